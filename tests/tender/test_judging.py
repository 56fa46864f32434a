"""One requirement against one offer. Expected verdicts are written by hand; where no source is named they are
common practice of tender evaluation."""

from __future__ import annotations

from typing import Any

import pytest

from speccheck.records import (
    Compliance,
    MatrixRow,
    Reading,
    Requirement,
    Status,
)
from speccheck.tender.judging import judge
from tender.panels import answers, demand, panel, says, tender

LOW, HIGH = (694.0, 960.0), (1695.0, 2690.0)


def _row(requirement: Requirement, *said: Any, **settings: Any) -> MatrixRow:
    rows = judge(tender(requirement, **settings), panel(*said), ())
    assert len(rows) == 1
    return rows[0]


@pytest.mark.parametrize(
    ("offered", "verdict"),
    [
        (17.5, "meets"),
        (17.3, "meets"),
        (17.2, "meets narrowly"),
        (17.0, "meets narrowly"),
        (16.9, "fails narrowly"),
        (16.7, "fails narrowly"),
        (16.6, "fails"),
    ],
)
def test_four_outcomes_of_a_guard_band(offered: float, verdict: str) -> None:
    """Limit 17 dBi, guard band 0.3 dB. Source: ILAC-G8:09/2019, section 4.2.3 (from memory)."""
    row = _row(demand("gain", "≥", 17.0), says("gain", offered, f"{offered:.2f}"), guard_bands={"gain": 0.3})
    assert row.verdict.value == verdict
    assert row.margin == pytest.approx(offered - 17)


@pytest.mark.parametrize(
    ("requirement", "reading", "verdict", "margin"),
    [
        (demand("vswr", "≤", 1.5), says("vswr", 1.4), "meets", 0.1),
        (demand("vswr", "≤", 1.5), says("vswr", 1.5), "meets", 0.0),
        (demand("vswr", "≤", 1.5), says("vswr", 1.7), "fails", -0.2),
        (demand("port_isolation", ">", 30.0), says("port_isolation", 30.0), "fails", 0.0),
        (demand("port_isolation", ">", 30.0), says("port_isolation", 30.5), "meets", 0.5),
        (demand("weight", "≤", 25.0), says("weight", 24.0), "meets", 1.0),
        (demand("passive_intermodulation", "≤", -150.0),
         says("passive_intermodulation", -153.0), "meets", 3.0),
        (demand("survival_wind_speed", "≥", 200.0, "km/h"),
         says("survival_wind_speed", 55.6, stated_unit="m/s"), "meets", 0.16),
        (demand("height", "≤", 2000.0, "mm"),
         says("height", 1.998, stated_value=1998.0, stated_unit="mm"), "meets", 2.0),
        (demand("gain", "≥", 15.0, "dBd"), says("gain", 17.0), "fails", -0.15),
        (demand("rf_ports", "≥", 8.0), says("rf_ports", 8.0), "meets", 0.0),
        (demand("rf_ports", "=", 12.0), says("rf_ports", 10.0), "fails", -2.0),
    ],
)  # fmt: skip
def test_margins_are_signed_in_the_good_direction(
    requirement: Requirement, reading: Reading, verdict: str, margin: float
) -> None:
    """dBd + 2.15 = dBi; 200 km/h = 55.56 m/s."""
    row = _row(requirement, reading)
    assert (row.verdict.value, row.margin) == (verdict, pytest.approx(margin, abs=1e-6))


@pytest.mark.parametrize(
    ("value", "tolerance", "verdict"),
    [
        (65.0, 5.0, "meets"),
        (65.0, 7.0, "fails"),
        (65.0, None, "meets narrowly"),
        (72.0, None, "fails"),
        ((61.0, 69.0), None, "meets"),
    ],
)
def test_an_offered_window_lies_inside_the_required_one(
    value: Any, tolerance: float | None, verdict: str
) -> None:
    """65° ± 5° is required; an offered 65° ± 7° fails, a bare 65° is judged as it stands (narrowly)."""
    row = _row(
        demand("horizontal_beamwidth", "within", (60.0, 70.0)),
        says("horizontal_beamwidth", value, tolerance=tolerance),
    )
    assert row.verdict.value == verdict


