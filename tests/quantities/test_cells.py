"""Cells as bidders write them; each reading was written down by hand as an engineer reads it."""

from __future__ import annotations

from datetime import date

import pytest

from speccheck.quantities import CellContent, read_cell


def one(
    text: object, kind: str = "number", expected: str | None = None, **more: object
) -> tuple[object, ...]:
    """Value, unit, tolerance and sense of the only quantity of a cell."""
    content = read_cell(text, kind=kind, expected=expected, **more)  # type: ignore[arg-type]
    (found,) = content.quantities
    return found.value, found.unit, found.tolerance, found.sense


@pytest.mark.parametrize(
    ("text", "reading"),
    [
        ("17.5 ± 0.5 dBi", (17.5, "dBi", 0.5, "nominal")),
        ("17,5", (17.5, "", None, "nominal")),
        ("≥ 25", (25.0, "", None, "min")),
        ("> 25 dB", (25.0, "dB", None, "min")),
        (">= 25 dB", (25.0, "dB", None, "min")),
        ("=> 17", (17.0, "", None, "min")),
        ("< 1.5:1", (1.5, "", None, "max")),
        ("1:1.5", (1.5, "", None, "nominal")),
        ("1.5 max", (1.5, "", None, "max")),
        ("min. 18.5 dB", (18.5, "dB", None, "min")),
        ("300 W max.", (300.0, "W", None, "max")),
        ("17+", (17.0, "", None, "min")),
        ("mindestens 17 dBi", (17.0, "dBi", None, "min")),
        ("jusqu'à 300 W", (300.0, "W", None, "max")),
        ("co najmniej 25 dB", (25.0, "dB", None, "min")),
        ("up to 25 kg", (25.0, "kg", None, "max")),
        ("65° ± 5", (65.0, "deg", 5.0, "nominal")),
        ("65 +/- 5 deg", (65.0, "deg", 5.0, "nominal")),
        ("65° (±5°)", (65.0, "deg", 5.0, "nominal")),
        ("17 +0.5/-0.3 dBi", (17.0, "dBi", 0.5, "nominal")),
        ("0.65λ", (0.65, "λ", None, "nominal")),
        ("105,0\u00a0mm", (105.0, "mm", None, "nominal")),
        ("2\u202f120\u00a0mm", (2120.0, "mm", None, "nominal")),
        ("1'998 mm", (1998.0, "mm", None, "nominal")),
        ("1.998 m", (1.998, "m", None, "nominal")),
        ("54.7″", (54.7, "in", None, "nominal")),
        ("\uff11\uff17\uff0e\uff15 dBi", (17.5, "dBi", None, "nominal")),
        ("\u2212153 dBc", (-153.0, "dBc", None, "nominal")),
        ("1.2 kW", (1200.0 / 1000, "kW", None, "nominal")),
        ("150 mph", (150.0, "mph", None, "nominal")),
        ("103 lbf", (103.0, "lbf", None, "nominal")),
        ("15 dBd", (15.0, "dBd", None, "nominal")),
        ("45º", (45.0, "deg", None, "nominal")),
        ("-40 °C", (-40.0, "°C", None, "nominal")),
        ("10 − 15 dB", ((10.0, 15.0), "dB", None, "nominal")),
    ],
)
def test_a_figure_reads_as_an_engineer_reads_it(text: str, reading: tuple[object, ...]) -> None:
    assert one(text) == reading


@pytest.mark.parametrize(
    "text",
    ["2-12", "2…12°", "2...12", "2 ÷ 12", "2 ~ 12°", "2 to 12", "2 bis 12°", "2 à 12°", "2 a 12°", "2 – 12°",
     "from 2° to 12°", "von 2 bis 12 Grad", "between 2 and 12 deg", "de 2° à 12°", "od 2 do 12°", "2 t/m 12°",
     "2° hasta 12°"],
)  # fmt: skip
def test_a_range_has_many_spellings(text: str) -> None:
    assert one(text, "range", "deg")[0] == (2.0, 12.0)


