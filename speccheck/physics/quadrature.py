"""Quadrature and series behind the kernels of elements."""

from __future__ import annotations

from functools import lru_cache

import numpy as np

from speccheck.physics.decibels import Floats


@lru_cache(maxsize=64)
def legendre(order: int) -> tuple[Floats, Floats]:
    """Gauss-Legendre quadrature.

    order [1]: nodes.
    Returns [1, 1]: nodes over -1..1 and weights, shape (order,) each.
    Source: definition.
    """
    nodes, weights = np.polynomial.legendre.leggauss(order)
    return nodes, weights


def legendre_order(phase_rad: float) -> int:
    """Quadrature order for a phase that swings by this much either side of the middle of the span.

    Half of it resolves the swing; the rest covers the pattern and the edge of the swing (1e-7 and better).
    phase_rad [rad]: swing.
    Returns [1]: nodes, an even number.
    Source: convergence of Gauss quadrature of exp(jx) (own margin).
    """
    return 2 * int(np.ceil((phase_rad / 2 + 6 + np.cbrt(phase_rad)) / 2)) + 2 * (phase_rad < 1)


def cosine_sums(angles: Floats, lags: Floats, weights: Floats) -> Floats:
    """Sums over the last axis of weights times cos(lag angle).

    By recurrence where the lags are whole multiples of one step: cos(n + 1)x = 2 cos x cos nx - cos(n - 1)x.
    angles [rad/m]: shape (F, T, P).
    lags [m]: shape (L,).
    weights [1]: shape (T, P).
    Returns [1]: shape (F, L, T).
    Source: definition.
    """
    ones = np.ones(angles.shape[-1])
    out = np.empty((len(lags), *angles.shape[:2]))
    steps = lags[1:] - lags[:-1]
    if len(lags) < 3 or abs(lags[0]) > 1e-12 or steps.max() - steps.min() > 1e-9 * steps[0]:
        for n, lag in enumerate(lags):
            out[n] = (weights * np.cos(lag * angles)) @ ones
        return out.transpose(1, 0, 2)
    twice = np.cos(steps[0] * angles)
    before, last = weights, weights * twice
    twice += twice
    out[0], out[1] = before @ ones, last @ ones
    for n in range(2, len(lags)):
        following = twice * last
        following -= before
        before, last = last, following
        out[n] = last @ ones
    return out.transpose(1, 0, 2)


def even_nodes(span: float) -> Floats:
    """Where an even function is sampled for its Chebyshev series: the positive half of the nodes.

    span [1]: the series holds from -span to span.
    Returns [1]: nodes, enough for a cosine transform of the unit interval (1e-7 and better).
    Source: the coefficients of cos(span x) are Bessel functions of span and fall off beyond that order.
    """
    count = int(np.ceil(span / 2 + 4 + np.cbrt(span)))
    return np.asarray(span * np.cos(np.pi / (2 * count) * (np.arange(count) + 0.5)))


def even_coefficients(count: int) -> Floats:
    """Matrix from samples at `even_nodes` to the coefficients of the Chebyshev series.

    count [1]: nodes.
    Returns [1]: shape (count, count).
    Source: discrete orthogonality of the Chebyshev polynomials.
    """
    matrix = np.cos(np.pi / count * np.outer(np.arange(count), np.arange(count) + 0.5)) * (2 / count)
    matrix[0] /= 2
    return matrix


def even_polynomials(argument: Floats, count: int) -> Floats:
    """Chebyshev polynomials of even order.

    argument [1]: -1..1, any shape.
    count [1]: polynomials.
    Returns [1]: T_0, T_2, T_4 ... along a last axis of that length.
    Source: T_n(cos x) = cos nx.
    """
    turn = np.arccos(argument)[..., None] * np.arange(0.0, 2 * count, 2)
    return np.asarray(np.cos(turn, out=turn))
