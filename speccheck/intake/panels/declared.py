"""Declarations of compliance beside an offer that says otherwise: shown, never used as a figure."""

from __future__ import annotations

from speccheck.dictionary import parameters
from speccheck.intake.panels.found import Figure
from speccheck.intake.panels.reading import Reader
from speccheck.intake.tables.claims import Declared
from speccheck.records import Notice, Sense
from speccheck.text import plain


def contrary_notices(rows: list[Declared], sheet: str, reader: Reader) -> list[Notice]:
    """A notice for each 'comply' beside a figure that misses the one required."""
    found = []
    for row in rows:
        asked, offered = reader.figures(row.required, row.context), reader.figures(row.offered, row.context)
        if len(asked) == len(offered) == 1 and _misses(asked[0], offered[0]):
            offer, asked_for = plain(row.offered.text, 60), plain(row.required.text, 60)
            text = (
                f"declares '{plain(row.said.text, 40)}' beside an offer of '{offer}' ({row.offered.address}) "
                f"where '{asked_for}' ({row.required.address}) is asked; "
                "the offer is read, the declaration is not"
            )
            found.append(Notice(where=reader.where(sheet, row.said.address), text=text))
    return found


def _misses(asked: Figure, offered: Figure) -> bool:
    wanted, given = asked.quantity.value, offered.quantity.value
    if asked.quantity.alternatives or offered.quantity.alternatives:
        return False
    if isinstance(wanted, tuple) and isinstance(given, tuple):
        contains = parameters()[asked.parameter].direction == "contains"
        return contains and not (given[0] <= wanted[0] and wanted[1] <= given[1])
    if not isinstance(wanted, float) or not isinstance(given, float):
        return False
    if asked.quantity.tolerance is not None:
        return abs(given - wanted) > asked.quantity.tolerance
    direction = parameters()[asked.parameter].direction
    least = asked.sense is Sense.MIN or (asked.sense is Sense.NOMINAL and direction == "higher")
    most = asked.sense is Sense.MAX or (asked.sense is Sense.NOMINAL and direction == "lower")
    return (least and given < wanted) or (most and given > wanted)
