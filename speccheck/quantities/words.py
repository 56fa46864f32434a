"""Small words around figures in eight languages, from ``data/cell_words.toml``."""

from __future__ import annotations

import functools
from typing import Any

from speccheck.kept import toml

ERROR_VALUES = frozenset(
    {"#div/0!", "#n/a", "#name?", "#null!", "#num!", "#ref!", "#value!", "#spill!", "#calc!", "#getting_data"}
)
"""Errors of spreadsheet programs, case-folded."""


@functools.cache
def _tables() -> dict[str, Any]:
    return toml("cell_words.toml")


@functools.cache
def roles() -> dict[str, tuple[tuple[str, str], ...]]:
    """Phrase to its roles (range, min, max, better, statistic, from, at, and), each with a statistic's name.

    Several stand in the order they are tried: 'bis' joins a range behind a figure, else it is a bound.
    """
    table: dict[str, tuple[tuple[str, str], ...]] = {}
    for section in ("joint", "sense", "statistic"):
        for name, phrases in _tables()[section].items():
            role = ("statistic", name) if section == "statistic" else (name, "")
            for phrase in phrases:
                key = phrase.casefold()
                table[key] = (*table.get(key, ()), role)
    return table


@functools.cache
def longest_phrase() -> int:
    """Most words in a phrase that has a role."""
    return max(len(phrase.split()) for phrase in roles())


@functools.cache
def statuses() -> dict[str, str]:
    """Text of a whole cell to its status."""
    return {p.casefold(): status for status, phrases in _tables()["status"].items() for p in phrases}


@functools.cache
def referrals() -> tuple[str, ...]:
    """Beginnings of a cell that points elsewhere."""
    return tuple(beginning.casefold() for beginning in _tables()["referred"]["beginnings"])


@functools.cache
def word_set(name: str) -> frozenset[str]:
    """A plain list of the file: ``understood``, ``tilt``, ``answers``."""
    return frozenset(word.casefold() for word in _tables()[name]["words"])


@functools.cache
def number_words() -> dict[str, str]:
    """A small number in words to its digits."""
    return {word.casefold(): digits for digits, words in _tables()["numbers"].items() for word in words}
