"""Claims to readings: the cell read by its parameter's kind, converted, with how it was recognised."""

from __future__ import annotations

import re
from collections.abc import Iterator
from dataclasses import replace
from functools import lru_cache

from speccheck.dictionary import Parameter, parameters, specified
from speccheck.intake.files.grid import Cell, Raw
from speccheck.intake.panels.found import Figure, Found, Outcome, spread
from speccheck.intake.panels.unitless import with_unit
from speccheck.intake.tables.claims import Claim, Context
from speccheck.quantities import (
    CellContent,
    DecimalHabit,
    Quantity,
    UnknownUnitError,
    array_of,
    read_cell,
    settle,
)
from speccheck.records import CellRef, Sense, Statement, Status, Unread
from speccheck.text import plain

MAX_WORDS = re.compile(
    r"(?<![a-z])(?:max(?:imum|imal\w*|i|\.)?|p\s?max|massim\w+|m[áa]xim\w+|maks\w*)(?![a-z])", re.IGNORECASE
)
MIN_WORDS = re.compile(
    r"(?<![a-z])(?:min(?:imum|imal\w*|\.)?|m[íi]nim\w+|at least|mindest\w*)(?![a-z])", re.IGNORECASE
)
_UNIT_CONDITION = re.compile(r"\s*(?:@|\bat\b|\bbei\b|[(\[]?(?=2\s?[x×]\s?\d))\s*(.+?)[)\]]?\s*$")
_AMBIGUOUS = re.compile(r"\d[.,]\d{3}(?!\d)")
_MOST_DIFFERENT = 20_000
"""A catalogue repeats its figures; more different ones than this are no bid, and understanding takes time."""
_FEWEST_OF_SEVERAL = {"array_rows": 2, "subarray_rows": 1}  # a plain number of rows may stand alone
_IDENTITY_UNITS = ("", "–", "-", "—")


_Understood = tuple[CellContent, tuple[Figure, ...], str]


