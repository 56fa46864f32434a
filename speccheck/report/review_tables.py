"""The sheets of results: Summary, Findings, Requirements, Questions."""

from __future__ import annotations

from collections.abc import Iterable

from speccheck.records import (
    Assessment,
    Band,
    CellRef,
    Compliance,
    Convention,
    Fit,
    Level,
    MatrixRow,
    Outcome,
    PanelAssessment,
    Step,
    Value,
)
from speccheck.report.cells import Content, Rich
from speccheck.report.formats import decimals_for, shown_unit
from speccheck.report.questions import Question
from speccheck.report.review_places import FINDINGS, NumberedFinding, Places
from speccheck.report.sheets import Column, Table
from speccheck.report.view import label, tally

MOST_DECIMALS = 4

PEOPLE = (
    Column(
        heading="Reviewer's verdict",
        width=16,
        look="entry",
        choices="Lists!$E$2:$E$20",
        note="For people to fill: the program's verdict stays beside it.",
    ),
    Column(heading="Reason", width=24, look="entry", note="Why the reviewer's verdict differs."),
    Column(heading="Reviewer", width=14, look="entry"),
    Column(heading="Reviewed on", width=12, look="entry-date"),
)
UNFILLED: tuple[None, ...] = (None,) * len(PEOPLE)


def summary(assessment: Assessment, questions: Iterable[Question]) -> Table:
    """One row a panel: outcome, counts, what decided it."""
    asked = [question.panel_number for question in questions]
    rows = [
        _summary_row(number, one, asked.count(number))
        for number, one in enumerate(assessment.panels, start=1)
    ]
    counts = ("Fits", "Doubtful", "Does not fit", "Checks not judged")
    required = ("Mandatory met", "Mandatory failed", "Mandatory open", "Desirable met", "Desirable not met")
    return Table(
        name="Summary",
        columns=(
            Column(heading="Panel", width=28),
            Column(heading="Outcome", width=13, status=tuple(Outcome), note="Worst of all that was found."),
            *(Column(heading=name, width=11, look="number0", note="Number of checks.") for name in counts),
            *(Column(heading=name, width=11, look="number0", note="Number of rows.") for name in required),
            Column(heading="Questions", width=11, look="number0"),
            Column(heading="Reasons", width=70, look="wrap"),
        ),
        rows=rows,
    )


_MET = (Compliance.MEETS, Compliance.MEETS_NARROWLY, Compliance.DEVIATION_ACCEPTED)
_MISSED = (Compliance.FAILS, Compliance.FAILS_NARROWLY)
_OPEN = (Compliance.DECLARED_ONLY, Compliance.NOT_STATED, Compliance.NOT_JUDGED)


def _summary_row(number: int, one: PanelAssessment, questions: int) -> list[Content]:
    counted = tally(one)
    return [
        Rich(value=one.panel.name or f"Panel {number}", look="text"),
        one.outcome.value,
        *(counted.findings[fit] for fit in (Fit.FITS, Fit.DOUBTFUL, Fit.DOES_NOT_FIT, Fit.NOT_JUDGED)),
        *(counted.of(Level.MANDATORY, *words) for words in (_MET, _MISSED, _OPEN)),
        counted.of(Level.DESIRABLE, *_MET),
        counted.of(Level.DESIRABLE, *_MISSED, *_OPEN),
        questions,
        "; ".join(one.reasons),
    ]


def findings(places: Places) -> Table:
    """One row a finding, with claim, expected interval, working and question."""
    bounds = ("Claimed", "Claimed to", "Expected from", "Expected to")
    return Table(
        name=FINDINGS,
        columns=(
            Column(heading="No.", width=7, look="number0", note="Number of the finding; keeps when sorted."),
            Column(heading="Panel", width=18),
            Column(heading="Band from (MHz)", width=10, look="number", note="Empty: the panel as a whole."),
            Column(heading="Band to (MHz)", width=10, look="number"),
            Column(heading="Verdict", width=13, status=tuple(Fit), note="Words of physics; see Lists."),
            Column(heading="Check", width=30),
            Column(heading="Summary", width=50, look="wrap"),
            *(
                Column(heading=name, width=11, look="number", note="In the unit beside it.")
                for name in bounds
            ),
            Column(heading="Unit", width=8),
            Column(heading="Cells", width=16, look="link", note="Leads to the first of the cells."),
            Column(heading="Question", width=40, look="wrap"),
            Column(heading="Claimed in words", width=16),
            Column(
                heading="Innocent readings", width=40, look="wrap", note="Conventions that would explain it."
            ),
            Column(heading="Working", width=50, look="wrap"),
            Column(heading="Assumptions", width=40, look="wrap"),
            Column(heading="Source", width=32, look="wrap"),
            *PEOPLE,
        ),
        rows=[_finding_row(one, places) for one in places.findings],
        frozen=2,
        printed=14,
    )


def _finding_row(one: NumberedFinding, places: Places) -> list[Content]:
    finding = one.finding
    claimed, expected = finding.claimed, finding.expected
    unit = (expected or claimed).unit if expected or claimed else ""  # type: ignore[union-attr]
    low, high, words = _spread(claimed.value if claimed else None)
    return [
        one.number,
        one.panel,
        *_band(finding.band),
        finding.verdict.value,
        finding.title,
        finding.summary,
        low,
        high,
        _number(expected.low if expected else None, unit),
        _number(expected.high if expected else None, unit),
        shown_unit(unit),
        _cells(finding.where, places),
        finding.question,
        words,
        "\n".join(map(_convention, finding.conventions)) or _none_tried(finding.verdict),
        "\n".join(map(_step, finding.working)),
        "\n".join(finding.assumptions),
        finding.source,
        *UNFILLED,
    ]


