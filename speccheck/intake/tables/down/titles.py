"""Which of the words alone in a row are the title of the next panel in a table, and which head its parts."""

from __future__ import annotations

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.down.regions import Down
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.naming import Names
from speccheck.intake.tables.words import is_generic_sheet_name, is_group_heading

_LOOK_AHEAD = 60


def waiting_title(names: Names, waiting: Cell | None, cell: Cell) -> Cell | None:
    """The cell that may name the rows below: under a title a group word or another text names nothing."""
    titled = names.is_title(cell.text)
    if not titled and (is_generic_sheet_name(cell.text) or is_group_heading(cell.text)):
        return waiting
    return waiting if waiting is not None and names.is_title(waiting.text) and not titled else cell


def stated_below(marks: Marks, table: Down, title: Cell, *, certain: bool) -> set[str]:
    """Parameters of the rows a title heads; what is no certain title heads rows up to the next such words."""
    keys: set[str] = set()
    for row in range(title.row + 1, min(title.row + _LOOK_AHEAD, table.bottom + 1)):
        label = marks.grid.cells.get((row, table.label_column))
        alone = label is not None and len(marks.rows[row]) == 1
        if alone and keys and not certain:
            break
        if found := marks.headings.get((row, table.label_column)):
            keys.update(found.parameters)
    return keys
