"""The far field of an excited array: array factor and power in given directions."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.decibels import Floats
from speccheck.physics.element import Element
from speccheck.physics.layout import (
    ArrayLayout,
    Complex,
    Line,
    column_weights,
    lines,
    row_shifts,
    row_weights,
    wavenumber,
)


@dataclass(frozen=True, eq=False, slots=True)
class Excitation:
    """A panel driven in S states: wavenumbers [rad/m], steering, weights of rows (S, M), columns (S, N).

    `distinct` holds the F different wavenumbers, `which` the one of each state.
    """

    layout: ArrayLayout
    element: Element
    wavenumbers: Floats
    theta_rad: Floats
    phi_rad: Floats
    rows: Complex
    columns: Complex
    row_shifts_m: Floats | None
    distinct: Floats
    which: NDArray[np.intp]
    steer_y: Floats
    steer_z: Floats

    @property
    def row_groups(self) -> tuple[tuple[slice, float], ...]:
        """Rows that share a sideways shift, and that shift [m]."""
        if self.row_shifts_m is None or len(self.row_shifts_m) < 2:
            return ((slice(None), 0.0),)
        return ((slice(0, None, 2), 0.0), (slice(1, None, 2), float(self.row_shifts_m[1])))


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
    k = wavenumber(freq_hz)
    tilt, phi = np.radians(tilt_deg), np.radians(scan_deg)
    u_y = np.cos(tilt) * np.sin(phi)
    rows, columns = row_weights(layout, k, tilt), column_weights(layout, k, u_y)
    shifts = row_shifts(layout)
    if shifts is not None:
        rows = rows * np.exp(-1j * (k * u_y)[:, None] * shifts)
    places = {value: at for at, value in enumerate(dict.fromkeys(k.tolist()))}
    distinct, which = np.array(list(places)), np.array([places[value] for value in k.tolist()])
    return Excitation(
        layout, element, k, np.pi / 2 + tilt, phi, rows, columns, shifts, distinct, which, u_y, -np.sin(tilt)
    )


def phasors(line: Line, path_phase: Floats) -> Complex:
    """Phase of each element of a line towards given directions, counted from its first element.

    line [Line]: element positions.
    path_phase [rad/m]: wavenumber times direction cosine, shape (G, P).
    Returns [1]: exp(j (position - first) path_phase), shape (G, M, P).
    Source: definition; powers of one phasor where the positions are equally spaced.
    """
    count = len(line.positions)
    if line.pitch_m == 0.0 or count == 1:
        return np.asarray(np.exp(1j * path_phase[:, None] * (line.positions - line.positions[0])[:, None]))
    out = np.empty((path_phase.shape[0], count, path_phase.shape[1]), complex)
    out[:, 0] = 1
    step = out[:, 1]
    np.exp(1j * line.pitch_m * path_phase, out=step)
    for n in range(2, count):
        np.multiply(out[:, n - 1], step, out=out[:, n])
    return out


def row_factor(states: Excitation, u_y: Floats, u_z: Floats) -> Complex:
    """Sum over the rows of one column, its phase counted from the first row.

    states [Excitation]: the states.
    u_y [1]: direction cosine along y, shape (S, P).
    u_z [1]: direction cosine along z, shape (S, P).
    Returns [1]: complex factor, shape (S, P).
    Source: array factor, 3GPP TR 37.840 clause 5.4.4.
    """
    k = states.wavenumbers[:, None]
    table = phasors(lines(states.layout)[0], k * u_z)
    total: Complex = np.zeros(u_z.shape, complex)
    for part, shift in states.row_groups:
        factor = (states.rows[:, None, part] @ table[:, part])[:, 0]
        total += factor * np.exp(1j * shift * k * u_y) if shift else factor
    return total


def column_factor(states: Excitation, u_y: Floats) -> Complex:
    """Sum over the columns of one row, its phase counted from the first column.

    states [Excitation]: the states.
    u_y [1]: direction cosine along y, shape (S, P).
    Returns [1]: complex factor, shape (S, P).
    Source: array factor, 3GPP TR 37.840 clause 5.4.4.
    """
    table = phasors(lines(states.layout)[1], states.wavenumbers[:, None] * u_y)
    return np.asarray((states.columns[:, None] @ table)[:, 0])


def line_power(line: Line, path_phase: Floats, steered_phase: Floats, fixed_phase: Floats) -> Floats:
    """Power of a line that is a product of uniform lines: a cosine series in the phase between neighbours.

    line [Line]: with factors.
    path_phase [rad/m]: wavenumber times direction cosine, shape (S, P).
    steered_phase [rad/m]: the same for the steering direction, shape (S, 1).
    fixed_phase [rad/m]: the same for the fixed direction of the sub-arrays, shape (S, 1).
    Returns [1]: squared magnitude of the line factor, shape (S, P).
    Source: power spectrum as the transform of the autocorrelation; Clenshaw's summation.
    """
    power: Floats | None = None
    for factor in line.factors:
        series = factor.autocorrelation
        phase = path_phase - (steered_phase if factor.steered else fixed_phase)
        phase *= factor.pitch_m
        cosine = np.cos(phase, out=phase)
        twice = cosine + cosine
        last, before = np.full_like(twice, series[-1]), np.zeros_like(twice)
        for coefficient in series[-2:0:-1]:
            following = twice * last
            following -= before
            following += coefficient
            last, before = following, last
        if len(series) > 1:
            last *= cosine
            last -= before
            last += last
            last += series[0]
        power = last if power is None else power * last
    return np.ones_like(path_phase) if power is None else power


def squared(factor: Complex) -> Floats:
    """Power of a complex factor.

    factor [1]: any shape.
    Returns [1]: its squared magnitude.
    Source: definition.
    """
    return np.asarray(factor.real**2 + factor.imag**2)


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
    power = squared(row_factor(states, u_y, u_z)) * squared(column_factor(states, u_y))
    return states.element.power(theta_rad, phi_rad) * power
