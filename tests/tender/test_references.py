"""Rows that lean on a panel of another sheet or on a condition, from the workbook to the verdict."""

from __future__ import annotations

from pathlib import Path
from typing import Any

import pytest

from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records import Requirement, Tender
from speccheck.tender.judging import judge
from tender.books import write_tender
from tender.panels import panel, says

HEAD = ["Clause", "Wording", "Level"]
BAND = (1710.0, 2690.0)
ANNEX = [
    ["Panel", "Frequency range [MHz]", "Gain [dBi]", "Horizontal beamwidth [°]", "VSWR", "Height [mm]",
     "Weight [kg]"],
    ["Fern 4", "1710-2690", 17.5, "65 ± 5", 1.5, 1500, 22],
]  # fmt: skip


def _tender(tmp_path: Path, *rows: list[Any], **sheets: Any) -> Tender:
    return read_tender(write_tender(tmp_path / "tender.xlsx", [HEAD, *rows], **sheets))


def _by_parameter(tender: Tender) -> dict[str, Requirement]:
    return {r.parameter: r for r in tender.requirements}


def test_a_baseline_demands_each_figure_of_its_sheet_by_its_own_direction(tmp_path: Path) -> None:
    """More gain and less mismatch, size and weight are better; a beamwidth has no 'better'."""
    asked = _by_parameter(
        _tender(tmp_path, ["1", "Same or better than the panel in Annex 3", "M"], **{"Annex 3": ANNEX})
    )
    assert (asked["gain"].operator, asked["gain"].limit, asked["gain"].bands) == ("≥", 17.5, (BAND,))
    assert (asked["vswr"].operator, asked["vswr"].limit) == ("≤", 1.5)
    assert (asked["weight"].operator, asked["weight"].limit) == ("≤", 22.0)
    assert asked["frequency_range"].operator == "contains"
    assert asked["horizontal_beamwidth"].operator == "baseline"
    assert "Annex 3!C2" in asked["gain"].scope


@pytest.mark.parametrize(("gain", "verdict"), [(17.6, "meets"), (17.5, "meets"), (17.0, "fails")])
def test_an_offer_is_held_against_the_baseline(tmp_path: Path, gain: float, verdict: str) -> None:
    tender = _tender(tmp_path, ["1", "Same or better than the panel in Annex 3", "M"], **{"Annex 3": ANNEX})
    said = (says("operating_bands", BAND, band=BAND), says("gain", gain, band=BAND))
    rows = {row.requirement.parameter: row for row in judge(tender, panel(*said), ())}
    assert rows["gain"].verdict.value == verdict
    assert rows["horizontal_beamwidth"].verdict.value == "not judged"


def test_a_baseline_without_its_sheet_stays_a_question_to_the_buyer(tmp_path: Path) -> None:
    tender = _tender(tmp_path, ["1", "Same or better than the panel in Annex 4", "M"], **{"Annex 3": ANNEX})
    assert [r.operator for r in tender.requirements] == ["baseline"]
    assert [row.verdict.value for row in judge(tender, panel(says("gain", 18.0)), ())] == ["not judged"]


@pytest.mark.parametrize(
    ("ports", "weight", "verdict", "said"),
    [
        (12, 44.0, "meets", "holds"),
        (12, 46.0, "fails", "holds"),
        (8, 46.0, "meets", "demands nothing"),
        (None, 46.0, "not judged", "cannot be told"),
    ],
)
def test_a_condition_is_evaluated_first(
    tmp_path: Path, ports: int | None, weight: float, verdict: str, said: str
) -> None:
    tender = _tender(tmp_path, ["1", "If more than 8 ports, weight shall not exceed 45 kg", "M"])
    offer = [says("weight", weight)] + ([says("rf_ports", float(ports))] if ports else [])
    (row,) = judge(tender, panel(*offer), ())
    assert row.verdict.value == verdict
    assert said in row.note


@pytest.mark.parametrize(("ports", "said"), [(10, "holds"), (8, "does not hold")])
def test_a_permission_says_whether_its_condition_holds(tmp_path: Path, ports: int, said: str) -> None:
    tender = _tender(tmp_path, ["1", "If more than 8 ports, cluster connectors are accepted", "D"])
    (row,) = judge(tender, panel(says("rf_ports", float(ports))), ())
    assert row.verdict.value == "not judged"
    assert f") {said};" in row.note
