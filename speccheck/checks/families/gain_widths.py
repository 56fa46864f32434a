"""Gain against the beam and the box: beamwidths and housing."""

from __future__ import annotations

import math

from speccheck.checks.beams import SAME_BEAM, claim_freq_hz, flat, rest_tilt_deg, uniform_widths_deg
from speccheck.checks.envelopes import held_as_envelope, is_envelope
from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack, mhz
from speccheck.physics.bounds import (
    aperture_directivity_dbi,
    aperture_is_hard,
    gain_from_beamwidths_dbi,
    implied_beamwidth_constant,
)
from speccheck.records import Amount, Fit, Interval, Reading, Step

SOLID_ANGLE = 41_253.0
PLANAR = 32_400.0
LOSSLESS = 36_407.0
LOSSY = 17_000.0
"""Products gain × width × width [deg²] of narrow beams: the sphere; arrays with side lobes (Balanis ch. 6);
a Gaussian beam without side lobes or losses, 16·ln 2·(180/π)²; a lossy or heavily shaped
beam (the 14 dBi, 70° × 10° panel of 3GPP TR 36.814 Table A.2.1.1-2 gives 17 600)."""

HOUSING_ALLOWANCE_DB = 0.5
"""Uniform arrays exceed 4πA/λ² by up to 0.4 dB (brute force on published arrays); rounded up [dB]."""


def crowding(vertical_deg: float) -> float:
    """What the products grow by for a beam that is wide [deg] in elevation.

    The area of a strip of the sphere shrinks with the cosine of its elevation. Averaged over a Gaussian
    beam the cosine is exp(−θ²/(16·ln 2)), θ in radians.

    >>> round(crowding(8), 3), round(crowding(65), 3)
    (1.002, 1.123)
    """
    return math.exp(math.radians(min(vertical_deg, 180.0)) ** 2 / (16 * math.log(2)))


@check(
    "gain-fits-beamwidths",
    "Gain fits the beamwidths",
    needs=("gain", "horizontal_beamwidth", "vertical_beamwidth"),
    optional=("electrical_tilt",),
    about=("gain",),
    source="beam solid angle (41 253 square degrees); C. A. Balanis, Antenna Theory, ch. 6 (32 400); "
    "ITU-R F.1336-5 recommends 3.3 (31 000)",
)
def gain_fits_beamwidths(
    *,
    case: Case,
    gain: Reading,
    horizontal_beamwidth: Reading,
    vertical_beamwidth: Reading,
    electrical_tilt: Reading | None,
) -> Judgement | None:
    """Holds the gain against the solid angle of a beam of the claimed half-power widths.

    Formula
    G ≤ 10·log10(K ÷ (θh·θv)), K = 32 400 for arrays with side lobes; 41 253 is the sphere itself. A gain
    between them is questioned, one above does not fit, one under K = 17 000 is questioned as low. The upper
    two are for beams narrow in elevation; for a wide one they grow by exp(θv² ÷ (16·ln 2)), θv in radians.

    Assumptions
    Gain and both widths belong to one beam. Where the gain is stated for another frequency than the vertical
    width, the width is taken to fall as the frequency rises. Widths may be half of their last printed digit
    smaller. Horizontal widths to about 130°.

    Worked example
    65° × 7°: 18.5 dBi with 32 400 and 19.6 dBi with 41 253; 20.5 dBi does not fit. 65° × 65°: K grows by
    1.12, so 9.3 dBi and 10.4 dBi.
    """
    if "element_gain_dbi" in gain.at:
        return _of_the_short_formula(gain)
    for width in (horizontal_beamwidth, vertical_beamwidth):
        if is_envelope(width):
            return held_as_envelope(case, width)
    across, along = horizontal_beamwidth.nominal, vertical_beamwidth.nominal
    note: tuple[str, ...] = ()
    model = model_of(case)
    if isinstance(model, Model):
        along, note = _at_frequency_of(gain, vertical_beamwidth, model)
    other = _width_of_another_beam(model, gain, horizontal_beamwidth, electrical_tilt)
    if other is not None and "beam_columns" in horizontal_beamwidth.at:
        across, note = other, (*note, f"Width of all columns, {other:.1f}°, in place of the broadcast width.")
    if across > 130:
        return None
    rounding = last_digit_slack(horizontal_beamwidth) / across + last_digit_slack(vertical_beamwidth) / along
    slack = last_digit_slack(gain) + 4.343 * rounding
    grown = crowding(along)
    k_upper = (LOSSLESS if gain.at.get("loss_db") == 0 else PLANAR) * grown
    k_sphere = SOLID_ANGLE * grown
    sphere, planar, least = (
        float(gain_from_beamwidths_dbi(across, along, k)) for k in (k_sphere, k_upper, LOSSY)
    )
    value = gain.nominal
    verdict = (
        Fit.DOES_NOT_FIT
        if value - slack > sphere
        else Fit.DOUBTFUL
        if value - slack > planar or value + slack < least
        else Fit.FITS
    )
    implied = float(implied_beamwidth_constant(value, across, along))
    if verdict is not Fit.FITS and other is not None and across != other and isinstance(model, Model):
        return _of_two_beams(gain, horizontal_beamwidth, along, other, model)
    return Judgement(
        verdict=verdict,
        summary=f"{claim(gain)} gain claimed with {across:.4g}° × {along:.4g}°; a beam of these widths has"
        f" {least:.1f} to {planar:.1f} dBi, and {sphere:.1f} dBi if it radiated nowhere else"
        f"{_beyond(value, least, planar, sphere, verdict)}.",
        claimed=Amount(round(value, 2), "dBi"),
        expected=Interval(round(least, 2), round(planar, 2), "dBi"),
        working=(
            *_edge_steps((across, along), grown, (k_upper, planar), (k_sphere, sphere)),
            Step(
                "Implied constant",
                f"10^({value:g} ÷ 10) × {across:.4g} × {along:.4g}",
                round(implied),
                "deg²",
            ),
            _mean_step(value, across, along),
        ),
        assumptions=("Gain and both widths belong to one beam at one frequency, widths at -3 dB.", *note),
        question="Please state the level (-3 dB), frequency and tilt at which each beamwidth was taken.",
    )


