"""Lines 'Label: value unit' pasted into one column, one or several a cell."""

from __future__ import annotations

from collections import defaultdict

from speccheck.intake.claims import Claim, Context, Draft, SheetResult
from speccheck.intake.grid import Cell
from speccheck.intake.labels import Label, looks_like_line
from speccheck.intake.marks import Marks
from speccheck.intake.naming import Names, model_name

_NAME_KEYS = frozenset({"model", "panel_type"})


def read_lines(marks: Marks, result: SheetResult, names: Names) -> None:
    """Collect the pasted lines no table has taken."""
    columns: dict[int, list[Cell]] = defaultdict(list)
    for place in sorted(marks.lines):
        if place not in result.roles:
            columns[place[1]].append(marks.grid.cells[place])
    for column, cells in columns.items():
        last = cells[-1].row
        while (below := marks.grid.cells.get((last + 1, column))) is not None and looks_like_line(below.text):
            last += 1
        _Column(marks, result, names, column).read(cells[0].row, last)


class _Column:
    def __init__(self, marks: Marks, result: SheetResult, names: Names, column: int) -> None:
        self._marks, self._result, self._names, self._index = marks, result, names, column
        self._draft: Draft | None = None

    def read(self, first: int, last: int) -> None:
        for row in range(first, last + 1):
            cell = self._marks.grid.cells.get((row, self._index))
            if cell is None or (row, self._index) in self._result.roles:
                continue
            lines = [piece.strip() for piece in cell.text.splitlines() if piece.strip()]
            if (row, self._index) in self._marks.lines:
                for line in lines:
                    self._line(cell, line)
            elif looks_like_line(cell.text):
                self._result.unread.append((cell, f"line '{cell.text[:80]}' has no known label", ""))
                self._result.mark(cell, "unread")
            elif self._names.is_title(cell.text):
                self._title(cell)

    def _line(self, cell: Cell, text: str) -> None:
        parsed = self._marks.labels.parse_line(text)
        if parsed is None:
            self._result.unread.append((cell, f"line '{text[:80]}' has no known label", ""))
            self._result.mark(cell, "unread")
            return
        label, value = parsed
        if label.parameters[0] in _NAME_KEYS:
            name = model_name(value)
            if self._draft is None or self._draft.claims:
                self._open(name, cell, named=True)
            self._result.mark(cell, "heading")
            return
        draft = self._draft or self._untitled(cell)
        context = Context(
            Label("", label.parameters, label.unit, label.condition, label.bands), heading=label.text
        )
        band = label.bands.hull
        draft.claims.append(Claim(cell, context, band, text=value, banded=band is not None))

    def _untitled(self, cell: Cell) -> Draft:
        title = self._names.above(cell.row, cell.column, cell.column + 3, self._marks, self._result)
        return self._open(title.name, title.cell, named=title.certain)

    def _title(self, cell: Cell) -> None:
        self._result.mark(cell, "heading")
        self._open(model_name(cell.text), cell, named=True)

    def _open(self, name: str, cell: Cell, *, named: bool) -> Draft:
        self._draft = Draft(name, self._marks.grid, cell, named=named)
        self._result.drafts.append(self._draft)
        return self._draft
