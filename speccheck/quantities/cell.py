"""One cell to quantities or a status: the entry of the package."""

from __future__ import annotations

import functools
import math
import re
from dataclasses import replace
from datetime import date, datetime, time, timedelta

from speccheck.quantities.amounts import Amount, amounts
from speccheck.quantities.assumptions import time_share, with_usual_unit
from speccheck.quantities.attachments import connectors, polarisations
from speccheck.quantities.content import CellContent, Quantity
from speccheck.quantities.counts import count_of_claims, special_count
from speccheck.quantities.dates import undo_date
from speccheck.quantities.decimals import Expected, Span, choose
from speccheck.quantities.figures import Claim, claims, quantity, unread_words
from speccheck.quantities.lexer import Token, tokens
from speccheck.quantities.numerals import numeral
from speccheck.quantities.ranges import one_range, scan_range
from speccheck.quantities.shown import shown_around
from speccheck.quantities.sizes import sides_by_letter
from speccheck.quantities.spectrum import band_names, bands
from speccheck.quantities.spelled import (
    as_ratio,
    in_digits,
    in_one_unit,
    without_ordinals,
    without_setting_letter,
)
from speccheck.quantities.statuses import declares, is_error_value, status_of
from speccheck.quantities.tidy import split_footnotes, tidy
from speccheck.quantities.units import unit_name

Raw = str | float | int | bool | datetime | date | time | timedelta | None

_LONGEST_TEXT = 1000
_POLARISATIONS = (1, 2, 3, 4)
_COUNTED = ("count", "connectors")
_PLAIN = re.compile(r"-?[0-9]{1,4}(?:[.,][0-9]{1,2})?")
_TOLERANCE_WORD = re.compile(
    r"[,;(]?\s*\b(?:toleran[cz]\w*|tolérance|tolerância|tolleranza|tolerantie)\s*(?:of|von|de|di|:)?\s*(?=[±+])",
    re.IGNORECASE,
)


_expected = functools.lru_cache(maxsize=1024)(Expected)
"""One object for all cells of a heading: what is known of a text is then found by identity."""


def read_cell(
    raw: Raw,
    *,
    kind: str,
    unit: str = "",
    decimal_comma: bool | None = None,
    number_format: str = "",
    expected: str | None = None,
    plausible: Span | None = None,
    possible: Span | None = None,
) -> CellContent:
    """Understand one cell.

    Parameters
    ----------
    raw : value of the cell
    kind : the parameter's kind: number, count, range, scan, bands, polarisation, connectors, size, text
    unit : unit found in the heading or the unit column, any spelling
    decimal_comma : habit of the file, None when it shows none
    number_format : the spreadsheet's format of the cell; its literal may be a unit
    expected : unit of the parameter, "" for a pure number; tells claims from their conditions
    plausible, possible : spans of the parameter [`expected`] that may settle an ambiguous decimal sign

    Returns
    -------
    CellContent; never raises for any content
    """
    if raw is None:
        return CellContent(status="missing")
    wanted = _expected(kind, unit_name(unit), decimal_comma, expected, plausible, possible)
    if isinstance(raw, str):
        return _read_text(raw, wanted)
    if isinstance(raw, bool):
        return CellContent(status="declared", notes=("yes" if raw else "no",))
    if isinstance(raw, datetime | date):
        return undo_date(raw, kind, wanted.unit, plausible)
    if isinstance(raw, int | float):
        return with_usual_unit(_read_number(float(raw), wanted, number_format), wanted)
    return CellContent(rest=str(raw), notes=("a time of day, not a figure",))


def _read_number(number: float, wanted: Expected, number_format: str) -> CellContent:
    if not math.isfinite(number):
        return CellContent(rest=str(number), notes=("not a finite number",))
    if number_format and number_format != "General":
        seen = _as_shown(number, wanted, number_format)
        if seen is not None:
            return seen
    if wanted.kind == "text":
        return CellContent(quantities=(Quantity(value=f"{number:.15g}"),))
    if wanted.kind == "connectors":
        return CellContent(quantities=(Quantity(value=number, parameter="rf_ports"),))
    if wanted.kind == "polarisation" and number not in _POLARISATIONS:
        return CellContent(rest=f"{number:g}", notes=("not a number of polarisations",))
    unit = wanted.unit
    if wanted.kind == "bands":
        unit = unit or "MHz"
    return CellContent(quantities=(Quantity(value=number, unit=unit),))


def _as_shown(number: float, wanted: Expected, number_format: str) -> CellContent | None:
    """A number with the sign, word or unit that its format shows; None where the format adds nothing."""
    around = shown_around(number_format, negative=number < 0)
    if around is None:
        return None
    content = _read_text(around.text(number), replace(wanted, decimal_comma=False))
    if len(content.quantities) != 1 or content.status or (content.rest and around.scale < 1.0):
        return None
    value = content.quantities[0].value
    if wanted.kind in ("polarisation", "text", "bands"):
        return content
    largest = value[1] if isinstance(value, tuple) else value
    return content if isinstance(largest, float) and math.isclose(largest, number * around.scale) else None


