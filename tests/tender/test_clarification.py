"""The clarification list goes out, comes back filled in, and is taken in beside the first figures."""

from __future__ import annotations

from pathlib import Path

import pytest
from batch.evaluation import BIDS, write_evaluation
from openpyxl import load_workbook

from speccheck import pipeline
from speccheck.errors import UnusableInputError
from speccheck.intake.tenders.answers import read_answers
from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records import Assessment, Compliance
from speccheck.records.answers import AnswerKind, TakenAnswer
from speccheck.report.pages.clarification import render_clarification, write_answers, write_clarification
from speccheck.tender.answers import take_in


@pytest.fixture
def hazel(tmp_path: Path) -> Assessment:
    tender, bids = write_evaluation(tmp_path)
    return pipeline.assess(bids / "hazel.xlsx", tender=read_tender(tender))


def _sent(hazel: Assessment, folder: Path) -> Path:
    page, book = write_clarification(hazel, folder, "hazel", ("html", "xlsx"))
    assert page.name == "hazel.questions.html"
    return book


def _rows(path: Path) -> list[dict[str, object]]:
    first, *others = load_workbook(path)["Questions"].iter_rows(values_only=True)
    return [dict(zip(map(str, first), row, strict=True)) for row in others]


def test_every_open_row_is_asked_about_once_with_clause_and_cell(hazel: Assessment, tmp_path: Path) -> None:
    rows = _rows(_sent(hazel, tmp_path))
    assert [row["No"] for row in rows] == list(range(1, len(rows) + 1))
    open_ = {
        (one.panel.name, row.requirement.clause)
        for one in hazel.panels
        for row in one.requirements
        if row.verdict in (Compliance.NOT_JUDGED, Compliance.NOT_STATED, Compliance.DECLARED_ONLY)
    }
    asked = {(row["Panel"], clause) for row in rows for clause in str(row["Clause"] or "").split(", ")}
    assert open_ <= asked
    assert any(row["Cells"] == "Offer!D2" and "65" in str(row["What was read"]) for row in rows)


def test_nothing_of_another_bid_is_in_the_list(hazel: Assessment, tmp_path: Path) -> None:
    text = render_clarification(hazel) + str(_rows(_sent(hazel, tmp_path)))
    others = [str(panel[0]) for name, panels in BIDS.items() if name != "hazel" for panel in panels]
    assert not [name for name in others if name in text]


def _answered(hazel: Assessment, folder: Path, replies: dict[str, tuple[str, str]]) -> dict[str, TakenAnswer]:
    """Fill in the list by clause and panel, read it back and take it in."""
    path = _sent(hazel, folder)
    book = load_workbook(path)
    sheet = book["Questions"]
    heads = {str(cell.value): cell.column for cell in sheet[1]}
    for row in sheet.iter_rows(min_row=2):
        values = {name: row[column - 1] for name, column in heads.items()}
        for key, (text, figure) in replies.items():
            panel, clause = key.split("/")
            if values["Panel"].value == panel and clause in str(values["Clause"].value or "").split(", "):
                values["Answer"].value, values["Figure"].value = text, figure
    back = folder / "answered.xlsx"
    book.save(back)
    return {f"{t.answer.panel}/{t.answer.clause}": t for t in take_in(hazel, read_answers(back))}


def test_answers_stand_beside_the_first_figure(hazel: Assessment, tmp_path: Path) -> None:
    """A tolerance added to a bare 65° and a missing level are new figures; the offer stays as opened."""
    before = hazel.panels
    taken = _answered(
        hazel,
        tmp_path,
        {
            "Hazel 4/E3": ("measured over the band", "65 ± 5"),
            "Hazel 4/E7": ("", "-155 dBc"),
            "Hazel 2/E2": ("see below", ""),
        },
    )
    width = taken["Hazel 4/E3"]
    assert (width.kind, width.first and width.first.raw) == (AnswerKind.CHANGED, "65")
    assert [(e.before, e.after) for e in width.effects] == [(Compliance.MEETS_NARROWLY, Compliance.MEETS)]
    level = taken["Hazel 4/E7"]
    assert (level.kind, level.answered and level.answered.value) == (AnswerKind.ADDED, -155.0)
    assert [(e.before, e.after) for e in level.effects] == [(Compliance.NOT_STATED, Compliance.MEETS)]
    words = next(t for key, t in taken.items() if key.startswith("Hazel 2/E2"))
    assert words.kind is AnswerKind.EXPLANATION
    assert hazel.panels is before


@pytest.mark.parametrize(
    ("figure", "kind"),
    [("65", AnswerKind.CONFIRMED), ("70", AnswerKind.CHANGED), ("wide enough", AnswerKind.NOT_READ)],
)
def test_only_another_figure_is_a_change_of_substance(
    hazel: Assessment, tmp_path: Path, figure: str, kind: AnswerKind
) -> None:
    assert _answered(hazel, tmp_path, {"Hazel 4/E3": ("as before", figure)})["Hazel 4/E3"].kind is kind


def test_page_and_workbook_of_answers_name_the_change(hazel: Assessment, tmp_path: Path) -> None:
    taken = tuple(_answered(hazel, tmp_path, {"Hazel 4/E3": ("corrected", "70 ± 3")}).values())
    page, book = write_answers(hazel, taken, tmp_path, "hazel")
    assert "change of substance" in page.read_text(encoding="utf-8")
    kinds = [row[9] for row in load_workbook(book)["Answers"].iter_rows(min_row=2, values_only=True)]
    assert kinds == ["change of substance"]


def test_a_file_that_is_no_clarification_list_is_refused(tmp_path: Path) -> None:
    tender, _ = write_evaluation(tmp_path)
    with pytest.raises(UnusableInputError, match="no sheet 'Questions'"):
        read_answers(tender)
