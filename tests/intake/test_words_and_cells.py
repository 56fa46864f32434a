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


def test_questions_are_read_as_the_headings_in_them(tmp_path: Path) -> None:
    rows = [
        ["Question", "Answer"],
        ["What is the maximum gain of the antenna in dBi?", "17.5"],
        ["Please state the horizontal 3 dB beamwidth", "65°"],
        ["What is the frequency range of the antenna?", "1710-2690 MHz"],
        ["How many RF ports does the antenna have?", "four"],
        ["How much does the antenna weigh without brackets?", "12 kg"],
    ]
    keys = ("gain", "horizontal_beamwidth", "operating_bands", "rf_ports", "weight")
    assert _lines(tmp_path, rows, *keys) == [
        "bid: B2 gain ≤17.5 dBi @1710-2690",
        "bid: B3 horizontal_beamwidth 65 deg @1710-2690",
        "bid: B4 operating_bands 1710..2690 MHz @1710-2690",
        "bid: B5 rf_ports 4",
        "bid: B6 weight 12 kg",
    ]


@pytest.mark.parametrize(
    ("question", "key"),
    [
        ("Wie hoch ist der Gewinn der Antenne?", "gain"),
        ("Veuillez indiquer l'ouverture horizontale à 3 dB", "horizontal_beamwidth"),
        ("¿Cuántos puertos tiene la antena?", "rf_ports"),
        ("Qual è il guadagno dell'antenna?", "gain"),
        ("Qual é o ganho da antena?", "gain"),
        ("Proszę podać szerokość wiązki w poziomie", "horizontal_beamwidth"),
        ("Hoeveel poorten heeft de antenne?", "rf_ports"),
    ],
)
def test_questions_in_other_languages(question: str, key: str) -> None:
    assert Labels({}).of(question).parameters == (key,)


def test_power_alone_has_two_meanings_unless_its_figure_says(tmp_path: Path) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], ["Power", "250 W"], ["Weight (kg)", 12]]
    submission = read(tmp_path, rows).submission
    assert [(u.where.cell, "of all ports" in u.suggestion) for u in submission.unread] == [("B3", True)]
    rows[2] = ["Power", "250 W per port"]
    assert _lines(tmp_path, rows, "max_power_per_port") == ["X-1: B3 max_power_per_port 250 W"]


@pytest.mark.parametrize(
    ("cell", "metres"),  # 12 inches a foot, 0.0254 m an inch (NIST SP 811)
    [("6' 2\"", 1.8796), ("1 ft 3 in", 0.381), ("74 3/8 in", 1.889125), ("6 ft.", 1.8288), ("6'", 1.8288)],
)
def test_feet_and_inches_are_one_length(tmp_path: Path, cell: str, metres: float) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], ["Height", cell], ["Weight (kg)", 12]]
    panel = read(tmp_path, rows).submission.panels[0]
    assert [r.value for r in panel.readings if r.parameter == "height"] == [pytest.approx(metres)]


def test_counts_in_words(tmp_path: Path) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], ["Columns", "zwei"], ["Rows", "twelve"]]
    rows += [["Connectors", "two 4.3-10 female"]]
    assert _lines(tmp_path, rows, "array_columns", "array_rows", "rf_ports") == [
        "X-1: B3 array_columns 2",
        "X-1: B4 array_rows 12",
        "X-1: B5 rf_ports 2",
    ]


def test_a_pair_of_letters_is_no_heading_among_values(tmp_path: Path) -> None:
    rows = [["Parameter", "X-1", "X-2"], ["Polarisation", "H/V", "V"], ["Gain (dBi)", 17, 16]]
    assert _lines(tmp_path, rows, "polarisations", "gain") == [
        "X-1: B2 polarisations 2",
        "X-1: B3 gain 17 dBi",
        "X-2: C2 polarisations 1",
        "X-2: C3 gain 16 dBi",
    ]


