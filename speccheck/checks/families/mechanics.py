"""Weight: against the size of the housing, and against the other weights stated."""

from __future__ import annotations

import math

from speccheck.checks.cell_text import half_digit
from speccheck.checks.registry import Judgement, check
from speccheck.checks.saying import claim, label
from speccheck.records import Amount, Fit, Interval, Reading, Step

_USUAL_DENSITY = (100.0, 1200.0)
_USUAL_ACTIVE_DENSITY = (280.0, 1600.0)
_SOLID_ALUMINIUM = 2700.0


@check(
    "weight-fits-size",
    "Weight fits the size",
    needs=("weight", "height", "width", "depth"),
    optional=("transceivers", "power_consumption"),
    about=("weight",),
    source="mass per housing volume of panels on the market (common practice)",
    scope="panel",
)
def weight_fits_size(
    *,
    weight: Reading,
    height: Reading,
    width: Reading,
    depth: Reading,
    transceivers: Reading | None,
    power_consumption: Reading | None,
) -> Judgement | None:
    """Asks about a weight that is unusual for the volume of the housing.

    Formula
    density = weight / (height × width × depth)

    Assumptions
    Passive panels hold 100 to 1200 kg/m³ of housing, active ones with radios 280 to 1600 kg/m³ (common
    practice). Outside is doubtful; above solid aluminium (2700 kg/m³) no panel fits.

    Worked example
    11.8 kg in 1.43 × 0.16 × 0.095 m, 0.0217 m³, is 543 kg/m³: usual. 12 kg for an active panel of 0.9 × 0.4 ×
    0.2 m is 167 kg/m³: doubtful, and would be usual without the radio.
    """
    volume = height.nominal * width.nominal * depth.nominal
    if volume <= 0:
        return None
    radio = (transceivers is not None or power_consumption is not None) and weight.at.get(
        "without_radio"
    ) != 1
    low, high = _USUAL_ACTIVE_DENSITY if radio else _USUAL_DENSITY
    density = weight.nominal / volume
    verdict = Fit.FITS if low <= density <= high else Fit.DOUBTFUL
    kind = "an active panel" if radio else "a passive panel"
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if density > _SOLID_ALUMINIUM else verdict,
        summary=f"{claim(weight)} in {volume * 1000:.1f} litres is {density:.0f} kg/m³, "
        f"{'usual' if verdict is Fit.FITS else 'unusual'} for {kind}.",
        claimed=Amount(weight.nominal, "kg"),
        expected=Interval(round(low * volume, 2), round(high * volume, 2), "kg"),
        working=(
            Step(
                "Volume",
                f"{height.nominal:g} × {width.nominal:g} × {depth.nominal:g} m",
                round(volume, 5),
                "m³",
            ),
            Step("Mass per volume", f"{weight.nominal:.4g} kg / {volume:.5f} m³", round(density, 1), "kg/m³"),
        ),
        assumptions=(f"Housing of {kind}; {low:g} to {high:g} kg/m³ is usual (common practice).",),
        question="Please state what the weight includes (brackets, radio) and the shipping weight.",
    )


@check(
    "weights-add-up",
    "Weights add up",
    needs=("weight",),
    optional=("weight_with_brackets", "mounting_kit_weight", "shipping_weight"),
    about=("weight_with_brackets", "mounting_kit_weight", "shipping_weight"),
    source="arithmetic of masses",
    scope="panel",
)
def weights_add_up(
    weight: Reading,
    weight_with_brackets: Reading | None,
    mounting_kit_weight: Reading | None,
    shipping_weight: Reading | None,
) -> Judgement | None:
    """Holds the weights of a panel against each other.

    Formula
    with brackets = without + mounting kit; with brackets ≥ without; shipping ≥ without

    Assumptions
    Net weight without mounting kit. 5 % and the last printed digits are allowed for in the sum.

    Worked example
    9.2 kg without and 12.6 kg with brackets leave 3.4 kg for the kit. A shipping weight of 8 kg does not fit.
    """
    slack = half_digit(weight)
    steps, troubles, used = [], [], []
    for other in (weight_with_brackets, shipping_weight):
        if other is None:
            continue
        used.append(other)
        more = round(other.nominal - weight.nominal, 3)
        formula = f"{other.nominal:g} − {weight.nominal:g} kg"
        steps.append(Step(f"{label(other.parameter)} less weight", formula, more, "kg"))
        if other.nominal + half_digit(other) < weight.nominal - slack:
            troubles.append(f"{label(other.parameter)} is below the net weight")
    if mounting_kit_weight is not None and weight_with_brackets is not None:
        together = weight.nominal + mounting_kit_weight.nominal
        steps.append(
            Step(
                "Weight and mounting kit",
                f"{weight.nominal:g} + {mounting_kit_weight.nominal:g} kg",
                together,
                "kg",
            )
        )
        allowed = 0.05 * together + slack + half_digit(mounting_kit_weight) + half_digit(weight_with_brackets)
        if not math.isclose(together, weight_with_brackets.nominal, abs_tol=allowed):
            troubles.append("weight and mounting kit do not add up to the weight with brackets")
    if not steps:
        return None
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if troubles else Fit.FITS,
        summary=f"The weights {'do not add up: ' + '; '.join(troubles) if troubles else 'agree'}.",
        claimed=Amount(weight.nominal, "kg"),
        expected=Interval(None, min((o.nominal + half_digit(o) for o in used), default=None), "kg"),
        working=tuple(steps),
        assumptions=("The weight is net, without mounting kit.",),
        question="Please state the weight without brackets, of the mounting kit, and as shipped.",
    )
