"""What a stopped run leaves: whole files, a code of its own, no process; the same command does the rest."""

from __future__ import annotations

import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import pytest

from batch.evaluation import BIDS, whole, write_evaluation

CHECK = """\
import os, time
from pathlib import Path
from speccheck import pipeline
from speccheck.atomic import whole_file
from speccheck.cli import main

write = pipeline.write_bytes_atomic
def stalling(path, data):
    if "STALL" not in os.environ or path.name not in ("cedar.report.html", "douglas.report.html"):
        return write(path, data)
    with whole_file(path) as stream:
        stream.write(data[:1000])
        Path(path.stem + ".stalled").touch()
        time.sleep(100)
pipeline.write_bytes_atomic = stalling

if __name__ == "__main__":
    main()
"""
"""The program, with a write that takes for ever in the middle of two bids."""
ORPHAN = """\
import os, sys, time
from speccheck.batch.pool import _pool
from speccheck.batch.work import Rules
from speccheck.records import Settings
from pathlib import Path

if __name__ == "__main__":
    rules = Rules(tender=None, settings=Settings(), formats=("json",), out=Path(sys.argv[1]), digest="")
    with _pool(1, rules) as pool:
        print(pool.submit(os.getpid).result(), flush=True)
        time.sleep(60)
"""


def _command(folder: Path) -> list[str]:
    script = folder / "check.py"
    script.write_text(CHECK, encoding="utf-8")
    rules = ("--tender", "tender.xlsx", "--formats", "json,xlsx,html")
    return [sys.executable, str(script), "check", "bids", *rules, "--out", "out"]


@pytest.mark.slow
@pytest.mark.parametrize("jobs", ["1", "2"])
@pytest.mark.parametrize("how", [signal.SIGKILL, signal.SIGINT])
def test_a_stopped_run_leaves_whole_files_and_a_resumed_one_gives_the_same_bytes(
    tmp_path: Path, how: signal.Signals, jobs: str
) -> None:
    write_evaluation(tmp_path)
    pipes = {"stdout": subprocess.PIPE, "stderr": subprocess.PIPE, "text": True, "cwd": tmp_path}
    stalled = {**os.environ, "STALL": "yes"}
    with subprocess.Popen(
        [*_command(tmp_path), "--jobs", jobs], env=stalled, start_new_session=True, **pipes
    ) as first:
        _wait_for_files(tmp_path, "*.stalled", int(jobs))
        os.killpg(first.pid, how)
        _, errors = first.communicate(timeout=30)
    left = sorted(path.name for path in (tmp_path / "out").glob("*.report.html"))
    assert left[:2] == ["alder.report.html", "beech.report.html"]
    assert "cedar.report.html" not in left
    if how == signal.SIGINT:
        assert first.returncode == 130, errors  # 128 + SIGINT, as shells count it (POSIX shell, 2.8.2)
        done = 1 + int(jobs)  # alder and beech, and the damaged bid that is next while the first of two waits
        assert f"stopped, {done} of {len(BIDS) + 1} bids done" in errors
        assert "--resume" in errors
        assert "Traceback" not in errors
        assert not list(tmp_path.glob("out/.*.part"))
    whole_before = whole(tmp_path / "out")
    again = subprocess.run([*_command(tmp_path), "--resume"], check=False, **pipes)
    assert again.returncode == 3, again.stderr
    assert again.stdout.count("(unchanged, kept)") == 2
    assert not list((tmp_path / "out").rglob("*.part"))
    fresh = subprocess.run([*_command(tmp_path)[:-1], "fresh"], check=False, **pipes)
    assert fresh.returncode == 3, fresh.stderr
    names = whole(tmp_path / "fresh")
    assert set(whole_before) < set(names) == set(whole(tmp_path / "out"))
    for name in names:
        assert (tmp_path / "out" / name).read_bytes() == (tmp_path / "fresh" / name).read_bytes(), name


@pytest.mark.slow
def test_a_process_ends_with_its_killed_parent(tmp_path: Path) -> None:
    script = tmp_path / "orphan.py"
    script.write_text(ORPHAN, encoding="utf-8")
    command = [sys.executable, str(script), str(tmp_path)]
    with subprocess.Popen(command, stdout=subprocess.PIPE, text=True) as parent:
        assert parent.stdout is not None
        worker = int(parent.stdout.readline())
        parent.kill()
    for _ in range(100):
        if not _alive(worker):
            return
        time.sleep(0.1)
    os.kill(worker, signal.SIGKILL)
    pytest.fail("the process outlived its parent")


def _wait_for_files(folder: Path, pattern: str, count: int) -> None:
    for _ in range(600):
        if len(list(folder.glob(pattern))) >= count:
            return
        time.sleep(0.1)
    pytest.fail(f"{count} files {pattern} did not appear")


def _alive(pid: int) -> bool:
    try:
        os.kill(pid, 0)
    except ProcessLookupError:
        return False
    return " Z " not in Path(f"/proc/{pid}/stat").read_text(encoding="utf-8")
