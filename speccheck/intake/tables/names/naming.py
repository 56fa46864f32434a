"""Which panel a table speaks of: titles, sheet names, model cells."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import lru_cache

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.bands import is_band_label
from speccheck.intake.tables.claims import SheetResult
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.papers import (
    is_coined_name,
    is_paper_of_name,
    settled_by_sheet,
    without_paper,
)
from speccheck.intake.tables.names.refused import of_paper
from speccheck.intake.tables.names.titles import (
    PARTS,
    announced,
    codes,
    is_numbered_name,
    name_in_title,
    only_counts,
)
from speccheck.intake.tables.words import fold, is_generic_sheet_name, is_group_heading, title_prefixes

_DESCRIBES = re.compile(
    r"\b(?:data ?sheet|technical|data|specifications?|comparison|tender|bid|offer|rev(?:ision)?|issue|draft|"
    r"annex|appendix|form|response|schedule|questionnaire|page|values?|all|valid|"
    r"datenblatt|fiche|ficha|scheda|hoja|karta|donnees|datos|dati|dados|dane|gegevens|technische)\b"
)
_OF = re.compile(r"^(?:of|for|de|du|del|di|da|für|von|van|dla)\s+", re.IGNORECASE)
_INSIDE = re.compile(
    r"\b(?:panel|antenna|type|model|Antenne|antenne|antena|Typ)\s+([A-Z][\w-]*(?:\s+[A-Z0-9][\w./-]*){0,3})$"
)
_ASIDE = re.compile(
    r"\s*[(\[][^()\[\]]*\b(?:rev|issue|draft|offer\w*|bid|proposed|version|date|standard|option)\b[^()\[\]]*[)\]]\s*$",
    re.IGNORECASE,
)
_PAPERS = re.compile(
    r"\b(?:concurso|concorso|licita\w+|ausschreibung|vergabe|appel|marche|gara|przetarg\w*|postepowanie|aanbesteding|bestek|tender|rf[qpi]|project|contract|order|document|doc|ref|lot|annex|clause)\b"
)
_LONG_TITLE = 90
_LONG_NAME = 40
_LONGEST_NAME = 120


@dataclass(frozen=True, slots=True)
class Title:
    """A name found for a panel, the cell it stands in, and whether it is surely a name."""

    name: str
    cell: Cell
    certain: bool


@lru_cache(maxsize=20_000)
def model_name(text: str) -> str:
    """The panel's name in a title or model cell: 'Type Kaldora 12S' is Kaldora 12S.

    A longer title is named by the code in it, together with the capitalised words beside the code.
    """
    words = without_paper(text)[:_LONGEST_NAME]
    stripped = _without_prefix(words, "prefix")
    plain = _OF.sub("", _without_prefix(stripped, "weak"))
    if only_counts(plain):
        return words
    titled = name_in_title(words)
    if titled:
        return titled
    inside = _INSIDE.search(plain)
    plain = _ASIDE.sub("", inside[1] if stripped == words and inside is not None else plain)
    parts = [part for part in PARTS.split(plain) if part and not _DESCRIBES.search(fold(part))]
    name = parts[0] if parts else plain
    found = codes(name)
    if stripped == words and inside is None and found and len(name.split()) > 2:
        return found[-1]
    return name


def _without_prefix(words: str, strength: str) -> str:
    folded = fold(words)
    best = 0
    for prefix in title_prefixes(strength):
        if folded.startswith(prefix) and len(prefix) > best:
            after = words[len(prefix) : len(prefix) + 1]
            if after in (" ", ":", "-", "–") and len(fold(words[: len(prefix)])) == len(prefix):
                best = len(prefix)
    return (words[best:].strip(" :–-—") if best else words) or words


def _score(text: str, sheet: str) -> int:
    """How surely a text is a panel's title; 0 when it is none."""
    words = " ".join(text.split())
    if len(words) > _LONG_TITLE or of_paper(words) or of_paper(model_name(words)):
        return 0
    if announced(words):
        return 5
    if len(sheet) > 2 and not is_generic_sheet_name(sheet) and fold(sheet) in fold(words):
        return 4
    stripped = _without_prefix(words, "prefix")
    inside = _INSIDE.search(words)
    prefixed = (
        stripped != words and len(stripped) <= _LONG_NAME and (codes(stripped) or stripped[-1:].isdigit())
    )
    no_paper = not _PAPERS.search(fold(words))
    numbered = inside is not None and any(map(str.isdigit, inside[1]))
    if prefixed or numbered or (is_paper_of_name(words) and no_paper):
        return 3
    if (codes(words) or name_in_title(words)) and no_paper:
        return 2
    named = (is_numbered_name(words) or is_coined_name(words)) and no_paper
    return 1 if named or (stripped != words and len(stripped.split()) <= 3) else 0


def _may_name(text: str) -> bool:
    parts = PARTS.split(" ".join(text.split()))
    return not is_generic_sheet_name(text) and not all(_DESCRIBES.search(fold(part)) for part in parts)


class Names:
    """Finds names on one sheet, with the file's name to fall back on."""

    def __init__(self, grid: Grid, stem: str) -> None:
        self._grid, self._stem = grid, stem
        self._titles: set[tuple[int, int]] = set()

    def is_file(self, name: str) -> bool:
        """Whether a sheet's name is only that of its file, as in delimited text."""
        return name == self._stem

    def is_title(self, text: str) -> bool:
        """Whether a text reads as the title of a panel."""
        return _score(text, self._grid.name.strip()) > 0

    def above(self, top: int, left: int, right: int, marks: Marks, result: SheetResult) -> Title:
        """The nearest title above a row, else the sheet's name, else the file's."""
        first = Cell(max(top, 1), left, self._grid.name, self._grid.name)
        sheet = self._grid.name.strip()
        candidates: list[Cell] = []
        for row in range(top - 1, max(0, top - 25), -1):
            cells = [c for c in marks.rows.get(row, ()) if c.column <= right]
            near = [c for c in cells if c.column >= left]
            near = near or [c for c in cells if c.column >= left - 2] or cells
            places = [(c.row, c.column) for c in near]
            if any(p not in self._titles and result.roles.get(p, "note") != "note" for p in places):
                break
            titles = [c for c in near if isinstance(c.raw, str) and not is_band_label(c.text)]
            titles = [c for c in titles if marks.may_name(c)]
            candidates += [c for c in titles if not (marks.is_heading(c) or is_group_heading(c.text))]
        scores = [_score(c.text, sheet) for c in candidates]
        if any(scores):
            return self._taken(candidates[scores.index(max(scores))], result)
        if not is_generic_sheet_name(sheet):
            return Title(model_name(sheet), first, any(letter.isdigit() for letter in sheet))
        short = [c for c in candidates if len(c.text) <= _LONG_NAME and _may_name(c.text)]
        short = short if len(candidates) <= 3 else []
        if short:
            result.mark(short[-1], "heading")
            return Title(model_name(short[-1].text), short[-1], False)
        return Title(self._stem, first, False)

    def _taken(self, cell: Cell, result: SheetResult) -> Title:
        self._titles.add((cell.row, cell.column))
        result.mark(cell, "heading")
        settled = settled_by_sheet(without_paper(cell.text), self._grid.name.strip())
        return Title(settled or model_name(cell.text), cell, True)
