"""Words of headings in the form they are compared in."""

from __future__ import annotations

import functools
import re
import unicodedata
from typing import Any

from speccheck.kept import toml

_SPECIAL_LETTERS = str.maketrans(
    {"ł": "l", "ø": "o", "đ": "d", "œ": "oe", "æ": "ae", "ı": "i", "φ": "phi", "θ": "theta"}
)
_ELIDED = re.compile(r"\b(?:d|l|dell|all|dall|nell|sull|qu)['’]")
_COMBINING = re.compile(r"[\u0300-\u036f]")
_NOT_WORDS = re.compile(r"[^\w°±λ&]+|_")


def fold(text: str) -> tuple[str, ...]:
    """Words of a heading without case, accents, hyphens, plural s and articles.

    >>> fold("Side-lobes of the main beam"), fold("Öffnungswinkel")
    (('sidelobe', 'main', 'beam'), ('offnungswinkel',))
    """
    raw = [word for word in _NOT_WORDS.sub(" ", _unaccented(text)).split() if word not in ("the", "a")]
    same, pairs, articles = _same(), _pairs(), _articles()
    words: list[str] = []
    follows_pair = False
    for index, plain in enumerate(raw):
        if follows_pair:
            follows_pair = False
            continue
        if plain in pairs and index + 1 < len(raw) and (pair := pairs[plain].get(raw[index + 1])):
            words.extend(pair.split())
            follows_pair = True
            continue
        word = same.get(plain) or _singular(plain)
        if word not in articles:
            words.append(word)
    return tuple(words)


def key_of(words: tuple[str, ...]) -> str:
    """Words regardless of their order."""
    return " ".join(sorted(words))


@functools.cache
def word_list(name: str) -> frozenset[str]:
    """A list of ``data/headings/words.toml`` by name, folded."""
    return frozenset(word for entry in heading_words()[name].split() for word in fold(entry))


@functools.cache
def heading_words() -> dict[str, Any]:
    """The tables of ``data/headings/words.toml``."""
    return toml("headings/words.toml")


def without_neutral(words: tuple[str, ...]) -> tuple[str, ...]:
    """Words without those that name no parameter, such as 'number', 'nominal', 'antenna'."""
    return tuple(word for word in words if word not in word_list("neutral"))


def _unaccented(text: str) -> str:
    plain = _ELIDED.sub(" ", text.replace("ß", "sz").casefold())
    if plain.isascii():
        return plain
    plain = unicodedata.normalize("NFKD", plain.translate(_SPECIAL_LETTERS))
    return _COMBINING.sub("", plain)


def _singular(word: str) -> str:
    if word.endswith("sses"):
        return word[:-2]
    return word[:-1] if len(word) > 3 and word.endswith("s") and not word.endswith("ss") else word


@functools.cache
def _articles() -> frozenset[str]:
    return frozenset(_unaccented(word) for word in heading_words()["articles"].split())


@functools.cache
def _same() -> dict[str, str]:
    """Spelling to the word it counts as."""
    return {form: word for form, word in _spellings() if " " not in form}


@functools.cache
def _pairs() -> dict[str, dict[str, str]]:
    """First and second word of two-word spellings to the word, or words, they count as."""
    table: dict[str, dict[str, str]] = {}
    for form, word in _spellings():
        first, _, second = form.partition(" ")
        if second:
            table.setdefault(first, {})[second] = word
    return table


@functools.cache
def spellings() -> frozenset[str]:
    """Single words of other spellings and abbreviations, unaccented."""
    return frozenset(word for form, _ in _spellings() for word in form.split())


def _spellings() -> list[tuple[str, str]]:
    return [(_unaccented(form), word) for word, forms in heading_words()["same"].items() for form in forms]
