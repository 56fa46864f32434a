"""How a bid was read, as a workbook and as JSON."""

import io
import json

import openpyxl

from speccheck.report.workbooks.readbook import read_book_bytes, read_json, write_read_book


def test_every_cell_that_was_read_is_listed_and_linked(bid, tmp_path):
    path = tmp_path / "read.xlsx"
    write_read_book(bid.submission, path)
    book = openpyxl.load_workbook(path)
    assert book.sheetnames == ["Read me", "Inputs as read", "Input 1", "Input 2"]
    listed = {row[0] for row in book["Inputs as read"].iter_rows(min_row=2, values_only=True)}
    panel = bid.submission.panels[0]
    said = (*panel.readings, *panel.statements, *bid.submission.unread, *bid.submission.notices)
    assert listed == {str(one.where) for one in said}
    assert book["Input 1"]["D3"].hyperlink.location == "'Inputs as read'!A5"


def test_nothing_is_judged(bid):
    book = openpyxl.load_workbook(io.BytesIO(read_book_bytes(bid.submission)))
    words = {cell.value for sheet in book for row in sheet.iter_rows() for cell in row}
    assert not words & {"does not fit", "meets", "clarify"}


def test_json_holds_readings_statements_and_the_rest(bid):
    document = json.loads(read_json(bid.submission))
    assert document["schema"] == "speccheck-reading/1"
    (panel,) = document["panels"]
    assert len(panel["readings"]) == len(bid.submission.panels[0].readings)
    assert panel["statements"][0]["status"] == "to be advised"
    assert document["unread"][0]["suggestion"] == "null fill"
    assert read_json(bid.submission) == read_json(bid.submission)