@pytest.mark.parametrize(
    ("first", "second"),
    [
        ("Frequency from (MHz)", "Frequency to (MHz)"),
        ("Start frequency", "Stop frequency"),
        ("f min", "f max"),
        ("Frequenz von", "Frequenz bis"),
    ],
)
def test_two_rows_of_band_edges_make_one_band(tmp_path: Path, first: str, second: str) -> None:
    rows: list[list[object]] = [["Parameter", "X-1"], [first, 1710], [second, 2170], ["Gain (dBi)", 17]]
    assert _lines(tmp_path, rows, "frequency_range", "gain") == [
        "X-1: B2 frequency_range 1710..2170 MHz",
        "X-1: B4 gain 17 dBi @1710-2170",
    ]


def test_one_edge_of_a_band_is_no_range(tmp_path: Path) -> None:
    rows = [["Parameter", "X-1"], ["Frequency from (MHz)", 1710], ["Gain (dBi)", 17], ["Weight (kg)", 12]]
    assert _lines(tmp_path, rows, "frequency_range", "operating_bands") == []
    assert [u.where.cell for u in read(tmp_path, rows).submission.unread] == ["B2"]


def test_an_upper_edge_under_to_beside_the_lower_one(tmp_path: Path) -> None:
    rows = [["Model", "Frequency from", "to", "Gain (dBi)"], ["A-1", 1710, 2170, 17.5], ["B-1", 790, 960, 15]]
    assert _lines(tmp_path, rows, "gain") == [
        "A-1: D2 gain 17.5 dBi @1710-2170",
        "B-1: D3 gain 15 dBi @790-960",
    ]


@pytest.mark.parametrize(
    "cell",
    [
        "W356 x H1998 x D115 mm",
        "1998 (H) x 356 (W) x 115 (D) mm",
        "H1998 W356 D115",
        "H: 1998, W: 356, D: 115 mm",
    ],
)
def test_letters_beside_three_sizes_name_the_sides(tmp_path: Path, cell: str) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], ["Dimensions (H x W x D)", cell], ["Weight (kg)", 12]]
    assert _lines(tmp_path, rows, "height", "width", "depth") == [
        "X-1: B3 depth 0.115 m",
        "X-1: B3 height 1.998 m",
        "X-1: B3 width 0.356 m",
    ]


def test_cross_polar_figures_at_an_angle_are_those_of_the_sector(tmp_path: Path) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], ["XPD", "0°: >20 dB, ±60°: >10 dB"], ["Weight (kg)", 12]]
    assert _lines(tmp_path, rows, "cross_polar_discrimination", "cross_polar_sector") == [
        "X-1: B3 cross_polar_discrimination ≥20 dB",
        "X-1: B3 cross_polar_sector ≥10 dB",
    ]


@pytest.mark.parametrize("cell", ["17,5 dBi (min. 17,0)", "17.5 typ, 17.0 min", "Min: 17.0 Typ: 17.5"])
def test_each_word_bounds_the_figure_it_stands_beside(tmp_path: Path, cell: str) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", cell], ["Weight (kg)", 12], ["Height (mm)", 1300]]
    assert _lines(tmp_path, rows, "gain") == ["X-1: B2 gain 17.5 dBi", "X-1: B2 gain ≥17 dBi"]


def test_the_order_of_intermodulation_is_no_second_figure(tmp_path: Path) -> None:
    rows = [
        ["Model", "X-1"],
        ["Gain (dBi)", 17],
        ["PIM", "< -150 dBc, 2 x 43 dBm, 3rd order"],
        ["Weight (kg)", 12],
    ]
    assert _lines(tmp_path, rows, "passive_intermodulation") == ["X-1: B3 passive_intermodulation ≤-150 dBc"]


@pytest.mark.parametrize(
    ("label", "key"),
    [
        ("Gain shall be not less than 17 dBi", "gain"),
        ("Vertical half-power beamwidth not exceeding 8°", "vertical_beamwidth"),
        ("VSWR shall not exceed 1.5", "vswr"),
        ("Weight shall not exceed 20 kg (without clamps)", "weight"),
        ("Gewinn mindestens 17 dBi", "gain"),
        ("Ganancia no menor de 17 dBi", "gain"),
        ("ROE ≤ 1,5:1", "vswr"),
        ("Gain: min. 17 dBi", "gain"),
    ],
)
def test_a_demand_in_the_label_says_nothing_of_the_offer(label: str, key: str) -> None:
    found = Labels({}).of(label)
    assert (found.parameters, found.sense) == ((key,), "nominal")