@functools.lru_cache(maxsize=16384)
def _read_text(raw: str, wanted: Expected) -> CellContent:
    if len(raw) > _LONGEST_TEXT and wanted.kind != "text":
        note = f"longer than {_LONGEST_TEXT} characters: not read as a figure"
        return CellContent(rest=raw[:_LONGEST_TEXT], notes=(note,))
    if wanted.kind == "number" and _PLAIN.fullmatch(raw):
        plain = Quantity(value=float(raw.replace(",", ".")), unit=wanted.unit)
        return with_usual_unit(CellContent(quantities=(plain,)), wanted)
    if is_error_value(raw):
        return CellContent(rest=raw.strip(), notes=("an error value of the spreadsheet",))
    status = status_of(tidy(raw), answers_count=wanted.kind != "text")
    if status:
        return CellContent(status=status, notes=(raw.strip(),) if status == "declared" else ())
    body, marks = split_footnotes(raw, bracketed=wanted.kind in ("number", "range", "scan", "size"))
    text = _TOLERANCE_WORD.sub(" ", tidy(body))
    if wanted.kind == "text":
        return CellContent(quantities=(Quantity(value=text),), footnotes=marks)
    text = _plainly(text, wanted)
    content = time_share(text, wanted) or with_usual_unit(_read_figures(text, wanted), wanted)
    if not content.quantities and not content.rest:
        content = replace(content, rest=text or raw.strip())
    return replace(content, footnotes=marks, status="declared" if declares(text) else None)


def _plainly(text: str, wanted: Expected) -> str:
    """The text with its figures in digits, one unit and plain signs, as far as its parameter tells."""
    if wanted.kind in _COUNTED:
        return in_digits(text, before_names=wanted.kind == "connectors")
    if wanted.kind == "number":
        text = without_ordinals(text)
        return as_ratio(text) if wanted.parameter_unit == "" else in_one_unit(text)
    return without_setting_letter(text) if wanted.kind == "range" else in_one_unit(text)


def _read_figures(text: str, wanted: Expected) -> CellContent:
    if wanted.kind == "connectors":
        found, rest = connectors(text)
        return CellContent(quantities=tuple(found), rest=rest)
    if wanted.kind == "polarisation":
        number = polarisations(text)
        return CellContent(rest=text) if number is None else CellContent(quantities=(Quantity(value=number),))
    if wanted.kind == "count":
        special = special_count(text)
        if special:
            return special
    if wanted.kind == "size":
        sides, text = sides_by_letter(text)
        if sides:
            return _with_sides(_read_figures(text, wanted), sides)
    names, body = band_names(text) if wanted.kind == "bands" else ((), text)
    parts = tokens(body)
    point = _parse(text, parts, names, wanted, comma=False)
    if all(numeral(t.text, comma=False) == numeral(t.text, comma=True) for t in parts if t.kind == "num"):
        return point
    comma = _parse(text, parts, names, wanted, comma=True)
    return point if point == comma else choose(point, comma, wanted)


def _with_sides(content: CellContent, sides: tuple[str, ...]) -> CellContent:
    if len(content.quantities) != len(sides):
        return content
    named = [replace(q, parameter=side) for q, side in zip(content.quantities, sides, strict=True)]
    return replace(content, quantities=tuple(named))


def _parse(
    text: str, parts: list[Token], names: tuple[str, ...], wanted: Expected, *, comma: bool
) -> CellContent:
    found, stray = amounts(parts, comma=comma)
    if any(math.isnan(a.low) or (a.high is not None and math.isnan(a.high)) for a in found):
        return CellContent(rest=text)
    if wanted.kind == "bands":
        ranges = bands(found, names, wanted.unit)
        return CellContent(quantities=tuple(ranges), rest="" if ranges else text)
    quantities = _sizes(found, wanted.unit) if wanted.kind == "size" else _figures(found, wanted)
    return CellContent(quantities=tuple(quantities), rest=unread_words(found, stray))


def _figures(found: list[Amount], wanted: Expected) -> list[Quantity]:
    read = claims(found, wanted.unit, wanted.parameter_unit)
    symmetric = wanted.kind in ("range", "scan")
    result = [quantity(c, wanted.unit, wanted.parameter_unit or "", symmetric=symmetric) for c in read]
    if symmetric:
        result = one_range(result)
    if wanted.kind == "scan":
        return [scan_range(q) for q in result]
    return count_of_claims(read, result) if wanted.kind == "count" else result


def _sizes(found: list[Amount], unit: str) -> list[Quantity]:
    """One quantity a factor of '1998 × 356 × 115 mm', in order; figures in parentheses are left out."""
    plain = [a for a in found if a.role == ""] or found
    return [quantity(Claim(a), unit) for a in plain]
