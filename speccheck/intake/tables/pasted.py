"""Lines 'Label: value unit' pasted into one column, one or several a cell."""

from __future__ import annotations

import re
from collections import defaultdict
from dataclasses import replace

from speccheck.intake.files.grid import Cell
from speccheck.intake.panels.told_by_value import label_by_values
from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.claims import Claim, Context, Draft, SheetResult
from speccheck.intake.tables.labels import Label
from speccheck.intake.tables.lines import looks_like_line, split_lines
from speccheck.intake.tables.loose_lines import loose_line
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.naming import Names, model_name
from speccheck.records import Band

_WORD = re.compile(r"[^\W\d_]{3,}")
_MOST_WORDS = 7
_FEWEST = 3
"""Lines without a colon that make a list of their own."""
_NAME_KEYS = frozenset({"model", "panel_type"})


def read_lines(marks: Marks, result: SheetResult, names: Names) -> None:
    """Collect the pasted lines no table has taken."""
    columns: dict[int, list[Cell]] = defaultdict(list)
    for place in sorted(marks.lines):
        if place not in result.roles:
            columns[place[1]].append(marks.grid.cells[place])
    if not (columns or result.drafts):
        columns = _loose_columns(marks)
    for column, cells in columns.items():
        if len(cells) == 1 and result.drafts and len(_WORD.findall(cells[0].text)) > _MOST_WORDS:
            continue  # a note below a table, 'Traffic beam: one user, uniform excitation of the whole array'
        last = cells[-1].row
        while (below := marks.grid.cells.get((last + 1, column))) is not None and (
            looks_like_line(below.text) or _is_loose(marks, below)
        ):
            last += 1
        first = cells[0].row
        while (above := marks.grid.cells.get((first - 1, column))) is not None and (
            _heads_lines(above, result) or _is_loose(marks, above)
        ):
            first -= 1
        _Column(marks, result, names, column).read(first, last)


def _loose_columns(marks: Marks) -> dict[int, list[Cell]]:
    """Columns of lines without any colon, on a sheet that holds nothing else."""
    columns: dict[int, list[Cell]] = defaultdict(list)
    for cell in marks.grid.cells.values():
        if _is_loose(marks, cell):
            columns[cell.column].append(cell)
    return {column: sorted(cells, key=_row) for column, cells in columns.items() if len(cells) >= _FEWEST}


def _row(cell: Cell) -> int:
    return cell.row


def _heads_lines(cell: Cell, result: SheetResult) -> bool:
    """Whether a cell above the first line names the band of the lines below it."""
    free = isinstance(cell.raw, str) and (cell.row, cell.column) not in result.roles
    return free and is_band_label(cell.text)


def _is_loose(marks: Marks, cell: Cell) -> bool:
    return isinstance(cell.raw, str) and loose_line(cell.text, marks.labels) is not None


_SUPERSEDED = re.compile(
    r"supersed|previous|formerly|no longer|obsolete|withdrawn|ungültig|überholt|ersetzt durch", re.I
)


class _Column:
    def __init__(self, marks: Marks, result: SheetResult, names: Names, column: int) -> None:
        self._marks, self._result, self._names, self._index = marks, result, names, column
        self._draft: Draft | None = None
        self._band: Band | None = None
        self._band_name = ""

    def read(self, first: int, last: int) -> None:
        for row in range(first, last + 1):
            cell = self._marks.grid.cells.get((row, self._index))
            if cell is None or (row, self._index) in self._result.roles:
                continue
            lines = split_lines(cell.text)
            if (row, self._index) in self._marks.lines:
                taken = [self._line(cell, line) for line in lines]
                if not any(taken):
                    self._result.mark(cell, "unread")
            elif (known := _by_value(cell.text)) is not None:
                self._claim(cell, *known)
            elif isinstance(cell.raw, str) and (loose := loose_line(cell.text, self._marks.labels)):
                self._claim(cell, *loose)
            elif looks_like_line(cell.text):
                self._result.unread.append((cell, f"line '{cell.text[:80]}' has no known label", ""))
                self._result.mark(cell, "unread")
            elif isinstance(cell.raw, str) and is_band_label(cell.text):
                self._section(cell, find_bands(cell.text).hull)
            elif self._names.is_title(cell.text) and self._marks.may_name(cell):
                self._title(cell, cell.text)
            else:
                self._band, self._band_name = None, ""

    def _line(self, cell: Cell, text: str) -> bool:
        """Take one line in; False when it says nothing that was understood."""
        parsed = self._marks.labels.parse_line(text)
        if parsed is None and self._names.is_title(text) and not looks_like_line(text):
            self._title(cell, text)
            return True
        if parsed is None or _SUPERSEDED.search(text):
            reason = "quotes a superseded figure" if parsed else "has no known label"
            self._result.unread.append((cell, f"line '{text[:80]}' {reason}", ""))
            return False
        label, value = parsed
        if label.parameters[0] in _NAME_KEYS:
            if self._draft is None or self._draft.claims:
                self._open(model_name(value), cell, named=True)
            self._result.mark(cell, "heading")
            return True
        self._claim(cell, label, value)
        return True

    def _claim(self, cell: Cell, label: Label, value: str) -> None:
        draft = self._draft or self._untitled(cell)
        inherited = replace(label, text="")
        band = label.bands.hull or self._band
        name = "" if band else self._band_name
        context = Context(inherited, heading=label.text, band_name=name)
        draft.claims.append(Claim(cell, context, band, text=value, banded=bool(band or name)))

    def _section(self, cell: Cell, band: Band | None) -> None:
        """A line that only names a band heads the lines below it."""
        self._result.mark(cell, "heading")
        draft = self._draft or self._untitled(cell)
        self._band, self._band_name = band, " ".join(cell.text.split())
        if band is not None and band not in draft.bands:
            draft.bands.append(band)
            label = Label("heading of the lines below", ("operating_bands",), "MHz")
            text = f"{band[0]:g}-{band[1]:g} MHz"
            draft.claims.append(Claim(cell, Context(label, heading=label.text), band, text=text, banded=True))

    def _untitled(self, cell: Cell) -> Draft:
        title = self._names.above(cell.row, cell.column, cell.column + 3, self._marks, self._result)
        return self._open(title.name, title.cell, named=title.certain)

    def _title(self, cell: Cell, text: str) -> None:
        self._result.mark(cell, "heading")
        self._open(model_name(text), cell, named=True)

    def _open(self, name: str, cell: Cell, *, named: bool) -> Draft:
        self._band, self._band_name = None, ""
        self._draft = Draft(name, self._marks.grid, cell, named=named)
        self._result.drafts.append(self._draft)
        return self._draft


def _by_value(text: str) -> tuple[Label, str] | None:
    """A line whose value alone says what it is, 'Configuration: 64T64R'."""
    heading, colon, value = text.partition(":")
    label = label_by_values(heading.strip(), [value]) if colon else None
    return (label, value.strip()) if label else None
