"""Any text is survived, and a number written in any notation and unit reads back to itself."""

from __future__ import annotations

from typing import get_args

import pytest
from hypothesis import assume, example, given, settings
from hypothesis import strategies as st

from speccheck.dictionary.parameters import Kind
from speccheck.quantities import (
    UnknownUnitError,
    convert,
    decimal_habit,
    numeral,
    read_cell,
    settle,
    split_footnotes,
    tidy,
)
from speccheck.quantities.units import _LINEAR, _OTHER, _SPELLINGS, unit_name

KINDS = st.sampled_from(get_args(Kind))
UNITS = st.sampled_from(["", "dBi", "m", "MHz", "deg", "dBc", "W", "N"])
CELLISH = st.text(
    alphabet="0123456789.,-+±<>≥≤…÷~/()[]:;@×xTR dBimWVHzcokgN°%λ\u00a0\u202f−–’'\"\n", max_size=40
)


@given(st.one_of(st.text(max_size=300), CELLISH), KINDS, UNITS, st.sampled_from([None, True, False]))
@example("1,234,5", "number", "", None)
@example("(±", "number", "deg", None)
@example("9" * 400, "number", "", None)
@settings(max_examples=400)
def test_no_text_makes_the_reader_stumble(text: str, kind: str, unit: str, comma: bool | None) -> None:
    content = read_cell(text, kind=kind, unit=unit, expected=unit, decimal_comma=comma)
    assert content.quantities or content.status or content.rest or content.notes or not tidy(text)
    for found in content.quantities:
        try:
            settle(found, unit, sign="positive", direction="higher")
        except UnknownUnitError:
            continue


@given(st.one_of(st.floats(), st.integers(), st.booleans(), st.datetimes(), st.dates(), st.times()), KINDS)
def test_no_value_makes_the_reader_stumble(value: object, kind: str) -> None:
    read_cell(value, kind=kind)  # type: ignore[arg-type]


def grouped(number: float, places: int, decimal: str, group: str) -> str:
    """A number with separators, by the general-purpose formatter of the language."""
    return f"{number:,.{places}f}".replace(".", "\0").replace(",", group).replace("\0", decimal)


# decimal sign, separator of thousands: the styles of ISO 80000-1 and of office programs
STYLES = [
    (".", ""), (",", ""), (".", ","), (",", "."), (".", " "), (",", " "), (",", "\u00a0"), (",", "\u202f"),
    (".", "\u2009"), (".", "'"), (".", "’"),
]  # fmt: skip
WIDTHS = [
    str.maketrans({}),
    str.maketrans("0123456789", "\uff10\uff11\uff12\uff13\uff14\uff15\uff16\uff17\uff18\uff19"),
]


@given(
    st.integers(0, 9_999_999), st.integers(0, 2), st.sampled_from(STYLES), st.sampled_from(WIDTHS),
    st.sampled_from(["", "-", "\u2212"]),
)  # fmt: skip
def test_a_number_reads_back_whatever_its_separators(
    digits: int, places: int, style: tuple[str, str], width: dict[int, int], sign: str
) -> None:
    number = digits / 10**places
    text = sign + grouped(number, places, *style).translate(width)
    content = read_cell(text, kind="number", decimal_comma=style[0] == ",")
    assert content.quantities[0].value == pytest.approx(-number if sign else number)


@given(
    st.integers(1, 9999), st.sampled_from(sorted((w, n) for n, ws in _SPELLINGS.items() for w in ws.split()))
)
def test_every_spelling_of_a_unit_is_read_behind_a_number(tenths: int, spelling: tuple[str, str]) -> None:
    written, name = spelling
    assume(name != "pcs" or not written.endswith("."))
    assume(written != "l")  # a bare L behind a figure names a length, as in '1400L x 300W'
    for text in (f"{tenths / 10} {written}", f"{tenths / 10}{written}"):
        (found,) = read_cell(text, kind="number", expected=name).quantities
        assert (found.value, found.unit) == (tenths / 10, name)


LEVEL = {"dBm", "dBW"}
PAIRS = [
    (a, b)
    for table in (_LINEAR | _OTHER,)
    for a in table
    for b in table
    if table[a][0] == table[b][0] and a != b
]


@given(st.sampled_from(PAIRS), st.floats(0.01, 1e4))
def test_conversion_there_and_back_is_the_same_figure(pair: tuple[str, str], value: float) -> None:
    there = convert(min(value, 200.0) if pair[0] in LEVEL else value, pair[0], pair[1])
    back = convert(there, pair[1], pair[0])
    assert back == pytest.approx(min(value, 200.0) if pair[0] in LEVEL else value, rel=1e-9, abs=1e-9)


@given(st.floats(0.3, 2), st.floats(400, 7000))
def test_a_length_in_wavelengths_needs_its_frequency(spacing: float, freq_mhz: float) -> None:
    metres = convert(spacing, "λ", "m", freq_mhz=freq_mhz)
    assert convert(metres, "m", "λ", freq_mhz=freq_mhz) == pytest.approx(spacing)
    with pytest.raises(UnknownUnitError):
        convert(spacing, "λ", "m")


