"""Columns in pairs where a row is a panel: 'Band 1 MHz | Gain 1 dBi | Band 2 MHz | Gain 2 dBi'."""

from __future__ import annotations

import itertools
import re
from collections import Counter

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.across.bands import gives_frequencies
from speccheck.intake.tables.across.fields import Field, cells_below
from speccheck.intake.tables.across.regions import Across
from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.claims import Context
from speccheck.intake.tables.labels import Label, is_unit
from speccheck.intake.tables.marks import Marks

_TAG = re.compile(
    r"(?<![^\W_])(?:(?:band|bande|banda|pasmo|array|range)\s?|[BRFbrf](?=\d))?#?([1-6]|[A-D]|I{1,3}|IV)(?![^\W_])(?!\s?[/.,x×]\s?\d)",
)
_PLACES = {
    "low": re.compile(
        r"\b(?:low(?:er)?[- ]?band|lb|unteres band|bande basse|banda (?:baja|bassa|baixa|inferiore?)"
        r"|pasmo dolne|dolne pasmo|lage band)\b",
        re.IGNORECASE,
    ),
    "middle": re.compile(
        r"\b(?:mid(?:dle)?[- ]?band|mb|mittleres band|bande m[ée]diane|banda (?:media|m[ée]dia)"
        r"|pasmo środkowe|midden ?band)\b",
        re.IGNORECASE,
    ),
    "high": re.compile(
        r"\b(?:(?:high|upp)(?:er)?[- ]?band|hb|oberes band|bande haute|banda (?:alta|superiore?)"
        r"|pasmo górne|górne pasmo|hoge band)\b",
        re.IGNORECASE,
    ),
}
_BRACKETED = re.compile(r"[(\[][^()\[\]]*[)\]]")


def pair_with_bands(marks: Marks, table: Across, fields: dict[int, Field]) -> None:
    """Tell each column of figures the column that gives its band, where a panel's row has several of these.

    Columns are paired by the number or letter in their headings; where the headings repeat without one, a
    column belongs to the band before it.
    """
    spans = [i for i, found in fields.items() if _gives_bands(marks, table, found)]
    if len(spans) < 2:
        return
    tags = {i: _tag(fields[i].column.heading) for i in spans}
    if all(tags.values()) and len(set(tags.values())) == len(spans):
        pairs = _by_tag(marks, fields, {tag: i for i, tag in tags.items()})
    else:
        pairs = _by_place(fields, spans)
    if len(set(pairs.values())) < 2:
        pairs = {}
        if not _are_apart(marks, table, fields, spans):
            return
    for index, span in pairs.items():
        fields[index].pair = span
    for index in spans:
        column = fields[index].column
        label = Label(column.heading, ("operating_bands",), fields[index].label.unit or column.unit or "MHz")
        fields[index].label, fields[index].role, fields[index].pair = label, "", index
        fields[index].context, fields[index].banded = Context(label, heading=column.heading), False


def band_of_pair(cell: Cell | None, found: Field) -> tuple[float, float] | None:
    """The band that a cell of a band's column gives; None without one."""
    if cell is None:
        return None
    unit = found.label.unit or found.column.unit or "MHz"
    text = cell.text if "hz" in cell.text.lower() else f"{cell.text} {unit}"
    return find_bands(text).hull


def _gives_bands(marks: Marks, table: Across, found: Field) -> bool:
    if found.column.band is not None or (found.label and not found.of_frequency):
        return False
    if found.banded and not all(is_band_label(c.text) or is_unit(c.text) for c in found.column.cells):
        return False
    cells = [c for c in cells_below(marks.grid, table, found.column.index) if any(map(str.isdigit, c.text))]
    ranges = [cell for cell in cells if band_of_pair(cell, found) is not None]  # a price is no range
    return 2 * len(ranges) > len(cells) and gives_frequencies(cells)


def _are_apart(marks: Marks, table: Across, fields: dict[int, Field], spans: list[int]) -> bool:
    """Whether no row gives bands that meet: 'Tx band' and 'Rx band' are bands of their own."""
    for row in table.data_rows:
        cells = [(marks.grid.covering(row, index), fields[index]) for index in spans]
        bands = sorted(band for cell, found in cells if (band := band_of_pair(cell, found)) is not None)
        if any(lower[1] > upper[0] for lower, upper in itertools.pairwise(bands)):
            return False
    return True


def _tag(heading: str) -> str:
    bare = _BRACKETED.sub(" ", heading)
    found = _TAG.findall(bare)
    return found[-1] if found else next((name for name, words in _PLACES.items() if words.search(bare)), "")


def _by_tag(marks: Marks, fields: dict[int, Field], spans: dict[str, int]) -> dict[int, int]:
    """Columns whose heading has the number or letter of a band, to the column of that band."""
    pairs: dict[int, int] = {}
    for index, found in fields.items():
        tag = _tag(found.column.heading)
        if index in spans.values() or tag not in spans or found.banded:
            continue
        bare = marks.labels.of(" ".join(_TAG.sub(" ", found.column.heading).split()))
        label = bare if bare else found.label
        if label:
            found.label, found.role, pairs[index] = label, "", spans[tag]
            found.context = Context(
                label, found.column.unit, "", found.column.statistic, found.column.heading
            )
    return pairs


def _by_place(fields: dict[int, Field], spans: list[int]) -> dict[int, int]:
    """Columns of headings that come again behind each band, to the column of the band before them."""
    before = {i: max((s for s in spans if s < i), default=0) for i in fields}
    groups = {(before[i], found.label.parameters) for i, found in fields.items() if found.label and before[i]}
    times = Counter(parameters for _, parameters in groups)
    return {
        i: before[i]
        for i, found in fields.items()
        if i not in spans
        and before[i]
        and found.label
        and not found.banded
        and times[found.label.parameters] == len(spans)
    }
