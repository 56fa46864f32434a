"""Bands whose two edges stand in columns of their own: 'Freq low (MHz)' and 'Freq high (MHz)'."""

from __future__ import annotations

import re
from collections.abc import Mapping
from functools import lru_cache

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.bands import find_bands
from speccheck.intake.tables.words import fold
from speccheck.records import Band

_FREQUENCY = re.compile(
    r"\b(?:f|freq\w*|frequen\w+|frecuencia|czestotliwosc\w*|band\w*)\b|\bf(?=min|max|low|high|start|stop)"
)
_LOWER = re.compile(
    r"low|start|from|min|\bvon\b|unter|\binf|\bde\b|desde|\bda\b|\bod\b|\bvan\b|onder|begin|debut|inici|inizi|dolna"
)
_UPPER = re.compile(
    r"high|upper|stop|\bend\b|\bto\b|max|\bbis\b|ober|\bsup|hasta|\ba\b|\bdo\b|\btot\b|boven|\bfin|gorna"
)
_ONLY_UPPER = re.compile(
    r"(?:to|up to|max\.?|high|bis|a|à|hasta|do|tot|ate|al|jusqu'a)(?:\s*[(\[]?(?:mhz|ghz)[)\]]?)?"
)
_FARTHEST = 2


def edge_columns(headings: Mapping[int, str]) -> tuple[int, int]:
    """Columns of the lower and the upper edge, from the headings by column; zeros where there are none."""
    edges = {index: edge_of(text) for index, text in headings.items()}
    lower = [index for index, edge in edges.items() if edge == "lower"]
    upper = [index for index, edge in edges.items() if edge == "upper"]
    if len(lower) == 1 and not upper and _ONLY_UPPER.fullmatch(fold(headings.get(lower[0] + 1, ""))):
        upper = [lower[0] + 1]  # 'Frequency from' beside 'to'
    if len(lower) == len(upper) == 1 and 0 < upper[0] - lower[0] <= _FARTHEST:
        return lower[0], upper[0]
    return 0, 0


def band_between(grid: Grid, row: int, columns: tuple[int, int], heading: str) -> Band | None:
    """The band that two cells of a row limit; `heading` says whether in gigahertz."""
    low, high = (grid.covering(row, index) for index in columns)
    if low is None or high is None or low.fault or high.fault:
        return None
    return find_bands(_text(low, high, heading)).hull


def _text(low: Cell, high: Cell, heading: str) -> str:
    unit = "GHz" if "ghz" in heading.lower() else "MHz"
    return f"{low.text}-{high.text} {unit}"


@lru_cache(maxsize=2_000)
def edge_of(text: str) -> str:
    """``lower`` or ``upper`` when a heading names one edge of a band, else empty."""
    folded = fold(text)
    if len(folded) > 40 or not _FREQUENCY.search(folded):
        return ""
    lower, upper = bool(_LOWER.search(folded)), bool(_UPPER.search(folded))
    return "" if lower == upper else "lower" if lower else "upper"
