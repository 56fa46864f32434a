"""No figure a cell can hold stops a check: whatever the bid says, every check answers in words."""

from __future__ import annotations

import math
from typing import Any

from checks.cases import panel_of
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from speccheck.checks import examine, exposure_note
from speccheck.checks.innocent.conventions import INNOCENT_READINGS, Reach
from speccheck.checks.registry import CHECKS
from speccheck.checks.runner import run_checks
from speccheck.dictionary import parameters
from speccheck.records import Finding, Settings

NUMERIC = sorted(key for key, p in parameters().items() if p.kind in ("number", "count", "range", "scan"))
WORDS = (
    "",
    "typ.",
    "per polarisation",
    "per port",
    "over ±60°",
    "co-polar",
    "at 150 km/h",
    "2 x 37 dBm",
    "horizon",
)
COUNTED = ("array_rows", "array_columns", "subarray_rows", "subarray_columns", "panel_groups")
"""Counts that set how long the array is computed: drawn from what panels have."""


def figures(key: str) -> st.SearchStrategy[Any]:
    parameter = parameters()[key]
    low, high = (parameter.plausible if key in COUNTED else parameter.possible) or (-1e6, 1e6)
    inside = st.one_of(st.sampled_from([low, high, 0.0, 1.0]), st.floats(low, high))
    anything = st.sampled_from([-1.0, 0.0, 1e308, -1e308, 1e-300])
    number = st.one_of(inside, inside, inside, anything)
    value = (
        st.one_of(number, st.tuples(number, number).map(list))
        if parameters()[key].kind in ("range", "scan")
        else number
    )
    return st.builds(lambda v, words: {"value": v, "condition": words}, value, st.sampled_from(WORDS))


@st.composite
def panels(draw: st.DrawFn) -> Any:
    whole: dict[str, Any] = {
        key: draw(figures(key)) for key in draw(st.sets(st.sampled_from(NUMERIC), min_size=5))
    }
    low = draw(st.floats(100, 100_000))
    whole["frequency_range"] = [low, low * draw(st.sampled_from([0.5, 1.0, 1.05, 1.2, 3.0]))]
    whole["operating_bands"] = draw(st.sampled_from(["n78", "n78/n77", "B3, B7", "n999"]))
    return panel_of(whole)


@settings(
    max_examples=60, deadline=None, suppress_health_check=[HealthCheck.too_slow, HealthCheck.data_too_large]
)
@given(panel=panels())
def test_no_check_stops(panel):
    for finding in run_checks(panel, Settings()):
        assert "stopped with" not in finding.summary, finding.summary
        assert finding.check in CHECKS
        assert all(math.isfinite(f) for f in figures_in(finding)), finding


@settings(max_examples=60, deadline=None, suppress_health_check=list(HealthCheck))
@given(panel=panels())
def test_no_innocent_reading_fails_and_none_shows_a_figure_without_end(panel):
    for reading in INNOCENT_READINGS.values():
        for reach in (Reach(), *(Reach((band,)) for band in panel.bands)):
            reading.reread(panel, reach)
    shown = [c.value for finding in examine(panel, Settings()) for c in finding.conventions]
    assert all(math.isfinite(value) for value in shown if isinstance(value, float))


def figures_in(finding: Finding) -> list[float]:
    """Every figure a finding prints, but for the claim, which is the bidder's own."""
    steps = [step.value for step in finding.working]
    edges = [finding.expected.low, finding.expected.high] if finding.expected else []
    return [figure for figure in (*steps, *edges) if isinstance(figure, float)]


@settings(
    max_examples=60, deadline=None, suppress_health_check=[HealthCheck.too_slow, HealthCheck.data_too_large]
)
@given(panel=panels())
def test_exposure_note_never_fails(panel):
    note = exposure_note(panel, Settings())
    assert note.complete or note.missing
    assert note.complete or not note.rows
