"""What is read off a cut: half-power width, lobes beside the beam, highest lobe."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.cuts import Cut
from speccheck.physics.decibels import Floats

Indices = NDArray[np.intp]
Flags = NDArray[np.bool_]


@dataclass(frozen=True, eq=False, slots=True)
class CutFigures:
    """What one cut shows per state, shape (S,): width [rad], lobes [dB] against the beam; nan for none.

    `before` is the lobe next to the beam at smaller angles, `after` the one at larger angles.
    """

    width_rad: Floats
    before_db: Floats
    after_db: Floats
    highest_db: Floats
    highest_rad: Floats


def read_cut(cut: Cut) -> CutFigures:
    """Half-power width and lobes of a cut.

    A lobe is what follows the first minimum beside the beam; the highest one includes grating and
    sub-array lobes and the value at the end of the cut.
    cut [Cut]: intensity over angle.
    Returns [CutFigures]: width [rad], lobes [dB], angle of the highest lobe [rad].
    Source: half power at -3.0103 dB of the beam; side lobes as in IEEE Std 145.
    """
    level = cut.intensity / cut.peak_intensity[:, None]
    states, count = level.shape
    step = cut.angle_rad[1] - cut.angle_rad[0]
    peak = (cut.peak_rad - cut.angle_rad[0]) / step
    at_peak = np.clip(np.rint(peak).astype(np.intp), 0, count - 1)
    # one pass over both sides: the reversed cut below the plain one
    sides = np.concatenate([level, level[:, ::-1]])
    starts = np.concatenate([at_peak, count - 1 - at_peak])
    index = np.arange(count)
    beyond = index > starts[:, None]
    half = _half_power(sides, beyond)
    minimum, lobe = _lobe_beside(sides, beyond)
    lobe_level, _ = _vertex(sides, np.maximum(lobe, 0))
    lobe_db = np.where(lobe > 0, 10 * np.log10(np.maximum(lobe_level, 1e-30)), np.nan)
    outside = (index >= minimum[:states, None]) | (index <= count - 1 - minimum[states:, None])
    best = np.where(outside, level, -1.0).argmax(1)
    best_level, offset = _vertex(level, best)
    some = outside.any(1)
    return CutFigures(
        (half[:states] + half[states:] - (count - 1)) * step,
        lobe_db[states:],
        lobe_db[:states],
        np.where(some, 10 * np.log10(np.maximum(best_level, 1e-30)), np.nan),
        np.where(some, cut.angle_rad[best] + offset * step, np.nan),
    )


def _half_power(level: Floats, beyond: Flags) -> Floats:
    """Fractional index of the first half-power crossing, by the cubic through four samples; nan: none."""
    low = beyond & (level < 0.5)
    after = low.argmax(1)
    base = np.clip(after - 1, 1, level.shape[1] - 3)
    p0, p1, p2, p3 = np.take_along_axis(level, base[:, None] + np.arange(-1, 3), 1).T
    c1 = -p0 / 3 - p1 / 2 + p2 - p3 / 6
    c2 = (p0 - 2 * p1 + p2) / 2
    c3 = (p3 - p0) / 6 + (p1 - p2) / 2
    at = after - base - 0.5
    for _ in range(3):
        slope = c1 + at * (2 * c2 + 3 * at * c3)
        at = at - (p1 - 0.5 + at * (c1 + at * (c2 + at * c3))) / np.where(slope < -1e-12, slope, -1e-12)
        at = np.clip(at, after - base - 1, after - base)
    return np.where(low.any(1), base + at, np.nan)


def _lobe_beside(level: Floats, beyond: Flags) -> tuple[Indices, Indices]:
    """Index of the first minimum beside the beam (past the end: none), of the lobe after it (-1: none)."""
    rising = level[:, 1:] > level[:, :-1] * (1 + 1e-9) + 1e-14
    climbs = rising & beyond[:, :-1]
    minimum = np.where(climbs.any(1), climbs.argmax(1), 2 * level.shape[1])
    falls = ~rising & (np.arange(level.shape[1] - 1) > minimum[:, None])
    return minimum, np.where(falls.any(1), falls.argmax(1), -1)


def _vertex(level: Floats, at: Indices) -> tuple[Floats, Floats]:
    """Height and offset (in samples) of a lobe: Stirling's quartic at the vertex of the parabola.

    The first and last sample of a cut stay as they are.
    """
    inner = (at > 0) & (at < level.shape[1] - 1)
    base = np.clip(at, 2, level.shape[1] - 3)
    m2, m1, p0, p1, p2 = np.take_along_axis(level, base[:, None] + np.arange(-2, 3), 1).T
    slope, bend = (p1 - m1) / 2, m1 - 2 * p0 + p1
    third, fourth = (p2 - 2 * p1 + 2 * m1 - m2) / 2, p2 - 4 * p1 + 6 * p0 - 4 * m1 + m2
    t = np.clip(-slope / np.where(bend < 0, bend, -np.inf), -0.5, 0.5)
    t2 = t * t
    height = p0 + t * slope + t2 / 2 * bend + (t2 - 1) * (t / 6 * third + t2 / 24 * fourth)
    edge = np.take_along_axis(level, at[:, None], 1)[:, 0]
    settled = inner & (base == at)
    return np.where(settled, height, edge), np.where(settled, t, 0.0)
