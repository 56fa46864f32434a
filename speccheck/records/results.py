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
    """Calculated compliance distances [m] along the strongest beam, rounded up to 0.1 m.

    `band` None is all bands together; such a row has no frequency, EIRP or limit of its own.
    `distance_m` is at full power with the reflection factor of the settings; `cautious_distance_m` has
    time factor 1, reflection factor 2.56 and the power raised by its tolerance; `factored_distance_m` has
    the time factor, is None where that is 1, and is shown beside the full-power figure, never instead.
    `category` is the population in the limit set's own words.
    `cylindrical_distance_m` is the spatial average beside the panel, where that model holds.
    """

    band: Band | None
    population: str
    basis: str
    frequency_mhz: float | None
    eirp_dbm: float | None
    limit_w_m2: float | None
    averaging_min: float
    distance_m: float
    cautious_distance_m: float
    factored_distance_m: float | None = None
    far_field_m: float | None = None
    region: str = ""
    category: str = ""
    power_w: float | None = None
    gain_dbi: float | None = None
    far_field_exposure_m: float | None = None
    cylindrical_distance_m: float | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class ExposureZone:
    """Calculated distances [m] around the panel at full power, from a modelled pattern, rounded up.

    The modelled pattern is swept over the stated tilt and azimuth ranges; `above_m`, `below_m`, `beside_m`
    and `behind_m` are the reach of the limit upwards, downwards, sideways and backwards from the centre.
    `side_view` and `top_view` are outlines as (forward, upward) and (forward, sideways) pairs [m].
    """

    band: Band
    population: str
    basis: str
    front_m: float
    above_m: float
    below_m: float
    beside_m: float
    behind_m: float
    tilts_deg: tuple[float, ...] = ()
    scans_deg: tuple[float, ...] = ()
    side_view: tuple[tuple[float, float], ...] = ()
    top_view: tuple[tuple[float, float], ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class ExposureNote:
    """The desk check of RF exposure; never shown without assumptions and cautions.

    An incomplete note has no distances and lists what is `missing`. `factors` holds the reflection factor,
    time factor and tolerance used, as steps; `working` shows the arithmetic of every distance.
    """

    complete: bool
    limit_set: str
    edition: str = ""
    limit_source: str = ""
    rows: tuple[ExposureRow, ...] = ()
    missing: tuple[str, ...] = ()
    assumptions: tuple[str, ...] = ()
    cautions: tuple[str, ...] = ()
    validity: tuple[str, ...] = ()
    factors: tuple[Step, ...] = ()
    working: tuple[Step, ...] = ()
    around: tuple[ExposureZone, ...] = ()
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
