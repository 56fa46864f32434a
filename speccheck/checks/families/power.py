"""Radiated power: EIRP and ERP against power and gain, total radiated power against conducted power."""

from __future__ import annotations

import math

from speccheck.checks.cell_text import half_digit
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
from speccheck.checks.transmit_power import TransmitPower, parts_of_total, transmit_power
from speccheck.physics.power import HALF_WAVE_DIPOLE_DBI, dbm, trp_dbm
from speccheck.records import Amount, Fit, Interval, Reading, Sense, Step
from speccheck.standards import power_classes

_DOUBT_DB = 0.3
_MISFIT_DB = 1.0
_MILLIMETRE_WAVE_MHZ = 24_250.0
_LARGEST_LOSS_DB = 3.0


@check(
    "eirp-fits-power-and-gain",
    "EIRP fits power and gain",
    needs=("gain",),
    optional=("eirp", "erp", "feed_loss"),
    about=("eirp", "erp"),
    source="ITU Radio Regulations No. 1.161; ITU-R P.525-4 section 2: EIRP is power plus gain in decibels",
)
def eirp_fits_power_and_gain(
    case: Case,
    gain: Reading,
    eirp: Reading | None,
    erp: Reading | None,
    feed_loss: Reading | None,
) -> Judgement | None:
    """Holds a stated EIRP against the panel's own power and gain.

    The power counts all ports and both polarisations, the gain is that of one polarisation: nothing more is
    added for two polarisations. A higher EIRP breaks the conservation of energy; a lower one breaks no law
    but may leave out a polarisation, ports or carriers, which makes exposure distances too short.

    Formula
    EIRP [dBm] = 10·log10(P [W]) + 30 + G [dBi] − L [dB]; ERP [dBm] = EIRP − 2.15 dB

    Assumptions
    Average power, not peak. The lowest and highest gain stated for the band with its tolerance, half of the
    last printed digit of every figure, and a stated feed loss span the interval. More than 0.3 dB outside is
    doubtful, more than 1 dB above does not fit. An EIRP stated as a minimum may lie 2.2 dB lower, 3.4 dB
    from 24.25 GHz (accuracy of declared beams, 3GPP TS 38.104 clause 9.2, from memory).

    Worked example
    320 W is 55.05 dBm; with 24.5 dBi the EIRP is 79.55 dBm. A claim of 82.5 dBm needs 27.45 dBi: it does not
    fit, and would if both polarisations had been added once more (3.01 dB).
    """
    claimed, notes = _claimed_dbm(eirp, erp)
    stated = eirp or erp
    if stated is None:
        return None
    if claimed is None:
        return _of_a_part(stated)
    power = transmit_power(case.panel, case.band)
    if power is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("conducted_power",))
    low, high = _eirp_span(case, power, feed_loss)
    slack = max(half_digit(stated), stated.tolerance or 0.0)
    excess = claimed - slack - high
    short = low - claimed - slack
    middle = float(dbm(power.nominal_w)) + gain.nominal
    return Judgement(
        verdict=_eirp_verdict(case, stated, excess, short),
        summary=_eirp_summary(f"{claimed:.2f} dBm ({stated.where})", low, high, excess, short),
        claimed=Amount(round(claimed, 3), "dBm"),
        expected=Interval(round(low, 3), round(high, 3), "dBm"),
        working=(
            power.step,
            _level(power),
            Step(
                "Power plus gain",
                f"{dbm(power.nominal_w):.2f} dBm + {gain.nominal:.2f} dBi",
                _r(middle),
                "dBm",
            ),
            Step(
                "Gain the claim needs",
                f"{claimed:.2f} dBm − {dbm(power.nominal_w):.2f} dBm",
                _r(claimed - dbm(power.nominal_w)),
                "dBi",
            ),
        ),
        assumptions=(
            *power.assumptions,
            *notes,
            "Average power; gain of one polarisation; no loss between power and gain beyond a stated one.",
        ),
        question="Please state whether the EIRP is average or peak, for both polarisations together, and for "
        "which beam; and the power and gain it is made of.",
        used=power.readings,
    )


