"""Side and top view of the calculated compliance distance, to scale; only drawn inside the exposure box."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence

from speccheck.records import ExposureNote, ExposureRow, ExposureZone, Panel
from speccheck.report.pages.canvas import Canvas, Figure
from speccheck.report.pages.formats import Numbers

WIDTH, HEIGHT = 316, 160
TOP_WIDTH, TOP_HEIGHT = 640, 220
_ARC_BEYOND_DEG = 4.0
_LABEL_WIDTH = 40
"""Room of a label of a tilt, which stands clear of its falling line [SVG units]."""
_SHARES = (0.62, 0.78, 0.86, 0.4, 0.25)
"""Where along the falling line its label may stand, the best place first."""
_STEEPEST_DEG = 60.0
_TALLEST_M = 6.0
_NEAREST_M, _FARTHEST_M = 0.01, 1e5
_PUBLIC_STYLE, _WORKER_STYLE = "first", "second"


def exposure_figures(panel: Panel, note: ExposureNote | None, numbers: Numbers) -> tuple[Figure, ...]:
    """Side view with tilts, arcs and far-field mark, and top view where the note has a zone."""
    if note is None or not note.complete or not note.rows:
        return ()
    together = [row for row in note.rows if row.band is None] or list(note.rows)
    farthest = _farthest_by_population(row for row in together if _NEAREST_M <= row.distance_m <= _FARTHEST_M)
    figures = [_side_view(panel, note, farthest, numbers)] if farthest else []
    outlines = [zone for zone in note.around if _drawable(zone.top_view)]
    if outlines:
        figures.append(_top_view(max(outlines, key=lambda zone: zone.front_m), numbers))
    return tuple(figures)


def _drawable(outline: Sequence[tuple[float, float]]) -> bool:
    """Whether an outline has an extent that a scale can hold."""
    reach = max((max(abs(x), abs(y)) for x, y in outline), default=0.0)
    return _NEAREST_M <= reach <= _FARTHEST_M


def _farthest_by_population(rows: Iterable[ExposureRow]) -> list[ExposureRow]:
    farthest: dict[str, ExposureRow] = {}
    for row in rows:
        known = farthest.get(row.population)
        if known is None or row.distance_m > known.distance_m:
            farthest[row.population] = row
    return sorted(farthest.values(), key=lambda row: -row.distance_m)


def _side_view(panel: Panel, note: ExposureNote, rows: Sequence[ExposureRow], numbers: Numbers) -> Figure:
    tilts = _tilts(panel, note.around)
    known = (row.far_field_m for row in note.rows if row.far_field_m is not None)
    far = max((d for d in known if 0 < d <= _FARTHEST_M), default=None)
    reach = max(row.distance_m for row in rows)
    shown_far = far is not None and far <= 1.6 * reach
    extent = max(reach, far if far is not None and shown_far else 0.0) * 1.08
    outline = next((z for z in note.around if _drawable(z.side_view)), None)
    depth = max(
        reach * math.sin(math.radians(max(tilts) + _ARC_BEYOND_DEG)) + 0.5,
        max((-y for _, y in outline.side_view), default=0.0) + 1 if outline else 0.0,
        2.5,
    )
    rise = max(1.5, max((y for _, y in outline.side_view), default=0.0) + 0.5 if outline else 0.0)
    px = min(256 / extent, (HEIGHT - 60) / (depth + rise))
    canvas = Canvas(WIDTH, round((depth + rise) * px + 68), numbers)
    x0, y0 = 24.0, 24 + rise * px
    height = panel.get("height")
    stated = height.nominal if height is not None and not isinstance(height.value, str) else 1.0
    tall = min(max(stated, 0.0), _TALLEST_M)
    if outline:
        canvas.line(((x0 + x * px, y0 - y * px) for x, y in outline.side_view), "shade", close=True)
    _arcs(canvas, rows, tilts, (x0, y0), px)
    for tilt in tilts:
        end = _at(extent * 0.99, tilt, (x0, y0), px)
        canvas.line(((x0, y0), end), "guide")
    canvas.write(
        *_at(extent * 0.62, min(tilts), (x0, y0 - 5), px),
        text=f"tilt {_degrees(min(tilts), numbers)}",
        style="small",
    )
    if max(tilts) > min(tilts):
        below = 13 + _LABEL_WIDTH * max(0.0, math.sin(math.radians(max(tilts))))
        places = [_at(extent * share, max(tilts), (x0, y0 + below), px) for share in _SHARES]
        x, y = next((place for place in places if _is_free(canvas, place)), places[0])
        canvas.write(x, y, f"tilt {_degrees(max(tilts), numbers)}", style="small")
    canvas.box(x0 - 4, y0 - tall * px / 2, 4, tall * px, "panel")
    canvas.write(x0 - 4, y0 - tall * px / 2 - 6, "panel", "middle", "small")
    if far is not None and shown_far:
        canvas.line(((x0 + far * px, y0 - 10), (x0 + far * px, y0 + 10)), "zero")
        beside_panel = far * px < 60
        rise_px = max(
            (
                row.distance_m * px * math.sin(math.radians(_ARC_BEYOND_DEG - min(tilts)))
                for row in rows
                if abs(row.distance_m - far) * px < _LABEL_WIDTH
            ),
            default=0.0,
        )
        canvas.write(
            x0 + far * px + (3 if beside_panel else 0),
            max(y0 - max(14, rise_px + 5), 10),
            f"far field {numbers.rounded_up(far)}",
            "start" if beside_panel else "middle",
            "small",
        )
    elif far is not None:
        canvas.write(
            WIDTH - 4, 12, f"far field from {numbers.rounded_up(far)}, beyond this drawing", "end", "small"
        )
    _ruler(canvas, x0, px, extent)
    spread = " and ".join(_degrees(t, numbers) for t in sorted(set(tilts)))
    said = "; ".join(f"{row.category or row.population} {numbers.rounded_up(row.distance_m)}" for row in rows)
    return canvas.figure(
        f"Side view to scale: {said} in front of the radome along the beam",
        f"Arcs at full power for tilts of {spread} downwards, all bands "
        "together; read with this box’s assumptions and cautions.",
        note="Expected, not measured.",
        kind="exposure-side",
    )


def _is_free(canvas: Canvas, place: tuple[float, float]) -> bool:
    """Whether a label of a tilt at a place runs into none of the centred labels."""
    x, y = place
    return all(
        abs(label.y - y) >= 11
        or abs(label.x - (x + _LABEL_WIDTH / 2)) >= 2.8 * len(label.text) + _LABEL_WIDTH / 2
        for label in canvas.labels
        if label.anchor == "middle"
    )


def _arcs(
    canvas: Canvas,
    rows: Sequence[ExposureRow],
    tilts: Sequence[float],
    origin: tuple[float, float],
    px: float,
) -> None:
    low, high = min(tilts) - _ARC_BEYOND_DEG, max(tilts) + _ARC_BEYOND_DEG
    angles = [low + (high - low) * i / 24 for i in range(25)]
    for row, style in zip(rows, (_PUBLIC_STYLE, _WORKER_STYLE, "third"), strict=False):
        canvas.line((_at(row.distance_m, a, origin, px) for a in angles), style)
        x, y = _at(row.distance_m, high, origin, px)
        name = f"{row.category or row.population} {canvas.numbers.rounded_up(row.distance_m)}"
        canvas.write(x, y + 14, name, "middle", f"{style}-text")


def _at(distance: float, tilt_deg: float, origin: tuple[float, float], px: float) -> tuple[float, float]:
    angle = math.radians(tilt_deg)
    return origin[0] + distance * math.cos(angle) * px, origin[1] + distance * math.sin(angle) * px


def _top_view(zone: ExposureZone, numbers: Numbers) -> Figure:
    aside = max(abs(y) for _, y in zone.top_view)
    widest = max(zone.top_view, key=lambda point: point[1])[0]
    front, behind = max(x for x, _ in zone.top_view), -min(0.0, *(x for x, _ in zone.top_view))
    px = min(520 / (front + behind or 1), TOP_HEIGHT / (2 * aside or 1))
    canvas = Canvas(TOP_WIDTH, round(2 * aside * px + 74), numbers)
    x0, y0 = 20 + behind * px, 28 + aside * px
    canvas.line(((x0 + x * px, y0 - y * px) for x, y in zone.top_view), "shade", close=True)
    canvas.line(((x0 + x * px, y0 - y * px) for x, y in zone.top_view), "first", close=True)
    canvas.line(((x0, y0), (x0 + front * px, y0)), "guide")
    canvas.box(x0 - 3, y0 - max(0.2 * px, 4), 4, 2 * max(0.2 * px, 4), "panel")
    canvas.write(x0 + front * px + 6, y0 + 4, numbers.rounded_up(zone.front_m), style="strong")
    canvas.write(
        x0 + widest * px,
        y0 - aside * px - 6,
        f"{numbers.rounded_up(zone.beside_m)} to each side",
        "middle",
        "small",
    )
    _ruler(canvas, x0, px, front)
    front_said, beside_said = numbers.rounded_up(zone.front_m), numbers.rounded_up(zone.beside_m)
    return canvas.figure(
        f"Top view to scale: {front_said} in front and {beside_said} to each side for {zone.population}, "
        f"{numbers.band(zone.band)}",
        "Reach of the limit at full power, modelled over the stated azimuths; read with this box’s "
        "assumptions.",
        note="Expected, not measured.",
        kind="exposure-top",
    )


def _ruler(canvas: Canvas, x0: float, px: float, extent: float) -> None:
    fits = max(extent / 7, 34 / px)
    step = next(s for s in (0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 1e12) if s >= fits)
    y = canvas.height - 24
    count = int(extent / step)
    canvas.line(((x0, y), (x0 + count * step * px, y)), "axis")
    for i in range(count + 1):
        canvas.line(((x0 + i * step * px, y), (x0 + i * step * px, y + 4)), "axis")
        unit = " m" if i == count else ""
        canvas.write(x0 + i * step * px, y + 16, f"{canvas.numbers.plain(i * step)}{unit}", "middle", "small")


def _degrees(angle: float, numbers: Numbers) -> str:
    return f"{numbers.plain(round(angle, 1))}°"


def _tilts(panel: Panel, zones: Iterable[ExposureZone]) -> tuple[float, ...]:
    """Least and greatest tilt [deg, downwards]: of the zone model, else as stated, else 0."""
    swept = [tilt for zone in zones for tilt in zone.tilts_deg]
    stated = [
        r
        for key in ("electrical_tilt", "vertical_scan")
        for r in panel.all(key)
        if not isinstance(r.value, str)
    ]
    ends = swept or [end for r in stated for end in (r.low, r.high)] or [0.0]
    return max(min(ends), -_STEEPEST_DEG), min(max(ends), _STEEPEST_DEG)