def requirements(assessment: Assessment, places: Places) -> Table:
    """One row a requirement, panel and band: limit, offer, margin, verdict."""
    return Table(
        name="Requirements",
        columns=(
            Column(heading="Clause", width=10),
            Column(heading="Panel", width=18),
            Column(heading="Level", width=12),
            Column(heading="Wording", width=44, look="wrap"),
            Column(heading="Parameter", width=26),
            Column(heading="Band from (MHz)", width=10, look="number", note="Empty: the panel as a whole."),
            Column(heading="Band to (MHz)", width=10, look="number"),
            Column(heading="Operator", width=10),
            Column(heading="Limit", width=10, look="number", note="In the unit beside it."),
            Column(heading="Limit to", width=10, look="number", note="Upper end of a range."),
            Column(heading="Limit in words", width=16),
            Column(heading="Unit", width=8),
            Column(heading="Offered", width=10, look="number", note="In the requirement's unit."),
            Column(heading="Offered to", width=10, look="number"),
            Column(heading="Margin", width=10, look="number", note="Positive is on the good side."),
            Column(heading="Verdict", width=18, status=tuple(Compliance), note="See Lists."),
            Column(heading="Offer's cell", width=14, look="link"),
            Column(heading="As written", width=20, note="The bidder's own text."),
            Column(heading="Verdict without deviation", width=16, status=tuple(Compliance)),
            Column(heading="Claim in doubt", width=26, note="Checks that the offered figure does not fit."),
            Column(heading="Note", width=40, look="wrap"),
            Column(heading="Reading confirmed", width=11, note="By the buyer, in the tender workbook."),
            Column(heading="Tender's cell", width=18),
            *PEOPLE,
        ),
        rows=[
            _requirement_row(one.panel.name, row, places)
            for one in assessment.panels
            for row in one.requirements
        ],
        frozen=2,
        printed=17,
    )


def _requirement_row(panel: str, row: MatrixRow, places: Places) -> list[Content]:
    asked = row.requirement
    limit = _spread(asked.limit)
    offered = _spread(row.offered_in_unit)
    answer = row.offered or row.statement
    return [
        asked.clause,
        panel,
        asked.level.value,
        asked.wording,
        label(asked.parameter) if asked.parameter else "",
        *_band(row.band),
        asked.operator,
        *limit,
        shown_unit(asked.unit),
        *offered[:2],
        _number(row.margin, asked.unit),
        row.verdict.value,
        _cells((answer.where,), places) if answer else "",
        answer.raw if answer else "",
        row.underlying.value if row.underlying else "",
        ", ".join(row.in_doubt),
        row.note,
        "yes" if asked.confirmed else "no",
        str(asked.where),
        *UNFILLED,
    ]


def question_list(questions: Iterable[Question], places: Places) -> Table:
    """One row a question, with room for the answer."""
    return Table(
        name="Questions",
        columns=(
            Column(heading="No.", width=7, look="number0"),
            Column(heading="Panel", width=18),
            Column(heading="Clause", width=10),
            Column(heading="Bands (MHz)", width=18),
            Column(heading="Cells", width=20, look="link"),
            Column(heading="What was found", width=50, look="wrap"),
            Column(heading="Question", width=56, look="wrap"),
            Column(heading="Owner", width=14, look="entry", note="Who sends it and follows it up."),
            Column(heading="Asked on", width=12, look="entry-date"),
            Column(heading="Answer", width=44, look="entry"),
            Column(heading="Answered on", width=12, look="entry-date"),
            Column(
                heading="Changes substance",
                width=12,
                look="entry",
                choices="Lists!$G$2:$G$3",
                note="yes where the answer changes a figure instead of explaining it.",
            ),
        ),
        rows=[
            [
                one.number,
                one.panel,
                ", ".join(one.clauses),
                ", ".join(f"{low:g}–{high:g}" for low, high in one.bands),
                _cells(one.where, places),
                one.problem,
                one.asked,
                *(None,) * 5,
            ]
            for one in questions
        ],
        frozen=2,
        printed=7,
    )


def _band(band: Band | None) -> tuple[float | None, float | None]:
    return band or (None, None)


def _number(value: float | None, unit: str) -> Content:
    """A real number that shows the digits its unit's data support."""
    if value is None:
        return None
    return Rich(value=value, look=f"number{min(decimals_for(value, unit), MOST_DECIMALS)}")


def _spread(value: Value | None) -> tuple[Content, Content, str]:
    """Number, upper end and words of a value: what it has not stays empty."""
    if isinstance(value, str):
        return None, None, value
    if isinstance(value, tuple):
        return Rich(value=value[0], look="number"), Rich(value=value[1], look="number"), ""
    return (Rich(value=value, look="number") if value is not None else None), None, ""


def _cells(where: Iterable[CellRef], places: Places) -> Content:
    cells = tuple(dict.fromkeys(where))
    text = ", ".join(map(str, cells))
    link = next(filter(None, map(places.mirror, cells)), "")
    return Rich(value=text, link=link, hint="to the cell as the bidder filled it") if link else text


def _convention(one: Convention) -> str:
    value = one.value if isinstance(one.value, str) else f"{one.value:g}"
    return f"{one.name}: {value} {shown_unit(one.unit)}".rstrip()


def _none_tried(verdict: Fit) -> str:
    return "none of those tried fits" if verdict in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL) else ""


def _step(step: Step) -> str:
    value = step.value if isinstance(step.value, str) else f"{step.value:.5g}"
    return f"{step.label}: {step.formula} = {value} {shown_unit(step.unit)}".rstrip()
