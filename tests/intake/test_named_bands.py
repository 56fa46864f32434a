"""Names of standard bands say what is supported; figures hold for the ranges given in megahertz."""

from __future__ import annotations

from pathlib import Path

import openpyxl

from speccheck.intake import read_submission
from speccheck.records import Panel


def _panel(tmp_path: Path, frequency: str, named: str) -> Panel:
    book = openpyxl.Workbook()
    sheet = book.active
    for row in (
        ("Parameter", "Unit", "Value"),
        ("Frequency range", "MHz", frequency),
        ("3GPP bands", "", named),
        ("Gain", "dBi", 24.5),
        ("Azimuth beamwidth", "°", 12.8),
    ):
        sheet.append(row)
    path = tmp_path / "bid.xlsx"
    book.save(path)
    return read_submission(path).panels[0]


def test_a_wider_named_band_is_no_band_of_its_own(tmp_path: Path) -> None:
    # n78 is 3300 to 3800 MHz (3GPP TS 38.104 Table 5.2-1)
    panel = _panel(tmp_path, "3400-3600", "n78")
    assert panel.bands == ((3400.0, 3600.0),)
    named = [r for r in panel.readings if r.raw == "n78"]
    assert [(r.parameter, r.value, r.band) for r in named] == [("operating_bands", (3300.0, 3800.0), None)]


def test_without_megahertz_the_named_band_is_the_band(tmp_path: Path) -> None:
    assert _panel(tmp_path, "n78", "n78").bands == ((3300.0, 3800.0),)


def test_ranges_below_band_names_say_which_part_is_meant(tmp_path: Path) -> None:
    # n77 is 3300 to 4200 MHz, n78 3300 to 3800 MHz, n41 2496 to 2690 MHz (3GPP TS 38.104 Table 5.2-1)
    book = openpyxl.Workbook()
    for row in (
        ("Parameter", "Unit", "n77", "n78", "n41"),
        ("Frequency range", "MHz", "3700-3980", "3400-3700", None),
        ("Gain", "dBi", 24, 24.5, 23),
    ):
        book.active.append(row)
    book.save(tmp_path / "bid.xlsx")
    panel = read_submission(tmp_path / "bid.xlsx").panels[0]
    gains = {r.value: r.band for r in panel.readings if r.parameter == "gain"}
    assert gains == {24.0: (3700.0, 3980.0), 24.5: (3400.0, 3700.0), 23.0: (2496.0, 2690.0)}
