"""The total average radio power of a panel as its own figures give it, with the way it was reached."""

from __future__ import annotations

import re
from dataclasses import dataclass

from speccheck.checks.cell_text import half_digit, words
from speccheck.records import Band, Panel, Reading, Step

_PER = r"(?:\b(?:per|each|pro|je|par|por|na)\b|/)\s*"
_PER_POLARISATION = re.compile(_PER + r"pol")
_PER_PORT = re.compile(_PER + r"(?:port|path|branch|trx|tx\b|transceiver|connector|channel)")
_MOST_CARRIERS = 32
_PER_CARRIER = re.compile(_PER + r"(?:carrier|träger|porteuse|portadora)")


_CARRIERS = re.compile(r"(\d+)\s*(?:carriers|träger|porteuses|portadoras)")


def per_polarisation(reading: Reading) -> bool:
    """Whether the words beside a figure say that it holds for one polarisation."""
    return bool(_PER_POLARISATION.search(words(reading)))


def parts_of_total(reading: Reading) -> tuple[float, str] | None:
    """How many such parts make the total, and of what; None where the words leave that open.

    A figure per carrier needs the number of carriers; one per port is no share of a total EIRP, because the
    ports add in phase.
    """
    said = words(reading)
    if _PER_PORT.search(said):
        return None
    if _PER_CARRIER.search(said):
        counted = _CARRIERS.search(said)
        return (float(counted[1]), "carriers") if counted and 1 <= int(counted[1]) <= _MOST_CARRIERS else None
    return (2.0, "polarisations") if per_polarisation(reading) else (1.0, "")


@dataclass(frozen=True, slots=True, kw_only=True)
class TransmitPower:
    """Power over all ports and both polarisations [W]; `input_rating` where it is what ports accept.

    `low_w` and `high_w` span tolerance and rounding. `whole_panel` where power or ports are stated once for
    a panel that has several bands.
    """

    nominal_w: float
    low_w: float
    high_w: float
    step: Step
    assumptions: tuple[str, ...]
    readings: tuple[Reading, ...]
    input_rating: bool
    whole_panel: bool


def transmit_power(panel: Panel, band: Band | None) -> TransmitPower | None:
    """The total power of a band, from the most direct statement there is; None where none is stated.

    In this order: conducted power of all transmitters; transceivers × power of one; the rating of the whole
    panel; ports × rating of one port.
    """
    found = (
        _stated_total(panel, band, "conducted_power"),
        _product(panel, band, "power_per_transceiver", ("transceivers", "rf_ports")),
        _stated_total(panel, band, "max_power_total"),
        _product(panel, band, "max_power_per_port", ("ports_per_band", "rf_ports")),
    )
    return next((power for power in found if power is not None), None)


def _stated_total(panel: Panel, band: Band | None, key: str) -> TransmitPower | None:
    power = panel.get(key, band)
    if power is None:
        return None
    said = words(power)
    if _PER_PORT.search(said):
        count = panel.get("transceivers", band) or panel.get("rf_ports", band)
        return None if count is None else _times(panel, power, count.nominal, "ports", (count,))
    parts = parts_of_total(power)
    return None if parts is None else _times(panel, power, *parts, ())


def _product(panel: Panel, band: Band | None, key: str, counts: tuple[str, ...]) -> TransmitPower | None:
    power = panel.get(key, band)
    count = next((r for c in counts if (r := panel.get(c, band)) is not None), None)
    if power is None or count is None:
        return None
    return _times(panel, power, count.nominal, "transceivers" if "transceiver" in key else "ports", (count,))


def _times(
    panel: Panel, power: Reading, count: float, of: str, counted: tuple[Reading, ...]
) -> TransmitPower:
    slack = 0.0 if power.tolerance else half_digit(power)
    rating = power.parameter.startswith("max_power")
    formula = f"{count:g} {of} × {power.nominal:.5g} W" if of else f"{power.nominal:.5g} W as stated"
    return TransmitPower(
        nominal_w=count * power.nominal,
        low_w=count * max(power.low - slack, 0.0),
        high_w=count * (power.high + slack),
        step=Step(
            "Total power, all ports and both polarisations", formula, round(count * power.nominal, 4), "W"
        ),
        assumptions=tuple(_assumed(power, of, rating)),
        readings=(power, *counted),
        input_rating=rating,
        whole_panel=len(panel.bands) > 1 and any(r.band is None for r in (power, *counted)),
    )


def _assumed(power: Reading, of: str, rating: bool) -> list[str]:
    said = []
    if rating:
        said.append("The panel is driven at the full input power its ports are rated for.")
    if of:
        said.append(f"The power stated for one of the {of} applies to each of them at the same time.")
    if _PER_CARRIER.search(words(power)):
        said.append("Power is stated per carrier; one carrier is counted, more carriers add.")
    return said
