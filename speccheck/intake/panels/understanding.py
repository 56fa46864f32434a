"""What a cell says under a heading, wherever it stands: its figures, and how they were recognised."""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from functools import lru_cache

from speccheck.dictionary import Parameter, match_heading, parameters
from speccheck.intake.files.grid import Raw
from speccheck.intake.panels.found import Figure
from speccheck.intake.panels.pairing import paired
from speccheck.intake.panels.slack import Slack, bare_unit, slack_of, with_slack, without_slack
from speccheck.intake.panels.unitless import with_unit
from speccheck.intake.tables.claims import Context
from speccheck.intake.tables.words import is_band_nickname
from speccheck.quantities import (
    CellContent,
    DecimalHabit,
    Quantity,
    UnknownUnitError,
    dimension,
    read_cell,
    settle,
    unit_name,
)
from speccheck.records import Sense
from speccheck.text import plain

MAX_WORDS = re.compile(
    r"(?<![a-z])(?:max(?:imum|imal\w*|i|\.)?|p\s?max|massim\w+|m[áa]xim\w+|maks\w*)(?![a-z])", re.IGNORECASE
)
MIN_WORDS = re.compile(
    r"(?<![a-z])(?:min(?:imum|imal\w*|\.)?|m[íi]nim\w+|at least|mindest\w*)(?![a-z])", re.IGNORECASE
)
_UNIT_CONDITION = re.compile(r"\s*(?:@|\bat\b|\bbei\b|[(\[]?(?=2\s?[x×]\s?\d))\s*(.+?)[)\]]?\s*$")
_AMBIGUOUS = re.compile(r"\d[.,]\d{3}(?!\d)")
_COUNT_AND_FACTORS = re.compile(
    r"\s*\d{1,4}\b(?!\s*[x×*/])[^\d(\[]*[(\[]\s*\d{1,3}\s*[x×*]\s*\d", re.IGNORECASE
)
_FACTORS_BEHIND = re.compile(r"\s*(?:[(\[,:]|\d)")
_IDENTITY_UNITS = ("", "–", "-", "—")
MOST_LETTERS = 120_000
"""Letters of different cells: time to understand grows with them, and catalogues repeat their figures."""
_OF_NUMBER, _OF_PLAIN_TEXT = 2, 20
"""A number takes the time of two letters; of text that is no figure, twenty letters take that of one."""


@dataclass(frozen=True, slots=True)
class Understood:
    """What cells of one content say under one heading; `refused` says why it was not looked at."""

    content: CellContent
    figures: tuple[Figure, ...] = ()
    trouble: str = ""
    refused: str = ""


_TOO_MUCH = Understood(
    CellContent(),
    refused=f"more than {MOST_LETTERS} letters of different cells in one file; it was not read",
)


@dataclass(frozen=True, slots=True)
class _Ground:
    """What a heading gives to every figure under it, whatever the cell says."""

    unit: str
    unit_source: str
    how: str
    conditions: tuple[str, str]
    of_unit: str
    slack: Slack | None


class Understanding:
    """Understands the cells of one file; equal cells under one heading once.

    Contexts are told apart by identity, so they must live as long as this.
    """

    def __init__(self, habit: DecimalHabit) -> None:
        self._habit = habit
        self._known: dict[tuple[int, type, Raw, str], Understood] = {}
        self._grounds: dict[int, _Ground] = {}
        self._room = MOST_LETTERS

    def of(self, raw: Raw, context: Context, number_format: str) -> Understood:
        """What a value says under a heading."""
        key = (id(context), type(raw), raw, number_format)
        known = self._known.get(key)
        if known is None:
            self._room -= _effort(raw, context)
            if self._room < 0:
                return _TOO_MUCH
            known = self._known[key] = self._understand(raw, context, number_format)
        return known

    def _understand(self, raw: Raw, context: Context, number_format: str) -> Understood:
        keys = _keys(context, raw)
        table = parameters()
        first = table[keys[0]]
        ground = self._grounds.get(id(context))
        if ground is None:
            ground = self._grounds[id(context)] = _ground(context)
        content = read_cell(
            raw,
            kind=first.kind if len(keys) == 1 else "size",
            unit=ground.unit,
            decimal_comma=self._habit.comma,
            number_format=number_format,
            expected=first.unit,
            plausible=first.plausible,
            possible=first.possible,
        )
        trouble = ""
        figures = []
        tail = self._tail(raw, content)
        for parameter, quantity in paired(keys, content.quantities):
            try:
                figures.append(_figure(table[parameter], quantity, context, ground, tail))
            except UnknownUnitError as error:
                trouble = str(error)
        if len(keys) > 1 and content.quantities and not figures and not trouble:
            trouble = f"{len(content.quantities)} figures for {len(keys)} parameters ({', '.join(keys)})"
        return Understood(content, tuple(figures), trouble)

    def _tail(self, raw: Raw, content: CellContent) -> str:
        """What else is to be said of how a cell was read."""
        parts = [*content.notes]
        if self._habit.comma is not None and isinstance(raw, str) and _AMBIGUOUS.search(raw):
            parts.append(f"decimal sign settled by the file: {self._habit.why}")
        if _substantial(content.rest):
            parts.append(f"beside the figure stands '{plain(content.rest, 80)}'")
        return "".join(f"; {part}" for part in parts)


