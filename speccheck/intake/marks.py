"""A first look at every cell of a sheet: headings, pasted lines, plain values."""

from __future__ import annotations

from dataclasses import dataclass, field

from speccheck.intake.grid import Cell, Grid
from speccheck.intake.labels import Label, Labels, is_unit
from speccheck.intake.words import column_role

_LINE_MARKS = (":", "=", "\t", "...", "…")


@dataclass(slots=True)
class Marks:
    """Headings and pasted lines of a sheet by place, and its cells by row."""

    grid: Grid
    labels: Labels
    rows: dict[int, list[Cell]]
    headings: dict[tuple[int, int], Label] = field(default_factory=dict)
    lines: dict[tuple[int, int], tuple[Label, str]] = field(default_factory=dict)

    def is_heading(self, cell: Cell) -> bool:
        """Whether a cell is a heading of the dictionary."""
        return (cell.row, cell.column) in self.headings

    def heading_columns(self, row: int) -> list[int]:
        """Columns of a row that hold headings."""
        return [cell.column for cell in self.rows.get(row, ()) if (row, cell.column) in self.headings]


def mark(grid: Grid, labels: Labels) -> Marks:
    """Look at every visible cell once."""
    marks = Marks(grid, labels, grid.rows())
    for place, cell in grid.cells.items():
        raw = cell.raw
        if not isinstance(raw, str) or cell.fault or len(raw) > 400 or is_unit(raw):
            continue
        label = labels.of(raw)
        line = None
        if (not label or label.bands.spans) and any(mark in raw for mark in _LINE_MARKS):
            line = labels.parse_line(raw)
        if line is not None:
            marks.lines[place] = line
        elif label:
            marks.headings[place] = label
    return marks


def looks_like_value(cell: Cell) -> bool:
    """Whether a cell could hold a figure."""
    return not isinstance(cell.raw, str) or any(letter.isdigit() for letter in cell.text)


def says_column_role(cell: Cell) -> bool:
    """Whether a cell only says what its column is for."""
    return isinstance(cell.raw, str) and bool(column_role(cell.raw))
