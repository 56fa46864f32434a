"""What a footnote settles of the figures it belongs to, and counts that every row of a panel repeats."""

from __future__ import annotations

import re
from collections import defaultdict
from dataclasses import replace

from speccheck.dictionary import parameters, specified
from speccheck.intake.panels.found import Found
from speccheck.intake.panels.understanding import MAX_WORDS, MIN_WORDS
from speccheck.quantities import read_cell
from speccheck.records import Sense

_LONGEST_CLAUSE = 80
_CLAUSE_END = re.compile(r"\s*;\s*|\.\s+")
_OF_NO_CLAIM = re.compile(
    r"\b(?:previous\w*|supersed\w*|former\w*|old|earlier|obsolete|withdrawn|excep\w*|not|unless|option\w*"
    r"|fr[üu]her\w*|nicht|außer|ancien\w*|sauf|anterior\w*|precedent\w*|eccetto|salvo|poprzedni\w*|vorig\w*)\b",
    re.IGNORECASE,
)
_OF_PANEL = frozenset({"rf_ports", "connector_type", "panel_type"})


def settle_by_note(found: Found, note: str) -> None:
    """Take in the first clause of a note as if it stood behind the figure: statistic, bound, place.

    A clause with figures of its own, or about another product or an exception, stays a remark.
    """
    clause = _CLAUSE_END.split(note, maxsplit=1)[0]
    figure = found.figure
    if len(clause) > _LONGEST_CLAUSE or _OF_NO_CLAIM.search(clause) or not isinstance(found.value, float):
        return
    said = read_cell(f"1 {figure.unit} {clause}", kind="number", unit=figure.unit, expected=figure.unit)
    if len(said.quantities) != 1 or said.quantities[0].value != 1.0:
        return
    smallest, largest = bool(MIN_WORDS.search(clause)), bool(MAX_WORDS.search(clause))
    sense = figure.sense
    if sense is Sense.NOMINAL and smallest != largest:
        sense = Sense.MIN if smallest else Sense.MAX
    statistic = figure.statistic or said.quantities[0].statistic
    found.figure = replace(
        figure, sense=sense, statistic=statistic, at={**said.quantities[0].at, **figure.at}
    )
    found.parameter = specified(found.parameter, clause)


def unband_repeated(readings: list[Found]) -> None:
    """Ports and connectors that every row of a panel repeats, one row a band, are the whole panel's.

    Not where the same rows give other figures of the panel, such as its height, only once.
    """
    columns: dict[tuple[str, str, str], list[Found]] = defaultdict(list)
    for found in readings:
        if found.parameter in _OF_PANEL:
            column = found.where.cell.rstrip("0123456789")
            columns[found.parameter, found.where.sheet, column].append(found)
    for alike in columns.values():
        if len(alike) < 2:
            continue
        rows = {found.where.cell for found in alike}
        bands = {found.band for found in alike}
        repeated = len(rows) == len(bands) == len(alike) and None not in bands
        per_band = any(re.search(r"band|pasm", found.heading, re.IGNORECASE) for found in alike)
        same = repeated and not per_band and len({found.value for found in alike}) == 1
        if same and not _gives_others_once(readings, alike):
            for found in alike:
                found.band = None


def _gives_others_once(readings: list[Found], alike: list[Found]) -> bool:
    """Whether a figure of the whole panel stands in the first of these rows and in none of the others."""
    rows = sorted(_row(found) for found in alike)
    columns: dict[str, list[int]] = defaultdict(list)
    for found in readings:
        of_panel = parameters()[found.parameter].scope == "panel" and found.parameter not in _OF_PANEL
        if of_panel and found.where.sheet == alike[0].where.sheet and _row(found) in rows:
            columns[found.where.cell.rstrip("0123456789")].append(_row(found))
    return any(set(given) == {rows[0]} for given in columns.values())


def _row(found: Found) -> int:
    return int(found.where.cell.lstrip("ABCDEFGHIJKLMNOPQRSTUVWXYZ"))
