"""A column of families, such as 'Tor' merged down beside the models of that family."""

from __future__ import annotations

from collections.abc import Iterator

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.across.fields import Field
from speccheck.intake.tables.across.regions import Across
from speccheck.intake.tables.labels import Label

_FAMILY = ("panel_type",)


def settle_families(grid: Grid, table: Across, fields: dict[int, Field], named: int) -> list[int]:
    """Columns whose merged cells name the family of each of their rows.

    Where the cells are not merged, a name over empty cells may or may not hold for these: it groups rows.
    """
    merged = []
    for index, found in fields.items():
        if index == named or not named or found.label.parameters != _FAMILY:
            continue
        filled = [row for row in table.data_rows if grid.cells.get((row, index)) is not None]
        if any(grid.span(grid.cells[row, index]).bottom > row for row in filled):
            merged.append(index)
        elif filled[0] == table.data_rows[0] and 2 * len(filled) <= len(table.data_rows):
            found.label, found.role = Label(found.label.text), "group"
    return merged


def families(grid: Grid, merged: list[int], row: int) -> Iterator[Cell]:
    """The cells that name the family of a row from above it."""
    for index in merged:
        cell = grid.covering(row, index)
        if cell is not None and cell.row != row:
            yield cell
