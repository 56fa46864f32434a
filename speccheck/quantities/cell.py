"""One cell to quantities or a status: the entry of the package."""

from __future__ import annotations

import functools
import math
import re
from dataclasses import replace
from datetime import date, datetime, time, timedelta

from speccheck.quantities.amounts import Amount, amounts
from speccheck.quantities.attachments import connectors, polarisations
from speccheck.quantities.content import CellContent, Quantity, Value
from speccheck.quantities.dates import undo_date
from speccheck.quantities.figures import Claim, claims, quantity, unread_words
from speccheck.quantities.lexer import tokens
from speccheck.quantities.spectrum import band_names, bands
from speccheck.quantities.statuses import declares, is_error_value, status_of
from speccheck.quantities.tidy import split_footnotes, tidy
from speccheck.quantities.units import UnknownUnitError, convert, unit_name

Raw = str | float | int | bool | datetime | date | time | timedelta | None
Span = tuple[float, float]

_LONGEST_TEXT = 1000
_TRANSCEIVERS = re.compile(r"(\d{1,4})\s?T\s?[/x-]?\s?(\d{1,4})\s?R(?![a-z])", re.IGNORECASE)
_FORMAT_UNIT = re.compile(r'["\[ \\]([^"\]\\;]+?)["\]\\;]*$')
_FACTORS = re.compile(r"^\d{1,3}(?:\s?[×xX*]\s?\d{1,3}){1,2}(?:\s?=\s?(\d{1,5}))?$")


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
    if isinstance(raw, str):
        return _read_text(raw, kind, unit_name(unit), decimal_comma, expected, plausible, possible)
    return _read_value(raw, kind, unit_name(unit), number_format, plausible)


def _read_value(raw: Raw, kind: str, unit: str, number_format: str, plausible: Span | None) -> CellContent:
    if isinstance(raw, bool):
        return CellContent(status="declared", notes=("yes" if raw else "no",))
    if isinstance(raw, datetime | date):
        return undo_date(raw, kind, unit, plausible)
    if isinstance(raw, int | float):
        return _read_number(float(raw), kind, unit, number_format)
    return CellContent(rest=str(raw), notes=("a time of day, not a figure",))


def _read_number(number: float, kind: str, unit: str, number_format: str) -> CellContent:
    if not math.isfinite(number):
        return CellContent(rest=str(number), notes=("not a finite number",))
    if kind == "text":
        return CellContent(quantities=(Quantity(value=f"{number:g}" if number < 1e6 else f"{number:.15g}"),))
    if number_format and number_format != "General":
        if "%" in number_format and '"' not in number_format:
            return CellContent(quantities=(Quantity(value=number * 100, unit="%"),))
        literal = _FORMAT_UNIT.search(number_format.split(";")[0])
        unit = (unit_name(literal.group(1)) if literal else "") or unit
    if kind == "connectors":
        return CellContent(quantities=(Quantity(value=number, parameter="rf_ports"),))
    if kind == "bands" and not unit:
        unit = "MHz"
    return CellContent(quantities=(Quantity(value=number, unit=unit),))


@functools.lru_cache(maxsize=16384)
def _read_text(
    raw: str, kind: str, unit: str, decimal_comma: bool | None, expected: str | None,
    plausible: Span | None, possible: Span | None,
) -> CellContent:  # fmt: skip
    if len(raw) > _LONGEST_TEXT and kind != "text":
        return CellContent(
            rest=raw[:_LONGEST_TEXT], notes=(f"longer than {_LONGEST_TEXT} characters: not read as a figure",)
        )
    if is_error_value(raw):
        return CellContent(rest=raw.strip(), notes=("an error value of the spreadsheet",))
    status = status_of(tidy(raw), answers_count=kind != "text")
    if status:
        return CellContent(status=status, notes=(raw.strip(),) if status == "declared" else ())
    body, marks = split_footnotes(raw, bracketed=kind in ("number", "range", "scan"))
    text = tidy(body)
    if kind == "text":
        return CellContent(quantities=(Quantity(value=text),), footnotes=marks)
    content = _read_figures(text, kind, unit, decimal_comma, expected, plausible, possible)
    status = "declared" if declares(text) else None
    return replace(content, footnotes=marks, status=status)


def _read_figures(
    text: str, kind: str, unit: str, decimal_comma: bool | None, expected: str | None,
    plausible: Span | None, possible: Span | None,
) -> CellContent:  # fmt: skip
    if kind == "connectors":
        found, rest = connectors(text)
        return CellContent(quantities=tuple(found), rest="" if not rest else rest)
    if kind == "polarisation":
        number = polarisations(text)
        return CellContent(rest=text) if number is None else CellContent(quantities=(Quantity(value=number),))
    by_habit = {comma: _parse(text, kind, unit, expected, comma=comma) for comma in (False, True)}
    if by_habit[False] == by_habit[True]:
        return by_habit[False]
    return _settle_decimal(by_habit, decimal_comma, unit, expected, plausible, possible)


