"""Tender workbooks read whole: settings, headings, deviations, and bad input named with its cell."""

from __future__ import annotations

from pathlib import Path
from typing import Any

import pytest
from openpyxl import load_workbook

from speccheck.errors import UnusableInputError
from speccheck.intake import read_submission
from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records import Level, Tender
from tender.books import write_tender

HEAD = [
    "Clause",
    "Wording",
    "Level",
    "Parameter",
    "Operator",
    "Value",
    "Unit",
    "Statistic",
    "Bands",
    "Weight",
    "Confirmed",
]


def _tender(tmp_path: Path, *rows: list[Any], **sheets: Any) -> Tender:
    return read_tender(write_tender(tmp_path / "tender.xlsx", [HEAD, *rows], **sheets))


def _troubles(tender: Tender, cell: str) -> list[str]:
    return [f.summary for f in tender.findings if any(w.cell == cell for w in f.where)]


def test_free_and_structured_rows_give_the_same_demand(tmp_path: Path) -> None:
    tender = _tender(
        tmp_path,
        [
            "1",
            "Gain shall be at least 17 dBi",
            "M",
            None,
            None,
            None,
            None,
            "worst case",
            "1710-2170",
            None,
            "yes",
        ],
        ["2", None, "M", "Gain", "≥", 17, "dBi", "each", "1710-2170 MHz", None, "yes"],
    )
    free, structured = tender.requirements
    for field in ("parameter", "operator", "limit", "unit", "statistic", "bands", "level", "confirmed"):
        assert getattr(free, field) == getattr(structured, field), field
    assert free.where.cell == "B2"


def test_everything_a_buyer_sets_is_taken_in(tmp_path: Path) -> None:
    tender = _tender(
        tmp_path,
        ["1", "Gain ≥ 17 dBi", "M"],
        Settings=[
            ["Setting", "Value", "Unit"],
            ["Tender", "Riverside sector renewal", None],
            ["Guard band: Gain", 0.3, "dB"],
            ["Guard band: Weight", 500, "g"],
            ["Equality rule", "does not meet", None],
            ["Default statistic", "typ", None],
            ["Exposure limit set", "icnirp-1998", None],
            ["Reflection factor", 2.56, None],
            ["TDD duty", 75, "%"],
            ["Country factor", 0.25, None],
            ["Actual-maximum factor", 0.25, None],
            ["Loss: passive", "0.5-1.5", "dB"],
            ["Paper", "letter", None],
            ["Report number", "R-7", None],
            ["Issued", "yes", None],
        ],
        Headings=[["Heading", "Parameter"], ["Boresight figure", "gain"]],
    )
    rules = tender.settings
    assert rules.tender == "Riverside sector renewal"
    assert rules.guard_bands == pytest.approx({"gain": 0.3, "weight": 0.5})
    assert (rules.equality_meets, rules.statistic, rules.limit_set) == (False, "typ", "icnirp-1998")
    assert (rules.reflection_factor, rules.tdd_duty, rules.actual_maximum_factor) == (2.56, 0.75, 0.25)
    assert rules.country_factor == 0.25
    assert (rules.loss_db, rules.paper, rules.report_number, rules.issued) == (
        {"passive": (0.5, 1.5)},
        "Letter",
        "R-7",
        True,
    )
    assert rules.headings == {"Boresight figure": "gain"}
    assert not tender.findings


def test_house_synonyms_are_read_in_the_wording(tmp_path: Path) -> None:
    sheet = [["Heading", "Parameter"], ["boresight figure", "gain"]]
    tender = _tender(tmp_path, ["1", "Boresight figure at least 17 dBi", "M"], Headings=sheet)
    assert tender.requirements[0].parameter == "gain"


def test_a_rule_row_sets_statistic_and_scope_of_the_others(tmp_path: Path) -> None:
    rule = ["1", "All values guaranteed, over temperature, all ports", "I"]
    tender = _tender(tmp_path, rule, ["2", "Gain ≥ 17 dBi", "M"], ["3", "Gain ≥ 17.5 dBi (typ.)", "D"])
    assert tender.requirements[1].statistic == "each"
    assert "over temperature" in tender.requirements[1].scope
    assert not any(text.startswith("STAT") for text in tender.requirements[1].doubts)
    assert tender.requirements[2].statistic == "typ"


