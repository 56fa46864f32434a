"""What a stopped run leaves: a code of its own, and no process that waits for a dead parent."""

from __future__ import annotations

import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import pytest

from speccheck.screen import stoppable

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


def test_an_interrupt_ends_with_its_own_code(capsys: pytest.CaptureFixture[str]) -> None:
    """128 + SIGINT, as shells count it (POSIX shell, 2.8.2)."""
    with pytest.raises(SystemExit) as stopped, stoppable(130):
        os.kill(os.getpid(), signal.SIGINT)
        time.sleep(1)
    assert stopped.value.code == 130
    assert "--resume" in capsys.readouterr().err


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


def _alive(pid: int) -> bool:
    try:
        os.kill(pid, 0)
    except ProcessLookupError:
        return False
    return " Z " not in Path(f"/proc/{pid}/stat").read_text(encoding="utf-8")
