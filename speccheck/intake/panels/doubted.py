"""Readings of a sheet whose layout was not understood for certain: they are shown, and carry no verdict."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Mapping, Sequence
from dataclasses import replace

from speccheck.intake.panels.found import Found
from speccheck.intake.tables.claims import Doubt, Draft
from speccheck.records import Value


class Doubted:
    """The cells of a file whose reading does not hang together with others, by sheet."""

    def __init__(self, doubts: Mapping[str, Sequence[Doubt]]) -> None:
        self._doubts = {sheet: found for sheet, found in doubts.items() if found}

    def mark(self, draft: Draft, readings: list[Found]) -> None:
        """Mark what is in doubt: a figure beside a contrary one has that for its alternative.

        Of a panel whose name or extent is in doubt every reading says so.
        """
        for doubt in self._doubts.get(draft.grid.name, ()):
            if doubt.no_names or doubt.names:
                if any(draft.where is cell for cell in doubt.cells):
                    for found in readings:
                        said = found.recognised or found.figure.recognised
                        found.recognised = f"{said}; layout not understood: {doubt.text}"
            else:
                _face(readings, {(draft.grid.name, cell.address) for cell in doubt.cells})


def _face(readings: list[Found], cells: set[tuple[str, str]]) -> None:
    alike: dict[tuple[object, ...], list[Found]] = defaultdict(list)
    for found in readings:
        if (found.where.sheet, found.where.cell) in cells:
            key = (found.parameter, found.band, found.heading, found.figure.condition, found.figure.statistic)
            alike[key].append(found)
    for several in alike.values():
        values: list[Value] = list(dict.fromkeys(found.value for found in several))
        for found in several if len(values) > 1 else ():
            others = tuple(value for value in values if value != found.value)
            quantity = replace(found.figure.quantity, alternatives=others)
            found.figure = replace(found.figure, quantity=quantity)
