"""Workbooks people can work in: tables with every convenience, and grids that mirror a sheet.

A workbook is always built new. The same content gives the same bytes.
"""

from __future__ import annotations

import io
import re
import zipfile
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from datetime import datetime
from pathlib import Path
from typing import Any

from openpyxl import Workbook
from openpyxl.comments import Comment
from openpyxl.styles import Protection
from openpyxl.utils import get_column_letter
from openpyxl.worksheet.datavalidation import DataValidation
from openpyxl.worksheet.dimensions import ColumnDimension
from openpyxl.worksheet.worksheet import Worksheet
from openpyxl.writer.excel import ExcelWriter

from speccheck.report.cells import Content, Rich, StyleIds, hyperlinks, sheet_data
from speccheck.report.looks import register_looks, status_rules
from speccheck.text import plain

LAST_COLUMN = 16_384
SPARE_ROWS = 500
"""Rows below a table of entries for which pick-lists and number checks hold too."""

UNDATED = datetime(2000, 1, 1)  # noqa: DTZ001 - the file format has no zone
"""Date of a workbook whose content has none, so that the same content gives the same bytes."""

Row = Sequence[tuple[int, Content, str]]


@dataclass(frozen=True, slots=True, kw_only=True)
class NumberCheck:
    """A range [in the heading's unit] outside which a person is warned, not stopped."""

    low: float
    high: float
    message: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Column:
    """One column of a table: its heading, width in characters, look and helps."""

    heading: str
    width: float = 12
    look: str = "text"
    note: str = ""
    status: Sequence[str] = ()
    choices: str = ""
    check: NumberCheck | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Table:
    """A sheet with one header row and one record a row; `frozen` columns stay in view."""

    name: str
    columns: Sequence[Column]
    rows: Sequence[Sequence[Content]]
    frozen: int = 1
    spare_rows: int = 0
    sortable: bool = True


@dataclass(frozen=True, slots=True, kw_only=True)
class Grid:
    """A sheet whose cells keep the addresses of another sheet: row, then column, then content.

    `notes` are shown beside the cell of (row, column); nothing may stand in a note only.
    """

    name: str
    cells: Mapping[int, Mapping[int, Content]]
    widths: Mapping[int, float] = field(default_factory=dict)
    notes: Mapping[tuple[int, int], str] = field(default_factory=dict)


@dataclass(frozen=True, slots=True, kw_only=True)
class Imprint:
    """What a workbook says of itself: document properties, footer, paper."""

    title: str
    subject: str = ""
    footer: str = ""
    paper: str = "A4"
    moment: datetime = UNDATED


def book_bytes(sheets: Sequence[Table | Grid], imprint: Imprint) -> bytes:
    """Return the .xlsx file that holds the sheets."""
    workbook = Workbook()
    workbook.remove(workbook.active)
    styles = register_looks(workbook)
    bodies: dict[str, _Body] = {}
    for number, sheet in enumerate(sheets, start=1):
        worksheet = workbook.create_sheet(sheet.name)
        rows = _table_rows(sheet) if isinstance(sheet, Table) else _grid_rows(sheet)
        if isinstance(sheet, Table):
            _frame_table(worksheet, sheet)
        else:
            _frame_grid(worksheet, sheet)
        _set_print(worksheet, imprint, _extent(rows), repeat_header=isinstance(sheet, Table))
        bodies[f"xl/worksheets/sheet{number}.xml"] = _Body(rows, styles)
    _set_properties(workbook, imprint)
    buffer = io.BytesIO()
    ExcelWriter(workbook, _SteadyArchive(buffer, bodies)).save()
    return buffer.getvalue()


def _table_rows(table: Table) -> dict[int, Row]:
    looks = [column.look for column in table.columns]
    rows: dict[int, Row] = {1: [(n, c.heading, "heading") for n, c in enumerate(table.columns, start=1)]}
    numbers = range(1, len(looks) + 1)
    for number, row in enumerate(table.rows, start=2):
        rows[number] = list(zip(numbers, row, looks, strict=True))
    return rows


def _grid_rows(grid: Grid) -> dict[int, Row]:
    return {
        number: [(column, item, "number") for column, item in sorted(row.items())]
        for number, row in sorted(grid.cells.items())
    }


def _extent(rows: Mapping[int, Row]) -> str:
    last_column = max((column for row in rows.values() for column, _, _ in row), default=1)
    return f"A1:{get_column_letter(last_column)}{max(rows, default=1)}"


def _frame_table(worksheet: Worksheet, table: Table) -> None:
    last_row = max(len(table.rows) + 1 + table.spare_rows, 2)
    worksheet.freeze_panes = worksheet.cell(2, table.frozen + 1)
    worksheet.auto_filter.ref = f"A1:{get_column_letter(len(table.columns))}{max(len(table.rows) + 1, 2)}"
    for number, column in enumerate(table.columns, start=1):
        letter = get_column_letter(number)
        worksheet.column_dimensions[letter].width = column.width
        worksheet.column_dimensions[letter].protection = Protection(locked=False)
        if column.note:
            worksheet.cell(1, number).comment = _comment(column.note)
        cells = f"{letter}2:{letter}{last_row}"
        for rule in status_rules(column.status):
            worksheet.conditional_formatting.add(cells, rule)
        _add_helps(worksheet, column, cells)
    beyond = ColumnDimension(
        worksheet, index=get_column_letter(len(table.columns) + 1), width=13, min=len(table.columns) + 1
    )
    beyond.max = LAST_COLUMN
    beyond.protection = Protection(locked=False)
    worksheet.column_dimensions[beyond.index] = beyond
    _lock_headings(worksheet, sortable=table.sortable)


