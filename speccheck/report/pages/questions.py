"""The clarification list: every question of a report, numbered once."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass, replace

from speccheck.records import (
    Assessment,
    Band,
    CellRef,
    Compliance,
    Finding,
    Fit,
    Level,
    MatrixRow,
    PanelAssessment,
)
from speccheck.records.demands import WINDOW_UNKNOWN, blocked
from speccheck.text import plain

UNANSWERED = (Compliance.NOT_STATED, Compliance.NOT_JUDGED, Compliance.DECLARED_ONLY)

_ASKED = {
    Compliance.NOT_STATED: "The offer has no cell for {what}. "
    "Please state the figure, with its unit and conditions.",
    Compliance.DECLARED_ONLY: "The offer declares {what} without a figure that can be judged. "
    "Please state the figure, with its unit and conditions.",
    Compliance.NOT_JUDGED: "{what} could not be judged from what the offer states. "
    "Please state the figure, with its unit and conditions.",
}

_OPEN_ANSWER = (
    "The offer answers {what} with '{said}'. Please state the figure, with its unit and conditions."
)
_LONGEST_SAID = 60
_OF_BAND = re.compile(r" for [\d.,]+–[\d.,]+ MHz(?=\.$)")

_CELL = re.compile(r"\b[A-Z]{1,3}[1-9][0-9]*\b")
_REWORD = "{what} cannot be judged as it is worded. The buyer settles the wording; no figure is asked yet."
_FOR_BUYER = ("condition", "baseline")
"""Operators that ask the bidder nothing: what they refer to is the buyer's to settle."""
_TOLERANCE = "{what} is stated without a tolerance. Please state the window within which every figure lies."
_PAPERS = "The offer declares {what}. Please supply the papers that show it."


@dataclass(frozen=True, slots=True, kw_only=True)
class Question:
    """One question to the bidder about one panel; `findings` are the places of those that ask it."""

    panel_number: int
    panel: str
    asked: str
    problem: str
    number: int = 0
    clauses: tuple[str, ...] = ()
    bands: tuple[Band, ...] = ()
    where: tuple[CellRef, ...] = ()
    findings: tuple[int, ...] = ()

    @property
    def unnamed(self) -> tuple[CellRef, ...]:
        """Cells in question that its own words don't name."""
        named = set(_CELL.findall(f"{self.asked} {self.problem}"))
        return tuple(place for place in self.where if place.cell not in named)


def collect_questions(assessment: Assessment, label: Callable[[str], str]) -> tuple[Question, ...]:
    """Questions of the findings, then of the requirement rows that no figure answers; none twice.

    A figure that both a check and a requirement miss is asked for once, in the words of the requirement.
    """
    questions: list[Question] = []
    for panel_number, panel in enumerate(assessment.panels, start=1):
        merged: dict[str, Question] = {}
        rows = tuple(_from_rows(panel_number, panel, label))
        words = {key: question.asked for key, question in reversed(rows)}
        for question in (*_from_findings(panel_number, panel, words), *(question for _, question in rows)):
            known = merged.get(question.asked)
            merged[question.asked] = _joined(known, question) if known else question
        questions.extend(merged.values())
    return tuple(replace(question, number=i) for i, question in enumerate(questions, start=1))


def _from_findings(panel_number: int, panel: PanelAssessment, words: Mapping[str, str]) -> Iterator[Question]:
    for index, finding in enumerate(panel.findings):
        if finding.question and finding.verdict is not Fit.FITS:
            rows = (row for row in panel.requirements if finding.check in row.in_doubt)
            yield Question(
                panel_number=panel_number,
                panel=panel.panel.name,
                asked=_in_words(finding, words),
                problem=finding.summary,
                clauses=tuple(dict.fromkeys(row.requirement.clause for row in rows)),
                bands=(finding.band,) if finding.band else (),
                where=finding.where,
                findings=(index,),
            )


def _in_words(finding: Finding, words: Mapping[str, str]) -> str:
    """What a finding asks; where figures are missing, without its band, which stands beside the question."""
    if len(finding.missing) == 1 and finding.missing[0] in words:
        return words[finding.missing[0]]
    return _OF_BAND.sub("", finding.question) if finding.missing else finding.question


def _from_rows(
    panel_number: int, panel: PanelAssessment, label: Callable[[str], str]
) -> Iterator[tuple[str, Question]]:
    """Parameter and question of each row that no figure answers."""
    for row in panel.requirements:
        window_unknown = WINDOW_UNKNOWN in row.note
        unanswered = row.verdict in UNANSWERED or window_unknown
        for_buyer = row.requirement.operator in _FOR_BUYER or row.requirement.level is Level.INFORMATION
        if not unanswered or for_buyer:
            continue
        name = label(row.requirement.parameter) if row.requirement.parameter else "this requirement"
        what = f"{name} (clause {row.requirement.clause})" if row.requirement.clause else name
        papers = row.requirement.operator == "evidence" and row.verdict is Compliance.DECLARED_ONLY
        said = plain(row.statement.raw.strip(), _LONGEST_SAID) if row.statement else ""
        asked = _TOLERANCE if window_unknown else _PAPERS if papers else _ASKED[row.verdict]
        if row.verdict is Compliance.NOT_STATED and said:
            asked = _OPEN_ANSWER
        if blocked(row.requirement.doubts):
            asked = _REWORD
        question = Question(
            panel_number=panel_number,
            panel=panel.panel.name,
            asked=asked.format(what=what, said=said),
            problem=row.note or row.requirement.wording,
            clauses=(row.requirement.clause,) if row.requirement.clause else (),
            bands=(row.band,) if row.band else (),
            where=_answer_cells(row),
        )
        yield row.requirement.parameter, question


def _answer_cells(row: MatrixRow) -> tuple[CellRef, ...]:
    answers = (row.offered, row.statement)
    return tuple(answer.where for answer in answers if answer is not None)


def _joined(first: Question, second: Question) -> Question:
    """The same question asked of two bands or cells."""
    return replace(
        first,
        clauses=tuple(dict.fromkeys((*first.clauses, *second.clauses))),
        bands=tuple(dict.fromkeys((*first.bands, *second.bands))),
        where=tuple(dict.fromkeys((*first.where, *second.where))),
        findings=(*first.findings, *second.findings),
    )
