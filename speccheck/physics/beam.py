"""Where the beam really points: the maximum reached from the steering direction."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from speccheck.physics.decibels import Floats
from speccheck.physics.field import Excitation
from speccheck.physics.layout import Complex

_STEPS = 30
_SETTLED_RAD = 4e-3
"""Newton's method squares the error: a last step of 4e-3 rad leaves about 5e-5 rad, 0.003 deg."""
_FLAT_RISE = 0.1
"""Beside a null Newton's method only doubles the distance: a short step that rises more is not the last."""
_FLAT = 1e-6


@dataclass(frozen=True, eq=False, slots=True)
class Beam:
    """Direction [rad] of the beam of each state."""

    theta_rad: Floats
    phi_rad: Floats


def find_beam(states: Excitation) -> Beam:
    """Direction of the beam: Newton's method on the logarithm of the intensity, from the steering direction.

    The element pattern pulls the beam towards boresight. Along an axis where nothing varies the steering
    direction stays; a grating lobe of equal height is never jumped to.
    states [Excitation]: the states.
    Returns [Beam]: directions, shape (S,).
    Source: definition of the beam peak; analytic derivatives of the array factor.
    """
    reach = _reach(states)
    theta, phi = _pulled(states)
    for _ in range(_STEPS):
        g_t, g_p, h_t, h_p, h_tp = _derivatives(states, theta, phi)
        determinant = h_t * h_p - h_tp * h_tp
        if h_t.max() < -_FLAT and h_p.max() < -_FLAT and determinant.min() > 1e-9:
            d_theta, d_phi = (h_tp * g_p - h_p * g_t) / determinant, (h_tp * g_t - h_t * g_p) / determinant
        else:  # each axis on its own
            d_theta, d_phi = _uphill(g_t, h_t), _uphill(g_p, h_p)
        step = np.array([d_theta, d_phi])
        step = np.minimum(np.maximum(step, -reach), reach)
        theta, phi = theta + step[0], phi + step[1]
        rise = np.abs(step * (g_t, g_p)).max()
        if rise < _FLAT_RISE and np.abs(step).max() < _SETTLED_RAD:
            break
    return Beam(theta, phi)


def _pulled(states: Excitation) -> tuple[Floats, Floats]:
    """First guess: each line a parabola by the spread of its weights, pulled in by the element alone."""
    start = np.array([states.theta_rad - np.pi / 2, states.phi_rad])
    stiff = np.array([[2 * line.spread_m2] for line in states.lines]) * states.wavenumbers**2
    sine, cosine = np.sin(start), np.cos(start)
    slope, bend = np.empty_like(start), np.empty_like(start)
    slope[0], slope[1], bend[0], bend[1] = states.element.log_slopes(start[0] + np.pi / 2, start[1])
    bend -= stiff * cosine * cosine
    angle = start - slope / np.minimum(bend, -_FLAT)
    now, cosine = np.sin(angle), np.cos(angle)
    slope[0], slope[1], bend[0], bend[1] = states.element.log_slopes(angle[0] + np.pi / 2, angle[1])
    off = stiff * (now - sine)
    slope -= off * cosine
    bend += off * now - stiff * cosine * cosine
    angle -= slope / np.minimum(bend, -_FLAT)
    return angle[0] + np.pi / 2, angle[1]


def _reach(states: Excitation) -> Floats:
    """Longest step [rad] by theta and phi: about a third of a null width, never more than a sixth."""
    k = states.highest
    sides = states.layout.height_m, states.layout.width_m
    return np.array([[min(2.0 / (k * side + 1e-9), 0.17)] for side in sides])


def _uphill(gradient: Floats, curvature: Floats) -> Floats:
    """Step along one axis alone: Newton where it curves down, along the slope elsewhere, none where flat."""
    curved = curvature < -_FLAT
    newton = -gradient / np.where(curved, curvature, -1.0)
    return np.where(curved, newton, np.where(np.abs(gradient) > 1e-9, 0.1 * np.sign(gradient), 0.0))


def _derivatives(states: Excitation, theta: Floats, phi: Floats) -> tuple[Floats, ...]:
    """Gradient and second derivatives of the log intensity in theta and phi."""
    sin_t, cos_t, sin_p, cos_p = np.sin(theta), np.cos(theta), np.sin(phi), np.cos(phi)
    u_y = sin_t * sin_p
    z, y, zz, yy, zy = _factor_derivatives(states, u_y, cos_t)
    e_t, e_p, e_tt, e_pp = states.element.log_slopes(theta, phi)
    y_t, y_p = cos_t * sin_p, sin_t * cos_p  # slopes of u_y; u_z slopes with -sin theta
    bend = y * u_y
    h_tt = zz * sin_t * sin_t - z * cos_t + yy * y_t * y_t - bend + e_tt
    h_tp = yy * y_t * y_p + y * cos_t * cos_p
    if zy is not None:
        h_tt, h_tp = h_tt - 2 * zy * sin_t * y_t, h_tp - zy * sin_t * y_p
    return y * y_t - z * sin_t + e_t, y * y_p + e_p, h_tt, yy * y_p * y_p - bend + e_pp, h_tp


def _factor_derivatives(
    states: Excitation, u_y: Floats, u_z: Floats
) -> tuple[Floats, Floats, Floats, Floats, Floats | None]:
    """Derivatives of the log power of the array factor: by z, y, zz, yy, zy (None: rectangular lattice)."""
    rows, columns = states.lines
    k = states.wavenumbers
    turned, column = _turned(states, u_y, u_z)
    (y, z), (yy, zz) = _log_derivatives(np.array([column @ columns.moments, turned @ rows.moments]))
    if states.row_shifts_m is None:
        return k * z, k * y, k * k * zz, k * k * yy, None
    shift = 1j * states.row_shifts_m
    sideways = turned @ np.stack([shift**0, shift, shift**2, shift * rows.moments[:, 1]], axis=1)
    ahead = turned @ rows.moments[:, 1] / sideways[:, 0]
    y_shift, yy_shift = _log_derivatives(sideways[:, :3])
    zy = 2 * (sideways[:, 3] / sideways[:, 0] - ahead * sideways[:, 1] / sideways[:, 0]).real
    return k * z, k * (y + y_shift), k * k * zz, k * k * (yy + yy_shift), k * k * zy


def _turned(states: Excitation, u_y: Floats, u_z: Floats) -> tuple[Complex, Complex]:
    """Contribution of each row (S, M) and of each column (S, N) in one direction per state."""
    rows, columns = states.lines
    across = (states.wavenumbers * u_y)[:, None]
    path = (states.wavenumbers * u_z)[:, None] * rows.moments[:, 1]
    if states.row_shifts_m is not None:
        path = path + across * (1j * states.row_shifts_m)
    return states.rows * np.exp(path), states.columns * np.exp(across * columns.moments[:, 1])


def _log_derivatives(moments: Complex) -> tuple[Floats, Floats]:
    """First and second derivative of the log power from a factor and its two derivatives, shape (..., 3)."""
    slope, bend = moments[..., 1] / moments[..., 0], moments[..., 2] / moments[..., 0]
    return 2 * slope.real, 2 * (bend - slope * slope).real
