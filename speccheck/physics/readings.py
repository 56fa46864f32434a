"""What is read off cuts: half-power width, lobes beside the beam, highest lobe."""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.cuts import Grid, angle_at
from speccheck.physics.decibels import Floats
from speccheck.physics.field import Singles

Indices = NDArray[np.intp]
Flags = NDArray[np.bool_]

_TWO, _THREE, _SEVEN = (np.arange(*span)[:, None] for span in ((0, 2), (-1, 2), (-3, 4)))
_SEXTIC = np.linalg.inv(np.vander(_SEVEN[:, 0], increasing=True))
"""From seven samples around a point to the coefficients of the polynomial through them."""


@dataclass(frozen=True, eq=False, slots=True)
class CutFigures:
    """What each cut shows, shape (C,): width [rad], lobes [dB] against the beam; nan for none.

    `before` is the lobe next to the beam at smaller angles, `after` the one at larger angles.
    """

    width_rad: Floats
    before_db: Floats
    after_db: Floats
    highest_db: Floats
    highest_rad: Floats


def read_cuts(level: Singles, grid: Grid, peak_rad: Floats) -> CutFigures:
    """Half-power width and lobes of cuts.

    Every maximum of a cut and its crossings of half power are found on the samples and refined together.
    The highest lobe includes grating and sub-array lobes and a rise towards the end of the cut.
    level [1]: power against the beam, shape (C, P).
    grid [Grid]: where the cuts are sampled.
    peak_rad [rad]: angle of the beam, shape (C,).
    Returns [CutFigures]: width [rad], lobes [dB], angle of the highest lobe [rad].
    Source: half power at -3.0103 dB of the beam; side lobes as in IEEE Std 145.
    """
    cuts, count = level.shape
    frame = _frame(cuts, count)
    beam = frame.first + np.searchsorted(grid.between_rad, peak_rad)
    edge, crosses = _half_power(level, frame, beam)
    lobe, starts = _maxima(level, frame)
    cut = lobe // count
    place, height = _refined(level, frame, edge, (lobe, cut, starts))
    ends = np.concatenate([starts, starts - 1])
    at_end, height[ends] = height[ends], np.nan
    before, after = _beside(height, lobe, beam)
    height[ends] = np.where(level.take(frame.ends) > level.take(frame.inward), at_end, np.nan)
    highest = np.fmax.reduceat(height, starts)
    where, shown = np.full(cuts, np.nan), height == highest[cut]
    where[cut[shown]] = place[2 * cuts :][shown]
    edges = np.where(crosses, place[: 2 * cuts], np.nan)
    before_edge, after_edge, at_highest = angle_at(np.concatenate([edges, where]), count).reshape(3, cuts)
    before, after, highest = 10 * np.log10(np.maximum([before, after, highest], 1e-30))
    return CutFigures(after_edge - before_edge, before, after, highest, at_highest)


@dataclass(frozen=True, eq=False, slots=True)
class _Frame:
    """Indices that count samples through all cuts: the first of each cut (C,); all first ones, then the last
    one before each of them (2 C,), and their neighbours inward; the first sample of the cut of each edge."""

    first: Indices
    ends: Indices
    inward: Indices
    edge_rows: Indices


@lru_cache(maxsize=64)
def _frame(cuts: int, count: int) -> _Frame:
    first = np.arange(0, cuts * count, count)
    ends = np.concatenate([first, (first - 1) % (cuts * count)])
    return _Frame(first, ends, ends + np.repeat([1, -1], cuts), np.tile(first, 2))


def _half_power(level: Singles, frame: _Frame, beam: Indices) -> tuple[Indices, Flags]:
    """The samples before the half-power crossings around each beam, all lower ones first, and which exist.

    Each cut begins and ends with a crossing that is none, so that every search finds something.
    """
    cuts, count = level.shape
    changes = np.ones((cuts, count + 1), bool)
    low = level < np.float32(0.5)
    np.not_equal(low[:, 1:], low[:, :-1], out=changes[:, 1:-1])
    found = np.flatnonzero(changes)
    margin = np.arange(cuts)  # one more crossing than samples in each cut
    after = np.searchsorted(found, beam + margin, side="right")
    sides = (found[[after - 1, after]] - (frame.first + margin)).ravel()
    return np.minimum(np.maximum(sides, 1), count - 1) - 1, (sides > 0) & (sides < count)


def _maxima(level: Singles, frame: _Frame) -> tuple[Indices, Indices]:
    """All local maxima and both ends of every cut, in order, and where in that list each cut begins."""
    up = level[:, 1:] > level[:, :-1]
    listed = np.ones(level.shape, bool)
    np.greater(up[:, :-1], up[:, 1:], out=listed[:, 1:-1])
    lobe = np.flatnonzero(listed)
    return lobe, np.searchsorted(lobe, frame.first)


def _beside(height: Floats, lobe: Indices, beam: Indices) -> tuple[Floats, Floats]:
    """Height of the lobes before and after the beam of each cut; the beam's own becomes nan."""
    own = np.searchsorted(lobe, beam + 1, side="right") - 1
    is_beam = lobe[own] >= beam - 1
    height[own[is_beam]] = np.nan
    return height[own - is_beam], height[np.minimum(own + 1, len(height) - 1)]


def _refined(
    level: Singles, frame: _Frame, edge: Indices, lobes: tuple[Indices, Indices, Indices]
) -> tuple[Floats, Floats]:
    """Place (fractional index) of half-power crossings and of lobes, and the height of the lobes.

    By a secant and a parabola first, then the polynomial through seven samples. Ends of cuts stay.
    edge: sample before each crossing. lobes: their samples, cuts, and where each cut begins among them.
    """
    lobe, cut, starts = lobes
    edges, last = len(edge), level.shape[1] - 4
    row = np.concatenate([frame.edge_rows, frame.first[cut]])
    at = np.concatenate([edge, lobe - row[edges:]])
    here, there = level.take(frame.edge_rows + edge + _TWO)
    before, middle, after = level.take(lobe + _THREE, mode="clip")
    drop, bend = here - there, middle + middle - before - after
    drop[drop == 0] = np.inf
    bend[bend <= 0] = bend[starts] = bend[starts - 1] = np.inf
    start = np.concatenate([(here - 0.5) / drop, (after - before) / (bend + bend)])
    base = np.minimum(np.maximum(at, 3), last)
    offset = np.minimum(np.maximum(start, -1), 1) + (at - base)
    coefficients = _SEXTIC @ level.take(row + base + _SEVEN)
    value = coefficients[6]
    for coefficient in coefficients[5::-1]:
        value = value * offset + coefficient
    place = base + offset
    place[:edges] += (value[:edges] - 0.5) / drop
    return place, value[edges:]
