"""Where the tables of a sheet with headings across the top lie."""

from __future__ import annotations

from dataclasses import dataclass, field

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.across.groups import parts_rows
from speccheck.intake.tables.heading_conditions import condition_of_heading
from speccheck.intake.tables.labels import begins_with_unit, is_heading_filler
from speccheck.intake.tables.marks import Marks, looks_like_value, says_column_role
from speccheck.intake.tables.repeats import numbers_columns
from speccheck.intake.tables.words import column_role, is_aside_of_table

_LOOK_BELOW = 4
_LONGEST_DETAIL = 30
_WIDE = 4
"""A heading over more columns than this and one more heads the rows below rather than the columns."""
_FEW = 2
"""A row with no more cells than this may only head the rows below it."""
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
    groups: set[int] = field(default_factory=set)
    """Data rows that only head, part or close the others: families, page numbers, sums."""


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
    most = max(sum((other, column) in marks.headings for other in near) for column in columns)
    return most + any((row + 1, column) in marks.headings for column in columns)


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
    while below < len(numbers) and (
        _is_subheading(marks, numbers[below], heading_rows[-1])
        or _details_heading(marks, numbers[below], heading_rows[-1], numbers[below + 1 : below + 3])
    ):
        heading_rows.append(numbers[below])
        below += 1
    above = position - 1
    while above >= 0 and numbers[above] > floor and numbers[above] >= row - 3:
        of_heading = not numbers_columns(marks.rows[numbers[above]])
        of_heading = of_heading and _is_upper_heading(marks, numbers[above], row)
        if numbers[above] != heading_rows[0] - 1 or not of_heading:
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
    if len(cells) == 1 and (cells[0].column == marks.rows[above][0].column or _is_wide(marks, cells[0])):
        return False
    fillers = [c for c in cells if is_heading_filler(c.text) or (marks.is_heading(c) and len(cells) > 1)]
    return len(fillers) == len(cells) and (len(cells) > 1 or is_heading_filler(cells[0].text))


def _is_wide(marks: Marks, cell: Cell) -> bool:
    span = marks.grid.span(cell)
    return span.right - span.left >= _WIDE


def _details_heading(marks: Marks, row: int, above: int, following: list[int]) -> bool:
    """Whether a row of short words details the heading row above: no figures, nothing under the first."""
    cells = marks.rows[row]
    if (
        row != above + 1
        or not following
        or cells[0].column <= min(marks.rows[r][0].column for r in following)
    ):
        return False
    words = [c for c in cells if isinstance(c.raw, str) and len(c.text) <= _LONGEST_DETAIL and not c.fault]
    figures = sum(looks_like_value(c) and not _belongs_to_heading(marks, c) for c in cells)
    below = max(sum(looks_like_value(c) for c in marks.rows[r]) for r in following)
    return len(words) == len(cells) > 1 and not figures and below > 1


def _belongs_to_heading(marks: Marks, cell: Cell) -> bool:
    text = cell.text
    filler = is_heading_filler(text) or begins_with_unit(text)
    return filler or bool(condition_of_heading(text, marks.labels))


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
    headed = {row for row, _ in marks.headings}
    last = heading_row
    for position, row in enumerate(following):
        cells = cells_of(marks, table, row)
        if row - last > _REACH_BELOW:
            break
        if not cells:
            continue
        headings = [c for c in cells if marks.is_heading(c) and c.column in texts] if row in headed else []
        if len(headings) > 1 and all(texts[c.column] == c.text for c in headings):
            if sum(marks.is_heading(c) for c in marks.rows[row]) > len(headings):
                break
            upper = _upper_rows(marks, table, row)
            table.data_rows = [r for r in table.data_rows if r not in upper]
            if upper and not _repeats(marks, table, heading_row, upper):
                break
            table.repeated += [*upper, row]
            continue
        if table.repeated and table.repeated[-1] == row - 1 and all(is_heading_filler(c.text) for c in cells):
            table.repeated.append(row)
            continue
        heads = (marks.is_heading(cells[0]) and cells[0].column == table.left) or len(headings) > 2
        after = following[position + 1 : position + 1 + _LOOK_BELOW]
        aside = is_aside_of_table(cells[0].text)
        if (
            (aside and not heads)
            or numbers_columns(cells)
            or ((aside or len(cells) <= _FEW) and parts_rows(marks, cells, heading_row, after))
        ):
            table.groups.add(row)
        elif heads:
            break
        if (row, cells[0].column) in marks.lines and len(cells) == 1:
            break
        table.data_rows.append(row)
        last = row
    while table.data_rows and not _is_data(marks, table, table.data_rows[-1]):
        table.data_rows.pop()


def _upper_rows(marks: Marks, table: Across, row: int) -> list[int]:
    """Rows of bands, or of words over several columns, just above a repeated heading row."""
    found: list[int] = []
    for above in (row - 1, row - 2):
        cells = cells_of(marks, table, above)
        if len(cells) < _FEW or not all(_is_upper_cell(marks, cell) for cell in cells):
            break
        found.insert(0, above)
    return found


def _is_upper_cell(marks: Marks, cell: Cell) -> bool:
    span = marks.grid.span(cell)
    return isinstance(cell.raw, str) and (span.right > span.left or is_heading_filler(cell.text))


def _repeats(marks: Marks, table: Across, heading_row: int, upper: list[int]) -> bool:
    """Whether rows above a repeated heading row say what the first ones above it said."""
    first = [row for row in table.heading_rows if row < heading_row][-len(upper) :]
    return [_texts(marks, row) for row in first] == [_texts(marks, row) for row in upper]


def _texts(marks: Marks, row: int) -> list[tuple[int, str]]:
    return [(cell.column, cell.text) for cell in marks.rows[row]]


def cells_of(marks: Marks, table: Across, row: int) -> list[Cell]:
    """The cells of a row that belong to a table."""
    cells = marks.rows.get(row, [])
    if cells and table.left <= cells[0].column and cells[-1].column <= table.right:
        return cells
    return [c for c in cells if table.left <= c.column <= table.right]


def _is_data(marks: Marks, table: Across, row: int) -> bool:
    return row not in table.groups and len(cells_of(marks, table, row)) > 1
