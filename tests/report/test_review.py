"""The review workbook: what evaluators find in it, and that nothing typed by a bidder can run."""

import dataclasses
import io
import re
import zipfile

import openpyxl
import pytest
from hypothesis import HealthCheck, Phase, given, settings
from report.strategies import assessments

from speccheck.errors import OutputError
from speccheck.records import Amount, Assessment, MirrorCell, MirrorSheet, Settings, Submission
from speccheck.report.machine import from_json, to_json
from speccheck.report.workbooks.review import review_bytes, write_review

HOSTILE = [
    "=1+1",
    "+5",
    "-5+cmd|'/c calc'!A0",
    "@SUM(A1)",
    "\t=1",
    "<b>&\"'",
    "_x0041_",
    "a\u202eb",
    "x" * 10_000,
]

LIVE = ("Summary", "Recomputed")
"""Sheets with formulas of our own."""


@pytest.fixture
def book(bid):
    return openpyxl.load_workbook(io.BytesIO(review_bytes(bid)))


def table(sheet):
    """Rows of a sheet as dicts by heading."""
    headings, *rows = sheet.iter_rows(values_only=True)
    return [dict(zip(headings, row, strict=True)) for row in rows]


def parts(data, pattern):
    with zipfile.ZipFile(io.BytesIO(data)) as archive:
        return {name: archive.read(name).decode() for name in archive.namelist() if re.search(pattern, name)}


def test_sheets_and_their_order(book):
    assert book.sheetnames == [
        "Read me",
        "Summary",
        "Findings",
        "Requirements",
        "Questions",
        "Inputs as read",
        "Input 1",
        "Input 2",
        "Recomputed",
        "Rules used",
        "Lists",
    ]
    assert {sheet.sheet_state for sheet in book} == {"visible"}


def test_findings_say_what_the_assessment_says(book):
    first = table(book["Findings"])[0]
    assert (first["No."], first["Verdict"], first["Check"]) == (1, "does not fit", "Gain fits the array")
    assert (first["Claimed"], first["Expected from"], first["Expected to"], first["Unit"]) == (
        26.8,
        23.9,
        25.1,
        "dBi",
    )
    assert (first["Band from (MHz)"], first["Band to (MHz)"]) == (3300, 3800)
    assert first["Cells"] == "Bid!D3, D6, D7"
    assert first["Question"] == "Please confirm the number of positions."
    assert first["Innocent readings"] == "both polarisations together: 23.8 dBi"
    assert first["Working"] == "Aperture: 12 · 55 mm × 8 · 45 mm = 0.2376 m²"
    assert first["Reviewer's verdict"] is None


def test_requirements_keep_margin_and_verdict(book):
    gain, weight = table(book["Requirements"])
    assert (gain["Limit"], gain["Offered"], gain["Margin"], gain["Verdict"]) == (24, 26.8, 2.8, "meets")
    assert (gain["Offer's cell"], gain["As written"], gain["Claim in doubt"]) == (
        "Bid!D3",
        "26.8",
        "gain-fits-array",
    )
    assert (weight["Offered"], weight["Margin"], weight["Verdict"]) == (None, None, "not stated")
    assert (weight["As written"], weight["Reading confirmed"]) == ("tbd", "no")


def test_summary_counts_are_those_of_the_tables(book):
    (row,) = table(book["Summary"])
    verdicts = [finding["Verdict"] for finding in table(book["Findings"])]
    assert (row["Panel"], row["Outcome"]) == ("=Panel 1", "clarify")
    for column, verdict in (
        ("Fits", "fits"),
        ("Does not fit", "does not fit"),
        ("Checks not judged", "not judged"),
    ):
        assert row[column] == verdicts.count(verdict) == 1
    # the weight that a check and a clause miss is asked for once
    assert row["Questions"] == len(table(book["Questions"])) == 2
    assert (row["Mandatory met"], row["Desirable not met"]) == (1, 1)


