"""Innocent readings of bands, directions, weights, wind and distances. See `conventions`."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace

from speccheck.checks.innocent.conventions import Reach, Transform, innocent, marked, reread, scaled, shifted
from speccheck.records import Panel, Reading
from speccheck.standards import WORKERS

FULL_LOAD_OVER_TYPICAL = 1.8
"""Power drawn at full load over a typical, part-load figure (common practice)."""


def _texts(panel: Panel, keys: tuple[str, ...], reach: Reach, **conditions: float) -> Panel:
    """A panel with conditions added to readings of `keys`, texts included."""

    def one(reading: Reading) -> Reading:
        mine = reading.parameter in keys and reading.certain and reach.covers(reading)
        return replace(reading, at={**reading.at, **conditions}) if mine else reading

    return replace(panel, readings=tuple(one(r) for r in panel.readings))


@innocent(
    "port rating for one port in use at a time",
    "the power per port holds for all ports at the same time",
    "max_power_per_port",
)
def one_port_in_use(panel: Panel, reach: Reach) -> Panel:
    """The rating of a port not multiplied by their number."""
    return reread(panel, reach, ("max_power_per_port",), marked(one_port=1))


def _frequencies_times(factor: float) -> Transform:
    def change(panel: Panel, reach: Reach) -> Panel:
        keys = ("frequency_range", "operating_bands")
        return reread(panel, reach, keys, lambda r: marked(unit_reread=1)(scaled(factor)(r)))

    return change


for _unit, _factor in (("gigahertz", 1000.0), ("kilohertz", 0.001)):
    innocent(
        f"frequencies in {_unit}",
        f"the frequencies are in megahertz or {_unit}",
        "frequency_range",
        "operating_bands",
    )(_frequencies_times(_factor))


@innocent(
    "only part of the named band is offered",
    "the named band is offered in full or in part, in both directions",
    "operating_bands",
)
def part_of_band(panel: Panel, reach: Reach) -> Panel:
    """A named band counts as covered where the range overlaps it."""
    return _texts(panel, ("operating_bands",), reach, part_of_band=1)


@innocent(
    "table of sub-bands shortened",
    "the panel holds its figures outside the sub-bands printed as well",
    "frequency_range",
)
def table_shortened(panel: Panel, reach: Reach) -> Panel:
    """The headline range taken as it stands."""
    return _texts(panel, ("frequency_range",), reach, table_shortened=1)


@innocent(
    "uplink and downlink seen from the terminal",
    "transmit and receive are seen from the panel or from the terminal",
    "operating_bands",
    "frequency_range",
    "remarks",
)
def seen_from_terminal(panel: Panel, reach: Reach) -> Panel:
    """Uplink and downlink exchanged."""
    return _texts(panel, ("operating_bands", "frequency_range", "remarks"), reach, seen_from_terminal=1)


@innocent(
    "front-to-back ratio co-polar at 180°",
    "the front-to-back ratio is co-polar at 180° or total power within 180° ± 30°",
    "front_to_back_ratio",
)
def co_polar_at_180(panel: Panel, reach: Reach) -> Panel:
    """The milder, older definition."""
    return reread(panel, reach, ("front_to_back_ratio",), marked(co_polar_only=1))


@innocent(
    "cross-polar discrimination on axis",
    "the cross-polar discrimination holds on axis or over the sector",
    "cross_polar_discrimination",
    "cross_polar_sector",
)
def cross_polar_on_axis(panel: Panel, reach: Reach) -> Panel:
    """The figure taken at boresight."""
    return reread(panel, reach, ("cross_polar_discrimination", "cross_polar_sector"), marked(angle_deg=0))


@innocent(
    "cut through the beam peak",
    "the horizontal cut goes through the beam peak or lies on the horizon",
    "horizontal_beamwidth",
)
def cut_through_beam(panel: Panel, reach: Reach) -> Panel:
    """The word 'horizon' taken as a habit of the file format."""
    return reread(panel, reach, ("horizontal_beamwidth",), marked(through_beam=1))


def _at_wind_speed(kmh: float) -> Transform:
    def change(panel: Panel, reach: Reach) -> Panel:
        keys = ("wind_load", "wind_load_lateral", "wind_load_rear", "wind_load_max")
        return reread(panel, reach, keys, marked(wind_speed_mps=kmh / 3.6))

    return change


for _kmh in (100, 120, 130, 160, 200):
    innocent(
        f"wind load at {_kmh} km/h",
        "the wind load holds at the speed stated or at another",
        "wind_load",
        "wind_load_lateral",
    )(_at_wind_speed(_kmh))


@innocent(
    "wind load with a rounded body in a wind tunnel",
    "the wind load was measured in a wind tunnel, and without brackets",
    "wind_load",
)
def measured_in_tunnel(panel: Panel, reach: Reach) -> Panel:
    """A drag down to that of a rounded body taken as usual."""
    return reread(panel, reach, ("wind_load", "wind_load_lateral"), marked(wind_tunnel=1))


@innocent("weight without the radio", "the weight includes the radio and the brackets", "weight")
def weight_without_radio(panel: Panel, reach: Reach) -> Panel:
    """The weight taken for the antenna part alone."""
    return reread(panel, reach, ("weight",), marked(without_radio=1))


@innocent(
    "power consumption at part load",
    "the power consumption is typical, at part load, or the highest",
    "power_consumption",
)
def consumption_at_part_load(panel: Panel, reach: Reach) -> Panel:
    """1.8 times the stated consumption."""
    return reread(panel, reach, ("power_consumption",), scaled(FULL_LOAD_OVER_TYPICAL))


@innocent("bare decibels are dBi", "the gain is in dBi or dBd", "gain")
def bare_decibels_isotropic(panel: Panel, reach: Reach) -> Panel:
    """The figure taken against an isotropic radiator."""
    return reread(panel, reach, ("gain",), _with_unit("dBi"))


@innocent("bare decibels are dBd", "the gain is in dBi or dBd", "gain")
def bare_decibels_dipole(panel: Panel, reach: Reach) -> Panel:
    """The figure taken against a half-wave dipole, 2.15 dB more in dBi."""
    return reread(panel, reach, ("gain",), lambda r: shifted(2.15)(_with_unit("dBd")(r)) if _bare(r) else r)


def _bare(reading: Reading) -> bool:
    return reading.stated_unit in ("", "dB")


def _with_unit(unit: str) -> Callable[[Reading], Reading]:
    return lambda reading: replace(reading, stated_unit=unit) if _bare(reading) else reading


@innocent("distance for workers", "the stated distance is for workers or the public", "compliance_distance")
def distance_for_workers(panel: Panel, reach: Reach) -> Panel:
    """The distance held against the workers' level."""
    return reread(panel, reach, ("compliance_distance",), lambda r: replace(r, condition=WORKERS))


def _with_time_factor(factor: float) -> Transform:
    def change(panel: Panel, reach: Reach) -> Panel:
        return reread(panel, reach, ("compliance_distance",), marked(time_factor=factor))

    return change


for _share, _name in (
    (0.75, "distance at a downlink share of 75 %"),
    (0.25, "distance at an actual-maximum factor of 0.25"),
    (0.1875, "distance at 75 % downlink share and an actual-maximum factor of 0.25"),
):
    innocent(
        _name, "the stated distance holds a time factor or an actual-maximum factor", "compliance_distance"
    )(_with_time_factor(_share))
