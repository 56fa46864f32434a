"""Offers under other conditions than demanded, names, and claims in doubt. Expected verdicts are
written by hand; where no source is named they are common practice of tender evaluation."""

from __future__ import annotations

from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from speccheck.records import (
    Amount,
    CellRef,
    Compliance,
    Finding,
    Fit,
    Interval,
    Level,
    MatrixRow,
    Outcome,
    Reading,
    Requirement,
)
from speccheck.tender.judging import judge
from speccheck.tender.outcome import outcome
from tender.panels import demand, panel, says, tender

LOW, HIGH = (694.0, 960.0), (1695.0, 2690.0)


def _row(requirement: Requirement, *said: Any, **settings: Any) -> MatrixRow:
    rows = judge(tender(requirement, **settings), panel(*said), ())
    assert len(rows) == 1
    return rows[0]


def test_wind_load_at_another_speed_is_scaled_with_its_square() -> None:
    """(150/160)² = 0.879: 640 N at 160 km/h is 562 N at 150 km/h."""
    requirement = demand("wind_load", "≤", 600.0, at={"wind_speed_mps": 150 / 3.6})
    row = _row(requirement, says("wind_load", 640.0, at={"wind_speed_mps": 160 / 3.6}))
    assert row.verdict is Compliance.MEETS
    assert row.offered_in_unit == pytest.approx(562.5, abs=0.5)
    assert "derived" in row.note


@pytest.mark.parametrize(
    ("requirement", "said", "verdict"),
    [
        (demand("wind_load", "≤", 600.0, at={"wind_speed_mps": 41.67}),
         [says("wind_load", 500.0)], "not judged"),
        (demand("passive_intermodulation", "≤", -150.0, at={"carrier_dbm": 43.0}),
         [says("passive_intermodulation", -153.0, at={"carrier_dbm": 37.0})], "not judged"),
        (demand("front_to_back_ratio", "≥", 25.0, scope="total power"),
         [says("front_to_back_ratio", 28.0, condition="co-polar at 180°")], "not judged"),
        (demand("front_to_back_ratio", "≥", 25.0, scope="total power"),
         [says("front_to_back_ratio", 23.0, condition="co-polar at 180°")], "fails"),
        (demand("cross_polar_discrimination", "≥", 10.0, at={"angle_deg": 60.0}),
         [says("cross_polar_discrimination", 20.0)], "not judged"),
        (demand("cross_polar_discrimination", "≥", 10.0, at={"angle_deg": 60.0}),
         [says("cross_polar_sector", 11.0)], "meets"),
        (demand("weight_with_brackets", "≤", 40.0), [says("weight", 38.0)], "not judged"),
        (demand("weight_with_brackets", "≤", 40.0), [says("weight", 42.0)], "fails"),
        (demand("weight", "≤", 40.0), [says("weight_with_brackets", 38.0)], "meets"),
        (demand("rf_ports", "=", 12.0, doubts=("DIR: more?",)), [says("rf_ports", 16.0)], "not judged"),
    ],
)  # fmt: skip
def test_other_conditions_are_asked_about_where_they_could_decide(
    requirement: Requirement, said: Any, verdict: str
) -> None:
    assert _row(requirement, *said).verdict.value == verdict


@pytest.mark.parametrize(
    ("requirement", "offered", "verdict"),
    [
        (demand("polarisations", "text", "±45°"), says("polarisations", 2.0, "±45°"), "meets"),
        (demand("polarisations", "text", "±45°"), says("polarisations", 1.0, "vertical"), "fails"),
        (demand("connector_type", "text", "4.3-10"), says("connector_type", "4.3-10 female"), "meets"),
        (
            demand("connector_type", "text", "4.3-10"),
            says("connector_type", "6 x 4.3-10 + 4 x 7-16"),
            "fails",
        ),
        (
            demand("connector_type", "any of", "7/16 DIN, 4.3-10"),
            says("connector_type", "7-16 female"),
            "meets",
        ),
        (demand("connector_type", "text", "4.3-10"), says("connector_type", "4.3-10 male"), "not judged"),
        (demand("ingress_protection", "text", "IP65"), says("ingress_protection", "IP65"), "meets"),
        (demand("ingress_protection", "text", "IP65"), says("ingress_protection", "IP66"), "meets"),
        (demand("ingress_protection", "text", "IP65"), says("ingress_protection", "IP67"), "not judged"),
        (demand("ingress_protection", "text", "IP65"), says("ingress_protection", "IP65/IP67"), "meets"),
        (demand("ingress_protection", "text", "IP65"), says("ingress_protection", "IP55"), "fails"),
        (
            demand("standards", "evidence", "3GPP TS 38.104"),
            says("standards", "3GPP TS 38.104"),
            "declared only",
        ),
        (demand("mtbf", "information", None), says("mtbf", 150000.0), "declared only"),
    ],
)
def test_names_are_compared_and_never_measured(
    requirement: Requirement, offered: Reading, verdict: str
) -> None:
    """Immersion codes (IPX7) do not include jets (IPX5/6): IEC 60529 (from memory)."""
    assert _row(requirement, offered).verdict.value == verdict


