"""Digits with separators to a number, under a decimal point or a decimal comma."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass

from speccheck.quantities.tidy import tidy

NUMERAL_PATTERN = (
    r"(?:[1-9]\d{0,2}(?:[ ']\d{3})+(?!\d)(?:[.,]\d+)?|\d+(?:[.,']\d+)*|(?<![\w.,])[.,]\d+)"
    r"(?:[eE][+-]?\d{1,3}(?!\w))?"
)
"""Regular expression for an unsigned numeral with any separators."""

_PLAIN = {
    False: re.compile(r"(?:\d+|[1-9]\d{0,2}(?:[, ']\d{3})+)?(?:\.\d+)?(?:[eE][+-]?\d+)?"),
    True: re.compile(r"(?:\d+|[1-9]\d{0,2}(?:[. ']\d{3})+)?(?:,\d+)?(?:[eE][+-]?\d+)?"),
}
_FIGURE = re.compile(rf"(?<![\w./-]){NUMERAL_PATTERN}(?![\w/])")
_NOT_FIGURES = re.compile(
    r"\b(?:4\.3-10|1\.5-3\.5|2\.2-5|(?:TS|TR|EN|IEC|ISO|ITU|V|v|rev\.?|Rev\.?)\s?[\d.]+|\d{1,2}\.\d{1,2}\.(?:\d{4}|\d\d)\b)"
)


@dataclass(frozen=True, slots=True)
class DecimalHabit:
    """How a file writes decimals; `comma` is None when it does not say, `why` is shown to the user."""

    comma: bool | None
    why: str


def numeral(text: str, *, comma: bool) -> float | None:
    """Value of an unsigned numeral, or None where it is none under this habit.

    A numeral that only the other habit can explain is read by that one: '17.5' is 17.5 in any file.

    >>> numeral("1.234", comma=False), numeral("1.234", comma=True), numeral("17,5", comma=False)
    (1.234, 1234.0, 17.5)
    """
    own = _strict(text, comma)
    return _strict(text, not comma) if own is None else own


def decimal_habit(texts: Iterable[str]) -> DecimalHabit:
    """What the texts of a file say about its decimal sign.

    Counts the figures that only one habit explains: '17,5' speaks for the comma, '17.5' for the point,
    '1,234' for neither. One habit must outnumber the other nine to one.
    """
    counts = {True: 0, False: 0}
    sample: dict[bool, str] = {}
    for text in texts:
        if "," not in text and "." not in text:
            continue
        for figure in _FIGURE.findall(_NOT_FIGURES.sub(" ", tidy(text))):
            point, comma = _strict(figure, False), _strict(figure, True)
            if (point is None) != (comma is None):
                counts[point is None] += 1
                sample.setdefault(point is None, figure)
    total = counts[True] + counts[False]
    if not total:
        return DecimalHabit(None, "no figure of the file shows its decimal sign")
    leader = counts[True] > counts[False]
    if counts[leader] < 0.9 * total:
        return DecimalHabit(
            None, f"decimal commas ({sample[True]}) and decimal points ({sample[False]}) are both in use"
        )
    sign = "comma" if leader else "point"
    return DecimalHabit(
        leader, f"{counts[leader]} of {total} figures have a decimal {sign}, such as {sample[leader]}"
    )


def _strict(text: str, comma: bool) -> float | None:
    if not text or not _PLAIN[comma].fullmatch(text):
        return None
    plain = text.replace(" ", "").replace("'", "")
    plain = plain.replace(".", "").replace(",", ".") if comma else plain.replace(",", "")
    value = float(plain)
    return value if value < 1e300 else None
