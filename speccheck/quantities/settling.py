"""A figure as written to the figure of the parameter: unit, sign habit, direction of 'better'."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import replace

from speccheck.quantities.content import Quantity, SenseWord, Value
from speccheck.quantities.units import convert, unit_name

_TURNED: dict[SenseWord, SenseWord] = {"min": "max", "max": "min", "nominal": "nominal"}
_BETTER: dict[str, SenseWord] = {"higher": "min", "lower": "max"}


def settle(
    found: Quantity,
    unit: str,
    *,
    sign: str = "",
    direction: str = "none",
    keep: Iterable[str] = (),
) -> Quantity:
    """The quantity in the parameter's unit and sign, with what was stated kept beside it.

    Parameters
    ----------
    found : quantity as read from the cell
    unit : unit of the parameter, "" for a pure number
    sign : "positive" turns -30 into 30 and at most into at least; "negative" turns 150 into -150
    direction : higher or lower is better; says what 'better than' bounds
    keep : units left as stated because conversion needs another figure

    Raises
    ------
    UnknownUnitError : the stated unit is of another dimension

    >>> settle(Quantity(value=-28.0, unit="dB", sense="max"), "dB", sign="positive").value
    28.0
    """
    stated = found.unit
    target = stated if stated in tuple(keep) else unit
    if "wavelength" in stated or stated == "pcs":
        target = stated
    turn = _turns(found.value, sign)
    value = _mapped(found.value, stated, target, turn)
    sense = _TURNED[found.sense] if turn else found.sense
    statistic = found.statistic
    if statistic == "better than":
        sense, statistic = _BETTER.get(direction, "nominal"), ""
    tolerance = found.tolerance
    if tolerance is not None and isinstance(found.value, float):
        upper = convert(found.value + tolerance, stated, target)
        tolerance = round(abs(upper - convert(found.value, stated, target)), 9)
    return replace(
        found,
        value=value,
        unit=target if unit_name(target) != "pcs" else "",
        tolerance=tolerance,
        sense=sense,
        statistic=statistic,
        alternatives=tuple(_mapped(a, stated, target, _turns(a, sign)) for a in found.alternatives),
        stated_value=found.value,
        stated_unit=stated,
    )


def _turns(value: Value, sign: str) -> bool:
    if isinstance(value, str) or not sign:
        return False
    ends = value if isinstance(value, tuple) else (value,)
    return all(end < 0 for end in ends) if sign == "positive" else all(end > 0 for end in ends)


def _mapped(value: Value, stated: str, target: str, turn: bool) -> Value:
    if isinstance(value, str):
        return value
    factor = -1.0 if turn else 1.0
    if isinstance(value, tuple):
        ends = sorted(factor * convert(end, stated, target) for end in value)
        return (ends[0], ends[1])
    return factor * convert(value, stated, target)
