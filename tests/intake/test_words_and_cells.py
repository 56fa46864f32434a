"""Wordings and cells of bids by makers of several countries; readings written by hand (common practice)."""

from __future__ import annotations

from pathlib import Path

import pytest

from speccheck.intake.tables.labels import Labels
from tests.intake.sheets import Rows, line, read


def _lines(path: Path, rows: Rows, *keys: str) -> list[str]:
    submission = read(path, rows).submission
    shown = [line(p.name, r) for p in submission.panels for r in p.readings if r.parameter in keys]
    return sorted(shown)


@pytest.mark.parametrize(
    ("heading", "key"),
    [
        ("Max. Windgeschwindigkeit / Max. wind velocity", "survival_wind_speed"),
        ("Welligkeit (VSWR)", "vswr"),
        ("Belastbarkeit je Tor, max. / Max. power per port", "max_power_per_port"),
        ("Intermodulación pasiva (2 x 43 dBm) / PIM", "passive_intermodulation"),
        ("Gain / förstärkning", "gain"),
        ("Max. power per port / W", "max_power_per_port"),
        ("Frequency band / MHz", "operating_bands"),
    ],
)
def test_a_name_given_twice_is_one_name(heading: str, key: str) -> None:
    assert Labels({}).of(heading).parameters == (key,)


@pytest.mark.parametrize(
    "heading", ["Gain / gain flatness", "Gain / ripple", "Power / W", "Gain / variation"]
)
def test_a_second_half_that_may_change_the_first_is_not_dropped(heading: str) -> None:
    assert Labels({}).of(heading).parameters == ()


@pytest.mark.parametrize("separator", [" | ", "/", " / "])
def test_three_sides_in_one_label_part_three_figures(tmp_path: Path, separator: str) -> None:
    label = f"Wind load at 150 km/h ({separator.join(('frontal', 'lateral', 'rearside'))})"
    rows = [["Model", "HX-10"], ["Gain (dBi)", 16], [label, "745 | 265 | 790 N"], ["Weight (kg)", 30]]
    assert _lines(tmp_path, rows, "wind_load", "wind_load_lateral", "wind_load_rear") == [
        "HX-10: B3 wind_load 745 N",
        "HX-10: B3 wind_load_lateral 265 N",
        "HX-10: B3 wind_load_rear 790 N",
    ]


@pytest.mark.parametrize("cell", ["192 elements (12x8x2)", "192 (12 x 8 x 2)"])
def test_a_count_with_its_factors_under_a_heading_of_the_factors(tmp_path: Path, cell: str) -> None:
    rows = [["Model", "OR-64"], ["Gain (dBi)", 25]]
    rows += [["Antenna elements (rows x columns x polarisations)", cell], ["Weight (kg)", 33]]
    keys = ("element_count", "array_rows", "array_columns", "polarisations")
    assert _lines(tmp_path, rows, *keys) == [
        "OR-64: B3 array_columns 8",
        "OR-64: B3 array_rows 12",
        "OR-64: B3 element_count 192",
        "OR-64: B3 polarisations 2",
    ]


def test_a_list_follows_the_order_of_the_bands_stated(tmp_path: Path) -> None:
    rows = [
        ["Parameter", "Unit", "SV-0810"],
        ["Frequency sub-bands", "MHz", "698-806 / 791-862 / 880-960"],
        ["Gain per sub-band", "dBi", "14.3 / 14.7 / 15.0"],
        ["Gain, 880-960 MHz, by tilt", "dBi", "0°/5°/10°: 15.1/15.0/14.7"],
        ["HPBW azimuth per sub-band", "°", "69 / 67 / 65"],
    ]
    assert _lines(tmp_path, rows, "gain", "horizontal_beamwidth") == [
        "SV-0810: C3 gain 14.3 dBi @698-806",
        "SV-0810: C3 gain 14.7 dBi @791-862",
        "SV-0810: C3 gain 15 dBi @880-960",
        "SV-0810: C4 gain 14.7 dBi @880-960",
        "SV-0810: C4 gain 15 dBi @880-960",
        "SV-0810: C4 gain 15.1 dBi @880-960",
        "SV-0810: C5 horizontal_beamwidth 65 deg @880-960",
        "SV-0810: C5 horizontal_beamwidth 67 deg @791-862",
        "SV-0810: C5 horizontal_beamwidth 69 deg @698-806",
    ]


@pytest.mark.parametrize("value", [4.1, "4,1 kg"])
def test_a_mounting_kit_in_kilograms_is_a_weight(tmp_path: Path, value: object) -> None:
    rows = [["Model", "IL-8"], ["Gain (dBi)", 16], ["Weight (kg)", 19.6], ["Mounting kit (kg)", value]]
    assert _lines(tmp_path, rows, "mounting_kit", "mounting_kit_weight") == [
        "IL-8: B4 mounting_kit_weight 4.1 kg"
    ]


def test_broadcast_beams_are_kept_apart_from_traffic_beams(tmp_path: Path) -> None:
    rows = [
        ["Model", "TP-64"],
        ["Frequency (MHz)", "3400-3800"],
        ["Gain, traffic beam (dBi)", 25],
        ["Gain, broadcast beam (dBi)", 17],
        ["SSB beam gain (dBi)", 18],
        ["Horizontal beamwidth, traffic beam (°)", 12.5],
        ["Horizontal beamwidth, broadcast beam (°)", 65],
        ["Vertical beamwidth, broadcast beam (°)", 7],
        ["EIRP (broadcast) (dBm)", 71],
    ]
    keys = ("gain", "horizontal_beamwidth", "vertical_beamwidth", "eirp", "broadcast_gain", "broadcast_eirp")
    assert _lines(tmp_path, rows, *keys) == [
        "TP-64: B3 gain 25 dBi @3400-3800",
        "TP-64: B4 broadcast_gain 17 dBi @3400-3800",
        "TP-64: B5 broadcast_gain 18 dBi @3400-3800",
        "TP-64: B6 horizontal_beamwidth 12.5 deg @3400-3800",
        "TP-64: B8 vertical_beamwidth 7 deg @3400-3800",
        "TP-64: B9 broadcast_eirp 71 dBm @3400-3800",
    ]


def test_the_spacing_beside_that_of_the_columns_is_along_them(tmp_path: Path) -> None:
    rows = [
        ["Model", "IL-36"],
        ["Gain (dBi)", 16],
        ["Column distance", "43.5 mm"],
        ["Radiator distance", "62 mm"],
    ]
    assert _lines(
        tmp_path, rows, "horizontal_element_spacing", "vertical_element_spacing", "element_spacing"
    ) == [
        "IL-36: B3 horizontal_element_spacing 0.0435 m",
        "IL-36: B4 vertical_element_spacing 0.062 m",
    ]


@pytest.mark.parametrize(
    "cell", ["H and V", "H/V", "vertical und horizontal", "HP/VP", "orizzontale e verticale"]
)
def test_two_polarisations_in_words(tmp_path: Path, cell: str) -> None:
    rows = [["Parameter", "MW26"], ["Gain (dBi)", 26], ["Polarisation", cell], ["Weight (kg)", 11]]
    assert [entry[-1] for entry in _lines(tmp_path, rows, "polarisations")] == ["2"]
