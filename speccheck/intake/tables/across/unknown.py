"""Columns of a table with headings across that were not read."""

from __future__ import annotations

from speccheck.intake.tables.across.fields import Field
from speccheck.intake.tables.across.regions import Across
from speccheck.intake.tables.claims import SheetResult
from speccheck.intake.tables.marks import Marks


def report_unknown(marks: Marks, table: Across, fields: dict[int, Field], result: SheetResult) -> None:
    """One line for a column that was not read, not one a cell."""
    for index, found in fields.items():
        if not found.misses:
            continue
        where = found.column.cells[-1] if found.column.cells else None
        if where is None:
            where = next(c for r in table.data_rows if (c := marks.grid.cells.get((r, index))) is not None)
        heading = found.column.heading[:80]
        unknown = f"column heading '{heading}' is not in the dictionary"
        if found.role == "superseded":
            unknown = f"column '{heading}' holds figures of an earlier year"
        reason = unknown if heading else "a column without a heading"
        nearest = marks.labels.suggestion(found.label.text)
        result.unread.append((where, f"{reason}; its {found.misses} cells were not read", nearest))
