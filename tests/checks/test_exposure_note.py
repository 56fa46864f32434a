"""The exposure note against distances worked by hand; source of each figure beside its test."""

from __future__ import annotations

import math
import re
from dataclasses import replace
from typing import Any

import pytest
from checks.cases import panel_of
from hypothesis import given
from hypothesis import strategies as st

from speccheck.checks import exposure_note
from speccheck.records import ExposureNote, ExposureRow, Settings

PLAIN = Settings(power_tolerance_db=0.0)
ACTIVE: dict[str, Any] = {
    "frequency_range": [3300, 3800],
    "conducted_power": 320,
    "gain": "25.0 dBi",
    "transceivers": 64,
}


def note_of(
    whole: dict[str, Any], bands: dict[str, Any] | None = None, settings: Settings = PLAIN
) -> ExposureNote:
    return exposure_note(panel_of(whole, bands), settings)


def row(
    note: ExposureNote, population: str = "general public", basis: str = "whole body", band: Any = ...
) -> ExposureRow:
    found = [r for r in note.rows if (r.population, r.basis) == (population, basis)]
    return next(r for r in found if band is ... or r.band == band)


def of_eirp(dbm: float, settings: Settings = PLAIN) -> ExposureNote:
    return note_of(
        {"frequency_range": [3300, 3800], "eirp": dbm, "gain": "25.0 dBi", "transceivers": 64},
        settings=settings,
    )


@pytest.mark.parametrize(
    ("dbm", "public", "workers", "factored", "cautious"),
    [
        (60, 2.82, 1.26, 1.22, 4.51),
        (65, 5.02, 2.24, 2.17, 8.03),
        (70, 8.92, 3.99, 3.86, 14.27),
        (75, 15.86, 7.09, 6.87, 25.38),
        (80, 28.21, 12.62, 12.22, 45.14),
    ],
)
def test_distances_of_the_spherical_model(dbm, public, workers, factored, cautious):
    """√(k·F·EIRP/(4π·S)) by hand: 10 and 50 W/m², F = 0.75 × 0.25, k = 2.56 (OET 65, eq. 4 and 7)."""
    settings = replace(PLAIN, tdd_duty=0.75, actual_maximum_factor=0.25)
    note = of_eirp(dbm, settings)
    mine = row(note)
    for printed, exact in ((mine.distance_m, public), (mine.factored_distance_m, factored)):
        assert 0 <= printed - exact < 0.105
    assert 0 <= mine.cautious_distance_m - cautious < 0.105
    assert 0 <= row(note, "workers").distance_m - workers < 0.105


def test_a_country_factor_lowers_the_level_and_is_said():
    """r = sqrt(EIRP/(4πS)): a quarter of the level doubles the distance."""
    plain, strict = of_eirp(60.0), of_eirp(60.0, Settings(country_factor=0.25))
    for one, other in zip(plain.rows, strict.rows, strict=True):
        assert other.limit_w_m2 is None or other.limit_w_m2 == pytest.approx(one.limit_w_m2 / 4, rel=1e-3)
        assert other.distance_m == pytest.approx(2 * one.distance_m, abs=0.2)
    assert any("country factor 0.25" in said for said in strict.assumptions)
    assert not any("country factor" in said for said in plain.assumptions)


def test_two_decibels_of_tolerance_add_a_quarter_to_the_cautious_distance():
    """10^(2/20) = 1.259 by hand."""
    plain, raised = of_eirp(80), of_eirp(80, Settings(power_tolerance_db=2.0))
    assert row(raised).cautious_distance_m == pytest.approx(45.14 * 1.259, abs=0.15)
    assert row(raised).distance_m == row(plain).distance_m


def test_both_populations_and_both_averaging_kinds_of_icnirp_2020():
    """ICNIRP 2020 tables 5 and 6: 10 and 40 W/m² for the public, 50 and 200 for workers, at 3.3 GHz."""
    note = note_of(ACTIVE)
    limits = {(r.population, r.basis): (r.limit_w_m2, r.averaging_min) for r in note.rows}
    assert limits == {
        ("general public", "whole body"): (10, 30),
        ("general public", "local"): (40, 6),
        ("workers", "whole body"): (50, 30),
        ("workers", "local"): (200, 6),
    }
    assert row(note, "workers").category == "occupational"


