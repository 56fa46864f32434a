"""A tidy cell text cut into numerals, units, signs and words."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Literal

from speccheck.quantities.numerals import NUMERAL_PATTERN
from speccheck.quantities.units import UNIT_PATTERN, dimension, unit_name
from speccheck.quantities.words import longest_phrase, roles, word_set

TokenKind = Literal[
    "num", "unit", "pm", "plus", "minus", "range", "times", "slash", "sep", "colon", "open", "close",
    "min", "max", "better", "statistic", "from", "at", "and", "word",
]  # fmt: skip


@dataclass(frozen=True, slots=True)
class Token:
    """One piece of a cell; `value` is the unit's name, the statistic's name, or the text."""

    kind: TokenKind
    text: str
    value: str = ""


_UNIT = re.compile(r"\s?(?:" + UNIT_PATTERN + ")")
_TOKEN = re.compile(
    rf"""
    (?P<num>{NUMERAL_PATTERN})
    |(?P<pm>±) |(?P<plus>\+) |(?P<hyphen>-) |(?P<range>[…÷]) |(?P<about>[~≈])
    |(?P<times>[×*]|[xX](?=\s?[\d±+-]))
    |(?P<slash>/) |(?P<sep>[;|\n]|,(?=\s|$)|,) |(?P<colon>:) |(?P<open>[\[(]) |(?P<close>[\])])
    |(?P<more>[≥>]) |(?P<less>[≤<]) |(?P<equal>=) |(?P<at>@)
    |(?P<word>[^\W\d_][\w'’]*(?:[-.·/][^\W\d_][\w']*)*\.?) |(?P<other>\S)
    """,
    re.VERBOSE,
)
_AMOUNT_END = ("num", "unit", "close")


def tokens(text: str) -> list[Token]:
    """Tokens of a tidy text; nothing is dropped but white space and equals signs.

    >>> [t.kind for t in tokens("≥ 17.5 ± 0.5 dBi (typ.)")]
    ['min', 'num', 'pm', 'num', 'unit', 'open', 'statistic', 'close']
    """
    found: list[Token] = []
    position = 0
    while position < len(text):
        if found and found[-1].kind in ("num", "close", "open"):
            unit = _UNIT.match(text, position)
            alone = found[-1].kind != "open" or (unit and text[unit.end() : unit.end() + 1] in ("]", ")"))
            if unit and alone and unit_name(unit.group()):
                found.append(Token("unit", unit.group().strip(), unit_name(unit.group())))
                position = unit.end()
                continue
        match = _TOKEN.match(text, position)
        if not match:
            position += 1
            continue
        position = match.end()
        token = _token(match, found, text)
        if token:
            found.append(token)
    return _phrases(_before_carriers(found))


def _before_carriers(found: list[Token]) -> list[Token]:
    """'-153 dBc a 2x43 dBm': before carriers stands no range, whatever the word or dash could mean elsewhere.

    The carriers may be counted in words, 'a 2 portadoras de 43 dBm'.
    """
    if not any(token.kind == "unit" and dimension(token.value) == "power" for token in found):
        return found
    result: list[Token] = []
    index = 0
    while index < len(found):
        token, after = found[index], found[index + 1 :]
        leads, of = _leads_to_carriers(token, result), _last_unit(result)
        count = _carriers(after) if leads and dimension(of) != "power" else 0
        count = count or int(leads and token.kind == "word" and of == "dBc" and _is_power(after))
        result.append(Token("at", token.text) if count else token)
        index += 1
        if count > 1:
            result += [found[index], Token("times", "×")]
            index += count
    return result


def _last_unit(before: list[Token]) -> str:
    return next((token.value for token in reversed(before) if token.kind == "unit"), "")


def _is_power(after: list[Token]) -> bool:
    kinds = [token.kind for token in after[:2]]
    return kinds == ["num", "unit"] and dimension(after[1].value) == "power"


def _leads_to_carriers(token: Token, before: list[Token]) -> bool:
    """Whether a token behind a figure may mean 'at'."""
    word = token.kind == "word" and token.text.casefold() in word_set("carriers")
    return bool(before) and (word or token.kind in ("range", "at", "minus"))


def _carriers(after: list[Token]) -> int:
    """How many tokens stand before the power of the carriers that begin a list: 1 in '2 × 43 dBm', else 0."""
    kinds = [token.kind for token in after[:6]]
    if kinds[:3] == ["num", "times", "num"]:
        return int(_is_power(after[2:]))
    words = next((n for n, kind in enumerate(kinds[1:]) if kind != "word"), 0)
    return words + 1 if words and kinds[0] == "num" and _is_power(after[words + 1 :]) else 0


def _token(match: re.Match[str], found: list[Token], text: str) -> Token | None:
    kind, piece = match.lastgroup or "other", match.group()
    before = found[-1].kind if found else ""
    if kind == "equal":
        return None
    if kind == "hyphen":
        return Token(_hyphen(before, text[match.end() : match.end() + 2]), piece)
    if kind == "about" and before not in _AMOUNT_END:
        return Token("statistic", piece, "approximate")
    plain = {"about": "range", "more": "min", "less": "max", "other": "word"}
    return Token(plain.get(kind, kind), piece)  # type: ignore[arg-type]


def _hyphen(before: str, after: str) -> TokenKind:
    """A hyphen behind a figure joins a range, before one it is a minus sign, else it separates."""
    if before in ("num", "unit"):
        return "range"
    return "minus" if after.strip()[:1].isdigit() or after[:1] in (".", ",") else "sep"


def _phrases(found: list[Token]) -> list[Token]:
    """Words that have a role, up to the longest phrase, become tokens of that role."""
    if not any(token.kind == "word" for token in found):
        return found
    result: list[Token] = []
    index = 0
    while index < len(found):
        token = found[index]
        if token.kind != "word":
            result.append(token)
            index += 1
            continue
        run = 1
        while run < longest_phrase() and index + run < len(found) and found[index + run].kind == "word":
            run += 1
        for length in range(run, 0, -1):
            phrase = " ".join(t.text for t in found[index : index + length]).casefold()
            after = found[index + length :]
            role = next((r for r in roles().get(phrase, ()) if _fits(r[0], result, after)), None)
            if role:
                result.append(Token(role[0], phrase, role[1]))  # type: ignore[arg-type]
                index += length
                break
        else:
            result.append(token)
            index += 1
    return result


def _fits(role: str, before: list[Token], after: list[Token]) -> bool:
    """Short words count only in their place: 'a' between figures, 'from' before one."""
    figure_next = bool(after) and after[0].kind in ("num", "minus", "plus", "pm", "min", "max", "statistic")
    if role == "range":
        return bool(before) and before[-1].kind in _AMOUNT_END and figure_next
    if role in ("from", "and", "at"):
        return figure_next
    return True
