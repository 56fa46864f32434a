"""Kernels of elements against a plain sum over the sphere, the definition of the integral."""

import numpy as np
import pytest

from speccheck.physics.element import SectorElement

LAGS_M = np.arange(6.0)


@pytest.mark.parametrize("pitch_rad", [(0.9, 2.5), (3.1, 5.0), (14.0, 15.9), (16.1, 4.0)])
@pytest.mark.parametrize("element", [SectorElement(65, 65), SectorElement(95, 20, 25, 20)])
def test_kernel_is_the_integral_over_the_sphere(element, pitch_rad):
    y, z = LAGS_M * pitch_rad[0], LAGS_M * pitch_rad[1]
    theta, phi = (np.arange(900) + 0.5) * np.pi / 900, (np.arange(900) + 0.5) * np.pi / 900  # y even: half
    weight = element.power(theta[:, None], phi) * np.sin(theta)[:, None] * (np.pi / 900) ** 2 / (2 * np.pi)
    u_y = np.sin(theta)[:, None] * np.sin(phi)
    over_phi = np.array([(weight * np.cos(lag * u_y)).sum(1) for lag in y])
    expected = over_phi @ np.cos(np.multiply.outer(np.cos(theta), z))
    assert element.kernel(np.ones(1), y, z)[0] == pytest.approx(expected, abs=2e-6)
