"""Amounts to quantities: which figures are the claim, and which say where it holds."""

from __future__ import annotations

import itertools
import math
from dataclasses import dataclass, field, replace

from speccheck.quantities.amounts import Amount
from speccheck.quantities.content import Quantity, SenseWord
from speccheck.quantities.units import UnknownUnitError, convert, dimension
from speccheck.quantities.words import word_set

_COMPATIBLE = {
    "gain": {"gain", "level"},
    "level": {"level", "gain", "carrier level"},
    "carrier level": {"carrier level", "level", "power"},
    "length": {"length", "wavelengths"},
    "": {"", "count"},
}
_RESTATED_WITHIN = 0.02
_MOST_IN_PRODUCT = 512
_NEVER_IN_HUNDREDS = ("gain", "level", "carrier level", "angle", "")
_LOWEST_BAND_MHZ, _HIGHEST_BAND_MHZ = 400.0, 7125.0
_CARRIER_DBM = 43.0


@dataclass(slots=True)
class Claim:
    """A figure of the cell with the amounts that qualify it."""

    amount: Amount
    factors: tuple[float, ...] = ()
    conditions: list[Amount] = field(default_factory=list)


def claims(found: list[Amount], unit: str, expected: str | None) -> list[Claim]:
    """Figures that answer for the parameter, each with its conditions.

    Parameters
    ----------
    found : amounts of the cell in order
    unit : unit of the heading, "" where it has none
    expected : unit of the parameter, "" for a pure number, None where it is not known
    """
    wanted = _wanted(found, unit, expected)
    if wanted in _NEVER_IN_HUNDREDS:
        for amount in found:
            if not amount.unit and amount.high is not None and _looks_like_band(amount.low, amount.high):
                amount.unit = "MHz"
    if len(found) == 1 and _is_figure_and_place(found[0], unit, wanted):
        found = _apart(found[0])
    result: list[Claim] = []
    for labels, values in _labelled(found):
        here = _plain_claims(values, wanted)
        if len(labels) == len(here):
            for label, claim in zip(labels, here, strict=True):
                claim.conditions.append(label)
        else:
            for claim in here:
                claim.conditions += labels
        result += here
    _share_conditions(result)
    return _without_restatements(result)


def _is_figure_and_place(amount: Amount, unit: str, wanted: str) -> bool:
    """'17,5 a 5°' under a heading in dBi: the word means 'at', as the unit is of another kind."""
    if amount.high is None or not amount.joint.isalpha() or not unit:
        return False
    band = dimension(amount.unit) == "frequency" and amount.low >= _LOWEST_BAND_MHZ
    return not band and answers(unit, wanted) and not answers(amount.unit, wanted)


def _apart(amount: Amount) -> list[Amount]:
    low, _, high = amount.spelled.rpartition("-")
    place = Amount(amount.high or 0.0, unit=amount.unit, role="at", spelled=high, words=amount.words)
    return [replace(amount, high=None, unit="", spelled=low, words=[]), place]


def answers(unit: str, wanted: str) -> bool:
    """Whether a figure in `unit` can answer for a parameter of the dimension `wanted`."""
    return not unit or dimension(unit) in _COMPATIBLE.get(wanted, {wanted})


def quantity(claim: Claim, unit: str, expected: str = "", *, symmetric: bool = False) -> Quantity:
    """The quantity of a claim; `unit` is the heading's, used where the cell has none.

    `expected` is the unit of the parameter; with an angle beside a gain it says that a tilt is meant.
    `symmetric` reads '±60' as the range -60 to 60, otherwise it is the largest deviation 60.
    """
    amount = claim.amount
    own = amount.unit or unit
    value: float | tuple[float, float] = amount.low
    sense: SenseWord = "min" if amount.sense == "min" else "max" if amount.sense == "max" else "nominal"
    if amount.high is not None:
        value = (min(amount.low, amount.high), max(amount.low, amount.high))
    elif amount.plusminus and symmetric:
        value = (-amount.low, amount.low)
    elif amount.plusminus:
        sense = "max"
    at: dict[str, float] = {"count": math.prod(claim.factors)} if claim.factors else {}
    for condition in claim.conditions:
        at |= _at(condition, dimension(own or expected))
    return Quantity(
        value=value,
        unit=own,
        tolerance=_tolerance(amount, own),
        sense=sense,
        statistic="better than" if amount.better else amount.statistic,
        at=at,
        condition=_condition(claim),
    )


