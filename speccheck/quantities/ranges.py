"""Ranges of angles and temperatures: their ends apart, their steps, scan ranges without ends."""

from __future__ import annotations

from dataclasses import replace

from speccheck.quantities.content import Quantity

_WIDEST_HALF_SCAN_DEG = 90.0


def one_range(found: list[Quantity]) -> list[Quantity]:
    """'-60/+60' and '0/10' are one range; a single figure beside a range, such as the step, is no range.

    A list of plain settings such as '0/2/4' stays a list.
    """
    if len(found) == 2:
        first, second = found[0].value, found[1].value
        if isinstance(first, float) and isinstance(second, float) and first <= 0 < second:
            both = replace(found[1], value=(first, second), condition=found[0].condition)
            return [replace(both, sense="nominal", statistic="")]
    ranges = [q for q in found if isinstance(q.value, tuple)]
    return ranges if ranges and len(ranges) < len(found) else found


def scan_range(found: Quantity) -> Quantity:
    """A scan range without its ends: over 90° it can only be the total, else both readings stand."""
    if not isinstance(found.value, float) or found.sense != "nominal" or found.value <= 0:
        return found
    half = (-found.value / 2, found.value / 2)
    if found.value > _WIDEST_HALF_SCAN_DEG or found.tolerance == found.value / 2:
        return replace(found, value=half, tolerance=None, condition=found.condition or "total")
    whole = (-found.value, found.value)
    return replace(found, value=whole, alternatives=(whole, half))
