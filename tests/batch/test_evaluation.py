"""A whole evaluation against the matrix written by hand in evaluation.py."""

from __future__ import annotations

import json
from pathlib import Path

import pytest
from openpyxl import load_workbook

from batch.evaluation import MATRIX, POINTS, REJECTED, WORDS, write_evaluation
from speccheck.batch import Evaluation, assess_many
from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records import Outcome


@pytest.fixture(scope="module")
def done(tmp_path_factory: pytest.TempPathFactory) -> tuple[Evaluation, Path]:
    folder = tmp_path_factory.mktemp("evaluation")
    tender, bids = write_evaluation(folder)
    rules = read_tender(tender)
    return assess_many(
        [bids], out=folder / "out", tender=rules, formats=("html", "xlsx", "json")
    ), folder / "out"


def _offers(evaluation: Evaluation) -> dict[str, dict[int, list[str]]]:
    found: dict[str, dict[int, list[str]]] = {}
    for bid in evaluation.bids:
        for offer in bid.offers:
            rows = found.setdefault(offer.panel, {})
            for cell in offer.cells:
                rows.setdefault(cell.requirement, []).append(cell.verdict.value)
    return found


@pytest.mark.parametrize("panel", list(MATRIX))
def test_verdicts_are_those_of_the_hand_made_matrix(done: tuple[Evaluation, Path], panel: str) -> None:
    rows = _offers(done[0])[panel]
    assert [rows[i] for i in sorted(rows)] == [[WORDS[letter]] for letter in MATRIX[panel].split()]


def test_only_failed_mandatory_rows_reject(done: tuple[Evaluation, Path]) -> None:
    outcomes = {o.panel: o.outcome for bid in done[0].bids for o in bid.offers}
    assert {panel for panel, outcome in outcomes.items() if outcome is Outcome.REJECT} == REJECTED


def test_points_place_and_weight_at_par(done: tuple[Evaluation, Path]) -> None:
    """Alder leads Elm by the 5 points of E11 alone: only at weight 0 of E11 do they draw level."""
    evaluation, _ = done
    names = [evaluation.bids[s.bid].offers[s.offer].panel for s in evaluation.standings]
    assert dict(zip(names, (s.points for s in evaluation.standings), strict=True)) == POINTS
    assert [s.place for s in evaluation.standings] == [1, 2, 3]
    first = [s for s in evaluation.swings if s.ahead == 0]
    assert [
        (evaluation.tender.requirements[s.requirement].clause, s.weight, s.weight_at_par) for s in first
    ] == [("E11", 5, 0)]  # type: ignore[union-attr]


def test_a_damaged_bid_is_named_and_stops_nothing(done: tuple[Evaluation, Path]) -> None:
    evaluation, out = done
    (damaged,) = [bid for bid in evaluation.bids if bid.error]
    assert damaged.file == "damaged.xlsx"
    assert "damaged.xlsx" in (out / "comparison.html").read_text(encoding="utf-8")
    assert len(list(out.glob("*.result.json"))) == 8


def test_expired_deviation_is_named_in_the_row_it_no_longer_excuses(done: tuple[Evaluation, Path]) -> None:
    gorse = next(o for bid in done[0].bids for o in bid.offers if o.panel == "Gorse 4")
    assert any("expired on 2026-05-31" in cell.note for cell in gorse.cells)
    fir = next(o for bid in done[0].bids for o in bid.offers if o.panel == "Fir 4")
    assert any(cell.underlying is not None and cell.underlying.value == "fails" for cell in fir.cells)


def test_page_workbook_and_json_agree(done: tuple[Evaluation, Path]) -> None:
    evaluation, out = done
    document = json.loads((out / "comparison.json").read_text(encoding="utf-8"))
    page = (out / "comparison.html").read_text(encoding="utf-8")
    sheet = load_workbook(out / "comparison.xlsx")["Rows"]
    rows = list(sheet.iter_rows(min_row=2, values_only=True))
    cells = [cell for bid in document["bids"] for offer in bid["offers"] for cell in offer["cells"]]
    assert len(rows) == len(cells) == sum(len(text.split()) for text in MATRIX.values())
    assert sorted(row[6] for row in rows) == sorted(cell["verdict"] for cell in cells)
    assert all(panel in page for panel in MATRIX)
    assert evaluation.program_version == document["program"]["version"]


def test_sums_of_the_points_sheet_are_live_and_right(done: tuple[Evaluation, Path]) -> None:
    path = done[1] / "comparison.xlsx"
    stored = list(load_workbook(path, data_only=True)["Points"].iter_rows(values_only=True))
    live = list(load_workbook(path)["Points"].iter_rows(values_only=True))
    assert stored[-1][2:] == (11, *POINTS.values())
    assert str(live[-1][3]).startswith("=SUMPRODUCT(")


def test_same_bids_and_rules_give_the_same_bytes(done: tuple[Evaluation, Path], tmp_path: Path) -> None:
    evaluation, out = done
    bids = Path(evaluation.bids[0].path).parent
    assess_many(
        [bids],
        out=tmp_path,
        tender=read_tender(bids.parent / "tender.xlsx"),
        formats=("html", "xlsx", "json"),
    )
    for name in ("comparison.html", "comparison.xlsx", "comparison.json"):
        assert (tmp_path / name).read_bytes() == (out / name).read_bytes(), name
