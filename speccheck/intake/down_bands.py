"""Which band a figure in a table with parameters down the side is said of."""

from __future__ import annotations

from speccheck.intake.bands import find_bands, is_band_label
from speccheck.intake.columns import Column
from speccheck.intake.down_row import RowCells
from speccheck.intake.grid import Cell, Grid
from speccheck.records import Band

NamedBand = tuple[Band | None, str]
"""Frequencies of a band, or its nickname where they are not known; neither for the whole panel."""
WHOLE: NamedBand = (None, "")


def band_of_row(extra: RowCells) -> NamedBand | None:
    """The band a row's own band or condition cell names, if any."""
    for text in filter(None, (extra.band.text if extra.band else "", extra.condition_text)):
        bands = find_bands(text)
        if bands.proved or is_band_label(text):
            return bands.hull, "" if bands.hull else text
    return None


def bands_of_columns(grid: Grid, mine: list[Column], cell: Cell, column: Column) -> list[NamedBand]:
    """The bands one panel's columns give a figure; empty when they name none.

    A figure merged over some of the bands is said of each of them, one merged over all, or standing in
    the first column only, of the whole panel: merges get lost on the way through other formats.
    """
    named = {c.index: (c.band, "" if c.band else c.band_name) for c in mine if c.band or c.band_name}
    if not named:
        return []
    span = grid.span(cell)
    covered = list(dict.fromkeys(band for index, band in named.items() if span.left <= index <= span.right))
    if len(covered) > 1:
        return covered if len(covered) < len(set(named.values())) else [WHOLE]
    filled = [index for index in named if grid.covering(cell.row, index) is not None]
    if len(named) > 1 and filled == [column.index] == [min(named)]:
        return [WHOLE]
    return covered
