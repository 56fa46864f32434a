"""The blank bid form: filled without a manual, read back whole, its example row left out."""

import io
from dataclasses import replace

import openpyxl
import pytest

from speccheck.dictionary import match_heading, parameters
from speccheck.errors import UnusableInputError
from speccheck.intake import read_submission
from speccheck.records import CellRef, Level, Requirement, Settings, Tender
from speccheck.report.workbooks.form import EXAMPLE, USUAL, form_bytes, form_heading, form_unit, write_form

FIGURES = {
    "array_rows": 10,
    "array_columns": 4,
    "gain": 17.3,
    "horizontal_beamwidth": 64,
    "vertical_beamwidth": 7.1,
    "height": 1400,
    "weight": 21.5,
    "passive_intermodulation": -153,
    "vertical_element_spacing": 105,
}
TEXTS = {"electrical_tilt": ("2 to 12", (2, 12)), "temperature_range": ("-40 to 55", (-40, 55))}


def asked(clause, parameter, wording):
    where = CellRef("tender.xlsx", "Requirements", f"B{clause}")
    return Requirement(
        where=where, clause=clause, wording=wording, level=Level.MANDATORY, parameter=parameter
    )


TENDER = Tender(
    file="tender.xlsx",
    sha256="",
    requirements=(
        asked("1", "gain", "Gain shall be at least 17 dBi"),
        asked("2", "ice_load", "State the ice load"),
        asked("3", "", "=Deliver within 20 weeks"),
    ),
    settings=Settings(paper="Letter"),
)


def columns(sheet):
    return {cell.value: cell.column for cell in sheet[1]}


@pytest.fixture
def form():
    return openpyxl.load_workbook(io.BytesIO(form_bytes()))


@pytest.mark.parametrize("key", [p.key for p in parameters().values() if p.headings])
def test_every_heading_reads_back_as_its_parameter_and_unit(key):
    parameter = parameters()[key]
    match = match_heading(form_heading(parameter))
    assert match.parameters == (key,)
    # a bare % in brackets adds nothing to a ratio that is always stated in percent
    assert match.unit == ("" if parameter.unit == "%" else form_unit(parameter)[0])


def test_filled_form_gives_every_figure_in_its_own_unit(form, tmp_path):
    sheet = form["Bid"]
    place = columns(sheet)
    for row, (model, band) in enumerate([("Fenwick 4", "1710-2170"), ("Fenwick 4", "2500-2690")], start=3):
        sheet.cell(row, place["Model"]).value = model
        sheet.cell(row, 2).value = band
        for key, value in [*FIGURES.items(), *((key, text) for key, (text, _) in TEXTS.items())]:
            sheet.cell(row, place[form_heading(parameters()[key])]).value = value
    path = tmp_path / "filled.xlsx"
    form.save(path)
    submission = read_submission(path)
    (panel,) = submission.panels
    assert panel.name == "Fenwick 4"
    assert panel.bands == ((1710, 2170), (2500, 2690))
    for key, value in FIGURES.items():
        for band in panel.bands:
            reading = panel.get(key, band)
            assert reading.value == pytest.approx(value / form_unit(parameters()[key])[1]), key
            assert reading.unit == parameters()[key].unit
    for key, (_, span) in TEXTS.items():
        assert panel.get(key, panel.bands[0]).value == span
    assert submission.unread == ()


def test_example_row_is_named_and_never_read(form, tmp_path):
    form["Bid"]["A3"].value = "Fenwick 4"
    form["Bid"].cell(3, columns(form["Bid"])["Gain (dBi)"]).value = 17.3
    path = tmp_path / "filled.xlsx"
    form.save(path)
    submission = read_submission(path)
    assert [panel.name for panel in submission.panels] == ["Fenwick 4"]
    assert [r.value for r in submission.panels[0].all("gain")] == [17.3]
    assert any("example row" in notice.text for notice in submission.notices)


def test_unfilled_form_is_no_bid(tmp_path):
    path = tmp_path / "form.xlsx"
    write_form(path)
    with pytest.raises(UnusableInputError):
        read_submission(path)


def test_conveniences(form):
    sheet = form["Bid"]
    assert sheet.freeze_panes == "C2"
    assert sheet["A2"].value == EXAMPLE["model"]
    assert not sheet["A3"].protection.locked
    assert sheet["A1"].protection.locked
    assert all(cell.comment for cell in sheet[1])
    assert form.sheetnames == ["Read me", "Bid", "Lists"]
    assert sheet["B3"].number_format == "@"


def test_numbers_are_warned_about_not_refused(form):
    checks = form["Bid"].data_validations.dataValidation
    gain = next(check for check in checks if check.errorTitle == "Gain (dBi)")
    assert (gain.errorStyle, gain.type) == ("warning", "decimal")
    assert gain.error == "Gain: a number in dBi, usually 5 to 28 dBi."
    spacing = next(check for check in checks if check.errorTitle.startswith("Vertical element spac"))
    assert (float(spacing.formula1), float(spacing.formula2)) == (20, 400)


