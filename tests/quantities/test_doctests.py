"""The worked examples in the documentation of the readers hold."""

from __future__ import annotations

import doctest
import importlib

import pytest

READERS = "attachments cell counts lexer numerals settling spectrum statuses tidy units"
MODULES = READERS.split()


@pytest.mark.parametrize(
    "module",
    [
        *(f"quantities.{m}" for m in MODULES),
        "dictionary.concepts",
        "dictionary.folding",
        "dictionary.matching",
    ],
)
def test_examples(module: str) -> None:
    found = doctest.testmod(importlib.import_module(f"speccheck.{module}"))
    assert found.failed == 0
