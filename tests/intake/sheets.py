"""Small workbooks for tests, and readings as short lines."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from pathlib import Path

from openpyxl import Workbook

from speccheck.intake.submission import Account, read_account
from speccheck.records import Reading

Rows = Sequence[Sequence[object]]


def save(path: Path, sheets: dict[str, Rows], merges: Iterable[str] = ()) -> Path:
    """Write rows to sheets; `merges` hold for the first sheet."""
    book = Workbook()
    book.remove(book.active)
    for name, rows in sheets.items():
        sheet = book.create_sheet(name)
        for row in rows:
            sheet.append(list(row))
    for span in merges:
        book.worksheets[0].merge_cells(span)
    book.save(path)
    return path


def read(path: Path, rows: Rows, merges: Iterable[str] = (), **options: object) -> Account:
    """Write one sheet named Sheet1 to ``bid.xlsx`` and read it."""
    return read_account(save(path / "bid.xlsx", {"Sheet1": rows}, merges), **options)  # type: ignore[arg-type]


def line(panel: str, reading: Reading) -> str:
    """A reading as ``panel: C4 gain ≥17.5±0.5 dBi @1710-2170``."""
    value = reading.value
    shown = (
        f"{value[0]:g}..{value[1]:g}"
        if isinstance(value, tuple)
        else value
        if isinstance(value, str)
        else f"{value:g}"
    )
    sign = {"min": "≥", "max": "≤", "nominal": ""}[reading.sense]
    tolerance = f"±{reading.tolerance:g}" if reading.tolerance is not None else ""
    unit = f" {reading.unit}" if reading.unit else ""
    band = f" @{reading.band[0]:g}-{reading.band[1]:g}" if reading.band else ""
    doubt = " ?" if reading.alternatives else ""
    return f"{panel}: {reading.where.cell} {reading.parameter} {sign}{shown}{tolerance}{unit}{band}{doubt}"


def lines(account: Account) -> list[str]:
    """All readings of a file as lines."""
    return [line(panel.name, reading) for panel in account.submission.panels for reading in panel.readings]
