"""Sizes with letters of their sides: 'H1998 W356 D115', '356 (W) x 1998 (H) x 115 (D) mm'."""

from __future__ import annotations

import re

_LETTERS = "HWDLBTP"
_FIGURES = 3
_BEFORE = re.compile(rf"(?<![^\W\d])([{_LETTERS}])\s?[:=]?\s?(?=\d)")
_AFTER = re.compile(
    rf"(?<=[\d\w])\s?(?:\(\s?([{_LETTERS}])\s?\)|(?<=\d)\s?([{_LETTERS}])(?!\w)|(?<=m)\s([{_LETTERS}])(?!\w))"
)
_SIDES = {
    frozenset("HWD"): {"H": "height", "W": "width", "D": "depth"},
    frozenset("LWD"): {"L": "height", "W": "width", "D": "depth"},
    frozenset("HBT"): {"H": "height", "B": "width", "T": "depth"},
    frozenset("LBT"): {"L": "height", "B": "width", "T": "depth"},
    frozenset("HLP"): {"H": "height", "L": "width", "P": "depth"},
    frozenset("LWH"): {"L": "height", "W": "width", "H": "depth"},
}
"""What three letters stand for together, in English, German and French."""


def sides_by_letter(text: str) -> tuple[tuple[str, ...], str]:
    """Sides that letters give to three figures, in the order of the text, and the text without the letters.

    >>> sides_by_letter("W356 x H1998 x D115 mm")
    (('width', 'height', 'depth'), '356 x 1998 x 115 mm')
    """
    for pattern in (_BEFORE, _AFTER):
        letters = ["".join(filter(None, found.groups())) for found in pattern.finditer(text)]
        sides = _SIDES.get(frozenset(letters), {}) if len(letters) == _FIGURES else {}
        if sides:
            return tuple(sides[letter] for letter in letters), pattern.sub(_parted, text)
    return (), text


def _parted(letter: re.Match[str]) -> str:
    """What keeps two figures apart when the letter between them goes."""
    before = letter.string[: letter.start()].rstrip()
    return "" if not before or before[-1] in "xX×*/,;" or letter.re is _AFTER else " / "
