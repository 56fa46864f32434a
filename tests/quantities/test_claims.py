"""What in a cell is a figure of the parameter, and what stands beside it; written down by hand."""

from __future__ import annotations

from typing import Any

import pytest

from speccheck.quantities import read_cell

HEIGHT = {"expected": "m", "plausible": (0.2, 3.0), "possible": (0.02, 10.0)}
SPACING = {"expected": "m", "plausible": (0.02, 0.4), "possible": (0.002, 3.0)}
WIND_SPEED = {"expected": "m/s", "plausible": (40.0, 90.0), "possible": (5.0, 150.0)}
DUTY = {"expected": "%", "plausible": (20.0, 100.0), "possible": (0.0, 100.0)}


@pytest.mark.parametrize(
    ("text", "known", "value", "unit"),
    [
        ("1998", HEIGHT, 1998.0, "mm"),
        ("90", SPACING, 90.0, "mm"),
        ("241", WIND_SPEED, 241.0, "km/h"),
        ("0.75", DUTY, 75.0, "%"),
        ("3:1", DUTY, 75.0, "%"),
        ("67", WIND_SPEED, 67.0, ""),
        ("2.1", HEIGHT, 2.1, ""),
    ],
)
def test_a_unit_left_out_is_filled_in_only_where_the_parameters_own_is_impossible(
    text: str, known: dict[str, Any], value: float, unit: str
) -> None:
    content = read_cell(text, kind="number", **known)
    (found,) = content.quantities
    assert (found.value, found.unit) == (value, unit)
    assert bool(content.notes) == bool(unit)


@pytest.mark.parametrize(
    ("text", "kind", "expected", "values"),
    [
        ("17.5 [dBi]", "number", "dBi", [17.5]),
        ("65 (±5)°", "number", "deg", [65.0]),
        ("25.1 dBi (64 el.)", "number", "dBi", [25.1]),
        ("16 dB (1st)", "number", "dB", [16.0]),
        (">14 dB (VSWR 1.5)", "number", "dB", [14.0]),
        ("2 - 12 (1° steps)", "range", "deg", [(2.0, 12.0)]),
        ("0-10, 0.5° step", "range", "deg", [(0.0, 10.0)]),
        ("-60/+60", "scan", "deg", [(-60.0, 60.0)]),
        ("120° (±60°)", "scan", "deg", [(-60.0, 60.0)]),
        ("−40 / +60 °C", "range", "°C", [(-40.0, 60.0)]),
        ("≥20 (0°) ≥10 (±60°)", "number", "dB", [20.0, 10.0]),
        ("15.2 (694-960), 17.6 (1710-2690)", "number", "dBi", [15.2, 17.6]),
        ("65° -3 dB", "number", "deg", [65.0]),
        ("60 mm (0.7 λ at 3.5 GHz)", "number", "m", [60.0]),
        ("< −153 dBc / < −110 dBm", "number", "dBc", [-153.0]),
        ("18.5 (22.1 with brackets)", "number", "kg", [18.5, 22.1]),
        ("17.3, 17.6, 17.9 dBi", "number", "dBi", [17.3, 17.6, 17.9]),
        ("17,3, 17,6, 17,9", "number", "dBi", [17.3, 17.6, 17.9]),
    ],
)
def test_what_is_a_claim_and_what_stands_beside_it(
    text: str, kind: str, expected: str, values: list[object]
) -> None:
    assert [q.value for q in read_cell(text, kind=kind, expected=expected).quantities] == values


@pytest.mark.parametrize(
    ("text", "ports"), [("2 + 2", 4), ("2 LB + 4 HB", 6), ("8T8R", 8), ("4.3-10, 8 pcs", 8)]
)
def test_ports_are_added_up(text: str, ports: int) -> None:
    found = {q.parameter: q.value for q in read_cell(text, kind="connectors").quantities}
    assert found["rf_ports"] == ports


def test_an_angle_alone_is_no_number_of_polarisations() -> None:
    assert read_cell("45", kind="polarisation").quantities == ()
    assert read_cell(45, kind="polarisation").quantities == ()


@pytest.mark.parametrize(
    "words",
    [
        "a",
        "à",
        "at",
        "to",
        "@",
        "con",
        "com",
        "com",
        "bei",
        "mit",
        "avec",
        "sous",
        "przy",
        "z",
        "bij",
        "met",
        "voor",
        "per",
        "-",
    ],
)
@pytest.mark.parametrize("carriers", ["2x43 dBm", "2 × 43 dBm", "2 x 20 W", "2 portadoras de 43 dBm"])
def test_before_carriers_no_word_makes_a_range(words: str, carriers: str) -> None:
    # IEC 62037-1: intermodulation is stated at two carriers, usually of 43 dBm (20 W) each
    for stated in (f"≤ -153 dBc {words} {carriers}", f"-153 dBc máx. {words} {carriers}"):
        (found,) = read_cell(stated, kind="number", expected="dBc").quantities
        assert (found.value, found.unit, found.sense) == (-153.0, "dBc", "max"), stated
        assert found.at["carrier_dbm"] == pytest.approx(43.0, abs=0.05), stated


def test_a_range_of_figures_is_still_one() -> None:
    (found,) = read_cell("0 a 10", kind="range", expected="deg").quantities
    assert found.value == (0.0, 10.0)
    (found,) = read_cell("300 a 400 W", kind="number", expected="W").quantities
    assert found.value == (300.0, 400.0)


@pytest.mark.parametrize("word", ["a", "à", "to", "do", "tot", "al"])
def test_behind_a_figure_a_unit_of_another_kind_is_a_place(word: str) -> None:
    (gain,) = read_cell(f"17,5 {word} 5°", kind="number", unit="dBi", expected="dBi").quantities
    assert (gain.value, gain.unit, gain.at) == (17.5, "dBi", {"tilt_deg": 5.0})
    (wind,) = read_cell(f"520 {word} 150 km/h", kind="number", unit="N", expected="N").quantities
    assert (wind.value, wind.unit) == (520.0, "N")
    assert wind.at["wind_speed_mps"] == pytest.approx(150 / 3.6)


def test_a_range_of_frequencies_is_no_gain_at_a_frequency() -> None:
    found = read_cell("1710 a 2170 MHz", kind="number", unit="dBi", expected="dBi").quantities
    assert not any(one.value == 1710.0 for one in found)