def test_a_plus_minus_alone_is_a_range_where_the_parameter_is_one() -> None:
    assert one("±60°", "scan", "deg")[0] == (-60.0, 60.0)
    assert one("± 0.4 dB", "number", "dB") == (0.4, "dB", None, "max")


def test_a_scan_range_without_ends_shows_both_readings() -> None:
    (found,) = read_cell("60°", kind="scan", expected="deg").quantities
    assert found.alternatives == ((-60.0, 60.0), (-30.0, 30.0))
    assert one("120°", "scan", "deg")[0] == (-60.0, 60.0)


@pytest.mark.parametrize(
    ("text", "value"),
    [("±45°", 2), ("+45° / -45°", 2), ("2 (+45° / −45°)", 2), ("2 x 45", 2), ("dual slant", 2), ("X-pol", 2),
     ("V", 1), ("vertical", 1), ("single", 1), ("H/V", 2), ("linear, ±45", 2), ("2", 2)],
)  # fmt: skip
def test_polarisations_are_counted(text: str, value: int) -> None:
    assert one(text, "polarisation")[0] == value


@pytest.mark.parametrize(
    ("text", "ports", "name"),
    [
        ("2 x 4.3-10 female", 2, "4.3-10 female"),
        ("2×4,3-10", 2, "4.3-10"),
        ("2 (4.3-10)", 2, "4.3-10"),
        ("4.3-10 (4x)", 4, "4.3-10"),
        ("2 x 7/16 DIN female", 2, "7-16 female"),
        ("6x4.3-10 + 4x7-16", 10, "4.3-10 + 7-16"),
        ("4 ports, 2 per band", 4, None),
        ("12 (4 LB + 8 HB)", 12, None),
        ("7-16", None, "7-16"),
        ("64", 64, None),
    ],
)
def test_a_connector_is_a_name_and_its_count_the_ports(
    text: str, ports: int | None, name: str | None
) -> None:
    found = {q.parameter: q.value for q in read_cell(text, kind="connectors").quantities}
    assert (found.get("rf_ports"), found.get("connector_type")) == (ports, name)


def test_a_calibration_connector_is_no_rf_port() -> None:
    found = {q.parameter: q.value for q in read_cell("16 x 4.3-10 + 1 x cal", kind="connectors").quantities}
    assert (found["rf_ports"], found["calibration_ports"]) == (16, 1)


@pytest.mark.parametrize(
    ("text", "values"),
    [
        ("1710-2690 MHz", [(1710.0, 2690.0)]),
        ("3.3-3.8 GHz", [(3300.0, 3800.0)]),
        ("1\u00a0710\u00a0–\u00a02\u202f200\u00a0MHz", [(1710.0, 2200.0)]),
        ("698–960 / 1710–2690", [(698.0, 960.0), (1710.0, 2690.0)]),
        ("n78 (3300-3800 MHz)", [(3300.0, 3800.0)]),
        ("n78, n77", ["n78", "n77"]),
    ],
)
def test_bands_are_ranges_or_names(text: str, values: list[object]) -> None:
    assert [q.value for q in read_cell(text, kind="bands", expected="MHz").quantities] == values


@pytest.mark.parametrize(
    ("text", "values"),
    [("1998 x 356 x 115 mm", [1998, 356, 115]), ("1\u202f390 × 160 × 92", [1390, 160, 92]),
     ("12 × 1", [12, 1]),
     ("65° x 7°", [65, 7]), ("12 × 2, both columns on one feed", [12, 2]), ("770/260/118", [770, 260, 118])],
)  # fmt: skip
def test_sizes_keep_their_order(text: str, values: list[float]) -> None:
    assert [q.value for q in read_cell(text, kind="size").quantities] == values


@pytest.mark.parametrize(
    ("text", "value"),
    [
        ("192 elements (12x8x2)", 192),
        ("12x8x2", 192),
        ("64T64R", 64),
        ("14 pcs", 14),
        ("32 TRX", 32),
        ("8x12=96", 96),
    ],
)
def test_counts(text: str, value: float) -> None:
    assert one(text, "count", "")[0] == value


