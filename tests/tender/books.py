"""Tender workbooks and tables for the tests, made by hand."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from pathlib import Path
from typing import Any

from openpyxl import Workbook

from speccheck.intake.files.grid import Cell
from speccheck.intake.tenders.tender_tables import Row, Table

Cells = Sequence[Any]


def table_of(rows: Sequence[Mapping[str, str]]) -> Table:
    """A table of requirement rows without a file."""
    columns = tuple(dict.fromkeys(name for row in rows for name in row))
    made = []
    for number, row in enumerate(rows, start=2):
        cells = {name: Cell(number, columns.index(name) + 1, text, text) for name, text in row.items()}
        made.append(Row("tender.xlsx", "Requirements", number, cells))
    return Table(tuple(made), columns, ())


def write_tender(path: Path, requirements: Sequence[Cells], **sheets: Sequence[Cells]) -> Path:
    """A tender workbook: the first row of each sheet holds its headings."""
    book = Workbook()
    sheet = book.active
    assert sheet is not None
    sheet.title = "Requirements"
    for row in requirements:
        sheet.append(list(row))
    for name, rows in sheets.items():
        other = book.create_sheet(name)
        for row in rows:
            other.append(list(row))
    book.save(path)
    return path
