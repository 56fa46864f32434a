"""Path data of drawn lines, as short as the eye allows: six bands bring forty figures to one page."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from itertools import pairwise

Point = tuple[float, float]
SLACK = 0.2
"""Farthest that a thinned line may run from its points [SVG units]: a ninth of the width of a curve."""
_SHAPE = 4
"""Points of a box or a diamond, which need no thinning."""


def path_data(points: Iterable[Point], *, close: bool = False) -> str:
    """SVG path data of a line, interrupted where a point is not finite; empty without a finite point."""
    pieces: list[list[Point]] = [[]]
    for x, y in points:
        if math.isfinite(x) and math.isfinite(y):
            pieces[-1].append((x, y))
        elif pieces[-1]:
            pieces.append([])
    drawn = "".join(_piece(thinned(piece) if len(piece) > _SHAPE else piece) for piece in pieces if piece)
    return drawn + ("Z" if close and drawn else "")


def thinned(points: Sequence[Point], slack: float = SLACK) -> list[Point]:
    """The points that a line needs so that no dropped one lies farther than `slack` from it.

    Source: D. H. Douglas and T. K. Peucker, Cartographica 10 (1973) 112, here without recursion.
    """
    keep = {0, len(points) - 1}
    spans = [(0, len(points) - 1)]
    while spans:
        first, last = spans.pop()
        if last - first > 1 and (place := _farthest(points[first : last + 1], slack)):
            keep.add(first + place)
            spans += [(first, first + place), (first + place, last)]
    return [points[i] for i in sorted(keep)]


def short(value: float) -> str:
    """A coordinate with one decimal, without needless zeros."""
    return f"{value:.1f}".removesuffix(".0")


def _piece(points: Sequence[Point]) -> str:
    """One unbroken line: its start, then steps in tenths, so that rounding does not add up."""
    tenths = [(round(10 * x), round(10 * y)) for x, y in points]
    start = tenths[0]
    text = f"M{_step(start[0])} {_step(start[1])}"
    last = ""
    for (x0, y0), (x1, y1) in pairwise(tenths):
        dx, dy = x1 - x0, y1 - y0
        if not dy:
            text, last = f"{text}h{_step(dx)}", "h"
        elif not dx:
            text, last = f"{text}v{_step(dy)}", "v"
        else:
            down = _step(dy)
            mark = ("" if dx < 0 else " ") if last == "l" else "l"
            text, last = f"{text}{mark}{_step(dx)}{'' if dy < 0 else ' '}{down}", "l"
    return text


def _step(tenths: int) -> str:
    whole = f"{tenths / 10:.1f}".removesuffix(".0")
    return whole.replace("0.", ".", 1) if whole.startswith(("0.", "-0.")) else whole


def _farthest(points: Sequence[Point], slack: float) -> int:
    """Place of the point farthest from the stretch between the first and the last; 0 where all lie within."""
    x0, y0 = points[0]
    dx, dy = points[-1][0] - x0, points[-1][1] - y0
    length = math.hypot(dx, dy)
    if length:
        along = [(x - x0) * dx + (y - y0) * dy for x, y in points]
        lowest, highest = min(along), max(along)
        if lowest < -slack * length:
            return along.index(lowest)
        if highest > length * (length + slack):
            return along.index(highest)
        aside = [abs((x - x0) * dy - (y - y0) * dx) for x, y in points]
    else:
        aside = [math.hypot(x - x0, y - y0) for x, y in points]
    worst = max(aside)
    return aside.index(worst) if worst > slack * (length or 1.0) else 0
