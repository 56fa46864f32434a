"""What a check says: claims held against intervals, with working and innocent readings."""

from __future__ import annotations

from dataclasses import dataclass

from speccheck.records.offers import Band, CellRef, Value
from speccheck.records.words import Fit


@dataclass(frozen=True, slots=True)
class Interval:
    """What a claim is held against: `low` and `high` in `unit`; None where that side is open."""

    low: float | None
    high: float | None
    unit: str


@dataclass(frozen=True, slots=True)
class Amount:
    """A claimed figure in `unit`."""

    value: Value
    unit: str


@dataclass(frozen=True, slots=True)
class Step:
    """One line of working: label, formula with its numbers, result and unit."""

    label: str
    formula: str
    value: float | str
    unit: str = ""


@dataclass(frozen=True, slots=True)
class Convention:
    """An innocent reading under which the claim would fit."""

    name: str
    value: float | str
    unit: str = ""
    repairs: tuple[str, ...] = ()
    leaves: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Finding:
    """What one check says of one panel, and band where it judges by band."""

    check: str
    title: str
    verdict: Fit
    summary: str
    parameters: tuple[str, ...] = ()
    band: Band | None = None
    claimed: Amount | None = None
    expected: Interval | None = None
    working: tuple[Step, ...] = ()
    assumptions: tuple[str, ...] = ()
    conventions: tuple[Convention, ...] = ()
    question: str = ""
    source: str = ""
    missing: tuple[str, ...] = ()
    where: tuple[CellRef, ...] = ()
