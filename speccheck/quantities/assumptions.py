"""Units and forms a bidder leaves out and every engineer fills in; each is said in a note."""

from __future__ import annotations

import math
import re
from dataclasses import replace

from speccheck.quantities.content import CellContent, Quantity
from speccheck.quantities.decimals import Expected
from speccheck.quantities.units import convert, dimension

_USUAL = {"length": ("mm", "cm", "in"), "speed": ("km/h",), "force": ("kN",), "power": ("kW",)}
_SHARE = re.compile(r"(\d{1,3})\s?:\s?(\d{1,3})")
_WHOLE_SHARE = 1.0


def time_share(text: str, expected: Expected) -> CellContent | None:
    """'3:1' as a share of the first part in per cent, where a share is asked for; else None."""
    parts = _SHARE.fullmatch(text) if expected.parameter_unit == "%" else None
    if not parts or int(parts.group(1)) + int(parts.group(2)) == 0:
        return None
    first, second = (int(n) for n in parts.groups())
    share = Quantity(value=100 * first / (first + second), unit="%")
    return CellContent(quantities=(share,), notes=(f"{first} parts of {first + second}",))


def with_usual_unit(content: CellContent, expected: Expected) -> CellContent:
    """A figure without unit that is impossible in the parameter's own, in the one bidders mean.

    A height of 1998 is in millimetres, a wind speed of 241 in km/h, a share of 0.75 is 75 %.
    """
    if not expected.possible or not expected.plausible or expected.unit or not expected.parameter_unit:
        return content
    found = _one_unit([_usual(q, expected) for q in content.quantities], expected)
    changed = [q.unit for q, old in zip(found, content.quantities, strict=True) if q != old]
    if not changed:
        return content
    note = f"no unit stated: read as {changed[0]}"
    return replace(content, quantities=tuple(found), notes=(*content.notes, note))


def _one_unit(found: list[Quantity], expected: Expected) -> list[Quantity]:
    """The sizes of one body have one unit, that of the largest; `expected` speaks of the first only."""
    if expected.kind != "size" or len(found) < 2:
        return found
    largest = max(found, key=lambda q: q.value if isinstance(q.value, float) else 0.0)
    return [replace(q, unit=largest.unit) if not q.parameter else q for q in found]


def _usual(found: Quantity, expected: Expected) -> Quantity:
    ends = found.value if isinstance(found.value, tuple) else (found.value,)
    numbers = [end for end in ends if isinstance(end, float) and math.isfinite(end)]
    if found.unit or found.parameter or len(numbers) != len(ends) or found.alternatives:
        return found
    own = expected.parameter_unit or ""
    assert expected.possible is not None and expected.plausible is not None  # noqa: S101 - checked by the caller
    if own == "%" and max(numbers) <= _WHOLE_SHARE < expected.plausible[0] and isinstance(found.value, float):
        return replace(found, value=found.value * 100, unit="%")
    if all(expected.possible[0] <= n <= expected.possible[1] for n in numbers):
        return found
    likely = [
        unit
        for unit in _USUAL.get(dimension(own), ())
        if all(expected.plausible[0] <= convert(n, unit, own) <= expected.plausible[1] for n in numbers)
    ]
    return replace(found, unit=likely[0]) if len(likely) == 1 else found  # centimetres or inches: not settled
