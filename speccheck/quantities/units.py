"""Spellings of units and conversion between units of one dimension."""

from __future__ import annotations

import math
import re
from collections.abc import Callable

SPEED_OF_LIGHT_MPS = 299_792_458.0
DIPOLE_DBI = 2.15
"""Gain of a half-wave dipole as the trade rounds it [dBi] (ITU-R BS.1195: 2.15)."""

# name: (dimension, factor to the dimension's base unit); factors by ISO 80000 and NIST SP 811
_LINEAR: dict[str, tuple[str, float]] = {
    "Hz": ("frequency", 1e-6),
    "kHz": ("frequency", 1e-3),
    "MHz": ("frequency", 1.0),
    "GHz": ("frequency", 1e3),
    "m": ("length", 1.0),
    "mm": ("length", 1e-3),
    "cm": ("length", 1e-2),
    "in": ("length", 0.0254),
    "ft": ("length", 0.3048),
    "kg": ("mass", 1.0),
    "g": ("mass", 1e-3),
    "lb": ("mass", 0.45359237),
    "N": ("force", 1.0),
    "daN": ("force", 10.0),
    "kN": ("force", 1e3),
    "kgf": ("force", 9.80665),
    "lbf": ("force", 4.4482216152605),
    "m/s": ("speed", 1.0),
    "km/h": ("speed", 1 / 3.6),
    "mph": ("speed", 0.44704),
    "kt": ("speed", 1852 / 3600),
    "ft/s": ("speed", 0.3048),
    "W": ("power", 1.0),
    "kW": ("power", 1e3),
    "mW": ("power", 1e-3),
    "deg": ("angle", 1.0),
    "rad": ("angle", math.degrees(1.0)),
    "ohm": ("resistance", 1.0),
    "%": ("share", 1.0),
    "V": ("voltage", 1.0),
    "kV": ("voltage", 1e3),
    "h": ("time", 1.0),
    "years": ("time", 8766.0),
    "months": ("time", 730.5),
    "m²": ("area", 1.0),
    "cm²": ("area", 1e-4),
    "ft²": ("area", 0.09290304),
    "l": ("volume", 1.0),
    "m³": ("volume", 1e3),
    "cm³": ("volume", 1e-3),
    "Pa": ("pressure", 1.0),
    "kPa": ("pressure", 1e3),
    "dB": ("level", 1.0),
    "dBc": ("carrier level", 1.0),
    "pcs": ("count", 1.0),
    "λ": ("wavelengths", 1.0),
}

# name: (dimension, to base, from base)
_OTHER: dict[str, tuple[str, Callable[[float], float], Callable[[float], float]]] = {
    "dBm": ("power", lambda v: 10 ** ((v - 30) / 10), lambda w: 10 * math.log10(w) + 30),
    "dBW": ("power", lambda v: 10 ** (v / 10), lambda w: 10 * math.log10(w)),
    "dBi": ("gain", lambda v: v, lambda v: v),
    "dBd": ("gain", lambda v: v + DIPOLE_DBI, lambda v: v - DIPOLE_DBI),
    "°C": ("temperature", lambda v: v, lambda v: v),
    "°F": ("temperature", lambda v: (v - 32) / 1.8, lambda v: v * 1.8 + 32),
    "K": ("temperature", lambda v: v - 273.15, lambda v: v + 273.15),
}

_SPELLINGS: dict[str, str] = {
    "Hz": "hz hertz herz",
    "kHz": "khz",
    "MHz": "mhz megahertz mc/s",
    "GHz": "ghz gigahertz",
    "m": "m metre metres meter meters metro metros metri mètre mètres metr metrów",
    "mm": "mm millimetre millimetres millimeter millimeters milímetros millimetri",
    "cm": "cm centimetre centimetres centimeter centimeters zentimeter",
    "in": 'in inch inches zoll pouce pouces pulgadas polegadas pollici cali "',
    "ft": "ft foot feet",
    "kg": "kg kgs kilo kilos kilogram kilograms kilogramm kilogrammes",
    "g": "g gram grams gramm",
    "lb": "lb lbs lbm pound pounds",
    "N": "N newton newtons",
    "daN": "dan",
    "kN": "kn kilonewton",
    "kgf": "kgf kp",
    "lbf": "lbf lbsf lb-f lb.f lb.-force pound-force",
    "m/s": "m/s m/sec m/sek mps ms-1 m.s-1 m·s-1 m*s-1",
    "km/h": "km/h kmh km/hr kph kmph km/u km/std km/godz km/ora",
    "mph": "mph mi/h miles/h mi/hr",
    "kt": "kt kts knot knots knoten nœuds nudos nodi nós",
    "ft/s": "ft/s ft/sec fps",
    "W": "W w watt watts wat watów vatios wrms",
    "kW": "kw kilowatt kilowatts",
    "mW": "mw milliwatt",
    "deg": "° deg degs deg. degree degrees grad degré degrés degre degres grado grados gradi grau graus"
    " stopień stopnie stopni graad graden °deg",
    "rad": "rad",
    "°C": "°c degc deg.c celsius",
    "°F": "°f degf fahrenheit",
    "K": "kelvin",
    "ohm": "Ω ω ohm ohms ohmios om omów",
    "%": "% percent per-cent prozent pourcent procent",
    "V": "V volt volts vdc vac v-dc",
    "kV": "kv",
    "h": "h hr hrs hour hours std stunden heures horas ore godz godzin uur",
    "years": "year years yr yrs jahr jahre an ans année années año años anno anni ano anos rok lat lata jaar",
    "months": "month months monate mois meses mesi miesięcy maanden",
    "m²": "m² m2 m^2 sqm sq.m qm",
    "cm²": "cm² cm2 cm^2",
    "ft²": "ft² ft2 ft^2 sqft sq.ft",
    "l": "l litre litres liter liters ltr litro litros litri litr litrów dm³ dm3 dm^3",
    "m³": "m³ m3 m^3 cbm",
    "cm³": "cm³ cm3 cm^3 ccm",
    "Pa": "pa n/m2 n/m²",
    "kPa": "kpa",
    "dB": "db decibel",
    "dBc": "dbc",
    "dBi": "dbi db(i) dbic",
    "dBd": "dbd db(d)",
    "dBm": "dbm db(m) dbmw db(mw)",
    "dBW": "dbw db(w)",
    "pcs": "pcs pc pcs. pieces piece pce stk stk. stück stueck szt szt. sztuk pz pzi pz. uds uds. unidades"
    " unités stuks st. each ea off qty nos nr unit units",
    "λ": "λ lambda lambdas wavelength wavelengths wl λ0",
}

