"""Many files: none stops the others, and a resumed run does what changed."""

from __future__ import annotations

import subprocess
import sys
from dataclasses import replace
from pathlib import Path

import pytest

from batch.evaluation import BIDS, whole, write_bid, write_evaluation
from speccheck.batch import assess_many, find_bids
from speccheck.batch import work as work_module
from speccheck.intake.tenders.tender_book import read_tender
from speccheck.records import Tender

RUN = """
import os, signal, sys
from speccheck import pipeline
from speccheck.batch import assess_many
from speccheck.intake.tenders.tender_book import read_tender

assess = pipeline.assess
def dying(path, **rules):
    if path.name in sys.argv:
        os.kill(os.getpid(), signal.SIGKILL)
    return assess(path, **rules)
pipeline.assess = dying

def progress(done, of, bid):
    print(done, bid.file, bid.error, "kept" if bid.resumed else "done", flush=True)

if __name__ == "__main__":
    folder, jobs = sys.argv[1], int(sys.argv[2])
    assess_many(
        [folder + "/bids"], out=folder + "/out", tender=read_tender(folder + "/tender.xlsx"),
        formats=("html", "xlsx", "json"), jobs=jobs, resume="resume" in sys.argv, progress=progress,
    )
"""


@pytest.fixture
def evaluation(tmp_path: Path) -> Path:
    write_evaluation(tmp_path)
    return tmp_path


@pytest.fixture
def rules(evaluation: Path) -> Tender:
    return read_tender(evaluation / "tender.xlsx")


def test_two_processes_give_what_one_gives(evaluation: Path, rules: Tender) -> None:
    one = assess_many([evaluation / "bids"], out=evaluation / "one", tender=rules, formats=("json",))
    two = assess_many([evaluation / "bids"], out=evaluation / "two", tender=rules, formats=("json",), jobs=2)
    assert [bid.file for bid in one.bids] == [bid.file for bid in two.bids]
    for name in whole(evaluation / "one"):
        assert (evaluation / "one" / name).read_bytes() == (evaluation / "two" / name).read_bytes(), name


def test_resume_does_again_only_what_changed(evaluation: Path, rules: Tender) -> None:
    def done(tender: Tender = rules) -> list[str]:
        result = assess_many(
            [evaluation / "bids"], out=evaluation / "out", tender=tender, formats=("json",), resume=True
        )
        return [bid.file for bid in result.bids if not bid.resumed and not bid.error]

    assert len(done()) == len(BIDS)
    assert done() == []
    write_bid(evaluation / "bids" / "alder.xlsx", BIDS["beech"])
    assert done() == ["alder.xlsx"]
    (evaluation / "out" / "cedar.result.json").unlink()
    assert done() == ["cedar.xlsx"]
    assert len(done(replace(rules, settings=replace(rules.settings, equality_meets=False)))) == len(BIDS)


def test_a_resumed_evaluation_compares_like_a_fresh_one(evaluation: Path, rules: Tender) -> None:
    pages = []
    for _ in range(2):
        assess_many(
            [evaluation / "bids"], out=evaluation / "out", tender=rules, formats=("json",), resume=True
        )
        pages.append((evaluation / "out" / "comparison.json").read_bytes())
    assert pages[0] == pages[1]


@pytest.mark.slow
def test_a_process_that_dies_names_its_bid_and_the_rest_is_done(evaluation: Path) -> None:
    """The process that starts on one of the bids is killed each time."""
    (evaluation / "bids" / "alder.xlsx").unlink()
    script = evaluation / "run.py"
    script.write_text(RUN, encoding="utf-8")
    command = [sys.executable, str(script), str(evaluation), "2", "beech.xlsx"]
    run = subprocess.run(command, stdout=subprocess.PIPE, text=True, check=True, timeout=120)
    lines = run.stdout.splitlines()
    assert len(lines) == len(BIDS)
    assert [
        line
        for line in lines
        if "beech.xlsx" in line and "the process ended while working on this file" in line
    ]
    assert len(list((evaluation / "out").glob("*.result.json"))) == len(BIDS) - 2


def test_a_fault_of_the_program_names_its_bid(
    evaluation: Path, rules: Tender, monkeypatch: pytest.MonkeyPatch
) -> None:
    def faulty(path: Path, **_: object) -> None:
        raise RuntimeError(f"broken on {path.name}")

    monkeypatch.setattr(work_module.pipeline, "assess", faulty)
    result = assess_many([evaluation / "bids" / "alder.xlsx"], out=evaluation / "out", tender=rules)
    assert "program failed on this file (RuntimeError: broken on alder.xlsx)" in result.bids[0].error


def test_folders_are_searched_and_odd_files_are_named_or_passed_over(tmp_path: Path) -> None:
    for name in (
        "b.xlsx",
        "a.csv",
        "sub/c.pdf",
        "~$b.xlsx",
        ".hidden.xlsx",
        "README.md",
        "b.report.pdf",
        "notes.png",
    ):
        path = tmp_path / name
        path.parent.mkdir(exist_ok=True)
        path.write_bytes(b"x")
    found = find_bids([tmp_path, tmp_path / "b.xlsx", tmp_path / "missing.xlsx"])
    assert [bid.path.name for bid in found] == ["a.csv", "b.xlsx", "c.pdf", "missing.xlsx"]


def test_bids_of_one_name_get_folders_of_their_own(tmp_path: Path) -> None:
    for folder in ("north", "south"):
        (tmp_path / folder).mkdir()
        (tmp_path / folder / "bid.xlsx").write_bytes(b"x")
    (tmp_path / "south" / "bid.csv").write_bytes(b"x")
    (tmp_path / "other.xlsx").write_bytes(b"x")
    folders = {str(b.path.relative_to(tmp_path)): b.folder for b in find_bids([tmp_path])}
    assert folders == {
        "other.xlsx": "",
        "north/bid.xlsx": "north__bid_xlsx",
        "south/bid.csv": "south__bid_csv",
        "south/bid.xlsx": "south__bid_xlsx",
    }


def test_progress_counts_every_bid(evaluation: Path, rules: Tender) -> None:
    seen: list[tuple[int, int]] = []
    assess_many(
        [evaluation / "bids"], out=evaluation / "out", tender=rules, formats=("json",),
        progress=lambda done, of, _: seen.append((done, of)),
    )  # fmt: skip
    assert seen == [(i, 9) for i in range(1, 10)]
