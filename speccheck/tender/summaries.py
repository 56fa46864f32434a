"""An assessment shrunk to what a comparison needs."""

from __future__ import annotations

from collections.abc import Mapping

from speccheck.records import Assessment, Fit, MatrixRow, PanelAssessment, Requirement, Value
from speccheck.records.evaluations import Offer, OfferCell

_MOST_REASONS = 8
_LONGEST_TEXT = 200
_NAMED = ("text", "any of", "all of", "evidence", "information")


def summarise(assessment: Assessment) -> tuple[Offer, ...]:
    """One offer a panel, its rows in the order judged."""
    requirements = assessment.tender.requirements if assessment.tender else ()
    places = {id(requirement): place for place, requirement in enumerate(requirements)}
    return tuple(_offer(panel, assessment.submission.file, places) for panel in assessment.panels)


def _offer(one: PanelAssessment, file: str, places: Mapping[int, int]) -> Offer:
    verdicts = [finding.verdict for finding in one.findings]
    return Offer(
        file=file,
        panel=one.panel.name,
        outcome=one.outcome,
        reasons=one.reasons[:_MOST_REASONS],
        cells=tuple(_cell(row, places[id(row.requirement)]) for row in one.requirements),
        misfits=verdicts.count(Fit.DOES_NOT_FIT),
        doubts=verdicts.count(Fit.DOUBTFUL),
        questions=len({finding.question for finding in one.findings if finding.question}),
    )


def _cell(row: MatrixRow, place: int) -> OfferCell:
    said = row.offered or row.statement
    return OfferCell(
        requirement=place,
        verdict=row.verdict,
        band=row.band,
        offered=_value(row, row.requirement),
        raw=(said.raw if said else "")[:_LONGEST_TEXT],
        where=said.where if said else None,
        margin=row.margin,
        in_doubt=row.in_doubt,
        note=row.note[:_LONGEST_TEXT],
        deviation=row.deviation.reason[:_LONGEST_TEXT] if row.deviation else "",
        underlying=row.underlying,
    )


def _value(row: MatrixRow, requirement: Requirement) -> Value | None:
    if requirement.operator in _NAMED and not isinstance(row.offered_in_unit, tuple):
        return None
    if row.offered_in_unit is not None:
        return row.offered_in_unit
    same = row.offered is not None and row.offered.unit == requirement.unit
    return (
        row.offered.value
        if row.offered is not None and (same or isinstance(row.offered.value, str))
        else None
    )
