"""The sentences of the approver's page: what each offer comes to, and what has to be decided."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass

from speccheck.records import Assessment, Compliance, Fit, Level, Outcome, PanelAssessment
from speccheck.report.pages.questions import UNANSWERED, Question


@dataclass(frozen=True, slots=True)
class Tally:
    """Counts of one panel: requirements by level and verdict, findings by verdict."""

    requirements: dict[Level, Counter[Compliance]]
    findings: Counter[Fit]

    def of(self, level: Level, *verdicts: Compliance) -> int:
        """How many requirement rows of a level have one of the verdicts; all of them without any."""
        counts = self.requirements[level]
        return sum(counts[v] for v in verdicts) if verdicts else counts.total()

    @property
    def levels(self) -> tuple[Level, ...]:
        """Levels that occur."""
        return tuple(level for level in Level if self.requirements[level].total())


def tally(panel: PanelAssessment) -> Tally:
    """Counts of one panel."""
    by_level: dict[Level, Counter[Compliance]] = {level: Counter() for level in Level}
    for row in panel.requirements:
        by_level[row.requirement.level][row.verdict] += 1
    return Tally(by_level, Counter(f.verdict for f in panel.findings))


def sentence(counted: Tally, questions: int, judged: bool) -> str:
    """What stands against an offer, in one sentence."""
    failed = counted.of(Level.MANDATORY, Compliance.FAILS)
    narrow = counted.of(Level.MANDATORY, Compliance.FAILS_NARROWLY)
    unanswered = counted.of(Level.MANDATORY, *UNANSWERED)
    facts = [
        _count(failed, "mandatory requirement fails", "mandatory requirements fail"),
        _count(narrow, "mandatory requirement fails narrowly", "mandatory requirements fail narrowly"),
        _count(unanswered, "mandatory requirement is open", "mandatory requirements are open"),
        _count(counted.findings[Fit.DOES_NOT_FIT], "claim does not fit", "claims do not fit"),
        _count(counted.findings[Fit.DOUBTFUL], "claim is doubtful", "claims are doubtful"),
        _count(counted.findings[Fit.NOT_JUDGED], "check could not be judged", "checks could not be judged"),
        _count(questions, "question to the bidder", "questions to the bidder"),
    ]
    said = [fact for fact in facts if fact]
    if not judged:
        said.append("no tender was given, so no requirement is judged")
    return (", ".join(said) or "nothing stands against it in what was stated and checked") + "."


def _count(number: int, one: str, many: str) -> str:
    return f"{number} {one if number == 1 else many}" if number else ""


def decisions(assessment: Assessment, questions: Sequence[Question]) -> tuple[str, ...]:
    """What the approver is asked to decide."""
    rejected: dict[str, list[str]] = {}
    for panel in assessment.panels:
        if panel.outcome is Outcome.REJECT:
            failed = (
                row.requirement.clause
                for row in panel.requirements
                if row.requirement.level is Level.MANDATORY and row.verdict is Compliance.FAILS
            )
            clauses = ", ".join(dict.fromkeys(clause for clause in failed if clause))
            rejected.setdefault(clauses or "as listed", []).append(panel.panel.name)
    asked = [
        f"{', '.join(names)}: confirm or withdraw the rejection on clause {clauses}."
        for clauses, names in rejected.items()
    ]
    if questions:
        span = f"questions 1 to {len(questions)}" if len(questions) > 1 else "question 1"
        asked.append(f"Release {span} to the bidder and set the date the answers are due.")
    unconfirmed = [r for r in assessment.tender.requirements if not r.confirmed] if assessment.tender else []
    if unconfirmed:
        asked.append(
            f"Confirm how {_count(len(unconfirmed), 'requirement was', 'requirements were')} read "
            "(see “Requirements as read”)."
        )
    if not asked:
        asked.append("Accept the result, or return it with conditions.")
    return tuple(asked)
