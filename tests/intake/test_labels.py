"""Type designations are answers, not headings (common practice: bidders' models are letters and figures)."""

from __future__ import annotations

import pytest

from speccheck.intake.tables.labels import Labels

_BEGINNINGS = (
    "BR",
    "AP",
    "ALT",
    "HB",
    "EL",
    "AZ",
    "IM",
    "XP",
    "FB",
    "RET",
    "TRX",
    "PIM",
    "TILT",
    "RL",
    "H",
    "W",
)


@pytest.mark.parametrize("ending", ["-0012", "-65", "65-18", " 6518", "-2X65"])
def test_a_model_code_is_no_heading(ending: str) -> None:
    labels = Labels({})
    assert [code for b in _BEGINNINGS if labels.of(code := b + ending)] == []
