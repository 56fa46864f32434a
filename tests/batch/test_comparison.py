"""The comparison of offers as page, workbook and JSON: counts, links, and what very many offers leave out."""

from __future__ import annotations

import io
import json
from pathlib import Path

import pytest
from openpyxl import load_workbook

from batch.evaluation import POINTS, REJECTED, write_evaluation
from speccheck.batch import assess_many, evaluate
from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records import CellRef, Compliance, Level, Outcome, Requirement, Settings, Tender
from speccheck.records.evaluations import Bid, Evaluation, Offer, OfferCell
from speccheck.report.offers.comparison import comparison_json, render_comparison
from speccheck.report.offers.comparison_book import comparison_bytes
from speccheck.report.offers.comparison_view import MOST_COLUMNS, compare

GAIN = Requirement(
    where=CellRef("tender.xlsx", "Requirements", "B2"),
    clause="1",
    wording="Gain at least 17 dBi",
    level=Level.DESIRABLE,
    parameter="gain",
    operator="≥",
    limit=17.0,
    unit="dBi",
    confirmed=True,
)


def _bid(name: str, gain: float, *, folder: str = "", outcome: Outcome = Outcome.ACCEPTABLE) -> Bid:
    verdict = Compliance.MEETS if gain >= 17 else Compliance.FAILS
    cell = OfferCell(requirement=0, verdict=verdict, offered=gain, raw=f"{gain}", margin=gain - 17)
    offer = Offer(file=f"{name}.xlsx", panel=name, outcome=outcome, cells=(cell,))
    outputs = (f"{name}.report.html",)
    return Bid(
        path=f"{name}.xlsx", file=f"{name}.xlsx", folder=folder, sha256="0", offers=(offer,), outputs=outputs
    )


def _evaluation(*bids: Bid) -> Evaluation:
    tender = Tender(file="tender.xlsx", sha256="0", requirements=(GAIN,))
    return evaluate(bids, tender, Settings())


@pytest.fixture(scope="module")
def page(tmp_path_factory: pytest.TempPathFactory) -> str:
    folder = tmp_path_factory.mktemp("comparison")
    tender, bids = write_evaluation(folder)
    assess_many([bids], out=folder / "out", tender=read_tender(tender), formats=("html",))
    return (folder / "out" / "comparison.html").read_text(encoding="utf-8")


def test_the_sentence_counts_files_with_and_without_offers_apart(page: str) -> None:
    """Nine files of evaluation.py: eight with nine offers, and a damaged one."""
    assert "9 offers from 8 files: " in page
    assert f" {len(REJECTED)} reject; 1 more file could not be used." in page


def test_points_of_every_desirable_row_stand_on_the_page(page: str) -> None:
    table = page[page.index("Points by desirable row") :]
    assert all(f"{points:g}</strong>" in table for points in POINTS.values())


def test_offers_lead_to_their_reports_and_no_name_is_taken_for_an_address() -> None:
    view = compare(_evaluation(_bid("javascript:alert(1)", 17.5), _bid("b", 16.0, folder="north__b_xlsx")))
    page = render_comparison(view, linked=True)
    assert 'href="./javascript%3Aalert%281%29.report.html"' in page
    assert 'href="./north__b_xlsx/b.report.html"' in page
    assert "b.xlsx (north__b_xlsx)" in page
    assert 'href="./' not in render_comparison(view)


def test_very_many_offers_are_all_listed_and_the_best_are_shown() -> None:
    """A page for a board; the workbook and the JSON leave nothing out."""
    many = [_bid(f"R{n}", 16.0, outcome=Outcome.REJECT) for n in range(MOST_COLUMNS)]
    view = compare(_evaluation(*many, *(_bid(f"G{n}", 17.0 + n) for n in range(5))))
    assert [column.name for column in view.shown[:5]] == [f"G{n}" for n in range(5)]
    assert view.hidden_columns == 5
    page = render_comparison(view)
    assert all(f"{bid.offers[0].panel}<br>" in page for bid in view.evaluation.bids)
    document = json.loads("".join(comparison_json(view.evaluation)))
    assert len(document["bids"]) == MOST_COLUMNS + 5
    rows = load_workbook(io.BytesIO(comparison_bytes(view)))["Rows"]
    assert rows.max_row == 1 + MOST_COLUMNS + 5


def test_tables_of_offers_are_about_equally_wide() -> None:
    view = compare(_evaluation(*(_bid(f"G{n}", 17.0) for n in range(6))))
    assert [len(group) for group in view.groups(5)] == [3, 3]
    assert [len(group) for group in compare(_evaluation()).groups(5)] == []


def test_outputs_of_bids_of_one_name_are_told_apart(tmp_path: Path) -> None:
    _, bids = write_evaluation(tmp_path)
    for folder in ("north", "south"):
        (bids / folder).mkdir()
        (bids / folder / "alder.xlsx").write_bytes((bids / "alder.xlsx").read_bytes())
    done = assess_many([bids / "north", bids / "south"], out=tmp_path / "out", formats=("json",))
    assert [bid.label for bid in done.bids] == [
        "alder.xlsx (north__alder_xlsx)",
        "alder.xlsx (south__alder_xlsx)",
    ]
