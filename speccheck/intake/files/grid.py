"""Sheets as plain grids: what stands in which cell, what is merged, what is hidden.

A grid knows nothing of antennas. Rows and columns count from 1, as in addresses.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from datetime import date, datetime, time
from functools import lru_cache

Raw = str | float | int | bool | date | time | None
Place = tuple[int, int]
"""Row and column, from 1."""

_MAX_SPAN_ROWS = 5_000
_MAX_INDEXED_ROWS = 200_000


@dataclass(slots=True)
class Cell:
    """One cell: the value stored, the number format, the formula behind it if any.

    `fault` says why there is no usable value: an error value, or a formula without stored result.
    """

    row: int
    column: int
    raw: Raw
    text: str
    number_format: str = ""
    formula: str = ""
    fault: str = ""
    _address: str = field(default="", init=False, repr=False, compare=False)

    @property
    def address(self) -> str:
        """Address such as ``D12``."""
        if not self._address:
            self._address = f"{column_letters(self.column)}{self.row}"
        return self._address


@dataclass(frozen=True, slots=True)
class Span:
    """A merged range, ends included."""

    top: int
    left: int
    bottom: int
    right: int


@dataclass(slots=True)
class Grid:
    """One sheet; `cells` holds what is visible and not empty, `hidden_cells` what a viewer does not see."""

    name: str
    cells: dict[Place, Cell] = field(default_factory=dict)
    hidden_cells: dict[Place, Cell] = field(default_factory=dict)
    spans: dict[Place, Span] = field(default_factory=dict)
    hidden: bool = False
    hidden_rows: frozenset[int] = frozenset()
    _spans_by_row: dict[int, list[Span]] | None = None

    def span(self, cell: Cell) -> Span:
        """The merged range a cell heads, or the cell alone."""
        place = (cell.row, cell.column)
        return self.spans.get(place) or Span(cell.row, cell.column, cell.row, cell.column)

    def covering(self, row: int, column: int) -> Cell | None:
        """The cell seen at a place: its own, or the head of the merged range over it."""
        cell = self.cells.get((row, column))
        if cell is not None or not self.spans:
            return cell
        if self._spans_by_row is None:
            self._spans_by_row = self._index_spans()
        for span in self._spans_by_row.get(row, ()):
            if span.left <= column <= span.right:
                return self.cells.get((span.top, span.left))
        return None

    def _index_spans(self) -> dict[int, list[Span]]:
        index: dict[int, list[Span]] = {}
        room = _MAX_INDEXED_ROWS
        for span in self.spans.values():
            rows = range(span.top, min(span.bottom, span.top + _MAX_SPAN_ROWS) + 1)
            room -= len(rows)
            if room < 0:
                break
            for row in rows:
                index.setdefault(row, []).append(span)
        return index

    def rows(self) -> dict[int, list[Cell]]:
        """Visible cells by row, both in order."""
        by_row: dict[int, list[Cell]] = {}
        for place in sorted(self.cells):
            by_row.setdefault(place[0], []).append(self.cells[place])
        return by_row


@lru_cache(maxsize=20_000)
def column_letters(column: int) -> str:
    """Letters of a column: 1 is A, 27 is AA."""
    letters = ""
    while column > 0:
        column, rest = divmod(column - 1, 26)
        letters = chr(65 + rest) + letters
    return letters


def text_of(raw: Raw) -> str:
    """A stored value as text; whole floats without their decimals."""
    if raw is None:
        return ""
    if isinstance(raw, bool):
        return "TRUE" if raw else "FALSE"
    if isinstance(raw, float):
        return repr(int(raw)) if raw.is_integer() and abs(raw) < 1e15 else repr(raw)
    if isinstance(raw, datetime | date | time):
        return raw.isoformat(sep=" ") if isinstance(raw, datetime) else raw.isoformat()
    return str(raw)
