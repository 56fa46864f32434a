"""Where the beam really points: the maximum reached from the steering direction."""

from __future__ import annotations

import numpy as np

from speccheck.physics.decibels import Floats
from speccheck.physics.field import Excitation
from speccheck.physics.layout import Complex, lines

_STEPS = 30
_SETTLED_RAD = 2e-6
_PROBE_RAD = 1e-3


def beam_peak(states: Excitation) -> tuple[Floats, Floats]:
    """Direction of the beam: Newton's method on the logarithm of the intensity, from the steering direction.

    The element pattern pulls the beam towards boresight. Along an axis where nothing varies the steering
    direction stays; a grating lobe of equal height is never jumped to.
    states [Excitation]: the states.
    Returns [rad, rad]: theta and phi, shape (S,) each.
    Source: definition of the beam peak; analytic derivatives of the array factor.
    """
    rows, columns, _ = lines(states.layout)
    k = states.wavenumbers
    # half a null width of the aperture, and never more than a sixth of a radian a step
    reach = [
        np.minimum(0.3 * 2 * np.pi / (k * (np.ptp(line.positions) + 1e-9)), 0.17) for line in (rows, columns)
    ]
    theta, phi = states.theta_rad.copy(), states.phi_rad.copy()
    for _ in range(_STEPS):
        g_theta, g_phi, h_theta, h_phi, h_cross = _derivatives(states, theta, phi)
        determinant = h_theta * h_phi - h_cross**2
        peaked = (h_theta < -1e-6) & (h_phi < -1e-6) & (determinant > 1e-9)
        safe = np.where(peaked, determinant, 1.0)
        d_theta = np.where(peaked, (h_cross * g_phi - h_phi * g_theta) / safe, _uphill(g_theta, h_theta))
        d_phi = np.where(peaked, (h_cross * g_theta - h_theta * g_phi) / safe, _uphill(g_phi, h_phi))
        d_theta = np.clip(d_theta, -reach[0], reach[0])
        d_phi = np.clip(d_phi, -reach[1], reach[1])
        theta += d_theta
        phi += d_phi
        if max(np.abs(d_theta).max(), np.abs(d_phi).max()) < _SETTLED_RAD:
            break
    return theta, phi


def _uphill(gradient: Floats, curvature: Floats) -> Floats:
    """Step along one axis alone: Newton where it curves down, along the slope elsewhere, none where flat."""
    curved = curvature < -1e-6
    newton = -gradient / np.where(curved, curvature, -1.0)
    return np.where(curved, newton, np.where(np.abs(gradient) > 1e-9, 0.1 * np.sign(gradient), 0.0))


def _derivatives(states: Excitation, theta: Floats, phi: Floats) -> tuple[Floats, ...]:
    """Gradient and second derivatives of the log intensity in theta and phi."""
    sin_t, cos_t, sin_p, cos_p = np.sin(theta), np.cos(theta), np.sin(phi), np.cos(phi)
    z, y, zz, yy, zy = _factor_derivatives(states, sin_t * sin_p, cos_t)
    e_t, e_p, e_tt, e_pp = _element_derivatives(states, theta, phi)
    yt, yp = cos_t * sin_p, sin_t * cos_p  # slopes of u_y; u_z slopes with -sin theta
    bend = y * sin_t * sin_p
    return (
        -z * sin_t + y * yt + e_t,
        y * yp + e_p,
        zz * sin_t**2 - z * cos_t + yy * yt**2 - 2 * zy * sin_t * yt - bend + e_tt,
        yy * yp**2 - bend + e_pp,
        yy * yt * yp - zy * sin_t * yp + y * cos_t * cos_p,
    )


def _factor_derivatives(states: Excitation, u_y: Floats, u_z: Floats) -> tuple[Floats, ...]:
    """Derivatives of the log power of the array factor: by z, y, zz, yy, zy."""
    rows, columns, shifts = lines(states.layout)
    k = states.wavenumbers
    position, shift = 1j * rows.positions, 1j * shifts
    turned = states.rows * np.exp(k[:, None] * (u_z[:, None] * position + u_y[:, None] * shift))
    ones = np.ones(len(position))
    if shifts.any():
        moments = np.stack([ones, position, position**2, shift, shift**2, shift * position], axis=1)
    else:
        moments = np.stack([ones, position, position**2], axis=1)
    row = turned @ moments
    along = 1j * columns.positions
    column = (states.columns * np.exp((k * u_y)[:, None] * along)) @ np.stack(
        [np.ones(len(along)), along, along**2], axis=1
    )
    z, zz = _log_derivatives(row[:, 0], row[:, 1], row[:, 2])
    y, yy = _log_derivatives(column[:, 0], column[:, 1], column[:, 2])
    zy: Floats = np.zeros(len(k))
    if shifts.any():
        extra = _log_derivatives(row[:, 0], row[:, 3], row[:, 4])
        y, yy = y + extra[0], yy + extra[1]
        zy = 2 * (row[:, 5] / row[:, 0] - row[:, 1] * row[:, 3] / row[:, 0] ** 2).real
    return k * z, k * y, k**2 * zz, k**2 * yy, k**2 * zy


def _log_derivatives(value: Complex, first: Complex, second: Complex) -> tuple[Floats, Floats]:
    slope = first / value
    return 2 * slope.real, 2 * (second / value - slope**2).real


def _element_derivatives(states: Excitation, theta: Floats, phi: Floats) -> tuple[Floats, ...]:
    """Gradient and curvature of the log element power, by differences (exact for parabolas in dB)."""
    d = _PROBE_RAD
    thetas = np.stack([theta, theta + d, theta - d, theta, theta])
    phis = np.stack([phi, phi, phi, phi + d, phi - d])
    centre, up, down, left, right = np.log(np.maximum(states.element.power(thetas, phis), 1e-30))
    return (
        (up - down) / (2 * d),
        (left - right) / (2 * d),
        (up + down - 2 * centre) / d**2,
        (left + right - 2 * centre) / d**2,
    )
