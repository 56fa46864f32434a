"""Every figure of a random array by brute force: a quarter-degree sphere, fine cuts, hill climbing.

Nothing is shared with the package. Axes, steering, tapers, panel groups and the meaning of each figure are
those of tests/reference/arrays.csv: cuts in front only, half power at -3.0103 dB, lobes outside the first
minima, grating and sub-array lobes within a null width of their lattice point. Lengths in wavelengths.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np

STEP_DEG = 0.25
HALF_POWER = 10 ** (-3.0103 / 10)


@dataclass(frozen=True)
class Array:
    """Rows, columns: of one panel group. Weights: amplitudes of the ports along the whole height or width."""

    rows: int
    columns: int
    pitch_v: float
    pitch_h: float
    element: tuple[float, float, float] = (65.0, 65.0, 30.0)
    grouped: int = 1
    fixed_tilt: float = 0.0
    staggered: bool = False
    row_weights: tuple[float, ...] = ()
    column_weights: tuple[float, ...] = ()
    groups: tuple[int, int] = (1, 1)
    group_pitches: tuple[float, float] = (0.0, 0.0)


def centred(count, pitch, groups, group_pitch):
    positions = np.add.outer(np.arange(groups) * group_pitch, np.arange(count) * pitch).ravel()
    return positions - positions.mean()


@dataclass(frozen=True)
class Brute:
    """One array steered one way."""

    array: Array
    tilt: float = 0.0
    scan: float = 0.0

    @cached_property
    def steering(self):
        tilt, scan = np.radians(self.tilt), np.radians(self.scan)
        return np.cos(tilt) * np.sin(scan), -np.sin(tilt)

    @cached_property
    def driven(self):
        """Positions and weights of rows and columns, and the sideways shift of each row."""
        a = self.array
        z = centred(a.rows, a.pitch_v, a.groups[0], a.group_pitches[0])
        y = centred(a.columns, a.pitch_h, a.groups[1], a.group_pitches[1])
        shift = np.tile(np.arange(a.rows) % 2, a.groups[0]) * a.pitch_h / 2 * a.staggered
        centre = np.repeat(z.reshape(-1, a.grouped).mean(1), a.grouped)
        u_y, u_z = self.steering
        inside = -np.sin(np.radians(a.fixed_tilt))
        along = np.exp(-2j * np.pi * (centre * u_z + (z - centre) * inside + shift * u_y))
        if a.row_weights:
            along = along * np.repeat(a.row_weights, a.grouped)
        across = np.exp(-2j * np.pi * y * u_y) * np.asarray(a.column_weights or 1.0)
        return z, y, shift, along, across

    def power(self, theta, phi):
        """Intensity towards directions of one shape, element pattern included."""
        z, y, shift, along, across = self.driven
        theta, phi = np.broadcast_arrays(np.asarray(theta, float), phi)
        u_y, u_z = np.sin(theta) * np.sin(phi), np.cos(theta)
        rows = sum(
            w * np.exp(2j * np.pi * (p * u_z + s * u_y)) for p, s, w in zip(z, shift, along, strict=True)
        )
        columns = sum(w * np.exp(2j * np.pi * p * u_y) for p, w in zip(y, across, strict=True))
        return self.element_power(theta, phi) * np.abs(rows * columns) ** 2

    def element_power(self, theta, phi):
        az, el, floor = self.array.element
        vertical = np.minimum(12 * ((np.degrees(theta) - 90) / el) ** 2, floor)
        horizontal = np.minimum(12 * (np.degrees(phi) / az) ** 2, floor)
        return 10 ** (-np.minimum(vertical + horizontal, floor) / 10)

    def sphere(self, phi_from, phi_to, step=STEP_DEG):
        """Theta, phi of a midpoint grid and the intensity there; rows summed once per theta."""
        theta = np.radians(np.arange(step / 2, 180, step))
        phi = np.radians(np.arange(phi_from + step / 2, phi_to, step))
        z, y, shift, along, across = self.driven
        u_y = np.multiply.outer(np.sin(theta), np.sin(phi))
        columns = np.zeros(u_y.shape, complex)
        for p, w in zip(y, across, strict=True):
            columns += w * np.exp(2j * np.pi * p * u_y)
        tall = np.exp(2j * np.pi * np.multiply.outer(np.cos(theta), z)) * along
        rows = tall[:, shift == 0].sum(1)[:, None] * np.ones(1)
        if shift.any():
            rows = rows + tall[:, shift > 0].sum(1)[:, None] * np.exp(2j * np.pi * shift.max() * u_y)
        return theta, phi, self.element_power(theta[:, None], phi) * np.abs(rows * columns) ** 2

    @cached_property
    def front(self):
        return self.sphere(-90, 90)

    @cached_property
    def mean_power(self):
        """Mean over the sphere: behind, only the element differs from the mirrored direction in front."""
        theta, phi, values = self.front
        behind = self.element_power(theta[:, None], np.pi - np.abs(phi))
        both = values * (1 + behind / self.element_power(theta[:, None], phi))
        return (both * np.sin(theta)[:, None]).sum() * np.radians(STEP_DEG) ** 2 / (4 * np.pi)

    def climbed(self, theta, phi, step):
        """Local maximum reached uphill from a direction in front: to the best neighbour, then halved."""
        around = np.array([(i, j) for i in (-1, 0, 1) for j in (-1, 0, 1)])
        while step > 2e-6:
            near_t = np.clip(theta + step * around[:, 0], 1e-6, np.pi - 1e-6)
            near_p = np.clip(phi + step * around[:, 1], -np.pi / 2, np.pi / 2)
            values = self.power(near_t, near_p)
            best = int(values.argmax())
            if values[best] <= values[4] * (1 + 1e-13):
                step /= 2
            else:
                theta, phi = near_t[best], near_p[best]
        return theta, phi, float(self.power(theta, phi))

    @cached_property
    def beam(self):
        """Theta, phi [rad] and intensity of the beam."""
        extent = max(np.ptp(self.driven[0]), np.ptp(self.driven[1]), 1.0)
        return self.climbed(np.radians(90 + self.tilt), np.radians(self.scan), 0.05 / extent)

    @property
    def directivity_dbi(self):
        return 10 * np.log10(self.beam[2] / self.mean_power)

    def cut(self, plane, step=0.02):
        """Half-power width [deg], lobe before and after the beam, highest level outside the minima [dB]."""
        theta, phi, top = self.beam
        angle = np.radians(np.arange(-90 + step / 2, 90, step))
        if plane == "vertical":
            level, at = self.power(np.pi / 2 + angle, phi) / top, theta - np.pi / 2
        else:
            level, at = self.power(theta, angle) / top, phi
        near = int(np.argmin(np.abs(angle - at)))
        middle = max(0, near - 2) + int(level[max(0, near - 2) : near + 3].argmax())
        after, before = level[middle:], level[middle::-1]
        edges = [crossing(side) for side in (before, after)]
        minima = [first_rise(side) for side in (before, after)]
        beside = [first_lobe(side[at:]) for side, at in zip((before, after), minima, strict=True)]
        rest = np.concatenate([side[at:] for side, at in zip((before, after), minima, strict=True)])
        highest = decibels(rest.max()) if len(rest) else np.nan
        return (edges[0] + edges[1]) * step, beside, highest

    def lattice_lobe(self, *, subarrays=False):
        """Highest visible level [dB] within a null width of a grating (or sub-array) lattice point."""
        a = self.array
        theta, phi, values = self.front
        u_y, u_z = np.sin(theta)[:, None] * np.sin(phi), np.cos(theta)[:, None] * np.ones(len(phi))
        lines = (a.columns, a.pitch_h), (a.rows, a.pitch_v)
        half = [1 / (count * pitch) if count > 1 else 0.0 for count, pitch in lines]
        best = 0.0
        for c_y, c_z in self.lattice_points(subarrays):
            inside = (np.abs(u_y - c_y) <= max(half[0], 0.004)) & (np.abs(u_z - c_z) <= max(half[1], 0.004))
            if inside.any():
                i, j = np.unravel_index(np.where(inside, values, -1).argmax(), values.shape)
                best = max(best, self.boxed(theta[i], phi[j], (c_y, c_z), half))
        return decibels(best / self.beam[2]) if best > 0 else np.nan

    def lattice_points(self, subarrays):
        """Points of the reciprocal lattice that are lobes of the kind asked for.

        A drive periodic in K rows repeats the beam every 1/(K dV); staggering moves odd columns of the
        lattice by half an order of the rows, 1/(2 dV).
        """
        a = self.array
        period = a.grouped if subarrays and a.rows > a.grouped else 1
        if subarrays and period == 1:
            return []
        columns = np.arange(-4, 5) if a.columns > 1 else np.array([0])
        rows = np.arange(-4 * period, 4 * period + 1) if a.rows > 1 else np.array([0])
        i, j = (grid.ravel() for grid in np.meshgrid(columns, rows))
        wanted = j % period != 0 if subarrays else (i != 0) | (j != 0)
        shear = i / (2 * a.pitch_v) * a.staggered
        u_y = self.steering[0] + i / a.pitch_h
        u_z = self.steering[1] + j / (period * a.pitch_v) - shear
        return np.stack([u_y, u_z], 1)[wanted]

    def boxed(self, theta, phi, centre, half):
        """Highest intensity close to a direction and inside the box of a lattice point."""
        best, span, grid = 0.0, np.radians(STEP_DEG), np.linspace(-1, 1, 15)
        for _ in range(3):
            near_t, near_p = np.meshgrid(theta + span * grid, phi + span * grid)
            near_p = np.clip(near_p, -np.pi / 2, np.pi / 2)
            off = np.sin(near_t) * np.sin(near_p) - centre[0], np.cos(near_t) - centre[1]
            inside = [np.abs(o) <= h + 1e-12 for o, h in zip(off, half, strict=True) if h]
            values = np.where(np.all(inside, axis=0), self.power(near_t, near_p), -1)
            at = np.unravel_index(values.argmax(), values.shape)
            best, theta, phi, span = max(best, float(values[at])), near_t[at], near_p[at], span / 5
        return best

    def highest_lobe(self):
        """Highest local maximum [dB] in front other than the beam: every grid maximum climbed to its top."""
        theta, phi, values = self.front
        padded = np.pad(values, 1, constant_values=-1)
        shape = values.shape
        neighbours = [
            padded[i : i + shape[0], j : j + shape[1]] for i in range(3) for j in range(3) if (i, j) != (1, 1)
        ]
        places = np.argwhere(np.all([values >= n for n in neighbours], axis=0))
        levels = values[tuple(places.T)]
        best, span = 0.0, np.radians(STEP_DEG)
        for at in np.argsort(-levels):
            if levels[at] < best * 10**-0.1:  # a grid maximum lies within a decibel of its top
                break
            i, j = places[at]
            top_t, top_p, level = self.climbed(theta[i], phi[j], span / 2)
            if np.hypot(top_t - self.beam[0], np.sin(top_t) * (top_p - self.beam[1])) > np.radians(0.1):
                best = max(best, level)
        return decibels(best / self.beam[2]) if best > 0 else np.nan


def decibels(ratio):
    return 10 * float(np.log10(ratio))


def crossing(side):
    """Fractional index of the half-power crossing; nan where the cut ends before."""
    below = np.flatnonzero(side < HALF_POWER)
    if not len(below):
        return np.nan
    at = below[0]
    return at - 1 + (side[at - 1] - HALF_POWER) / (side[at - 1] - side[at])


def first_rise(side):
    """Index of the first minimum: the first rise of more than rounding; the length where there is none."""
    rises = np.flatnonzero(np.diff(side) > 1e-12)
    return int(rises[0]) if len(rises) else len(side)


def first_lobe(rest):
    """Level [dB] of the lobe that follows a minimum; nan where the cut ends without a fall."""
    falls = np.flatnonzero(np.diff(rest) < -1e-12)
    return decibels(rest[falls[0]]) if len(falls) else np.nan
