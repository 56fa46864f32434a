"""Beamwidths against the box, and widths at other levels."""

from __future__ import annotations

from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack
from speccheck.physics.bounds import narrowest_beamwidth_deg, shortest_length_m
from speccheck.records import Amount, Band, Fit, Interval, Reading, Step

HARD = 0.95
"""A width this far under the bound does not fit (hard within 5 %)."""

LONG_SIDE_WL = 1.5
"""Side [wavelengths] below which the uniform-line bound says nothing: the element sets the width."""

TEN_DB_RATIO = (1.5, 2.05)
"""Width at -10 dB over that at -3 dB: 1.67 uniform line, 1.83 parabola in decibels, with room either side."""


def _against_side(width: Reading, side: Reading, band: Band, word: str) -> Judgement | None:
    freq_mhz = width.at.get("frequency_mhz", sum(band) / 2)
    wavelength_m = 299.792458 / freq_mhz
    if side.high / wavelength_m < LONG_SIDE_WL:
        return None
    bound = float(narrowest_beamwidth_deg(side.high, freq_mhz * 1e6))
    ratio = (width.nominal + last_digit_slack(width)) / bound
    verdict = Fit.FITS if ratio >= 1 else Fit.DOES_NOT_FIT if ratio < HARD else Fit.DOUBTFUL
    needed = float(shortest_length_m(width.nominal, freq_mhz * 1e6))
    return Judgement(
        verdict=verdict,
        summary=f"{claim(width)} claimed from a {word} of {claim(side)}; a line of that length has"
        f" {bound:.1f}° at"
        f" {freq_mhz:.0f} MHz at best, the claim needs {needed:.2f} m.",
        claimed=Amount(width.nominal, "deg"),
        expected=Interval(round(bound, 2), None, "deg"),
        working=(
            Step(
                "Narrowest beam",
                f"50.8° × {wavelength_m * 1000:.1f} mm ÷ {side.high * 1000:.0f} mm",
                round(bound, 2),
                "deg",
            ),
            Step("Length the claim needs", f"50.8° × λ ÷ {width.nominal:g}°", round(needed, 3), "m"),
        ),
        assumptions=("The whole side radiates with uniform weights; mid band unless a frequency is stated.",),
        question=f"Please confirm the outer {word} and the frequency and level of the beamwidth.",
    )


@check(
    "vertical-beamwidth-fits-height",
    "Vertical beamwidth fits the height",
    needs=("vertical_beamwidth", "height"),
    about=("height",),
    source="uniform line source: C. A. Balanis, Antenna Theory, ch. 12",
)
def vertical_beamwidth_fits_height(
    *, case: Case, vertical_beamwidth: Reading, height: Reading
) -> Judgement | None:
    """Holds the vertical width against the narrowest beam the height of the box allows.

    Formula
    θv ≥ 50.8° · λ ÷ h; more than 5 % narrower does not fit

    Assumptions
    The whole height radiates. Mid band unless a frequency is stated. No bound below 1.5 λ.

    Worked example
    7° at 1900 MHz needs 1.15 m; from 0.90 m the beam is 8.9° at best, so 7° does not fit.
    """
    if case.band is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("frequency_range",))
    return _against_side(vertical_beamwidth, height, case.band, "height")


@check(
    "horizontal-beamwidth-fits-width",
    "Horizontal beamwidth fits the width",
    needs=("horizontal_beamwidth", "width"),
    about=("width",),
    source="uniform line source: C. A. Balanis, Antenna Theory, ch. 12",
)
def horizontal_beamwidth_fits_width(
    *, case: Case, horizontal_beamwidth: Reading, width: Reading
) -> Judgement | None:
    """Holds the horizontal width against the narrowest beam the width of the box allows.

    Formula
    θh ≥ 50.8° · λ ÷ w; more than 5 % narrower does not fit

    Assumptions
    The whole width radiates. Narrow boxes, under 1.5 λ, set no bound: the element does.

    Worked example
    20° at 1900 MHz from 0.30 m, which is 1.90 λ: 27.0° at best, so 20° does not fit.
    """
    if case.band is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("frequency_range",))
    return _against_side(horizontal_beamwidth, width, case.band, "width")


@check(
    "ten-db-width",
    "Width at -10 dB fits the half-power width",
    needs=("horizontal_beamwidth", "horizontal_beamwidth_10db"),
    about=("horizontal_beamwidth_10db",),
    source="parabola in decibels √(10/3) = 1.83 (TR 38.901 element); uniform line 1.67 (computed)",
)
def ten_db_width(*, horizontal_beamwidth: Reading, horizontal_beamwidth_10db: Reading) -> Judgement:
    """Divides the width at -10 dB by the half-power width.

    Formula
    1.5 ≤ θ10 ÷ θ3 ≤ 2.05

    Assumptions
    One smooth beam: 1.67 for a uniform line, 1.83 for a sector element.

    Worked example
    65° and 119°: ratio 1.83, fits. 65° and 70°: ratio 1.08, doubtful.
    """
    ratio = horizontal_beamwidth_10db.nominal / horizontal_beamwidth.nominal
    low, high = TEN_DB_RATIO
    return Judgement(
        verdict=Fit.FITS if low <= ratio <= high else Fit.DOUBTFUL,
        summary=f"{claim(horizontal_beamwidth_10db)} at -10 dB and {claim(horizontal_beamwidth)} at half"
        " power"
        f" claimed: ratio {ratio:.2f}; one smooth beam has {low:g} to {high:g}.",
        claimed=Amount(round(ratio, 3), ""),
        expected=Interval(low, high, ""),
        working=(
            Step(
                "Ratio of the widths",
                f"{horizontal_beamwidth_10db.nominal:g} ÷ {horizontal_beamwidth.nominal:g}",
                round(ratio, 3),
            ),
        ),
        assumptions=("One smooth beam.",),
        question="Please state the level of each beamwidth.",
    )
