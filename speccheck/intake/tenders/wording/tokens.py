"""A clause cut into tokens: at each place the longest thing known wins; the rest is unread, never dropped."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass

from speccheck.intake.tenders.wording.figures import Figure, match_figure
from speccheck.intake.tenders.wording.lexicon import Kind, general_vocabularies, parameter_vocabulary

_DASHES = dict.fromkeys(map(ord, "−–—‑‒﹣－"), "-")
_SPACES = dict.fromkeys(map(ord, "\u00a0\u2009\u202f\u2007\u2002\u2003\t\n\r"), " ")
_SIGNS = {
    ord("…"): "...",
    ord("⩾"): "≥",
    ord("⩽"): "≤",
    ord("º"): "°",
    ord("˚"): "°",
    ord("～"): "~",
    ord("×"): "x",
}

_CODES: tuple[tuple[Kind, re.Pattern[str]], ...] = (
    (Kind.BAND_NAME, re.compile(r"(?<!\w)(?:n\d{1,3}|[Bb]and n?\d{1,3}|B\d{1,3})(?!\w)")),
    (
        Kind.CONNECTOR,
        re.compile(
            r"(?<![\w.])(?:\d{1,2}\s*x\s*)?"
            r"(?:4\.3[-/]10|7[-/]16(?:\s*DIN)?|DIN\s*7[-/]16|NEX10|2\.2-5|N[- ]type|MCX|MQ\d|SMP)"
            r"(?:\s*\(?(?:fe)?male\)?)?(?![\w.])",
            re.IGNORECASE,
        ),
    ),
    (Kind.INGRESS, re.compile(r"(?<!\w)IPX?\d{1,2}X?(?:\s*/\s*IPX?\d{1,2})*(?!\w)", re.IGNORECASE)),
    (Kind.BRANCHES, re.compile(r"(?<!\w)\d{1,3}T\d{1,3}R(?!\w)", re.IGNORECASE)),
    (
        Kind.STANDARD,
        re.compile(
            r"(?<!\w)(?:3GPP\s+TS\s*\d+\.\d+|(?:ETSI\s+)?EN\s*\d[\d -]*\d|IEC\s*\d[\d-]*"
            r"|ITU-[RT]\s*\w+\.\d+|ISO\s*\d+|AISG)(?!\w)",
            re.IGNORECASE,
        ),
    ),
    (Kind.VERSION, re.compile(r"(?<!\w)(?:v|version\s*|rev\.?\s*)\d+(?:\.\d+)*(?!\w)", re.IGNORECASE)),
    (Kind.ORDER, re.compile(r"(?<!\w)[HLWDT]\s*x\s*[HLWDT](?:\s*x\s*[HLWDT])?(?!\w)", re.IGNORECASE)),
    (Kind.UNREAD, re.compile(r"(?<!\w)(?:n/a|n\.a\.|t\.b\.[ad]\.)(?!\w)", re.IGNORECASE)),
    (Kind.MARK, re.compile(r"[,;:/()\[\].]")),
)
_WORD = re.compile(r"[^\s,;:/()\[\]]+")


@dataclass(frozen=True, slots=True)
class Token:
    """One understood piece of a clause; `said` is its meaning, `figure` a quantity."""

    kind: Kind
    text: str
    said: str = ""
    figure: Figure | None = None


def normalise(text: str) -> str:
    """Typographic dashes, spaces and signs as plain ones; nothing else changes."""
    return re.sub(r" +", " ", text.translate({**_DASHES, **_SPACES, **_SIGNS})).strip()


def tokens(text: str, *, house: Mapping[str, str], decimal_comma: bool | None = None) -> tuple[Token, ...]:
    """Cut a clause into tokens.

    Parameters
    ----------
    text : the wording
    house : the tender's own names of parameters
    decimal_comma : whether this file writes decimal commas; None if unknown
    """
    clean = normalise(text)
    found: list[Token] = []
    place = 0
    while place < len(clean):
        if clean[place].isspace():
            place += 1
            continue
        token = _longest(clean, place, house, decimal_comma)
        found.append(token)
        place += len(token.text)
    return tuple(found)


def _longest(text: str, place: int, house: Mapping[str, str], decimal_comma: bool | None) -> Token:
    candidates: list[Token] = []
    for kind, pattern in _CODES:
        code = pattern.match(text, place)
        if code:
            candidates.append(Token(kind, code.group(), code.group()))
    figure = match_figure(text, place, decimal_comma=decimal_comma)
    if figure:
        candidates.append(Token(Kind.QUANTITY, figure[0], figure=figure[1]))
    for vocabulary in (parameter_vocabulary(house), *general_vocabularies()):
        term = vocabulary.match(text, place)
        if term:
            candidates.append(Token(vocabulary.kind, term[0], term[1]))
    if candidates:
        return max(candidates, key=lambda token: len(token.text))
    word = _WORD.match(text, place)
    return Token(Kind.UNREAD, word.group() if word else text[place])
