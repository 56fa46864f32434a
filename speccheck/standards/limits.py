"""Exposure limit sets as dated, named data: reference levels of incident power density.

One TOML file a set under ``data/exposure``; each carries edition, populations, averaging, source and its own
worked examples, which a test runs. No set is a default of the world: the name is printed with every result.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from importlib import resources

from speccheck.kept import toml

PUBLIC = "general public"
WORKERS = "workers"
WHOLE_BODY = "whole body"
LOCAL = "local"
POPULATIONS = (PUBLIC, WORKERS)
BASES = (WHOLE_BODY, LOCAL)


class UnknownLimitSetError(ValueError):
    """A limit set was asked for that is not among the data files."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Limit:
    """A reference level at one frequency: value [W/m²], averaging time [min] and where it stands."""

    value_w_m2: float
    averaging_min: float
    formula: str
    table: str
    confidence: str


@dataclass(frozen=True, slots=True, kw_only=True)
class LimitRow:
    """coefficient · f^exponent [W/m²] from `low_mhz` to `high_mhz` [MHz], f in MHz or GHz.

    The averaging time is `averaging_min` · f^averaging_exponent [min], f in GHz.
    """

    population: str
    basis: str
    low_mhz: float
    high_mhz: float
    coefficient: float
    exponent: float
    frequency_unit: str
    averaging_min: float
    table: str
    confidence: str
    averaging_exponent: float = 0.0

    def at(self, frequency_mhz: float) -> Limit:
        """The level at a frequency [MHz] inside the row."""
        f = frequency_mhz / 1000 if self.frequency_unit == "GHz" else frequency_mhz
        return Limit(
            value_w_m2=self.coefficient * f**self.exponent,
            averaging_min=self.averaging_min * (frequency_mhz / 1000) ** self.averaging_exponent,
            formula=self.formula,
            table=self.table,
            confidence=self.confidence,
        )

    @property
    def formula(self) -> str:
        """The level as printed in a table, such as ``f/200`` with f in MHz."""
        if self.exponent == 0:
            return f"{self.coefficient:g}"
        if self.exponent == 1:
            return f"f/{1 / self.coefficient:.6g} (f in {self.frequency_unit})"
        return f"{self.coefficient:g} · f^{self.exponent:g} (f in {self.frequency_unit})"


@dataclass(frozen=True, slots=True, kw_only=True)
class LimitExample:
    """A worked example a set carries: the level [W/m²] some outside source gives at a frequency [MHz]."""

    population: str
    basis: str
    frequency_mhz: float
    limit_w_m2: float
    tolerance_percent: float
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class LimitSet:
    """A named edition of exposure limits; `populations` gives the set's own names for the two categories."""

    name: str
    title: str
    edition: str
    source: str
    populations: Mapping[str, str]
    averaging: str
    verify_before_use: bool
    note: str
    rows: tuple[LimitRow, ...]
    examples: tuple[LimitExample, ...]

    @property
    def bases(self) -> tuple[str, ...]:
        """The averaging kinds this set has levels for."""
        return tuple(basis for basis in BASES if any(row.basis == basis for row in self.rows))

    def limit(self, frequency_mhz: float, population: str = PUBLIC, basis: str = WHOLE_BODY) -> Limit | None:
        """The level at a frequency [MHz], the lower one where two rows meet; None where the set has none."""
        levels = [
            row.at(frequency_mhz)
            for row in self._rows(population, basis)
            if row.low_mhz <= frequency_mhz <= row.high_mhz
        ]
        return min(levels, key=lambda level: level.value_w_m2, default=None)

    def lowest(
        self, low_mhz: float, high_mhz: float, population: str = PUBLIC, basis: str = WHOLE_BODY
    ) -> tuple[float, Limit] | None:
        """The frequency [MHz] of a band where the level is lowest, and the level there; None without levels.

        Every row is monotonic in frequency, so band edges and row edges suffice. None also where the set
        leaves part of the band without a level.
        """
        edges = {low_mhz, high_mhz}
        for row in self._rows(population, basis):
            edges |= {f for f in (row.low_mhz, row.high_mhz) if low_mhz < f < high_mhz}
        found = [(f, self.limit(f, population, basis)) for f in sorted(edges)]
        levels = [(f, level) for f, level in found if level is not None]
        if not levels or len(levels) < len(found):
            return None
        return min(levels, key=lambda pair: pair[1].value_w_m2)

    def _rows(self, population: str, basis: str) -> tuple[LimitRow, ...]:
        return tuple(row for row in self.rows if row.population == population and row.basis == basis)


@cache
def limit_set_names() -> tuple[str, ...]:
    """Names of the sets that ship with the program, such as ``icnirp-2020``."""
    files = resources.files("speccheck").joinpath("data", "exposure").iterdir()
    return tuple(sorted(file.name.removesuffix(".toml") for file in files if file.name.endswith(".toml")))


@cache
def limit_set(name: str) -> LimitSet:
    """A limit set by name.

    Raises
    ------
    UnknownLimitSetError : a name without data file; the message lists the known ones
    """
    if name not in limit_set_names():
        known = ", ".join(limit_set_names())
        raise UnknownLimitSetError(f"exposure limit set '{name}' is not known; known are {known}")
    data = toml(f"exposure/{name}.toml")
    rows = tuple(LimitRow(**row) for row in data.pop("limit"))
    examples = tuple(LimitExample(**example) for example in data.pop("example"))
    return LimitSet(rows=rows, examples=examples, **data)
