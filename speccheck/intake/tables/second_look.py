"""A sheet whose reading does not hang together is read again without the guesses that may have misled."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Mapping
from dataclasses import replace

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.claims import Doubt, SheetResult
from speccheck.intake.tables.coherence import doubts_of, incoherence, share_read
from speccheck.intake.tables.marks import Marks, Without, looks_like_value

_ROUNDS = 3
"""Times a name that proves to be none is given up for the next best."""
_KEPT = 3
"""Names of which one may be that of the only panel."""
_BETTER = 0.05
"""By so much another reading must hang together better than one that takes more for granted."""

_ENOUGH = 0.5
"""A reading without doubt that loses more of the figures is no better one."""
Place = tuple[int, int]
Way = tuple[Without, int]
"""What a reading does without, and the number of headings it goes by."""
Walk = Callable[[Marks], SheetResult]


def most_coherent(marks: Marks, walk: Walk) -> SheetResult:
    """Read a sheet; where that does not hang together, in the few other ways too, and keep the best of them.

    What the best of them leaves in doubt is noted in it. An ordinary sheet is read once.
    """
    best = walk(marks)
    doubts = doubts_of(best, marks)
    if not doubts:
        return best
    least, enough = incoherence(best, marks, doubts), _ENOUGH * share_read(best, marks)
    tried = {_way(marks): doubts}
    for other in _other_ways(marks, doubts, tried):
        if _way(other) in tried:
            continue
        result = walk(other)
        left = tried[_way(other)] = doubts_of(result, other)
        score = incoherence(result, marks, left)
        if score < least - _BETTER and share_read(result, other) > enough:
            best, doubts, least = result, left, score
        if not left and best is result:
            break
    best.doubts = [doubt for doubt in doubts if doubt.weight]
    return best


def _way(marks: Marks) -> Way:
    return marks.without, len(marks.headings)


def _other_ways(marks: Marks, doubts: list[Doubt], tried: Mapping[Way, list[Doubt]]) -> Iterator[Marks]:
    """The sheet without misleading names; also without repeats, names over columns, tables across, lines."""
    wrong = _places(cell for doubt in doubts for cell in doubt.no_names)
    names = wrong | _places(cell for doubt in doubts for cell in doubt.names)
    plain = {p: label for p, label in marks.headings.items() if not _begins_with_figure(marks, p)}
    for bare in [marks] if len(plain) == len(marks.headings) else [replace(marks, headings=plain), marks]:
        yield from _without_names(bare, wrong, tried)
        perhaps = sorted(names - wrong)[:_KEPT]
        for without in (
            *(Without(names - {kept}) for kept in perhaps),
            Without(names),
            Without(wrong, repeats=True),
            Without(wrong, over_columns=True),
            Without(wrong, across=True),
            Without(wrong, lines=True),
        ):
            yield replace(bare, without=without)


def _without_names(
    marks: Marks, names: frozenset[Place], tried: Mapping[Way, list[Doubt]]
) -> Iterator[Marks]:
    """The sheet without the names that cannot be any, and without those that then take their place.

    Each way is tried, and what is doubted then known, before the next one is asked for.
    """
    for _ in range(_ROUNDS):
        without = replace(marks, without=Without(names))
        yield without
        more = names | _places(cell for doubt in tried[_way(without)] for cell in doubt.no_names)
        if more == names:
            return
        names = more


def _places(cells: Iterable[Cell]) -> frozenset[Place]:
    return frozenset((cell.row, cell.column) for cell in cells)


def _begins_with_figure(marks: Marks, place: Place) -> bool:
    cell = marks.grid.cells[place]
    return looks_like_value(cell) and cell.text.lstrip(" <>≤≥±~+-−")[:1].isdigit()
