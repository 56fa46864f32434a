"""The review workbook: where evaluators sort, filter, annotate and redo the arithmetic.

It is built new from the assessment; the bidder's own file is never opened or saved here.
"""

from __future__ import annotations

from pathlib import Path

from speccheck.atomic import write_bytes_atomic
from speccheck.records import Assessment
from speccheck.report.pages.questions import collect_questions
from speccheck.report.pages.view import label
from speccheck.report.workbooks.book import book_bytes
from speccheck.report.workbooks.review_front import lists, read_me, rules_used
from speccheck.report.workbooks.review_inputs import inputs_as_read, mirror_grids
from speccheck.report.workbooks.review_places import place_everything
from speccheck.report.workbooks.review_recomputed import recomputed
from speccheck.report.workbooks.review_summary import question_list, summary
from speccheck.report.workbooks.review_tables import findings, requirements
from speccheck.report.workbooks.sheets import Grid, Imprint, Table, moment_of


def write_review(assessment: Assessment, path: Path | str) -> None:
    """Write the review workbook to `path`.

    Raises
    ------
    OutputError : `path` cannot be written
    """
    write_bytes_atomic(path, review_bytes(assessment))


def review_bytes(assessment: Assessment) -> bytes:
    """Return the review workbook as an .xlsx file; the same assessment gives the same bytes."""
    places = place_everything(assessment)
    questions = collect_questions(assessment, label)
    judged = (findings(places), requirements(assessment, places))
    sheets: list[Table | Grid] = [
        read_me(assessment, places),
        summary(assessment, questions, judged),
        *judged,
        question_list(questions, places),
        inputs_as_read(assessment.submission, places),
        *mirror_grids(assessment, places),
        recomputed(assessment, places),
        rules_used(assessment),
        lists(),
    ]
    return book_bytes(sheets, imprint(assessment, "Review workbook"))


def imprint(assessment: Assessment, title: str) -> Imprint:
    """What a workbook about one bid says of itself; its date is the assessment's, not the clock's."""
    rules = assessment.settings
    revision = f", revision {rules.revision}" if rules.revision else ""
    number = f"{rules.report_number}, " if rules.report_number else ""
    status = "" if rules.issued else "DRAFT, "
    return Imprint(
        title=f"{title}: {assessment.submission.file}",
        subject=f"speccheck {assessment.program_version}",
        footer=f"{status}{number}{assessment.submission.file}{revision}",
        paper=rules.paper,
        moment=moment_of(rules.today),
    )
