"""Two invented bids that weigh most on a page: six bands, and six bands whose figures clash."""

from __future__ import annotations

from pathlib import Path

from openpyxl import Workbook

BANDS = ("617-698", "694-960", "1427-1518", "1695-2690", "2300-2690", "3300-3800")
MORE_BANDS = ("3800-4200", "4400-5000")
"""Bands of a still larger bid; their figures are those of the last band."""
ROWS = (
    ("Array rows", (6, 6, 8, 10, 10, 12)),
    ("Array columns", (1, 1, 1, 1, 1, 4)),
    ("Polarisations", (2, 2, 2, 2, 2, 2)),
    ("Vertical element spacing (mm)", (280, 250, 140, 105, 95, 60)),
    ("Horizontal element spacing (mm)", (None, None, None, None, None, 43)),
    ("Gain (dBi)", (13.2, 14.1, 15.5, 17.1, 17.4, 20.6)),
    ("Horizontal beamwidth (deg)", (68, 65, 64, 63, 61, 24)),
    ("Vertical beamwidth (deg)", (14.5, 11.6, 10.0, 6.8, 6.9, 6.5)),
    ("Electrical tilt (deg)", ("2-12", "2-12", "2-10", "2-10", "2-10", "2-12")),
    ("Upper side-lobe suppression (dB)", (16, 16, 16, 17, 17, 16)),
    ("Front-to-back ratio (dB)", (25, 26, 27, 28, 28, 28)),
    ("Cross-polar discrimination (dB)", (15, 16, 17, 18, 18, 18)),
    ("Isolation between polarisations (dB)", (26, 28, 28, 28, 28, 26)),
    ("VSWR", ("< 1.5",) * 6),
    ("Return loss (dB)", (14, 14, 14, 14, 14, 14)),
    ("Passive intermodulation (dBc)", ("< -153 @ 2x43 dBm",) * 6),
    ("Maximum power per port (W)", (250, 250, 200, 200, 200, 80)),
    ("Total power (W)", (500, 500, 400, 400, 400, 640)),
    ("EIRP (dBm)", (70.2, 71.1, 71.5, 73.1, 73.4, 78.6)),
    ("RF ports", (2, 2, 2, 2, 2, 8)),
)
CLASHES = {
    "Vertical element spacing (mm)": (390, 330, 215, 140, 140, 98),
    "Gain (dBi)": (19.1, 20.3, 21.6, 24.2, 24.4, 29.5),
    "Horizontal beamwidth (deg)": (33, 31, 31, 30, 30, 8),
    "Vertical beamwidth (deg)": (25.0, 22.0, 19.0, 14.0, 14.0, 14.5),
    "Upper side-lobe suppression (dB)": (40, 42, 42, 42, 42, 42),
    "EIRP (dBm)": (84.0, 85.0, 86.0, 88.0, 88.0, 95.0),
    "RF ports": (3, 3, 3, 3, 3, 11),
}
WHOLE = (
    ("Height (mm)", 1990, 1200),
    ("Width (mm)", 420, 150),
    ("Depth (mm)", 190, 60),
    ("Weight (kg)", 38, 2),
    ("Wind load frontal at 150 km/h (N)", 780, 90),
    ("Survival wind speed (km/h)", 241, 120),
)


def write_bid(path: Path, *, bands: int = len(BANDS), clashing: bool = False) -> Path:
    """Write one bid as a workbook, with the first so many bands; the path again."""
    book = Workbook()
    page = book.active
    page.title = "Panel data"
    page.append(["Model", "Sallowmere Six"])
    page.append(["Frequency band (MHz)", *(*BANDS, *MORE_BANDS)[:bands]])
    for name, row in ROWS:
        figures = CLASHES.get(name, row) if clashing else row
        page.append([name, *(*figures, *(figures[-1] for _ in MORE_BANDS))[:bands]])
    for name, usual, small in WHOLE:
        page.append([name, small if clashing else usual])
    book.save(path)
    return path


def write_heavy_bids(folder: Path) -> tuple[Path, Path]:
    """Write the bid of six bands, and the one with more than fifty misfits, into a folder."""
    clean, clashing = folder / "six-bands.xlsx", folder / "fifty-misfits.xlsx"
    return write_bid(clean), write_bid(clashing, clashing=True)
