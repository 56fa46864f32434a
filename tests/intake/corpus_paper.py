"""Paper for the corpus: sheets filled with rows."""

from __future__ import annotations

from collections.abc import Sequence

from openpyxl import Workbook
from openpyxl.utils.cell import column_index_from_string, coordinate_from_string
from openpyxl.worksheet.worksheet import Worksheet

Row = Sequence[object]


def place(sheet: Worksheet, corner: str, rows: Sequence[Row]) -> None:
    """Write rows with their upper left corner in a cell; None leaves a cell empty."""
    letters, top = coordinate_from_string(corner)
    left = column_index_from_string(letters)
    for down, row in enumerate(rows):
        for across, value in enumerate(row):
            if value is not None:
                sheet.cell(top + down, left + across, value)


def sheet(book: Workbook, title: str, rows: Sequence[Row] = (), corner: str = "A1") -> Worksheet:
    """The first sheet of a new book under a title, or a further one, with rows."""
    first = book.active if book.active and book.active.title == "Sheet" else None
    made = first or book.create_sheet()
    made.title = title
    place(made, corner, rows)
    return made


def merge(made: Worksheet, areas: str) -> None:
    """Merge areas such as ``A1:B1 C3:C5``."""
    for area in areas.split():
        made.merge_cells(area)
