"""The tolerance that a heading or a unit gives to all figures below it: 'Gain [dBi ±0.5]', '° ± 5'."""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from functools import lru_cache

from speccheck.dictionary import Parameter
from speccheck.intake.tables.labels import Label
from speccheck.quantities import (
    NUMERAL_PATTERN,
    Quantity,
    UnknownUnitError,
    answers,
    convert,
    dimension,
    numeral,
    tidy,
    unit_name,
)

_SLACK = re.compile(
    rf"(?:(?P<of>{NUMERAL_PATTERN})\s?)?(?P<before>[^\W\d]+|[°%])?[\])]?\s*[(\[,;]?\s*"
    rf"±\s?(?P<size>{NUMERAL_PATTERN})\s?(?P<unit>[^\s\d()\[\],;]{{1,4}})?"
)
_PLACES = frozenset(
    ["at", "bei", "à", "a", "for", "over", "within", "in", "con", "przy", "bij", "sector", "pol"]
)
_LARGEST_SHARE = 0.25
"""What is larger in proportion to its figure is a place, a slant or a range."""
_IN_DECIBELS = ("gain", "level", "carrier level")


@dataclass(frozen=True, slots=True)
class Slack:
    """A tolerance by its size and unit; `of` is the figure it stands beside, None where it stands alone."""

    size: float
    unit: str
    of: float | None


def slack_of(label: Label, unit: str) -> Slack | None:
    """The tolerance told by a heading, else by the unit beside the figures; None without any."""
    in_heading = _in_text(label.text) if "±" in label.condition else None
    return in_heading or _in_text(tidy(unit))


def with_slack(quantity: Quantity, slack: Slack | None, parameter: Parameter) -> Quantity:
    """The quantity with the tolerance of its heading, where it is a plain figure without one of its own.

    '±60°' over decibels is a place; '±45' without a unit over decibels is the slant of two ports.
    """
    value = quantity.value
    if slack is None or parameter.kind != "number" or not parameter.unit or not isinstance(value, float):
        return quantity
    if quantity.sense != "nominal" or quantity.tolerance is not None:
        return quantity
    size = _in_unit_of(quantity.unit or parameter.unit, slack, value)
    if size is None or size > _LARGEST_SHARE * abs(value) or slack.of not in (None, value):
        return quantity
    return replace(quantity, tolerance=size)


def without_slack(condition: str) -> str:
    """A condition of a heading without the tolerance that the figures have taken over."""
    return ", ".join(part for part in condition.split(", ") if not _SLACK.fullmatch(part))


def bare_unit(unit: str) -> str:
    """A unit without the tolerance beside it.

    >>> bare_unit("dBi ±0.5"), bare_unit("° ± 5"), bare_unit("km/h")
    ('dBi', '°', 'km/h')
    """
    return tidy(unit).partition("±")[0].strip(" ,;([") if "±" in tidy(unit) else unit


def _in_unit_of(unit: str, slack: Slack, value: float) -> float | None:
    if slack.unit == "%":
        return abs(value) * slack.size / 100
    if not slack.unit:
        return None if dimension(unit) == "level" else slack.size
    if not answers(slack.unit, dimension(unit)):
        return None
    if dimension(unit) in _IN_DECIBELS:
        return slack.size
    try:
        return convert(slack.size, slack.unit, unit)
    except UnknownUnitError:
        return None


@lru_cache(maxsize=2000)
def _in_text(text: str) -> Slack | None:
    found = list(_SLACK.finditer(tidy(text)))
    if len(found) != 1 or (found[0]["before"] or "").casefold() in _PLACES:
        return None
    size = numeral(found[0]["size"], comma="," in found[0]["size"])
    of = numeral(found[0]["of"], comma="," in found[0]["of"]) if found[0]["of"] else None
    unit = unit_name(found[0]["unit"] or "") or unit_name(found[0]["before"] or "")
    return Slack(size, unit, of) if size is not None else None