def unread_words(found: list[Amount], stray: list[str]) -> str:
    """Words of the cell that are not known to qualify a figure."""
    words = itertools.chain(stray, *((*a.before, *a.words) for a in found))
    return " ".join(w for w in words if w.casefold().rstrip(".") not in word_set("understood"))


def _wanted(found: list[Amount], unit: str, expected: str | None) -> str:
    if expected is not None and (expected or not unit):
        return dimension(expected)
    if unit:
        return dimension(unit)
    plain = next((a for a in found if a.role == ""), found[0] if found else None)
    return dimension(plain.unit) if plain else ""


def _labelled(found: list[Amount]) -> list[tuple[list[Amount], list[Amount]]]:
    """Split at colons: '0°/5°: 17.2/17.0' and '0°: 17.2; 5°: 17.0' give labels and their values."""
    runs: list[list[Amount]] = [[]]
    for amount in found:
        if amount.joined == ":" and runs[-1]:
            runs.append([])
        runs[-1].append(amount)
    if len(runs) == 1:
        return [([], runs[0])]
    parts: list[tuple[list[Amount], list[Amount]]] = []
    labels = runs[0]
    for index, run in enumerate(runs[1:], start=1):
        last = index == len(runs) - 1
        values, following = (run, []) if last else (run[:-1], run[-1:])
        parts.append(([] if _is_one(labels) else labels, values))
        labels = following
    return parts


def _is_one(labels: list[Amount]) -> bool:
    """The 1 of a ratio written '1:1.5'."""
    return len(labels) == 1 and labels[0].low == 1 and not labels[0].unit


def _plain_claims(values: list[Amount], wanted: str) -> list[Claim]:
    result: list[Claim] = []
    waiting: list[Amount] = []
    factors: tuple[float, ...] = ()
    own_units = len({id(a) for a in values if a.joined == "" and a.role == ""}) <= 2
    for index, amount in enumerate(values):
        following = values[index + 1] if index + 1 < len(values) else None
        if following is not None and following.joined == "×" and _is_count(amount):
            factors = (*factors, amount.low)
            continue
        if result and _stands_apart(amount, own_units=own_units):
            result[-1].conditions.append(amount)
            continue
        carriers = bool(factors) and wanted == "carrier level"
        if carriers or amount.role == "at" or not answers(amount.unit, wanted):
            condition = replace(amount, before=[*amount.before, *(f"{factor:g} ×" for factor in factors)])
            (result[-1].conditions if result else waiting).append(condition)
        else:
            result.append(Claim(amount, factors, waiting))
            waiting = []
        factors = ()
    if not result and waiting:
        return [Claim(waiting[0], (), waiting[1:])]
    return result


def _stands_apart(amount: Amount, *, own_units: bool) -> bool:
    """A bare number in parentheses or simply beside the figure is no figure of the parameter."""
    if amount.unit or amount.sense or amount.statistic or amount.high is not None or amount.plusminus:
        return False
    if amount.role == "aside":
        return not amount.joined and not word_set("extent").intersection(w.casefold() for w in amount.words)
    return own_units and amount.joined == "" and amount.role == "" and not amount.before


def _looks_like_band(low: float, high: float) -> bool:
    return _LOWEST_BAND_MHZ <= low < high <= _HIGHEST_BAND_MHZ


def _is_count(amount: Amount) -> bool:
    return amount.high is None and amount.low.is_integer() and 0 < amount.low <= _MOST_IN_PRODUCT


