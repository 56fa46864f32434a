"""Innocent readings of spacings and sizes. See `conventions` for how they are tried."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import replace

from speccheck.checks.innocent.conventions import Reach, innocent, reread, scaled
from speccheck.checks.model import WAVELENGTHS
from speccheck.dictionary import parameters
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.records import Band, Panel, Reading

_SPACINGS = ("horizontal_element_spacing", "vertical_element_spacing", "element_spacing")
_LENGTHS = (*_SPACINGS, "height", "width", "depth")

USUAL_PITCHES_WL = (0.35, 1.5)
"""Spacings [wavelengths] of elements that panels have, with the edges of wide bands (common practice)."""


def _frequency_open(panel: Panel) -> bool:
    """Whether a spacing stands in wavelengths without the frequency they hold at."""
    return any(
        r.stated_unit in WAVELENGTHS and "frequency_mhz" not in r.at
        for key in _SPACINGS
        for r in panel.all(key)
    )


def _whole_span(panel: Panel) -> Band | None:
    """From the lowest to the highest edge [MHz] of the bands, for a figure stated once for all of them."""
    return (min(b[0] for b in panel.bands), max(b[1] for b in panel.bands)) if panel.bands else None


def _at_edge(panel: Panel, reach: Reach, edge: Callable[[Band], float]) -> Panel:
    """Spacings in λ taken at another frequency of their band [MHz]."""

    def change(reading: Reading) -> Reading:
        band = reading.band or _whole_span(panel)
        stated = reading.stated_value if reading.stated_unit in WAVELENGTHS else None
        if band is None or not isinstance(stated, int | float):
            return reading
        value = stated * SPEED_OF_LIGHT_MPS / (edge(band) * 1e6)
        return replace(reading, value=value, unit="m", at={**reading.at, "frequency_mhz": edge(band)})

    return reread(panel, reach, _SPACINGS, change)


@innocent(
    "spacing in wavelengths quoted at the upper band edge",
    "the spacing in λ holds at the top of the band",
    *_SPACINGS,
    likely=_frequency_open,
)
def spacing_at_top(panel: Panel, reach: Reach) -> Panel:
    """Spacing in λ taken at the upper edge."""
    return _at_edge(panel, reach, lambda band: band[1])


@innocent(
    "spacing in wavelengths quoted at the lower band edge",
    "the spacing in λ holds at the bottom of the band",
    *_SPACINGS,
    likely=_frequency_open,
)
def spacing_at_bottom(panel: Panel, reach: Reach) -> Panel:
    """Spacing in λ taken at the lower edge."""
    return _at_edge(panel, reach, lambda band: band[0])


@innocent(
    "spacing in wavelengths quoted at mid band",
    "the spacing in λ holds at the middle of the band",
    *_SPACINGS,
    likely=_frequency_open,
)
def spacing_at_middle(panel: Panel, reach: Reach) -> Panel:
    """Spacing in λ taken at the middle."""
    return _at_edge(panel, reach, lambda band: (band[0] + band[1]) / 2)


def _rescaled(panel: Panel, factor: float) -> Callable[[Reading], Reading]:
    """Scaled where the result is a length that panels have; left alone elsewhere."""

    def change(reading: Reading) -> Reading:
        low, high = _usual_lengths_m(panel, reading)
        return scaled(factor)(reading) if low <= reading.nominal * factor <= high else reading

    return change


def _usual_lengths_m(panel: Panel, reading: Reading) -> Band:
    """Lengths [m] that panels have: sizes by the dictionary, spacings by the wavelength."""
    band = reading.band or _whole_span(panel)
    if reading.parameter in _SPACINGS and band is not None:
        wavelength_m = 2 * SPEED_OF_LIGHT_MPS / (sum(band) * 1e6)
        return USUAL_PITCHES_WL[0] * wavelength_m, USUAL_PITCHES_WL[1] * wavelength_m
    return parameters()[reading.parameter].plausible or (0.0, math.inf)


@innocent("lengths in inches", "lengths are in millimetres or in inches", *_LENGTHS)
def inches_for_millimetres(panel: Panel, reach: Reach) -> Panel:
    """Lengths times 25.4, where that leaves a length panels have."""
    return reread(panel, reach, _LENGTHS, _rescaled(panel, 25.4))


@innocent("lengths in millimetres", "lengths are in millimetres or in inches", *_LENGTHS)
def millimetres_for_inches(panel: Panel, reach: Reach) -> Panel:
    """Lengths divided by 25.4, where that leaves a length panels have."""
    return reread(panel, reach, _LENGTHS, _rescaled(panel, 1 / 25.4))
