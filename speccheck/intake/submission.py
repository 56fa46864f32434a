"""A bidder's file, the whole way: opened, laid out, read, put together by panel."""

from __future__ import annotations

import gc
from collections.abc import Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass
from pathlib import Path

from speccheck.errors import UnusableInputError
from speccheck.intake.files.grid import Grid
from speccheck.intake.files.limits import Limits
from speccheck.intake.files.opening import Book, open_book
from speccheck.intake.panels.declared import contrary_notices
from speccheck.intake.panels.doubted import Doubted
from speccheck.intake.panels.joining import joined
from speccheck.intake.panels.notices import (
    book_notices,
    doubt_notices,
    footnotes,
    grid_notices,
    note_notices,
    passed_over,
)
from speccheck.intake.panels.open_records import mirror_cell
from speccheck.intake.panels.panels import Builder, Built
from speccheck.intake.panels.reading import Reader
from speccheck.intake.tables.claims import Draft, SheetResult
from speccheck.intake.tables.labels import Labels
from speccheck.intake.tables.layout import read_layout
from speccheck.intake.tenders.tender_given_as_bid import refuse_tender
from speccheck.quantities import decimal_habit
from speccheck.records import MirrorSheet, Notice, Submission, Unread


@dataclass(frozen=True, slots=True)
class Account:
    """A submission and what became of each filled cell: sheet, row and column to a word."""

    submission: Submission
    layouts: tuple[SheetResult, ...]
    titles: tuple[Draft, ...]
    built: tuple[Built, ...]

    @property
    def roles(self) -> dict[tuple[str, int, int], str]:
        """What each filled cell was taken for; the word of reading it comes after that of its place."""
        roles = {(r.grid.name, *place): role for r in self.layouts for place, role in r.roles.items()}
        roles |= {(t.grid.name, c.cell.row, c.cell.column): "heading" for t in self.titles for c in t.claims}
        for piece in self.built:
            roles |= piece.roles
        return roles


def read_submission(
    path: str | Path, *, headings: Mapping[str, str] | None = None, limits: Limits | None = None
) -> Submission:
    """Read a bid: what it says of each panel, what was not understood, what one must know of the file.

    Parameters
    ----------
    path : workbook (.xlsx, .xlsm) or delimited text
    headings : the buyer's own headings and the parameters they mean
    limits : ceilings on the input

    Raises
    ------
    UnusableInputError : the file cannot be used at all
    """
    with _collector_at_rest():
        return _account(path, headings, limits).submission


def read_account(
    path: str | Path, *, headings: Mapping[str, str] | None = None, limits: Limits | None = None
) -> Account:
    """As `read_submission`, with what became of every filled cell."""
    with _collector_at_rest():
        return _account(path, headings, limits)


def _account(path: str | Path, headings: Mapping[str, str] | None, limits: Limits | None) -> Account:
    book = open_book(path, limits)
    refuse_tender(book)
    return account_of(book, Path(path).stem, headings or {})


@contextmanager
def _collector_at_rest() -> Iterator[None]:
    """Hold the cycle collector: it would walk the many small records again and again, and none has cycles."""
    running = gc.isenabled()
    gc.disable()
    try:
        yield
    finally:
        if running:
            gc.enable()


def account_of(book: Book, stem: str, headings: Mapping[str, str]) -> Account:
    """What an opened book says; a panel without a name is called after `stem`."""
    labels = Labels(headings)
    visible = [grid for grid in book.grids if not grid.hidden]
    results = [read_layout(grid, labels, stem) for grid in visible]
    drafts, titles = joined([draft for result in results for draft in result.drafts])
    if not drafts:
        raise _no_table(book, labels)
    texts = (cell.raw for grid in visible for cell in grid.cells.values() if isinstance(cell.raw, str))
    reader = Reader(book.file, decimal_habit(dict.fromkeys(texts)))
    doubted = Doubted({result.grid.name: result.doubts for result in results})
    builder = Builder(reader, {result.grid.name: footnotes(result) for result in results}, doubted)
    built = [builder.build(draft) for draft in drafts]
    notices: list[Notice] = book_notices(book, reader.where)
    for grid in book.grids:
        notices += grid_notices(grid, reader.where)
    unread: list[Unread] = []
    for result in results:
        notices += doubt_notices(result, reader.where)
        notices += note_notices(result, labels, reader.where)
        notices += contrary_notices(result.declared, result.grid.name, reader)
        unread += _layout_unread(result, reader)
    if labels.passed_over:
        notices.append(Notice(where=reader.where("", ""), text=passed_over(labels)))
    for piece in built:
        unread += piece.unread
    submission = Submission(
        file=book.file,
        sha256=book.sha256,
        size_bytes=book.size_bytes,
        panels=tuple(piece.panel for piece in built),
        unread=tuple(unread),
        notices=tuple(notices),
        mirror=tuple(_mirror(grid) for grid in book.grids),
    )
    return Account(submission, tuple(results), tuple(titles), tuple(built))


def _layout_unread(result: SheetResult, reader: Reader) -> list[Unread]:
    listed = [
        Unread(
            where=reader.where(result.grid.name, c.address), text=c.text, reason=reason, suggestion=nearest
        )
        for c, reason, nearest in result.unread
    ]
    known = {(c.row, c.column) for c, _, _ in result.unread}
    for place, cell in result.grid.cells.items():
        if cell.fault and place not in known and result.roles.get(place) != "reading":
            where = reader.where(result.grid.name, cell.address)
            listed.append(Unread(where=where, text=cell.text, reason=cell.fault))
    return listed


def _mirror(grid: Grid) -> MirrorSheet:
    cells = {**grid.cells, **grid.hidden_cells} if grid.hidden_cells else grid.cells
    ordered = [cells[place] for place in sorted(cells)]
    mirrored = tuple([mirror_cell(cell.address, cell.raw, cell.text, cell.formula) for cell in ordered])
    return MirrorSheet(name=grid.name, hidden=grid.hidden, cells=mirrored)


def _no_table(book: Book, labels: Labels) -> UnusableInputError:
    names = ", ".join(f"'{grid.name}'" for grid in book.grids[:5])
    left = f"; {passed_over(labels)}" if labels.passed_over else ""
    return UnusableInputError(
        book.file,
        found=f"no heading of the dictionary with a figure beside or below it (sheets {names}){left}",
        expected="a table of panel parameters such as 'Gain', 'Frequency range', 'Height'",
        remedy="check that the right file was sent, or add the house's headings to the tender workbook",
    )
