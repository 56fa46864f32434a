"""What `speccheck read TENDER.xlsx` shows: each wording beside its reading, doubts, and what to put right."""

from __future__ import annotations

from pathlib import Path

from speccheck.intake.tenders.tender_book import read_tender
from speccheck.report.screens.tender_listing import tender_listing
from speccheck.tender.vetting import vetted
from tender.books import write_tender

ROWS = [
    ["Clause", "Wording", "Level", "Confirmed"],
    ["1", "Gain shall be at least 17 dBi in the frobnicated state", "M", "yes"],
    ["2", "VSWR not less than 1.3", "M", ""],
    ["3", "All values guaranteed, over temperature, all ports", "I", ""],
    ["4", "Control per AISG v2.0; v3.0 should be supported", "M", "yes"],
    ["5", "x" * 500, "D", ""],
]


def test_wording_stands_beside_reading_and_nothing_is_dropped(tmp_path: Path) -> None:
    text = tender_listing(vetted(read_tender(write_tender(tmp_path / "t.xlsx", ROWS))))
    shown = ("Requirements!B2", "frobnicated state", "≥ 17 dBi", "CLASH", "rule for other rows", "AISG v3.0")
    for said in (*shown, "NOT CONFIRMED"):
        assert said in text, said
    assert max(map(len, text.splitlines())) <= 100


def test_a_direction_mark_in_a_wording_is_made_harmless(tmp_path: Path) -> None:
    rows = [ROWS[0], ["1", "Gain \u202e≥ 17 dBi", "M", "yes"]]
    assert "\u202e" not in tender_listing(read_tender(write_tender(tmp_path / "t.xlsx", rows)))
