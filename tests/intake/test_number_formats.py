"""Number formats against openpyxl's reading of them and ECMA-376-1, 18.8.30 and 18.8.31."""

from __future__ import annotations

import datetime

import pytest
from hypothesis import given
from hypothesis import strategies as st
from openpyxl.styles.numbers import BUILTIN_FORMATS, is_date_format

from speccheck.intake.files.number_formats import BUILT_IN, date_of_serial, date_of_text, shows_date

_PIECES = ("0", "0.0", "#,##0", "d", "mmm", "yy", "h:mm", " ", "-", '"dBm"', '"d"', "[Red]", "[$-409]", "[h]")


def test_built_in_formats_are_those_of_the_standard() -> None:
    assert {number: code for number, code in BUILTIN_FORMATS.items() if number} == BUILT_IN


@given(st.lists(st.sampled_from(_PIECES), min_size=1, max_size=6).map("".join))
def test_dates_are_recognised_as_openpyxl_does(number_format: str) -> None:
    assert shows_date(number_format) == is_date_format(number_format)


@pytest.mark.parametrize(
    "number_format", ['0.0" m/s; held"', r"0.0\ \d\B\i", "0.0_d", "0.0*s", "General", ""]
)
def test_letters_that_are_shown_as_they_stand_make_no_date(number_format: str) -> None:
    # 18.8.31: quoted, escaped, padding and filling characters are literal
    assert not shows_date(number_format)


def test_serial_numbers_count_from_either_epoch() -> None:
    # 18.17.4.1: day 1 of the 1900 system is 1 January 1900, day 0 of the 1904 system is 1 January 1904
    first = date_of_serial(1, counts_from_1904=False)
    later = date_of_serial(1462, counts_from_1904=True)
    assert (str(first), str(later)) == ("1900-01-01 00:00:00", "1908-01-02 00:00:00")


def test_a_length_of_time_is_no_date() -> None:
    assert date_of_text("2024-02-29") == datetime.date(2024, 2, 29)
    with pytest.raises(ValueError, match="length of time"):
        date_of_text("PT3H")
