"""What steering costs: scan loss against the projected aperture."""

from __future__ import annotations

from speccheck.checks.registry import Judgement, check
from speccheck.checks.saying import claim
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