TOLERANCES = ["{} ± {} {}", "{} ±{} {}", "{} {unit} ± {}", "{} +/- {} {}", "{} {unit} (±{} {unit})"]


@given(
    st.integers(1, 999),
    st.integers(1, 99),
    st.sampled_from(TOLERANCES),
    st.sampled_from(["dBi", "deg", "mm", "kg"]),
)
def test_a_tolerance_reads_back(tenths: int, slack: int, form: str, unit: str) -> None:
    text = form.format(tenths / 10, slack / 10, unit, unit=unit)
    (found,) = read_cell(text, kind="number", expected=unit).quantities
    assert (found.value, found.tolerance, found.unit) == (tenths / 10, slack / 10, unit)


RANGES = [
    "{}-{}",
    "{} – {}",
    "{}…{}",
    "{}...{}",
    "{} ÷ {}",
    "{}~{}",
    "{} to {}",
    "{} bis {}",
    "from {} to {}",
]


@given(st.integers(-60, 60), st.integers(1, 60), st.sampled_from(RANGES), st.sampled_from(["", "°", " deg"]))
def test_a_range_reads_back(low: int, width: int, form: str, unit: str) -> None:
    text = form.format(f"{low}{unit}", f"{low + width}{unit}")
    (found,) = read_cell(text, kind="range", expected="deg").quantities
    assert found.value == (low, low + width)


@given(st.lists(st.integers(0, 99999).map(lambda n: n / 10), min_size=3, max_size=20), st.booleans())
def test_a_file_shows_its_decimal_habit(numbers: list[float], comma: bool) -> None:
    texts = [str(n).replace(".", ",") if comma else str(n) for n in numbers]
    assert decimal_habit(texts).comma is comma


def test_a_file_of_both_habits_or_of_none_does_not_say() -> None:
    assert decimal_habit(["17,5", "17.5"]).comma is None
    assert decimal_habit(["17", "4.3-10", "TS 38.104", "1,234"]).comma is None
    assert "both in use" in decimal_habit(["17,5", "17.5"]).why


@given(st.text(max_size=60))
def test_tidying_twice_changes_nothing(text: str) -> None:
    assert tidy(tidy(text)) == tidy(text)
    split_footnotes(text)


@given(st.integers(0, 10**6))
def test_two_decimals_are_the_same_under_either_habit(
    digits: int,
) -> None:
    text = f"{digits / 100:.2f}"
    assert numeral(text, comma=True) == numeral(text, comma=False) == float(text)


@pytest.mark.parametrize(
    ("value", "unit", "to_unit", "expected"),
    [
        (1, "in", "mm", 25.4),  # NIST SP 811, appendix B.8: inch
        (1, "ft", "m", 0.3048),  # NIST SP 811: foot
        (1, "lb", "kg", 0.45359237),  # NIST SP 811: pound
        (1, "lbf", "N", 4.448222),  # NIST SP 811: pound-force
        (1, "kgf", "N", 9.80665),  # NIST SP 811: kilogram-force
        (1, "mph", "m/s", 0.44704),  # NIST SP 811: mile per hour
        (1, "kt", "m/s", 0.5144444),  # NIST SP 811: knot
        (150, "km/h", "m/s", 41.66667),  # 150/3.6
        (43, "dBm", "W", 19.95262),  # definition of the decibel: 10^1.3
        (0, "dBW", "dBm", 30),  # definition
        (0, "dBd", "dBi", 2.15),  # gain of a half-wave dipole as the trade rounds it
        (212, "°F", "°C", 100),  # NIST SP 811
        (3, "GHz", "MHz", 3000),
        (1.5, "", "", 1.5),
    ],
)
def test_conversions_of_the_handbook(value: float, unit: str, to_unit: str, expected: float) -> None:
    assert convert(value, unit, to_unit) == pytest.approx(expected, rel=1e-6)


@pytest.mark.parametrize(
    ("unit", "to_unit"), [("kg", "m"), ("parsec", "m"), ("dBi", "dBm"), ("dBc", "dBi"), ("MHz", "deg")]
)
def test_units_of_different_kinds_do_not_convert(unit: str, to_unit: str) -> None:
    with pytest.raises(UnknownUnitError, match=r"unit|convert"):
        convert(1, unit, to_unit)


def test_settling_follows_the_sign_habits_of_the_trade() -> None:
    (coupling,) = read_cell("≤ −28 dB", kind="number", expected="dB").quantities
    settled = settle(coupling, "dB", sign="positive")
    assert (settled.value, settled.sense, settled.stated_value) == (28.0, "min", -28.0)
    (pim,) = read_cell("> 153 dBc", kind="number", expected="dBc").quantities
    settled = settle(pim, "dBc", sign="negative", keep=("dBm",))
    assert (settled.value, settled.sense) == (-153.0, "max")
    (better,) = read_cell("better than 1.5", kind="number", expected="").quantities
    assert settle(better, "", direction="lower").sense == "max"


def test_unit_names_are_spellings_of_themselves() -> None:
    assert all(unit_name(name) == name for name in (*_LINEAR, *_OTHER))
