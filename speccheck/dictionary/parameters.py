"""The dictionary of parameters: what a figure is called, its unit, and how it is judged.

`parameters()` gives the definitions of ``data/parameters.toml``; `synonyms()` the headings of
``data/headings/<language>.toml``; `match_heading` recognises a bidder's heading.
"""

from __future__ import annotations

import functools
from collections.abc import Mapping
from dataclasses import dataclass
from types import MappingProxyType
from typing import Any, Literal, get_args

from speccheck.kept import toml

Scope = Literal["panel", "band", "port"]
Direction = Literal["higher", "lower", "window", "contains", "none"]
Kind = Literal["number", "count", "range", "scan", "bands", "polarisation", "connectors", "size", "text"]
Sign = Literal["", "positive", "negative"]

LANGUAGES = ("en", "de", "fr", "es", "it", "pt", "pl", "nl")


@dataclass(frozen=True, slots=True, kw_only=True)
class Example:
    """A cell and what it reads as, in the parameter's unit."""

    cell: str
    value: float | tuple[float, float] | str
    tolerance: float | None = None
    sense: str = "nominal"


@dataclass(frozen=True, slots=True, kw_only=True)
class Parameter:
    """One parameter; the fields are explained at the head of ``data/parameters.toml``."""

    key: str
    label: str
    unit: str
    scope: Scope
    direction: Direction
    kind: Kind
    definition: str
    source: str
    examples: tuple[Example, ...]
    plausible: tuple[float, float] | None = None
    possible: tuple[float, float] | None = None
    sign: Sign = ""
    keep: tuple[str, ...] = ()

    @property
    def headings(self) -> Mapping[str, tuple[str, ...]]:
        """Headings by language, as bidders write them."""
        return {language: table[self.key] for language, table in synonyms().items() if self.key in table}


@functools.cache
def parameters() -> Mapping[str, Parameter]:
    """All parameters by key.

    Raises
    ------
    ValueError : a definition with an unknown or missing entry, naming the parameter
    """
    return MappingProxyType({key: _parameter(key, table) for key, table in toml("parameters.toml").items()})


@functools.cache
def synonyms() -> Mapping[str, Mapping[str, tuple[str, ...]]]:
    """Headings by language and parameter key; composite headings under keys joined by ``+``."""
    return MappingProxyType(
        {
            language: {key: tuple(words) for key, words in toml(f"headings/{language}.toml").items()}
            for language in LANGUAGES
        }
    )


def _parameter(key: str, table: dict[str, Any]) -> Parameter:
    pairs: dict[str, Any] = {
        name: tuple(table[name]) for name in ("plausible", "possible", "keep") if name in table
    }
    examples = tuple(_example(example) for example in table["examples"])
    fields: dict[str, Any] = {**table, **pairs, "key": key, "examples": examples}
    try:
        parameter = Parameter(**fields)
    except TypeError as error:
        raise ValueError(f"parameter '{key}': {error}") from None
    closed: dict[str, Any] = {"scope": Scope, "direction": Direction, "kind": Kind, "sign": Sign}
    for field, allowed in closed.items():
        if getattr(parameter, field) not in get_args(allowed):
            raise ValueError(f"parameter '{key}': {field} is {getattr(parameter, field)!r}")
    return parameter


def _example(table: dict[str, Any]) -> Example:
    value = table["value"]
    return Example(
        cell=table["cell"],
        value=tuple(value) if isinstance(value, list) else value,
        tolerance=table.get("tolerance"),
        sense=table.get("sense", "nominal"),
    )
