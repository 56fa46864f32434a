"""What a spreadsheet's number format shows around a number: a sign, a word, a unit.

A bidder who formats 28 as ``"≥ "0`` shows the reader '≥ 28', and that is the claim.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import lru_cache

_PARTS = re.compile(
    r'"(?P<quoted>[^"]*)"|\\(?P<escaped>.)|[_*].|\[\$(?P<sign>[^\]-]*)[^\]]*\]|\[[^\]]*\]'
    r"|(?P<number>General|[0#?][0#?.,/ ]*(?:E[+-]?[0#]+)?|\.[0#?]+)|(?P<plain>.)",
    re.IGNORECASE,
)
"""ECMA-376-1, 18.8.31: text in quotes or escaped, padding, filling, currencies, colours, digits, the rest."""
_SECTION = re.compile(r';(?=(?:[^"]*"[^"]*")*[^"]*$)')
_THOUSANDS = re.compile(r"[0#?](,+)[. ]*$")


@dataclass(frozen=True, slots=True)
class Shown:
    """Texts around a number, what is shown for 1, and whether the sign is left to the texts."""

    before: str
    after: str
    scale: float = 1.0
    unsigned: bool = False

    def text(self, number: float) -> str:
        """A number as a reader sees it, though with all its digits."""
        shown = number * self.scale
        return f"{self.before}{abs(shown) if self.unsigned else shown:.12g}{self.after}"


@lru_cache(maxsize=500)
def shown_around(number_format: str, *, negative: bool) -> Shown | None:
    """What a number format shows around numbers of one sign; None when it is nothing but the number.

    >>> shown_around('"≥ "0.0', negative=False).text(17.5)
    '≥ 17.5'
    """
    sections = _SECTION.split(number_format)
    own = len(sections) > 1 and negative
    texts = ["", ""]
    scale, numbers = 1.0, 0
    for part in _PARTS.finditer(sections[1] if own else sections[0]):
        if part["number"]:
            numbers += 1
            thousands = _THOUSANDS.search(part["number"])
            scale /= 1000.0 ** len(thousands[1]) if thousands else 1.0
            continue
        scale *= 100.0 if part["plain"] == "%" else 1.0
        texts[min(numbers, 1)] += part["quoted"] or part["escaped"] or part["sign"] or part["plain"] or ""
    if numbers != 1 or not "".join(texts).strip():
        return None
    return Shown(texts[0], texts[1], scale, own)
