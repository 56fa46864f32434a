"""Drafts to panels: pieces joined, bands given, lists shared out, tolerances and footnotes added."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from speccheck.dictionary import parameters
from speccheck.intake.bands import find_bands
from speccheck.intake.claims import Claim, Draft
from speccheck.intake.reading import Outcome, Reader
from speccheck.records import Band, Panel, Reading, Statement, Unread

FREQUENCY = frozenset({"frequency_range", "operating_bands"})
GEOMETRY = frozenset(
    {
        "array_rows", "array_columns", "element_count", "array_size", "horizontal_element_spacing",
        "vertical_element_spacing", "element_spacing", "subarray_rows", "subarray_columns",
        "subarray_spacing_vertical", "lattice", "panel_groups", "element_type", "transceivers",
        "csi_rs_ports", "mimo_layers", "served_users", "beam_count", "element_gain", "subarray_gain", "tdd_duty",
        "occupied_bandwidth", "front_to_back_definition", "grating_lobes",
    }
)  # fmt: skip
"""Band-scoped in a panel of several arrays, but said of the whole panel when it has one."""
PER_BAND_IF_SAID = GEOMETRY | {
    "rf_ports",
    "max_power_per_port",
    "max_power_total",
    "panel_type",
    "connector_type",
}
_TITLE_KEYS = frozenset(
    {"model", "part_number", "manufacturer", "revision", "panel_type", "remarks", "standards"}
)


def joined(drafts: list[Draft]) -> list[Draft]:
    """Drafts of one panel put together: by name, or because a piece has no name of its own."""
    kept: list[Draft] = []
    for draft in drafts:
        if not draft.claims:
            continue
        home = _home(draft, kept)
        if home is None:
            kept.append(draft)
            continue
        if draft.named and not home.named:
            home.name, home.named = draft.name, True
        home.claims += draft.claims
        home.bands += [band for band in draft.bands if band not in home.bands]
    return kept


def _home(draft: Draft, kept: list[Draft]) -> Draft | None:
    for other in reversed(kept):
        same_name = other.name.casefold() == draft.name.casefold()
        if same_name and not _clashes(draft, other):
            return other
    if not kept:
        return None
    last = kept[-1]
    if last.keys() <= _TITLE_KEYS and last.grid is draft.grid and not draft.named:
        return last
    if draft.named and (last.named or last.grid is draft.grid):
        return None
    alone = len(kept) == 1 or last.grid is draft.grid
    return last if alone and not _clashes(draft, last) else None


def _clashes(draft: Draft, other: Draft) -> bool:
    """Whether two drafts state the same things and so are two panels."""
    mine = {(key, c.band, c.context.band_name) for c in draft.claims for key in c.context.label.parameters}
    theirs = {(key, c.band, c.context.band_name) for c in other.claims for key in c.context.label.parameters}
    shared = {entry for entry in mine & theirs if entry[0] not in _TITLE_KEYS}
    return len(shared) >= 2 and len(shared) * 3 >= min(len(mine), len(theirs))


@dataclass(slots=True)
class Built:
    """A panel with what was not read of it, and what each of its cells became."""

    panel: Panel
    unread: list[Unread] = field(default_factory=list)
    roles: dict[tuple[str, int, int], str] = field(default_factory=dict)


class Builder:
    """Makes panels of drafts."""

    def __init__(self, reader: Reader, notes: Mapping[str, Mapping[str, str]]) -> None:
        self._reader, self._notes = reader, notes

    def build(self, draft: Draft) -> Built:
        """Read the claims of a draft and settle what only the whole panel can settle."""
        sheet = draft.grid.name
        built = Built(Panel(name=draft.name, where=self._reader.where(sheet, draft.where.address)))
        readings: list[Reading] = []
        statements: list[Statement] = []
        tolerances: list[tuple[Claim, Outcome]] = []
        outcomes = [(claim, self._reader.read(claim, sheet)) for claim in draft.claims]
        several = self._bands(draft, outcomes)
        for claim, outcome in outcomes:
            role = "unread"
            if claim.context.label.tolerance:
                tolerances.append((claim, outcome))
                role = "label"
            else:
                if outcome.readings:
                    role = "reading"
                    found, trouble = _shared_out(claim, outcome.readings, draft.bands, several)
                    readings += self._noted(found, outcome, claim, sheet)
                    if trouble is not None:
                        built.unread.append(trouble)
                if outcome.statement is not None:
                    role = "statement"
                    statements.append(outcome.statement)
                if outcome.unread is not None:
                    built.unread.append(outcome.unread)
            built.roles[sheet, claim.cell.row, claim.cell.column] = role
        readings = _with_tolerances(readings, tolerances, built.unread)
        readings = _placed(readings, draft.bands, several)
        built.panel = replace(built.panel, readings=tuple(readings), statements=tuple(statements))
        return built

    def _bands(self, draft: Draft, outcomes: list[tuple[Claim, Outcome]]) -> bool:
        """Complete the draft's bands from its frequency cells; True when it has several."""
        overall: list[Band] = []
        for claim, outcome in outcomes:
            if claim.context.label.parameters[0] not in FREQUENCY:
                continue
            outcome.readings = [_as_span(reading) for reading in outcome.readings]
            spans = [r.value for r in outcome.readings if isinstance(r.value, tuple)]
            if len(spans) > 1 and len(draft.bands) < 2:
                draft.bands += [s for s in spans if s not in draft.bands]
            elif len(spans) == 1 and not claim.banded:
                overall.append(spans[0])
        named = any(claim.context.band_name for claim, _ in outcomes)
        if not draft.bands and overall and not named:
            draft.bands = [overall[0]] if len(set(overall)) == 1 else list(dict.fromkeys(overall))
        if len(draft.bands) == 1 and overall and draft.bands[0] not in overall:
            return True
        return len(draft.bands) > 1 or named

    def _noted(self, readings: list[Reading], outcome: Outcome, claim: Claim, sheet: str) -> list[Reading]:
        markers = dict.fromkeys((*outcome.footnotes, *_markers(claim.context.heading)))
        notes = [f"note {m}: {self._notes[sheet][m]}" for m in markers if m in self._notes.get(sheet, {})]
        if not notes:
            return readings
        extra = "; ".join(notes)
        return [replace(r, condition=f"{r.condition}; {extra}" if r.condition else extra) for r in readings]


