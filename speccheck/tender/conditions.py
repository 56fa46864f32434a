"""Whether an offered figure was stated under the conditions demanded, and what to do where it was not.

A figure under kinder conditions than demanded proves a fail but no pass, under harsher ones the
reverse; wind load is scaled with the square of the speed and marked as derived.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from speccheck.physics.wind import scaled_force_n
from speccheck.records import Panel, Reading, Requirement

_SAME_SHARE = 0.01
_SECTOR_EDGE_DEG = 60.0
_CO_POLAR = ("co-polar", "copolar", "co polar", "co-pol", "180° only")


@dataclass(frozen=True, slots=True)
class Comparable:
    """A reading as comparable to a demand: factor to apply, notes, and why the difference could decide.

    `kinder` True: stated under kinder conditions; False: harsher; None: neither is known.
    """

    reading: Reading
    factor: float = 1.0
    note: str = ""
    differs: str = ""
    kinder: bool | None = None


def comparable(requirement: Requirement, reading: Reading, panel: Panel) -> Comparable:
    """One reading held against the conditions of a requirement."""
    if "wind_speed_mps" in requirement.at:
        return _wind(requirement, reading, panel)
    if "carrier_dbm" in requirement.at:
        return _carriers(requirement, reading, panel)
    if requirement.parameter == "front_to_back_ratio":
        return _front_to_back(requirement, reading, panel)
    if "angle_deg" in requirement.at and requirement.parameter.startswith("cross_polar"):
        return _cross_polar(requirement, reading)
    return _wider_band(requirement, reading)


def at_demanded_tilt(requirement: Requirement, readings: Sequence[Reading]) -> tuple[Reading, ...]:
    """The readings of the tilt demanded, where both the requirement and the offer name tilts."""
    asked = requirement.at.get("tilt_deg")
    if asked is None:
        return tuple(readings)
    there = tuple(r for r in readings if r.at.get("tilt_deg", asked) == asked)
    return there or tuple(readings)


def _wind(requirement: Requirement, reading: Reading, panel: Panel) -> Comparable:
    asked = requirement.at["wind_speed_mps"]
    speed = reading.at.get("wind_speed_mps")
    if speed is None:
        general = panel.get("wind_load_speed")
        speed = general.nominal if general is not None else None
    if speed is None or speed <= 0:
        return Comparable(reading, differs="the wind speed of the load is not stated")
    if abs(speed - asked) <= _SAME_SHARE * asked:
        return Comparable(reading)
    factor = float(scaled_force_n(1.0, speed, asked))
    note = (
        f"derived: stated at {speed * 3.6:.0f} km/h, scaled with v² by {factor:.2f} to {asked * 3.6:.0f} km/h"
    )
    return Comparable(reading, factor=factor, note=note)


def _carriers(requirement: Requirement, reading: Reading, panel: Panel) -> Comparable:
    asked = requirement.at["carrier_dbm"]
    power = reading.at.get("carrier_dbm")
    if power is None:
        general = panel.get("pim_test_power", reading.band)
        power = general.nominal if general is not None else None
    if power is None:
        return Comparable(reading, note=f"test power not stated; taken as 2 × {asked:g} dBm")
    if abs(power - asked) < 0.1:
        return Comparable(reading)
    differs = f"stated at 2 × {power:g} dBm, demanded at 2 × {asked:g} dBm: not comparable"
    return Comparable(reading, differs=differs, kinder=power < asked)


def _front_to_back(requirement: Requirement, reading: Reading, panel: Panel) -> Comparable:
    definition = panel.get("front_to_back_definition", reading.band)
    words = f"{reading.condition} {definition.raw if definition else ''} {reading.raw}".casefold()
    if "total power" in requirement.scope and any(word in words for word in _CO_POLAR):
        differs = "stated co-polar, demanded as total power: another quantity"
        return Comparable(reading, differs=differs, kinder=True)
    if "total power" in requirement.scope and "total" not in words:
        return Comparable(reading, note="definition not stated; taken as the demanded one")
    return Comparable(reading)


def _cross_polar(requirement: Requirement, reading: Reading) -> Comparable:
    asked = abs(requirement.at["angle_deg"])
    on_sector = reading.parameter == "cross_polar_sector"
    angle = abs(reading.at.get("angle_deg", _SECTOR_EDGE_DEG if on_sector else 0.0))
    if abs(angle - asked) < 1.0:
        return Comparable(reading)
    differs = f"stated at {angle:g}°, demanded at {asked:g}°"
    return Comparable(reading, differs=differs, kinder=angle < asked)


def _wider_band(requirement: Requirement, reading: Reading) -> Comparable:
    if reading.band is None or not requirement.bands:
        return Comparable(reading)
    if any(low <= reading.band[0] and reading.band[1] <= high for low, high in requirement.bands):
        return Comparable(reading)
    differs = f"stated for {reading.band[0]:g}-{reading.band[1]:g} MHz, which is wider than the band demanded"
    return Comparable(reading, differs=differs, kinder=False)
