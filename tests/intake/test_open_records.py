"""Records filled while open are the frozen ones, field by field."""

from __future__ import annotations

from dataclasses import FrozenInstanceError, fields
from pathlib import Path

import pytest

from speccheck.intake import read_submission
from speccheck.intake.panels.open_records import cell_ref, mirror_cell
from speccheck.records import CellRef, MirrorCell, Reading


def test_a_closed_record_is_the_record() -> None:
    assert cell_ref("bid.xlsx", "Data", "B2") == CellRef("bid.xlsx", "Data", "B2")
    assert hash(cell_ref("bid.xlsx", "Data", "B2")) == hash(CellRef("bid.xlsx", "Data", "B2"))
    assert mirror_cell("B2", 18.1, "18.1", "=A1") == MirrorCell("B2", 18.1, "=A1")
    assert mirror_cell("B2", True, "TRUE", "").value == "TRUE"


def test_a_closed_record_is_frozen() -> None:
    with pytest.raises(FrozenInstanceError):
        cell_ref("bid.xlsx", "Data", "B2").cell = "B3"  # type: ignore[misc]


def test_every_field_of_a_reading_is_filled(tmp_path: Path) -> None:
    path = tmp_path / "bid.csv"
    path.write_text("Parameter,Unit,Value\nFrequency range,MHz,1710-2170\nGain,dBi,18.1\nWeight,kg,10.4\n")
    readings = read_submission(path).panels[0].readings
    assert len(readings) == 4  # the range is the panel's and its band's
    for reading in readings:
        copy = Reading(**{field.name: getattr(reading, field.name) for field in fields(Reading)})
        assert type(reading) is Reading and copy == reading