def test_mirror_keeps_addresses_values_and_types(book, bid):
    mirror = book["Input 1"]
    for cell in bid.submission.mirror[0].cells:
        assert mirror[cell.cell].value == cell.value
    assert mirror["D13"].value == -153
    assert mirror["F3"].data_type == "n"


def test_links_lead_both_ways(book):
    assert book["Findings"]["M2"].hyperlink.location == "'Input 1'!D3"
    assert book["Input 1"]["D3"].hyperlink.location == "'Findings'!A2"
    assert book["Inputs as read"]["A2"].hyperlink.location == "'Input 1'!D1"
    assert book["Input 1"]["D2"].hyperlink.location.startswith("'Inputs as read'!A")
    assert "does not fit" in book["Input 1"]["D3"].comment.text


def test_judged_cells_differ_in_colour(book):
    fill = {name: book["Input 1"][name].fill.start_color.rgb for name in ("D3", "D11", "D4", "A16", "A3")}
    assert len(set(fill.values())) == 5


def test_unread_cells_and_notices_are_listed(book):
    rows = {row["Cell"]: row for row in table(book["Inputs as read"])}
    assert rows["Bid!A16"]["Read as"] == "not understood"
    assert rows["Bid!A16"]["How it was read"] == "no known heading; nearest known: null fill"
    assert rows["Bid!F3"]["Read as"] == "notice"
    assert rows["Bid!D17"]["Read as"] == "to be advised"
    assert rows["Bid!D8"]["How it was read"] == "stated as 55 mm"


@pytest.mark.parametrize(
    "name", ["Read me", "Summary", "Findings", "Requirements", "Questions", "Recomputed", "Lists"]
)
def test_conveniences_of_every_table(book, name):
    sheet = book[name]
    assert sheet.freeze_panes[1:] == "2"
    assert sheet.auto_filter.ref.startswith("A1:")
    setup = sheet.page_setup
    assert (setup.orientation, setup.fitToHeight) == ("landscape", 0)
    assert sheet.sheet_properties.pageSetUpPr.fitToPage
    assert sheet.print_title_rows == "$1:$1"
    assert sheet.print_area
    assert sheet.oddFooter.center.text == "&A, page &P of &N"
    assert sheet.oddFooter.left.text == "&F\nDRAFT, bid.xlsx, revision B && 1"
    assert sheet.oddFooter.right.text == "printed &D &T"
    assert sheet["A1"].protection.locked
    assert not sheet["A2"].protection.locked
    assert sheet.protection.sheet
    assert sheet.protection.password is None
    headings = [cell.value for cell in sheet[1]]
    assert all(headings)
    assert len(set(headings)) == len(headings)


@pytest.mark.parametrize("name", ["Read me", "Summary", "Findings", "Requirements", "Questions", "Input 1"])
def test_print_stays_readable_and_names_its_rows(book, name):
    """Letters of 7 points at least on A4: a character of 11 points is 7 of 96 pixels an inch wide
    (ISO/IEC 29500-1, 18.3.1.13, Calibri), and 297 mm less two margins of 0.6 inch hold what is printed."""
    sheet = book[name]
    _, _, last, _ = openpyxl.utils.range_boundaries(sheet.print_area.rpartition("!")[2].replace("$", ""))
    letters = (openpyxl.utils.get_column_letter(n) for n in range(1, last + 1))
    inches = sum(sheet.column_dimensions[letter].width for letter in letters) * 7 / 96
    across = sheet.page_setup.fitToWidth
    repeated = sheet.print_title_cols
    assert 11 * across * (297 / 25.4 - 1.2) / inches >= 7
    assert bool(repeated) == (across > 1)


def test_status_colours_follow_the_word(book):
    rules = {
        str(r.sqref): [rule.formula[0] for rule in r.rules] for r in book["Findings"].conditional_formatting
    }
    assert rules["E2:E4"] == ['"fits"', '"doubtful"', '"does not fit"', '"not judged"']