def test_unequal_chains_are_two_figures() -> None:
    found = read_cell("64T32R", kind="count").quantities
    assert [(q.value, q.condition) for q in found] == [(64.0, "transmit"), (32.0, "receive")]


def test_figures_by_tilt_and_by_band_carry_their_place() -> None:
    by_tilt = read_cell("0°/5°/10°: 17.2/17.0/16.5", kind="number", expected="dBi").quantities
    assert [(q.value, q.at["tilt_deg"]) for q in by_tilt] == [(17.2, 0), (17.0, 5), (16.5, 10)]
    by_band = read_cell("16.5/17 dBi for 1710-1880/1850-1990 MHz", kind="number", expected="dBi").quantities
    assert [q.at["frequency_low_mhz"] for q in by_band] == [1710, 1850]
    assert [q.value for q in read_cell("16.2 / 16.8 / 17.1", kind="number").quantities] == [16.2, 16.8, 17.1]


def test_conditions_are_told_from_claims_by_their_unit() -> None:
    (pim,) = read_cell("-153 dBc @ 2x43 dBm", kind="number", expected="dBc").quantities
    assert (pim.value, pim.at["carrier_dbm"]) == (-153.0, 43.0)
    (same,) = read_cell("≤ −110 dBm at 2×20 W", kind="number", expected="dBc").quantities
    assert (same.value, same.unit, round(same.at["carrier_dbm"], 2)) == (-110.0, "dBm", 43.01)
    (load,) = read_cell("721 N at 150 km/h", kind="number", expected="N").quantities
    assert round(load.at["wind_speed_mps"], 2) == 41.67
    near, far = read_cell("> 20 dB (0°), > 10 dB (±60°)", kind="number", expected="dB").quantities
    assert (near.at["angle_deg"], far.at["angle_deg"]) == (0, 60)
    (pitch,) = read_cell("0,5 lambda at 3.5 GHz", kind="number", expected="m").quantities
    assert (pitch.value, pitch.unit, pitch.at["frequency_mhz"]) == (0.5, "λ", 3500)


def test_wind_loads_of_two_sides_stand_apart() -> None:
    front, side = read_cell(
        "frontal: 500 N / lateral: 120 N at 150 km/h", kind="number", expected="N"
    ).quantities
    assert (front.value, side.value) == (500, 120)
    assert "frontal" in front.condition and "lateral" in side.condition
    assert front.at == side.at


def test_a_figure_restated_in_another_unit_counts_once() -> None:
    assert one("2120 mm (83.5 in)", expected="m")[:2] == (2120.0, "mm")
    assert one("46 dBm (40 W)", expected="W")[:2] == (46.0, "dBm")


def test_a_tolerance_in_decibels_of_a_power_in_watts() -> None:
    # practice: 320 W ± 1 dB reaches up to 320·10^0.1 = 402.9 W (arithmetic of the decibel)
    assert one("320 W ± 1 dB", expected="W")[2] == pytest.approx(82.9, abs=0.05)


@pytest.mark.parametrize(
    ("text", "status"),
    [
        ("", "missing"), ("–", "missing"), ("-", "missing"), ("k.A.", "missing"), ("brak danych", "missing"),
        ("n/a", "not applicable"), ("N.A.", "not applicable"), ("entfällt", "not applicable"),
        ("sans objet", "not applicable"), ("nie dotyczy", "not applicable"), ("n.v.t.", "not applicable"),
        ("TBD", "to be advised"), ("t.b.c.", "to be advised"), ("auf Anfrage", "to be advised"),
        ("à définir", "to be advised"), ("por definir", "to be advised"), ("do ustalenia", "to be advised"),
        ("see note 3", "referred"), ("s. Datenblatt", "referred"), ("voir annexe", "referred"),
        ("ver anexo 2", "referred"), ("vedi allegato", "referred"), ("patrz karta", "referred"),
        ("Note 3", "referred"),
        ("comply", "declared"), ("Yes", "declared"), ("erfüllt", "declared"), ("conforme", "declared"),
        ("cumple", "declared"), ("spełnia", "declared"), ("voldoet", "declared"), ("noted", "declared"),
    ],
)  # fmt: skip
def test_a_cell_without_a_figure_has_its_own_status(text: str, status: str) -> None:
    content = read_cell(text, kind="number", expected="dBi")
    assert (content.status, content.quantities) == (status, ())


