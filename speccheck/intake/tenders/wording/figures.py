"""Figures inside running text: numbers, ranges, tolerances, sizes, two-carrier powers, with their unit."""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from enum import StrEnum

from speccheck.quantities import unit_name


class Form(StrEnum):
    """How a figure is written."""

    PLAIN = "plain"
    RANGE = "range"
    TOLERANCE = "tolerance"
    PLUS_MINUS = "plus-minus"
    SIZE = "size"
    CARRIERS = "carriers"


@dataclass(frozen=True, slots=True)
class Figure:
    """A figure as written: one to three numbers in `unit` ("" if none), or an ambiguous `text`.

    RANGE holds both ends, TOLERANCE the middle and the slack, PLUS_MINUS and PLAIN one number,
    SIZE two or three, CARRIERS the count and the power of each.
    """

    form: Form
    numbers: tuple[float, ...]
    unit: str
    slack_unit: str = ""
    ambiguous: bool = False

    def with_unit(self, unit: str) -> Figure:
        """The same figure under a unit printed once for a list of them."""
        return replace(self, unit=unit)


_NUMBER = r"\d{1,3}(?:[ ']\d{3})+(?![\d])(?:[.,]\d+)?|\d+(?:[.,]\d+)?"
_SIGNED = rf"(?:[-+](?=\d))?(?:{_NUMBER})"
_UNIT = (
    r"dBi|dBd|dBc|dBm|dBW|dB|°\s?C|degrees?\s?C|deg\.?\s?C|°|degrees?|deg\b\.?|Grad\b|GHz|MHz|kHz|mm|cm|m/s|mph|km/h|kmh|kph"
    r"|kN|N\b|lbf|(?-i:lbs?\b)|kg|kW|W\b|watts?\b|ohms?\b|Ω|λ|lambda\b|inch(?:es)?\b|in\b(?=\s*(?:$|[,;)]))|ft\b|m\b|g\b|%|years?\b|hours?\b|h\b|V\b|VDC|:\s?1(?![\d.])"
)
_TO = r"\s*(?:-|–|\.{2,3}|÷|~|\bto\b|\bbis\b|\bà\b|\bhasta\b|\ba\b)\s*"
_TIMES = r"\s*[x×*]\s*"
_LEAD = r"(?<![\w.,])"

_PATTERNS: tuple[tuple[Form, re.Pattern[str]], ...] = tuple(
    (form, re.compile(_LEAD + text, re.IGNORECASE))
    for form, text in (
        (Form.CARRIERS, rf"(?P<a>\d){_TIMES}(?P<b>{_SIGNED})\s*(?P<u2>dBm|W\b)"),
        (
            Form.SIZE,
            rf"(?P<a>{_NUMBER})(?:\s*(?P<u1>{_UNIT}))?(?:{_TIMES}(?:{_NUMBER})(?:\s*(?:{_UNIT}))?){{1,2}}",
        ),
        (
            Form.TOLERANCE,
            rf"(?P<a>{_SIGNED})(?:\s*(?P<u1>{_UNIT}))?\s*(?:±|\+/-|\+-)\s*(?P<b>{_NUMBER})(?:\s*(?P<u2>{_UNIT}))?",
        ),
        (
            Form.RANGE,
            rf"(?:between|zwischen|entre|from|von|de)\s+(?P<a>{_SIGNED})(?:\s*(?P<u1>{_UNIT}))?"
            rf"\s+(?:and|to|und|bis|et|à|y|a)\s+(?P<b>{_SIGNED})(?:\s*(?P<u2>{_UNIT}))?",
        ),
        (Form.RANGE, rf"(?P<a>{_SIGNED})(?:\s*(?P<u1>{_UNIT}))?{_TO}(?P<b>{_SIGNED})(?:\s*(?P<u2>{_UNIT}))?"),
        (Form.PLUS_MINUS, rf"(?:±|\+/-|\+-)\s*(?P<a>{_NUMBER})(?:\s*(?P<u1>{_UNIT}))?"),
        (Form.PLAIN, rf"(?P<a>{_SIGNED})(?:\s*(?P<u1>{_UNIT}))?"),
    )
)
_IN_SIZE = re.compile(_NUMBER)
_TRAILING_UNIT = re.compile(rf"(?:{_UNIT})\s*$", re.IGNORECASE)


def match_figure(text: str, start: int, *, decimal_comma: bool | None = None) -> tuple[str, Figure] | None:
    """The longest figure beginning at `start` of `text`, as written and as read."""
    best: tuple[str, Figure] | None = None
    for form, pattern in _PATTERNS:
        found = pattern.match(text, start)
        if found and (best is None or len(found.group()) > len(best[0])):
            best = found.group(), _figure(form, found, decimal_comma)
    return best


def number(text: str, decimal_comma: bool | None = None) -> tuple[float, bool]:
    """A number as written, and whether it admits two readings ('1,234' with no known habit)."""
    body = text.replace(" ", "").replace("'", "")
    comma = "," in body
    grouped = re.fullmatch(r"[-+]?\d{1,3},\d{3}", body) is not None and not body.lstrip("+-").startswith("0")
    if decimal_comma and "." in body and re.fullmatch(r"[-+]?\d{1,3}\.\d{3}", body):
        return float(body.replace(".", "")), False
    if comma and grouped and decimal_comma is False:
        return float(body.replace(",", "")), False
    return float(body.replace(",", ".")), bool(comma and grouped and decimal_comma is None)


def _figure(form: Form, found: re.Match[str], decimal_comma: bool | None) -> Figure:
    if form is Form.SIZE:
        return _size(found.group(), decimal_comma)
    parts = found.groupdict()
    read = [number(parts[name], decimal_comma) for name in ("a", "b") if parts.get(name)]
    first, last = unit_name(parts.get("u1") or ""), unit_name(parts.get("u2") or "")
    return Figure(
        form=form,
        numbers=tuple(value for value, _ in read),
        unit=first or last,
        slack_unit=last or first if form is Form.TOLERANCE else "",
        ambiguous=any(doubtful for _, doubtful in read),
    )


def _size(written: str, decimal_comma: bool | None) -> Figure:
    trailing = _TRAILING_UNIT.search(written)
    read = [number(piece, decimal_comma) for piece in _IN_SIZE.findall(written)]
    return Figure(
        form=Form.SIZE,
        numbers=tuple(value for value, _ in read),
        unit=unit_name(trailing.group()) if trailing else "",
        ambiguous=any(doubtful for _, doubtful in read),
    )