@pytest.mark.parametrize(
    ("parameter", "limit", "offered", "verdict", "margin"),
    [
        ("electrical_tilt", (2.0, 12.0), (0.0, 10.0), "fails", -2.0),
        ("electrical_tilt", (2.0, 12.0), (2.0, 12.0), "meets", 0.0),
        ("electrical_tilt", 12.0, (0.0, 10.0), "fails", -2.0),
        ("electrical_tilt", 12.0, (2.0, 14.0), "meets", 2.0),
        ("temperature_range", (-40.0, 55.0), (-40.0, 60.0), "meets", 0.0),
        ("horizontal_scan", (-60.0, 60.0), (-50.0, 50.0), "fails", -10.0),
    ],
)
def test_a_capability_contains_the_requirement(
    parameter: str, limit: Any, offered: tuple[float, float], verdict: str, margin: float
) -> None:
    row = _row(demand(parameter, "contains", limit), says(parameter, offered))
    assert (row.verdict.value, row.margin) == (verdict, margin)


@pytest.mark.parametrize(
    ("operator", "limit", "offered", "verdict", "said"),
    [
        ("contains", (1710.0, 2690.0), [(1695.0, 2690.0)], "meets", ""),
        ("contains", (1710.0, 2690.0), [(1710.0, 2170.0), (2300.0, 2690.0)], "fails", "130 MHz missing"),
        ("contains", (3700.0, 3980.0), [(3300.0, 3800.0)], "fails", "180 MHz missing"),
        ("all of", "n78, n77", [(3300.0, 4200.0)], "meets", ""),
        ("all of", "n78, n77", [(3300.0, 3800.0)], "fails", "n77: 400 MHz missing"),
        ("any of", "n78, n77", [(3300.0, 3800.0)], "meets", ""),
        ("all of", "n77", ["n77"], "meets", ""),
        ("all of", "n78", [(3400.0, 3600.0)], "fails", "n78: 300 MHz missing"),
    ],
)
def test_bands_are_covered_whole_or_the_missing_megahertz_named(
    operator: str, limit: Any, offered: list[Any], verdict: str, said: str
) -> None:
    """n77 is 3300-4200 MHz, n78 3300-3800 MHz (3GPP TS 38.104 table 5.2-1)."""
    row = _row(demand("operating_bands", operator, limit), *(says("operating_bands", x) for x in offered))
    assert row.verdict.value == verdict
    assert said in row.note


def test_a_headline_wider_than_the_band_table_is_asked_about() -> None:
    said = (
        says("frequency_range", (3300.0, 4200.0)),
        says("operating_bands", (3300.0, 3800.0), band=(3300.0, 3800.0)),
    )
    row = _row(demand("frequency_range", "contains", (3300.0, 4200.0)), *said)
    assert row.verdict is Compliance.NOT_JUDGED
    assert "400 MHz" in row.note


@pytest.mark.parametrize(
    ("demanded", "reading", "verdict"),
    [
        ("each", says("gain", 17.4, statistic="typical"), "not judged"),
        ("each", says("gain", 16.0, statistic="typical"), "fails"),
        ("typ", says("gain", 17.4, sense="min"), "meets"),
        ("typ", says("gain", 16.4, sense="min"), "not judged"),
        ("typ", says("gain", 16.4, statistic="mean"), "not judged"),
        ("mean-dB", says("gain", 17.4, sense="min"), "meets"),
        ("each", says("gain", 17.4, sense="max"), "not judged"),
        ("each", says("gain", 17.4, tolerance=0.5), "fails"),
        ("each", says("gain", 17.4, sense="min"), "meets"),
        ("each", says("gain", 17.4), "meets"),
    ],
)
def test_another_statistic_is_judged_only_where_it_cannot_decide(
    demanded: str, reading: Reading, verdict: str
) -> None:
    """A typical value is no guarantee; a worst case above the limit proves the mean."""
    assert _row(demand("gain", "≥", 17.0, statistic=demanded), reading).verdict.value == verdict


