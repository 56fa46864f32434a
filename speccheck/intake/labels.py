"""What a heading says: parameter, unit, band, statistic and condition, read once per distinct text."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass, replace

from speccheck.dictionary import match_heading
from speccheck.intake.bands import NO_BANDS, BandText, find_bands, is_band_label
from speccheck.intake.words import column_role, is_counting_unit
from speccheck.quantities.units import unit_name

FREQUENCY_KEYS = frozenset({"frequency_range", "operating_bands"})
_WORDS = re.compile(r"[^\W\d_]{2,}|\b[A-Z]/[A-Z]\b|\b[PFv]\b")
_LINE = re.compile(r"^\s*[-•*·]?\s*([^:=\t]{2,90}?)\s*(?::|=|\t|\.{3,}|…{2,})\s*(?=\S)(.+)$", re.DOTALL)
_STATISTIC = {"minimum": "min", "typical": "typ", "maximum": "max"}


@dataclass(frozen=True, slots=True)
class Label:
    """A heading as understood. No `parameters` means it is not in the dictionary."""

    text: str
    parameters: tuple[str, ...] = ()
    unit: str = ""
    condition: str = ""
    bands: BandText = NO_BANDS
    sense: str = "nominal"
    statistic: str = ""
    tolerance: bool = False
    how: str = ""
    suggestion: str = ""

    def __bool__(self) -> bool:
        return bool(self.parameters)


class Labels:
    """The reader of headings, with the buyer's own synonyms."""

    def __init__(self, synonyms: Mapping[str, str]) -> None:
        self._synonyms = dict(synonyms)
        self._known: dict[str, Label] = {}

    def of(self, text: str) -> Label:
        """Understand one heading text."""
        known = self._known.get(text)
        if known is None:
            known = self._known[text] = self._understand(text)
        return known

    def parse_line(self, text: str) -> tuple[Label, str] | None:
        """A line ``Label: value`` cut in two, when the label is known."""
        match = _LINE.match(text)
        if match is None:
            return None
        label = self.of(match[1])
        return (label, match[2].strip()) if label else None

    def _understand(self, text: str) -> Label:
        if len(text) > 160 or not _WORDS.search(text):
            return Label(text)
        cleaned = text.strip().rstrip(":").strip()
        whole = self._match(cleaned)
        if whole:
            return whole
        bands = find_bands(cleaned)
        if (bands.spans and bands.proved) or (bands.spans and bands.rest):
            inner = self._match(_tidy(bands.rest))
            if inner:
                return replace(inner, text=text, bands=bands)
        return replace(whole, text=text)

    def _match(self, text: str) -> Label:
        found = match_heading(text, self._synonyms)
        suggestion = ", ".join(found.suggestions[:2])
        if not found.exact or not found.parameters:
            return Label(text, suggestion=suggestion)
        condition = found.condition
        bands = find_bands(condition) if condition else NO_BANDS
        return Label(
            text=text,
            parameters=tuple(found.parameters),
            unit=found.unit,
            condition=condition,
            bands=bands if bands.proved or set(found.parameters) <= FREQUENCY_KEYS else NO_BANDS,
            sense=found.sense,
            statistic=found.statistic,
            tolerance=found.tolerance_of,
            how=found.how,
        )


def _tidy(text: str) -> str:
    text = re.sub(r"[(\[]\s*[)\]]", " ", text)
    return re.sub(r"\s*[@,;:–-]\s*$", "", " ".join(text.split())).strip()


def is_unit(text: str) -> bool:
    """Whether a cell holds a unit and nothing else; a dash in a unit column says that there is none."""
    return len(text) <= 24 and (bool(unit_name(text)) or is_counting_unit(text))


def looks_like_line(text: str) -> bool:
    """Whether a text has the form ``Label: value``, known or not."""
    return len(text) < 200 and _LINE.match(text) is not None


def statistic_of(text: str) -> str:
    """``min``, ``typ`` or ``max`` when a heading cell says only that."""
    return _STATISTIC.get(column_role(text), "")


def is_heading_filler(text: str) -> bool:
    """Whether a cell under a heading still belongs to the heading: a unit, band or statistic."""
    return is_unit(text) or is_band_label(text) or bool(statistic_of(text))
