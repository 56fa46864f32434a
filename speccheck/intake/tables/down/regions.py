"""Where the tables of a sheet with headings down the side lie."""

from __future__ import annotations

from collections import defaultdict
from dataclasses import dataclass

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.marks import Marks, is_form_heading, looks_like_value
from speccheck.intake.tables.words import column_role, without_number

_NEAR = 4
_LISTED = ("model", "part_number", "manufacturer", "revision")
_FEWEST_ROLES = 2
"""A row of more words, each of which says what a column is for, heads a table."""


@dataclass(slots=True)
class Down:
    """A table with headings down one column."""

    label_column: int
    top: int
    bottom: int
    left: int
    right: int


def find_down(marks: Marks, taken: set[int]) -> list[Down]:
    """Tables with a column of headings, values beside it; `taken` rows belong to other tables."""
    by_column: dict[int, list[int]] = defaultdict(list)
    for row, column in marks.headings:
        if row not in taken:
            by_column[column].append(row)
    columns = _label_columns(marks, {c: sorted(rows) for c, rows in by_column.items()})
    columns = {c: rows for c, rows in columns.items() if not _is_group_column(marks, columns, c)}
    columns = {c: rows for c, rows in columns.items() if not _is_second_label(marks, columns, c)}
    tables: list[Down] = []
    for column, rows in sorted(columns.items()):
        for top, bottom in _runs(marks, column, rows, taken):
            right = _right_bound(columns, column, top, bottom)
            left = _left_bound(columns, column, top, bottom)
            tables.append(Down(column, top, bottom, left, right))
    return tables


def _label_columns(marks: Marks, by_column: dict[int, list[int]]) -> dict[int, list[int]]:
    """Columns of headings that have something beside them; the right one of two adjacent ones."""
    kept: dict[int, list[int]] = {}
    for column, rows in by_column.items():
        usable = [row for row in rows if _has_value_right(marks, row, column)]
        if usable:
            kept[column] = usable
    return kept


def _has_value_right(marks: Marks, row: int, column: int) -> bool:
    for cell in marks.rows[row]:
        if cell.column > column:
            return _answers(marks, row, column, cell) and not _heads_a_list(marks, row, column, cell)
    below = marks.grid.cells.get((row + 1, column))
    if below is not None and is_band_label(without_number(below.text)) and not marks.is_heading(below):
        return any(c.column > column for c in marks.rows[row + 1])
    span = marks.grid.span(marks.grid.cells[row, column])
    return any(
        c.column > span.right
        for r in range(row + 1, min(span.bottom, row + 60) + 1)
        for c in marks.rows.get(r, ())
    )


def _answers(marks: Marks, row: int, column: int, cell: Cell) -> bool:
    """Whether a cell may be the value of the label before it: no heading, or the label again, at the end."""
    said = marks.headings.get((row, cell.column))
    label = marks.headings[row, column]
    again = said is not None and said.parameters == label.parameters and not label.condition
    return said is None or (again and cell is marks.rows[row][-1])


def _heads_a_list(marks: Marks, row: int, column: int, beside: Cell) -> bool:
    """Whether 'Model | Quantity' stands over a list of models, so that 'Quantity' is no model."""
    if marks.headings[row, column].parameters[0] not in _LISTED:
        return False
    below = (marks.grid.cells.get((row + 1, column)), marks.grid.cells.get((row + 1, beside.column)))
    label, value = below
    return (
        label is not None
        and value is not None
        and not marks.is_heading(label)
        and not looks_like_value(beside)
    )


def _is_second_label(marks: Marks, columns: dict[int, list[int]], column: int) -> bool:
    """Whether a column of headings only details the labels of a column before it, values following both."""
    for other, rows in columns.items():
        if other < column and rows[0] <= columns[column][-1] and columns[column][0] <= rows[-1] + _NEAR:
            if _details_labels(marks, other, column, columns[column]):
                return True
            near = [row for row in rows if columns[column][0] - 6 <= row <= columns[column][-1] + 6]
            near = [row for row in near if not _parted(marks, row, columns[column][0], column)]
            beyond = [row for row in near if _first_value_column(marks, row, other) > column]
            if near and len(beyond) * 2 > len(near):
                return True
    return False


def _parted(marks: Marks, row: int, top: int, column: int) -> bool:
    """Whether the heading row of a table with labels in a column lies between a row above it and its top."""
    return any(heads_columns(marks, between, column) for between in range(row + 1, top))


