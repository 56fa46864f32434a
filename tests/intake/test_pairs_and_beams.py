"""Rows with several bands side by side, and rows that are beams of one panel; written down by hand."""

from __future__ import annotations

from pathlib import Path

import pytest

from tests.intake.sheets import Rows, line, read


def _lines(path: Path, rows: Rows, *keys: str) -> list[str]:
    panels = read(path, rows).submission.panels
    return sorted(line(p.name, r) for p in panels for r in p.readings if r.parameter in keys)


@pytest.mark.parametrize(
    "headings",
    [
        ("Band 1 MHz", "Gain 1 dBi", "Band 2 MHz", "Gain 2 dBi"),
        ("Band 1 (MHz)", "Gain band 1 (dBi)", "Band 2 (MHz)", "Gain band 2 (dBi)"),
        ("Frequency band A, MHz", "Gain A, dBi", "Frequency band B, MHz", "Gain B, dBi"),
        ("Frequency (MHz)", "Gain (dBi)", "Frequency (MHz)", "Gain (dBi)"),
        ("Frequenzband 1 [MHz]", "Gewinn 1 [dBi]", "Frequenzband 2 [MHz]", "Gewinn 2 [dBi]"),
        ("Low band (MHz)", "Low band gain (dBi)", "High band (MHz)", "High band gain (dBi)"),
        ("LB (MHz)", "LB gain (dBi)", "HB (MHz)", "HB gain (dBi)"),
        ("Bande 1 (MHz)", "Gain 1 (dBi)", "Bande 2 (MHz)", "Gain 2 (dBi)"),
    ],
)
def test_a_figure_has_the_band_of_its_pair(tmp_path: Path, headings: tuple[str, ...]) -> None:
    rows = [
        ["Model", *headings, "Weight (kg)"],
        ["DX-1", "694-960", 15.1, "1695-2690", 17.8, 20],
        ["DX-2", "698-894", 16.1, "1710-2170", 18.1, 22],
    ]
    assert _lines(tmp_path, rows, "gain", "weight", "operating_bands") == [
        "DX-1: B2 operating_bands 694..960 MHz @694-960",
        "DX-1: C2 gain 15.1 dBi @694-960",
        "DX-1: D2 operating_bands 1695..2690 MHz @1695-2690",
        "DX-1: E2 gain 17.8 dBi @1695-2690",
        "DX-1: F2 weight 20 kg",
        "DX-2: B3 operating_bands 698..894 MHz @698-894",
        "DX-2: C3 gain 16.1 dBi @698-894",
        "DX-2: D3 operating_bands 1710..2170 MHz @1710-2170",
        "DX-2: E3 gain 18.1 dBi @1710-2170",
        "DX-2: F3 weight 22 kg",
    ]


def test_a_family_merged_down_is_that_of_each_of_its_panels(tmp_path: Path) -> None:
    rows = [
        ["Family", "Model", "Frequency (MHz)", "Gain (dBi)"],
        ["Tor", "WT-04", "694-960", 15.1],
        [None, "WT-06", "694-960", 16.1],
        ["Fell", "WF-05", "1710-2170", 17.1],
        [None, "WF-06", "1710-2170", 17.5],
    ]
    book = read(tmp_path, rows, merges=["A2:A3", "A4:A5"])
    told = [
        (p.name, r.value) for p in book.submission.panels for r in p.readings if r.parameter == "panel_type"
    ]
    assert told == [("WT-04", "Tor"), ("WT-06", "Tor"), ("WF-05", "Fell"), ("WF-06", "Fell")]
    alone = read(tmp_path, rows).submission.panels
    assert [r for p in alone for r in p.readings if r.parameter == "panel_type"] == []


