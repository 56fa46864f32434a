"""Cells that stand for others: ditto marks for the cell above, and rows that only number the columns."""

from __future__ import annotations

import re
from dataclasses import replace
from functools import lru_cache
from itertools import pairwise

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.words import fold

_DITTO = re.compile(
    r"[-–—]?\s*(?:[\"″”“〃]|'')\s*[-–—]?"
    r"|ditto|do\.|dto\.?|idem|id\.|as above|wie oben|s\. ?o\.|come sopra|j\. ?w\."
)
_HIGHEST = 2_000
_LONGEST = 12
_LONGEST_NUMBER = 5
_FEWEST = 4


@lru_cache(maxsize=20_000)
def is_ditto(text: str) -> bool:
    """Whether a cell only repeats the one above it: '"', 'ditto', 'idem'."""
    return len(text) <= _LONGEST and _DITTO.fullmatch(fold(text)) is not None


def meant(grid: Grid, cell: Cell) -> Cell:
    """The cell itself, or for a ditto mark the cell above that it stands for, put in its place."""
    if not isinstance(cell.raw, str) or not is_ditto(cell.raw):
        return cell
    for row in range(cell.row - 1, max(0, cell.row - _HIGHEST), -1):
        above = grid.cells.get((row, cell.column))
        if above is None:
            return cell
        if not isinstance(above.raw, str) or not is_ditto(above.raw):
            return replace(above, row=cell.row)
    return cell


def numbers_columns(cells: list[Cell]) -> bool:
    """Whether a row numbers the columns of a table: 1, 2, 3 … or (a), (b), (c) …"""
    if len(cells) < _FEWEST or any(len(cell.text) > _LONGEST_NUMBER for cell in cells[:2]):
        return False
    marks = [re.sub(r"\.0$", "", cell.text).strip(" ()[].").lower() for cell in cells]
    if all(mark.isdecimal() and len(mark) <= 3 for mark in marks):
        numbers = [int(mark) for mark in marks]
    elif all(len(mark) == 1 and "a" <= mark <= "z" for mark in marks):
        numbers = [ord(mark) for mark in marks]
    else:
        return False
    steps = {after - before for before, after in pairwise(numbers)}
    return steps == {1} and numbers[0] in (0, 1, ord("a"))