def _details_labels(marks: Marks, labels: int, column: int, rows: list[int]) -> bool:
    """Whether every heading of a column stands just behind another heading, with something beyond both."""
    beside = ([c.column for c in marks.rows[row]] for row in rows if (row, labels) in marks.headings)
    between = [sum(labels < c < column for c in found) == 0 and found[-1] > column for found in beside]
    return len(between) == len(rows) and all(between)


def _is_group_column(marks: Marks, columns: dict[int, list[int]], column: int) -> bool:
    """Whether the labels stand further right, under a word such as 'Parameter', beside group words here."""
    top = columns[column][0]
    for row in range(max(1, top - _NEAR), top + 1):
        anchors = [c.column for c in marks.rows.get(row, ()) if column_role(c.text) == "parameter"]
        if anchors and column < anchors[0] <= column + 3 and anchors[0] in columns:
            return True
    return False


def _first_value_column(marks: Marks, row: int, label_column: int) -> int:
    for cell in marks.rows[row]:
        if cell.column > label_column and looks_like_value(cell) and not marks.is_heading(cell):
            return cell.column
    return 0


def _runs(marks: Marks, column: int, rows: list[int], taken: set[int]) -> list[tuple[int, int]]:
    """Rows cut where a table of another kind, or a new row of headings, lies between them."""
    runs: list[tuple[int, int]] = []
    start = previous = rows[0]
    for row in rows[1:]:
        between = range(previous + 1, row)
        cut = any(r in taken or heads_columns(marks, r, column) for r in between)
        above = range(start, row)
        again = marks.without.repeats and _states_again(marks, row, column, above)
        if cut or again or (row > start and _names_panels_again(marks, row, column, above)):
            runs.append((start, previous))
            start = row
        previous = row
    return [*runs, (start, previous)]


def _names_panels_again(marks: Marks, row: int, column: int, above: range) -> bool:
    """Whether a row names other panels for the columns, as a row above did: 'Model | KD-3 | KD-4'."""
    if not _names_columns(marks, row, column):
        return False
    said = [r for r in above if (r, column) in marks.headings]
    return len(said) > 1 and any(_names_columns(marks, r, column) for r in said)


def _states_again(marks: Marks, row: int, column: int, above: range) -> bool:
    text = marks.grid.cells[row, column].text
    return any(marks.grid.cells[r, column].text == text for r in above if (r, column) in marks.headings)


def _names_columns(marks: Marks, row: int, column: int) -> bool:
    label = marks.headings.get((row, column))
    if label is None or label.parameters[0] not in ("model", "panel_type", "part_number"):
        return False
    return len({cell.text for cell in marks.rows[row] if cell.column > column}) > 1


def heads_columns(marks: Marks, row: int, column: int) -> bool:
    """Whether a row is the heading row of a table with its labels in this column."""
    cell = marks.grid.cells.get((row, column))
    beside = [other for other in marks.rows.get(row, ()) if other.column > column]
    if cell is None or not beside or (row, column) in marks.headings:
        return False
    bands = len(beside) > 1 and all(find_bands(c.text).proved and is_band_label(c.text) for c in beside)
    roles = [column_role(c.text) for c in (cell, *beside) if isinstance(c.raw, str)]
    form = is_form_heading(roles) or (len(roles) > _FEWEST_ROLES and all(roles))
    return column_role(cell.text) == "parameter" or bands or form


def _right_bound(columns: dict[int, list[int]], column: int, top: int, bottom: int) -> int:
    """The last column before the next table beside this one."""
    for other in sorted(columns):
        inside = [row for row in columns[other] if top <= row <= bottom]
        if other > column and len(inside) >= 2:
            return other - 1
    return 16_384


def _left_bound(columns: dict[int, list[int]], column: int, top: int, bottom: int) -> int:
    """The first column that may carry numbers or group words of this table."""
    left = 1
    for other, rows in columns.items():
        if other < column and sum(top <= row <= bottom for row in rows) >= 2:
            left = max(left, column)
    return left


def cells_between(marks: Marks, row: int, left: int, right: int) -> list[Cell]:
    """Cells of a row between two columns, ends included."""
    return [cell for cell in marks.rows.get(row, ()) if left <= cell.column <= right]
