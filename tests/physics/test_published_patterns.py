"""Gains in single directions against a public reference test suite of ITU-R M.2101 (158 vectors)."""

import numpy as np
import pytest
from physics import tables

from speccheck.physics.decibels import db
from speccheck.physics.element import SectorElement
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.pattern import nominal_pattern_dbi

VECTORS = tables.rows("pattern_test_vectors.csv")
FAMILIES = sorted({(row["model"], row["parameters"]) for row in VECTORS})


def recomputed(model, parameters, rows):
    p = {key: float(value) for key, value in (part.split("=") for part in parameters.split(";"))}
    element = SectorElement(p["phi3"], p["theta3"], p["Am"], p["SLA"])
    theta, phi = (np.array([float(row[name]) for row in rows]) for name in ("el_deg", "az_deg"))
    theta = 90 - theta
    if model == "element":
        return p["G"] + db(element.power(np.radians(theta), np.radians(phi)))
    grouped = int(p.get("M", 1))
    # in the published extension the sub-array pitch need not be the sub-array length: overlay group factor
    layout = ArrayLayout(int(p["NV"]), int(p["NH"]), p["dV"], p["dH"])
    gains = np.array(
        [
            nominal_pattern_dbi(
                layout, element, tables.ONE_METRE_HZ, t, f, element_gain_dbi=p["G"], correlation=p["rho"],
                tilt_deg=-float(row["steer_el_deg"]), scan_deg=float(row["steer_az_deg"]),
            )
            for t, f, row in zip(theta, phi, rows, strict=True)
        ]
    )  # fmt: skip
    if grouped > 1:
        inner = ArrayLayout(grouped, 1, p["dsub"], 1.0)
        own = db(element.power(np.radians(theta), np.radians(phi)))
        gains += [
            nominal_pattern_dbi(
                inner, element, tables.ONE_METRE_HZ, t, f, element_gain_dbi=0, tilt_deg=p["subtilt"]
            ) - e
            for t, f, e in zip(theta, phi, own, strict=True)
        ]  # fmt: skip
    return gains


@pytest.mark.parametrize(
    ("model", "parameters"), FAMILIES, ids=[f"{m}-{i}" for i, (m, _) in enumerate(FAMILIES)]
)
def test_all_vectors(model, parameters):
    rows = [row for row in VECTORS if (row["model"], row["parameters"]) == (model, parameters)]
    published = [float(row["published_gain_dbi"]) for row in rows]
    assert recomputed(model, parameters, rows) == pytest.approx(
        published, abs=1e-5
    )  # angles are printed to 1e-6 deg


def test_no_vector_is_left_out():
    assert len(VECTORS) == 158
