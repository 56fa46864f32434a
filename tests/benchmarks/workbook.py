"""How long the review workbook and the JSON take: python tests/benchmarks/workbook.py [BID.xlsx …]

Prints, for each bid, both times beside openpyxl's load of the same bid and beside openpyxl writing the same
cells without any format, all measured in the same run. Without arguments it takes the samples and a
bid made here of 5 panels and 2 bands.
"""

from __future__ import annotations

import io
import statistics
import sys
import tempfile
import time
from pathlib import Path

import openpyxl

from speccheck.pipeline import assess
from speccheck.report.machine import to_json
from speccheck.report.workbooks.form import form_bytes
from speccheck.report.workbooks.review import review_bytes

SAMPLES = Path(__file__).parents[2] / "sample_specs"
REPEATS = 15


def timed(work):
    """Median time of one call [s]."""
    spent = []
    for _ in range(REPEATS):
        start = time.perf_counter()
        work()
        spent.append(time.perf_counter() - start)
    return statistics.median(spent)


def written_plainly(data):
    """What openpyxl needs to write the values of a workbook, no look, link or note."""
    source = openpyxl.load_workbook(io.BytesIO(data), data_only=True)
    values = {sheet.title: list(sheet.values) for sheet in source}

    def work():
        book = openpyxl.Workbook(write_only=True)
        for title, rows in values.items():
            sheet = book.create_sheet(title)
            for row in rows:
                sheet.append(row)
        book.save(io.BytesIO())

    return work


def filled_form(folder):
    """A bid of 5 panels and 2 bands on the program's own form."""
    book = openpyxl.load_workbook(io.BytesIO(form_bytes()))
    sheet = book["Bid"]
    example = [cell.value for cell in sheet[2]]
    for panel in range(5):
        for band, text in enumerate(("1710-2170", "3300-3800")):
            for column, value in enumerate([f"Panel {panel + 1}", text, *example[2:]], start=1):
                sheet.cell(3 + 2 * panel + band, column).value = value
    path = Path(folder) / "five-panels.xlsx"
    book.save(path)
    return path


def report(path):
    """One line of the table."""
    assessment = assess(path)
    load = timed(lambda: openpyxl.load_workbook(path))
    book, text = timed(lambda: review_bytes(assessment)), timed(lambda: to_json(assessment))
    plain = timed(written_plainly(review_bytes(assessment)))
    print(
        f"{path.name:32} load {1e3 * load:6.1f} ms  workbook {1e3 * book:6.1f} ms = {book / load:4.1f} × load"
        f" = {book / plain:4.2f} × plain writing  JSON {1e3 * text:6.1f} ms = {text / load:4.1f} × load"
    )


if __name__ == "__main__":
    with tempfile.TemporaryDirectory() as folder:
        bids = [Path(name) for name in sys.argv[1:]] or [
            *sorted(SAMPLES.glob("*-*.xlsx")),
            filled_form(folder),
        ]
        for bid in bids:
            report(bid)
