"""Figures of the array: spacing, pattern cuts, steering map, EIRP ladder, port map."""

from __future__ import annotations

import math
from collections.abc import Callable
from itertools import pairwise

from speccheck.records import Drawing
from speccheck.report.pages.canvas import Canvas, Figure, Plot, Scale, axes, scale_around
from speccheck.report.pages.formats import Numbers

EXPECTED = "Curves: expected, not measured."
FLOOR_DB = -30.0
SIDE_TILT_DB = -12.0
"""Least and greatest tilt are drawn above this level only: beam and any grating lobe, no side lobes."""

HALF, FULL = 320, 640
_HIDDEN = (math.nan, math.nan)
_CURVE_STYLES = ("first", "second", "third")
_ORDER = ("second", "first", "third")
"""Styles of the vertical cut: the middle tilt carries the strong line."""


def draw(drawing: Drawing, numbers: Numbers) -> Figure | None:
    """The figure of a drawing; None for a kind that this report has no figure for."""
    drawer = _DRAWERS.get(drawing.kind)
    return drawer(drawing, numbers) if drawer else None


def _spacing(drawing: Drawing, numbers: Numbers) -> Figure:
    canvas = Canvas(HALF, 230, numbers)
    limits = {k: v for k, v in drawing.marks.items() if k.startswith("limit_")}
    values = [y for curve in drawing.curves for y in curve.y] + list(limits.values())
    ends = drawing.curves[0].x
    plot = axes(
        canvas,
        Scale(ends[0], ends[-1], 36, 214),
        scale_around([*values, min(values) * 0.9], 190, 20),
        "Frequency [MHz]",
        "Spacing [λ]",
        x_ticks=Scale(ends[0], ends[-1], 0, 1).ticks(3),
    )
    rows = []
    for i, curve in enumerate(drawing.curves):
        plane = curve.name.partition(",")[0]
        style = _CURVE_STYLES[i]
        plot.curve(curve.x, curve.y, style)
        said = f"{plane} {numbers.plain(curve.y[-1], 2)}λ"
        canvas.write(218, plot.y(curve.y[-1]) + 4, said, style=f"{style}-text")
        limit = drawing.marks[f"limit_{plane}_wl"]
        plot.level(limit, "limit")
        crossing = drawing.marks[f"crossing_{plane}_mhz"]
        if ends[0] < crossing < ends[-1]:
            canvas.dot(plot.x(crossing), plot.y(limit), 4, "open")
            met = f"{numbers.plain(crossing, 0)} MHz"
            canvas.write(plot.x(crossing), plot.y(limit) - 8, met, "middle", "strong")
        angle = numbers.figure(drawing.marks[f"angle_{plane}_deg"], "deg")
        rows.append(
            (curve.name, *(f"{numbers.plain(y, 2)}λ" for y in (curve.y[0], curve.y[-1], limit)), angle)
        )
    _limit_labels(plot, drawing, limits, [c.y[-1] for c in drawing.curves])
    return canvas.figure(
        drawing.title,
        drawing.text,
        where=drawing.where,
        kind=drawing.kind,
        columns=(
            "Plane",
            f"at {numbers.plain(ends[0])} MHz",
            f"at {numbers.plain(ends[-1])} MHz",
            "limit",
            "steering",
        ),
        rows=tuple(rows),
    )


def _limit_labels(plot: Plot, drawing: Drawing, limits: dict[str, float], taken: list[float]) -> None:
    """Names of the limit lines at the right, moved apart where they would lie on each other or a curve."""
    placed = [plot.y(value) for value in taken]
    for key, value in limits.items():
        plane = key.removeprefix("limit_").removesuffix("_wl")
        angle = plot.canvas.numbers.figure(drawing.marks[f"angle_{plane}_deg"], "deg")
        y = plot.y(value)
        while any(abs(y - other) < 12 for other in placed):
            y += 3
        placed.append(y)
        plot.canvas.write(218, y + 4, f"limit {plane}, {angle}", style="limit-text")


