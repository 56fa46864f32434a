"""The whole result for one file: all that a report may see."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from speccheck.records.offers import Band, CellRef, Panel, Submission
from speccheck.records.tenders import MatrixRow, Settings, Tender
from speccheck.records.verdicts import Finding, Step
from speccheck.records.words import Outcome


@dataclass(frozen=True, slots=True, kw_only=True)
class Curve:
    """A modelled or stated line of a figure; `x` and `y` have equal length."""

    name: str
    x: tuple[float, ...]
    y: tuple[float, ...]
    x_unit: str
    y_unit: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Drawing:
    """The numbers behind one figure; `kind` names the template that draws it."""

    kind: str
    title: str
    text: str
    band: Band | None = None
    curves: tuple[Curve, ...] = ()
    marks: Mapping[str, float] = field(default_factory=dict)
    where: tuple[CellRef, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class ExposureRow:
    """One distance [m] along the strongest beam; `band` None is all bands together."""

    band: Band | None
    population: str
    basis: str
    frequency_mhz: float
    eirp_dbm: float
    limit_w_m2: float
    averaging_min: float
    distance_m: float
    cautious_distance_m: float
    factored_distance_m: float | None = None
    far_field_m: float | None = None
    region: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class ExposureNote:
    """The desk check of RF exposure; never shown without assumptions and cautions."""

    complete: bool
    limit_set: str
    edition: str = ""
    limit_source: str = ""
    rows: tuple[ExposureRow, ...] = ()
    missing: tuple[str, ...] = ()
    assumptions: tuple[str, ...] = ()
    cautions: tuple[str, ...] = ()
    validity: tuple[str, ...] = ()
    working: tuple[Step, ...] = ()
    around: tuple[Step, ...] = ()
    where: tuple[CellRef, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class PanelAssessment:
    """A panel with everything that was found about it."""

    panel: Panel
    outcome: Outcome
    findings: tuple[Finding, ...] = ()
    requirements: tuple[MatrixRow, ...] = ()
    exposure: ExposureNote | None = None
    drawings: tuple[Drawing, ...] = ()
    reasons: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Assessment:
    """The whole result for one file; all a report may see."""

    submission: Submission
    settings: Settings
    panels: tuple[PanelAssessment, ...] = ()
    tender: Tender | None = None
    program_version: str = ""
