"""Amplitude tapers of a line of ports, and what they do to beam and side lobes."""

from __future__ import annotations

from functools import lru_cache

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats

_FINE = 4096


def cosine_on_pedestal(count: int, pedestal: float) -> Floats:
    """Cosine on a pedestal, the taper this program fits to claimed beamwidths.

    count [1]: number of ports.
    pedestal [1]: height of the edge, 0 (pure cosine) to 1 (uniform).
    Returns [1]: amplitudes, shape (count,).
    Source: C. A. Balanis, "Antenna Theory", ch. 12 (aperture distributions), sampled at port centres.

    >>> cosine_on_pedestal(4, 1.0).tolist()
    [1.0, 1.0, 1.0, 1.0]
    """
    across = floats(np.sin(np.pi * (np.arange(count) + 0.5) / count))
    return pedestal + (1 - pedestal) * across


def chebyshev(count: int, sidelobe_db: float) -> Floats:
    """Dolph-Chebyshev weights: all side lobes equal, the narrowest beam for that level.

    count [1]: number of ports, at least 1.
    sidelobe_db [dB]: side-lobe suppression, positive.
    Returns [1]: amplitudes, largest 1, shape (count,).
    Source: C. A. Balanis, "Antenna Theory", ch. 6; 10 elements, 26.02 dB: centre over edge 2.775 (exact).

    >>> weights = chebyshev(10, 20 * np.log10(20))
    >>> float((weights[4] / weights[0]).round(3))
    2.775
    """
    if count < 2:
        return np.ones(count)
    order = count - 1
    widest = np.cosh(np.arccosh(10 ** (abs(sidelobe_db) / 20)) / order)
    # the array factor is the polynomial T_order(widest cos(psi/2)), sampled at the N roots of unity
    samples = _chebyshev_polynomial(order, widest * np.cos(np.pi * np.arange(count) / count))
    phase = np.exp(1j * np.pi * np.arange(count) * order / count)
    weights = np.fft.fft(samples * phase).real
    weights = (weights + weights[::-1]) / 2
    return floats(weights / weights[np.abs(weights).argmax()])


def taylor(count: int, sidelobe_db: float, nbar: int) -> Floats:
    """Taylor weights: nbar - 1 nearly equal side lobes, falling ones beyond.

    count [1]: number of ports.
    sidelobe_db [dB]: side-lobe suppression, positive.
    nbar [1]: number of nearly equal side lobes plus one.
    Returns [1]: amplitudes, largest 1, shape (count,).
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 2 (Taylor line source).

    >>> float(efficiency_db(taylor(16, 25, 4)).round(2))  # brute-force table: -0.432
    -0.43
    """
    a = np.arccosh(10 ** (abs(sidelobe_db) / 20)) / np.pi
    sigma_squared = nbar**2 / (a**2 + (nbar - 0.5) ** 2)
    orders = np.arange(1.0, nbar)
    zeros = sigma_squared * (a**2 + (orders - 0.5) ** 2)
    coefficients = np.array([_taylor_coefficient(int(m), orders, zeros) for m in orders])
    at = (np.arange(count) - (count - 1) / 2) / count
    weights: Floats = 1 + 2 * np.cos(2 * np.pi * np.multiply.outer(at, orders)) @ coefficients
    scaled: Floats = weights / weights.max()
    return scaled


def taylor_dilation(sidelobe_db: ArrayLike, nbar: ArrayLike) -> Floats:
    """Dilation factor of a Taylor line source.

    sidelobe_db [dB]: side-lobe suppression, positive.
    nbar [1]: number of nearly equal side lobes plus one.
    Returns [1]: sigma.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", Taylor tables; 25 dB, nbar 4: 1.087.

    >>> float(taylor_dilation(25, 4).round(3))
    1.087
    """
    a = np.arccosh(10 ** (floats(sidelobe_db) / 20)) / np.pi
    sigma: Floats = floats(nbar) / np.sqrt(a**2 + (floats(nbar) - 0.5) ** 2)
    return sigma


def efficiency_db(weights: ArrayLike) -> Floats:
    """Taper efficiency: directivity against uniform weights, at wide spacing.

    weights [1]: amplitudes.
    Returns [dB]: 10 log10((sum a)^2/(N sum a^2)), zero or negative.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 2.

    >>> float(efficiency_db([1, 1, 1]))
    0.0
    """
    a = floats(weights)
    return db(np.sum(a) ** 2 / (a.size * np.sum(a**2)))


def line_pattern(weights: ArrayLike) -> Floats:
    """Power pattern of a line over half a period of the phase between neighbours.

    weights [1]: amplitudes.
    Returns [1]: power against the beam, at 4097 equal steps of the phase from 0 to pi.
    Source: discrete Fourier transform of the weights.
    """
    a = floats(weights)
    spectrum = np.abs(np.fft.rfft(a, 2 * _FINE)) ** 2
    return spectrum / np.sum(a) ** 2


