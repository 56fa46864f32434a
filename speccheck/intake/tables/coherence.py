"""How far the reading of one sheet hangs together, judged by what was read: names, bands, contradictions."""

from __future__ import annotations

import statistics
from collections import Counter, defaultdict
from collections.abc import Iterator
from dataclasses import dataclass

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.claims import Claim, Doubt, Draft, SheetResult
from speccheck.intake.tables.labels import FREQUENCY_KEYS, Labels
from speccheck.intake.tables.marks import Marks, looks_like_value
from speccheck.intake.tables.names.refused import never_a_name
from speccheck.intake.tables.names.titles import codes
from speccheck.quantities import UnknownUnitError, convert

_ASIDE = frozenset({"model", "part_number", "manufacturer", "revision", "panel_type", "remarks", "standards"})
_LOOKED_AT = 40
"""Panels of a sheet that are judged, evenly spaced: a catalogue repeats what it does in its first rows."""
_FEW_KEYS, _USUAL_KEYS = 2, 6
_LEAST_SHARED = 1 / 3
_OF_NAMES = 0.2
_FEWEST_NAMED = 3
"""Beside so many named panels one without a name is none; beside fewer it may belong to one of them."""
_MOSTLY = 0.6
_LEAST_CONTRARY, _CONTRARY_SHARE = 2, 0.1
_FEWEST_FIGURES = 6
_FEWEST_MISPLACED, _MISPLACED_SHARE = 3, 0.25
_STRETCH = 3.0
"""So far beyond the usual figures a figure is hardly one of its parameter."""


@dataclass(frozen=True, slots=True)
class _Panel:
    """All pieces of one name on a sheet, and the technical parameters they state."""

    name: str
    drafts: list[Draft]
    keys: set[str]

    def claims(self) -> Iterator[Claim]:
        return (claim for draft in self.drafts for claim in draft.claims)

    @property
    def where(self) -> Cell:
        return self.drafts[0].where

    @property
    def named(self) -> bool:
        return any(draft.named for draft in self.drafts)

    @property
    def banded(self) -> bool:
        bands = any(draft.bands for draft in self.drafts)
        return bands or bool(self.keys & FREQUENCY_KEYS) or any(c.banded for c in self.claims())


def doubts_of(result: SheetResult, marks: Marks) -> list[Doubt]:
    """What speaks against a reading of a sheet; empty for one that hangs together."""
    panels = _panels(result)
    if not panels:
        return _nothing_read(marks)
    named = [panel for panel in panels if panel.named]
    found = (
        _misnamed(named, marks.labels),
        _strewn(named),
        _thin(panels if len(named) >= _FEWEST_NAMED else named),
        _interleaved(named),
        _without_band(named),
        _contrary(panels),
        _misplaced(panels),
        _mostly_unread(result),
    )
    return [doubt for doubt in found if doubt is not None]


def incoherence(result: SheetResult, marks: Marks, doubts: list[Doubt]) -> float:
    """How badly a reading hangs together: its doubts, figures left out, panels it cannot name."""
    left_out = 1 - share_read(result, marks)
    unnamed = sum(not draft.named for draft in result.drafts) / max(len(result.drafts), 1)
    return sum(doubt.weight for doubt in doubts) + left_out + _OF_NAMES * unnamed


def share_read(result: SheetResult, marks: Marks) -> float:
    """Share of the figures of a sheet that a reading takes for figures of panels."""
    figures = [place for place, cell in marks.grid.cells.items() if looks_like_value(cell)]
    return sum(result.roles.get(place) == "claimed" for place in figures) / max(len(figures), 1)


