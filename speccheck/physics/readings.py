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
    at_peak = np.rint(np.interp(peak_rad, angle_rad, index)).astype(np.int16)[:, None]
    # single precision hides the rounding of a flat cut and halves the work of comparing
    coarse = level.astype(np.float32)
    sides = index > at_peak, index < at_peak
    edges = angle_at(_half_power(level, coarse, sides), count)
    minima, lobes, found = _lobes_beside(coarse, sides, index)
    outside = (index >= minima[0][:, None]) | (index <= minima[1][:, None])
    best = np.where(outside, coarse, np.float32(-1)).argmax(1)
    some = outside.any(1)
    height, offset = _vertex(level, np.arange(3 * cuts) % cuts, np.concatenate([*lobes, best]))
    height_db = 10 * np.log10(np.maximum(height, 1e-30))
    height_db[~np.concatenate([*found, some])] = np.nan
    return CutFigures(
        edges[:cuts] - edges[cuts:],
        height_db[cuts : 2 * cuts],
        height_db[:cuts],
        height_db[2 * cuts :],
        np.where(some, angle_at(best + offset[2 * cuts :], count), np.nan),
    )


def _half_power(level: Floats, coarse: Singles, sides: tuple[Flags, Flags]) -> Floats:
    """Fractional index of the half-power crossings, after the beam and then before it; nan: none.

    By the cubic through four samples: a secant, then one step of Newton's method.
    """
    cuts, count = level.shape
    low = coarse < np.float32(0.5)
    after, before = low & sides[0], low & sides[1]
    right = after.argmax(1)
    left = count - 1 - before[:, ::-1].argmax(1)
    between = np.concatenate([np.maximum(right - 1, 0), np.minimum(left, count - 2)])
    rows = np.arange(2 * cuts) % cuts * count
    base = np.minimum(np.maximum(between, 1), count - 3)
    flat = level.ravel()
    c0, c1, c2, c3 = _CUBIC @ flat[rows + base + _FOUR]
    here, there = flat[rows + between + _TWO]
    fall = here - there
    at = (between - base) + (here - 0.5) / np.where(fall == 0, 1.0, fall)
    slope = c1 + at * (2 * c2 + 3 * c3 * at)
    at = at - (c0 - 0.5 + at * (c1 + at * (c2 + at * c3))) / np.where(slope == 0, 1.0, slope)
    each = np.arange(cuts)
    crossed = np.concatenate([after[each, right], before[each, left]])
    return np.where(crossed, base + at, np.nan)


def _lobes_beside(
    coarse: Singles, sides: tuple[Flags, Flags], index: Places
) -> tuple[tuple[Places, Places], tuple[Indices, Indices], tuple[Flags, Flags]]:
    """After the beam and before it: index of the first minimum (off the cut: none), of the lobe, if any.

    A lobe needs a fall beyond it: a rise up to the end of the cut is none.
    """
    cuts, count = coarse.shape
    each = np.arange(cuts)
    up, down = coarse[:, 1:] > coarse[:, :-1], coarse[:, 1:] < coarse[:, :-1]
    climbs = up & sides[0][:, :-1]
    first = climbs.argmax(1)
    after = np.where(climbs[each, first], first, 2 * count).astype(np.int16)
    falls = (index[:-1] > after[:, None]) > up
    lobe = falls.argmax(1)
    drops = (down & sides[1][:, 1:])[:, ::-1]
    first = drops.argmax(1)
    before = np.where(drops[each, first], count - 1 - first, -1 - count).astype(np.int16)
    rises = ((index[1:] < before[:, None]) > down)[:, ::-1]
    other = rises.argmax(1)
    return (after, before), (lobe, count - 1 - other), (falls[each, lobe], rises[each, other])


def _vertex(level: Floats, rows: Indices, at: Indices) -> tuple[Floats, Floats]:
    """Height and offset (in samples) of lobes: the quartic through five samples, the vertex of its parabola
    refined by one Newton step.

    The outermost two samples of a cut stay as they are.
    """
    count = level.shape[1]
    base = np.minimum(np.maximum(at, 2), count - 3)
    c0, c1, c2, c3, c4 = _QUARTIC @ level.ravel()[rows * count + base + _FIVE]
    t = np.minimum(np.maximum(-c1 / np.where(c2 < 0, 2 * c2, -np.inf), -0.6), 0.6)
    bend = 2 * c2 + t * (6 * c3 + 12 * c4 * t)
    t = t - (c1 + t * (2 * c2 + t * (3 * c3 + 4 * c4 * t))) / np.where(bend < 0, bend, -np.inf)
    t = np.minimum(np.maximum(t, -0.6), 0.6)
    inner = base == at
    t = np.where(inner, t, 0.0)
    height = c0 + t * (c1 + t * (c2 + t * (c3 + t * c4)))
    return np.where(inner, height, level.ravel()[rows * count + at]), t
