"""The two principal cuts of many states at once.

The horizontal cut runs in phi at the theta of the beam, the vertical cut in theta at its phi, both over the
front. Samples stand seven to a null width.
"""

from __future__ import annotations

from typing import TypeVar

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.beam import Beam
from speccheck.physics.decibels import Floats
from speccheck.physics.field import Excitation, phasors, row_factor, squared
from speccheck.physics.layout import ArrayLayout, Complex, lines

_Number = TypeVar("_Number", np.float64, np.complex128)
_SAMPLES_PER_WAVELENGTH = 11.0
_FEWEST, _MOST = 72, 1500


def half_grid(layout: ArrayLayout, wavenumbers: Floats) -> Floats:
    """Angles from the middle of a cut to its end, fine enough for the longer side.

    layout [ArrayLayout]: the panel.
    wavenumbers [rad/m]: of all states.
    Returns [rad]: 0 to pi/2, seven samples to a null width.
    Source: sampling of a pattern whose null width is wavelength over aperture.
    """
    in_wavelengths = max(layout.height_m, layout.width_m) * float(wavenumbers.max()) / (2 * np.pi)
    count = min(max(int(np.ceil(_SAMPLES_PER_WAVELENGTH * in_wavelengths)), _FEWEST), _MOST)
    return np.linspace(0, np.pi / 2, count + 1)


def both_sides(half: Floats) -> Floats:
    """Angles of a whole cut.

    half [rad]: from its middle to its end.
    Returns [rad]: from end to end.
    Source: symmetry.
    """
    return np.concatenate([-half[:0:-1], half])


def horizontal_cut(states: Excitation, beam: Beam, half: Floats) -> Floats:
    """Cut in phi at constant theta, over the front.

    states [Excitation]: the states.
    beam [Beam]: their beams.
    half [rad]: phi from 0 to pi/2, shape (P,).
    Returns [1]: level against the beam, shape (S, 2 P - 1).
    Source: azimuth cut through the beam peak (a cone at constant theta).
    """
    sine = np.sin(beam.theta_rad)[:, None]
    k = states.wavenumbers[:, None]
    table = phasors(lines(states.layout)[1], k * sine * np.sin(half))
    level = squared(_mirrored(states.columns, table))
    angle = both_sides(half)
    level *= states.element.power(beam.theta_rad[:, None], angle)
    if states.row_shifts_m is None:  # the row factor is the same all along the cut
        level /= (beam.column_power * beam.element_power)[:, None]
        return level
    u_y = sine * np.sin(angle)
    u_z = np.broadcast_to(np.cos(beam.theta_rad)[:, None], u_y.shape)
    return level * squared(row_factor(states, u_y, u_z)) / beam.intensity[:, None]


def vertical_cut(states: Excitation, beam: Beam, half: Floats) -> Floats:
    """Cut in theta at constant phi, over the front, from the zenith down.

    states [Excitation]: the states.
    beam [Beam]: their beams.
    half [rad]: angle from the horizon, 0 to pi/2, shape (P,).
    Returns [1]: level against the beam, shape (S, 2 P - 1).
    Source: elevation cut through the beam peak.
    """
    table = phasors(lines(states.layout)[0], -states.distinct[:, None] * np.sin(half))[states.which]
    sin_phi = np.sin(beam.phi_rad)[:, None]
    u_y = np.cos(half) * sin_phi
    groups = [(_mirrored(states.rows[:, part], table[:, part]), shift) for part, shift in states.row_groups]
    rows = groups[0][0]
    for factor, shift in groups[1:]:
        rows = rows + factor * _unfolded(np.exp(1j * shift * states.wavenumbers[:, None] * u_y))
    level = squared(rows)
    level *= states.element.power(np.pi / 2 + both_sides(half), beam.phi_rad[:, None])
    level /= (beam.row_power * beam.element_power)[:, None]
    scanned = np.flatnonzero(np.abs(sin_phi) > 1e-6)
    if len(scanned):
        table = phasors(lines(states.layout)[1], (states.wavenumbers[:, None] * u_y)[scanned])
        across = squared((states.columns[scanned, None] @ table)[:, 0]) / beam.column_power[scanned, None]
        level[scanned] *= _unfolded(across)
    return level


def _mirrored(weights: Complex, table: Complex) -> Complex:
    """Line factor over the whole cut from its half: f(-u) = (w* . e)*."""
    both = np.stack([weights, weights.conj()], axis=1) @ table
    return np.concatenate([both[:, 1, :0:-1].conj(), both[:, 0]], axis=1)


def _unfolded(half: NDArray[_Number]) -> NDArray[_Number]:
    return np.concatenate([half[:, :0:-1], half], axis=1)
