"""One worksheet part read as a stream: values, formulas, merged ranges, what is hidden.

A single pass gives formula and stored result together, which a general workbook library needs two loads for.
"""

from __future__ import annotations

import re
from dataclasses import dataclass

from speccheck.intake.files.archive import Archive
from speccheck.intake.files.grid import Cell, Grid, Raw, Span, text_of
from speccheck.intake.files.limits import Limits
from speccheck.intake.files.number_formats import date_of_serial, date_of_text, shows_date
from speccheck.intake.files.package import Package, SheetEntry
from speccheck.intake.files.xml_parts import Ends, Starts, stream

_ADDRESS = re.compile(r"([A-Z]{1,3})([0-9]{1,7})")
_NO_RESULT = "formula without a stored result"
_MAX_ROW, _MAX_COLUMN = 1_048_576, 16_384


@dataclass(slots=True)
class Allowance:
    """Cells still allowed in this workbook."""

    cells: int


def read_sheet(
    archive: Archive, entry: SheetEntry, package: Package, limits: Limits, allowance: Allowance
) -> Grid:
    """Read one sheet into a grid.

    Raises
    ------
    UnusableInputError : broken XML or more than the limits allow
    """
    reader = _SheetReader(archive, entry, package, limits, allowance)
    stream(
        archive.chunks(entry.part),
        file=archive.file,
        part=entry.part,
        limits=limits,
        starts=reader.starts(),
        ends=reader.ends(),
        text=reader.text,
    )
    return reader.grid()


