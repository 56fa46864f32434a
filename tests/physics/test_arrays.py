"""Array figures against the brute-force table tests/reference/arrays.csv (columns D_gauss_legendre and
hpbw_step_diff_deg tell its accuracy); required here: directivity 0.01 dB, widths 0.05 deg, lobes 0.1 dB."""

import numpy as np
import pytest
from physics import tables

from speccheck.physics.lobes import element_lobes, highest_lobe, subarray_lobes
from speccheck.physics.pattern import gain_pattern_dbi
from speccheck.physics.states import array_states, scan_loss_db

ROWS = tables.rows("arrays.csv")
OMNI_BY_CONVENTION = {"A11"}
"""One row of isotropic elements scanned to 45 deg: the table calls its vertical cut 'omni', yet at constant
phi u_y changes with theta, so the pattern varies; the row is checked in the horizontal cut only."""


def states(row):
    return array_states(
        tables.layout(row),
        tables.element(row["element"]),
        tables.ONE_METRE_HZ,
        float(row["downtilt_deg"]),
        float(row["az_scan_deg"]),
    )


def figure(text):
    try:
        return float(text)
    except ValueError:
        return np.nan


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["id"])
class TestTable:
    def test_directivity(self, row):
        assert states(row).directivity_dbi == pytest.approx(float(row["D_gauss_legendre"]), abs=0.001)

    def test_beam_direction(self, row):
        found = states(row)
        assert found.peak_theta_deg == pytest.approx(float(row["peak_theta_deg"]), abs=0.02)
        assert found.peak_phi_deg == pytest.approx(float(row["peak_phi_deg"]), abs=0.02)

    @pytest.mark.parametrize(
        ("column", "field", "tolerance"),
        [
            ("hpbw_az_deg", "horizontal_beamwidth_deg", 0.05),
            ("hpbw_el_deg", "vertical_beamwidth_deg", 0.05),
            ("fsll_az_dB", "first_sidelobe_horizontal_db", 0.1),
            ("fsll_el_dB", "first_sidelobe_vertical_db", 0.1),
            ("fsll_el_upper_dB", "upper_sidelobe_db", 0.1),
            ("msll_az_dB", "highest_sidelobe_horizontal_db", 0.1),
            ("msll_el_dB", "highest_sidelobe_vertical_db", 0.1),
        ],
    )
    def test_cut(self, row, column, field, tolerance):
        if "_el_" in column and row["id"] in OMNI_BY_CONVENTION:
            pytest.skip("convention of the table, see OMNI_BY_CONVENTION")
        expected = figure(row[column])  # blank, 'omni' and '>front' mean that the cut has none
        assert getattr(states(row), field) == pytest.approx(expected, abs=tolerance, nan_ok=True)

    def test_scan_loss(self, row):
        loss = scan_loss_db(
            tables.layout(row),
            tables.element(row["element"]),
            tables.ONE_METRE_HZ,
            float(row["downtilt_deg"]),
            float(row["az_scan_deg"]),
        )
        assert loss == pytest.approx(float(row["scan_loss_D_dB"]), abs=0.01)

    @pytest.mark.parametrize(("prefix", "search"), [("gl", element_lobes), ("ql", subarray_lobes)])
    def test_lattice_lobes(self, row, prefix, search):
        lobe = search(
            tables.layout(row),
            tables.element(row["element"]),
            tables.ONE_METRE_HZ,
            float(row["downtilt_deg"]),
            float(row["az_scan_deg"]),
        )
        assert lobe.level_db == pytest.approx(figure(row[f"{prefix}_level_dB"]), abs=0.1, nan_ok=True)
        assert lobe.theta_deg == pytest.approx(figure(row[f"{prefix}_theta_deg"]), abs=0.3, nan_ok=True)
        assert lobe.phi_deg == pytest.approx(figure(row[f"{prefix}_phi_deg"]), abs=0.3, nan_ok=True)
        if row[f"{prefix}_visible_count"]:
            assert lobe.visible_count == int(row[f"{prefix}_visible_count"])
        if row.get(f"{prefix}_centre_visible"):
            assert bool(lobe.centre_visible) is (row[f"{prefix}_centre_visible"] == "True")

    def test_highest_lobe_in_front(self, row):
        if not row["max_lobe3d_dB"]:
            pytest.skip("the table gives it for planar arrays only")
        lobe = highest_lobe(
            tables.layout(row),
            tables.element(row["element"]),
            tables.ONE_METRE_HZ,
            float(row["downtilt_deg"]),
            float(row["az_scan_deg"]),
        )
        assert lobe.level_db == pytest.approx(float(row["max_lobe3d_dB"]), abs=0.05)

    def test_front_to_back_of_the_mirrored_direction(self, row):
        if row["fb_mirror_dB"] in ("inf", ""):
            pytest.skip("nothing behind")
        tilt, scan = float(row["downtilt_deg"]), float(row["az_scan_deg"])
        found = states(row)
        phi = np.array([found.peak_phi_deg, 180 - found.peak_phi_deg])
        ahead, behind = gain_pattern_dbi(
            tables.layout(row),
            tables.element(row["element"]),
            tables.ONE_METRE_HZ,
            found.peak_theta_deg,
            np.where(phi > 180, phi - 360, phi),
            tilt_deg=tilt,
            scan_deg=scan,
        )
        assert ahead - behind == pytest.approx(float(row["fb_mirror_dB"]), abs=0.1)


def test_many_states_at_once_equal_one_at_a_time():
    row = next(r for r in ROWS if r["id"] == "A35")
    layout, element, freq = tables.layout(row), tables.element("37840"), tables.ONE_METRE_HZ
    tilts, scans = np.array([0.0, 3, 10, 10]), np.array([0.0, 0, 45, 45])
    together = array_states(layout, element, freq, tilts, scans)
    for at, (tilt, scan) in enumerate(zip(tilts, scans, strict=True)):
        alone = array_states(layout, element, freq, tilt, scan)
        assert together.directivity_dbi[at] == pytest.approx(float(alone.directivity_dbi), abs=1e-6)
        assert together.vertical_beamwidth_deg[at] == pytest.approx(
            float(alone.vertical_beamwidth_deg), abs=1e-4
        )


def test_shapes_broadcast():
    row = next(r for r in ROWS if r["id"] == "A29")
    found = array_states(
        tables.layout(row), tables.element("38901"), tables.ONE_METRE_HZ, np.zeros((3, 1)), np.zeros(4)
    )
    assert found.directivity_dbi.shape == found.freq_hz.shape == (3, 4)
