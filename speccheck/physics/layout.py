"""Where the elements of a panel stand and how its ports drive them."""

from __future__ import annotations

from dataclasses import dataclass
from enum import Enum
from functools import lru_cache

import numpy as np
from numpy.typing import NDArray

from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS, Floats, floats

Complex = NDArray[np.complex128]


class Lattice(Enum):
    """How rows stand to each other."""

    RECTANGULAR = "rectangular"
    TRIANGULAR = "triangular"
    """Odd rows shifted by half a horizontal pitch."""


@dataclass(frozen=True, slots=True)
class ArrayLayout:
    """A panel: element positions, sub-arrays, tapers, panel groups in one housing.

    rows [1]: element positions along the height of one panel group (M of TR 38.901).
    columns [1]: element positions along its width (N).
    vertical_pitch_m [m]: distance of rows (d_V).
    horizontal_pitch_m [m]: distance of columns (d_H).
    subarray_rows [1]: neighbours of one column that share a port.
    subarray_columns [1]: neighbours of one row that share a port.
    subarray_tilt_deg [deg]: fixed tilt inside a sub-array, positive downwards.
    row_taper [1]: amplitudes along the whole height, all groups together, of ports or of single elements;
        empty for uniform.
    column_taper [1]: the same along the whole width.
    panel_rows [1]: panel groups along the height (M_g).
    panel_columns [1]: panel groups along the width (N_g).
    panel_vertical_pitch_m [m]: first element to first element of groups (d_g,V).
    panel_horizontal_pitch_m [m]: the same along the width (d_g,H).
    lattice [Lattice]: rectangular or triangular.
    Raises ValueError where counts, pitches or tapers do not go together.
    Source: 3GPP TR 38.901 clause 7.3.
    """

    rows: int
    columns: int
    vertical_pitch_m: float
    horizontal_pitch_m: float
    subarray_rows: int = 1
    subarray_columns: int = 1
    subarray_tilt_deg: float = 0.0
    row_taper: tuple[float, ...] = ()
    column_taper: tuple[float, ...] = ()
    panel_rows: int = 1
    panel_columns: int = 1
    panel_vertical_pitch_m: float = 0.0
    panel_horizontal_pitch_m: float = 0.0
    lattice: Lattice = Lattice.RECTANGULAR

    def __post_init__(self) -> None:
        counts = (self.rows, self.columns, self.subarray_rows, self.subarray_columns)
        if min(*counts, self.panel_rows, self.panel_columns) < 1:
            raise ValueError("counts of rows, columns, sub-arrays and panel groups must be at least 1")
        if self.rows % self.subarray_rows or self.columns % self.subarray_columns:
            raise ValueError(
                f"{self.rows} x {self.columns} elements do not divide into sub-arrays of "
                f"{self.subarray_rows} x {self.subarray_columns}"
            )
        pitched = (
            (self.rows, self.vertical_pitch_m),
            (self.columns, self.horizontal_pitch_m),
            (self.panel_rows, self.panel_vertical_pitch_m),
            (self.panel_columns, self.panel_horizontal_pitch_m),
        )
        if any(count > 1 and not (np.isfinite(pitch) and pitch > 0) for count, pitch in pitched):
            raise ValueError("the pitch of two or more rows, columns or panel groups must be positive [m]")
        for name, taper, ports, elements in (
            ("row", self.row_taper, self.port_rows, self.panel_rows * self.rows),
            ("column", self.column_taper, self.port_columns, self.panel_columns * self.columns),
        ):
            if taper and len(taper) not in (ports, elements):
                raise ValueError(f"the {name} taper has {len(taper)} amplitudes for {ports} ports")

    @property
    def port_rows(self) -> int:
        """Ports [1] along the whole height, one polarisation."""
        return self.panel_rows * (self.rows // self.subarray_rows)

    @property
    def port_columns(self) -> int:
        """Ports [1] along the whole width, one polarisation."""
        return self.panel_columns * (self.columns // self.subarray_columns)

    @property
    def ports_per_polarisation(self) -> int:
        """Ports [1] of the whole panel, one polarisation."""
        return self.port_rows * self.port_columns

    @property
    def height_m(self) -> float:
        """Height [m] taken by the elements, half a pitch beyond the outermost ones."""
        return (self.panel_rows - 1) * self.panel_vertical_pitch_m + self.rows * self.vertical_pitch_m

    @property
    def width_m(self) -> float:
        """Width [m] taken by the elements, half a pitch beyond the outermost ones."""
        return (
            self.panel_columns - 1
        ) * self.panel_horizontal_pitch_m + self.columns * self.horizontal_pitch_m


@dataclass(frozen=True, eq=False, slots=True)
class Factor:
    """A uniform line that is one factor of another: its pitch [m], its amplitudes [1], and whether its phase
    follows the steering (ports) or is fixed (inside a sub-array)."""

    pitch_m: float
    amplitudes: tuple[float, ...]
    steered: bool


@dataclass(frozen=True, eq=False, slots=True)
class Line:
    """The elements of one axis.

    positions [m]: of the elements, centred. centres [m]: of the port of each. amplitudes [1]: of each.
    pitch_m [m]: where all are equally spaced, else 0.
    spread_m2 [m^2]: variance of the positions, weighted by amplitude.
    factors [Factor]: the line as a product of uniform lines, empty where it is none.
    moments [1, m, m^2]: 1, j z, (j z)^2 of each element, for slopes of the factor.
    """

    positions: Floats
    centres: Floats
    amplitudes: Floats
    pitch_m: float
    spread_m2: float
    moments: Complex
    factors: tuple[Factor, ...]


@lru_cache(maxsize=512)
def lines(layout: ArrayLayout) -> tuple[Line, Line]:
    """Rows and columns of a layout, centred.

    layout [ArrayLayout]: the panel.
    Returns [Line, Line]: rows along z, columns along y.
    Source: 3GPP TR 38.901 clause 7.3.
    """
    rows = _line(
        (layout.rows, layout.vertical_pitch_m, layout.subarray_rows),
        (layout.panel_rows, layout.panel_vertical_pitch_m),
        layout.row_taper,
    )
    columns = _line(
        (layout.columns, layout.horizontal_pitch_m, layout.subarray_columns),
        (layout.panel_columns, layout.panel_horizontal_pitch_m),
        layout.column_taper,
    )
    return rows, columns


def row_shifts(layout: ArrayLayout) -> Floats | None:
    """Sideways shift of each row.

    layout [ArrayLayout]: the panel.
    Returns [m]: half a pitch for the odd rows of a triangular lattice; None for a rectangular one.
    Source: 3GPP-style panels with staggered rows (common practice).
    """
    if layout.lattice is Lattice.RECTANGULAR:
        return None
    row_in_panel = np.tile(np.arange(layout.rows), layout.panel_rows)
    return floats(row_in_panel % 2) * (layout.horizontal_pitch_m / 2)


def _line(inner: tuple[int, float, int], outer: tuple[int, float], taper: tuple[float, ...]) -> Line:
    (count, pitch, grouped), (groups, group_pitch) = inner, outer
    if count == 1 and groups > 1:
        pitch = group_pitch
    if groups == 1 or abs(group_pitch - count * pitch) < 1e-9 * group_pitch:
        unit = _unit_line((groups * count, grouped), (1, 0.0), taper)
    else:
        unit = _unit_line((count, grouped), (groups, group_pitch / pitch), taper)
    positions = unit.positions * pitch
    return Line(
        positions,
        unit.centres * pitch if grouped > 1 else positions,
        unit.amplitudes,
        unit.pitch_m * pitch,
        unit.spread_m2 * pitch * pitch,
        unit.moments * np.array([1.0, pitch, pitch * pitch]),
        tuple(Factor(factor.pitch_m * pitch, factor.amplitudes, factor.steered) for factor in unit.factors),
    )


@lru_cache(maxsize=256)
def _unit_line(inner: tuple[int, int], outer: tuple[int, float], taper: tuple[float, ...]) -> Line:
    """A line of pitch one: elements and those that share a port, groups and their pitch."""
    (count, grouped), (groups, group_pitch) = inner, outer
    positions = floats(np.arange(count) - (count - 1) / 2)
    if groups > 1:
        middles = (np.arange(groups) - (groups - 1) / 2) * group_pitch
        positions = floats(middles[:, None] + positions).ravel()
    centres = np.repeat(positions.reshape(-1, grouped).mean(1), grouped)
    amplitudes = np.ones(len(positions))
    if taper:
        amplitudes = np.repeat(floats(taper), len(positions) // len(taper))
    moments = np.stack([np.ones(len(positions)), 1j * positions, -positions * positions], axis=1)
    mean, square = np.average(np.stack([positions, positions**2]), axis=1, weights=amplitudes).tolist()
    pitch = 1.0 if groups == 1 else 0.0
    factors = _factors(count, grouped, outer, taper)
    return Line(positions, centres, amplitudes, pitch, square - mean * mean, moments, factors)


def _factors(
    count: int, grouped: int, outer: tuple[int, float], taper: tuple[float, ...]
) -> tuple[Factor, ...]:
    """Ports, elements inside a sub-array, and panel groups as factors of a line of pitch one."""
    groups, group_pitch = outer
    if groups > 1:  # a factor of their own, unless a taper runs across
        if taper:
            return ()
        return *_factors(count, grouped, (1, 0.0), ()), Factor(group_pitch, (1.0,) * groups, True)
    ports = count // grouped
    if len(taper) not in (0, ports):
        return ()
    of_ports = Factor(float(grouped), taper or (1.0,) * ports, True)
    return (of_ports,) if grouped == 1 else (of_ports, Factor(1.0, (1.0,) * grouped, False))


def wavenumber(freq_hz: Floats) -> Floats:
    """Wavenumber in free space.

    freq_hz [Hz]: frequency.
    Returns [rad/m]: 2 pi f/c.
    Source: definition.
    """
    return 2 * np.pi / SPEED_OF_LIGHT_MPS * freq_hz


def row_weights(layout: ArrayLayout, wavenumbers: Floats, tilt_rad: Floats) -> Complex:
    """Excitation along the height, one row of values per state.

    Ports follow the tilt, elements inside a sub-array its fixed tilt.
    layout [ArrayLayout]: the panel.
    wavenumbers [rad/m]: shape (S,).
    tilt_rad [rad]: electrical tilt, positive downwards, shape (S,).
    Returns [1]: complex weights, shape (S, M).
    Source: 3GPP TR 37.840 clause 5.4.4; the phase that points a line along sin(tilt).
    """
    rows = lines(layout)[0]
    path = np.sin(tilt_rad)[:, None] * rows.centres
    if layout.subarray_rows > 1 and layout.subarray_tilt_deg:
        path += np.sin(np.radians(layout.subarray_tilt_deg)) * (rows.positions - rows.centres)
    return np.asarray(rows.amplitudes * np.exp((1j * wavenumbers)[:, None] * path))


def column_weights(layout: ArrayLayout, wavenumbers: Floats, u_y: Floats) -> Complex:
    """Excitation along the width, one row of values per state.

    layout [ArrayLayout]: the panel.
    wavenumbers [rad/m]: shape (S,).
    u_y [1]: direction cosine of the steering along y, shape (S,).
    Returns [1]: complex weights, shape (S, N).
    Source: 3GPP TR 37.840 clause 5.4.4.
    """
    columns = lines(layout)[1]
    return np.asarray(columns.amplitudes * np.exp((-1j * wavenumbers * u_y)[:, None] * columns.centres))
