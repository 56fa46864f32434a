"""Conditions a figure holds under, from its structured conditions or else from the words beside it."""

from __future__ import annotations

import re

from speccheck.checks.cell_text import words
from speccheck.physics.power import dbm
from speccheck.quantities import band_names, convert
from speccheck.records import Band, Panel, Reading
from speccheck.standards import operating_band

_SPEED = re.compile(r"(\d+(?:[.,]\d+)?)\s*(km/h|kmh|kph|mph|m/s)", re.IGNORECASE)
_CARRIERS = re.compile(r"2\s*[x×*·]\s*\+?(\d+(?:[.,]\d+)?)\s*(dbm|w)\b", re.IGNORECASE)
_SPEED_UNITS = {"kmh": "km/h", "kph": "km/h"}
_ORDINAL = re.compile(r"(?<!LTE )(?<!NR )\bband\s?\d", re.IGNORECASE)
_MEGAHERTZ = re.compile(r"\d[\d.,\s]*\d")


def wind_speed_mps(load: Reading, stated: Reading | None) -> float | None:
    """Speed [m/s] a wind load holds at: its own, that in its words, or that of a row for the speed."""
    if "wind_speed_mps" in load.at:
        return load.at["wind_speed_mps"]
    found = _SPEED.search(words(load))
    if found:
        unit = found[2].lower()
        return float(convert(_number(found[1]), _SPEED_UNITS.get(unit, unit), "m/s"))
    return stated.nominal if stated else None


def carrier_dbm(intermodulation: Reading, test_power: Reading | None) -> float | None:
    """Power [dBm] of each test carrier: its own, that in its words, or that of a row for the test power."""
    if "carrier_dbm" in intermodulation.at:
        return intermodulation.at["carrier_dbm"]
    found = _CARRIERS.search(words(intermodulation))
    if found:
        power = _number(found[1])
        return power if found[2].lower() == "dbm" else float(dbm(power))
    return test_power.nominal if test_power else None


def named_bands(panel: Panel) -> dict[str, Reading]:
    """Names of standard bands the panel's frequency cells use, with the first cell of each."""
    found: dict[str, Reading] = {}
    for reading in _frequency_cells(panel):
        for name in band_names(f"{reading.raw} {reading.condition}")[0]:
            if not _only_counts(name, reading):
                found.setdefault(name, reading)
    return found


def _only_counts(name: str, reading: Reading) -> bool:
    """Whether 'Band 1: 790-862 MHz' numbers the panel's own bands: no part of the standard band is in it."""
    band = operating_band(name)
    ordinal = _ORDINAL.search(reading.raw) and _has_figures(reading)
    if not ordinal or band is None:
        return bool(ordinal)
    return all(high <= reading.low or low >= reading.high for low, high in band.spans)


def stated_ranges(panel: Panel, *keys: str) -> tuple[Band, ...]:
    """Ranges [MHz] the bid itself writes in figures, not those that stand for a band's name."""
    return tuple(
        (reading.low, reading.high)
        for reading in _frequency_cells(panel)
        if reading.parameter in keys and isinstance(reading.value, tuple) and _has_figures(reading)
    )


def _has_figures(reading: Reading) -> bool:
    return bool(_MEGAHERTZ.search(band_names(reading.raw)[1]))


def _frequency_cells(panel: Panel) -> tuple[Reading, ...]:
    return (*panel.all("operating_bands"), *panel.all("frequency_range"))


def _number(text: str) -> float:
    return float(text.replace(",", "."))
