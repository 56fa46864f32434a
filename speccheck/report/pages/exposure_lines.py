"""Rows of the exposure note folded for print: a line for a band and averaging kind, populations abreast."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass, replace

from speccheck.records import Band, ExposureNote, ExposureRow, ExposureZone

MOST_BANDS = 6
"""Bands of which a box with all assumptions and cautions still stands on one page, A4 or Letter."""


def note_parts(note: ExposureNote) -> tuple[ExposureNote, ...]:
    """A note of many bands as several, each with its share of the bands and all that bounds every figure.

    The lines of all bands together stand in each part.
    """
    named = (*(row.band for row in note.rows), *(zone.band for zone in note.around))
    bands = tuple(dict.fromkeys(band for band in named if band))
    count = max(1, -(-len(bands) // MOST_BANDS))
    shares = [bands[i * len(bands) // count : (i + 1) * len(bands) // count] for i in range(count)]
    return tuple(
        replace(
            note,
            rows=tuple(row for row in note.rows if row.band is None or row.band in share),
            around=tuple(zone for zone in note.around if zone.band in share),
        )
        for share in shares
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class ExposureLine:
    """One line: the rows of a band and averaging kind in the order of `ExposureTable.populations`."""

    band: Band | None
    basis: str
    averaging_min: float
    rows: tuple[ExposureRow | None, ...]

    @property
    def first(self) -> ExposureRow:
        """A row of the line, for what all of them share."""
        return next(row for row in self.rows if row is not None)


@dataclass(frozen=True, slots=True, kw_only=True)
class ExposureTable:
    """All lines; `factored` where a time factor below 1 gives a second figure."""

    populations: tuple[tuple[str, str], ...]
    lines: tuple[ExposureLine, ...]
    factored: bool


def exposure_table(note: ExposureNote) -> ExposureTable:
    """Fold the rows of a note; no row is left out."""
    populations = _populations(note)
    places = {name: i for i, name in enumerate(populations)}
    folded: list[tuple[tuple[Band | None, str, float], list[ExposureRow | None]]] = []
    for row in note.rows:
        key, place = (row.band, row.basis, row.averaging_min), places[row.population]
        free = (line for known, line in folded if known == key and line[place] is None)
        line = next(free, None)
        if line is None:
            line = [None] * len(places)
            folded.append((key, line))
        line[place] = row
    return ExposureTable(
        populations=tuple(populations.items()),
        lines=tuple(
            ExposureLine(band=band, basis=basis, averaging_min=minutes, rows=tuple(rows))
            for (band, basis, minutes), rows in folded
        ),
        factored=any(row.factored_distance_m is not None for row in note.rows),
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class ZoneLine:
    """Zones of a band and averaging kind in the order of `ZoneTable.populations`."""

    band: Band
    basis: str
    zones: tuple[ExposureZone | None, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class ZoneTable:
    """All zones of a note, folded."""

    populations: tuple[str, ...]
    lines: tuple[ZoneLine, ...]


def _populations(note: ExposureNote) -> dict[str, str]:
    """Who is meant, in the words of the limit set, beside the plain word where that differs."""
    return {row.population: _category(row.population, row.category) for row in note.rows}


def _category(population: str, category: str) -> str:
    return category if population in category else f"{category} ({population})" if category else population


def zone_table(note: ExposureNote) -> ZoneTable:
    """Fold the zones of a note; no zone is left out."""
    populations = tuple(dict.fromkeys(zone.population for zone in note.around))
    folded: dict[tuple[Band, str], list[ExposureZone | None]] = {}
    for zone in note.around:
        line = folded.setdefault((zone.band, zone.basis), [None] * len(populations))
        line[populations.index(zone.population)] = zone
    lines = (ZoneLine(band=band, basis=basis, zones=tuple(zones)) for (band, basis), zones in folded.items())
    named = _populations(note)
    return ZoneTable(populations=tuple(named.get(p, p) for p in populations), lines=tuple(lines))


_BAND = re.compile(r"(\d+(?:\.\d+)?[-–]\d+(?:\.\d+)?)\sMHz")
_FIGURES = re.compile(r" \([\d.,]+ m\)|; cylindrical model holds up to [\d.,]+ m")


_OF_BAND = re.compile(r"(\w+) of (\d+(?:\.\d+)?[-–]\d+(?:\.\d+)?\sMHz): ([^;]*)(?:; )?(.*)")
_SHEET = re.compile(r"\(([^()!;]+)!(?=[A-Z]{1,3}\d+\))")
_STATED = re.compile(r"(EIRP stated as) (.*)()(: the stated .*)")


def merged_by_band(texts: Iterable[str]) -> tuple[str, ...]:
    """Sentences that differ in their band, or in band and figure, said once for all of those bands."""
    said: dict[str, list[str]] = {}
    for text in texts:
        found = _BAND.search(text)
        frame = f"{text[: found.start()]}\0{text[found.end() :]}" if found else text
        said.setdefault(frame, []).append(found[1] if found else "")
    return _merged_figures(frame.replace("\0", ", ".join(bands) + " MHz") for frame, bands in said.items())


def _merged_figures(texts: Iterable[str]) -> tuple[str, ...]:
    """Power, gain and EIRP of several bands as one sentence each."""
    said: dict[tuple[str, str], list[str]] = {}
    for text in texts:
        if of_band := _OF_BAND.fullmatch(text):
            name, band, figure, rest = of_band.groups()
            said.setdefault((f"{name}: ", f"; {rest}" if rest else ""), []).append(f"{band} {figure}")
        elif stated := _STATED.fullmatch(text):
            said.setdefault((f"{stated[1]} ", stated[4]), []).append(stated[2])
        else:
            said.setdefault((text, ""), []).append("")
    return tuple(
        head
        + _sheet_once("; ".join(figure.rstrip(".") for figure in figures))
        + (tail or ("." if figures[0] else ""))
        for (head, tail), figures in said.items()
    )


def _sheet_once(text: str) -> str:
    """A list of figures with the sheet named before its first cell only, where all cells lie in one."""
    sheets = dict.fromkeys(_SHEET.findall(text))
    if len(sheets) != 1:
        return text
    named = f"({next(iter(sheets))}!"
    first, _, rest = text.partition(named)
    return first + named + rest.replace(named, "(")


def region_lines(note: ExposureNote) -> tuple[str, ...]:
    """Near or far field of the distances: with figures for one band, a line for each region for several."""
    regions: dict[str, dict[Band, None]] = {}
    several = len({row.band for row in note.rows if row.band}) > 1
    for row in note.rows:
        if row.region and (row.band or not several):
            words = _FIGURES.sub("", row.region) if several else row.region
            regions.setdefault(words, {})
            if row.band:
                regions[words][row.band] = None
    if not several:
        return tuple(regions)
    return tuple(
        f"{words} ({', '.join(f'{low:g}-{high:g}' for low, high in bands)} MHz)"
        for words, bands in regions.items()
    )
