"""A requirement as an interval of figures it allows, in the dictionary's unit."""

from __future__ import annotations

import math
from dataclasses import dataclass

from speccheck.dictionary import parameters
from speccheck.quantities import UnknownUnitError, convert
from speccheck.records import Requirement
from speccheck.records.demands import blocked

_PLACES = ("angle_deg", "tilt_deg", "frequency_mhz", "carrier_dbm", "wind_speed_mps")


@dataclass(frozen=True, slots=True)
class Demanded:
    """Figures from `low` to `high` [unit] are allowed; infinite where that side is open."""

    requirement: Requirement
    low: float
    high: float
    unit: str


def demanded(requirement: Requirement) -> Demanded | None:
    """The interval of a judged numeric requirement; None for names, papers and rows that stop."""
    limit, operator = requirement.limit, requirement.operator
    known = parameters().get(requirement.parameter)
    if known is None or limit is None or isinstance(limit, str) or blocked(requirement.doubts):
        return None
    ends = {
        "≥": (True, False),
        ">": (True, False),
        "≤": (False, True),
        "<": (False, True),
        "=": (True, True),
        "within": (True, True),
        "contains": (True, True),
    }.get(operator)
    if ends is None:
        return None
    low, high = limit if isinstance(limit, tuple) else (limit, limit)
    try:
        low, high = (convert(edge, requirement.unit, known.unit) for edge in (low, high))
    except UnknownUnitError:
        return None
    return Demanded(requirement, low if ends[0] else -math.inf, high if ends[1] else math.inf, known.unit)


def overlap(one: Requirement, other: Requirement) -> bool:
    """Whether two rows hold in a common band and place, so that one offered figure must satisfy both."""
    places = all(one.at.get(name) == other.at.get(name) for name in _PLACES)
    if one.statistic != other.statistic or not places:
        return False
    if not one.bands or not other.bands:
        return True
    return any(min(a[1], b[1]) > max(a[0], b[0]) for a in one.bands for b in other.bands)


def named(requirement: Requirement) -> str:
    """'clause 4.2 (Gain ≥ 17 dBi)'."""
    known = parameters().get(requirement.parameter)
    label = known.label if known else requirement.wording[:60]
    operator = "nominally" if requirement.operator == "information" else requirement.operator
    demand = f"{label} {operator} {_figure(requirement)} {requirement.unit}".rstrip()
    return f"clause {requirement.clause or requirement.where} ({demand})"


def _figure(requirement: Requirement) -> str:
    limit = requirement.limit
    if isinstance(limit, tuple):
        return f"{limit[0]:g} to {limit[1]:g}"
    return f"{limit:g}" if isinstance(limit, float | int) else str(limit)