def _edge_steps(
    widths_deg: tuple[float, float], grown: float, upper: tuple[float, float], sphere: tuple[float, float]
) -> tuple[Step, ...]:
    across, along = widths_deg
    cosine = f"exp(({along:.4g}° × π ÷ 180)² ÷ (16·ln 2))"
    named = (("Upper edge", upper), ("Sphere", sphere))
    return (
        Step("Growth of K with the width in elevation", cosine, round(grown, 3)),
        *(
            Step(
                name,
                f"10·log10({k / grown:.0f} × {grown:.3f} ÷ ({across:.4g} × {along:.4g}))",
                round(edge, 2),
                "dBi",
            )
            for name, (k, edge) in named
        ),
    )


def _at_frequency_of(gain: Reading, width: Reading, model: Model) -> tuple[float, tuple[str, ...]]:
    """Width [deg] of the rows at the frequency of the gain, and a note where that is another one."""
    gain_hz, width_hz = claim_freq_hz(gain, model), claim_freq_hz(width, model)
    if gain_hz == width_hz:
        return width.nominal, ()
    there = width.nominal * width_hz / gain_hz
    said = f"Vertical width of {width.nominal:g}° at {width_hz / 1e6:.0f} MHz taken as {there:.1f}°"
    return there, (f"{said} at {gain_hz / 1e6:.0f} MHz, where the gain holds.",)


def _beyond(value: float, least: float, usual: float, most: float, verdict: Fit) -> str:
    """How far a claim [dBi] lies outside, in words."""
    if verdict is Fit.FITS:
        return ""
    if value < least:
        return f": the claim is {least - value:.1f} dB less"
    edge, which = (most, "even that") if verdict is Fit.DOES_NOT_FIT else (usual, "the usual")
    return f": the claim is {value - edge:.1f} dB more than {which}"


def _width_of_another_beam(
    model: Model | Lacking, gain: Reading, width: Reading, tilt: Reading | None
) -> float | None:
    """Width [deg] of all columns, where the stated one is far from it; None where they agree."""
    if isinstance(model, Lacking) or model.layout.columns < 2:
        return None
    freq_hz = claim_freq_hz(gain, model)
    uniform, _ = uniform_widths_deg(flat(model.layout), freq_hz, rest_tilt_deg(gain, model, tilt))
    return uniform if uniform is not None and width.nominal / uniform > SAME_BEAM[1] else None


def _of_the_short_formula(gain: Reading) -> Judgement:
    return Judgement(
        verdict=Fit.FITS,
        summary=f"{claim(gain)} read as element gain plus 10·log10 N is not the gain of a beam: not held.",
        claimed=Amount(round(gain.nominal, 2), "dBi"),
        expected=Interval(gain.nominal, gain.nominal, "dBi"),
    )


