"""Rows that lean on something else: a panel in another sheet of the tender, or a condition.

'Same or better than the panel in Annex 3' becomes one demand for each figure of that sheet, by the good
direction of its parameter. 'If more than 8 ports, …' becomes a premise and what then holds.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import replace

from speccheck.dictionary import parameters
from speccheck.errors import UnusableInputError
from speccheck.intake.files.opening import Book
from speccheck.intake.submission import account_of
from speccheck.intake.tenders.phrases import Habits, read_wording
from speccheck.intake.tenders.requirements import ReadRow
from speccheck.intake.tenders.tender_tables import fold
from speccheck.records import Panel, Premise, Reading, Requirement
from speccheck.records.demands import OPERATORS, blocked, doubt, doubt_code

_OWN_SHEETS = ("requirements", "settings", "headings", "deviations")
_BY_DIRECTION = {"higher": "≥", "lower": "≤", "contains": "contains"}


def resolved(rows: Sequence[ReadRow], book: Book, habits: Habits) -> tuple[ReadRow, ...]:
    """Rows with baselines taken from their sheets and conditions read; what cannot be stays as it was."""
    return tuple(
        replace(row, requirements=tuple(n for r in row.requirements for n in _resolved(r, book, habits)))
        for row in rows
    )


def _resolved(requirement: Requirement, book: Book, habits: Habits) -> tuple[Requirement, ...]:
    if requirement.operator == "baseline":
        return tuple(_as_baseline(requirement, book, habits)) or (requirement,)
    if requirement.operator == "condition":
        return _conditional(requirement, habits)
    return (requirement,)


def _as_baseline(requirement: Requirement, book: Book, habits: Habits) -> Iterator[Requirement]:
    panel = _panel_named(str(requirement.limit), book, habits)
    seen = set()
    for reading in panel.readings if panel else ():
        if (reading.parameter, reading.band) not in seen and reading.certain:
            seen.add((reading.parameter, reading.band))
            yield from _no_worse_than(reading, requirement)


def _panel_named(said: str, book: Book, habits: Habits) -> Panel | None:
    """The panel of the sheet that the words name; the one called by its name where it holds several."""
    for grid in book.grids:
        name = fold(grid.name)
        if name in _OWN_SHEETS or name not in fold(said):
            continue
        try:
            account = account_of(replace(book, grids=[grid], oddities=[]), grid.name, habits.house)
        except UnusableInputError:
            continue
        panels = account.submission.panels
        called = [panel for panel in panels if fold(panel.name) in fold(said)]
        if called or len(panels) == 1:
            return (called or panels)[0]
    return None


def _no_worse_than(reading: Reading, requirement: Requirement) -> Iterator[Requirement]:
    parameter = parameters()[reading.parameter]
    if parameter.direction == "window":
        yield replace(requirement, parameter=reading.parameter, scope=f"as {reading.where}: {reading.raw}")
        return
    operator = _BY_DIRECTION.get(parameter.direction, "")
    spans = isinstance(reading.value, tuple)
    if not operator or isinstance(reading.value, str) or (operator == "contains") != spans:
        return
    yield replace(
        requirement,
        parameter=reading.parameter,
        operator=operator,
        limit=reading.value,
        unit=reading.unit,
        statistic=reading.statistic or "each",
        bands=(reading.band,) if reading.band else (),
        at=dict(reading.at),
        scope=f"as {reading.where}",
        doubts=tuple(text for text in requirement.doubts if doubt_code(text) != "BASELINE"),
    )


def _conditional(requirement: Requirement, habits: Habits) -> tuple[Requirement, ...]:
    """The row under its premise; without a readable consequence it is a permission for a person to apply."""
    premises = read_wording(requirement.scope.removeprefix("if "), habits=habits)
    if len(premises) != 1 or premises[0].operator not in OPERATORS or blocked(premises[0].doubts):
        return (requirement,)
    clause = premises[0]
    premise = Premise(
        parameter=clause.parameter, operator=clause.operator, limit=clause.limit, unit=clause.unit
    )
    then = read_wording(str(requirement.limit), level=requirement.level, habits=habits)
    if any(c.operator not in OPERATORS or not c.parameter or blocked(c.doubts) for c in then):
        return (replace(requirement, premise=premise),)
    kept = tuple(text for text in requirement.doubts if doubt_code(text) != "CONDITION")
    return tuple(
        replace(
            requirement,
            parameter=c.parameter,
            operator=c.operator,
            limit=c.limit,
            unit=c.unit,
            statistic=c.statistic,
            bands=c.bands,
            scope="; ".join(filter(None, (requirement.scope, c.scope))),
            at=dict(c.at),
            doubts=tuple(dict.fromkeys((*kept, *c.doubts, *(_unread(c.unread))))),
            unread=c.unread,
            premise=premise,
        )
        for c in then
    )


def _unread(words: str) -> tuple[str, ...]:
    return (doubt("CONDITION", f"'{words}' was not read"),) if words else ()
