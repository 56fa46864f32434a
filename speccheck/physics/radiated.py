"""Radiated power of an excited array by the lag form: exact, and no sphere is ever sampled.

P = sum over pairs of elements w_i w_j* b(y_i - y_j, z_i - z_j) with the kernel b of the element. Only the
different lags count: a panel of M rows and N columns needs M N kernel values, whatever the number of states.
"""

from __future__ import annotations

from functools import lru_cache

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.decibels import Floats
from speccheck.physics.element import Element
from speccheck.physics.field import Excitation
from speccheck.physics.layout import Complex, Line


def radiated_power(states: Excitation) -> Floats:
    """Mean of the radiation intensity over the sphere.

    states [Excitation]: the states.
    Returns [1]: (1/4 pi) integral of the intensity, shape (S,).
    Source: quadratic form of the far field over a lossless array, C. A. Balanis, "Antenna Theory", ch. 6.
    """
    if states.row_shifts_m is not None:
        return _staggered_power(states, states.row_shifts_m)
    rows, columns = states.lines
    y_lags, over_y = _folded(columns, states.columns, states.wavenumbers * states.steer_y)
    z_lags, over_z = _folded(rows, states.rows, states.wavenumbers * states.steer_z)
    kernel = _kernels(states, y_lags, z_lags)
    return np.asarray(((over_y[:, None] @ kernel)[:, 0] * over_z).sum(1))


def _staggered_power(states: Excitation, shifts: Floats) -> Floats:
    """Pairs of rows with equal shift, and twice the real part of the pairs shifted against unshifted rows."""
    rows, columns = states.lines
    every = np.ones((len(columns.positions),) * 2, bool)
    y_lags, y_pairs = _sum_over(_differences(columns), every)
    over_y, pairs_z = _correlation(states.columns) @ y_pairs, _correlation(states.rows)
    total = np.zeros(len(states.wavenumbers))
    crossed = (shifts[:, None] > 0) & (shifts == 0)
    for mask, shift, weight in ((shifts[:, None] == shifts, 0.0, 1.0), (crossed, float(shifts.max()), 2.0)):
        z_lags, z_pairs = _sum_over(_differences(rows), mask)
        kernel = _kernels(states, np.abs(y_lags + shift), np.abs(z_lags))
        total += weight * ((over_y[:, None] @ kernel)[:, 0] * (pairs_z @ z_pairs)).sum(1).real
    return total


def _kernels(states: Excitation, y_m: Floats, z_m: Floats) -> Floats:
    """Kernel of each state, computed once per frequency."""
    keys = (tuple(values.tolist()) for values in (states.distinct, y_m, z_m))
    return _kernel(states.element, *keys)[states.which]


@lru_cache(maxsize=128)
def _kernel(
    element: Element, wavenumbers: tuple[float, ...], y_m: tuple[float, ...], z_m: tuple[float, ...]
) -> Floats:
    return element.kernel(np.array(wavenumbers), np.array(y_m), np.array(z_m))


def _correlation(weights: Complex) -> Complex:
    """Products w_i w_j* of all pairs, shape (S, M M)."""
    pairs = weights[:, :, None] * weights.conj()[:, None, :]
    return pairs.reshape(len(weights), -1)


def _folded(line: Line, weights: Complex, steered: Floats) -> tuple[Floats, Floats]:
    """Distinct absolute lags [m] of a line, and the sums over its pairs at each, shape (S, lags).

    steered [rad/m]: wavenumber times the direction cosine of the steering, shape (S,). On a line that is
    steered throughout all pairs at one lag have the same phase.
    """
    if len(line.factors) == 1 and line.factors[0].steered:
        lags = line.factors[0].pitch_m * np.arange(float(len(line.positions)))
        return lags, _autocorrelation(line.factors[0].amplitudes) * np.cos(steered[:, None] * lags)
    lags, pairs = _sum_over(np.abs(_differences(line)), np.ones((len(line.positions),) * 2, bool))
    return lags, _correlation(weights).real @ pairs


@lru_cache(maxsize=64)
def _autocorrelation(amplitudes: tuple[float, ...]) -> Floats:
    """Sums of products of amplitudes at each lag, both signs of it together."""
    sums = np.correlate(amplitudes, amplitudes, "full")[len(amplitudes) - 1 :]
    sums[1:] *= 2
    return sums


def _differences(line: Line) -> Floats:
    return line.positions[:, None] - line.positions


def _sum_over(lags: Floats, mask: NDArray[np.bool_]) -> tuple[Floats, Floats]:
    """Distinct lags [m] and the matrix, shape (pairs, lags), that sums the pairs of the mask over them."""
    lags = lags.ravel()
    scale = max(float(np.abs(lags).max()), 1e-300)
    _, first, which = np.unique(np.round(lags / scale, 9), return_index=True, return_inverse=True)
    return lags[first], np.eye(len(first))[which.ravel()] * mask.ravel()[:, None]
