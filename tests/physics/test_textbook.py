"""Handbook worked examples, tests/reference/textbook.csv: one call per row, sources in the table.

Rows whose printed value disagrees with an exact calculation (agrees_exact = NO) are checked against the exact
value where the package is exact, or against the printed formula where the package offers that formula.
"""

import re

import numpy as np
import pytest
from physics import tables

from speccheck.physics import (
    beamwidth,
    bounds,
    decibels,
    errors,
    exposure,
    grating,
    matching,
    power,
    taper,
    wind,
)
from speccheck.physics.element import CosineElement, IsotropicElement, SectorElement
from speccheck.physics.element import directivity_dbi as element_dbi
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.lobes import subarray_lobes
from speccheck.physics.states import array_states

ROWS = {row["id"]: row for row in tables.rows("textbook.csv")}
HZ = tables.ONE_METRE_HZ


def numbers(text):
    return [float(n) for n in re.findall(r"\d+\.?\d*", text)]


def line(count, pitch, weights=()):
    return array_states(ArrayLayout(count, 1, pitch, 0.5, row_taper=tuple(weights)), IsotropicElement(), HZ)


def linear(level_db):
    return float(decibels.ratio(level_db))


R20 = 20 * np.log10(20)
EDGE = taper.chebyshev(10, R20) / taper.chebyshev(10, R20)[0]

