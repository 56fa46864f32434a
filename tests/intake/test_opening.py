"""Opening against openpyxl as the outside reader, and text files in the encodings bidders use."""

from __future__ import annotations

import datetime
from pathlib import Path

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st
from openpyxl import Workbook, load_workbook
from openpyxl.cell.cell import ILLEGAL_CHARACTERS_RE

from speccheck.intake.files.grid import Cell, text_of
from speccheck.intake.files.opening import open_book

EARLIEST = datetime.datetime.fromisoformat("1990-01-01")
LATEST = datetime.datetime.fromisoformat("2040-01-01")
CELLS = st.one_of(
    st.text(max_size=30).filter(lambda t: not ILLEGAL_CHARACTERS_RE.search(t) and "\r" not in t),
    st.floats(allow_nan=False, allow_infinity=False, width=32),
    st.integers(-(10**9), 10**9),
    st.booleans(),
    st.datetimes(min_value=EARLIEST, max_value=LATEST).map(lambda d: d.replace(microsecond=0)),
    st.none(),
)


def cells_of(path: Path) -> dict[str, Cell]:
    return {cell.address: cell for grid in open_book(path).grids for cell in grid.cells.values()}


@given(rows=st.lists(st.lists(CELLS, max_size=6), min_size=1, max_size=8))
@settings(max_examples=60, deadline=None, suppress_health_check=[HealthCheck.function_scoped_fixture])
def test_same_values_as_openpyxl(tmp_path: Path, rows: list[list[object]]) -> None:
    """Outside reader: openpyxl 3.1."""
    path = tmp_path / "any.xlsx"
    book = Workbook()
    book.active.append(["anchor"])
    for row in rows:
        book.active.append([f" {v}" if isinstance(v, str) and v.startswith("=") else v for v in row])
    book.save(path)
    mine = cells_of(path)
    theirs = {
        cell.coordinate: cell.value
        for row in load_workbook(path).active.iter_rows()
        for cell in row
        if cell.value is not None and (not isinstance(cell.value, str) or cell.value.strip())
    }
    assert set(mine) == set(theirs)
    for address, value in theirs.items():
        if isinstance(value, float):
            assert mine[address].raw == pytest.approx(value, rel=1e-12)
        elif isinstance(value, datetime.datetime):
            assert abs(mine[address].raw - value) < datetime.timedelta(seconds=1)  # type: ignore[operator]
        else:
            assert mine[address].raw == value


def test_formulas_with_and_without_stored_result(tmp_path: Path) -> None:
    path = tmp_path / "formula.xlsx"
    book = Workbook()
    book.active.append(["Gain", "=17+0.5"])
    book.save(path)
    cell = cells_of(path)["B1"]
    assert cell.raw is None
    assert cell.formula == "=17+0.5"
    assert "without a stored result" in cell.fault


def test_hidden_rows_columns_and_sheets_are_apart(tmp_path: Path) -> None:
    path = tmp_path / "hidden.xlsx"
    book = Workbook()
    sheet = book.active
    for _ in range(3):
        sheet.append(["a", "b", "c"])
    sheet.row_dimensions[2].hidden = True
    sheet.column_dimensions["C"].hidden = True
    book.create_sheet("Old").append(["x"])
    book["Old"].sheet_state = "hidden"
    book.save(path)
    grids = open_book(path).grids
    assert sorted(c.address for c in grids[0].cells.values()) == ["A1", "A3", "B1", "B3"]
    assert len(grids[0].hidden_cells) == 5
    assert grids[1].hidden


@pytest.mark.parametrize(
    "encoding", ["utf-8", "utf-8-sig", "utf-16", "utf-16-le", "utf-16-be", "cp1252", "latin-1"]
)
@pytest.mark.parametrize("delimiter", [",", ";", "\t"])
def test_text_files(tmp_path: Path, encoding: str, delimiter: str) -> None:
    path = tmp_path / "bid.csv"
    rows = [["Höhe", "1998 mm"], ["Gewinn", '"17.5 ± 0.5 dBi"'], ["Abstand", '"0.65 a, b; c"']]
    path.write_bytes("\r\n".join(delimiter.join(row) for row in rows).encode(encoding))
    found = cells_of(path)
    assert found["A1"].text == "Höhe"
    assert found["B1"].text == "1998 mm"
    assert found["B2"].text == "17.5 ± 0.5 dBi"


def test_decimal_commas_do_not_cut_a_semicolon_file(tmp_path: Path) -> None:
    path = tmp_path / "bid.csv"
    path.write_text("Gewinn;17,5;18,1\nVSWR;1,5;1,4\n", encoding="utf-8")
    assert cells_of(path)["B1"].text == "17,5"


@pytest.mark.parametrize(
    ("raw", "text"), [(17.0, "17"), (17.5, "17.5"), (True, "TRUE"), (None, ""), ("x", "x")]
)
def test_text_of(raw: str | float | None, text: str) -> None:
    assert text_of(raw) == text
