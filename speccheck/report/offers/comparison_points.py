"""Points of desirable requirements as the comparison prints them, and what would change their order."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from speccheck.records import Requirement
from speccheck.records.evaluations import Weight
from speccheck.records.words import PASSED
from speccheck.report.offers.comparison_view import Column, Comparison

MOST_PLACES = 12
MOST_SWINGS = 12


@dataclass(frozen=True, slots=True, kw_only=True)
class PointsLine:
    """One desirable row of the tender: its demands, its weight, and which offers earn it."""

    demands: tuple[Requirement, ...]
    weight: float
    earned: tuple[bool, ...]


def points_lines(view: Comparison, columns: Sequence[Column]) -> tuple[PointsLine, ...]:
    """One line a weight, in tender order."""
    return tuple(
        PointsLine(
            demands=tuple(view.requirements[place] for place in one.requirements),
            weight=one.weight,
            earned=tuple(_earns(column, one) for column in columns),
        )
        for one in view.evaluation.weights
    )


def _earns(column: Column, one: Weight) -> bool:
    rows = [column.cells.get(place, ()) for place in one.requirements]
    return all(cells and all(cell.verdict in PASSED for cell in cells) for cells in rows)


def swing_texts(view: Comparison) -> tuple[str, ...]:
    """How far weights must move, in sentences, the least move of each pair of neighbours first."""
    return tuple(_swing_texts(view))


def _swing_texts(view: Comparison) -> Iterator[str]:
    evaluation, write = view.evaluation, view.numbers.plain
    columns = {id(column.offer): column for column in view.columns}
    seen: set[int] = set()
    for swing in evaluation.swings:
        if swing.ahead in seen or len(seen) >= MOST_SWINGS:
            continue
        seen.add(swing.ahead)
        neighbours = (evaluation.standings[swing.ahead], evaluation.standings[swing.behind])
        one, other = (columns[id(evaluation.bids[s.bid].offers[s.offer])] for s in neighbours)
        yield (
            f"Offers {one.number} ({one.name}) and {other.number} ({other.name}) would draw level "
            f"if the weight of clause {view.requirements[swing.requirement].clause} moved "
            f"from {write(swing.weight)} to {write(round(swing.weight_at_par, 3))}, all other weights kept."
        )
