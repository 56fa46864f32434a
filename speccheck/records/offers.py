"""What a bidder said: places, readings, statements, panels, the file.

Location is born with the record. Missing is not a value: what was not stated has no `Reading`.
"""

from __future__ import annotations

import functools
from collections.abc import Mapping
from dataclasses import dataclass, field

from speccheck.records.words import Sense, Status

Band = tuple[float, float]
"""Lower and upper edge [MHz]."""

Value = float | tuple[float, float] | str
"""A number, the two ends of a range, or text."""


@dataclass(frozen=True, slots=True)
class CellRef:
    """Place of a cell: file name, sheet name, cell address such as ``D12``."""

    file: str
    sheet: str
    cell: str

    def __str__(self) -> str:
        return f"{self.sheet}!{self.cell}" if self.sheet else self.cell


@dataclass(frozen=True, slots=True, kw_only=True)
class Reading:
    """One figure or text as a competent engineer reads it from one cell.

    `value` is in the dictionary's unit of the parameter; `stated_value` and `stated_unit` are what
    the bidder wrote. `at` holds structured conditions by name with the unit in the name, such as
    ``frequency_mhz``, ``tilt_deg``, ``angle_deg``, ``carrier_dbm``, ``wind_speed_mps``.
    A reading with `alternatives` is ambiguous: it is shown and carries no verdict.
    """

    where: CellRef
    parameter: str
    raw: str
    value: Value
    unit: str
    band: Band | None = None
    tolerance: float | None = None
    sense: Sense = Sense.NOMINAL
    statistic: str = ""
    stated_value: Value | None = None
    stated_unit: str = ""
    condition: str = ""
    at: Mapping[str, float] = field(default_factory=dict)
    heading: str = ""
    recognised: str = ""
    alternatives: tuple[Value, ...] = ()

    @property
    def certain(self) -> bool:
        """Whether the cell admits one reading only."""
        return not self.alternatives

    @property
    def low(self) -> float:
        """Lowest figure the claim admits, in `unit`; ValueError for text."""
        low, _ = self._span()
        return low

    @property
    def high(self) -> float:
        """Highest figure the claim admits, in `unit`; ValueError for text."""
        _, high = self._span()
        return high

    @property
    def nominal(self) -> float:
        """The figure itself, or the middle of a range, in `unit`; ValueError for text."""
        if isinstance(self.value, tuple):
            return (self.value[0] + self.value[1]) / 2
        return self._number()

    def _number(self) -> float:
        if isinstance(self.value, str | tuple):
            raise ValueError(f"{self.where}: {self.parameter} is {self.value!r}, not a number")
        return float(self.value)

    def _span(self) -> tuple[float, float]:
        if isinstance(self.value, tuple):
            return min(self.value), max(self.value)
        number = self._number()
        slack = self.tolerance or 0.0
        return number - slack, number + slack


@dataclass(frozen=True, slots=True, kw_only=True)
class Statement:
    """A cell that answers for a parameter without a figure ('n/a', 'TBD', 'see note 3', 'comply')."""

    where: CellRef
    parameter: str
    raw: str
    status: Status
    band: Band | None = None
    heading: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Unread:
    """Text that was not understood, with the reason and the nearest thing known."""

    where: CellRef
    text: str
    reason: str
    suggestion: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Notice:
    """Something about the input that the reader must know (hidden row, macro, formula without result)."""

    where: CellRef
    text: str


@dataclass(frozen=True, kw_only=True)
class Panel:
    """One offered panel with everything its bidder says of it; without slots, to keep its index."""

    name: str
    where: CellRef
    readings: tuple[Reading, ...] = ()
    statements: tuple[Statement, ...] = ()

    @property
    def bands(self) -> tuple[Band, ...]:
        """Bands [MHz] the panel's figures are stated for, in order of appearance.

        Without figures by band, the stated operating bands or else the frequency range.
        """
        banded = dict.fromkeys(r.band for r in self.readings if r.band is not None)
        if banded:
            return tuple(b for b in banded if b is not None)
        for key in ("operating_bands", "frequency_range"):
            spans = [r.value for r in self.all(key) if isinstance(r.value, tuple)]
            if spans:
                return tuple(dict.fromkeys((float(s[0]), float(s[1])) for s in spans))
        return ()

    def all(self, parameter: str, band: Band | None = None) -> tuple[Reading, ...]:
        """Certain readings of a parameter; with a band, those of that band or else of the whole panel."""
        mine = self._certain.get(parameter, ())
        if band is None:
            return mine
        return tuple(r for r in mine if r.band == band) or tuple(r for r in mine if r.band is None)

    def get(self, parameter: str, band: Band | None = None) -> Reading | None:
        """The first of `all`, preferring a figure for the whole panel when no band is asked for."""
        found = self.all(parameter, band)
        if band is None:
            found = tuple(r for r in found if r.band is None) or found
        return found[0] if found else None

    @functools.cached_property
    def _certain(self) -> Mapping[str, tuple[Reading, ...]]:
        """Certain readings by parameter: the checks ask some hundred times for each reading of a panel."""
        found: dict[str, list[Reading]] = {}
        for reading in self.readings:
            if reading.certain:
                found.setdefault(reading.parameter, []).append(reading)
        return {parameter: tuple(readings) for parameter, readings in found.items()}


@dataclass(frozen=True, slots=True)
class MirrorCell:
    """A cell of the bidder's sheet as it stood: address, value, and its text if it was a formula."""

    cell: str
    value: str | float | None
    formula: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class MirrorSheet:
    """A sheet of the bidder's file, values only."""

    name: str
    hidden: bool = False
    cells: tuple[MirrorCell, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Submission:
    """One bidder's file, read."""

    file: str
    sha256: str
    size_bytes: int
    panels: tuple[Panel, ...] = ()
    unread: tuple[Unread, ...] = ()
    notices: tuple[Notice, ...] = ()
    mirror: tuple[MirrorSheet, ...] = ()
