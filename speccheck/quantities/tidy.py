"""One spelling for the many ways a spreadsheet writes dashes, spaces, dots and signs."""

from __future__ import annotations

import re
import unicodedata

_INVISIBLE = re.compile(
    r"[\x00-\x08\x0b\x0c\x0e-\x1f\x7f\u00ad\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]"
)
_BEFORE_FOLDING = str.maketrans(
    {
        "º": "°",
        "˚": "°",
        "″": '"',
        "”": '"',
        "“": '"',
        "′": "'",
        "’": "'",
        "‘": "'",
        "´": "'",
        "`": "'",
        "…": "…",
    }
)
_SIGNS = str.maketrans(
    {
        **dict.fromkeys("‐‑‒–—―−﹘﹣－⁻➖", "-"),
        **dict.fromkeys("✕✖⨯⨉", "×"),
        **dict.fromkeys("⩾≧", "≥"),
        **dict.fromkeys("⩽≦", "≤"),
        **dict.fromkeys("〜∼～", "~"),
        **dict.fromkeys("≃≅≒", "≈"),
        "\t": " ",
    }
)
_POWERS = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹⁻", "0123456789-")
_REPLACEMENTS: tuple[tuple[re.Pattern[str], str], ...] = (
    (re.compile(r"\.{2,}"), "…"),
    (re.compile(r">\s?=|=\s?>"), "≥"),
    (re.compile(r"<\s?=|=\s?<"), "≤"),
    (re.compile(r"\+\s?/\s?-|-\s?/\s?\+|\+-"), "±"),
    (re.compile(r"''"), '"'),
    (re.compile(r"(?<=\s)--(?=\s)"), "-"),
    (re.compile(r"[ \r\f\v]+"), " "),
)
_TEXT_MARK = re.compile(r"^'(?=[\d+±≥≤<>-])")
_POWER_OF_TEN = re.compile(r"\s?[x×·*]\s?10\^?([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+|(?<=\^)-?\d+)")
_RAISED = re.compile(r"(?<![mM])(?<!ft)([⁰¹²³⁴⁵⁶⁷⁸⁹]+)\)?|(?<=[mM])([⁰¹⁴⁵⁶⁷⁸⁹]+)\)?")
_TRAILING_SIGN = re.compile(r"(?<=\S)\s?(\*{1,3}|†|‡|§|#)\)?$")
_TRAILING_MARK = re.compile(
    _TRAILING_SIGN.pattern + r"|(?<=\S)\s(\d|[a-e])\)$|(?<=\S)\s?[\[(](\d)[\])]$|(?<=\S)\s[\[(]([a-e])[\])]$"
)
_BRACKETED_MARK = re.compile(r"\((?:\d|[a-e])\)$")
_NOTE = re.compile(r"[,;]?\s?[\[(]\s?(?:see )?(?:foot)?note:?\s?(\w{1,3})\s?[\])]$", re.IGNORECASE)


def tidy(text: str) -> str:
    """Text in compatibility form with one kind of space, dash, dots, multiplication and plus-minus.

    >>> tidy("１\u202f390 × 160\u00a0mm"), tidy("−40...+60 ºC"), tidy("+/- 45")
    ('1 390 × 160 mm', '-40…+60 °C', '± 45')
    """
    if text.isascii():
        clean = _INVISIBLE.sub("", text).replace("`", "'")
    else:
        clean = _INVISIBLE.sub("", text.translate(_BEFORE_FOLDING))
        clean = unicodedata.normalize("NFKC", clean).translate(_SIGNS)
    for pattern, replacement in _REPLACEMENTS:
        clean = pattern.sub(replacement, clean)
    return _TEXT_MARK.sub("", clean.strip())


def split_footnotes(text: str, *, bracketed: bool = True) -> tuple[str, tuple[str, ...]]:
    """Raw text without its footnote markers, and the markers.

    With `bracketed` false, '(2)' and '2)' are part of the text, as in '4.3-10 (2)'.

    >>> split_footnotes("17.5¹"), split_footnotes("17.5 1)"), split_footnotes("0.5 m²")
    (('17.5', ('1',)), ('17.5', ('1',)), ('0.5 m²', ()))
    """
    marks: list[str] = []

    def keep(match: re.Match[str]) -> str:
        marks.append(next(g for g in match.groups() if g).translate(_POWERS))
        return ""

    body = text.strip()
    if not body.isascii():
        body = _POWER_OF_TEN.sub(lambda m: "e" + m.group(1).translate(_POWERS), body)
        body = _RAISED.sub(keep, body)
    body = _NOTE.sub(keep, body)
    closes = body.count("(") >= body.count(")") > 0 and not _BRACKETED_MARK.search(body)
    without = (_TRAILING_MARK if bracketed and not closes else _TRAILING_SIGN).sub(keep, body)
    return (without.strip(), tuple(marks)) if without.strip() else (text.strip(), ())