@pytest.mark.parametrize(("limit", "verdict"), [(16.0, "meets"), (16.2, "not judged"), (16.5, "fails")])
def test_a_mean_over_tilts_is_formed_both_ways(limit: float, verdict: str) -> None:
    """14 and 18 dBi have the mean 16.0 in decibels; (25.12 + 63.10)/2 = 44.11 is 16.45 dBi in powers."""
    tilts = (says("gain", 14.0, at={"tilt_deg": 2.0}), says("gain", 18.0, at={"tilt_deg": 12.0}))
    row = _row(demand("gain", "≥", limit, statistic="mean-dB", doubts=("STAT: which mean",)), *tilts)
    assert row.verdict.value == verdict
    assert "16.00" in row.note
    assert "16.45" in row.note


def test_the_worst_tilt_decides_where_no_mean_is_demanded() -> None:
    tilts = [says("gain", g, at={"tilt_deg": t}) for g, t in ((17.3, 2.0), (17.1, 7.0), (16.8, 12.0))]
    row = _row(demand("gain", "≥", 17.0), *tilts)
    assert (row.verdict, row.offered) == (Compliance.FAILS, tilts[2])


def test_each_band_has_its_row_and_a_figure_for_the_panel_has_one() -> None:
    said = (says("gain", 15.0, band=LOW), says("gain", 17.0, band=HIGH), says("vswr", 1.5))
    rows = judge(tender(demand("gain", "≥", 16.0), demand("vswr", "≤", 1.5)), panel(*said), ())
    assert [(r.band, r.verdict.value) for r in rows] == [(LOW, "fails"), (HIGH, "meets"), (None, "meets")]


def test_a_requirement_of_one_band_leaves_the_others_alone() -> None:
    said = (says("gain", 15.0, band=LOW), says("gain", 17.0, band=HIGH))
    rows = judge(tender(demand("gain", "≥", 16.0, bands=((1710.0, 2170.0),))), panel(*said), ())
    assert [(r.band, r.verdict.value) for r in rows] == [(HIGH, "meets")]


def test_a_figure_for_a_wider_band_than_demanded_cannot_fail_it() -> None:
    row = _row(demand("gain", "≥", 17.5, bands=((1710.0, 2170.0),)), says("gain", 17.0, band=HIGH))
    assert row.verdict is Compliance.NOT_JUDGED
    assert "wider" in row.note


def test_a_band_that_is_not_offered_is_not_stated() -> None:
    row = _row(demand("gain", "≥", 17.5, bands=((3300.0, 3800.0),)), says("gain", 17.0, band=HIGH))
    assert (row.verdict, row.offered) == (Compliance.NOT_STATED, None)


@pytest.mark.parametrize(
    ("said", "verdict"),
    [
        ((), "not stated"),
        ((answers("gain", "comply", Status.DECLARED),), "declared only"),
        ((answers("gain", "TBD", Status.TO_BE_ADVISED),), "not stated"),
        ((answers("gain", "n/a", Status.NOT_APPLICABLE),), "not stated"),
        ((answers("gain", "see datasheet", Status.REFERRED),), "not stated"),
        ((says("gain", 1.234, "1,234", alternatives=(1.234, 1234.0)),), "not judged"),
    ],
)
def test_missing_declared_and_ambiguous_stay_apart(said: Any, verdict: str) -> None:
    assert _row(demand("gain", "≥", 17.0), *said).verdict.value == verdict


def test_comply_beside_a_contrary_figure_is_shown() -> None:
    row = _row(demand("gain", "≥", 17.0), says("gain", 16.0), answers("gain", "Comply", Status.DECLARED))
    assert row.verdict is Compliance.FAILS
    assert "'Comply'" in row.note


def test_rounding_decides_between_vswr_and_return_loss() -> None:
    """VSWR 1.5 is 13.98 dB (Pozar, Microwave Engineering, ch. 2); 14 dB is the same demand rounded."""
    row = _row(demand("return_loss", "≥", 14.0), says("vswr", 1.5, "1.5"))
    assert row.verdict is Compliance.MEETS_NARROWLY
    assert row.offered_in_unit == pytest.approx(13.98, abs=0.005)
    assert "ROUND" in row.note
    assert "1.5 = 13.98 dB" in row.note


