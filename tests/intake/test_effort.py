"""The work of reading is bounded, and what would take too long is named; readings are frozen records."""

from __future__ import annotations

import copy
import dataclasses
from pathlib import Path

import pytest
from intake.sheets import read

from speccheck.errors import UnusableInputError
from speccheck.intake.panels import joining, understanding
from speccheck.intake.tables import labels, layout
from speccheck.intake.tables.claims import Draft
from speccheck.records import Band, Reading

TABLE = [["Model", "Gain (dBi)", "VSWR"], ["BR-1", "17.5 ± 0.5", "< 1.5"], ["BR-2", 16, "< 1.5"]]


def test_a_reading_made_by_the_reader_is_the_frozen_record(tmp_path: Path) -> None:
    for reading in read(tmp_path, TABLE).submission.panels[0].readings:
        values = {field.name: getattr(reading, field.name) for field in dataclasses.fields(Reading)}
        assert type(reading) is Reading
        assert reading == Reading(**values) == copy.deepcopy(reading) == dataclasses.replace(reading)
        with pytest.raises(dataclasses.FrozenInstanceError):
            reading.unit = "dBd"  # type: ignore[misc]


def heading_like(count: int) -> list[str]:
    return [f"Gain tolerance horizontal 3rd upper xyz {number}" for number in range(count)]


def test_texts_like_headings_are_looked_up_so_far_and_the_rest_is_named(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    looked_up: list[str] = []
    match = labels.match_heading
    monkeypatch.setattr(labels, "MOST_LETTERS", 2_000)
    monkeypatch.setattr(labels, "match_heading", lambda *a, **k: looked_up.append(a[0]) or match(*a, **k))
    account = read(tmp_path, [*TABLE, [], *([text] for text in heading_like(300))])
    assert any("not looked up as headings" in notice.text for notice in account.submission.notices)
    assert len(set(looked_up)) < 150
    assert len(account.submission.panels) == 2


def test_a_file_of_texts_like_headings_is_refused_and_says_what_was_left(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr(labels, "MOST_LETTERS", 2_000)
    with pytest.raises(UnusableInputError, match=r"2\d\d texts were not looked up as headings"):
        read(tmp_path, [[text] for text in heading_like(300)])


def test_different_cells_are_understood_so_far_and_the_rest_is_listed(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr(understanding, "MOST_LETTERS", 2_000)
    rows = [[f"BR-{number}", f"17.{number} dBi, {text}"] for number, text in enumerate(heading_like(100))]
    submission = read(tmp_path, [TABLE[0][:2], *rows]).submission
    refused = [unread for unread in submission.unread if "letters of different cells" in unread.reason]
    assert len(refused) > 50
    assert len(refused) + sum(len(panel.readings) > 0 for panel in submission.panels) >= 100
    assert all(unread.suggestion == "split the file" for unread in refused)


def test_each_claim_is_marked_once_however_many_tables_a_sheet_holds(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    walked: list[int] = []
    mark = layout.SheetResult.mark_claims

    def counted(result: layout.SheetResult) -> None:
        walked.append(len(result.drafts) - result._walked)
        mark(result)

    monkeypatch.setattr(layout.SheetResult, "mark_claims", counted)
    tables = [
        row for n in range(20) for row in ([f"Type BR-{n}"], ["Gain", "dBi", 17], ["VSWR", "", 1.5], [])
    ]
    account = read(tmp_path, tables)
    assert sum(walked) == sum(len(result.drafts) for result in account.layouts)


def test_what_a_panel_states_is_gathered_once_a_piece(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    gathered: list[int] = []
    stated = joining._stated

    def counted(draft: Draft) -> set[tuple[str, Band | None, str]]:
        gathered.append(sum(len(piece.claims) for piece in draft.pieces()))
        return stated(draft)

    monkeypatch.setattr(joining, "_stated", counted)
    rows = [row for n in range(40) for row in (["Parameter", "Value"], ["Gain", f"{n + 10} dBi"], [])]
    account = read(tmp_path, rows)
    claims = [len(draft.claims) for result in account.layouts for draft in result.drafts]
    assert len(claims) == 40
    assert sum(gathered) == sum(claims)
