"""Which figure of a reading a demanded statistic looks at, and whether another statistic could decide."""

from __future__ import annotations

import math
from collections.abc import Sequence
from statistics import fmean

from speccheck.records import Reading, Sense

_NAMES = {
    "": "",
    "each": "each",
    "absolute": "each",
    "guaranteed": "each",
    "worst case": "each",
    "typ": "typ",
    "typical": "typ",
    "nominal": "typ",
    "approximate": "typ",
    "mean": "mean",
    "average": "mean",
    "mean-dB": "mean",
    "mean-lin": "mean",
}
_BY_SENSE = {
    ("higher", "min"): "each",
    ("higher", "max"): "best",
    ("lower", "max"): "each",
    ("lower", "min"): "best",
}
_SPREAD_UNITS = ("dB", "dBi", "dBc", "%")
"""Units of figures that spread over frequency, tilt and port, so that a maximum is their best case."""
_RANK = {"each": 0, "mean": 1, "typ": 1, "best": 2}


def canonical(statistic: str, direction: str) -> str:
    """'each', 'mean', 'typ', 'best' or '' for a statistic of a tender or a bid; else the word itself."""
    known = _BY_SENSE.get((direction, statistic))
    return known or _NAMES.get(statistic, statistic)


def offered_statistic(reading: Reading, direction: str) -> str:
    """Statistic of an offered figure; a bound in the good direction is worst case, the other best case.

    'Maximum power 250 W' or 'max. wind speed' names a capability and bounds nothing.
    """
    stated = canonical(reading.statistic, direction)
    if stated:
        return stated
    capability = direction == "higher" and reading.sense is Sense.MAX and reading.unit not in _SPREAD_UNITS
    if reading.sense is Sense.NOMINAL or capability:
        return ""
    return canonical(reading.sense.value, direction)


def could_decide(demanded: str, offered: str, *, meets: bool) -> bool:
    """Whether the verdict could change if the offer used the demanded statistic.

    A kinder statistic than demanded proves a fail but no pass, a harsher one the reverse. An
    unstated one is taken as the demanded.
    """
    if not offered or not demanded or offered == demanded:
        return False
    if offered not in _RANK or demanded not in _RANK or _RANK[offered] == _RANK[demanded]:
        return True
    kinder = _RANK[offered] > _RANK[demanded]
    return meets if kinder else not meets


def tilt_means(readings: Sequence[Reading]) -> tuple[float, float] | None:
    """Mean of decibels and mean of powers [dB] over figures stated tilt by tilt; None if there are none."""
    by_tilt = {r.at["tilt_deg"]: r.nominal for r in readings if "tilt_deg" in r.at}
    if len(by_tilt) < 2:
        return None
    powers = fmean(10 ** (value / 10) for value in by_tilt.values())
    return fmean(by_tilt.values()), 10 * math.log10(powers)
