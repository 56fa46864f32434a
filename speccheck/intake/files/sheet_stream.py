"""One worksheet part read as a stream: values, formulas, merged ranges, what is hidden.

A single pass gives formula and stored result together, which a general workbook library needs two loads for.
"""

from __future__ import annotations

import re
from dataclasses import dataclass

from speccheck.intake.files.archive import Archive
from speccheck.intake.files.grid import Cell, Grid, Place, Raw, Span, text_of
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
        self._cells: dict[Place, Cell] = {}
        self._spans: list[Span] = []
        self._hidden_rows: set[int] = set()
        self._hidden_columns: list[tuple[int, int]] = []
        self._columns: dict[str, int] = {}
        self._numbers: dict[str, tuple[Raw, str]] = {}
        self._row = self._column = 0
        self._row_digits = ""
        self._cell: dict[str, str] = {}
        self._formula: str | None = None
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
        grid = Grid(name=self._entry.name, hidden=self._entry.hidden, cells=self._cells)
        hidden_rows, ranges = self._hidden_rows, self._hidden_columns
        if hidden_rows or ranges:
            grid.cells = {}
            for place, cell in self._cells.items():
                hidden = cell.row in hidden_rows or any(low <= cell.column <= high for low, high in ranges)
                (grid.hidden_cells if hidden else grid.cells)[place] = cell
        grid.spans = {(span.top, span.left): span for span in self._spans}
        grid.hidden_rows = frozenset(hidden_rows)
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
        digits = address[len(letters) :]
        if digits != self._row_digits and digits and column:
            self._row_digits, self._row = digits, min(int(digits[:8]), _MAX_ROW)
        self._cell = at
        self._formula = None
        self._pieces.clear()

    def _end_cell(self) -> None:
        stored, formula = "".join(self._pieces), self._formula
        if not stored and formula is None:
            return
        style = self._cell.get("s")
        number_format = self._package.number_format(style) if style else ""
        raw, text, fault = self._value(self._cell.get("t", "n"), stored, number_format)
        if formula is not None:
            formula = f"={formula}"
            if raw is None:
                text, fault = formula, fault or _NO_RESULT
        if not fault and (not text or text.isspace()):
            return
        if len(text) > self._limits.text_length:
            fault = f"text of {len(text)} characters, more than {self._limits.text_length}"
            raw = text = text[: self._limits.text_length]
        self._allowance.cells -= 1
        if self._allowance.cells < 0:
            raise self._archive.too_large(f"more than {self._limits.cells} filled cells")
        row, column = self._row, self._column
        cell = Cell(row, column, raw, text, number_format, formula[:500] if formula else "", fault)
        self._cells[row, column] = cell

    def _value(self, kind: str, stored: str, number_format: str) -> tuple[Raw, str, str]:
        """A stored value, the same as text, and why it cannot be used."""
        if kind == "n" and not number_format:
            return *self._number(stored), ""
        if kind == "s":
            return self._shared_text(stored)
        if kind in ("str", "inlineStr"):
            return stored, stored, ""
        if kind == "e" and stored:
            return stored, stored, f"error value {stored[:20]}"
        return *self._converted(kind, stored, number_format), ""

    def _shared_text(self, stored: str) -> tuple[Raw, str, str]:
        texts = self._package.texts
        index = int(stored) if stored.isdigit() and len(stored) < 10 else -1
        if 0 <= index < len(texts):
            return texts[index], texts[index], ""
        return None, "", "reference to a text that is not there"

    def _number(self, stored: str) -> tuple[Raw, str]:
        """A number and its text; sheets repeat their figures, so each is made once."""
        known = self._numbers.get(stored)
        if known is None:
            known = self._numbers[stored] = _number_of(stored)
        return known

    def _converted(self, kind: str, stored: str, number_format: str) -> tuple[Raw, str]:
        """A truth value, date or number and its text; text where it is none of them."""
        if not stored:
            return None, ""
        raw: Raw
        try:
            if kind == "b":
                raw = stored.strip() == "1"
            elif kind == "d":
                raw = date_of_text(stored)
            elif number_format and shows_date(number_format):
                raw = date_of_serial(float(stored), counts_from_1904=self._package.counts_from_1904)
            else:
                return self._number(stored)
        except (ValueError, OverflowError):
            return stored, stored
        return raw, text_of(raw)

    def _merge(self, at: dict[str, str]) -> None:
        ends = [_place(part) for part in at.get("ref", "").split(":", 1)]
        if len(ends) == 2 and ends[0] and ends[1] and len(self._spans) < self._limits.merged_ranges:
            (top, left), (bottom, right) = ends[0], ends[1]
            if top <= bottom and left <= right:
                self._spans.append(Span(top, left, bottom, right))


def _number_of(stored: str) -> tuple[Raw, str]:
    if not stored:
        return None, ""
    try:
        number = float(stored)
    except ValueError:
        return stored, stored
    raw = int(number) if number.is_integer() and abs(number) < 1e15 else number
    return raw, text_of(raw)


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
