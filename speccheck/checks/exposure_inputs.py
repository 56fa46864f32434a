"""What an exposure calculation of one band stands on: power, highest gain, EIRP, each with its cells."""

from __future__ import annotations

from dataclasses import dataclass

from speccheck.checks.saying import claim, mhz
from speccheck.checks.transmit_power import TransmitPower, transmit_power
from speccheck.physics.power import dbm, eirp_dbm, implied_gain_dbi, watts
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
        power_w = float(watts(stated.level_dbm - gain.high))
        implied = Step(
            f"Power implied, {mhz(band)}",
            f"{stated.level_dbm:.2f} dBm − {gain.high:g} dBi",
            round(power_w, 3),
            "W",
        )
        note = f"The power follows from EIRP {claim(stated.reading)} and gain {claim(gain)}; none is stated."
        return Radiated(
            band=band,
            power_w=power_w,
            gain_dbi=gain.high,
            eirp_dbm=stated.level_dbm,
            whole_panel=False,
            steps=(implied,),
            assumptions=(*stated.notes, note),
            readings=(stated.reading, gain),
        )
    if stated is not None and power is not None:
        implied_dbi = float(implied_gain_dbi(stated.level_dbm, power.nominal_w))
        implied = Step(
            f"Gain implied, {mhz(band)}",
            f"{stated.level_dbm:.2f} dBm − {dbm(power.nominal_w):.2f} dBm",
            round(implied_dbi, 3),
            "dBi",
        )
        note = f"The gain follows from EIRP {claim(stated.reading)} and the power; none is stated."
        return Radiated(
            band=band,
            power_w=power.nominal_w,
            gain_dbi=implied_dbi,
            eirp_dbm=stated.level_dbm,
            whole_panel=power.whole_panel,
            steps=(power.step, implied),
            assumptions=(*power.assumptions, *stated.notes, note),
            readings=(*power.readings, stated.reading),
        )
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
    if eirp is not None:
        return _StatedEirp(eirp.high, eirp, ())
    if erp is not None:
        return _StatedEirp(erp.high + 2.15, erp, ("The stated ERP is raised by 2.15 dB to EIRP.",))
    return None


def _from_power(band: Band, power: TransmitPower, gain: Reading, stated: _StatedEirp | None) -> Radiated:
    level = float(eirp_dbm(power.nominal_w, gain.high))
    computed = Step(
        f"EIRP, {mhz(band)}", f"10·log10({power.nominal_w:.5g}) + 30 + {gain.high:g}", round(level, 3), "dBm"
    )
    cells = ", ".join(str(r.where) for r in power.readings)
    notes = [
        *power.assumptions,
        f"Power of {mhz(band)}: {power.nominal_w:.5g} W, {power.step.formula} ({cells}).",
    ]
    notes.append(f"Gain of {mhz(band)}: highest stated, {gain.high:g} dBi ({gain.where}); no loss taken off.")
    steps, readings = [power.step, computed], [*power.readings, gain]
    if stated is not None:
        readings.append(stated.reading)
        higher = stated.level_dbm > level
        used = "used, being the higher" if higher else "not used, being the lower"
        notes.append(
            f"EIRP stated as {stated.level_dbm:g} dBm ({stated.reading.where}) beside {level:.2f} dBm: "
            f"the stated one is {used}."
        )
        if higher:
            steps.append(
                Step(f"EIRP as stated, {mhz(band)}", str(stated.reading.where), stated.level_dbm, "dBm")
            )
            level = stated.level_dbm
    return Radiated(
        band=band,
        power_w=power.nominal_w,
        gain_dbi=gain.high,
        eirp_dbm=level,
        whole_panel=power.whole_panel,
        steps=tuple(steps),
        assumptions=tuple(notes),
        readings=tuple(readings),
    )


def _highest(panel: Panel, key: str, band: Band) -> Reading | None:
    return max(panel.all(key, band), key=lambda r: r.high, default=None)
