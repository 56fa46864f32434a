"""The heading rows above a table with parameters down the side, and what its columns hold."""

from __future__ import annotations

import re

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.bands import is_band_label
from speccheck.intake.tables.claims import SheetResult
from speccheck.intake.tables.columns import VALUE_ROLES, Column, describe, heading_stack
from speccheck.intake.tables.down.regions import Down, cells_between, heads_columns
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.titles import codes, is_numbered_name
from speccheck.intake.tables.roles import settle_roles
from speccheck.intake.tables.words import bound_of, column_role
from speccheck.intake.tenders.answering import labelled, share_answering

_REACH = 7
_FIGURE = re.compile(r"\s*[-+<>≤≥±]?\s*\d{1,3}(?:[.,]\d+)?\s*")
_FEWEST_NUMBERED, _MOST_OF = 4, 0.7
_LONG_NOTE = 120


def find_headings(marks: Marks, table: Down, result: SheetResult) -> list[int]:
    """Rows of headings over the table; moves the table's top up to just below them."""
    found: list[int] = []
    for row in range(table.top - 1, max(0, table.top - 1 - _REACH), -1):
        cells = cells_between(marks, row, table.left, table.right)
        if any((row, cell.column) in result.roles for cell in cells):
            break
        beside = [cell for cell in cells if cell.column > table.label_column]
        heads = any(_stands_over(marks, table, cell) for cell in beside)
        if heads and _is_heading_row(marks, table, row, cells, beside):
            found.insert(0, row)
        elif found:
            break
    if found:
        table.top = min(table.top, found[-1] + 1)
    return found


def _stands_over(marks: Marks, table: Down, cell: Cell) -> bool:
    """Whether any cell of a table stands below a cell; not so for a list of issues beside a title."""
    span = marks.grid.span(cell)
    below = (cells_between(marks, row, span.left, span.right) for row in range(table.top, table.bottom + 1))
    return any(below)


def _is_heading_row(marks: Marks, table: Down, row: int, cells: list[Cell], beside: list[Cell]) -> bool:
    label = marks.grid.covering(row, table.label_column)
    if any((c.row, c.column) in marks.lines for c in cells):
        return False
    role = column_role(label.text) if label is not None else ""
    if role != "parameter" and not all(map(marks.may_name, cells)):
        return False
    if label is None or label.row != row or role:
        return all(isinstance(c.raw, str | int | float) for c in beside)
    if marks.is_heading(label) or any(_FIGURE.fullmatch(c.text) for c in beside if isinstance(c.raw, str)):
        return False
    if any(column_role(c.text) or is_band_label(c.text) for c in beside):
        return True
    return len(beside) > 1 and all(isinstance(c.raw, str) for c in beside)


def find_name_column(marks: Marks, table: Down, heading_rows: list[int]) -> int:
    """The column before the labels that names the panel of each row, else 0.

    It stands under a word such as 'Panel', or its cells are names merged down over the rows of a panel.
    """
    for row in heading_rows:
        for cell in cells_between(marks, row, table.left, table.label_column - 1):
            label = marks.labels.of(cell.text)
            named = column_role(cell.text) == "panel"
            named = named or label.parameters[:1] in (("model",), ("part_number",))
            if named and not _holds_headings(marks, table, cell.column):
                return cell.column
    columns = range(table.left, table.label_column)
    return next((column for column in columns if _holds_merged_names(marks, table, column)), 0)


def _holds_headings(marks: Marks, table: Down, column: int) -> bool:
    """Whether a column gives the labels in another language: under 'Désignation' stand no names of panels."""
    rows = range(table.top, table.bottom + 1)
    cells = [cell for row in rows if (cell := marks.grid.cells.get((row, column))) is not None]
    no_names = sum(marks.is_heading(cell) or not marks.may_name(cell) for cell in cells)
    return no_names * 3 > len(cells) > 0


def _holds_merged_names(marks: Marks, table: Down, column: int) -> bool:
    covering = [marks.grid.covering(row, column) for row in range(table.top, table.bottom + 1)]
    cells = {cell.row: cell for cell in covering if cell is not None}.values()
    return (
        all(map(marks.may_name, cells))
        and bool(cells)
        and all(
            marks.grid.span(c).bottom > c.row and (codes(c.text) or is_numbered_name(c.text)) for c in cells
        )
    )


