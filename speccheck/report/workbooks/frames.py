"""A sheet of a generated workbook: panes, filter, widths, colours, pick-lists, warnings, print set-up.

The order of the elements is that of the schema of ISO/IEC 29500-1, CT_Worksheet.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from textwrap import wrap

from speccheck.report.workbooks.cells import (
    Content,
    Rich,
    column_letter,
    hyperlinks,
    row_xml,
    xml_attribute,
    xml_text,
)
from speccheck.report.workbooks.looks import status_rules, style_number
from speccheck.report.workbooks.sheets import Column, Grid, Imprint, Table
from speccheck.text import plain

LAST_COLUMN = 16_384
LINE_POINTS = 15.0
TALLEST_POINTS = 409.0
LONGEST_FOOTER = 90
"""Letters of our own in a footer, which holds 255 with its codes and doubled ampersands."""
WIDEST_PAGE = 180
"""Characters on a landscape page whose letters stay above 7 points; 11 points take about 120."""
WIDE_LETTERS = 1.05
"""Room a letter takes, against the digit that column widths are counted in."""

_MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main"
_RELATIONS = "http://schemas.openxmlformats.org/officeDocument/2006/relationships"
_ALLOWED = [
    *("formatCells", "formatColumns", "formatRows", "insertColumns", "insertRows", "insertHyperlinks"),
    *("deleteColumns", "deleteRows", "autoFilter", "pivotTables"),
]

Row = Sequence[tuple[int, Content, str]]


def sheet_xml(sheet: Table | Grid, imprint: Imprint) -> Iterator[str]:
    """Yield the worksheet part of a sheet, a row at a time: a long table is never in memory as text."""
    frozen = sheet.frozen if isinstance(sheet, Table) else 1
    yield (
        f'<worksheet xmlns="{_MAIN}" xmlns:r="{_RELATIONS}">'
        '<sheetPr><pageSetUpPr fitToPage="1"/></sheetPr>'
        f'<dimension ref="{extent(sheet)}"/>'
        f"{_view(frozen)}"
        '<sheetFormatPr defaultRowHeight="15"/>'
        f"{_columns(sheet)}<sheetData>"
    )
    links: list[tuple[str, Rich]] = []
    for number, row, height, kept in _rows_of(sheet):
        links += _links(number, row)
        yield row_xml(number, row, height, kept=kept)
    yield (
        f"</sheetData>{_helps(sheet) if isinstance(sheet, Table) else ''}"
        f"{hyperlinks(links)}"
        '<pageMargins left="0.6" right="0.6" top="0.6" bottom="0.7" header="0.3" footer="0.3"/>'
        f'<pageSetup paperSize="{1 if imprint.paper.lower() == "letter" else 9}" orientation="landscape"'
        f' fitToWidth="{pages_across(sheet)}" fitToHeight="0" pageOrder="overThenDown"/>'
        f"<headerFooter><oddFooter>{xml_text(_footer(imprint))}</oddFooter></headerFooter>"
        f"{'<legacyDrawing r:id=' + chr(34) + 'notes' + chr(34) + '/>' if notes_of(sheet) else ''}"
        "</worksheet>"
    )


def pages_across(sheet: Table | Grid) -> int:
    """Sheets of paper side by side, so that print is not shrunk below what can be read."""
    return max(1, -(-round(sum(_printed_widths(sheet))) // WIDEST_PAGE))


def _printed_widths(sheet: Table | Grid) -> Sequence[float]:
    """Widths [characters] of the columns that go on paper."""
    if isinstance(sheet, Grid):
        return [sheet.widths.get(n, 9.0) for n in range(1, max(sheet.widths, default=0) + 1)]
    return [column.width for column in sheet.columns[: sheet.printed or None]]


def _rows_of(sheet: Table | Grid) -> Iterator[tuple[int, Row, float | None, bool]]:
    """Yield number, cells (column number, content, look), height and whether it is kept, of each row.

    A height is kept where text that is not printed would stretch the row on paper.
    """
    if isinstance(sheet, Grid):
        for number, cells in sorted(sheet.cells.items()):
            yield number, [(column, item, "number") for column, item in sorted(cells.items())], None, False
        return
    looks = [column.look for column in sheet.columns]
    printed = sheet.printed or len(looks)
    wrapped = [(n, column.width) for n, column in enumerate(sheet.columns) if column.look in ("wrap", "link")]
    on_paper = [(n, width) for n, width in wrapped if n < printed]
    headings: Row = [(n, c.heading, "heading") for n, c in enumerate(sheet.columns, start=1)]
    yield 1, headings, _heading_height(sheet), False
    numbers = range(1, len(looks) + 1)
    for number, row in enumerate(sheet.rows, start=2):
        height = _row_height(row, on_paper)
        kept = printed < len(looks) and _row_height(row, wrapped) > height
        tall = height if kept or height > LINE_POINTS else None
        yield number, list(zip(numbers, row, looks, strict=True)), tall, kept


def extent(sheet: Table | Grid) -> str:
    """The range that holds everything, from A1."""
    if isinstance(sheet, Table):
        return f"A1:{column_letter(len(sheet.columns))}{len(sheet.rows) + 1}"
    last = max((column for row in sheet.cells.values() for column in row), default=1)
    return f"A1:{column_letter(last)}{max(sheet.cells, default=1)}"


def notes_of(sheet: Table | Grid) -> dict[tuple[int, int], str]:
    """Notes by (row, column), in reading order."""
    if isinstance(sheet, Grid):
        return dict(sorted(sheet.notes.items()))
    return {(1, n): column.note for n, column in enumerate(sheet.columns, start=1) if column.note}


def defined_names(sheet: Table | Grid, number: int) -> str:
    """Return the names that hold filter range, print area and repeated rows of the sheet at `number`."""
    area = extent(sheet)
    name = xml_text("'" + sheet.name.replace("'", "''") + "'")
    found = []
    if isinstance(sheet, Table):
        found.append(("_FilterDatabase", f' localSheetId="{number}" hidden="1"', _filter_range(sheet)))
        if sheet.printed:
            area = f"A1:{column_letter(sheet.printed)}{len(sheet.rows) + 1}"
    found.append(("Print_Area", f' localSheetId="{number}"', area))
    text = "".join(
        f'<definedName name="_xlnm.{kind}"{where}>{name}!{_absolute(span)}</definedName>'
        for kind, where, span in found
    )
    titles = [f"{name}!$1:$1"] if isinstance(sheet, Table) else []
    if pages_across(sheet) > 1:
        kept = sheet.frozen if isinstance(sheet, Table) else 1
        titles.insert(0, f"{name}!$A:${column_letter(kept)}")
    if titles:
        kind = f'name="_xlnm.Print_Titles" localSheetId="{number}"'
        text += f"<definedName {kind}>{','.join(titles)}</definedName>"
    return text


def _absolute(span: str) -> str:
    return ":".join(
        f"${end.rstrip('0123456789')}${end.lstrip('ABCDEFGHIJKLMNOPQRSTUVWXYZ')}" for end in span.split(":")
    )


def _filter_range(table: Table) -> str:
    return f"A1:{column_letter(len(table.columns))}{max(len(table.rows) + 1, 2)}"


def _view(frozen: int) -> str:
    corner = f"{column_letter(frozen + 1)}2"
    return (
        '<sheetViews><sheetView workbookViewId="0">'
        f'<pane xSplit="{frozen}" ySplit="1" topLeftCell="{corner}" activePane="bottomRight" state="frozen"/>'
        '<selection pane="topRight"/><selection pane="bottomLeft"/>'
        f'<selection pane="bottomRight" activeCell="{corner}" sqref="{corner}"/>'
        "</sheetView></sheetViews>"
    )


def _columns(sheet: Table | Grid) -> str:
    """Widths; in tables every cell below and beside the headings may be changed."""
    if isinstance(sheet, Grid):
        widths = "".join(
            f'<col min="{n}" max="{n}" width="{width:g}" customWidth="1"/>'
            for n, width in sorted(sheet.widths.items())
        )
        return f"<cols>{widths}</cols>" if widths else ""
    free = style_number("number")
    columns = [
        f'<col min="{n}" max="{n}" width="{column.width:g}" style="{free}" customWidth="1"/>'
        for n, column in enumerate(sheet.columns, start=1)
    ]
    columns.append(
        f'<col min="{len(columns) + 1}" max="{LAST_COLUMN}" width="13" style="{free}" customWidth="1"/>'
    )
    return f"<cols>{''.join(columns)}</cols>"


def _helps(table: Table) -> str:
    """Locks without password, filter, status colours, pick-lists and number warnings of a table."""
    last_row = max(len(table.rows) + 1, 2)
    freedoms = [*_ALLOWED, "sort"] if table.sortable else _ALLOWED
    allowed = "".join(f' {name}="0"' for name in freedoms)
    colours, checks, priority = "", [], 1
    for number, column in enumerate(table.columns, start=1):
        cells = f"{column_letter(number)}2:{column_letter(number)}{last_row}"
        if column.status:
            rules = status_rules(column.status, priority)
            priority += len(column.status)
            colours += f'<conditionalFormatting sqref="{cells}">{rules}</conditionalFormatting>'
        checks += _checks(column, cells)
    validations = f'<dataValidations count="{len(checks)}">{"".join(checks)}</dataValidations>'
    return (
        f'<sheetProtection sheet="1"{allowed}/><autoFilter ref="{_filter_range(table)}"/>'
        f"{colours}{validations if checks else ''}"
    )


def _checks(column: Column, cells: str) -> list[str]:
    """Data validations that warn and never stop."""
    title = xml_attribute(column.heading[:32])
    found = []
    if column.choices:
        found.append(
            f'<dataValidation type="list" errorStyle="warning" allowBlank="1" showErrorMessage="1"'
            f' errorTitle="{title}" error="This is not on the list of the sheet Lists. Keep it all the same?"'
            f' sqref="{cells}"><formula1>{xml_text(column.choices)}</formula1></dataValidation>'
        )
    if column.check:
        message = xml_attribute(column.check.message[:225])
        found.append(
            f'<dataValidation type="decimal" errorStyle="warning" operator="between" allowBlank="1"'
            f' showInputMessage="1" showErrorMessage="1" errorTitle="{title}" error="{message}"'
            f' promptTitle="{title}" prompt="{message}" sqref="{cells}">'
            f"<formula1>{column.check.low!r}</formula1><formula2>{column.check.high!r}</formula2></dataValidation>"
        )
    return found


def _links(number: int, row: Row) -> Iterator[tuple[str, Rich]]:
    for column, item, _ in row:
        if isinstance(item, Rich) and item.link:
            yield f"{column_letter(column)}{number}", item


def _footer(imprint: Imprint) -> str:
    """File, revision, page and time of printing; an ampersand of the text is doubled."""
    said = plain(imprint.footer, LONGEST_FOOTER).replace("&", "&&")
    return f"&L&F\n{said}&C&A, page &P of &N&Rprinted &D &T"


def _heading_height(table: Table) -> float:
    lines = max(len(wrap(column.heading, max(int(column.width) - 3, 4))) for column in table.columns)
    return LINE_POINTS * lines + 4


def _row_height(row: Sequence[Content], wrapped: Sequence[tuple[int, float]]) -> float:
    """Height [points] that shows the text of wrapped columns whole."""
    lines = max((_lines(_text(row[n]), width) for n, width in wrapped), default=1)
    return min(LINE_POINTS * lines, TALLEST_POINTS)


def _text(item: Content) -> str:
    value = item.value if isinstance(item, Rich) else item
    return value if isinstance(value, str) else ""


def _lines(text: str, width: float) -> int:
    return sum(1 + int(len(part) * WIDE_LETTERS / max(width, 1)) for part in text.split("\n"))
