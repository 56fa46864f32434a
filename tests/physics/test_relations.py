"""Limit cases, inverse pairs, and arrays against scalars of the small relations."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from physics import tables

from speccheck.physics import bounds, errors, grating, intermodulation, matching, power, wind
from speccheck.physics.element import IsotropicElement, SectorElement
from speccheck.physics.layout import ArrayLayout, Lattice
from speccheck.physics.lobes import element_lobes, subarray_lobes
from speccheck.physics.states import array_states, directivity_dbi

HZ = tables.ONE_METRE_HZ


@given(st.floats(1.001, 20))
def test_vswr_and_return_loss_are_inverse(vswr):
    assert matching.vswr_from_return_loss(matching.return_loss_db(vswr)) == pytest.approx(vswr)


def test_perfect_match():
    assert matching.mismatch_loss_db(1.0) == 0  # nothing is reflected
    assert matching.return_loss_db(1.0) == np.inf


@given(st.floats(-60, 90))
def test_dbm_and_watts_are_inverse(level):
    assert power.dbm(power.watts(level)) == pytest.approx(level)


@given(st.floats(-200, -50), st.floats(20, 46), st.floats(20, 46))
def test_intermodulation_there_and_back(level, first, second):
    there = intermodulation.at_carrier_dbc(level, first, second)
    assert intermodulation.at_carrier_dbc(there, second, first) == pytest.approx(level)
    absolute = intermodulation.at_carrier_dbm(intermodulation.level_dbm(level, first), first, second)
    assert intermodulation.relative_dbc(absolute, second) == pytest.approx(float(there))


def test_wind_load_and_drag_are_inverse():
    assert wind.drag_coefficient(wind.force_n(1.2, 42, 0.8), 42, 0.8) == pytest.approx(1.2)


@pytest.mark.parametrize(
    ("scan", "limit"),
    # 1/(1 + sin scan), handbook rule, hand arithmetic
    [(0, 1.0), (8, 0.878), (12, 0.828), (15, 0.794), (20, 0.745), (30, 0.667), (60, 0.536)],
)
def test_pitch_limit(scan, limit):
    assert grating.pitch_limit_wl(scan) == pytest.approx(limit, abs=0.0006)
    assert grating.pitch_limit_wl(-scan) == pytest.approx(limit, abs=0.0006)  # either side alike
    assert grating.entry_angle_deg(grating.pitch_limit_wl(scan)) == pytest.approx(scan, abs=1e-6)


def test_lobe_of_a_wideband_column():
    """0.85 wavelengths at 1710 MHz are 1.34 at 2690: a lobe 48 deg away, 6.7 dB down on a 65 deg element."""
    pitch = 0.85 * 2690 / 1710
    assert grating.lobe_angle_deg(pitch, 0, 1) == pytest.approx(48.4, abs=0.2)
    lobe = element_lobes(ArrayLayout(10, 1, pitch, 0.5), SectorElement(), HZ)
    assert lobe.level_db == pytest.approx(-6.7, abs=0.15)


def test_half_wave_panel_has_no_grating_lobe_at_any_scan():
    lobe = element_lobes(ArrayLayout(8, 8, 0.5, 0.5), SectorElement(), HZ, 0, [0, 10, 30])
    assert lobe.visible_count.tolist() == [0, 0, 0]


def test_triangular_lattice_has_its_own_limit():
    """An equilateral lattice of side 1.1 wavelengths shows no lobe at broadside; a square one of 1.1 does."""
    side = 1.1
    staggered = ArrayLayout(12, 12, side * np.sqrt(3) / 2, side, lattice=Lattice.TRIANGULAR)
    assert element_lobes(staggered, SectorElement(), HZ).visible_count == 0
    assert element_lobes(ArrayLayout(12, 12, side, side), SectorElement(), HZ).visible_count == 4


def test_constant_phase_step_steers():
    """90 deg between half-wave neighbours points 30 deg aside (common practice)."""
    found = array_states(ArrayLayout(1, 16, 0.5, 0.5), IsotropicElement(front_only=True), HZ, 0, 30)
    assert found.peak_phi_deg == pytest.approx(30, abs=0.01)


def test_a_fourth_element_narrows_the_beam_lowers_side_lobes_and_adds_gain():
    """Common practice: more elements, narrower beam, lower first side lobe, more gain."""
    three, four = (array_states(ArrayLayout(n, 1, 0.5, 0.5), IsotropicElement(), HZ) for n in (3, 4))
    assert four.vertical_beamwidth_deg < three.vertical_beamwidth_deg
    assert four.highest_sidelobe_vertical_db < three.highest_sidelobe_vertical_db
    assert four.directivity_dbi > three.directivity_dbi


def test_half_wave_isotropic_line_has_directivity_n():
    """Exact for half-wave spacing: all cross terms vanish (Balanis, ch. 6)."""
    for count in (2, 5, 9):
        found = directivity_dbi(ArrayLayout(count, 1, 0.5, 0.5), IsotropicElement(), HZ, 13.0)
        assert 10 ** (found / 10) == pytest.approx(count)


def test_random_errors_against_simulation():
    """Mean over 4000 simulated sets of 32 excitations (seed 7) of gain loss and of the floor."""
    rng, count = np.random.default_rng(7), 32
    amplitude = 1 + rng.normal(0, 0.115, (4000, count))
    phase = rng.normal(0, np.radians(10), (4000, count))
    weights = amplitude * np.exp(1j * phase)
    loss = count * np.sum(np.abs(weights) ** 2, 1).mean() / np.mean(np.abs(weights.sum(1)) ** 2)
    simulated_floor = np.mean(np.abs((weights * (-1) ** np.arange(count)).sum(1)) ** 2) / count**2
    assert 10 * np.log10(loss) == pytest.approx(float(errors.gain_loss_db(1.0, 10.0)), abs=0.03)
    assert 10 * np.log10(simulated_floor) == pytest.approx(
        float(errors.sidelobe_floor_db(count, 1.0, 10.0)), abs=0.3
    )


def test_pointing_error_against_simulation():
    """Pointing of 16 half-wave elements with 10 deg phase errors, 4000 draws (seed 11)."""
    rng, n = np.random.default_rng(11), np.arange(16) - 7.5
    phase = rng.normal(0, np.radians(10), (4000, 16))
    slope = (phase @ n) / np.sum(n**2)
    pointed = np.degrees(np.arcsin(slope / np.pi))
    assert pointed.std() == pytest.approx(float(errors.pointing_rms_deg(16, 0.5, 10.0)), rel=0.05)


def test_narrow_apertures_are_not_bound_by_their_box():
    """1.3 m x 0.15 m at 800 MHz: 12.4 dBi by the plain formula, an honest column 15.7 dBi lossless."""
    assert not bounds.aperture_is_hard(0.15, 1.3, 800e6)
    assert bounds.aperture_directivity_dbi(0.15, 1.3, 800e6) > 15.7


def test_one_sub_array_alone_has_no_quantisation_lobe():
    """A passive column tied to one port: its sub-array lattice has a single point."""
    column = ArrayLayout(10, 1, 0.8, 0.5, subarray_rows=10, subarray_tilt_deg=4)
    assert np.isnan(subarray_lobes(column, SectorElement(), HZ, 4).level_db)


def test_states_refuse_what_is_no_frequency():
    with pytest.raises(ValueError, match="frequencies must be positive"):
        array_states(ArrayLayout(2, 2, 0.5, 0.5), SectorElement(), [HZ, 0.0])
    with pytest.raises(ValueError, match="angles finite"):
        array_states(ArrayLayout(2, 2, 0.5, 0.5), SectorElement(), HZ, np.nan)


def test_element_refuses_what_is_no_width():
    with pytest.raises(ValueError, match="must be positive"):
        SectorElement(0.0)


def test_a_single_element_is_its_own_pattern():
    """TR 38.901 element: 9.826 dBi integrated, half power at 65.1 deg (-3.01 dB of a -3 dB width)."""
    found = array_states(ArrayLayout(1, 1, 0.0, 0.0), SectorElement(), HZ)
    assert found.directivity_dbi == pytest.approx(9.826, abs=0.001)
    assert found.horizontal_beamwidth_deg == pytest.approx(65.11, abs=0.02)
    assert np.isnan(found.highest_sidelobe_vertical_db)


def test_layout_refuses_what_cannot_be():
    with pytest.raises(ValueError, match="10 x 1 elements do not divide into sub-arrays of 3 x 1"):
        ArrayLayout(10, 1, 0.8, 0.5, subarray_rows=3)
    with pytest.raises(ValueError, match="must be positive"):
        ArrayLayout(10, 1, 0.0, 0.5)
    with pytest.raises(ValueError, match="has 4 amplitudes for 10 ports"):
        ArrayLayout(10, 1, 0.8, 0.5, row_taper=(1.0,) * 4)
    with pytest.raises(ValueError, match="at least 1"):
        ArrayLayout(0, 1, 0.8, 0.5)
