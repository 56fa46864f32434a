"""Bids in which one guess of the layout would go wrong: what hangs together is read, what does not is named.

Expectations by hand: what an engineer reads in such a sheet.
"""

from __future__ import annotations

from pathlib import Path

import pytest
from intake.sheets import Rows, lines, read

from speccheck.intake.files.grid import Grid
from speccheck.intake.tables.claims import SheetResult
from speccheck.intake.tables.labels import Labels
from speccheck.intake.tables.marking import mark
from speccheck.intake.tables.names.refused import never_a_name
from speccheck.intake.tables.second_look import most_coherent

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
    "words over the columns that come again name no panel": (
        [
            ["Parameter", "KD-1", "KD-2", "KD-3"],
            ["Status", "in production", "prototype", "in production"],
            ["Gain (dBi)", 15, 16, 17],
            ["Weight (kg)", 11, 12, 9],
        ],
        """KD-1: B3 gain 15 dBi
        KD-1: B4 weight 11 kg
        KD-2: C3 gain 16 dBi
        KD-2: C4 weight 12 kg
        KD-3: D3 gain 17 dBi
        KD-3: D4 weight 9 kg""",
    ),
    "a line between title and table, all of words that say what a column is for": (
        [
            ["Model", "KD-9"],
            ["Requirement", "Guaranteed min", "Guaranteed typ", "Unit"],
            ["Gain", 16.5, 17, "dBi"],
            ["Isolation", 28, 30, "dB"],
        ],
        """KD-9: B1 model KD-9
        KD-9: B3 gain ≥16.5 dBi
        KD-9: C3 gain 17 dBi
        KD-9: B4 port_isolation ≥28 dB
        KD-9: C4 port_isolation 30 dB""",
    ),
    "remarks scribbled beside the figures, in a column without a heading": (
        [
            ["Parameter", "KD-9"],
            ["Gain (dBi)", 17, "typical of 3 samples"],
            ["VSWR", 1.5],
            ["Front-to-back ratio (dB)", 25, "measured 2025-11-03"],
        ],
        """KD-9: B2 gain 17 dBi
        KD-9: B3 vswr 1.5
        KD-9: B4 front_to_back_ratio 25 dB""",
    ),
    "bands over the columns in words of a value": (
        [
            ["Characteristic", "Value at 1710-1880 MHz", "Value at 1920-2170 MHz"],
            ["Gain (dBi)", 17, 17.6],
        ],
        """bid: B1 operating_bands 1710..1880 MHz @1710-1880
        bid: C1 operating_bands 1920..2170 MHz @1920-2170
        bid: B2 gain 17 dBi @1710-1880
        bid: C2 gain 17.6 dBi @1920-2170""",
    ),
    "names over the first of a panel's bands only, as merged cells come out of other formats": (
        [
            ["Parameter", "NR-1", _, "NR-2", _],
            ["Band, MHz", "698-960", "1710-2690", "698-960", "1710-2690"],
            ["Gain, dBi", 13, 18, 14, 19],
        ],
        """NR-1: B2 operating_bands 698..960 MHz @698-960
        NR-1: C2 operating_bands 1710..2690 MHz @1710-2690
        NR-1: B3 gain 13 dBi @698-960
        NR-1: C3 gain 18 dBi @1710-2690
        NR-2: D2 operating_bands 698..960 MHz @698-960
        NR-2: E2 operating_bands 1710..2690 MHz @1710-2690
        NR-2: D3 gain 14 dBi @698-960
        NR-2: E3 gain 19 dBi @1710-2690""",
    ),
    "headings over several columns without merges: a new group ends the band before it": (
        [
            ["Type", "Low band", _, "High band", _, "Connection", _],
            [_, "694-960 MHz", _, "1710-2690 MHz", _, _, _],
            [_, "Gain", "HPBW H", "Gain", "HPBW H", "Isolation", "Weight"],
            [_, "dBi", "°", "dBi", "°", "dB", "kg"],
            ["SA-1", 14, 65, 17, 62, 28, 20],
            ["SA-2", 15, 66, 18, 63, 28, 25],
        ],
        """SA-1: B5 gain 14 dBi @694-960
        SA-1: C5 horizontal_beamwidth 65 deg @694-960
        SA-1: D5 gain 17 dBi @1710-2690
        SA-1: E5 horizontal_beamwidth 62 deg @1710-2690
        SA-1: F5 port_isolation 28 dB
        SA-1: G5 weight 20 kg
        SA-2: B6 gain 15 dBi @694-960
        SA-2: C6 horizontal_beamwidth 66 deg @694-960
        SA-2: D6 gain 18 dBi @1710-2690
        SA-2: E6 horizontal_beamwidth 63 deg @1710-2690
        SA-2: F6 port_isolation 28 dB
        SA-2: G6 weight 25 kg""",
    ),
    "panels across that only a row of part numbers names": (
        [
            ["Part no.", "WT-0465", "WT-0665"],
            ["Gain (dBi)", 14.3, 16.1],
            ["Weight (kg)", 11, 12],
        ],
        """WT-0465: B1 part_number WT-0465
        WT-0465: B2 gain 14.3 dBi
        WT-0465: B3 weight 11 kg
        WT-0665: C1 part_number WT-0665
        WT-0665: C2 gain 16.1 dBi
        WT-0665: C3 weight 12 kg""",
    ),
    "arrays over the columns, 'Array' in the corner": (
        [
            ["NW-8P"],
            ["Array", "R1", "Y1", "Y2"],
            ["Frequency (MHz)", "694-960", "1695-2690", "1695-2690"],
            ["Gain (dBi)", 15, 17, 17.2],
        ],
        """NW-8P: B3 operating_bands 694..960 MHz @694-960
        NW-8P: C3 operating_bands 1695..2690 MHz @1695-2690
        NW-8P: D3 operating_bands 1695..2690 MHz @1695-2690
        NW-8P: B4 gain 15 dBi @694-960
        NW-8P: C4 gain 17 dBi @1695-2690
        NW-8P: D4 gain 17.2 dBi @1695-2690""",
    ),
    "a block for each band, named in the corner of its heading row": (
        [
            ["Model KD-40"],
            ["Low band", "Value"],
            ["Frequency range (MHz)", "694-960"],
            ["Gain (dBi)", 15],
            [],
            ["High band", "Value"],
            ["Frequency range (MHz)", "1710-2690"],
            ["Gain (dBi)", 17.5],
        ],
        """KD-40: B3 operating_bands 694..960 MHz @694-960
        KD-40: B4 gain 15 dBi @694-960
        KD-40: B7 operating_bands 1710..2690 MHz @1710-2690
        KD-40: B8 gain 17.5 dBi @1710-2690""",
    ),
}


