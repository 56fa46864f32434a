"""The two principal cuts of many states at once.

The horizontal cut runs in phi at the theta of the beam, the vertical cut in theta at its phi, both over the
front. Samples stand six to a null width. Levels are in single precision, a millionth of the beam: it halves
the work, and hides the rounding of a cut that is flat.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache

import numpy as np

from speccheck.physics.beam import Beam
from speccheck.physics.decibels import Floats, floats
from speccheck.physics.field import Excitation, Singles, column_factor, line_power, row_factor, squared
from speccheck.physics.layout import ArrayLayout

_CLOSEST = 0.68
"""Step at broadside [1] over that of equal steps."""
_SAMPLES_PER_WAVELENGTH = 9.5 * _CLOSEST
"""On either side of broadside; six to a null width there."""
_FEWEST, _MOST = 50, 1500


@dataclass(frozen=True, eq=False, slots=True)
class Grid:
    """Angles [rad] of a cut over the front, their sines and cosines [1], shape (P,) each; P is odd.

    between_rad [rad]: halfway from one to the next, shape (P - 1,).
    """

    angle_rad: Floats
    between_rad: Floats
    sine: Singles
    cosine: Singles


def angle_at(index: Floats, count: int) -> Floats:
    """Angle of a sample of a cut: lobes widen away from broadside, and so do the steps.

    index [1]: place of the sample, whole or between, 0 to count - 1.
    count [1]: samples of the cut.
    Returns [rad]: -pi/2 to pi/2, odd about the middle.
    Source: a cubic whose steps are closest at broadside (own choice).
    """
    s = index * (2 / (count - 1)) - 1
    return (np.pi / 2 * _CLOSEST) * s + (np.pi / 2 * (1 - _CLOSEST)) * (s * s * s)


def front_grid(layout: ArrayLayout, wavenumber: float) -> Grid:
    """Where a cut over the front is sampled, fine enough for the longer side.

    layout [ArrayLayout]: the panel.
    wavenumber [rad/m]: highest of all states.
    Returns [Grid]: -pi/2 to pi/2, an odd number of samples, six or more to a null width.
    Source: sampling of a pattern whose null width is wavelength over aperture.
    """
    in_wavelengths = max(layout.height_m, layout.width_m) * wavenumber / (2 * np.pi)
    return _grid(min(max(int(np.ceil(_SAMPLES_PER_WAVELENGTH * in_wavelengths)), _FEWEST), _MOST))


@lru_cache(maxsize=64)
def _grid(half: int) -> Grid:
    angle = angle_at(np.arange(2 * half + 1.0), 2 * half + 1)
    return Grid(
        angle,
        (angle[1:] + angle[:-1]) / 2,
        np.sin(angle).astype(np.float32),
        np.cos(angle).astype(np.float32),
    )


@dataclass(frozen=True, eq=False, slots=True)
class Cuts:
    """Levels against the beam [1], shape (2 S, P): all horizontal cuts, then all vertical ones; and the
    intensity [1] of the beam, not normalised, shape (S,)."""

    level: Singles
    intensity: Floats


def principal_cuts(states: Excitation, beam: Beam, grid: Grid) -> Cuts:
    """Cuts through the beam: in phi at constant theta (a cone), then in theta at constant phi.

    states [Excitation]: the states.
    beam [Beam]: their beams.
    grid [Grid]: phi, and the angle below the horizon from the zenith down.
    Returns [Cuts]: levels and the intensity they are held against.
    Source: azimuth and elevation cut as in IEEE Std 149, pattern multiplication.
    """
    count, samples = len(beam.theta_rad), len(grid.angle_rad)
    middle = samples // 2  # the vertical cut sees the columns alike above and below the horizon
    sin_theta, sin_phi = np.sin(beam.theta_rad)[:, None], np.sin(beam.phi_rad)[:, None]
    u_y = np.empty((count, samples + middle + 2), np.float32)  # both cuts, then the beam itself
    np.multiply(sin_theta.astype(np.float32), grid.sine, out=u_y[:, :samples])
    np.multiply(sin_phi.astype(np.float32), grid.cosine[middle:], out=u_y[:, samples:-1])
    u_y[:, -1:] = sin_theta * sin_phi
    columns = _column_power(states, u_y)
    rows = _row_power(states, beam, grid)
    across, below, column = columns[:, :samples], columns[:, samples:-1], columns[:, -1:]
    row, element = rows[:, -1:], states.element.power(beam.theta_rad, beam.phi_rad)
    level = np.empty((2 * count, samples), np.float32)
    horizontal, vertical = level[:count], level[count:]
    horizontal[:] = states.element.power(beam.theta_rad[:, None], grid.angle_rad)
    vertical[:] = states.element.power(np.pi / 2 + grid.angle_rad, beam.phi_rad[:, None])
    horizontal *= across
    vertical *= rows[:, :-1]
    vertical[:, middle:] *= below
    vertical[:, :middle] *= below[:, :0:-1]
    array = row * column
    intensity = element * array[:, 0]
    vertical /= array * _single(element)
    if states.row_shifts_m is None:  # the row factor is the same all along the horizontal cut
        horizontal /= column * _single(element)
    else:
        u_z = np.broadcast_to(np.cos(beam.theta_rad)[:, None], across.shape)
        horizontal *= squared(row_factor(states, floats(u_y[:, :samples]), u_z)).astype(np.float32)
        horizontal /= array * _single(element)
    return Cuts(level, intensity)


def _single(values: Floats) -> Singles:
    return values.astype(np.float32)[:, None]


def _column_power(states: Excitation, u_y: Singles) -> Singles:
    """Power of the column factor."""
    columns = states.lines[1]
    if not columns.factors:
        return squared(column_factor(states, floats(u_y))).astype(np.float32)
    return line_power(columns, states.wavenumbers, u_y, states.steer_y, 0.0)


def _row_power(states: Excitation, beam: Beam, grid: Grid) -> Singles:
    """Power of the row factor along a vertical cut, and at the beam."""
    rows = states.lines[0]
    u_z = np.empty((len(beam.theta_rad), len(grid.sine) + 1), np.float32)
    np.negative(grid.sine, out=u_z[:, :-1])
    u_z[:, -1] = np.cos(beam.theta_rad)
    if not rows.factors or states.row_shifts_m is not None:
        sin_theta = np.concatenate([np.tile(grid.cosine, (len(u_z), 1)), np.sin(beam.theta_rad)[:, None]], 1)
        u_y = np.sin(beam.phi_rad)[:, None] * sin_theta
        return squared(row_factor(states, u_y, floats(u_z))).astype(np.float32)
    fixed = -float(np.sin(np.radians(states.layout.subarray_tilt_deg)))
    return line_power(rows, states.wavenumbers, u_z, states.steer_z, fixed)
