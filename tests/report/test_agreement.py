"""The outputs of one bid agree with each other: workbook, JSON and page, on every sample."""

import html.parser
import io
import json
import re
import shutil
import subprocess
from collections import Counter
from pathlib import Path

import openpyxl
import pytest

from speccheck.intake.tenders.tender_book import read_tender
from speccheck.pipeline import assess
from speccheck.records import Fit
from speccheck.report.machine import to_json
from speccheck.report.pages.html import render_html
from speccheck.report.pages.marks import FITS
from speccheck.report.pages.pdf import pdf_bytes
from speccheck.report.pages.view import label
from speccheck.report.workbooks.review import review_bytes

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
    book, document, typeset = outputs
    page = typeset.replace("−", "-")  # the page sets minus signs, a cell keeps the sign of a keyboard
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
            if finding["verdict"] != "fits" and finding["question"] not in asked:
                # a missing figure is asked for once, for all bands and in the words of a requirement
                wanted = [label(key).lower() for key in finding["missing"]]
                assert wanted, finding["check"]
                assert any(all(name in text.lower() for name in wanted) for text in asked), finding["check"]
    said = zip(
        column(book, "Findings", "Verdict"), column(book, "Findings", "Innocent readings"), strict=True
    )
    assert all(text for verdict, text in said if verdict in ("does not fit", "doubtful"))


RUNNING = re.compile(r"^(DRAFT – not issued|Report not numbered.*|Page \d+ of \d+|\S+\.xlsx)$", re.MULTILINE)


@pytest.mark.skipif(not shutil.which("pdftotext"), reason="poppler-utils is not installed")
@pytest.mark.parametrize("sample", SAMPLES, ids=lambda path: path.stem)
def test_the_pdf_says_what_the_other_outputs_say(sample, tmp_path):
    assessment = assess(sample, tender=read_tender(FOLDER / "tender.xlsx"))
    page = render_html(assessment)
    (tmp_path / "report.pdf").write_bytes(pdf_bytes(page))
    text = subprocess.run(
        ["pdftotext", tmp_path / "report.pdf", "-"], capture_output=True, text=True, check=True
    ).stdout
    printed, shown = squeezed(RUNNING.sub("", text)), squeezed(Words(page).text)
    document = json.loads(to_json(assessment))
    for panel in document["panels"]:
        findings, rows = panel["findings"], panel["requirements"]
        said = [finding["summary"] for finding in findings if finding["verdict"] != "fits"]
        said += [without_verdict(reason) for reason in panel["reasons"]]
        said += [f"{row['clause']}" for row in rows]
        distances = [row["distance_m"] for row in panel["exposure"]["rows"]]
        said += [f"{distance:.1f} m" for distance in distances]
        for words in map(squeezed, said):
            assert words in shown
            assert words in printed
        verdicts = Counter(finding["verdict"] for finding in findings)
        for word in ("does not fit", "doubtful"):
            symbol = FITS[Fit(word)].symbol
            assert text.count(symbol) >= verdicts[word]


def without_verdict(reason):
    """What a reason says; verdict and band of a misfit stand beside it as a mark and a heading."""
    return re.sub(r"^(?:does not fit|doubtful)[^:]*: ", "", reason)


def squeezed(text):
    """Text without its spaces and line ends, with one kind of dash."""
    return re.sub(r"[−–]", "-", re.sub(r"\s", "", text))
