"""What answers of a check have in common is said once, and only that."""

from __future__ import annotations

from speccheck.records import Convention, Finding, Fit
from speccheck.report.pages.shared import common_bases, named_reading, named_readings


def answer(check: str = "gain", verdict: Fit = Fit.FITS, source: str = "a table", **more: object) -> Finding:
    return Finding(check=check, title=check.title(), verdict=verdict, summary="", source=source, **more)  # type: ignore[arg-type]


def test_only_assumptions_of_every_answer_are_common() -> None:
    low = answer(assumptions=("loss 0.5 dB", "tilt 2°", "uniform weights"))
    high = answer(assumptions=("uniform weights", "loss 0.5 dB", "tilt 8°"))
    basis = common_bases([low, high])["gain"]
    assert basis.assumptions == ("loss 0.5 dB", "uniform weights")
    assert (basis.rest(low), basis.rest(high)) == (("tilt 2°",), ("tilt 8°",))


def test_nothing_is_lost_between_the_common_and_the_own() -> None:
    answers = [answer(assumptions=tuple(text)) for text in ("abc", "bcd", "cab")]
    basis = common_bases(answers)["gain"]
    for one in answers:
        assert sorted((*basis.assumptions, *basis.rest(one))) == sorted(one.assumptions)


def test_a_check_that_answered_once_has_no_common_basis() -> None:
    assert common_bases([answer("gain"), answer("eirp")]) == {}


def test_answers_of_two_sources_share_nothing() -> None:
    assert common_bases([answer(source="a table"), answer(source="a handbook")]) == {}


def test_an_answer_without_a_verdict_does_not_count() -> None:
    assert common_bases([answer(), answer(verdict=Fit.NOT_JUDGED)]) == {}


def test_an_innocent_reading_is_listed_once_whatever_value_it_gives() -> None:
    halves = Convention("half of the width", 4.0, "deg", repairs=("beamwidth",), leaves=("gain",))
    again = Convention("half of the width", 5.0, "deg", repairs=("beamwidth",), leaves=("gain",))
    less = Convention("half of the width", 5.0, "deg", repairs=("beamwidth",))
    plain = Convention("power of one port", 40.0, "W")
    listed = named_readings([answer(conventions=(halves, plain)), answer(conventions=(again, less))])
    assert listed == {named_reading(halves): 1, named_reading(less): 2}
    assert named_reading(again) == named_reading(halves)
