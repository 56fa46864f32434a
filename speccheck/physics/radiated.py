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
from speccheck.physics.layout import Complex, Line, lines


def radiated_power(states: Excitation) -> Floats:
    """Mean of the radiation intensity over the sphere.

    states [Excitation]: the states.
    Returns [1]: (1/4 pi) integral of the intensity, shape (S,).
    Source: quadratic form of the far field over a lossless array, C. A. Balanis, "Antenna Theory", ch. 6.
    """
    if states.row_shifts_m is not None:
        return _staggered_power(states, states.row_shifts_m)
    rows, columns = lines(states.layout)
    (y_lags, y_pairs), (z_lags, z_pairs) = _folded(columns), _folded(rows)
    kernel = _kernels(states, y_lags, z_lags)
    over_y = _correlation(states.columns).real @ y_pairs
    over_z = _correlation(states.rows).real @ z_pairs
    return np.asarray(((over_y[:, None] @ kernel)[:, 0] * over_z).sum(1))


def _staggered_power(states: Excitation, shifts: Floats) -> Floats:
    """Pairs of rows with equal shift, and twice the real part of the pairs shifted against unshifted rows."""
    rows, columns = lines(states.layout)
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


def _folded(line: Line) -> tuple[Floats, Floats]:
    """Distinct absolute lags [m] of a line and the matrix that sums pairs over them."""
    count = len(line.positions)
    if line.pitch_m or count == 1:
        return np.arange(float(count)) * line.pitch_m, _uniform_pairs(count)
    return _sum_over(np.abs(_differences(line)), np.ones((count, count), bool))


@lru_cache(maxsize=64)
def _uniform_pairs(count: int) -> Floats:
    steps = np.abs(np.subtract.outer(np.arange(count), np.arange(count))).ravel()
    return np.eye(count)[steps]


def _differences(line: Line) -> Floats:
    return line.positions[:, None] - line.positions


def _sum_over(lags: Floats, mask: NDArray[np.bool_]) -> tuple[Floats, Floats]:
    """Distinct lags [m] and the matrix, shape (pairs, lags), that sums the pairs of the mask over them."""
    lags = lags.ravel()
    scale = max(float(np.abs(lags).max()), 1e-300)
    _, first, which = np.unique(np.round(lags / scale, 9), return_index=True, return_inverse=True)
    return lags[first], np.eye(len(first))[which.ravel()] * mask.ravel()[:, None]
