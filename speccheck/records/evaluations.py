"""Many bids side by side: small summaries, so that a whole evaluation fits in memory."""

from __future__ import annotations

from dataclasses import dataclass, field

from speccheck.records.offers import Band, CellRef, Value
from speccheck.records.outputs import SUFFIXES
from speccheck.records.tenders import Settings, Tender
from speccheck.records.words import Compliance, Outcome


@dataclass(frozen=True, slots=True, kw_only=True)
class OfferCell:
    """One row of one offer: `requirement` is its place in the tender; figures in the requirement's unit."""

    requirement: int
    verdict: Compliance
    band: Band | None = None
    offered: Value | None = None
    raw: str = ""
    where: CellRef | None = None
    margin: float | None = None
    in_doubt: tuple[str, ...] = ()
    note: str = ""
    deviation: str = ""
    underlying: Compliance | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Offer:
    """One panel of one bid; `misfits` and `doubts` count findings of physics, `questions` what is asked."""

    file: str
    panel: str
    outcome: Outcome
    reasons: tuple[str, ...] = ()
    cells: tuple[OfferCell, ...] = ()
    misfits: int = 0
    doubts: int = 0
    questions: int = 0


@dataclass(frozen=True, slots=True, kw_only=True)
class Bid:
    """What became of one file: its offers and outputs, or the message why it could not be used.

    `note` tells of an output that could not be made although the bid was used; `folder` is where its outputs
    lie below those of the evaluation, '' for there.
    """

    path: str
    file: str
    folder: str = ""
    sha256: str = ""
    offers: tuple[Offer, ...] = ()
    outputs: tuple[str, ...] = ()
    error: str = ""
    note: str = ""
    resumed: bool = False

    @property
    def label(self) -> str:
        """The file, with the folder that tells it from another of the same name."""
        return f"{self.file} ({self.folder})" if self.folder else self.file

    @property
    def page(self) -> str:
        """Its report as a page, '' where none was written."""
        return next((name for name in self.outputs if name.endswith(SUFFIXES["html"])), "")


@dataclass(frozen=True, slots=True, kw_only=True)
class Standing:
    """Place of an offer that no mandatory requirement rejects, by points of desirable requirements."""

    place: int
    bid: int
    offer: int
    points: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Weight:
    """Weight of one desirable row of the tender and the requirements that must all pass to earn it."""

    requirements: tuple[int, ...]
    weight: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Swing:
    """How far one weight must move for a neighbour to draw level, all other weights kept."""

    ahead: int
    behind: int
    requirement: int
    weight: float
    weight_at_par: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Evaluation:
    """All bids of one evaluation under one set of rules; `standings` indices count from 0."""

    bids: tuple[Bid, ...]
    settings: Settings
    tender: Tender | None = None
    standings: tuple[Standing, ...] = ()
    swings: tuple[Swing, ...] = ()
    weights: tuple[Weight, ...] = ()
    points_possible: float = 0.0
    weighted: bool = False
    rules_sha256: str = ""
    program_version: str = ""
    notes: tuple[str, ...] = field(default_factory=tuple)