def test_zero_is_a_figure_and_nothing_is_missing() -> None:
    assert one("0", "range", "deg")[0] == 0.0
    assert one(0, "range", "deg")[0] == 0.0
    assert read_cell(None, kind="number").status == "missing"
    assert read_cell(True, kind="number") == CellContent(status="declared", notes=("yes",))


def test_an_error_value_is_not_a_status() -> None:
    content = read_cell("#N/A", kind="number")
    assert (content.status, content.rest) == (None, "#N/A")


@pytest.mark.parametrize(
    ("text", "mark"), [("17.5 1)", "1"), ("17.5¹", "1"), ("17.5*", "*"), ("17.5 [2]", "2")]
)
def test_footnote_markers_are_no_part_of_the_figure(text: str, mark: str) -> None:
    content = read_cell(text, kind="number", expected="dBi")
    assert (content.quantities[0].value, content.footnotes) == (17.5, (mark,))


def test_a_number_keeps_the_unit_of_its_heading_or_its_format() -> None:
    assert one(17.5, unit="dBi")[:2] == (17.5, "dBi")
    assert one(17.5, number_format='0.0" dBi"')[:2] == (17.5, "dBi")
    assert one(0.75, expected="%", number_format="0%")[:2] == (75.0, "%")


@pytest.mark.parametrize(("text", "both"), [("1,234", {1.234, 1234.0}), ("1.234", {1.234, 1234.0})])
def test_an_ambiguous_figure_shows_both_readings(text: str, both: set[float]) -> None:
    (found,) = read_cell(text, kind="number").quantities
    assert set(found.alternatives) == both


def test_the_habit_of_the_file_settles_an_ambiguous_figure() -> None:
    assert one("1,234", decimal_comma=True)[0] == 1.234
    assert one("1,234", decimal_comma=False)[0] == 1234.0


def test_a_plausible_range_settles_an_ambiguous_figure_and_says_so() -> None:
    content = read_cell(
        "1.710 – 2.690 MHz", kind="bands", expected="MHz", plausible=(400, 7125), possible=(100, 1e5)
    )
    assert content.quantities[0].value == (1710.0, 2690.0)
    assert content.quantities[0].alternatives == ()
    assert "outside what panels show" in content.notes[0]


def test_a_date_in_a_connector_cell_is_undone() -> None:
    content = read_cell(date(2026, 7, 16), kind="connectors")
    assert content.quantities[0].value == "7-16"
    assert "likely original '7-16'" in content.notes[0]


def test_a_date_in_a_tilt_cell_is_never_certain() -> None:
    content = read_cell(date(2026, 2, 12), kind="range")
    assert content.quantities[0].value == (2.0, 12.0)
    assert content.quantities[0].alternatives
    assert "likely original '2-12'" in content.notes[0]


def test_a_date_in_a_gain_cell_offers_the_plausible_decimal() -> None:
    (found,) = read_cell(date(2026, 5, 17), kind="number", plausible=(5, 28)).quantities
    assert found.alternatives == (17.5, 5.17)


def test_a_declaration_beside_a_figure_keeps_the_figure() -> None:
    content = read_cell("17.5 dBi, comply", kind="number", expected="dBi")
    assert (content.status, content.quantities[0].value) == ("declared", 17.5)


def test_words_that_are_not_understood_are_left_over() -> None:
    assert read_cell("17.5 dBi subject to design", kind="number").rest == "subject to design"
