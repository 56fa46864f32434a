"""Path data of drawn lines, as short as the eye allows: six bands bring forty figures to one page."""

from __future__ import annotations

import functools
import math
from collections.abc import Iterable, Iterator, Sequence
from itertools import pairwise

Point = tuple[float, float]
SLACK = 0.2
"""Farthest that a thinned line may run from its points [SVG units]: a ninth of the width of a curve."""
_SHAPE = 4
"""Points of a box or a diamond, which need no thinning."""


def path_data(points: Iterable[Point], *, close: bool = False) -> str:
    """SVG path data of a line, interrupted where a point is not finite; empty without a finite point."""
    drawn = "".join(map(_piece, _pieces(list(points))))
    return drawn + ("Z" if close and drawn else "")


def _pieces(points: list[Point]) -> Iterator[Sequence[Point]]:
    """Unbroken stretches of a line, thinned."""
    lost = [i for i, (x, y) in enumerate(points) if not math.isfinite(x + y)]
    start = 0
    for end in (*lost, len(points)):
        if end > start:
            piece = points[start:end]
            yield thinned(piece) if len(piece) > _SHAPE else piece
        start = end + 1


def thinned(points: Sequence[Point], slack: float = SLACK) -> list[Point]:
    """The points that a line needs so that no dropped one lies farther than `slack` from it.

    From each kept point a sector of directions is narrowed by every point passed, so that a stretch inside
    it misses none of them by more than `slack`; the first point outside the sector, or nearer than the one
    before it, ends the stretch. One pass, and no more points than splitting at the farthest one leaves.
    Source: Z. Zhao and A. Saalfeld, Linear-time sleeve-fitting polyline simplification algorithms,
    AutoCarto 13 (1997) 214 (from memory).
    """
    kept = [points[0]]
    x0, y0 = last = points[0]
    low_x = low_y = high_x = high_y = reached = 0.0
    bounded = False
    for point in points[1:]:
        dx, dy = point[0] - x0, point[1] - y0
        far = math.hypot(dx, dy)
        if bounded and (low_x * dy < low_y * dx or dx * high_y < dy * high_x or far < reached):
            kept.append(last)
            x0, y0 = last
            dx, dy = point[0] - x0, point[1] - y0
            far, bounded = math.hypot(dx, dy), False
        if far > slack:
            aside_x, aside_y = -dy * slack / far, dx * slack / far
            if not bounded or low_x * (dy - aside_y) > low_y * (dx - aside_x):
                low_x, low_y = dx - aside_x, dy - aside_y
            if not bounded or (dx + aside_x) * high_y > (dy + aside_y) * high_x:
                high_x, high_y = dx + aside_x, dy + aside_y
            bounded = True
        last, reached = point, far
    return [*kept, last] if len(points) > 1 else kept


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


@functools.lru_cache(maxsize=8192)
def _step(tenths: int) -> str:
    whole = f"{tenths / 10:.1f}".removesuffix(".0")
    return whole.replace("0.", ".", 1) if whole.startswith(("0.", "-0.")) else whole
