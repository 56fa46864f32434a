"""From a panel's figures to the array that physics can compute.

A `Model` is what one band of a panel says of its array: counts, pitches, sub-arrays, frequencies, and
every assumption made where the bid is silent. It is built once for a panel and band and shared.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass, replace
from typing import Literal

from speccheck.checks.registry import Case
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.physics.layout import ArrayLayout, Lattice
from speccheck.records import Band, Panel, Reading

WAVELENGTHS = frozenset({"λ", "wl", "lambda"})
_TRIANGULAR = re.compile(
    r"triang|hexag|stagger|offset|dreieck|versetzt|decal|décal|trójk|driehoek", re.IGNORECASE
)

_GROUP_PITCH = re.compile(
    r"d\s?g[\s_,]*h\s*[=:]?\s*(\d+(?:[.,]\d+)?)\s*(λ|wl|lambda|mm|cm|m)\b", re.IGNORECASE
)

SECTOR_COLUMN_AZ_DEG = 65.0
"""Azimuth width [deg] taken for one column when the bid states none (TR 38.901 Table 7.3-1)."""

Plane = Literal["both", "vertical", "horizontal"]

FEW_BRANCHES = 4
"""Transceivers that one column of two polarisations may have; more mean several columns (common practice)."""

MOST_GROUPS = 8
MOST_COUNTED = 256
"""Panel groups, and rows or columns, beyond which a count is no count of those."""


@dataclass(frozen=True, slots=True)
class Model:
    """One band's array: layout, frequencies [MHz], the readings it was made of, what was assumed."""

    band: Band
    layout: ArrayLayout
    used: tuple[Reading, ...]
    assumptions: tuple[str, ...]
    groups: int = 1
    group_pitch_m: float = 0.0
    """First column to first column of neighbouring panel groups [m]; 0 where not stated."""

    @property
    def low_hz(self) -> float:
        """Lower band edge [Hz]."""
        return self.band[0] * 1e6

    @property
    def high_hz(self) -> float:
        """Upper band edge [Hz]."""
        return self.band[1] * 1e6

    @property
    def centre_hz(self) -> float:
        """Middle of the band [Hz]."""
        return (self.low_hz + self.high_hz) / 2

    def vertical_pitch_wl(self, freq_hz: float) -> float:
        """Row pitch [wavelengths] at `freq_hz` [Hz]."""
        return self.layout.vertical_pitch_m * freq_hz / SPEED_OF_LIGHT_MPS

    def horizontal_pitch_wl(self, freq_hz: float) -> float:
        """Column pitch [wavelengths] at `freq_hz` [Hz]."""
        return self.layout.horizontal_pitch_m * freq_hz / SPEED_OF_LIGHT_MPS

    def with_columns(self, columns: int) -> Model:
        """The same array with so many columns forming the beam; panel groups at their stated distance."""
        own = self.layout.columns
        if columns > own and columns % own == 0 and self.group_pitch_m > 0:
            side_by_side = replace(
                self.layout, panel_columns=columns // own, panel_horizontal_pitch_m=self.group_pitch_m
            )
            return replace(self, layout=side_by_side)
        grouped = self.layout.subarray_columns if columns % self.layout.subarray_columns == 0 else 1
        pitch = self.layout.horizontal_pitch_m
        if columns > 1 and pitch <= 0:
            return self
        return replace(self, layout=replace(self.layout, columns=columns, subarray_columns=grouped))


@dataclass(frozen=True, slots=True)
class Lacking:
    """What the bid does not state and no model can do without."""

    missing: tuple[str, ...]
    used: tuple[Reading, ...] = ()


class _Maker:
    """Collects readings and assumptions while a model is made."""

    def __init__(self, panel: Panel, band: Band) -> None:
        self.panel, self.band = panel, band
        self.used: list[Reading] = []
        self.assumptions: list[str] = []

    def count(self, key: str) -> int | None:
        reading = self.reading(key)
        return (
            round(reading.nominal) if reading is not None and 1 <= reading.nominal <= MOST_COUNTED else None
        )

    def reading(self, key: str) -> Reading | None:
        found = self.panel.get(key, self.band)
        if found is None or isinstance(found.value, str):
            return None
        self.used.append(found)
        return found

    def text(self, key: str) -> str:
        found = self.panel.get(key, self.band)
        if found is None:
            return ""
        self.used.append(found)
        return str(found.value)

    def pitch_m(self, key: str) -> float | None:
        """A spacing [m]; one spacing for both planes serves where the plane's own is not stated."""
        reading = self.reading(key) or self.reading("element_spacing")
        if reading is None or not 0 < reading.nominal < math.inf:
            return None
        if reading.unit in WAVELENGTHS or (
            reading.stated_unit in WAVELENGTHS and "frequency_mhz" not in reading.at
        ):
            self.assumptions.append(f"Spacing in λ ({reading.where}) taken at the middle of the band.")
        return pitch_m(reading, self.band)


def pitch_m(reading: Reading, band: Band) -> float:
    """A spacing [m], whatever it is stated in; λ without a frequency counts at mid `band` [MHz]."""
    if reading.unit not in WAVELENGTHS:
        return reading.nominal
    at_mhz = reading.at.get("frequency_mhz", (band[0] + band[1]) / 2)
    return reading.nominal * SPEED_OF_LIGHT_MPS / (at_mhz * 1e6)


