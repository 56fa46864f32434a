"""Words of headings in the form they are compared in."""

from __future__ import annotations

import functools
import re
import tomllib
import unicodedata
from importlib import resources
from typing import Any

_SPECIAL_LETTERS = str.maketrans(
    {"ł": "l", "ø": "o", "đ": "d", "œ": "oe", "æ": "ae", "ı": "i", "φ": "phi", "θ": "theta"}
)
_ELIDED = re.compile(r"\b(?:d|l|dell|all|dall|nell|sull|qu)['’]")
_NOT_WORDS = re.compile(r"[^\w°±λ&]+|_")


def fold(text: str) -> tuple[str, ...]:
    """Words of a heading without case, accents, hyphens, plural s and articles.

    >>> fold("Side-lobes of the main beam"), fold("Öffnungswinkel")
    (('sidelobe', 'main', 'beam'), ('offnungswinkel',))
    """
    raw = [word for word in _NOT_WORDS.sub(" ", _unaccented(text)).split() if word not in ("the", "a")]
    same, articles = _same(), _articles()
    words: list[str] = []
    index = 0
    while index < len(raw):
        pair = same.get(" ".join(raw[index : index + 2]))
        if pair and index + 1 < len(raw):
            words.extend(pair.split())
            index += 2
            continue
        word = same.get(raw[index]) or _singular(raw[index])
        if word not in articles:
            words.append(word)
        index += 1
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
    path = resources.files("speccheck").joinpath("data", "headings", "words.toml")
    return tomllib.loads(path.read_text(encoding="utf-8"))


def without_neutral(words: tuple[str, ...]) -> tuple[str, ...]:
    """Words without those that name no parameter, such as 'number', 'nominal', 'antenna'."""
    return tuple(word for word in words if word not in word_list("neutral"))


def _unaccented(text: str) -> str:
    plain = _ELIDED.sub(" ", text.replace("ß", "sz").casefold())
    if plain.isascii():
        return plain
    plain = unicodedata.normalize("NFKD", plain.translate(_SPECIAL_LETTERS))
    return "".join(c for c in plain if not unicodedata.combining(c))


def _singular(word: str) -> str:
    if word.endswith("sses"):
        return word[:-2]
    return word[:-1] if len(word) > 3 and word.endswith("s") and not word.endswith("ss") else word


@functools.cache
def _articles() -> frozenset[str]:
    return frozenset(_unaccented(word) for word in heading_words()["articles"].split())


@functools.cache
def _same() -> dict[str, str]:
    return {_unaccented(form): word for word, forms in heading_words()["same"].items() for form in forms}
