"""A margin to a verdict: guard band, equality and rounding, as fixed before opening.

The four outcomes follow ILAC-G8:09/2019 section 4.2.3 (guard band, conditional pass and fail; from
memory); a guard band of zero gives plain acceptance.
"""

from __future__ import annotations

from dataclasses import dataclass

from speccheck.records import Compliance
from speccheck.records.demands import margin_unit
from speccheck.records.words import FAILED

_SLACK = 1e-9
"""Share of the figures below which two floats count as equal."""


@dataclass(frozen=True, slots=True)
class Grade:
    """Verdict, margin in the good direction, and what decided where that is not plain."""

    verdict: Compliance
    margin: float | None = None
    note: str = ""


def settled(margin: float, scale: float) -> float:
    """Margin with float noise of unit conversion taken out: zero where the figures are equal."""
    return 0.0 if abs(margin) <= _SLACK * max(1.0, abs(scale)) else round(margin, 9)


def graded(
    margin: float, guard: float, unit: str = "", *, equal_meets: bool = True, equal_note: str = ""
) -> Grade:
    """Grade of one figure against one limit.

    Parameters
    ----------
    margin : figure against limit, positive on the good side, in the unit of the limit
    guard : guard band in the same unit, not negative
    unit : that unit, for the words
    equal_meets : whether a figure exactly at the limit meets it
    equal_note : what to say where equality decided
    """
    within = f"within the guard band of {guard:g} {margin_unit(unit)}".rstrip()
    if margin == 0 and (not equal_meets or equal_note):
        if equal_meets:
            return Grade(Compliance.MEETS_NARROWLY, 0.0, equal_note)
        verdict = Compliance.FAILS_NARROWLY if guard > 0 else Compliance.FAILS
        return Grade(verdict, 0.0, equal_note or "exactly at a limit that must be exceeded")
    if margin >= guard:
        return Grade(Compliance.MEETS, margin)
    if margin >= 0:
        return Grade(Compliance.MEETS_NARROWLY, margin, within)
    if margin >= -guard and guard > 0:
        return Grade(Compliance.FAILS_NARROWLY, margin, within)
    return Grade(Compliance.FAILS, margin)


def rounded(grade: Grade, allowance: float) -> Grade:
    """The grade once half a unit of the last digit printed in the offer is allowed for.

    A shortfall within it is a narrow pass, after conversion of units as in the offer's own unit. A shortfall
    of the whole half is none: the limit itself would have been printed one digit higher.
    """
    short = grade.verdict in FAILED and grade.margin is not None and grade.margin < 0
    if not short or (grade.margin or 0.0) + allowance <= _SLACK:
        return grade
    note = f"ROUND: short by less than half a unit of the last digit printed ({allowance:.2g})"
    return Grade(Compliance.MEETS_NARROWLY, grade.margin, note)
