"""What the comparison prints: offers as columns, requirements as lines, each counted and placed once."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from functools import cached_property

from speccheck.records import Compliance, Level, Outcome, Requirement
from speccheck.records.evaluations import Bid, Evaluation, Offer, OfferCell
from speccheck.records.words import FAILED, GRAVITY, OPEN
from speccheck.report.offers.comparison_figures import MOST_CHARTS, charted, strips
from speccheck.report.pages.canvas import Figure
from speccheck.report.pages.formats import Numbers

MOST_COLUMNS = 60
"""Offers whose figures a page can show; its list of offers, the workbook and the JSON hold all of them."""
COLUMNS_PER_TABLE = 5
MARKS_PER_TABLE = 20


@dataclass(frozen=True, kw_only=True)
class Column:
    """One offer; `number` is what charts and tables call it, `place` 0 where it has none."""

    number: int
    name: str
    bid: Bid
    offer: Offer
    place: int = 0
    points: float | None = None
    counts: tuple[int, int, int, int, int] = (0, 0, 0, 0, 0)

    @property
    def knocked_out(self) -> bool:
        """Whether a mandatory requirement rejects the offer."""
        return self.offer.outcome is Outcome.REJECT

    @cached_property
    def cells(self) -> Mapping[int, Sequence[OfferCell]]:
        """Rows of the offer by the place of their requirement."""
        grouped: dict[int, list[OfferCell]] = {}
        for cell in self.offer.cells:
            grouped.setdefault(cell.requirement, []).append(cell)
        return grouped


@dataclass(frozen=True, slots=True, kw_only=True)
class Entry:
    """One requirement of one offer: the row that weighs most, and how many bands it stands for."""

    cell: OfferCell
    bands: int

    @property
    def doubted(self) -> bool:
        """Whether physics puts the claim in doubt."""
        return bool(self.cell.in_doubt)


@dataclass(frozen=True, slots=True, kw_only=True)
class Line:
    """One requirement across some offers."""

    index: int
    requirement: Requirement
    entries: tuple[Entry | None, ...]


@dataclass(frozen=True, kw_only=True)
class Comparison:
    """Everything the templates and the workbook print."""

    evaluation: Evaluation
    columns: tuple[Column, ...]
    unusable: tuple[Bid, ...]
    empty: tuple[Bid, ...]
    numbers: Numbers
    shown: tuple[Column, ...] = ()

    @property
    def requirements(self) -> tuple[Requirement, ...]:
        """Requirements of the tender, none without one."""
        return self.evaluation.tender.requirements if self.evaluation.tender else ()

    @property
    def placed(self) -> tuple[Column, ...]:
        """Offers with a place, the first one first."""
        return tuple(column for column in self.columns if column.place)

    def lines(self, columns: Sequence[Column], level: Level | None = None) -> tuple[Line, ...]:
        """Lines in tender order for some of the offers, of one level where it is given."""
        return tuple(_lines(self.requirements, columns, level))

    def groups(self, size: int) -> tuple[tuple[Column, ...], ...]:
        """The shown offers, a table's width at a time, in tables of about the same width."""
        tables = -(-len(self.shown) // size) or 1
        width = -(-len(self.shown) // tables)
        return tuple(self.shown[i : i + width] for i in range(0, len(self.shown), max(width, 1)))

    @property
    def hidden_columns(self) -> int:
        """Offers whose figures the page leaves to the workbook."""
        return len(self.columns) - len(self.shown)

    @cached_property
    def figures(self) -> tuple[Figure, ...]:
        """Charts of the requirements with figures."""
        rows = [(column.number, column.name, column.offer) for column in self.shown]
        return strips(self.requirements, rows, self.numbers)

    @property
    def hidden_figures(self) -> int:
        """Requirements whose chart the page leaves out."""
        rows = [(column.number, column.name, column.offer) for column in self.shown]
        return max(sum(1 for _ in charted(self.requirements, rows)) - MOST_CHARTS, 0)

    @property
    def sentence(self) -> str:
        """The evaluation in one sentence."""
        outcomes = [column.offer.outcome for column in self.columns]
        parts = [f"{outcomes.count(word)} {word.value}" for word in Outcome if outcomes.count(word)]
        said = f"{_count(len(outcomes), 'offer')} from {_count(self._usable, 'file')}"
        unusable = f"; {_count(len(self.unusable), 'more file')} could not be used" if self.unusable else ""
        return f"{said}: {', '.join(parts) or 'none'}{unusable}."

    @property
    def _usable(self) -> int:
        return len(self.evaluation.bids) - len(self.unusable)


def _count(number: int, thing: str) -> str:
    return f"{number} {thing}{'' if number == 1 else 's'}"


def compare(evaluation: Evaluation) -> Comparison:
    """Put an evaluation in reading order: the rejected offers first as they decide most, the others by place.

    Where there are more offers than a page can show, it shows those with the best places.
    """
    columns = tuple(_columns(evaluation))
    first = columns if len(columns) <= MOST_COLUMNS else sorted(columns, key=lambda c: c.knocked_out)
    return Comparison(
        evaluation=evaluation,
        columns=columns,
        unusable=tuple(bid for bid in evaluation.bids if bid.error),
        empty=tuple(bid for bid in evaluation.bids if not bid.error and not bid.offers),
        numbers=Numbers(evaluation.settings.decimal_comma, evaluation.settings.date_order),
        shown=tuple(first[:MOST_COLUMNS]),
    )


def _columns(evaluation: Evaluation) -> Iterator[Column]:
    placed = {(s.bid, s.offer): s for s in evaluation.standings}
    order = [(b, o) for b, bid in enumerate(evaluation.bids) for o in range(len(bid.offers))]
    rejected = [at for at in order if evaluation.bids[at[0]].offers[at[1]].outcome is Outcome.REJECT]
    others = [(s.bid, s.offer) for s in evaluation.standings] or [at for at in order if at not in rejected]
    for number, (b, o) in enumerate((*rejected, *others), start=1):
        bid = evaluation.bids[b]
        offer = bid.offers[o]
        standing = placed.get((b, o))
        yield Column(
            number=number,
            name=offer.panel,
            bid=bid,
            offer=offer,
            place=standing.place if standing else 0,
            points=standing.points if standing else None,
            counts=_counts(evaluation, offer),
        )


def _counts(evaluation: Evaluation, offer: Offer) -> tuple[int, int, int, int, int]:
    """Rows: mandatory passed, failed, open; claims in doubt; accepted deviations."""
    requirements = evaluation.tender.requirements if evaluation.tender else ()
    cells = [c for c in offer.cells if requirements[c.requirement].level is Level.MANDATORY]
    failed = sum(c.verdict in FAILED for c in cells)
    open_ = sum(c.verdict in OPEN for c in cells)
    doubted = sum(bool(c.in_doubt) for c in offer.cells)
    accepted = sum(c.verdict is Compliance.DEVIATION_ACCEPTED for c in offer.cells)
    return len(cells) - failed - open_, failed, open_, doubted, accepted


def _lines(
    requirements: Sequence[Requirement], columns: Sequence[Column], level: Level | None
) -> Iterator[Line]:
    """Lines in tender order; rules that judge no row have no line."""
    for index, requirement in enumerate(requirements):
        if level not in (None, requirement.level):
            continue
        entries = tuple(_entry(column.cells.get(index, ())) for column in columns)
        if requirement.operator not in ("rule", "after award") or any(entries):
            yield Line(index=index, requirement=requirement, entries=entries)


def _entry(cells: Sequence[OfferCell]) -> Entry | None:
    if not cells:
        return None

    def weight(cell: OfferCell) -> tuple[int, float]:
        return GRAVITY.index(cell.verdict), cell.margin if cell.margin is not None else float("inf")

    return Entry(cell=min(cells, key=weight), bands=len(cells))
