"""The look of a figure's marks, written once: as rules for browsers, as attributes for the PDF.

A page names a mark's style by class only, which keeps forty figures small. WeasyPrint gives a drawing no
style of the page around it, so the PDF gets the same looks as attributes, and each drawing its title inside.
"""

from __future__ import annotations

import re
from collections import Counter

TYPEFACE = "Report Sans, Report Sans Wide, sans-serif"
MARKS = {
    "axis": 'fill="none" stroke="#5b6670" stroke-width="0.9"',
    "grid": 'fill="none" stroke="#dde2e6" stroke-width="0.7"',
    "zero": 'fill="none" stroke="#1c252d" stroke-width="1.2"',
    "first": 'fill="none" stroke="#0d5c75" stroke-width="1.8"',
    "second": 'fill="none" stroke="#8a4b00" stroke-width="1.6" stroke-dasharray="6 3"',
    "third": 'fill="none" stroke="#5a4a8a" stroke-width="1.6" stroke-dasharray="2 2.5"',
    "limit": 'fill="none" stroke="#a3262a" stroke-width="1.3" stroke-dasharray="8 3 2 3"',
    "guide": 'fill="none" stroke="#5b6670" stroke-width="0.9" stroke-dasharray="3 3"',
    "span": 'fill="none" stroke="#0d5c75" stroke-width="4"',
    "claimspan": 'fill="none" stroke="#1c252d" stroke-width="1.6"',
    "expected": 'fill="#bcd6df" stroke="#0d5c75" stroke-width="0.9"',
    "shade": 'fill="#eef1f3" stroke="none"',
    "guard": 'fill="#f3e6cf" stroke="none"',
    "panel": 'fill="#3c4852" stroke="none"',
    "claim": 'fill="#1c252d" stroke="#ffffff" stroke-width="0.8"',
    "good": 'fill="#1b6e4a" stroke="none"',
    "near": 'fill="#c98a1b" stroke="#7a5000" stroke-width="0.9"',
    "bad": 'fill="#a3262a" stroke="none"',
    "open": 'fill="#ffffff" stroke="#59636e" stroke-width="1.2"',
}
"""Lines and shapes; hues differ, and so do widths, dashes and greys."""
LETTERS = {
    "text": 'font-size="11" fill="#1c252d"',
    "small": 'fill="#4d5862"',
    "strong": 'font-size="11" font-weight="600" fill="#1c252d"',
    "limit-text": 'fill="#a3262a"',
    "first-text": 'fill="#0d5c75"',
    "second-text": 'fill="#8a4b00"',
    "third-text": 'fill="#5a4a8a"',
}
_ANCHORS = {"m": 'text-anchor="middle"', "e": 'text-anchor="end"'}
_LOOKS = {**MARKS, **LETTERS, **_ANCHORS}
_GROUP = re.compile(r'<g class="([a-z -]+)"(?: id=(g[0-9]+))?>(.*?)</g>|<use href=#(g[0-9]+) />')
_DRAWING = re.compile(r'(<p class="figure-title"[^>]*>)([^\n]*)(</p>\n<svg)([^>]*>)')
_WORTH_SHARING = 90
"""Least size [characters] of a group that is drawn once and referred to."""


def rules() -> str:
    """Style rules of every mark, for the head of a page."""
    looks = "".join(f"g.{name}{{{_declared(look)}}}\n" for name, look in _LOOKS.items())
    return f"svg{{font:10px {TYPEFACE}}}\n{looks}"


def shared_groups(page: str) -> str:
    """The page with groups of marks that occur again, such as equal axes, drawn once and referred to."""
    counts = Counter(found[0] for found in _GROUP.finditer(page) if len(found[0]) > _WORTH_SHARING)
    names: dict[str, str] = {}

    def put(found: re.Match[str]) -> str:
        group = found[0]
        if counts[group] < 2:
            return group
        if group in names:
            return f"<use href=#{names[group]} />"
        names[group] = f"g{len(names) + 1}"
        return f'<g class="{found[1]}" id={names[group]}>{found[3]}</g>'

    return _GROUP.sub(put, page)


def for_print(page: str) -> str:
    """The page with looks and titles written into its drawings, and no drawing referring to another."""
    drawn: dict[str, str] = {}

    def put(found: re.Match[str]) -> str:
        style, name, content, wanted = found.groups()
        if wanted:
            return drawn[wanted]
        group = f"<g {' '.join(_LOOKS[part] for part in style.split())}>{content}</g>"
        if name:
            drawn[name] = group
        return group

    page = _DRAWING.sub(rf'\1\2\3 font-size="10" font-family="{TYPEFACE}"\4<title>\2</title>', page)
    return _GROUP.sub(put, page.replace(rules(), "", 1))


def _declared(look: str) -> str:
    """Attributes as declarations of a style rule."""
    pairs = re.findall(r'([a-z-]+)="([^"]*)"', look)
    return ";".join(f"{name}:{value}{'px' if name == 'font-size' else ''}" for name, value in pairs)
