"""Answers taken in beside the first figure: they may explain an offer, but a changed figure changes it.

The offer stays as it was opened. What an answered figure would do to the verdicts is shown, not done.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import replace

from speccheck.dictionary import Parameter, parameters
from speccheck.quantities import UnknownUnitError, read_cell, settle
from speccheck.records import Assessment, Panel, PanelAssessment, Reading, Sense
from speccheck.records.answers import Answer, AnswerKind, Effect, TakenAnswer
from speccheck.tender.judging import judge


def take_in(assessment: Assessment, answers: Sequence[Answer]) -> tuple[TakenAnswer, ...]:
    """Each answer with the figure first stated, what kind of answer it is, and its effect on verdicts."""
    return tuple(_taken(assessment, answer) for answer in answers)


def _taken(assessment: Assessment, answer: Answer) -> TakenAnswer:
    one = next((p for p in assessment.panels if p.panel.name == answer.panel), None)
    if one is None:
        return TakenAnswer(
            answer=answer, kind=AnswerKind.EXPLANATION if not answer.figure else AnswerKind.NOT_READ
        )
    first = _first(one.panel, answer)
    if not answer.figure:
        return TakenAnswer(answer=answer, kind=AnswerKind.EXPLANATION, first=first)
    key = first.parameter if first else _asked_parameter(assessment, answer)
    answered = _read(answer, parameters()[key], first) if key else None
    if answered is None:
        return TakenAnswer(answer=answer, kind=AnswerKind.NOT_READ, first=first)
    kind = AnswerKind.ADDED if first is None else _kind(first, answered)
    effects = tuple(_effects(assessment, one, first, answered)) if kind is not AnswerKind.CONFIRMED else ()
    return TakenAnswer(answer=answer, kind=kind, first=first, answered=answered, effects=effects)


def _first(panel: Panel, answer: Answer) -> Reading | None:
    """The figure that stood in the cell asked about."""
    return next((r for r in panel.readings if str(r.where) == answer.replaces), None)


def _asked_parameter(assessment: Assessment, answer: Answer) -> str:
    """Parameter of the clause asked about, where nothing was stated."""
    requirements = assessment.tender.requirements if assessment.tender else ()
    return next(
        (r.parameter for r in requirements if r.clause and r.clause == answer.clause and r.parameter), ""
    )


def _read(answer: Answer, parameter: Parameter, first: Reading | None) -> Reading | None:
    unit = first.stated_unit if first else parameter.unit
    content = read_cell(answer.figure, kind=parameter.kind, unit=unit or parameter.unit)
    for quantity in content.quantities:
        if quantity.alternatives or quantity.parameter not in ("", parameter.key):
            continue
        try:
            found = settle(
                quantity,
                parameter.unit,
                sign=parameter.sign,
                direction=parameter.direction,
                keep=parameter.keep,
            )
        except UnknownUnitError:
            return None
        return Reading(
            where=answer.where,
            parameter=parameter.key,
            raw=answer.figure,
            value=found.value,
            unit=found.unit,
            band=first.band if first else None,
            tolerance=found.tolerance,
            sense=Sense(found.sense),
            statistic=found.statistic,
            stated_value=found.stated_value,
            stated_unit=found.stated_unit,
            condition=found.condition,
            at={**(first.at if first else {}), **found.at},
        )
    return None


def _kind(first: Reading, answered: Reading) -> AnswerKind:
    """A figure with another value, tolerance, sense or statistic is another offer."""
    same = all(getattr(first, name) == getattr(answered, name) for name in ("value", "sense", "statistic"))
    tolerance = answered.tolerance in (None, first.tolerance)
    return AnswerKind.CONFIRMED if same and tolerance else AnswerKind.CHANGED


def _effects(
    assessment: Assessment, one: PanelAssessment, first: Reading | None, answered: Reading
) -> Iterator[Effect]:
    if assessment.tender is None:
        return
    kept = tuple(answered if r is first else r for r in one.panel.readings)
    changed = replace(one.panel, readings=kept if first is not None else (*kept, answered))
    after = judge(assessment.tender, changed, one.findings)
    verdicts = {(id(row.requirement), row.band): row.verdict for row in one.requirements}
    for row in after:
        if row.requirement.parameter != answered.parameter:
            continue
        before = verdicts.get((id(row.requirement), row.band))
        if before is not None and before is not row.verdict:
            requirement = row.requirement
            yield Effect(
                clause=requirement.clause,
                parameter=requirement.parameter,
                band=row.band,
                before=before,
                after=row.verdict,
            )
