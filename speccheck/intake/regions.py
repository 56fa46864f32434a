"""Where the tables of a sheet lie: headings across the top, headings down the side, pasted lines."""

from __future__ import annotations

from collections import defaultdict
from dataclasses import dataclass, field

from speccheck.intake.grid import Cell
from speccheck.intake.labels import is_heading_filler
from speccheck.intake.marks import Marks, looks_like_value, says_column_role
from speccheck.intake.words import column_role

_LOOK_BELOW = 4
_REACH_BELOW = 400
"""Empty rows after which a table is over; catalogues are continuous."""


@dataclass(slots=True)
class Across:
    """A table with headings across: heading rows, data rows, columns."""

    heading_rows: list[int]
    data_rows: list[int]
    left: int
    right: int
    repeated: list[int] = field(default_factory=list)


@dataclass(slots=True)
class Down:
    """A table with headings down one column."""

    label_column: int
    top: int
    bottom: int
    left: int
    right: int


def find_across(marks: Marks) -> list[Across]:
    """Tables with a row of headings, values below it."""
    tables: list[Across] = []
    numbers = sorted(marks.rows)
    taken_to = 0
    for position, row in enumerate(numbers):
        if row <= taken_to or not _is_heading_row(marks, row, numbers, position):
            continue
        table = _grow(marks, row, numbers, position, taken_to)
        if table is not None:
            tables.append(table)
            taken_to = max([*table.data_rows, *table.heading_rows])
    return tables


def _is_heading_row(marks: Marks, row: int, numbers: list[int], position: int) -> bool:
    columns = marks.heading_columns(row)
    if len(columns) < 2:
        return False
    cells = marks.rows[row]
    values = [
        c for c in cells if not marks.is_heading(c) and looks_like_value(c) and not is_heading_filler(c.text)
    ]
    if len(values) > len(columns) // 3 or (len(columns) < 4 and _stacked(marks, row, columns) > 1):
        return False
    if len(columns) == 2 and not any(says_column_role(c) or column_role(c.text) for c in cells):
        others = [c for c in cells if not marks.is_heading(c)]
        if values or len(others) > 2:
            return False
    return _values_below(marks, columns, numbers[position + 1 : position + 1 + _LOOK_BELOW])


def _stacked(marks: Marks, row: int, columns: list[int]) -> int:
    """Headings just above and below those of a row: many of them speak for headings down the side."""
    near = (row - 2, row - 1, row + 1, row + 2)
    return max(sum((other, column) in marks.headings for other in near) for column in columns)


def _values_below(marks: Marks, columns: list[int], rows: list[int]) -> bool:
    for row in rows:
        under = [cell for c in columns if (cell := marks.grid.cells.get((row, c))) is not None]
        plain = [c for c in under if not marks.is_heading(c) and not is_heading_filler(c.text)]
        if any(marks.is_heading(c) for c in marks.rows[row]) and len(plain) < len(columns):
            continue
        if len(plain) * 2 >= len(columns) and len(plain) >= 1:
            return True
    return False


def _grow(marks: Marks, row: int, numbers: list[int], position: int, floor: int) -> Across | None:
    heading_rows = [row]
    below = position + 1
    while below < len(numbers) and _is_subheading(marks, numbers[below], heading_rows[-1]):
        heading_rows.append(numbers[below])
        below += 1
    above = position - 1
    while above >= 0 and numbers[above] > floor and numbers[above] >= row - 3:
        if numbers[above] != heading_rows[0] - 1 or not _is_upper_heading(marks, numbers[above], row):
            break
        heading_rows.insert(0, numbers[above])
        above -= 1
    columns = [c.column for r in heading_rows if r >= row for c in marks.rows[r]]
    left, right = min(columns), max(columns)
    for r in heading_rows:
        for cell in marks.rows[r]:
            span = marks.grid.span(cell)
            if cell.column < left and (marks.is_heading(cell) or says_column_role(cell)):
                left = cell.column
            if span.right > right and span.left <= right + 1:
                right = min(span.right, right + 60)
    left = _with_names(marks, left, numbers[below : below + 6])
    table = Across(heading_rows, [], left, right)
    _collect_rows(marks, table, row, numbers[below:])
    return table if table.data_rows else None


def _with_names(marks: Marks, left: int, rows: list[int]) -> int:
    """The first column, one further left where rows begin with a word that has no heading."""
    before = [c for row in rows if (c := marks.grid.cells.get((row, left - 1))) is not None]
    words = [c for c in before if isinstance(c.raw, str) and not marks.is_heading(c)]
    return left - 1 if words and len(words) == len(before) and len(words) * 2 >= len(rows) else left


