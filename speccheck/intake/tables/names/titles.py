"""The name of a panel in a longer title: its code and the capitalised words beside it."""

from __future__ import annotations

import re
from functools import cache
from itertools import pairwise

from speccheck.intake.tables.words import fold, generic_title_words, is_group_word, title_prefixes

_CODE = re.compile(r"(?<![\w.])(?=[\w./+-]*\d)(?=[\w./+-]*[A-Za-z])[A-Za-z0-9][\w./+-]{2,}(?![\w])")
_NOT_A_CODE = re.compile(
    r"^(?:\d+(?:[.,]\d+)?-?(?:mhz|ghz|dbi|dbd|db|mm|cm|m|kg|w|kw|n|v|deg|ports?|x\d.*)|[nb]\d{1,3}|\d+t\d+r|"
    r"ip\d\d|rev\.?\w*|v\d(?:\.\d+)*|[245]g|ts\d+.*|\d{4}-\d\d-\d\d|\d+x\d+\w*|q[1-4])$",
    re.IGNORECASE,
)
PARTS = re.compile(r"\s*[:,;|]\s+|\s+[-–—/]\s+|\s+:\s*")
_BRACKETED = re.compile(r"\s*[(\[][^()\[\]]*[)\]]")
_GENERIC = re.compile(
    r"panel|band$|sheet|daten|sector|sektor|passiv|activ|aktiv|port$|ports$|beam|array|mimo|technical|"
    r"specif|revision|issue|rev\.?$|draft|offer|tender|bid$|model|type|typ$|tipo$|anten|^n[or]\.?$|^n°$|product|dual|multi|quad|hexa|octo|penta"
)
_NUMBER_OF_NAME = re.compile(r"\d{2}[\d/.-]*|\d[/-]\d+")
_YEAR = re.compile(r"(?:19|20)\d\d(?:[-/.]\d\d?)*")
_COUNT = re.compile(r"\d{1,2}|[A-Za-z]|[IVX]{1,4}")
_SIZES = ("H", "W", "D", "L", "P")
_SHORT = 3


def codes(text: str) -> list[str]:
    """Words that read as a type designation."""
    return [m for m in _CODE.findall(text) if not _NOT_A_CODE.match(m)]


def announced(text: str) -> str:
    """The part of a title behind 'offered antenna' and the like; empty when nothing announces one."""
    parts = PARTS.split(text)
    for before, part in pairwise(parts):
        if fold(before) in title_prefixes() and any(letter.isdigit() for letter in part):
            return part
    return ""


def name_in_title(text: str) -> str:
    """The name within a title of several parts or words; empty for a plain name and where none is found.

    >>> name_in_title("Helion 64-N78 active antenna panel"), name_in_title("KD 12 v2")
    ('Helion 64-N78', '')
    """
    bare = _BRACKETED.sub("", text)
    named = announced(bare)
    parts = [part for part in PARTS.split(named or bare) if part]
    words = [word for part in parts for word in part.split()]
    plain = len(parts) == 1 and len(words) <= _SHORT and not any(map(_is_generic, words))
    if plain and bare == text and not named:
        return ""
    for part in parts:
        name = _around_code(part.split())
        if name:
            return name
    return named if len(named.split()) <= _SHORT + 1 else ""


def only_counts(text: str) -> bool:
    """Whether what is left of a title only counts: '1', 'B', 'II', 'no. 2', 'type 1'; alone it is no name."""
    *words, last = text.split() or [""]
    return _COUNT.fullmatch(last) is not None and all(map(_is_generic, words))


def counts_panels(text: str) -> bool:
    """Whether a text tells a panel from others by a letter: 'Panel A', 'Type II'; 'Panel H' is a size."""
    words, _, last = text.rpartition(" ")
    lettered = last.isalpha() and last.isupper() and _COUNT.fullmatch(last) is not None
    return lettered and bool(words) and last not in _SIZES and all(map(_is_generic, words.split()))


def is_numbered_name(text: str) -> bool:
    """Whether a short text is a name and its number, such as 'NORDA 65-12'; 'Section 12' is none."""
    words = text.split()
    pairs = [(a, b) for a, b in pairwise(words) if _NUMBER_OF_NAME.fullmatch(b) and not _YEAR.fullmatch(b)]
    return len(words) <= _SHORT + 1 and any(is_name_word(a) and not is_group_word(a) for a, _ in pairs)


def _around_code(words: list[str]) -> str:
    for index, word in enumerate(words):
        if not _is_code(word) and not (index and _is_number(word) and is_name_word(words[index - 1])):
            continue
        first = last = index
        while first > 0 and is_name_word(words[first - 1]):
            first -= 1
        shouted = all(word.isupper() for word in words if word.isalpha())
        while last + 1 < len(words) and (
            _is_code(words[last + 1]) or (is_name_word(words[last + 1]) and not shouted)
        ):
            last += 1
        return " ".join(words[first : last + 1])
    return ""


def _is_code(word: str) -> bool:
    return bool(codes(word))


def _is_number(word: str) -> bool:
    return re.fullmatch(r"\d[\d/.-]*", word) is not None


def is_name_word(word: str) -> bool:
    """Whether a word may be part of a name: capitalised and no word of the trade."""
    return word[:1].isupper() and not _is_generic(word) and not _NOT_A_CODE.match(word)


@cache
def _is_generic(word: str) -> bool:
    folded = fold(word)
    return folded in generic_title_words() or _GENERIC.search(folded) is not None