def test_a_symbol_and_the_unit_below_or_beside_it_name_a_parameter(tmp_path: Path) -> None:
    across = [["Model", "Band", "G", "VSWR"], [None, "MHz", "dBi", None], ["KD-1", "1710-2170", 18.7, 1.4]]
    assert _lines(tmp_path, across, "gain") == ["KD-1: C3 gain 18.7 dBi @1710-2170"]
    down = [
        ["Parameter", "Unit", "Value"],
        ["Model", None, "KD-1"],
        ["G", "dBi", 17.5],
        ["G", "dB", 3],
        ["VSWR", "", 1.4],
    ]
    assert _lines(tmp_path, down, "gain") == ["KD-1: C3 gain 17.5 dBi"]


def test_bands_before_all_figures_are_told_by_their_names(tmp_path: Path) -> None:
    headings = ["Low band (MHz)", "High band (MHz)", "Gain low band (dBi)", "Gain high band (dBi)", "VSWR"]
    rows = [["Model", *headings], ["DX-1", "694-960", "1695-2690", 15, 17.5, 1.5]]
    assert _lines(tmp_path, [*rows, ["DX-2", "698-960", "1710-2690", 16, 18.5, 1.4]], "gain", "vswr") == [
        "DX-1: D2 gain 15 dBi @694-960",
        "DX-1: E2 gain 17.5 dBi @1695-2690",
        "DX-1: F2 vswr 1.5",
        "DX-2: D3 gain 16 dBi @698-960",
        "DX-2: E3 gain 18.5 dBi @1710-2690",
        "DX-2: F3 vswr 1.4",
    ]


def test_bands_of_both_directions_hold_for_all_figures(tmp_path: Path) -> None:
    rows = [
        ["Model", "Tx band (MHz)", "Rx band (MHz)", "Gain (dBi)"],
        ["KD-1", "1805-1880", "1710-1785", 17.5],
        ["KD-2", "925-960", "880-915", 16.5],
    ]
    assert _lines(tmp_path, rows, "gain", "operating_bands", "frequency_range") == [
        "KD-1: B2 operating_bands 1805..1880 MHz @1805-1880",
        "KD-1: C2 operating_bands 1710..1785 MHz @1710-1785",
        "KD-1: D2 gain 17.5 dBi",
        "KD-2: B3 operating_bands 925..960 MHz @925-960",
        "KD-2: C3 operating_bands 880..915 MHz @880-915",
        "KD-2: D3 gain 16.5 dBi",
    ]


def test_three_bands_over_units_one_of_them_empty(tmp_path: Path) -> None:
    rows = [
        ["Model", "Band 1", "Gain 1", "Band 2", "Gain 2", "Band 3", "Gain 3", "Ports"],
        ["", "MHz", "dBi", "MHz", "dBi", "MHz", "dBi", ""],
        ["TX-1", "694-960", 15, "1427-1518", 16.5, "1695-2690", 17.5, 6],
        ["TX-2", "694-960", 16, "–", "–", "1695-2690", 18.5, 4],
    ]
    assert _lines(tmp_path, rows, "gain", "rf_ports") == [
        "TX-1: C3 gain 15 dBi @694-960",
        "TX-1: E3 gain 16.5 dBi @1427-1518",
        "TX-1: G3 gain 17.5 dBi @1695-2690",
        "TX-1: H3 rf_ports 6",
        "TX-2: C4 gain 16 dBi @694-960",
        "TX-2: G4 gain 18.5 dBi @1695-2690",
        "TX-2: H4 rf_ports 4",
    ]


BEAMS = [["Broadcast beam", 17.5, 65], ["Traffic beam", 24.5, 12], ["Service beam, edge", 22.5, 14]]
HEADINGS = ["Gain (dBi)", "HPBW H (°)"]
KEYS = ("gain", "broadcast_gain", "horizontal_beamwidth", "broadcast_horizontal_beamwidth")


