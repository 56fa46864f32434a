"""A range whose two ends stand in cells of their own, under 'min' and 'max' or 'from' and 'to'."""

from __future__ import annotations

from dataclasses import replace

from speccheck.dictionary import parameters
from speccheck.intake.panels.found import Found, Outcome
from speccheck.intake.tables.claims import Claim
from speccheck.intake.tables.edges import edge_of
from speccheck.records import Sense, Unread

_RANGES = ("range", "scan", "bands")
_ONE_EDGE = "one edge of a band without the other"
_FREQUENCY = ("frequency_range", "operating_bands")


def join_ends(outcomes: list[tuple[Claim, Outcome]]) -> None:
    """Make one range of the lower and the upper end; its place is the cell of the lower one."""
    lower: dict[tuple[str, int, str, object], Found] = {}
    below: dict[tuple[str, int, int], Outcome] = {}
    for claim, outcome in outcomes:
        if claim.context.label.parameters[0] in _FREQUENCY and len(outcome.found) == 1:
            _join_edges(claim, outcome, below)
        if claim.context.statistic not in ("min", "max") or len(outcome.found) != 1:
            continue
        found = outcome.found[0]
        if parameters()[found.parameter].kind not in _RANGES or not isinstance(found.value, float):
            continue
        key = (outcome.sheet, claim.cell.row, found.parameter, found.band)
        first = lower.get(key)
        if claim.context.statistic == "min":
            lower[key] = found
        elif first is not None:
            _join(first, found, outcome)


def _join_edges(claim: Claim, outcome: Outcome, below: dict[tuple[str, int, int], Outcome]) -> None:
    """'Frequency from' above 'Frequency to' make one band; `below` holds lower edges by the place under them.

    An edge is no range: it stays unread until the other one is found.
    """
    found, edge = outcome.found[0], edge_of(claim.context.heading)
    if not edge or not isinstance(found.value, float):
        return
    lower = below.pop((outcome.sheet, claim.cell.row, claim.cell.column), None)
    outcome.found, outcome.unread = [], Unread(where=found.where, text=found.raw, reason=_ONE_EDGE)
    if edge == "lower":
        below[outcome.sheet, claim.cell.row + 1, claim.cell.column] = outcome
        outcome.kept = found
    elif lower is not None and lower.kept is not None:
        _join(lower.kept, found, outcome)
        if outcome.joined:
            lower.found, lower.unread, outcome.unread = [lower.kept], None, None


def _join(first: Found, found: Found, outcome: Outcome) -> None:
    if not (isinstance(first.value, float) and isinstance(found.value, float) and first.value < found.value):
        return
    first.value = (first.value, found.value)
    first.raw = f"{first.raw} … {found.raw}"
    first.figure = replace(first.figure, sense=Sense.NOMINAL, statistic="")
    first.recognised = f"{first.figure.recognised}; upper end from {found.where.cell}"
    outcome.found = []
    outcome.joined = True
