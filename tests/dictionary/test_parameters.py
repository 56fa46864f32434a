"""The definitions hold together, and each example of a definition reads as it says."""

from __future__ import annotations

from typing import get_args

import pytest

from speccheck.dictionary import LANGUAGES, Example, Parameter, parameters, synonyms
from speccheck.dictionary.parameters import Direction, Kind, Scope
from speccheck.quantities import convert, read_cell, settle, unit_name

EXAMPLES = [(p, e) for p in parameters().values() for e in p.examples]

# The keys and units the project's result format names (docs of the result schema).
PUBLISHED_UNITS = {
    "frequency_range": "MHz",
    "operating_bands": "MHz",
    "horizontal_element_spacing": "m",
    "vertical_element_spacing": "m",
    "gain": "dBi",
    "element_gain": "dBi",
    "horizontal_beamwidth": "deg",
    "vertical_beamwidth": "deg",
    "electrical_tilt": "deg",
    "horizontal_scan": "deg",
    "vertical_scan": "deg",
    "upper_sidelobe_suppression": "dB",
    "front_to_back_ratio": "dB",
    "cross_polar_discrimination": "dB",
    "port_isolation": "dB",
    "return_loss": "dB",
    "feed_loss": "dB",
    "vswr": "",
    "passive_intermodulation": "dBc",
    "max_power_per_port": "W",
    "max_power_total": "W",
    "conducted_power": "W",
    "power_consumption": "W",
    "eirp": "dBm",
    "impedance": "ohm",
    "height": "m",
    "weight": "kg",
    "wind_load": "N",
    "survival_wind_speed": "m/s",
}


@pytest.mark.parametrize(("parameter", "example"), EXAMPLES, ids=[f"{p.key}: {e.cell}" for p, e in EXAMPLES])
def test_an_example_reads_as_its_definition_says(parameter: Parameter, example: Example) -> None:
    content = read_cell(
        example.cell,
        kind=parameter.kind,
        expected=parameter.unit,
        plausible=parameter.plausible,
        possible=parameter.possible,
    )
    own = [q for q in content.quantities if q.parameter in ("", parameter.key)]
    found = settle(
        own[0], parameter.unit, sign=parameter.sign, direction=parameter.direction, keep=parameter.keep
    )
    wanted = example.value if isinstance(example.value, str) else pytest.approx(example.value, rel=1e-4)
    assert (found.value, found.sense) == (wanted, example.sense)
    assert found.tolerance == (example.tolerance and pytest.approx(example.tolerance))
    assert not found.alternatives


def test_there_are_more_parameters_than_the_sixty_asked_for() -> None:
    assert len(parameters()) >= 60


@pytest.mark.parametrize("key", PUBLISHED_UNITS)
def test_units_are_those_of_the_result_format(key: str) -> None:
    assert parameters()[key].unit == PUBLISHED_UNITS[key]


@pytest.mark.parametrize("parameter", parameters().values(), ids=parameters())
def test_a_definition_is_complete(parameter: Parameter) -> None:
    assert parameter.label and parameter.definition.endswith(".") and parameter.source
    assert parameter.scope in get_args(Scope) and parameter.direction in get_args(Direction)
    assert parameter.kind in get_args(Kind)
    assert parameter.examples
    assert parameter.unit in ("", *filter(None, [unit_name(parameter.unit)]))
    if parameter.plausible and parameter.possible:
        assert (
            parameter.possible[0] <= parameter.plausible[0] < parameter.plausible[1] <= parameter.possible[1]
        )


@pytest.mark.parametrize("language", LANGUAGES)
def test_a_language_has_headings_for_the_figures_every_data_sheet_states(language: str) -> None:
    usual = {
        "gain", "horizontal_beamwidth", "vertical_beamwidth", "electrical_tilt", "vswr", "port_isolation",
        "front_to_back_ratio", "passive_intermodulation", "max_power_per_port", "weight", "wind_load",
    }  # fmt: skip
    assert usual <= set(synonyms()[language])


@pytest.mark.parametrize("key", [k for k, p in parameters().items() if p.kind in ("number", "range")])
def test_a_plausible_range_is_in_the_unit_of_the_parameter(key: str) -> None:
    parameter = parameters()[key]
    assert convert(1.0, parameter.unit, parameter.unit) == 1.0
    assert parameter.plausible is not None
