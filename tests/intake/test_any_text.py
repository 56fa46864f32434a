"""Whatever stands in a sheet, the reader answers: readings, or one message; never a crash, nothing lost."""

from __future__ import annotations

from pathlib import Path

from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st
from intake.sheets import read
from openpyxl.cell.cell import ILLEGAL_CHARACTERS_RE

from speccheck.errors import UnusableInputError
from speccheck.report.screens.listing import WIDTH, listing

TRADE = st.sampled_from(
    [
        "Gain",
        "VSWR",
        "Parameter",
        "Unit",
        "dBi",
        "Model",
        "Type",
        "Band",
        "Low band",
        "n78",
        "1710-2690 MHz",
        "698-960",
        "Gain: 17 dBi",
        "Offered",
        "Required",
        "Comply",
        "H x W x D",
        "1300 x 160 x 90",
        "HPBW",
        "H",
        "V",
        "W",
        "D",
        "Typ",
        "min",
        "max",
        "Frequency range",
        "Frequency range 1695 – 2690",
        "±0.5",
        "Tolerance on gain",
        "Weight",
        "kg",
        "λ",
        "0.65 λ",
        "1,234",
        "17.5 1)",
        "1) note",
        "* see",
        "–",
        "n/a",
        "TBD",
        "4.3-10",
        "2 x 7-16",
        "Panel AA-10",
        "16.2 / 16.8",
        "Gain at tilt 0°/5°",
        "Remarks",
        "comply",
        "°",
        "Horizontal",
        "vertical",
        "Band 1: 1695-1880 MHz",
        "(1710-1880)",
        ":",
        "=",
        ";",
    ]
)
ANY = st.one_of(
    TRADE,
    TRADE,
    st.text(max_size=40).filter(lambda text: not ILLEGAL_CHARACTERS_RE.search(text)),
    st.floats(allow_nan=False, allow_infinity=False),
    st.integers(-(10**12), 10**12),
    st.booleans(),
    st.none(),
)
ROWS = st.lists(st.lists(ANY, max_size=7), min_size=1, max_size=12)
SPANS = st.lists(
    st.tuples(st.integers(1, 5), st.integers(1, 10), st.integers(0, 3), st.integers(0, 4)), max_size=2
)


def merged(spans: list[tuple[int, int, int, int]]) -> list[str]:
    return [f"{chr(64 + c)}{r}:{chr(64 + c + w)}{r + h}" for c, r, w, h in spans[:1]]


@given(rows=ROWS, spans=SPANS)
@settings(max_examples=150, deadline=None, suppress_health_check=list(HealthCheck))
def test_any_cells_are_read_or_refused(
    tmp_path: Path, rows: list[list[object]], spans: list[tuple[int, int, int, int]]
) -> None:
    try:
        account = read(tmp_path, rows, merged(spans))
    except UnusableInputError as error:
        assert str(error).startswith("bid.xlsx")
        return
    filled = [cell.cell for sheet in account.submission.mirror for cell in sheet.cells]
    assert len(account.roles) == len(filled)
    assert all(len(text) <= WIDTH for text in listing(account.submission).splitlines())


@given(text=st.text(max_size=200).filter(lambda text: not ILLEGAL_CHARACTERS_RE.search(text)))
@settings(max_examples=150, deadline=None, suppress_health_check=list(HealthCheck))
def test_any_text_beside_a_heading(tmp_path: Path, text: str) -> None:
    """A hostile value never hides the figures around it."""
    value = f" {text}" if text.startswith("=") else text
    account = read(tmp_path, [["Parameter", "Value"], ["Gain", value], ["VSWR", "1.4"], ["Weight", "12 kg"]])
    found = {
        r.parameter: r.value
        for panel in account.submission.panels
        for r in panel.readings
        if r.where.cell != "B2"
    }
    assert found == {"vswr": 1.4, "weight": 12.0}
