"""Turns of phrase the checks share: figures with unit and cell, bands, the bidder's statistic."""

from __future__ import annotations

import re

from speccheck.dictionary import parameters
from speccheck.records import Band, Reading

_NUMBER = re.compile(r"\d+(?:[.,](\d+))?")

MOST_LEVEL_SLACK_DB = 0.25

SHOWN_IN_MM = 2.0
"""Lengths [m] below this are printed in millimetres, as drawings do."""


def figure(value: float, unit: str) -> str:
    """A number with its unit and the digits that carry meaning."""
    if unit == "m" and abs(value) < SHOWN_IN_MM:
        return f"{value * 1000:.4g} mm"
    sign = "°" if unit == "deg" else unit
    gap = "" if unit in ("", "deg") else " "
    return f"{value:.5g}{gap}{sign}"


def value_of(reading: Reading) -> str:
    """The reading's figure or range with its unit."""
    if isinstance(reading.value, str):
        return f"'{reading.value}'"
    if isinstance(reading.value, tuple):
        low, high = reading.value
        return f"{low:.5g} to {figure(high, reading.unit)}"
    return figure(reading.value, reading.unit)


def claim(reading: Reading) -> str:
    """The figure and the cell it stands in: '17.5 dBi (Data!D12)'."""
    return f"{value_of(reading)} ({reading.where})"


def named(reading: Reading) -> str:
    """Parameter, figure and cell: 'gain 17.5 dBi (Data!D12)'."""
    return f"{label(reading.parameter)} {claim(reading)}"


def label(key: str) -> str:
    """The dictionary's label of a parameter, fit for the middle of a sentence."""
    text = parameters()[key].label
    return text if text[1:2].isupper() else text[0].lower() + text[1:]


def mhz(band: Band | None) -> str:
    """'3300–3800 MHz', or 'the panel' where there is no band."""
    return "the panel" if band is None else f"{band[0]:g}–{band[1]:g} MHz"


def last_digit_slack(reading: Reading) -> float:
    """Half of the last digit the bidder printed [the reading's unit]: 17.5 may be 17.45 to 17.55.

    Levels carry a quarter of a decibel at most, since spreadsheets drop the zero of 18.0. Figures in another
    unit than they were written in, and texts, carry no slack.
    """
    if reading.stated_unit not in ("", reading.unit) or not isinstance(reading.stated_value, int | float):
        return 0.0
    half = 0.5 * 10.0 ** -_printed_decimals(reading.raw, float(reading.stated_value))
    return min(half, MOST_LEVEL_SLACK_DB) if reading.unit.startswith("dB") else half


def _printed_decimals(raw: str, value: float) -> int:
    """Decimals of a figure as printed in its cell; those of the value where the text has another form."""
    for match in _NUMBER.finditer(raw):
        if float(match[0].replace(",", ".")) == abs(value):
            return len(match[1] or "")
    return len(f"{value:.6f}".rstrip("0").partition(".")[2])
