"""Readings of a sheet whose layout was not understood for certain: they are shown, and carry no verdict."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Mapping, Sequence
from dataclasses import replace

from speccheck.intake.panels.found import Found
from speccheck.intake.tables.claims import Doubt, Draft
from speccheck.records import Unread, Value

_MOST_OTHERS = 20
"""Contrary figures kept beside each: a column of a thousand would give each the thousand."""


class Doubted:
    """The cells of a file whose reading does not hang together with others, by sheet."""

    def __init__(self, doubts: Mapping[str, Sequence[Doubt]]) -> None:
        self._doubts = {
            sheet: [(doubt, {(sheet, cell.address) for cell in doubt.cells}) for doubt in found]
            for sheet, found in doubts.items()
            if found
        }

    def settle(self, draft: Draft, readings: list[Found], unread: list[Unread]) -> list[Found]:
        """Readings that may stand: figures out of place are listed as not read.

        A figure beside a contrary one has that for its alternative; where the name or extent of the panel is
        in doubt, every reading says so.
        """
        for doubt, cells in self._doubts.get(draft.grid.name, ()):
            if doubt.misplaced:
                reason = f"layout not understood: {doubt.text}"
                lost = [found for found in readings if _place(found) in cells]
                unread += [Unread(where=found.where, text=found.raw, reason=reason) for found in lost]
                readings = [found for found in readings if _place(found) not in cells]
            elif doubt.no_names or doubt.names:
                if any(draft.where is cell for cell in doubt.cells):
                    for found in readings:
                        said = found.recognised or found.figure.recognised
                        found.recognised = f"{said}; layout not understood: {doubt.text}"
            else:
                _face([found for found in readings if _place(found) in cells])
        return readings


def _place(found: Found) -> tuple[str, str]:
    return found.where.sheet, found.where.cell


def _face(readings: list[Found]) -> None:
    """Give each of several contrary figures the others for alternatives."""
    alike: dict[tuple[object, ...], list[Found]] = defaultdict(list)
    for found in readings:
        key = (found.parameter, found.band, found.heading, found.figure.condition, found.figure.statistic)
        alike[key].append(found)
    for several in alike.values():
        values: list[Value] = list(dict.fromkeys(found.value for found in several))
        few = values[: _MOST_OTHERS + 1]
        for found in several if len(values) > 1 else ():
            others = tuple(value for value in few if value != found.value)
            quantity = replace(found.figure.quantity, alternatives=others)
            found.figure = replace(found.figure, quantity=quantity)
