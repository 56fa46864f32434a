"""Power patterns of single elements and the integrals the directivity of an array needs.

The kernel of an element, b(y, z) = (1/4 pi) integral e cos(k y u_y) cos(k z u_z) dOmega, is all that the
radiated power of any array of that element depends on (e is even in y and z for every element here).
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache
from typing import Protocol

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats, ratio
from speccheck.physics.quadrature import (
    cosine_sums,
    even_coefficients,
    even_nodes,
    even_polynomials,
    legendre,
    legendre_order,
)

_PER_DB = np.log(10) / 10
"""Nepers of power [1] in a decibel."""
_PARABOLA = float(-24 * _PER_DB * np.degrees(1) ** 2)
"""Curvature of the logarithm of a parabola in dB [1/rad^2], times the square of its width [deg^2]."""
_SPAN_STEP, _WIDEST_SPAN = 16.0, 80.0
"""Phases [rad] of the longest lag: kernel series are kept in these steps; beyond, building one costs more
than it saves."""


class Element(Protocol):
    """What an element must offer: its power pattern, peak 1, and its kernel."""

    def power(self, theta_rad: ArrayLike, phi_rad: ArrayLike) -> Floats:
        """Power pattern [1] at theta_rad [rad], phi_rad [rad]."""
        ...

    def __hash__(self) -> int: ...

    def log_slopes(self, theta_rad: Floats, phi_rad: Floats) -> tuple[Floats, Floats, Floats, Floats]:
        """Slopes and curvatures of log power by theta_rad [rad], phi_rad [rad]: t, p, tt, pp."""
        ...

    def kernel(self, wavenumbers: Floats, y_m: Floats, z_m: Floats) -> Floats:
        """Integrals [1], shape (F, Y, Z), at wavenumbers [rad/m] (F), lags y_m [m] (Y) and z_m [m] (Z)."""
        ...


def directivity_dbi(element: Element) -> float:
    """Directivity of one element alone.

    element [Element]: the element.
    Returns [dBi]: 4 pi over the integral of its power pattern.
    Source: definition; the TR 38.901 element (65 by 65 deg, floor 30 dB) integrates to 9.826 dBi, not to
    its stated 8 dBi.

    >>> round(directivity_dbi(SectorElement()), 3)
    9.826
    """
    zero = np.zeros(1)
    return float(-db(element.kernel(np.ones(1), zero, zero))[0, 0, 0])


@dataclass(frozen=True, slots=True)
class SectorElement:
    """Element of 3GPP TR 38.901 Table 7.3-1 form: parabolas in dB, clamped.

    az_hpbw_deg [deg]: azimuth half-power beamwidth.
    el_hpbw_deg [deg]: elevation half-power beamwidth.
    floor_db [dB]: greatest attenuation of the horizontal cut and of the whole pattern (A_max).
    el_floor_db [dB]: greatest attenuation of the vertical cut (SLA_V).
    Raises ValueError for a width or floor that is not positive.
    Source: 3GPP TR 38.901 Table 7.3-1; ITU-R M.2101 Table 4.
    """

    az_hpbw_deg: float = 65.0
    el_hpbw_deg: float = 65.0
    floor_db: float = 30.0
    el_floor_db: float = 30.0

    def __post_init__(self) -> None:
        if not min(self.az_hpbw_deg, self.el_hpbw_deg, self.floor_db, self.el_floor_db) > 0:
            raise ValueError("beamwidths [deg] and floors [dB] of an element must be positive")

    def power(self, theta_rad: ArrayLike, phi_rad: ArrayLike) -> Floats:
        """Power pattern, peak 1.

        theta_rad [rad]: zenith angle.
        phi_rad [rad]: azimuth, -pi..pi.
        Returns [1]: 10^(A/10).
        Source: 3GPP TR 38.901 Table 7.3-1.

        >>> float(db(SectorElement().power(np.pi / 2, np.radians(32.5))).round(4))
        -3.0
        """
        elevation, azimuth = floats(theta_rad) - np.pi / 2, floats(phi_rad)
        bend_t, bend_p = _PARABOLA / (2 * self.el_hpbw_deg**2), _PARABOLA / (2 * self.az_hpbw_deg**2)
        # the exponentials run over each angle alone, not over all pairs
        vertical = np.exp(np.maximum(bend_t * (elevation * elevation), -_PER_DB * self.el_floor_db))
        product: Floats = vertical * np.exp(bend_p * (azimuth * azimuth))
        return np.maximum(product, 10 ** (-self.floor_db / 10))

    def log_slopes(self, theta_rad: Floats, phi_rad: Floats) -> tuple[Floats, Floats, Floats, Floats]:
        """Slopes and curvatures of the logarithm of the power, of the parabolas before clamping.

        theta_rad [rad]: zenith angle.
        phi_rad [rad]: azimuth.
        Returns [1/rad, 1/rad, 1/rad^2, 1/rad^2]: by theta, phi, theta twice, phi twice.
        Source: derivative of the parabolas.
        """
        bend_t, bend_p = (_PARABOLA / (w * w) for w in (self.el_hpbw_deg, self.az_hpbw_deg))
        return bend_t * (theta_rad - np.pi / 2), bend_p * phi_rad, np.array(bend_t), np.array(bend_p)

    def kernel(self, wavenumbers: Floats, y_m: Floats, z_m: Floats) -> Floats:
        """Kernel of the element, of a panel of ordinary size by one series for all such panels.

        wavenumbers [rad/m]: 2 pi / wavelength, shape (F,).
        y_m [m]: horizontal lags, shape (Y,).
        z_m [m]: vertical lags, shape (Z,).
        Returns [1]: integrals, shape (F, Y, Z).
        Source: it depends on wavenumber times lag alone, and is even and band-limited in either: a short
        Chebyshev series.
        """
        highest = float(wavenumbers.max())
        y_phase, z_phase = highest * float(np.abs(y_m).max()), highest * float(np.abs(z_m).max())
        if min(y_phase, z_phase) == 0 or max(y_phase, z_phase) > _WIDEST_SPAN:
            return self.integrated_kernel(wavenumbers, y_m, z_m)
        y_span, z_span = (_SPAN_STEP * float(np.ceil(phase / _SPAN_STEP)) for phase in (y_phase, z_phase))
        series = _kernel_series(self, y_span, z_span)
        phases = np.concatenate([y_m / y_span, z_m / z_span]) * wavenumbers[:, None]
        over = even_polynomials(phases, max(series.shape))
        over_y = over[:, : len(y_m), : series.shape[0]]
        over_z = over[:, len(y_m) :, : series.shape[1]]
        return np.asarray(over_y @ series @ over_z.transpose(0, 2, 1))

    def integrated_kernel(self, wavenumbers: Floats, y_m: Floats, z_m: Floats) -> Floats:
        """Kernel of the element: the floor in closed form, the rest by quadrature over its own region.

        wavenumbers [rad/m]: 2 pi / wavelength, shape (F,).
        y_m [m]: horizontal lags, shape (Y,).
        z_m [m]: vertical lags, shape (Z,).
        Returns [1]: integrals, shape (F, Y, Z).
        Source: closed form sin(kr)/(kr) of the isotropic part; Gauss-Legendre quadrature of the smooth part.
        """
        y_phase, z_phase = (float(wavenumbers.max() * np.abs(lags).max()) for lags in (y_m, z_m))
        reach = np.radians(min(180.0, self.az_hpbw_deg * (self.floor_db / 12) ** 0.5))
        orders = (
            legendre_order(np.pi / 4 * float(np.hypot(y_phase, z_phase))),
            legendre_order(reach / 2 * y_phase),
        )
        sines, u_z, weights = _nodes(self, *orders)
        over_phi = cosine_sums(wavenumbers[:, None, None] * sines, y_m, weights)
        over_theta: Floats = over_phi @ np.cos((wavenumbers[:, None] * u_z)[:, :, None] * z_m)
        return over_theta + ratio(-self.floor_db) * _isotropic_kernel(wavenumbers, y_m, z_m)


@dataclass(frozen=True, slots=True)
class CosineElement:
    """Element of power pattern cos^n of the angle from boresight, nothing behind.

    exponent [1]: n of the POWER pattern, above -1.
    Source: C. A. Balanis, "Antenna Theory", ch. 2: directivity 2 (n + 1).
    """

    exponent: float = 1.0

    def power(self, theta_rad: ArrayLike, phi_rad: ArrayLike) -> Floats:
        """Power pattern, peak 1.

        theta_rad [rad]: zenith angle.
        phi_rad [rad]: azimuth.
        Returns [1]: cos^n, zero behind.
        Source: C. A. Balanis, "Antenna Theory", ch. 2.
        """
        along = np.sin(floats(theta_rad)) * np.cos(floats(phi_rad))
        front: Floats = np.where(along > 0, np.maximum(along, 0) ** self.exponent, 0.0)
        return front

    def log_slopes(self, theta_rad: Floats, phi_rad: Floats) -> tuple[Floats, Floats, Floats, Floats]:
        """Slopes and curvatures of the logarithm of the power in front.

        theta_rad [rad]: zenith angle.
        phi_rad [rad]: azimuth.
        Returns [1/rad, 1/rad, 1/rad^2, 1/rad^2]: by theta, phi, theta twice, phi twice.
        Source: derivatives of n log(sin theta cos phi).
        """
        n, sin_t, cos_p = self.exponent, np.sin(theta_rad), np.maximum(np.cos(phi_rad), 1e-6)
        return (
            n * np.cos(theta_rad) / sin_t,
            -n * np.sin(phi_rad) / cos_p,
            -n / sin_t**2,
            -n / cos_p**2,
        )

    def kernel(self, wavenumbers: Floats, y_m: Floats, z_m: Floats) -> Floats:
        """Kernel of the element, a function of the distance alone.

        wavenumbers [rad/m]: shape (F,).
        y_m [m]: horizontal lags, shape (Y,).
        z_m [m]: vertical lags, shape (Z,).
        Returns [1]: integrals, shape (F, Y, Z).
        Source: half of the mean of cos(k r sin psi cos chi), weighted by cos^n psi; trapezoid in chi.
        """
        distance = wavenumbers[:, None, None] * np.hypot(y_m[None, :, None], z_m[None, None, :])
        order = legendre_order(float(distance.max())) + 16
        nodes, weights = legendre(order)
        root = (nodes + 1) / 2  # cos psi = root^2 keeps a fractional power smooth at the horizon
        weights = weights * root * root ** (2 * self.exponent)
        turns = np.cos(np.pi * (np.arange(order) + 0.5) / order)
        argument = np.multiply.outer(distance, np.sqrt(1 - root**4)[:, None] * turns)
        kernel: Floats = 0.5 * np.cos(argument).mean(-1) @ weights
        return kernel


@dataclass(frozen=True, slots=True)
class IsotropicElement:
    """Element that radiates alike in all directions, or in all directions in front.

    front_only [bool]: nothing behind the panel plane.
    Source: definition.
    """

    front_only: bool = False

    def power(self, theta_rad: ArrayLike, phi_rad: ArrayLike) -> Floats:
        """Power pattern, 1 or 0.

        theta_rad [rad]: zenith angle.
        phi_rad [rad]: azimuth.
        Returns [1]: 1, or 0 behind.
        Source: definition.
        """
        along = np.sin(floats(theta_rad)) * np.cos(floats(phi_rad))
        shown: Floats = np.where((along > 0) | (not self.front_only), 1.0, 0.0)
        return shown

    def log_slopes(self, theta_rad: Floats, phi_rad: Floats) -> tuple[Floats, Floats, Floats, Floats]:
        """Slopes and curvatures of the logarithm of the power: none.

        theta_rad [rad]: zenith angle.
        phi_rad [rad]: azimuth.
        Returns [1/rad, 1/rad, 1/rad^2, 1/rad^2]: zeros.
        Source: definition.
        """
        none = np.zeros(np.broadcast(theta_rad, phi_rad).shape)
        return none, none, none, none

    def kernel(self, wavenumbers: Floats, y_m: Floats, z_m: Floats) -> Floats:
        """Kernel of the element.

        wavenumbers [rad/m]: shape (F,).
        y_m [m]: horizontal lags, shape (Y,).
        z_m [m]: vertical lags, shape (Z,).
        Returns [1]: sin(kr)/(kr), halved for the front alone; shape (F, Y, Z).
        Source: C. A. Balanis, "Antenna Theory", ch. 6, directivity of arrays of isotropic sources.
        """
        return (0.5 if self.front_only else 1.0) * _isotropic_kernel(wavenumbers, y_m, z_m)


def _isotropic_kernel(wavenumbers: Floats, y_m: Floats, z_m: Floats) -> Floats:
    distance = np.hypot(y_m[:, None], z_m)
    return np.sinc(wavenumbers[:, None, None] / np.pi * distance)


@lru_cache(maxsize=64)
def _kernel_series(element: SectorElement, y_span: float, z_span: float) -> Floats:
    """Chebyshev coefficients of the kernel, even orders of y (first axis) and of z, both as phases [rad]."""
    y, z = even_nodes(y_span), even_nodes(z_span)
    samples = element.integrated_kernel(np.ones(1), y, z)[0]
    return np.asarray(even_coefficients(len(y)) @ samples @ even_coefficients(len(z)).T)


@lru_cache(maxsize=64)
def _nodes(element: SectorElement, elevations: int, azimuths: int) -> tuple[Floats, Floats, Floats]:
    """Nodes over the quarter sphere above the floor: sin theta sin phi, cos theta, weights."""
    floor, flat = element.floor_db, min(element.el_floor_db, element.floor_db)
    edge = min(90.0, element.el_hpbw_deg * np.sqrt(flat / 12))
    spans = [(0.0, edge)] if edge >= 90 or flat >= floor else [(0.0, edge), (edge, 90.0)]
    nodes, weights = legendre(elevations)
    elevation = np.concatenate([low + (high - low) * (nodes + 1) / 2 for low, high in spans])
    d_elevation = np.radians(np.concatenate([(high - low) / 2 * weights for low, high in spans]))
    vertical = np.minimum(12 * (elevation / element.el_hpbw_deg) ** 2, flat)
    reach = np.minimum(180.0, element.az_hpbw_deg * np.sqrt(np.maximum(floor - vertical, 0) / 12))
    nodes, weights = legendre(azimuths)
    azimuth = reach[:, None] * (nodes + 1) / 2
    above_floor = ratio(-(vertical[:, None] + 12 * (azimuth / element.az_hpbw_deg) ** 2)) - ratio(-floor)
    solid = d_elevation[:, None] * np.radians(reach)[:, None] / 2 * weights
    cos_elevation = np.cos(np.radians(elevation))
    sines = cos_elevation[:, None] * np.sin(np.radians(azimuth))
    # four quarters of the sphere over 4 pi
    return sines, np.sin(np.radians(elevation)), above_floor * cos_elevation[:, None] * solid / np.pi
