"""Passive intermodulation: relative and absolute level, dependence on the carrier power."""

from __future__ import annotations

from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, floats

THIRD_ORDER_SLOPE = 3.0
"""Textbook slope [dB/dB] of the third-order product; measured ones follow 2.2 to 3 (common practice)."""


def level_dbm(relative_dbc: ArrayLike, carrier_dbm: ArrayLike) -> Floats:
    """Absolute level of a product stated relative to one carrier.

    relative_dbc [dBc]: level relative to one carrier, negative.
    carrier_dbm [dBm]: power of each of the two test carriers.
    Returns [dBm]: relative level plus carrier level.
    Source: IEC 62037-1, statement of passive intermodulation; -150 dBc at 2 x 43 dBm is -107 dBm.

    >>> float(level_dbm(-150, 43))
    -107.0
    """
    return floats(relative_dbc) + floats(carrier_dbm)


def relative_dbc(level_dbm: ArrayLike, carrier_dbm: ArrayLike) -> Floats:
    """Level of a product relative to one carrier.

    level_dbm [dBm]: absolute level of the product.
    carrier_dbm [dBm]: power of each of the two test carriers.
    Returns [dBc]: level minus carrier level.
    Source: IEC 62037-1, statement of passive intermodulation.

    >>> float(relative_dbc(-110, 43))
    -153.0
    """
    return floats(level_dbm) - floats(carrier_dbm)


def at_carrier_dbm(
    level_dbm: ArrayLike,
    from_carrier_dbm: ArrayLike,
    to_carrier_dbm: ArrayLike,
    slope: ArrayLike = THIRD_ORDER_SLOPE,
) -> Floats:
    """Absolute level of a product at another carrier power.

    level_dbm [dBm]: level at the stated carrier power.
    from_carrier_dbm [dBm]: stated power of each carrier.
    to_carrier_dbm [dBm]: wanted power of each carrier.
    slope [dB/dB]: growth of the product per dB of carrier; 3 ideal third order, 2.2-3 measured.
    Returns [dBm]: level + slope (to - from).
    Source: power-series model of a weak non-linearity, third order.

    >>> float(at_carrier_dbm(-107, 43, 37))
    -125.0
    """
    return floats(level_dbm) + floats(slope) * (floats(to_carrier_dbm) - floats(from_carrier_dbm))


def at_carrier_dbc(
    relative_dbc: ArrayLike,
    from_carrier_dbm: ArrayLike,
    to_carrier_dbm: ArrayLike,
    slope: ArrayLike = THIRD_ORDER_SLOPE,
) -> Floats:
    """Relative level of a product at another carrier power.

    relative_dbc [dBc]: level at the stated carrier power.
    from_carrier_dbm [dBm]: stated power of each carrier.
    to_carrier_dbm [dBm]: wanted power of each carrier.
    slope [dB/dB]: growth of the absolute product per dB of carrier.
    Returns [dBc]: level + (slope - 1)(to - from).
    Source: power-series model; from 43 to 37 dBm a slope of 3 flatters the figure by 12 dB, 2.5 by 9 dB.

    >>> float(at_carrier_dbc(-150, 43, 37)), float(at_carrier_dbc(-150, 43, 37, slope=2.5))
    (-162.0, -159.0)
    """
    return floats(relative_dbc) + (floats(slope) - 1) * (floats(to_carrier_dbm) - floats(from_carrier_dbm))