@pytest.mark.parametrize(
    ("offered", "raw", "verdict"),
    [(16.96, "16.96", "fails"), (17.0, "17", "meets"), (16.9, "16.9", "fails"), (16.95, "16.95", "fails")],
)
def test_a_shortfall_beyond_the_digits_printed_fails(offered: float, raw: str, verdict: str) -> None:
    """Half a unit of the last digit: 0.005 dB of 16.96, 0.05 dB of 16.9; neither reaches 17."""
    assert _row(demand("gain", "≥", 17.0), says("gain", offered, raw)).verdict.value == verdict


@pytest.mark.parametrize(("raw", "verdict"), [("17", "meets narrowly"), ("17.0", "fails")])
def test_rounding_holds_in_the_unit_of_the_offer(raw: str, verdict: str) -> None:
    """A '17' may have been 17.4 before it was rounded, a '17.0' not."""
    row = _row(demand("gain", "≥", 17.4), says("gain", 17.0, raw))
    assert row.verdict.value == verdict
    assert ("ROUND" in row.note) == (verdict == "meets narrowly")


def test_a_shortfall_of_the_whole_half_unit_was_not_rounded() -> None:
    """17.5 rounds to 18, half away from zero or half to even (IEEE 754-2019, 4.3), never to 17."""
    assert _row(demand("gain", "≥", 17.5), says("gain", 17.0, "17")).verdict is Compliance.FAILS


def test_a_lone_digit_was_not_rounded() -> None:
    """1.5 would round to 2, but a VSWR is printed with a decimal (common practice): '2' falls 0.5 short."""
    assert _row(demand("vswr", "≤", 1.5), says("vswr", 2.0, "2")).verdict is Compliance.FAILS


@pytest.mark.parametrize(("vswr", "verdict"), [(1.7, "fails"), (1.4, "meets")])
def test_return_loss_is_judged_from_vswr(vswr: float, verdict: str) -> None:
    assert _row(demand("return_loss", "≥", 14.0), says("vswr", vswr)).verdict.value == verdict


@pytest.mark.parametrize(("equality", "verdict"), [(True, "meets narrowly"), (False, "fails")])
def test_better_than_at_equality_follows_the_rule(equality: bool, verdict: str) -> None:
    requirement = demand("vswr", "<", 1.5, doubts=("EQUAL: better than",))
    assert _row(requirement, says("vswr", 1.5), equality_meets=equality).verdict.value == verdict


def test_power_per_port_is_judged_in_the_band_demanded() -> None:
    said = (says("max_power_per_port", 150.0, band=LOW), says("max_power_per_port", 250.0, band=HIGH))
    rows = judge(tender(demand("max_power_per_port", "≥", 200.0, bands=(HIGH,))), panel(*said), ())
    assert [(row.band, row.verdict) for row in rows] == [(HIGH, Compliance.MEETS)]


def test_ports_counted_band_by_band_are_asked_about() -> None:
    said = (says("rf_ports", 2.0, band=LOW), says("rf_ports", 4.0, band=HIGH))
    assert _row(demand("rf_ports", "≥", 6.0), *said).verdict is Compliance.NOT_JUDGED
    assert _row(demand("rf_ports", "≥", 8.0), *said).verdict is Compliance.FAILS


def test_the_range_shown_is_the_one_that_answers_in_the_unit_demanded() -> None:
    """1.695 to 2.36 GHz inside 1695 to 2690 MHz; the low band of the same panel answers nothing of it."""
    offered = (says("operating_bands", LOW, band=LOW), says("operating_bands", HIGH, band=HIGH))
    row = _row(demand("operating_bands", "contains", (1.695, 2.36), "GHz"), *offered)
    assert row.verdict is Compliance.MEETS
    assert row.offered_in_unit == pytest.approx((1.695, 2.69))


def test_a_narrow_verdict_names_the_guard_band_with_its_unit() -> None:
    # 17 − 16.9 = 0.1 dB, less than the 0.3 dB; a difference of two levels is in dB (ITU-R V.574, from memory)
    row = _row(demand("gain", "≥", 17.0), says("gain", 16.9, "16.90"), guard_bands={"gain": 0.3})
    assert row.note == "within the guard band of 0.3 dB"