def test_what_does_not_hang_together_is_shown_as_doubt_with_its_cells(tmp_path: Path) -> None:
    rows = [["Gain (dBi)", 15, 16], ["VSWR", 1.4, 1.5], ["Weight (kg)", 11, 12]]
    account = read(tmp_path, rows)
    assert [line for line in lines(account) if not line.endswith("?")] == []
    (notice,) = [n.text for n in account.submission.notices if "layout" in n.text]
    assert "A1" not in notice and all(cell in notice for cell in ("B1", "C1", "B2", "C2", "B3", "C3"))


def test_figures_that_cannot_belong_to_their_headings_are_listed_not_read(tmp_path: Path) -> None:
    headings = ["Gain (dBi)", "VSWR", "Weight (kg)", "Height (mm)"]
    rows = [headings, ["NW-1", 15, 1.5, 11, 1400], ["NW-2", 16, 1.4, 12, 1500]]
    account = read(tmp_path, rows)
    assert not any(
        r.parameter in ("gain", "vswr", "height") for p in account.submission.panels for r in p.readings
    )
    assert {"A2", "B2", "D2", "A3", "B3", "D3"} <= {item.where.cell for item in account.submission.unread}


def test_a_note_above_a_list_of_panels_is_no_panel_of_its_own(tmp_path: Path) -> None:
    headings = ["Model", "Gain (dBi)", "VSWR", "Weight (kg)", "Height (mm)", "Width (mm)", "Isolation (dB)"]
    rows = [["Nordlicht: overview"], ["Gain: boresight, all columns in phase"], [], headings]
    rows += [[f"NW-{n}", 15 + n, 1.5, 11, 1400, 200, 28] for n in (1, 2, 3)]
    assert [panel.name for panel in read(tmp_path, rows).submission.panels] == ["NW-1", "NW-2", "NW-3"]


def test_a_reading_that_loses_the_figures_is_no_better_one(tmp_path: Path) -> None:
    headings = ["Model", "Gain (dBi)", "Gain (dBi)", "VSWR", "VSWR", "Weight (kg)"]
    rows = [headings, *([f"KD-{n}", 15, 15.5, 1.5, 1.4, 12] for n in range(4))]
    found = lines(read(tmp_path, rows))
    assert "KD-0: B2 gain 15 dBi ?" in found and "KD-0: F2 weight 12 kg" in found and len(found) == 20


def test_a_sheet_that_hangs_together_is_walked_once() -> None:
    marks, walks = mark(Grid("Sheet1"), Labels({})), []
    assert most_coherent(marks, lambda way: walks.append(way) or SheetResult(way.grid)).doubts == []
    assert len(walks) == 1


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
