"""Figures that are not written in decimal digits and one unit: numbers in words, feet with inches."""

from __future__ import annotations

import re
from collections.abc import Callable

from speccheck.quantities.words import number_words

_INCHES = r"(?:\"|''|in(?:ch(?:es)?)?\b\.?)"
_FEET = r"(?:'|ft\b\.?|feet\b|foot\b)"
_FRACTION = r"(?P<{0}>\d{{1,2}})/(?P<{1}>2|4|8|16|32)"
_FEET_INCHES = re.compile(
    rf"(?<![\w.,'])(?P<feet>\d{{1,2}})\s?{_FEET}\s?-?\s?(?P<inches>\d{{1,2}}(?:[.,]\d+)?)"
    rf"(?:[\s-]{_FRACTION.format('top', 'bottom')})?\s?{_INCHES}"
)
_FEET_ONLY = re.compile(r"(?<![\w.,'])(\d{1,2}(?:[.,]\d+)?)\s?'(?=\s|$|[x×,;)])")
_MIXED_INCHES = re.compile(
    rf"(?<![\w.,/'])(?P<inches>\d{{1,3}})[\s-]{_FRACTION.format('top', 'bottom')}\s?(?={_INCHES})"
)
_ORDER = re.compile(
    r"(?<![\w.,])([2357])\s?(?:st|nd|rd|th|[ªº°]|er|ème|eme|e)?\.?\s?(?=(?:ord(?:er|re|en|ine|em|nung)|orde|rz[ęa]du)\b)",
    re.IGNORECASE,
)
_ORDINALS = {"2": "second", "3": "third", "5": "fifth", "7": "seventh"}
_RATIO = re.compile(r"(\d)\s?/\s?1(?=$|\s|\))")
_SETTING = re.compile(r"(?<!\w)[Tt](?=\d{1,2}(?:\D|$))")
_WORD = re.compile(r"[^\W\d_]+(?:-[^\W\d_]+)?")
_INCHES_A_FOOT = 12


def in_digits(text: str, *, before_names: bool = False) -> str:
    """A tidy text with a leading number word in digits: 'four ports' is '4 ports'; others as they are.

    A text with other figures is left alone, unless they may be part of a name, as in 'two 4.3-10 female'.

    >>> in_digits("Four ports"), in_digits("vier"), in_digits("4 ports"), in_digits("fourfold")
    ('4 ports', '4', '4 ports', 'fourfold')
    """
    if not before_names and any(map(str.isdigit, text)):
        return text
    first = _WORD.match(text)
    digits = number_words().get(first.group().casefold(), "") if first else ""
    return digits + text[first.end() :] if first and digits else text


def in_one_unit(text: str) -> str:
    """A tidy text with feet and inches as inches, and fractions of an inch as decimals.

    >>> in_one_unit("6 ft 2 in"), in_one_unit("74 3/8 in"), in_one_unit("6'"), in_one_unit("17.5 dBi")
    ('74 in', '74.375 in', '6 ft', '17.5 dBi')
    """
    if "'" not in text and "ft" not in text and "fe" not in text and "foot" not in text and "/" not in text:
        return text
    text = _FEET_INCHES.sub(_total(lambda feet: f"{feet:g} in"), text)
    text = _MIXED_INCHES.sub(_total(lambda inches: f"{inches:g} "), text)
    return _FEET_ONLY.sub(r"\1 ft", text)


def without_ordinals(text: str) -> str:
    """A tidy text with the number of an order as a word: '3rd order' is 'third order'.

    >>> without_ordinals("< -150 dBc, 3rd order"), without_ordinals("IM 3. Ordnung")
    ('< -150 dBc, third order', 'IM third Ordnung')
    """
    return _ORDER.sub(lambda found: f"{_ORDINALS[found[1]]} ", text)


def as_ratio(text: str) -> str:
    """'1.5/1' as '1.5:1', where a pure number is asked for.

    >>> as_ratio("< 1.5/1")
    '< 1.5:1'
    """
    return _RATIO.sub(r"\1:1", text)


def without_setting_letter(text: str) -> str:
    """'T0 - T10' as '0 - 10': settings of a tilt by their letter.

    >>> without_setting_letter("T0 - T10")
    '0 - 10'
    """
    return _SETTING.sub("", text)


def _total(shown: Callable[[float], str]) -> Callable[[re.Match[str]], str]:
    def total(found: re.Match[str]) -> str:
        parts = found.groupdict()
        inches = float(parts["inches"].replace(",", ".")) + _INCHES_A_FOOT * float(parts.get("feet") or 0)
        return shown(inches + (float(parts["top"]) / float(parts["bottom"]) if parts["top"] else 0.0))

    return total
