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
from speccheck.physics.layout import ArrayLayout, Complex, lines


def radiated_power(states: Excitation) -> Floats:
    """Mean of the radiation intensity over the sphere.

    states [Excitation]: the states.
    Returns [1]: (1/4 pi) integral of the intensity, shape (S,).
    Source: quadratic form of the far field over a lossless array, C. A. Balanis, "Antenna Theory", ch. 6.
    """
    wavenumbers, which = _distinct(states.wavenumbers)
    rows, columns, shifts = lines(states.layout)
    if not shifts.any():
        y_lags, y_pairs = _folded(states.layout, 1)
        z_lags, z_pairs = _folded(states.layout, 0)
        kernel = _kernel(states.element, tuple(wavenumbers), tuple(y_lags), tuple(z_lags))
        over_y = _correlation(states.columns).real @ y_pairs
        over_z = _correlation(states.rows).real @ z_pairs
        return np.asarray(((over_y[:, None, :] @ kernel[which])[:, 0] * over_z).sum(1))
    same = shifts[:, None] == shifts
    from_shifted = (shifts[:, None] > 0) & (shifts == 0)
    total = np.zeros(len(states.wavenumbers))
    for mask, shift, weight in ((same, 0.0, 1.0), (from_shifted, float(shifts.max()), 2.0)):
        y_lags, y_pairs = _signed(columns.positions, np.ones((len(columns.positions),) * 2, bool))
        z_lags, z_pairs = _signed(rows.positions, mask)
        kernel = _kernel(
            states.element, tuple(wavenumbers), tuple(np.abs(y_lags + shift)), tuple(np.abs(z_lags))
        )
        seen = (_correlation(states.columns) @ y_pairs)[:, None, :] @ kernel[which]
        total += weight * (seen[:, 0] * (_correlation(states.rows) @ z_pairs)).sum(1).real
    return total


def _distinct(wavenumbers: Floats) -> tuple[Floats, NDArray[np.intp]]:
    values, which = np.unique(wavenumbers, return_inverse=True)
    return values, which


def _correlation(weights: Complex) -> Complex:
    """Products w_i w_j* of all pairs, shape (S, M M)."""
    pairs = weights[:, :, None] * weights.conj()[:, None, :]
    return pairs.reshape(len(weights), -1)


@lru_cache(maxsize=512)
def _kernel(
    element: Element, wavenumbers: tuple[float, ...], y_m: tuple[float, ...], z_m: tuple[float, ...]
) -> Floats:
    return element.kernel(np.array(wavenumbers), np.array(y_m), np.array(z_m))


@lru_cache(maxsize=512)
def _folded(layout: ArrayLayout, axis: int) -> tuple[Floats, Floats]:
    """Distinct absolute lags [m] of a line and the matrix that sums pairs over them."""
    rows, columns, _ = lines(layout)
    positions = (rows, columns)[axis].positions
    return _sum_over(np.abs(positions[:, None] - positions).ravel(), np.ones(len(positions) ** 2, bool))


def _signed(positions: Floats, mask: NDArray[np.bool_]) -> tuple[Floats, Floats]:
    """Distinct signed lags [m] among the pairs of a mask and the matrix that sums those pairs over them."""
    return _sum_over((positions[:, None] - positions).ravel(), mask.ravel())


def _sum_over(lags: Floats, mask: NDArray[np.bool_]) -> tuple[Floats, Floats]:
    scale = max(float(np.abs(lags).max()), 1e-300)
    values, first, which = np.unique(np.round(lags / scale, 9), return_index=True, return_inverse=True)
    matrix = np.zeros((len(lags), len(values)))
    matrix[np.arange(len(lags)), which.ravel()] = mask
    return lags[first], matrix
