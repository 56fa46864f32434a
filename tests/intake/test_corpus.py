"""The reader on 32 bids in differing habits, against expectations written by hand."""

from __future__ import annotations

from pathlib import Path

import pytest
from intake import build_corpus, score

FILES = score.corpus([])


@pytest.mark.parametrize(("source", "expected"), FILES, ids=[source.stem for source, _ in FILES])
def test_a_bid_is_read_as_a_person_reads_it(source: Path, expected: Path) -> None:
    result = score.score(source, score.expectations(expected))
    assert result.wrong == []
    assert result.right >= 0.97 * result.total, result.missed


def test_the_files_are_those_the_builder_makes(tmp_path: Path) -> None:
    for made in build_corpus.write(tmp_path / "corpus"):
        assert made.read_bytes() == (build_corpus.CORPUS / made.name).read_bytes(), made.name


def test_the_corpus_is_as_wide_as_asked_for() -> None:
    assert len(FILES) >= 25
