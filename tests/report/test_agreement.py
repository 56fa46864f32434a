"""The outputs of one bid agree with each other: workbook, JSON and page, on every sample."""

import html.parser
import io
import json
from pathlib import Path

import openpyxl
import pytest

from speccheck.intake.tender_book import read_tender
from speccheck.pipeline import assess
from speccheck.report.html import render_html
from speccheck.report.machine import to_json
from speccheck.report.review import review_bytes

FOLDER = Path(__file__).parents[2] / "sample_specs"
SAMPLES = sorted(FOLDER.glob("*-*.xlsx"))


class Words(html.parser.HTMLParser):
    """The text of a page, white space folded."""

    def __init__(self, page):
        super().__init__()
        self.parts = []
        self.feed(page)

    def handle_data(self, data):
        self.parts.append(data)

    @property
    def text(self):
        return " ".join(" ".join(self.parts).split())


@pytest.fixture(scope="module", params=SAMPLES, ids=lambda path: path.stem)
def outputs(request):
    assessment = assess(request.param, tender=read_tender(FOLDER / "tender.xlsx"))
    book = openpyxl.load_workbook(io.BytesIO(review_bytes(assessment)), data_only=True)
    return book, json.loads(to_json(assessment)), Words(render_html(assessment)).text


def column(book, sheet, heading):
    first, *rows = book[sheet].iter_rows(values_only=True)
    return [row[first.index(heading)] for row in rows]


def test_findings_in_workbook_and_json(outputs):
    book, document, _ = outputs
    findings = [finding for panel in document["panels"] for finding in panel["findings"]]
    assert column(book, "Findings", "Verdict") == [finding["verdict"] for finding in findings]
    assert column(book, "Findings", "Check") == [finding["title"] for finding in findings]
    lows = [finding["expected"] and finding["expected"]["low"] for finding in findings]
    assert column(book, "Findings", "Expected from") == lows


def test_requirements_in_workbook_and_json(outputs):
    book, document, _ = outputs
    rows = [row for panel in document["panels"] for row in panel["requirements"]]
    assert column(book, "Requirements", "Verdict") == [row["verdict"] for row in rows]
    assert column(book, "Requirements", "Margin") == [row["margin"] for row in rows]
    assert column(book, "Requirements", "Clause") == [row["clause"] for row in rows]


def test_outcomes_and_counts_of_the_summary(outputs):
    book, document, _ = outputs
    for number, panel in enumerate(document["panels"]):
        verdicts = [finding["verdict"] for finding in panel["findings"]]
        assert column(book, "Summary", "Outcome")[number] == panel["outcome"]
        headings = {"Fits": "fits", "Doubtful": "doubtful", "Does not fit": "does not fit"}
        for heading, verdict in {**headings, "Checks not judged": "not judged"}.items():
            assert column(book, "Summary", heading)[number] == verdicts.count(verdict)


def test_every_question_and_misfit_is_on_the_page_too(outputs):
    book, document, page = outputs
    for question in column(book, "Questions", "Question"):
        assert " ".join(question.split()) in page
    misfits = [f for p in document["panels"] for f in p["findings"] if f["verdict"] == "does not fit"]
    for finding in misfits:
        assert finding["title"] in page


def test_every_open_check_has_a_question_and_every_doubt_its_innocent_readings(outputs):
    book, document, _ = outputs
    asked = set(column(book, "Questions", "Question"))
    for panel in document["panels"]:
        for finding in panel["findings"]:
            if finding["verdict"] != "fits":
                assert finding["question"] in asked, finding["check"]
    said = zip(
        column(book, "Findings", "Verdict"), column(book, "Findings", "Innocent readings"), strict=True
    )
    assert all(text for verdict, text in said if verdict in ("does not fit", "doubtful"))