def _claimed_dbm(eirp: Reading | None, erp: Reading | None) -> tuple[float | None, tuple[str, ...]]:
    stated = eirp or erp
    if stated is None:
        return None, ()
    level, notes = stated.nominal, []
    if eirp is None:
        level += HALF_WAVE_DIPOLE_DBI
        notes.append("EIRP is the stated ERP plus 2.15 dB.")
    parts = parts_of_total(stated)
    if parts is None:
        return None, ()
    count, of = parts
    if count > 1:
        level += 10 * math.log10(count)
        notes.append(f"The figure is for one of {count:g} {of}; {10 * math.log10(count):.2f} dB are added.")
    return level, tuple(notes)


def _of_a_part(stated: Reading) -> Judgement:
    """Where the words say that the figure is no total, and not how many parts make one."""
    return Judgement(
        verdict=Fit.NOT_JUDGED,
        summary=f"The EIRP of {claim(stated)} is stated for a part of the panel's power, not for all carriers"
        " and ports together: not held against the total power, and not used for exposure.",
        question="Please state the EIRP of all carriers, ports and both polarisations together"
        f" ({stated.where}).",
        used=(stated,),
    )


def _eirp_span(case: Case, power: TransmitPower, feed_loss: Reading | None) -> tuple[float, float]:
    stated = case.panel.all("gain", case.band)
    gains = [g for g in stated if "angle_deg" not in g.at] or stated
    lowest = min(g.low - (0.0 if g.tolerance else half_digit(g)) for g in gains)
    highest = max(g.high + (0.0 if g.tolerance else half_digit(g)) for g in gains)
    loss_db = feed_loss.high if feed_loss else 0.0
    floor_w = max(power.low_w, power.nominal_w / 10)
    return float(dbm(floor_w)) + lowest - loss_db, float(dbm(power.high_w)) + highest


def _declared_accuracy_db(case: Case) -> float:
    """How far a declared minimum may lie below the rated EIRP [dB]: accuracy of TS 38.104 clause 9.2."""
    kind = "2-O" if case.band is not None and case.band[0] >= _MILLIMETRE_WAVE_MHZ else "1-O"
    rows = (c for c in power_classes() if "EIRP accuracy" in c.quantity and kind in c.equipment)
    return next((c.limit for c in rows if c.limit is not None), _DOUBT_DB)


def _eirp_verdict(case: Case, stated: Reading, excess: float, short: float) -> Fit:
    allowed_short = _declared_accuracy_db(case) if stated.sense is Sense.MIN else _DOUBT_DB
    if excess > _MISFIT_DB:
        return Fit.DOES_NOT_FIT
    return Fit.DOUBTFUL if excess > _DOUBT_DB or short > allowed_short else Fit.FITS


def _eirp_summary(claimed: str, low: float, high: float, excess: float, short: float) -> str:
    stands = f"The EIRP of {claimed}"
    span = f"{low:.2f} to {high:.2f} dBm that power and gain give"
    if excess > _DOUBT_DB:
        return f"{stands} lies {excess:.2f} dB above the {span}."
    if short > _DOUBT_DB:
        return (
            f"{stands} lies {short:.2f} dB below the {span}; an exposure distance from it would be too short."
        )
    return f"{stands} agrees with the {span}."


