"""Power density in front of a panel: spherical, aperture and cylindrical models and where each holds."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, floats, wavelength_m

REFLECTION_NONE = 1.0
"""Factor on power density [1]: free space."""
REFLECTION_GROUND = 2.56
"""Factor on power density [1]: field raised 1.6 times by ground (OET Bulletin 65, equations 7 and 8)."""
REFLECTION_FULL = 4.0
"""Factor on power density [1]: perfect reflection, field doubled (OET Bulletin 65, equation 6)."""


def power_density_wm2(eirp_w: ArrayLike, distance_m: ArrayLike, reflection: ArrayLike = 1.0) -> Floats:
    """Power density of the spherical model.

    eirp_w [W]: EIRP, all ports and polarisations, average.
    distance_m [m]: distance from the antenna.
    reflection [1]: factor on power density, 1, 2.56 or 4.
    Returns [W/m^2]: k EIRP/(4 pi r^2).
    Source: OET Bulletin 65, equations 3, 4, 6 and 7; ITU-T K.52. 1000 W at 10 m gives 0.7958 W/m^2.

    >>> float(power_density_wm2(1000, 10).round(4))
    0.7958
    """
    return floats(reflection) * floats(eirp_w) / (4 * np.pi * floats(distance_m) ** 2)


def distance_m(
    eirp_w: ArrayLike, limit_wm2: ArrayLike, reflection: ArrayLike = 1.0, factor: ArrayLike = 1.0
) -> Floats:
    """Distance at which the spherical model falls to a limit, along the strongest beam.

    eirp_w [W]: EIRP, all ports and polarisations, average while transmitting.
    limit_wm2 [W/m^2]: limit of the power density.
    reflection [1]: factor on power density, 1, 2.56 or 4.
    factor [1]: time factor: TDD duty times any enforced reduction, 0..1.
    Returns [m]: sqrt(k F EIRP/(4 pi S)).
    Source: OET Bulletin 65, equation 4, solved for the distance; 80 dBm and 10 W/m^2 give 28.21 m.

    >>> float(distance_m(1e5, 10).round(2)), float(distance_m(1e5, 10, reflection=2.56).round(2))
    (28.21, 45.14)
    """
    squared: Floats = floats(reflection) * floats(factor) * floats(eirp_w) / (4 * np.pi * floats(limit_wm2))
    return np.sqrt(squared)


def combined_distance_m(distances_m: ArrayLike, axis: int = -1) -> Floats:
    """Distance at which the ratios of several bands on one axis sum to one.

    distances_m [m]: distance of each band alone.
    axis [1]: axis of the bands.
    Returns [m]: sqrt(sum r_i^2).
    Source: ICNIRP 2020, simultaneous exposure: sum of S_i/S_lim,i at most 1, with S falling as 1/r^2.

    >>> float(combined_distance_m([5, 8]).round(2))
    9.43
    """
    squared: Floats = np.sum(floats(distances_m) ** 2, axis=axis)
    return np.sqrt(squared)


def exposure_ratio(densities_wm2: ArrayLike, limits_wm2: ArrayLike, axis: int = -1) -> Floats:
    """Sum of the exposure ratios of several sources at one point.

    densities_wm2 [W/m^2]: power density of each source.
    limits_wm2 [W/m^2]: limit at the frequency of each source.
    axis [1]: axis of the sources.
    Returns [1]: sum S_i/S_lim,i; above 1 the limits are exceeded together.
    Source: ICNIRP 2020, simultaneous exposure to multiple frequency fields.

    >>> float(exposure_ratio([2, 5], [4, 10]))
    1.0
    """
    total: Floats = np.sum(floats(densities_wm2) / floats(limits_wm2), axis=axis)
    return total


def round_up_m(distance_m: ArrayLike, step_m: float = 0.1) -> Floats:
    """Distance rounded up for print, never down.

    distance_m [m]: distance.
    step_m [m]: printed step.
    Returns [m]: next multiple of the step; a multiple stays (to one part in 10^9).
    Source: the cautious direction of rounding (common practice).

    >>> round_up_m([9.43, 9.5, 0.01]).round(1).tolist()
    [9.5, 9.5, 0.1]
    """
    steps = floats(distance_m) / step_m
    return np.ceil(steps * (1 - 1e-9)) * step_m


def field_strength_vm(power_density_wm2: ArrayLike) -> Floats:
    """Plane-wave field strength of a power density.

    power_density_wm2 [W/m^2]: power density.
    Returns [V/m]: sqrt(376.73 S).
    Source: impedance of free space 376.73 ohm; OET Bulletin 65 equation 1 rounds to 377.

    >>> float(field_strength_vm(0.795775).round(2))
    17.31
    """
    return np.sqrt(376.730313668 * floats(power_density_wm2))


def far_field_pattern_m(largest_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Start of the far field for pattern and EIRP figures.

    largest_m [m]: largest dimension of the antenna.
    freq_hz [Hz]: frequency.
    Returns [m]: 2 D^2/lambda.
    Source: IEEE Std 149; 1.0 m at 3.5 GHz gives 23.35 m.

    >>> float(far_field_pattern_m(1.0, 3.5e9).round(2))
    23.35
    """
    return 2 * floats(largest_m) ** 2 / wavelength_m(freq_hz)


