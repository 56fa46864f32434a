"""The worked examples in the documentation of the readers hold."""

from __future__ import annotations

import doctest
import importlib

import pytest

READERS = "attachments cell counts lexer numerals settling spectrum statuses tidy units"
MODULES = READERS.split()


PATHS = [
    *(f"quantities.{m}" for m in MODULES),
    *(f"dictionary.{m}" for m in ("concepts", "folding", "matching")),
]


@pytest.mark.parametrize("module", PATHS)
def test_examples(module: str) -> None:
    found = doctest.testmod(importlib.import_module(f"speccheck.{module}"))
    assert found.failed == 0
