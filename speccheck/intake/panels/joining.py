"""Pieces of one panel found in several tables or sheets, put together."""

from __future__ import annotations

import re

from speccheck.dictionary import parameters
from speccheck.intake.tables.claims import Claim, Draft
from speccheck.records import Band

_LINKS = re.compile(r"[\s_‐‑–—-]+")
_TITLE_KEYS = frozenset(
    {"model", "part_number", "manufacturer", "revision", "panel_type", "remarks", "standards"}
)
_Stated = set[tuple[str, Band | None, str]]
"""Parameters with the band each is stated for."""
_FEWEST_CONTRARY = 2
_NEAREST = 50
"""A piece belongs to one of the last panels of its name."""


def joined(drafts: list[Draft]) -> tuple[list[Draft], list[Draft]]:
    """Drafts put together by name, or because a piece has no name of its own; and those of no panel.

    A piece that only names a model or maker heads the table that follows it, or the only panel there is.
    """
    joiner = _Joiner()
    pieces = [draft for draft in drafts if draft.claims]
    last_of_sheet = {id(draft.grid): draft for draft in pieces}
    for draft in pieces:
        joiner.take(draft, last=draft is last_of_sheet[id(draft.grid)])
    return joiner.finish()


class _Joiner:
    def __init__(self) -> None:
        self._kept: list[Draft] = []
        self._by_name: dict[str, list[Draft]] = {}
        self._titles: list[Draft] = []
        self._stated: dict[int, _Stated] = {}
        """What a draft states, by its identity, once it was asked for; grows as pieces join it."""

    def take(self, draft: Draft, *, last: bool) -> None:
        """Keep a draft, or join it to one kept before; `last` says that no other follows on its sheet."""
        if _only_names(draft):
            self._titles.append(draft)
            return
        title = self._titles[-1] if self._titles and self._titles[-1].grid is draft.grid else None
        if title is not None and last:
            self._titles.pop()
            self._give_title(title, draft)
        home = self._home(draft)
        if home is None:
            self._tell_apart(draft)
            self._kept.append(draft)
            self._by_name.setdefault(_key(draft.name), []).append(draft)
            return
        if draft.named and not home.named:
            home.name, home.named = draft.name, True
            self._by_name.setdefault(_key(draft.name), []).append(home)
        self._stated_by(home).update(self._stated_by(draft))
        home.joined.append(draft)
        home.bands += [band for band in draft.bands if band not in home.bands]

    def _tell_apart(self, draft: Draft) -> None:
        """Add its place to the name of a panel that has none of its own, where another is called alike."""
        alike = self._by_name.get(_key(draft.name), [])
        if not draft.named and any(other.grid is draft.grid for other in alike[-_NEAREST:]):
            draft.name = f"{draft.name} (table at {draft.where.address})"

    def _give_title(self, title: Draft, draft: Draft) -> None:
        """A title names the piece below it, and a nameless one before that piece on its sheet."""
        keys = title.keys()
        if title.named and ("model" in keys or not draft.named):
            before = self._kept[-1] if self._kept and not draft.named else None
            if before is not None and before.grid is draft.grid and not before.named:
                before.name, before.where, before.named = title.name, title.where, True
                self._by_name.setdefault(_key(title.name), []).append(before)
            draft.name, draft.where, draft.named = title.name, title.where, True
        draft.joined.append(title)

    def finish(self) -> tuple[list[Draft], list[Draft]]:
        """Panels, and titles that belong to none of them."""
        if not self._kept:
            return self._titles, []
        if len(self._kept) > 1:
            return self._kept, self._titles
        only = self._kept[0]
        for title in self._titles:
            if title.named and not only.named:
                only.name, only.where, only.named = title.name, title.where, True
            only.joined.append(title)
        return self._kept, []

    def _stated_by(self, draft: Draft) -> _Stated:
        """What a draft states; in a catalogue of different names nobody asks."""
        if id(draft) not in self._stated:
            self._stated[id(draft)] = _stated(draft)
        return self._stated[id(draft)]

    def _home(self, draft: Draft) -> Draft | None:
        for other in reversed(self._by_name.get(_key(draft.name), [])[-_NEAREST:]):
            sure = draft.named and other.named
            if not _clash(self._stated_by(draft), self._stated_by(other)) and (
                sure or not _contrary(draft, other)
            ):
                return other
        if not self._kept:
            return None
        last = self._kept[-1]
        if draft.named and (last.named or last.grid is draft.grid):
            return None
        alone = len(self._kept) == 1 or last.grid is draft.grid
        if not alone or _clash(self._stated_by(draft), self._stated_by(last)) or _contrary(draft, last):
            return None
        return last


def _only_names(draft: Draft) -> bool:
    """Whether a draft says no more than what a panel is called and by whom it is made."""
    claims = (claim for piece in draft.pieces() for claim in piece.claims)
    return all(_TITLE_KEYS.issuperset(claim.context.label.parameters) for claim in claims)


def _clash(mine: _Stated, theirs: _Stated) -> bool:
    """Whether two drafts state the same things and so are two panels."""
    shared = {entry for entry in mine & theirs if entry[0] not in _TITLE_KEYS}
    return len(shared) >= 2 and len(shared) * 3 >= min(len(mine), len(theirs))


def _contrary(mine: Draft, theirs: Draft) -> bool:
    """Whether two drafts give a whole panel other figures, again and again: no panel has two heights."""
    one, other = _of_whole(mine), _of_whole(theirs)
    return sum(one[key].isdisjoint(other[key]) for key in one.keys() & other.keys()) >= _FEWEST_CONTRARY


def _of_whole(draft: Draft) -> dict[tuple[str, str], set[str]]:
    """Figures of what a panel has only one of, as they are written, by parameter and condition."""
    figures: dict[tuple[str, str], set[str]] = {}
    for piece in draft.pieces():
        for claim in piece.claims:
            label, text = claim.context.label, claim.text or claim.cell.text
            key = label.parameters[0]
            measured = len(label.parameters) == 1 and parameters()[key].kind == "number"
            if measured and parameters()[key].scope == "panel" and any(map(str.isdigit, text)):
                said = (label.condition, claim.context.condition, claim.context.statistic)
                condition = " ".join((label.unit, claim.context.unit, *said))
                figures.setdefault((key, condition), set()).add(text.strip())
    return figures


def _stated(draft: Draft) -> _Stated:
    claims: list[Claim] = [claim for piece in draft.pieces() for claim in piece.claims]
    return {(key, c.band, c.context.band_name) for c in claims for key in c.context.label.parameters}


def _key(name: str) -> str:
    """A name as it is told from others: 'KD-20' and 'kd 20' are one panel."""
    return _LINKS.sub("", name.casefold()) or name
