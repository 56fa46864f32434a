"""Titles of a short name, perhaps beside a word for the paper: 'Ficha técnica Aldaya 3L', 'Valmora P7'."""

from __future__ import annotations

import re
from functools import lru_cache

from speccheck.intake.tables.names.titles import is_name_word
from speccheck.intake.tables.vocabulary import stem, vocabulary
from speccheck.intake.tables.words import fold, is_band_nickname, is_group_word, names_array, title_prefixes

_OF_ENGLISH, _OF_GERMAN, _OF_POLISH = ("of", "for"), ("der", "des", "fur"), ("dla",)
_OF_LATIN = ("de", "du", "del", "della", "di", "da", "do", "pour", "per", "para")
_OF_DUTCH = ("van", "voor")
_OF = frozenset({*_OF_ENGLISH, *_OF_GERMAN, *_OF_POLISH, *_OF_LATIN, *_OF_DUTCH})
_MARKS = " :,;|()[]–—-"
_LONGEST_PAPER = 5
_SHORT_CODE = re.compile(r"[A-Z]{1,2}\d{1,2}|\d{1,2}[A-Z]{1,2}")
_NUMBER = re.compile(r"\d{1,4}(?:[/-]\d{1,4})*")
_YEAR = re.compile(r"(?:19|20)\d\d")
_SHORTEST, _MOST_WORDS = 4, 3


@lru_cache(maxsize=20_000)
def without_paper(text: str) -> str:
    """A title without the word for the paper before or behind it; the title itself where nothing is left.

    >>> without_paper("Ficha técnica Aldaya 3L"), without_paper("Kaldora 8 – Datenblatt")
    ('Aldaya 3L', 'Kaldora 8')
    """
    words = text.split()
    papers = title_prefixes("papers")
    begin = [fold(word) for word in words[: _LONGEST_PAPER + 1]]
    end = [fold(word) for word in words[-_LONGEST_PAPER:]]
    for size in range(min(_LONGEST_PAPER, len(words) - 1), 0, -1):
        if " ".join(begin[:size]).strip(_MARKS) in papers:
            linked = words[size:] if begin[size] not in _OF else words[size + 1 :]
            return " ".join(linked).strip(" :–—-") or " ".join(words)
        if " ".join(end[-size:]).strip(_MARKS) in papers:
            return " ".join(words[:-size]).strip(" :,–—-") or " ".join(words)
    return " ".join(words)


def is_paper_of_name(text: str) -> bool:
    """Whether a word for the paper stands beside what can be a name with a figure: 'Datenblatt Kaldora 8'."""
    name = without_paper(text)
    first, *others = name.split() or [""]
    return name != " ".join(text.split()) and bool(others) and _is_coined(first) and _are_numbers(others)


def is_coined_name(text: str) -> bool:
    """Whether a text is a word that is none of the trade and a short code: 'Valmora P7', not 'Section A1'."""
    first, *others = text.split() or [""]
    coined = bool(others) and _is_coined(first) and _SHORT_CODE.fullmatch(others[-1]) is not None
    return coined and _are_numbers(others) and stem(first) not in vocabulary()


def _is_coined(word: str) -> bool:
    known = is_group_word(word) or fold(word) in title_prefixes("counted")
    return len(word) >= _SHORTEST and word.isalpha() and is_name_word(word) and not known


def _are_numbers(words: list[str]) -> bool:
    """Whether the words behind a name are more of it, the last a figure that is no year or array."""
    last = words[-1]
    figure = _NUMBER.fullmatch(last) is not None and not _YEAR.fullmatch(last)
    apart = is_band_nickname(last) or names_array(" ".join(words))
    return (
        len(words) < _MOST_WORDS
        and (figure or _SHORT_CODE.fullmatch(last) is not None)
        and not apart
        and all(map(is_name_word, words[:-1]))
        and (last[0].isdigit() or is_name_word(last))
    )


def settled_by_sheet(title: str, sheet: str) -> str:
    """The name of a sheet that ends the title behind words in lower case or of the trade; empty for others.

    >>> settled_by_sheet("Karta wyrobu Aldaya 3L", "Aldaya 3L"), settled_by_sheet("Vela KD-12", "KD-12")
    ('Aldaya 3L', '')
    """
    words, name = title.split(), sheet.split()
    before = words[: -len(name)]
    named = any(map(str.isdigit, sheet)) and any(len(word) >= _SHORTEST for word in name)
    if not named or not before or fold(" ".join(words[len(before) :])) != fold(" ".join(name)):
        return ""
    return " ".join(words[len(before) :]) if not is_name_word(before[-1]) else ""
