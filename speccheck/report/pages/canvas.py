"""A small drawing surface for figures: scales, axes and marks as plain records that a template prints.

Figures are drawn here and printed by one template instead of by a plotting library: the marks carry the
report's own type and tones, follow light, dark and print, cost a few milliseconds and a few kilobytes, and
add no dependency.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field
from itertools import groupby
from typing import Literal

from speccheck.records import CellRef
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.paths import Point, path_data, short

Anchor = Literal["start", "middle", "end"]


@dataclass(frozen=True, slots=True)
class Stroke:
    """A line or filled shape: SVG path data and the name of its style."""

    path: str
    style: str


@dataclass(frozen=True, slots=True)
class Label:
    """A text at a place, to the unit."""

    x: int
    y: int
    text: str
    anchor: Anchor = "start"
    style: str = "text"


@dataclass(frozen=True, slots=True, kw_only=True)
class Figure:
    """A drawing ready to print; `text` is its equivalent in words, `rows` its numbers as a table."""

    title: str
    text: str
    width: float
    height: float
    strokes: tuple[Stroke, ...]
    labels: tuple[Label, ...]
    where: tuple[CellRef, ...] = ()
    note: str = ""
    columns: tuple[str, ...] = ()
    rows: tuple[tuple[str, ...], ...] = ()
    kind: str = ""
    joined: bool = False
    """Whether no two shapes of one style meet, so that those that follow each other may be one path."""

    @property
    def half(self) -> bool:
        """Whether two such figures stand side by side."""
        return self.width <= 330

    @property
    def runs(self) -> tuple[tuple[str, tuple[str, ...]], ...]:
        """Style and paths of the strokes that follow each other in one style; it is written once a run.

        Grid lines are one path; shapes stay apart, for where they overlap each shows its own edge.
        """
        runs = groupby(self.strokes, key=lambda stroke: stroke.style)
        paths = ((style, tuple(stroke.path for stroke in strokes)) for style, strokes in runs)
        lines = ("grid", "axis")
        return tuple(
            (style, ("".join(run),) if self.joined or style in lines else run) for style, run in paths
        )

    @property
    def lettering(self) -> tuple[tuple[str, Anchor, tuple[Label, ...]], ...]:
        """Style, anchor and labels that share both, in the order in which they first appear."""
        groups: dict[tuple[str, Anchor], list[Label]] = {}
        for label in self.labels:
            groups.setdefault((label.style, label.anchor), []).append(label)
        return tuple((style, anchor, tuple(labels)) for (style, anchor), labels in groups.items())


@dataclass(slots=True)
class Canvas:
    """Collects the marks of one figure; coordinates in SVG units, y downwards."""

    width: float
    height: float
    numbers: Numbers
    strokes: list[Stroke] = field(default_factory=list)
    labels: list[Label] = field(default_factory=list)

    def line(self, points: Iterable[Point], style: str, *, close: bool = False) -> None:
        """A line through points; interrupted where a point is not finite."""
        if path := path_data(points, close=close):
            self.strokes.append(Stroke(path, style))

    def box(self, x: float, y: float, width: float, height: float, style: str) -> None:
        """A rectangle."""
        self.line(((x, y), (x + width, y), (x + width, y + height), (x, y + height)), style, close=True)

    def dot(self, x: float, y: float, radius: float, style: str) -> None:
        """A disc or ring."""
        self.arc(x, y, radius, radius, style)

    def arc(self, x: float, y: float, rx: float, ry: float, style: str) -> None:
        """A whole ellipse."""
        if not all(map(math.isfinite, (x, y, rx, ry))):
            return
        a, b, c, d = short(x - rx), short(x + rx), short(rx), short(ry)
        at = short(y)
        self.strokes.append(Stroke(f"M{a} {at}A{c} {d} 0 1 1 {b} {at}A{c} {d} 0 1 1 {a} {at}Z", style))

    def diamond(self, x: float, y: float, size: float, style: str) -> None:
        """A diamond: the mark of a claimed figure."""
        self.line(((x - size, y), (x, y - size), (x + size, y), (x, y + size)), style, close=True)

    def write(self, x: float, y: float, text: str, anchor: Anchor = "start", style: str = "text") -> None:
        """A text; `y` is its base line."""
        self.labels.append(Label(round(x), round(y), text, anchor, style))

    def figure(self, title: str, text: str, **more: object) -> Figure:
        """The finished figure."""
        return Figure(
            title=title,
            text=text,
            width=self.width,
            height=self.height,
            strokes=tuple(self.strokes),
            labels=tuple(self.labels),
            **more,  # type: ignore[arg-type]
        )


@dataclass(frozen=True, slots=True)
class Scale:
    """Maps `low`…`high` of a quantity to `start`…`end` of the page."""

    low: float
    high: float
    start: float
    end: float

    def __call__(self, value: float) -> float:
        """Place on the page; the ends of the scale are the ends of the axis."""
        share = (value - self.low) / (self.high - self.low) if self.high > self.low else 0.5
        return self.start + share * (self.end - self.start)

    def places(self, values: Iterable[float]) -> list[float]:
        """Places on the page of many values."""
        if not self.high > self.low:
            return [self(value) for value in values]
        step = (self.end - self.start) / (self.high - self.low)
        origin = self.start - self.low * step
        return [origin + value * step for value in values]

    def clipped(self, value: float) -> float:
        """Place on the page, held inside the axis."""
        return self(min(max(value, self.low), self.high))

    def ticks(self, wanted: int = 5) -> tuple[float, ...]:
        """Round numbers inside the scale; its one value where it has no extent."""
        if not self.high > self.low:
            return (self.low,)
        step = _round_step((self.high - self.low) / max(wanted, 1))
        first = math.ceil(self.low / step - 1e-9)
        last = math.floor(self.high / step + 1e-9)
        return tuple(round(i * step, 10) for i in range(first, last + 1))


def scale_around(values: Sequence[float], start: float, end: float, pad: float = 0.08) -> Scale:
    """A scale that holds all values with some air on both sides."""
    finite = [v for v in values if math.isfinite(v)] or [0.0, 1.0]
    low, high = min(finite), max(finite)
    span = high - low or max(abs(high), 1.0) * 0.1
    return Scale(low - pad * span, high + pad * span, start, end)


@dataclass(frozen=True, slots=True)
class Plot:
    """A canvas with two axes."""

    canvas: Canvas
    x: Scale
    y: Scale

    def curve(self, x: Sequence[float], y: Sequence[float], style: str) -> None:
        """A curve, held inside the frame vertically and cut off at its sides."""
        low, high = self.y.low, self.y.high
        held = self.y.places([low if v < low else high if v > high else v for v in y])
        shown = zip(x, self.x.places(x), held, strict=True)
        self.canvas.line([(at, level) for u, at, level in shown if self.x.low <= u <= self.x.high], style)

    def level(self, value: float, style: str) -> None:
        """A horizontal line over the whole frame."""
        at = self.y(value)
        self.canvas.line(((self.x.start, at), (self.x.end, at)), style)

    def upright(self, value: float, style: str) -> None:
        """A vertical line over the whole frame."""
        at = self.x(value)
        self.canvas.line(((at, self.y.start), (at, self.y.end)), style)


def axes(
    canvas: Canvas,
    x: Scale,
    y: Scale,
    x_title: str,
    y_title: str,
    *,
    x_ticks: Sequence[float] | None = None,
    y_ticks: Sequence[float] | None = None,
) -> Plot:
    """A frame with light grid, tick figures, and axis titles with units."""
    for tick in x_ticks if x_ticks is not None else x.ticks():
        canvas.line(((x(tick), y.start), (x(tick), y.end)), "grid")
        canvas.write(x(tick), y.start + 13, canvas.numbers.plain(tick), "middle", "small")
    for tick in y_ticks if y_ticks is not None else y.ticks():
        canvas.line(((x.start, y(tick)), (x.end, y(tick))), "grid")
        canvas.write(x.start - 5, y(tick) + 3.5, canvas.numbers.plain(tick), "end", "small")
    canvas.line(((x.start, y.end), (x.start, y.start), (x.end, y.start)), "axis")
    canvas.write((x.start + x.end) / 2, y.start + 28, x_title, "middle", "small")
    canvas.write(4, 11, y_title, "start", "small")
    return Plot(canvas, x, y)


def _round_step(raw: float) -> float:
    """The nearest of 1, 2, 5 × a power of ten that is not smaller."""
    power = 10.0 ** math.floor(math.log10(raw))
    return next(power * m for m in (1, 2, 5, 10) if power * m >= raw * (1 - 1e-9))