class Reader:
    """Reads claims of one file; equal cells under one heading are understood once.

    Contexts are told apart by identity, so they must live as long as the reader.
    """

    def __init__(self, file: str, habit: DecimalHabit) -> None:
        self._file, self._habit = file, habit
        self._known: dict[tuple[int, type, Raw, str], _Understood] = {}

    def where(self, sheet: str, address: str) -> CellRef:
        """The reference of a cell."""
        return CellRef(self._file, sheet, address)

    def figures(self, cell: Cell, context: Context) -> tuple[Figure, ...]:
        """What a cell would say under a heading, claimed or not."""
        return () if cell.fault else self._understand(cell.raw, context, cell.number_format)[1]

    def read(self, claim: Claim, sheet: str) -> Outcome:
        """Readings of one claim, or its statement, or why it was not read."""
        cell, context = claim.cell, claim.context
        where = CellRef(self._file, sheet, cell.address)
        if cell.fault:
            return Outcome(
                sheet,
                unread=Unread(where=where, text=cell.text, reason=cell.fault, suggestion=_remedy(cell.fault)),
            )
        raw: Raw = cell.raw if claim.text is None else claim.text
        if isinstance(raw, str) and raw.startswith("'"):
            raw = raw[1:]  # the sign that a spreadsheet shall keep a cell as text
        key = (id(context), type(raw), raw, cell.number_format)
        known = self._known.get(key)
        if known is None and len(self._known) > _MOST_DIFFERENT:
            reason = f"more than {_MOST_DIFFERENT} different cells in one file; it was not read"
            unread = Unread(
                where=where, text=plain(cell.text, 80), reason=reason, suggestion="split the file"
            )
            return Outcome(sheet, unread=unread)
        if known is None:
            known = self._known[key] = self._understand(raw, context, cell.number_format)
        content, figures, trouble = known
        if not figures or content.status is not None or trouble or claim.tolerance is not None:
            return self._read_with_care(claim, sheet, where, known)
        if len(figures) == 1:  # nearly every cell of a catalogue
            return Outcome(sheet, [_found(where, claim, figures[0])], None, None, content.footnotes)
        return Outcome(sheet, [_found(where, claim, f) for f in figures], None, None, content.footnotes)

    def _read_with_care(self, claim: Claim, sheet: str, where: CellRef, understood: _Understood) -> Outcome:
        """A claim whose cell says no figure, or more than one."""
        cell, context = claim.cell, claim.context
        content, figures, trouble = understood
        first = context.label.parameters[0]
        outcome = Outcome(
            sheet, [_found(where, claim, figure) for figure in figures], footnotes=content.footnotes
        )
        if content.status is not None:
            outcome.statement = Statement(
                where=where,
                parameter=first,
                raw=cell.text,
                status=Status(content.status),
                band=claim.band,
                heading=context.heading,
            )
        elif not figures:
            trouble = trouble or f"no {parameters()[first].label} could be read from it"
        if trouble:
            hint = "" if figures else _example(first)
            outcome.unread = Unread(where=where, text=cell.text, reason=trouble, suggestion=hint)
        self._add_tolerance(outcome.found, claim)
        return outcome

    def _add_tolerance(self, found: list[Found], claim: Claim) -> None:
        """A tolerance in a column of its own holds for the figure of its row."""
        if claim.tolerance is None or claim.tolerance.fault:
            return
        key = claim.context.label.parameters[0]
        content = read_cell(
            claim.tolerance.raw, kind="number", unit=_unit(claim.context)[0], expected=parameters()[key].unit
        )
        for quantity in content.quantities[:1]:
            for one in found:
                if one.tolerance is None and isinstance(one.value, float):
                    one.tolerance = spread(quantity, one)

    def _understand(self, raw: Raw, context: Context, number_format: str) -> _Understood:
        label = context.label
        keys = label.parameters
        table = parameters()
        first = table[keys[0]]
        content = read_cell(
            raw,
            kind=first.kind if len(keys) == 1 else "size",
            unit=_unit(context)[0],
            decimal_comma=self._habit.comma,
            number_format=number_format,
            expected=first.unit,
            plausible=first.plausible,
            possible=first.possible,
        )
        trouble = ""
        figures = []
        tail = self._tail(raw, content)
        for parameter, quantity in _paired(keys, content.quantities):
            try:
                figures.append(_figure(table[parameter], quantity, context, tail))
            except UnknownUnitError as error:
                trouble = str(error)
        if len(keys) > 1 and content.quantities and not figures and not trouble:
            trouble = f"{len(content.quantities)} figures for {len(keys)} parameters ({', '.join(keys)})"
        return content, tuple(figures), trouble

    def _tail(self, raw: Raw, content: CellContent) -> str:
        """What else is to be said of how a cell was read."""
        parts = [*content.notes]
        if self._habit.comma is not None and isinstance(raw, str) and _AMBIGUOUS.search(raw):
            parts.append(f"decimal sign settled by the file: {self._habit.why}")
        if _substantial(content.rest):
            parts.append(f"beside the figure stands '{plain(content.rest, 80)}'")
        return "".join(f"; {part}" for part in parts)


def _found(where: CellRef, claim: Claim, figure: Figure) -> Found:
    quantity = figure.quantity
    return Found(
        where,
        claim.cell.text,
        claim.context.heading,
        figure,
        figure.parameter,
        quantity.value,
        claim.band or figure.band,
        quantity.tolerance,
    )


