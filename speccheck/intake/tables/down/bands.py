"""Which band a figure in a table with parameters down the side is said of."""

from __future__ import annotations

from collections.abc import Iterable

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.columns import Column
from speccheck.intake.tables.down.row import RowCells
from speccheck.records import Band

NamedBand = tuple[Band | None, str]
"""Frequencies of a band, or its nickname where they are not known; neither for the whole panel."""
WHOLE: NamedBand = (None, "")


def lone_nickname(cells: Iterable[Cell]) -> str:
    """The nickname that conditions give, when they give no other: 'mid band' is then a place in a band."""
    found = {cell.text for cell in cells if is_band_label(cell.text)}
    (only,) = found if len(found) == 1 else ("",)
    return "" if find_bands(only).spans else only


def band_of_row(extra: RowCells, place: str = "") -> NamedBand | None:
    """The band a row's own band or condition cell names, if any; the condition `place` names none."""
    for text in filter(None, (extra.band.text if extra.band else "", extra.condition_text)):
        bands = find_bands(text)
        if text == place:
            continue
        if bands.proved or is_band_label(text):
            return bands.hull, "" if bands.hull else text
    return None


class ColumnBands:
    """The bands that the columns of one panel stand for."""

    def __init__(self, columns: list[Column]) -> None:
        named = {c.index: (c.band, "" if c.band else c.band_name) for c in columns if c.band or c.band_name}
        self._named: dict[int, NamedBand] = named
        self._different = len(set(named.values()))
        self._wider = {c.index: c.wider for c in columns if c.wider}
        self._first = min(named, default=0)

    def of(self, grid: Grid, cell: Cell, column: Column) -> list[NamedBand]:
        """The bands a figure is said of; empty when the columns name none.

        A figure merged over some of the bands is said of each of them, one merged over all, or standing in
        the first column only, of the whole panel: merges get lost on the way through other formats.
        """
        span = grid.span(cell)
        if span.left == span.right:
            covered = [self._named[column.index]] if column.index in self._named else []
        else:
            inside = (band for index, band in self._named.items() if span.left <= index <= span.right)
            covered = list(dict.fromkeys(inside))
        if len(covered) > 1 and (wider := self._wider_band(span.left, span.right)):
            return [(wider, "")]
        if len(covered) > 1:
            return covered if len(covered) < self._different else [WHOLE]
        if len(self._named) > 1 and column.index == self._first and self._alone(grid, cell):
            return [WHOLE]
        return covered

    def _wider_band(self, left: int, right: int) -> Band | None:
        """The wider band whose sub-bands, all of them and no other, stand in these columns."""
        inside = {self._wider.get(index) for index in self._named if left <= index <= right}
        wider = next(iter(inside)) if len(inside) == 1 else None
        beyond = any(band == wider for i, band in self._wider.items() if not left <= i <= right)
        return wider if wider and not beyond and len(self._named) > len(self._wider_columns(wider)) else None

    def _wider_columns(self, wider: Band) -> list[int]:
        return [index for index, band in self._wider.items() if band == wider]

    def _alone(self, grid: Grid, cell: Cell) -> bool:
        filled = (grid.covering(cell.row, index) is not None for index in self._named)
        return sum(filled) == 1
