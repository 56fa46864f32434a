"""Figures of one panel, drawn from the numbers that checks and exposure note supply."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from speccheck.records import Band, PanelAssessment
from speccheck.report.canvas import Figure
from speccheck.report.formats import Numbers


@dataclass(frozen=True, slots=True)
class PanelFigures:
    """Where the figures go: overview of the offer, physics pages by band, exposure note."""

    overview: tuple[Figure, ...]
    by_band: dict[Band | None, tuple[Figure, ...]]
    exposure: tuple[Figure, ...]


def panel_figures(panel: PanelAssessment, numbers: Numbers, label: Callable[[str], str]) -> PanelFigures:
    """Draw everything that one panel's records allow."""
    return PanelFigures((), {}, ())
