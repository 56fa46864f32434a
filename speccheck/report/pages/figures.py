"""Figures of one panel, drawn from the numbers that checks and exposure note supply."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass

from speccheck.records import Band, PanelAssessment
from speccheck.report.pages.array_figures import draw
from speccheck.report.pages.canvas import Figure
from speccheck.report.pages.exposure_figures import exposure_figures
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.offer_figures import coverage_chart, interval_charts, margin_chart


@dataclass(frozen=True, slots=True)
class PanelFigures:
    """Where the figures go: overview of the offer, physics pages by band, exposure note."""

    overview: tuple[Figure, ...]
    by_band: dict[Band | None, tuple[Figure, ...]]
    exposure: tuple[Figure, ...]


def panel_figures(panel: PanelAssessment, numbers: Numbers, label: Callable[[str], str]) -> PanelFigures:
    """Draw everything that one panel's records allow."""
    by_band: dict[Band | None, tuple[Figure, ...]] = {}
    for band in (*panel.panel.bands, None):
        own = (f for f in panel.findings if f.band == band)
        drawn = (draw(drawing, numbers) for drawing in panel.drawings if drawing.band == band)
        by_band[band] = _present((*interval_charts(own, numbers, band), *drawn))
    return PanelFigures(
        overview=_present((margin_chart(panel, numbers, label), coverage_chart(panel, numbers, label))),
        by_band=by_band,
        exposure=exposure_figures(panel.panel, panel.exposure, numbers),
    )


def _present(figures: Iterable[Figure | None]) -> tuple[Figure, ...]:
    return tuple(figure for figure in figures if figure is not None)
