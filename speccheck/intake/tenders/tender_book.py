"""The tender workbook: Requirements, Settings, Headings and Deviations of one buyer, read in one go."""

from __future__ import annotations

import os
from collections.abc import Iterable, Iterator
from dataclasses import replace
from datetime import UTC, datetime
from pathlib import Path

from speccheck.errors import UnusableInputError
from speccheck.intake.files.grid import Grid
from speccheck.intake.files.opening import Book, open_book
from speccheck.intake.tenders.phrases import CONTRADICTING_LEVELS, Habits
from speccheck.intake.tenders.requirement_columns import LEVEL_WORDS
from speccheck.intake.tenders.requirements import COLUMNS, ReadRow, read_requirements
from speccheck.intake.tenders.tender_references import resolved
from speccheck.intake.tenders.tender_settings import read_deviations, read_headings, read_settings
from speccheck.intake.tenders.tender_tables import Table, fold, table, trouble
from speccheck.records import CellRef, Deviation, Finding, Fit, Settings, Tender, Unread
from speccheck.records.demands import blocked, doubt_code

_NEEDED = (("wording",), ("parameter", "value"))


def read_tender(path: str | Path) -> Tender:
    """Read a tender workbook.

    Parameters
    ----------
    path : the buyer's .xlsx; only the sheet Requirements is needed

    Raises
    ------
    UnusableInputError : the file cannot be opened, or has no requirements to read
    """
    book = open_book(path)
    sheets = {fold(grid.name): grid for grid in book.grids}
    found = _requirements_table(book, sheets.get("requirements"))
    settings, troubles = _settings(sheets, book.file)
    habits = Habits(
        house=settings.headings, statistic=settings.statistic, decimal_comma=_comma(settings, sheets)
    )
    rows, labels = read_requirements(found, habits)
    rows = resolved(rows, book, habits)
    if not rows:
        raise _unusable(book.file, "no filled requirement row", sheet="Requirements")
    deviations, more = (
        read_deviations(sheets["deviations"], book.file) if "deviations" in sheets else ((), ())
    )
    settings = replace(settings, tender=settings.tender or book.file, tender_sha256=book.sha256)
    dated = _dated(settings, deviations)
    undated = tuple(_undated(settings, dated, deviations))
    settings = dated
    requirements = tuple(r for row in rows for r in row.requirements)
    return Tender(
        file=book.file,
        sha256=book.sha256,
        requirements=requirements,
        deviations=deviations,
        settings=settings,
        unread=(*labels, *_unread(found, rows, book.file)),
        findings=(
            *troubles,
            *more,
            *undated,
            *_row_troubles(rows),
            *_duplicates(rows),
            *_deviation_troubles(deviations, {r.clause for r in requirements}, settings.today),
        ),
    )


def _requirements_table(book: Book, grid: Grid | None) -> Table:
    if grid is None:
        names = ", ".join(f"'{g.name}'" for g in book.grids[:8])
        raise UnusableInputError(
            book.file,
            found=f"no sheet 'Requirements' (sheets: {names})",
            expected="a tender workbook with the sheet Requirements",
            remedy="check that this is not a bid; a tender is given with --tender, bids as arguments",
        )
    for needed in _NEEDED:
        found = table(grid, book.file, COLUMNS, needed)
        if found is not None:
            return found
    raise _unusable(book.file, "no heading row", sheet=grid.name)


def _unusable(file: str, found: str, *, sheet: str) -> UnusableInputError:
    return UnusableInputError(
        file,
        sheet=sheet,
        cell="A1",
        found=found,
        expected="headings Clause, Wording, Level (or Parameter, Operator, Value, Unit) with rows below",
        remedy="name the columns so and fill one row a requirement",
    )


def _settings(sheets: dict[str, Grid], file: str) -> tuple[Settings, tuple[Finding, ...]]:
    settings, troubles = read_settings(sheets["settings"], file) if "settings" in sheets else (Settings(), ())
    headings, more = read_headings(sheets["headings"], file) if "headings" in sheets else ({}, ())
    return replace(settings, headings=headings), (*troubles, *more)


def _comma(settings: Settings, sheets: dict[str, Grid]) -> bool | None:
    """The tender's number habit: the setting where the sheet is there, else unknown."""
    return settings.decimal_comma if "settings" in sheets and settings.decimal_comma else None


def _dated(settings: Settings, deviations: tuple[Deviation, ...]) -> Settings:
    """Settings with the day that expiry is judged by; left open where nothing can expire."""
    if settings.today or not deviations:
        return settings
    epoch = _source_date()
    day = datetime.fromtimestamp(epoch, UTC) if epoch is not None else datetime.now(UTC)
    return replace(settings, today=day.date().isoformat())


_YEAR_10000 = 253_402_300_800
"""Seconds of the first moment that a date cannot hold."""


