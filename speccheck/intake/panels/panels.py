"""Drafts to panels: pieces joined, bands given, lists shared out, tolerances and footnotes added."""

from __future__ import annotations

from collections import Counter
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache, lru_cache

from speccheck.dictionary import parameters
from speccheck.intake.panels.doubted import Doubted
from speccheck.intake.panels.ends import join_ends
from speccheck.intake.panels.found import Found, Outcome
from speccheck.intake.panels.lists import share_out_list
from speccheck.intake.panels.noted import settle_by_note, unband_repeated
from speccheck.intake.panels.reading import Reader
from speccheck.intake.panels.titled import claims_with_title
from speccheck.intake.panels.told_by_panel import settle_by_panel
from speccheck.intake.tables.bands import find_bands
from speccheck.intake.tables.claims import Claim, Draft
from speccheck.intake.tables.nicknames import resolve_nicknames
from speccheck.quantities import split_footnotes
from speccheck.records import Band, Panel, Statement, Unread

FREQUENCY = frozenset({"frequency_range", "operating_bands"})
GEOMETRY = frozenset(
    [
        "array_rows",
        "array_columns",
        "element_count",
        "array_size",
        "horizontal_element_spacing",
        "vertical_element_spacing",
        "element_spacing",
        "subarray_rows",
        "subarray_columns",
        "subarray_spacing_vertical",
        "lattice",
        "panel_groups",
        "element_type",
        "transceivers",
        "csi_rs_ports",
        "mimo_layers",
        "uplink_layers",
        "served_users",
        "beam_count",
        "element_gain",
        "subarray_gain",
        "tdd_duty",
        "occupied_bandwidth",
        "front_to_back_definition",
        "grating_lobes",
    ]
)
"""Band-scoped in a panel of several arrays, but said of the whole panel when it has one."""
PER_BAND_IF_SAID = GEOMETRY | {
    "rf_ports",
    "max_power_per_port",
    "max_power_total",
    "panel_type",
    "connector_type",
}


@dataclass(slots=True)
class Built:
    """A panel with what was not read of it, and what each of its cells became."""

    panel: Panel
    unread: list[Unread]
    outcomes: list[tuple[Claim, Outcome]]

    @property
    def roles(self) -> dict[tuple[str, int, int], str]:
        """What each cell became: sheet, row and column to a word."""
        return {(o.sheet, c.cell.row, c.cell.column): _role(c, o) for c, o in self.outcomes}


class Builder:
    """Makes panels of drafts."""

    def __init__(self, reader: Reader, notes: Mapping[str, Mapping[str, str]], doubted: Doubted) -> None:
        self._reader, self._notes = reader, {sheet: found for sheet, found in notes.items() if found}
        self._doubted = doubted

    def build(self, draft: Draft) -> Built:
        """Read the claims of a draft and settle what only the whole panel can settle."""
        where = self._reader.where(draft.grid.name, draft.where.address)
        unread: list[Unread] = []
        statements: list[Statement] = []
        readings: list[Found] = []
        tolerances: list[tuple[Claim, Outcome]] = []
        outcomes = [
            (claim, self._reader.read(claim, piece.grid.name)) for piece, claim in claims_with_title(draft)
        ]
        join_ends(outcomes)
        resolve_nicknames(outcomes)
        several = self._bands(draft, outcomes)
        for claim, outcome in outcomes:
            if claim.context.label.tolerance:
                tolerances.append((claim, outcome))
                continue
            found = outcome.found
            if len(found) > 1 or (found and found[0].parameter in FREQUENCY):
                found, trouble = _shared_out(claim, found, draft.bands, several)
                if trouble is not None:
                    unread.append(trouble)
            if self._notes:
                self._add_notes(found, outcome, claim)
            readings += found
            if outcome.statement is not None:
                statements.append(outcome.statement)
            if outcome.unread is not None:
                unread.append(outcome.unread)
        _add_tolerances(readings, tolerances, unread)
        _place(readings, draft.bands, several)
        unband_repeated(readings)
        settle_by_panel(readings)
        readings = self._doubted.settle(draft, readings, unread)
        panel = Panel(
            name=draft.name,
            where=where,
            readings=tuple([f.reading() for f in readings]),
            statements=tuple(statements),
        )
        return Built(panel, unread, outcomes)

    def _bands(self, draft: Draft, outcomes: list[tuple[Claim, Outcome]]) -> bool:
        """Complete the draft's bands from its frequency cells; True when it has several."""
        overall: list[Band] = []
        told = [(c, o) for c, o in outcomes if c.context.label.parameters[0] in FREQUENCY]
        for _, outcome in told:
            for found in outcome.found:
                _name_to_span(found)
        in_figures = bool(draft.bands) or any(_in_figures(o.found) for _, o in told)
        for claim, outcome in told:
            spans = [f.value for f in outcome.found if isinstance(f.value, tuple)]
            if in_figures and not claim.banded and not _in_figures(outcome.found):
                continue
            if len(spans) > 1 and (len(draft.bands) < 2 or set(draft.bands) <= set(spans)):
                # figures in one cell follow the order of the list, not that in which single bands were met
                draft.bands[:] = dict.fromkeys([*spans, *draft.bands])
            elif len(spans) == 1 and not claim.banded:
                overall.append(spans[0])
        of_figures = [f.band for _, outcome in outcomes for f in outcome.found if f.band is not None]
        draft.bands = list(dict.fromkeys([*draft.bands, *of_figures]))
        named = any(claim.banded and claim.band is None for claim, _ in outcomes)
        if not draft.bands and overall and not named:
            draft.bands = [overall[0]] if len(set(overall)) == 1 else list(dict.fromkeys(overall))
        if len(draft.bands) == 1 and overall and draft.bands[0] not in overall:
            return True
        return len(draft.bands) > 1 or named

    def _add_notes(self, found: list[Found], outcome: Outcome, claim: Claim) -> None:
        notes = self._notes.get(outcome.sheet, {})
        markers = dict.fromkeys((*outcome.footnotes, *_markers(claim.context.heading)))
        remark = "; ".join(f"note {m}: {notes[m]}" for m in markers if m in notes)
        for one in found:
            one.remark = remark
            for marker in markers:
                if marker in notes:
                    settle_by_note(one, notes[marker])


