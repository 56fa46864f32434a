"""Folded headings to parameters, and the headings nearest to an unknown one."""

from __future__ import annotations

import difflib
import functools

from speccheck.dictionary.concepts import by_concepts, concept_words
from speccheck.dictionary.folding import fold, heading_words, key_of, without_neutral, word_list
from speccheck.dictionary.parameters import parameters, synonyms
from speccheck.kept import kept

_LONGEST_SUGGESTED = 80
_QUALIFIERS = frozenset({"max", "min", "typical", "mean", "cw", "rms", "rated"})
_SOURCES = ("data/parameters.toml", "data/headings/*.toml", "dictionary/*.py")
_TRANSCRIBED = str.maketrans({"ä": "ae", "ö": "oe", "ü": "ue", "Ä": "Ae", "Ö": "Oe", "Ü": "Ue"})


@functools.cache
def index() -> dict[str, str]:
    """Folded heading to parameter key, or keys joined by ``+``.

    Raises
    ------
    ValueError : a heading claimed by two parameters, or one for an unknown parameter
    """
    return kept("headings", _SOURCES, _index)


def _index() -> dict[str, str]:
    table: dict[str, str] = {}
    for language, headings in synonyms().items():
        for key, texts in headings.items():
            unknown = [part for part in key.split("+") if part not in parameters()]
            if unknown:
                raise ValueError(f"headings/{language}.toml: no parameter '{unknown[0]}'")
            for text in texts:
                _claim(table, text, key, language)
                if language == "de" and not text.isascii():
                    _claim(table, text.translate(_TRANSCRIBED), key, language)
    return table


def listed(words: tuple[str, ...]) -> str:
    """Parameter key of a listed heading's words, as they stand or without neutral ones; empty if unknown."""
    table = index()
    for form in (words, without_neutral(words)):
        key = table.get(key_of(form)) or table.get("".join(form)) if form else None
        if key:
            return key
    return ""


def find(words: tuple[str, ...]) -> str:
    """Parameter key of a heading's words, listed or put together from known concepts; empty if unknown."""
    return listed(words) or by_concepts(words)


@functools.cache
def known_words() -> frozenset[str]:
    """All words of listed headings and concepts, and those that must not be dropped."""
    listed_words = {word for key in index() for word in key.split()}
    return frozenset(listed_words).union(concept_words(), word_list("vital"))


def suggestions(text: str) -> tuple[str, ...]:
    """The three nearest headings with their parameters; for the reader, never taken as a match."""
    words = fold(text)[:8]
    if not words or len(text) > _LONGEST_SUGGESTED:
        return ()
    if is_ambiguous(text):
        return (_ambiguous()[key_of(tuple(word for word in words if word not in _QUALIFIERS))],)
    near: dict[tuple[str, str], int] = {}
    for stem in dict.fromkeys(word[:5] for word in words if len(word) > 2):  # a set's order changes by run
        for entry in _by_stem().get(stem, ()):
            near[entry] = near.get(entry, 0) + 1
    ranked = sorted(near, key=lambda entry: -near[entry])[:24]
    scored = [(difflib.SequenceMatcher(None, text.casefold(), t.casefold()).ratio(), t, k) for t, k in ranked]
    best = sorted((entry for entry in scored if entry[0] > 0.5), reverse=True)
    return tuple(dict.fromkeys(f"{heading} ({key})" for _, heading, key in best))[:3]


@functools.lru_cache(maxsize=1024)
def is_ambiguous(text: str) -> bool:
    """Whether a heading is known to have several meanings, such as 'Power'."""
    words = tuple(word for word in fold(text) if word not in _QUALIFIERS)
    return key_of(words) in _ambiguous()


@functools.cache
def _ambiguous() -> dict[str, str]:
    """Folded heading of more than one meaning to the meanings."""
    table = heading_words()["ambiguous"]
    return {key_of(fold(text)): meanings for meanings, texts in table.items() for text in texts}


def _claim(table: dict[str, str], text: str, key: str, language: str) -> None:
    words = fold(text)
    for form in (key_of(words), "".join(words)):
        if form and table.setdefault(form, key) != key:
            raise ValueError(f"headings/{language}.toml: '{text}' is claimed by {table[form]} and by {key}")


@functools.cache
def _by_stem() -> dict[str, list[tuple[str, str]]]:
    """First five letters of a word to the headings that hold it."""
    return kept("stems", _SOURCES, _stems)


def _stems() -> dict[str, list[tuple[str, str]]]:
    table: dict[str, list[tuple[str, str]]] = {}
    for headings in synonyms().values():
        for key, texts in headings.items():
            for text in texts:
                for stem in {word[:5] for word in fold(text) if len(word) > 2}:
                    table.setdefault(stem, []).append((text, key))
    return table