class _SheetReader:
    def __init__(
        self, archive: Archive, entry: SheetEntry, package: Package, limits: Limits, allowance: Allowance
    ) -> None:
        self._archive, self._entry, self._package = archive, entry, package
        self._limits, self._allowance = limits, allowance
        self._cells: list[Cell] = []
        self._spans: list[Span] = []
        self._hidden_rows: set[int] = set()
        self._hidden_columns: list[tuple[int, int]] = []
        self._columns: dict[str, int] = {}
        self._row = self._column = 0
        self._kind = self._style = self._formula = self._row_digits = ""
        self._has_formula = False
        self._pieces: list[str] = []
        self._listening = False

    def starts(self) -> Starts:
        return {
            "c": self._start_cell,
            "v": self._start_value,
            "f": self._start_formula,
            "t": self._start_text,
            "row": self._start_row,
            "mergeCell": self._merge,
            "col": self._column_width,
            "rPh": self._start_hint,
        }

    def ends(self) -> Ends:
        return {"c": self._end_cell, "v": self._end_text, "t": self._end_text, "f": self._end_formula}

    def text(self, data: str) -> None:
        if self._listening:
            self._pieces.append(data)

    def grid(self) -> Grid:
        grid = Grid(name=self._entry.name, hidden=self._entry.hidden)
        hidden_rows, ranges = self._hidden_rows, self._hidden_columns
        for cell in self._cells:
            out_of_sight = cell.row in hidden_rows or any(low <= cell.column <= high for low, high in ranges)
            (grid.hidden_cells if out_of_sight else grid.cells)[cell.row, cell.column] = cell
        grid.spans = {(span.top, span.left): span for span in self._spans}
        grid.hidden_rows, grid.hidden_columns = frozenset(hidden_rows), tuple(ranges)
        return grid

    def _start_row(self, at: dict[str, str]) -> None:
        number = at.get("r", "")
        self._row = int(number) if number.isdigit() and len(number) < 8 else self._row + 1
        self._column, self._row_digits = 0, ""
        if at.get("hidden") in ("1", "true") or at.get("ht") == "0":
            self._hidden_rows.add(self._row)

    def _column_width(self, at: dict[str, str]) -> None:
        if at.get("hidden") in ("1", "true") or at.get("width") == "0":
            low, high = at.get("min", ""), at.get("max", "")
            if low.isdigit() and high.isdigit():
                self._hidden_columns.append((int(low), int(high)))

    def _start_value(self, _: dict[str, str]) -> None:
        self._pieces.clear()
        self._listening = True

    def _start_formula(self, _: dict[str, str]) -> None:
        self._has_formula = True
        self._pieces.clear()
        self._listening = True

    def _start_text(self, _: dict[str, str]) -> None:
        self._listening = True

    def _start_hint(self, _: dict[str, str]) -> None:
        self._listening = False

    def _end_text(self) -> None:
        self._listening = False

    def _end_formula(self) -> None:
        self._formula = "".join(self._pieces)
        self._pieces.clear()
        self._listening = False

    def _start_cell(self, at: dict[str, str]) -> None:
        address = at.get("r", "")
        letters = address.rstrip("0123456789")
        column = self._columns.get(letters)
        if column is None:
            column = self._columns[letters] = _column_number(letters)
        self._column = column or self._column + 1
        if len(letters) < len(address) and column:
            digits = address[len(letters) :]
            if digits != self._row_digits:
                self._row_digits, self._row = digits, min(int(digits[:8]), _MAX_ROW)
        self._kind = at.get("t", "n")
        self._style = at.get("s", "")
        self._formula, self._has_formula = "", False
        self._pieces.clear()

    def _end_cell(self) -> None:
        if not (self._pieces or self._has_formula):
            return
        stored = "".join(self._pieces)
        number_format = self._package.number_format(self._style) if self._style else ""
        raw, fault = self._value(stored, number_format)
        formula = f"={self._formula}" if self._has_formula else ""
        if self._has_formula and raw is None and not fault:
            fault = _NO_RESULT
        text = raw if isinstance(raw, str) else text_of(raw)
        if not fault and (not text or text.isspace()):
            return
        if len(text) > self._limits.text_length:
            fault = f"text of {len(text)} characters, more than {self._limits.text_length}"
            raw = text = text[: self._limits.text_length]
        self._allowance.cells -= 1
        if self._allowance.cells < 0:
            raise self._archive.too_large(f"more than {self._limits.cells} filled cells")
        self._cells.append(
            Cell(
                self._row,
                self._column,
                raw,
                (fault and not text and formula) or text,
                number_format,
                formula[:500],
                fault,
            )
        )

    def _value(self, stored: str, number_format: str) -> tuple[Raw, str]:
        kind = self._kind
        if kind == "s":
            texts = self._package.texts
            index = int(stored) if stored.isdigit() and len(stored) < 10 else -1
            return (
                (texts[index], "")
                if 0 <= index < len(texts)
                else (None, "reference to a text that is not there")
            )
        if kind in ("str", "inlineStr"):
            return stored, ""
        if not stored:
            return None, ""
        if kind == "e":
            return stored, f"error value {stored[:20]}"
        if kind == "b":
            return stored.strip() == "1", ""
        return self._number_or_date(stored, number_format)

    def _number_or_date(self, stored: str, number_format: str) -> tuple[Raw, str]:
        try:
            if self._kind == "d":
                return date_of_text(stored), ""
            number = float(stored)
            if number_format and shows_date(number_format):
                return date_of_serial(number, counts_from_1904=self._package.counts_from_1904), ""
        except (ValueError, OverflowError):
            return stored, ""
        if number.is_integer() and abs(number) < 1e15:
            return int(number), ""
        return number, ""

    def _merge(self, at: dict[str, str]) -> None:
        ends = [_place(part) for part in at.get("ref", "").split(":", 1)]
        if len(ends) == 2 and ends[0] and ends[1] and len(self._spans) < self._limits.merged_ranges:
            (top, left), (bottom, right) = ends[0], ends[1]
            if top <= bottom and left <= right:
                self._spans.append(Span(top, left, bottom, right))


def _place(address: str) -> tuple[int, int] | None:
    match = _ADDRESS.fullmatch(address.replace("$", ""))
    if match is None:
        return None
    column = _column_number(match[1])
    return (int(match[2]), column) if column else None


def _column_number(letters: str) -> int:
    if not 0 < len(letters) <= 3 or not letters.isascii() or not letters.isupper():
        return 0
    number = 0
    for letter in letters:
        number = number * 26 + ord(letter) - 64
    return number if number <= _MAX_COLUMN else 0
