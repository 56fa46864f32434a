"""What steering costs: scan loss against the projected aperture."""

from __future__ import annotations

from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack
from speccheck.checks.steering_lobes import span_deg
from speccheck.physics.bounds import cosine_scan_loss_db
from speccheck.records import Amount, Fit, Interval, Reading, Step

ROOM_DB = 0.7
"""Integrated directivity loses 2.0 to 3.1 dB at 60°, since the beam stops short of it [dB under the
cosine]."""


@check(
    "scan-loss",
    "Scan loss fits the scan range",
    needs=("scan_loss", "horizontal_scan"),
    about=("scan_loss",),
    source="projected aperture cos θ, usual cos^1.5 θ: R. J. Mailloux, Phased Array Antenna Handbook, ch. 1",
)
def scan_loss(scan_loss: Reading, horizontal_scan: Reading) -> Judgement | None:
    """Holds the claimed scan loss against the projected aperture at the end of the scan range.

    Formula
    loss at θ: −10·log10 cos θ, usually −15·log10 cos θ; a claim 0.7 dB under the first is questioned

    Assumptions
    The loss is against the panel's own boresight figure, which makes it a soft bound.

    Worked example
    ±60°: 3.0 dB by the cosine, 4.5 dB usual. 1 dB claimed is doubtful.
    """
    ends = span_deg(horizontal_scan)
    if ends is None:
        return None
    angle = scan_loss.at.get("angle_deg", max(abs(e) for e in ends))
    if not 0 < angle < 85:
        return None
    least, usual = float(cosine_scan_loss_db(angle)), float(cosine_scan_loss_db(angle, 1.5))
    short = least - scan_loss.high
    return Judgement(
        verdict=Fit.DOUBTFUL if short > ROOM_DB else Fit.FITS,
        summary=f"{claim(scan_loss)} scan loss claimed at {angle:g}°; the projected aperture alone loses"
        f" {least:.1f} dB,"
        f" panels usually {usual:.1f} dB."
        + (f" The claim is {short:.1f} dB less." if short > ROOM_DB else ""),
        claimed=Amount(scan_loss.nominal, "dB"),
        expected=Interval(round(max(0.0, least - ROOM_DB), 2), None, "dB"),
        working=(
            Step("Projected aperture", f"−10·log10 cos {angle:g}°", round(least, 2), "dB"),
            Step("Usual for panels", f"−15·log10 cos {angle:g}°", round(usual, 2), "dB"),
        ),
        assumptions=("Against the panel's own boresight figure; soft.",),
        question="Please state the angle of the scan loss and whether it is EIRP or gain, worst over the"
        " band.",
    )


LEAST_SCAN_DEG = 30.0
"""Angles below it cost less than the room allows for: nothing to hold [deg]."""


@check(
    "figures-fall-with-scan",
    "Gain and EIRP fall with the scan angle",
    needs=(),
    optional=("gain", "eirp"),
    about=("gain", "eirp"),
    source="projected aperture cos θ: R. J. Mailloux, Phased Array Antenna Handbook, ch. 1",
)
def figures_fall_with_scan(case: Case) -> tuple[Judgement, ...]:
    """Holds a gain or EIRP stated at a scan angle against the same figure along the panel normal.

    Formula
    fall from the normal to θ ≥ −10·log10 cos θ; a fall 0.7 dB smaller is questioned

    Assumptions
    Both figures are of the same beam and frequency. Against the panel's own figure the bound is soft.
    Angles from 30° to 85°.

    Worked example
    25 dBi along the normal and 25 dBi at 60°: the projected aperture alone loses 3.0 dB. Doubtful.
    """
    return tuple(found for key in ("gain", "eirp") for found in _falls(case, key))


def _falls(case: Case, key: str) -> list[Judgement]:
    stated = [r for r in case.panel.all(key, case.band) if not isinstance(r.value, str)]
    ahead = [r for r in stated if "angle_deg" not in r.at]
    aside = [r for r in stated if LEAST_SCAN_DEG <= abs(r.at.get("angle_deg", 0.0)) < 85]
    if not ahead:
        return []
    normal = max(ahead, key=lambda r: r.nominal)
    return [_fall(normal, steered) for steered in aside]


def _fall(normal: Reading, steered: Reading) -> Judgement:
    angle = abs(steered.at["angle_deg"])
    least = float(cosine_scan_loss_db(angle))
    fall = normal.nominal - steered.nominal
    short = least - fall - last_digit_slack(normal) - last_digit_slack(steered)
    name = "gain" if normal.parameter == "gain" else "EIRP"
    return Judgement(
        verdict=Fit.DOUBTFUL if short > ROOM_DB else Fit.FITS,
        summary=f"{claim(normal)} {name} claimed along the normal and {claim(steered)} at {angle:g}°, a fall"
        f" of {fall:.1f} dB; the projected aperture alone loses {least:.1f} dB.",
        claimed=Amount(round(fall, 2), "dB"),
        expected=Interval(round(max(0.0, least - ROOM_DB), 2), None, "dB"),
        working=(
            Step("Fall as stated", f"{normal.nominal:g} − {steered.nominal:g}", round(fall, 2), "dB"),
            Step("Projected aperture", f"−10·log10 cos {angle:g}°", round(least, 2), "dB"),
        ),
        assumptions=("Both figures are of the same beam and frequency; soft.",),
        question="Please state for which direction each of the two figures holds.",
        used=(normal, steered),
        alone=True,
    )
