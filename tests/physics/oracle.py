"""An independent brute force: the sphere summed element by element, nothing shared with the package.

Midpoint rule in theta and phi, rows and columns separated; angles and axes as in 3GPP TR 38.901 clause 7.1.
"""

from __future__ import annotations

from dataclasses import dataclass, field

import numpy as np


@dataclass
class Panel:
    """A panel with pitches in wavelengths; weights per port of a column and of a row."""

    rows: int
    columns: int
    pitch_v: float
    pitch_h: float
    az_hpbw: float = 65.0
    el_hpbw: float = 65.0
    floor: float = 30.0
    grouped: int = 1
    fixed_tilt: float = 0.0
    staggered: bool = False
    row_weights: list[float] = field(default_factory=list)
    column_weights: list[float] = field(default_factory=list)
    errors: np.ndarray | None = None


def element_power(panel, theta, phi):
    vertical = np.minimum(12 * ((np.degrees(theta) - 90) / panel.el_hpbw) ** 2, panel.floor)
    horizontal = np.minimum(12 * (np.degrees(phi) / panel.az_hpbw) ** 2, panel.floor)
    return 10 ** (-np.minimum(vertical + horizontal, panel.floor) / 10)


def excitation(panel, tilt, scan):
    m, n = np.arange(panel.rows), np.arange(panel.columns)
    z = m * panel.pitch_v
    shift = (m % 2) * panel.pitch_h / 2 * panel.staggered
    y = n * panel.pitch_h
    centre = (m // panel.grouped) * panel.grouped * panel.pitch_v + (panel.grouped - 1) / 2 * panel.pitch_v
    theta0, phi0 = np.radians(90 + tilt), np.radians(scan)
    inside = np.cos(np.radians(90 + panel.fixed_tilt))
    row = np.exp(-2j * np.pi * (centre * np.cos(theta0) + (z - centre) * inside))
    across = np.exp(-2j * np.pi * np.add.outer(shift, y) * np.sin(theta0) * np.sin(phi0))
    amplitude_v = np.repeat(panel.row_weights or [1.0] * (panel.rows // panel.grouped), panel.grouped)
    amplitude_h = np.asarray(panel.column_weights or [1.0] * panel.columns)
    weights = (row * amplitude_v)[:, None] * amplitude_h * across
    if panel.errors is not None:
        weights = weights * panel.errors
    return z, np.add.outer(shift, y), weights


def power(panel, tilt, scan, theta, phi):
    """Intensity at directions of any one shape."""
    z, y, weights = excitation(panel, tilt, scan)
    theta, phi = np.broadcast_arrays(theta, phi)
    u_y, u_z = np.sin(theta) * np.sin(phi), np.cos(theta)
    total = np.zeros(theta.shape, complex)
    for m in range(panel.rows):
        line = sum(weights[m, n] * np.exp(2j * np.pi * y[m, n] * u_y) for n in range(panel.columns))
        total += line * np.exp(2j * np.pi * z[m] * u_z)
    return element_power(panel, theta, phi) * np.abs(total) ** 2


def mean_power(panel, tilt, scan, step=1.0):
    """Mean of the intensity over the sphere, midpoint rule."""
    theta = np.radians(np.arange(step / 2, 180, step))
    phi = np.radians(np.arange(-180 + step / 2, 180, step))
    values = power(panel, tilt, scan, theta[:, None], phi[None, :]) * np.sin(theta)[:, None]
    return values.sum() * np.radians(step) ** 2 / (4 * np.pi)


def peak(panel, tilt, scan):
    """Beam by two nested grid searches around the steering direction: theta, phi [rad], intensity."""
    theta, phi = np.radians(90 + tilt), np.radians(scan)
    extents = (max((panel.rows - 1) * panel.pitch_v, 0.5), max((panel.columns - 1) * panel.pitch_h, 0.5))
    width = np.array([0.25 / extents[0], 0.35 / extents[1] / max(np.cos(phi), 0.3)])
    width = np.minimum(width, 0.4)
    for _ in range(5):
        thetas = theta + np.linspace(-1, 1, 21) * width[0]
        phis = phi + np.linspace(-1, 1, 21) * width[1]
        values = power(panel, tilt, scan, thetas[:, None], phis[None, :])
        i, j = np.unravel_index(values.argmax(), values.shape)
        theta, phi, width = thetas[i], phis[j], width / 6
    return theta, phi, float(values.max())


def directivity(panel, tilt=0.0, scan=0.0, step=1.0):
    """Directivity [dBi] at the beam."""
    return 10 * np.log10(peak(panel, tilt, scan)[2] / mean_power(panel, tilt, scan, step))


def width_and_lobe(panel, tilt, scan, plane, step=0.02):
    """Half-power width [deg] and highest level [dB] outside the first minima of a cut, by fine sampling."""
    theta, phi, top = peak(panel, tilt, scan)
    front = np.radians(np.arange(-90 + step / 2, 90, step))
    if plane == "vertical":
        values, at = power(panel, tilt, scan, np.pi / 2 + front, phi) / top, theta - np.pi / 2
    else:
        values, at = power(panel, tilt, scan, theta, front) / top, phi
    middle = int(np.argmin(np.abs(front - at)))
    right = middle + int(np.argmax(values[middle:] < 0.5))
    left = middle - int(np.argmax(values[middle::-1] < 0.5))
    edges = [
        np.interp(0.5, values[[right, right - 1]], front[[right, right - 1]]),
        np.interp(0.5, values[[left, left + 1]], front[[left, left + 1]]),
    ]
    falls = np.diff(values) > 1e-12
    after = np.flatnonzero(falls[middle + 1 :])
    before = np.flatnonzero(~falls[: middle - 1])
    rest = np.concatenate(
        [
            values[middle + 1 + after[0] :] if len(after) else [],
            values[: before[-1] + 2] if len(before) else [],
        ]
    )
    return float(np.degrees(edges[0] - edges[1])), float(10 * np.log10(rest.max())) if len(rest) else np.nan