def half_power_phase_rad(weights: ArrayLike) -> float:
    """Phase between neighbours at which the beam of a line falls to half power.

    weights [1]: amplitudes, two or more.
    Returns [rad]: the phase; nan for a single port.
    Source: definition, interpolated between 4097 samples.
    """
    pattern = line_pattern(weights)
    below = np.flatnonzero(pattern < 0.5)
    if len(below) == 0:
        return float("nan")
    at = below[0]
    fraction = (pattern[at - 1] - 0.5) / (pattern[at - 1] - pattern[at])
    return float((at - 1 + fraction) * np.pi / _FINE)


def beamwidth_ratio(weights: ArrayLike) -> float:
    """How much wider the beam of a line is than with uniform weights.

    weights [1]: amplitudes, two or more.
    Returns [1]: ratio of half-power widths in the sine of the angle.
    Source: exact patterns; 10 elements at 20 dB Dolph-Chebyshev: 1.10.

    >>> round(beamwidth_ratio(chebyshev(10, 20)), 2)
    1.1
    """
    a = floats(weights)
    return half_power_phase_rad(a) / _uniform_half_power_rad(a.size)


@lru_cache(maxsize=128)
def _uniform_half_power_rad(count: int) -> float:
    return half_power_phase_rad(np.ones(count))


def sidelobe_db(weights: ArrayLike) -> float:
    """Highest side lobe of a line.

    weights [1]: amplitudes.
    Returns [dB]: against the beam, negative; nan where the pattern has no side lobe.
    Source: exact pattern; 10 uniform elements: -12.97 dB.

    >>> round(sidelobe_db(np.ones(10)), 2)
    -12.97
    """
    pattern = line_pattern(weights)
    rises = np.flatnonzero(np.diff(pattern) > 1e-12)
    if len(rises) == 0:
        return float("nan")
    return float(db(pattern[rises[0] :].max()))


def pedestal_for_ratio(count: int, ratio: float, grouped: int = 1) -> float:
    """Pedestal of the cosine taper that widens the beam by a given ratio.

    count [1]: number of ports.
    ratio [1]: wanted half-power width over that of uniform weights; below 1 gives uniform.
    grouped [1]: neighbouring elements of the line that share a port.
    Returns [1]: pedestal 0..1; 0 where even the pure cosine is narrower than asked.
    Source: exact patterns, inverted by interpolation over 65 pedestals.

    >>> round(pedestal_for_ratio(10, 1.0), 3), round(pedestal_for_ratio(10, 1.165), 2)
    (1.0, 0.3)
    """
    pedestals, ratios = _ratios(count, grouped)
    return float(np.interp(ratio, ratios, pedestals))


@lru_cache(maxsize=128)
def _ratios(count: int, grouped: int) -> tuple[Floats, Floats]:
    if count < 3:  # two ports of equal weight: no taper
        return np.ones(2), np.array([1.0, 2.0])
    pedestals = np.linspace(1, 0, 65)
    tapers = np.array([np.repeat(cosine_on_pedestal(count, c), grouped) for c in pedestals])
    uniform = _uniform_half_power_rad(count * grouped)
    return pedestals, _symmetric_half_power_rad(tapers, uniform) / uniform


def _symmetric_half_power_rad(tapers: Floats, uniform_rad: float) -> Floats:
    """Half-power phases [rad] of symmetric tapers, one a row, each at most twice the uniform one."""
    places = np.arange(tapers.shape[1]) - (tapers.shape[1] - 1) / 2
    total = tapers.sum(axis=1)
    low, high = np.zeros(len(tapers)), np.full(len(tapers), min(2 * uniform_rad, np.pi))
    for _ in range(36):  # halves the bracket to the last digits
        middle = (low + high) / 2
        beam = np.einsum("rn,rn->r", tapers, np.cos(np.outer(middle, places))) > total * np.sqrt(0.5)
        low, high = np.where(beam, middle, low), np.where(beam, high, middle)
    return low


def _chebyshev_polynomial(order: int, x: Floats) -> Floats:
    inside: Floats = np.cos(order * np.arccos(np.clip(x, -1, 1)))
    outside = np.cosh(order * np.arccosh(np.maximum(np.abs(x), 1)))
    signed: Floats = np.where(x > 0, 1, (-1) ** order) * outside
    return np.where(np.abs(x) <= 1, inside, signed)


def _taylor_coefficient(m: int, orders: Floats, zeros: Floats) -> float:
    numerator = np.prod(1 - m**2 / zeros)
    others = orders[orders != m]
    return float((-1) ** (m + 1) * numerator / (2 * np.prod(1 - m**2 / others**2)))