def test_two_columns_of_values_and_weights(tmp_path: Path) -> None:
    rows = [
        ["Clause", "Requirement", "Must", "Should", "Unit", "Weight"],
        ["1", "VSWR", "1.5", "1.4", None, 10],
    ]
    tender = read_tender(write_tender(tmp_path / "t.xlsx", rows))
    assert [(r.operator, r.limit, r.level, r.weight) for r in tender.requirements] == [
        ("≤", 1.5, Level.MANDATORY, 10),
        ("≤", 1.4, Level.DESIRABLE, 10),
    ]


@pytest.mark.parametrize(
    ("row", "cell", "said"),
    [
        (["1", "Gain", "M"], "B2", "no value"),
        (["1", "Gain ≥ 17", "M", "gain", "≥", None, None], None, None),
        (["1", None, "M", "gain", "≥", "high", "dBi"], "F2", "no value"),
        (["1", None, "M", "gain", "≥", 17, "furlong"], "G2", "unit does not belong"),
        (["1", None, "M", "gain", "≥", 17, "kg"], "G2", "unit does not belong"),
        (["1", None, "M", "flux", "≥", 17, "dBi"], "D2", "no known parameter"),
        (["1", "VSWR not less than 1.3", "M"], "B2", "direction that is worse"),
        (["1", "Gain should be ≥ 17 dBi", "M"], "C2", "level 'M' beside"),
        (["1", "Gain ≥ 17 dBi", "maybe"], "C2", "level 'maybe'"),
        (["1", "Gain shall preferably be ≥ 17 dBi", "M"], "B2", "words of two levels"),
        (["1", "Gain ≥ 16 dBi", "M", "gain", "≥", 17, "dBi"], "B2", "columns and the wording"),
    ],
)
def test_a_faulty_row_is_named_with_its_cell(
    tmp_path: Path, row: list[Any], cell: str | None, said: str | None
) -> None:
    tender = _tender(tmp_path, row)
    if cell is None or said is None:
        assert not tender.findings
    else:
        assert any(said in text for text in _troubles(tender, cell)), [f.summary for f in tender.findings]


def test_duplicate_clauses_are_named_with_both_cells(tmp_path: Path) -> None:
    tender = _tender(tmp_path, ["4.1", "Gain ≥ 17 dBi", "M"], ["4.1", "Weight ≤ 25 kg", "M"])
    assert any("Requirements!A2" in text for text in _troubles(tender, "A3"))


def test_deviations_need_reason_approver_and_expiry(tmp_path: Path) -> None:
    sheet = [
        ["Clause", "Bidder or panel", "Reason", "Approver", "Expiry"],
        ["1", "Aster 8", "mast is short", "head of radio", "2030-01-31"],
        ["1", "Birch 4", "", "head of radio", "2030-01-31"],
        ["1", "Cedar 4", "mast is short", "head of radio", "31/01/30"],
        ["1", "Dogwood 4", "mast is short", "head of radio", "2020-01-31"],
        ["9", "Elm 4", "mast is short", "head of radio", "2030-01-31"],
    ]
    tender = _tender(tmp_path, ["1", "Gain ≥ 17 dBi", "M"], Deviations=sheet)
    assert [d.offer for d in tender.deviations] == ["Aster 8", "Dogwood 4", "Elm 4"]
    assert "reason" in _troubles(tender, "A3")[0]
    assert "expiry" in _troubles(tender, "A4")[0]
    assert "expired on 2020-01-31" in _troubles(tender, "A5")[0]
    assert "no requirement has" in _troubles(tender, "A6")[0]


