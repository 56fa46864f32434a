"""What is read off cuts: half-power width, lobes beside the beam, highest lobe."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.decibels import Floats

Indices = NDArray[np.intp]
Flags = NDArray[np.bool_]

_NOISE = 1e-13
"""Rise [1] against the beam that is rounding, not a lobe."""


_FOUR, _FIVE = np.arange(-1, 3)[:, None], np.arange(-2, 3)[:, None]
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
    angle_rad [rad]: equally spaced angles, shape (P,).
    peak_rad [rad]: angle of the beam, shape (C,).
    Returns [CutFigures]: width [rad], lobes [dB], angle of the highest lobe [rad].
    Source: half power at -3.0103 dB of the beam; side lobes as in IEEE Std 145.
    """
    cuts, count = level.shape
    last = count - 1
    step = (angle_rad[-1] - angle_rad[0]) / last
    at_peak = np.rint((peak_rad - angle_rad[0]) / step)
    at_peak = np.minimum(np.maximum(at_peak, 0), last)
    # one pass over both sides: the reversed cut below the plain one
    sides = np.concatenate([level, level[:, ::-1]])
    index = np.arange(float(count))
    beyond = index > np.concatenate([at_peak, last - at_peak])[:, None]
    half = _half_power(sides, beyond)
    minimum, lobe, has_lobe = _lobe_beside(sides, beyond, index[:-1])
    outside = (index >= minimum[:cuts, None]) | (index <= last - minimum[cuts:, None])
    best = np.where(outside, level, -1.0).argmax(1)
    some = minimum.reshape(2, cuts).min(0) < count
    rows = np.concatenate([np.arange(2 * cuts), np.arange(cuts)])
    height, offset = _vertex(sides, rows, np.concatenate([lobe, best]))
    height_db = 10 * np.log10(np.maximum(height, 1e-30))
    height_db[: 2 * cuts][~has_lobe] = np.nan
    height_db[2 * cuts :][~some] = np.nan
    return CutFigures(
        (half[:cuts] + half[cuts:] - last) * step,
        height_db[cuts : 2 * cuts],
        height_db[:cuts],
        height_db[2 * cuts :],
        np.where(some, angle_rad[best] + offset[2 * cuts :] * step, np.nan),
    )


def _half_power(level: Floats, beyond: Flags) -> Floats:
    """Fractional index of the first half-power crossing, by the cubic through four samples; nan: none."""
    rows, count = level.shape
    low = (level < 0.5) & beyond
    after = low.argmax(1)
    start = np.arange(rows) * count
    base = np.minimum(np.maximum(after - 1, 1), count - 3)
    c0, c1, c2, c3 = _CUBIC @ level.ravel()[start + base + _FOUR]
    first, last = after - base - 1.0, after - base
    at = first + 0.5
    for _ in range(3):
        slope = np.minimum(c1 + at * (2 * c2 + 3 * c3 * at), -1e-12)
        at = at - (c0 - 0.5 + at * (c1 + at * (c2 + at * c3))) / slope
        at = np.minimum(np.maximum(at, first), last)
    return np.where(low.ravel()[start + after], base + at, np.nan)


def _lobe_beside(level: Floats, beyond: Flags, index: Floats) -> tuple[Floats, Indices, Flags]:
    """Index of the first minimum beside the beam (past the end: none), of the lobe after it, if any."""
    rows, count = level.shape
    start = np.arange(rows) * (count - 1)
    rising = level[:, 1:] > level[:, :-1] + _NOISE
    climbs = rising & beyond[:, :-1]
    first = climbs.argmax(1)
    minimum = np.where(climbs.ravel()[start + first], first, 2.0 * count)
    falls = (index > minimum[:, None]) > rising
    lobe = falls.argmax(1)
    return minimum, lobe, falls.ravel()[start + lobe]


def _vertex(level: Floats, rows: Indices, at: Indices) -> tuple[Floats, Floats]:
    """Height and offset (in samples) of lobes: the quartic through five samples, by two Newton steps.

    The outermost two samples of a cut stay as they are.
    """
    count = level.shape[1]
    base = np.minimum(np.maximum(at, 2), count - 3)
    c0, c1, c2, c3, c4 = _QUARTIC @ level.ravel()[rows * count + base + _FIVE]
    t = np.zeros(len(rows))
    for _ in range(2):
        bend = 2 * c2 + t * (6 * c3 + 12 * c4 * t)
        t = t - (c1 + t * (2 * c2 + t * (3 * c3 + 4 * c4 * t))) / np.where(bend < 0, bend, -np.inf)
        t = np.minimum(np.maximum(t, -0.6), 0.6)
    inner = base == at
    t = np.where(inner, t, 0.0)
    height = c0 + t * (c1 + t * (c2 + t * (c3 + t * c4)))
    return np.where(inner, height, level.ravel()[rows * count + at]), t
