"""LibreOffice, an independent spreadsheet, recomputes the live formulas to the stored results."""

import io
import re
import shutil
import subprocess
import zipfile

import openpyxl
import pytest

from speccheck.report.review import review_bytes

SOFFICE = shutil.which("soffice")

pytestmark = pytest.mark.skipif(SOFFICE is None, reason="LibreOffice is not installed")


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


def figures(book):
    return {row[0]: row[5] for row in book["Recomputed"].iter_rows(min_row=2, values_only=True)}


def test_libreoffice_agrees_with_every_stored_result(bid, tmp_path):
    data = review_bytes(bid)
    stored = figures(openpyxl.load_workbook(io.BytesIO(data), data_only=True))
    assert len(stored) >= 40
    again = figures(recalculated(without_results(data), tmp_path))
    assert again == {line: pytest.approx(value, rel=1e-9) for line, value in stored.items()}


def test_libreoffice_keeps_hostile_text_as_text(bid, tmp_path):
    book = recalculated(review_bytes(bid), tmp_path)
    assert book["Input 1"]["D1"].value == "=cmd|'/c calc'!A0"
    assert book["Input 1"]["D1"].data_type == "s"
    assert book["Input 1"]["D13"].value == -153