def test_settings_that_cannot_be_used_say_so_and_leave_the_default(tmp_path: Path) -> None:
    sheet = [
        ["Setting", "Value"],
        ["Reflexion factor", 2],
        ["TDD duty", "lots"],
        ["Reflection factor", "1,234"],
    ]
    tender = _tender(tmp_path, ["1", "Gain ≥ 17 dBi", "M"], Settings=sheet)
    assert "not known" in _troubles(tender, "A2")[0]
    assert "expected a number" in _troubles(tender, "B3")[0]
    assert "reads one way" in _troubles(tender, "B4")[0]
    assert tender.settings.tdd_duty == 1.0


def test_a_bid_given_as_tender_is_refused_by_name(tmp_path: Path) -> None:
    path = write_tender(tmp_path / "bid.xlsx", [["Panel", "Gain (dBi)"], ["Aster 8", 17]])
    with pytest.raises(UnusableInputError, match=r"no heading row.*Clause, Wording"):
        read_tender(path)
    book = load_workbook(path)
    book["Requirements"].title = "Panels"
    book.save(path)
    with pytest.raises(UnusableInputError, match=r"no sheet 'Requirements'.*'Panels'.*not a bid"):
        read_tender(path)


def test_group_labels_are_listed_and_not_judged(tmp_path: Path) -> None:
    tender = _tender(tmp_path, [None, "Electrical"], ["1", "Gain ≥ 17 dBi", "M"], ["2", None, None])
    assert len(tender.requirements) == 1
    assert any(u.text == "Electrical" for u in tender.unread)


def test_a_weight_that_is_no_number_and_a_missing_evaluation_date_are_named(tmp_path: Path) -> None:
    row = ["1", "Weight ≤ 20 kg", "D", None, None, None, None, None, None, "heavy", "yes"]
    deviation = ["1", "bid5", "light mast", "head of planning", "2099-12-31"]
    head = ["Clause", "Bidder or panel", "Reason", "Approver", "Expiry"]
    tender = _tender(tmp_path, row, Deviations=[head, deviation])
    assert any("'heavy' as weight" in text for text in _troubles(tender, "J2"))
    assert any("no Evaluation date" in text for text in _troubles(tender, "A2"))


@pytest.mark.parametrize("stated", [True, False])
def test_the_evaluation_date_decides_and_then_source_date_epoch(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, *, stated: bool
) -> None:
    """1 900 000 000 s of POSIX time is 17 March 2030; the deviation expired between the two dates."""
    monkeypatch.setenv("SOURCE_DATE_EPOCH", "1900000000")
    head = ["Clause", "Bidder or panel", "Reason", "Approver", "Expiry"]
    sheets = {"Deviations": [head, ["1", "bid5", "light mast", "head of planning", "2029-12-31"]]}
    if stated:
        sheets["Settings"] = [["Setting", "Value"], ["Evaluation date", "2029-06-01"]]
    tender = _tender(tmp_path, ["1", "Weight ≤ 20 kg", "M"], **sheets)
    said = [text for text in _troubles(tender, "A2") if "2030-03-17, the day of SOURCE_DATE_EPOCH" in text]
    assert tender.settings.today == ("2029-06-01" if stated else "2030-03-17")
    assert any("expired on 2029-12-31" in text for text in _troubles(tender, "A2")) is not stated
    assert bool(said) is not stated


def test_a_tender_given_as_bid_is_refused_by_name(tmp_path: Path) -> None:
    sheets = {"Settings": [["Setting", "Value"]]}
    path = write_tender(tmp_path / "tender.xlsx", [HEAD, ["1", "Gain ≥ 17 dBi", "M"]], **sheets)
    with pytest.raises(
        UnusableInputError, match=r"'Requirements', cell B1: found a tender workbook.*--tender"
    ):
        read_submission(path)


def test_a_size_in_the_value_column_gives_three_limits(tmp_path: Path) -> None:
    row = ["1", None, "M", "Dimensions", "≤", "2000 x 450 x 220", "mm"]
    demands = [(r.parameter, r.operator, r.limit, r.unit) for r in _tender(tmp_path, row).requirements]
    assert demands == [("height", "≤", 2000, "mm"), ("width", "≤", 450, "mm"), ("depth", "≤", 220, "mm")]
