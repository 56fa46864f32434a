"""What a cell was before the spreadsheet made a date of it."""

from __future__ import annotations

from datetime import date, datetime

from speccheck.quantities.attachments import connector_of_date
from speccheck.quantities.content import CellContent, Quantity, Value

_SPAN = tuple[float, float]


def undo_date(day: date | datetime, kind: str, unit: str, plausible: _SPAN | None) -> CellContent:
    """The likely original of a date in a cell that should hold a figure; never presented as certain.

    '2-12' becomes the 2nd or 12th of a month, '17.5' the 17th of May, '7-16' the 16th of July. Only a
    connector name comes back without alternatives: no other connector has such a name.
    """
    note = f"the spreadsheet made a date of this cell ({day:%Y-%m-%d}); "
    if kind == "text":
        return CellContent(quantities=(Quantity(value=f"{day:%Y-%m-%d}"),))
    if kind == "connectors":
        name = connector_of_date(day)
        if name:
            return CellContent(
                quantities=(Quantity(value=name, parameter="connector_type"),),
                notes=(f"{note}likely original '{name}'",),
            )
        return CellContent(rest=f"{day:%Y-%m-%d}", notes=(f"{note}ask for the original text",))
    readings = _ranges(day) if kind in ("range", "scan", "bands") else _decimals(day, plausible)
    likely = " or ".join(f"'{_written(value)}'" for value in readings)
    return CellContent(
        quantities=(Quantity(value=readings[0], unit=unit, alternatives=readings),),
        notes=(f"{note}likely original {likely}",),
    )


def _ranges(day: date) -> tuple[Value, ...]:
    low, high = sorted((day.day, day.month))
    return ((float(low), float(high)),)


def _decimals(day: date, plausible: _SPAN | None) -> tuple[Value, ...]:
    both = {float(f"{day.day}.{day.month}"), float(f"{day.month}.{day.day}")}
    likely = [v for v in sorted(both, reverse=True) if plausible is None or plausible[0] <= v <= plausible[1]]
    return tuple(likely or sorted(both, reverse=True))


def _written(value: Value) -> str:
    if isinstance(value, tuple):
        return f"{value[0]:g}-{value[1]:g}"
    return value if isinstance(value, str) else f"{value:g}"
