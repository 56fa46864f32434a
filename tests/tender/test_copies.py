"""A copy for one bidder holds no trace of another, in any output."""

import io
import zipfile

import pytest

from speccheck.errors import UnusableInputError
from speccheck.records import (
    Assessment,
    CellRef,
    Deviation,
    Finding,
    Fit,
    Outcome,
    Panel,
    PanelAssessment,
    Reading,
    Settings,
    Submission,
    Tender,
    Unread,
)
from speccheck.report.machine import to_json
from speccheck.report.pages.html import render_html
from speccheck.report.workbooks.review import review_bytes
from speccheck.tender.copies import copy_for

HERE = CellRef("tender.xlsx", "Deviations", "B2")


def granted(offer):
    return Deviation(
        where=HERE, clause="3.1", offer=offer, reason="lighter mast", approver="Board", expires=""
    )


def expired(offer):
    return Finding(
        check="deviation-expired", title="", verdict=Fit.DOUBTFUL, summary=f"{offer} expired", where=(HERE,)
    )


TENDER = Tender(
    file="tender.xlsx",
    sha256="",
    deviations=(granted("Maker-One"), granted("Quillon-Two")),
    unread=(Unread(where=HERE, text="see mail of Quillon-Two", reason="no date"),),
    findings=(expired("Quillon-Two"),),
)


def bid(stem, maker):
    where = CellRef(f"{stem}.xlsx", "Bid", "B1")
    said = Reading(where=where, parameter="manufacturer", raw=maker, value=maker, unit="")
    panel = Panel(name=f"Panel of {maker}", where=where, readings=(said,))
    submission = Submission(file=f"{stem}.xlsx", sha256=stem, size_bytes=1, panels=(panel,))
    judged = PanelAssessment(panel=panel, outcome=Outcome.CLARIFY)
    return Assessment(submission=submission, settings=Settings(), panels=(judged,), tender=TENDER)


OFFERS = (bid("first", "Maker-One"), bid("vexbury", "Quillon-Two"))


@pytest.mark.parametrize("name", ["first", "FIRST.xlsx", "maker-one", "Panel of Maker-One"])
def test_a_bidder_goes_by_file_maker_or_panel(name):
    (copy,) = copy_for(name, OFFERS)
    assert copy.submission.file == "first.xlsx"
    assert [one.offer for one in copy.tender.deviations] == ["Maker-One"]


def test_no_output_of_a_copy_names_another_bidder():
    (copy,) = copy_for("first", OFFERS)
    with zipfile.ZipFile(io.BytesIO(review_bytes(copy))) as book:
        texts = [book.read(name).decode() for name in book.namelist()]
    for text in (*texts, to_json(copy), render_html(copy)):
        assert "quillon" not in text.lower()
        assert "vexbury" not in text


def test_unknown_bidder_is_one_message():
    with pytest.raises(UnusableInputError, match=r"a bidder among first\.xlsx, vexbury\.xlsx"):
        copy_for("third", OFFERS)
