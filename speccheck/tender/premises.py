"""Rows that hold only under a condition: the condition is judged first, on the same offer."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from dataclasses import replace

from speccheck.dictionary import parameters
from speccheck.records import Compliance, Level, MatrixRow, Requirement
from speccheck.records.words import FAILED, PASSED

Judge = Callable[[Requirement], Iterator[MatrixRow]]


def under_premise(requirement: Requirement, judge: Judge) -> Iterator[MatrixRow]:
    """Rows of a requirement with a premise.

    Where the premise does not hold the row demands nothing and is met; where it cannot be told the row
    is not judged. A permission is shown with what holds and left to a person: it changes other rows.
    """
    asked = _premise(requirement)
    rows = tuple(judge(asked))
    holds = _holds(rows)
    said = f"{_words(asked)} ({_figure(rows)})"
    if requirement.operator == "condition":
        state = {True: "holds", False: "does not hold", None: "cannot be told"}[holds]
        note = f"the condition {said} {state}; a person applies '{requirement.limit}' to the rows it changes"
        yield MatrixRow(requirement=requirement, verdict=Compliance.NOT_JUDGED, note=note)
    elif holds is None:
        note = f"whether the condition {said} holds cannot be told"
        yield MatrixRow(requirement=requirement, verdict=Compliance.NOT_JUDGED, note=note)
    elif not holds:
        offered = rows[0].offered if rows else None
        note = f"demands nothing: the condition {said} does not hold"
        yield MatrixRow(requirement=requirement, verdict=Compliance.MEETS, offered=offered, note=note)
    else:
        for row in judge(replace(requirement, premise=None)):
            note = "; ".join(filter(None, (row.note, f"the condition {said} holds")))
            yield replace(row, requirement=requirement, note=note)


def _premise(requirement: Requirement) -> Requirement:
    premise = requirement.premise
    if premise is None:
        raise ValueError("the requirement has no premise")
    return replace(
        requirement,
        level=Level.INFORMATION,
        parameter=premise.parameter,
        operator=premise.operator,
        limit=premise.limit,
        unit=premise.unit,
        statistic="",
        bands=(),
        at={},
        doubts=(),
        premise=None,
    )


def _holds(rows: Sequence[MatrixRow]) -> bool | None:
    verdicts = {row.verdict for row in rows}
    if verdicts and verdicts <= set(PASSED):
        return True
    return False if verdicts and verdicts <= set(FAILED) else None


def _words(asked: Requirement) -> str:
    limit = asked.limit
    shown = f"{limit:g}" if isinstance(limit, float | int) else str(limit)
    return f"{parameters()[asked.parameter].label} {asked.operator} {shown} {asked.unit}".rstrip()


def _figure(rows: Sequence[MatrixRow]) -> str:
    offered = next((row.offered for row in rows if row.offered is not None), None)
    return f"offered {offered.raw.strip()}" if offered else "not stated"