def _panels(result: SheetResult) -> list[_Panel]:
    drafts = [draft for draft in result.drafts if draft.claims]
    if len(drafts) > _LOOKED_AT:
        usual = statistics.median_low(len(draft.claims) for draft in drafts)
        thin = [draft for draft in drafts if len(draft.claims) * 3 < usual][:_LOOKED_AT]
        drafts = list({id(draft): draft for draft in (*drafts[:: len(drafts) // _LOOKED_AT], *thin)}.values())
    by_name: dict[str, list[Draft]] = defaultdict(list)
    for draft in drafts:
        by_name[draft.name].append(draft)
    panels = [_Panel(name, mine, set().union(*(d.keys() for d in mine))) for name, mine in by_name.items()]
    return [panel for panel in panels if panel.keys - _ASIDE]


def _nothing_read(marks: Marks) -> list[Doubt]:
    headings = [marks.grid.cells[place] for place in marks.headings]
    figures = [cell for cell in marks.grid.cells.values() if looks_like_value(cell)]
    if len(headings) < 2 or len(figures) < _FEWEST_FIGURES:
        return []
    return [Doubt("no figure was read beside or below headings that are known", tuple(headings), 1.0)]


def _misnamed(panels: list[_Panel], labels: Labels) -> Doubt | None:
    """Panels called by what can never be a name, or by the name of a parameter."""
    told = [p for p in panels if p.where.text.strip() != p.drafts[0].grid.name.strip()]
    wrong = [p for p in told if never_a_name(p.name) or labels.of(p.name)]
    if not wrong:
        return None
    cells = tuple(panel.where for panel in wrong)
    said = ", ".join(f"'{p.name}' ({never_a_name(p.name) or 'a parameter'})" for p in wrong[:3])
    return Doubt(f"panels are called {said}", cells, len(wrong) / len(panels), cells)


def _strewn(panels: list[_Panel]) -> Doubt | None:
    """Panels that state nothing in common: parameters of one panel, strewn over several."""
    if len(panels) < 2:
        return None
    stated = Counter(key for panel in panels for key in panel.keys - _ASIDE)
    shared = sum(count > 1 for count in stated.values()) / len(stated)
    if shared >= _LEAST_SHARED or (len(panels) == 2 and shared):
        return None
    cells = tuple(panel.where for panel in panels)
    text = f"{len(panels)} panels state hardly a parameter in common"
    return Doubt(text, cells, 1.0 - shared, names=cells)


def _thin(panels: list[_Panel]) -> Doubt | None:
    """A panel of hardly a figure beside full ones."""
    counts = [len(panel.keys) for panel in panels]
    if len(panels) < 2 or statistics.median_high(counts) < _USUAL_KEYS:
        return None
    thin = [p for p in panels if len(p.keys - _ASIDE) <= _FEW_KEYS]
    if not thin:
        return None
    cells = tuple(panel.where for panel in thin)
    said = ", ".join(f"'{p.name}'" for p in thin[:3])
    return Doubt(f"{said} has hardly a figure", cells, len(thin) / len(panels), names=cells)


def _interleaved(panels: list[_Panel]) -> Doubt | None:
    """Panels whose columns lie between those of another: 'in production' names no panel."""
    columns = [{claim.cell.column for claim in panel.claims()} for panel in panels]
    around = [
        panel
        for panel, mine in zip(panels, columns, strict=True)
        if any(min(mine) < min(c) <= max(c) < max(mine) and c.isdisjoint(mine) for c in columns)
    ]
    if not around:
        return None
    cells = tuple(panel.where for panel in around)
    return Doubt(f"the columns of '{around[0].name}' lie apart", cells, len(around) / len(panels), cells)


def _without_band(panels: list[_Panel]) -> Doubt | None:
    """Panels with figures of a band but no frequencies, beside others that have them."""
    table = parameters()
    bare = [p for p in panels if not p.banded and any(table[key].scope == "band" for key in p.keys)]
    if not bare or len(panels) - len(bare) < _MOSTLY * len(panels):
        return None
    cells = tuple(panel.where for panel in bare)
    said = ", ".join(f"'{p.name}'" for p in bare[:3])
    return Doubt(f"{said} has no frequencies", cells, len(bare) / len(panels), names=cells)


def _contrary(panels: list[_Panel]) -> Doubt | None:
    """The same heading with different figures for the same panel and band, again and again."""
    cells: list[Cell] = []
    claims = 0
    for panel in panels:
        said: dict[tuple[object, ...], Cell] = {}
        contrary: list[Cell] = []
        for claim in panel.claims():
            if not looks_like_value(claim.cell):
                continue
            claims += 1
            first = said.setdefault(_subject(claim), claim.cell)
            if first.text != claim.cell.text and claim.text is None:
                contrary += [first, claim.cell]
        cells += contrary if len(contrary) > _LEAST_CONTRARY else []
    if not cells or len(cells) < _CONTRARY_SHARE * claims:
        return None
    text = "the same headings give one panel different figures for one band"
    return Doubt(text, tuple({id(cell): cell for cell in cells}.values()), min(len(cells) / claims, 1.0))


def _subject(claim: Claim) -> tuple[object, ...]:
    context = claim.context
    label = context.label
    return (
        label.parameters, label.condition, label.statistic, label.bands.spans, label.sense, label.tolerance,
        context.heading, context.condition, context.statistic, context.band_name, claim.band,
    )  # fmt: skip


def _misplaced(panels: list[_Panel]) -> Doubt | None:
    """Many figures far from any a panel has, or codes of products for figures: beside their headings."""
    asked = [claim for panel in panels for claim in panel.claims() if _is_plain(claim)]
    cells = [claim.cell for claim in asked if _is_out_of_place(claim)]
    if len(cells) < _FEWEST_MISPLACED or len(cells) < _MISPLACED_SHARE * len(asked):
        return None
    text = f"{len(cells)} figures cannot belong to their headings"
    return Doubt(text, tuple(cells), len(cells) / len(asked), misplaced=True)


def _is_plain(claim: Claim) -> bool:
    """Whether a claim is a number, or a single word, for one measured parameter."""
    keys = claim.context.label.parameters
    raw = claim.cell.raw
    number = type(raw) in (int, float) or (isinstance(raw, str) and len(raw.split()) == 1)
    measured = len(keys) == 1 and parameters()[keys[0]].kind in ("number", "count")
    return number and measured and claim.text is None


def _is_out_of_place(claim: Claim) -> bool:
    raw, wanted = claim.cell.raw, parameters()[claim.context.label.parameters[0]]
    if isinstance(raw, str):
        return raw.strip()[:1].isalpha() and bool(codes(raw.strip()))
    unit = claim.context.unit or claim.context.label.unit
    if wanted.plausible is None or (wanted.unit and not unit) or not isinstance(raw, int | float):
        return False
    try:
        value = abs(convert(float(raw), unit, wanted.unit))
    except UnknownUnitError:
        return False
    low, high = wanted.plausible
    return not low / _STRETCH <= value <= high * _STRETCH


def _mostly_unread(result: SheetResult) -> Doubt | None:
    """More figures left unread than read."""
    cells = [cell for cell, _, _ in result.unread if looks_like_value(cell)]
    read = sum(len(draft.claims) for draft in result.drafts)
    if len(cells) < _FEWEST_FIGURES or len(cells) <= read:
        return None
    return Doubt("most figures are left unread", tuple(cells), 0.0)
