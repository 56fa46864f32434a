"""What rows and findings add up to, and what an accepted deviation changes. Expectations: only a failed
mandatory requirement rejects, nothing missing passes, deviations count until they expire (common
practice)."""

from __future__ import annotations

import pytest

from speccheck.records import CellRef, Compliance, Deviation, Finding, Fit, Level, Outcome, Status
from speccheck.tender.judging import judge
from speccheck.tender.outcome import outcome
from tender.panels import answers, demand, panel, says, tender

GAIN = demand("gain", "≥", 17.0)


def _finding(verdict: Fit) -> Finding:
    return Finding(
        check="vswr-matches-return-loss", title="VSWR matches return loss", verdict=verdict, summary=""
    )


@pytest.mark.parametrize(
    ("level", "gain", "expected"),
    [
        (Level.MANDATORY, 17.5, Outcome.ACCEPTABLE),
        (Level.MANDATORY, 17.1, Outcome.ACCEPTABLE),
        (Level.MANDATORY, 16.9, Outcome.REJECT),
        (Level.MANDATORY, 16.0, Outcome.REJECT),
        (Level.MANDATORY, None, Outcome.CLARIFY),
        (Level.DESIRABLE, 16.0, Outcome.ACCEPTABLE),
        (Level.DESIRABLE, None, Outcome.ACCEPTABLE),
        (Level.INFORMATION, 16.0, Outcome.ACCEPTABLE),
    ],
)
def test_only_a_failed_mandatory_row_rejects(level: Level, gain: float | None, expected: Outcome) -> None:
    said = [] if gain is None else [says("gain", gain, f"{gain:.2f}")]
    rules = tender(demand("gain", "≥", 17.0, level=level), guard_bands={"gain": 0.2})
    assert outcome((), judge(rules, panel(*said), ()))[0] is expected


@pytest.mark.parametrize(
    ("verdict", "expected"),
    [
        (Fit.FITS, Outcome.ACCEPTABLE),
        (Fit.NOT_JUDGED, Outcome.ACCEPTABLE),
        (Fit.DOUBTFUL, Outcome.CLARIFY),
        (Fit.DOES_NOT_FIT, Outcome.CLARIFY),
    ],
)
def test_a_misfit_asks_and_never_rejects(verdict: Fit, expected: Outcome) -> None:
    assert outcome((_finding(verdict),), ())[0] is expected


def test_many_good_rows_never_average_a_failed_one_away() -> None:
    """A difference of two levels is in dB, whatever their reference (ITU-R V.574-5, from memory)."""
    good = [demand("gain", "≥", float(g), clause=str(g)) for g in range(1, 17)]
    rows = judge(tender(*good, demand("gain", "≥", 18.0, clause="18")), panel(says("gain", 17.0)), ())
    verdict, reasons = outcome((), rows)
    assert verdict is Outcome.REJECT
    assert reasons == ("clause 18, Gain: mandatory, fails by 1 dB",)


def test_a_statement_without_figure_is_never_a_pass() -> None:
    rows = judge(tender(GAIN), panel(answers("gain", "fully compliant", Status.DECLARED)), ())
    assert outcome((), rows)[0] is Outcome.CLARIFY


def _deviation(offer: str, expires: str = "2026-12-31", clause: str = "1") -> Deviation:
    where = CellRef("tender.xlsx", "Deviations", "A2")
    return Deviation(
        where=where, clause=clause, offer=offer, reason="short mast", approver="radio", expires=expires
    )


@pytest.mark.parametrize(
    ("deviation", "counts"),
    [
        (_deviation("Aster 8"), True),
        (_deviation("ASTER 8 "), True),
        (_deviation("aster.xlsx"), True),
        (_deviation("aster"), True),
        (_deviation("Nordwind"), True),
        (_deviation("Birch 4"), False),
        (_deviation("Aster 8", clause="2"), False),
        (_deviation("Aster 8", expires="2026-06-01"), True),
        (_deviation("Aster 8", expires="2026-05-31"), False),
    ],
)
def test_a_deviation_counts_for_its_clause_and_offer_until_it_expires(
    deviation: Deviation, counts: bool
) -> None:
    rules = tender(GAIN, deviations=(deviation,), today="2026-06-01")
    (row,) = judge(rules, panel(says("gain", 16.0), says("manufacturer", "Nordwind")), ())
    assert (row.verdict is Compliance.DEVIATION_ACCEPTED) is counts
    assert (row.underlying is Compliance.FAILS) is counts
    assert outcome((), (row,))[0] is (Outcome.ACCEPTABLE if counts else Outcome.REJECT)
    if deviation.expires == "2026-05-31":
        assert "expired on 2026-05-31" in row.note


def test_a_passed_row_needs_no_deviation_and_an_undated_day_accepts_none() -> None:
    deviation = _deviation("Aster 8")
    (passed,) = judge(
        tender(GAIN, deviations=(deviation,), today="2026-06-01"), panel(says("gain", 18.0)), ()
    )
    (undated,) = judge(tender(GAIN, deviations=(deviation,)), panel(says("gain", 16.0)), ())
    assert (passed.verdict, undated.verdict) == (Compliance.MEETS, Compliance.FAILS)
