"""Relations between widths of a beam at different levels and the line that makes them."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, floats, wavelength_m

_HALF_POWER_ARGUMENT = 1.39156
"""Argument [rad] at which (sin x/x)^2 is one half (Balanis, ch. 6, prints 1.391)."""


def uniform_line_deg(count: ArrayLike, pitch_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Half-power width of a uniform broadside line, long-line formula.

    count [1]: elements, eight or more for one per cent.
    pitch_m [m]: pitch.
    freq_hz [Hz]: frequency.
    Returns [deg]: 2 (90 - acos(1.3916 lambda/(pi N d))).
    Source: C. A. Balanis, "Antenna Theory", ch. 6; 10 at half a wavelength: 10.17 deg (exact 10.21).

    >>> float(uniform_line_deg(10, 0.5, 299792458.0).round(1))
    10.2
    """
    sine = _HALF_POWER_ARGUMENT * wavelength_m(freq_hz) / (np.pi * floats(count) * floats(pitch_m))
    return 2 * np.degrees(np.arcsin(np.minimum(sine, 1.0)))


def first_null_width_deg(count: ArrayLike, pitch_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Width between the first nulls of a uniform broadside line.

    count [1]: elements.
    pitch_m [m]: pitch.
    freq_hz [Hz]: frequency.
    Returns [deg]: 2 (90 - acos(lambda/(N d))); 180 where the line is too short for a null.
    Source: C. A. Balanis, "Antenna Theory", ch. 6; 10 at a quarter wavelength: 47.16 deg.

    >>> float(first_null_width_deg(10, 0.25, 299792458.0).round(2))
    47.16
    """
    sine = wavelength_m(freq_hz) / (floats(count) * floats(pitch_m))
    return 2 * np.degrees(np.arcsin(np.minimum(sine, 1.0)))


def parabolic_level_width_deg(hpbw_deg: ArrayLike, level_db: ArrayLike) -> Floats:
    """Width at a level of a beam that is a parabola in dB (element and broad azimuth beams).

    hpbw_deg [deg]: half-power width.
    level_db [dB]: level below the beam, positive.
    Returns [deg]: width sqrt(level/3).
    Source: the form of 3GPP TR 38.901 Table 7.3-1; 65 deg is 118.7 deg wide at -10 dB.

    >>> float(parabolic_level_width_deg(65, 10).round(1))
    118.7
    """
    return floats(hpbw_deg) * np.sqrt(floats(level_db) / 3)


def uniform_level_ratio(level_db: float) -> float:
    """Width at a level over the half-power width, for a narrow beam of a uniform line.

    level_db [dB]: level below the beam, positive, down to the first null.
    Returns [1]: ratio of the widths.
    Source: (sin x/x)^2 solved at both levels; 10 dB: 1.67.

    >>> round(uniform_level_ratio(10), 2)
    1.67
    """
    low, high = 1e-6, np.pi
    wanted = 10 ** (-level_db / 10)
    for _ in range(60):
        middle = (low + high) / 2
        low, high = (middle, high) if (np.sin(middle) / middle) ** 2 > wanted else (low, middle)
    return float(low / _HALF_POWER_ARGUMENT)


def scanned_width_deg(hpbw_deg: ArrayLike, scan_deg: ArrayLike) -> Floats:
    """Half-power width of a beam steered away from the panel normal, long arrays.

    hpbw_deg [deg]: width unsteered.
    scan_deg [deg]: scan from the normal, up to about 60.
    Returns [deg]: width/cos(scan).
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1; 60 deg doubles the width.

    >>> float(scanned_width_deg(2.5, 60).round(2))
    5.0
    """
    return floats(hpbw_deg) / np.cos(np.radians(floats(scan_deg)))


def phase_step_deg(pitch_wl: ArrayLike, steer_deg: ArrayLike) -> Floats:
    """Phase step between neighbours that steers a line.

    pitch_wl [wavelengths]: pitch.
    steer_deg [deg]: tilt or scan from the normal.
    Returns [deg]: 360 d sin(steer).
    Source: definition; half a wavelength and 30 deg: 90 deg (common practice).

    >>> float(phase_step_deg(0.5, 30).round(6))
    90.0
    """
    return 360 * floats(pitch_wl) * np.sin(np.radians(floats(steer_deg)))