def model_of(case: Case, plane: Plane = "both") -> Model | Lacking:
    """The array of one band of a panel, or what is missing for it.

    A check that looks at one plane only names it: what the bid leaves out of the other plane is then
    replaced by a single row or column.
    """
    if case.band is None:
        return Lacking(("frequency_range",))
    maker = _Maker(case.panel, case.band)
    rows, columns = maker.count("array_rows"), _columns(maker)
    vertical = maker.pitch_m("vertical_element_spacing") if rows != 1 else 0.0
    horizontal = maker.pitch_m("horizontal_element_spacing") if columns != 1 else 0.0
    if plane == "vertical" and (columns is None or horizontal is None):
        columns, horizontal = 1, 0.0
        maker.assumptions.append("Computed as one column: columns or their spacing are not stated.")
    if plane == "horizontal" and (rows is None or vertical is None):
        rows, vertical = 1, 0.0
        maker.assumptions.append("Computed as one row: rows or their spacing are not stated.")
    if rows is None or columns is None or vertical is None or horizontal is None:
        named = {
            "array_rows": rows,
            "array_columns": columns,
            "vertical_element_spacing": vertical if rows else 0.0,
            "horizontal_element_spacing": horizontal if columns else 0.0,
        }
        return Lacking(tuple(key for key, value in named.items() if value is None), _unique(maker.used))
    grouped_rows, grouped_columns, tilt = _subarrays(maker, rows, columns)
    layout = ArrayLayout(
        rows=rows,
        columns=columns,
        vertical_pitch_m=vertical,
        horizontal_pitch_m=horizontal,
        subarray_rows=grouped_rows,
        subarray_columns=grouped_columns,
        subarray_tilt_deg=tilt,
        lattice=_lattice(maker),
    )
    groups, group_pitch = _groups(maker), _group_pitch_m(maker, columns * horizontal)
    assumed = tuple(dict.fromkeys(maker.assumptions))
    return Model(case.band, layout, _unique(maker.used), assumed, groups, group_pitch)


def _unique(readings: list[Reading]) -> tuple[Reading, ...]:
    return tuple({r.where: r for r in readings}.values())


def _columns(maker: _Maker) -> int | None:
    """Columns as stated; one for a panel of few branches that states none."""
    columns = maker.count("array_columns")
    if columns is not None:
        return columns
    branches = maker.panel.get("transceivers", maker.band)
    if branches is not None and not isinstance(branches.value, str) and branches.nominal > FEW_BRANCHES:
        return None
    maker.assumptions.append("One column: the bid states no number of columns.")
    return 1


def _groups(maker: _Maker) -> int:
    """Panel groups side by side; their columns may form one beam or one each."""
    counts = [int(n) for n in re.findall(r"\d+", maker.text("panel_groups"))][:2]
    groups = math.prod(counts) if counts else 1
    if not 1 < groups <= MOST_GROUPS:
        return 1
    maker.assumptions.append(f"{groups} panel groups may form one beam each or one beam together.")
    return groups


def _group_pitch_m(maker: _Maker, own_width_m: float) -> float:
    """Pitch [m] of panel groups side by side (d_g,H of TR 38.901), where it is stated beside their number.

    Groups do not overlap: a pitch below the width of one is the gap between them.
    """
    found = _GROUP_PITCH.search(maker.text("panel_groups"))
    if found is None:
        return 0.0
    figure, unit = float(found[1].replace(",", ".")), found[2].lower()
    wavelength_m = SPEED_OF_LIGHT_MPS / (sum(maker.band) / 2 * 1e6)
    stated = figure * {"mm": 1e-3, "cm": 1e-2, "m": 1.0}.get(unit, wavelength_m)
    if stated >= own_width_m * (1 - 1e-6):
        return stated
    maker.assumptions.append(f"{found[0].strip()} taken as the gap between panel groups: they would overlap.")
    return own_width_m + stated


def _lattice(maker: _Maker) -> Lattice:
    return Lattice.TRIANGULAR if _TRIANGULAR.search(maker.text("lattice")) else Lattice.RECTANGULAR


def _subarrays(maker: _Maker, rows: int, columns: int) -> tuple[int, int, float]:
    """Rows and columns that share a port, and the tilt [deg] built into the sub-array.

    A whole column on one feed steers by phase shifters inside it, so its elements count one by one.
    """
    grouped_rows, grouped_columns = maker.count("subarray_rows") or 1, maker.count("subarray_columns") or 1
    if rows % grouped_rows or columns % grouped_columns:
        maker.assumptions.append(
            f"Sub-arrays of {grouped_rows} × {grouped_columns} do not divide {rows} × {columns} positions; "
            "computed element by element."
        )
        return 1, 1, 0.0
    grouped_rows = 1 if grouped_rows == rows else grouped_rows
    grouped_columns = 1 if grouped_columns == columns else grouped_columns
    if grouped_rows == 1:
        return grouped_rows, grouped_columns, 0.0
    stated = maker.reading("subarray_tilt")
    if stated is not None:
        return grouped_rows, grouped_columns, stated.nominal
    tilts = maker.reading("electrical_tilt") or maker.reading("vertical_scan")
    middle = tilts.nominal if tilts else 0.0
    maker.assumptions.append(f"Sub-arrays built for a fixed tilt of {middle:g}°, middle of the tilt range.")
    return grouped_rows, grouped_columns, middle
