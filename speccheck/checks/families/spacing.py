"""Element and sub-array spacing against the lobes they raise over the claimed steering range.

One rule for every lattice: a lobe of -3 dB or more inside the claimed range does not fit, one from -8 to
-3 dB is doubtful; what breaks the bid's own claim of freedom from grating lobes or of side-lobe
suppression does not fit. The lobe is computed with the element pattern, at the top of the band and both
ends of the range.
"""

from __future__ import annotations

from speccheck.checks.beams import columns_of_width
from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
from speccheck.checks.steering_lobes import (
    ELEMENT_ASSUMED,
    Lobe,
    Steering,
    broken_claims,
    broken_said,
    every_lobe,
    lobe_said,
    lobe_steps,
    span_deg,
    strongest,
    tilt_span_deg,
)
from speccheck.physics import grating
from speccheck.physics.layout import Lattice
from speccheck.records import Amount, Fit, Interval, Reading, Step

AT_REST = "Beam taken along the panel normal: the bid states no range of steering in this plane."
SOURCE = "grating-lobe condition d < λ/(1 + sin θ): R. J. Mailloux, Phased Array Antenna Handbook, ch. 1"


@check(
    "horizontal-spacing",
    "Horizontal spacing fits the scan range",
    needs=("array_columns",),
    optional=(
        "horizontal_element_spacing",
        "horizontal_scan",
        "transceivers",
        "horizontal_beamwidth",
        "ports_per_band",
        "grating_lobes",
        "sidelobe_suppression",
    ),
    source=SOURCE,
)
def horizontal_spacing(
    *,
    case: Case,
    array_columns: Reading,
    horizontal_scan: Reading | None,
    transceivers: Reading | None,
    horizontal_beamwidth: Reading | None,
    ports_per_band: Reading | None,
    grating_lobes: Reading | None,
    sidelobe_suppression: Reading | None,
) -> Judgement | None:
    """Holds the column spacing against the claimed azimuth scan, at the top of the band.

    A spacing too wide for the scan repeats the beam in another direction. The lobe is computed with the
    element pattern at both ends of the range: from -3 dB on it does not fit, from -8 dB it is doubtful,
    below that it fits. It does not fit either where the bid claims freedom from grating lobes, or a
    side-lobe suppression, that the lobe breaks. Crossing frequency and angle are always reported.

    Formula
    d/λ < 1/(1 + sin θ); the lobe stands at sin θ' = sin θ − λ/d

    Assumptions
    Element of TR 38.901 form, 65° × 65°. Passive columns fed together are not steered; columns that each
    have their own ports and beam are arrays side by side and form no lattice. A triangular lattice is judged
    by its own check.

    Worked example
    60 mm at 3800 MHz is 0.76 λ; steering to 60° allows 0.54 λ. A lobe enters from 18°, so it does not fit.
    """
    if round(array_columns.nominal) < 2:
        return None
    model = model_of(case, "horizontal")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    ends = span_deg(horizontal_scan)
    if ends is None and transceivers is not None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("horizontal_scan",), used=model.used)
    pitch = _pitch(case, "horizontal_element_spacing")
    if model.layout.lattice is Lattice.TRIANGULAR or pitch is None:
        return None
    if ends is None and _columns_apart(model, horizontal_beamwidth, ports_per_band):
        return None
    steering = Steering(ends or (0.0, 0.0), True, horizontal_scan)
    lobe = strongest(model, steering, subarrays=False)
    broken = broken_claims(
        lobe, grating_lobes=grating_lobes, suppressions=(sidelobe_suppression,), horizontal=True
    )
    return _judged(model, steering, pitch, broken, lobe)