def test_the_lowest_level_of_a_band_counts():
    """700 MHz: 700/200 = 3.5 W/m², not 10; distance √(100000/(4π·3.5)) = 47.68 m by hand."""
    note = note_of({"frequency_range": [700, 960], "eirp": 80, "gain": "15.0 dBi"})
    assert row(note).frequency_mhz == 700
    assert row(note).limit_w_m2 == pytest.approx(3.5)
    assert row(note).distance_m == pytest.approx(47.7)


def test_bands_add_as_the_root_of_squares():
    """5 m and 8 m are 9.43 m together, printed 9.5: EIRP = 4π·10·r² by hand."""
    eirps = {r: 10 * math.log10(4 * math.pi * 10 * r**2) + 30 for r in (5, 8)}
    bands = {
        "2300-2400": {"eirp": eirps[5], "gain": "17.0 dBi"},
        "3300-3800": {"eirp": eirps[8], "gain": "17.0 dBi"},
    }
    note = note_of({"frequency_range": [[2300, 2400], [3300, 3800]]}, bands)
    assert [row(note, band=b).distance_m for b in ((2300, 2400), (3300, 3800), None)] == [5.0, 8.0, 9.5]


def test_ports_times_power_per_port_is_an_assumption_with_its_cells():
    """2 × 250 W and 17.1 dBi: 10·log10 500 + 30 + 17.1 = 74.09 dBm by hand."""
    note = note_of(
        {"frequency_range": [1710, 2170], "rf_ports": 2, "max_power_per_port": 250, "gain": "17.1 dBi"}
    )
    assert row(note).eirp_dbm == pytest.approx(74.09, abs=0.005)
    said = "\n".join(note.assumptions)
    assert "2 ports × 250 W" in said
    assert "Case!B3, Case!" in said or "Case!B4, Case!" in said
    assert "full input power its ports are rated for" in said


def test_the_highest_gain_counts():
    """Gain for exposure is the highest: 17.1 + 0.5 dBi at the best tilt."""
    gains = [
        {"value": 16.5, "tolerance": 0.5, "at": {"tilt_deg": 10}},
        {"value": 17.1, "tolerance": 0.5, "at": {"tilt_deg": 2}},
    ]
    note = note_of({**ACTIVE, "gain": gains})
    assert row(note).gain_dbi == pytest.approx(17.6)


def test_the_higher_of_stated_and_computed_eirp_counts():
    """320 W and 25 dBi are 80.05 dBm by hand; a stated 77 dBm is not used, a stated 83 dBm is."""
    assert row(note_of({**ACTIVE, "eirp": 77.0})).eirp_dbm == pytest.approx(80.05, abs=0.01)
    assert row(note_of({**ACTIVE, "eirp": 83.0})).eirp_dbm == pytest.approx(83.0)


@pytest.mark.parametrize(
    ("left_out", "missing"),
    [("conducted_power", "conducted output power"), ("gain", "gain"), ("frequency_range", "frequency range")],
)
def test_no_distance_without_inputs(left_out, missing):
    note = note_of({key: value for key, value in ACTIVE.items() if key != left_out})
    assert not note.complete
    assert note.rows == ()
    assert note.around == ()
    assert any(missing in text for text in note.missing), note.missing
    assert note.cautions


def test_one_band_without_power_leaves_the_whole_note_incomplete():
    bands = {"1710-2170": {"conducted_power": 80, "gain": 17}, "2500-2690": {"gain": 18}}
    note = note_of({"frequency_range": [[1710, 2170], [2500, 2690]]}, bands)
    assert not note.complete
    assert note.rows == ()
    assert note.missing == ("conducted output power for 2500–2690 MHz",)


def test_unknown_limit_set_and_frequency_outside_a_set_give_no_distance():
    assert "not known" in note_of(ACTIVE, settings=Settings(limit_set="moon-2030")).missing[0]
    high = note_of(
        {**ACTIVE, "frequency_range": [120_000, 130_000]}, settings=Settings(limit_set="fcc-1.1310")
    )
    assert high.rows == ()


def test_time_factor_is_shown_beside_and_never_instead():
    plain, factored = note_of(ACTIVE), note_of(ACTIVE, settings=replace(PLAIN, tdd_duty=0.75))
    assert row(plain).factored_distance_m is None
    assert row(factored).distance_m == row(plain).distance_m
    assert row(factored).factored_distance_m < row(factored).distance_m


