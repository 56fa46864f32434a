"""Sheets of a tender workbook as tables under known headings; every row keeps its cells."""

from __future__ import annotations

import difflib
from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from speccheck.intake.files.grid import Cell, Grid
from speccheck.records import CellRef, Finding, Fit
from speccheck.text import plain

_SEARCHED_ROWS = 40


@dataclass(frozen=True, slots=True)
class Row:
    """One row of a table: cells by column name."""

    file: str
    sheet: str
    number: int
    cells: Mapping[str, Cell]

    def text(self, column: str) -> str:
        """Text of a column, '' if empty."""
        cell = self.cells.get(column)
        return "" if cell is None else plain(cell.text.strip())

    def where(self, column: str = "") -> CellRef:
        """Place of a column's cell, or of the first filled cell of the row."""
        cell = self.cells.get(column) or next(iter(self.cells.values()))
        return CellRef(self.file, self.sheet, cell.address)


@dataclass(frozen=True, slots=True)
class Table:
    """Rows of one sheet and the headings that were not recognised."""

    rows: tuple[Row, ...]
    columns: tuple[str, ...]
    unknown: tuple[Cell, ...]


def fold(text: str) -> str:
    """A heading in lower case, without brackets, punctuation and doubled spaces."""
    head = text.casefold().split("(")[0]
    return " ".join("".join(c if c.isalnum() or c in "/#★" else " " for c in head).split())


def table(
    grid: Grid, file: str, columns: Mapping[str, tuple[str, ...]], needed: tuple[str, ...]
) -> Table | None:
    """The table of a sheet whose heading row names all `needed` columns; None if there is no such row."""
    by_row: dict[int, list[Cell]] = {}
    for (row, _), cell in sorted(grid.cells.items()):
        by_row.setdefault(row, []).append(cell)
    names = {fold(word): column for column, words in columns.items() for word in words}
    for number in sorted(by_row)[:_SEARCHED_ROWS]:
        heads = {cell.column: names[fold(cell.text)] for cell in by_row[number] if fold(cell.text) in names}
        if set(needed) <= set(heads.values()):
            unknown = tuple(cell for cell in by_row[number] if cell.column not in heads)
            below = {row: cells for row, cells in by_row.items() if row > number}
            rows = tuple(_rows(below, heads, file, grid.name))
            return Table(rows, tuple(dict.fromkeys(heads.values())), unknown)
    return None


def _rows(by_row: Mapping[int, list[Cell]], heads: Mapping[int, str], file: str, sheet: str) -> Iterator[Row]:
    for number, cells in by_row.items():
        known = {heads[cell.column]: cell for cell in cells if cell.column in heads and cell.text.strip()}
        if known:
            yield Row(file, sheet, number, known)


def trouble(
    slug: str, title: str, where: CellRef, summary: str, ask: str, *, verdict: Fit = Fit.DOUBTFUL
) -> Finding:
    """A reading trouble of the tender workbook, in the shape of every finding."""
    return Finding(
        check=slug,
        title=title,
        verdict=verdict,
        summary=f"{where}: {summary}",
        question=ask,
        source="tender workbook",
        where=(where,),
    )


def nearest(word: str, known: Mapping[str, str] | tuple[str, ...]) -> str:
    """The known word most like `word`, '' if none is near."""
    close = difflib.get_close_matches(fold(word), [fold(k) for k in known], n=1, cutoff=0.6)
    return close[0] if close else ""
