"""Kept things: made once, made anew after any change, never the reason for an error."""

from __future__ import annotations

import tomllib
from pathlib import Path

import pytest

from speccheck import kept as module
from speccheck.kept import PACKAGE, kept, toml


@pytest.fixture
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.setattr(module, "PACKAGE", tmp_path)
    monkeypatch.setattr(module, "_FOLDER", tmp_path / "kept")
    (tmp_path / "a.txt").write_text("1")
    return tmp_path


def made(what: object) -> object:
    module._digest.cache_clear()
    return kept("thing", ("*.txt",), lambda: what)


@pytest.mark.usefixtures("folder")
def test_what_is_kept_is_not_made_again() -> None:
    assert made({"a": (1, 2)}) == {"a": (1, 2)}
    assert made("another") == {"a": (1, 2)}


@pytest.mark.parametrize("change", [("a.txt", "2"), ("b.txt", "1")])
def test_any_change_of_its_sources_makes_it_anew(folder: Path, change: tuple[str, str]) -> None:
    made("before")
    (folder / change[0]).write_text(change[1])
    assert made("after") == "after"


@pytest.mark.parametrize("content", [b"", b"nonsense", b"i\x01\x00\x00\x00"])
def test_a_damaged_file_is_made_anew(folder: Path, content: bytes) -> None:
    made("before")
    (kept_file,) = (folder / "kept").iterdir()
    kept_file.write_bytes(content)
    assert made("after") == "after"


@pytest.mark.usefixtures("folder")
def test_a_source_that_is_not_there_is_an_error() -> None:
    with pytest.raises(FileNotFoundError, match="moved"):
        kept("thing", ("*.txt", "moved.py"), lambda: 1)


@pytest.mark.usefixtures("folder")
def test_a_folder_that_cannot_be_written_is_no_error(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(module, "_FOLDER", Path("/proc/nowhere"))
    assert made("thing") == "thing"


@pytest.mark.parametrize("path", sorted((PACKAGE / "data").rglob("*.toml")), ids=lambda path: path.name)
def test_kept_tables_are_those_of_the_files(path: Path) -> None:
    name = str(path.relative_to(PACKAGE / "data"))
    assert toml(name) == tomllib.loads(path.read_text(encoding="utf-8"))
