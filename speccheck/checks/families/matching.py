"""Matching and isolation: one quantity stated twice, mismatch loss, which ports an isolation is between."""

from __future__ import annotations

import re

from speccheck.checks.cell_text import half_digit, words
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
from speccheck.physics.decibels import wavelength_m
from speccheck.physics.matching import mismatch_loss_db, return_loss_db
from speccheck.records import Amount, Fit, Interval, Reading, Step

_TYPICAL = re.compile(r"\bt[yi]p(?:\.|ic|isch|\b)")
_PAIR_NAMED = re.compile(
    r"cross|intra|inter|pol|\+\s*45|between (bands|columns|arrays)|same (band|column)|co-"
)
_CLOSE_COLUMNS_WL = 0.6
_HIGH_BETWEEN_COLUMNS_DB = 28.0
_BEYOND_MEASURED_DB = 50.0
_HIGH_UNNAMED_DB = 40.0
_MOST_PORTS = 1024


@check(
    "vswr-matches-return-loss",
    "VSWR matches return loss",
    needs=(),
    optional=("vswr", "return_loss"),
    about=("return_loss",),
    source="D. M. Pozar, Microwave Engineering, ch. 2: reflection coefficient, standing-wave ratio",
)
def vswr_matches_return_loss(
    vswr: Reading | None,
    return_loss: Reading | None,
) -> Judgement | None:
    """Holds VSWR against return loss: the same reflection stated twice.

    Formula
    |r| = (s − 1)/(s + 1); RL [dB] = −20·log10|r|; mismatch loss [dB] = −10·log10(1 − |r|²)

    Assumptions
    Both figures are for the worst port. Half of the last printed digit of the return loss and 0.05 dB are
    allowed for; a pair that needs the rounding of the VSWR as well is doubtful, one beyond that does not fit.
    Where one figure alone is stated there is nothing to compare. If only one of the two is typical it may be
    the better one; if it is the worse one the pair is doubtful.

    Worked example
    VSWR 1.5 is 13.98 dB and costs 0.18 dB, so 14 dB beside it fits. VSWR 1.3 is 17.69 dB; 14 dB beside it is
    VSWR 1.50, and the pair does not fit.
    """
    if vswr is None or return_loss is None:
        return None
    claimed, exact = return_loss.nominal, _loss_of(vswr.nominal)
    slack = half_digit(return_loss) + 0.05
    low, high = exact - slack, exact + slack
    verdict = _matching_verdict(vswr, return_loss, claimed - exact, slack)
    way = "less" if claimed < exact else "more"
    off = "agrees with" if verdict is Fit.FITS else f"is {abs(claimed - exact):.2f} dB {way} than"
    typical = "; one of the two is typical" if _typical(vswr) != _typical(return_loss) else ""
    return Judgement(
        verdict=verdict,
        summary=f"Return loss {claim(return_loss)} {off} the {exact:.2f} dB of VSWR {claim(vswr)}{typical}.",
        claimed=Amount(claimed, "dB"),
        expected=Interval(round(low, 3), round(high, 3), "dB"),
        working=(
            Step(
                "Return loss of the VSWR",
                f"−20·log10(({vswr.nominal:g} − 1)/({vswr.nominal:g} + 1))",
                round(exact, 3),
                "dB",
            ),
            Step(
                "Mismatch loss of the VSWR",
                f"10·log10 of 1/(1 − |r|²) at {vswr.nominal:g}",
                round(float(mismatch_loss_db(vswr.nominal)), 3),
                "dB",
            ),
        ),
        assumptions=(
            "Both figures are for the worst port; rounding of the last printed digits allowed for.",
        ),
        question="Please state the guaranteed maximum VSWR, and whether either figure is typical.",
    )


def _matching_verdict(vswr: Reading, return_loss: Reading, off_db: float, slack_db: float) -> Fit:
    if abs(off_db) <= slack_db:
        return Fit.FITS
    if _typical(vswr) != _typical(return_loss):
        typical_is_better = off_db < 0 if _typical(vswr) else off_db > 0
        return Fit.FITS if typical_is_better else Fit.DOUBTFUL
    exact = _loss_of(vswr.nominal)
    rounded = half_digit(vswr)
    lowest, highest = _loss_of(vswr.nominal + rounded) - slack_db, _loss_of(vswr.nominal - rounded) + slack_db
    return Fit.DOUBTFUL if lowest <= exact + off_db <= highest else Fit.DOES_NOT_FIT


