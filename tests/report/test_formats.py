"""How numbers are written; expectations by hand after the digits of report practice."""

from __future__ import annotations

import pytest

from speccheck.records import Amount, Interval
from speccheck.report.pages.formats import Numbers

POINT, COMMA = Numbers(), Numbers(decimal_comma=True)


@pytest.mark.parametrize(
    ("value", "unit", "written"),
    [
        (18.04, "dBi", "18.0 dBi"),  # gain to 0.1 dB
        (64.6, "deg", "65°"),  # angle to 1°
        (5.52, "deg", "5.5°"),
        (1.1493, "λ", "1.15 λ"),  # spacing to 0.01 λ
        (-153.0, "dBc", "−153 dBc"),
        (0.1281, "m", "128 mm"),
        (2.5, "m", "2.50 m"),
        ((60.0, 70.0), "deg", "60 to 70°"),
        (0.0, "W", "0 W"),
        (-0.04, "dB", "0.0 dB"),  # no negative zero
    ],
)
def test_computed_figures_carry_the_digits_the_data_support(value: float, unit: str, written: str) -> None:
    assert POINT.figure(value, unit).replace("\u202f", " ") == written


def test_a_stated_figure_keeps_every_digit() -> None:
    assert POINT.stated(1234.567, "W").replace("\u202f", " ") == "1234.57 W"
    assert POINT.amount(Amount(21.0, "dBi")).startswith("21.0")
    assert POINT.amount(Amount(21.25, "dBi")).startswith("21.25")


def test_the_decimal_sign_is_one_setting() -> None:
    assert COMMA.figure(18.04, "dBi").startswith("18,0")
    assert COMMA.interval(Interval(1.5, 2.5, "dB")).startswith("1,5 to 2,5")


@pytest.mark.parametrize(
    ("sentence", "written"),
    [
        ("21.0 dBi claimed; 18.1 to 19.8 dBi expected", "21,0 dBi claimed; 18,1 to 19,8 dBi expected"),
        ("clause 4.1 and TR 38.901 stay", "clause 4.1 and TR 38.901 stay"),
        ("the cell says '15.2 dBi'", "the cell says '15.2 dBi'"),
        ("0.85λ at 2.5°", "0,85λ at 2,5°"),
    ],
)
def test_sentences_follow_the_decimal_sign_and_quotes_do_not(sentence: str, written: str) -> None:
    assert COMMA.prose(sentence) == written
    assert POINT.prose(sentence) == sentence


def test_formulas_part_their_arguments_by_semicolons_beside_a_decimal_comma() -> None:
    assert COMMA.formula("10·log10(max(8.02, 0.8) × 1.10)") == "10·log10(max(8,02; 0,8) × 1,10)"


def test_open_intervals_say_which_side_binds() -> None:
    assert POINT.interval(Interval(None, 3.0, "dB")).startswith("at most 3.0")
    assert POINT.interval(Interval(3.0, None, "dB")).startswith("at least 3.0")


def test_margins_carry_their_sign() -> None:
    assert POINT.signed(0.3, "dB").startswith("+0.3")
    assert POINT.signed(-0.3, "dB").startswith("−0.3")
    assert POINT.signed(0.0, "dB").startswith("0.0")


@pytest.mark.parametrize(
    ("metres", "written"), [(5.01, "5.1"), (5.0, "5.0"), (0.301, "0.4"), (9.433981, "9.5")]
)
def test_compliance_distances_are_rounded_up(metres: float, written: str) -> None:
    # 5 m and 8 m together: √(25 + 64) = 9.43 m, printed as 9.5 m
    assert POINT.rounded_up(metres).startswith(written)


@pytest.mark.parametrize(
    ("order", "written"),
    [("iso", "2027-03-31"), ("day first", "31 March 2027"), ("month first", "March 31, 2027")],
)
def test_dates_follow_the_habit_and_name_the_month(order: str, written: str) -> None:
    assert Numbers(date_order=order).day("2027-03-31") == written
    assert Numbers(date_order=order).day("") == ""


@pytest.mark.parametrize(
    ("value", "unit", "shown"),
    [
        (12.5, "deg", "12.5°"),
        (26.55, "dBi", "26.55 dBi"),
        (11.0223, "kg", "11.0 kg"),
        ((59.0, 71.0), "deg", "59 to 71°"),
    ],
)
def test_what_a_bidder_offers_is_not_rounded_to_another_figure(value: object, unit: str, shown: str) -> None:
    assert POINT.offered(value, unit).replace("\u202f", " ") == shown


def test_halves_are_rounded_as_a_spreadsheet_rounds_them() -> None:
    # ISO 80000-1, rounding by rule B (from memory): of two equally near multiples the greater in magnitude.
    assert [POINT.plain(0.735, 2), POINT.plain(-0.735, 2), POINT.plain(12.5, 0)] == ["0.74", "−0.74", "13"]


def test_a_margin_keeps_the_half_degree_that_was_stated() -> None:
    assert POINT.signed(-46.5, "deg") == "−46.5°"


def test_sentences_carry_a_minus_sign_and_leave_what_was_quoted() -> None:
    assert POINT.prose("at -63° in 3400-3800 MHz, read '-3 dB'") == "at −63° in 3400-3800 MHz, read '-3 dB'"
