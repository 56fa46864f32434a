"""The words of the program: one enumeration a scale, never swapped."""

from __future__ import annotations

from enum import StrEnum


class Sense(StrEnum):
    """What the sign or word beside a figure says it bounds."""

    NOMINAL = "nominal"
    MIN = "min"
    MAX = "max"


class Status(StrEnum):
    """A cell that speaks about a parameter without giving a figure."""

    MISSING = "missing"
    NOT_APPLICABLE = "not applicable"
    TO_BE_ADVISED = "to be advised"
    REFERRED = "referred"
    DECLARED = "declared"


class Fit(StrEnum):
    """Verdict of physics and arithmetic on a claim."""

    FITS = "fits"
    DOUBTFUL = "doubtful"
    DOES_NOT_FIT = "does not fit"
    NOT_JUDGED = "not judged"


FIT_GRAVITY = {Fit.FITS: 0, Fit.NOT_JUDGED: 0, Fit.DOUBTFUL: 1, Fit.DOES_NOT_FIT: 2}


class Compliance(StrEnum):
    """Verdict of a tender requirement on an offer (the middle pair after ILAC-G8:09/2019)."""

    MEETS = "meets"
    MEETS_NARROWLY = "meets narrowly"
    FAILS_NARROWLY = "fails narrowly"
    FAILS = "fails"
    DECLARED_ONLY = "declared only"
    NOT_STATED = "not stated"
    NOT_JUDGED = "not judged"
    DEVIATION_ACCEPTED = "deviation accepted"


PASSED = (Compliance.MEETS, Compliance.MEETS_NARROWLY, Compliance.DEVIATION_ACCEPTED)
FAILED = (Compliance.FAILS, Compliance.FAILS_NARROWLY)
OPEN = (Compliance.DECLARED_ONLY, Compliance.NOT_STATED, Compliance.NOT_JUDGED)

GRAVITY = (
    Compliance.FAILS,
    Compliance.FAILS_NARROWLY,
    Compliance.NOT_STATED,
    Compliance.DECLARED_ONLY,
    Compliance.NOT_JUDGED,
    Compliance.DEVIATION_ACCEPTED,
    Compliance.MEETS_NARROWLY,
    Compliance.MEETS,
)
"""Verdicts from the one that weighs most to the one that weighs least."""


class Outcome(StrEnum):
    """What a panel's findings and requirements add up to."""

    ACCEPTABLE = "acceptable"
    CLARIFY = "clarify"
    REJECT = "reject"


class Level(StrEnum):
    """Weight of a requirement."""

    MANDATORY = "mandatory"
    DESIRABLE = "desirable"
    INFORMATION = "information"