def test_actual_maximum_factor_is_refused_for_a_passive_panel():
    passive = {"frequency_range": [1710, 2170], "rf_ports": 2, "max_power_per_port": 250, "gain": "17 dBi"}
    note = note_of(passive, settings=replace(PLAIN, actual_maximum_factor=0.25))
    assert row(note).factored_distance_m is None
    assert any("No actual-maximum factor" in text for text in note.assumptions)


@pytest.mark.parametrize(
    ("height_mm", "range_mhz", "far_m"),
    [
        (2000, [790, 800], 21.3),
        (2000, [1900, 2000], 53.4),
        (900, [3400, 3500], 18.9),
        (250, [27500, 28000], 11.7),
    ],
)
def test_far_field_distance(height_mm, range_mhz, far_m):
    """2D²/λ by hand at the upper band edge; 0.6D²/λ is 0.3 of it (OET Bulletin 65, eq. 16)."""
    mine = row(note_of({**ACTIVE, "frequency_range": range_mhz, "height": f"{height_mm} mm"}))
    assert mine.far_field_m == pytest.approx(far_m, abs=0.1)
    assert mine.far_field_exposure_m == pytest.approx(0.3 * far_m, abs=0.1)
    assert "λ" in mine.region


def test_cylindrical_model_only_where_it_holds():
    """OET 65: it meets the spherical one at R = G·h·θ/720; 17 dBi, 2 m, 65°: 9.05 m by hand."""
    column = {
        "frequency_range": [1710, 2170],
        "conducted_power": 100,
        "gain": "17.0 dBi",
        "height": "2000 mm",
        "horizontal_beamwidth": 65,
    }
    note = note_of(column)
    public, workers = row(note), row(note, "workers")
    assert public.cylindrical_distance_m == pytest.approx(180 * 100 / (65 * math.pi * 2 * 8.55), abs=0.1)
    assert "9.0 m" in public.region or "9.1 m" in public.region
    assert workers.cylindrical_distance_m < workers.distance_m
    strong = row(note_of({**column, "conducted_power": 1000}))
    assert strong.distance_m > 9.1
    assert strong.cylindrical_distance_m is None


def test_iec_cylindrical_formula_nears_the_spherical_one_far_out():
    """IEC 62232 (from memory): far out 2·S_avg is P·D/(12·r²) against P·D/(4π·r²), 4.7 % more."""
    note = note_of({**COLUMN, "max_power_per_port": 5000, "height": "300 mm"})
    step = next(s for s in note.working if s.label.startswith("Cylindrical formula of IEC 62232"))
    assert step.value == pytest.approx(8.55 * 4 * math.pi / 12, rel=0.01)


def test_stated_eirp_of_one_polarisation_is_doubled():
    """80 + 3.01 dBm by hand; without it the distance would be short by 1.41."""
    one = {"value": 80.0, "raw": "80 dBm per polarisation"}
    note = note_of({"frequency_range": [3300, 3800], "eirp": one, "gain": "25.0 dBi"})
    assert row(note).eirp_dbm == pytest.approx(83.01, abs=0.005)


COLUMN: dict[str, Any] = {
    "frequency_range": [1710, 2170],
    "array_rows": 10,
    "array_columns": 1,
    "vertical_element_spacing": "110 mm",
    "horizontal_beamwidth": 65,
    "rf_ports": 2,
    "max_power_per_port": 250,
    "gain": "17.0 dBi",
    "electrical_tilt": [2, 10],
    "height": "1300 mm",
}


def test_zone_around_a_downtilted_column():
    """A beam tilted 2° to 10° reaches at least r·sin 10° below; nothing reaches further than the front."""
    note = note_of(COLUMN)
    zone = note.around[0]
    front = zone.front_m
    assert front == row(note).distance_m
    assert zone.below_m >= front * math.sin(math.radians(10)) - 0.1
    assert zone.above_m < zone.below_m
    assert max(zone.above_m, zone.below_m, zone.beside_m, zone.behind_m) < front
    assert min(zone.above_m, zone.behind_m) >= front * 10 ** (-20 / 20) - 0.1
    assert zone.tilts_deg == (2, 10)
    assert max(math.hypot(x, y) for x, y in zone.side_view) == pytest.approx(front, abs=0.15)


