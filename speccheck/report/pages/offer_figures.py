"""Figures of the offer: margins against the tender, claims against intervals, band coverage."""

from __future__ import annotations

import textwrap
from collections.abc import Callable, Iterable, Iterator, Sequence

from speccheck.records import Band, Compliance, Finding, Fit, Interval, MatrixRow, PanelAssessment
from speccheck.report.pages.canvas import Canvas, Figure, Scale
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.marks import mark_for

Labels = Callable[[str], str]

_DECIBEL_UNITS = {"dB", "dBi", "dBm", "dBc"}
_DRAWN = {
    Compliance.MEETS,
    Compliance.MEETS_NARROWLY,
    Compliance.FAILS_NARROWLY,
    Compliance.FAILS,
    Compliance.DEVIATION_ACCEPTED,
}
FULL = 640
MOST_ROWS = 24
MOST_CLAIMS, CLAIM_HEIGHT = 10, 37
_LAYERS = {style: i for i, style in enumerate(("grid", "expected", "zero"))}
"""What lies below what in a chart whose rows do not meet; marks lie on top."""


def margin_chart(panel: PanelAssessment, numbers: Numbers, label: Labels) -> Figure | None:
    """Signed margins, in dB or as a share of the limit, so that no axis mixes units."""
    every = [(row, share) for row in panel.requirements if (share := _margin_share(row)) is not None]
    if not every:
        return None
    least = sorted(range(len(every)), key=lambda i: every[i][1])[:MOST_ROWS]
    rows = [every[i] for i in sorted(least)]
    canvas = Canvas(FULL, 40 + 20 * len(rows), numbers)
    scale = Scale(-1, 1, 300, 520)
    bottom = 22 + 20 * len(rows)
    canvas.write(scale(-1), 12, "outside the limit", style="small")
    canvas.write(scale(1), 12, "inside the limit", "end", "small")
    for i, (row, share) in enumerate(rows):
        y = 26 + 20 * i
        name = _row_name(row, numbers, label)
        end = scale(max(-1.0, min(1.0, share)))
        mark = mark_for(row.verdict)
        canvas.write(4, y + 8, name, style="text")
        if abs(end - scale(0)) < 1.5:
            canvas.diamond(scale(0), y + 4, 4, mark.tone)
        else:
            canvas.box(min(end, scale(0)), y, abs(end - scale(0)), 9, mark.tone)
        written = numbers.signed(row.margin or 0.0, row.requirement.unit)
        canvas.write(528, y + 8, f"{mark.symbol} {written}", style="text")
    canvas.line(((scale(0), 18), (scale(0), bottom)), "zero")
    canvas.write(scale(0), bottom + 14, "full bar: 3 dB, or 20 % of the limit", "middle", "small")
    short = sum(1 for row, _ in every if (row.margin or 0) < 0)
    title = (
        f"{short} of {len(every)} numeric rows are outside their limit"
        if short
        else (f"{_all(len(every), 'numeric row')} on the good side of the limit")
    )
    drawn = f" The {len(rows)} rows with the least margin are drawn." if len(rows) < len(every) else ""
    return canvas.figure(
        title,
        "Margin of every numeric requirement in the parameter’s own good direction; bars end at the edge of "
        f"the scale. Closest to its limit: {_closest(every, numbers, label)}.{drawn}",
        where=tuple(dict.fromkeys(row.offered.where for row, _ in rows if row.offered)),
        kind="margins",
        joined=True,
        columns=("Requirement", "Verdict", "Margin"),
        rows=tuple(
            (
                _row_name(row, numbers, label),
                mark_for(row.verdict).word,
                numbers.signed(row.margin or 0.0, row.requirement.unit),
            )
            for row, _ in every
        ),
    )


def _all(count: int, thing: str) -> str:
    return f"All {count} {thing}s" if count > 1 else f"The only {thing}"


def _margin_share(row: MatrixRow) -> float | None:
    """Margin as part of a full bar: 3 dB, or a fifth of the limit."""
    if row.margin is None or row.verdict not in _DRAWN:
        return None
    if row.requirement.unit in _DECIBEL_UNITS:
        return row.margin / 3
    limit = row.requirement.limit
    if isinstance(limit, tuple):
        size = max(abs(limit[0]), abs(limit[1]))
    elif isinstance(limit, str) or limit is None:
        return None
    else:
        size = abs(limit)
    return row.margin / (0.2 * size) if size else None