def _as_span(reading: Reading) -> Reading:
    """A band given by name ('n78') as its frequencies."""
    if isinstance(reading.value, str):
        hull = find_bands(reading.value).hull
        if hull is not None:
            how = f"{reading.recognised}; {reading.value} is {hull[0]:g}–{hull[1]:g} MHz by the band table"
            return replace(reading, value=hull, unit="MHz", recognised=how)
    return reading


def _markers(heading: str) -> tuple[str, ...]:
    found = re.findall(r"(?<=[\w)])\s?((?:\*+|[¹²³⁴⁵⁶⁷⁸⁹]|\d\)))\s*$", heading)
    return tuple(m.translate(str.maketrans("¹²³⁴⁵⁶⁷⁸⁹", "123456789")).strip(") ") for m in found)


def _shared_out(
    claim: Claim, readings: list[Reading], bands: list[Band], several: bool
) -> tuple[list[Reading], Unread | None]:
    """A list of figures in one cell, given to the panel's bands in their order."""
    first = readings[0]
    if first.parameter in FREQUENCY:
        return _frequency_readings(claim, readings, several), None
    alike = [r for r in readings if r.parameter == first.parameter]
    plain = len(alike) > 1 and not any(r.at for r in alike) and len({r.condition for r in alike}) == 1
    if (
        claim.band is not None
        or not plain
        or parameters()[first.parameter].kind not in ("number", "range", "count")
    ):
        return readings, None
    if len(alike) == len(bands):
        others = [r for r in readings if r not in alike]
        return [*(replace(r, band=b) for r, b in zip(alike, bands, strict=True)), *others], None
    if len({r.sense for r in alike}) > 1:
        return readings, None
    reason = f"{len(alike)} figures in one cell, but {len(bands)} known bands to give them to"
    return [], Unread(
        where=first.where, text=first.raw, reason=reason, suggestion="ask which figure holds for which band"
    )


def _frequency_readings(claim: Claim, readings: list[Reading], several: bool) -> list[Reading]:
    spans = [r for r in readings if isinstance(r.value, tuple)]
    others = [r for r in readings if r not in spans]
    if len(spans) > 1 or claim.banded:
        banded = [
            replace(r, parameter="operating_bands", band=r.value) for r in spans if isinstance(r.value, tuple)
        ]
        return [*banded, *others]
    if spans and not several:
        whole = replace(spans[0], parameter="frequency_range", band=None)
        band = spans[0].value if isinstance(spans[0].value, tuple) else None
        return [whole, replace(spans[0], parameter="operating_bands", band=band), *others]
    return [replace(r, band=None) if r.parameter == "frequency_range" else r for r in readings]


def _with_tolerances(
    readings: list[Reading], tolerances: list[tuple[Claim, Outcome]], unread: list[Unread]
) -> list[Reading]:
    for claim, outcome in tolerances:
        key = claim.context.label.parameters[0]
        amounts = [r.tolerance if r.tolerance is not None else r.value for r in outcome.readings]
        amount = amounts[0] if amounts else None
        hit = False
        for index, reading in enumerate(readings):
            fits = (
                reading.parameter == key and claim.band in (None, reading.band) and reading.tolerance is None
            )
            if fits and isinstance(amount, float | int):
                readings[index] = replace(reading, tolerance=abs(float(amount)))
                hit = True
        if not hit:
            where = outcome.readings[0].where if outcome.readings else None
            if where is not None:
                reason = "a tolerance without a figure it belongs to"
                unread.append(Unread(where=where, text=claim.cell.text, reason=reason))
            elif outcome.unread is not None:
                unread.append(outcome.unread)
    return readings


def _placed(readings: list[Reading], bands: list[Band], several: bool) -> list[Reading]:
    """Bands by the scope of each parameter."""
    table = parameters()
    only = bands[0] if len(bands) == 1 and not several else None
    placed = []
    for reading in readings:
        key = reading.parameter
        if key in FREQUENCY:
            placed.append(reading)
            continue
        by_band = table[key].scope == "band" and key not in GEOMETRY
        band = reading.band
        if only is not None:
            band = only if by_band else None
        elif not by_band and key not in PER_BAND_IF_SAID:
            band = None
        placed.append(reading if band == reading.band else replace(reading, band=band))
    return placed
