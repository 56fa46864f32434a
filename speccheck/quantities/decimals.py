"""Choosing between the decimal point and the decimal comma, or showing both readings."""

from __future__ import annotations

from dataclasses import dataclass, replace

from speccheck.quantities.content import CellContent, Value
from speccheck.quantities.units import UnknownUnitError, convert

Span = tuple[float, float]


@dataclass(frozen=True, slots=True)
class Expected:
    """What is known of a cell before it is read; see `read_cell`."""

    kind: str
    unit: str = ""
    decimal_comma: bool | None = None
    parameter_unit: str | None = None
    plausible: Span | None = None
    possible: Span | None = None


def choose(point: CellContent, comma: CellContent, expected: Expected) -> CellContent:
    """One of two readings of a cell, or the first with the second as its alternative.

    The habit of the file decides, unless only the other reading is a figure that a panel can have;
    without a habit, a reading decides when it alone is plausible.
    """
    by_habit = {False: point, True: comma}
    likely = [c for c in (False, True) if _within(by_habit[c], expected, expected.plausible)]
    habit = expected.decimal_comma
    if habit is None:
        if expected.plausible is not None and len(likely) == 1:
            return _settled(by_habit, likely[0])
        return _both(by_habit, first=False)
    if expected.plausible is None or habit in likely or not likely:
        return by_habit[habit]
    if not _within(by_habit[habit], expected, expected.possible):
        return _settled(by_habit, not habit)
    return _both(by_habit, first=habit)


def _within(content: CellContent, expected: Expected, span: Span | None) -> bool:
    if span is None:
        return True
    for found in content.quantities:
        for end in found.value if isinstance(found.value, tuple) else (found.value,):
            if isinstance(end, str):
                continue
            try:
                number = convert(end, found.unit or expected.unit, expected.parameter_unit or "")
            except UnknownUnitError:
                continue
            if not span[0] <= number <= span[1]:
                return False
    return True


def _settled(by_habit: dict[bool, CellContent], chosen: bool) -> CellContent:
    taken, other = _shown(by_habit[chosen]), _shown(by_habit[not chosen])
    note = f"read as {taken}: {other} is outside what panels show"
    return replace(by_habit[chosen], notes=(*by_habit[chosen].notes, note))


def _both(by_habit: dict[bool, CellContent], *, first: bool) -> CellContent:
    chosen, other = by_habit[first], by_habit[not first]
    if len(chosen.quantities) != len(other.quantities):
        rest = chosen.rest or _shown(chosen)
        return replace(chosen, quantities=(), rest=rest, notes=("the decimal sign is not clear",))
    merged = tuple(
        a if a == b else replace(a, alternatives=(a.value, b.value))
        for a, b in zip(chosen.quantities, other.quantities, strict=True)
    )
    return replace(chosen, quantities=merged, notes=(f"may be {_shown(chosen)} or {_shown(other)}",))


def _shown(content: CellContent) -> str:
    return ", ".join(_figure(found.value) for found in content.quantities)


def _figure(value: Value) -> str:
    if isinstance(value, tuple):
        return f"{value[0]:.10g}-{value[1]:.10g}"
    return value if isinstance(value, str) else f"{value:.10g}"
