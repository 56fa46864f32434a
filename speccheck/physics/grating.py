"""The grating-lobe rule: when the lobe of a lattice reaches the panel plane, and where it stands."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS, Floats, floats

SIDE_PER_SQUARE_PITCH = 2 / 3**0.5
"""Side of an equilateral lattice over the square pitch with the same nearest lobe [1] (Hansen, ch. 2)."""


def pitch_limit_wl(scan_deg: ArrayLike, count: ArrayLike = np.inf) -> Floats:
    """Largest element pitch without a grating-lobe peak in visible space.

    Holds for the ELEMENT pitch in the plane of the scan; a sub-array pitch may exceed it (compute the lobe).
    scan_deg [deg]: largest scan or tilt from the panel normal, either sign.
    count [1]: elements in that line; when given, the stricter limit that also keeps the flank out.
    Returns [wavelengths]: (1 - 1/N)/(1 + |sin scan|).
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1; 60 deg gives 0.5359, with N = 10 0.482.

    >>> float(pitch_limit_wl(60).round(4)), float(pitch_limit_wl(60, 10).round(3))
    (0.5359, 0.482)
    """
    limit: Floats = (1 - 1 / floats(count)) / (1 + np.abs(np.sin(np.radians(floats(scan_deg)))))
    return limit


def entry_angle_deg(pitch_wl: ArrayLike) -> Floats:
    """Scan angle at which the first grating lobe enters visible space.

    pitch_wl [wavelengths]: element pitch in the plane of the scan.
    Returns [deg]: asin(1/d - 1); 90 where none enters (d at most 0.5), 0 where one always stands (d >= 1).
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1, solved for the angle; 0.6: 41.8 deg.

    >>> entry_angle_deg([0.5, 0.6, 1.1]).round(1).tolist()
    [90.0, 41.8, 0.0]
    """
    return np.degrees(np.arcsin(np.clip(1 / floats(pitch_wl) - 1, 0, 1)))


def entry_freq_hz(pitch_m: ArrayLike, scan_deg: ArrayLike) -> Floats:
    """Frequency above which the first grating lobe is visible at a scan angle.

    pitch_m [m]: element pitch in the plane of the scan.
    scan_deg [deg]: scan or tilt from the panel normal.
    Returns [Hz]: c/(d (1 + |sin scan|)).
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1, solved for the frequency.

    >>> float((entry_freq_hz(0.0428, 60) / 1e9).round(3))
    3.754
    """
    return SPEED_OF_LIGHT_MPS * pitch_limit_wl(scan_deg) / floats(pitch_m)


def lattice_entry_freq_hz(lobes_per_m: ArrayLike, beams: ArrayLike) -> float:
    """Frequency above which some grating lobe of a lattice is visible for some beam of a steering range.

    lobes_per_m [1/m]: points of the reciprocal lattice around the beam, over the wavelength, shape (K, 2).
    beams [1]: direction cosines of the beams, inside visible space, shape (N, 2).
    Returns [Hz]: least c/s over lobes g and beams b, with s the larger root of |b + s g| = 1.
    Source: reciprocal lattice, R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1; a lobe stands on the
    rim of visible space where its distance from the panel normal in direction cosines is 1. An equilateral
    lattice of 0.1 m sides, not steered, keeps lobes out up to 1.1547 wavelengths (Hansen, ch. 2).

    >>> up = 10 / 3**0.5
    >>> points = [[10, up], [10, -up], [-10, up], [-10, -up], [0, 2 * up], [0, -2 * up]]
    >>> round(lattice_entry_freq_hz(points, [[0, 0]]) / SPEED_OF_LIGHT_MPS * 0.1, 4)
    1.1547
    """
    lobes, beam = floats(lobes_per_m)[:, None], floats(beams)[None]
    square, along = (lobes**2).sum(-1), (lobes * beam).sum(-1)
    room = np.clip(1 - (beam**2).sum(-1), 0, None)
    steps = (np.sqrt(along**2 + square * room) - along) / square
    return float(SPEED_OF_LIGHT_MPS / steps.max())


def lobe_angle_deg(pitch_wl: ArrayLike, scan_deg: ArrayLike, order: ArrayLike = -1) -> Floats:
    """Direction of a grating lobe in the plane of the scan.

    pitch_wl [wavelengths]: element pitch in that plane.
    scan_deg [deg]: scan from the panel normal.
    order [1]: order of the lobe, non-zero; -1 is the first to enter for a positive scan.
    Returns [deg]: asin(sin scan + order/d), nan where it is not visible.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1; 1.1 wavelengths untilted: 65.38 deg.

    >>> float(lobe_angle_deg(1.1, 0, 1).round(2))
    65.38
    """
    sine = np.sin(np.radians(floats(scan_deg))) + floats(order) / floats(pitch_wl)
    return np.degrees(np.arcsin(np.where(np.abs(sine) <= 1, sine, np.nan)))


def triangular_side_limit_wl(scan_deg: ArrayLike) -> Floats:
    """Largest side of an equilateral triangular lattice without a grating-lobe peak, any scan plane.

    scan_deg [deg]: largest scan from the panel normal.
    Returns [wavelengths]: (2/sqrt 3)/(1 + |sin scan|).
    Source: R. C. Hansen, "Phased Array Antennas", ch. 2; broadside 1.1547.

    >>> float(triangular_side_limit_wl(0).round(4))
    1.1547
    """
    return pitch_limit_wl(scan_deg) * SIDE_PER_SQUARE_PITCH
