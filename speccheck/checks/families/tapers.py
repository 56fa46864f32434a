"""What low side lobes and losses cost in gain."""

from __future__ import annotations

import functools
from dataclasses import replace

from speccheck.checks.beams import Claims, beam_gains, claim_freq_hz, declared_loss_db, rest_tilt_deg
from speccheck.checks.families.sidelobes import CLAIMS, LEAST_CLAIM_DB, strictest
from speccheck.checks.model import Lacking, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, figure, last_digit_slack
from speccheck.physics.taper import chebyshev, efficiency_db
from speccheck.records import Amount, Fit, Interval, Reading, Step

LEAST_LOSS_DB = 0.3
"""Loss [dB] that no panel undercuts; the least plausible one of a class is higher (common practice)."""

ALLOWANCE_DB = 0.2


@check(
    "sidelobes-fit-gain",
    "Side lobes fit the gain",
    needs=("gain", "array_rows"),
    optional=(*CLAIMS, "horizontal_beamwidth", "electrical_tilt"),
    about=CLAIMS,
    source="taper efficiency (Σa)² ÷ (N·Σa²) of Dolph-Chebyshev weights: C. A. Balanis, Antenna Theory, ch."
    " 6",
)
def sidelobes_fit_gain(
    *,
    case: Case,
    gain: Reading,
    array_rows: Reading,
    sidelobe_suppression: Reading | None,
    upper_sidelobe_peak_to_20: Reading | None,
    upper_sidelobe_suppression: Reading | None,
    horizontal_beamwidth: Reading | None,
    electrical_tilt: Reading | None,
) -> Judgement | None:
    """Takes the taper that the side-lobe claim needs off the directivity of uniform weights.

    Formula
    G ≤ D(uniform) + η(taper) − loss, η = 10·log10((Σa)² ÷ (N·Σa²)); questioned above a loss of 0.3 dB,
    does not fit above the lossless value and 0.2 dB

    Assumptions
    Chebyshev weights, close to the least loss for a level; gain and side lobes of one beam; mid band.

    Worked example
    10 rows at 0.8 λ with 65°: 19.2 dBi with uniform weights. 30 dB costs 0.72 dB: 18.5 dBi lossless. A gain
    of
    19.0 dBi with 30 dB does not fit.
    """
    suppression = strictest(sidelobe_suppression, upper_sidelobe_peak_to_20, upper_sidelobe_suppression)
    rows = round(array_rows.nominal)
    if suppression is None or rows < 3 or suppression.low <= LEAST_CLAIM_DB or "element_gain_dbi" in gain.at:
        return None
    model = model_of(case)
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    width = horizontal_beamwidth
    claims = Claims(
        freq_hz=claim_freq_hz(gain, model),
        tilt_deg=rest_tilt_deg(gain, model, electrical_tilt),
        horizontal_deg=None if width is None or isinstance(width.value, str) else width.nominal,
        vertical_deg=None,
        loss_db=declared_loss_db(gain, None, None),
        beam_columns=round(gain.at["beam_columns"]) if "beam_columns" in gain.at else None,
    )
    uniform = max(
        beam.expected.directivity_dbi for beam in beam_gains(model, replace(claims, vertical_deg=None))
    )
    cost = _taper_cost_db(rows, min(suppression.low, 60.0))
    lossless = uniform - cost
    loss = 0.0 if gain.at.get("loss_db") == 0 else LEAST_LOSS_DB
    value = gain.nominal - last_digit_slack(gain)
    verdict = (
        Fit.DOES_NOT_FIT
        if value > lossless + ALLOWANCE_DB
        else Fit.DOUBTFUL
        if value > lossless - loss
        else Fit.FITS
    )
    return Judgement(
        verdict=verdict,
        summary=f"{claim(gain)} gain and {claim(suppression)} side-lobe suppression claimed; uniform weights"
        " have"
        f" {uniform:.1f} dBi, such side lobes cost {cost:.1f} dB and leave {lossless:.1f} dBi lossless.",
        claimed=Amount(round(gain.nominal, 2), "dBi"),
        expected=Interval(None, round(lossless - loss, 2), "dBi"),
        working=(
            Step("Directivity with uniform weights", f"integrated, {rows} rows", round(uniform, 2), "dBi"),
            Step(
                "Cost of the taper",
                f"Chebyshev, {rows} elements, {suppression.low:g} dB",
                round(cost, 2),
                "dB",
            ),
            Step("Lossless gain left", f"{uniform:.2f} − {cost:.2f}", round(lossless, 2), "dBi"),
        ),
        assumptions=("Gain and side lobes belong to one beam.", *model.assumptions),
        question="Please state gain and side lobes of the same beam: frequency, tilt and taper.",
        used=(suppression, *model.used),
    )


@functools.lru_cache(maxsize=256)
def _taper_cost_db(rows: int, suppression_db: float) -> float:
    return -float(efficiency_db(chebyshev(rows, suppression_db)))


@check(
    "gain-below-directivity",
    "Gain stays below directivity",
    needs=("gain", "directivity"),
    about=("directivity",),
    source="gain = efficiency × directivity (IEEE Std 145)",
)
def gain_below_directivity(gain: Reading, directivity: Reading) -> Judgement:
    """Takes the gain off the stated directivity: what is left is the loss, and a loss is positive.

    Formula
    loss = D − G ≥ 0; a passive panel loses at least about 0.3 dB

    Assumptions
    Both figures are of the same beam, frequency and tilt.

    Worked example
    18.5 dBi gain beside 18.3 dBi directivity: a loss of -0.2 dB, does not fit.
    """
    loss = directivity.nominal - gain.nominal
    slack = last_digit_slack(gain) + last_digit_slack(directivity)
    verdict = Fit.DOES_NOT_FIT if loss < -slack else Fit.DOUBTFUL if loss < 0.2 else Fit.FITS
    return Judgement(
        verdict=verdict,
        summary=f"{claim(gain)} gain beside {claim(directivity)} directivity: a loss of {loss:.1f} dB"
        + ("." if verdict is Fit.FITS else ", less than any feed and radome leave."),
        claimed=Amount(round(gain.nominal, 2), "dBi"),
        expected=Interval(None, directivity.nominal, "dBi"),
        working=(
            Step(
                "Loss",
                f"{figure(directivity.nominal, 'dBi')} − {figure(gain.nominal, 'dBi')}",
                round(loss, 2),
                "dB",
            ),
        ),
        assumptions=("Both figures are of the same beam, frequency and tilt.",),
        question="Please state the loss between connector and radiated beam.",
    )
