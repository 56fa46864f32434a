"""Innocent readings of EIRP and transmit power. See `conventions` for how they are tried."""

from __future__ import annotations

import math
from dataclasses import replace

from speccheck.checks.innocent.conventions import Reach, Transform, innocent, reread, scaled, shifted
from speccheck.checks.innocent.innocent_gain import DIPOLE_DBI, TWICE_DB
from speccheck.dictionary import parameters
from speccheck.records import Panel, Reading

PEAK_OVER_AVERAGE_DB = 9.0
"""Middle of the usual 8 to 10 dB from average to envelope power of many carriers (common practice)."""

_POWERS = ("conducted_power", "max_power_total")
_EACH = ("power_per_transceiver", "max_power_per_port")
_IN_DBM = "dbm"


def _less(offset_db: float) -> Transform:
    def change(panel: Panel, reach: Reach) -> Panel:
        return reread(panel, reach, ("eirp",), shifted(-offset_db))

    return change


@innocent(
    "EIRP with both polarisations added twice", "the EIRP adds the power of both polarisations once", "eirp"
)
def polarisations_twice_in_eirp(panel: Panel, reach: Reach) -> Panel:
    """EIRP less 3.01 dB."""
    return reread(panel, reach, ("eirp",), shifted(-TWICE_DB))


@innocent("EIRP of one polarisation", "the EIRP is that of one or of both polarisations", "eirp")
def eirp_of_one_polarisation(panel: Panel, reach: Reach) -> Panel:
    """EIRP plus 3.01 dB."""
    return reread(panel, reach, ("eirp",), shifted(TWICE_DB))


@innocent("EIRP of one port", "the EIRP is that of one port or of all", "eirp")
def eirp_of_one_port(panel: Panel, reach: Reach) -> Panel:
    """EIRP of all transceivers or connectors."""
    ports = panel.get("transceivers") or panel.get("rf_ports")
    if ports is None or isinstance(ports.value, str):
        return panel
    return reread(panel, reach, ("eirp",), shifted(10 * math.log10(max(1.0, ports.nominal))))


@innocent("ERP written as EIRP", "the figure is ERP (from a half-wave dipole) or EIRP", "eirp")
def erp_as_eirp(panel: Panel, reach: Reach) -> Panel:
    """EIRP plus 2.15 dB."""
    return reread(panel, reach, ("eirp",), shifted(DIPOLE_DBI))


@innocent("EIRP converted from ERP twice", "the figure is ERP (from a half-wave dipole) or EIRP", "eirp")
def erp_converted_twice(panel: Panel, reach: Reach) -> Panel:
    """EIRP less 2.15 dB."""
    return reread(panel, reach, ("eirp",), shifted(-DIPOLE_DBI))


for _name, _over_db in (
    ("EIRP of the envelope peak, not the average", PEAK_OVER_AVERAGE_DB),
    ("EIRP of the envelope peak, 8 dB above the average", 8.0),
    ("EIRP of the envelope peak, 10 dB above the average", 10.0),
):
    innocent(_name, "the EIRP is the average or the envelope peak", "eirp")(_less(_over_db))


@innocent(
    "EIRP averaged over the TDD pattern", "the EIRP is averaged over the downlink share", "eirp", "tdd_duty"
)
def eirp_averaged(panel: Panel, reach: Reach) -> Panel:
    """EIRP over the stated downlink share, or 75 % where none is stated."""
    duty = panel.get("tdd_duty")
    share = duty.nominal / 100 if duty is not None and not isinstance(duty.value, str) else 0.75
    return reread(panel, reach, ("eirp",), shifted(-10 * math.log10(max(share, 0.01))))


@innocent("power of one polarisation", "the power is that of one or of both polarisations", *_POWERS)
def power_of_one_polarisation(panel: Panel, reach: Reach) -> Panel:
    """Twice the stated power."""
    return reread(panel, reach, _POWERS, scaled(2))


@innocent("power of one port", "the power is that of one port or of all", *_POWERS)
def power_of_one_port(panel: Panel, reach: Reach) -> Panel:
    """The stated power times transceivers or connectors."""
    ports = panel.get("transceivers") or panel.get("rf_ports")
    if ports is None or isinstance(ports.value, str):
        return panel
    return reread(panel, reach, _POWERS, scaled(ports.nominal))


def _beyond_one(panel: Panel) -> bool:
    """Whether a power of one transceiver or port is more than any has."""
    return any(
        usual is not None and not isinstance(r.value, str) and r.nominal > usual[1]
        for key in _EACH
        for usual in [parameters()[key].plausible]
        for r in panel.all(key)
    )


@innocent(
    "total power given as that of one port",
    "the power is that of one port or of all",
    *_EACH,
    likely=_beyond_one,
)
def total_for_one_port(panel: Panel, reach: Reach) -> Panel:
    """The stated power shared out over transceivers or connectors."""
    ports = panel.get("transceivers") or panel.get("rf_ports")
    if ports is None or isinstance(ports.value, str) or ports.nominal < 2:
        return panel
    return reread(panel, reach, _EACH, scaled(1 / ports.nominal))


@innocent("power in dBm under a heading in W", "the power is in W or in dBm", *_POWERS, *_EACH)
def power_in_dbm(panel: Panel, reach: Reach) -> Panel:
    """The number taken as a level: 46 becomes 39.8 W."""

    def watts(reading: Reading) -> Reading:
        level_dbm = reading.stated_value
        if reading.stated_unit.lower() == _IN_DBM or not isinstance(level_dbm, int | float):
            return reading
        return replace(reading, value=10 ** (min(level_dbm, 90.0) / 10 - 3))

    return reread(panel, reach, (*_POWERS, *_EACH), watts)


@innocent("power in W under a heading in dBm", "the power is in W or in dBm", *_POWERS, *_EACH)
def power_in_watts(panel: Panel, reach: Reach) -> Panel:
    """The number taken as a power: 40 dBm becomes 40 W."""

    def watts(reading: Reading) -> Reading:
        number = reading.stated_value
        if reading.stated_unit.lower() != _IN_DBM or not isinstance(number, int | float):
            return reading
        return replace(reading, value=number)

    return reread(panel, reach, (*_POWERS, *_EACH), watts)
