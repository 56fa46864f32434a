"""A quick look at a text: whether it holds any word that headings are made of."""

from __future__ import annotations

import re
from functools import cache, lru_cache

from speccheck.dictionary import concept_words, spellings, synonyms
from speccheck.intake.tables.words import fold
from speccheck.kept import kept
from speccheck.quantities.units import unit_name

_SOURCES = (
    "data/headings/*.toml",
    "dictionary/*.py",
    "intake/**/vocabulary.py",
    "intake/**/words.py",
    "**/units.py",
)
_RUN = re.compile(r"[^\W\d_]+")


def runs(text: str) -> list[str]:
    """The runs of letters of a text."""
    return _RUN.findall(text)


@lru_cache(maxsize=20_000)
def stem(word: str) -> str:
    """The first letters of a word, folded."""
    return fold(word)[:4]


@cache
def vocabulary() -> frozenset[str]:
    """First letters of all words of the dictionary's headings: a text without any of them is no heading."""
    return kept("vocabulary", _SOURCES, _first_letters)


def _first_letters() -> frozenset[str]:
    texts = (text for table in synonyms().values() for headings in table.values() for text in headings)
    words = set(runs("\n".join(texts))).union(concept_words(), spellings())
    return frozenset(stem(word) for word in words if not unit_name(word))
