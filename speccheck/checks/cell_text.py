"""What the words and digits of a cell say beyond its figure: conditions named, digits printed."""

from __future__ import annotations

import re

from speccheck.records import Reading

_NUMBER = re.compile(r"\d+(?:[.,]\d+)?")
_LEVELS = {"dbm": 0.0, "dbw": 30.0}


def words(*readings: Reading | None) -> str:
    """Heading, cell, condition and statistic of readings in one lower-case line."""
    parts = [p for r in readings if r is not None for p in (r.heading, r.raw, r.condition, r.statistic)]
    return " ".join(p for p in parts if p).lower()


def half_digit(reading: Reading) -> float:
    """Half of the last printed digit, in the reading's unit: 17 stands for 16.5 to 17.5, 17.1 for ± 0.05.

    Where the printed figure cannot be found in the cell, nothing is allowed for.
    """
    stated = reading.stated_value if isinstance(reading.stated_value, int | float) else None
    if stated is None or isinstance(reading.value, str):
        return 0.0
    for text in _NUMBER.findall(reading.raw):
        if abs(float(text.replace(",", ".")) - abs(stated)) < 1e-9:
            decimals = len(re.split("[.,]", text)[1]) if re.search("[.,]", text) else 0
            return _in_unit(0.5 * 10.0**-decimals, reading, stated)
    return 0.0


def _in_unit(half: float, reading: Reading, stated: float) -> float:
    if reading.stated_unit.lower() in _LEVELS and reading.unit == "W":
        return float(reading.nominal * (10 ** (half / 10) - 1))
    if reading.unit.startswith("dB") or stated == 0:
        return half
    return half * abs(reading.nominal / stated)


def listed(names: tuple[str, ...]) -> str:
    """Names as a sentence lists them: 'a, b and c'."""
    return names[0] if len(names) == 1 else f"{', '.join(names[:-1])} and {names[-1]}"
