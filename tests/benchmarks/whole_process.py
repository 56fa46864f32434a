"""`speccheck check BID --formats html,json,xlsx` as a whole process, against importing the libraries alone.

Run: ``python tests/benchmarks/whole_process.py [PAIRS]``. The floor is a process that imports numpy, openpyxl
and jinja2 and opens the same workbook. Both run in turn; what is printed is the median of the ratios of the
pairs, for processor time (user and system) and for time on the clock. Target: 2.5.

Both keep numpy to one thread, as the program does: left alone it starts one per core, and these spin while
numpy is imported, which adds processor time to the floor but none on the clock. Nothing else parts the two
ratios: the program waits neither for the disk nor for other processes.

Two states of one copy of the package: byte code compiled, as `pip` and `make` leave it, and no byte code, as
in a checkout under PYTHONDONTWRITEBYTECODE, where every run compiles every module again. The dictionary and
the templates are kept from the first run in both, which is not counted.
"""

from __future__ import annotations

import compileall
import os
import resource
import shutil
import statistics
import subprocess
import sys
import tempfile
import time
from pathlib import Path

from reading import bid

ROOT = Path(__file__).parents[2]
SAMPLES = ROOT / "sample_specs"
FLOOR = "import sys, numpy, openpyxl, jinja2; openpyxl.load_workbook(sys.argv[1])"
OURS = "from speccheck.cli import main; main()"
PAIRS = 7
BIDS = ("aldervane-quay-column", "cindermoor-beam", "dunlyre-sector")
"""A sound bid, one with six misfits, one with eight that many readings are tried on."""


def copy_of_the_package(folder: Path) -> Path:
    """The package and its templates without anything compiled."""
    unwanted = shutil.ignore_patterns("__pycache__")
    shutil.copytree(ROOT / "speccheck", folder / "speccheck", ignore=unwanted)
    shutil.copytree(ROOT / "templates", folder / "templates", ignore=unwanted)
    return folder


def timed(command: list[str], package: Path) -> tuple[float, float]:
    """Processor time and time on the clock [s] of one process."""
    # no byte code is written, so that the first state lasts
    env = {**os.environ, "PYTHONDONTWRITEBYTECODE": "1", "OPENBLAS_NUM_THREADS": "1"}
    before, start = resource.getrusage(resource.RUSAGE_CHILDREN), time.perf_counter()
    done = subprocess.run(command, env=env, cwd=package, capture_output=True, check=False)
    clock, after = time.perf_counter() - start, resource.getrusage(resource.RUSAGE_CHILDREN)
    assert done.returncode in (0, 1), done.stderr.decode()
    return after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime, clock


def compare(path: Path, package: Path, out: Path, pairs: int, *options: str) -> None:
    """Print one row of the table."""
    floor = [sys.executable, "-c", FLOOR, str(path)]
    ours = [sys.executable, "-c", OURS, "check", str(path), "--formats", "html,json,xlsx", "--out", str(out)]
    ours += options
    timed(floor, package)
    timed(ours, package)
    rows = [(*timed(floor, package), *timed(ours, package)) for _ in range(pairs)]
    floors, times = (statistics.median(row[place] for row in rows) for place in (0, 2))
    cpu = statistics.median(row[2] / row[0] for row in rows)
    clock = statistics.median(row[3] / row[1] for row in rows)
    name = f"{path.stem}{' with tender' if options else ''}"
    shown = f"  {name:<36}{floors * 1e3:6.0f} ms {times * 1e3:6.0f} ms"
    print(f"{shown}   x {cpu:4.2f}   x {clock:4.2f}", flush=True)


def main() -> None:
    """Print the table."""
    pairs = int(sys.argv[1]) if len(sys.argv) > 1 else PAIRS
    with tempfile.TemporaryDirectory() as folder:
        place = Path(folder)
        package, out = copy_of_the_package(place / "package"), place / "out"
        cells60, tender = bid(place), ("--tender", str(SAMPLES / "tender.xlsx"))
        samples = [SAMPLES / f"{name}.xlsx" for name in BIDS]
        for state in ("no byte code", "byte code"):
            if state == "byte code":
                compileall.compile_dir(package / "speccheck", quiet=2)
            print(f"{state:<38}{'floor':>9} {'check':>9}   cpu      clock")
            for path in samples:
                compare(path, package, out, pairs)
            compare(cells60, package, out, pairs)
            compare(cells60, package, out, pairs, *tender)


if __name__ == "__main__":
    main()
