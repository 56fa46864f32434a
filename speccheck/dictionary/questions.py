"""Headings asked for in a sentence: 'What is the gain of the antenna?', 'Please state the height'."""

from __future__ import annotations

import functools
import re

from speccheck.dictionary.folding import heading_words

_SPACES = re.compile(r"\s+")


def unasked(text: str) -> str:
    """The heading within a question or a request; the text itself where it is none.

    >>> unasked("What is the maximum gain of the antenna in dBi?"), unasked("How many RF ports does it have?")
    ('maximum gain in dBi', 'number RF ports')
    """
    begins = _beginning().match(text)
    if begins is None:
        return text
    rest = text[begins.end() :].rstrip(" ?.!:")
    rest = _end().sub(lambda found: f" {found['unit'] or ''}", rest).strip()
    word = _words_before().get(_SPACES.sub(" ", begins[1].casefold()), "")
    return " ".join(f"{word} {rest}".split()) or text


@functools.cache
def _words_before() -> dict[str, str]:
    """Beginning of a question to the word that stands for it."""
    return {begin.casefold(): word for word, begins in heading_words()["asked"].items() for begin in begins}


@functools.cache
def _beginning() -> re.Pattern[str]:
    asked = sorted(_words_before(), key=len, reverse=True)
    articles = "the|a|an|your|its|der|die|das|den|le|la|les|l'|el|los|las|il|lo|gli|o|os|as|de|het|be"
    return re.compile(
        rf"[\s¿¡]*({'|'.join(map(re.escape, asked))})\s+(?:(?:{articles})(?:\s+|(?<=')))?(?=\S)",
        re.IGNORECASE,
    )


@functools.cache
def _end() -> re.Pattern[str]:
    ends = sorted(heading_words()["asked_of"]["ends"], key=len, reverse=True)
    unit = r"(?P<unit>,?\s+in\s+\S{1,12}|\s*[(\[][^()\[\]]{1,12}[)\]])?"
    return re.compile(rf"(?:\s+(?:{'|'.join(map(re.escape, ends))}))+{unit}$", re.IGNORECASE)