CHECKED = {
    # uniform lines
    "T001": lambda _: linear(line(10, 0.25).directivity_dbi),
    "T002": lambda _: line(10, 0.25).directivity_dbi,
    "T004": lambda _: linear(line(2, 0.5).directivity_dbi),
    "T005": lambda _: beamwidth.uniform_line_deg(10, 0.5, HZ),
    "T007": lambda _: beamwidth.first_null_width_deg(10, 0.25, HZ),
    "T008": lambda _: taper.sidelobe_db(np.ones(200)),
    "T010": lambda _: line(10, 0.5).first_sidelobe_vertical_db,
    "T011": lambda _: line(4, 0.5).first_sidelobe_vertical_db,
    # Dolph-Chebyshev
    "T022": lambda _: EDGE[1],
    "T023": lambda _: EDGE[2],
    "T025": lambda _: EDGE[4],
    "T026": lambda _: taper.beamwidth_ratio(taper.chebyshev(10, R20)),
    "T028": lambda _: taper.beamwidth_ratio(taper.chebyshev(6, R20)),
    "T029": lambda _: taper.beamwidth_ratio(taper.chebyshev(8, R20)),
    "T031": lambda _: taper.beamwidth_ratio(taper.chebyshev(16, R20)),
    "T032": lambda _: taper.beamwidth_ratio(taper.chebyshev(24, R20)),
    "T034": lambda _: line(10, 0.5, taper.chebyshev(10, R20)).vertical_beamwidth_deg,
    "T035": lambda _: linear(line(10, 0.5, taper.chebyshev(10, R20)).directivity_dbi),
    "T037": lambda _: line(10, 0.5, taper.chebyshev(10, R20)).highest_sidelobe_vertical_db,
    # grating lobes
    **dict.fromkeys(("T044", "T046", "T047"), lambda i: grating.pitch_limit_wl(numbers(i)[0])),
    "T049": lambda _: grating.pitch_limit_wl(60, 10),
    "T050": lambda _: grating.lobe_angle_deg(1.1, 0, 1),
    "T052": lambda _: grating.triangular_side_limit_wl(0),
    # scan
    "T053": lambda _: beamwidth.scanned_width_deg(1.0, 60),
    "T055": lambda _: bounds.cosine_scan_loss_db(60, 1.5),
    "T056": lambda _: beamwidth.phase_step_deg(0.8, 6),
    # directivity of cos^n
    **dict.fromkeys(
        ("T059", "T062", "T065", "T068", "T071", "T074", "T077", "T080"),
        lambda i: linear(element_dbi(CosineElement(numbers(i)[0]))),
    ),
    "T082": lambda _: bounds.gain_from_beamwidths_dbi(65.11, 6.35, 32_400),
    "T083": lambda _: bounds.gain_from_beamwidths_dbi(65.11, 6.35, 30_000),
    # apertures: a long line is the continuous aperture
    "T085": lambda _: bounds.aperture_directivity_dbi(1, 1, HZ / 0.1),
    "T086": lambda _: bounds.aperture_directivity_dbi(0.42, 0.72, 3.5e9),
    "T088": lambda _: taper.sidelobe_db(np.ones(400)),
    "T089": lambda _: linear(taper.efficiency_db(np.ones(400))),
    "T091": lambda _: taper.sidelobe_db(taper.cosine_on_pedestal(400, 0)),
    "T092": lambda _: linear(taper.efficiency_db(taper.cosine_on_pedestal(400, 0))),
    "T094": lambda _: taper.sidelobe_db(taper.cosine_on_pedestal(400, 0) ** 2),
    "T095": lambda _: linear(taper.efficiency_db(taper.cosine_on_pedestal(400, 0) ** 2)),
    # Taylor
    "T109": lambda _: taper.taylor_dilation(20, 2),
    "T110": lambda _: 100 * line(200, 0.5, taper.taylor(200, 20, 2)).vertical_beamwidth_deg,
    "T112": lambda _: taper.taylor_dilation(25, 4),
    "T113": lambda _: 100 * line(200, 0.5, taper.taylor(200, 25, 4)).vertical_beamwidth_deg,
    "T115": lambda _: 100 * line(200, 0.5, taper.taylor(200, 25, 5)).vertical_beamwidth_deg,
    "T118": lambda _: 100 * line(200, 0.5, taper.taylor(200, 30, 5)).vertical_beamwidth_deg,
    "T119": lambda _: taper.taylor_dilation(30, 6),
    # small antennas
    "T124": lambda _: bounds.normal_gain_dbi(10 / (2 * np.pi), HZ),
    # sub-array lobes of 96 isotropic elements
    "T127": lambda _: _lobe(3, 0.7, 3, 10),
    "T128": lambda _: _lobe(4, 0.5, 0, 5),
    "T130": lambda _: _lobe(2, 0.7, 6, 12),
    # errors
    **dict.fromkeys(
        ("T131", "T134", "T137", "T140", "T143"), lambda i: errors.phase_quantisation_lobe_db(numbers(i)[0])
    ),
    **dict.fromkeys(
        ("T133", "T136", "T139", "T142", "T145"), lambda i: errors.phase_step_rms_deg(numbers(i)[0])
    ),
    "T146": lambda _: errors.phase_quantisation_floor_db(100, 3),
    "T149": lambda _: errors.surface_loss_db(1 / 32),
    "T151": lambda _: errors.surface_loss_db(1 / 50),
    # mismatch
    **dict.fromkeys(
        ("T152", "T154", "T158", "T160", "T164", "T166", "T170", "T172"),
        lambda i: matching.return_loss_db(numbers(i)[0]),
    ),
    **dict.fromkeys(
        ("T155", "T157", "T161", "T163", "T167", "T169", "T173"),
        lambda i: matching.mismatch_loss_db(numbers(i)[0]),
    ),
    # power and exposure
    "T176": lambda _: power.eirp_dbm(power.watts(43), 18),
    "T178": lambda _: power.eirp_dbm(power.total_power_w(5, 64), 24.5),
    "T179": lambda _: power.erp_dbm(61),
    "T182": lambda _: exposure.power_density_wm2(1000, 10),
    "T184": lambda _: exposure.field_strength_vm(exposure.power_density_wm2(1000, 10)),
    "T185": lambda _: exposure.far_field_pattern_m(1.0, 3.5e9),
    "T187": lambda _: exposure.far_field_pattern_m(0.0925, 26e9),
    **dict.fromkeys(
        ("T188", "T190", "T191"), lambda i: decibels.wavelength_m(numbers(i)[0] * 1e9) * 1000
    ),
    # wind (0.613 v^2: 1.226 kg/m^3; 0.625 v^2: 1.25 kg/m^3)
    "T193": lambda _: wind.dynamic_pressure_pa(160 / 3.6, 1.226),
    "T194": lambda _: wind.dynamic_pressure_pa(200 / 3.6, 1.226),
    "T196": lambda _: wind.dynamic_pressure_pa(45, 1.226),
    "T197": lambda _: wind.dynamic_pressure_pa(150 / 3.6, 1.25),
    "T199": lambda _: wind.force_n(2.0, 150 / 3.6, 0.8 * 0.5, 1.226),
    "T200": lambda _: wind.scaled_force_n(1.0, 150, 200),
    # elements
    "T209": lambda _: element_dbi(SectorElement(65, 65)),
    "T211": lambda _: element_dbi(SectorElement(90, 65)),
    "T212": lambda _: element_dbi(SectorElement(65, 65, 25, 25)),
    "T214": lambda _: bounds.cell_directivity_dbi(0.5, 0.5),
    "T215": lambda _: bounds.cell_directivity_dbi(0.5, 0.7),
}  # fmt: skip