def test_pick_lists_point_at_the_visible_list(book):
    (check,) = book["Findings"].data_validations.dataValidation
    assert (check.formula1, check.errorStyle) == ("Lists!$E$2:$E$20", "warning")
    words = [cell.value for cell in book["Lists"]["E"][1:] if cell.value]
    assert {"does not fit", "deviation accepted"} <= set(words)


def test_recomputed_holds_formulas_with_stored_results(bid):
    data = review_bytes(bid)
    live = table(openpyxl.load_workbook(io.BytesIO(data))["Recomputed"])
    stored = table(openpyxl.load_workbook(io.BytesIO(data), data_only=True)["Recomputed"])
    by_name = {row["Quantity"]: (row, value["Figure"]) for row, value in zip(live, stored, strict=True)}
    gain, figure = by_name["Gain as claimed"]
    assert (gain["Figure"], figure) == ("='Input 1'!D3", 26.8)
    spacing, figure = by_name["Vertical element spacing"]
    assert (spacing["Figure"], figure) == ("='Input 1'!D8*0.001", 0.055)
    # hand arithmetic: 299.792458 / 3800 = 0.078893 m; 0.045 / 0.078893 = 0.5704; 1/(1 + sin 60°) = 0.5359
    assert by_name["Wavelength at the top of the band"][1] == pytest.approx(0.078893, abs=1e-6)
    assert by_name["Horizontal spacing in wavelengths at the top of the band"][1] == pytest.approx(
        0.5704, abs=1e-4
    )
    assert by_name["Horizontal spacing at which a grating lobe enters"][1] == pytest.approx(0.5359, abs=1e-4)
    # 12·0.055 m × 8·0.045 m = 0.2376 m²; 10 log10(4π · 0.2376 / 0.078893²) = 26.81 dBi
    assert by_name["Directivity of the aperture at the top of the band"][1] == pytest.approx(26.81, abs=0.01)
    # 200 W is 53.01 dBm; with 26.8 dBi 79.81 dBm
    assert by_name["EIRP of all power through this gain"][1] == pytest.approx(79.81, abs=0.01)
    # VSWR 1.5: 13.98 dB (any handbook's table of VSWR and return loss)
    assert by_name["Return loss of this VSWR"][1] == pytest.approx(13.98, abs=0.005)
    # √(10^4.98 / (4π · 10)) = 27.57 m
    assert by_name["Calculated compliance distance (general public, whole body)"][1] == pytest.approx(
        27.57, abs=0.01
    )
    assert by_name["The same, rounded up (general public, whole body)"][1] == 27.6


def test_text_never_becomes_a_formula(bid):
    cells = tuple(MirrorCell(f"B{n}", text) for n, text in enumerate(HOSTILE, 2))
    mirror = (MirrorSheet(name="=Bid'!A1", cells=cells),)
    data = review_bytes(
        dataclasses.replace(bid, submission=dataclasses.replace(bid.submission, mirror=mirror))
    )
    book = openpyxl.load_workbook(io.BytesIO(data))
    for sheet in book:
        formulas = [cell for row in sheet.iter_rows() for cell in row if cell.data_type == "f"]
        assert not formulas or sheet.title in LIVE
    for number, text in enumerate(HOSTILE, 2):
        cell = book["Input 1"][f"B{number}"]
        assert cell.data_type == "s"
        assert bool(cell.quotePrefix) == text.startswith(("=", "+", "-", "@", "\t"))
    assert book["Input 1"]["B11"].value is None
    assert len(book["Input 1"]["B10"].value) == 10_000
    assert book["Input 1"]["B8"].value == "_x005F_x0041_"  # a spreadsheet shows this as typed: _x0041_
    assert "\u202e" not in book["Input 1"]["B9"].value