def _vertical_cut(drawing: Drawing, numbers: Numbers) -> Figure:
    """Level to the right, elevation upwards: up is up."""
    canvas = Canvas(HALF, 250, numbers)
    x, y = Scale(-30, 0, 34, 246), Scale(-90, 90, 212, 22)
    axes(canvas, x, y, "Level against the beam [dB]", "Elevation [°]", y_ticks=range(-90, 91, 30))
    canvas.line(((x.start, y(0)), (x.end, y(0))), "axis")
    middle = len(drawing.curves[:3]) // 2
    styles = _ORDER if middle else ("first",)
    for i, curve in enumerate(drawing.curves[:3]):
        lowest = FLOOR_DB if i == middle else SIDE_TILT_DB
        points = zip(curve.y, x.places(curve.y), y.places(curve.x), strict=True)
        canvas.line([(at, up) if level >= lowest else _HIDDEN for level, at, up in points], styles[i])
        canvas.write(252, 34 + 13 * i, curve.name, style=f"{styles[i]}-text")
        canvas.line(((297, 31 + 13 * i), (318, 31 + 13 * i)), styles[i])
    above = f"Least and greatest tilt: drawn above {numbers.plain(SIDE_TILT_DB)} dB."
    marks = drawing.marks
    for level, name in ((-3.0, "3db"), (-10.0, "10db")):
        if f"expected_{name}_from_deg" in marks:
            ends = [y(marks[f"expected_{name}_{end}_deg"]) for end in ("from", "to")]
            canvas.line(((x(level), ends[0]), (x(level), ends[1])), "claimspan")
    if "upper_sidelobe_db" in marks:
        canvas.write(252, 84, "upper lobe", style="small")
        canvas.write(252, 97, numbers.figure(marks["upper_sidelobe_db"], "dB"), style="small")
    for i, (said, name) in enumerate((("−3 dB", "3db"), ("−10 dB", "10db"))):
        if f"expected_{name}_deg" in marks:
            canvas.write(252, 140 + 30 * i, said, style="small")
            width = numbers.figure(marks[f"expected_{name}_deg"], "deg")
            canvas.write(252, 153 + 30 * i, width, style="small")
    return canvas.figure(
        drawing.title,
        drawing.text,
        where=drawing.where,
        note=f"{EXPECTED} {above}" if middle else EXPECTED,
        kind=drawing.kind,
        **_width_table(drawing, numbers),
    )


def _horizontal_cut(drawing: Drawing, numbers: Numbers) -> Figure:
    canvas = Canvas(HALF, 262, numbers)
    plot = axes(
        canvas,
        Scale(-180, 180, 40, 310),
        Scale(-30, 0, 160, 36),
        "Azimuth [°]",
        "Level against the beam [dB]",
        x_ticks=range(-180, 181, 60),
    )
    for i, curve in enumerate(drawing.curves[:3]):
        plot.curve(curve.x, curve.y, _CURVE_STYLES[i])
        canvas.line(((40 + 92 * i, 23), (58 + 92 * i, 23)), _CURVE_STYLES[i])
        canvas.write(62 + 92 * i, 26, curve.name, style=f"{_CURVE_STYLES[i]}-text")
    marks, y = drawing.marks, 206.0
    for name_shown, name in (("−3 dB", "3db"), ("−10 dB", "10db")):
        expected, claimed = marks.get(f"expected_{name}_deg"), marks.get(f"claimed_{name}_deg")
        canvas.write(36, y + 4, name_shown, "end", "small")
        said = []
        if expected is not None:
            canvas.line(((plot.x(-expected / 2), y), (plot.x(expected / 2), y)), "span")
            said.append(f"{numbers.figure(expected, 'deg')} expected")
        if claimed is not None:
            ends = [plot.x(-min(claimed, 358) / 2), plot.x(min(claimed, 358) / 2)]
            canvas.line(((ends[0], y - 5), (ends[0], y + 5)), "claimspan")
            canvas.line(((ends[0], y), (ends[1], y)), "claimspan")
            canvas.line(((ends[1], y - 5), (ends[1], y + 5)), "claimspan")
            said.append(f"{numbers.offered(claimed, 'deg')} claimed")
        canvas.write(310, y + 15, ", ".join(said) or "no width", "end", "small")
        y += 26
    return canvas.figure(
        drawing.title,
        drawing.text,
        where=drawing.where,
        note=EXPECTED,
        kind=drawing.kind,
        **_width_table(drawing, numbers),
    )


