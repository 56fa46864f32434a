"""Markup that a page prints thousands of, joined here: in a template each piece costs a call and an escape.

Every text passes `safe`; class names, coordinates and anchors are the program's own.
"""

from __future__ import annotations

import functools
import re
from collections.abc import Iterable, Mapping, Sequence

from markupsafe import Markup, escape

from speccheck.records import CellRef, Compliance, Fit, Outcome, Step
from speccheck.report.pages.canvas import Figure
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.marks import mark_for
from speccheck.text import plain

LONGEST_TEXT = 20_000
_ANCHORS = {"start": "", "middle": " m", "end": " e"}
_SPECIAL = re.compile(r"[&<>'\"]")


def clean(text: str) -> str:
    """Text without control and direction marks; what is printable has none of them."""
    return text if text.isprintable() and len(text) <= LONGEST_TEXT else plain(text, limit=LONGEST_TEXT)


def safe(text: str) -> str:
    """Text as it may stand in markup."""
    text = clean(text)
    return str(escape(text)) if _SPECIAL.search(text) else text


@functools.cache
def status(word: Fit | Compliance | Outcome) -> Markup:
    """A verdict as symbol and word in its tone."""
    look = mark_for(word)
    return Markup("<b class={}><i aria-hidden=true>{}</i> {}</b>").format(look.tone, look.symbol, look.word)


def marks(figure: Figure) -> Markup:
    """Lines, shapes and letters of a drawing; `inks` holds the look of their classes."""
    parts = []
    for style, paths in figure.runs:
        shapes = '"/><path d="'.join(paths)
        parts.append(f'<g class="{style}"><path d="{shapes}"/></g>')
    for style, anchor, labels in figure.lettering:
        letters = [f"<text x={label.x} y={label.y}>{safe(label.text)}</text>" for label in labels]
        parts.append(f'<g class="{style}{_ANCHORS[anchor]}">{"".join(letters)}</g>')
    return Markup("".join(parts))  # noqa: S704 - every text of it is safe


def table_rows(rows: Iterable[Sequence[str]]) -> Markup:
    """Rows of a table of figures."""
    lines = [f"<tr><td>{'<td>'.join(map(safe, row))}" for row in rows]
    return Markup("".join(lines))  # noqa: S704 - every text of it is safe


def cells(places: Sequence[CellRef], anchors: Mapping[CellRef, str]) -> Markup:
    """Addresses, each a link to its row of inputs as read; a sheet is named once, before its first cell."""
    parts = []
    sheet = None
    for place in places:
        name = safe(place.cell if (place.file, place.sheet) == sheet else str(place))
        sheet = place.file, place.sheet
        anchor = anchors.get(place)
        parts.append(f"<a href=#{anchor}>{name}</a>" if anchor else f'<span class="cell">{name}</span>')
    return Markup(", ".join(parts))  # noqa: S704 - every text of it is safe


def workings(steps: Iterable[Step], numbers: Numbers) -> Markup:
    """Items of a list of steps: what is worked out, its formula with numbers, the result."""
    items = [
        f"<li>{safe(numbers.prose(step.label))}: {safe(numbers.formula(step.formula))}"
        f" = <b>{safe(numbers.figure(step.value, step.unit))}</b>"
        for step in steps
    ]
    return Markup("".join(items))  # noqa: S704 - every text of it is safe