def test_rows_are_as_tall_as_what_is_printed(bid):
    """Working is not printed: twenty steps of it make no row of the paper taller."""
    panel = bid.panels[0]
    finding = next(f for f in panel.findings if f.working)
    long = dataclasses.replace(finding, working=finding.working[:1] * 20)
    panel = dataclasses.replace(panel, findings=(long,))
    sheet = openpyxl.load_workbook(io.BytesIO(review_bytes(dataclasses.replace(bid, panels=(panel,)))))[
        "Findings"
    ]
    headings = {cell.value: cell.column_letter for cell in sheet[1]}
    assert sheet[f"{headings['Working']}2"].value.count("\n") == 19
    assert sheet.print_area.endswith(f"${headings['Question']}$2")
    summary = len(sheet[f"{headings['Summary']}2"].value)
    question = len(sheet[f"{headings['Question']}2"].value)
    lines = 1 + 1.05 * max(summary / 60, question / 40)
    assert sheet.row_dimensions[2].height <= 15 * lines
    assert sheet.row_dimensions[2].customHeight


def test_nothing_leads_outside_or_runs(bid):
    data = review_bytes(bid)
    names = parts(data, "")
    assert not [name for name in names if "vba" in name.lower() or "externalLink" in name]
    assert "TargetMode" not in "".join(parts(data, r"\.rels$").values())


def test_same_assessment_same_bytes(bid, monkeypatch):
    first = review_bytes(bid)
    monkeypatch.setattr("time.time", lambda: 0.0)
    assert review_bytes(bid) == first
    with zipfile.ZipFile(io.BytesIO(first)) as archive:
        assert {entry.date_time for entry in archive.infolist()} == {(1980, 1, 1, 0, 0, 0)}
    (core,) = parts(first, "core.xml").values()
    assert set(re.findall(r"\d{4}-\d\d-\d\dT", core)) == {"2000-01-01T"}


def test_made_again_from_stored_json(bid):
    """Without the mirror everything but the mirror is there, and inputs refer to the readings."""
    again = openpyxl.load_workbook(io.BytesIO(review_bytes(from_json(to_json(bid)))))
    assert "Input 1" not in again.sheetnames
    assert len(table(again["Findings"])) == 3
    gain = next(row for row in table(again["Recomputed"]) if row["Quantity"] == "Gain as claimed")
    assert gain["Figure"].startswith("='Inputs as read'!$H$")


def test_an_empty_submission_still_gives_a_workbook():
    empty = Assessment(submission=Submission(file="b.xlsx", sha256="", size_bytes=0), settings=Settings())
    book = openpyxl.load_workbook(io.BytesIO(review_bytes(empty)))
    assert table(book["Summary"]) == []


def test_unwritable_place_is_one_message(bid, tmp_path):
    with pytest.raises(OutputError, match="could not be written"):
        write_review(bid, tmp_path / "absent" / "bid.review.xlsx")


@settings(
    max_examples=8,
    deadline=None,
    phases=[Phase.explicit, Phase.reuse, Phase.generate],  # shrinking a whole assessment takes minutes
    suppress_health_check=list(HealthCheck),
)
@given(assessments(mirrored=True))
def test_any_assessment_gives_a_workbook_that_opens_and_runs_nothing(one):
    book = openpyxl.load_workbook(io.BytesIO(review_bytes(one)))
    assert len(table(book["Findings"])) == sum(len(panel.findings) for panel in one.panels)
    for sheet in book:
        formulas = [cell for row in sheet.iter_rows() for cell in row if cell.data_type == "f"]
        assert not formulas or sheet.title in LIVE


def test_claim_in_another_unit_than_the_expected_is_given_in_words(bid):
    odd = dataclasses.replace(bid.panels[0].findings[0], claimed=Amount(24.65, "dBd"))
    judged = dataclasses.replace(bid.panels[0], findings=(odd,))
    book = openpyxl.load_workbook(io.BytesIO(review_bytes(dataclasses.replace(bid, panels=(judged,)))))
    (row,) = table(book["Findings"])
    assert (row["Claimed"], row["Claimed in words"].split(), row["Unit"]) == (None, ["24.65", "dBd"], "dBi")
