"""What a first look makes of a sheet: where headings and pasted lines stand, and how a cell looks."""

from __future__ import annotations

from dataclasses import dataclass, field

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.labels import Label, Labels
from speccheck.intake.tables.words import column_role


@dataclass(frozen=True, slots=True)
class Without:
    """What a second reading of a sheet does without, where the first one did not hang together.

    `names` are places of cells that name no panel; the others: tables that state a heading twice, names over
    columns, tables with headings across, and lines beside the tables.
    """

    names: frozenset[tuple[int, int]] = frozenset()
    repeats: bool = False
    over_columns: bool = False
    across: bool = False
    lines: bool = False


@dataclass(slots=True)
class Marks:
    """Headings and pasted lines of a sheet by place, and its cells by row."""

    grid: Grid
    labels: Labels
    rows: dict[int, list[Cell]]
    headings: dict[tuple[int, int], Label] = field(default_factory=dict)
    lines: dict[tuple[int, int], tuple[Label, str]] = field(default_factory=dict)
    without: Without = Without()

    def may_name(self, cell: Cell) -> bool:
        """Whether a cell may give a panel its name in this reading."""
        return (cell.row, cell.column) not in self.without.names

    def is_heading(self, cell: Cell) -> bool:
        """Whether a cell is a heading of the dictionary."""
        return (cell.row, cell.column) in self.headings

    def heading_columns(self, row: int) -> list[int]:
        """Columns of a row that hold headings."""
        return [cell.column for cell in self.rows.get(row, ()) if (row, cell.column) in self.headings]


def is_form_heading(roles: list[str]) -> bool:
    """Whether a row says of each column of a form what it is for: 'Requirement | Offered | Comply'."""
    labels = {"parameter", "required"} & set(roles)
    answers = {"offered", "compliance"} & set(roles)
    if len(roles) > 1 and set(roles) <= {"offered", "remark", "compliance", "required"}:
        return True
    return bool(labels and answers) and sum(map(bool, roles)) * 4 >= 3 * len(roles)


def looks_like_value(cell: Cell) -> bool:
    """Whether a cell could hold a figure."""
    return not isinstance(cell.raw, str) or any(letter.isdigit() for letter in cell.text)


def says_column_role(cell: Cell) -> bool:
    """Whether a cell only says what its column is for."""
    return isinstance(cell.raw, str) and bool(column_role(cell.raw))