def _row_name(row: MatrixRow, numbers: Numbers, label: Labels) -> str:
    name = f"{row.requirement.clause} {label(row.requirement.parameter)}".strip()
    if row.band:
        name += f", {numbers.band(row.band)}"
    return name if len(name) <= 52 else name[:51] + "…"


def _closest(rows: Iterable[tuple[MatrixRow, float]], numbers: Numbers, label: Labels) -> str:
    row, _ = min(rows, key=lambda item: abs(item[1]))
    return f"{_row_name(row, numbers, label)} ({numbers.signed(row.margin or 0.0, row.requirement.unit)})"


def interval_charts(findings: Iterable[Finding], numbers: Numbers, band: Band | None) -> tuple[Figure, ...]:
    """Claims as marks on the intervals that physics and arithmetic allow, each on its own scale.

    Those outside come first; a chart holds few enough rows that a page is not left half empty before it.
    """
    shown = [f for f in findings if f.verdict is not Fit.NOT_JUDGED and _ends(f) is not None]
    outside = [f for f in shown if f.verdict in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)]
    inside = [f for f in shown if f.verdict not in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)]
    where = "" if band is None else f" of {numbers.band(band)}"
    said = f"{len(outside)} of {len(shown)} claims{where} are outside what is expected, or at its edge"
    others = f"The other {len(inside)} claims" if outside else _all(len(inside), "claim")
    return (
        *_charts(outside, said, numbers),
        *_charts(inside, f"{others}{where} inside what is expected", numbers),
    )


