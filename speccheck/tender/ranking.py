"""Points of desirable requirements, the order they give, and how far a weight must move to change it.

A row of the tender earns its whole weight when every one of its rows passes and nothing otherwise, so that
points can be redone by hand from the table. A rejected offer has no place; nothing averages a
mandatory failure away.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping, Sequence
from itertools import pairwise

from speccheck.records import Level, Outcome, Requirement
from speccheck.records.evaluations import Bid, Offer, Standing, Swing, Weight
from speccheck.records.words import PASSED

_LEAST_GAIN = 1e-9
_NO_POINTS = ("rule", "after award", "information", "evidence", "baseline", "condition")


def groups(requirements: Sequence[Requirement]) -> Mapping[int, tuple[int, ...]]:
    """Desirable requirements that earn points, by the row of the tender they stand in.

    One row can make several demands (height, width and depth); they share its weight, keyed by the
    place of the first.
    """
    rows: dict[tuple[str, str], list[int]] = {}
    for place, requirement in enumerate(requirements):
        if requirement.level is Level.DESIRABLE and requirement.operator not in _NO_POINTS:
            rows.setdefault((str(requirement.where), requirement.clause), []).append(place)
    return {places[0]: tuple(places) for places in rows.values()}


def weights(requirements: Sequence[Requirement]) -> Mapping[int, float]:
    """Weight of each group; 1 each where the tender gives none."""
    given = {first: requirements[first].weight for first in groups(requirements)}
    if all(weight is None for weight in given.values()):
        return dict.fromkeys(given, 1.0)
    return {first: weight or 0.0 for first, weight in given.items()}


def weight_table(requirements: Sequence[Requirement]) -> tuple[Weight, ...]:
    """The weights as records, in tender order."""
    weighted = weights(requirements)
    return tuple(
        Weight(requirements=places, weight=weighted[first]) for first, places in groups(requirements).items()
    )


def earned(offer: Offer, requirements: Sequence[Requirement]) -> Mapping[int, float]:
    """Share (0 or 1) of each group's weight that an offer earns: 1 where every row of it passes."""
    rows: dict[int, list[bool]] = {}
    for cell in offer.cells:
        rows.setdefault(cell.requirement, []).append(cell.verdict in PASSED)
    return {
        first: float(all(rows.get(place) and all(rows[place]) for place in places))
        for first, places in groups(requirements).items()
    }


def standings(bids: Sequence[Bid], requirements: Sequence[Requirement]) -> tuple[Standing, ...]:
    """Offers that are not rejected, most points first; equal points share a place."""
    weighted = weights(requirements)
    scored = [
        (sum(weighted[i] * share for i, share in earned(offer, requirements).items()), b, o)
        for b, o, offer in _offers(bids)
        if offer.outcome is not Outcome.REJECT
    ]
    scored.sort(key=lambda entry: (-entry[0], entry[1], entry[2]))
    placed: list[Standing] = []
    for position, (points, b, o) in enumerate(scored, start=1):
        level = placed[-1].place if placed and placed[-1].points == points else position
        placed.append(Standing(place=level, bid=b, offer=o, points=points))
    return tuple(placed)


def swings(
    placed: Sequence[Standing], bids: Sequence[Bid], requirements: Sequence[Requirement]
) -> tuple[Swing, ...]:
    """For each pair of neighbours, every single weight whose move alone would bring them level.

    With points A and B (A ahead) and shares a and b of weight w, the points are equal at
    w' = w - (A - B)/(a - b); a negative w' does not count. Positions in `placed` are given.
    """
    weighted = weights(requirements)
    found: list[Swing] = []
    for position, (ahead, behind) in enumerate(pairwise(placed)):
        lead = ahead.points - behind.points
        if lead <= _LEAST_GAIN:
            continue
        first = earned(bids[ahead.bid].offers[ahead.offer], requirements)
        second = earned(bids[behind.bid].offers[behind.offer], requirements)
        for i, weight in weighted.items():
            difference = first[i] - second[i]
            if difference == 0:
                continue
            at_par = weight - lead / difference
            if at_par >= 0:
                swing = Swing(
                    ahead=position, behind=position + 1, requirement=i, weight=weight, weight_at_par=at_par
                )
                found.append(swing)
    return tuple(sorted(found, key=lambda s: (s.ahead, abs(s.weight_at_par - s.weight), s.requirement)))


def weight_notes(requirements: Sequence[Requirement]) -> tuple[str, ...]:
    """What a reader must know of the weights."""
    if all(requirements[first].weight is None for first in groups(requirements)):
        return ("The tender gives no weights; each desirable row counts one point.",)
    notes = [f"The weights of desirable rows add up to {sum(weights(requirements).values()):g}."]
    counted = {place for places in groups(requirements).values() for place in places}
    ignored = [r.clause for place, r in enumerate(requirements) if r.weight and place not in counted]
    others = [
        clause for clause in dict.fromkeys(ignored) if clause not in {requirements[p].clause for p in counted}
    ]
    if others:
        listed = ", ".join(others)
        notes.append(f"Weights of clauses {listed} are not counted: only desirable figures earn points.")
    return tuple(notes)


def _offers(bids: Iterable[Bid]) -> Iterator[tuple[int, int, Offer]]:
    for b, bid in enumerate(bids):
        for o, offer in enumerate(bid.offers):
            yield b, o, offer
