"""How a batch scales: 200 bids of five panels and two bands through one process and through two.

Overhead of a bid is everything beyond its assessment and the writing of its own outputs: digests, marks,
summaries, progress, and its share of the comparison; with two processes also their start and the way of
the results between them. It is measured as processor time inside one run, against openpyxl's own load of
one bid. Speed-up stands beside that of two bare loops on half the bids each, in processes of their own
(what this machine gives two processes at the moment). Memory is that of a process that works and of the
one that leads, for numbers of bids up to twice the count. Run: ``python tests/benchmarks/batch.py [bids]``.
"""

# ruff: noqa: E501 - rows of a bid are read as tables

from __future__ import annotations

import gc
import multiprocessing
import resource
import statistics
import sys
import tempfile
import time
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from multiprocessing.connection import Connection
from pathlib import Path
from typing import Any

from openpyxl import Workbook, load_workbook

import speccheck.batch
from speccheck import pipeline
from speccheck.batch import assess_many, work
from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records.evaluations import Bid
from speccheck.report.offers import comparison as written
from speccheck.report.pages.clarification import write_clarification

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


@dataclass(slots=True)
class Clocked:
    """Processor and wall time [s] spent inside some functions of a module."""

    processor: float = 0.0
    wall: float = 0.0

    def watch(self, module: Any, name: str) -> None:
        """Count every call of ``module.name`` from now on."""
        real = getattr(module, name)

        def watched(*arguments: Any, **named: Any) -> Any:
            processor, wall = time.process_time(), time.perf_counter()
            try:
                return real(*arguments, **named)
            finally:
                self.processor += time.process_time() - processor
                self.wall += time.perf_counter() - wall

        setattr(module, name, watched)


@dataclass(frozen=True, slots=True)
class Cost:
    """One run: wall time and processor time [s], peak memory [MB] of the process that led and of a worker."""

    wall: float
    processor: float
    leader: float
    worker: float
    more: Mapping[Any, float]


def run_in_fresh_processes(
    *parts: tuple[Callable[..., Mapping[Any, float]], tuple[object, ...]],
) -> list[Cost]:
    """Pieces of work at the same time, each in a process of its own."""
    context = multiprocessing.get_context("spawn")
    pipes, processes = [], []
    for function, arguments in parts:
        parent, child = context.Pipe()
        processes.append(context.Process(target=_measured, args=(child, function, arguments)))
        processes[-1].start()
        pipes.append(parent)
    results = [pipe.recv() for pipe in pipes]
    for process in processes:
        process.join()
    return results


def _measured(
    pipe: Connection, work: Callable[..., Mapping[Any, float]], arguments: tuple[object, ...]
) -> None:
    gc.set_threshold(50_000)  # as the program does
    started = time.perf_counter()
    more = work(*arguments)
    wall = time.perf_counter() - started
    own, others = (resource.getrusage(who) for who in (resource.RUSAGE_SELF, resource.RUSAGE_CHILDREN))
    processor = own.ru_utime + own.ru_stime + others.ru_utime + others.ru_stime
    pipe.send(Cost(wall, processor, own.ru_maxrss / 1024, others.ru_maxrss / 1024, more))


def batch(
    out: Path, tender_file: Path, bids: list[Path], jobs: int, resume: bool = False
) -> Mapping[Any, float]:
    """The work as the program does it; returns the largest worker's peak [MB] by number of bids done."""
    peaks: dict[Any, float] = {}

    def progress(done: int, _of: int, _bid: Bid) -> None:
        if done in (20, 50) or done % 100 == 0:
            peaks[done] = max((_peak(p.pid or 0) for p in multiprocessing.active_children()), default=0.0)

    evaluation = assess_many(
        bids,
        out=out,
        tender=read_tender(tender_file),
        formats=FORMATS,
        jobs=jobs,
        resume=resume,
        progress=progress,
    )
    bad = [bid.error for bid in evaluation.bids if bid.error]
    if bad or len(evaluation.bids) != len(bids):
        raise SystemExit(f"{len(bad)} of {len(bids)} bids failed: {bad[:1]}")
    return peaks