def _share_conditions(result: list[Claim]) -> None:
    """'16.5/17.0 dBi for 1710-1880/1850-1990 MHz' zips; '300/200 N at 150 km/h' holds for both."""
    if len(result) < 2 or any(c.conditions for c in result[:-1]):
        return
    shared = result[-1].conditions
    slashes = all(c.amount.joined == "/" for c in result[1:])
    if not slashes and not (len(shared) == 1 and dimension(shared[0].unit) == "speed"):
        return
    if len(shared) == len(result):
        for claim, condition in zip(result, list(shared), strict=True):
            claim.conditions = [condition]
    elif len(shared) == 1:
        for claim in result[:-1]:
            claim.conditions = list(shared)


def _without_restatements(result: list[Claim]) -> list[Claim]:
    """Drop '83.5 in' after '2120 mm': the same figure in another unit."""
    kept: list[Claim] = []
    for claim in result:
        if kept and _restates(kept[-1].amount, claim.amount):
            continue
        kept.append(claim)
    return kept


def _restates(first: Amount, second: Amount) -> bool:
    if not second.unit or first.unit == second.unit or first.high is not None or second.high is not None:
        return False
    if (first.unit, second.unit) == ("dBc", "dBm"):
        return math.isclose(second.low - first.low, _CARRIER_DBM, abs_tol=0.1)
    if "λ" in (first.unit, second.unit) and second.role == "aside":
        return True
    try:
        again = convert(second.low, second.unit, first.unit)
    except UnknownUnitError:
        return False
    return math.isclose(again, first.low, rel_tol=_RESTATED_WITHIN, abs_tol=0.06)


def _tolerance(amount: Amount, unit: str) -> float | None:
    if amount.tolerance is None:
        return None
    size = abs(amount.tolerance)
    if amount.tolerance_unit == "%" and unit != "%":
        return abs(amount.low) * size / 100
    if amount.tolerance_unit == "dB" and unit in ("W", "kW", "mW"):
        return abs(amount.low) * (10 ** (size / 10) - 1)
    try:
        return (
            convert(size, amount.tolerance_unit, unit)
            if dimension(unit) in ("length", "mass", "power")
            else size
        )
    except UnknownUnitError:
        return size


_NAMED = {
    "speed": ("wind_speed_mps", "m/s"),
    "temperature": ("temperature_c", "°C"),
    "power": ("carrier_dbm", "dBm"),
    "length": ("length_m", "m"),
}


def _at(condition: Amount, claim_dimension: str) -> dict[str, float]:
    kind = dimension(condition.unit)
    if kind == "frequency":
        low = convert(condition.low, condition.unit, "MHz")
        if condition.high is None:
            return {"frequency_mhz": low}
        high = convert(condition.high, condition.unit, "MHz")
        return {"frequency_low_mhz": min(low, high), "frequency_high_mhz": max(low, high)}
    if kind == "angle" and condition.high is None:
        beside = {w.casefold() for w in (*condition.words, *condition.before)}
        sideways = bool(beside & word_set("scan"))
        tilt = not sideways and (claim_dimension in ("gain", "angle") or bool(beside & word_set("tilt")))
        named = {"tilt_deg" if tilt and not condition.plusminus else "angle_deg": condition.low}
        return named if condition.tolerance is None else {**named, "angle_span_deg": condition.tolerance}
    if kind in _NAMED and condition.high is None:
        name, unit = _NAMED[kind]
        try:
            return {name: convert(condition.low, condition.unit, unit)}
        except UnknownUnitError:
            return {}
    return {}


def _condition(claim: Claim) -> str:
    words = [*claim.amount.before, *claim.amount.words]
    return ", ".join(filter(None, [" ".join(words), *map(_spelled, claim.conditions)]))


def _spelled(amount: Amount) -> str:
    sign = "±" if amount.plusminus else "-" if amount.low < 0 else ""
    figure = sign + amount.spelled + (f" ± {amount.tolerance:g}" if amount.tolerance is not None else "")
    unit = "°" if amount.unit == "deg" else f" {amount.unit}" if amount.unit else ""
    return " ".join([*amount.before, figure + unit, *amount.words])