@check(
    "vertical-spacing",
    "Vertical spacing fits the tilt range",
    needs=("array_rows",),
    optional=(
        "vertical_element_spacing",
        "electrical_tilt",
        "vertical_scan",
        "grating_lobes",
        "sidelobe_suppression",
        "upper_sidelobe_suppression",
    ),
    source=SOURCE,
)
def vertical_spacing(
    *,
    case: Case,
    array_rows: Reading,
    electrical_tilt: Reading | None,
    vertical_scan: Reading | None,
    grating_lobes: Reading | None,
    sidelobe_suppression: Reading | None,
    upper_sidelobe_suppression: Reading | None,
) -> Judgement | None:
    """Holds the row spacing against the claimed tilt range, at the top of the band.

    The rule is that of the horizontal spacing. It is applied to the pitch of the elements, never to the wider
    pitch of sub-arrays, which has a check of its own.

    Formula
    d/λ < 1/(1 + sin θ), with θ the largest tilt; the lobe stands at sin θ' = sin θ − λ/d

    Assumptions
    Element of TR 38.901 form, 65° × 65°. The first upper side lobe is not this lobe: a claim on it is broken
    only where it says that it covers all lobes.

    Worked example
    149 mm at 2690 MHz is 1.34 λ; a tilt of 0° allows 1.00 λ. A lobe always stands 48° from the beam, about
    -6.7 dB: doubtful.
    """
    if round(array_rows.nominal) < 2:
        return None
    model = model_of(case, "vertical")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    pitch = _pitch(case, "vertical_element_spacing")
    if model.layout.lattice is Lattice.TRIANGULAR or pitch is None:
        return None
    stated = tilt_span_deg(electrical_tilt, vertical_scan)
    steering = Steering(stated[0] if stated else (0.0, 0.0), False, stated[1] if stated else None)
    lobe = strongest(model, steering, subarrays=False)
    suppressions = (sidelobe_suppression, every_lobe(upper_sidelobe_suppression))
    broken = broken_claims(lobe, grating_lobes=grating_lobes, suppressions=suppressions, horizontal=False)
    return _judged(model, steering, pitch, broken, lobe)


def _columns_apart(model: Model, width: Reading | None, ports: Reading | None) -> bool:
    """Whether each column is an array of its own: a port pair and the beam of a single column."""
    if ports is not None and ports.nominal < 2 * model.layout.columns:
        return False
    if width is None or isinstance(width.value, str):
        return ports is not None
    return columns_of_width(model, width.nominal, model.centre_hz, 0.0) == 1


def _pitch(case: Case, key: str) -> Reading | None:
    return case.panel.get(key, case.band) or case.panel.get("element_spacing", case.band)


def _judged(model: Model, steering: Steering, pitch: Reading, broken: list[str], lobe: Lobe) -> Judgement:
    """Judgement of an element spacing in one plane from the lobe that was computed."""
    plane = "horizontal" if steering.horizontal else "vertical"
    wl = model.horizontal_pitch_wl if steering.horizontal else model.vertical_pitch_wl
    pitch_m = model.layout.horizontal_pitch_m if steering.horizontal else model.layout.vertical_pitch_m
    top, largest = wl(model.high_hz), abs(steering.largest_deg)
    limit = float(grating.pitch_limit_wl(largest))
    enters_at = float(grating.entry_angle_deg(top))
    entry_mhz = float(grating.entry_freq_hz(pitch_m, largest)) / 1e6
    verdict = Fit.DOES_NOT_FIT if broken else lobe.verdict
    steps = (
        Step(
            "Spacing at the top of the band",
            f"{pitch_m * 1000:.4g} mm × {model.band[1]:g} MHz ÷ c",
            round(top, 3),
            "λ",
        ),
        Step(f"Limit for {largest:g}°", f"1 ÷ (1 + sin {largest:g}°)", round(limit, 3), "λ"),
        Step(
            f"Frequency at which a lobe enters at {largest:g}°",
            f"c ÷ ({pitch_m * 1000:.4g} mm × (1 + sin {largest:g}°))",
            round(entry_mhz),
            "MHz",
        ),
        Step(
            "Angle at which a lobe enters at the top of the band",
            f"arcsin(1 ÷ {top:.3f} − 1)",
            round(enters_at, 1),
            "deg",
        ),
        *lobe_steps(lobe),
    )
    return Judgement(
        verdict=verdict,
        summary=f"{plane.capitalize()} spacing {claim(pitch)} is {top:.2f} λ at {model.band[1]:g} MHz;"
        f" steering to {largest:g}° allows {limit:.2f} λ without a lobe. {lobe_said(lobe, enters_at)}"
        f"{broken_said(broken)}",
        claimed=Amount(round(top, 3), "λ"),
        expected=Interval(None, round(limit, 3), "λ"),
        working=steps,
        assumptions=(ELEMENT_ASSUMED, *model.assumptions, *(() if steering.reading else (AT_REST,))),
        question=f"Please confirm the {plane} spacing in millimetres and the steering range offered.",
        used=model.used,
    )
