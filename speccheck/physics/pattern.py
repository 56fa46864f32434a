"""Directivity of one state in any directions, and the published composite gain of system studies."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats
from speccheck.physics.element import Element
from speccheck.physics.field import Excitation, excite, intensity
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.radiated import radiated_power


def power_pattern(  # noqa: PLR0917 state first, directions last
    layout: ArrayLayout,
    element: Element,
    freq_hz: float,
    tilt_deg: float,
    scan_deg: float,
    theta_deg: ArrayLike,
    phi_deg: ArrayLike,
) -> Floats:
    """Directivity as a ratio in given directions.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    theta_deg [deg]: zenith angle, broadcast with phi.
    phi_deg [deg]: azimuth.
    Returns [1]: 4 pi U/P.
    Source: definition, with the power by the lag form.

    >>> from speccheck.physics.element import IsotropicElement
    >>> pair = ArrayLayout(2, 1, 0.5, 0.5)
    >>> float(power_pattern(pair, IsotropicElement(), 299792458.0, 0, 0, 90, 0).round(4))
    2.0
    """
    state, theta, phi = _prepared(layout, element, freq_hz, (tilt_deg, scan_deg), (theta_deg, phi_deg))
    power = intensity(state, theta.reshape(1, -1), phi.reshape(1, -1)) / radiated_power(state)[:, None]
    return floats(power.reshape(theta.shape)[()])


def gain_pattern_dbi(
    layout: ArrayLayout,
    element: Element,
    freq_hz: float,
    theta_deg: ArrayLike,
    phi_deg: ArrayLike,
    *,
    tilt_deg: float = 0.0,
    scan_deg: float = 0.0,
) -> Floats:
    """Directivity in given directions.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    theta_deg [deg]: zenith angle, broadcast with phi.
    phi_deg [deg]: azimuth.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [dBi]: 4 pi U/P; minus infinity where nothing is radiated.
    Source: definition, with the power by the lag form.

    >>> from speccheck.physics.element import SectorElement
    >>> column = ArrayLayout(10, 1, 0.8, 0.5)
    >>> float(gain_pattern_dbi(column, SectorElement(), 299792458.0, 90.0, 0.0).round(2))
    19.25
    """
    return db(power_pattern(layout, element, freq_hz, tilt_deg, scan_deg, theta_deg, phi_deg))


def nominal_pattern_dbi(
    layout: ArrayLayout,
    element: Element,
    freq_hz: float,
    theta_deg: ArrayLike,
    phi_deg: ArrayLike,
    *,
    element_gain_dbi: float,
    tilt_deg: float = 0.0,
    scan_deg: float = 0.0,
    correlation: float = 1.0,
) -> Floats:
    """Composite gain as system studies print it: stated element gain plus array factor, nothing integrated.

    It is a convention, not an energy-conserving gain: compare `gain_pattern_dbi`.
    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    theta_deg [deg]: zenith angle, broadcast with phi.
    phi_deg [deg]: azimuth.
    element_gain_dbi [dBi]: stated gain of the element.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    correlation [1]: correlation level rho, 0 (element pattern alone) to 1.
    Returns [dBi]: A_E + 10 log10(1 + rho(|sum w v|^2/sum|w|^2 - 1)).
    Source: ITU-R M.2101 Annex 1 section 5; 8 x 8 elements of 5 dBi at half a wavelength: 23.06 dBi.

    >>> from speccheck.physics.element import SectorElement
    >>> panel = ArrayLayout(8, 8, 0.5, 0.5)
    >>> float(nominal_pattern_dbi(panel, SectorElement(), 299792458.0, 90, 0, element_gain_dbi=5).round(2))
    23.06
    """
    state, theta, phi = _prepared(layout, element, freq_hz, (tilt_deg, scan_deg), (theta_deg, phi_deg))
    own = element.power(theta, phi)
    driven = np.sum(np.abs(state.rows) ** 2) * np.sum(np.abs(state.columns) ** 2)
    both = intensity(state, theta.reshape(1, -1), phi.reshape(1, -1)).reshape(theta.shape)
    array = np.divide(both, own * driven, out=np.zeros(theta.shape), where=own > 0)
    return floats((element_gain_dbi + db(own) + db(1 + correlation * (array - 1)))[()])


def _prepared(
    layout: ArrayLayout,
    element: Element,
    freq_hz: float,
    beam_deg: tuple[float, float],
    angles_deg: tuple[ArrayLike, ArrayLike],
) -> tuple[Excitation, Floats, Floats]:
    tilt_deg, scan_deg = beam_deg
    state = excite(layout, element, floats([freq_hz]), floats([tilt_deg]), floats([scan_deg]))
    theta, phi = np.broadcast_arrays(*(np.radians(floats(angle)) for angle in angles_deg))
    return state, theta, phi