def _charts(findings: Sequence[Finding], title: str, numbers: Numbers) -> Iterator[Figure]:
    """One chart, or several of about the same size."""
    parts = -(-len(findings) // MOST_CLAIMS)
    for part in range(parts):
        rows = findings[part * len(findings) // parts : (part + 1) * len(findings) // parts]
        yield _chart(rows, title if parts == 1 else f"{title}, part {part + 1} of {parts}", numbers)


def _chart(findings: Sequence[Finding], title: str, numbers: Numbers) -> Figure:
    canvas = Canvas(FULL, 26 + CLAIM_HEIGHT * len(findings), numbers)
    for i, finding in enumerate(findings):
        y = 14 + CLAIM_HEIGHT * i
        mark = mark_for(finding.verdict)
        lines = _lines(finding.title)
        for at, line in enumerate(lines):
            canvas.write(4, y + (8 if len(lines) == 1 else 2 + 13 * at), line, style="text")
        _interval_row(canvas, finding, y, mark.tone)
        canvas.write(548, y + 8, f"{mark.symbol} {mark.word}", style="strong")
    canvas.strokes.sort(key=lambda stroke: (_LAYERS.get(stroke.style, len(_LAYERS)), stroke.style))
    key = "bar: expected interval; ◆ claim; each row has its own scale"
    canvas.write(290, 22 + CLAIM_HEIGHT * len(findings), key, style="small")
    first = "; ".join(
        f"{f.title}: {numbers.amount(f.claimed)} against {numbers.interval(f.expected)}" for f in findings[:2]
    )
    return canvas.figure(
        title,
        f"Claim on the interval expected. {first}. All figures stand with their checks below.",
        kind="intervals",
        joined=True,
    )


def _lines(title: str) -> list[str]:
    """A title in one line or two."""
    return [title] if len(title) <= 46 else textwrap.wrap(title, 46, max_lines=2, placeholder="…")


def _ends(finding: Finding) -> tuple[float, float] | None:
    """Lowest and highest figure of the claim, when claim and interval share a unit and can be drawn."""
    claimed, expected = finding.claimed, finding.expected
    if claimed is None or expected is None or isinstance(claimed.value, str) or claimed.unit != expected.unit:
        return None
    if expected.low is None and expected.high is None:
        return None
    value = claimed.value
    return (min(value), max(value)) if isinstance(value, tuple) else (float(value), float(value))


def _interval_row(canvas: Canvas, finding: Finding, y: float, tone: str) -> None:
    ends, expected = _ends(finding), finding.expected
    if ends is None or expected is None:
        return
    known = [v for v in (expected.low, expected.high, *ends) if v is not None]
    span = (max(known) - min(known)) or max(abs(known[0]) * 0.1, 0.1)
    scale = Scale(min(known) - 0.25 * span, max(known) + 0.25 * span, 290, 540)
    left = scale.start if expected.low is None else scale(expected.low)
    right = scale.end if expected.high is None else scale(expected.high)
    canvas.line(((scale.start, y + 4), (scale.end, y + 4)), "grid")
    canvas.box(left, y, max(right - left, 1.5), 8, "expected")
    _interval_labels(canvas, expected, (left, right), y + 19)
    if ends[0] != ends[1]:
        canvas.line(((scale(ends[0]), y + 4), (scale(ends[1]), y + 4)), "zero")
    for value in dict.fromkeys(ends):
        canvas.diamond(scale(value), y + 4, 4.5, "claim" if tone == "good" else tone)
    canvas.write(scale(sum(ends) / 2), y - 4, canvas.numbers.amount(finding.claimed), "middle", "strong")


def _interval_labels(canvas: Canvas, expected: Interval, ends: tuple[float, float], y: float) -> None:
    """Figures under the ends of a bar; one label where the two would run into each other."""
    number, unit = canvas.numbers, expected.unit
    if expected.low is not None and expected.high is not None and ends[1] - ends[0] < 60:
        canvas.write(sum(ends) / 2, y, number.interval(expected), "middle", "small")
        return
    for value, at in ((expected.low, ends[0]), (expected.high, ends[1])):
        if value is not None:
            canvas.write(at, y, number.figure(value, unit), "middle", "small")


def coverage_chart(panel: PanelAssessment, numbers: Numbers, label: Labels) -> Figure | None:
    """Required and offered frequency ranges on one axis; gaps in MHz."""
    offered = tuple(dict.fromkeys(panel.panel.bands))
    required = _required_ranges(panel)
    if not offered or not required:
        return None
    edges = [edge for band in (*offered, *required) for edge in band]
    lines = [("required", band, "shade") for band in required] + [
        ("offered", band, "expected") for band in offered
    ]
    canvas = Canvas(FULL, 40 + 20 * len(lines), numbers)
    scale = Scale(min(edges), max(edges), 90, 560)
    for i, (name, band, style) in enumerate(lines):
        y = 10 + 20 * i
        canvas.write(4, y + 10, name, style="text")
        left, right = scale(band[0]), scale(band[1])
        canvas.box(left, y, max(right - left, 2), 12, style)
        if style == "shade":
            canvas.box(left, y, max(right - left, 2), 12, "axis")
        canvas.write(min(right + 5, 562), y + 10, numbers.band(band), style="small")
    bottom = 14 + 20 * len(lines)
    canvas.line(((scale.start, bottom), (scale.end, bottom)), "axis")
    for tick in scale.ticks(6):
        canvas.line(((scale(tick), bottom), (scale(tick), bottom + 4)), "axis")
        canvas.write(scale(tick), bottom + 16, numbers.plain(tick), "middle", "small")
    canvas.write(632, bottom + 16, "MHz", "end", "small")
    gaps = [gap for band in required for gap in _gaps(band, offered)]
    said = ", ".join(numbers.band(gap) for gap in gaps)
    title = f"Required ranges not covered: {said}" if gaps else "The offered bands cover every required range"
    return canvas.figure(
        title,
        f"{label('operating_bands')}: required {', '.join(map(numbers.band, required))}; offered "
        f"{', '.join(map(numbers.band, offered))}.",
        kind="coverage",
        columns=("", "Range"),
        rows=tuple((name, numbers.band(band)) for name, band, _ in lines),
    )


def _required_ranges(panel: PanelAssessment) -> tuple[Band, ...]:
    keys = ("operating_bands", "frequency_range")
    limits = (
        row.requirement.limit
        for row in panel.requirements
        if row.requirement.parameter in keys and row.verdict is not Compliance.NOT_JUDGED
    )
    return tuple(dict.fromkeys(limit for limit in limits if isinstance(limit, tuple)))


def _gaps(required: Band, offered: Iterable[Band]) -> list[Band]:
    """Parts of a required range that no offered range covers."""
    gaps, at = [], required[0]
    for low, high in sorted(offered):
        if low > at and low < required[1]:
            gaps.append((at, low))
        at = max(at, high)
    if at < required[1]:
        gaps.append((at, required[1]))
    return [gap for gap in gaps if gap[1] > gap[0]]
