"""Grating and sub-array lobes where they really stand, element pattern included.

Lobes repeat the beam on the reciprocal lattice of the elements (grating lobes) or of the sub-arrays
(quantisation lobes). Each is searched within one null width of its lattice point, inside visible space, so
that the flank of a lobe whose centre is still hidden counts too.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.beam import find_beam
from speccheck.physics.cuts import front_angles
from speccheck.physics.decibels import Floats, db, floats, wavelength_m
from speccheck.physics.element import Element
from speccheck.physics.field import Excitation, excite, intensity
from speccheck.physics.layout import ArrayLayout, Lattice

_ACROSS = 13
"""Samples [1] across the search box of one lobe, each way."""


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
    return _all_states(layout, element, (freq_hz, tilt_deg, scan_deg), _element_points)


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
    return _all_states(layout, element, (freq_hz, tilt_deg, scan_deg), _subarray_points)


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
    level, theta, phi = beam.intensity, beam.theta_rad, beam.phi_rad
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


def _element_points(layout: ArrayLayout, wavelength: float) -> Floats:
    """Reciprocal points (u_y, u_z) of the element lattice around the beam, itself left out."""
    y_step = wavelength / layout.horizontal_pitch_m if layout.columns > 1 else np.inf
    z_step = wavelength / layout.vertical_pitch_m if layout.rows > 1 else np.inf
    y, z = _orders(y_step, z_step)
    shear = y * z_step / 2 if layout.lattice is Lattice.TRIANGULAR and layout.rows > 1 else 0.0
    points = floats(np.stack([y * _finite(y_step), z * _finite(z_step) - shear], 1))
    return floats(points[(y != 0) | (z != 0)])


def _subarray_points(layout: ArrayLayout, wavelength: float) -> Floats:
    """Reciprocal points of the lattice of two or more sub-arrays, points of the element lattice left out."""
    across, along = layout.subarray_columns, layout.subarray_rows
    y_pitch, z_pitch = across * layout.horizontal_pitch_m, along * layout.vertical_pitch_m
    y_step = wavelength / y_pitch if layout.columns > across else np.inf
    z_step = wavelength / z_pitch if layout.rows > along else np.inf
    y, z = _orders(y_step, z_step)
    points = floats(np.stack([y * _finite(y_step), z * _finite(z_step)], 1))
    return floats(points[(y % across != 0) | (z % along != 0)])


def _orders(y_step: float, z_step: float) -> tuple[Floats, Floats]:
    """All orders that can come within a null width of visible space."""
    most = [0 if not np.isfinite(step) else int(np.ceil(3 / step)) + 1 for step in (y_step, z_step)]
    y, z = np.meshgrid(*(np.arange(-count, count + 1.0) for count in most), indexing="ij")
    return y.ravel(), z.ravel()


def _finite(step: float) -> float:
    return step if np.isfinite(step) else 0.0


def _strongest(state: Excitation, wavelength: float, beam: float, points: Floats) -> _Lobe:
    """Highest level within a null width of any of the points: all boxes coarsely, the best three finely."""
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
    if len(centres) == 0:
        return _Lobe(visible_count=visible)
    offsets = _box(half_width)
    power = _seen_power(state, centres[:, None] + offsets)
    best: tuple[float, Floats, Floats] | None = None
    for at in np.argsort(power.max(1))[:-4:-1]:
        found = _refined(state, centres[at], half_width, offsets[power[at].argmax()])
        if found is not None and (best is None or found[0] > best[0]):
            best = (*found, centres[at])
    if best is None or best[0] <= 0:
        return _Lobe(visible_count=visible)
    level, (u_y, u_z), centre = best
    theta = np.arccos(u_z)
    phi = np.arcsin(np.clip(u_y / max(np.sin(theta), 1e-12), -1, 1))
    return _Lobe(
        float(db(level / beam)),
        float(np.degrees(theta)),
        float(np.degrees(phi)),
        visible,
        bool(np.hypot(*centre) <= 1 + 1e-9),
    )


def _box(half_width: Floats) -> Floats:
    """Offsets (K, 2) over a box, one line of them where the array has no width that way."""
    steps = np.linspace(-1, 1, _ACROSS)
    y, z = (width * steps if width > 0 else np.zeros(1) for width in half_width)
    return floats(np.stack(np.meshgrid(y, z, indexing="ij"), -1).reshape(-1, 2))


def _seen_power(state: Excitation, u: Floats) -> Floats:
    """Intensity at direction cosines (..., 2); -1 outside visible space."""
    power = np.full(u.shape[:-1], -1.0)
    seen = u[..., 0] ** 2 + u[..., 1] ** 2 <= 1 - 1e-9
    u_y, u_z = u[seen].T
    theta = np.arccos(u_z)
    phi = np.arcsin(np.clip(u_y / np.sin(theta), -1, 1))
    if len(u_y):
        power[seen] = intensity(state, theta[None], phi[None])[0]
    return power


def _refined(
    state: Excitation, centre: Floats, half_width: Floats, offset: Floats
) -> tuple[float, Floats] | None:
    """Highest level around an offset in the box of a lattice point, by two finer grids; None: not seen."""
    level = -1.0
    for finer in (1, 2):
        near = offset + _box(half_width * (2 / (_ACROSS - 1)) ** finer)
        near = near[(np.abs(near) <= half_width + 1e-12).all(1)]
        power = _seen_power(state, centre + near)
        level, offset = float(power.max()), near[power.argmax()]
    return (level, centre + offset) if level >= 0 else None


def _anywhere(state: Excitation, beam_rad: tuple[float, float], beam: float) -> _Lobe:
    """Highest local maximum over the front outside the beam's own."""
    phi = front_angles(state.layout, state.wavenumbers)
    theta = np.pi / 2 + phi[1:-1]
    mesh = np.meshgrid(theta, phi, indexing="ij")
    power = intensity(state, mesh[0].reshape(1, -1), mesh[1].reshape(1, -1)).reshape(mesh[0].shape)
    padded = np.pad(power, 1, constant_values=-1.0)
    rows, columns = power.shape
    higher = np.ones(power.shape, bool)
    for down in (0, 1, 2):
        for right in (0, 1, 2):
            if (down, right) != (1, 1):
                higher &= power >= padded[down : down + rows, right : right + columns] * (1 + 1e-9)
    steps = theta[1] - theta[0], phi[1] - phi[0]
    own = (np.abs(mesh[0] - beam_rad[0]) <= 1.5 * steps[0]) & (
        np.abs(mesh[1] - beam_rad[1]) <= 1.5 * steps[1]
    )
    lobes = higher & ~own & (power > 1e-9 * beam)
    if not lobes.any():
        return _Lobe()
    at = np.unravel_index(np.where(lobes, power, -1.0).argmax(), power.shape)
    level, where = float(power[at]), (float(mesh[0][at]), float(mesh[1][at]))
    for finer in (1.0, 0.2):
        offsets = np.linspace(-finer, finer, _ACROSS)
        near = np.meshgrid(where[0] + steps[0] * offsets, where[1] + steps[1] * offsets, indexing="ij")
        near_phi = np.clip(near[1].reshape(1, -1), -np.pi / 2, np.pi / 2)
        values = intensity(state, near[0].reshape(1, -1), near_phi)[0]
        best = int(values.argmax())
        level, where = float(values[best]), (float(near[0].ravel()[best]), float(near_phi[0, best]))
    degrees = np.degrees(where)
    return _Lobe(float(db(level / beam)), float(degrees[0]), float(degrees[1]), int(lobes.sum()), True)
