"""Figures in words, and the slack of the last printed digit."""

from __future__ import annotations

import pytest
from checks.cases import panel_of

from speccheck.checks.saying import claim, figure, label, last_digit_slack
from speccheck.records import Reading


def reading(key: str, value: object) -> Reading:
    return panel_of({key: value}).readings[0]


@pytest.mark.parametrize(
    ("value", "unit", "said"),
    [
        (17.5, "dBi", "17.5 dBi"),
        (0.092, "m", "92 mm"),
        (2.69, "m", "2.69 m"),
        (65, "deg", "65°"),
        (8, "", "8"),
    ],
)
def test_figure_carries_its_unit(value: float, unit: str, said: str) -> None:
    assert figure(value, unit) == said


def test_claim_names_the_cell() -> None:
    assert claim(reading("electrical_tilt", [2, 10])) == "2 to 10° (Case!B2)"
    assert claim(reading("height", "1430 mm")) == "1430 mm (Case!B2)"


def test_label_keeps_abbreviations() -> None:
    assert label("rf_ports") == "RF ports"
    assert label("array_rows") == "element rows"


@pytest.mark.parametrize(
    ("key", "raw", "value", "slack"),
    [
        ("vertical_beamwidth", "7.2", 7.2, 0.05),
        ("vertical_beamwidth", "7,0 °", 7.0, 0.05),
        ("vertical_beamwidth", "7", 7.0, 0.5),
        ("gain", "18", 18.0, 0.25),
        ("gain", "17.7 ± 0.4", 17.7, 0.05),
    ],
)
def test_slack_is_half_of_the_last_printed_digit(key: str, raw: str, value: float, slack: float) -> None:
    assert last_digit_slack(reading(key, {"value": value, "raw": raw})) == pytest.approx(slack)


def test_converted_figures_carry_no_slack() -> None:
    assert last_digit_slack(reading("height", "56 in")) == 0
