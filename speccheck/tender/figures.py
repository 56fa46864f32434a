"""One offered figure against one limit, in the unit of the requirement."""

from __future__ import annotations

import re
from collections.abc import Callable
from dataclasses import dataclass, replace

from speccheck.dictionary import Parameter
from speccheck.quantities import UnknownUnitError, convert
from speccheck.records import Compliance, Reading, Requirement, Sense, Settings
from speccheck.records.demands import WINDOW_UNKNOWN, doubt_code
from speccheck.records.words import FAILED, PASSED
from speccheck.tender.conditions import Comparable
from speccheck.tender.grading import Grade, graded, rounded, settled
from speccheck.tender.offers import Relation
from speccheck.tender.statistics import canonical, could_decide, offered_statistic

_AT_LEAST, _AT_MOST = ("≥", ">"), ("≤", "<")
_NUMERAL = re.compile(r"\d+(?:[.,]\d+)?")
_FEWEST_DIGITS = 2
_IDENTITY = Relation("")


@dataclass(frozen=True, slots=True)
class Span:
    """Lowest and highest figure of an offer, and half a unit of its last digit, in the requirement's unit."""

    low: float
    high: float
    half_digit: float


@dataclass(frozen=True, slots=True)
class Comparison:
    """Grade of a reading with the figure as compared; `kinder` as in Comparable."""

    reading: Reading
    grade: Grade
    span: Span | None


def compare(
    requirement: Requirement,
    parameter: Parameter,
    offered: Comparable,
    settings: Settings,
    relation: Relation | None = None,
) -> Comparison:
    """Grade one reading; NOT_JUDGED where a difference of unit, statistic or condition could decide."""
    reading, relation = offered.reading, relation or _IDENTITY
    try:
        span = _span(requirement, parameter, offered, relation)
    except (UnknownUnitError, ValueError) as error:
        return Comparison(reading, Grade(Compliance.NOT_JUDGED, None, f"unit not comparable: {error}"), None)
    grade = _against_limit(requirement, parameter, reading, span, settings)
    reasons = _differences(requirement, parameter, offered, relation, meets=grade.verdict in PASSED)
    if reasons and grade.verdict in (*PASSED, *FAILED):
        grade = replace(grade, verdict=Compliance.NOT_JUDGED, note="; ".join(reasons))
    return Comparison(reading, grade, span)


def guard_band(requirement: Requirement, parameter: Parameter, settings: Settings) -> float:
    """The guard band of a parameter in the requirement's unit, at the limit."""
    width = settings.guard_bands.get(parameter.key, 0.0)
    limit = requirement.limit[0] if isinstance(requirement.limit, tuple) else requirement.limit
    if not width or not isinstance(limit, float | int):
        return width
    there = convert(float(limit), requirement.unit, parameter.unit)
    return round(abs(convert(there + width, parameter.unit, requirement.unit) - float(limit)), 9)


def _span(requirement: Requirement, parameter: Parameter, offered: Comparable, relation: Relation) -> Span:
    reading = offered.reading
    demanded = canonical(requirement.statistic, parameter.direction)
    firm = demanded in ("", "each")
    low, high = (
        (reading.low, reading.high) if firm or isinstance(reading.value, tuple) else (reading.nominal,) * 2
    )
    unit = parameter.unit if relation.parameter and relation.convert is not float else reading.unit
    carrier = requirement.at.get("carrier_dbm", reading.at.get("carrier_dbm"))

    def there(value: float) -> float:
        if carrier is not None and {unit, requirement.unit} == {"dBm", "dBc"}:
            return value - carrier if requirement.unit == "dBc" else value + carrier
        return convert(relation.convert(value) * offered.factor, unit, requirement.unit)

    ends = sorted((there(low), there(high)))
    return Span(ends[0], ends[1], _half_digit(reading, there))


def _half_digit(reading: Reading, there: Callable[[float], float]) -> float:
    """Half a unit of the last digit printed, carried to the requirement's unit.

    A lone digit was not rounded to a unit: '2' is no VSWR of 1.5.
    """
    stated = reading.value if reading.stated_value is None else reading.stated_value
    if isinstance(stated, str | tuple) or isinstance(reading.value, str | tuple):
        return 0.0
    printed = [n for n in _NUMERAL.findall(reading.raw) if float(n.replace(",", ".")) == abs(stated)]
    if not printed or len(re.sub(r"^[0.,]+|[.,]", "", printed[0])) < _FEWEST_DIGITS:
        return 0.0
    decimals = len(re.split("[.,]", printed[0])[1]) if re.search("[.,]", printed[0]) else 0
    half = 0.5 * 10.0**-decimals
    try:
        own = abs(convert(stated + half, reading.stated_unit or reading.unit, reading.unit) - reading.value)
        return max(
            abs(there(reading.value + own) - there(reading.value)),
            abs(there(reading.value - own) - there(reading.value)),
        )
    except (UnknownUnitError, ValueError):
        return 0.0


