"""Path data of drawn lines, as short as the eye allows: six bands bring forty figures to one page."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from itertools import pairwise

Point = tuple[float, float]
SLACK = 0.15
"""Farthest that a thinned line may run from its points [SVG units]: a tenth of the width of a curve."""


def path_data(points: Iterable[Point], *, close: bool = False) -> str:
    """SVG path data of a line, interrupted where a point is not finite; empty without a finite point."""
    pieces: list[list[Point]] = [[]]
    for x, y in points:
        if math.isfinite(x) and math.isfinite(y):
            pieces[-1].append((x, y))
        elif pieces[-1]:
            pieces.append([])
    drawn = "".join(_piece(thinned(piece)) for piece in pieces if piece)
    return drawn + ("Z" if close and drawn else "")


def thinned(points: Sequence[Point], slack: float = SLACK) -> list[Point]:
    """The points that a line needs so that no dropped one lies farther than `slack` from it.

    Source: D. H. Douglas and T. K. Peucker, Cartographica 10 (1973) 112, here without recursion.
    """
    keep = {0, len(points) - 1}
    spans = [(0, len(points) - 1)]
    while spans:
        first, last = spans.pop()
        distances = [_distance(points[i], points[first], points[last]) for i in range(first + 1, last)]
        if distances and (worst := max(distances)) > slack:
            middle = first + 1 + distances.index(worst)
            keep.add(middle)
            spans += [(first, middle), (middle, last)]
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


def _distance(point: Point, start: Point, end: Point) -> float:
    """Distance of a point from the stretch between two others."""
    dx, dy = end[0] - start[0], end[1] - start[1]
    length = dx * dx + dy * dy
    share = ((point[0] - start[0]) * dx + (point[1] - start[1]) * dy) / length if length else 0.0
    share = min(max(share, 0.0), 1.0)
    return math.hypot(point[0] - start[0] - share * dx, point[1] - start[1] - share * dy)