EXACT = {"T001", "T002", "T026", "T028", "T029", "T031", "T032", "T035", "T131"}
"""Printed values that a rough formula gave; the package is exact and is held to the exact value."""

OUTSIDE = {
    "T013": "end-fire arrays are no panels", "T014": "end-fire", "T016": "end-fire", "T017": "end-fire",
    "T019": "binomial weights are not used in panels", "T020": "binomial",
    "T038": "hand-calculation chain of the book; the array itself is A25 of arrays.csv", "T040": "as T038",
    "T041": "as T038", "T043": "as T038",
    "T058": "rule 72815/(a^2 + b^2), 7 to 37 % low: not offered", "T061": "as T058", "T064": "as T058",
    "T067": "as T058", "T070": "as T058", "T073": "as T058", "T076": "as T058", "T079": "as T058",
    "T097": "triangular aperture", "T098": "triangular aperture", "T100": "circular aperture",
    "T101": "circular aperture", "T103": "circular aperture", "T104": "circular aperture",
    "T106": "circular aperture", "T107": "circular aperture",
    "T116": "ideal space factor, limit of Taylor", "T121": "as T116", "T122": "as T116",
    "T125": "identity behind the normal gain",
    "T148": "its inputs stand in a row left out of the table",
    "T175": "polarisation mismatch", "T181": "path loss is no panel figure",
    "T202": "wire antenna; 2.15 dBi is power.HALF_WAVE_DIPOLE_DBI", "T203": "wire antenna",
    "T205": "wire antenna", "T206": "wire antenna", "T208": "wire antenna",
}  # fmt: skip


def _lobe(grouped, pitch, fixed_tilt, tilt):
    column = ArrayLayout(96, 1, pitch, 0.5, subarray_rows=grouped, subarray_tilt_deg=fixed_tilt)
    return subarray_lobes(column, IsotropicElement(), HZ, tilt).level_db


@pytest.mark.parametrize("row", [ROWS[key] for key in CHECKED], ids=lambda row: row["id"])
def test_worked_example(row):
    exact = row["id"] in EXACT
    expected = float(row["exact_value"] if exact else row["expected"] or row["exact_value"])
    tolerance = max(2e-3 * abs(expected), 1e-6) if exact else float(row["tolerance"])
    if row["id"] in {"T026", "T028", "T029", "T031", "T032"}:
        tolerance = 0.005  # the table holds the ratio of angles, the package that of sines
    assert float(CHECKED[row["id"]](row["inputs"])) == pytest.approx(expected, abs=max(tolerance, 1e-9))


def test_every_row_is_checked_or_named_as_outside():
    assert set(CHECKED) | set(OUTSIDE) == set(ROWS)
    assert not set(CHECKED) & set(OUTSIDE)


def test_rows_that_disagree_with_the_exact_value_are_not_truth():
    disputed = {key for key, row in ROWS.items() if row["agrees_exact"] == "NO"}
    formula_offered = {"T083"}  # 30000/(az el) misses array A15 by 0.64 dB: the package defaults to 31000
    rule_of_thumb = {"T134", "T137", "T140", "T143"}
    assert disputed <= EXACT | set(OUTSIDE) | formula_offered | rule_of_thumb


def test_the_printed_chebyshev_broadening_is_not_used():
    assert taper.beamwidth_ratio(taper.chebyshev(10, R20)) > 1.19  # printed 1.079, exact 1.21
