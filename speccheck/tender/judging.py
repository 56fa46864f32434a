"""Requirements held against one panel, band by band and tilt by tilt; nothing missing ever passes."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import replace
from functools import partial

from speccheck.dictionary import parameters
from speccheck.records import (
    Compliance,
    Finding,
    MatrixRow,
    Panel,
    Reading,
    Requirement,
    Settings,
    Status,
    Tender,
)
from speccheck.records.demands import blocked
from speccheck.records.words import FAILED, GRAVITY, PASSED
from speccheck.tender.answer_rule import answer_rule, ruled
from speccheck.tender.capabilities import covers_bands, covers_range, nearest
from speccheck.tender.caps import capped
from speccheck.tender.conditions import at_demanded_tilt, comparable
from speccheck.tender.deviations import with_deviation
from speccheck.tender.doubts import marked
from speccheck.tender.figures import Comparison, compare, guard_band
from speccheck.tender.grading import Grade, graded, settled
from speccheck.tender.named import compare_names
from speccheck.tender.offers import Offer, offers
from speccheck.tender.premises import under_premise
from speccheck.tender.statistics import canonical, tilt_means

_NOT_ROWS = ("rule", "after award")
_NAMES = ("text", "any of", "all of")


def judge(tender: Tender, panel: Panel, findings: Sequence[Finding]) -> tuple[MatrixRow, ...]:
    """Rows of a tender for one panel, in tender order; by band where the parameter is stated by band.

    Parameters
    ----------
    tender : requirements, accepted deviations and settings
    panel : the offer
    findings : what the checks said of the same panel; a misfit marks the rows of its parameters
    """
    rows: list[MatrixRow] = []
    rule = answer_rule(tender.requirements)
    for requirement in tender.requirements:
        if requirement.operator in _NOT_ROWS:
            continue
        for row in _rows(requirement, panel, tender.settings):
            rows.append(with_deviation(marked(ruled(row, rule), findings), tender, panel))
    return (*rows, *capped(tender.requirements, rows))


def _rows(requirement: Requirement, panel: Panel, settings: Settings) -> Iterator[MatrixRow]:
    stops = blocked(requirement.doubts)
    if stops:
        yield _row(requirement, Compliance.NOT_JUDGED, note="; ".join(stops))
    elif requirement.premise is not None:
        yield from under_premise(requirement, partial(_rows, panel=panel, settings=settings))
    elif requirement.operator in ("baseline", "condition"):
        note = requirement.doubts[0].partition(": ")[2] if requirement.doubts else ""
        yield _row(requirement, Compliance.NOT_JUDGED, note=note)
    elif requirement.parameter not in parameters():
        yield _row(requirement, Compliance.NOT_JUDGED, note="no known parameter in the words; for a person")
    elif parameters()[requirement.parameter].kind == "bands" and requirement.operator in (
        "contains",
        *_NAMES,
    ):
        yield _bands_row(requirement, panel)
    else:
        for offer in offers(requirement, panel):
            yield _answered(requirement, offer, panel, settings)


def _row(
    requirement: Requirement, verdict: Compliance, *, note: str = "", offer: Offer | None = None
) -> MatrixRow:
    statement = offer.statements[0] if offer and offer.statements else None
    band = offer.band if offer else None
    return MatrixRow(requirement=requirement, verdict=verdict, band=band, statement=statement, note=note)


def _bands_row(requirement: Requirement, panel: Panel) -> MatrixRow:
    grade, used = covers_bands(requirement, panel)
    if grade.verdict is Compliance.NOT_STATED:
        said = [s for s in panel.statements if s.parameter in ("frequency_range", "operating_bands")]
        return _without_reading(requirement, Offer(band=None, statements=tuple(said)))
    shown, value = nearest(requirement, used) if used else (None, None)
    row = _row(requirement, grade.verdict, note=grade.note)
    return replace(row, offered=shown, offered_in_unit=value, margin=grade.margin)


def _answered(requirement: Requirement, offer: Offer, panel: Panel, settings: Settings) -> MatrixRow:
    if not offer.readings:
        return _without_reading(requirement, offer)
    if requirement.operator in ("evidence", "information"):
        note = (
            "stated; papers are for a person to see"
            if requirement.operator == "evidence"
            else "for information: stated"
        )
        row = _row(requirement, Compliance.DECLARED_ONLY, note=note, offer=offer)
        return replace(row, offered=offer.readings[0])
    parameter = parameters()[requirement.parameter]
    if requirement.operator in _NAMES:
        grade = compare_names(requirement, offer.readings)
        row = _row(requirement, grade.verdict, note=grade.note, offer=offer)
        return replace(row, offered=offer.readings[0])
    if requirement.operator == "contains":
        grade = covers_range(
            requirement, parameter, offer.readings, guard_band(requirement, parameter, settings)
        )
        row = _row(requirement, grade.verdict, note=grade.note, offer=offer)
        shown, value = nearest(requirement, offer.readings)
        return replace(row, offered=shown, offered_in_unit=value, margin=grade.margin)
    return _figure_row(requirement, offer, panel, settings)


def _without_reading(requirement: Requirement, offer: Offer) -> MatrixRow:
    if offer.ambiguous:
        note = f"the cell reads more than one way: {', '.join(map(str, offer.ambiguous[0].alternatives))}"
        return replace(
            _row(requirement, Compliance.NOT_JUDGED, note=note, offer=offer), offered=offer.ambiguous[0]
        )
    declared = [s for s in offer.statements if s.status is Status.DECLARED]
    if declared:
        row = _row(requirement, Compliance.DECLARED_ONLY, note="declared without a figure", offer=offer)
        return replace(row, statement=declared[0])
    said = offer.statements[0].status.value if offer.statements else ""
    note = offer.note or (f"answered '{said}'" if said else "")
    return _row(requirement, Compliance.NOT_STATED, note=note, offer=offer)


def _figure_row(requirement: Requirement, offer: Offer, panel: Panel, settings: Settings) -> MatrixRow:
    """The row of a numeric limit: the worst of the offered figures decides."""
    parameter = parameters()[requirement.parameter]
    readings = [r for r in at_demanded_tilt(requirement, offer.readings) if not isinstance(r.value, str)]
    if not readings:
        note = "no figure could be read"
        return replace(
            _row(requirement, Compliance.NOT_JUDGED, note=note, offer=offer), offered=offer.readings[0]
        )
    relation = offer.relation
    compared = [
        compare(requirement, parameter, comparable(requirement, reading, panel), settings, relation)
        for reading in readings
    ]
    governing = min(compared, key=_weight)
    grade = _over_tilts(requirement, offer, settings) or governing.grade
    if grade.verdict in FAILED and _counted_by_band(requirement, readings):
        note = "stated band by band; the number for the whole panel is not stated"
        grade = replace(grade, verdict=Compliance.NOT_JUDGED, note=note)
    notes = [
        comparable(requirement, governing.reading, panel).note,
        offer.note,
        _conversion(requirement, governing),
    ]
    notes.append(_declared_beside(offer, grade))
    row = _row(requirement, grade.verdict, note="; ".join(filter(None, (grade.note, *notes))), offer=offer)
    return replace(row, offered=governing.reading, offered_in_unit=_in_unit(governing), margin=grade.margin)


def _counted_by_band(requirement: Requirement, readings: Sequence[Reading]) -> bool:
    """Whether ports of a whole panel were stated for each band and their sum could meet the number."""
    parameter = parameters()[requirement.parameter]
    by_band = {r.band: r.nominal for r in readings if r.band is not None}
    counted = parameter.scope == "panel" and parameter.kind in ("connectors", "count")
    limit = requirement.limit
    return counted and len(by_band) > 1 and isinstance(limit, float | int) and sum(by_band.values()) >= limit


def _weight(comparison: Comparison) -> tuple[int, float]:
    margin = comparison.grade.margin
    return GRAVITY.index(comparison.grade.verdict), margin if margin is not None else float("inf")


def _in_unit(comparison: Comparison) -> float | tuple[float, float] | None:
    span = comparison.span
    if span is None:
        return None
    return span.low if span.low == span.high else (span.low, span.high)


def _conversion(requirement: Requirement, comparison: Comparison) -> str:
    """'1.5 = 13.98 dB' where the figure was carried to another unit."""
    reading, value = comparison.reading, _in_unit(comparison)
    stated = reading.stated_unit or reading.unit
    same = reading.parameter == requirement.parameter or not requirement.unit
    if value is None or isinstance(value, tuple) or (stated == requirement.unit and same):
        return ""
    return f"{reading.raw.strip()} = {value:.4g} {requirement.unit}".strip()


def _declared_beside(offer: Offer, grade: Grade) -> str:
    declared = [s for s in offer.statements if s.status is Status.DECLARED]
    if declared and grade.verdict in FAILED:
        return f"'{declared[0].raw.strip()}' in {declared[0].where} stands beside a figure that does not meet"
    return ""


def _over_tilts(requirement: Requirement, offer: Offer, settings: Settings) -> Grade | None:
    """Grade of the mean over figures stated tilt by tilt, where a mean was demanded.

    The mean of decibels and the mean of powers are both formed; where they disagree a person decides.
    """
    limit = requirement.limit
    parameter = parameters()[requirement.parameter]
    if canonical(requirement.statistic, parameter.direction) != "mean" or not isinstance(limit, float | int):
        return None
    means = tilt_means(offer.readings) if requirement.operator in ("≥", ">") else None
    if means is None or requirement.unit != parameter.unit:
        return None
    guard = guard_band(requirement, parameter, settings)
    grades = [
        graded(settled(mean - limit, limit), guard, equal_meets=requirement.operator == "≥") for mean in means
    ]
    said = f"mean of decibels {means[0]:.2f}, of powers {means[1]:.2f} {requirement.unit}"
    wanted = grades[1] if requirement.statistic == "mean-lin" else grades[0]
    unclear = requirement.statistic == "mean-dB" and any(
        text.startswith("STAT") for text in requirement.doubts
    )
    if unclear and (grades[0].verdict in PASSED) != (grades[1].verdict in PASSED):
        return Grade(Compliance.NOT_JUDGED, wanted.margin, f"the two kinds of mean disagree: {said}")
    return replace(wanted, note=said)
