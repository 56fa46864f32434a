"""The far field of an excited array: array factor and power in given directions."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from speccheck.physics.decibels import Floats
from speccheck.physics.element import Element
from speccheck.physics.layout import (
    ArrayLayout,
    Complex,
    Line,
    column_weights,
    lines,
    row_weights,
    wavenumber,
)


@dataclass(frozen=True, eq=False, slots=True)
class Excitation:
    """A panel driven in S states: wavenumbers [rad/m], steering, weights of rows (S, M), columns (S, N)."""

    layout: ArrayLayout
    element: Element
    wavenumbers: Floats
    theta_rad: Floats
    phi_rad: Floats
    rows: Complex
    columns: Complex

    @property
    def row_groups(self) -> tuple[tuple[slice, float], ...]:
        """Rows that share a sideways shift, and that shift [m]."""
        shifts = lines(self.layout)[2]
        if not shifts.any():
            return ((slice(None), 0.0),)
        return ((slice(0, None, 2), 0.0), (slice(1, None, 2), float(shifts[1])))


def excite(
    layout: ArrayLayout, element: Element, freq_hz: Floats, tilt_deg: Floats, scan_deg: Floats
) -> Excitation:
    """Weights of a panel steered by tilt and azimuth scan.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: shape (S,).
    tilt_deg [deg]: electrical tilt, positive downwards, shape (S,).
    scan_deg [deg]: azimuth scan, shape (S,).
    Returns [Excitation]: the states.
    Source: 3GPP TR 37.840 clause 5.4.4, with theta = 90 + tilt.
    """
    wavenumbers = wavenumber(freq_hz)
    tilt, phi = np.radians(tilt_deg), np.radians(scan_deg)
    u_y = np.cos(tilt) * np.sin(phi)
    rows = row_weights(layout, wavenumbers, tilt)
    shifts = lines(layout)[2]
    if shifts.any():
        rows = rows * np.exp(-1j * np.multiply.outer(wavenumbers * u_y, shifts))
    return Excitation(
        layout, element, wavenumbers, np.pi / 2 + tilt, phi, rows, column_weights(layout, wavenumbers, u_y)
    )


def phasors(line: Line, path_phase: Floats, part: slice = slice(None)) -> Complex:
    """Phase of each element of a line towards given directions, by recurrence on a uniform line.

    line [Line]: element positions.
    path_phase [rad/m]: wavenumber times direction cosine, shape (G, P).
    part [1]: which elements of the line.
    Returns [1]: exp(j position path_phase), shape (G, M, P).
    Source: definition; powers of one phasor where the positions are equally spaced.
    """
    positions = line.positions[part]
    if line.uniform_pitch_m == 0.0:
        return np.asarray(np.exp(1j * path_phase[:, None, :] * positions[:, None]))
    out = np.empty((path_phase.shape[0], len(positions), path_phase.shape[1]), complex)
    np.exp(1j * positions[0] * path_phase, out=out[:, 0])
    if len(positions) > 1:
        step = np.exp(1j * (positions[1] - positions[0]) * path_phase)
        for n in range(1, len(positions)):
            np.multiply(out[:, n - 1], step, out=out[:, n])
    return out


def row_factor(states: Excitation, u_y: Floats, u_z: Floats) -> Complex:
    """Sum over the rows of one column.

    states [Excitation]: the states.
    u_y [1]: direction cosine along y, shape (S, P).
    u_z [1]: direction cosine along z, shape (S, P).
    Returns [1]: complex factor, shape (S, P).
    Source: array factor, 3GPP TR 37.840 clause 5.4.4.
    """
    line = lines(states.layout)[0]
    k = states.wavenumbers[:, None]
    total: Complex = np.zeros(u_z.shape, complex)
    for part, shift in states.row_groups:
        factor = np.einsum("sm,smp->sp", states.rows[:, part], phasors(line, k * u_z, part))
        total += factor * np.exp(1j * shift * k * u_y) if shift else factor
    return total


def column_factor(states: Excitation, u_y: Floats) -> Complex:
    """Sum over the columns of one row.

    states [Excitation]: the states.
    u_y [1]: direction cosine along y, shape (S, P).
    Returns [1]: complex factor, shape (S, P).
    Source: array factor, 3GPP TR 37.840 clause 5.4.4.
    """
    table = phasors(lines(states.layout)[1], states.wavenumbers[:, None] * u_y)
    return np.asarray(np.einsum("sn,snp->sp", states.columns, table))


def intensity(states: Excitation, theta_rad: Floats, phi_rad: Floats) -> Floats:
    """Radiation intensity with the element pattern, not normalised.

    states [Excitation]: the states.
    theta_rad [rad]: zenith angle, shape (S, P) or (1, P).
    phi_rad [rad]: azimuth, shape (S, P) or (1, P).
    Returns [1]: element power times the square of the array factor, shape (S, P).
    Source: pattern multiplication, C. A. Balanis, "Antenna Theory", ch. 6.
    """
    sine = np.sin(theta_rad)
    shape = (len(states.wavenumbers), theta_rad.shape[1])
    u_y = np.broadcast_to(sine * np.sin(phi_rad), shape)
    u_z = np.broadcast_to(np.cos(theta_rad), shape)
    factor = row_factor(states, u_y, u_z) * column_factor(states, u_y)
    return states.element.power(theta_rad, phi_rad) * (factor.real**2 + factor.imag**2)
