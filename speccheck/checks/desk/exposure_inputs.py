"""What an exposure calculation of one band stands on: power, highest gain, EIRP, each with its cells."""

from __future__ import annotations

from dataclasses import dataclass, replace

from speccheck.checks.saying import claim, mhz
from speccheck.checks.transmit_power import TransmitPower, parts_of_total, transmit_power
from speccheck.physics.decibels import db
from speccheck.physics.power import HALF_WAVE_DIPOLE_DBI, dbm, eirp_dbm, implied_gain_dbi, watts
from speccheck.records import Band, Panel, Reading, Step

_ACTIVE = ("transceivers", "conducted_power", "power_per_transceiver", "power_consumption")


@dataclass(frozen=True, slots=True, kw_only=True)
class Radiated:
    """A band at its strongest: power over all ports [W], gain [dBi], EIRP [dBm], and how they were reached.

    `whole_panel` where power or ports are stated once for a panel of several bands.
    """

    band: Band
    power_w: float
    gain_dbi: float
    eirp_dbm: float
    whole_panel: bool
    steps: tuple[Step, ...]
    assumptions: tuple[str, ...]
    readings: tuple[Reading, ...]

    @property
    def eirp_w(self) -> float:
        """EIRP [W]."""
        return float(watts(self.eirp_dbm))


def active(panel: Panel) -> bool:
    """Whether the panel holds its own transmitters, as far as its figures tell."""
    return any(panel.all(key) for key in _ACTIVE)


def radiated(panel: Panel, band: Band) -> Radiated | None:
    """The strongest a band radiates: highest gain, all ports, the higher of stated and computed EIRP.

    Two of power, gain and EIRP give the third; None where fewer are stated.
    """
    power, gain, stated = transmit_power(panel, band), _highest(panel, "gain", band), _eirp(panel, band)
    if power is not None and gain is not None:
        return _from_power(band, power, gain, stated)
    if stated is not None and gain is not None:
        return _without_power(band, gain, stated)
    if stated is not None and power is not None:
        return _without_gain(band, power, stated)
    return None


def lacking(panel: Panel, band: Band) -> tuple[str, ...]:
    """Dictionary keys of what a band still needs for an exposure calculation."""
    power, gain = transmit_power(panel, band), _highest(panel, "gain", band)
    keys = [] if power is not None else ["conducted_power" if active(panel) else "max_power_per_port"]
    if power is None and panel.get("max_power_per_port", band) is not None:
        keys = ["rf_ports"]
    return (*keys, *(() if gain is not None else ("gain",)))


@dataclass(frozen=True, slots=True)
class _StatedEirp:
    level_dbm: float
    reading: Reading
    notes: tuple[str, ...]


def _eirp(panel: Panel, band: Band) -> _StatedEirp | None:
    eirp, erp = _highest(panel, "eirp", band), _highest(panel, "erp", band)
    reading = eirp or erp
    if reading is None:
        return None
    level, notes = reading.high, []
    if eirp is None:
        level += HALF_WAVE_DIPOLE_DBI
        notes.append("The stated ERP is raised by 2.15 dB to EIRP.")
    parts = parts_of_total(reading)
    if parts is None:
        return None
    count, of = parts
    if count > 1:
        level += float(db(count))
        notes.append(f"EIRP {claim(reading)} is one of {count:g} {of}; {db(count):.2f} dB are added for all.")
    return _StatedEirp(level, reading, tuple(notes))


def _from_power(band: Band, power: TransmitPower, gain: Reading, stated: _StatedEirp | None) -> Radiated:
    level = float(eirp_dbm(power.nominal_w, gain.high))
    formula = f"10·log10({power.nominal_w:.5g}) + 30 + {gain.high:g}"
    cells = ", ".join(str(r.where) for r in power.readings)
    computed = Radiated(
        band=band,
        power_w=power.nominal_w,
        gain_dbi=gain.high,
        eirp_dbm=level,
        whole_panel=power.whole_panel,
        steps=(power.step, Step(f"EIRP, {mhz(band)}", formula, round(level, 3), "dBm")),
        assumptions=(
            *power.assumptions,
            f"Power of {mhz(band)}: {power.nominal_w:.5g} W, {power.step.formula} ({cells}).",
            f"Gain of {mhz(band)}: highest stated, {gain.high:g} dBi ({gain.where}); no loss taken off.",
        ),
        readings=(*power.readings, gain),
    )
    return computed if stated is None else _with_stated(computed, stated)


def _with_stated(computed: Radiated, stated: _StatedEirp) -> Radiated:
    """The higher of computed and stated EIRP, and a word on the other."""
    higher = stated.level_dbm > computed.eirp_dbm
    used = "used, being the higher" if higher else "not used, being the lower"
    note = f"EIRP stated as {claim(stated.reading)} beside {computed.eirp_dbm:.2f} dBm: the stated is {used}."
    label = f"EIRP as stated, {mhz(computed.band)}"
    step = Step(label, str(stated.reading.where), round(stated.level_dbm, 3), "dBm")
    return replace(
        computed,
        eirp_dbm=max(stated.level_dbm, computed.eirp_dbm),
        steps=(*computed.steps, step) if higher else computed.steps,
        assumptions=(*computed.assumptions, *stated.notes, note),
        readings=(*computed.readings, stated.reading),
    )


def _without_power(band: Band, gain: Reading, stated: _StatedEirp) -> Radiated:
    power_w = float(watts(stated.level_dbm - gain.high))
    formula = f"{stated.level_dbm:.2f} dBm − {gain.high:g} dBi"
    note = f"The power follows from EIRP {claim(stated.reading)} and gain {claim(gain)}; none is stated."
    return Radiated(
        band=band,
        power_w=power_w,
        gain_dbi=gain.high,
        eirp_dbm=stated.level_dbm,
        whole_panel=False,
        steps=(Step(f"Power implied, {mhz(band)}", formula, round(power_w, 3), "W"),),
        assumptions=(*stated.notes, note),
        readings=(stated.reading, gain),
    )


def _without_gain(band: Band, power: TransmitPower, stated: _StatedEirp) -> Radiated:
    gain_dbi = float(implied_gain_dbi(stated.level_dbm, power.nominal_w))
    formula = f"{stated.level_dbm:.2f} dBm − {dbm(power.nominal_w):.2f} dBm"
    note = f"The gain follows from EIRP {claim(stated.reading)} and the power; none is stated."
    return Radiated(
        band=band,
        power_w=power.nominal_w,
        gain_dbi=gain_dbi,
        eirp_dbm=stated.level_dbm,
        whole_panel=power.whole_panel,
        steps=(power.step, Step(f"Gain implied, {mhz(band)}", formula, round(gain_dbi, 3), "dBi")),
        assumptions=(*power.assumptions, *stated.notes, note),
        readings=(*power.readings, stated.reading),
    )


def _highest(panel: Panel, key: str, band: Band) -> Reading | None:
    return max(panel.all(key, band), key=lambda r: r.high, default=None)
