"""Bounds on gain, beamwidth and side lobes, each with the domain in which it binds."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike, NDArray

from speccheck.physics.decibels import Floats, db, floats, wavelength_m
from speccheck.physics.taper import beamwidth_ratio, chebyshev

NARROW_APERTURE_WL = 0.95
"""Effective width [wavelengths] of an aperture that is narrower: elements collect from beyond their box.

A 65 deg column collects from 0.84 wavelengths, a 58 deg one from 0.95 (35000 deg^2 over both widths set
equal to 4 pi A). A panel of 1.3 m x 0.15 m at 800 MHz has 12.4 dBi by the plain formula, an honest 65 deg
column of that length 15.7 dBi."""
HARD_APERTURE_WL = 1.0
"""Both sides must exceed this [wavelengths] for the aperture bound to be hard."""
UNIFORM_LINE_DEG = 50.77
"""Half-power width [deg] of a uniform line one wavelength long: 0.886 rad (Balanis, ch. 12)."""


@dataclass(frozen=True, slots=True)
class BeamwidthConstant:
    """Constant [deg^2] of gain = constant/(azimuth x elevation width), with its domain and source."""

    value: float
    domain: str
    source: str


BEAMWIDTH_CONSTANTS = (
    BeamwidthConstant(41_253.0, "one smooth beam without side lobes; upper guide, never reached by a panel",
                      "4 pi steradian in square degrees"),
    BeamwidthConstant(35_000.0, "lossless directivity of a uniform column (8 at 0.8 wavelengths)",
                      "exact patterns (computed)"),
    BeamwidthConstant(32_400.0, "planar arrays with side lobes",
                      "C. A. Balanis, Antenna Theory, ch. 6 (planar arrays)"),
    BeamwidthConstant(31_000.0, "sector panels, azimuth beamwidth up to about 120 deg",
                      "ITU-R F.1336-5 recommends 3.3"),
)  # fmt: skip


def aperture_directivity_dbi(
    width_m: ArrayLike, height_m: ArrayLike, freq_hz: ArrayLike, least_side_wl: float = NARROW_APERTURE_WL
) -> Floats:
    """Directivity of a uniform aperture, a narrow side taken at its effective width.

    Hard only where both sides exceed about one wavelength; uniform arrays exceed it by up to 0.4 dB.
    width_m [m]: width of the aperture.
    height_m [m]: height of the aperture.
    freq_hz [Hz]: frequency.
    least_side_wl [wavelengths]: least effective side; 0 for the plain formula.
    Returns [dBi]: 10 log10(4 pi A/lambda^2).
    Source: C. A. Balanis, "Antenna Theory", ch. 12; 0.42 m x 0.72 m at 3.5 GHz: 27.14 dBi.

    >>> float(aperture_directivity_dbi(0.42, 0.72, 3.5e9).round(2))
    27.14
    >>> float(aperture_directivity_dbi(0.15, 1.3, 800e6, least_side_wl=0).round(1))
    12.4
    """
    wavelength = wavelength_m(freq_hz)
    sides = (np.maximum(floats(side) / wavelength, least_side_wl) for side in (width_m, height_m))
    return db(4 * np.pi * next(sides) * next(sides))


def aperture_is_hard(width_m: ArrayLike, height_m: ArrayLike, freq_hz: ArrayLike) -> NDArray[np.bool_]:
    """Whether the aperture bound may be used as a hard one.

    width_m [m]: width of the aperture.
    height_m [m]: height of the aperture.
    freq_hz [Hz]: frequency.
    Returns [bool]: both sides exceed one wavelength.
    Source: common practice; small apertures collect from beyond their edge.

    >>> bool(aperture_is_hard(0.15, 1.3, 800e6))
    False
    """
    least_m = HARD_APERTURE_WL * wavelength_m(freq_hz)
    return np.asarray(np.minimum(floats(width_m), floats(height_m)) > least_m)


def narrowest_beamwidth_deg(length_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Half-power width of a uniformly driven line of a given length, the narrowest ordinary beam.

    Tapers widen it; a claim more than 5 % narrower does not fit the length (superdirective lines aside).
    length_m [m]: radiating length.
    freq_hz [Hz]: frequency.
    Returns [deg]: 50.77 lambda/L in the sine, turned into an angle.
    Source: C. A. Balanis, "Antenna Theory", ch. 12 (uniform line source); 7.3 wavelengths: 7 deg.

    >>> float(narrowest_beamwidth_deg(7.3 * 299792458 / 1.9e9, 1.9e9).round(1))
    7.0
    """
    half_sine = np.radians(UNIFORM_LINE_DEG) * wavelength_m(freq_hz) / floats(length_m) / 2
    half_deg: Floats = np.degrees(np.arcsin(np.minimum(half_sine, 1.0)))
    return 2 * half_deg


