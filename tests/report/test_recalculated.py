"""LibreOffice, an independent spreadsheet, recomputes the live formulas to the stored results."""

import io
import re
import shutil
import subprocess
import zipfile
from pathlib import Path

import openpyxl
import pytest

from speccheck.pipeline import assess
from speccheck.report.workbooks.review import review_bytes

SOFFICE = shutil.which("soffice")

SAMPLES = sorted(Path(__file__).parents[2].joinpath("sample_specs").glob("*-*.xlsx"))

needs_soffice = pytest.mark.skipif(SOFFICE is None, reason="LibreOffice is not installed")


def without_results(data):
    """The workbook with every stored formula result taken out, so that none can be kept."""
    stripped = io.BytesIO()
    with zipfile.ZipFile(io.BytesIO(data)) as old, zipfile.ZipFile(stripped, "w") as new:
        for name in old.namelist():
            text = old.read(name)
            if name.startswith("xl/worksheets/sheet"):
                text = re.sub(rb"</f><v>[^<]*</v>", b"</f>", text)
            new.writestr(name, text)
    return stripped.getvalue()


def recalculated(data, folder):
    source = folder / "review.xlsx"
    source.write_bytes(data)
    subprocess.run(
        [
            SOFFICE,
            f"-env:UserInstallation=file://{folder}/profile",
            "--headless",
            "--convert-to",
            "xlsx",
            "--outdir",
            folder / "out",
            source,
        ],
        check=True,
        capture_output=True,
        timeout=120,
    )
    return openpyxl.load_workbook(folder / "out" / "review.xlsx", data_only=True)


def reviewed(book):
    return [row[-2] for row in book["Summary"].iter_rows(min_row=2, values_only=True)]


def figures(book):
    return {row[0]: row[5] for row in book["Recomputed"].iter_rows(min_row=2, values_only=True)}


@needs_soffice
def test_libreoffice_agrees_with_every_stored_result(bid, tmp_path):
    data = review_bytes(bid)
    stored = figures(openpyxl.load_workbook(io.BytesIO(data), data_only=True))
    assert len(stored) >= 40
    again = figures(recalculated(without_results(data), tmp_path))
    assert again == {line: pytest.approx(value, rel=1e-9) for line, value in stored.items()}


@needs_soffice
def test_libreoffice_keeps_hostile_text_as_text(bid, tmp_path):
    book = recalculated(review_bytes(bid), tmp_path)
    assert book["Input 1"]["D1"].value == "=cmd|'/c calc'!A0"
    assert book["Input 1"]["D1"].data_type == "s"
    assert book["Input 1"]["D13"].value == -153


@needs_soffice
def test_libreoffice_agrees_on_a_sample_bid(tmp_path):
    data = review_bytes(assess(SAMPLES[0]))
    stored = figures(openpyxl.load_workbook(io.BytesIO(data), data_only=True))
    again = figures(recalculated(without_results(data), tmp_path))
    assert again == {line: pytest.approx(value, rel=1e-9) for line, value in stored.items()}


@pytest.mark.parametrize("sample", SAMPLES, ids=lambda path: path.stem)
def test_recomputed_distances_are_those_of_the_exposure_note(sample):
    assessment = assess(sample)
    sheet = openpyxl.load_workbook(io.BytesIO(review_bytes(assessment)), data_only=True)["Recomputed"]
    found = [row[5] for row in sheet.iter_rows(values_only=True) if row[4].startswith("The same, rounded up")]
    notes = [one.exposure for one in assessment.panels if one.exposure and one.exposure.complete]
    assert found == [row.distance_m for note in notes for row in note.rows if row.band is not None]


@needs_soffice
def test_summary_counts_the_verdicts_of_reviewers(bid, tmp_path):
    book = openpyxl.load_workbook(io.BytesIO(review_bytes(bid)))
    assert reviewed(openpyxl.load_workbook(io.BytesIO(review_bytes(bid)), data_only=True)) == [0]
    for sheet, row in (("Findings", 2), ("Findings", 3), ("Requirements", 3)):
        headings = [cell.value for cell in book[sheet][1]]
        book[sheet].cell(row, 1 + headings.index("Reviewer's verdict")).value = "fits"
    saved = io.BytesIO()
    book.save(saved)
    assert reviewed(recalculated(saved.getvalue(), tmp_path)) == [3]