def _width_table(drawing: Drawing, numbers: Numbers) -> dict[str, tuple[object, ...]]:
    rows = []
    for level, name in (("−3 dB", "3db"), ("−10 dB", "10db")):
        shown = [drawing.marks.get(f"{kind}_{name}_deg") for kind in ("claimed", "expected")]
        rows.append((level, *(numbers.figure(v, "deg") if v is not None else "–" for v in shown)))
    return {"columns": ("Level", "claimed width", "expected width"), "rows": tuple(rows)}


def _steering_map(drawing: Drawing, numbers: Numbers) -> Figure:
    canvas = Canvas(HALF, 230, numbers)
    x, y = Scale(-1.6, 1.6, 56, 264), Scale(-1.6, 1.6, 211, 3)
    canvas.arc(x(0), y(0), x(1) - x(0), y(0) - y(1), "shade")
    canvas.arc(x(0), y(0), x(1) - x(0), y(0) - y(1), "axis")
    canvas.line(((x(-1.6), y(0)), (x(1.6), y(0))), "guide")
    canvas.line(((x(0), y(-1.6)), (x(0), y(1.6))), "guide")
    claimed, *lobes = drawing.curves
    for lobe in lobes:
        outline = [*zip(lobe.x, lobe.y, strict=True), (lobe.x[0], lobe.y[0])]
        canvas.line(
            ((x(u), y(v)) if -1.6 <= u <= 1.6 and -1.6 <= v <= 1.6 else _HIDDEN for u, v in outline),
            "third" if lobe.name == "sub-array lobe" else "limit",
        )
    canvas.line(zip(x.places(claimed.x), y.places(claimed.y), strict=True), "first", close=True)
    canvas.write(x(1.62), y(0) + 3, "u →", "start", "small")
    canvas.write(x(0) + 5, y(1.6) + 8, "v ↑", style="small")
    grouped = any(lobe.name == "sub-array lobe" for lobe in lobes)
    canvas.write(4, 227, "– · – grating lobes", style="limit-text")
    canvas.write(112, 227, "—— claimed steering", style="first-text")
    if grouped:
        canvas.write(222, 227, "····· sub-array lobes", style="third-text")
    return canvas.figure(drawing.title, drawing.text, where=drawing.where, note=EXPECTED, kind=drawing.kind)


def _ladder(drawing: Drawing, numbers: Numbers) -> Figure:
    canvas = Canvas(HALF, 190, numbers)
    marks = drawing.marks
    power, total, claim = marks["power_dbm"], marks["sum_dbm"], marks.get("claimed_dbm")
    highest = max(total, claim or total)
    scale = Scale(0, highest * 1.08, 150, 24)
    steps = [
        ("power", 0.0, power, "expected"),
        ("gain", power, total, "expected"),
        ("sum", 0.0, total, "shade"),
    ]
    if claim is not None:
        steps.append(("claimed", 0.0, claim, "panel"))
    slots = [46 + 68 * i for i in range(4)]
    canvas.line(((30, 150), (312, 150)), "axis")
    for (name, low, high, style), left in zip(steps, slots, strict=False):
        canvas.box(left, scale(high), 46, scale(low) - scale(high), style)
        unit = "dBi" if name == "gain" else "dBm"
        value = high - low if name == "gain" else high
        canvas.write(left + 23, scale(high) - 5, numbers.figure(value, unit), "middle", "strong")
        canvas.write(left + 23, 164, name, "middle", "text")
    for (_, _, high, _), (left, right) in zip(steps, pairwise(slots), strict=False):
        canvas.line(((left + 46, scale(high)), (right, scale(high))), "guide")
    if claim is not None:
        canvas.write(170, 184, f"claim − sum: {numbers.signed(claim - total, 'dB')}", "middle", "small")
    return canvas.figure(
        drawing.title,
        drawing.text,
        where=drawing.where,
        kind=drawing.kind,
        columns=("Step", "Value"),
        rows=tuple(
            (name, numbers.figure(high - low if name == "gain" else high, "dBi" if name == "gain" else "dBm"))
            for name, low, high, _ in steps
        ),
    )


