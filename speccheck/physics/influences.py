"""Which unknown moves the expected gain most: each input of the model varied alone over its range."""

from __future__ import annotations

from dataclasses import dataclass, replace

import numpy as np

from speccheck.physics.element import SectorElement
from speccheck.physics.expected import ExpectedGain
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.states import directivity_dbi
from speccheck.physics.taper import beamwidth_ratio, cosine_on_pedestal, pedestal_for_ratio

COLUMN_AZ_SPREAD_DEG = 3.0
PLANAR_AZ_RANGE_DEG = (65.0, 100.0)
EL_RANGE_DEG = (60.0, 85.0)
FLOOR_RANGE_DB = (20.0, 30.0)
WIDTH_SPREAD = 0.05
"""Ranges over which the unknowns of a panel are varied (assumptions about the trade, from memory)."""


@dataclass(frozen=True, slots=True)
class Influence:
    """How far one input moves the expected gain: name, range in words, lowest and highest change [dB]."""

    name: str
    over: str
    low_db: float
    high_db: float

    @property
    def span_db(self) -> float:
        """Spread [dB] between the lowest and the highest change."""
        return self.high_db - self.low_db


def gain_influences(
    layout: ArrayLayout, freq_hz: float, gain: ExpectedGain, *, tilt_deg: float = 0.0, scan_deg: float = 0.0
) -> tuple[Influence, ...]:
    """Changes of the expected gain by each input alone, the strongest first: that one binds.

    layout [ArrayLayout]: declared geometry.
    freq_hz [Hz]: frequency of the claim.
    gain [ExpectedGain]: the model fitted to the claim.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [dB]: influences, sorted by their span.
    Source: integrated directivity of the varied models; ranges of this program.

    >>> from speccheck.physics.expected import PanelClass, expected_gain
    >>> column = ArrayLayout(10, 1, 0.8, 0.5)
    >>> claim = expected_gain(column, 299792458.0, PanelClass.PASSIVE, horizontal_beamwidth_deg=65,
    ...                       vertical_beamwidth_deg=6.8)
    >>> gain_influences(column, 299792458.0, claim)[0].name
    'loss'
    """
    single = layout.panel_columns * layout.columns == 1
    element = gain.element
    azimuths = (
        (element.az_hpbw_deg - COLUMN_AZ_SPREAD_DEG, element.az_hpbw_deg + COLUMN_AZ_SPREAD_DEG)
        if single
        else PLANAR_AZ_RANGE_DEG
    )

    def change(varied: SectorElement, pedestal: float = gain.row_pedestal) -> float:
        tapered = _tapered(layout, pedestal, gain.column_pedestal)
        return float(directivity_dbi(tapered, varied, freq_hz, tilt_deg, scan_deg)) - gain.directivity_dbi

    found = [
        Influence("loss", _range(gain.loss_low_db, gain.loss_high_db), -gain.loss_high_db, -gain.loss_low_db),
        _ordered(
            "azimuth beamwidth of the element",
            f"{azimuths[0]:.0f} to {azimuths[1]:.0f}°",
            [change(replace(element, az_hpbw_deg=width)) for width in azimuths],
        ),
        _ordered(
            "elevation beamwidth of the element",
            f"{EL_RANGE_DEG[0]:.0f} to {EL_RANGE_DEG[1]:.0f}°",
            [change(replace(element, el_hpbw_deg=width)) for width in EL_RANGE_DEG],
        ),
        _ordered(
            "level behind the element",
            f"-{FLOOR_RANGE_DB[0]:.0f} to -{FLOOR_RANGE_DB[1]:.0f} dB",
            [change(replace(element, floor_db=floor, el_floor_db=floor)) for floor in FLOOR_RANGE_DB],
        ),
        Influence("element model", f"±{gain.allowance_db:.1f} dB", -gain.allowance_db, gain.allowance_db),
    ]
    if layout.port_rows > 2:
        pedestals = _pedestals(layout.port_rows, layout.subarray_rows, gain.row_pedestal)
        found.append(
            _ordered(
                "amplitude taper",
                f"elevation beamwidth ±{100 * WIDTH_SPREAD:.0f} %",
                [change(element, pedestal) for pedestal in pedestals],
            )
        )
    return tuple(sorted(found, key=lambda influence: -influence.span_db))


def _range(low_db: float, high_db: float) -> str:
    return f"{low_db:.1f} to {high_db:.1f} dB"


def _ordered(name: str, over: str, changes: list[float]) -> Influence:
    return Influence(name, over, min(*changes, 0.0), max(*changes, 0.0))


def _pedestals(ports: int, grouped: int, fitted: float) -> list[float]:
    """Pedestals whose beam is narrower and wider than the fitted one by the spread of a printed width."""
    taper = np.repeat(cosine_on_pedestal(ports, fitted), grouped)
    ratio = beamwidth_ratio(taper)
    return [pedestal_for_ratio(ports, ratio * (1 + sign * WIDTH_SPREAD), grouped) for sign in (-1, 1)]


def _tapered(layout: ArrayLayout, row_pedestal: float, column_pedestal: float) -> ArrayLayout:
    tapers = [
        tuple(cosine_on_pedestal(ports, pedestal).tolist()) if pedestal < 1 and ports > 2 else ()
        for ports, pedestal in ((layout.port_rows, row_pedestal), (layout.port_columns, column_pedestal))
    ]
    return replace(layout, row_taper=tapers[0], column_taper=tapers[1])
