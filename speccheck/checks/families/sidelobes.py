"""Side-lobe claims against beamwidth, gain, tilt and each other."""

from __future__ import annotations

from speccheck.checks.beams import claim_freq_hz, flat, rest_tilt_deg, uniform_widths_deg
from speccheck.checks.model import Lacking, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack, named
from speccheck.checks.steering_lobes import Steering, every_lobe, strongest, tilt_span_deg
from speccheck.physics.bounds import chebyshev_beamwidth_ratio
from speccheck.records import Amount, Fit, Interval, Reading, Step

ROUNDING = 0.03
ONE_SIDED = 0.08
"""Shares by which a width may undercut the Chebyshev one: rounding; shaping of the upper lobes alone."""

HELD_IN_PRODUCTION_DB = 20.0
"""Port errors of 0.5 dB and 5° spread a -20 dB design to -17 … -21 dB (simulated)."""

LEAST_CLAIM_DB = 13.3
"""Uniform weights alone give this much (first side lobe of a uniform line)."""

CLAIMS = ("sidelobe_suppression", "upper_sidelobe_peak_to_20", "upper_sidelobe_suppression")


def strictest(*claims: Reading | None) -> Reading | None:
    """The highest of the side-lobe claims that are figures."""
    stated = [c for c in claims if c is not None and not isinstance(c.value, str)]
    return max(stated, key=lambda c: c.low) if stated else None


@check(
    "sidelobes-fit-beamwidth",
    "Side lobes fit the beamwidth",
    needs=("vertical_beamwidth", "array_rows"),
    optional=(*CLAIMS, "electrical_tilt"),
    about=CLAIMS,
    source="Dolph-Chebyshev optimum: for a side-lobe level no beam of equal elements is narrower (C. L."
    " Dolph, 1946)",
)
def sidelobes_fit_beamwidth(
    *,
    case: Case,
    vertical_beamwidth: Reading,
    array_rows: Reading,
    sidelobe_suppression: Reading | None,
    upper_sidelobe_peak_to_20: Reading | None,
    upper_sidelobe_suppression: Reading | None,
    electrical_tilt: Reading | None,
) -> Judgement | None:
    """Holds a side-lobe claim against the narrowest beam that allows it.

    Lower side lobes cost beamwidth. The Chebyshev taper gives the narrowest beam for a level; a claimed width
    more than 3 % below it does not fit the side-lobe claim. Where only the lobes above the beam are claimed,
    it
    is questioned to 8 %, since they can be lowered at the expense of those below.

    Formula
    θv ÷ θ(uniform) ≥ r(N, S), the Chebyshev ratio; 10 elements at 20, 25, 30 dB: 1.096, 1.191, 1.277

    Assumptions
    Width and side lobes of the same beam; equal spacing; mid band unless a frequency is stated.

    Worked example
    10 rows at 0.8 λ have 6.3°; 25 dB needs 1.19 of that, 7.6°. 25 dB with 6.4° (ratio 1.01) does not fit.
    """
    suppression = strictest(sidelobe_suppression, upper_sidelobe_peak_to_20, upper_sidelobe_suppression)
    rows = round(array_rows.nominal)
    if suppression is None or rows < 3 or suppression.low <= LEAST_CLAIM_DB:
        return None
    model = model_of(case, "vertical")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    freq_hz = claim_freq_hz(vertical_beamwidth, model)
    _, uniform = uniform_widths_deg(
        flat(model.layout), freq_hz, rest_tilt_deg(vertical_beamwidth, model, electrical_tilt)
    )
    if uniform is None:
        return None
    needed = chebyshev_beamwidth_ratio(rows, min(suppression.low, 60.0))
    ratio = (vertical_beamwidth.nominal + last_digit_slack(vertical_beamwidth)) / uniform
    one_sided = suppression.parameter != "sidelobe_suppression" and every_lobe(suppression) is None
    short = 1 - ratio / needed
    hard = short > (ONE_SIDED if one_sided else ROUNDING)
    verdict = Fit.DOES_NOT_FIT if hard else Fit.DOUBTFUL if short > ROUNDING else Fit.FITS
    return Judgement(
        verdict=verdict,
        summary=f"{claim(suppression)} side-lobe suppression claimed with {claim(vertical_beamwidth)}; {rows}"
        " rows have"
        f" {uniform:.1f}° with uniform weights and {needed * uniform:.1f}° at best with such side lobes."
        + ("" if verdict is Fit.FITS else f" The width is {100 * short:.0f} % too narrow for them."),
        claimed=Amount(vertical_beamwidth.nominal, "deg"),
        expected=Interval(round((1 - ROUNDING) * needed * uniform, 2), None, "deg"),
        working=(
            Step("Width with uniform weights", f"exact pattern of {rows} rows", round(uniform, 2), "deg"),
            Step("Chebyshev ratio", f"{rows} elements, {suppression.low:g} dB", round(needed, 3)),
            Step("Ratio of the claim", f"{vertical_beamwidth.nominal:g} ÷ {uniform:.2f}", round(ratio, 3)),
        ),
        assumptions=(
            "Width and side lobes belong to the same beam.",
            "Only the lobes above the beam are claimed."
            if one_sided
            else "All side lobes of the cut are claimed.",
            *model.assumptions,
        ),
        question="Please state side lobes and beamwidth of the same cut: frequency, tilt and range of"
        " angles.",
        used=(suppression, *model.used),
    )


