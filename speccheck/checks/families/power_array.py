"""EIRP against the array where a bid states power and geometry but no gain."""

from __future__ import annotations

from dataclasses import replace

from speccheck.checks.beams import Claims, beam_gains, declared_loss_db, rest_tilt_deg
from speccheck.checks.cell_text import half_digit
from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.transmit_power import TransmitPower, transmit_power
from speccheck.physics.expected import ExpectedGain
from speccheck.physics.power import dbm, implied_gain_dbi
from speccheck.records import Amount, Fit, Interval, Reading, Step


@check(
    "eirp-fits-array",
    "EIRP fits power and array",
    needs=("eirp",),
    optional=("gain", "array_rows", "electrical_tilt", "feed_loss", "efficiency"),
    about=("eirp",),
    source="ITU-R P.525-4 section 2; integrated directivity of the declared array, TR 38.901 elements",
)
def eirp_fits_array(
    *,
    case: Case,
    eirp: Reading,
    gain: Reading | None,
    electrical_tilt: Reading | None,
    feed_loss: Reading | None,
    efficiency: Reading | None,
) -> Judgement | None:
    """Holds the gain that EIRP and power imply against the declared array, where no gain is stated.

    Formula
    G [dBi] = EIRP [dBm] − 10·log10(P [W]) − 30; G ≤ D, the integrated directivity of the array

    Assumptions
    All columns in phase, uniform or tapered as the range of expected gain allows, at the top of the band for
    the upper edge and at its bottom for the lower one. Losses by the class of the panel. Power over all ports
    and both polarisations. Half of the last printed digits is allowed for.

    Worked example
    320 W (55.05 dBm) and 79.5 dBm imply 24.45 dBi: 8 × 8 positions at 0.7 λ × 0.5 λ have 24.8 dBi lossless,
    so it fits. 82.5 dBm implies 27.45 dBi: it does not fit, and would if both polarisations had been added
    once more.
    """
    power, model = transmit_power(case.panel, case.band), model_of(case)
    if gain is not None or power is None or isinstance(model, Lacking):
        return None
    top = Claims(
        freq_hz=model.high_hz,
        tilt_deg=rest_tilt_deg(eirp, model, electrical_tilt),
        horizontal_deg=None,
        vertical_deg=None,
        loss_db=declared_loss_db(eirp, feed_loss, efficiency),
        beam_columns=model.layout.columns,
    )
    low, high = (beam_gains(model, c)[0].expected for c in (replace(top, freq_hz=model.low_hz), top))
    return _judged(eirp, power, model, low, high)


def _judged(
    eirp: Reading, power: TransmitPower, model: Model, low: ExpectedGain, high: ExpectedGain
) -> Judgement:
    implied = float(implied_gain_dbi(eirp.nominal, power.nominal_w))
    slack = max(half_digit(eirp), eirp.tolerance or 0.0) + float(dbm(power.high_w) - dbm(power.nominal_w))
    verdict = Fit.FITS
    if implied - slack > high.impossible_dbi:
        verdict = Fit.DOES_NOT_FIT
    elif implied - slack > high.question_dbi or implied + slack < low.low_dbi:
        verdict = Fit.DOUBTFUL
    layout = model.layout
    level = float(dbm(power.nominal_w))
    return Judgement(
        verdict=verdict,
        summary=f"EIRP {eirp.nominal:g} dBm and {power.nominal_w:.4g} W imply a gain of {implied:.2f} dBi; "
        f"{layout.rows} × {layout.columns} positions have {high.directivity_dbi:.1f} dBi lossless at "
        f"{model.high_hz / 1e6:.0f} MHz and {low.low_dbi:.1f} to {high.question_dbi:.1f} dBi with losses.",
        claimed=Amount(round(implied, 3), "dBi"),
        expected=Interval(round(low.low_dbi, 2), round(high.question_dbi, 2), "dBi"),
        working=(
            power.step,
            Step("Gain implied", f"{eirp.nominal:g} dBm − {level:.2f} dBm", round(implied, 3), "dBi"),
            Step(
                "Directivity at the top of the band",
                f"4π·U ÷ ∮U dΩ, {layout.rows} × {layout.columns}",
                round(high.directivity_dbi, 2),
                "dBi",
            ),
        ),
        assumptions=(
            *power.assumptions,
            "All columns in phase.",
            f"Upper edge set by: {high.binding}.",
            *model.assumptions,
        ),
        question="Please state the gain, the total power, and whether the EIRP is average, for both "
        "polarisations together, and of which beam.",
        used=(*power.readings, *model.used),
    )
