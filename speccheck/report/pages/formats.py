"""How numbers, bands and places are written: digits that the data support, one decimal sign."""

from __future__ import annotations

import datetime as dt
import math
import re
from dataclasses import dataclass
from decimal import ROUND_HALF_UP, Decimal

from speccheck.records import Amount, Band, Interval, Value
from speccheck.records.demands import margin_unit

MINUS = "−"
NARROW_SPACE = " "

_DECIMALS = {
    "dB": 1,
    "dBi": 1,
    "dBd": 1,
    "dBm": 1,
    "dBc": 0,
    "deg": 0,
    "λ": 2,
    "wl": 2,
    "kg": 1,
    "N": 0,
    "MHz": 0,
    "mm": 0,
}
"""Decimals a figure carries by unit; the rest is written with three significant digits."""

_SHOWN_IN_MM = 2.0
_FARTHEST_M = 1e9

_SHOWN_UNITS = {"deg": "°", "ohm": "Ω", "wl": "λ", "W/m2": "W/m²", "m2": "m²", "kg/m3": "kg/m³", "1": ""}


_UNITS = r"(?:dB[idmc]?|°|λ|mm|cm|m/s|m²|m|kg|km/h|N|kW|W/m²|W|[kMG]Hz|%|Ω)(?!\w)"
_DECIMAL_IN_PROSE = re.compile(
    r"'[^']*'|“[^”]*”|"  # what a bidder wrote is quoted as it stands
    rf"(?<![\w.,])\d+\.\d+(?=(?:\s?(?:to|and|–|…|±|×)\s?[+−-]?\d+(?:\.\d+)?)*\s?{_UNITS})"
)
_MINUS_IN_PROSE = re.compile(r"'[^']*'|“[^”]*”|(?<![\w.,)\]°!'’-])-(?=\d)")
_POWER_OF_TEN = re.compile(r"(?<![\w.])\d(?:\.\d+)?e\+\d+")
_DECIMAL_IN_FORMULA = re.compile(r"(?<=\d)\.(?=\d)")


_MONTHS = (
    "January", "February", "March", "April", "May", "June",
    "July", "August", "September", "October", "November", "December",
)  # fmt: skip


