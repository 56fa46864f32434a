"""The two principal cuts of many states at once.

The horizontal cut runs in phi at the theta of the beam, the vertical cut in theta at its phi, both over the
front. Samples stand seven to a null width.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from speccheck.physics.decibels import Floats
from speccheck.physics.field import Excitation, column_factor, phasors, row_factor
from speccheck.physics.layout import Complex, lines

_SAMPLES_PER_WAVELENGTH = 11.0
_FEWEST, _MOST = 72, 1500


@dataclass(frozen=True, eq=False, slots=True)
class Cut:
    """Intensity [1] of a cut, shape (S, P), over angles [rad] from the cut's middle, shape (P,)."""

    angle_rad: Floats
    intensity: Floats
    peak_rad: Floats
    peak_intensity: Floats


def half_grid(aperture_m: float, wavenumbers: Floats) -> Floats:
    """Angles from the middle of a cut to its end.

    aperture_m [m]: length of the aperture in that cut.
    wavenumbers [rad/m]: of all states.
    Returns [rad]: 0 to pi/2, seven samples to a null width.
    Source: sampling of a pattern whose null width is wavelength over aperture.
    """
    in_wavelengths = aperture_m * float(wavenumbers.max()) / (2 * np.pi)
    count = int(np.clip(np.ceil(_SAMPLES_PER_WAVELENGTH * in_wavelengths), _FEWEST, _MOST))
    return np.linspace(0, np.pi / 2, count + 1)


def horizontal_cut(states: Excitation, theta_rad: Floats, phi_rad: Floats, peak: Floats) -> Cut:
    """Cut in phi at constant theta, over the front.

    states [Excitation]: the states.
    theta_rad [rad]: theta of the beam, shape (S,).
    phi_rad [rad]: phi of the beam, shape (S,).
    peak [1]: intensity of the beam, shape (S,).
    Returns [Cut]: phi from -pi/2 to pi/2.
    Source: azimuth cut through the beam peak (a cone at constant theta).
    """
    half = half_grid(states.layout.width_m, states.wavenumbers)
    sine = np.sin(theta_rad)[:, None]
    k = states.wavenumbers[:, None]
    table = phasors(lines(states.layout)[1], k * sine * np.sin(half))
    both = np.stack([states.columns, states.columns.conj()], axis=1) @ table
    factor = _mirrored(both)
    angle = np.concatenate([-half[:0:-1], half])
    power = (factor.real**2 + factor.imag**2) * _rows_at(states, theta_rad, sine * np.sin(angle))
    return Cut(angle, power * states.element.power(theta_rad[:, None], angle), phi_rad, peak)


def _rows_at(states: Excitation, theta_rad: Floats, u_y: Floats) -> Floats:
    """Power of the row factor at one theta per state, over u_y where rows are shifted."""
    u_z = np.cos(theta_rad)[:, None]
    if len(states.row_groups) == 1:
        u_y = u_y[:, :1]
    factor = row_factor(states, u_y, np.broadcast_to(u_z, u_y.shape))
    return factor.real**2 + factor.imag**2


def vertical_cut(states: Excitation, theta_rad: Floats, phi_rad: Floats, peak: Floats) -> Cut:
    """Cut in theta at constant phi, over the front; angles are counted downwards from the horizon.

    states [Excitation]: the states.
    theta_rad [rad]: theta of the beam, shape (S,).
    phi_rad [rad]: phi of the beam, shape (S,).
    peak [1]: intensity of the beam, shape (S,).
    Returns [Cut]: theta - pi/2 from -pi/2 to pi/2.
    Source: elevation cut through the beam peak.
    """
    half = half_grid(states.layout.height_m, states.wavenumbers)
    angle = np.concatenate([-half[:0:-1], half])
    u_y = np.cos(half) * np.sin(phi_rad)[:, None]
    wavenumbers, which = np.unique(states.wavenumbers, return_inverse=True)
    rows: Complex = np.zeros((len(which), len(angle)), complex)
    for part, shift in states.row_groups:
        table = phasors(lines(states.layout)[0], -wavenumbers[:, None] * np.sin(half), part)
        weights = np.stack([states.rows[:, part], states.rows[:, part].conj()], axis=1)
        factor = _mirrored(weights @ table[which])
        turn = np.exp(1j * shift * states.wavenumbers[:, None] * u_y)
        rows += factor * _unfolded(turn) if shift else factor
    power = rows.real**2 + rows.imag**2
    if np.abs(phi_rad).max() > 1e-6:
        column = column_factor(states, u_y)
        power = power * _unfolded(column.real**2 + column.imag**2)
    else:
        power = power * np.abs(states.columns.sum(1))[:, None] ** 2
    power = power * states.element.power(np.pi / 2 + angle, phi_rad[:, None])
    return Cut(angle, power, theta_rad - np.pi / 2, peak)


def _mirrored(both: Complex) -> Complex:
    """Line factor over the whole cut from w . e and w* . e over its half: f(-u) = (w* . e)*."""
    return np.concatenate([both[:, 1, :0:-1].conj(), both[:, 0]], axis=1)


def _unfolded(half: Floats) -> Floats:
    return np.concatenate([half[:, :0:-1], half], axis=1)