def _is_subheading(marks: Marks, row: int, above: int) -> bool:
    cells = marks.rows[row]
    if row > above + 1 or not cells:
        return False
    fillers = [c for c in cells if is_heading_filler(c.text) or (marks.is_heading(c) and len(cells) > 1)]
    return len(fillers) == len(cells) and (len(cells) > 1 or is_heading_filler(cells[0].text))


def _is_upper_heading(marks: Marks, row: int, heading_row: int) -> bool:
    cells = marks.rows[row]
    bottom = [c.column for c in marks.rows[heading_row]]
    if len(cells) == 1:
        span = marks.grid.span(cells[0])
        wide = span.right - span.left + 1
        whole = span.left <= min(bottom) and span.right >= max(bottom)
        return (wide > 1 and not whole) or (
            cells[0].column > min(bottom) and is_heading_filler(cells[0].text)
        )
    texts = [c for c in cells if isinstance(c.raw, str)]
    if len(texts) < len(cells):
        return False
    spread = any(marks.grid.span(c).right > c.column or marks.grid.span(c).bottom > c.row for c in cells)
    return spread or all(
        marks.is_heading(c) or is_heading_filler(c.text) or len(c.text) < 40 for c in cells[1:]
    )


def _collect_rows(marks: Marks, table: Across, heading_row: int, following: list[int]) -> None:
    texts = {c.column: c.text for c in marks.rows[heading_row]}
    last = heading_row
    for row in following:
        cells = [c for c in marks.rows[row] if table.left <= c.column <= table.right]
        if row - last > _REACH_BELOW:
            break
        if not cells:
            continue
        headings = [c for c in cells if marks.is_heading(c) and c.column in texts]
        if len(headings) > 1 and all(texts[c.column] == c.text for c in headings):
            if sum(marks.is_heading(c) for c in marks.rows[row]) > len(headings):
                break
            table.repeated.append(row)
            continue
        if table.repeated and table.repeated[-1] == row - 1 and all(is_heading_filler(c.text) for c in cells):
            table.repeated.append(row)
            continue
        if (marks.is_heading(cells[0]) and cells[0].column == table.left) or len(headings) > 2:
            break
        if (row, cells[0].column) in marks.lines and len(cells) == 1:
            break
        table.data_rows.append(row)
        last = row
    while table.data_rows and not _is_data(marks, table, table.data_rows[-1]):
        table.data_rows.pop()


def _is_data(marks: Marks, table: Across, row: int) -> bool:
    cells = [c for c in marks.rows[row] if table.left <= c.column <= table.right]
    return len(cells) > 1


def find_down(marks: Marks, taken: set[int]) -> list[Down]:
    """Tables with a column of headings, values beside it; `taken` rows belong to other tables."""
    by_column: dict[int, list[int]] = defaultdict(list)
    for row, column in marks.headings:
        if row not in taken:
            by_column[column].append(row)
    columns = _label_columns(marks, {c: sorted(rows) for c, rows in by_column.items()})
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
            return not marks.is_heading(cell)
    span = marks.grid.span(marks.grid.cells[row, column])
    return any(
        c.column > span.right
        for r in range(row + 1, min(span.bottom, row + 60) + 1)
        for c in marks.rows.get(r, ())
    )


def _is_second_label(marks: Marks, columns: dict[int, list[int]], column: int) -> bool:
    """Whether a column of headings only details the labels of a column before it, values following both."""
    for other, rows in columns.items():
        if other < column and rows[0] <= columns[column][-1] and columns[column][0] <= rows[-1] + _LOOK_BELOW:
            near = [row for row in rows if columns[column][0] - 6 <= row <= columns[column][-1] + 6]
            beyond = [row for row in near if _first_value_column(marks, row, other) > column]
            if near and len(beyond) * 2 > len(near):
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
        if any(r in taken or heads_columns(marks, r, column) for r in between):
            runs.append((start, previous))
            start = row
        previous = row
    return [*runs, (start, previous)]


def heads_columns(marks: Marks, row: int, column: int) -> bool:
    """Whether a row is the heading row of a table with its labels in this column."""
    cell = marks.grid.cells.get((row, column))
    if cell is None or column_role(cell.text) != "parameter":
        return False
    return any(other.column > column for other in marks.rows[row])


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
