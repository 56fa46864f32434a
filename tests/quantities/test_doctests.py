"""The worked examples in the documentation of the readers hold."""

from __future__ import annotations

import doctest
import importlib

import pytest

MODULES = ["attachments", "cell", "counts", "lexer", "numerals", "settling", "spectrum", "statuses", "tidy", "units"]


@pytest.mark.parametrize(
    "module", [*(f"quantities.{m}" for m in MODULES), "dictionary.folding", "dictionary.matching"]
)
def test_examples(module: str) -> None:
    found = doctest.testmod(importlib.import_module(f"speccheck.{module}"))
    assert found.failed == 0
