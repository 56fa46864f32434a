"""Bids in which one guess of the layout would go wrong: what hangs together is read, what does not is named.

Expectations by hand: what an engineer reads in such a sheet.
"""

from __future__ import annotations

from pathlib import Path

import pytest
from intake.sheets import Rows, lines, read

from speccheck.intake.tables.no_names import never_a_name

_ = None

SHEETS: dict[str, tuple[Rows, str]] = {
    "blocks of panels below one another, 'Model' in the corner of each": (
        [
            [_, "Model", "BR-31", "BR-32"],
            ["RF", "Band, MHz", "694-862", "790-960"],
            [_, "Gain, dBi", 14.4, 17],
            [],
            [_, "Model", "BR-33", "BR-34"],
            ["RF", "Band, MHz", "1710-1880", "1710-2170"],
            [_, "Gain, dBi", 16.1, 13.6],
        ],
        """BR-31: C2 frequency_range 694..862 MHz
        BR-31: C2 operating_bands 694..862 MHz @694-862
        BR-31: C3 gain 14.4 dBi @694-862
        BR-32: D2 frequency_range 790..960 MHz
        BR-32: D2 operating_bands 790..960 MHz @790-960
        BR-32: D3 gain 17 dBi @790-960
        BR-33: C6 frequency_range 1710..1880 MHz
        BR-33: C6 operating_bands 1710..1880 MHz @1710-1880
        BR-33: C7 gain 16.1 dBi @1710-1880
        BR-34: D6 frequency_range 1710..2170 MHz
        BR-34: D6 operating_bands 1710..2170 MHz @1710-2170
        BR-34: D7 gain 13.6 dBi @1710-2170""",
    ),
    "labels in two languages, the first under a word that may head names": (
        [
            ["Modèle / Model", _, "PL-36"],
            [],
            ["N°", "Désignation", "Description", "Valeur / Value", "Unité / Unit"],
            [1, "Gain", "Gain", "16,1", "dBi"],
            [2, "Hauteur", "Height", "0,745", "m"],
            [3, "Masse", "Weight", "11,8", "kg"],
        ],
        """PL-36: C1 model PL-36
        PL-36: D4 gain 16.1 dBi
        PL-36: D5 height 0.745 m
        PL-36: D6 weight 11.8 kg""",
    ),
    "issue and date above the right one of two tables": (
        [
            ["Model: QR-8X65", _, _, "Spec sheet rev. 4, 2026-02-11"],
            [],
            ["Gain, dBi", 17.2, _, "Height", "1999 mm"],
            ["VSWR", 1.5, _, "Width", "356 mm"],
            ["Isolation, dB", 28, _, "Weight", "31 kg"],
        ],
        """QR-8X65: B3 gain 17.2 dBi
        QR-8X65: B4 vswr 1.5
        QR-8X65: B5 port_isolation 28 dB
        QR-8X65: E3 height 1.999 m
        QR-8X65: E4 width 0.356 m
        QR-8X65: E5 weight 31 kg""",
    ),
}


@pytest.mark.parametrize("name", SHEETS)
def test_sheets(name: str, tmp_path: Path) -> None:
    rows, expected = SHEETS[name]
    assert sorted(lines(read(tmp_path, rows))) == sorted(line.strip() for line in expected.splitlines())


@pytest.mark.parametrize(
    "text",
    ["Rev. 4, 2026-02-11", "12.03.2026", "11 Feb 2026", "Ausgabe C", "50 ohm", "17,5", "65°", "Désignation",
     "Guaranteed min", "R1", "1710-2170 MHz", "Datasheets", "Nordlicht GmbH", "Electrical data"],
)  # fmt: skip
def test_never_names(text: str) -> None:
    assert never_a_name(text)


@pytest.mark.parametrize(
    "text",
    ["KD-65", "NORDA 65-12", "742 215", "80010123", "Panel 1", "Panel A", "Helion 64T64R", "12S"],
)
def test_names(text: str) -> None:
    assert not never_a_name(text)
