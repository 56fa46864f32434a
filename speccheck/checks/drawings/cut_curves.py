"""Modelled pattern cuts of one band: what the stated geometry lets expect, never a measurement."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

import numpy as np
from numpy.typing import NDArray

from speccheck.checks.model import SECTOR_COLUMN_AZ_DEG, Model
from speccheck.checks.saying import mhz
from speccheck.physics.element import SectorElement
from speccheck.physics.pattern import power_pattern
from speccheck.physics.states import array_states
from speccheck.records import Band, Curve, Drawing, Finding, Panel, Reading

FLOOR_DB = -30.0
"""Depth of the cuts: below it the model, which has no coupling and no tolerances, says nothing."""

_STEP_DEG = 0.5
_WIDEST_COLUMN_DEG = 120.0
_FULL_CIRCLE_DEG = 360.0


def cut_drawings(
    panel: Panel,
    model: Model,
    tilts_deg: tuple[float, float],
    scan_deg: float,
    findings: Sequence[Finding],
) -> Iterator[Drawing]:
    """Vertical cut at least, middle and greatest tilt; horizontal cut at boresight and largest scan."""
    element = SectorElement(az_hpbw_deg=_column_width_deg(panel, model))
    yield _vertical(panel, model, element, tilts_deg, findings)
    yield _horizontal(panel, model, element, sum(tilts_deg) / 2, scan_deg, findings)


def _column_width_deg(panel: Panel, model: Model) -> float:
    """Azimuth width of one column [deg]: the claimed one where the beam is formed by one column."""
    claimed = _figure(panel, "horizontal_beamwidth", model.band)
    if model.layout.columns > 1 or claimed is None:
        return SECTOR_COLUMN_AZ_DEG
    return float(np.clip(claimed.nominal, 20.0, _WIDEST_COLUMN_DEG))


def _vertical(
    panel: Panel,
    model: Model,
    element: SectorElement,
    tilts_deg: tuple[float, float],
    findings: Sequence[Finding],
) -> Drawing:
    tilts = sorted({tilts_deg[0], round(sum(tilts_deg) / 2, 1), tilts_deg[1]})
    elevation = np.arange(-90.0, 90.0 + _STEP_DEG, _STEP_DEG)
    curves = []
    for tilt in tilts:
        gain = power_pattern(model.layout, element, model.centre_hz, tilt, 0.0, 90.0 - elevation, 0.0)
        curves.append(_cut(f"tilt {tilt:.3g}°".replace("-", "−"), elevation, gain, "deg"))
    middle = tilts[len(tilts) // 2]
    states = array_states(model.layout, element, model.centre_hz, middle, 0.0)
    marks = {"beam_deg": 90.0 - float(states.peak_theta_deg), "tilt_deg": middle}
    marks |= _widths(curves[len(tilts) // 2])
    upper = float(states.upper_sidelobe_db)
    if np.isfinite(upper):
        marks["upper_sidelobe_db"] = upper
    marks |= _claims(panel, model.band, "vertical", findings)
    said = (
        f"expected {marks['expected_3db_deg']:.1f}° at −3 dB"
        if "expected_3db_deg" in marks
        else "no −3 dB width"
    )
    if np.isfinite(upper):
        said += f"; first upper side lobe {upper:.1f} dB".replace("-", "−")
    return Drawing(
        kind="vertical-cut",
        title=f"Vertical cut: {_claimed(marks)}{said}",
        text=f"{mhz(model.band)}, computed at {model.centre_hz / 1e6:.0f} MHz for {_list(curves)}, uniform "
        "excitation. Elevation counts upwards; tilt counts downwards.",
        band=model.band,
        curves=tuple(curves),
        marks=marks,
        where=_cells(panel, model, ("vertical_beamwidth", "electrical_tilt")),
    )


def _horizontal(  # noqa: PLR0917 what the cut is of, then where it is taken
    panel: Panel,
    model: Model,
    element: SectorElement,
    tilt_deg: float,
    scan_deg: float,
    findings: Sequence[Finding],
) -> Drawing:
    azimuth = np.arange(-180.0, 180.0 + _STEP_DEG, 2 * _STEP_DEG)
    curves = []
    for scan in sorted({0.0, scan_deg}):
        states = array_states(model.layout, element, model.centre_hz, tilt_deg, scan)
        theta = float(states.peak_theta_deg)
        gain = power_pattern(model.layout, element, model.centre_hz, tilt_deg, scan, theta, azimuth)
        curves.append(_cut(f"azimuth {scan:.3g}°", azimuth, gain, "deg"))
    marks = {"beam_deg": 0.0} | _widths(curves[0]) | _claims(panel, model.band, "horizontal", findings)
    title, basis = f"Horizontal cut: {_claimed(marks)}expected {_expected(marks)}", ""
    if model.layout.columns == 1 and "claimed_3db_deg" in marks:
        # the width of one column is an input of the model, so it is no expectation
        marks = {key: value for key, value in marks.items() if not key.startswith("expected_3db")}
        title = (
            f"Horizontal cut of one column, drawn for its claimed {marks['claimed_3db_deg']:.3g}° at −3 dB"
        )
        if "expected_10db_deg" in marks:
            title += f": {marks['expected_10db_deg']:.3g}° at −10 dB expected"
        basis = ", with the claimed −3 dB width of the column"
    return Drawing(
        kind="horizontal-cut",
        title=title,
        text=f"{mhz(model.band)}, computed at {model.centre_hz / 1e6:.0f} MHz for {_list(curves)} in the "
        f"cone of the beam at {tilt_deg:.3g}° tilt, uniform excitation{basis}.",
        band=model.band,
        curves=tuple(curves),
        marks=marks,
        where=_cells(panel, model, ("horizontal_beamwidth", "horizontal_beamwidth_10db", "horizontal_scan")),
    )


_LEVELS = (("expected_3db_deg", "−3 dB"), ("expected_10db_deg", "−10 dB"))


def _expected(marks: dict[str, float]) -> str:
    said = [f"{marks[key]:.3g}° at {level}" for key, level in _LEVELS if key in marks]
    return " and ".join(said) or "no −3 dB width"


def _claimed(marks: dict[str, float]) -> str:
    return f"{marks['claimed_3db_deg']:.3g}° claimed, " if "claimed_3db_deg" in marks else ""


def _cut(name: str, angle: NDArray[np.float64], gain: NDArray[np.float64], unit: str) -> Curve:
    """A cut in dB below its own highest value, down to the floor."""
    peak = max(float(np.max(gain)), 1e-30)
    level = np.maximum(10 * np.log10(np.maximum(gain / peak, 1e-30)), FLOOR_DB)
    return Curve(
        name=name,
        x=tuple(angle.tolist()),
        y=tuple(np.round(level, 2).tolist()),
        x_unit=unit,
        y_unit="dB",
    )


def _widths(curve: Curve) -> dict[str, float]:
    """Widths [deg] of the main beam at -3.01 and -10 dB and its edges, where the curve has them."""
    found: dict[str, float] = {}
    x, y = np.array(curve.x), np.array(curve.y)
    peak = int(np.argmax(y))
    for name, level in (("3db", -3.0103), ("10db", -10.0)):
        left, right = _crossing(x[peak::-1], y[peak::-1], level), _crossing(x[peak:], y[peak:], level)
        if left is not None and right is not None:
            found |= {
                f"expected_{name}_deg": right - left,
                f"expected_{name}_from_deg": left,
                f"expected_{name}_to_deg": right,
            }
    return found


def _crossing(x: NDArray[np.float64], y: NDArray[np.float64], level: float) -> float | None:
    """Where a falling flank first passes `level`, by linear interpolation."""
    below = np.nonzero(y < level)[0]
    if not below.size or below[0] == 0:
        return None
    i = int(below[0])
    return float(np.interp(level, [y[i], y[i - 1]], [x[i], x[i - 1]]))


def _claims(panel: Panel, band: Band, plane: str, findings: Sequence[Finding]) -> dict[str, float]:
    """Claimed widths of a plane, and the interval the checks expect for the -3 dB one."""
    marks = {}
    for key, name in (
        (f"{plane}_beamwidth", "claimed_3db_deg"),
        (f"{plane}_beamwidth_10db", "claimed_10db_deg"),
    ):
        claimed = _figure(panel, key, band)
        if claimed is not None and 0 < claimed.nominal <= _FULL_CIRCLE_DEG:
            marks[name] = claimed.nominal
    for finding in findings:
        interval = finding.expected
        judged = finding.band == band and finding.parameters[:1] == (f"{plane}_beamwidth",)
        if judged and interval is not None and interval.unit == "deg":
            marks |= {} if interval.low is None else {"interval_low_deg": interval.low}
            marks |= {} if interval.high is None else {"interval_high_deg": interval.high}
    return marks


def _figure(panel: Panel, key: str, band: Band) -> Reading | None:
    reading = panel.get(key, band)
    return None if reading is None or isinstance(reading.value, str) else reading


def _list(curves: Sequence[Curve]) -> str:
    return ", ".join(curve.name for curve in curves)


def _cells(panel: Panel, model: Model, keys: tuple[str, ...]) -> tuple:  # type: ignore[type-arg]
    claims = (panel.get(key, model.band) for key in keys)
    return tuple(dict.fromkeys((*(r.where for r in model.used), *(c.where for c in claims if c is not None))))
