"""The words of tender clauses, loaded from data/requirement_words.toml and the dictionary.

A term is matched whole, in any case and with any spacing; the longest match at a place wins, so
'not less than' is never read as 'less than'.
"""

from __future__ import annotations

import functools
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass
from enum import StrEnum

from speccheck.dictionary import parameters, synonyms
from speccheck.kept import toml


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
    """Terms of one kind: folded term to what it says, and the lengths to try by first letter, longest first.

    Looked up, not searched: a pattern of all names of parameters takes longer to compile than a bid to judge.
    """

    kind: Kind
    meaning: Mapping[str, str]
    lengths: Mapping[str, tuple[int, ...]]

    def match(self, text: str, start: int) -> tuple[str, str] | None:
        """Longest term beginning at `start`, with its meaning."""
        folded, at, origin = _folded_text(text)
        first = at[start]
        for length in self.lengths.get(folded[first : first + 1], ()):
            last = first + length
            said = self.meaning.get(folded[first:last]) if last < len(origin) else None
            if said is not None and _stands_alone(text, start, origin[last]):
                return text[start : origin[last]], said
        return None

    def finditer(self, text: str) -> Iterator[tuple[int, str]]:
        """Place and text of each term, from left to right, none within another."""
        place = 0
        while place < len(text):
            found = None if text[place].isspace() else self.match(text, place)
            if found:
                yield place, found[0]
            place += len(found[0]) if found else 1


def fold(term: str) -> str:
    """A term in lower case with single spaces."""
    return " ".join(term.casefold().split())


def vocabulary(kind: Kind, meaning: Mapping[str, str]) -> Vocabulary:
    """Terms made ready to be found in any case and spacing."""
    folded = {fold(term): said for term, said in meaning.items() if term.strip()}
    lengths: dict[str, set[int]] = {}
    for term in folded:
        lengths.setdefault(term[0], set()).add(len(term))
    ordered = {first: tuple(sorted(found, reverse=True)) for first, found in lengths.items()}
    return Vocabulary(kind, folded, ordered)


@functools.lru_cache(maxsize=8)
def _folded_text(text: str) -> tuple[str, tuple[int, ...], tuple[int, ...]]:
    """A text folded, the folded place of each letter, and the letter of each folded place.

    A letter that folds to two, such as ß, is never cut: no letter stands at its second place (-1).
    """
    folded: list[str] = []
    at: list[int] = []
    origin: list[int] = []
    for place, letter in enumerate(text):
        at.append(len(folded))
        if letter.isspace():
            if folded and folded[-1] == " ":
                at[-1] -= 1
                continue
            folded.append(" ")
            origin.append(place)
        else:
            folds = letter.casefold()
            folded.extend(folds)
            origin.extend((place, *(-1 for _ in folds[1:])))
    at.append(len(folded))
    origin.append(len(text))
    return "".join(folded), tuple(at), tuple(origin)


def _stands_alone(text: str, start: int, end: int) -> bool:
    """Whether neither end of a term lies inside a word."""
    if end <= start:
        return False
    runs_on = end < len(text) and _of_word(text[end]) and text[end - 1].isalnum()
    return not runs_on and not (start and _of_word(text[start - 1]) and text[start].isalnum())


def _of_word(letter: str) -> bool:
    return letter.isalnum() or letter == "_"


@functools.cache
def words() -> Mapping[str, Mapping[str, list[str]]]:
    """The word lists of the data file."""
    return toml("requirement_words.toml")


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
            _add(meaning, terms, key)
        meaning.setdefault(fold(parameter.label), key)
    for table in synonyms().values():
        for key, terms in table.items():
            if "+" in key and set(key.split("+")) <= parameters().keys():
                _add(meaning, terms, key)
    for key, listed in words()["parameter"].items():
        meaning.update({fold(term): key for term in listed})
    meaning.update({fold(term): key for term, key in house})
    return vocabulary(Kind.PARAMETER, meaning)


def _add(meaning: dict[str, str], terms: Iterable[str], key: str) -> None:
    for term in terms:
        if len(term) > 1:
            meaning.setdefault(fold(term), key)


def _inverted(lists: Mapping[str, list[str]]) -> dict[str, str]:
    return {term: said for said, terms in lists.items() for term in terms}
