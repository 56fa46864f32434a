# ruff: noqa: E501 - bids and matrix are read as tables
"""An invented evaluation: a tender and eight bids, written as workbooks, with the matrix a person would fill in."""

from __future__ import annotations

import json
from pathlib import Path

from openpyxl import Workbook, load_workbook
from tender.books import write_tender

REQUIREMENTS = [
    ["Clause", "Wording", "Level", "Weight", "Confirmed"],
    ["E1", "Operating band between 1710 and 2170 MHz", "M", None, "yes"],
    ["E2", "Gain shall be at least 17 dBi", "M", None, "yes"],
    ["E3", "Horizontal beamwidth 65° ± 6°", "M", None, "yes"],
    ["E4", "Electrical downtilt 2-10°", "M", None, "yes"],
    ["E5", "VSWR ≤ 1.5:1", "M", None, "yes"],
    ["E6", "Isolation > 28 dB", "M", None, "yes"],
    ["E7", "PIM ≤ -150 dBc @ 2×43 dBm", "M", None, "yes"],
    ["E8", "At least 4 ports 4.3-10 female", "M", None, "yes"],
    ["E9", "Weight up to 25 kg", "D", 3, "yes"],
    ["E10", "Wind load ≤ 500 N at 150 km/h frontal", "D", 2, "yes"],
    ["E11", "Gain should be at least 17.5 dBi", "D", 5, "yes"],
    ["E12", "Return loss ≥ 14 dB", "D", 1, None],
]
SETTINGS = [
    ["Setting", "Value", "Unit"],
    ["Tender", "Harbour ring renewal", None],
    ["Guard band: Gain", 0.2, "dB"],
    ["Evaluation date", "2026-06-01", None],
]
DEVIATIONS = [
    ["Clause", "Bidder or panel", "Reason", "Approver", "Expiry"],
    ["E4", "Fir 4", "flat terrain needs no more than 8°", "head of radio planning", "2026-12-31"],
    ["E6", "Gorse 4", "filters give the missing part", "head of radio planning", "2026-05-31"],
]

HEADINGS = [
    "Panel", "Frequency range [MHz]", "Gain [dBi]", "Horizontal beamwidth [°]", "Vertical beamwidth [°]",
    "Electrical tilt [°]", "VSWR", "Isolation [dB]", "PIM [dBc] at 2 x 43 dBm", "RF connectors", "Weight [kg]",
    "Wind load frontal at 150 km/h [N]",
]  # fmt: skip

BIDS = {
    "alder": [["Alder 4", "1695-2690", 17.6, "65 ± 5", 7.0, "0-10", 1.4, 30, -153, "4 x 4.3-10 female", 18, 420]],
    "beech": [["Beech 4", "1695-2690", 16.9, "65 ± 5", 7.0, "0-10", 1.5, 30, -153, "4 x 4.3-10 female", 18, 420]],
    "cedar": [["Cedar 4", "1710-2170", 17.1, "65 ± 6", 7.0, "2-10", 1.5, 30, -150, "4 x 4.3-10 female", 26, 420]],
    "douglas": [["Douglas 4", "1710-2690", 17.6, "65 ± 7", 7.0, "2-12", 1.5, 30, -153, "6 x 4.3-10 female", 18, 560]],
    "elm": [["Elm 4", "1710-2170", "comply", "65 ± 5", 7.0, "2-10", 1.5, 30, -153, "4 x 4.3-10 female", 18, 420]],
    "fir": [["Fir 4", "1710-2170", 17.6, "65 ± 5", 7.0, "0-8", 1.7, 30, -153, "4 x 4.3-10 female", 18, 420]],
    "gorse": [["Gorse 4", "1710-2170", 17.6, "65 ± 5", 7.0, "2-10", 1.5, 28, -153, "4 x 7-16 female", None, 420]],
    "hazel": [
        ["Hazel 4", "1920-2170", 17.6, 65, 7.0, "2-10", 1.5, 30, "TBD", "4 x 4.3-10 female", 18, 420],
        ["Hazel 2", "1710-2170", "17.6 typ.", "65 ± 5", 7.0, "2-10", 1.5, 30, -153, "2 x 4.3-10 female", 9, 210],
    ],
}  # fmt: skip

# One word a requirement in tender order (E8 makes two: count and connector), after the rules of the tender:
# guard band 0.2 dB for gain, '>' not met by equality, windows contained, deviation of Fir in force and that of
# Gorse expired on the day before, VSWR 1.5 = 13.98 dB and 1.4 = 15.56 dB and 1.7 = 11.73 dB return loss.
# m meets, n meets narrowly, c fails narrowly (close), f fails, d declared only, s not stated, j not judged,
# a deviation accepted.
#                                E1  E2  E3  E4  E5  E6  E7  E8 E8  E9 E10 E11 E12
MATRIX = {
    "Alder 4": "m   m   m   m   m   m   m   m  m   m  m   n   m",
    "Beech 4": "m   c   m   m   m   m   m   m  m   m  m   f   n",
    "Cedar 4": "m   n   m   m   m   m   m   m  m   f  m   f   n",
    "Douglas 4": "m   m   f   m   m   m   m   m  m   m  f   n   n",
    "Elm 4": "m   d   m   m   m   m   m   m  m   m  m   d   n",
    "Fir 4": "m   m   m   a   f   m   m   m  m   m  m   n   f",
    "Gorse 4": "m   m   m   m   m   f   m   m  f   s  m   n   n",
    "Hazel 4": "f   m   n   m   m   m   s   m  m   m  m   n   n",
    "Hazel 2": "m   j   m   m   m   m   m   f  m   m  m   j   n",
}
WORDS = {
    "m": "meets",
    "n": "meets narrowly",
    "c": "fails narrowly",
    "f": "fails",
    "d": "declared only",
    "s": "not stated",
    "j": "not judged",
    "a": "deviation accepted",
}
REJECTED = {"Beech 4", "Douglas 4", "Fir 4", "Gorse 4", "Hazel 4", "Hazel 2"}

# Weights 3 + 2 + 5 + 1 of E9 to E12; only offers that no mandatory row rejects have a place.
POINTS = {"Alder 4": 11.0, "Elm 4": 6.0, "Cedar 4": 3.0}


def write_evaluation(folder: Path) -> tuple[Path, Path]:
    """Write tender and bids; returns the tender's file and the folder of bids."""
    tender = write_tender(folder / "tender.xlsx", REQUIREMENTS, Settings=SETTINGS, Deviations=DEVIATIONS)
    bids = folder / "bids"
    bids.mkdir()
    for name, panels in BIDS.items():
        write_bid(bids / f"{name}.xlsx", panels)
    (bids / "damaged.xlsx").write_bytes(b"PK\x03\x04 cut off on the way")
    return tender, bids


def write_bid(path: Path, panels: list[list[object]]) -> None:
    """One bid: headings, then a row a panel."""
    book = Workbook()
    sheet = book.active
    assert sheet is not None
    sheet.title = "Offer"
    sheet.append(HEADINGS)
    for panel in panels:
        sheet.append(panel)
    book.save(path)


def whole(out: Path) -> list[str]:
    """Names of the outputs, each opened to see that it is whole."""
    for path in out.glob("*.json"):
        json.loads(path.read_text(encoding="utf-8"))
    for path in out.glob("*.xlsx"):
        load_workbook(path)
    for path in out.glob("*.html"):
        assert path.read_text(encoding="utf-8").rstrip().endswith("</html>")
    return sorted(path.name for path in out.iterdir() if path.is_file() and not path.name.startswith("."))
