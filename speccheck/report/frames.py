"""What openpyxl does for a sheet: frozen panes, filters, widths, pick-lists, warnings, print set-up."""

from __future__ import annotations

from openpyxl import Workbook
from openpyxl.comments import Comment
from openpyxl.styles import Protection
from openpyxl.utils import get_column_letter
from openpyxl.worksheet.datavalidation import DataValidation
from openpyxl.worksheet.dimensions import ColumnDimension
from openpyxl.worksheet.worksheet import Worksheet

from speccheck.report.cells import Content, Rich
from speccheck.report.looks import status_rules
from speccheck.report.sheets import Column, Grid, Imprint, Table
from speccheck.text import plain

LAST_COLUMN = 16_384
LINE_POINTS = 15.0
TALLEST_POINTS = 409.0
WIDE_LETTERS = 1.05
"""Room a letter takes, against the digit that column widths are counted in."""


def row_heights(table: Table) -> dict[int, float]:
    """Heights [points] that show wrapped text whole, for programs that don't fit rows on opening."""
    wrapped = [(n, column.width) for n, column in enumerate(table.columns) if column.look == "wrap"]
    headings = max(_lines(column.heading, column.width - 3) for column in table.columns)
    heights = {1: LINE_POINTS * headings + 4}
    for number, row in enumerate(table.rows, start=2):
        lines = max((_lines(_text(row[n]), width) for n, width in wrapped), default=1)
        if lines > 1:
            heights[number] = min(LINE_POINTS * lines, TALLEST_POINTS)
    return heights


def _text(item: Content) -> str:
    value = item.value if isinstance(item, Rich) else item
    return value if isinstance(value, str) else ""


def _lines(text: str, width: float) -> int:
    return sum(1 + int(len(part) * WIDE_LETTERS / max(width, 1)) for part in text.split("\n"))


def frame_table(worksheet: Worksheet, table: Table) -> None:
    """Give a table its panes, filter, widths, notes, pick-lists, warnings, colours and locks."""
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


def frame_grid(worksheet: Worksheet, grid: Grid) -> None:
    """Give a mirror its widths and notes."""
    for number, width in grid.widths.items():
        worksheet.column_dimensions[get_column_letter(number)].width = width
    worksheet.freeze_panes = "B2"
    for (row, number), text in grid.notes.items():
        worksheet.cell(row, number).comment = _comment(plain(text, 500))


def set_print(worksheet: Worksheet, imprint: Imprint, area: str, *, repeat_header: bool) -> None:
    """Landscape, one page wide, header row repeated, footer with file, revision, page and time."""
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


def set_properties(workbook: Workbook, imprint: Imprint) -> None:
    """Title, subject, language and a date that is not the clock's."""
    properties = workbook.properties
    properties.title, properties.subject = plain(imprint.title, 200), plain(imprint.subject, 200)
    properties.creator = properties.lastModifiedBy = "speccheck"
    properties.language = "en"
    properties.created = properties.modified = imprint.moment