def test_a_clash_of_words_is_never_judged() -> None:
    row = _row(demand("vswr", "≥", 1.3, doubts=("CLASH: lower is better",)), says("vswr", 1.2))
    assert row.verdict is Compliance.NOT_JUDGED


def test_a_misfit_marks_the_rows_of_its_parameters_in_its_band() -> None:
    finding = Finding(
        check="gain-fits-beamwidths", title="Gain fits the beamwidths", verdict=Fit.DOES_NOT_FIT, summary="",
        parameters=("gain",), band=HIGH, claimed=Amount(19.0, "dBi"), expected=Interval(15.0, 17.0, "dBi"),
        where=(CellRef("b", "s", "D2"),),
    )  # fmt: skip
    said = (says("gain", 19.0, band=HIGH), says("gain", 16.0, band=LOW))
    rows = judge(tender(demand("gain", "≥", 15.0)), panel(*said), (finding,))
    assert [(r.verdict.value, r.in_doubt) for r in rows] == [
        ("meets", ("gain-fits-beamwidths",)),
        ("meets", ()),
    ]


@given(st.floats(10, 25), st.floats(10, 25), st.floats(0, 2))
def test_the_verdict_follows_the_sign_of_the_margin(limit: float, offered: float, guard: float) -> None:
    row = _row(demand("gain", "≥", limit), says("gain", offered, "x"), guard_bands={"gain": guard})
    assert row.margin is not None
    assert (row.margin >= 0) == row.verdict.value.startswith("meets")
    assert ("narrowly" in row.verdict.value) <= (abs(row.margin) <= guard)


def test_a_level_in_dbm_is_held_against_a_limit_in_dbc_at_the_test_power() -> None:
    """-110 dBm with 43 dBm carriers is -153 dBc (common practice; IEC 62037-1 states both, from memory)."""
    requirement = demand("passive_intermodulation", "≤", -150.0, at={"carrier_dbm": 43.0})
    row = _row(requirement, says("passive_intermodulation", -110.0, unit="dBm", at={"carrier_dbm": 43.0}))
    assert (row.verdict, row.offered_in_unit) == (Compliance.MEETS, -153.0)


def test_maximum_power_names_a_capability_and_bounds_nothing() -> None:
    row = _row(demand("max_power_per_port", "≥", 200.0), says("max_power_per_port", 250.0, sense="max"))
    assert row.verdict is Compliance.MEETS


@pytest.mark.parametrize(
    ("weights", "verdict", "rejected"),
    [
        ((24.0, 24.0), "meets", False),
        ((26.0, 24.0), "meets", False),
        ((26.0, 31.0), "fails", True),
        ((26.0, None), "not judged", False),
    ],
)
def test_a_cap_on_negative_deviations_counts_missed_wishes(
    weights: tuple[float, float | None], verdict: str, rejected: bool
) -> None:
    """'★ marked items: any negative deviation rejects; others at most 1', two wishes of 25 and 30 kg."""
    rule = demand("gain", "rule", "negative deviations ≤ 1", "", clause="9")
    wishes = [
        demand(key, "≤", limit, level=Level.DESIRABLE, clause=key)
        for key, limit in (("weight", 25.0), ("mounting_kit_weight", 30.0))
    ]
    keys = ("weight", "mounting_kit_weight")
    said = [says(key, w) for key, w in zip(keys, weights, strict=True) if w is not None]
    rows = judge(tender(rule, *wishes), panel(*said), ())
    assert rows[-1].requirement is rule
    assert rows[-1].verdict.value == verdict
    assert (outcome((), rows)[0] is Outcome.REJECT) is rejected