_NAMES: dict[str, str] = {word: name for name, words in _SPELLINGS.items() for word in words.split(" ")}
_NAMES |= {"° c": "°C", "° f": "°F"}

_BY_LENGTH = sorted(_NAMES.keys() - {"l"}, key=len, reverse=True)  # an L behind a figure is a length
UNIT_PATTERN = "(?i:" + "|".join(map(re.escape, _BY_LENGTH)) + r")(?:(?![^\W\d_])|(?=[xX]\s?\d))"
"""Regular expression for any spelling, longest first, not running on into a word."""


class UnknownUnitError(ValueError):
    """A unit that is not known, or that the other one cannot be converted to."""


def unit_name(text: str) -> str:
    """The program's name of a unit as somebody wrote it; empty when it is not a unit.

    Case counts for single letters only: h is an hour, H stands for horizontal or height.

    >>> unit_name("Degrees"), unit_name("km/hr"), unit_name("parsec")
    ('deg', 'km/h', '')
    """
    word = text.strip()
    if word in _LINEAR or word in _OTHER:
        return word
    for form in (word, word.strip("[]()").strip()):
        plain = form.replace("º", "°").replace("\u2126", "Ω")
        folded = plain if len(plain) == 1 else plain.casefold()
        name = _NAMES.get(folded) or _NAMES.get(folded.rstrip("."))
        if name:
            return name
    return ""


def dimension(unit: str) -> str:
    """Dimension of a unit's name, such as ``length``; empty for no or an unknown unit."""
    if unit in _LINEAR:
        return _LINEAR[unit][0]
    return _OTHER[unit][0] if unit in _OTHER else ""


def convert(value: float, unit: str, to_unit: str, *, freq_mhz: float | None = None) -> float:
    """A figure in another unit of the same dimension.

    Parameters
    ----------
    value : figure in `unit`
    unit, to_unit : names or spellings of units; an empty one means 'the same'
    freq_mhz : frequency for wavelengths [MHz]

    Bare ``dB`` passes as dBi or dBc: bidders drop the letter, and the heading says which is meant.

    Raises
    ------
    UnknownUnitError : the units are not of one dimension, or wavelengths come without a frequency

    >>> convert(15, "dBd", "dBi"), convert(2, "in", "mm")
    (17.15, 50.8)
    """
    have, want = _known(unit), _known(to_unit)
    if not have or not want or have == want:
        return value
    if "λ" in (have, want):
        return _wavelengths(value, have, want, freq_mhz)
    if {have, want} in ({"dB", "dBi"}, {"dB", "dBc"}):
        return value
    if dimension(have) != dimension(want):
        raise UnknownUnitError(f"cannot convert {unit} to {to_unit}")
    base = _OTHER[have][1](value) if have in _OTHER else value * _LINEAR[have][1]
    if want in _LINEAR:
        return base / _LINEAR[want][1]
    if dimension(want) == "power" and base <= 0:
        raise UnknownUnitError(f"{value} {unit} has no level in {to_unit}")
    return _OTHER[want][2](base)


def _known(unit: str) -> str:
    if not unit or unit in _LINEAR or unit in _OTHER:
        return unit
    name = unit_name(unit)
    if not name:
        raise UnknownUnitError(f"unknown unit '{unit}'")
    return name


def _wavelengths(value: float, have: str, want: str, freq_mhz: float | None) -> float:
    if freq_mhz is None or freq_mhz <= 0:
        raise UnknownUnitError("a length in wavelengths needs its frequency")
    metres = SPEED_OF_LIGHT_MPS / (freq_mhz * 1e6)
    if have == "λ":
        return convert(value * metres, "m", want)
    return convert(value, have, "m") / metres
