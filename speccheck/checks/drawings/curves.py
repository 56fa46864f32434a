"""The numbers behind the figures of a report: modelled curves and stated marks, judged nowhere.

`panel_drawings` never raises for odd figures: what a model cannot be made for is not drawn.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

import numpy as np

from speccheck.checks.drawings.cut_curves import cut_drawings
from speccheck.checks.drawings.feed_curves import eirp_ladder, port_grid, port_map
from speccheck.checks.model import Model, model_of
from speccheck.checks.registry import Case
from speccheck.checks.saying import mhz
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.physics.grating import entry_freq_hz, lattice_entry_freq_hz
from speccheck.physics.layout import Lattice
from speccheck.records import Band, CellRef, Curve, Drawing, Finding, Panel, Reading, Settings

_EDGE_POINTS = 13
_DECIMALS = 4
_BOTTOM_MHZ, _TOP_MHZ = 10.0, 300e3
_MOST_LOBES = 12
_MOST_ROWS = 512
_NARROWEST_WL, _WIDEST_WL = 0.01, 20.0
_STEEPEST_DEG = 89.0
"""Beyond these a figure shows a slip of the pen, which the checks report, and no array."""


def panel_drawings(panel: Panel, settings: Settings, findings: Sequence[Finding]) -> tuple[Drawing, ...]:
    """Drawings of every band of a panel, and of the panel as a whole.

    Parameters
    ----------
    panel : the panel as read
    settings : the buyer's settings
    findings : what the checks said; their expected intervals are marked in the cuts
    """
    drawings: list[Drawing] = []
    for band in panel.bands:
        model, steering = _model(Case(panel, band, settings)), Steering(panel, band)
        if model is not None and steering.possible:
            drawings += [*_spacing(model, steering), *_steering_map(model, steering)]
            drawings += cut_drawings(panel, model, steering.tilts_deg, steering.scan_deg, findings)
            drawings += port_grid(panel, model)
        drawings += eirp_ladder(panel, band)
    return (*drawings, *port_map(panel))


def _model(case: Case) -> Model | None:
    """The array of a band, when it can be drawn: counts and frequencies that a panel can have."""
    try:
        model = model_of(case)
    except ValueError:
        return None
    if not isinstance(model, Model) or not _BOTTOM_MHZ <= model.band[0] <= model.band[1] <= _TOP_MHZ:
        return None
    layout = model.layout
    planes = (
        (layout.rows, model.vertical_pitch_wl(model.high_hz)),
        (layout.columns, model.horizontal_pitch_wl(model.high_hz)),
    )
    drawable = all(
        n == 1 or (n <= _MOST_ROWS and _NARROWEST_WL <= pitch <= _WIDEST_WL) for n, pitch in planes
    )
    return model if drawable else None


class Steering:
    """Claimed tilt and azimuth range of one band [deg], with the cells they stand in."""

    def __init__(self, panel: Panel, band: Band) -> None:
        self.readings: list[Reading] = []
        tilt = self._first(panel, band, ("electrical_tilt", "vertical_scan"))
        scan = self._first(panel, band, ("horizontal_scan",))
        self.tilts_deg = (tilt.low, tilt.high) if tilt else (0.0, 0.0)
        self.scan_deg = max(abs(scan.low), abs(scan.high)) if scan else 0.0

    def _first(self, panel: Panel, band: Band, keys: tuple[str, ...]) -> Reading | None:
        found = (panel.get(key, band) for key in keys)
        reading = next((r for r in found if r is not None and not isinstance(r.value, str)), None)
        if reading is not None:
            self.readings.append(reading)
        return reading

    @property
    def possible(self) -> bool:
        """Whether the angles are ones that a panel can steer to."""
        return self.largest_tilt_deg <= _STEEPEST_DEG and self.scan_deg <= _STEEPEST_DEG

    @property
    def where(self) -> tuple[CellRef, ...]:
        """Cells of the ranges."""
        return tuple(r.where for r in self.readings)

    @property
    def largest_tilt_deg(self) -> float:
        """Largest angle from the panel normal in the vertical plane [deg]."""
        return max(abs(t) for t in self.tilts_deg)


def _spacing(model: Model, steering: Steering) -> Iterator[Drawing]:
    """Spacing in wavelengths over the band against the limit of the claimed steering, for each plane."""
    layout = model.layout
    triangular = layout.lattice is Lattice.TRIANGULAR and layout.rows > 1 and layout.columns > 1
    planes = [
        ("vertical", layout.rows, layout.vertical_pitch_m, steering.largest_tilt_deg),
        ("horizontal", layout.columns, layout.horizontal_pitch_m, steering.scan_deg),
    ]
    shown = [plane for plane in planes if plane[1] > 1]
    if not shown:
        return
    common = _triangular_entry_hz(model, steering) if triangular else None
    marks: dict[str, float] = {}
    curves, said = [], []
    for name, _, pitch, angle in shown:
        over = [pitch * f * 1e6 / SPEED_OF_LIGHT_MPS for f in model.band]
        curves.append(_curve(f"{name}, {pitch * 1000:.4g} mm", model.band, over, "MHz", "λ"))
        entry_hz = common or float(entry_freq_hz(pitch, angle))
        limit, crossing = pitch * entry_hz / SPEED_OF_LIGHT_MPS, entry_hz / 1e6
        marks |= {f"limit_{name}_wl": limit, f"angle_{name}_deg": angle, f"crossing_{name}_mhz": crossing}
        said.append(f"{name} spacing {_against(limit, crossing, model.band)} for {angle:.3g}° of steering")
    text = f"{mhz(model.band)}: " + "; ".join(
        f"{name} {c.y[0]:.2f}λ at {c.x[0]:.0f} MHz to {c.y[1]:.2f}λ at {c.x[1]:.0f} MHz"
        for (name, *_), c in zip(shown, curves, strict=True)
    )
    title = "; ".join(said)
    yield Drawing(
        kind="spacing",
        title=title[0].upper() + title[1:],
        text=f"{text}. Above the limit the centre of a grating lobe is in visible space."
        + (
            " Both limits are those of the triangular lattice, which a lobe enters at one frequency."
            if triangular
            else ""
        ),
        band=model.band,
        curves=tuple(curves),
        marks=marks,
        where=_cells(model, steering),
    )


def _against(limit: float, crossing: float, band: Band) -> str:
    """Where a spacing stands against its limit [wavelengths], reached at a frequency [MHz]."""
    if crossing >= band[1]:
        return f"stays below its limit of {limit:.2f}λ"
    where = "in the whole band" if crossing <= band[0] else f"from {crossing:.0f} MHz on"
    return f"is above its limit of {limit:.2f}λ {where}"


def _triangular_entry_hz(model: Model, steering: Steering) -> float:
    """Frequency at which the first lobe of a triangular lattice enters for some beam of the claimed range."""
    u_step, v_step = 1 / model.layout.horizontal_pitch_m, 1 / model.layout.vertical_pitch_m
    return lattice_entry_freq_hz(
        list(_lattice_points(u_step, v_step, triangular=True)), np.stack(_range_outline(steering), axis=1)
    )


def _steering_map(model: Model, steering: Steering) -> Iterator[Drawing]:
    """Steering range and its grating lobes in direction cosines at the band top: u to the side, v upwards."""
    layout = model.layout
    wavelength = SPEED_OF_LIGHT_MPS / model.high_hz
    u_step = wavelength / layout.horizontal_pitch_m if layout.columns > 1 else np.inf
    v_step = wavelength / layout.vertical_pitch_m if layout.rows > 1 else np.inf
    if not (np.isfinite(u_step) or np.isfinite(v_step)):
        return
    outline = _range_outline(steering)
    inside = _range_points(steering)
    curves = [_curve("claimed steering", *outline, "u", "v")]
    seen = 0
    for u, v in _lattice_points(u_step, v_step, layout.lattice is Lattice.TRIANGULAR):
        visible = bool((np.hypot(inside[0] + u, inside[1] + v) <= 1).any())
        if visible or np.hypot(outline[0] + u, outline[1] + v).min() <= 1.6:
            curves.append(_curve("grating lobe", outline[0] + u, outline[1] + v, "u", "v"))
        seen += visible
    curves += _subarray_lobes(model, outline)
    low, high = steering.tilts_deg
    span = f"tilt {low:.3g}° to {high:.3g}°".replace("-", "−")
    span += f", azimuth ±{steering.scan_deg:.3g}°" if steering.scan_deg else ""
    at = f"{model.band[1]:.0f} MHz"
    title = (
        f"At {at} grating lobes reach visible space within the claimed steering"
        if seen
        else f"At {at} no grating lobe centre reaches visible space within the claimed steering"
    )
    yield Drawing(
        kind="steering-map",
        title=title,
        text=f"Element lattice at {at}, {span}: {_lobes(seen)} with the centre inside the circle of visible "
        f"directions for some beam of that range. {_of_subarrays(model)}Levels are "
        "computed in the checks.",
        band=model.band,
        curves=tuple(curves),
        marks={"lobes_seen": float(seen)},
        where=_cells(model, steering),
    )


def _subarray_lobes(model: Model, outline: tuple[np.ndarray, np.ndarray]) -> list[Curve]:
    """Lobes of the lattice of sub-arrays near visible space, those of the elements left out.

    Source: quantisation lobes of an array of sub-arrays stand at sin θ + n·λ/D (R. J. Mailloux, Phased Array
    Antenna Handbook, ch. 7).
    """
    layout = model.layout
    rows, columns = _grouped(model)
    if layout.lattice is Lattice.TRIANGULAR:
        return []
    wavelength = SPEED_OF_LIGHT_MPS / model.high_hz
    u_step = wavelength / (layout.horizontal_pitch_m * columns) if layout.columns > columns else np.inf
    v_step = wavelength / (layout.vertical_pitch_m * rows) if layout.rows > rows else np.inf
    own = [
        (i * u_step if i else 0.0, j * v_step if j else 0.0)
        for i in _orders(u_step if columns > 1 else np.inf)
        for j in _orders(v_step if rows > 1 else np.inf)
        if i % columns or j % rows
    ]
    return [
        _curve("sub-array lobe", outline[0] + u, outline[1] + v, "u", "v")
        for u, v in own
        if np.hypot(outline[0] + u, outline[1] + v).min() <= 1
    ]


def _grouped(model: Model) -> tuple[int, int]:
    """Rows and columns of a sub-array, 1 along an axis where they fill the whole array."""
    layout = model.layout
    rows = layout.subarray_rows if layout.subarray_rows < layout.rows else 1
    return rows, layout.subarray_columns if layout.subarray_columns < layout.columns else 1


def _orders(step: float) -> range:
    """Orders of lobes that can reach visible space from any beam."""
    most = min(int(2 / step), _MOST_LOBES) if np.isfinite(step) else 0
    return range(-most, most + 1)


def _of_subarrays(model: Model) -> str:
    rows, columns = _grouped(model)
    if rows * columns == 1:
        return ""
    if model.layout.lattice is Lattice.TRIANGULAR:
        return "Lobes of sub-arrays of a triangular lattice are not drawn. "
    return (
        f"Sub-arrays of {rows} × {columns} bring lobes of their own, dotted here, weakened by the pattern of "
        "the sub-array. "
    )


def _lobes(count: int) -> str:
    return "no lobe" if count == 0 else f"{count} lobe{'s' if count > 1 else ''}"


def _lattice_points(u_step: float, v_step: float, triangular: bool) -> Iterator[tuple[float, float]]:
    """Nearest lobes around a beam, itself left out."""
    for i in (-2, -1, 0, 1, 2) if np.isfinite(u_step) else (0,):
        for j in (-2, -1, 0, 1, 2) if np.isfinite(v_step) else (0,):
            if i or j:
                u = i * u_step if i else 0.0
                v = (j - (i / 2 if triangular else 0.0)) * v_step if np.isfinite(v_step) else 0.0
                yield u, v


def _range_outline(steering: Steering) -> tuple[np.ndarray, np.ndarray]:
    tilts = np.radians(np.linspace(*steering.tilts_deg, _EDGE_POINTS))
    scans = np.radians(np.linspace(-steering.scan_deg, steering.scan_deg, _EDGE_POINTS))
    tilt = np.concatenate([np.full_like(scans, tilts[0]), tilts, np.full_like(scans, tilts[-1]), tilts[::-1]])
    scan = np.concatenate([scans, np.full_like(tilts, scans[-1]), scans[::-1], np.full_like(tilts, scans[0])])
    return np.cos(tilt) * np.sin(scan), -np.sin(tilt)


def _range_points(steering: Steering) -> tuple[np.ndarray, np.ndarray]:
    tilts = np.radians(np.linspace(*steering.tilts_deg, _EDGE_POINTS))[:, None]
    scans = np.radians(np.linspace(-steering.scan_deg, steering.scan_deg, 2 * _EDGE_POINTS + 1))[None, :]
    u = np.cos(tilts) * np.sin(scans)
    return u.ravel(), np.broadcast_to(-np.sin(tilts), u.shape).ravel()


def _curve(
    name: str, x: Sequence[float] | np.ndarray, y: Sequence[float] | np.ndarray, x_unit: str, y_unit: str
) -> Curve:
    return Curve(name=name, x=_rounded(x), y=_rounded(y), x_unit=x_unit, y_unit=y_unit)


def _rounded(values: Sequence[float] | np.ndarray) -> tuple[float, ...]:
    return tuple(round(float(v), _DECIMALS) for v in values)


def _cells(model: Model, steering: Steering) -> tuple[CellRef, ...]:
    return tuple(dict.fromkeys((*(r.where for r in model.used), *steering.where)))