def batch_by_part(out: Path, tender_file: Path, bids: list[Path]) -> Mapping[Any, float]:
    """The work through one process; returns processor time [s] of its parts and wall time of the work proper."""
    proper, comparison, whole = Clocked(), Clocked(), Clocked()
    proper.watch(work.pipeline, "assess")
    proper.watch(work, "_outputs")
    comparison.watch(speccheck.batch, "evaluate")
    comparison.watch(written, "write_comparison")
    whole.watch(sys.modules[__name__], "batch")
    sys.modules[__name__].batch(out, tender_file, bids, 1)  # type: ignore[attr-defined]
    bookkeeping = whole.processor - proper.processor - comparison.processor
    return {"bookkeeping": bookkeeping, "comparison": comparison.processor, "proper": proper.wall}


def _peak(process: int) -> float:
    """Peak memory [MB] of a living process; 0 where the system does not tell."""
    try:
        status = Path(f"/proc/{process}/status").read_text(encoding="ascii")
    except OSError:
        return 0.0
    (line,) = (line for line in status.splitlines() if line.startswith("VmHWM:"))
    return int(line.split()[1]) / 1024


def bare(out: Path, tender_file: Path, bids: list[Path]) -> Mapping[Any, float]:
    """The work proper in a plain loop."""
    tender = read_tender(tender_file)
    for path in bids:
        assessment = pipeline.assess(path, tender=tender)
        pipeline.write_outputs(assessment, path, out, FORMATS)
        write_clarification(assessment, out, path.stem, FORMATS)
    return {}


def load_floor(bids: list[Path]) -> float:
    """Processor time [s] of openpyxl's full load of one bid, median."""
    times = []
    for path in bids[:20]:
        started = time.process_time()
        load_workbook(path)
        times.append(time.process_time() - started)
    return statistics.median(times)


def main() -> None:
    """Print the table."""
    count = int(sys.argv[1]) if len(sys.argv) > 1 else 200
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        tender_file = write_bids(folder, 2 * count)
        bids = sorted((folder / "bids").iterdir())
        some = bids[:count]
        floor = load_floor(bids) * 1e3
        print(
            f"{count} bids of 5 panels x 2 bands to {', '.join(FORMATS)}; openpyxl loads one in {floor:.1f} ms"
        )
        (single,) = run_in_fresh_processes((batch_by_part, (folder / "one", tender_file, some)))
        kept, offers = single.more["bookkeeping"] / count * 1e3, single.more["comparison"] / count * 1e3
        print(
            f"one process   {single.wall:7.1f} s  work proper {single.more['proper'] / count * 1e3:.0f} ms a bid"
        )
        print(
            f"  overhead a bid {kept + offers:.1f} ms = bookkeeping {kept:.1f} + comparison of {5 * count} offers {offers:.1f}"
            f" = {(kept + offers) / floor:.1f} x openpyxl's load (aim 2)"
        )
        again = [
            run_in_fresh_processes((batch, (folder / "one", tender_file, some, jobs, True)))[0]
            for jobs in (1, 2)
        ]
        pool = again[1].processor - again[0].processor
        print(f"  two processes cost {pool:.2f} s once: start, imports, results passed on")
        halves = [(bare, (folder / f"half{i}", tender_file, some[i::2])) for i in range(2)]
        possible = max(cost.wall for cost in run_in_fresh_processes(*halves))
        (double,) = run_in_fresh_processes((batch, (folder / "two", tender_file, some, 2)))
        print(
            f"two processes {double.wall:7.1f} s  speed-up {single.wall / double.wall:.2f} (aim 1.8);"
            f" two bare loops on half each {single.more['proper'] / possible:.2f}"
        )
        (all_of_them,) = run_in_fresh_processes((batch, (folder / "all", tender_file, bids, 2)))
        print("peak memory [MB] by number of bids (aim below 250, flat)")
        print(f"  process that works  {'  '.join(f'{n}: {mb:.0f}' for n, mb in all_of_them.more.items())}")
        leaders = {}
        for number in all_of_them.more:
            out = folder / "all"
            (leader,) = run_in_fresh_processes((batch, (out, tender_file, bids[:number], 2, True)))
            leaders[number] = leader.leader
        print(
            f"  process that leads  {'  '.join(f'{n}: {mb:.0f}' for n, mb in leaders.items())}, comparison written"
        )


if __name__ == "__main__":
    main()