def shortest_length_m(el_hpbw_deg: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Length of line that a half-power width needs at least.

    el_hpbw_deg [deg]: claimed half-power width in the plane of the line.
    freq_hz [Hz]: frequency.
    Returns [m]: length of the uniform line of that width.
    Source: C. A. Balanis, "Antenna Theory", ch. 12, solved for the length; 7 deg at 1.9 GHz: 1.15 m.

    >>> float(shortest_length_m(7, 1.9e9).round(2))
    1.15
    """
    length_wl: Floats = np.radians(UNIFORM_LINE_DEG) / (2 * np.sin(np.radians(floats(el_hpbw_deg)) / 2))
    return length_wl * wavelength_m(freq_hz)


def chebyshev_beamwidth_ratio(count: int, sidelobe_db: float) -> float:
    """Least widening of the beam for a side-lobe level, over uniform weights.

    Exact for the N elements; the closed broadening factor of the textbooks is too small for short lines
    (1.079 printed against 1.21 exact for 10 elements at 26 dB).
    count [1]: elements or ports of the line, two or more.
    sidelobe_db [dB]: side-lobe suppression, positive.
    Returns [1]: half-power width over that of uniform weights; 1 where uniform weights suffice.
    Source: Dolph-Chebyshev optimum; 8 elements at 18, 20, 25, 30 dB: 1.071, 1.112, 1.203, 1.284.

    >>> [round(chebyshev_beamwidth_ratio(16, level), 2) for level in (18, 20)]
    [1.02, 1.07]
    """
    return max(1.0, beamwidth_ratio(chebyshev(count, sidelobe_db)))


def chebyshev_sidelobe_db(count: int, ratio: float) -> float:
    """Best side-lobe suppression that a beam widened by a ratio can have.

    count [1]: elements or ports of the line, three or more.
    ratio [1]: half-power width over that of uniform weights.
    Returns [dB]: suppression, positive, searched from 10 to 60 dB.
    Source: Dolph-Chebyshev optimum, inverted by bisection.

    >>> round(chebyshev_sidelobe_db(10, 1.277))
    30
    """
    low, high = 10.0, 60.0
    for _ in range(30):
        middle = (low + high) / 2
        narrow_enough = beamwidth_ratio(chebyshev(count, middle)) <= ratio
        low, high = (middle, high) if narrow_enough else (low, middle)
    return low


def gain_from_beamwidths_dbi(
    az_hpbw_deg: ArrayLike, el_hpbw_deg: ArrayLike, constant: ArrayLike = 31_000.0
) -> Floats:
    """Gain of a beam of given half-power widths.

    az_hpbw_deg [deg]: azimuth width.
    el_hpbw_deg [deg]: elevation width.
    constant [deg^2]: see BEAMWIDTH_CONSTANTS for values and domains.
    Returns [dBi]: 10 log10(constant/(az el)).
    Source: ITU-R F.1336-5 recommends 3.3 (31000); 65 deg x 7 deg with 41253, 32400: 19.6, 18.5 dBi.

    >>> gain_from_beamwidths_dbi(65, 7, [41253, 32400]).round(1).tolist()
    [19.6, 18.5]
    """
    return db(floats(constant) / (floats(az_hpbw_deg) * floats(el_hpbw_deg)))


def implied_beamwidth_constant(gain_dbi: ArrayLike, az_hpbw_deg: ArrayLike, el_hpbw_deg: ArrayLike) -> Floats:
    """Constant that a gain and two widths imply; above 41253 the three cannot describe one beam.

    gain_dbi [dBi]: gain.
    az_hpbw_deg [deg]: azimuth half-power width.
    el_hpbw_deg [deg]: elevation half-power width.
    Returns [deg^2]: gain times both widths.
    Source: beam solid angle; 17.3 dBi with 120 deg x 8 deg would need 51600.

    >>> float(implied_beamwidth_constant(17.3, 120, 8).round(-2))
    51600.0
    """
    return np.power(10.0, floats(gain_dbi) / 10) * floats(az_hpbw_deg) * floats(el_hpbw_deg)


def normal_gain_dbi(radius_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Largest gain of an antenna of ordinary bandwidth inside a sphere.

    Binds small antennas; large panels stay far below it.
    radius_m [m]: radius of the smallest sphere around the antenna.
    freq_hz [Hz]: frequency.
    Returns [dBi]: 10 log10((ka)^2 + 2 ka).
    Source: R. F. Harrington, normal gain; ka = 10 gives 20.79 dBi.

    >>> float(normal_gain_dbi(10 / (2 * np.pi), 299792458.0).round(2))
    20.79
    """
    ka = 2 * np.pi * floats(radius_m) / wavelength_m(freq_hz)
    return db(ka**2 + 2 * ka)


def cosine_scan_loss_db(scan_deg: ArrayLike, exponent: ArrayLike = 1.0) -> Floats:
    """Scan loss of the projected aperture.

    Hard only against the aperture limit 4 pi A cos(scan)/lambda^2; against a panel's own boresight figure
    it is a guide (integrated directivity loses 2.0 to 3.1 dB at 60 deg).
    scan_deg [deg]: scan from the panel normal.
    exponent [1]: 1 projected area, 1.5 usual for hardware.
    Returns [dB]: -10 n log10(cos), positive.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1; 60 deg: 3.01, with 1.5: 4.52 dB.

    >>> cosine_scan_loss_db(60, [1, 1.5]).round(2).tolist()
    [3.01, 4.52]
    """
    return -floats(exponent) * db(np.cos(np.radians(floats(scan_deg))))


def aperture_slope_db(from_hz: ArrayLike, to_hz: ArrayLike) -> Floats:
    """Growth of gain over a band at constant aperture.

    from_hz [Hz]: lower frequency.
    to_hz [Hz]: upper frequency.
    Returns [dB]: 20 log10(f2/f1).
    Source: 4 pi A/lambda^2; 1710 to 2690 MHz: 3.9 dB.

    >>> float(aperture_slope_db(1710e6, 2690e6).round(1))
    3.9
    """
    return 2 * db(floats(to_hz) / floats(from_hz))


def cell_directivity_dbi(horizontal_pitch_wl: ArrayLike, vertical_pitch_wl: ArrayLike) -> Floats:
    """Directivity that the area of one lattice cell can give to one element of a large array.

    horizontal_pitch_wl [wavelengths]: horizontal pitch.
    vertical_pitch_wl [wavelengths]: vertical pitch.
    Returns [dBi]: 10 log10(4 pi d_H d_V).
    Source: aperture theorem; 0.5 x 0.5: 4.97, 0.5 x 0.7: 6.43 dBi.

    >>> cell_directivity_dbi(0.5, [0.5, 0.7]).round(2).tolist()
    [4.97, 6.43]
    """
    return db(4 * np.pi * floats(horizontal_pitch_wl) * floats(vertical_pitch_wl))