@check(
    "sidelobes-hold-in-production",
    "Side lobes hold over band and tilt",
    needs=(),
    optional=CLAIMS,
    about=CLAIMS,
    source="random port errors: 0.5 dB and 5° rms spread a -20 dB design to -17 … -21 dB (simulated; common"
    " practice)",
)
def sidelobes_hold(
    *,
    sidelobe_suppression: Reading | None,
    upper_sidelobe_peak_to_20: Reading | None,
    upper_sidelobe_suppression: Reading | None,
) -> Judgement | None:
    """Asks for proof where side lobes under -20 dB are claimed for a whole band and all tilts.

    Formula
    claim ≤ 20 dB, unless it names a frequency or a tilt

    Assumptions
    Random errors of feed and elements limit what production holds; a single cut can be better.

    Worked example
    25 dB without a condition: 5 dB more than usual, doubtful. 18 dB fits.
    """
    suppression = strictest(sidelobe_suppression, upper_sidelobe_peak_to_20, upper_sidelobe_suppression)
    if suppression is None or {"frequency_mhz", "tilt_deg"} & set(suppression.at):
        return None
    over = suppression.low - HELD_IN_PRODUCTION_DB
    return Judgement(
        verdict=Fit.FITS if over <= 0 else Fit.DOUBTFUL,
        summary=f"{claim(suppression)} side-lobe suppression claimed without frequency or tilt; production"
        " holds about"
        f" {HELD_IN_PRODUCTION_DB:g} dB." + (f" The claim is {over:.0f} dB more." if over > 0 else ""),
        claimed=Amount(suppression.low, "dB"),
        expected=Interval(None, HELD_IN_PRODUCTION_DB, "dB"),
        working=(Step("Over what production holds", f"{suppression.low:g} − 20", round(over, 1), "dB"),),
        assumptions=("The claim holds for the whole band and all tilts, since it names neither.",),
        question="Please state at which frequencies and tilts the side-lobe figure was measured, and on how"
        " many panels.",
        used=(suppression,),
        alone=True,
    )


