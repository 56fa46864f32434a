"""The exposure box on paper: distances, assumptions and cautions stand on one page, whatever the bands."""

from __future__ import annotations

import io
import re
from dataclasses import replace
from pathlib import Path

import pypdf
import pytest
from benchmarks.heavy_bids import write_bid

from speccheck.checks import exposure_note
from speccheck.intake.submission import read_submission
from speccheck.records import Assessment, Outcome, PanelAssessment, Settings
from speccheck.report.pages.exposure_lines import merged_by_band, note_parts
from speccheck.report.pages.html import render_html
from speccheck.report.pages.pdf import pdf_bytes


def squeezed(text: str) -> str:
    """Text without spaces, line ends and kinds of dashes."""
    return re.sub(r"[−–]", "-", re.sub(r"\s", "", text))


def note_only(path: Path, bands: int, paper: str) -> Assessment:
    """A bid of so many bands, with nothing but its exposure note to print."""
    submission = read_submission(write_bid(path / "bid.xlsx", bands=bands))
    (panel,) = submission.panels
    settings = Settings(paper=paper)
    judged = PanelAssessment(
        panel=panel, outcome=Outcome.ACCEPTABLE, findings=(), exposure=exposure_note(panel, settings)
    )
    bare = replace(submission, panels=(), notices=(), unread=())
    return Assessment(submission=bare, settings=settings, panels=(judged,), program_version="0.1.0")


@pytest.mark.parametrize(("bands", "paper"), [(1, "A4"), (2, "A4"), (6, "A4"), (2, "Letter"), (6, "Letter")])
def test_the_whole_box_stands_on_one_page(bands: int, paper: str, tmp_path: Path) -> None:
    assessment = note_only(tmp_path, bands, paper)
    note = assessment.panels[0].exposure
    assert note is not None
    assert note.complete
    pages = pypdf.PdfReader(io.BytesIO(pdf_bytes(render_html(assessment)))).pages
    texts = [squeezed(page.extract_text()) for page in pages]
    for title in ("Calculated compliance distance", "Calculated reach around the panel"):
        (page,) = [text for text in texts if squeezed(title) + "(desk" in text]
        box = page[page.index(squeezed(title) + "(desk") :]
        words = [*note.cautions, *merged_by_band(note.assumptions)]
        assert [text for text in words if squeezed(text) not in box] == []
    (page,) = [text for text in texts if squeezed("Calculated compliance distance (desk") in text]
    distances = [f"{row.distance_m:.1f}m" for row in note.rows]
    assert [text for text in (*distances, *map(squeezed, note.validity)) if text not in page] == []


@pytest.mark.parametrize(("bands", "paper"), [(7, "A4"), (8, "A4"), (8, "Letter")])
def test_more_bands_than_a_page_holds_make_two_boxes_with_all_cautions_each(
    bands: int, paper: str, tmp_path: Path
) -> None:
    assessment = note_only(tmp_path, bands, paper)
    note = assessment.panels[0].exposure
    assert note is not None
    pages = pypdf.PdfReader(io.BytesIO(pdf_bytes(render_html(assessment)))).pages
    texts = [squeezed(page.extract_text()) for page in pages]
    words = [squeezed(text) for text in (*note.cautions, *merged_by_band(note.assumptions))]
    for title in ("Calculated compliance distance", "Calculated reach around the panel"):
        boxes = [text for text in texts if squeezed(title) + "(desk" in text]
        assert len(boxes) == 2
        assert [(n, text) for n, box in enumerate(boxes) for text in words if text not in box] == []
        edges = [f"{low:g}-{high:g}" for low, high in assessment.panels[0].panel.bands]
        tables = [box.partition("Assumptions")[0] for box in boxes]
        assert [edge for edge in edges if not any(edge in table for table in tables)] == []


def test_parts_of_a_note_lose_no_row_and_share_the_sum_of_all_bands(tmp_path: Path) -> None:
    note = note_only(tmp_path, 8, "A4").panels[0].exposure
    assert note is not None
    parts = note_parts(note)
    together = [row for row in note.rows if row.band is None]
    assert together
    assert all([row for row in part.rows if row.band is None] == together for part in parts)
    assert {row for part in parts for row in part.rows} == set(note.rows)
    assert [zone for part in parts for zone in part.around] == list(note.around)
    assert all(part.cautions == note.cautions for part in parts)


def test_figures_of_several_bands_make_one_sentence_and_none_is_lost() -> None:
    said = (
        "Power of 617–698 MHz: 500 W as stated (Panel!B20).",
        "Gain of 617–698 MHz: highest stated, 13.2 dBi (Panel!B8); no loss taken off.",
        "Power of 694–960 MHz: 400 W as stated (Panel!C20).",
        "Gain of 694–960 MHz: highest stated, 14.1 dBi (Panel!C8); no loss taken off.",
        "Nothing was measured.",
    )
    assert merged_by_band(said) == (
        "Power: 617–698 MHz 500 W as stated (Panel!B20); 694–960 MHz 400 W as stated (C20).",
        "Gain: 617–698 MHz highest stated, 13.2 dBi (Panel!B8); "
        "694–960 MHz highest stated, 14.1 dBi (C8); no loss taken off.",
        "Nothing was measured.",
    )


def test_cells_of_two_sheets_keep_their_sheets() -> None:
    said = ("Power of 1–2 MHz: 5 W (Low!B2).", "Power of 3–4 MHz: 6 W (High!B2).")
    assert merged_by_band(said) == ("Power: 1–2 MHz 5 W (Low!B2); 3–4 MHz 6 W (High!B2).",)
