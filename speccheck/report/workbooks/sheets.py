"""What a generated workbook is made of: columns, tables, grids, imprint."""

from __future__ import annotations

from collections.abc import Collection, Mapping, Sequence
from dataclasses import dataclass, field
from datetime import date, datetime

from speccheck.report.workbooks.cells import Content

UNDATED = datetime(2000, 1, 1)  # noqa: DTZ001 - the file format has no zone
"""Date of a workbook whose content has none, so that the same content gives the same bytes."""


@dataclass(frozen=True, slots=True, kw_only=True)
class NumberCheck:
    """A range [in the heading's unit] outside which a person is warned, not stopped."""

    low: float
    high: float
    message: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Column:
    """One column of a table: its heading, width in characters, look and helps."""

    heading: str
    width: float = 12
    look: str = "text"
    note: str = ""
    status: Sequence[str] = ()
    choices: str = ""
    check: NumberCheck | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Table:
    """A sheet with one header row and one record a row.

    `frozen` columns stay in view; the first `printed` columns go on paper, all of them where it is 0.
    """

    name: str
    columns: Sequence[Column]
    rows: Collection[Sequence[Content]]
    frozen: int = 1
    printed: int = 0
    sortable: bool = True


@dataclass(frozen=True, slots=True, kw_only=True)
class Grid:
    """A sheet whose cells keep the addresses of another sheet: row, then column, then content.

    `notes` are shown beside the cell of (row, column); nothing may stand in a note only.
    """

    name: str
    cells: Mapping[int, Mapping[int, Content]]
    widths: Mapping[int, float] = field(default_factory=dict)
    notes: Mapping[tuple[int, int], str] = field(default_factory=dict)


@dataclass(frozen=True, slots=True, kw_only=True)
class Imprint:
    """What a workbook says of itself: document properties, footer, paper."""

    title: str
    subject: str = ""
    footer: str = ""
    paper: str = "A4"
    moment: datetime = UNDATED


def moment_of(today: str) -> datetime:
    """Time a workbook bears for an ISO day; UNDATED where there is none."""
    try:
        day = date.fromisoformat(today)
    except ValueError:
        return UNDATED
    return datetime(day.year, day.month, day.day)  # noqa: DTZ001 - the file format has no zone
