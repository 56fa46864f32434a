"""Innocent readings of matching, isolation and intermodulation. See `conventions` for how they are tried."""

from __future__ import annotations

from dataclasses import replace

from speccheck.checks.innocent.conventions import Reach, innocent, marked, reread
from speccheck.physics.matching import return_loss_db, vswr_from_return_loss
from speccheck.records import Panel, Reading

MOST_AS_VSWR, LEAST_AS_RETURN_LOSS_DB = 3.0, 8.0
"""No panel is sold with a VSWR of 3, a return loss of 6 dB (common practice): a VSWR far above is a return
loss [dB], and a return loss [dB] below is a VSWR."""

_CELLS_ASKED = "VSWR and return loss are in the right cells"


@innocent("VSWR is typical", "the VSWR is typical or guaranteed", "vswr")
def vswr_typical(panel: Panel, reach: Reach) -> Panel:
    """VSWR marked typical: the guaranteed return loss may be lower than it gives."""
    return reread(panel, reach, ("vswr",), marked(typical=1))


@innocent("return loss is typical", "the return loss is typical or guaranteed", "return_loss")
def return_loss_typical(panel: Panel, reach: Reach) -> Panel:
    """Return loss marked typical: it may be higher than the guaranteed VSWR gives."""
    return reread(panel, reach, ("return_loss",), marked(typical=1))


@innocent(
    "return loss in the cell of the VSWR",
    "VSWR and return loss are in the right cells",
    "vswr",
    "return_loss",
)
def return_loss_as_vswr(panel: Panel, reach: Reach) -> Panel:
    """A VSWR no panel has, taken as a return loss [dB]: 14 becomes 1.5."""

    def ratio(reading: Reading) -> Reading:
        if isinstance(reading.value, tuple) or reading.nominal < LEAST_AS_RETURN_LOSS_DB:
            return reading
        return replace(reading, value=float(vswr_from_return_loss(reading.nominal)))

    return reread(panel, reach, ("vswr",), ratio)


@innocent(
    "VSWR in the cell of the return loss",
    "VSWR and return loss are in the right cells",
    "return_loss",
    "vswr",
)
def vswr_as_return_loss(panel: Panel, reach: Reach) -> Panel:
    """A return loss no panel has, taken as a VSWR: 1.5 becomes 14 dB."""

    def decibels(reading: Reading) -> Reading:
        if isinstance(reading.value, tuple) or not 1 < reading.nominal < MOST_AS_VSWR:
            return reading
        return replace(reading, value=float(return_loss_db(reading.nominal)))

    return reread(panel, reach, ("return_loss",), decibels)


@innocent(
    "isolation of the two polarisations of one column",
    "the isolation is that of the two polarisations of one column or of the worst pair of ports",
    "port_isolation",
)
def isolation_within_column(panel: Panel, reach: Reach) -> Panel:
    """Isolation held against what one dual-polarised column shows."""
    return reread(panel, reach, ("port_isolation",), marked(same_column=1))


@innocent(
    "intermodulation in dBm written as dBc",
    "the intermodulation is in dBm or relative to a carrier",
    "passive_intermodulation",
)
def intermodulation_in_dbm(panel: Panel, reach: Reach) -> Panel:
    """The figure as an absolute level."""
    return reread(panel, reach, ("passive_intermodulation",), lambda r: replace(r, unit="dBm"))


@innocent(
    "intermodulation in dBc written as dBm",
    "the intermodulation is in dBm or relative to a carrier",
    "passive_intermodulation",
)
def intermodulation_in_dbc(panel: Panel, reach: Reach) -> Panel:
    """The figure relative to one carrier."""
    return reread(panel, reach, ("passive_intermodulation",), lambda r: replace(r, unit="dBc"))


@innocent(
    "small panel tested at its own rating",
    "the test power is the highest one the panel is rated for",
    "passive_intermodulation",
)
def tested_at_rating(panel: Panel, reach: Reach) -> Panel:
    """The test power taken as the rating of the panel."""
    return reread(panel, reach, ("passive_intermodulation",), marked(tested_at_rating=1))