@check(
    "sidelobes-over-tilt",
    "Side lobes hold at both ends of the tilt range",
    needs=("array_rows", "subarray_rows"),
    optional=(*CLAIMS, "subarray_tilt", "electrical_tilt", "vertical_scan"),
    about=("subarray_rows",),
    source="quantisation lobes of sub-arrays: R. J. Mailloux, Phased Array Antenna Handbook, ch. 7",
)
def sidelobes_over_tilt(
    *,
    case: Case,
    subarray_rows: Reading,
    sidelobe_suppression: Reading | None,
    upper_sidelobe_peak_to_20: Reading | None,
    upper_sidelobe_suppression: Reading | None,
    electrical_tilt: Reading | None,
    vertical_scan: Reading | None,
) -> Judgement | None:
    """Holds one side-lobe figure against the sub-array lobe at both ends of the tilt range.

    Formula
    −(sub-array lobe) ≥ claimed suppression at the least and the greatest tilt, at the top of the band

    Assumptions
    The figure holds over the tilt range, since it names no tilt. A claim on the first upper lobe alone may
    leave this lobe out, so it is a question.

    Worked example
    Sub-arrays of 3 at 0.7 λ built for 3°, tilted to 10°: lobe -7.9 dB; 16 dB claimed is doubtful.
    """
    suppression = strictest(sidelobe_suppression, upper_sidelobe_peak_to_20, upper_sidelobe_suppression)
    if suppression is None:
        return None
    model = model_of(case, "vertical")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    stated = tilt_span_deg(electrical_tilt, vertical_scan)
    if stated is None or model.layout.subarray_rows < 2 or "tilt_deg" in suppression.at:
        return None
    lobe = strongest(model, Steering(stated[0], False, stated[1]), subarrays=True)
    if not lobe.present:
        return None
    short = suppression.low + lobe.level_db
    return Judgement(
        verdict=Fit.FITS if not short > 0.5 else Fit.DOUBTFUL,
        summary=f"{claim(suppression)} side-lobe suppression claimed over {named(stated[1])}; tilted to"
        f" {lobe.scan_deg:g}° the lobe of sub-arrays of {model.layout.subarray_rows} is {lobe.level_db:.1f}"
        " dB.",
        claimed=Amount(suppression.low, "dB"),
        expected=Interval(None, round(-lobe.level_db, 1), "dB"),
        working=(
            Step(
                "Sub-array lobe",
                f"tilt {lobe.scan_deg:g}°, built for {model.layout.subarray_tilt_deg:g}°, at"
                f" {model.band[1]:g} MHz",
                round(lobe.level_db, 1),
                "dB",
            ),
            Step("Missing suppression", f"{suppression.low:g} − {-lobe.level_db:.1f}", round(short, 1), "dB"),
        ),
        assumptions=(
            "The figure holds over the whole tilt range, since it names no tilt.",
            *model.assumptions,
        ),
        question="Please state the side-lobe suppression at least and greatest tilt, and its range of"
        " angles.",
        used=(suppression, subarray_rows, *model.used),
    )


@check(
    "first-lobe-and-range",
    "First side lobe and highest lobe to 20° agree",
    needs=("upper_sidelobe_peak_to_20",),
    optional=("upper_sidelobe_suppression",),
    source="the first upper side lobe lies within 20° of the beam of any column of five rows or more",
)
def first_lobe_and_range(
    upper_sidelobe_peak_to_20: Reading, upper_sidelobe_suppression: Reading | None
) -> Judgement | None:
    """Compares the first upper side lobe with the highest lobe up to 20°: the range contains the first lobe.

    Formula
    suppression (peak to 20°) ≤ suppression (first lobe)

    Assumptions
    Both figures are of the same cut, tilt and statistic.

    Worked example
    First lobe 15 dB, peak to 20° 18 dB: 3 dB more over a range that contains the first lobe, does not fit.
    """
    if upper_sidelobe_suppression is None:
        return None
    first, within = upper_sidelobe_suppression.low, upper_sidelobe_peak_to_20.low
    over = within - first
    return Judgement(
        verdict=Fit.FITS if over <= 0 else Fit.DOES_NOT_FIT,
        summary=f"{claim(upper_sidelobe_suppression)} for the first upper side lobe and"
        f" {claim(upper_sidelobe_peak_to_20)} for the highest lobe to 20° claimed; the range contains the"
        " first lobe" + (f", so it cannot be {over:.1f} dB better." if over > 0 else "."),
        claimed=Amount(within, "dB"),
        expected=Interval(None, first, "dB"),
        working=(Step("Range over first lobe", f"{within:g} − {first:g}", round(over, 2), "dB"),),
        assumptions=("Both figures are of the same cut, tilt and statistic.",),
        question="Please state the range of angles of each side-lobe figure.",
    )
