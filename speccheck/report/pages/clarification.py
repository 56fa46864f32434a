"""The clarification list to send to one bidder, and its answers; nothing of another bid in either."""

from __future__ import annotations

from collections.abc import Sequence
from pathlib import Path

from speccheck.atomic import write_bytes_atomic, write_text_atomic
from speccheck.records import Assessment
from speccheck.records.answers import AnswerKind, TakenAnswer
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.html import render
from speccheck.report.pages.questions import Question, collect_questions
from speccheck.report.pages.view import label
from speccheck.report.workbooks.book import book_bytes
from speccheck.report.workbooks.cells import Content, Rich
from speccheck.report.workbooks.review import imprint
from speccheck.report.workbooks.sheets import Column, Table

_KINDS = {
    AnswerKind.EXPLANATION: "near",
    AnswerKind.CONFIRMED: "good",
    AnswerKind.ADDED: "near",
    AnswerKind.CHANGED: "bad",
    AnswerKind.NOT_READ: "open",
}


def write_clarification(
    assessment: Assessment, out: Path, stem: str, formats: Sequence[str]
) -> tuple[Path, ...]:
    """Write ``<stem>.questions.html`` and ``.xlsx`` as far as asked for; nothing where nothing is asked.

    Raises
    ------
    OutputError : a file cannot be written
    """
    if not questions_of(assessment):
        return ()
    written: list[Path] = []
    if "html" in formats:
        written.append(out / f"{stem}.questions.html")
        write_text_atomic(written[-1], render_clarification(assessment))
    if "xlsx" in formats:
        written.append(out / f"{stem}.questions.xlsx")
        write_bytes_atomic(written[-1], clarification_bytes(assessment))
    return tuple(written)


def write_answers(
    assessment: Assessment, taken: Sequence[TakenAnswer], out: Path, stem: str
) -> tuple[Path, ...]:
    """Write ``<stem>.answers.html`` and ``.xlsx``: the answers beside the first figures.

    Raises
    ------
    OutputError : a file cannot be written
    """
    page, book = out / f"{stem}.answers.html", out / f"{stem}.answers.xlsx"
    write_text_atomic(page, render_clarification(assessment, taken))
    write_bytes_atomic(book, answers_bytes(assessment, taken))
    return page, book


def questions_of(assessment: Assessment) -> tuple[Question, ...]:
    """Questions of one bid, numbered as in its report."""
    return collect_questions(assessment, label)


def clarification_bytes(assessment: Assessment) -> bytes:
    """The clarification list as a workbook for the bidder to fill in and send back."""
    return book_bytes(
        [_read_me(assessment), _questions(assessment)], imprint(assessment, "Clarification questions")
    )


def render_clarification(assessment: Assessment, taken: Sequence[TakenAnswer] = ()) -> str:
    """The clarification list as a page to send, or with the answers that came back."""
    numbers = Numbers(assessment.settings.decimal_comma, assessment.settings.date_order)
    questions = questions_of(assessment)
    return render(
        "clarification.html",
        assessment.settings.paper,
        numbers,
        assessment=assessment,
        questions=questions,
        stated={question.number: _stated(assessment, question) for question in questions},
        taken=taken,
        tones=_KINDS,
        changed=sum(one.kind is AnswerKind.CHANGED for one in taken),
    )


def answers_bytes(assessment: Assessment, taken: Sequence[TakenAnswer]) -> bytes:
    """The answers beside the first figures as a workbook."""
    return book_bytes([_answers(assessment, taken)], imprint(assessment, "Answers taken in"))


def _read_me(assessment: Assessment) -> Table:
    rows: list[tuple[Content, Content]] = [
        ("Your file", assessment.submission.file),
        ("Its SHA-256", assessment.submission.sha256),
        ("Tender", assessment.settings.tender or "none named"),
        ("How to answer", "Fill in the column Answer of the sheet Questions and send this file back."),
        (
            "Figures",
            "Give a figure with its unit in the column Figure only where one was missing or asked for.",
        ),
        (
            "What an answer may do",
            "An answer may explain a figure. A changed figure is a change of the offer.",
        ),
    ]
    columns = (Column(heading="Topic", width=26, look="bold"), Column(heading="Text", width=110, look="wrap"))
    return Table(name="Read me", columns=columns, rows=rows)


def _stated(assessment: Assessment, question: Question) -> tuple[str, ...]:
    """What stood in the cells asked about: parameter and text, each once."""
    panel = assessment.panels[question.panel_number - 1].panel
    said = [(r.where, r.parameter, r.raw) for r in panel.readings]
    said += [(s.where, s.parameter, s.raw) for s in panel.statements]
    asked = [
        f"{label(parameter)} ({where}): {raw.strip()}"
        for cell in question.where
        for where, parameter, raw in said
        if where == cell
    ]
    return tuple(dict.fromkeys(asked))


def _questions(assessment: Assessment) -> Table:
    numbers = Numbers(assessment.settings.decimal_comma, assessment.settings.date_order)
    rows = []
    for question in questions_of(assessment):
        cells = [str(where) for where in question.where]
        rows.append(
            (
                question.number,
                question.panel,
                ", ".join(question.clauses),
                ", ".join(numbers.band(band) for band in question.bands),
                ", ".join(cells),
                "; ".join(_stated(assessment, question)),
                question.problem,
                question.asked,
                None,
                None,
                cells[0] if cells else None,
                None,
            )
        )
    return Table(
        name="Questions",
        columns=(
            Column(heading="No", width=6, look="number0"),
            Column(heading="Panel", width=24),
            Column(heading="Clause", width=10),
            Column(heading="Band", width=16),
            Column(heading="Cells", width=22, look="wrap"),
            Column(heading="What was read", width=34, look="wrap"),
            Column(heading="What does not fit", width=50, look="wrap"),
            Column(heading="What is asked", width=50, look="wrap"),
            Column(heading="Answer", width=50, look="entry-text"),
            Column(
                heading="Figure",
                width=18,
                look="entry-text",
                note="With its unit; only if missing or asked for.",
            ),
            Column(
                heading="Cell of the figure",
                width=20,
                look="entry-text",
                note="The cell your figure stands for.",
            ),
            Column(heading="Answered on", width=13, look="entry-date"),
        ),
        rows=rows,
        frozen=2,
    )


def _answers(assessment: Assessment, taken: Sequence[TakenAnswer]) -> Table:
    numbers = Numbers(assessment.settings.decimal_comma, assessment.settings.date_order)
    rows = [
        (
            one.answer.number,
            one.answer.panel,
            one.answer.clause,
            one.answer.asked,
            one.answer.text,
            one.first.raw if one.first else "not stated",
            str(one.first.where) if one.first else "",
            one.answer.figure,
            numbers.stated(one.answered.value, one.answered.unit) if one.answered else "",
            Rich(value=one.kind.value, look=_KINDS[one.kind]),
            "; ".join(
                f"{e.clause} {label(e.parameter)}: {e.before.value} to {e.after.value}" for e in one.effects
            ),
        )
        for one in taken
    ]
    return Table(
        name="Answers",
        columns=(
            Column(heading="No", width=6),
            Column(heading="Panel", width=24),
            Column(heading="Clause", width=10),
            Column(heading="What was asked", width=50, look="wrap"),
            Column(heading="Answer", width=50, look="wrap"),
            Column(heading="First stated", width=18),
            Column(heading="Cell", width=16),
            Column(heading="Figure answered", width=18),
            Column(heading="As read", width=18),
            Column(heading="Kind", width=20),
            Column(heading="Verdicts it would change", width=50, look="wrap"),
        ),
        rows=rows,
        frozen=2,
    )
