"""Passive intermodulation: dBc and dBm at the test power, order, sign, and what the test power flatters."""

from __future__ import annotations

import re

from speccheck.checks.cell_text import words
from speccheck.checks.registry import Judgement, check
from speccheck.checks.saying import claim
from speccheck.checks.stated_conditions import carrier_dbm
from speccheck.physics.intermodulation import at_carrier_dbc, relative_dbc
from speccheck.records import Amount, Fit, Interval, Reading, Step

_STANDARD_CARRIER_DBM = 43.0
_USUAL_DBC = (-165.0, -140.0)
_SLOPES = (2.5, 3.0)
_HIGHER_ORDER = re.compile(r"\b(5th|7th|9th|fifth|seventh|ninth|im[579]|pim[579]|5\. ?ord|7\. ?ord)")
_SIGNED = re.compile(r"[-−–]\s*\d{2,3}")


@check(
    "intermodulation-comparable",
    "Intermodulation is stated for comparable test power and order",
    needs=("passive_intermodulation",),
    optional=("pim_test_power", "max_power_per_port"),
    source="IEC 62037-1: two carriers of 20 W, third order (from memory); series of a weak non-linearity",
)
def intermodulation_comparable(
    passive_intermodulation: Reading,
    pim_test_power: Reading | None,
    max_power_per_port: Reading | None,
) -> Judgement | None:
    """Brings an intermodulation figure to two carriers of 43 dBm and holds it against what panels show.

    Formula
    level [dBc] = level [dBm] − carrier [dBm]; at 43 dBm: L + (n − 1)·(43 − carrier), slope n of 2.5 to 3

    Assumptions
    Third order. Without a stated test power two carriers of 43 dBm are taken, as IEC 62037-1 has it. Panels
    show -165 to -140 dBc there (common practice). A test power more than 1 dB below 43 dBm flatters the
    figure and is doubtful, unless no port of the panel is rated for 20 W. A higher order than the third is
    doubtful. A figure of -180 dBc or below at 43 dBm is under what test sets resolve and does not fit.

    Worked example
    -162 dBc at two carriers of 37 dBm is -150 to -153 dBc at 43 dBm: the lower power flatters the figure by 9
    to 12 dB. -110 dBm at 43 dBm is -153 dBc.
    """
    known = carrier_dbm(passive_intermodulation, pim_test_power)
    carrier = _STANDARD_CARRIER_DBM if known is None else known
    in_dbm = passive_intermodulation.unit == "dBm"
    stated = passive_intermodulation.nominal
    dbc = float(relative_dbc(stated, carrier)) if in_dbm else stated
    ends = sorted(float(at_carrier_dbc(dbc, carrier, _STANDARD_CARRIER_DBM, slope)) for slope in _SLOPES)
    rated_low = max_power_per_port is not None and max_power_per_port.high < 20.0
    small = rated_low or passive_intermodulation.at.get("tested_at_rating") == 1
    trouble, verdict = _trouble(passive_intermodulation, carrier, ends, small)
    span = f"{ends[0]:.1f} dBc" if ends[0] == ends[1] else f"{ends[0]:.1f} to {ends[1]:.1f} dBc"
    notes = [] if known is not None else ["Test power not stated; two carriers of 43 dBm (20 W) are taken."]
    if not in_dbm and not _SIGNED.search(passive_intermodulation.raw):
        notes.append("Written without its minus sign; read as a negative level.")
    return Judgement(
        verdict=verdict,
        summary=f"Intermodulation {claim(passive_intermodulation)} is {span} at two carriers of 43 dBm"
        + (f": {trouble}." if trouble else ", as panels usually show."),
        claimed=Amount(round(dbc, 3), "dBc"),
        expected=Interval(*_USUAL_DBC, "dBc"),
        working=_steps(stated, dbc, carrier, in_dbm, ends),
        assumptions=(
            *notes,
            "Third order unless another is stated.",
            "Slope of 2.5 to 3 dB per dB of carrier.",
        ),
        question="Please state the third-order level and its unit at two carriers of 43 dBm, worst port.",
    )


def _trouble(pim: Reading, carrier: float, ends: list[float], small_panel: bool) -> tuple[str, Fit]:
    if ends[1] <= -180:
        return "below what a test set resolves", Fit.DOES_NOT_FIT
    if _HIGHER_ORDER.search(words(pim)):
        return "a higher order than the third is stated, which lies lower", Fit.DOUBTFUL
    if carrier < _STANDARD_CARRIER_DBM - 1 and not small_panel:
        flattered = [(n - 1) * (_STANDARD_CARRIER_DBM - carrier) for n in _SLOPES]
        return (
            f"the lower test power flatters it by {flattered[0]:.0f} to {flattered[1]:.0f} dB",
            Fit.DOUBTFUL,
        )
    if ends[0] < _USUAL_DBC[0]:
        return "better than panels usually show", Fit.DOUBTFUL
    if ends[1] > _USUAL_DBC[1]:
        return "worse than panels usually show; the unit may be another", Fit.DOUBTFUL
    return "", Fit.FITS


def _steps(stated: float, dbc: float, carrier: float, in_dbm: bool, ends: list[float]) -> tuple[Step, ...]:
    steps = []
    if in_dbm:
        steps.append(
            Step("Relative to one carrier", f"{stated:g} dBm − {carrier:g} dBm", round(dbc, 3), "dBc")
        )
    else:
        steps.append(
            Step("Absolute level", f"{stated:g} dBc + {carrier:g} dBm", round(dbc + carrier, 3), "dBm")
        )
    if ends[0] != ends[1]:
        for slope in _SLOPES:
            level = dbc + (slope - 1) * (_STANDARD_CARRIER_DBM - carrier)
            formula = f"{dbc:g} + ({slope:g} − 1)·(43 − {carrier:g})"
            steps.append(Step(f"At 43 dBm, slope {slope:g}", formula, round(level, 3), "dBc"))
    return tuple(steps)