def test_lines_without_a_colon_belong_to_the_list_around_them(tmp_path: Path) -> None:
    rows = [
        ["Panel KX-12"],
        ["Gain: 17.2 dBi"],
        ["Vertical beamwidth - 7 deg"],
        ["VSWR < 1.5"],
        ["Weight 8.5 kg"],
    ]
    assert _lines(tmp_path, rows, "gain", "vertical_beamwidth", "vswr", "weight") == [
        "KX-12: A2 gain 17.2 dBi",
        "KX-12: A3 vertical_beamwidth 7 deg",
        "KX-12: A4 vswr ≤1.5",
        "KX-12: A5 weight 8.5 kg",
    ]


def test_a_list_may_have_no_colon_at_all(tmp_path: Path) -> None:
    rows = [["Panel KX-14"], ["Gain 17.2 dBi"], ["Isolation > 30 dB"], ["Dimensions 1310 x 155 x 80 mm"]]
    assert _lines(tmp_path, rows, "gain", "port_isolation", "height") == [
        "KX-14: A2 gain 17.2 dBi",
        "KX-14: A3 port_isolation ≥30 dB",
        "KX-14: A4 height 1.31 m",
    ]


def test_lines_in_one_cell_beside_a_group_word_are_read(tmp_path: Path) -> None:
    rows = [
        ["Item", "Data"],
        ["Model", "TR-6"],
        ["Electrical", "Gain: 17.2 dBi\nVSWR: < 1.5"],
        ["Weight", "8 kg"],
    ]
    assert _lines(tmp_path, rows, "gain", "vswr", "weight") == [
        "TR-6: B3 gain 17.2 dBi",
        "TR-6: B3 vswr ≤1.5",
        "TR-6: B4 weight 8 kg",
    ]


@pytest.mark.parametrize(
    "label", ["Dimensions (H x W x D), in", "H x W x D (in)", "Length x Width x Depth, in."]
)
def test_in_behind_a_size_is_a_unit(tmp_path: Path, label: str) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], [label, "68.1 x 24.3 x 5.5"], ["Weight (kg)", 12]]
    panel = read(tmp_path, rows).submission.panels[0]
    sizes = {r.parameter: r.value for r in panel.readings if r.parameter in ("height", "width", "depth")}
    # 0.0254 m an inch (NIST SP 811)
    assert sizes == {
        k: pytest.approx(v) for k, v in (("height", 1.72974), ("width", 0.61722), ("depth", 0.1397))
    }


def test_a_size_that_may_be_centimetres_or_inches_is_not_settled(tmp_path: Path) -> None:
    rows = [["Model", "X-1"], ["Gain (dBi)", 17], ["Height", 68.1], ["Weight (kg)", 12]]
    panel = read(tmp_path, rows).submission.panels[0]
    (height,) = [r for r in panel.readings if r.parameter == "height"]
    assert sorted(height.alternatives) == pytest.approx([0.681, 1.72974])


@pytest.mark.parametrize(
    ("heading", "unit", "sense"),
    [("USLS (First Lobe), dB, min.", "dB", "min"), ("PIM, 3rd Order, 2 x 20 W, dBc, max.", "dBc", "max")],
)
def test_a_unit_before_a_bound(heading: str, unit: str, sense: str) -> None:
    found = Labels({}).of(heading)
    assert (found.unit, found.sense, len(found.parameters)) == (unit, sense, 1)


def test_a_figure_with_a_unit_is_no_pure_number(tmp_path: Path) -> None:
    rows = [["Parameter", "V-1"], ["VSWR", "14 dB"], ["Rows", "12 mm"], ["Columns", 4], ["Gain (dBi)", 17]]
    submission = read(tmp_path, rows).submission
    assert [r.parameter for r in submission.panels[0].readings] == ["array_columns", "gain"]
    assert [u.where.cell for u in submission.unread] == ["B2", "B3"]
