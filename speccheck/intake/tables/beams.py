"""Beams of an active antenna that rows or columns are about: 'Broadcast beam', 'Traffic beam'."""

from __future__ import annotations

import re
from dataclasses import replace
from functools import lru_cache

from speccheck.dictionary import match_heading, parameters, specified
from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.claims import Context
from speccheck.intake.tables.labels import FREQUENCY_KEYS
from speccheck.intake.tables.marks import Marks

_LONGEST = 60
_BROADCAST = re.compile(
    r"\b(?:broadcast|ssb|pbch|diffusion|difusi[óo]n|difus[ãa]o|diffusione|rozg[łl]oszeni\w*|rundstrahl\w*|omroep\w*)",
    re.IGNORECASE,
)
_TRAFFIC = re.compile(
    r"\b(?:traffic|service beam|user beam|unicast|pdsch|csi[- ]?rs|verkehr\w*|nutz(?:strahl|beam)\w*|trafic"
    r"|tr[áa]fico|traffico|tr[áa]fego|ruchow\w*|ruchu|verkeers?\w*)",
    re.IGNORECASE,
)
_BOUND = re.compile(r"\s*[(\[][^()\[\]]*\b(?:max|min)[^()\[\]]*[)\]]", re.IGNORECASE)
"""'Traffic (max. gain)' is the beam of the largest gain; none of its figures is a limit."""
_BRACKETED = re.compile(r"[(\[][^()\[\]]*[)\]]")
_MOST_WORDS = 7
_FEWEST = 2
_UNITS_BETWEEN = 2
"""Rows in which headings may stand above the first beam: their own, or the one above a row of units."""


@lru_cache(maxsize=2000)
def is_beam_name(text: str) -> bool:
    """Whether a text names a kind of beam and no parameter of it.

    >>> is_beam_name("Broadcast beam"), is_beam_name("Traffic (max. gain)"), is_beam_name("Traffic beam gain")
    (True, True, False)
    """
    told = len(text) <= _LONGEST and bool(_BROADCAST.search(text) or _TRAFFIC.search(text))
    if not told or ":" in text or len(text.split()) > _MOST_WORDS:
        return False
    bare = _BRACKETED.sub(" ", text)
    return set(match_heading(bare, suggest=False).parameters) <= {"beam_count"}


def hold_beams(cells: list[Cell]) -> bool:
    """Whether the cells of a column or row all name beams, of two kinds at least."""
    names = [cell.text for cell in cells]
    kinds = {bool(_BROADCAST.search(name)) for name in names}
    return len(names) >= _FEWEST and len(kinds) > 1 and all(map(is_beam_name, names))


def of_beam(context: Context, beam: str) -> Context:
    """What figures of one beam inherit: the gain of a broadcast beam is a parameter of its own.

    What is said of the whole panel, such as its weight, is said of no beam.
    """
    label = context.label
    if not beam or not label or any(parameters()[key].scope != "band" for key in label.parameters):
        return context
    if set(label.parameters) <= FREQUENCY_KEYS:
        return context
    if _BROADCAST.search(beam):
        label = replace(label, parameters=tuple(specified(key, "broadcast beam") for key in label.parameters))
    said = _BOUND.sub("", beam).strip()
    return replace(context, label=label, condition="; ".join(filter(None, (context.condition, said))))


def said_apart(grid: Grid, beamed: int, tilted: int, row: int) -> str:
    """The beam or tilt for which all figures of a row hold, where a column tells rows of a band apart."""
    if beamed and (beam := grid.covering(row, beamed)) is not None:
        return " ".join(beam.text.split())
    cell = grid.covering(row, tilted) if tilted else None
    return f"tilt {cell.text.strip(' °')}°" if cell is not None else ""


def unmark_beams(marks: Marks) -> None:
    """Names of beams below or among headings head no figures: 'Traffic (max. gain)' under 'Beam'."""
    places = {**marks.headings, **marks.lines}
    beams = [marks.grid.cells[place] for place in places if is_beam_name(marks.grid.cells[place].text)]
    for cell in beams:
        if _stands_among_beams(marks, cell):
            marks.headings.pop((cell.row, cell.column), None)
            marks.lines.pop((cell.row, cell.column), None)


def _stands_among_beams(marks: Marks, cell: Cell) -> bool:
    if len(marks.rows[cell.row]) == 1:
        return True  # it heads the rows below
    if hold_beams([other for other in marks.rows[cell.row] if is_beam_name(other.text)]):
        return True
    in_column = [
        row for row in marks.rows if (c := marks.grid.cells.get((row, cell.column))) and is_beam_name(c.text)
    ]
    if not hold_beams([marks.grid.cells[row, cell.column] for row in in_column]):
        return False
    above = range(min(in_column) - 1, max(0, min(in_column) - 1 - _UNITS_BETWEEN), -1)
    return any(sum(c > cell.column for c in marks.heading_columns(row)) >= _FEWEST for row in above)
