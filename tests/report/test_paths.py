"""Path data: short, never farther from its points than the slack, interrupted where a point is missing."""

from __future__ import annotations

import math
import re

from hypothesis import given
from hypothesis import strategies as st

from speccheck.report.pages.paths import SLACK, path_data, short, thinned

POINTS = st.lists(
    st.tuples(st.floats(-50, 700, allow_nan=False), st.floats(-50, 700, allow_nan=False)),
    min_size=1,
    max_size=60,
)
ROUNDING = 0.05 * math.sqrt(2)
"""Farthest that rounding to tenths moves a point [SVG units]: half a step in both directions."""


def distance(point: tuple[float, float], start: tuple[float, float], end: tuple[float, float]) -> float:
    """Distance from a point to a stretch, by trying a thousand places along it."""
    return min(
        math.dist(point, (start[0] + share * (end[0] - start[0]), start[1] + share * (end[1] - start[1])))
        for share in (i / 1000 for i in range(1001))
    )


def read(path: str) -> list[tuple[float, float]]:
    """The points of path data of M, l, h, v and Z, as an SVG reader takes them (SVG 2, clause 9.3)."""
    points: list[tuple[float, float]] = []
    for mark, text in re.findall(r"([MlhvZ])([^MlhvZ]*)", path):
        figures = [float(figure) for figure in re.findall(r"-?(?:\d+\.?\d*|\.\d+)", text)]
        x, y = points[-1] if points else (0.0, 0.0)
        for i in range(0, len(figures), 1 if mark in "hv" else 2):
            if mark == "M":
                x, y = figures[i], figures[i + 1]
            elif mark == "l":
                x, y = x + figures[i], y + figures[i + 1]
            elif mark == "h":
                x += figures[i]
            else:
                y += figures[i]
            points.append((x, y))
    return points


@given(POINTS)
def test_no_dropped_point_lies_farther_from_the_line_than_the_slack(
    points: list[tuple[float, float]],
) -> None:
    kept = thinned(points)
    assert kept[0] == points[0]
    assert kept[-1] == points[-1]
    at = 0
    for point in points:
        if at + 1 < len(kept) and point == kept[at + 1]:
            at += 1
        ends = kept[at], kept[min(at + 1, len(kept) - 1)]
        longest = math.dist(*ends)
        assert distance(point, *ends) <= SLACK + longest / 1000 or point in kept


@given(POINTS)
def test_a_reader_of_the_path_finds_the_kept_points(points: list[tuple[float, float]]) -> None:
    wanted = thinned(points) if len(points) > 4 else points
    found = read(path_data(points))
    assert math.dist(found[0], wanted[0]) <= ROUNDING + 1e-9
    assert math.dist(found[-1], wanted[-1]) <= ROUNDING + 1e-6
    assert len(found) == len(wanted)


def test_a_straight_line_needs_its_ends_only() -> None:
    assert thinned([(x / 10, x / 5) for x in range(200)]) == [(0.0, 0.0), (19.9, 39.8)]


def test_a_peak_that_turns_back_on_itself_is_kept() -> None:
    peak = [(0.0, 0.0), (40.0, 0.1), (0.0, 0.2)]
    assert thinned(peak) == peak
    beyond = [(0.0, 0.0), (9.0, 0.0), (3.0, 0.0)]
    assert thinned(beyond) == beyond


def test_a_closed_outline_keeps_its_shape() -> None:
    square = [(0.0, 0.0), (5.0, 0.0), (5.0, 5.0), (0.0, 5.0), (0.0, 0.0)]
    assert thinned(square) == square
    assert path_data(square, close=True) == "M0 0h5v5h-5v-5Z"


def test_a_line_is_interrupted_where_a_point_is_missing() -> None:
    assert path_data([(0, 0), (1, 1), (math.nan, 2), (3, 3), (4, 4)]) == "M0 0l1 1M3 3l1 1"
    assert path_data([(math.inf, 0), (math.nan, math.nan)], close=True) == ""


def test_figures_are_as_short_as_they_can_be() -> None:
    assert path_data([(0.5, 0), (0.75, 0.4), (0.25, 0.1)]) == "M.5 0l.3 .4-.6-.3"
    assert short(12.04) == "12"
    assert short(-0.25) == "-0.2"