def numbering_columns(marks: Marks, table: Down, heading_rows: list[int]) -> set[int]:
    """Columns before the labels that number the rows, 'B1', 'B2': so headed, or different in every row."""
    found = {
        cell.column
        for row in heading_rows
        for cell in cells_between(marks, row, table.left, table.label_column - 1)
        if column_role(cell.text) == "number"
    }
    rows = range(table.top, table.bottom + 1)
    for column in {c.column for row in rows for c in cells_between(marks, row, 1, table.label_column - 1)}:
        cells = [cell for row in rows if (cell := marks.grid.cells.get((row, column))) is not None]
        texts = {cell.text for cell in cells}
        if len(cells) >= _FEWEST_NUMBERED and len(texts) == len(cells) >= _MOST_OF * len(rows):
            found.add(column)
    return found


def extend(marks: Marks, table: Down, result: SheetResult) -> None:
    """Take in rows below the last known heading that continue the table."""
    span = marks.grid.span(marks.grid.cells[table.bottom, table.label_column])
    row = max(table.bottom, min(span.bottom, table.bottom + 60))
    while True:
        cells = cells_between(marks, row + 1, table.label_column, table.right)
        if _heads_details(marks, table, row + 1, cells, result):
            row += 1
            continue
        if len(cells) < 2 or any((c.row, c.column) in result.roles for c in cells):
            break
        if heads_columns(marks, row + 1, table.label_column):
            break
        if cells[0].column == table.label_column and len(cells[0].text) > _LONG_NOTE:
            break
        row += 1
    table.bottom = row


def _heads_details(marks: Marks, table: Down, row: int, cells: list[Cell], result: SheetResult) -> bool:
    """Whether a label alone heads rows that detail it: 'Wind load' over 'frontal' and 'lateral'."""
    if len(cells) != 1 or cells[0].column != table.label_column or (row, cells[0].column) in result.roles:
        return False
    below = cells_between(marks, row + 1, table.label_column, table.right)
    if len(below) < 2 or below[0].column != table.label_column:
        return False
    return marks.is_heading(cells[0]) or bool(marks.labels.of(f"{cells[0].text} {below[0].text.strip()}"))


def describe_columns(
    marks: Marks, table: Down, heading_rows: list[int], result: SheetResult
) -> dict[int, Column]:
    """The columns beside the labels, with roles settled by heading words and then by content."""
    used: dict[int, list[Cell]] = {}
    for row in heading_rows:
        for cell in cells_between(marks, row, table.label_column + 1, table.right):
            used.setdefault(cell.column, [])
        for cell in cells_between(marks, row, table.left, table.right):
            result.mark(cell, "heading")
    for row in range(table.top, table.bottom + 1):
        for cell in cells_between(marks, row, table.label_column + 1, table.right):
            used.setdefault(cell.column, []).append(cell)
    columns = {}
    for index in sorted(used):
        stack = heading_stack(marks.grid, heading_rows, index, table.label_column + 1)
        columns[index] = describe(index, stack, marks.labels)
        _head_in_table(columns[index], used[index], result)
    settle_roles(columns, used, _shares(marks, table, columns, used))
    for index, column in columns.items():
        if column.role == "parameter" and _holds_headings(marks, table, index):
            column.role = "group"
        if column.role == "bound":
            _list_unknown_bounds(used[index], result)
        if column.guessed and column.role == "remark" and used[index]:
            reason = f"column heading '{column.heading[:80]}' is not known; its cells were taken for remarks"
            result.unread.append((column.cells[-1], reason, ""))
    return columns


def _list_unknown_bounds(cells: list[Cell], result: SheetResult) -> None:
    for cell in cells:
        if not bound_of(cell.text):
            reason = "not known as a word for what the figure beside it bounds"
            result.unread.append((cell, reason, ""))


def _head_in_table(column: Column, cells: list[Cell], result: SheetResult) -> None:
    """'Comments' in the first row of a table without headings says what its column is for."""
    first = cells[0] if cells and not column.cells else None
    if first is not None and column_role(first.text) in ("remark", "compliance", "required"):
        column.role = column_role(first.text)
        result.mark(first, "heading")


def _shares(
    marks: Marks, table: Down, columns: dict[int, Column], cells: dict[int, list[Cell]]
) -> dict[int, float | None]:
    """How far the cells of each column answer for the labels; not asked where its heading tells."""
    return {
        index: share_answering(labelled(marks.grid, marks.headings, table.label_column, cells.get(index, [])))
        for index, column in columns.items()
        if column.role in VALUE_ROLES and not (column.band or column.band_name)
    }
