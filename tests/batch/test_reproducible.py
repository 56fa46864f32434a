"""The same inputs and rules give the same bytes: other day, zone, hash seed, folder, number of processes."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest
from tender.books import write_tender

from batch.evaluation import BIDS, DEVIATIONS, REQUIREMENTS, SETTINGS, write_bid

ANOTHER_DAY = """\
import datetime, time

class Day(datetime.datetime):
    @classmethod
    def now(cls, tz=None):
        return cls(2031, 5, 6, 7, 8, 9, tzinfo=tz)

class Date(datetime.date):
    @classmethod
    def today(cls):
        return cls(2031, 5, 6)

datetime.datetime, datetime.date = Day, Date
now = time.time
time.time = lambda: now() + 150_000_000
"""
RUN = """\
import sys
from speccheck.cli import main

if __name__ == "__main__":
    sys.argv[0] = "speccheck"
    main()
"""


def _run(folder: Path, out: str, *more: str, before: str = "", **environment: str) -> dict[str, bytes]:
    script = folder / f"{out}.py"
    script.write_text(before + RUN, encoding="utf-8")
    arguments = ["check", "bids", "--tender", "tender.xlsx", "--out", out, *more]
    known = {name: value for name, value in os.environ.items() if name != "SOURCE_DATE_EPOCH"}
    done = subprocess.run(
        [sys.executable, str(script), *arguments],
        cwd=folder,
        env={**known, **environment},
        capture_output=True,
        text=True,
        check=False,
    )
    assert done.returncode == 1, done.stderr
    return {path.name: path.read_bytes() for path in (folder / out).iterdir() if path.is_file()}


@pytest.mark.slow
def test_another_day_and_surroundings_give_the_same_bytes(tmp_path: Path) -> None:
    (tmp_path / "bids").mkdir()
    for name in ("alder", "fir"):
        write_bid(tmp_path / "bids" / f"{name}.xlsx", BIDS[name])
    write_tender(tmp_path / "tender.xlsx", REQUIREMENTS, Settings=SETTINGS, Deviations=DEVIATIONS)
    first = _run(tmp_path, "first", PYTHONHASHSEED="1", TZ="UTC")
    second = _run(tmp_path, "second", before=ANOTHER_DAY, PYTHONHASHSEED="2", TZ="Asia/Tokyo", LC_ALL="C")
    third = _run(tmp_path, "third", "--jobs", "2", PYTHONHASHSEED="3")
    assert {Path(name).suffix for name in first} == {".json", ".html", ".xlsx", ".pdf"}
    for other in (second, third):
        assert first.keys() == other.keys()
        assert [name for name in first if first[name] != other[name]] == []
