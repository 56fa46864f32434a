"""The two principal cuts of many states at once.

The horizontal cut runs in phi at the theta of the beam, the vertical cut in theta at its phi, both over the
front. Samples stand seven to a null width.
"""

from __future__ import annotations

import numpy as np

from speccheck.physics.beam import Beam
from speccheck.physics.decibels import Floats
from speccheck.physics.field import Excitation, column_factor, line_power, row_factor, squared
from speccheck.physics.layout import ArrayLayout, lines

_CLOSEST = 0.68
"""Step at broadside [1] over that of equal steps."""
_SAMPLES_PER_WAVELENGTH = 11.0 * _CLOSEST
"""On either side of broadside; seven to a null width there."""
_FEWEST, _MOST = 60, 1500


def angle_at(index: Floats, count: int) -> Floats:
    """Angle of a sample of a cut: lobes widen away from broadside, and so do the steps.

    index [1]: place of the sample, whole or between, 0 to count - 1.
    count [1]: samples of the cut.
    Returns [rad]: -pi/2 to pi/2, odd about the middle.
    Source: a cubic whose steps are closest at broadside (own choice).
    """
    s = index * (2 / (count - 1)) - 1
    return np.pi / 2 * s * (_CLOSEST + (1 - _CLOSEST) * s * s)


def front_angles(layout: ArrayLayout, wavenumbers: Floats) -> Floats:
    """Angles of a cut over the front, fine enough for the longer side.

    layout [ArrayLayout]: the panel.
    wavenumbers [rad/m]: of all states.
    Returns [rad]: -pi/2 to pi/2, an odd number of samples, seven or more to a null width.
    Source: sampling of a pattern whose null width is wavelength over aperture.
    """
    in_wavelengths = max(layout.height_m, layout.width_m) * float(wavenumbers.max()) / (2 * np.pi)
    count = min(max(int(np.ceil(_SAMPLES_PER_WAVELENGTH * in_wavelengths)), _FEWEST), _MOST)
    return angle_at(np.arange(2 * count + 1.0), 2 * count + 1)


def horizontal_cut(states: Excitation, beam: Beam, angle: Floats) -> Floats:
    """Cut in phi at constant theta, over the front.

    states [Excitation]: the states.
    beam [Beam]: their beams.
    angle [rad]: phi, shape (P,).
    Returns [1]: level against the beam, shape (S, P).
    Source: azimuth cut through the beam peak (a cone at constant theta).
    """
    sine, profile = np.sin(beam.theta_rad)[:, None], np.sin(angle)
    level = _column_power(states, sine, profile)
    level *= states.element.power(beam.theta_rad[:, None], angle)
    if states.row_shifts_m is None:  # the row factor is the same all along the cut
        level /= (beam.column_power * beam.element_power)[:, None]
        return level
    u_z = np.broadcast_to(np.cos(beam.theta_rad)[:, None], level.shape)
    return level * squared(row_factor(states, sine * profile, u_z)) / beam.intensity[:, None]


def vertical_cut(states: Excitation, beam: Beam, angle: Floats) -> Floats:
    """Cut in theta at constant phi, over the front, from the zenith down.

    states [Excitation]: the states.
    beam [Beam]: their beams.
    angle [rad]: angle below the horizon, symmetric about zero, shape (P,).
    Returns [1]: level against the beam, shape (S, P).
    Source: elevation cut through the beam peak.
    """
    sin_phi, cosine = np.sin(beam.phi_rad)[:, None], np.cos(angle)
    level = _row_power(states, sin_phi, angle)
    level *= states.element.power(np.pi / 2 + angle, beam.phi_rad[:, None])
    level /= (beam.row_power * beam.element_power)[:, None]
    if np.abs(sin_phi).max() > 1e-6:
        across = _column_power(states, sin_phi, cosine[len(angle) // 2 :])
        across /= beam.column_power[:, None]
        level *= np.concatenate([across[:, :0:-1], across], axis=1)
    return level


def _column_power(states: Excitation, share: Floats, profile: Floats) -> Floats:
    """Power of the column factor over u_y = share (S, 1) times profile (P,)."""
    columns = lines(states.layout)[1]
    if not columns.factors:
        return squared(column_factor(states, share * profile))
    k = states.wavenumbers[:, None]
    return line_power(columns, k * share, profile, k * states.steer_y[:, None], 0.0)


def _row_power(states: Excitation, sin_phi: Floats, angle: Floats) -> Floats:
    """Power of the row factor of a vertical cut."""
    rows = lines(states.layout)[0]
    profile = -np.sin(angle)
    if not rows.factors or states.row_shifts_m is not None:
        u_y = sin_phi * np.cos(angle)
        return squared(row_factor(states, u_y, np.broadcast_to(profile, u_y.shape)))
    k = states.wavenumbers[:, None]
    fixed = -k * np.sin(np.radians(states.layout.subarray_tilt_deg))
    return line_power(rows, k, profile, k * states.steer_z[:, None], fixed)
