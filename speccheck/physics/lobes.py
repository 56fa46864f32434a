"""Grating and sub-array lobes where they really stand, element pattern included.

Lobes repeat the beam on the reciprocal lattice of the elements (grating lobes) or of the sub-arrays
(quantisation lobes). Each is searched within one null width of its lattice point, inside visible space, so
that the flank of a lobe whose centre is still hidden counts too.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike, NDArray

from speccheck.physics.beam import find_beam
from speccheck.physics.cuts import front_grid
from speccheck.physics.decibels import Floats, db, floats, wavelength_m
from speccheck.physics.element import Element
from speccheck.physics.field import Excitation, excite, intensity
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.reciprocal import element_points, subarray_points

_STEPS = 12
"""Steps [1] across the search box of one lobe, each way and for each panel group."""
_REFINED = 8
"""Coarse maxima [1] of all boxes that are looked at finely."""
_CLIMB = 60
"""Most moves [1] on the way to the top of a lobe."""
_RIVAL = 0.7
"""A maximum of samples six to a null width lies within 0.6 dB of its top: lower ones are no rivals."""


@dataclass(frozen=True, eq=False, slots=True)
class Lobes:
    """The strongest lobe of each state, same shape as the states; nan and 0 where there is none.

    level_db [dB]: level against the beam.
    theta_deg, phi_deg [deg]: where it stands.
    visible_count [1]: lattice points inside visible space.
    centre_visible [bool]: the strongest one is seen with its centre, not with its flank alone.
    """

    level_db: Floats
    theta_deg: Floats
    phi_deg: Floats
    visible_count: Floats
    centre_visible: Floats


@dataclass(frozen=True, slots=True)
class _Lobe:
    level_db: float = float("nan")
    theta_deg: float = float("nan")
    phi_deg: float = float("nan")
    visible_count: int = 0
    centre_visible: bool = False


def element_lobes(
    layout: ArrayLayout,
    element: Element,
    freq_hz: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    scan_deg: ArrayLike = 0.0,
) -> Lobes:
    """Strongest grating lobe of the element lattice; a triangular lattice by its own reciprocal lattice.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [Lobes]: of the broadcast states.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1 (grating lobe lattice).

    >>> from speccheck.physics.element import SectorElement
    >>> panel = ArrayLayout(16, 8, 0.6, 0.6)
    >>> lobe = element_lobes(panel, SectorElement(80, 65), 299792458.0, scan_deg=50)
    >>> float(lobe.level_db.round(2)), float(lobe.phi_deg.round())
    (-2.65, -60.0)
    """
    return _all_states(layout, element, (freq_hz, tilt_deg, scan_deg), element_points)


def subarray_lobes(
    layout: ArrayLayout,
    element: Element,
    freq_hz: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    scan_deg: ArrayLike = 0.0,
) -> Lobes:
    """Strongest quantisation lobe of the sub-array lattice (points of the element lattice left out).

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [Lobes]: of the broadcast states.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7 (sub-arrays, quantisation lobes).

    >>> from speccheck.physics.element import SectorElement
    >>> panel = ArrayLayout(12, 8, 0.7, 0.5, subarray_rows=3, subarray_tilt_deg=3)
    >>> lobe = subarray_lobes(panel, SectorElement(), 299792458.0, tilt_deg=10)
    >>> float(lobe.level_db.round(1)), float(lobe.theta_deg.round(1))
    (-7.9, 74.3)
    """
    return _all_states(layout, element, (freq_hz, tilt_deg, scan_deg), subarray_points)


def highest_lobe(
    layout: ArrayLayout,
    element: Element,
    freq_hz: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    scan_deg: ArrayLike = 0.0,
) -> Lobes:
    """Highest lobe anywhere in front other than the beam, whatever its origin.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [Lobes]: of the broadcast states; visible_count is the number of lobes found.
    Source: definition; local maxima of the pattern over the front, refined.

    >>> from speccheck.physics.element import SectorElement
    >>> lobe = highest_lobe(ArrayLayout(8, 8, 0.5, 0.5), SectorElement(), 299792458.0)
    >>> float(lobe.level_db.round(2))
    -14.04
    """
    return _all_states(layout, element, (freq_hz, tilt_deg, scan_deg), None)


def _all_states(
    layout: ArrayLayout,
    element: Element,
    keys: tuple[ArrayLike, ...],
    points: Callable[[ArrayLayout, float], Floats] | None,
) -> Lobes:
    grids = np.broadcast_arrays(*(floats(key) for key in keys))
    states = excite(layout, element, *(grid.ravel() for grid in grids))
    beam = find_beam(states)
    theta, phi = beam.theta_rad, beam.phi_rad
    level = intensity(states, theta[:, None], phi[:, None])[:, 0]
    found = []
    for s, wavelength in enumerate(wavelength_m(grids[0].ravel())):
        state = excite(layout, element, *(grid.ravel()[s : s + 1] for grid in grids))
        if points is None:
            found.append(_anywhere(state, (theta[s], phi[s]), level[s]))
        else:
            found.append(_strongest(state, wavelength, level[s], points(layout, wavelength)))
    shape = grids[0].shape
    return Lobes(
        *(
            np.array([getattr(lobe, name) for lobe in found]).reshape(shape)
            for name in ("level_db", "theta_deg", "phi_deg", "visible_count", "centre_visible")
        )
    )


def _strongest(state: Excitation, wavelength: float, beam: float, points: Floats) -> _Lobe:
    """Highest level within a null width of any of the points: all boxes coarsely, the best maxima finely."""
    layout = state.layout
    tilt, phi = state.theta_rad[0] - np.pi / 2, state.phi_rad[0]
    centres = np.array([np.cos(tilt) * np.sin(phi), -np.sin(tilt)]) + points
    half_width = np.array(
        [
            wavelength / (layout.columns * layout.horizontal_pitch_m) if layout.columns > 1 else 0.0,
            wavelength / (layout.rows * layout.vertical_pitch_m) if layout.rows > 1 else 0.0,
        ]
    )
    visible = int((np.hypot(*centres.T) <= 1 + 1e-9).sum())
    centres = centres[(np.abs(centres) < 1 + half_width).all(1)]
    offsets = _box(half_width, (layout.panel_columns, layout.panel_rows))
    if len(centres) == 0:
        return _Lobe(visible_count=visible)
    offsets = _visible(centres[:, None, None], offsets)
    power = _power(state, centres[:, None, None], offsets, half_width)
    tops = np.argwhere(_local_maxima(power) & (power > 0))
    # samples brought to the same point of the rim count once
    _, different = np.unique(power[tuple(tops.T)], return_index=True)
    box, y, z = tops[different[: -_REFINED - 1 : -1]].T
    if len(box) == 0:
        return _Lobe(visible_count=visible)
    heights, places = _refined(state, centres[box], half_width, offsets[box, y, z])
    best = heights.argmax()
    level, where, around = heights[best], places[best], centres[box[best]]
    theta = np.arccos(where[1])
    phi = np.arcsin(np.clip(where[0] / max(np.sin(theta), 1e-12), -1, 1))
    return _Lobe(
        float(db(level / beam)),
        float(np.degrees(theta)),
        float(np.degrees(phi)),
        visible,
        bool(np.hypot(*around) <= 1 + 1e-9),
    )


def _box(half_width: Floats, groups: tuple[int, int] = (1, 1)) -> Floats:
    """Offsets (Y, Z, 2) over a box, one line of them where the array has no width that way."""
    y, z = (
        width * np.linspace(-1, 1, _STEPS * count + 1) if width > 0 else np.zeros(1)
        for width, count in zip(half_width, groups, strict=True)
    )
    return floats(np.stack(np.meshgrid(y, z, indexing="ij"), -1))


def _visible(centres: Floats, offsets: Floats) -> Floats:
    """Offsets (..., 2) from lattice points; what lies beyond visible space is brought to its rim, where the
    flank of a hidden lobe is highest."""
    u = centres + offsets
    beyond = np.maximum(np.hypot(u[..., 0], u[..., 1]) * (1 + 1e-9), 1.0)
    return floats(u / beyond[..., None] - centres)


def _power(state: Excitation, centres: Floats, offsets: Floats, half_width: Floats) -> Floats:
    """Intensity at visible offsets (..., 2) from lattice points; -1 outside their boxes."""
    inside = (np.abs(offsets) <= half_width + 1e-12).all(-1)
    power = np.full(inside.shape, -1.0)
    u_y, u_z = (centres + offsets)[inside].T
    theta = np.arccos(u_z)
    phi = np.arcsin(np.clip(u_y / np.sin(theta), -1, 1))
    if len(u_y):
        power[inside] = intensity(state, theta[None], phi[None])[0]
    return power


def _refined(
    state: Excitation, centres: Floats, half_width: Floats, offsets: Floats
) -> tuple[Floats, Floats]:
    """Highest levels (C,) around offsets in the boxes of lattice points, by two finer grids, and where."""
    each = np.arange(len(centres))
    levels = np.zeros(len(centres))
    for finer in (1, 2):
        near = offsets[:, None] + _box(half_width * (2 / _STEPS) ** finer).reshape(-1, 2)
        near = _visible(centres[:, None], np.clip(near, -half_width, half_width))
        power = _power(state, centres[:, None], near, half_width)
        highest = power.argmax(1)
        levels, offsets = power[each, highest], near[each, highest]
    return levels, centres + offsets


def _anywhere(state: Excitation, beam_rad: tuple[float, float], beam: float) -> _Lobe:
    """Highest local maximum over the front that is not the beam: rivals are climbed to their tops."""
    phi = front_grid(state.layout, state.highest).angle_rad
    theta = np.pi / 2 + phi[1:-1]
    mesh = np.meshgrid(theta, phi, indexing="ij")
    power = intensity(state, mesh[0].reshape(1, -1), mesh[1].reshape(1, -1)).reshape(mesh[0].shape)
    maxima = np.argwhere(_local_maxima(power, 1e-9) & (power > 1e-9 * beam))
    levels = power[tuple(maxima.T)]
    steps = np.array([theta[1] - theta[0], phi[1] - phi[0]])
    best, level = np.full(2, np.nan), 0.0
    others = len(maxima)
    for at in np.argsort(-levels):
        if levels[at] < _RIVAL * level:
            break
        top, height = _climbed(state, np.array([theta[maxima[at, 0]], phi[maxima[at, 1]]]), steps)
        if (np.abs(top - beam_rad) < steps / 4).all():
            others -= 1
        elif height > level:
            best, level = top, height
    if level == 0:
        return _Lobe()
    theta_deg, phi_deg = np.degrees(best).tolist()
    return _Lobe(float(db(level / beam)), theta_deg, phi_deg, others, True)


def _local_maxima(power: Floats, more: float = 0.0) -> NDArray[np.bool_]:
    """Which samples of grids (..., Y, Z) are no lower than their neighbours, or so much `more` (a share of
    them); edges count as falling off."""
    margins = [(0, 0)] * (power.ndim - 2) + [(1, 1)] * 2
    padded = np.pad(power, margins, constant_values=-1.0) * (1 + more)
    rows, columns = power.shape[-2:]
    highest = np.ones(power.shape, bool)
    for down in range(3) if rows > 1 else (1,):
        for right in range(3) if columns > 1 else (1,):
            if (down, right) != (1, 1):
                highest &= power >= padded[..., down : down + rows, right : right + columns]
    return highest


def _climbed(state: Excitation, where: Floats, steps: Floats) -> tuple[Floats, float]:
    """The local maximum uphill of a direction (theta, phi): best of a grid around it, ever finer."""
    around = np.stack(np.meshgrid(*(np.linspace(-1, 1, 5),) * 2, indexing="ij"), -1).reshape(-1, 2)
    span, height = steps / 3, 0.0  # less than half a step: never over the null beside it
    for _ in range(_CLIMB):
        near = np.clip(where + span * around, [1e-6, -np.pi / 2], [np.pi - 1e-6, np.pi / 2])
        values = intensity(state, near[None, :, 0], near[None, :, 1])[0]
        highest = values.argmax()
        if np.abs(around[highest]).max() < 1:
            span = span / 2
        where, height = near[highest], float(values[highest])
        if span[0] < steps[0] / 64:
            break
    return where, height
