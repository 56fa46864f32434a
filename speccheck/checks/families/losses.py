"""Losses between directivity and gain, as far as a bid states them."""

from __future__ import annotations

from speccheck.checks.cell_text import half_digit
from speccheck.checks.registry import Judgement, check
from speccheck.checks.saying import claim
from speccheck.physics.decibels import db
from speccheck.records import Amount, Fit, Interval, Reading, Step


@check(
    "gain-is-directivity-less-loss",
    "Gain is directivity less loss",
    needs=(),
    optional=("gain", "directivity", "feed_loss", "efficiency"),
    about=("directivity",),
    source="IEEE Std 145: gain is directivity times radiation efficiency (from memory)",
)
def gain_is_directivity_less_loss(
    gain: Reading | None,
    directivity: Reading | None,
    feed_loss: Reading | None,
    efficiency: Reading | None,
) -> Judgement | None:
    """Holds the gain at the port against directivity and loss stated beside it.

    Formula
    G [dBi] = D [dBi] − L [dB]; L = −10·log10(η); G ≤ D always

    Assumptions
    Same beam, frequency and plane. Applies where a loss or an efficiency is stated beside both figures. The
    tolerance of the gain, or half of the last printed digit, and 0.3 dB are allowed for; beyond that the
    figure is doubtful.

    Worked example
    A directivity of 18.4 dBi and a loss of 0.9 dB give a gain of 17.5 dBi at the port. A gain of 18.4 dBi at
    the port beside that loss is the directivity: doubtful.
    """
    losses = _stated_loss(feed_loss, efficiency)
    if gain is None or directivity is None or losses is None:
        return None
    low_db, high_db = losses
    slack = (0.0 if gain.tolerance else half_digit(gain)) + half_digit(directivity)
    low, high = directivity.nominal - high_db - slack, directivity.nominal - low_db + slack
    outside = gain.low > high + 0.3 or gain.high < low - 0.3
    return Judgement(
        verdict=Fit.DOUBTFUL if outside else Fit.FITS,
        summary=f"A directivity of {directivity.nominal:.2f} dBi less a loss of {low_db:g} to {high_db:g} dB "
        f"gives {low:.2f} to {high:.2f} dBi; the gain is {claim(gain)}.",
        claimed=Amount(gain.nominal, "dBi"),
        expected=Interval(round(low, 3), round(high, 3), "dBi"),
        working=(
            Step(
                "Directivity less loss",
                f"{directivity.nominal:g} dBi − {high_db:g} dB",
                round(directivity.nominal - high_db, 3),
                "dBi",
            ),
        ),
        assumptions=("Same beam, frequency and reference plane for both figures.",),
        question="Please state at which plane the gain holds and which losses are in it.",
    )


def _stated_loss(feed_loss: Reading | None, efficiency: Reading | None) -> tuple[float, float] | None:
    if feed_loss is not None:
        return feed_loss.low, feed_loss.high
    if efficiency is not None and efficiency.low > 0:
        return -float(db(efficiency.high / 100)), -float(db(efficiency.low / 100))
    return None
