"""The sheets people start and end with: Summary and Questions."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from speccheck.records import Assessment, Fit, Level, Outcome, PanelAssessment
from speccheck.records.words import FAILED, OPEN, PASSED
from speccheck.report.pages.questions import Question
from speccheck.report.pages.summary import tally
from speccheck.report.workbooks.cells import Content, Rich, column_letter
from speccheck.report.workbooks.review_parts import PEOPLE, linked_cells
from speccheck.report.workbooks.review_places import Places
from speccheck.report.workbooks.sheets import Column, Table


def summary(assessment: Assessment, questions: Iterable[Question], judged: Sequence[Table]) -> Table:
    """One row a panel: outcome, counts, what decided it; `judged` are the sheets that people review."""
    asked = [question.panel_number for question in questions]
    rows = [
        _summary_row(number, one, asked.count(number), _overrides(number + 1, judged))
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
            *(Column(heading=name, width=13, look="number0", note="Number of rows.") for name in required),
            Column(heading="Questions", width=11, look="number0"),
            Column(
                heading="Reviewed",
                width=11,
                look="number0",
                note="Rows with a reviewer's verdict; counts live.",
            ),
            Column(heading="Reasons", width=70, look="wrap"),
        ),
        rows=rows,
    )


def _summary_row(number: int, one: PanelAssessment, questions: int, reviewed: Rich) -> list[Content]:
    counted = tally(one)
    return [
        Rich(value=one.panel.name or f"Panel {number}", look="text"),
        one.outcome.value,
        *(counted.findings[fit] for fit in (Fit.FITS, Fit.DOUBTFUL, Fit.DOES_NOT_FIT, Fit.NOT_JUDGED)),
        *(counted.of(Level.MANDATORY, *words) for words in (PASSED, FAILED, OPEN)),
        counted.of(Level.DESIRABLE, *PASSED),
        counted.of(Level.DESIRABLE, *FAILED, *OPEN),
        questions,
        reviewed,
        "; ".join(one.reasons),
    ]


def _overrides(row: int, judged: Sequence[Table]) -> Rich:
    """A live count of the rows of the panel named in column A that carry a reviewer's verdict."""
    counts = []
    for table in judged:
        headings = [column.heading for column in table.columns]
        last = len(table.rows) + 1
        panel, verdict = (
            f"'{table.name}'!${letter}$2:${letter}${max(last, 2)}"
            for letter in (column_letter(1 + headings.index(name)) for name in ("Panel", PEOPLE[0].heading))
        )
        counts.append(f'SUMPRODUCT(({panel}=$A{row})*({verdict}<>""))')
    return Rich(value=0, formula="+".join(counts))


def question_list(questions: Iterable[Question], places: Places) -> Table:
    """One row a question, with room for the answer."""
    return Table(
        name="Questions",
        columns=(
            Column(heading="No.", width=7, look="number0"),
            Column(heading="Panel", width=18),
            Column(heading="Clause", width=10),
            Column(heading="Bands (MHz)", width=18),
            Column(heading="Cells", width=34, look="link"),
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
                linked_cells(one.where, places),
                one.problem,
                one.asked,
                *(None,) * 5,
            ]
            for one in questions
        ],
        frozen=2,
        printed=7,
    )
