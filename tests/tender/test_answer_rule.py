"""Answers in words where the tender lists the answers it allows."""

from __future__ import annotations

from typing import Any

import pytest

from speccheck.records import Status
from speccheck.tender.judging import judge
from tender.panels import answers, demand, panel, says, tender

ANSWERS = demand("", "rule", "answers allowed", "", clause="9", scope="Meets / Does not meet / Exceeds")


@pytest.mark.parametrize(
    ("said", "verdict"),
    [
        (answers("gain", "Meets", Status.DECLARED), "declared only"),
        (answers("gain", "Exceeds.", Status.DECLARED), "declared only"),
        (answers("gain", "does not meet", Status.DECLARED), "fails"),
        (answers("gain", "noted", Status.DECLARED), "fails"),
        (answers("gain", "-", Status.MISSING), "fails"),
        (says("gain", 17.5, "17.5"), "meets"),
        (says("vswr", 1.5, "1.5"), "not stated"),
    ],
)
def test_answers_outside_the_tenders_list_count_as_does_not_meet(said: Any, verdict: str) -> None:
    """Only where the tender has such a rule; a figure stays a figure (phrase 55)."""
    rows = judge(tender(ANSWERS, demand("gain", "≥", 17.0)), panel(said), ())
    assert [row.verdict.value for row in rows] == [verdict]
