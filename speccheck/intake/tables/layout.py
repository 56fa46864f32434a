"""One sheet: its tables found and walked, the rest told apart into titles, notes and leftovers."""

from __future__ import annotations

from dataclasses import replace
from itertools import pairwise

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.across.reader import AcrossReader
from speccheck.intake.tables.across.regions import Across, find_across
from speccheck.intake.tables.claims import SheetResult
from speccheck.intake.tables.down.reader import DownReader
from speccheck.intake.tables.down.regions import find_down
from speccheck.intake.tables.labels import Labels
from speccheck.intake.tables.marking import mark
from speccheck.intake.tables.marks import Marks, looks_like_value
from speccheck.intake.tables.names.naming import Names
from speccheck.intake.tables.pasted import read_lines
from speccheck.intake.tables.second_look import most_coherent
from speccheck.intake.tables.words import column_role

_LONGEST_FIGURE = 40


def read_layout(grid: Grid, labels: Labels, stem: str) -> SheetResult:
    """Find and walk all tables of a sheet; every visible cell ends up with a role."""
    return most_coherent(mark(grid, labels), lambda marks: _walk(marks, stem))


def _walk(marks: Marks, stem: str) -> SheetResult:
    result = SheetResult(marks.grid)
    names = Names(marks.grid, stem)
    taken: set[int] = set()
    for table in () if marks.without.across else find_across(marks):
        taken.update(table.heading_rows, table.data_rows, table.repeated)
        for part in _side_by_side(marks, table):
            AcrossReader(marks, part, result, names).read()
    result.mark_claims()
    for down in sorted(find_down(marks, taken), key=lambda t: (t.top, t.label_column)):
        DownReader(marks, down, result, names).read()
        result.mark_claims()
    if not marks.without.lines:
        read_lines(marks, result, names)
    result.mark_claims()
    result.drafts.sort(key=lambda draft: draft.claims[0].cell.row if draft.claims else 0)
    _leftovers(marks, result)
    return result


def _side_by_side(marks: Marks, table: Across) -> list[Across]:
    """Tables beside each other share rows; an empty column between the same headings parts them."""
    columns = sorted({c.column for row in table.heading_rows for c in marks.rows[row]})
    for before, after in pairwise(columns):
        if after - before < 2:
            continue
        left = _keys(marks, table, table.left, before)
        right = _keys(marks, table, after, table.right)
        if len(left & right) >= min(2, len(left), len(right)) > 0:
            first, rest = replace(table, right=before), replace(table, left=after)
            return [_with_own_rows(marks, first), *_side_by_side(marks, _with_own_rows(marks, rest))]
    return [table]


def _keys(marks: Marks, table: Across, left: int, right: int) -> set[str]:
    places = (
        (row, c.column) for row in table.heading_rows for c in marks.rows[row] if left <= c.column <= right
    )
    return {key for place in places if place in marks.headings for key in marks.headings[place].parameters}


def _with_own_rows(marks: Marks, table: Across) -> Across:
    rows = [r for r in table.data_rows if any(table.left <= c.column <= table.right for c in marks.rows[r])]
    return replace(table, data_rows=rows)


def _leftovers(marks: Marks, result: SheetResult) -> None:
    """Cells outside every table: notes, unless a figure stands beside a word as if it were a claim."""
    left = {place for place in marks.grid.cells if place not in result.roles}
    for row in sorted({row for row, _ in left}):
        free = [c for c in marks.rows[row] if (row, c.column) in left]
        for position, cell in enumerate(free):
            if cell.fault:
                result.mark(cell, "unread")
            elif (label := _labelled(marks, cell)) is not None:
                result.unread.append((cell, f"a figure beside '{label.text[:60]}', in no table", ""))
                result.mark(cell, "unread")
            elif isinstance(cell.raw, str):
                result.mark(cell, "note")
                continue
            else:
                before = free[position - 1].text if position else ""
                if not (before and column_role(before) == "number"):
                    reason = f"a figure beside '{before[:60]}'" if before else "a figure outside every table"
                    result.unread.append((cell, reason, marks.labels.suggestion(before)))
                result.mark(cell, "unread")


def _labelled(marks: Marks, cell: Cell) -> Cell | None:
    """The heading before a cell of figures in its row, as in a table that was not seen as one."""
    if len(cell.text) > _LONGEST_FIGURE or marks.is_heading(cell) or not looks_like_value(cell):
        return None
    before = [c for c in marks.rows[cell.row] if c.column < cell.column and marks.is_heading(c)]
    return before[-1] if before else None
