"""Which beam a figure belongs to, and what an honest panel would have there.

A bid may state the gain of all columns in phase, of one column, or of a broadcast beam. The claimed
horizontal width tells them apart where it is stated; where it is not, every whole share of the columns is
allowed. All array figures are computed once for equal layouts.
"""

from __future__ import annotations

import functools
import re
from dataclasses import dataclass, replace

import numpy as np

from speccheck.checks.model import Model
from speccheck.physics import expected as envelope
from speccheck.physics.element import SectorElement
from speccheck.physics.expected import ExpectedGain, GainZone, PanelClass
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.states import directivity_dbi
from speccheck.records import Reading

COLUMN_WIDTHS_DEG = (45.0, 125.0)
"""Horizontal half-power widths [deg] of single columns on the market (common practice)."""

WIDE_PITCH_WL = 0.65
NARROW_ELEMENT_DEG = 65.0
"""Column pitch [wavelengths] that leaves room for the element of a single column, and its width [deg]."""

ELEMENT_WIDTHS_DEG = (30.0, 135.0)
"""Horizontal half-power widths [deg] the element of the model can be given."""

SAME_BEAM = (0.85, 1.5)
"""A width within these ratios of the uniform one belongs to that beam; heavier tapers are not usual."""

_BEST = re.compile(r"\b(peak|max(imum)?|best)\b", re.IGNORECASE)


@dataclass(frozen=True, slots=True)
class BeamGain:
    """Expected gain of a beam formed by so many columns."""

    columns: int
    expected: ExpectedGain

    def zone(self, gain_dbi: float, slack_db: float = 0.0) -> GainZone:
        """Where a gain lies; within `slack_db` [dB] of the last printed digit the better zone holds."""
        return min((self.expected.zone(gain_dbi + s) for s in (0.0, -slack_db, slack_db)), key=_ZONES.index)


_ZONES = (GainZone.PLAUSIBLE, GainZone.LOW, GainZone.QUESTION, GainZone.IMPOSSIBLE)


def claim_freq_hz(reading: Reading, model: Model) -> float:
    """Frequency [Hz] a figure holds for: as stated, else the top for a best value, else mid band."""
    if "frequency_mhz" in reading.at:
        return reading.at["frequency_mhz"] * 1e6
    best = reading.statistic in ("max", "maximum", "peak") or _BEST.search(
        f"{reading.condition} {reading.heading}"
    )
    return model.high_hz if best else model.centre_hz


def rest_tilt_deg(reading: Reading, model: Model, tilt: Reading | None) -> float:
    """Tilt [deg] a figure holds for: as stated, else the fixed one of the sub-arrays, else the least tilt."""
    if "tilt_deg" in reading.at:
        return reading.at["tilt_deg"]
    if model.layout.subarray_rows > 1:
        return model.layout.subarray_tilt_deg
    if tilt is None or isinstance(tilt.value, str):
        return 0.0
    return tilt.low if tilt.low > 0 else min(0.0, tilt.high)


def declared_loss_db(reading: Reading, feed_loss: Reading | None, efficiency: Reading | None) -> float | None:
    """Loss [dB] the bid declares, as a condition of the figure, as feed loss or as efficiency."""
    if "loss_db" in reading.at:
        return reading.at["loss_db"]
    if feed_loss is not None and not isinstance(feed_loss.value, str):
        return max(0.0, feed_loss.nominal)
    if efficiency is not None and not isinstance(efficiency.value, str) and 0 < efficiency.nominal <= 100:
        return float(-10 * np.log10(efficiency.nominal / 100))
    return None


def panel_class(model: Model) -> PanelClass:
    """Class that sets the range of loss."""
    return envelope.panel_class(model.centre_hz, model.layout.columns)


def flat(layout: ArrayLayout) -> ArrayLayout:
    """The elements without their division into sub-arrays: the same beam at the sub-arrays' own tilt."""
    return replace(layout, subarray_rows=1, subarray_columns=1, subarray_tilt_deg=0.0)


@functools.lru_cache(maxsize=4096)
def uniform_widths_deg(
    layout: ArrayLayout, freq_hz: float, tilt_deg: float
) -> tuple[float | None, float | None]:
    """Horizontal and vertical width [deg] of uniform weights; None where one row or column sets none."""
    edges = envelope.expected_beamwidths(layout, freq_hz, tilt_deg=tilt_deg)
    return (
        edges.horizontal.uniform_deg if edges.horizontal else None,
        edges.vertical.uniform_deg if edges.vertical else None,
    )