def test_rows_that_are_beams_are_of_one_panel(tmp_path: Path) -> None:
    rows = [["Model: SX64-35"], ["Frequency range: 3300-3800 MHz"], [], ["Beam", *HEADINGS], *BEAMS]
    assert _lines(tmp_path, rows, *KEYS) == [
        "SX64-35: B5 broadcast_gain 17.5 dBi @3300-3800",
        "SX64-35: B6 gain 24.5 dBi @3300-3800",
        "SX64-35: B7 gain 22.5 dBi @3300-3800",
        "SX64-35: C5 broadcast_horizontal_beamwidth 65 deg @3300-3800",
        "SX64-35: C6 horizontal_beamwidth 12 deg @3300-3800",
        "SX64-35: C7 horizontal_beamwidth 14 deg @3300-3800",
    ]
    (panel,) = read(tmp_path, rows).submission.panels
    assert {r.condition for r in panel.readings if r.parameter == "gain"} == {
        "Traffic beam",
        "Service beam, edge",
    }


def test_rows_of_a_panel_and_beam_make_one_panel_each(tmp_path: Path) -> None:
    rows = [
        ["Model", "Frequency (MHz)", "Beam", "Gain (dBi)", "Weight (kg)"],
        ["SX-1", "3300-3800", "SSB", 17.5, 40],
        ["SX-1", "3300-3800", "Traffic (max. gain)", 24.5, 40],
        ["SX-2", "3400-3800", "SSB", 16.5, 30],
        ["SX-2", "3400-3800", "Traffic (max. gain)", 23.5, 30],
    ]
    assert _lines(tmp_path, rows, "gain", "broadcast_gain") == [
        "SX-1: D2 broadcast_gain 17.5 dBi @3300-3800",
        "SX-1: D3 gain 24.5 dBi @3300-3800",
        "SX-2: D4 broadcast_gain 16.5 dBi @3400-3800",
        "SX-2: D5 gain 23.5 dBi @3400-3800",
    ]


def test_columns_that_are_beams_are_of_one_panel(tmp_path: Path) -> None:
    rows = [
        ["Model", "", "SX64-35"],
        ["Frequency range", "MHz", "3300-3800"],
        ["Parameter", "Unit", "Broadcast beam", "Traffic beam"],
        ["Gain", "dBi", 17.5, 24.5],
        ["HPBW horizontal", "°", 65, 12],
        ["VSWR", "", 1.5, 1.5],
    ]
    assert _lines(tmp_path, rows, *KEYS) == [
        "SX64-35: C4 broadcast_gain 17.5 dBi @3300-3800",
        "SX64-35: C5 broadcast_horizontal_beamwidth 65 deg @3300-3800",
        "SX64-35: D4 gain 24.5 dBi @3300-3800",
        "SX64-35: D5 horizontal_beamwidth 12 deg @3300-3800",
    ]


def test_numbers_of_beams_down_the_side_stay_counts(tmp_path: Path) -> None:
    rows = [
        ["Model", "SX-1"],
        ["Gain (dBi)", 24.5],
        ["Broadcast beams", 8],
        ["Traffic beams", 64],
        ["VSWR", 1.5],
    ]
    assert _lines(tmp_path, rows, "beam_count") == ["SX-1: B3 beam_count 8", "SX-1: B4 beam_count 64"]


def test_a_beam_alone_in_its_row_is_that_of_the_rows_below(tmp_path: Path) -> None:
    figures = [[["Gain (dBi)", gain], ["HPBW H (°)", width]] for gain, width in ((17.5, 65), (24.5, 12))]
    rows = [["Model", "SX-64"], ["Frequency range", "3300-3800 MHz"]]
    rows += [
        ["Broadcast beam"],
        *figures[0],
        ["Traffic beam"],
        *figures[1],
        ["Mechanical"],
        ["Weight (kg)", 40],
    ]
    assert _lines(tmp_path, rows, *KEYS, "weight") == [
        "SX-64: B10 weight 40 kg",
        "SX-64: B4 broadcast_gain 17.5 dBi @3300-3800",
        "SX-64: B5 broadcast_horizontal_beamwidth 65 deg @3300-3800",
        "SX-64: B7 gain 24.5 dBi @3300-3800",
        "SX-64: B8 horizontal_beamwidth 12 deg @3300-3800",
    ]