def test_pick_lists_point_at_their_words(form):
    checks = [check for check in form["Bid"].data_validations.dataValidation if check.type == "list"]
    words = [[cell.value for (cell,) in form["Lists"][check.formula1.split("!")[1]]] for check in checks]
    assert words == [
        ["±45°", "vertical and horizontal", "vertical", "horizontal"],
        ["4.3-10 female", "7/16 female", "2.2-5 female", "N female"],
    ]


def test_form_for_a_tender_asks_exactly_its_clauses():
    book = openpyxl.load_workbook(io.BytesIO(form_bytes(TENDER)))
    headings = columns(book["Bid"])
    assert "Gain (dBi)" in headings
    assert "Ice load" in headings
    assert "VSWR" not in headings
    assert (
        "Clause 1: Gain shall be at least 17 dBi" in book["Bid"].cell(1, headings["Gain (dBi)"]).comment.text
    )
    assert [cell.value for cell in book["Clauses"]["A"][1:]] == [
        "1 (mandatory): Gain shall be at least 17 dBi — answer on sheet Bid, column Gain (dBi)",
        "2 (mandatory): State the ice load — answer on sheet Bid, column Ice load",
        "3 (mandatory): =Deliver within 20 weeks — answer here, in words",
    ]
    assert book["Bid"].page_setup.paperSize == 1


def test_clauses_are_not_read_as_the_bidders_figures(tmp_path):
    book = openpyxl.load_workbook(io.BytesIO(form_bytes(TENDER)))
    sheet = book["Bid"]
    sheet["A3"].value, sheet["B3"].value = "Fenwick 4", "1710-2170"
    sheet.cell(3, columns(sheet)["Gain (dBi)"]).value = 16.5
    book["Clauses"]["B2"].value = "see the sheet Bid"
    path = tmp_path / "filled.xlsx"
    book.save(path)
    (panel,) = read_submission(path).panels
    assert [reading.value for reading in panel.all("gain")] == [16.5]


def test_conditions_of_the_tender_stand_in_the_headings_and_come_back(tmp_path):
    """150 km/h = 41.67 m/s; a force without its speed could not be judged."""
    rows = (
        replace(asked("1", "wind_load", "≤ 600 N at 150 km/h"), at={"wind_speed_mps": 150 / 3.6}),
        replace(asked("2", "passive_intermodulation", "≤ -150 dBc @ 2 x 43"), at={"carrier_dbm": 43.0}),
        replace(asked("3", "cross_polar_discrimination", "≥ 20 dB (0°)"), at={"angle_deg": 0.0}),
        replace(asked("3", "cross_polar_discrimination", "≥ 10 dB (±60°)"), at={"angle_deg": 60.0}),
    )
    book = openpyxl.load_workbook(io.BytesIO(form_bytes(replace(TENDER, requirements=rows))))
    sheet = book["Bid"]
    sheet["A3"].value, sheet["B3"].value = "Fenwick 4", "1710-2170"
    place = columns(sheet)
    for heading, value in (
        ("Wind load, frontal, at 150 km/h (N)", 512),
        ("Passive intermodulation, at 2 x 43 dBm (dBc)", -153),
        ("Cross-polar discrimination, at 0° (dB)", 21),
        ("Cross-polar discrimination, at 60° (dB)", 11),
    ):
        sheet.cell(3, place[heading]).value = value
    path = tmp_path / "filled.xlsx"
    book.save(path)
    (panel,) = read_submission(path).panels
    assert panel.all("wind_load")[0].at["wind_speed_mps"] == pytest.approx(41.67, abs=0.01)
    assert panel.all("passive_intermodulation")[0].at["carrier_dbm"] == 43
    assert {(r.value, r.at["angle_deg"]) for r in panel.all("cross_polar_discrimination")} == {
        (21, 0),
        (11, 60),
    }


def test_same_tender_same_bytes():
    assert form_bytes(TENDER) == form_bytes(TENDER)


def test_usual_columns_are_parameters():
    assert set(USUAL) <= set(parameters())


def test_a_tender_form_asks_in_the_tenders_units_and_for_each_band_once():
    """A band is a row of the form: two columns of frequencies would be answered once here, once there."""
    wind = replace(asked("2", "survival_wind_speed", "Survival wind speed at least 200 km/h"), unit="km/h")
    band = asked("3", "frequency_range", "698 to 894 MHz")
    tender = Tender(file="t.xlsx", sha256="", requirements=(wind, band))
    book = openpyxl.load_workbook(io.BytesIO(form_bytes(tender)))
    headings = [cell.value for cell in book["Bid"][1]]
    assert "Survival wind speed (km/h)" in headings
    assert [text for text in headings if "MHz" in text] == ["Operating bands (MHz)"]
    answers = [cell.value for cell in book["Clauses"]["A"]]
    assert answers[1].endswith("column Survival wind speed (km/h)")
    assert answers[2].endswith("column Operating bands (MHz)")
