"""Distances around a panel: the recomputed pattern, swept over tilt and scan, set to the highest EIRP."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import product

import numpy as np
from numpy.typing import NDArray

from speccheck.checks.cell_text import listed
from speccheck.checks.desk.exposure_inputs import Radiated
from speccheck.checks.desk.exposure_rows import Frame
from speccheck.checks.model import SECTOR_COLUMN_AZ_DEG, Lacking, Model, model_of
from speccheck.checks.registry import Case
from speccheck.checks.saying import label, mhz
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS, ratio
from speccheck.physics.element import SectorElement
from speccheck.physics.exposure import distance_m, round_up_m
from speccheck.physics.zones import envelope_dbi
from speccheck.records import ExposureZone, Panel, Settings
from speccheck.standards import BASES, POPULATIONS, PUBLIC, WHOLE_BODY

Floats = NDArray[np.float64]

_PLANAR_ELEMENT_AZ_DEG = 80.0
_WIDTHS_DEG = (20.0, 120.0)
_FLOOR_DB = 20.0
"""No direction is taken lower under the beam than this, or than a smaller stated front-to-back ratio."""
_COARSE_DEG = 5.0
_FINE_DEG = 1.0
_BESIDE_BEAM_DEG = 12.0
_MOST_STEPS = 24


@dataclass(frozen=True, slots=True)
class _Cuts:
    """Power relative to the strongest direction [1] over elevation and azimuth [deg], both full circles."""

    elevation_deg: Floats
    side: Floats
    azimuth_deg: Floats
    top: Floats
    tilts_deg: tuple[float, ...]
    scans_deg: tuple[float, ...]
    mechanical_deg: tuple[float, ...]
    floor_db: float


def zones(
    panel: Panel, sources: tuple[Radiated, ...], frame: Frame
) -> tuple[tuple[ExposureZone, ...], tuple[str, ...]]:
    """Zones of every band, population and averaging kind, and the assumptions of the model.

    A band whose array is not stated well enough to be modelled has no zone; the assumptions say what lacks.
    """
    found: list[ExposureZone] = []
    said: list[str] = []
    for source in sources:
        model = model_of(Case(panel, source.band, Settings()))
        if isinstance(model, Lacking):
            names = listed(tuple(label(key) for key in model.missing))
            said.append(f"No distances around the panel for {mhz(source.band)}: {names} not stated.")
            continue
        cuts = _cuts(panel, source, model)
        said += [_words(source, cuts), *model.assumptions]
        for population, basis in product(POPULATIONS, BASES):
            level = frame.level(source, population, basis)
            if level is not None:
                front = float(distance_m(source.eirp_w, level[1].value_w_m2, frame.reflection))
                found.append(_zone(source, cuts, population, basis, front))
    return tuple(found), tuple(dict.fromkeys(said))


def _cuts(panel: Panel, source: Radiated, model: Model) -> _Cuts:
    tilts = _ends(panel, source, ("electrical_tilt", "vertical_scan"))
    scans = _ends(panel, source, ("horizontal_scan",))
    wavelength_m = SPEED_OF_LIGHT_MPS / model.centre_hz
    steps_down = _sweep(tilts, wavelength_m / max(model.layout.height_m, wavelength_m))
    steps_across = _sweep(scans, wavelength_m / max(model.layout.width_m, wavelength_m))
    ahead = min(steps_across, key=abs)
    element = SectorElement(az_hpbw_deg=_element_width_deg(panel, source, model))
    elevation, azimuth = _circle(tuple(-t for t in tilts)), _circle(scans)
    side = envelope_dbi(
        model.layout,
        element,
        model.centre_hz,
        list(product(steps_down, dict.fromkeys((*scans, ahead)))),
        theta_deg=np.degrees(np.arccos(np.sin(np.radians(elevation)))),
        phi_deg=np.where(np.abs(elevation) > 90, 180.0, 0.0),
    )
    cone = np.full_like(azimuth, 90 + float(np.mean(tilts)))
    across = list(product(dict.fromkeys((*tilts, float(np.mean(tilts)))), steps_across))
    top = envelope_dbi(model.layout, element, model.centre_hz, across, theta_deg=cone, phi_deg=azimuth)
    floor_db = min([_FLOOR_DB, *(r.low for r in panel.all("front_to_back_ratio", source.band))])
    floor = float(ratio(-floor_db))
    return _Cuts(
        elevation_deg=elevation,
        side=np.maximum(ratio(side - side.max()), floor),
        azimuth_deg=azimuth,
        top=np.maximum(ratio(top - top.max()), floor),
        tilts_deg=tilts,
        scans_deg=scans,
        mechanical_deg=_ends(panel, source, ("mechanical_tilt",)),
        floor_db=floor_db,
    )


def _ends(panel: Panel, source: Radiated, keys: tuple[str, ...]) -> tuple[float, ...]:
    """The two ends of a stated steering range [deg], or straight ahead where none is stated."""
    reading = next((r for key in keys if (r := panel.get(key, source.band)) is not None), None)
    if reading is None or isinstance(reading.value, str):
        return (0.0,)
    return tuple(sorted({reading.low, reading.high}))


def _sweep(ends_deg: tuple[float, ...], beam_rad: float) -> tuple[float, ...]:
    """Beams from one end of a range to the other [deg], at most half a beam width apart."""
    low, high = ends_deg[0], ends_deg[-1]
    steps = int(np.clip(np.ceil((high - low) / (np.degrees(beam_rad) / 2)), 1, _MOST_STEPS))
    return tuple(np.linspace(low, high, steps + 1).tolist()) if high > low else ends_deg


def _element_width_deg(panel: Panel, source: Radiated, model: Model) -> float:
    width = panel.get("horizontal_beamwidth", source.band)
    if model.layout.columns > 1:
        return _PLANAR_ELEMENT_AZ_DEG
    if width is None or isinstance(width.value, str):
        return SECTOR_COLUMN_AZ_DEG
    return float(np.clip(width.nominal, *_WIDTHS_DEG))


def _circle(beams_deg: tuple[float, ...]) -> Floats:
    """Angles once around [deg]: coarse, and fine beside and between the beams."""
    low, high = min(beams_deg) - _BESIDE_BEAM_DEG, max(beams_deg) + _BESIDE_BEAM_DEG
    coarse = np.arange(-180.0, 180.0 + _COARSE_DEG, _COARSE_DEG)
    fine = np.arange(np.floor(low), np.ceil(high) + _FINE_DEG, _FINE_DEG)
    # sorted here: numpy's `unique` would load the masked arrays, which takes as long as both zones
    angles = np.array(sorted({*coarse.tolist(), *fine.tolist(), *beams_deg}))
    return angles[(angles >= -180) & (angles <= 180)]


def _zone(source: Radiated, cuts: _Cuts, population: str, basis: str, front_m: float) -> ExposureZone:
    elevation, azimuth = np.radians(cuts.elevation_deg), np.radians(cuts.azimuth_deg)
    side, top = front_m * np.sqrt(cuts.side), front_m * np.sqrt(cuts.top)
    leant = [elevation - np.radians(tilt) for tilt in cuts.mechanical_deg]
    ahead, up = np.array([[side * np.cos(e), side * np.sin(e)] for e in leant]).swapaxes(0, 1)
    outline = population == PUBLIC and basis == WHOLE_BODY
    return ExposureZone(
        band=source.band,
        population=population,
        basis=basis,
        front_m=_up(front_m),
        above_m=_up(up.max()),
        below_m=_up(-up.min()),
        beside_m=_up(np.abs(top * np.sin(azimuth)).max()),
        behind_m=_up(max(-ahead.min(), -(top * np.cos(azimuth)).min())),
        tilts_deg=cuts.tilts_deg,
        scans_deg=cuts.scans_deg,
        side_view=_outline(ahead[0], up[0]) if outline else (),
        top_view=_outline(top * np.cos(azimuth), top * np.sin(azimuth)) if outline else (),
    )


def _outline(x: Floats, y: Floats) -> tuple[tuple[float, float], ...]:
    return tuple((round(float(a), 2), round(float(b), 2)) for a, b in zip(x, y, strict=True))


def _up(distance: float) -> float:
    return round(float(round_up_m(max(float(distance), 0.0))), 1)


def _words(source: Radiated, cuts: _Cuts) -> str:
    tilts = " to ".join(f"{t:g}°" for t in cuts.tilts_deg)
    scans = " to ".join(f"{s:g}°" for s in cuts.scans_deg)
    mechanical = " to ".join(f"{m:g}°" for m in cuts.mechanical_deg)
    return (
        f"Around the panel, {mhz(source.band)}: pattern expected of the stated array at mid band, not "
        f"measured; strongest "
        f"direction at the highest EIRP; tilt {tilts}, azimuth {scans}; no direction lower than "
        f"{cuts.floor_db:g} dB under the beam; mechanical tilt {mechanical}; principal cuts."
    )
