"""The tender vetted before issue: rows that contradict each other or physics, each with the limiting rows.

Nothing here knows a bid. A finding says which rows cannot all be met, read as they are, and what to change.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import replace
from itertools import combinations

from speccheck.dictionary import parameters
from speccheck.physics.matching import return_loss_db
from speccheck.quantities import UnknownUnitError, convert
from speccheck.records import Finding, Fit, Interval, Level, Requirement, Step, Tender
from speccheck.records.demands import blocked
from speccheck.tender.attainable import attainability
from speccheck.tender.demanded import Demanded, demanded, named, overlap

_SAME_RETURN_LOSS_DB = 0.05
"""VSWR 1.5 and 14 dB are one demand rounded (13.98 dB)."""


def vet(tender: Tender) -> tuple[Finding, ...]:
    """Findings on the tender itself; empty where nothing was found."""
    rows = [row for r in tender.requirements if (row := demanded(r)) is not None]
    return (
        *_contradictions(rows),
        *_weaker_wishes(rows),
        *_mismatch_twice(rows),
        *_bands_beyond(tender.requirements),
        *attainability(rows, tender.requirements),
        *_unconfirmed(tender.requirements),
    )


def vetted(tender: Tender) -> Tender:
    """The tender with what vetting found beside what reading found."""
    return replace(tender, findings=(*tender.findings, *vet(tender)))


def _finding(
    slug: str, title: str, verdict: Fit, rows: Sequence[Requirement], *, summary: str, ask: str
) -> Finding:
    return Finding(
        check=slug,
        title=title,
        verdict=verdict,
        summary=summary,
        parameters=tuple(dict.fromkeys(r.parameter for r in rows if r.parameter)),
        question=ask,
        source="requirements of the tender held against each other",
        where=tuple(dict.fromkeys(r.where for r in rows)),
    )


def _contradictions(rows: Sequence[Demanded]) -> Iterator[Finding]:
    """Two mandatory rows of one parameter, place and band that leave no figure between them."""
    for one, other in _pairs(rows):
        low = max(one.low, other.low)
        high = min(one.high, other.high)
        binding = one.requirement.level is Level.MANDATORY and other.requirement.level is Level.MANDATORY
        if binding and low > high:
            summary = (
                f"{named(one.requirement)} and {named(other.requirement)} cannot both be met: "
                f"at least {low:g} and at most {high:g} {one.unit}".rstrip()
            )
            yield _finding(
                "tender-rows-contradict",
                "Requirements contradict each other",
                Fit.DOES_NOT_FIT,
                (one.requirement, other.requirement),
                summary=summary,
                ask="Change one of the rows.",
            )


def _weaker_wishes(rows: Sequence[Demanded]) -> Iterator[Finding]:
    """A desirable limit that the mandatory one already demands."""
    for one, other in _pairs(rows):
        levels = {one.requirement.level: one, other.requirement.level: other}
        must, wish = levels.get(Level.MANDATORY), levels.get(Level.DESIRABLE)
        if must is None or wish is None:
            continue
        if must.low >= wish.low and must.high <= wish.high:
            summary = f"{named(wish.requirement)} is desirable but no stricter than {named(must.requirement)}"
            yield _finding(
                "tender-wish-weaker-than-duty",
                "Desirable limit is no stricter than the mandatory one",
                Fit.DOUBTFUL,
                (must.requirement, wish.requirement),
                summary=summary,
                ask="Check the order of the two values; of VSWR the desirable one must be the smaller.",
            )


def _pairs(rows: Sequence[Demanded]) -> Iterator[tuple[Demanded, Demanded]]:
    """Pairs of rows on one parameter under overlapping conditions; capabilities have their own check."""
    judged = [row for row in rows if row.requirement.operator != "contains"]
    for one, other in combinations(judged, 2):
        if one.requirement.parameter == other.requirement.parameter and overlap(
            one.requirement, other.requirement
        ):
            yield one, other


def _mismatch_twice(rows: Sequence[Demanded]) -> Iterator[Finding]:
    """VSWR and return loss demanded apart, with limits that are not the same mismatch."""
    ratios = [row for row in rows if row.requirement.parameter == "vswr" and 1 < row.high < float("inf")]
    losses = [row for row in rows if row.requirement.parameter == "return_loss" and row.low > 0]
    for ratio in ratios:
        for loss in losses:
            implied = float(return_loss_db(ratio.high))
            if abs(implied - loss.low) <= _SAME_RETURN_LOSS_DB or not overlap(
                ratio.requirement, loss.requirement
            ):
                continue
            stricter = ratio if implied > loss.low else loss
            summary = (
                f"{named(ratio.requirement)} is {implied:.2f} dB return loss, {named(loss.requirement)} "
                f"demands {loss.low:g} dB; the stricter, clause {stricter.requirement.clause}, decides"
            )
            finding = _finding(
                "tender-mismatch-twice",
                "VSWR and return loss demand different mismatch",
                Fit.DOUBTFUL,
                (ratio.requirement, loss.requirement),
                summary=summary,
                ask="Demand one of the two, or make them the same mismatch.",
            )
            formula = f"-20 log10(({ratio.high:g} - 1)/({ratio.high:g} + 1))"
            step = Step(
                "Return loss of the VSWR",
                formula,
                implied,
                "dB",
            )
            yield replace(finding, working=(step,), expected=Interval(implied, implied, "dB"))


def _bands_beyond(requirements: Sequence[Requirement]) -> Iterator[Finding]:
    """Figures demanded in a band that no row of the tender demands to be covered."""
    spans = []
    for r in requirements:
        if r.parameter in ("frequency_range", "operating_bands") and isinstance(r.limit, tuple):
            try:
                spans.append(tuple(convert(edge, r.unit or "MHz", "MHz") for edge in r.limit))
            except UnknownUnitError:
                continue
    named_bands = any(r.parameter == "operating_bands" and isinstance(r.limit, str) for r in requirements)
    if not spans or named_bands:
        return
    for requirement in requirements:
        for low, high in requirement.bands:
            if high < 1e6 and low > 0 and not any(s[0] <= low and high <= s[1] for s in spans):
                summary = (
                    f"{named(requirement)} holds for {low:g}-{high:g} MHz, "
                    "which no row demands to be covered as a whole"
                )
                yield _finding(
                    "tender-band-not-demanded",
                    "Figures demanded outside the bands demanded",
                    Fit.DOUBTFUL,
                    (requirement,),
                    summary=summary,
                    ask="Add the band to the frequency row, or narrow the row.",
                )


def _unconfirmed(requirements: Sequence[Requirement]) -> Iterator[Finding]:
    """Mandatory rows that nobody has confirmed: their reading could reject an offer."""
    duties = (r for r in requirements if r.level is Level.MANDATORY and r.parameter in parameters())
    open_rows = [r for r in duties if not r.confirmed and not blocked(r.doubts)]
    if open_rows:
        clauses = ", ".join(dict.fromkeys(r.clause or str(r.where) for r in open_rows))
        yield _finding(
            "tender-readings-unconfirmed",
            "Readings of mandatory rows not confirmed",
            Fit.DOUBTFUL,
            open_rows,
            summary=f"mandatory rows whose reading nobody has confirmed: clauses {clauses}",
            ask="Compare wording and reading, then fill the column Confirmed.",
        )