def shares(model: Model) -> tuple[int, ...]:
    """Numbers of columns that may form a beam: all of them, then every whole share down to one.

    Columns of several panel groups count together too.
    """
    columns = model.layout.columns
    if model.groups > 1 and columns > 1:
        columns *= model.groups
    return tuple(c for c in range(columns, 0, -1) if columns % c == 0)


def columns_of_width(model: Model, width_deg: float, freq_hz: float, tilt_deg: float) -> int | None:
    """How many columns give a horizontal width [deg]; None where no whole share of them does."""
    best: tuple[float, int] | None = None
    wider = False
    for columns in shares(model):
        if columns == 1:
            near = COLUMN_WIDTHS_DEG[0] <= width_deg <= COLUMN_WIDTHS_DEG[1]
            # the element's width is free within its range, so distance counts less than for an array
            distance = 0.3 * abs(np.log(width_deg / NARROW_ELEMENT_DEG)) if near else np.inf
        elif wider:  # the fewer columns, the wider their beam
            continue
        else:
            uniform, _ = uniform_widths_deg(flat(model.with_columns(columns).layout), freq_hz, tilt_deg)
            ratio = np.nan if uniform is None else width_deg / uniform
            wider = ratio < SAME_BEAM[0]
            distance = abs(np.log(ratio)) if SAME_BEAM[0] <= ratio <= SAME_BEAM[1] else np.inf
        if np.isfinite(distance) and (best is None or distance < best[0]):
            best = (float(distance), columns)
    return None if best is None else best[1]


@dataclass(frozen=True, slots=True, kw_only=True)
class Claims:
    """The figures a gain is held against, and the conditions they share."""

    freq_hz: float
    tilt_deg: float
    horizontal_deg: float | None
    vertical_deg: float | None
    loss_db: float | None
    beam_columns: int | None = None


def beam_gains(model: Model, claims: Claims) -> tuple[BeamGain, ...]:
    """Expected gain of every beam the claim may belong to, the most likely one first."""
    wanted: tuple[int, ...] = shares(model)
    if claims.beam_columns is not None:
        wanted = (claims.beam_columns,)
    elif claims.horizontal_deg is not None and model.layout.columns > 1:
        own = columns_of_width(model, claims.horizontal_deg, claims.freq_hz, claims.tilt_deg)
        # a broadcast width may stand beside the gain of all columns, so those are always tried
        wanted = tuple(dict.fromkeys(c for c in (own, model.layout.columns) if c is not None))
    return tuple(BeamGain(c, _one(model, claims, c)) for c in wanted)


def _one(model: Model, claims: Claims, columns: int) -> ExpectedGain:
    layout = flat(model.with_columns(columns).layout)
    width = claims.horizontal_deg
    if columns == 1 and width is not None and not ELEMENT_WIDTHS_DEG[0] <= width <= ELEMENT_WIDTHS_DEG[1]:
        width = None
    gain = _gain(layout, panel_class(model), replace(claims, horizontal_deg=width))
    wide = columns > 1 and model.horizontal_pitch_wl(claims.freq_hz) > WIDE_PITCH_WL
    return _with_narrower_element(layout, claims, gain) if wide else gain


@functools.lru_cache(maxsize=4096)
def _with_narrower_element(layout: ArrayLayout, claims: Claims, gain: ExpectedGain) -> ExpectedGain:
    """Upper edges for the narrower element that widely spaced columns may have."""
    narrow, model = (
        float(directivity_dbi(layout, SectorElement(az), claims.freq_hz, claims.tilt_deg))
        for az in (NARROW_ELEMENT_DEG, gain.element.az_hpbw_deg)
    )
    more = max(0.0, narrow - model)
    return replace(
        gain,
        directivity_dbi=gain.directivity_dbi + more,
        impossible_dbi=gain.impossible_dbi + more,
        question_dbi=gain.question_dbi + more,
        assumptions=(
            *gain.assumptions,
            f"widely spaced columns: an element of {NARROW_ELEMENT_DEG:g}° in azimuth adds {more:.2f} dB",
        ),
    )


@functools.lru_cache(maxsize=4096)
def _gain(layout: ArrayLayout, kind: PanelClass, claims: Claims) -> ExpectedGain:
    return envelope.expected_gain(
        layout,
        claims.freq_hz,
        kind,
        tilt_deg=claims.tilt_deg,
        horizontal_beamwidth_deg=claims.horizontal_deg,
        vertical_beamwidth_deg=claims.vertical_deg,
        declared_loss_db=claims.loss_db,
    )
