"""Reading a bid against openpyxl's own full load of the same file.

Run: ``python tests/benchmarks/reading.py``. Prints the ratio of the two times (median of several runs of
each, taken in turn) for a bid of 60 cells and a catalogue of 2 000 rows, and how memory grows with rows.
"""

from __future__ import annotations

import random
import statistics
import tempfile
import time
import tracemalloc
from collections.abc import Callable
from pathlib import Path

from openpyxl import Workbook, load_workbook

from speccheck.intake import read_submission

BID = [
    ["Type Brae 12", None, None],
    ["Parameter", "Unit", "Value"],
    ["Frequency range", "MHz", "1710 – 2170"],
    ["Polarisation", None, "±45°"],
    ["Dipoles per column", "pcs", 12],
    ["Columns", "pcs", 1],
    ["Vertical spacing", "mm", 105],
    ["Gain", "dBi", "18.1 ± 0.4"],
    ["Horizontal half-power beamwidth", "°", 65],
    ["Vertical half-power beamwidth", "°", 7.2],
    ["Electrical downtilt", "°", "2 … 12"],
    ["First upper side-lobe suppression", "dB", "> 18"],
    ["Front-to-back ratio", "dB", "≥ 25"],
    ["Isolation", "dB", "≥ 30"],
    ["VSWR", "–", "< 1.5"],
    ["Passive intermodulation, 2 x 43 dBm", "dBc", "≤ -153"],
    ["Max. power per port", "W", 300],
    ["Dimensions H x W x D", "mm", "1390 x 160 x 92"],
    ["Weight", "kg", 10.4],
    ["Wind load, frontal, 150 km/h", "N", 236],
]
HEADINGS = [
    "Model", "Frequency (MHz)", "Gain (dBi)", "Horizontal beamwidth (°)", "Vertical beamwidth (°)",
    "Front-to-back ratio (dB)", "Electrical tilt (°)", "VSWR", "Isolation (dB)", "Intermodulation (dBc)",
    "Max. power per port (W)", "Height (mm)", "Width (mm)", "Depth (mm)", "Weight (kg)", "Wind load (N)",
    "Survival wind speed (km/h)", "Connectors", "Element rows", "Row spacing (mm)",
]  # fmt: skip


def bid(path: Path) -> Path:
    """A data sheet of about 60 cells."""
    return _saved(path / "bid.xlsx", BID)


def catalogue(path: Path, rows: int) -> Path:
    """A catalogue with one row a panel, 20 columns."""
    chance = random.Random(rows)
    table: list[list[object]] = [list(HEADINGS)]
    table += [_catalogue_row(number, chance) for number in range(rows)]
    return _saved(path / f"catalogue-{rows}.xlsx", table)


def _catalogue_row(number: int, chance: random.Random) -> list[object]:
    gain, width, height = chance.uniform(13, 19), chance.choice([33, 65, 90]), chance.randint(500, 2600)
    return [
        f"BR-{number:04d}", chance.choice(["1710-2690", "698-960", "1710-2170"]), round(gain, 1), width,
        round(chance.uniform(5, 16), 1), "≥ 25", "2-12", "< 1.5", 30, -153, 250, height, 160, 95,
        round(height / 110, 1), round(height / 6), 241, "2 x 4.3-10 female", 12, 92,
    ]  # fmt: skip


def _saved(path: Path, rows: list[list[object]]) -> Path:
    book = Workbook()
    for row in rows:
        book.active.append(row)
    book.save(path)
    return path


def ratio(path: Path, repeats: int) -> tuple[float, float]:
    """Time of reading over time of openpyxl's load, and the latter [s]."""
    mine, floor = [], []
    read_submission(path)
    for _ in range(repeats):
        mine.append(_timed(lambda: read_submission(path)))
        floor.append(_timed(lambda: load_workbook(path)))
    return statistics.median(mine) / statistics.median(floor), statistics.median(floor)


def _timed(work: Callable[[], object]) -> float:
    start = time.perf_counter()
    work()
    return time.perf_counter() - start


def peak_mb(path: Path) -> float:
    """Peak of memory while reading [MB]."""
    tracemalloc.start()
    read_submission(path)
    peak = tracemalloc.get_traced_memory()[1]
    tracemalloc.stop()
    return peak / 1e6


def main() -> None:
    """Print the table."""
    with tempfile.TemporaryDirectory() as folder:
        path = Path(folder)
        for name, file, repeats in (
            ("60-cell bid", bid(path), 30),
            ("2 000-row catalogue", catalogue(path, 2000), 5),
        ):
            times, floor = ratio(file, repeats)
            print(
                f"read {name:<22} {times:5.2f} x openpyxl's load ({floor * 1000:.1f} ms); at most 2, aim 1.5"
            )
        peaks = {rows: peak_mb(catalogue(path, rows)) for rows in (500, 1000, 2000, 4000)}
        for rows, peak in peaks.items():
            print(f"memory {rows:>5} rows  {peak:6.1f} MB  {peak / rows * 1000:6.1f} kB a row")


if __name__ == "__main__":
    main()
