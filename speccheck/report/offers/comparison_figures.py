"""Small repeated charts: one numeric requirement each, all offers on one axis, the limit drawn in."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from speccheck.records import Requirement
from speccheck.records.evaluations import Offer, OfferCell
from speccheck.records.words import FAILED
from speccheck.report.pages.canvas import Canvas, Figure, scale_around
from speccheck.report.pages.formats import Numbers, shown_unit
from speccheck.report.pages.marks import mark_for
from speccheck.report.pages.view import label

MOST_CHARTS = 12
MOST_OFFERS = 24
_WIDTH, _ROW = 330, 16
_MOST_NAMED = 4

Row = tuple[int, str, Offer]
Point = tuple[int, str, OfferCell]


def strips(
    requirements: Sequence[Requirement], offers: Sequence[Row], numbers: Numbers
) -> tuple[Figure, ...]:
    """Charts of the numeric requirements that at least two offers answer, in tender order."""
    found = list(charted(requirements, offers))
    return tuple(_strip(requirement, points, numbers) for requirement, points in found[:MOST_CHARTS])


def charted(
    requirements: Sequence[Requirement], offers: Sequence[Row]
) -> Iterator[tuple[Requirement, Sequence[Point]]]:
    """Requirements worth a chart, with the figures offered."""
    for index, requirement in enumerate(requirements):
        points = list(_points(index, offers[:MOST_OFFERS]))
        if _limits(requirement) and len({number for number, _, _ in points}) >= 2:
            yield requirement, points


def _points(index: int, offers: Sequence[Row]) -> Iterator[Point]:
    for number, name, offer in offers:
        for cell in offer.cells:
            if cell.requirement == index and isinstance(cell.offered, float | int | tuple):
                yield number, name, cell


def _limits(requirement: Requirement) -> tuple[float, ...]:
    limit = requirement.limit
    if isinstance(limit, tuple):
        return limit
    return (float(limit),) if isinstance(limit, float | int) else ()


def _strip(requirement: Requirement, points: Sequence[Point], numbers: Numbers) -> Figure:
    limits = _limits(requirement)
    rows = list(dict.fromkeys((number, name) for number, name, _ in points))
    canvas = Canvas(_WIDTH, 44 + _ROW * len(rows), numbers)
    bottom = 14 + _ROW * len(rows)
    scale = scale_around([*limits, *(v for _, _, cell in points for v in _ends(cell))], 34, 250)
    for tick in scale.ticks(4):
        canvas.line(((scale(tick), 10), (scale(tick), bottom)), "grid")
        canvas.write(scale(tick), bottom + 12, numbers.plain(tick), "middle", "small")
    for limit in limits:
        canvas.line(((scale(limit), 8), (scale(limit), bottom)), "limit")
    for line, (number, _) in enumerate(rows):
        y = 14 + _ROW * line + 5
        canvas.write(4, y + 4, f"{number}", style="text")
        cells = [cell for n, _, cell in points if n == number]
        for cell in cells:
            ends = _ends(cell)
            if len(ends) == 2:
                canvas.line(((scale(ends[0]), y), (scale(ends[1]), y)), "claimspan")
            for value in ends:
                canvas.diamond(scale(value), y, 4, mark_for(cell.verdict).tone)
        shown = min(cells, key=lambda c: c.margin if c.margin is not None else float("inf"))
        written = _short(_rounded(shown), requirement.unit, numbers)
        canvas.write(254, y + 4, f"{mark_for(shown.verdict).symbol} {written}", style="small")
    name = label(requirement.parameter) if requirement.parameter else requirement.wording[:40]
    unit = shown_unit(requirement.unit)
    canvas.write(142, bottom + 26, f"{name}{f' [{unit}]' if unit else ''}; dashed: limit", "middle", "small")
    bands = ", ".join(map(numbers.band, requirement.bands))
    limit_text = numbers.stated(requirement.limit, requirement.unit)
    demand = f"{name} {requirement.operator} {limit_text}{f', {bands}' if bands else ''}"
    return canvas.figure(
        f"Clause {requirement.clause or '–'}: {demand}",
        _in_words(points, requirement.unit, numbers),
        kind="offers",
        columns=("Offer", "Panel", "Verdict", "Figure"),
        rows=tuple(
            (f"{n}", who, mark_for(c.verdict).word, numbers.stated(_rounded(c), requirement.unit))
            for n, who, c in points
        ),
    )


def _short(value: float | tuple[float, float] | None, unit: str, numbers: Numbers) -> str:
    """A figure beside its line, a range without its unit, which the axis names."""
    if not isinstance(value, tuple):
        return numbers.stated(value, unit)
    low, high = map(numbers.plain, value)
    return f"{low}–{high}" if value[0] >= 0 else f"{low} to {high}"


def _in_words(points: Sequence[Point], unit: str, numbers: Numbers) -> str:
    outside = [(n, who, c) for n, who, c in points if (c.underlying or c.verdict) in FAILED]
    if not outside:
        return f"All {len(points)} figures are inside the limit."
    named = [
        f"{n} {who} ({numbers.stated(_rounded(c), unit)})"
        for n, who, c in {n: (n, who, c) for n, who, c in outside}.values()
    ]
    more = f" and {len(named) - _MOST_NAMED} more" if len(named) > _MOST_NAMED else ""
    said = f"{len(points) - len(outside)} of {len(points)} figures are inside the limit"
    return f"{said}; outside: {', '.join(named[:_MOST_NAMED])}{more}."


def _ends(cell: OfferCell) -> tuple[float, ...]:
    if isinstance(cell.offered, tuple):
        return cell.offered
    return (float(cell.offered),) if isinstance(cell.offered, float | int) else ()


def _rounded(cell: OfferCell) -> float | tuple[float, float] | None:
    ends = tuple(float(f"{value:.4g}") for value in _ends(cell))
    if len(ends) == 2:
        return ends[0], ends[1]
    return ends[0] if ends else None