def _against_limit(
    requirement: Requirement, parameter: Parameter, reading: Reading, span: Span, settings: Settings
) -> Grade:
    guard, limit, operator = (
        guard_band(requirement, parameter, settings),
        requirement.limit,
        requirement.operator,
    )
    if isinstance(limit, tuple):
        margin = settled(min(span.low - limit[0], limit[1] - span.high), max(map(abs, limit)))
        grade = rounded(graded(margin, guard, requirement.unit), span.half_digit)
        return _windowed(requirement, parameter, reading, grade)
    if not isinstance(limit, float | int):
        return Grade(Compliance.NOT_JUDGED, None, "the limit is not a figure")
    if operator == "=":
        return _counted(requirement, span, float(limit))
    margin = span.low - limit if operator in _AT_LEAST else limit - span.high
    equal = any(doubt_code(text) == "EQUAL" for text in requirement.doubts)
    grade = graded(
        settled(margin, float(limit)),
        guard,
        requirement.unit,
        equal_meets=settings.equality_meets if equal else operator in ("≥", "≤"),
        equal_note="EQUAL: exactly at the limit; the equality rule decides" if equal else "",
    )
    return rounded(grade, span.half_digit)


def _windowed(requirement: Requirement, parameter: Parameter, reading: Reading, grade: Grade) -> Grade:
    """A window in the offer must lie inside the required one.

    A figure without tolerance is judged as it stands and never passes better than narrowly: its window
    is not known, and the bidder is asked for it.
    """
    bare = reading.tolerance is None and not isinstance(reading.value, tuple)
    firm = canonical(requirement.statistic, parameter.direction) in ("", "each")
    if bare and firm and parameter.direction == "window" and grade.verdict in PASSED:
        return replace(grade, verdict=Compliance.MEETS_NARROWLY, note=WINDOW_UNKNOWN)
    return grade


def _counted(requirement: Requirement, span: Span, limit: float) -> Grade:
    margin = settled((span.low if span.low < limit else span.high) - limit, limit)
    if margin == 0:
        return Grade(Compliance.MEETS, 0.0)
    if margin > 0 and any(doubt_code(text) == "DIR" for text in requirement.doubts):
        return Grade(
            Compliance.NOT_JUDGED, margin, "more than the number named; whether more is allowed is not stated"
        )
    return Grade(Compliance.FAILS, margin)


def _differences(
    requirement: Requirement, parameter: Parameter, offered: Comparable, relation: Relation, *, meets: bool
) -> list[str]:
    """Why the verdict could change under the demanded statistic and conditions; empty if it could not."""
    direction = _direction(requirement, parameter)
    demanded = canonical(requirement.statistic, direction)
    stated = offered_statistic(_turned(offered.reading, relation), direction)
    reasons: list[str] = []
    if could_decide(demanded or "each", stated, meets=meets):
        reasons.append(
            f"offered as {_words(offered.reading, stated)}, demanded as {requirement.statistic or 'each'}"
        )
    if offered.differs and (offered.kinder is None or offered.kinder == meets):
        reasons.append(offered.differs)
    if relation.bound:
        kinder = (relation.bound == "lower bound") == (requirement.operator in _AT_MOST)
        if kinder == meets:
            reasons.append(f"the figure stated is a {relation.bound} of the one demanded")
    return reasons


def _direction(requirement: Requirement, parameter: Parameter) -> str:
    if requirement.operator in _AT_LEAST:
        return "higher"
    return "lower" if requirement.operator in _AT_MOST else parameter.direction


def _turned(reading: Reading, relation: Relation) -> Reading:
    if not relation.falling or reading.sense is Sense.NOMINAL:
        return reading
    return replace(reading, sense=Sense.MIN if reading.sense is Sense.MAX else Sense.MAX)


def _words(reading: Reading, stated: str) -> str:
    return reading.statistic or {"best": f"a {reading.sense.value}imum"}.get(stated, stated)
