"""Rows within a table with headings across that only part its rows: families, page numbers, sums."""

from __future__ import annotations

import re

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.labels import is_unit, statistic_of
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.words import is_aside_of_table
from speccheck.quantities import read_cell

_FEWEST = 2
"""A row with more cells than this says something of a panel."""
_NARROWEST = 2
"""Columns of headings for each cell of such a row, and one more."""
_NAMES = frozenset({"model", "panel_type", "part_number", "manufacturer"})
_WORD = re.compile(r"[^\W\d_]+")


def parts_rows(marks: Marks, cells: list[Cell], heading_row: int, following: list[int]) -> bool:
    """Whether a row parts the rows of a table: it says nothing under the headings, and the table goes on."""
    columns = {cell.column for cell in marks.rows[heading_row]}
    if not _goes_on(marks, columns, following):
        return False
    if is_aside_of_table(cells[0].text):
        return True
    silent = len(cells) <= _FEWEST and len(columns) > _NARROWEST * len(cells)
    return silent and not any(_says_something(marks, cell, heading_row) for cell in cells)


def _goes_on(marks: Marks, columns: set[int], following: list[int]) -> bool:
    """Whether one of the next rows has cells under half of the headings, and no label before its values."""
    for row in following:
        under = [cell for cell in marks.rows[row] if cell.column in columns]
        if 2 * len(under) < len(columns):
            continue
        headings = [cell for cell in under if marks.is_heading(cell)]
        return len(headings) < _FEWEST or len(headings) * 2 > len(under)
    return False


def _says_something(marks: Marks, cell: Cell, heading_row: int) -> bool:
    """Whether a cell answers to the heading of its column."""
    if not isinstance(cell.raw, str) or cell.fault:
        return True
    label = marks.headings.get((heading_row, cell.column))
    if label is None or label.parameters[0] in _NAMES:
        return False
    kind = parameters()[label.parameters[0]].kind
    words = _WORD.findall(cell.text)
    figure = any(map(str.isdigit, cell.text)) and all(
        len(word) == 1 or is_unit(word) or statistic_of(word) for word in words
    )
    return figure or kind == "text" or read_cell(cell.raw, kind=kind).status is not None
