"""Wind on a panel: dynamic pressure, the drag a stated load implies, scaling with speed."""

from __future__ import annotations

from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, floats

AIR_DENSITY_KGM3 = 1.225
"""Air at 15 °C, sea level [kg/m^3] (ISO 2533); EN 1991-1-4 recommends 1.25, ASCE 7 uses 1.226."""


def dynamic_pressure_pa(speed_mps: ArrayLike, air_density_kgm3: ArrayLike = AIR_DENSITY_KGM3) -> Floats:
    """Dynamic pressure of wind.

    speed_mps [m/s]: wind speed.
    air_density_kgm3 [kg/m^3]: density of air.
    Returns [Pa]: rho v^2 / 2.
    Source: EN 1991-1-4 equation 4.10 (rho 1.25); ASCE 7 SI form 0.613 v^2: 45 m/s gives 1241 Pa.

    >>> float(dynamic_pressure_pa(45, 1.226).round())
    1241.0
    """
    return 0.5 * floats(air_density_kgm3) * floats(speed_mps) ** 2


def force_n(
    drag_coefficient: ArrayLike,
    speed_mps: ArrayLike,
    area_m2: ArrayLike,
    air_density_kgm3: ArrayLike = AIR_DENSITY_KGM3,
) -> Floats:
    """Wind load on a face.

    drag_coefficient [1]: drag coefficient of the body for that face.
    speed_mps [m/s]: wind speed.
    area_m2 [m^2]: projected area.
    air_density_kgm3 [kg/m^3]: density of air.
    Returns [N]: q C_d A.
    Source: EN 1991-1-4 section 5.3, force coefficient; 0.8 m x 0.5 m, C_d 2.0, 150 km/h: 851 N (rho 1.226).

    >>> float(force_n(2.0, 150 / 3.6, 0.8 * 0.5, 1.226).round())
    851.0
    """
    return floats(drag_coefficient) * dynamic_pressure_pa(speed_mps, air_density_kgm3) * floats(area_m2)


def drag_coefficient(
    force_n: ArrayLike,
    speed_mps: ArrayLike,
    area_m2: ArrayLike,
    air_density_kgm3: ArrayLike = AIR_DENSITY_KGM3,
) -> Floats:
    """Drag coefficient that a stated wind load implies.

    Flat plates are near 1.2 or above, rounded radomes lower (common practice).
    force_n [N]: stated wind load.
    speed_mps [m/s]: wind speed it is stated at.
    area_m2 [m^2]: projected area of that face.
    air_density_kgm3 [kg/m^3]: density of air.
    Returns [1]: F/(q A).
    Source: EN 1991-1-4 section 5.3, rearranged; 400 N on 2.0 m x 0.4 m at 150 km/h is 0.47.

    >>> float(drag_coefficient(400, 150 / 3.6, 2.0 * 0.4).round(2))
    0.47
    """
    return floats(force_n) / (dynamic_pressure_pa(speed_mps, air_density_kgm3) * floats(area_m2))


def scaled_force_n(force_n: ArrayLike, from_speed_mps: ArrayLike, to_speed_mps: ArrayLike) -> Floats:
    """Wind load at another speed, same drag coefficient.

    force_n [N]: stated load.
    from_speed_mps [m/s]: speed it is stated at.
    to_speed_mps [m/s]: wanted speed.
    Returns [N]: F (v2/v1)^2.
    Source: force proportional to the dynamic pressure; 150 to 200 km/h is a factor 1.778.

    >>> float(scaled_force_n(1000, 150, 200).round())
    1778.0
    """
    return floats(force_n) * (floats(to_speed_mps) / floats(from_speed_mps)) ** 2
