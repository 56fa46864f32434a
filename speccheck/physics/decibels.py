"""Decibels, powers of ten and the wavelength."""

from __future__ import annotations

from typing import TypeAlias

import numpy as np
from numpy.typing import ArrayLike, NDArray

Floats: TypeAlias = NDArray[np.float64]

SPEED_OF_LIGHT_MPS = 299_792_458.0
"""Speed of light in vacuum [m/s], exact (BIPM SI Brochure, 9th edition)."""


def floats(values: ArrayLike) -> Floats:
    """Any numbers as a float array.

    values [any]: numbers, any shape.
    Returns [as given]: the same numbers as float64.
    Source: conversion only.
    """
    return np.asarray(values, dtype=np.float64)


def db(ratio: ArrayLike) -> Floats:
    """Power ratio in decibels.

    ratio [1]: power ratio, any shape; zero gives minus infinity, a negative one nan.
    Returns [dB]: 10 log10(ratio).
    Source: ISO 80000-3, level of a power quantity.

    >>> float(db(2).round(4))
    3.0103
    """
    with np.errstate(divide="ignore", invalid="ignore"):
        return 10 * np.log10(floats(ratio))


def ratio(level_db: ArrayLike) -> Floats:
    """Power ratio of a level in decibels.

    level_db [dB]: level, any shape.
    Returns [1]: 10^(level/10).
    Source: ISO 80000-3, level of a power quantity.

    >>> float(ratio(30))
    1000.0
    """
    return np.power(10.0, floats(level_db) / 10)


def wavelength_m(freq_hz: ArrayLike) -> Floats:
    """Wavelength in free space.

    freq_hz [Hz]: frequency, any shape.
    Returns [m]: c/f.
    Source: definition; 3.5 GHz is 85.65 mm.

    >>> float(wavelength_m(3.5e9).round(5))
    0.08565
    """
    return SPEED_OF_LIGHT_MPS / floats(freq_hz)