def _effort(raw: Raw, context: Context) -> int:
    """Time that understanding a value takes, in letters."""
    letters = len(raw) if isinstance(raw, str) else 0
    text = parameters()[context.label.parameters[0]].kind == "text"
    return _OF_NUMBER + (letters // _OF_PLAIN_TEXT if text else letters)


def _keys(context: Context, raw: Raw) -> tuple[str, ...]:
    """Parameters a cell answers for, where the cell or the unit says it better than the heading.

    '192 elements (12x8x2)' under 'Elements (rows x columns x polarisations)' is their number, as 192 is
    under 'Elements' beside '12 rows x 8 columns'; a mounting kit in kilograms is a weight, and connectors of
    the low band are not all of the panel's.
    """
    label, keys = context.label, context.label.parameters
    if keys[:2] == ("array_rows", "array_columns"):
        counted = isinstance(raw, str) and _COUNT_AND_FACTORS.match(raw)
        alone = not isinstance(raw, str) or raw.strip().isdecimal()
        if counted or (alone and _names_elements(label.text)):
            return ("element_count",)
    elif keys == ("rf_ports",) and any(map(is_band_nickname, label.condition.split(", "))):
        return ("ports_per_band",)
    elif keys == ("mounting_kit",) and _is_mass(raw, _unit(context)[0]):
        return ("mounting_kit_weight",)
    return keys


@lru_cache(maxsize=200)
def _names_elements(text: str) -> bool:
    name = _FACTORS_BEHIND.split(text, maxsplit=1)[0]
    return match_heading(name, suggest=False).parameters == ("element_count",)


def _is_mass(raw: Raw, unit: str) -> bool:
    if isinstance(raw, str) and not any(map(str.isdigit, raw)):
        return False
    found = read_cell(raw, kind="number", unit=unit, expected="kg").quantities
    return len(found) == 1 and dimension(found[0].unit) == "mass"


def _ground(context: Context) -> _Ground:
    label = context.label
    unit, source = _unit(context)
    said = set(re.findall(r"\w+", context.condition))
    of_label = "" if set(re.findall(r"\w+", label.condition)) <= said else label.condition
    return _Ground(
        unit=unit,
        unit_source=source,
        how=label.how or f"heading '{context.heading or label.text}'",
        conditions=(of_label, context.condition),
        of_unit=next(iter(_UNIT_CONDITION.findall(context.unit)), ""),
        slack=slack_of(label, context.unit),
    )


def _figure(parameter: Parameter, quantity: Quantity, context: Context, ground: _Ground, tail: str) -> Figure:
    if parameter.unit == "" and parameter.kind in ("number", "count"):
        _refuse_unit(quantity, ground.unit, parameter)
    quantity, supplied = with_unit(quantity, parameter)
    slack = with_slack(quantity, ground.slack, parameter)
    of_heading = tuple(map(without_slack, ground.conditions)) if slack is not quantity else ground.conditions
    quantity = slack
    settled = settle(
        quantity, parameter.unit, sign=parameter.sign, direction=parameter.direction, keep=parameter.keep
    )
    how = ground.how
    if quantity.unit or parameter.unit:
        how += f"; {supplied or _unit_told(quantity, ground.unit_source, parameter)}"
    conditions = (context.band_name, *of_heading, settled.condition, ground.of_unit)
    at = _at(" ".join(filter(None, (*ground.conditions, ground.of_unit))), parameter.unit) | dict(settled.at)
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


def _refuse_unit(quantity: Quantity, of_heading: str, parameter: Parameter) -> None:
    """'14 dB' is no standing-wave ratio and '60°' no count; a unit column beside pure numbers is let pass."""
    if dimension(quantity.unit) not in ("", "count") and quantity.unit != unit_name(of_heading):
        raise UnknownUnitError(f"a figure in {quantity.unit} is no {parameter.label}")


def unit_of(context: Context) -> str:
    """The unit that a unit column or a heading gives; empty without any."""
    return _unit(context)[0]


def _unit(context: Context) -> tuple[str, str]:
    for unit, source in ((context.unit, "unit column"), (context.label.unit, "heading")):
        if unit.strip() not in _IDENTITY_UNITS:
            return bare_unit(_UNIT_CONDITION.sub("", unit)), source
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
