"""Headings that nobody listed word for word, taken apart into known words.

Every word must belong to a concept of ``data/headings/concepts.toml`` and one rule must account for
all of them: a heading with a word that is not understood is no match.
"""

from __future__ import annotations

import functools
import itertools
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from speccheck.dictionary.folding import fold, without_neutral
from speccheck.kept import kept, toml

_MOST_WORDS = 12
_FILLER = "filler"
_TELLING = frozenset(
    {
        "horizontal",
        "vertical",
        "upper",
        "lateral",
        "rear",
        "element",
        "subarray",
        "column",
        "row",
        "percolumn",
    }
    | {"mechanical", "interband", "allports", "pertrx", "withbracket", "consumption", "tilt", "sector"}
    | {"returnloss", "vswr", "isolation", "pim", "loss", "tenwidth"}
)


@dataclass(frozen=True, slots=True)
class Rule:
    """Concepts that make a parameter: all of `needs` (each a set of alternatives), perhaps `may`."""

    parameter: str
    needs: tuple[frozenset[str], ...]
    may: frozenset[str]

    def fits(self, concepts: frozenset[str]) -> bool:
        """Whether the rule accounts for all the concepts of a heading."""
        allowed = self.may.union(*self.needs)
        return concepts <= allowed and all(need & concepts for need in self.needs)


@functools.lru_cache(maxsize=4096)
def by_concepts(words: tuple[str, ...]) -> str:
    """Parameter key of a heading's words by the one rule that fits best; empty if none or several do.

    >>> by_concepts(("halfpower", "width", "azimuth", "plane")), by_concepts(("gain", "money"))
    ('horizontal_beamwidth', '')
    """
    plain = without_neutral(words)
    if not plain or len(plain) > _MOST_WORDS:
        return ""
    best: dict[str, int] = {}
    for concepts in itertools.islice(_readings(plain), 64):
        for rule in rules():
            if rule.fits(concepts):
                best[rule.parameter] = max(best.get(rule.parameter, 0), len(rule.needs))
    top = max(best.values(), default=0)
    winners = [parameter for parameter, needs in best.items() if needs == top]
    return winners[0] if len(winners) == 1 else ""


@functools.cache
def rules() -> tuple[Rule, ...]:
    """The rules of the file.

    Raises
    ------
    ValueError : a rule that names a concept without words
    """
    tables = _tables()
    made = tuple(
        Rule(r["parameter"], tuple(frozenset(n.split("|")) for n in r["needs"]), frozenset(r["may"]))
        for r in tables["rules"]
    )
    for rule in made:
        unknown = rule.may.union(*rule.needs) - set(tables["words"])
        if unknown:
            raise ValueError(f"concepts.toml: rule for {rule.parameter} names {', '.join(sorted(unknown))}")
    return made


@functools.cache
def _tables() -> dict[str, Any]:
    return toml("headings/concepts.toml")


@functools.cache
def _phrases() -> dict[tuple[str, ...], tuple[str, ...]]:
    """Folded phrase to the concepts it may stand for."""
    return kept("concepts", ("data/headings/*.toml", "dictionary/*.py"), _folded_phrases)


def _folded_phrases() -> dict[tuple[str, ...], tuple[str, ...]]:
    table: dict[tuple[str, ...], tuple[str, ...]] = {}
    for concept, phrases in _tables()["words"].items():
        for phrase in phrases:
            words = without_neutral(fold(phrase)) or fold(phrase)
            if words and concept not in table.get(words, ()):
                table[words] = (*table.get(words, ()), concept)
    return table


@functools.cache
def concept_words() -> frozenset[str]:
    """All words that any concept is made of."""
    return frozenset(word for phrase in _phrases() for word in phrase)


@functools.cache
def telling_words() -> frozenset[str]:
    """Single words of the concepts that tell one parameter from another."""
    phrases = (phrase for phrase, concepts in _phrases().items() if _TELLING.intersection(concepts))
    return frozenset(phrase[0] for phrase in phrases if len(phrase) == 1 and not phrase[0].isdigit())


@functools.cache
def _longest() -> int:
    return max(map(len, _phrases()))


def _readings(words: tuple[str, ...]) -> Iterator[frozenset[str]]:
    """Every way of cutting the words into phrases, longest phrases first."""
    if not words:
        yield frozenset()
        return
    for length in range(min(_longest(), len(words)), 0, -1):
        for concept in _phrases().get(words[:length], ()):
            for rest in _readings(words[length:]):
                yield rest if concept == _FILLER else rest | {concept}
