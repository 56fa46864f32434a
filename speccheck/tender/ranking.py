"""Points of desirable requirements, the order they give, and how far a weight must move to change it.

A requirement earns its whole weight when every one of its rows passes and nothing otherwise, so that
points can be redone by hand from the table. A rejected offer has no place; nothing averages a
mandatory failure away.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping, Sequence
from itertools import pairwise

from speccheck.records import Level, Outcome, Requirement
from speccheck.records.evaluations import Bid, Offer, Standing, Swing
from speccheck.tender.grading import PASSING

_LEAST_GAIN = 1e-9
_NO_POINTS = ("rule", "after award", "information")


def weights(requirements: Sequence[Requirement]) -> Mapping[int, float]:
    """Weight of each desirable requirement by its place; 1 each where the tender gives none."""
    desirable = {
        i: r.weight
        for i, r in enumerate(requirements)
        if r.level is Level.DESIRABLE and r.operator not in _NO_POINTS
    }
    if all(weight is None for weight in desirable.values()):
        return dict.fromkeys(desirable, 1.0)
    return {i: weight or 0.0 for i, weight in desirable.items()}


def earned(offer: Offer, weighted: Mapping[int, float]) -> Mapping[int, float]:
    """Share (0 or 1) of each weight that an offer earns."""
    rows: dict[int, list[bool]] = {}
    for cell in offer.cells:
        rows.setdefault(cell.requirement, []).append(cell.verdict in PASSING)
    return {i: float(bool(rows.get(i)) and all(rows[i])) for i in weighted}


def standings(bids: Sequence[Bid], requirements: Sequence[Requirement]) -> tuple[Standing, ...]:
    """Offers that are not rejected, most points first; equal points share a place."""
    weighted = weights(requirements)
    scored = [
        (sum(weighted[i] * share for i, share in earned(offer, weighted).items()), b, o)
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
        first = earned(bids[ahead.bid].offers[ahead.offer], weighted)
        second = earned(bids[behind.bid].offers[behind.offer], weighted)
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
    given = [r.weight for r in requirements if r.level is Level.DESIRABLE and r.weight is not None]
    if not given:
        return ("The tender gives no weights; each desirable requirement counts one point.",)
    notes = [f"The weights of desirable requirements add up to {sum(given):g}."]
    ignored = [r.clause for r in requirements if r.level is not Level.DESIRABLE and r.weight]
    if ignored:
        listed = ", ".join(dict.fromkeys(ignored))
        notes.append(f"Weights of clauses {listed} are not counted: only desirable requirements earn points.")
    return tuple(notes)


def _offers(bids: Iterable[Bid]) -> Iterator[tuple[int, int, Offer]]:
    for b, bid in enumerate(bids):
        for o, offer in enumerate(bid.offers):
            yield b, o, offer
