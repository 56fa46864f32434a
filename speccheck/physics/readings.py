"""What is read off cuts: half-power width, lobes beside the beam, highest lobe."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.cuts import angle_at
from speccheck.physics.decibels import Floats

Indices = NDArray[np.intp]
Flags = NDArray[np.bool_]
Places = NDArray[np.int16]
Singles = NDArray[np.float32]


_TWO, _FOUR, _FIVE = (np.arange(*span)[:, None] for span in ((0, 2), (-1, 3), (-2, 3)))
_CUBIC = np.linalg.inv(np.vander(_FOUR[:, 0], increasing=True))
_QUARTIC = np.linalg.inv(np.vander(_FIVE[:, 0], increasing=True))
"""From samples around a point to the coefficients of the polynomial through them."""


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


def read_cuts(level: Floats, angle_rad: Floats, peak_rad: Floats) -> CutFigures:
    """Half-power width and lobes of cuts.

    A lobe is what follows the first minimum beside the beam; the highest one includes grating and
    sub-array lobes and the value at the end of the cut.
    level [1]: power against the beam, shape (C, P).
    angle_rad [rad]: the angles of `cuts.front_angles`, shape (P,).
    peak_rad [rad]: angle of the beam, shape (C,).
    Returns [CutFigures]: width [rad], lobes [dB], angle of the highest lobe [rad].
    Source: half power at -3.0103 dB of the beam; side lobes as in IEEE Std 145.
    """
    cuts, count = level.shape
    index = np.arange(count, dtype=np.int16)
    at_peak = np.rint(np.interp(peak_rad, angle_rad, index)).astype(np.int16)
    # what lies before the beam lies after it on the cut read backwards
    rays = np.concatenate([level, level[:, ::-1]])
    beyond = index > np.concatenate([at_peak, count - 1 - at_peak])[:, None]
    # single precision hides the rounding of a flat cut and halves the work of comparing
    coarse = rays.astype(np.float32)
    edges = _half_power(rays, coarse, beyond)
    minimum, lobe, found = _lobes_beside(coarse, beyond, index)
    outside = (index >= minimum[:cuts, None]) | (index < count - minimum[cuts:, None])
    best = (coarse[:cuts] * outside).argmax(1)
    found = np.concatenate([found, outside[np.arange(cuts), best]])
    height, offset = _vertex(rays, np.arange(3 * cuts) % (2 * cuts), np.concatenate([lobe, best]))
    height[~found] = np.nan
    height_db = 10 * np.log10(np.maximum(height, 1e-30))
    angles = angle_at(np.concatenate([edges, best + offset[2 * cuts :]]), count)
    return CutFigures(
        angles[:cuts] + angles[cuts : 2 * cuts],
        height_db[cuts : 2 * cuts],
        height_db[:cuts],
        height_db[2 * cuts :],
        np.where(found[2 * cuts :], angles[2 * cuts :], np.nan),
    )


def _half_power(rays: Floats, coarse: Singles, beyond: Flags) -> Floats:
    """Fractional index of the half-power crossings after the beam; nan: none.

    By the cubic through four samples: a secant, then one step of Newton's method.
    """
    each, count = np.arange(len(rays)), rays.shape[1]
    low = (coarse < np.float32(0.5)) & beyond
    first = low.argmax(1)
    between = np.maximum(first - 1, 0)
    base = np.minimum(np.maximum(between, 1), count - 3)
    c0, c1, c2, c3 = _CUBIC @ rays[each, base + _FOUR]
    here, there = rays[each, between + _TWO]
    fall = here - there
    fall[fall == 0] = 1.0
    at = (between - base) + (here - 0.5) / fall
    slope = c1 + at * (2 * c2 + 3 * c3 * at)
    slope[slope == 0] = 1.0
    at -= (c0 - 0.5 + at * (c1 + at * (c2 + at * c3))) / slope
    return np.where(low[each, first], base + at, np.nan)


def _lobes_beside(coarse: Singles, beyond: Flags, index: Places) -> tuple[Places, Indices, Flags]:
    """Index of the first minimum after the beam (off the cut: none), of the lobe that follows, if any.

    A lobe needs a fall beyond it: a rise up to the end of the cut is none.
    """
    each, count = np.arange(len(coarse)), coarse.shape[1]
    up = coarse[:, 1:] > coarse[:, :-1]
    climbs = up & beyond[:, :-1]
    first = climbs.argmax(1)
    minimum = np.where(climbs[each, first], first, 2 * count).astype(np.int16)
    falls = (index[:-1] > minimum[:, None]) > up
    lobe = falls.argmax(1)
    return minimum, lobe, falls[each, lobe]


def _vertex(level: Floats, rows: Indices, at: Indices) -> tuple[Floats, Floats]:
    """Height and offset (in samples) of lobes: the quartic through five samples, the vertex of its parabola
    refined by one Newton step.

    The outermost two samples of a cut stay as they are.
    """
    base = np.minimum(np.maximum(at, 2), level.shape[1] - 3)
    c0, c1, c2, c3, c4 = _QUARTIC @ level[rows, base + _FIVE]
    double, triple, quadruple = 2 * c2, 3 * c3, 4 * c4
    t = _within(c1 / -np.where(double < 0, double, -np.inf))
    slope = c1 + t * (double + t * (triple + t * quadruple))
    bend = double + t * (2 * triple + t * (3 * quadruple))
    t -= slope / np.where(bend < 0, bend, -np.inf)
    inner = base == at
    t = np.where(inner, _within(t), 0.0)
    height = c0 + t * (c1 + t * (c2 + t * (c3 + t * c4)))
    return np.where(inner, height, level[rows, at]), t


def _within(offset: Floats) -> Floats:
    """Offsets [samples] kept near the highest sample."""
    return np.minimum(np.maximum(offset, -0.6), 0.6)
