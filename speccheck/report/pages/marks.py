"""The look of each verdict: word, symbol and tone, so that none depends on colour."""

from __future__ import annotations

from dataclasses import dataclass

from speccheck.records import Compliance, Fit, Level, Outcome


@dataclass(frozen=True, slots=True)
class Mark:
    """A verdict as printed: `tone` names a colour of the style sheet (good, near, bad, open)."""

    word: str
    symbol: str
    tone: str
    meaning: str


FITS = {
    Fit.FITS: Mark("fits", "=", "good", "the claim lies in the interval that physics and arithmetic allow"),
    Fit.DOUBTFUL: Mark("doubtful", "≈", "near", "possible only with favourable assumptions; ask"),
    Fit.DOES_NOT_FIT: Mark(
        "does not fit", "≠", "bad", "these figures, read this way, cannot all be true; ask"
    ),
    Fit.NOT_JUDGED: Mark("not judged", "○", "open", "a figure that the check needs is missing or ambiguous"),
}

COMPLIANCE = {
    Compliance.MEETS: Mark("meets", "✓", "good", "the offered figure is inside the limit"),
    Compliance.MEETS_NARROWLY: Mark(
        "meets narrowly", "△", "near", "inside the limit by less than the guard band"
    ),
    Compliance.FAILS_NARROWLY: Mark(
        "fails narrowly", "▽", "near", "outside the limit by less than the guard band"
    ),
    Compliance.FAILS: Mark("fails", "✗", "bad", "the offered figure is outside the limit"),
    Compliance.DECLARED_ONLY: Mark("declared only", "◇", "open", "a statement without a figure to judge"),
    Compliance.NOT_STATED: Mark("not stated", "–", "open", "no cell of the offer answers this requirement"),
    Compliance.NOT_JUDGED: Mark(
        "not judged", "○", "open", "wording or figure cannot be judged; never a pass"
    ),
    Compliance.DEVIATION_ACCEPTED: Mark(
        "deviation accepted", "◆", "near", "outside the limit; the buyer has accepted it"
    ),
}

OUTCOMES = {
    Outcome.ACCEPTABLE: Mark("acceptable", "✓", "good", "no mandatory requirement fails, nothing to clarify"),
    Outcome.CLARIFY: Mark("clarify", "?", "near", "questions must be answered before a decision"),
    Outcome.REJECT: Mark("reject", "✗", "bad", "a mandatory requirement fails"),
}

LEVELS = {
    Level.MANDATORY: "a failure rejects the offer",
    Level.DESIRABLE: "counts for ranking; a miss never rejects",
    Level.INFORMATION: "asked for the record; not judged as pass or fail",
}


def mark_for(word: Fit | Compliance | Outcome) -> Mark:
    """The printed mark of a verdict word of any of the three scales."""
    if isinstance(word, Fit):
        return FITS[word]
    if isinstance(word, Compliance):
        return COMPLIANCE[word]
    return OUTCOMES[word]
