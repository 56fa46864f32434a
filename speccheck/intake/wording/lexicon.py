"""The words of tender clauses, loaded from data/requirement_words.toml and the dictionary.

A term is matched whole, in any case and with any spacing; the longest match at a place wins, so
'not less than' is never read as 'less than'.
"""

from __future__ import annotations

import functools
import re
import tomllib
from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from enum import StrEnum
from importlib import resources

from speccheck.dictionary import parameters, synonyms


class Kind(StrEnum):
    """What a token of a clause says."""

    PARAMETER = "parameter"
    COMPARATOR = "comparator"
    QUANTITY = "quantity"
    BAND_NAME = "band name"
    CONNECTOR = "connector"
    INGRESS = "ingress code"
    BRANCHES = "branches"
    STANDARD = "standard"
    VERSION = "version"
    LEVEL = "level"
    STATISTIC = "statistic"
    SCOPE = "scope"
    ORDER = "order"
    PLANE = "plane"
    JOIN = "join"
    MARK = "mark"
    FILLER = "filler"
    UNREAD = "unread"


@dataclass(frozen=True, slots=True)
class Vocabulary:
    """Terms of one kind: folded term to what it says, and the pattern that finds any of them."""

    kind: Kind
    meaning: Mapping[str, str]
    pattern: re.Pattern[str]

    def match(self, text: str, start: int) -> tuple[str, str] | None:
        """Longest term beginning at `start`, with its meaning."""
        found = self.pattern.match(text, start)
        return (found.group(), self.meaning[fold(found.group())]) if found else None


def fold(term: str) -> str:
    """A term in lower case with single spaces."""
    return " ".join(term.casefold().split())


def vocabulary(kind: Kind, meaning: Mapping[str, str]) -> Vocabulary:
    """Compile terms so that the longest alternative is tried first."""
    folded = {fold(term): said for term, said in meaning.items() if term.strip()}
    ordered = sorted(folded, key=len, reverse=True)
    pattern = "|".join(_as_pattern(term) for term in ordered) or r"(?!)"
    return Vocabulary(kind, folded, re.compile(pattern, re.IGNORECASE))


def _as_pattern(term: str) -> str:
    body = r"\s+".join(re.escape(word) for word in term.split())
    before = r"(?<!\w)" if term[0].isalnum() else ""
    after = r"(?!\w)" if term[-1].isalnum() else ""
    return f"{before}{body}{after}"


@functools.cache
def words() -> Mapping[str, Mapping[str, list[str]]]:
    """The word lists of the data file."""
    text = resources.files("speccheck").joinpath("data/requirement_words.toml").read_text(encoding="utf-8")
    return tomllib.loads(text)


@functools.cache
def general_vocabularies() -> tuple[Vocabulary, ...]:
    """Vocabularies that do not depend on a tender's house synonyms."""
    kinds = {
        Kind.LEVEL: "level",
        Kind.COMPARATOR: "comparator",
        Kind.STATISTIC: "statistic",
        Kind.PLANE: "plane",
        Kind.JOIN: "join",
        Kind.FILLER: "filler",
    }
    scope = vocabulary(Kind.SCOPE, {term: term for term in words()["scope"]["words"]})
    return (*(vocabulary(kind, _inverted(words()[name])) for kind, name in kinds.items()), scope)


def parameter_vocabulary(house: Mapping[str, str]) -> Vocabulary:
    """Names of parameters: dictionary headings, words of clauses, and the tender's own synonyms."""
    return _parameter_vocabulary(tuple(sorted(house.items())))


_IDENTITIES = ("model", "part_number", "manufacturer", "revision", "remarks", "panel_type")
"""Headings such as 'panel' or 'antenna' that in a clause are no parameter."""


@functools.lru_cache(maxsize=8)
def _parameter_vocabulary(house: tuple[tuple[str, str], ...]) -> Vocabulary:
    meaning: dict[str, str] = {}
    for key, parameter in parameters().items():
        if key in _IDENTITIES:
            continue
        for terms in parameter.headings.values():
            meaning.update(_new(terms, key, meaning))
        meaning.setdefault(fold(parameter.label), key)
    for table in synonyms().values():
        for key, terms in table.items():
            if "+" in key and set(key.split("+")) <= parameters().keys():
                meaning.update(_new(terms, key, meaning))
    for key, listed in words()["parameter"].items():
        meaning.update({fold(term): key for term in listed})
    meaning.update({fold(term): key for term, key in house})
    return vocabulary(Kind.PARAMETER, meaning)


def _new(terms: Iterable[str], key: str, known: Mapping[str, str]) -> dict[str, str]:
    return {fold(term): key for term in terms if len(term) > 1 and fold(term) not in known}


def _inverted(lists: Mapping[str, list[str]]) -> dict[str, str]:
    return {term: said for said, terms in lists.items() for term in terms}