def _add_helps(worksheet: Worksheet, column: Column, cells: str) -> None:
    if column.choices:
        choice = DataValidation(type="list", formula1=column.choices, allow_blank=True, errorStyle="warning")
        choice.showErrorMessage = True
        choice.error = "This is not on the list of the sheet Lists. Keep it all the same?"
        choice.errorTitle = column.heading[:32]
        worksheet.add_data_validation(choice)
        choice.add(cells)
    if column.check:
        check = DataValidation(
            type="decimal",
            operator="between",
            formula1=repr(column.check.low),
            formula2=repr(column.check.high),
            allow_blank=True,
            errorStyle="warning",
            showErrorMessage=True,
            showInputMessage=True,
        )
        check.error = check.prompt = column.check.message[:225]
        check.errorTitle = check.promptTitle = column.heading[:32]
        worksheet.add_data_validation(check)
        check.add(cells)


def _comment(text: str) -> Comment:
    lines = 1 + len(text) // 38 + text.count("\n")
    return Comment(text, "speccheck", height=24 + 16 * lines, width=260)


def _lock_headings(worksheet: Worksheet, *, sortable: bool) -> None:
    """Protect the sheet without password; only headings are locked, all work on the rest is allowed."""
    protection = worksheet.protection
    protection.sheet = True
    for freedom in ("formatCells", "formatColumns", "formatRows", "insertRows", "deleteRows"):
        setattr(protection, freedom, False)
    for freedom in ("insertColumns", "deleteColumns", "insertHyperlinks", "autoFilter", "pivotTables"):
        setattr(protection, freedom, False)
    protection.sort = not sortable


def _frame_grid(worksheet: Worksheet, grid: Grid) -> None:
    for number, width in grid.widths.items():
        worksheet.column_dimensions[get_column_letter(number)].width = width
    worksheet.freeze_panes = "B2"
    for (row, number), text in grid.notes.items():
        worksheet.cell(row, number).comment = _comment(plain(text, 500))


def _set_print(worksheet: Worksheet, imprint: Imprint, area: str, *, repeat_header: bool) -> None:
    worksheet.page_setup.orientation = "landscape"
    worksheet.page_setup.paperSize = 1 if imprint.paper.lower() == "letter" else 9
    worksheet.page_setup.fitToWidth, worksheet.page_setup.fitToHeight = 1, 0
    worksheet.sheet_properties.pageSetUpPr.fitToPage = True
    worksheet.print_area = area
    if repeat_header:
        worksheet.print_title_rows = "1:1"
    worksheet.oddFooter.left.text = plain(imprint.footer, 120).replace("&", "&&")
    worksheet.oddFooter.center.text = "&A, page &P of &N"
    worksheet.oddFooter.right.text = "&F, printed &D &T"


def _set_properties(workbook: Workbook, imprint: Imprint) -> None:
    properties = workbook.properties
    properties.title, properties.subject = plain(imprint.title, 200), plain(imprint.subject, 200)
    properties.creator = properties.lastModifiedBy = "speccheck"
    properties.language = "en"
    properties.created = properties.modified = imprint.moment


@dataclass(frozen=True, slots=True)
class _Body:
    """The rows of one sheet, to be put into the frame that openpyxl wrote."""

    rows: Mapping[int, Row]
    styles: StyleIds

    def put_into(self, frame: str) -> str:
        data = sheet_data(self.rows, self.styles)
        head, tail = _SHEET_DATA.split(frame, maxsplit=1)
        head = _DIMENSION.sub(f'<dimension ref="{_extent(self.rows)}"', head)
        before, found, after = tail.partition("<pageMargins")
        return f"{head}{data}{before}{hyperlinks(self._links())}{found}{after}"

    def _links(self) -> list[tuple[str, Rich]]:
        return [
            (f"{get_column_letter(column)}{number}", item)
            for number, row in self.rows.items()
            for column, item, _ in row
            if isinstance(item, Rich) and item.link
        ]


_SHEET_DATA = re.compile(r"<sheetData\s*/>|<sheetData>.*</sheetData>", re.DOTALL)
_DIMENSION = re.compile(r'<dimension ref="[^"]*"')
_NAMED_APPLICATION = re.compile(r"<Application>.*</AppVersion>", re.DOTALL)


class _SteadyArchive(zipfile.ZipFile):
    """An archive without times of its own that fills the rows into the sheets openpyxl writes."""

    def __init__(self, buffer: io.BytesIO, bodies: Mapping[str, _Body]) -> None:
        super().__init__(buffer, "w", zipfile.ZIP_DEFLATED)
        self._bodies = bodies

    def write(self, filename: Any, arcname: Any = None, *_: Any, **__: Any) -> None:
        frame = Path(filename).read_text(encoding="utf-8")
        self.writestr(arcname, self._bodies[str(arcname)].put_into(frame))

    def writestr(self, zinfo_or_arcname: Any, data: Any, *_: Any, **__: Any) -> None:
        name = str(zinfo_or_arcname)
        if name == "docProps/app.xml":
            text = data if isinstance(data, str) else data.decode("utf-8")
            data = _NAMED_APPLICATION.sub("<Application>speccheck</Application>", text)
        entry = zipfile.ZipInfo(name, date_time=(1980, 1, 1, 0, 0, 0))
        entry.create_system, entry.external_attr = 3, 0o644 << 16
        super().writestr(entry, data, zipfile.ZIP_DEFLATED, 6)
