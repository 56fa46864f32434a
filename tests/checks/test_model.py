"""From figures to an array: units, planes, sub-arrays, lattices, and every assumption named."""

from __future__ import annotations

from typing import Any

import pytest
from checks.cases import panel_of

from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case
from speccheck.physics.layout import Lattice
from speccheck.records import Settings

PLANAR: dict[str, Any] = {
    "frequency_range": [3300, 3800],
    "array_rows": 12,
    "array_columns": 8,
    "vertical_element_spacing": "58 mm",
    "horizontal_element_spacing": "41.5 mm",
}


def made(plane: Any = "both", **more: Any) -> Model | Lacking:
    table = {k: v for k, v in {**PLANAR, **more}.items() if v is not None}
    panel = panel_of(table)
    return model_of(Case(panel, panel.bands[0], Settings()), plane)


def model(plane: Any = "both", **more: Any) -> Model:
    result = made(plane, **more)
    assert isinstance(result, Model), result
    return result


def test_spacing_in_wavelengths_holds_at_its_frequency() -> None:
    spacing = {"value": 0.7, "unit": "λ", "at": {"frequency_mhz": 3400}}
    pitch_m = model(vertical_element_spacing=spacing).layout.vertical_pitch_m
    assert pitch_m == pytest.approx(0.7 * 299_792_458 / 3.4e9)  # wavelength = c/f


def test_spacing_in_wavelengths_without_frequency_is_an_assumption() -> None:
    made_of = model(vertical_element_spacing="0.7 λ")
    assert made_of.vertical_pitch_wl(made_of.centre_hz) == pytest.approx(0.7)
    assert any("middle of the band" in text for text in made_of.assumptions)


def test_missing_figures_are_named() -> None:
    result = made(vertical_element_spacing=None, array_rows=None)
    assert isinstance(result, Lacking)
    assert result.missing == ("array_rows",)
    result = made(horizontal_element_spacing=None)
    assert isinstance(result, Lacking)
    assert result.missing == ("horizontal_element_spacing",)


def test_one_plane_does_without_the_other() -> None:
    assert model("vertical", horizontal_element_spacing=None).layout.columns == 1
    assert model("horizontal", vertical_element_spacing=None).layout.rows == 1
    assert isinstance(made("vertical", vertical_element_spacing=None), Lacking)


def test_active_panel_without_columns_is_not_taken_for_one_column() -> None:
    result = made(array_columns=None, transceivers=64)
    assert isinstance(result, Lacking)
    assert "array_columns" in result.missing
    assert model(array_columns=None, rf_ports=2).layout.columns == 1


def test_column_on_one_feed_steers_inside() -> None:
    assert model(subarray_rows=12, subarray_columns=1).layout.subarray_rows == 1
    assert model(subarray_rows=3, subarray_tilt=6).layout.subarray_tilt_deg == 6


def test_fixed_tilt_not_stated_is_the_middle_of_the_range() -> None:
    made_of = model(subarray_rows=3, electrical_tilt=[2, 10])
    assert made_of.layout.subarray_tilt_deg == 6
    assert any("fixed tilt of 6°" in text for text in made_of.assumptions)


def test_sub_arrays_that_do_not_divide_are_computed_by_element() -> None:
    made_of = model(subarray_rows=5)
    assert made_of.layout.subarray_rows == 1
    assert any("do not divide" in text for text in made_of.assumptions)


@pytest.mark.parametrize("word", ["triangular", "staggered rows", "hexagonal", "Dreiecksgitter", "versetzt"])
def test_staggered_lattice_is_recognised(word: str) -> None:
    assert model(lattice=word).layout.lattice is Lattice.TRIANGULAR


def test_groups_stand_at_their_stated_distance() -> None:
    """3GPP TR 38.901 clause 7.3: d_g,H runs from first element to first element; 8 at 41.5 mm take 332 mm."""
    apart = model(panel_groups="1 x 2, dgH = 400 mm")
    assert apart.with_columns(16).layout.width_m == pytest.approx(0.400 + 0.332)
    assert apart.with_columns(8).layout.width_m == pytest.approx(0.332)
    assert model(panel_groups="1 x 2").with_columns(16).layout.width_m == pytest.approx(2 * 0.332)
    wavelength_m = 299_792_458 / 3.55e9
    assert model(panel_groups="1 x 2; dgH 5 λ").group_pitch_m == pytest.approx(5 * wavelength_m)


def test_a_distance_below_the_width_of_a_group_is_the_gap() -> None:
    # 20 mm from first to first element would lay groups of 8 · 41.5 = 332 mm over one another: a gap
    # (common practice) puts the second 332 + 20 mm away
    gap = model(panel_groups="1 x 2, dgH = 20 mm")
    assert gap.group_pitch_m == pytest.approx(0.332 + 0.020)
    assert any("gap" in text for text in gap.assumptions)


def test_groups_are_counted_and_said() -> None:
    assert model(panel_groups="1 x 2").groups == 2
    assert model(panel_groups="multi-panel").groups == 1
    assert model(panel_groups="999").groups == 1


@pytest.mark.parametrize("count", [0, -3, 100_000])
def test_impossible_counts_make_no_model(count: int) -> None:
    assert isinstance(made(array_rows=count), Lacking)
