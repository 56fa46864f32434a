"""How a batch scales: 200 bids of five panels and two bands through one process and through two.

Floors measured in the same run: openpyxl's own load of one bid; the same work in a bare loop without the
batch (what one bid costs whoever runs it); two bare loops on half the bids each in processes of their own
(what this machine gives two processes at the moment). Run: ``python tests/benchmarks/batch.py [bids]``.
"""

# ruff: noqa: E501 - rows of a bid are read as tables

from __future__ import annotations

import multiprocessing
import resource
import statistics
import sys
import tempfile
import time
from collections.abc import Callable, Sequence
from multiprocessing.connection import Connection
from pathlib import Path

from openpyxl import Workbook, load_workbook

from speccheck import pipeline
from speccheck.batch import assess_many
from speccheck.intake.tenders.tender_book import read_tender

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


def timed(work: Callable[..., None], *arguments: object) -> tuple[float, float]:
    """Wall time [s] of some work in a fresh process, and the peak memory of any process of it [MB]."""
    (result,) = timed_together([(work, arguments)])
    return result


def timed_together(
    parts: Sequence[tuple[Callable[..., None], tuple[object, ...]]],
) -> list[tuple[float, float]]:
    """As `timed` for several pieces of work at the same time."""
    context = multiprocessing.get_context("spawn")
    pipes, processes = [], []
    for work, arguments in parts:
        parent, child = context.Pipe()
        processes.append(context.Process(target=_measured, args=(child, work, arguments)))
        processes[-1].start()
        pipes.append(parent)
    results = [pipe.recv() for pipe in pipes]
    for process in processes:
        process.join()
    return results


def _measured(pipe: Connection, work: Callable[..., None], arguments: tuple[object, ...]) -> None:
    started = time.perf_counter()
    work(*arguments)
    seconds = time.perf_counter() - started
    usage = [
        resource.getrusage(who).ru_maxrss / 1024 for who in (resource.RUSAGE_SELF, resource.RUSAGE_CHILDREN)
    ]
    pipe.send((seconds, max(usage)))


def batch(out: Path, tender_file: Path, bids: list[Path], jobs: int) -> None:
    """The work as the program does it."""
    evaluation = assess_many(bids, out=out, tender=read_tender(tender_file), formats=FORMATS, jobs=jobs)
    bad = [bid.error for bid in evaluation.bids if bid.error]
    if bad or len(evaluation.bids) != len(bids):
        raise SystemExit(f"{len(bad)} of {len(bids)} bids failed: {bad[:1]}")


def bare(out: Path, tender_file: Path, bids: list[Path]) -> None:
    """The same work in a plain loop."""
    tender = read_tender(tender_file)
    for path in bids:
        pipeline.write_outputs(pipeline.assess(path, tender=tender), path, out, FORMATS)


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
        loop, _ = timed(bare, folder / "bare", tender_file, bids)
        single, _ = timed(batch, folder / "one", tender_file, bids, 1)
        print(f"bare loop     {loop:7.1f} s  {loop / count * 1e3:.0f} ms a bid")
        print(
            f"one process   {single:7.1f} s  overhead a bid {(single - loop) / count * 1e3:.1f} ms (aim below {2 * floor * 1e3:.1f})"
        )
        halves = [(bare, (folder / f"half{i}", tender_file, bids[i::2])) for i in range(2)]
        possible = max(seconds for seconds, _ in timed_together(halves))
        _, early = timed(batch, folder / "tenth", tender_file, tenth, 2)
        double, late = timed(batch, folder / "two", tender_file, bids, 2)
        print(
            f"two processes {double:7.1f} s  speed-up {single / double:.2f} (aim 1.8); two bare loops on half each {loop / possible:.2f}"
        )
        print(
            f"peak memory a process {early:.0f} MB after {len(tenth)} bids, {late:.0f} MB after {count} (aim below 250, flat)"
        )


if __name__ == "__main__":
    main()