def _parse(text: str, kind: str, unit: str, expected: str | None, *, comma: bool) -> CellContent:
    if kind == "count":
        special = _special_count(text)
        if special:
            return special
    names: tuple[str, ...] = ()
    if kind == "bands":
        names, text = band_names(text)
    found, stray = amounts(tokens(text), comma=comma)
    if kind == "bands":
        quantities = bands([a for a in found if not math.isnan(a.low)], names, unit)
        return CellContent(quantities=tuple(quantities), rest="" if quantities else text)
    if any(math.isnan(a.low) or (a.high is not None and math.isnan(a.high)) for a in found):
        return CellContent(rest=text)
    if kind == "size":
        return CellContent(quantities=tuple(_sizes(found, unit)), rest=unread_words(found, stray))
    read = claims(found, unit, expected)
    quantities = [quantity(c, unit, symmetric=kind in ("range", "scan")) for c in read]
    if kind == "scan":
        quantities = [_scan(q) for q in quantities]
    if kind == "count":
        quantities = _counts(read, quantities)
    return CellContent(quantities=tuple(quantities), rest=unread_words(found, stray))


def _sizes(found: list[Amount], unit: str) -> list[Quantity]:
    """One quantity a factor of '1998 × 356 × 115 mm', in order; figures in parentheses are left out."""
    plain = [a for a in found if a.role == ""] or found
    return [quantity(Claim(a), unit) for a in plain]


def _scan(found: Quantity) -> Quantity:
    """A scan range without its ends: over 90° it can only be the total, else both readings stand."""
    if not isinstance(found.value, float) or found.sense != "nominal" or found.value <= 0:
        return found
    half = (-found.value / 2, found.value / 2)
    if found.value > 90:
        return replace(found, value=half, condition=found.condition or "total")
    return replace(found, value=(-found.value, found.value), alternatives=((-found.value, found.value), half))


def _special_count(text: str) -> CellContent | None:
    chains = _TRANSCEIVERS.search(text)
    if chains:
        sent, received = float(chains.group(1)), float(chains.group(2))
        pair = [Quantity(value=sent, condition="" if sent == received else "transmit")]
        if sent != received:
            pair.append(Quantity(value=received, condition="receive"))
        return CellContent(quantities=tuple(pair))
    factors = _FACTORS.match(text)
    if factors:
        parts = [float(n) for n in re.findall(r"\d+", text.split("=")[0])]
        stated = factors.group(1)
        return CellContent(
            quantities=(Quantity(value=float(stated) if stated else math.prod(parts), at=_factors(parts)),),
            notes=() if stated else (f"the product {text}",),
        )
    return None


def _factors(parts: list[float]) -> dict[str, float]:
    return {f"factor_{i}": part for i, part in enumerate(parts, start=1)}


def _counts(read: list[Claim], quantities: list[Quantity]) -> list[Quantity]:
    """'192 elements (12x8x2)' is 192; the factors in parentheses go into its conditions."""
    if not quantities:
        return quantities
    first = quantities[0]
    if len(read) == 2 and read[1].amount.role == "aside" and read[1].factors:
        return [replace(first, at=_factors([*read[1].factors, read[1].amount.low]))]
    if read[0].factors:
        factors = [*read[0].factors, read[0].amount.low]
        return [replace(first, value=math.prod(factors), at=_factors(factors))]
    return [first] if all(c.amount.role == "aside" for c in read[1:]) else quantities


def _settle_decimal(
    by_habit: dict[bool, CellContent], decimal_comma: bool | None, unit: str, expected: str | None,
    plausible: Span | None, possible: Span | None,
) -> CellContent:  # fmt: skip
    """Choose between the decimal point and the decimal comma, or show both readings."""
    likely = [c for c in (False, True) if _within(by_habit[c], unit, expected, plausible)]
    thinkable = [c for c in (False, True) if _within(by_habit[c], unit, expected, possible)]
    if decimal_comma is not None:
        chosen = by_habit[decimal_comma]
        if plausible is None or decimal_comma in likely or not likely:
            return chosen
        if decimal_comma not in thinkable:
            return replace(by_habit[not decimal_comma], notes=(_settled_note(by_habit, not decimal_comma),))
        return _both(by_habit, first=decimal_comma)
    if plausible is not None and len(likely) == 1:
        return replace(by_habit[likely[0]], notes=(_settled_note(by_habit, likely[0]),))
    return _both(by_habit, first=False)


def _within(content: CellContent, unit: str, expected: str | None, span: Span | None) -> bool:
    if span is None:
        return True
    for found in content.quantities:
        ends = found.value if isinstance(found.value, tuple) else (found.value,)
        for end in ends:
            if isinstance(end, str):
                continue
            try:
                number = convert(end, found.unit or unit, expected or "")
            except UnknownUnitError:
                continue
            if not span[0] <= number <= span[1]:
                return False
    return True


def _settled_note(by_habit: dict[bool, CellContent], chosen: bool) -> str:
    taken, other = (_shown(by_habit[c]) for c in (chosen, not chosen))
    return f"read as {taken}: {other} is outside what panels show"


def _shown(content: CellContent) -> str:
    return ", ".join(_figure(q.value) for q in content.quantities)


def _figure(value: Value) -> str:
    if isinstance(value, tuple):
        return f"{value[0]:.10g}-{value[1]:.10g}"
    return value if isinstance(value, str) else f"{value:.10g}"


def _both(by_habit: dict[bool, CellContent], *, first: bool) -> CellContent:
    chosen, other = by_habit[first], by_habit[not first]
    if len(chosen.quantities) != len(other.quantities):
        return replace(
            chosen,
            quantities=(),
            rest=chosen.rest or _shown(chosen),
            notes=("the decimal sign is not clear",),
        )
    merged = tuple(
        a if a == b else replace(a, alternatives=(a.value, b.value))
        for a, b in zip(chosen.quantities, other.quantities, strict=True)
    )
    return replace(chosen, quantities=merged, notes=(f"may be {_shown(chosen)} or {_shown(other)}",))