@check(
    "erp-agrees-with-eirp",
    "ERP agrees with EIRP",
    needs=("erp",),
    optional=("eirp",),
    source="ITU Radio Regulations Nos. 1.161 and 1.162; gain of a half-wave dipole 2.15 dBi (ITU-R V.573)",
)
def erp_agrees_with_eirp(erp: Reading, eirp: Reading | None) -> Judgement | None:
    """Holds ERP against EIRP: the same power against two reference antennas.

    Formula
    EIRP [dBm] − ERP [dBm] = 2.15 dB

    Assumptions
    Both figures are for the same power, beam and polarisations. Half of the last printed digit of both and
    0.05 dB for 2.1 or 2.2 dB in use are allowed for.

    Worked example
    An ERP of 61 dBm beside an EIRP of 61 dBm: the EIRP must be 63.15 dBm, so the pair does not fit. Confusing
    the two changes an exposure distance by 28 %.
    """
    if eirp is None:
        return None
    slack = half_digit(eirp) + half_digit(erp) + 0.05
    expected = erp.nominal + HALF_WAVE_DIPOLE_DBI
    off = eirp.nominal - expected
    fits = abs(off) <= slack
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOES_NOT_FIT,
        summary=f"EIRP {claim(eirp)} and ERP {claim(erp)} differ by "
        f"{eirp.nominal - erp.nominal:.2f} dB; the two references differ by 2.15 dB.",
        claimed=Amount(eirp.nominal, "dBm"),
        expected=Interval(_r(expected - slack), _r(expected + slack), "dBm"),
        working=(Step("EIRP of the stated ERP", f"{erp.nominal:g} dBm + 2.15 dB", _r(expected), "dBm"),),
        assumptions=("Both figures are for the same power, beam and polarisations.",),
        question="Please state EIRP and ERP for the same power and beam.",
    )


@check(
    "radiated-power-below-conducted",
    "Total radiated power fits conducted power",
    needs=("trp",),
    optional=("feed_loss",),
    about=("trp",),
    source="conservation of energy; 3GPP TS 38.104 clause 3.1, total radiated power",
)
def radiated_power_below_conducted(case: Case, trp: Reading, feed_loss: Reading | None) -> Judgement | None:
    """Holds the total radiated power against the power fed in: less by the losses, never more.

    Formula
    TRP [dBm] = P [dBm] − L [dB], L from 0 to 3 dB unless stated

    Assumptions
    Ohmic and mismatch losses of a panel lie below 3 dB (common practice). Total radiated power has no gain
    in it: a figure near the EIRP is one. Half of the last printed digit is allowed for.

    Worked example
    320 W is 55.05 dBm, so TRP lies between 52.05 and 55.05 dBm. A TRP of 58 dBm does not fit.
    """
    power = transmit_power(case.panel, case.band)
    if power is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("conducted_power",))
    loss_db = feed_loss.high if feed_loss else _LARGEST_LOSS_DB
    low, high = float(trp_dbm(power.low_w, loss_db)), float(dbm(power.high_w))
    excess, short = trp.nominal - half_digit(trp) - high, low - trp.nominal - half_digit(trp)
    verdict = Fit.DOES_NOT_FIT if excess > 0.1 else Fit.DOUBTFUL if short > 0.3 else Fit.FITS
    where = (
        "above the power fed in"
        if excess > 0.1
        else "further below it than usual losses"
        if short > 0.3
        else ""
    )
    return Judgement(
        verdict=verdict,
        summary=f"A total radiated power of {claim(trp)} "
        + (f"lies {where}." if where else f"agrees with {dbm(power.nominal_w):.2f} dBm fed in.")
        + f" Expected {low:.2f} to {high:.2f} dBm.",
        claimed=Amount(trp.nominal, "dBm"),
        expected=Interval(_r(low), _r(high), "dBm"),
        working=(
            power.step,
            _level(power),
            Step("With the largest loss", f"{dbm(power.low_w):.2f} dBm − {loss_db:g} dB", _r(low), "dBm"),
        ),
        assumptions=(*power.assumptions, f"Losses of 0 to {loss_db:g} dB."),
        question="Please state whether this figure is total radiated power or EIRP, and the power fed in.",
        used=power.readings,
    )


def _r(value: object) -> float:
    return round(float(value), 3)  # type: ignore[arg-type]


def _level(power: TransmitPower) -> Step:
    formula = f"10·log10({power.nominal_w:.5g}) + 30"
    return Step("Total power as a level", formula, _r(dbm(power.nominal_w)), "dBm")
