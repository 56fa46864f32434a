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

Singles = NDArray[np.float32]


@dataclass(frozen=True, eq=False, slots=True)
class Excitation:
    """A panel driven in S states: wavenumbers [rad/m], steering, weights of rows (S, M), columns (S, N).

    `lines` are the rows and columns of the layout; `distinct` holds the F different wavenumbers, `which` the
    one of each state, `highest` the highest [rad/m].
    """

    layout: ArrayLayout
    lines: tuple[Line, Line]
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
    highest: float

    @property
    def row_groups(self) -> tuple[tuple[slice | NDArray[np.intp], float], ...]:
        """Rows that share a sideways shift [m]; every panel group begins with an unshifted row."""
        if self.row_shifts_m is None:
            return ((slice(None), 0.0),)
        shifts = dict.fromkeys(self.row_shifts_m.tolist())
        return tuple((np.flatnonzero(self.row_shifts_m == shift), shift) for shift in shifts)


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
    Raises ValueError for a frequency that is not positive, or an angle that is no number.
    Source: 3GPP TR 37.840 clause 5.4.4, with theta = 90 + tilt.
    """
    if not (freq_hz.min() > 0 and np.isfinite((freq_hz + tilt_deg + scan_deg).sum())):
        raise ValueError("frequencies must be positive [Hz] and steering angles finite [deg]")
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
        layout,
        lines(layout),
        element,
        k,
        np.pi / 2 + tilt,
        phi,
        rows,
        columns,
        shifts,
        distinct,
        which,
        u_y,
        -np.sin(tilt),
        max(places),
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
    table = phasors(states.lines[0], k * u_z)
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
    table = phasors(states.lines[1], states.wavenumbers[:, None] * u_y)
    return np.asarray((states.columns[:, None] @ table)[:, 0])


def line_power(line: Line, wavenumbers: Floats, cosine: Singles, steered: Floats, fixed: float) -> Singles:
    """Power of a line that is a product of uniform lines: a cosine series in the phase between neighbours.

    line [Line]: with factors.
    wavenumbers [rad/m]: shape (S,).
    cosine [1]: direction cosine along the line, single precision, shape (S, P).
    steered [1]: direction cosine of the steering, shape (S,).
    fixed [1]: the same for the fixed direction of the sub-arrays.
    Returns [1]: squared magnitude of the line factor, shape (S, P).
    Source: array polynomial, C. A. Balanis, "Antenna Theory", ch. 6; summed by Clenshaw's recurrence.
    """
    power: Singles | None = None
    for factor in line.factors:
        step = wavenumbers * factor.pitch_m
        phase = step.astype(np.float32)[:, None] * cosine
        phase -= (step * (steered if factor.steered else fixed)).astype(np.float32)[:, None]
        one = _series_power(np.cos(phase, out=phase), factor.amplitudes)
        power = one if power is None else np.multiply(power, one, out=power)
    return np.ones((len(wavenumbers), cosine.shape[-1]), np.float32) if power is None else power


def _series_power(cosine: Singles, amplitudes: tuple[float, ...]) -> Singles:
    """|sum a_n e^(j n x)|^2 from cos x.

    A symmetric line is real about its middle: cos(x/2) times a series of Chebyshev polynomials of the third
    kind for an even number, a plain cosine series for an odd one. Others: the series of autocorrelations.
    """
    count = len(amplitudes)
    symmetric = amplitudes == amplitudes[::-1]
    if symmetric:
        terms = [2 * a for a in amplitudes[count // 2 :]]
        if count % 2:
            terms[0] /= 2
    else:
        lags = np.correlate(amplitudes, amplitudes, "full")[count - 1 :]
        terms = [float(lags[0]), *(2 * lags[1:]).tolist()]
    if len(terms) == 1:
        terms.append(0.0)
    twice = cosine + cosine
    before: Singles | float = terms[-1]
    last = twice * terms[-1]
    last += terms[-2]
    for term in terms[-3::-1]:
        following = twice * last
        following -= before
        following += term
        before, last = last, following
    third_kind = symmetric and count % 2 == 0
    last -= before if third_kind else before * cosine
    if not symmetric:
        return last
    last *= last
    if third_kind:
        twice += 2
        twice *= 0.25
        last *= twice
    return last


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
