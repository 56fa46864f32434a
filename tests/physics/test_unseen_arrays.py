"""Arrays nobody tabulated, against the brute-force sphere of tests/physics/oracle.py."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from physics import oracle, tables

from speccheck.physics.element import SectorElement
from speccheck.physics.layout import ArrayLayout, Lattice
from speccheck.physics.states import array_states, directivity_dbi


def layout_of(panel):
    return ArrayLayout(
        panel.rows,
        panel.columns,
        panel.pitch_v,
        panel.pitch_h,
        subarray_rows=panel.grouped,
        subarray_tilt_deg=panel.fixed_tilt,
        row_taper=tuple(panel.row_weights),
        column_taper=tuple(panel.column_weights),
        lattice=Lattice.TRIANGULAR if panel.staggered else Lattice.RECTANGULAR,
    )


def element_of(panel):
    return SectorElement(panel.az_hpbw, panel.el_hpbw, panel.floor, panel.floor)


@st.composite
def panels(draw):
    grouped = draw(st.sampled_from([1, 1, 2, 3]))
    ports, columns = draw(st.integers(2, 5)), draw(st.integers(1, 8))
    taper = st.floats(0.3, 1.0)
    return oracle.Panel(
        ports * grouped,
        columns,
        draw(st.floats(0.45, 0.95)),
        draw(st.floats(0.45, 0.8)),
        az_hpbw=draw(st.floats(50, 110)),
        el_hpbw=draw(st.floats(50, 90)),
        floor=draw(st.floats(18, 30)),
        grouped=grouped,
        fixed_tilt=draw(st.floats(0, 5)) if grouped > 1 else 0.0,
        staggered=columns > 1 and draw(st.booleans()),
        row_weights=draw(st.lists(taper, min_size=ports, max_size=ports)),
        column_weights=draw(st.lists(taper, min_size=columns, max_size=columns)),
    )


@settings(max_examples=25, deadline=None, derandomize=True)
@given(panel=panels(), tilt=st.floats(0, 10), scan=st.floats(-40, 40))
def test_directivity_of_any_panel(panel, tilt, scan):
    scan = scan if panel.columns > 2 else 0.0
    found = array_states(layout_of(panel), element_of(panel), tables.ONE_METRE_HZ, tilt, scan)
    theta, phi = np.radians(found.peak_theta_deg), np.radians(found.peak_phi_deg)
    beam = oracle.power(panel, tilt, scan, theta, phi)
    expected = 10 * np.log10(beam / oracle.mean_power(panel, tilt, scan))
    assert found.directivity_dbi == pytest.approx(float(expected), abs=0.01)
    # and the beam is a maximum: no neighbour is higher
    near = 1e-3 * np.array([[1, 0], [-1, 0], [0, 1], [0, -1]])
    assert np.all(oracle.power(panel, tilt, scan, theta + near[:, 0], phi + near[:, 1]) <= beam * (1 + 1e-6))


LISTED = [
    (oracle.Panel(11, 1, 0.72, 0.5, az_hpbw=62), 4, 0),
    (oracle.Panel(8, 1, 0.93, 0.5, az_hpbw=88, floor=22), 9, 0),
    (oracle.Panel(6, 5, 0.66, 0.55, az_hpbw=90, el_hpbw=75), 5, 25),
    (oracle.Panel(12, 4, 0.6, 0.5, az_hpbw=80, grouped=4, fixed_tilt=4), 8, 0),
    (oracle.Panel(9, 6, 0.68, 0.52, grouped=3, fixed_tilt=2, row_weights=[0.6, 1, 0.7]), 5, 40),
    (oracle.Panel(7, 7, 0.5, 0.5, staggered=True), 0, 30),
    (oracle.Panel(16, 12, 0.5, 0.5, az_hpbw=100, el_hpbw=85), 6, 50),
    (oracle.Panel(3, 20, 0.7, 0.5, az_hpbw=85), 0, -35),
    (oracle.Panel(10, 8, 0.8, 0.6, row_weights=[0.4, 0.6, 0.8, 0.95, 1, 1, 0.95, 0.8, 0.6, 0.4]), 7, 10),
]


@pytest.mark.parametrize(("panel", "tilt", "scan"), LISTED)
def test_cuts_of_listed_panels(panel, tilt, scan):
    found = array_states(layout_of(panel), element_of(panel), tables.ONE_METRE_HZ, tilt, scan)
    assert found.directivity_dbi == pytest.approx(oracle.directivity(panel, tilt, scan), abs=0.01)
    width, lobe = oracle.width_and_lobe(panel, tilt, scan, "vertical")
    assert found.vertical_beamwidth_deg == pytest.approx(width, abs=0.05)
    assert found.highest_sidelobe_vertical_db == pytest.approx(lobe, abs=0.1)
    if panel.columns > 1:
        width, lobe = oracle.width_and_lobe(panel, tilt, scan, "horizontal")
        assert found.horizontal_beamwidth_deg == pytest.approx(width, abs=0.05)
        assert found.highest_sidelobe_horizontal_db == pytest.approx(lobe, abs=0.1)


@pytest.mark.parametrize("columns", [1, 8, 24, 40])
def test_wide_and_tall_apertures_keep_the_tolerance(columns):
    """The quadrature order follows the aperture in both directions: 40 columns of 100 deg elements."""
    panel = oracle.Panel(4, columns, 0.7, 0.5, az_hpbw=100, el_hpbw=80)
    found = directivity_dbi(layout_of(panel), element_of(panel), tables.ONE_METRE_HZ)
    step = 0.5 if columns > 24 else 1.0
    assert found == pytest.approx(oracle.directivity(panel, step=step), abs=0.01)
