"""Numbers as their format shows them (ECMA-376-1, 18.8.31: quoted and escaped text is shown as it stands)."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from speccheck.quantities import read_cell

# number format, number, unit of the heading; value, unit and sense by eye
SHOWN = [
    ('"≥ "0', 28, "dB", (28.0, "dB", "min")),
    ('"<"0.0', 1.5, "", (1.5, "", "max")),
    ('0.0" dBi"', 17.5, "", (17.5, "dBi", "nominal")),
    ("0.0\\ \\m\\m", 1998.5, "", (1998.5, "mm", "nominal")),
    ("[Red]>0", 25, "dB", (25.0, "dB", "min")),
    ('"< "0;"< -"0', -153, "dBc", (-153.0, "dBc", "max")),
    ("0.0_);(0.0)", -150, "dBc", (-150.0, "dBc", "nominal")),
    ('0.0,"kW"', 2500, "", (2.5, "kW", "nominal")),
    ('"Var. "0', 17, "dBi", (17.0, "dBi", "nominal")),
]


@pytest.mark.parametrize(("number_format", "number", "unit", "expected"), SHOWN)
def test_a_number_means_what_its_format_shows(
    number_format: str, number: float, unit: str, expected: tuple[float, str, str]
) -> None:
    (found,) = read_cell(number, kind="number", unit=unit, number_format=number_format).quantities
    assert (found.value, found.unit, str(found.sense)) == expected


def test_a_tolerance_or_range_may_stand_in_the_format() -> None:
    (gain,) = read_cell(17.5, kind="number", number_format='0.0" ± 0.5 dBi"').quantities
    (scan,) = read_cell(60, kind="scan", number_format='"±"0"°"').quantities
    assert (gain.value, gain.tolerance, scan.value) == (17.5, 0.5, (-60.0, 60.0))


@given(st.text(max_size=20), st.floats(allow_nan=False, allow_infinity=False))
def test_no_format_makes_a_number_fail(number_format: str, number: float) -> None:
    assert len(read_cell(number, kind="number", number_format=number_format).quantities) <= 1
