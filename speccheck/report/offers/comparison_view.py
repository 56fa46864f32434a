"""What the comparison prints: offers as columns, requirements as lines, each counted and placed once."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from speccheck.records import Compliance, Level, Outcome, Requirement
from speccheck.records.evaluations import Bid, Evaluation, Offer, OfferCell
from speccheck.report.offers.comparison_figures import strips
from speccheck.report.pages.canvas import Figure
from speccheck.report.pages.formats import Numbers

MOST_COLUMNS = 60
"""Offers a page can show; the workbook and the JSON always hold all of them."""
COLUMNS_PER_TABLE = 5
MOST_SWINGS = 12

_SEVERITY = (
    Compliance.FAILS,
    Compliance.FAILS_NARROWLY,
    Compliance.NOT_STATED,
    Compliance.DECLARED_ONLY,
    Compliance.NOT_JUDGED,
    Compliance.DEVIATION_ACCEPTED,
    Compliance.MEETS_NARROWLY,
    Compliance.MEETS,
)
_FAILED = (Compliance.FAILS, Compliance.FAILS_NARROWLY)
_OPEN = (Compliance.NOT_STATED, Compliance.DECLARED_ONLY, Compliance.NOT_JUDGED)


@dataclass(frozen=True, slots=True, kw_only=True)
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
    """One requirement across all shown offers."""

    index: int
    requirement: Requirement
    entries: tuple[Entry | None, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Comparison:
    """Everything the templates and the workbook print."""

    evaluation: Evaluation
    columns: tuple[Column, ...]
    unusable: tuple[Bid, ...]
    empty: tuple[Bid, ...]
    numbers: Numbers
    figures: tuple[Figure, ...] = ()
    shown: tuple[Column, ...] = ()

    def lines(self, columns: Sequence[Column], level: Level) -> tuple[Line, ...]:
        """Lines of one level in tender order for some of the offers."""
        return tuple(lines(self.evaluation, columns, level))

    @property
    def column_groups(self) -> tuple[tuple[Column, ...], ...]:
        """The shown offers, a table's width at a time."""
        starts = range(0, len(self.shown), COLUMNS_PER_TABLE)
        return tuple(self.shown[i : i + COLUMNS_PER_TABLE] for i in starts)

    @property
    def hidden_columns(self) -> int:
        """Offers that the page leaves to the workbook."""
        return len(self.columns) - len(self.shown)

    @property
    def sentence(self) -> str:
        """The evaluation in one sentence."""
        outcomes = [column.offer.outcome for column in self.columns]
        parts = [f"{outcomes.count(word)} {word.value}" for word in Outcome if outcomes.count(word)]
        bids = len(self.evaluation.bids)
        unusable = f"; {len(self.unusable)} of them could not be used" if self.unusable else ""
        offers = f"{len(outcomes)} offer{'' if len(outcomes) == 1 else 's'}"
        return f"{offers} from {bids} file{'' if bids == 1 else 's'}: {', '.join(parts) or 'none'}{unusable}."

    @property
    def swing_texts(self) -> tuple[str, ...]:
        """How far weights must move, in sentences, the least move of each pair of neighbours first."""
        return tuple(_swing_texts(self))


def compare(evaluation: Evaluation) -> Comparison:
    """Put an evaluation in reading order: offers by place, the rejected ones first as they decide most."""
    columns = tuple(_columns(evaluation))
    numbers = Numbers(evaluation.settings.decimal_comma, evaluation.settings.date_order)
    shown = columns[:MOST_COLUMNS]
    requirements = evaluation.tender.requirements if evaluation.tender else ()
    rows = [(c.number, c.name, c.offer) for c in shown]
    return Comparison(
        evaluation=evaluation,
        columns=columns,
        unusable=tuple(bid for bid in evaluation.bids if bid.error),
        empty=tuple(bid for bid in evaluation.bids if not bid.error and not bid.offers),
        numbers=numbers,
        shown=shown,
        figures=strips(requirements, rows, numbers),
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
    failed = sum(c.verdict in _FAILED for c in cells)
    open_ = sum(c.verdict in _OPEN for c in cells)
    doubted = sum(bool(c.in_doubt) for c in offer.cells)
    accepted = sum(c.verdict is Compliance.DEVIATION_ACCEPTED for c in offer.cells)
    return len(cells) - failed - open_, failed, open_, doubted, accepted


def lines(evaluation: Evaluation, columns: Sequence[Column], level: Level) -> Iterator[Line]:
    """Lines of one level, in tender order; rules that judge no row have no line."""
    requirements = evaluation.tender.requirements if evaluation.tender else ()
    grouped = [_by_requirement(column.offer) for column in columns]
    for index, requirement in enumerate(requirements):
        entries = tuple(_entry(cells.get(index, ())) for cells in grouped)
        if requirement.level is level and (
            requirement.operator not in ("rule", "after award") or any(entries)
        ):
            yield Line(index=index, requirement=requirement, entries=entries)


def _by_requirement(offer: Offer) -> dict[int, list[OfferCell]]:
    grouped: dict[int, list[OfferCell]] = {}
    for cell in offer.cells:
        grouped.setdefault(cell.requirement, []).append(cell)
    return grouped


def _entry(cells: Sequence[OfferCell]) -> Entry | None:
    if not cells:
        return None

    def weight(cell: OfferCell) -> tuple[int, float]:
        return _SEVERITY.index(cell.verdict), cell.margin if cell.margin is not None else float("inf")

    return Entry(cell=min(cells, key=weight), bands=len(cells))


def _swing_texts(comparison: Comparison) -> Iterator[str]:
    evaluation = comparison.evaluation
    requirements = evaluation.tender.requirements if evaluation.tender else ()
    names = {(s.bid, s.offer): evaluation.bids[s.bid].offers[s.offer].panel for s in evaluation.standings}
    numbers = {id(column.offer): column.number for column in comparison.columns}
    seen: set[int] = set()
    for swing in evaluation.swings:
        if swing.ahead in seen or len(seen) >= MOST_SWINGS:
            continue
        seen.add(swing.ahead)
        ahead, behind = evaluation.standings[swing.ahead], evaluation.standings[swing.behind]
        clause = requirements[swing.requirement].clause
        write = comparison.numbers.plain
        first = numbers[id(evaluation.bids[ahead.bid].offers[ahead.offer])]
        second = numbers[id(evaluation.bids[behind.bid].offers[behind.offer])]
        one, other = names[ahead.bid, ahead.offer], names[behind.bid, behind.offer]
        yield (
            f"Offers {first} ({one}) and {second} ({other}) would draw level "
            f"if the weight of clause {clause} moved from {write(swing.weight)} to "
            f"{write(round(swing.weight_at_par, 3))}, all other weights kept."
        )
