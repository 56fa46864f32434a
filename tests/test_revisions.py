"""Comparing two revisions of one bid: expectations written by hand from small invented bids."""

import dataclasses

import pytest

from speccheck.records import (
    Assessment,
    CellRef,
    Compliance,
    Finding,
    Fit,
    Level,
    MatrixRow,
    Outcome,
    Panel,
    PanelAssessment,
    Reading,
    Requirement,
    Settings,
    Statement,
    Status,
    Submission,
)
from speccheck.revisions import compare, comparison_text

BAND = (3300.0, 3800.0)


def figure(parameter, value, address="D3", **more):
    return Reading(
        where=CellRef("bid.xlsx", "Bid", address),
        parameter=parameter,
        raw=str(value),
        value=value,
        unit="dBi",
        **more,
    )


def judged(
    readings=(),
    *,
    name="A",
    verdict=Fit.FITS,
    met=Compliance.MEETS,
    outcome=Outcome.ACCEPTABLE,
    statements=(),
):
    finding = Finding(
        check="gain-fits-array", title="Gain fits the array", verdict=verdict, summary="", band=BAND
    )
    asked = Requirement(
        where=CellRef("t.xlsx", "R", "A2"), clause="3.1", wording="", level=Level.MANDATORY, parameter="gain"
    )
    panel = Panel(
        name=name,
        where=CellRef("bid.xlsx", "Bid", "D1"),
        readings=tuple(readings),
        statements=tuple(statements),
    )
    rows = (MatrixRow(requirement=asked, verdict=met, band=BAND),)
    return PanelAssessment(panel=panel, outcome=outcome, findings=(finding,), requirements=rows)


def result(*panels, sha="a" * 64, file="bid.xlsx", **more):
    submission = Submission(file=file, sha256=sha, size_bytes=1, panels=tuple(p.panel for p in panels))
    return Assessment(
        submission=submission, settings=Settings(**more), panels=panels, program_version="0.1.0"
    )


def told(old, new):
    """The changes as short tuples."""
    revision = compare(result(old), result(new, sha="b" * 64))
    return [(change.word, change.kind, change.what, change.old, change.new) for change in revision.changes]


def test_nothing_changed():
    one = judged([figure("gain", 17.5, band=BAND)])
    assert told(one, one) == []


def test_changed_added_and_vanished_figures():
    old = judged([figure("gain", 17.5, band=BAND), figure("weight", 20.0)])
    new = judged([figure("gain", 18.0, band=BAND), figure("vswr", 1.5)])
    assert told(old, new) == [
        ("changed", "figure", "Gain", "17.5 dBi", "18 dBi"),
        ("vanished", "figure", "Weight", "20 dBi", None),
        ("added", "figure", "VSWR", None, "1.5 dBi"),
    ]


def test_same_figure_in_another_cell_or_unit_is_no_change():
    old = judged([figure("height", 2.0, "D3", stated_value=2000.0, stated_unit="mm")])
    new = judged([figure("height", 2.0, "E9", stated_value=2.0, stated_unit="m")])
    assert told(old, new) == []


def test_figures_by_tilt_are_held_against_their_own_tilt():
    old = judged([figure("gain", 17.0, at={"tilt_deg": 2.0}), figure("gain", 16.0, at={"tilt_deg": 10.0})])
    new = judged([figure("gain", 16.5, at={"tilt_deg": 10.0}), figure("gain", 17.0, at={"tilt_deg": 2.0})])
    assert told(old, new) == [("changed", "figure", "Gain (tilt deg 10)", "16 dBi", "16.5 dBi")]


def test_a_statement_that_became_a_figure():
    where = CellRef("bid.xlsx", "Bid", "D9")
    old = judged(
        statements=[Statement(where=where, parameter="weight", raw="tbd", status=Status.TO_BE_ADVISED)]
    )
    new = judged([figure("weight", 24.0, "D9")])
    assert told(old, new) == [
        ("added", "figure", "Weight", None, "24 dBi"),
        ("vanished", "statement", "Weight", "to be advised", None),
    ]


def test_verdicts_and_outcome():
    old = judged()
    new = judged(verdict=Fit.DOES_NOT_FIT, met=Compliance.FAILS, outcome=Outcome.REJECT)
    assert told(old, new) == [
        ("changed", "outcome", "outcome", "acceptable", "reject"),
        ("changed", "finding", "Gain fits the array", "fits", "does not fit"),
        ("changed", "requirement", "clause 3.1, Gain", "meets", "fails"),
    ]


def test_renamed_panel_is_still_compared():
    assert told(judged([figure("gain", 17.0)], name="A"), judged([figure("gain", 18.0)], name="A rev 2")) == [
        ("changed", "panel", "name", "A", "A rev 2"),
        ("changed", "figure", "Gain", "17 dBi", "18 dBi"),
    ]


def test_panels_that_came_and_went():
    revision = compare(result(judged(name="A"), judged(name="B")), result(judged(name="B"), sha="b" * 64))
    assert [(c.word, c.kind, c.panel) for c in revision.changes] == [("vanished", "panel", "A")]


def revision_label(text):
    return judged([dataclasses.replace(figure("revision", text), unit="")])


@pytest.mark.parametrize(
    ("old", "new", "caution"),
    [
        (
            result(revision_label("B")),
            result(revision_label("B"), sha="b" * 64),
            "revision 'B' is on both files",
        ),
        (result(judged()), result(judged(), sha="b" * 64), "both files are named 'bid.xlsx'"),
        (result(judged()), result(judged()), "the same file, byte for byte"),
        (result(judged()), result(judged(), tdd_duty=0.75), "different settings"),
        (result(judged()), result(judged(), tender_sha256="c"), "two different tender files"),
    ],
)
def test_cautions(old, new, caution):
    assert any(caution in text for text in compare(old, new).cautions)


def test_new_revision_label_gives_no_caution():
    assert compare(result(revision_label("B")), result(revision_label("C"), sha="b" * 64)).cautions == ()


def test_text_names_files_cells_and_counts_and_hides_control_marks():
    old = result(judged([figure("gain", 17.0, band=BAND)], name="A\u202e"))
    new = result(judged([figure("gain", 18.0, "E3", band=BAND)], name="A\u202e"), sha="b" * 64)
    text = comparison_text(compare(old, new))
    assert "changed  figure      Gain, 3300–3800 MHz: 17 dBi → 18 dBi  [Bid!D3 → Bid!E3]" in text
    assert text.rstrip().endswith("1 changed, 0 added, 0 vanished")
    assert "\u202e" not in text
