"""Cost of the report, as ratios against floors of the same run. Run: python tests/benchmarks/report.py

The PDF is held against WeasyPrint alone on the same page, and that page against the same text, tables and
figures without any style. Aims: HTML 30 ms and 400 KB a panel; PDF 1.15 × WeasyPrint alone; style 1.4 × none.
Jobs are run in turn, three rounds after one to warm up; the best of each counts.
"""

from __future__ import annotations

import importlib
import logging
import re
import sys
import tempfile
import time
import warnings
from collections.abc import Callable
from pathlib import Path

import weasyprint

from speccheck.pipeline import assess
from speccheck.records import Assessment
from speccheck.report.pages.html import render_html
from speccheck.report.pages.pdf import pdf_bytes

SPECS = Path(__file__).parents[2] / "sample_specs"
ROUNDS = 3


def best(*jobs: Callable[[], object]) -> list[float]:
    """Least processor time [s] of each job, taken in turn; a busy machine burdens wall clocks, not this."""
    times = [float("inf")] * len(jobs)
    for job in jobs:
        job()
    for _ in range(ROUNDS):
        for i, job in enumerate(jobs):
            start = time.process_time()
            job()
            times[i] = min(times[i], time.process_time() - start)
    return times


def measure(name: str, assessment: Assessment) -> None:
    """Print one line of ratios."""
    page = render_html(assessment)
    panels = len(assessment.panels)
    (html,) = best(lambda: render_html(assessment))
    bare = re.sub(r"<style>.*?</style>", "", page, flags=re.DOTALL)
    ours, alone, unstyled = best(
        lambda: pdf_bytes(page),
        lambda: weasyprint.HTML(string=page).write_pdf(),
        lambda: weasyprint.HTML(string=bare).write_pdf(),
    )
    print(
        f"{name:24} {panels:6d} {1000 * html / panels:9.1f} {len(page.encode()) / 1000 / panels:9.0f} "
        f"{ours:8.2f} {ours / alone:10.2f} {alone / unstyled:12.2f}"
    )


def main() -> None:
    """Measure the sample of the tests and every sample bid."""
    warnings.simplefilter("ignore", ResourceWarning)
    logging.getLogger("weasyprint").setLevel(logging.ERROR)
    titles = ("panels", "HTML ms", "HTML KB", "PDF s", "PDF/alone", "style/none")
    print(
        f"{'report':24} " + " ".join(f"{t:>{w}}" for t, w in zip(titles, (6, 9, 9, 8, 10, 12), strict=True))
    )
    sys.path[0] = str(Path(__file__).parents[1])  # the folder of this script hides the package 'report'
    measure("hand-written sample", importlib.import_module("report.sample").sample())
    for path in sorted(SPECS.glob("*.xlsx")):
        if path.stem != "tender":
            measure(path.stem, assess(path))
    heavy = importlib.import_module("benchmarks.heavy_bids").write_heavy_bids
    with tempfile.TemporaryDirectory() as folder:
        for path in heavy(Path(folder)):
            measure(path.stem, assess(path))


if __name__ == "__main__":
    main()