def _port_map(drawing: Drawing, numbers: Numbers) -> Figure:
    return _port_grid(drawing, numbers) if "grid_rows" in drawing.marks else _port_bands(drawing, numbers)


def _port_grid(drawing: Drawing, numbers: Numbers) -> Figure:
    """A cell for each sub-array, crossed for its two polarisations."""
    rows, columns = int(drawing.marks["grid_rows"]), int(drawing.marks["grid_columns"])
    size = min(22.0, 280 / max(columns, 1), 170 / max(rows, 1))
    height = rows * size + 46
    canvas = Canvas(HALF, round(height), numbers)
    for r in range(min(rows, 40)):
        for c in range(min(columns, 40)):
            left, top = 30 + c * size, 18 + r * size
            canvas.box(left, top, size - 2, size - 2, "shade")
            arm = size * 0.28
            x, y = left + size / 2 - 1, top + size / 2 - 1
            canvas.line(((x - arm, y - arm), (x + arm, y + arm)), "first")
            canvas.line(((x - arm, y + arm), (x + arm, y - arm)), "second")
    canvas.write(30, 11, f"{columns} columns", style="small")
    canvas.write(
        30, height - 12, f"{rows} rows; each cross is one port in +45° and one in −45°", style="small"
    )
    return canvas.figure(drawing.title, drawing.text, where=drawing.where, kind=drawing.kind)


def _port_bands(drawing: Drawing, numbers: Numbers) -> Figure:
    marks = drawing.marks
    bands: list[tuple[float, float, float]] = []
    while f"band_{len(bands) + 1}_ports" in marks:
        i = len(bands) + 1
        low, high, ports = (marks[f"band_{i}_{key}"] for key in ("low_mhz", "high_mhz", "ports"))
        bands.append((low, high, ports))
    canvas = Canvas(FULL, 26 + 24 * len(bands), numbers)
    for row, (low, high, ports) in enumerate(bands):
        y = 14 + 24 * row
        canvas.write(4, y + 9, numbers.band((low, high)), style="text")
        count = round(ports)
        for port in range(min(count, 32)):
            canvas.dot(130 + 15 * port, y + 5, 5, "expected" if port % 2 == 0 else "open")
        canvas.write(140 + 15 * min(count, 32), y + 9, f"{count} ports", style="strong")
    canvas.write(4, 22 + 24 * len(bands), "● +45°  ○ −45°", style="small")
    return canvas.figure(
        drawing.title,
        drawing.text,
        where=drawing.where,
        kind=drawing.kind,
        columns=("Band", "Ports"),
        rows=tuple((numbers.band((low, high)), numbers.plain(ports)) for low, high, ports in bands),
    )


_DRAWERS: dict[str, Callable[[Drawing, Numbers], Figure]] = {
    "spacing": _spacing,
    "vertical-cut": _vertical_cut,
    "horizontal-cut": _horizontal_cut,
    "steering-map": _steering_map,
    "eirp-ladder": _ladder,
    "port-map": _port_map,
}
