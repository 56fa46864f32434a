"""Lattices other than the plain rectangle of elements: staggered rows and sub-arrays of fixed tilt."""

from __future__ import annotations

from speccheck.checks.model import Lacking, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.steering_lobes import (
    ELEMENT_ASSUMED,
    SOFT_DB,
    Steering,
    broken_claims,
    broken_said,
    level_said,
    lobe_steps,
    span_deg,
    strongest,
    tilt_span_deg,
)
from speccheck.physics import grating
from speccheck.physics.layout import Lattice
from speccheck.records import Amount, Fit, Interval, Reading, Step


@check(
    "triangular-lattice",
    "Triangular lattice fits the steering range",
    needs=("lattice", "array_rows", "array_columns"),
    optional=("horizontal_scan", "electrical_tilt", "vertical_scan", "grating_lobes", "sidelobe_suppression"),
    about=("lattice",),
    source="reciprocal lattice of staggered rows: R. J. Mailloux, Phased Array Antenna Handbook, ch. 1",
)
def triangular_lattice(
    *,
    case: Case,
    horizontal_scan: Reading | None,
    electrical_tilt: Reading | None,
    vertical_scan: Reading | None,
    grating_lobes: Reading | None,
    sidelobe_suppression: Reading | None,
) -> Judgement | None:
    """Holds a triangular lattice against the steering range by its own reciprocal lattice.

    Rows shifted by half a column spacing move the lobes off the principal planes, so a wider spacing is
    legitimate than the square-lattice formula allows.

    Formula
    lobes at (u, v) = (sin θ cos … + i·λ/dH, … + (j − i/2)·λ/dV) for whole i, j; visible where u² + v² < 1

    Assumptions
    Odd rows shifted by half the horizontal spacing. Element of TR 38.901 form, 65° × 65°.

    Worked example
    Rows of 0.5 λ and columns of 1.0 λ, shifted: the nearest lobes lie at (±1, ±1), radius 1.41, and at
    (0, ±2): none is visible without steering.
    """
    model = model_of(case)
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    if model.layout.lattice is not Lattice.TRIANGULAR:
        return None
    across = Steering(span_deg(horizontal_scan) or (0.0, 0.0), True, horizontal_scan)
    stated = tilt_span_deg(electrical_tilt, vertical_scan)
    along = Steering(stated[0] if stated else (0.0, 0.0), False, stated[1] if stated else None)
    found = [(strongest(model, s, subarrays=False), s) for s in (across, along)]
    lobe, steering = max(found, key=lambda f: (f[0].visible, f[0].present, f[0].level_db))
    broken = broken_claims(
        lobe,
        grating_lobes=grating_lobes,
        suppressions=(sidelobe_suppression,),
        horizontal=steering.horizontal,
    )
    top_h, top_v = model.horizontal_pitch_wl(model.high_hz), model.vertical_pitch_wl(model.high_hz)
    radius = ((1 / top_h) ** 2 + (0.5 / top_v) ** 2) ** 0.5
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if broken else lobe.verdict,
        summary=f"Triangular lattice of {top_v:.2f} λ × {top_h:.2f} λ at {model.band[1]:g} MHz, steered to"
        f" {abs(steering.largest_deg):g}°. "
        + (
            f"A second beam is visible, {level_said(lobe.level_db)}."
            if lobe.visible
            else "No lobe is visible."
        )
        + broken_said(broken),
        claimed=Amount(round(top_h, 3), "λ"),
        working=(
            Step(
                "Nearest oblique lobe from the beam",
                f"√((1 ÷ {top_h:.3f})² + (0.5 ÷ {top_v:.3f})²)",
                round(radius, 3),
            ),
            *lobe_steps(lobe),
        ),
        assumptions=("Odd rows shifted by half the horizontal spacing.", ELEMENT_ASSUMED, *model.assumptions),
        question="Please confirm the lattice with a drawing of the element positions.",
        used=model.used,
    )


@check(
    "subarray-spacing",
    "Sub-array spacing fits the tilt range",
    needs=("array_rows", "subarray_rows"),
    optional=("subarray_tilt", "electrical_tilt", "vertical_scan", "grating_lobes", "sidelobe_suppression"),
    about=("subarray_rows",),
    source="quantisation lobes of sub-arrays: R. J. Mailloux, Phased Array Antenna Handbook, ch. 7",
)
def subarray_spacing(
    *,
    case: Case,
    electrical_tilt: Reading | None,
    vertical_scan: Reading | None,
    grating_lobes: Reading | None,
    sidelobe_suppression: Reading | None,
) -> Judgement | None:
    """Computes the lobe that sub-arrays of fixed tilt raise at both ends of the tilt range.

    A sub-array pitch of two wavelengths is ordinary: at its fixed tilt the lobe lies in a null of the
    sub-array and grows as the ports steer away. From -3 dB it does not fit, from -8 dB it is doubtful,
    and against a claim of no grating lobes it does not fit.

    Formula
    lobe at sin θ' = sin θ − λ/(K·d), weighted by the sub-array and element patterns there

    Assumptions
    Where no fixed tilt is stated, the sub-arrays are built for the middle of the tilt range. A whole
    column on one feed steers inside and is no sub-array here.

    Worked example
    Sub-arrays of 3 at 0.7 λ built for 0° and steered to 12°: the lobe is 1.8 dB below the beam and does not
    fit. Built for 3° and steered to 10° it is -7.9 dB: doubtful, and inside ±4° it fits.
    """
    model = model_of(case, "vertical")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    if model.layout.subarray_rows < 2:
        return None
    stated = tilt_span_deg(electrical_tilt, vertical_scan)
    if stated is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("electrical_tilt",), used=model.used)
    lobe = strongest(model, Steering(stated[0], False, stated[1]), subarrays=True)
    broken = broken_claims(
        lobe,
        grating_lobes=grating_lobes,
        suppressions=(sidelobe_suppression,),
        horizontal=False,
        distinct_db=SOFT_DB,
    )
    layout = model.layout
    pitch_wl = layout.subarray_rows * model.vertical_pitch_wl(model.high_hz)
    free = float(grating.pitch_limit_wl(max(abs(e) for e in stated[0])))
    seen = f"their lobe is a second beam {level_said(lobe.level_db)}" if lobe.present else "no lobe is seen"
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if broken else lobe.verdict,
        summary=f"Sub-arrays of {layout.subarray_rows} rows stand {pitch_wl:.2f} λ apart at {model.band[1]:g}"
        f" MHz, built for {layout.subarray_tilt_deg:g}°. Steered to {lobe.scan_deg:g}° {seen}."
        f"{broken_said(broken)}",
        claimed=Amount(round(lobe.level_db, 1), "dB") if lobe.present else None,
        expected=Interval(None, -8.0, "dB"),
        working=(
            Step(
                "Sub-array pitch at the top of the band",
                f"{layout.subarray_rows} × {model.vertical_pitch_wl(model.high_hz):.3f} λ",
                round(pitch_wl, 3),
                "λ",
            ),
            Step(
                "Pitch without any sub-array lobe",
                f"1 ÷ (1 + sin {max(abs(e) for e in stated[0]):g}°)",
                round(free, 3),
                "λ",
            ),
            *lobe_steps(lobe),
        ),
        assumptions=(ELEMENT_ASSUMED, *model.assumptions),
        question="Please state the fixed tilt of the sub-arrays, the tilt range about it and the highest lobe"
        " at both ends.",
        used=model.used,
    )
