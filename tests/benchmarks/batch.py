"""How a batch scales: 200 bids of five panels and two bands through one process and through two.

Printed: bids per second, the ratio of two processes to one, the peak memory of each process after a tenth
and after all of the bids, and the time per bid over openpyxl's own load of the same file (the floor,
measured in the same run). Run: ``python tests/benchmarks/batch.py [bids]``.
"""

from __future__ import annotations

import multiprocessing
import resource
import statistics
import sys
import tempfile
import time
from pathlib import Path

from openpyxl import Workbook, load_workbook

from speccheck.batch import assess_many
from speccheck.intake.tender_book import read_tender

FORMATS = ("json", "html", "xlsx")
BANDS = ((694, 960, 16.0, 9.5), (1710, 2690, 17.6, 6.5))
HEADINGS = [
    "Panel", "Frequency band [MHz]", "Gain [dBi]", "Horizontal beamwidth [°]", "Vertical beamwidth [°]", "Electrical tilt [°]",
    "VSWR", "Isolation [dB]", "Front-to-back ratio [dB]", "Element rows", "Element columns", "Vertical element spacing [mm]",
    "Height [mm]", "Width [mm]", "Depth [mm]", "Weight [kg]", "Wind load frontal at 150 km/h [N]", "RF connectors",
]  # fmt: skip
REQUIREMENTS = [
    ["Clause", "Wording", "Level", "Weight"],
    ["1", "Gain ≥ 15.5 dBi (694-960), ≥ 17 dBi (1710-2690)", "M", None],
    ["2", "Horizontal beamwidth 65° ± 7°", "M", None],
    ["3", "Electrical downtilt 2-10°", "M", None],
    ["4", "VSWR ≤ 1.5", "M", None],
    ["5", "Isolation ≥ 28 dB", "M", None],
    ["6", "Weight up to 45 kg", "D", 3],
    ["7", "Wind load ≤ 900 N at 150 km/h frontal", "D", 2],
    ["8", "Return loss ≥ 14 dB", "D", 1],
]


def write_bids(folder: Path, count: int) -> Path:
    """Write `count` bids, all different; returns the tender's file."""
    (folder / "bids").mkdir()
    for number in range(count):
        book = Workbook()
        sheet = book.active
        assert sheet is not None
        sheet.append(HEADINGS)
        for panel in range(5):
            for low, high, gain, width in BANDS:
                shift = (number * 5 + panel) % 17 / 20
                rows, pitch = (8, 250) if low < 1000 else (12, 105)
                sheet.append(
                    [
                        f"Model {number}-{panel}", f"{low}-{high}", round(gain - shift, 2), "65 ± 5", width, "2-12", 1.5, 30,
                        26 + panel, rows, 1, pitch, 2000, 430 + panel, 190, 28 + panel + number % 7, 700 + number, "4 x 4.3-10 female",
                    ]
                )  # fmt: skip
        book.save(folder / "bids" / f"bid{number:05d}.xlsx")
    tender = Workbook()
    sheet = tender.active
    assert sheet is not None
    sheet.title = "Requirements"
    for row in REQUIREMENTS:
        sheet.append(row)
    tender.save(folder / "tender.xlsx")
    return folder / "tender.xlsx"


def run(folder: Path, tender_file: Path, bids: list[Path], jobs: int) -> tuple[float, float]:
    """Wall time [s] of one batch in a fresh process, and the peak memory of any process of it [MB]."""
    context = multiprocessing.get_context("spawn")
    parent, child = context.Pipe()
    process = context.Process(
        target=_batch, args=(child, folder / f"out{jobs}-{len(bids)}", tender_file, bids, jobs)
    )
    process.start()
    seconds, peak = parent.recv()
    process.join()
    return seconds, peak


def _batch(pipe: object, out: Path, tender_file: Path, bids: list[Path], jobs: int) -> None:
    tender = read_tender(tender_file)
    started = time.perf_counter()
    evaluation = assess_many(bids, out=out, tender=tender, formats=FORMATS, jobs=jobs)
    seconds = time.perf_counter() - started
    bad = [bid.error for bid in evaluation.bids if bid.error]
    if bad or len(evaluation.bids) != len(bids):
        raise SystemExit(f"{len(bad)} of {len(bids)} bids failed: {bad[:1]}")
    usage = [
        resource.getrusage(who).ru_maxrss / 1024 for who in (resource.RUSAGE_SELF, resource.RUSAGE_CHILDREN)
    ]
    pipe.send((seconds, max(usage)))  # type: ignore[attr-defined]


def load_floor(bids: list[Path]) -> float:
    """openpyxl's full load of one bid [s], median."""
    times = []
    for path in bids[:20]:
        started = time.perf_counter()
        load_workbook(path)
        times.append(time.perf_counter() - started)
    return statistics.median(times)


def main() -> None:
    """Print the table."""
    count = int(sys.argv[1]) if len(sys.argv) > 1 else 200
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        tender_file = write_bids(folder, count)
        bids = sorted((folder / "bids").iterdir())
        tenth = bids[: max(2, count // 10)]
        floor = load_floor(bids)
        print(
            f"{count} bids of 5 panels x 2 bands to {', '.join(FORMATS)}; openpyxl loads one in {floor * 1e3:.1f} ms"
        )
        single, _ = run(folder, tender_file, bids, 1)
        print(f"one process   {single:7.1f} s  {count / single:5.1f} bids/s")
        _, early = run(folder, tender_file, tenth, 2)
        double, late = run(folder, tender_file, bids, 2)
        print(
            f"two processes {double:7.1f} s  {count / double:5.1f} bids/s  speed-up {single / double:.2f} (aim 1.8)"
        )
        print(
            f"peak memory per process {early:.0f} MB after {len(tenth)} bids, {late:.0f} MB after {count} (aim below 250, flat)"
        )
        print(f"time per bid {single / count * 1e3:.0f} ms = {single / count / floor:.1f} x openpyxl's load")


if __name__ == "__main__":
    main()
