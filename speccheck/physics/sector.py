"""Reference patterns of sector antennas, Recommendation ITU-R F.1336-5."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats


@dataclass(frozen=True, slots=True)
class SectorParameters:
    """Side-lobe parameters of F.1336-5.

    k_level [1]: k_p or k_a, level of the back. k_h [1]: azimuth. k_v [1]: elevation.
    """

    k_level: float
    k_h: float
    k_v: float


TYPICAL = SectorParameters(0.7, 0.8, 0.7)
"""Typical antenna (F.1336-5 recommends 3.1)."""
IMPROVED = SectorParameters(0.7, 0.7, 0.3)
"""Improved side-lobe performance, used for IMT (F.1336-5 recommends 3.1; ITU-R M.2292)."""
WIDEST_AZ_DEG = 120.0
"""Azimuth width [deg] up to which the beamwidth-gain relation holds."""


def elevation_beamwidth_deg(gain_dbi: ArrayLike, az_hpbw_deg: ArrayLike) -> Floats:
    """Elevation half-power width of a sector antenna from its gain and azimuth width.

    gain_dbi [dBi]: gain.
    az_hpbw_deg [deg]: azimuth half-power width, up to about 120.
    Returns [deg]: 31000 10^(-0.1 G)/phi_3; nan above 120 deg, where the relation does not hold.
    Source: ITU-R F.1336-5 recommends 3.3; 18 dBi and 65 deg give 7.56 deg.

    >>> elevation_beamwidth_deg([15, 18], 65).round(2).tolist()
    [15.08, 7.56]
    """
    azimuth = floats(az_hpbw_deg)
    width = 31_000 * np.power(10.0, -floats(gain_dbi) / 10) / azimuth
    return floats(np.where(azimuth <= WIDEST_AZ_DEG, width, np.nan)[()])


def peak_pattern_dbi(
    gain_dbi: float,
    az_hpbw_deg: float,
    el_hpbw_deg: float,
    azimuth_deg: ArrayLike,
    elevation_deg: ArrayLike,
    *,
    parameters: SectorParameters = IMPROVED,
) -> Floats:
    """Peak side-lobe pattern, 400 MHz to about 6 GHz.

    Of two public copies that print the constant C differently, the form used here is the one that meets the
    back level continuously at 90 deg. C is singular at an elevation width of 22.5 deg.
    gain_dbi [dBi]: gain.
    az_hpbw_deg [deg]: azimuth half-power width.
    el_hpbw_deg [deg]: elevation half-power width.
    azimuth_deg [deg]: azimuth from boresight, -180..180.
    elevation_deg [deg]: elevation from the beam, -90..90.
    parameters [SectorParameters]: side-lobe parameters.
    Returns [dBi]: envelope of the peaks.
    Source: ITU-R F.1336-5 recommends 3.1.1; 18 dBi, 65 x 7.56 deg, azimuth 60 deg: 9.06 dBi.

    >>> peak_pattern_dbi(18, 65, 7.56, [0, 32.5, 60, 180], 0).round(2).tolist()
    [18.0, 15.0, 9.06, -6.46]
    """
    k = parameters
    shape = _Shape(el_hpbw_deg, k, -12.0, float(np.sqrt(1 - 0.36 * k.k_v)), 0.0)
    return _sector(gain_dbi, az_hpbw_deg, (azimuth_deg, elevation_deg), shape)


def average_pattern_dbi(
    gain_dbi: float,
    az_hpbw_deg: float,
    el_hpbw_deg: float,
    azimuth_deg: ArrayLike,
    elevation_deg: ArrayLike,
    *,
    parameters: SectorParameters = IMPROVED,
) -> Floats:
    """Average side-lobe pattern, 400 MHz to about 6 GHz.

    gain_dbi [dBi]: gain.
    az_hpbw_deg [deg]: azimuth half-power width.
    el_hpbw_deg [deg]: elevation half-power width.
    azimuth_deg [deg]: azimuth from boresight, -180..180.
    elevation_deg [deg]: elevation from the beam, -90..90.
    parameters [SectorParameters]: side-lobe parameters.
    Returns [dBi]: mean level; behind, 3 dB below the peak pattern.
    Source: ITU-R F.1336-5 recommends 3.1.2.

    >>> average_pattern_dbi(18, 65, 7.56, [0, 32.5, 180], 0).round(2).tolist()
    [18.0, 15.0, -9.46]
    """
    k = parameters
    shape = _Shape(el_hpbw_deg, k, -15.0, float(np.sqrt(1.33 - 0.33 * k.k_v)), 3.0)
    return _sector(gain_dbi, az_hpbw_deg, (azimuth_deg, elevation_deg), shape)


def tilted_mechanically(
    azimuth_deg: ArrayLike, elevation_deg: ArrayLike, tilt_deg: ArrayLike
) -> tuple[Floats, Floats]:
    """Direction seen from a mechanically tilted antenna.

    azimuth_deg [deg]: azimuth in the horizontal frame.
    elevation_deg [deg]: elevation in the horizontal frame.
    tilt_deg [deg]: mechanical tilt, positive downwards.
    Returns [deg, deg]: azimuth and elevation in the frame of the antenna.
    Source: ITU-R F.1336-5 recommends 3.4; behind the antenna the beam is lifted.

    >>> [float(angle.round(2)) for angle in tilted_mechanically(0, -6, 6)]
    [0.0, 0.0]
    """
    phi, theta, beta = (np.radians(floats(a)) for a in (azimuth_deg, elevation_deg, tilt_deg))
    up = np.sin(theta) * np.cos(beta) + np.cos(theta) * np.cos(phi) * np.sin(beta)
    ahead = -np.sin(theta) * np.sin(beta) + np.cos(theta) * np.cos(phi) * np.cos(beta)
    aside = np.cos(theta) * np.sin(phi)
    return np.degrees(np.arctan2(aside, ahead)), np.degrees(np.arcsin(np.clip(up, -1, 1)))


@dataclass(frozen=True, slots=True)
class _Shape:
    """Figures that tell the peak from the average pattern: elevation width, parameters, middle level [dB],
    break point, extra loss [dB] of the far part."""

    el_hpbw_deg: float
    k: SectorParameters
    middle_db: float
    break_at: float
    far_loss_db: float

    @property
    def back_db(self) -> float:
        level = self.middle_db + float(db(1 + 8 * self.k.k_level))
        return level - 15 * float(np.log10(180 / self.el_hpbw_deg))


def _sector(
    gain_dbi: float, az_hpbw_deg: float, angles_deg: tuple[ArrayLike, ArrayLike], shape: _Shape
) -> Floats:
    azimuth, elevation = (np.abs(floats(angle)) for angle in angles_deg)
    across = _azimuth_cut(azimuth / az_hpbw_deg, shape)
    back = float(_azimuth_cut(floats(180 / az_hpbw_deg), shape))
    share = (across - back) / (0.0 - back)
    return gain_dbi + across + share * _elevation_cut(elevation / shape.el_hpbw_deg, shape)


def _azimuth_cut(x: Floats, shape: _Shape) -> Floats:
    k_h = shape.k.k_h
    join = 3 * (1 - 0.5**-k_h)
    far = -12 * np.power(np.maximum(x, 1e-9), 2 - k_h) - join
    return np.maximum(np.where(x <= 0.5, -12 * x**2, far), shape.back_db)


def _elevation_cut(x: Floats, shape: _Shape) -> Floats:
    k_v, k_level, width = shape.k.k_v, shape.k.k_level, shape.el_hpbw_deg
    at_four = 4**-1.5 + k_v
    ratio_to_back = (180 / width) ** 1.5 * at_four / (1 + 8 * k_level)
    c = float(db(ratio_to_back)) / float(np.log10(22.5 / width))
    join = 12 - c * float(np.log10(4)) - float(db(at_four))
    safe = np.maximum(x, 1e-9)
    middle = shape.middle_db + db(safe**-1.5 + k_v)
    far = -join - shape.far_loss_db - c * np.log10(safe)
    inner = np.where(x < shape.break_at, -12 * x**2, np.where(x < 4, middle, far))
    return floats(np.where(x >= 90 / width, shape.back_db, inner))