def _mean_step(gain_dbi: float, across_deg: float, along_deg: float) -> Step:
    """The mean gain over the sphere of what radiates between the half-power points alone.

    A pattern holds no more than its panel is fed with: a mean above 0 dB is no pattern of one beam, but an
    envelope of many.
    """
    mean_db = gain_dbi + 10 * math.log10(across_deg * along_deg / SOLID_ANGLE)
    formula = f"{gain_dbi:g} + 10·log10({across_deg:.4g} × {along_deg:.4g} ÷ 41253), 0 dB at most"
    return Step("Mean of such a pattern over the sphere", formula, round(mean_db, 1), "dB")


def _of_two_beams(gain: Reading, width: Reading, along_deg: float, all_deg: float, model: Model) -> Judgement:
    columns = model.layout.columns
    return Judgement(
        verdict=Fit.DOUBTFUL,
        summary=f"{claim(gain)} gain and {claim(width)} horizontal width claimed; {columns} columns in phase"
        " have"
        f" {all_deg:.1f}°. Gain and width are not of the same beam.",
        claimed=Amount(width.nominal, "deg"),
        expected=Interval(round(0.92 * all_deg, 1), round(1.22 * all_deg, 1), "deg"),
        working=(
            Step("Width of all columns", f"{columns} columns, uniform weights", round(all_deg, 1), "deg"),
            _mean_step(gain.nominal, width.nominal, along_deg),
        ),
        assumptions=(
            "The width may be that of a broadcast beam, of one column or of the envelope of all beams.",
        ),
        question="Please state which beam (traffic, broadcast, one column, envelope of all) each of gain and"
        " beamwidth belongs to.",
        used=model.used,
    )


@check(
    "gain-fits-housing",
    "Gain fits the housing",
    needs=("gain", "height", "width"),
    about=("height", "width"),
    source="aperture theorem G ≤ 4πA/λ²: C. A. Balanis, Antenna Theory, ch. 12",
)
def gain_fits_housing(*, case: Case, gain: Reading, height: Reading, width: Reading) -> Judgement:
    """Holds the gain against the area of the housing.

    Formula
    G ≤ 10·log10(4π·h·w ÷ λ²), a side shorter than 0.8 λ taken as 0.8 λ

    Assumptions
    The box holds the whole aperture. The bound is hard where both sides exceed one wavelength, a question
    otherwise: narrow columns collect from beyond their edge. Allowance 0.5 dB.

    Worked example
    720 mm × 420 mm at 3500 MHz: 27.1 dBi; 29.0 dBi does not fit.
    """
    if case.band is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("frequency_range",))
    if "element_gain_dbi" in gain.at:
        return _of_the_short_formula(gain)
    freq_mhz = gain.at.get("frequency_mhz", sum(case.band) / 2)
    bound = float(aperture_directivity_dbi(width.high, height.high, freq_mhz * 1e6))
    hard = bool(aperture_is_hard(width.high, height.high, freq_mhz * 1e6))
    over = gain.nominal - last_digit_slack(gain) - bound - HOUSING_ALLOWANCE_DB
    verdict = Fit.FITS if over <= 0 else Fit.DOES_NOT_FIT if hard else Fit.DOUBTFUL
    wavelength_mm = 299_792.458 / freq_mhz
    sides = " × ".join(f"max({side * 1000 / wavelength_mm:.2f}, 0.8)" for side in (height.high, width.high))
    return Judgement(
        verdict=verdict,
        summary=f"{claim(gain)} gain claimed from {claim(height)} × {claim(width)}; that area has {bound:.1f}"
        " dBi at"
        f" {freq_mhz:.0f} MHz without losses."
        + (f" The claim is {gain.nominal - bound:.1f} dB more." if over > 0 else ""),
        claimed=Amount(round(gain.nominal, 2), "dBi"),
        expected=Interval(None, round(bound + HOUSING_ALLOWANCE_DB, 2), "dBi"),
        working=(
            Step(
                "Aperture bound",
                f"10·log10(4π × {sides}), sides in λ of {wavelength_mm:.1f} mm",
                round(bound, 2),
                "dBi",
            ),
        ),
        assumptions=(
            f"Band {mhz(case.band)}, middle; allowance {HOUSING_ALLOWANCE_DB} dB.",
            "Both sides exceed one wavelength."
            if hard
            else "A side is shorter than one wavelength: a guide only.",
        ),
        question="Please confirm the outer size of the radome.",
    )
