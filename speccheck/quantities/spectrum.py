"""Frequency cells: ranges in megahertz, lists of them, and names of standard bands."""

from __future__ import annotations

import re

from speccheck.quantities.amounts import Amount
from speccheck.quantities.content import Quantity
from speccheck.quantities.units import convert, dimension

_NAME = re.compile(r"(?<![\w.])(?:n|N|B|b|[Bb]and\s?|LTE\s?B?|NR\s?n?)(\d{1,3})(?![\w-]|\.\d)")
_LOWEST_MHZ = 100.0
_HIGHEST_GHZ = 110.0


def band_names(text: str) -> tuple[tuple[str, ...], str]:
    """Names of standard bands such as n78 or B3, in one spelling, and the text without them.

    >>> band_names("n78 (3300-3800 MHz), B3")
    (('n78', 'B3'), '(3300-3800 MHz),')
    """
    names: list[str] = []

    def keep(match: re.Match[str]) -> str:
        letter = "n" if match.group()[0] in "nN" else "B"
        names.append(letter + match.group(1))
        return " "

    rest = _NAME.sub(keep, text)
    return tuple(names), rest.strip()


def bands(found: list[Amount], names: tuple[str, ...], unit: str) -> list[Quantity]:
    """Ranges [MHz] of a frequency cell; names alone come back as text."""
    result = [q for a in found if (q := _band(a, unit, ", ".join(names))) is not None]
    ranges = [q for q in result if isinstance(q.value, tuple)]
    if ranges:
        return ranges
    return [Quantity(value=name) for name in names] or result


def _band(amount: Amount, unit: str, name: str) -> Quantity | None:
    own = amount.unit or unit
    if own and dimension(own) != "frequency":
        return None
    if not own:
        own = "GHz" if max(amount.low, amount.high or 0) < min(_LOWEST_MHZ, _HIGHEST_GHZ) else "MHz"
    low = convert(amount.low, own, "MHz")
    condition = ", ".join(filter(None, [name, " ".join([*amount.before, *amount.words])]))
    if amount.high is None and amount.tolerance:  # '3500 ± 100 MHz'
        spread = convert(amount.tolerance, amount.tolerance_unit or own, "MHz")
        return Quantity(value=(_exact(low - spread), _exact(low + spread)), unit="MHz", condition=condition)
    if amount.high is None:
        return Quantity(value=_exact(low), unit="MHz", condition=condition)
    high = convert(amount.high, own, "MHz")
    pair = (_exact(min(low, high)), _exact(max(low, high)))
    return Quantity(value=pair, unit="MHz", condition=condition)


def _exact(mhz: float) -> float:
    """3.3 GHz is 3300 MHz, without the last binary digit."""
    return round(mhz, 6)