@dataclass(frozen=True, slots=True)
class Numbers:
    """The habits of a report: decimal comma or point; dates as ISO 8601, day first or month first."""

    decimal_comma: bool = False
    date_order: str = "iso"

    def day(self, text: str) -> str:
        """An ISO date in the order of the page, the month in letters; other text as it stands."""
        try:
            day = dt.date.fromisoformat(text)
        except ValueError:
            return text
        if self.date_order == "day first":
            return f"{day.day} {_MONTHS[day.month - 1]} {day.year}"
        if self.date_order == "month first":
            return f"{_MONTHS[day.month - 1]} {day.day}, {day.year}"
        return text

    def plain(self, value: float, decimals: int | None = None) -> str:
        """A number with `decimals` digits after the sign, or as many as it was stated with."""
        if not math.isfinite(value):
            return "∞" if value > 0 else (f"{MINUS}∞" if value < 0 else "not a number")
        if decimals is None:
            text = f"{value:.6g}"
            if "e" in text and abs(value) < 1e15:
                text = f"{value:.0f}" if abs(value) >= 1 else f"{value:.9f}".rstrip("0")
        else:
            text = f"{_half_away(value, decimals):.{decimals}f}"
            if float(text) == 0:
                text = text.lstrip("-")
        text = text.replace("-", MINUS)
        return text.replace(".", ",") if self.decimal_comma else text

    def figure(self, value: Value | None, unit: str = "") -> str:
        """A computed value with its unit and the digits that the unit's data support."""
        if value is None:
            return "–"
        if isinstance(value, str):
            return self._with_unit(value, unit)
        if isinstance(value, tuple):
            shown, unit = _in_millimetres(value, unit)
            low, high = (self.plain(v, decimals_for(v, unit)) for v in shown)
            return self._with_unit(f"{low} to {high}", unit)
        (number,), unit = _in_millimetres((value,), unit)
        return self._with_unit(self.plain(number, decimals_for(number, unit)), unit)

    def stated(self, value: Value | None, unit: str = "") -> str:
        """A value as read: every digit it was stated with; speeds, stated in km/h as a rule, to 0.1 m/s."""
        if value is None:
            return "–"
        if isinstance(value, str):
            return value
        if unit == "m/s":
            value = (round(value[0], 1), round(value[1], 1)) if isinstance(value, tuple) else round(value, 1)
        if isinstance(value, tuple):
            return self._with_unit(f"{self.plain(value[0])} to {self.plain(value[1])}", unit)
        return self._with_unit(self.plain(value), unit)

    def signed(self, value: float, unit: str = "", decimals: int | None = None) -> str:
        """A difference of two figures in `unit`: always with its sign."""
        (value,), unit = _in_millimetres((value,), unit)
        digits = margin_decimals(value, unit) if decimals is None else decimals
        text, unit = self.plain(value, digits), margin_unit(unit)
        return self._with_unit(text if text.startswith(MINUS) or float(value) == 0 else f"+{text}", unit)

    def amount(self, amount: Amount | None) -> str:
        """A claimed figure."""
        if amount is None:
            return "–"
        if isinstance(amount.value, str):
            return self._with_unit(amount.value, amount.unit)
        stated: tuple[float, ...] = amount.value if isinstance(amount.value, tuple) else (amount.value,)
        ends, unit = _in_millimetres(stated, amount.unit)
        shown = [self.plain(v, _least_decimals(v, unit)) for v in ends]
        return self._with_unit(" to ".join(shown), unit)

    def offered(self, value: Value, unit: str = "") -> str:
        """What a bidder offers: the unit's usual digits, one more where that holds his figure whole."""
        if isinstance(value, str):
            return self.figure(value, unit)
        ends, unit = _in_millimetres(value if isinstance(value, tuple) else (value,), unit)
        return self._with_unit(" to ".join(self.plain(v, _offered_decimals(v, unit)) for v in ends), unit)

    def interval(self, interval: Interval | None) -> str:
        """What a claim is held against: both ends, or the one that is not open."""
        if interval is None or (interval.low is None and interval.high is None):
            return "–"
        if interval.low is None:
            return f"at most {self.figure(interval.high, interval.unit)}"
        if interval.high is None:
            return f"at least {self.figure(interval.low, interval.unit)}"
        if interval.low == interval.high:
            return self.figure(interval.low, interval.unit)
        return self.figure((interval.low, interval.high), interval.unit)

    def prose(self, text: str) -> str:
        """A sentence of the program: its figures with units in the page's decimal sign, quotes untouched."""
        text = _MINUS_IN_PROSE.sub(lambda m: MINUS if m[0] == "-" else m[0], text)
        if not self.decimal_comma:
            return text
        return _DECIMAL_IN_PROSE.sub(lambda m: m[0] if m[0][0] in "'“" else m[0].replace(".", ","), text)

    def formula(self, text: str) -> str:
        """A formula with its numbers; beside a decimal comma its arguments are parted by semicolons."""
        text = _POWER_OF_TEN.sub(lambda m: self.plain(float(m[0]), 0) if float(m[0]) < 1e12 else m[0], text)
        text = _MINUS_IN_PROSE.sub(lambda m: MINUS if m[0] == "-" else m[0], text)
        if not self.decimal_comma:
            return text
        return _DECIMAL_IN_FORMULA.sub(",", text.replace(", ", "; "))

    def band(self, band: Band | None) -> str:
        """A frequency range in MHz, or the words for a figure of the whole panel."""
        if band is None:
            return "whole panel"
        return f"{self.plain(band[0])}–{self.plain(band[1])}{NARROW_SPACE}MHz"

    def rounded_up(self, metres: float) -> str:
        """A compliance distance: upwards to 0.1 m, never down."""
        if not abs(metres) < _FARTHEST_M:
            return self._with_unit(self.plain(metres), "m")
        return self._with_unit(self.plain(math.ceil(round(metres * 10, 6)) / 10, 1), "m")

    @staticmethod
    def _with_unit(number: str, unit: str) -> str:
        shown = _SHOWN_UNITS.get(unit, unit)
        if not shown:
            return number
        return f"{number}{shown}" if shown in {"°", "%"} else f"{number}{NARROW_SPACE}{shown}"


def _in_millimetres(values: tuple[float, ...], unit: str) -> tuple[tuple[float, ...], str]:
    """Lengths below two metres in millimetres, as drawings of panels state them."""
    if unit != "m" or max(abs(v) for v in values) >= _SHOWN_IN_MM:
        return values, unit
    return tuple(round(v * 1000, 6) for v in values), "mm"


def decimals_for(value: float, unit: str) -> int:
    """Digits after the decimal sign for a computed figure in a unit."""
    if unit == "deg" and abs(value) < 10:
        return 1
    if unit in _DECIMALS:
        return _DECIMALS[unit]
    if not unit and abs(value) < 100:
        return 0 if value == round(value) else 2
    if value == 0 or not math.isfinite(value):
        return 0
    return max(0, 2 - math.floor(math.log10(abs(value))))


def _half_away(value: float, decimals: int) -> float:
    """The number as printed in full, rounded half away from zero: 0.735 is 0.74 here as in a workbook."""
    if abs(value) >= _FARTHEST_M:
        return value
    return float(Decimal(repr(float(value))).quantize(Decimal(1).scaleb(-decimals), ROUND_HALF_UP))


def _offered_decimals(value: float, unit: str) -> int:
    digits = decimals_for(value, unit)
    return digits + (round(value, digits) != round(value, 9) == round(value, digits + 1))


def margin_decimals(value: float, unit: str) -> int:
    """Digits of a margin: a half degree that a bidder stated is not rounded away."""
    digits = decimals_for(value, unit)
    return 1 if unit == "deg" and math.isfinite(value) and round(value, 1) != round(value) else digits


def _least_decimals(value: float, unit: str) -> int | None:
    """The unit's usual digits where they hold the whole figure, else as many as were stated."""
    digits = decimals_for(value, unit)
    return digits if round(value, digits) == value else None


def shown_unit(unit: str) -> str:
    """The unit as a page prints it."""
    return _SHOWN_UNITS.get(unit, unit)
