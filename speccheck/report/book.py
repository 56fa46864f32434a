"""Workbooks people can work in: tables with every convenience, and grids that mirror a sheet.

A workbook is always built new. The same content gives the same bytes.
"""

from __future__ import annotations

import io
import re
import zipfile
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from openpyxl import Workbook
from openpyxl.utils import get_column_letter
from openpyxl.writer.excel import ExcelWriter

from speccheck.report.cells import Content, Rich, StyleIds, hyperlinks, sheet_data
from speccheck.report.frames import frame_grid, frame_table, row_heights, set_print, set_properties
from speccheck.report.looks import register_looks
from speccheck.report.sheets import Grid, Imprint, Table

Row = Sequence[tuple[int, Content, str]]


def book_bytes(sheets: Sequence[Table | Grid], imprint: Imprint) -> bytes:
    """Return the .xlsx file that holds the sheets."""
    workbook = Workbook()
    workbook.remove(workbook.active)
    styles = register_looks(workbook)
    bodies: dict[str, _Body] = {}
    for number, sheet in enumerate(sheets, start=1):
        worksheet = workbook.create_sheet(sheet.name)
        if isinstance(sheet, Table):
            body = _Body(_table_rows(sheet), row_heights(sheet), styles)
            frame_table(worksheet, sheet)
        else:
            body = _Body(_grid_rows(sheet), {}, styles)
            frame_grid(worksheet, sheet)
        set_print(worksheet, imprint, _print_area(sheet, body), repeat_header=isinstance(sheet, Table))
        bodies[f"xl/worksheets/sheet{number}.xml"] = body
    set_properties(workbook, imprint)
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


def _print_area(sheet: Table | Grid, body: _Body) -> str:
    if isinstance(sheet, Table) and sheet.printed:
        return f"A1:{get_column_letter(sheet.printed)}{max(body.rows)}"
    return body.extent


@dataclass(frozen=True, slots=True)
class _Body:
    """The rows of one sheet, to be put into the frame that openpyxl wrote."""

    rows: Mapping[int, Row]
    heights: Mapping[int, float]
    styles: StyleIds

    @property
    def extent(self) -> str:
        """The range that holds everything, from A1."""
        last = max((column for row in self.rows.values() for column, _, _ in row), default=1)
        return f"A1:{get_column_letter(last)}{max(self.rows, default=1)}"

    def put_into(self, frame: str) -> str:
        """Return the sheet with rows and links; raises ValueError where `frame` is no sheet."""
        data = sheet_data(self.rows, self.heights, self.styles)
        head, tail = _SHEET_DATA.split(frame, maxsplit=1)
        head = _DIMENSION.sub(f'<dimension ref="{self.extent}"', head)
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
