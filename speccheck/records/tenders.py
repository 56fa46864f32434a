"""What a buyer asks, sets and accepts, and how an offer stands against it."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from speccheck.records.offers import Band, CellRef, Reading, Statement, Unread, Value
from speccheck.records.verdicts import Finding
from speccheck.records.words import Compliance, Level


@dataclass(frozen=True, slots=True, kw_only=True)
class Premise:
    """What must hold of an offer before a requirement binds it; `limit` in `unit`."""

    parameter: str
    operator: str
    limit: Value | None = None
    unit: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Requirement:
    """One row of the buyer's requirements as read; `limit` is in the requirement's own unit.

    `at` holds structured conditions by name with the unit in the name, as in `Reading.at`. A doubt
    starts with its code word and says in words what a person has to settle.
    """

    where: CellRef
    clause: str
    wording: str
    level: Level
    parameter: str = ""
    operator: str = ""
    limit: Value | None = None
    unit: str = ""
    statistic: str = ""
    bands: tuple[Band, ...] = ()
    scope: str = ""
    at: Mapping[str, float] = field(default_factory=dict)
    doubts: tuple[str, ...] = ()
    unread: str = ""
    confirmed: bool = False
    weight: float | None = None
    premise: Premise | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Deviation:
    """A departure the buyer has accepted; `expires` is an ISO date."""

    where: CellRef
    clause: str
    offer: str
    reason: str
    approver: str
    expires: str


@dataclass(frozen=True, slots=True, kw_only=True)
class MatrixRow:
    """One requirement held against one panel, in one band where its parameter is stated by band.

    `margin` is signed in the parameter's good direction, in the requirement's unit.
    """

    requirement: Requirement
    verdict: Compliance
    band: Band | None = None
    offered: Reading | None = None
    statement: Statement | None = None
    offered_in_unit: Value | None = None
    margin: float | None = None
    note: str = ""
    in_doubt: tuple[str, ...] = ()
    deviation: Deviation | None = None
    underlying: Compliance | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Settings:
    """Everything a buyer may set; the defaults are printed in every report."""

    tender: str = ""
    tender_sha256: str = ""
    limit_set: str = "icnirp-2020"
    reflection_factor: float = 1.0
    tdd_duty: float = 1.0
    actual_maximum_factor: float = 1.0
    power_tolerance_db: float = 2.0
    country_factor: float = 1.0
    guard_bands: Mapping[str, float] = field(default_factory=dict)
    equality_meets: bool = True
    statistic: str = "each"
    loss_db: Mapping[str, tuple[float, float]] = field(default_factory=dict)
    headings: Mapping[str, str] = field(default_factory=dict)
    paper: str = "A4"
    decimal_comma: bool = False
    date_order: str = "iso"
    report_number: str = ""
    revision: str = ""
    issued: bool = False
    today: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Tender:
    """The buyer's workbook, read."""

    file: str
    sha256: str
    requirements: tuple[Requirement, ...] = ()
    deviations: tuple[Deviation, ...] = ()
    settings: Settings = field(default_factory=Settings)
    unread: tuple[Unread, ...] = ()
    findings: tuple[Finding, ...] = ()
