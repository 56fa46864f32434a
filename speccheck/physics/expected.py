"""The gain and beamwidths an honest panel of a declared geometry can have, as edges to hold a claim against.

The loss ranges and edge distances are this program's own, set on a simulated population of panels
(tests/benchmarks/population.py repeats it); they are assumptions about the trade, not a standard.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from enum import Enum

import numpy as np

from speccheck.physics.element import SectorElement
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.states import array_states, directivity_dbi
from speccheck.physics.taper import cosine_on_pedestal, pedestal_for_ratio


class PanelClass(Enum):
    """Kinds of panel that differ in loss (common practice)."""

    PASSIVE = "passive"
    MASSIVE_MIMO = "massive MIMO"
    MMWAVE = "millimetre wave"


class GainZone(Enum):
    """Where a claimed gain lies."""

    IMPOSSIBLE = "not consistent with geometry and beamwidths"
    QUESTION = "needs a loss statement or a measurement report"
    PLAUSIBLE = "plausible"
    LOW = "suspiciously low"


LOSS_RANGE_DB = {
    PanelClass.PASSIVE: (0.5, 1.6),
    PanelClass.MASSIVE_MIMO: (0.5, 1.8),
    PanelClass.MMWAVE: (0.9, 2.8),
}
"""Plausible dissipative loss [dB], least and most, by class (from memory of trade practice)."""
LOWEST_BELOW_DB = {PanelClass.PASSIVE: 2.2, PanelClass.MASSIVE_MIMO: 2.2, PanelClass.MMWAVE: 3.3}
"""Distance [dB] below the fitted directivity under which a gain is suspiciously low, by class."""

MODEL_ALLOWANCE_DB = 0.2
WIDE_ALLOWANCE_DB = 0.4
"""Model allowance [dB]; the wide one holds above 90 deg azimuth beamwidth (full-wave comparison)."""
DECLARED_SPREAD_DB = 0.3
DECLARED_HEADROOM_DB = 0.4
COLUMN_AZ_HPBW_DEG = 65.0
PLANAR_AZ_HPBW_DEG = 80.0
NARROWEST_RATIO, QUESTION_RATIO, WIDEST_RATIO = 0.92, 0.95, 1.22
"""Edges of a half-power width over that of uniform weights [1]: reject, ask, and ask for a heavier taper."""
_OTHER_BEAM_RATIO = 1.6
_MMWAVE_HZ = 20e9
_MIMO_COLUMNS = 4


@dataclass(frozen=True, slots=True, kw_only=True)
class ExpectedGain:
    """Edges [dBi] for a claimed gain, and what they rest on.

    directivity_dbi [dBi]: lossless directivity of the fitted model, at the beam.
    impossible_dbi [dBi]: above it the claim cannot be true with this geometry and these beamwidths.
    question_dbi [dBi]: above it the claim needs a loss statement or a measurement report.
    low_dbi [dBi]: below it the claim is suspiciously low.
    loss_low_db, loss_high_db, allowance_db [dB]: range of loss and model allowance used.
    element [SectorElement], row_pedestal, column_pedestal [1]: the fitted model.
    fitted [bool]: fitted to a claimed beamwidth in at least one plane.
    binding [text]: the assumption that sets the question edge.
    assumptions [text]: all of them.
    """

    directivity_dbi: float
    impossible_dbi: float
    question_dbi: float
    low_dbi: float
    loss_low_db: float
    loss_high_db: float
    allowance_db: float
    element: SectorElement
    row_pedestal: float
    column_pedestal: float
    fitted: bool
    binding: str
    assumptions: tuple[str, ...]

    def zone(self, gain_dbi: float) -> GainZone:
        """Where a claim lies.

        gain_dbi [dBi]: claimed gain.
        Returns [GainZone]: impossible, question, plausible or low.
        Source: the edges of this class.
        """
        if gain_dbi > self.impossible_dbi:
            return GainZone.IMPOSSIBLE
        if gain_dbi > self.question_dbi:
            return GainZone.QUESTION
        return GainZone.LOW if gain_dbi < self.low_dbi else GainZone.PLAUSIBLE


@dataclass(frozen=True, slots=True)
class WidthEdges:
    """Edges [deg] for a claimed half-power width of an array axis.

    uniform_deg [deg]: with uniform weights. reject_deg [deg]: narrower is not consistent with the geometry.
    question_deg [deg]: narrower needs a question. wide_deg [deg]: wider means a heavy taper, null fill or
    fewer elements than stated.
    """

    uniform_deg: float
    reject_deg: float
    question_deg: float
    wide_deg: float


@dataclass(frozen=True, slots=True)
class ExpectedBeamwidths:
    """Edges in both planes; None where the array does not set the width (one row or one column)."""

    horizontal: WidthEdges | None
    vertical: WidthEdges | None


def panel_class(freq_hz: float, columns: int) -> PanelClass:
    """Class of a panel when the bid does not state it.

    freq_hz [Hz]: frequency.
    columns [1]: columns driven together.
    Returns [PanelClass]: millimetre wave above 20 GHz, massive MIMO from four columns, else passive.
    Source: common practice.

    >>> panel_class(3.5e9, 8).value
    'massive MIMO'
    """
    if freq_hz > _MMWAVE_HZ:
        return PanelClass.MMWAVE
    return PanelClass.MASSIVE_MIMO if columns >= _MIMO_COLUMNS else PanelClass.PASSIVE


def expected_gain(
    layout: ArrayLayout,
    freq_hz: float,
    kind: PanelClass,
    *,
    tilt_deg: float = 0.0,
    scan_deg: float = 0.0,
    horizontal_beamwidth_deg: float | None = None,
    vertical_beamwidth_deg: float | None = None,
    declared_loss_db: float | None = None,
) -> ExpectedGain:
    """Edges for the gain of a panel at one frequency and beam, fitted to its claimed beamwidths.

    layout [ArrayLayout]: declared geometry; its tapers are replaced by the fitted ones.
    freq_hz [Hz]: frequency of the claim.
    kind [PanelClass]: class, for the range of loss.
    tilt_deg [deg]: electrical tilt of the claim, positive downwards.
    scan_deg [deg]: azimuth scan of the claim.
    horizontal_beamwidth_deg [deg]: claimed azimuth half-power beamwidth, None if not stated.
    vertical_beamwidth_deg [deg]: claimed elevation half-power beamwidth, None if not stated.
    declared_loss_db [dB]: loss stated by the bidder, None if not stated.
    Returns [ExpectedGain]: edges and assumptions.
    Source: integrated directivity of TR 38.901-form elements; loss ranges and edges of this program.

    >>> column = ArrayLayout(10, 1, 0.8, 0.5)
    >>> gain = expected_gain(column, 299792458.0, PanelClass.PASSIVE, horizontal_beamwidth_deg=65,
    ...                      vertical_beamwidth_deg=6.4)
    >>> round(gain.directivity_dbi, 1), gain.zone(18.0).value, gain.zone(20.0).name
    (19.2, 'plausible', 'IMPOSSIBLE')
    """
    bare = replace(layout, row_taper=(), column_taper=())
    claims = (horizontal_beamwidth_deg, vertical_beamwidth_deg)
    element = _element(bare, claims)
    fitted, pedestals, notes = _fit(bare, element, freq_hz, (tilt_deg, scan_deg), claims)
    directivity = float(directivity_dbi(fitted, element, freq_hz, tilt_deg, scan_deg))
    wide = bare.panel_columns * bare.columns == 1 and element.az_hpbw_deg > 90
    allowance = WIDE_ALLOWANCE_DB if wide else MODEL_ALLOWANCE_DB
    low_loss, high_loss, headroom, binding = _loss(kind, declared_loss_db)
    impossible = directivity + allowance
    floor = LOWEST_BELOW_DB[kind] if declared_loss_db is None else high_loss + DECLARED_HEADROOM_DB
    if claims == (None, None):
        binding += "; no beamwidth is stated, so the edge is up to 1 dB looser"
    return ExpectedGain(
        directivity_dbi=directivity,
        impossible_dbi=impossible,
        question_dbi=min(impossible, directivity - low_loss + headroom),
        low_dbi=directivity - floor - (0.0 if claims != (None, None) else 0.5),
        loss_low_db=low_loss,
        loss_high_db=high_loss,
        allowance_db=allowance,
        element=element,
        row_pedestal=pedestals[0],
        column_pedestal=pedestals[1],
        fitted=claims != (None, None),
        binding=binding,
        assumptions=(
            f"element {element.az_hpbw_deg:g}° × {element.el_hpbw_deg:g}° of TR 38.901 form, "
            f"floor {element.floor_db:g} dB",
            *notes,
            f"loss {low_loss:.1f} to {high_loss:.1f} dB",
            f"model allowance {allowance:.1f} dB",
        ),
    )


def expected_beamwidths(
    layout: ArrayLayout, freq_hz: float, *, tilt_deg: float = 0.0, scan_deg: float = 0.0
) -> ExpectedBeamwidths:
    """Edges for the half-power widths that the array sets.

    layout [ArrayLayout]: declared geometry; its tapers are ignored.
    freq_hz [Hz]: frequency of the claim.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [ExpectedBeamwidths]: edges in both planes.
    Source: exact patterns of uniform weights; edges at 0.92, 0.95 and 1.22 of them (this program's own).

    >>> round(expected_beamwidths(ArrayLayout(10, 1, 0.8, 0.5), 299792458.0).vertical.uniform_deg, 2)
    6.35
    """
    bare = replace(layout, row_taper=(), column_taper=())
    states = array_states(bare, _element(bare, (None, None)), freq_hz, tilt_deg, scan_deg)
    across = _edges(bare.panel_columns * bare.columns, float(states.horizontal_beamwidth_deg))
    return ExpectedBeamwidths(
        across, _edges(bare.panel_rows * bare.rows, float(states.vertical_beamwidth_deg))
    )


def _edges(count: int, uniform_deg: float) -> WidthEdges | None:
    if count < 2 or np.isnan(uniform_deg):
        return None
    return WidthEdges(
        uniform_deg, NARROWEST_RATIO * uniform_deg, QUESTION_RATIO * uniform_deg, WIDEST_RATIO * uniform_deg
    )


def _element(layout: ArrayLayout, claims: tuple[float | None, float | None]) -> SectorElement:
    """Element of the model: its azimuth width is the claim on a single column; wide on a planar array."""
    if layout.panel_columns * layout.columns == 1:
        return SectorElement(claims[0] or COLUMN_AZ_HPBW_DEG)
    return SectorElement(COLUMN_AZ_HPBW_DEG if claims == (None, None) else PLANAR_AZ_HPBW_DEG)


def _fit(
    layout: ArrayLayout,
    element: SectorElement,
    freq_hz: float,
    beam: tuple[float, float],
    claims: tuple[float | None, float | None],
) -> tuple[ArrayLayout, tuple[float, float], tuple[str, ...]]:
    """Layout with the cosine tapers that reproduce the claimed widths, their pedestals, and notes."""
    uniform = array_states(layout, element, freq_hz, *beam)
    rows = _pedestal(
        (layout.port_rows, layout.subarray_rows),
        claims[1],
        float(uniform.vertical_beamwidth_deg),
        "elevation",
    )
    columns = _pedestal(
        (layout.port_columns, layout.subarray_columns),
        claims[0] if layout.panel_columns * layout.columns > 1 else None,
        float(uniform.horizontal_beamwidth_deg),
        "azimuth",
    )
    tapered = replace(layout, row_taper=rows[1], column_taper=columns[1])
    return tapered, (rows[0], columns[0]), rows[2] + columns[2]


def _pedestal(
    line: tuple[int, int], claim_deg: float | None, uniform_deg: float, plane: str
) -> tuple[float, tuple[float, ...], tuple[str, ...]]:
    """Pedestal of one axis, its amplitudes, and what was assumed."""
    ports, grouped = line
    if ports < 3:  # tapered inside the feed network of the sub-array, if at all
        ports, grouped = ports * grouped, 1
    if claim_deg is None or np.isnan(uniform_deg):
        return 1.0, (), (f"uniform weights in {plane}",)
    ratio = claim_deg / uniform_deg
    if ratio > _OTHER_BEAM_RATIO:
        return 1.0, (), (f"uniform weights in {plane}: {claim_deg:g}° is not the width of this array's beam",)
    pedestal = pedestal_for_ratio(ports, ratio, grouped)
    if pedestal >= 1:
        return 1.0, (), (f"uniform weights in {plane}, the narrowest beam",)
    taper = tuple(cosine_on_pedestal(ports, pedestal).tolist())
    return pedestal, taper, (f"cosine taper on pedestal {pedestal:.2f} in {plane}, from {claim_deg:g}°",)


def _loss(kind: PanelClass, declared_db: float | None) -> tuple[float, float, float, str]:
    """Least and most loss, headroom over the least [dB], and the binding assumption."""
    if declared_db is None:
        low, high = LOSS_RANGE_DB[kind]
        return low, high, 0.0, f"least plausible loss {low:.1f} dB of a {kind.value} panel; none is stated"
    low, high = max(0.0, declared_db - DECLARED_SPREAD_DB), declared_db + DECLARED_SPREAD_DB
    # headroom counts from the declared figure itself
    return low, high, DECLARED_HEADROOM_DB - (declared_db - low), f"declared loss {declared_db:.1f} dB"