def test_beside_a_65_degree_sector():
    """TR 38.901 Table 7.3-1: 12·(φ/65)² dB; the most of sin φ·10^(−A/20) is 0.384 at 38°, by hand."""
    zone = note_of(COLUMN).around[0]
    assert zone.beside_m == pytest.approx(0.384 * zone.front_m, rel=0.03)


def test_mechanical_tilt_lowers_the_zone():
    """Leaning by 10° more takes the beam to 20° below: r·sin 20° by hand."""
    upright = note_of(COLUMN).around[0]
    leaning = note_of({**COLUMN, "mechanical_tilt": [0, 10]}).around[0]
    assert leaning.front_m == upright.front_m
    assert leaning.below_m >= upright.front_m * math.sin(math.radians(20)) - 0.1
    assert leaning.above_m == upright.above_m


def test_no_zone_without_an_array_and_the_note_says_so():
    note = note_of({key: v for key, v in COLUMN.items() if key != "vertical_element_spacing"})
    assert note.complete
    assert note.around == ()
    assert any("No distances around the panel" in text for text in note.assumptions)


def test_power_stated_once_for_several_bands_is_named():
    bands = {"1710-2170": {"gain": "17.0 dBi"}, "2500-2690": {"gain": "18.0 dBi"}}
    note = note_of(
        {"frequency_range": [[1710, 2170], [2500, 2690]], "rf_ports": 2, "max_power_per_port": 200}, bands
    )
    each = [row(note, band=b).distance_m for b in ((1710, 2170), (2500, 2690))]
    assert row(note, band=None).distance_m == pytest.approx(math.hypot(*each), abs=0.2)
    assert any("stated once for several bands" in text for text in note.assumptions)
    assert any("if the bands share it" in step.label for step in note.working)


def test_other_limit_sets():
    """47 CFR 1.1310: 900/1.5 = 600 µW/cm² = 6 W/m²; averaging 30 and 6 min; no local level."""
    low = {**ACTIVE, "frequency_range": [900, 960]}
    fcc = note_of(low, settings=replace(PLAIN, limit_set="fcc-1.1310"))
    assert {(r.population, r.limit_w_m2, r.averaging_min) for r in fcc.rows} == {
        ("general public", 6.0, 30.0),
        ("workers", 30.0, 6.0),
    }
    assert row(note_of(low, settings=replace(PLAIN, limit_set="icnirp-1998"))).averaging_min == 6
    canada = note_of(low, settings=replace(PLAIN, limit_set="canada-safety-code-6"))
    assert any("verify before use" in text for text in canada.assumptions)


FORBIDDEN = re.compile(
    r"\b(safe|safely|harmless|no risk|guaranteed|radiation-free|complies|exclusion zone)\b", re.I
)


@pytest.mark.parametrize(
    "note", [note_of(ACTIVE), note_of(COLUMN), note_of({})], ids=["active", "column", "empty"]
)
def test_words_of_the_note(note):
    texts = [*note.assumptions, *note.cautions, *note.validity, *note.missing, *(r.region for r in note.rows)]
    assert not [text for text in texts if FORBIDDEN.search(text)]
    assert any("does not replace" in text for text in note.cautions)
    assert any("Local rules" in text for text in note.cautions)
    assert any("Other transmitters" in text for text in note.cautions)


@given(
    power_w=st.floats(0.1, 5000),
    gain_dbi=st.floats(0, 35),
    low_mhz=st.floats(410, 60_000),
    reflection=st.sampled_from([1.0, 2.56, 4.0]),
)
def test_properties_of_any_note(power_w, gain_dbi, low_mhz, reflection):
    """Workers' distances are shorter; the cautious one never is; printed ones are tenths, rounded up."""
    settings = Settings(reflection_factor=reflection)
    note = note_of(
        {"frequency_range": [low_mhz, low_mhz * 1.1], "conducted_power": power_w, "gain": gain_dbi},
        settings=settings,
    )
    assert note.complete
    for mine in note.rows:
        assert mine.cautious_distance_m >= mine.distance_m > 0
        assert mine.distance_m * 10 == pytest.approx(round(mine.distance_m * 10))
        exact = math.sqrt(reflection * power_w * 10 ** (gain_dbi / 10) / (4 * math.pi * mine.limit_w_m2))
        assert mine.distance_m >= exact * (1 - 1e-4)
        assert (
            row(note, "workers", mine.basis).distance_m <= row(note, "general public", mine.basis).distance_m
        )