def _source_date() -> int | None:
    """SOURCE_DATE_EPOCH of the surroundings, the usual way to repeat a run of another day."""
    epoch = os.environ.get("SOURCE_DATE_EPOCH", "")
    return int(epoch) if epoch.isdecimal() and int(epoch) < _YEAR_10000 else None


def _undated(stated: Settings, dated: Settings, deviations: tuple[Deviation, ...]) -> Iterator[Finding]:
    if dated.today != stated.today:
        source = "SOURCE_DATE_EPOCH" if _source_date() is not None else "the run, so another day may differ"
        summary = f"no Evaluation date is set; expiry was judged by {dated.today}, the day of {source}"
        ask = "Set the Evaluation date on the sheet Settings, so that the evaluation can be repeated."
        yield trouble("tender-deviations", "Accepted deviations", deviations[0].where, summary, ask)


def _unread(found: Table, rows: Iterable[ReadRow], file: str) -> Iterator[Unread]:
    for cell in found.unknown:
        where = CellRef(file, "Requirements", cell.address)
        yield Unread(where=where, text=cell.text, reason="column not known, not read")
    for row in rows:
        for where, text in dict.fromkeys((r.where, r.unread) for r in row.requirements if r.unread):
            yield Unread(where=where, text=text, reason="words of the requirement not understood")


def _row_troubles(rows: Iterable[ReadRow]) -> Iterator[Finding]:
    """One finding for each row that cannot be judged as it stands, or whose level words clash."""
    for row in rows:
        stopping = dict.fromkeys(text for r in row.requirements for text in blocked(r.doubts))
        for text in stopping:
            column = {"VALUE": "value", "UNITS": "unit", "PARAMETER": "parameter"}.get(doubt_code(text), "")
            where = row.row.where(column) if column in row.row.cells else row.requirements[0].where
            summary = f"clause {row.requirements[0].clause or '(none)'}: {text.partition(': ')[2]}"
            ask = "Complete or reword the row; until then it is not judged."
            yield trouble(
                "tender-requirement-rows", "Requirement rows", where, summary, ask, verdict=Fit.NOT_JUDGED
            )
        if row.row.text("weight") and row.requirements[0].weight is None:
            clause, found = row.requirements[0].clause, row.row.text("weight")
            summary = f"clause {clause}: found '{found}' as weight; expected a number; the row has none"
            ask = "Correct the weight."
            yield trouble("tender-weights", "Weights", row.row.where("weight"), summary, ask)
        yield from _level_troubles(row)


def _level_troubles(row: ReadRow) -> Iterator[Finding]:
    doubts = [text for r in row.requirements for text in r.doubts if doubt_code(text) == "LEVEL"]
    title, level = "Levels of requirements", row.row.text("level")
    unknown = [text for text in doubts if LEVEL_WORDS in text]
    if unknown:
        first = row.requirements[0]
        summary = f"clause {first.clause}: level {unknown[0].partition('; ')[2]}; read as {first.level.value}"
        yield trouble("tender-levels", title, row.row.where("level"), summary, "Use one of these words.")
    elif any(CONTRADICTING_LEVELS in text for text in doubts):
        first = row.requirements[0]
        summary = f"clause {first.clause}: {CONTRADICTING_LEVELS}; read as {first.level.value}"
        yield trouble("tender-levels", title, first.where, summary, "Use words of one level.")
    elif level and doubts:
        clause = row.requirements[0].clause
        summary = f"clause {clause}: level '{level}' beside the words of the row; the column counts"
        ask = "Use one level in the column and in the wording."
        yield trouble("tender-levels", title, row.row.where("level"), summary, ask)


def _duplicates(rows: Iterable[ReadRow]) -> Iterator[Finding]:
    first: dict[str, CellRef] = {}
    for row in rows:
        clause = row.row.text("clause")
        if not clause:
            continue
        where = row.row.where("clause")
        if clause in first:
            summary = f"clause {clause} stands already in {first[clause]}"
            ask = "Give each row a clause number of its own; deviations refer to it."
            yield trouble("tender-duplicate-clauses", "Duplicate clauses", where, summary, ask)
        first.setdefault(clause, where)


def _deviation_troubles(deviations: Iterable[Deviation], clauses: set[str], today: str) -> Iterator[Finding]:
    title = "Accepted deviations"
    for deviation in deviations:
        if deviation.expires < today:
            which = f"deviation from clause {deviation.clause} for {deviation.offer}"
            summary = f"{which} expired on {deviation.expires}"
            ask = "It no longer counts. Renew or remove it."
            yield trouble("tender-deviations", title, deviation.where, summary, ask)
        if deviation.clause not in clauses:
            summary = f"deviation from clause {deviation.clause}, which no requirement has"
            yield trouble("tender-deviations", title, deviation.where, summary, "Correct the clause number.")
