"""Two spacings in one cell: which is horizontal and which vertical."""

from __future__ import annotations

import re

from speccheck.intake.panels.found import Found

ASK_FOR_PLANES = "ask which spacing is horizontal and which vertical"
_ORDER = re.compile(r"(?<![^\W\d_])(h|v)(?:or\w*|er\w*)?\s*[x×/*]\s*(h|v)(?:or\w*|er\w*)?\W*$", re.IGNORECASE)
_PRODUCT = re.compile(r"\d\s*[^\W\d]{0,2}\s*[x×*]\s*\d", re.IGNORECASE)
_SPACINGS = {"h": "horizontal_element_spacing", "v": "vertical_element_spacing"}


def part_by_plane(found: list[Found]) -> str:
    """Give two different spacings to the planes that 'H x V' behind them names; why not, if nothing does.

    One spacing, the same twice, or one in two units or at two frequencies, holds for both planes.
    """
    spacings = [one for one in found if one.parameter == "element_spacing"]
    told_apart = len({(one.figure.unit, *sorted(one.figure.at.items())) for one in spacings}) > 1
    doubtful = any(one.figure.quantity.alternatives for one in spacings)
    if told_apart or doubtful or len({one.value for one in spacings}) < 2:
        if len(spacings) == 2 and not (told_apart or doubtful) and _PRODUCT.search(spacings[0].raw):
            for one, plane in zip(spacings, _SPACINGS.values(), strict=True):  # equal, in any order
                one.parameter = plane
        return ""
    order = _ORDER.search(spacings[0].raw)
    letters = [letter.lower() for letter in order.groups()] if order else []
    if len(spacings) != 2 or set(letters) != {"h", "v"}:
        return f"{len(spacings)} different spacings, and no word says for which plane each holds"
    for one, letter in zip(spacings, letters, strict=True):
        one.parameter = _SPACINGS[letter]
    return ""
