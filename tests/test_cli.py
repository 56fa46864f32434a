"""The command line as a user meets it: screens, files, exit codes, one message for each trouble."""

from __future__ import annotations

import json
from pathlib import Path

import pytest
from click.testing import CliRunner, Result

import speccheck
from speccheck.cli import cli, main

SAMPLES = Path(__file__).parents[1] / "sample_specs"
SOUND = SAMPLES / "eskerfold-slim.xlsx"
WRONG = SAMPLES / "cindermoor-beam.xlsx"
TENDER = SAMPLES / "tender.xlsx"


def run(*words: object) -> Result:
    return CliRunner().invoke(cli, [str(word) for word in words])


def test_folder_of_bids_finds_its_tender_and_shows_every_panel(tmp_path: Path) -> None:
    done = run("check", SAMPLES, "--out", tmp_path, "--formats", "json")
    assert done.exit_code == 1, done.output
    assert "found among the bids" in done.output
    for panel in (
        "Quay Column 12",
        "Brack 64",
        "Brack 32",
        "Cinder Beam 128",
        "Twin 17",
        "Wide 17",
        "Slim 08",
    ):
        assert panel in done.output
    assert (tmp_path / "comparison.json").is_file()


def test_sound_bid_ends_with_zero(tmp_path: Path) -> None:
    done = run("check", SOUND, "--tender", TENDER, "--out", tmp_path, "--formats", "json")
    assert done.exit_code == 0, done.output


def test_every_format_is_written_whole(tmp_path: Path) -> None:
    run("check", SOUND, "--out", tmp_path)
    names = {
        path.name.removeprefix("eskerfold-slim") for path in tmp_path.iterdir() if path.suffix != ".done"
    }
    assert {".report.html", ".report.pdf", ".review.xlsx", ".result.json"} <= names


def test_copy_for_a_bidder_holds_no_trace_of_the_others(tmp_path: Path) -> None:
    run("check", SAMPLES, "--out", tmp_path, "--formats", "html,json", "--copy-for", "brackwater-active")
    copies = list((tmp_path / "copy-for-brackwater-active").iterdir())
    assert {path.suffix for path in copies} == {".html", ".json"}
    for path in copies:
        text = path.read_text(encoding="utf-8")
        assert "Brack 64" in text
        assert not any(name in text for name in ("Cinder", "Dunlyre", "Eskerfold", "Aldervane"))


def test_damaged_bid_is_named_and_the_others_are_done(tmp_path: Path) -> None:
    broken = tmp_path / "broken.xlsx"
    broken.write_bytes(SOUND.read_bytes()[:2000])
    done = run("check", broken, SOUND, "--out", tmp_path / "out", "--formats", "json")
    assert done.exit_code == 3
    assert "broken.xlsx" in done.output
    assert (tmp_path / "out" / "eskerfold-slim.result.json").is_file()


@pytest.mark.parametrize(
    "words", [("check",), ("check", SOUND, "--formats", "doc"), ("explain", "no-such-check")]
)
def test_wrong_usage_ends_with_two(words: tuple[object, ...]) -> None:
    assert run(*words).exit_code == 2


def test_empty_folder_is_wrong_usage(tmp_path: Path) -> None:
    assert run("check", tmp_path).exit_code == 2


def test_read_shows_raw_text_cell_and_figure() -> None:
    done = run("read", SOUND)
    assert done.exit_code == 0
    assert "9.84 in" in done.output
    assert "B8" in done.output
    assert max(map(len, done.output.splitlines())) <= 100


def test_read_of_a_tender_shows_wording_beside_reading() -> None:
    done = run("read", TENDER)
    assert "NOT CONFIRMED" in done.output
    assert "VSWR ≤ 1.5:1" in done.output


def test_explain_lists_all_checks_and_tells_one() -> None:
    assert "vertical-spacing" in run("explain").output
    told = run("explain", "vertical-spacing").output
    for word in ("Formula", "Assumptions", "Worked example", "Source"):
        assert word in told


def test_form_is_written_and_named(tmp_path: Path) -> None:
    done = run("form", tmp_path / "form.xlsx", "--tender", TENDER)
    assert done.exit_code == 0, done.output
    assert (tmp_path / "form.xlsx").is_file()


def test_compare_of_a_result_with_itself_finds_nothing(tmp_path: Path) -> None:
    run("check", SOUND, "--out", tmp_path, "--formats", "json")
    result = tmp_path / "eskerfold-slim.result.json"
    done = run("compare", result, result)
    assert done.exit_code == 0, done.output


def test_unusable_input_outside_a_batch_ends_with_three_and_one_message(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    monkeypatch.setattr("sys.argv", ["speccheck", "read", str(tmp_path / "absent.xlsx")])
    with pytest.raises(SystemExit) as stopped:
        main()
    assert stopped.value.code == 3
    assert "absent.xlsx" in capsys.readouterr().err


def test_public_calls_work_from_the_package(tmp_path: Path) -> None:
    assert speccheck.assess(WRONG).panels[0].outcome == "clarify"
    evaluation = speccheck.assess_many([SOUND], out=tmp_path, formats=("json",))
    stored = json.loads((tmp_path / "eskerfold-slim.result.json").read_text(encoding="utf-8"))
    assert stored["panels"][0]["outcome"] == evaluation.bids[0].offers[0].outcome