def _role(claim: Claim, outcome: Outcome) -> str:
    if claim.context.label.tolerance:
        return "label"
    if outcome.statement is not None:
        return "statement"
    return "reading" if outcome.found or outcome.joined else "unread"


def _name_to_span(found: Found) -> None:
    """A band given by name ('n78') as its frequencies."""
    if isinstance(found.value, str):
        hull = find_bands(found.value).hull
        if hull is not None:
            how = f"{found.value} is {hull[0]:g}–{hull[1]:g} MHz by the band table"
            found.recognised = f"{found.figure.recognised}; {how}"
            found.value = hull


def _in_figures(found: list[Found]) -> bool:
    """Whether a frequency cell gives any range in figures, not only names of standard bands."""
    return any(
        isinstance(f.value, tuple) and not isinstance(f.figure.quantity.stated_value, str) for f in found
    )


@lru_cache(maxsize=2000)
def _markers(heading: str) -> tuple[str, ...]:
    """Footnote markers of a heading; of headings one above another each may have its own."""
    return tuple(marker for part in heading.split(" / ") for marker in split_footnotes(part)[1])


def _shared_out(
    claim: Claim, found: list[Found], bands: list[Band], several: bool
) -> tuple[list[Found], Unread | None]:
    """Frequencies taken for bands; a list of figures in one cell given to the panel's bands in order."""
    first = found[0]
    if first.parameter in FREQUENCY:
        if bands and not claim.banded and claim.band is None and not _in_figures(found):
            return _named_bands(found, bands), None
        return _frequencies(claim, found, several), None
    return share_out_list(claim, found, bands)


def _named_bands(found: list[Found], bands: list[Band]) -> list[Found]:
    """Names of standard bands say what is supported; they are no bands with figures of their own."""
    for one in found:
        span = _span_of(one)
        one.parameter, one.band = "operating_bands", span if span in bands else None
    return found


def _frequencies(claim: Claim, found: list[Found], several: bool) -> list[Found]:
    """The one range of a panel is also its operating band; of several ranges each is a band."""
    spans = [f for f in found if isinstance(f.value, tuple)]
    if len(spans) > 1 or (claim.banded and several):
        for one in spans:
            one.parameter, one.band = "operating_bands", _span_of(one)
    elif spans and not several:
        whole = spans[0].also("frequency_range", None)
        spans[0].parameter, spans[0].band = "operating_bands", _span_of(spans[0])
        return [whole, *found]
    else:
        for one in found:
            if one.parameter == "frequency_range" or (not claim.banded and claim.band is None and spans):
                one.parameter, one.band = "frequency_range", None
    return found


def _span_of(found: Found) -> Band | None:
    return found.value if isinstance(found.value, tuple) else None


def _add_tolerances(
    readings: list[Found], tolerances: list[tuple[Claim, Outcome]], unread: list[Unread]
) -> None:
    for claim, outcome in tolerances:
        key = claim.context.label.parameters[0]
        amounts = [f.tolerance if f.tolerance is not None else f.value for f in outcome.found]
        amount = amounts[0] if amounts else None
        fits = [
            f for f in readings if f.parameter == key and claim.band in (None, f.band) and f.tolerance is None
        ]
        if isinstance(amount, float) and fits:
            for one in fits:
                one.tolerance = abs(amount)
        elif outcome.found:
            reason = "a tolerance without a figure it belongs to"
            unread.append(Unread(where=outcome.found[0].where, text=claim.cell.text, reason=reason))
        elif outcome.unread is not None:
            unread.append(outcome.unread)


@cache
def _keys_of_bands() -> frozenset[str]:
    """Parameters that have a figure for each band, of whatever panel."""
    return frozenset(key for key, known in parameters().items() if known.scope == "band") - GEOMETRY


def _place(readings: list[Found], bands: list[Band], several: bool) -> None:
    """Bands by the scope of each parameter."""
    of_bands = _keys_of_bands()
    only = bands[0] if len(bands) == 1 and not several else None
    several_of = _stated_again(readings, only) if only else frozenset()
    for found in readings:
        key = found.parameter
        if key in FREQUENCY:
            continue
        by_band = key in of_bands
        if only is not None:
            of_array = key in PER_BAND_IF_SAID and key in several_of and found.band == only
            found.band = only if by_band or of_array else None
        elif not by_band and key not in PER_BAND_IF_SAID:
            found.band = None


def _stated_again(readings: list[Found], band: Band) -> frozenset[str]:
    """Parameters that several arrays of one band give; '128 (8x8x2)' only says 'Rows: 8' once more."""
    elements = {found.where for found in readings if found.parameter == "element_count"}
    stated = Counter([(f.parameter, f.where in elements) for f in readings if f.band == band])
    return frozenset(key for (key, _), count in stated.items() if count > 1)