def far_field_exposure_m(largest_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Start of the far field for exposure.

    largest_m [m]: largest dimension of the aperture.
    freq_hz [Hz]: frequency.
    Returns [m]: 0.6 D^2/lambda.
    Source: OET Bulletin 65, equation 16; FCC filing SES-MOD-20110214-00152: 1.5 m at 0.0211 m gives 63.98 m.

    >>> float(far_field_exposure_m(1.5, 299792458 / 0.0211).round(3))
    63.981
    """
    return 0.6 * floats(largest_m) ** 2 / wavelength_m(freq_hz)


def near_field_m(largest_m: ArrayLike, freq_hz: ArrayLike) -> Floats:
    """Extent of the near field of an aperture.

    largest_m [m]: largest dimension of the aperture.
    freq_hz [Hz]: frequency.
    Returns [m]: D^2/(4 lambda).
    Source: OET Bulletin 65, equation 12; same filing: 26.659 m.

    >>> float(near_field_m(1.5, 299792458 / 0.0211).round(3))
    26.659
    """
    return floats(largest_m) ** 2 / (4 * wavelength_m(freq_hz))


def surface_density_wm2(power_w: ArrayLike, area_m2: ArrayLike, factor: ArrayLike = 4.0) -> Floats:
    """Highest power density at the face of an aperture.

    power_w [W]: power into the aperture.
    area_m2 [m^2]: physical area.
    factor [1]: 4 in OET Bulletin 65; some published exhibits use 2 for a reflector face: say which.
    Returns [W/m^2]: factor P/A.
    Source: OET Bulletin 65, equation 11; filing SES-MOD-20110214-00152 prints 20.420 mW/cm^2 with factor 2.

    >>> float((surface_density_wm2(180.43, 1.7671, factor=2) / 10).round(2))
    20.42
    """
    return floats(factor) * floats(power_w) / floats(area_m2)


def near_field_density_wm2(power_w: ArrayLike, diameter_m: ArrayLike, efficiency: ArrayLike = 0.65) -> Floats:
    """Highest on-axis power density inside the near field of a circular aperture.

    power_w [W]: power into the aperture.
    diameter_m [m]: diameter.
    efficiency [1]: aperture efficiency, 0.5-0.75.
    Returns [W/m^2]: 16 eta P/(pi D^2), constant up to the near-field extent.
    Source: OET Bulletin 65, equation 13; filing SES-MOD-20110214-00152: 26.55 mW/cm^2.

    >>> float((near_field_density_wm2(180.43, 1.5) / 10).round(2))
    26.55
    """
    return 16 * floats(efficiency) * floats(power_w) / (np.pi * floats(diameter_m) ** 2)


def transition_density_wm2(
    near_field_density_wm2: ArrayLike, near_field_m: ArrayLike, distance_m: ArrayLike
) -> Floats:
    """Power density between the near-field extent and the far field.

    near_field_density_wm2 [W/m^2]: density inside the near field.
    near_field_m [m]: extent of the near field.
    distance_m [m]: distance, between 1 and 2.4 times that extent.
    Returns [W/m^2]: S_nf R_nf/R.
    Source: OET Bulletin 65, equation 15.

    >>> float(transition_density_wm2(100, 10, 20))
    50.0
    """
    return floats(near_field_density_wm2) * floats(near_field_m) / floats(distance_m)


def cylindrical_oet65_wm2(
    net_power_w: ArrayLike, distance_m: ArrayLike, height_m: ArrayLike, az_hpbw_deg: ArrayLike = 360.0
) -> Floats:
    """Power density averaged over the height of a panel, close to it, in the main sector.

    net_power_w [W]: power radiated by the array.
    distance_m [m]: distance from the panel.
    height_m [m]: radiating height.
    az_hpbw_deg [deg]: azimuth half-power beamwidth; 360 for an omnidirectional array.
    Returns [W/m^2]: (360/beamwidth) P/(2 pi R h).
    Source: OET Bulletin 65, cylindrical model (from memory); meets the spherical model at R = G h theta/720.

    >>> float(cylindrical_oet65_wm2(100, 1.0, 2.0, 65).round(2))
    44.07
    """
    share = 360.0 / floats(az_hpbw_deg)
    return share * floats(net_power_w) / (2 * np.pi * floats(distance_m) * floats(height_m))


def cylindrical_crossover_m(gain: ArrayLike, height_m: ArrayLike, az_hpbw_deg: ArrayLike = 360.0) -> Floats:
    """Distance where the OET 65 cylindrical and spherical models meet; nearer in, the cylindrical one holds.

    gain [1]: linear peak gain.
    height_m [m]: radiating height.
    az_hpbw_deg [deg]: azimuth half-power beamwidth.
    Returns [m]: G h theta/720.
    Source: both formulas of OET Bulletin 65 set equal (derived).

    >>> float(cylindrical_crossover_m(50.0, 2.0, 65).round(2))
    9.03
    """
    return floats(gain) * floats(height_m) * floats(az_hpbw_deg) / 720


def cylindrical_iec62232_wm2(
    power_w: ArrayLike,
    distance_m: ArrayLike,
    *,
    height_m: ArrayLike,
    az_hpbw_deg: ArrayLike,
    directivity: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    azimuth_deg: ArrayLike = 0.0,
) -> Floats:
    """Power density averaged over height near a sector array, near and far; the peak is twice this.

    power_w [W]: power radiated by the array.
    distance_m [m]: distance from the panel.
    height_m [m]: array length.
    az_hpbw_deg [deg]: azimuth half-power beamwidth.
    directivity [1]: linear peak directivity.
    tilt_deg [deg]: electrical tilt.
    azimuth_deg [deg]: azimuth from boresight.
    Returns [W/m^2]: P 2^-(2 phi/phi3)^2/(phi3 r L cos^2 g sqrt(1 + (2r/r0)^2)) with r0 = phi3 D L cos^2 g/12.
    Source: IEC 62232 cylindrical formula (from memory, medium confidence); far out 2 S tends to
    P D/(4 pi r^2) within 12 against 4 pi.

    >>> near = cylindrical_iec62232_wm2(
    ...     100, 500.0, height_m=2.0, az_hpbw_deg=65, directivity=50.0
    ... )
    >>> float((2 * near * 500**2 / (100 * 50)).round(4))
    0.0833
    """
    width_rad = np.radians(floats(az_hpbw_deg))
    effective_m = floats(height_m) * np.cos(np.radians(floats(tilt_deg))) ** 2
    crossover_m = width_rad * floats(directivity) * effective_m / 12
    r = floats(distance_m)
    roll_off = np.power(2.0, -((2 * floats(azimuth_deg) / floats(az_hpbw_deg)) ** 2))
    spread: Floats = width_rad * r * effective_m * np.sqrt(1 + (2 * r / crossover_m) ** 2)
    return floats(power_w) * roll_off / spread
