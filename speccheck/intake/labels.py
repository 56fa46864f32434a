"""What a heading says: parameter, unit, band, statistic and condition, read once per distinct text."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import cache, lru_cache

from speccheck.dictionary import match_heading, synonyms
from speccheck.intake.bands import NO_BANDS, BandText, find_bands, is_band_label
from speccheck.intake.words import column_role, fold, is_counting_unit
from speccheck.quantities.units import unit_name

FREQUENCY_KEYS = frozenset({"frequency_range", "operating_bands"})
_LONGEST = 160
_MOST_MISSES = 10_000
"""More texts that are no headings, though made of their words, no honest bid has; looking costs time."""
_RUN = re.compile(r"[^\W\d_]+")
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

    def __bool__(self) -> bool:
        return bool(self.parameters)


class Labels:
    """The reader of headings, with the buyer's own synonyms."""

    def __init__(self, synonyms: Mapping[str, str]) -> None:
        self._synonyms = dict(synonyms)
        self._known: dict[str, Label] = {}
        self._vocabulary = _vocabulary() | {_stem(word) for text in synonyms for word in _runs(text)}
        self._misses = 0

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
        words = _runs(text)
        if len(text) > _LONGEST or not any(_stem(word) in self._vocabulary for word in words):
            return Label(text)
        if max(map(len, words)) < 2 and "/" not in text:
            return Label(text)
        if self._misses > _MOST_MISSES:
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
        self._misses += 1
        return replace(whole, text=text)

    def letter(self, text: str) -> Label:
        """A single letter as a heading, such as H for the height; only its neighbours can prove it one."""
        return self._match(text.strip()) if len(text.strip()) == 1 else Label(text)

    def suggestion(self, text: str) -> str:
        """The nearest known headings to a text."""
        return "; ".join(match_heading(text, self._synonyms).suggestions[:2]) if text else ""

    def _match(self, text: str) -> Label:
        found = match_heading(text, self._synonyms, suggest=False)
        if not found.exact or not found.parameters:
            return Label(text)
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


def _runs(text: str) -> list[str]:
    return _RUN.findall(text)


@lru_cache(maxsize=20_000)
def _stem(word: str) -> str:
    return fold(word)[:4]


@cache
def _vocabulary() -> frozenset[str]:
    """First letters of all words of the dictionary's headings: a text without any of them is no heading."""
    texts = (text for table in synonyms().values() for headings in table.values() for text in headings)
    return frozenset(_stem(word) for text in texts for word in _runs(text) if not unit_name(word))


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
