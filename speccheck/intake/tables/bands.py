"""Which band a heading, condition or cell speaks of."""

from __future__ import annotations

import re
import unicodedata
from collections.abc import Callable
from dataclasses import dataclass
from functools import lru_cache
from itertools import pairwise

from speccheck.intake.tables.words import is_band_nickname
from speccheck.records import Band
from speccheck.standards import operating_band

_NUMBER = r"(\d{1,3}(?:[ ,.'\u00a0\u2009\u202f]\d{3})(?!\d)|\d+(?:[.,]\d+)?)"
_DASH = (
    r"\s*(MHz|GHz)?\s*(?:-|–|—|−|‐|‑|~|…|\.{2,3}|÷|〜|\bto\b|\bbis\b|\bà\b|\ba\b|\btot\b|\bdo\b|\baté\b|/)\s*"
)
_RANGE = re.compile(
    r"(?<![\w.,])" + _NUMBER + _DASH + _NUMBER + r"(?:\s*(MHz|GHz))?(?![\d°%λ])", re.IGNORECASE
)
_NAME = re.compile(r"(?<![\w-])(?:(?:NR|LTE|5G|4G|E-?UTRA)[\s-]*)?(?:band\s*)?([nB])(\d{1,3})(?![\w.-])")
_GAP = 1.1
"""Neighbouring sub-bands leave no more than a duplex gap between them."""
_WIDE = "０１２３４５６７８９～〜"
_LONGEST_TITLE = 60
_SEVERAL = re.compile(r"\d\s*/\s*\d")
_LOWEST_MHZ, _HIGHEST_MHZ = 60.0, 110_000.0


@dataclass(frozen=True, slots=True)
class BandText:
    """Bands found in a text, the words around them, and whether a unit or a name proved them bands."""

    spans: tuple[Band, ...]
    rest: str
    proved: bool
    names: tuple[str, ...] = ()

    @property
    def hull(self) -> Band | None:
        """The one band meant: from the lowest edge to the highest."""
        if not self.spans:
            return None
        return min(s[0] for s in self.spans), max(s[1] for s in self.spans)

    @property
    def connected(self) -> bool:
        """Whether the ranges overlap or follow on one another, so that their hull is a band."""
        ordered = sorted(self.spans)
        return bool(self.names) or all(b[0] <= a[1] * _GAP for a, b in pairwise(ordered))


NO_BANDS = BandText((), "", False)


@lru_cache(maxsize=20_000)
def find_bands(text: str) -> BandText:
    """Frequency ranges and 3GPP band names in a text."""
    if len(text) > 300 or not any(letter.isdigit() for letter in text):
        return BandText((), text, False)
    if not text.isascii() and any(letter in text for letter in _WIDE):
        text = unicodedata.normalize("NFKC", text)
    spans: list[Band] = []
    proved = False
    rest = text
    # a unit after the last of several ranges holds for those before it
    ghz_last = bool(re.search(r"GHz", text, re.IGNORECASE)) and not re.search(r"MHz", text, re.IGNORECASE)
    for match in _RANGE.finditer(text):
        span = _span(match, ghz_last)
        if span is not None:
            spans.append(span)
            proved = proved or bool(match[2] or match[4]) or ghz_last
            rest = rest.replace(match[0], " ", 1)
    names = []
    if not spans:
        for match in _NAME.finditer(text):
            band = operating_band(match[1] + match[2])
            if band is not None and band.spans:
                names.append(band.name)
                spans.append((min(s[0] for s in band.spans), max(s[1] for s in band.spans)))
                rest = rest.replace(match[0], " ", 1)
                proved = True
    else:
        rest = _NAME.sub(" ", rest)
    return BandText(tuple(spans), " ".join(re.sub(r"\b[MG]Hz\b", " ", rest).split()), proved, tuple(names))


def _span(match: re.Match[str], ghz: bool) -> Band | None:
    unit = (match[4] or match[2] or ("GHz" if ghz else "")).lower()
    low, high = (_number(match[1], unit), _number(match[3], unit))
    first_unit = (match[2] or unit).lower()
    low *= 1000.0 if first_unit == "ghz" else 1.0
    high *= 1000.0 if unit == "ghz" else 1.0
    low, high = round(low, 6), round(high, 6)
    if not (_LOWEST_MHZ <= low < high <= _HIGHEST_MHZ) or high > 8 * low:
        return None
    if "/" in match[0] and not unit:
        return None
    return low, high


def _number(text: str, unit: str) -> float:
    plain = re.sub(r"[ '\u00a0\u2009\u202f]", "", text)
    if unit != "ghz" and re.fullmatch(r"\d{1,3}[.,]\d{3}", plain):
        return float(re.sub(r"[.,]", "", plain))
    return float(plain.replace(",", "."))


_BAND_WORDS = re.compile(
    r"(?:(?:sub-?)?band|teilband|bande|banda|pasmo|range|frequency|frequenz\w*|fr[ée]quence|frecuencia|frequenza|"
    r"uplink|downlink|ul|dl|tx|rx|nr|lte|gsm|umts|5g|4g|fdd|tdd|arrays?|cluster|ports?|"
    r"inputs?|[ryblmhpgow]\d{1,2}|[lmh]b\d?|"
    r"tore?|eing[äa]nge?|anschl[üu]sse?|entr[ée]es?|puertos?|porte|portas?|porty?|poort(?:en)?|"
    r"low(?:er)?|mid(?:dle)?|high|upper|and|&|\d{1,2}|[a-h])$",
    re.IGNORECASE,
)


@lru_cache(maxsize=20_000)
def is_band_label(text: str) -> bool:
    """Whether a whole text labels a band: only a range or band name, or a band's nickname."""
    found = find_bands(text)
    if not found.spans:
        return is_band_nickname(text)
    words = re.sub(r"[\s()\[\],;:|/+.·•–—-]+", " ", found.rest).split()
    return all(_BAND_WORDS.match(word) for word in words) or is_band_nickname(" ".join(words))


def band_of_title(text: str, is_title: Callable[[str], bool]) -> tuple[Band | None, str] | None:
    """The band, or its nickname, that a title gives to the rows below it.

    None for a sentence, for several bands, and where `is_title` finds a panel's name in the other words.
    """
    words = " ".join(text.split())
    if len(words) > _LONGEST_TITLE or words.endswith((".", "!")):
        return None
    found = find_bands(words)
    if is_band_label(words):
        return found.hull, "" if found.hull else words
    one = len(found.spans) == 1 and found.proved and not found.names and not _SEVERAL.search(words)
    return (found.hull, "") if one and not is_title(found.rest) else None
