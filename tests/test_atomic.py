"""Outputs are whole or absent."""

import errno
import io
import os

import pytest

from speccheck.atomic import write_bytes_atomic, write_text_atomic
from speccheck.errors import OutputError


def stream_that_raises(error):
    """An opener whose streams fail in the middle of writing."""

    class Failing(io.FileIO):
        def write(self, data):
            super().write(data[:1])
            raise error

    return lambda handle, _mode: Failing(handle, "wb")


def test_replaces_what_stood_there(tmp_path):
    target = tmp_path / "a.json"
    target.write_text("old")
    write_text_atomic(target, "λ new")
    assert target.read_text(encoding="utf-8") == "λ new"
    assert [p.name for p in tmp_path.iterdir()] == ["a.json"]


def test_full_disk_keeps_the_old_file_and_leaves_no_part(tmp_path, monkeypatch):
    target = tmp_path / "a.json"
    target.write_text("old")

    monkeypatch.setattr(os, "fdopen", stream_that_raises(OSError(errno.ENOSPC, os.strerror(errno.ENOSPC))))
    with pytest.raises(OutputError, match=r"a\.json: could not be written \(No space left on device\)"):
        write_bytes_atomic(target, b"new")
    assert target.read_text() == "old"
    assert [p.name for p in tmp_path.iterdir()] == ["a.json"]


def test_interruption_leaves_no_part(tmp_path, monkeypatch):
    monkeypatch.setattr(os, "fdopen", stream_that_raises(KeyboardInterrupt()))
    with pytest.raises(KeyboardInterrupt):
        write_bytes_atomic(tmp_path / "a.json", b"new")
    assert list(tmp_path.iterdir()) == []


def test_missing_folder_is_one_clear_message(tmp_path):
    with pytest.raises(OutputError, match="give a folder you may write to"):
        write_bytes_atomic(tmp_path / "absent" / "a.json", b"new")
