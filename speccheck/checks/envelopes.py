"""Widths that are those of the envelope of all beams of a steered panel, not of one beam."""

from __future__ import annotations

import re

from speccheck.checks.beams import flat, uniform_widths_deg
from speccheck.checks.cell_text import words
from speccheck.checks.model import Lacking, model_of
from speccheck.checks.registry import Case, Judgement
from speccheck.checks.saying import claim
from speccheck.checks.steering_lobes import span_deg
from speccheck.records import Amount, Band, Fit, Interval, Panel, Reading, Step

ENVELOPE = re.compile(
    r"envelop|all beams|hüllkurve|enveloppe|envolvente|inviluppo|envoltória|omhullende|obwiedni", re.I
)
NEAR = (0.75, 1.25)
"""Ratios of a width to steering range plus one beam within which it is taken as their envelope: the beam
widens, and the element falls, towards the ends of the range (common practice)."""


def is_envelope(width: Reading) -> bool:
    """Whether a width is said, or read, to be that of the envelope of all beams."""
    return width.at.get("envelope") == 1 or bool(ENVELOPE.search(words(width)))


def steered_deg(panel: Panel, band: Band | None, width: Reading) -> float | None:
    """Stated steering range [deg] of the plane of a width, from end to end; the wider of two statements."""
    horizontal = width.parameter == "horizontal_beamwidth"
    spans = (
        [span_deg(panel.get("horizontal_scan", band))]
        if horizontal
        else [_tilts_deg(panel.get("electrical_tilt", band)), span_deg(panel.get("vertical_scan", band))]
    )
    return max((ends[1] - ends[0] for ends in spans if ends is not None), default=None)


def _tilts_deg(tilt: Reading | None) -> tuple[float, float] | None:
    return None if tilt is None or isinstance(tilt.value, str) else (tilt.low, tilt.high)


def held_as_envelope(case: Case, width: Reading) -> Judgement:
    """An envelope against the range its beams are steered over, plus one beam."""
    horizontal = width.parameter == "horizontal_beamwidth"
    range_deg = steered_deg(case.panel, case.band, width)
    if range_deg is None:
        return Judgement(
            verdict=Fit.NOT_JUDGED,
            summary="",
            missing=("horizontal_scan" if horizontal else "vertical_scan",),
        )
    model = model_of(case, "horizontal" if horizontal else "vertical")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    beam_deg = uniform_widths_deg(flat(model.layout), model.centre_hz, 0.0)[0 if horizontal else 1] or 0.0
    expected = range_deg + beam_deg
    fits = NEAR[0] <= width.nominal / expected <= NEAR[1]
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOUBTFUL,
        summary=f"{claim(width)} read as the envelope of all beams: steered over {range_deg:g}°, a beam of"
        f" {beam_deg:.1f}° covers {expected:.1f}°. It is not the width of one beam and not held against the"
        " gain of one.",
        claimed=Amount(width.nominal, "deg"),
        expected=Interval(round(NEAR[0] * expected, 1), round(NEAR[1] * expected, 1), "deg"),
        working=(
            Step("Envelope", f"{range_deg:g}° + {beam_deg:.1f}°", round(expected, 1), "deg"),
            Step(
                "Its share of the width",
                f"{width.nominal:g} ÷ {expected:.1f}",
                round(width.nominal / expected, 2),
            ),
        ),
        assumptions=("An envelope serves studies of interference and exposure; one beam is never as wide.",),
        question="Please state the half-power widths of one beam beside those of the envelope of all beams.",
        used=model.used,
    )
