"""What the words and digits of a cell say: rounding, conditions, named bands, total power."""

from __future__ import annotations

from typing import Any

import pytest
from checks.cases import panel_of

from speccheck.checks.cell_text import half_digit
from speccheck.checks.stated_conditions import carrier_dbm, named_bands, stated_ranges, wind_speed_mps
from speccheck.checks.transmit_power import transmit_power
from speccheck.records import Reading


def reading_of(key: str, given: Any) -> Reading:
    found = panel_of({key: given}).get(key)
    assert found is not None
    return found


@pytest.mark.parametrize(
    ("key", "raw", "value", "unit", "half"),
    [
        ("gain", "17", 17, "dBi", 0.5),
        ("gain", "17.1 ± 0.5", 17.1, "dBi", 0.05),
        ("gain", "18,10", 18.1, "dBi", 0.005),
        ("wind_load", "0,721 kN", 0.721, "kN", 0.5),
        ("height", "1430 mm", 1430, "mm", 0.0005),
        ("gain", "seventeen", 17, "dBi", 0.0),
    ],
)
def test_half_of_the_last_printed_digit(key, raw, value, unit, half):
    """By hand: half a unit in the last place, in the dictionary's unit."""
    reading = reading_of(key, {"value": value, "unit": unit, "raw": raw})
    assert half_digit(reading) == pytest.approx(half, rel=1e-6)


@pytest.mark.parametrize(
    ("heading", "speed"),
    [
        ("Wind load, frontal, at 150 km/h", 41.6667),
        ("Wind load @ 93 mph", 41.5747),
        ("Frontal load at 42 m/s", 42.0),
        ("Wind load", None),
    ],
)
def test_wind_speed_in_words(heading, speed):
    """150/3.6 and 93 × 0.44704 by hand."""
    found = wind_speed_mps(reading_of("wind_load", {"value": 240, "heading": heading}), None)
    assert found == (None if speed is None else pytest.approx(speed, abs=1e-4))


@pytest.mark.parametrize(
    ("words", "power"),
    [("2 x 43 dBm carriers", 43.0), ("2×20 W", 43.0103), ("2 x +37 dBm", 37.0), ("3rd order", None)],
)
def test_test_power_in_words(words, power):
    """20 W is 43.01 dBm by hand."""
    found = carrier_dbm(reading_of("passive_intermodulation", {"value": -150, "condition": words}), None)
    assert found == (None if power is None else pytest.approx(power, abs=1e-3))


def test_a_band_that_stands_for_its_name_is_no_stated_range():
    panel = panel_of(
        {
            "frequency_range": [
                {"value": [3400, 3600], "raw": "3400 – 3600 MHz"},
                {"value": [3300, 3800], "raw": "n78", "heading": "3GPP bands"},
            ]
        }
    )
    assert stated_ranges(panel, "frequency_range") == ((3400, 3600),)
    assert list(named_bands(panel)) == ["n78"]


@pytest.mark.parametrize(
    ("stated", "watts"),
    [
        ({"conducted_power": 320}, 320),
        ({"conducted_power": {"value": 160, "raw": "160 W per polarisation"}}, 320),
        ({"conducted_power": {"value": 5, "raw": "5 W per TRX"}, "transceivers": 64}, 320),
        ({"power_per_transceiver": 5, "transceivers": 64}, 320),
        ({"max_power_per_port": 250, "rf_ports": 4}, 1000),
        ({"max_power_per_port": 250, "rf_ports": 4, "max_power_total": 800}, 800),
        ({"max_power_per_port": 250}, None),
    ],
)
def test_total_power_over_all_ports(stated, watts):
    """Arithmetic by hand: all ports and both polarisations."""
    panel = panel_of({"frequency_range": [3300, 3800], **stated})
    power = transmit_power(panel, (3300, 3800))
    assert (power.nominal_w if power else None) == watts
