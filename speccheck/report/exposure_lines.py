"""Rows of the exposure note folded for print: a line for a band and averaging kind, populations abreast."""

from __future__ import annotations

from dataclasses import dataclass

from speccheck.records import Band, ExposureNote, ExposureRow, ExposureZone


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
    populations = {row.population: row.category or row.population for row in note.rows}
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


def zone_table(note: ExposureNote) -> ZoneTable:
    """Fold the zones of a note; no zone is left out."""
    populations = tuple(dict.fromkeys(zone.population for zone in note.around))
    folded: dict[tuple[Band, str], list[ExposureZone | None]] = {}
    for zone in note.around:
        line = folded.setdefault((zone.band, zone.basis), [None] * len(populations))
        line[populations.index(zone.population)] = zone
    lines = (ZoneLine(band=band, basis=basis, zones=tuple(zones)) for (band, basis), zones in folded.items())
    return ZoneTable(populations=populations, lines=tuple(lines))
