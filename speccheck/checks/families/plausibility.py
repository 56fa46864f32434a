"""Figures that no panel can have: slips of unit, sign or column, found before any physics."""

from __future__ import annotations

import math

from speccheck.checks.registry import Case, Judgement, check
from speccheck.dictionary import Parameter, parameters
from speccheck.records import Amount, Fit, Interval, Reading, Step

_NUMERIC = frozenset({"number", "count", "range", "scan", "bands"})
_FIGURE_OR_WORDS = frozenset({"connectors", "polarisation", "size"})
_MAY_BE_NAMED = frozenset({"bands", "scan"})


def impossible(reading: Reading) -> bool:
    """Whether a figure cannot be what its heading says, whatever the panel."""
    return _trouble(reading) != ""


def _trouble(reading: Reading) -> str:
    parameter = parameters().get(reading.parameter)
    if parameter is None or parameter.kind not in _NUMERIC | _FIGURE_OR_WORDS:
        return ""
    if parameter.kind in _FIGURE_OR_WORDS and isinstance(reading.value, str):
        return ""
    if isinstance(reading.value, str):
        return "" if parameter.kind in _MAY_BE_NAMED else "is text where a figure belongs"
    return _number_trouble(parameter, reading.value if isinstance(reading.value, tuple) else (reading.value,))


def _number_trouble(parameter: Parameter, ends: tuple[float, ...]) -> str:
    if not all(math.isfinite(end) for end in ends):
        return "is not a finite figure"
    if parameter.kind == "count" and any(end != round(end) for end in ends):
        return "is a count but not a whole number"
    if parameter.kind == "bands" and len(ends) > 1 and ends[0] >= ends[-1]:
        return "is a range whose upper edge does not lie above its lower edge"
    low, high = parameter.possible or (-math.inf, math.inf)
    if any(not low <= end <= high for end in ends):
        return f"lies outside {_span(parameter)}, the figures possible for {parameter.label.lower()}"
    return ""


def _span(parameter: Parameter) -> str:
    low, high = parameter.possible or (-math.inf, math.inf)
    return f"{low:g} to {high:g} {parameter.unit}".strip()


@check(
    "figure-plausible",
    "Figures are possible",
    needs=(),
    source="dictionary of parameters: range possible for any panel; common practice",
    scope="panel",
    sees_impossible=True,
)
def figure_plausible(case: Case) -> tuple[Judgement, ...]:
    """Holds every figure against the range that any panel could have.

    A negative length, a frequency of zero, 1e308 or a fraction of a connector is a slip of unit, sign
    or column. Such a figure is reported here and used in no other check. Figures that are merely
    unusual are not reported.

    Formula
    low ≤ figure ≤ high of the dictionary; counts are whole; text is no figure

    Assumptions
    The ranges are far wider than the market: they catch slips, not poor panels.

    Worked example
    A panel height of -1430 mm: a length is 0.01 m or more, so -1.43 m does not fit.
    """
    troubled = [(r, _trouble(r)) for r in case.panel.readings if r.certain]
    return tuple(_judgement(reading, trouble) for reading, trouble in troubled if trouble)


def _judgement(reading: Reading, trouble: str) -> Judgement:
    parameter = parameters()[reading.parameter]
    low, high = parameter.possible or (None, None)
    text = isinstance(reading.value, str)
    shown = reading.raw if len(reading.raw) <= 60 else reading.raw[:60] + "…"
    return Judgement(
        verdict=Fit.NOT_JUDGED if text else Fit.DOES_NOT_FIT,
        summary=f"{parameter.label} '{shown}' ({reading.where}) {trouble}. The figure is used in no check.",
        claimed=Amount(reading.value, reading.unit),
        expected=None if text else Interval(low, high, parameter.unit),
        working=() if text else (Step("Possible figures", _span(parameter), shown, parameter.unit),),
        assumptions=("The range is far wider than the market; it catches slips only.",),
        question=f"Please give {parameter.label.lower()} ({reading.where}) as a figure"
        + (f" in {parameter.unit}." if parameter.unit else "."),
        missing=(reading.parameter,) if text else (),
        used=(reading,),
        alone=True,
    )
