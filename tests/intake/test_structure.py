"""Which cells are headings, bands, names, titles and groups: each read as a competent engineer reads it."""

from __future__ import annotations

from pathlib import Path

import pytest
from intake.sheets import lines, read, save
from intake.structures_across import ACROSS
from intake.structures_down import DOWN

from speccheck.intake.submission import read_account

_ = None
STRUCTURES = ACROSS | DOWN


@pytest.mark.parametrize("name", STRUCTURES)
def test_structures(name: str, tmp_path: Path) -> None:
    rows, merges, expected = STRUCTURES[name]
    found = lines(read(tmp_path, rows, merges))
    assert sorted(found) == sorted(line.strip() for line in expected.splitlines())


def test_one_panel_in_electrical_and_mechanical_sheets(tmp_path: Path) -> None:
    electrical = [["Model", "Gain (dBi)", "VSWR"], ["VD-1", 15, 1.5], ["VD-2", 16, 1.5]]
    mechanical = [["Model", "Height (mm)", "Weight (kg)"], ["VD-2", 1500, 13], ["VD-1", 1300, 12]]
    account = read_account(save(tmp_path / "bid.xlsx", {"694-960 MHz": electrical, "Mechanics": mechanical}))
    assert lines(account) == [
        "VD-1: B2 gain 15 dBi @694-960",
        "VD-1: C2 vswr 1.5 @694-960",
        "VD-1: B3 height 1.3 m",
        "VD-1: C3 weight 12 kg",
        "VD-2: B3 gain 16 dBi @694-960",
        "VD-2: C3 vswr 1.5 @694-960",
        "VD-2: B2 height 1.5 m",
        "VD-2: C2 weight 13 kg",
    ]


def test_a_tilt_over_a_column_is_the_tilt_of_its_figures(tmp_path: Path) -> None:
    rows = [["Panel KD-20"], ["Parameter", "Tilt 0°", "Tilt 10°"], ["Gain (dBi)", 15, 14.7]]
    (panel,) = read(tmp_path, rows).submission.panels
    assert [dict(reading.at) for reading in panel.readings] == [{"tilt_deg": 0.0}, {"tilt_deg": 10.0}]


def test_figures_of_an_earlier_year_or_issue_are_listed_not_read(tmp_path: Path) -> None:
    across = [["Type", "Gain 2025 (dBi)", "Gain (dBi)", "VSWR"], ["KD-1", 15, 16, 1.5]]
    down = [["Parameter", "Value 2025", "Value 2026"], ["Gain (dBi)", 15, 16]]
    account = read_account(save(tmp_path / "bid.xlsx", {"KD-1": across, "KD-2": down}))
    assert lines(account) == ["KD-1: C2 gain 16 dBi", "KD-1: D2 vswr 1.5", "KD-2: C2 gain 16 dBi"]
    assert [item.where.cell for item in account.submission.unread] == ["B1", "B2"]


def test_a_figure_beside_a_label_in_no_table_is_listed(tmp_path: Path) -> None:
    rows = [["Model", "Gain (dBi)", "VSWR"], ["KD-1", 15, 1.5], [], [_, "", "", "Weight", "Height", "12 kg"]]
    account = read(tmp_path, rows)
    figures = {reading.where.cell for panel in account.submission.panels for reading in panel.readings}
    assert "F4" in figures | {item.where.cell for item in account.submission.unread}


@pytest.mark.parametrize("name", STRUCTURES)
def test_every_filled_cell_has_a_role(name: str, tmp_path: Path) -> None:
    rows, merges, _expected = STRUCTURES[name]
    account = read(tmp_path, rows, merges)
    filled = sum(len(sheet.cells) for sheet in account.submission.mirror)
    assert len(account.roles) == filled
