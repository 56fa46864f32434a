"""Cells that answer without a figure: missing, not applicable, to be advised, referred, declared."""

from __future__ import annotations

import re

from speccheck.quantities.content import StatusWord
from speccheck.quantities.words import ERROR_VALUES, referrals, statuses, word_set

_OUTER = re.compile(r"^[\s('\"\[]+|[\s)'\"\],;!]+$")
_NUMBERED_NOTE = re.compile(
    r"(?:foot)?(?:note|remark|fußnote|anmerkung|nota|uwaga|opmerking)s?\s?\(?[\d*]+\)?", re.IGNORECASE
)
_DECLARATION = re.compile(
    r"\b(?:fully )?(?:compl(?:y|ies|iant)|konform|erfüllt|conforme|cumple|zgodn[ye]|voldoet)\b", re.IGNORECASE
)


def status_of(text: str, *, answers_count: bool = True) -> StatusWord | None:
    """Status of a whole cell in any of the dictionary's languages; None when it may hold more.

    With `answers_count` false (a parameter that is text) 'yes' and 'no' are answers, not statuses.

    >>> status_of("TBD"), status_of("s. Datenblatt"), status_of("17.5 dBi")
    ('to be advised', 'referred', None)
    """
    folded = _OUTER.sub("", text).casefold()
    if folded in ("", "-", "--"):
        return "missing"
    if not answers_count and folded in word_set("answers"):
        return None
    found = statuses().get(folded) or statuses().get(folded.rstrip("."))
    if found:
        return found  # type: ignore[return-value]
    if _refers(folded):
        return "referred"
    return None


def declares(text: str) -> bool:
    """Whether a longer text also says that the bidder complies."""
    return bool(_DECLARATION.search(text))


def is_error_value(text: str) -> bool:
    """Whether the text is an error of the spreadsheet program, such as #REF!."""
    return text.strip().casefold() in ERROR_VALUES


def _refers(folded: str) -> bool:
    if len(folded) > 120 or not folded[0].isalpha():
        return False
    if _NUMBERED_NOTE.fullmatch(folded):
        return True
    return any(
        folded.startswith(start)
        and (start.endswith((" ", ".")) or not folded[len(start) : len(start) + 1].isalpha())
        for start in referrals()
    )
