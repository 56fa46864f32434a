"""Power arithmetic: dBm and watts, EIRP, ERP, dipole reference, sums, efficiency."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats, ratio

HALF_WAVE_DIPOLE_DBI = 2.15
"""Directivity of a half-wave dipole [dBi] as the trade rounds it (ITU-R V.573); exact value 2.151."""


def watts(level_dbm: ArrayLike) -> Floats:
    """Power of a level in dBm.

    level_dbm [dBm]: level, any shape.
    Returns [W]: 10^((L - 30)/10).
    Source: definition, ITU-R V.574.

    >>> float(watts(43).round(2))
    19.95
    """
    return ratio(floats(level_dbm) - 30)


def dbm(power_w: ArrayLike) -> Floats:
    """Level in dBm of a power.

    power_w [W]: power, any shape.
    Returns [dBm]: 10 log10(P) + 30.
    Source: definition, ITU-R V.574.

    >>> float(dbm(320).round(2))
    55.05
    """
    return db(power_w) + 30


def eirp_dbm(total_power_w: ArrayLike, gain_dbi: ArrayLike, loss_db: ArrayLike = 0.0) -> Floats:
    """Equivalent isotropically radiated power of one beam.

    The power is the sum over all ports and both polarisations, the gain that of one polarisation: no
    further 3 dB is added.
    total_power_w [W]: conducted power, all ports and polarisations together.
    gain_dbi [dBi]: gain of one polarisation.
    loss_db [dB]: loss between the power reference plane and the antenna port.
    Returns [dBm]: P + G - L.
    Source: ITU-R P.525-4 section 2; 64 ports of 5 W and 24.5 dBi give 79.55 dBm.

    >>> float(eirp_dbm(64 * 5, 24.5).round(2))
    79.55
    """
    return dbm(total_power_w) + floats(gain_dbi) - floats(loss_db)


def implied_gain_dbi(eirp_dbm: ArrayLike, total_power_w: ArrayLike, loss_db: ArrayLike = 0.0) -> Floats:
    """Gain that a stated EIRP needs.

    eirp_dbm [dBm]: stated EIRP.
    total_power_w [W]: conducted power, all ports and polarisations together.
    loss_db [dB]: loss between the power reference plane and the antenna port.
    Returns [dBi]: EIRP - P + L.
    Source: ITU-R P.525-4 section 2, rearranged.

    >>> float(implied_gain_dbi(79.5, 320).round(2))
    24.45
    """
    return floats(eirp_dbm) - dbm(total_power_w) + floats(loss_db)


def erp_dbm(eirp_dbm: ArrayLike) -> Floats:
    """Effective radiated power (against a half-wave dipole) of an EIRP.

    eirp_dbm [dBm]: EIRP.
    Returns [dBm]: EIRP - 2.15.
    Source: ITU-R V.573; 61 dBm EIRP is 58.85 dBm ERP.

    >>> float(erp_dbm(61).round(2))
    58.85
    """
    return floats(eirp_dbm) - HALF_WAVE_DIPOLE_DBI


def eirp_from_erp_dbm(erp_dbm: ArrayLike) -> Floats:
    """EIRP of an effective radiated power.

    erp_dbm [dBm]: ERP against a half-wave dipole.
    Returns [dBm]: ERP + 2.15.
    Source: ITU-R V.573.

    >>> float(eirp_from_erp_dbm(58.85).round(2))
    61.0
    """
    return floats(erp_dbm) + HALF_WAVE_DIPOLE_DBI


def dbi_from_dbd(gain_dbd: ArrayLike) -> Floats:
    """Gain over isotropic of a gain over a half-wave dipole.

    gain_dbd [dBd]: gain over a half-wave dipole.
    Returns [dBi]: G + 2.15.
    Source: ITU-R V.573.

    >>> float(dbi_from_dbd(15).round(2))
    17.15
    """
    return floats(gain_dbd) + HALF_WAVE_DIPOLE_DBI


def dbd_from_dbi(gain_dbi: ArrayLike) -> Floats:
    """Gain over a half-wave dipole of a gain over isotropic.

    gain_dbi [dBi]: gain over isotropic.
    Returns [dBd]: G - 2.15.
    Source: ITU-R V.573.

    >>> float(dbd_from_dbi(17.15).round(2))
    15.0
    """
    return floats(gain_dbi) - HALF_WAVE_DIPOLE_DBI


def total_power_w(power_per_port_w: ArrayLike, ports: ArrayLike) -> Floats:
    """Power of all ports together.

    power_per_port_w [W]: power of one port.
    ports [1]: number of ports, both polarisations counted.
    Returns [W]: P times ports.
    Source: energy conservation; uncorrelated or orthogonal ports add in power.

    >>> float(total_power_w(5, 64))
    320.0
    """
    return floats(power_per_port_w) * floats(ports)


def sum_dbm(levels_dbm: ArrayLike, axis: int = -1) -> Floats:
    """Sum of several powers given as levels.

    levels_dbm [dBm]: levels.
    axis [1]: axis summed over.
    Returns [dBm]: 10 log10 of the sum of the powers.
    Source: energy conservation; two equal levels give 3.01 dB more.

    >>> float(sum_dbm([43, 43]).round(2))
    46.01
    """
    return dbm(np.sum(watts(levels_dbm), axis=axis))


def trp_dbm(total_power_w: ArrayLike, loss_db: ArrayLike) -> Floats:
    """Total radiated power.

    total_power_w [W]: conducted power, all ports together.
    loss_db [dB]: ohmic and mismatch loss of the antenna.
    Returns [dBm]: P - L.
    Source: 3GPP TS 38.104 clause 3.1, total radiated power; energy conservation.

    >>> float(trp_dbm(320, 1.0).round(2))
    54.05
    """
    return dbm(total_power_w) - floats(loss_db)


def rf_efficiency(radiated_w: ArrayLike, consumed_w: ArrayLike, duty: ArrayLike = 1.0) -> Floats:
    """Share of the consumed power that leaves as radio power on average.

    radiated_w [W]: average radio power while transmitting.
    consumed_w [W]: average power consumption.
    duty [1]: share of time spent transmitting (TDD downlink share), 0..1.
    Returns [1]: duty P_rf / P_mains; above 1 breaks energy conservation.
    Source: energy conservation; 320 W at 75 % duty from 500 W is 48 %.

    >>> float(rf_efficiency(320, 500, 0.75))
    0.48
    """
    return floats(duty) * floats(radiated_w) / floats(consumed_w)
