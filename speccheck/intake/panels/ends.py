"""A range whose two ends stand in cells of their own, under 'min' and 'max' or 'from' and 'to'."""

from __future__ import annotations

from dataclasses import replace

from speccheck.dictionary import parameters
from speccheck.intake.panels.found import Found, Outcome
from speccheck.intake.tables.claims import Claim
from speccheck.records import Sense

_RANGES = ("range", "scan", "bands")


def join_ends(outcomes: list[tuple[Claim, Outcome]]) -> None:
    """Make one range of the lower and the upper end; its place is the cell of the lower one."""
    lower: dict[tuple[str, int, str, object], Found] = {}
    for claim, outcome in outcomes:
        if claim.context.statistic not in ("min", "max") or len(outcome.found) != 1:
            continue
        found = outcome.found[0]
        if parameters()[found.parameter].kind not in _RANGES or not isinstance(found.value, float):
            continue
        key = (outcome.sheet, claim.cell.row, found.parameter, found.band)
        first = lower.get(key)
        if claim.context.statistic == "min":
            lower[key] = found
        elif first is not None and isinstance(first.value, float) and first.value < found.value:
            first.value = (first.value, found.value)
            first.raw = f"{first.raw} … {found.raw}"
            first.figure = replace(first.figure, sense=Sense.NOMINAL, statistic="")
            first.recognised = f"{first.figure.recognised}; upper end from {found.where.cell}"
            outcome.found = []
            outcome.joined = True
