"""Which band a row of a table with headings across is about."""

from __future__ import annotations

import re
from dataclasses import dataclass

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.bands import find_bands
from speccheck.intake.tables.words import is_band_nickname
from speccheck.records import Band

_POINT = re.compile(r"\s*(\d{3,6}(?:[.,]\d+)?)\s*(?:MHz)?\s*", re.IGNORECASE)
_LOOKED_AT = 12


@dataclass(frozen=True, slots=True)
class RowBand:
    """The band of a row, its nickname, and the condition its figures inherit."""

    band: Band | None = None
    name: str = ""
    point: bool = False

    @property
    def known(self) -> bool:
        """Whether the row is about one band."""
        return self.band is not None or (bool(self.name) and not self.point)

    @property
    def said(self) -> bool:
        """Whether the row says anything of its band."""
        return self.band is not None or bool(self.name)


_NO_BAND = RowBand()


def band_of(cell: Cell | None, nickname: Cell | None, unit: str) -> RowBand:
    """The band two cells of a row name: one with frequencies, one with a nickname such as 'Low band'."""
    if cell is None and nickname is None:
        return _NO_BAND
    name = " ".join(nickname.text.split()) if nickname is not None else ""
    if cell is None:
        return RowBand(None, name)
    text = cell.text if "hz" in cell.text.lower() or not unit else f"{cell.text} {unit}"
    point = _POINT.fullmatch(cell.text)
    if point is not None:
        return RowBand(None, f"{point[1]} MHz", point=True)
    found = find_bands(text)
    if len(found.spans) > 1 and not found.names:
        return RowBand(None, name)
    return RowBand(found.hull, name if found.hull else name or " ".join(cell.text.split()))


def holds_spans(cells: list[Cell], unit: str) -> bool:
    """Whether most cells of a column give frequencies."""
    first = cells[:_LOOKED_AT]
    spans = [c for c in first if find_bands(f"{c.text} {unit}").spans or _POINT.fullmatch(c.text)]
    return bool(first) and len(spans) * 2 > len(first)


def gives_frequencies(cells: list[Cell]) -> bool:
    """Whether a column of bands gives them as frequencies, not by names such as 'n78'."""
    return not any(find_bands(cell.text).names for cell in cells[:_LOOKED_AT])


def holds_nicknames(cells: list[Cell]) -> bool:
    """Whether all cells of a column are nicknames of bands or arrays."""
    first = cells[:_LOOKED_AT]
    return bool(first) and all(isinstance(c.raw, str) and is_band_nickname(c.text) for c in first)