def _figure(parameter: Parameter, quantity: Quantity, context: Context, tail: str) -> Figure:
    quantity, supplied = with_unit(quantity, parameter)
    settled = settle(
        quantity, parameter.unit, sign=parameter.sign, direction=parameter.direction, keep=parameter.keep
    )
    label = context.label
    said = set(re.findall(r"\w+", context.condition))
    of_label = "" if set(re.findall(r"\w+", label.condition)) <= said else label.condition
    of_unit = next(iter(_UNIT_CONDITION.findall(context.unit)), "")
    conditions = (context.band_name, of_label, context.condition, settled.condition, of_unit)
    how = label.how or f"heading '{context.heading or label.text}'"
    if quantity.unit or parameter.unit:
        how += f"; {supplied or _unit_told(quantity, _unit(context)[1], parameter)}"
    at = _at(" ".join(filter(None, (*conditions[1:3], of_unit))), parameter.unit) | dict(settled.at)
    named = "frequency_high_mhz" in at
    return Figure(
        parameter=parameter.key,
        quantity=replace(settled, alternatives=quantity.alternatives) if supplied else settled,
        unit=settled.unit or parameter.unit,
        sense=_sense(settled, context),
        statistic=settled.statistic or _statistic(context, parameter),
        recognised=how + tail,
        condition="; ".join(dict.fromkeys(filter(None, conditions))),
        at=at,
        band=(at["frequency_low_mhz"], at["frequency_high_mhz"]) if named else None,
    )


def _paired(keys: tuple[str, ...], quantities: tuple[Quantity, ...]) -> Iterator[tuple[str, Quantity]]:
    table = parameters()
    if len(keys) == 1:
        for quantity in quantities:
            own = quantity.parameter if quantity.parameter in table else keys[0]
            yield specified(own, quantity.condition), quantity
            if own == "element_count":
                yield from ((part.parameter, part) for part in array_of(quantity))
    elif len(quantities) == len(keys) or len(keys) > len(quantities) >= _FEWEST_OF_SEVERAL.get(keys[0], 9):
        yield from zip(keys, quantities, strict=False)


def _unit(context: Context) -> tuple[str, str]:
    for unit, source in ((context.unit, "unit column"), (context.label.unit, "heading")):
        if unit.strip() not in _IDENTITY_UNITS:
            return _UNIT_CONDITION.sub("", unit), source
    return "", ""


def _unit_told(quantity: Quantity, source: str, parameter: Parameter) -> str:
    unit = quantity.unit or parameter.unit
    if not quantity.unit:
        return f"no unit given, {unit} taken"
    return f"unit {unit} from the {source or 'cell'}"


def _sense(settled: Quantity, context: Context) -> Sense:
    """What the sign in the cell bounds, else the word in the heading, the column or the condition."""
    if settled.sense != "nominal" or not isinstance(settled.value, float):
        return Sense(settled.sense)
    if context.label.sense != "nominal":
        return Sense(context.label.sense)
    if context.statistic in ("min", "max"):
        return Sense(context.statistic)
    smallest, largest = (bool(words.search(context.condition)) for words in (MIN_WORDS, MAX_WORDS))
    if smallest != largest:
        return Sense.MIN if smallest else Sense.MAX
    return Sense.NOMINAL


def _statistic(context: Context, parameter: Parameter) -> str:
    if parameter.kind != "number":
        return ""
    return context.label.statistic or ("typical" if context.statistic == "typ" else "")


@lru_cache(maxsize=2000)
def _at(condition: str, unit: str) -> dict[str, float]:
    """Conditions of a heading by name, understood as if they stood in the cell behind a figure."""
    if not any(letter.isdigit() for letter in condition):
        return {}
    found = read_cell(f"1 {unit} @ {condition}", kind="number", expected=unit).quantities
    return dict(found[0].at) if len(found) == 1 and found[0].value == 1.0 else {}


def _substantial(rest: str) -> bool:
    return sum(letter.isalnum() for letter in rest) >= 2


def _example(key: str) -> str:
    examples = parameters()[key].examples
    return f"such as '{examples[0].cell}'" if examples else ""


def _remedy(fault: str) -> str:
    if fault.startswith("formula"):
        return "open the file in a spreadsheet program and save it, so that results are stored"
    return "ask the bidder for the figure"