def _loss_of(vswr: float) -> float:
    """Return loss [dB] of a VSWR; that of a match within rounding stays finite."""
    return float(return_loss_db(max(vswr, 1.0 + 1e-6)))


def _typical(reading: Reading) -> bool:
    return bool(_TYPICAL.search(words(reading))) or reading.at.get("typical") == 1


@check(
    "isolation-plausible",
    "Isolation is plausible for the ports it is between",
    needs=("port_isolation",),
    optional=("rf_ports", "transceivers", "array_columns", "subarray_columns", "horizontal_element_spacing"),
    about=("port_isolation",),
    source="coupling of close columns 15 to 28 dB (common practice); n(n − 1)/2 port pairs",
)
def isolation_plausible(
    case: Case,
    *,
    port_isolation: Reading,
    rf_ports: Reading | None,
    transceivers: Reading | None,
    array_columns: Reading | None,
    subarray_columns: Reading | None,
    horizontal_element_spacing: Reading | None,
) -> Judgement | None:
    """Asks which ports an isolation is between where the figure is high for the closest pair.

    Formula
    pairs = n·(n − 1)/2; spacing of driven columns = column spacing · columns in a sub-array, in wavelengths

    Assumptions
    A figure that names no ports is taken for the worst pair. Columns driven apart and up to 0.6 λ from each
    other couple at 15 to 28 dB (common practice): 28 dB or more between them is doubtful unless the ports are
    named. Two polarisations of one column reach about 30 dB: from 40 dB on the figure is doubtful where no
    ports are named, and from 50 dB in any case (common practice).

    Worked example
    8 ports have 28 pairs. Four columns 40 mm apart at 3600 MHz stand 0.48 λ from each other: 30 dB for the
    worst pair is doubtful; for the two polarisations of one column it would be usual.
    """
    claimed = port_isolation.nominal
    counted = rf_ports or transceivers
    ports = int(counted.nominal) if counted else None
    pitch_wl = _driven_pitch_wl(case, ports, array_columns, subarray_columns, horizontal_element_spacing)
    named = bool(_PAIR_NAMED.search(words(port_isolation))) or port_isolation.at.get("same_column") == 1
    close = pitch_wl is not None and pitch_wl <= _CLOSE_COLUMNS_WL and not named
    highest = _HIGH_BETWEEN_COLUMNS_DB if close else _BEYOND_MEASURED_DB if named else _HIGH_UNNAMED_DB
    doubtful = claimed >= highest
    about = (
        f"for columns {pitch_wl:.2f} λ apart when the ports are not named"
        if close
        else "for any two ports of a panel"
    )
    return Judgement(
        verdict=Fit.DOUBTFUL if doubtful else Fit.FITS,
        summary=f"An isolation of {claim(port_isolation)} is {'high' if doubtful else 'usual'} {about}.",
        claimed=Amount(claimed, "dB"),
        expected=Interval(None, highest, "dB"),
        working=_isolation_steps(ports, pitch_wl),
        assumptions=(
            "Taken for the ports named."
            if named
            else "No ports are named; taken for the worst pair of ports.",
        ),
        question="Please state the isolation of the worst pair of ports, in which bands and over all tilts, "
        "and which pairs the figure is for.",
    )


def _isolation_steps(ports: int | None, pitch_wl: float | None) -> tuple[Step, ...]:
    steps = []
    if ports and 1 < ports <= _MOST_PORTS:
        steps.append(Step("Pairs of ports", f"{ports} × {ports - 1} / 2", ports * (ports - 1) / 2))
    if pitch_wl is not None:
        steps.append(
            Step(
                "Spacing of driven columns", "spacing / wavelength, lowest frequency", round(pitch_wl, 3), "λ"
            )
        )
    return tuple(steps)


def _driven_pitch_wl(
    case: Case,
    ports: int | None,
    columns: Reading | None,
    grouped: Reading | None,
    spacing: Reading | None,
) -> float | None:
    """Spacing [wavelengths] of columns that have ports of their own; None where there are none."""
    if ports is None or ports < 4 or columns is None or columns.nominal < 2 or spacing is None:
        return None
    tied = grouped.nominal if grouped else 1.0
    if tied >= columns.nominal:
        return None
    low_mhz = case.band[0] if case.band else min((b[0] for b in case.panel.bands), default=None)
    if low_mhz is None:
        return None
    return spacing.nominal * tied / float(wavelength_m(low_mhz * 1e6))
