"""Uplink and downlink: the order of a stated pair against the standard's tables."""

from __future__ import annotations

import re

from speccheck.checks.cell_text import words
from speccheck.checks.families.bands import TABLES, shown
from speccheck.checks.registry import Case, Judgement, check
from speccheck.records import Amount, Band, Fit, Panel, Reading, Step
from speccheck.standards import OperatingBand, operating_bands

_SPAN = r"[^0-9]{0,20}(\d{3,5}(?:\.\d+)?)\s*(?:-|–|−|to|…|\.\.\.?)\s*(\d{3,5}(?:\.\d+)?)"
_UP, _DOWN = r"(?:\bul\b|uplink|\brx\b|receive)", r"(?:\bdl\b|downlink|\btx\b|transmit)"
_UPLINK_WORD, _DOWNLINK_WORD = re.compile(_UP, re.IGNORECASE), re.compile(_DOWN, re.IGNORECASE)
_UPLINK, _DOWNLINK = re.compile(_UP + _SPAN, re.IGNORECASE), re.compile(_DOWN + _SPAN, re.IGNORECASE)


@check(
    "duplex-order",
    "Uplink and downlink are the right way round",
    needs=(),
    about=("operating_bands", "frequency_range", "remarks"),
    source=TABLES,
    scope="panel",
)
def duplex_order(case: Case) -> Judgement | None:
    """Holds stated uplink and downlink ranges against the bands of the standard.

    Formula
    uplink inside the uplink of a band and downlink inside its downlink, not the reverse

    Assumptions
    In most bands the downlink lies above the uplink; in n13, n14, n20, n24, n71 and n105 it lies below. A
    pair that fits a band only when exchanged does not fit; it would if transmit and receive were seen from
    the terminal. A pair of no band is not judged here.

    Worked example
    Uplink 791 to 821 MHz with downlink 832 to 862 MHz is n20 exchanged: n20 has its downlink at 791 to 821.
    """
    for reading in case.panel.readings:
        up, down = _UPLINK.search(words(reading)), _DOWNLINK.search(words(reading))
        if up and down:
            return _duplex_judgement(_ends(up), _ends(down), (reading,))
    up_cell, down_cell = _cell(case.panel, _UPLINK_WORD), _cell(case.panel, _DOWNLINK_WORD)
    if up_cell is None or down_cell is None or up_cell.where == down_cell.where:
        return None
    cells = (up_cell, down_cell)
    return _duplex_judgement((up_cell.low, up_cell.high), (down_cell.low, down_cell.high), cells)


def _cell(panel: Panel, word: re.Pattern[str]) -> Reading | None:
    """The frequency cell whose words name one direction."""
    cells = (*panel.all("frequency_range"), *panel.all("operating_bands"))
    return next((r for r in cells if isinstance(r.value, tuple) and word.search(words(r))), None)


def _ends(found: re.Match[str]) -> Band:
    return (float(found[1]), float(found[2]))


def _duplex_judgement(up: Band, down: Band, cells: tuple[Reading, ...]) -> Judgement | None:
    right, turned = _pairs(up, down), _pairs(down, up)
    if not right and not turned:
        return None
    band = (right or turned)[0]
    from_terminal = any(cell.at.get("seen_from_terminal") == 1 for cell in cells)
    fits = bool(turned) if from_terminal else bool(right)
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOES_NOT_FIT,
        summary=f"Uplink {shown((up,))} MHz and downlink {shown((down,))} MHz are "
        + (f"as in {band.name}." if fits else f"{band.name} exchanged."),
        claimed=Amount(f"uplink {shown((up,))}, downlink {shown((down,))}", "MHz"),
        working=tuple(
            Step(f"{band.name} {way}", band.source, shown((span,)), "MHz")
            for way, span in (("uplink", band.uplink), ("downlink", band.downlink))
            if span is not None
        ),
        assumptions=("Uplink is towards the panel, downlink from it.",),
        question="Please confirm which range the panel transmits in and which it receives in.",
        used=cells,
    )


def _pairs(up: Band, down: Band) -> list[OperatingBand]:
    return [
        band
        for band in operating_bands().values()
        if band.duplex == "FDD" and band.uplink and band.downlink and not band.satellite
        if band.uplink[0] <= up[0] and up[1] <= band.uplink[1]
        if band.downlink[0] <= down[0] and down[1] <= band.downlink[1]
    ]
