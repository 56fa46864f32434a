"""Ranges an offer must cover: bands, tilt, steering, temperature. The offer contains the demand."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence

from speccheck.dictionary import Parameter
from speccheck.quantities import UnknownUnitError, convert
from speccheck.records import Band, Compliance, Panel, Reading, Requirement, Value
from speccheck.standards import operating_band, union
from speccheck.tender.grading import Grade, graded, settled

_SLACK_MHZ = 0.05


def covers_range(
    requirement: Requirement, parameter: Parameter, readings: Sequence[Reading], guard: float
) -> Grade:
    """Grade of an offered range (tilt, steering, temperature …) that must contain the required one."""
    try:
        spans = [_span(reading, parameter, requirement.unit) for reading in readings]
    except (UnknownUnitError, ValueError) as error:
        return Grade(Compliance.NOT_JUDGED, None, f"not comparable: {error}")
    limit = requirement.limit
    if isinstance(limit, float | int):
        inside = max(min(limit - low, high - limit) for low, high in spans)
        return graded(settled(inside, limit), guard, requirement.unit)
    if not isinstance(limit, tuple):
        return Grade(Compliance.NOT_JUDGED, None, "the limit is not a range")
    margin = max(min(limit[0] - low, high - limit[1]) for low, high in spans)
    return graded(settled(margin, max(map(abs, limit))), guard, requirement.unit)


def nearest(requirement: Requirement, readings: Sequence[Reading]) -> tuple[Reading, Value | None]:
    """The offered range to show beside the demand, the one that has most in common, in the demand's unit."""
    shown = [(reading, _in_unit(reading, requirement.unit)) for reading in readings]
    limit = requirement.limit
    if not isinstance(limit, tuple):
        return shown[0]

    def common(one: tuple[Reading, Value | None]) -> float:
        value = one[1]
        return min(value[1], limit[1]) - max(value[0], limit[0]) if isinstance(value, tuple) else -math.inf

    return max(shown, key=common)


def _in_unit(reading: Reading, unit: str) -> Value | None:
    value = reading.value
    try:
        if isinstance(value, tuple):
            return convert(value[0], reading.unit, unit), convert(value[1], reading.unit, unit)
        return None if isinstance(value, str) else convert(value, reading.unit, unit)
    except (UnknownUnitError, ValueError):
        return None


def _span(reading: Reading, parameter: Parameter, unit: str) -> Band:
    low, high = reading.low, reading.high
    if parameter.kind == "scan" and not isinstance(reading.value, tuple):
        low, high = -abs(high), abs(high)
    return convert(low, reading.unit, unit), convert(high, reading.unit, unit)


def covers_bands(requirement: Requirement, panel: Panel) -> tuple[Grade, tuple[Reading, ...]]:
    """Grade of the offered frequency ranges against a required range or named bands, and the cells used."""
    headline, table = panel.all("frequency_range"), panel.all("operating_bands")
    if not headline and not table:
        return Grade(Compliance.NOT_STATED), ()
    wanted = _wanted(requirement)
    if not wanted:
        return Grade(Compliance.NOT_JUDGED, None, "the bands demanded cannot be resolved"), (
            *headline,
            *table,
        )
    grades = [_covered(requirement, wanted, _ranges(said)) for said in (headline, table) if said]
    if len(grades) == 2 and grades[0].verdict is not grades[1].verdict:
        worse = min(grades, key=lambda grade: grade.margin or 0.0)
        note = f"the headline range and the band table differ: {worse.note}"
        return Grade(Compliance.NOT_JUDGED, worse.margin, note), (*headline, *table)
    return grades[-1], table or headline


def _wanted(requirement: Requirement) -> tuple[tuple[str, tuple[Band, ...]], ...]:
    limit = requirement.limit
    if isinstance(limit, tuple):
        low, high = (convert(edge, requirement.unit or "MHz", "MHz") for edge in limit)
        return ((f"{low:g}-{high:g} MHz", ((low, high),)),)
    if isinstance(limit, float | int):
        edge = convert(limit, requirement.unit or "MHz", "MHz")
        return ((f"{edge:g} MHz", ((edge, edge),)),)
    names = [name.strip() for name in (limit or "").split(",") if name.strip()]
    found = [(name, operating_band(name)) for name in names]
    if any(band is None for _, band in found):
        return ()
    return tuple((name, band.spans) for name, band in found if band is not None)


def _ranges(readings: Iterable[Reading]) -> tuple[Band, ...]:
    spans: list[Band] = []
    for reading in readings:
        if isinstance(reading.value, tuple):
            spans.append((reading.low, reading.high))
        elif isinstance(reading.value, str):
            for name in reading.value.replace("/", ",").split(","):
                band = operating_band(name)
                spans.extend(band.spans if band is not None else ())
    return union(tuple(spans))


def _covered(
    requirement: Requirement, wanted: Sequence[tuple[str, tuple[Band, ...]]], offered: tuple[Band, ...]
) -> Grade:
    missing = {name: sum(_missing(span, offered) for span in spans) for name, spans in wanted}
    lacking = {name: gap for name, gap in missing.items() if gap > _SLACK_MHZ or gap < 0}
    met = len(lacking) < len(wanted) if requirement.operator == "any of" else not lacking
    if met:
        return Grade(Compliance.MEETS, _spare(wanted, offered) if not lacking else 0.0)
    worst = max(abs(gap) for gap in lacking.values())
    note = "; ".join(f"{name}: {abs(gap):g} MHz missing" for name, gap in lacking.items())
    return Grade(Compliance.FAILS, -worst, note)


def _missing(span: Band, offered: Sequence[Band]) -> float:
    """Megahertz of a span outside the offered ranges; -1 where a single frequency is outside."""
    if span[0] == span[1]:
        return 0.0 if any(low <= span[0] <= high for low, high in offered) else -1.0
    inside = sum(max(0.0, min(span[1], high) - max(span[0], low)) for low, high in offered)
    return span[1] - span[0] - inside


def _spare(wanted: Sequence[tuple[str, tuple[Band, ...]]], offered: Sequence[Band]) -> float:
    """Least distance [MHz] of a required edge from the offered edge beyond it."""
    spare = [
        min(span[0] - low, high - span[1])
        for _, spans in wanted
        for span in spans
        for low, high in offered
        if low - _SLACK_MHZ <= span[0] and span[1] <= high + _SLACK_MHZ
    ]
    return max(min(spare, default=0.0), 0.0)
