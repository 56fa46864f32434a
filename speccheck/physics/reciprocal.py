"""The reciprocal lattices on which an array repeats its beam, in direction cosines around the beam."""

from __future__ import annotations

import numpy as np

from speccheck.physics.decibels import Floats, floats
from speccheck.physics.layout import ArrayLayout, Lattice


def element_points(layout: ArrayLayout, wavelength_m: float) -> Floats:
    """Points of the element lattice: grating lobes.

    layout [ArrayLayout]: the panel.
    wavelength_m [m]: wavelength.
    Returns [1]: u_y and u_z against the beam, itself left out, shape (K, 2).
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 1 (grating lobe lattice).

    >>> element_points(ArrayLayout(8, 1, 0.8, 0), 1.0)[:, 1].tolist()
    [-5.0, -3.75, -2.5, -1.25, 1.25, 2.5, 3.75, 5.0]
    """
    y, z = _orders(layout, (1, 1), wavelength_m)
    return floats(_placed(layout, (1, 1), wavelength_m, (y, z))[(y != 0) | (z != 0)])


def subarray_points(layout: ArrayLayout, wavelength_m: float) -> Floats:
    """Points that sub-arrays add to those of the element lattice: quantisation lobes.

    layout [ArrayLayout]: the panel.
    wavelength_m [m]: wavelength.
    Returns [1]: u_y and u_z against the beam, shape (K, 2); none for fewer than two sub-arrays.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7; an error of drive that repeats every K
    rows shifts the lobes of the element lattice by whole multiples of lambda/(K d).

    >>> column = ArrayLayout(12, 1, 0.8, 0, subarray_rows=2)
    >>> subarray_points(column, 1.0)[:, 1].round(3).tolist()
    [-3.125, -1.875, -0.625, 0.625, 1.875, 3.125]
    """
    across, along = layout.subarray_columns, layout.subarray_rows
    period = (across if layout.columns > across else 1, along if layout.rows > along else 1)
    y, z = _orders(layout, period, wavelength_m)
    added = (y % period[0] != 0) | (z % period[1] != 0)
    return floats(_placed(layout, period, wavelength_m, (y, z))[added])


def _orders(layout: ArrayLayout, period: tuple[int, int], wavelength_m: float) -> tuple[Floats, Floats]:
    """All orders that can come within a null width of visible space: from -1 - sin 90 deg, and one more."""
    pitches = (layout.columns, layout.horizontal_pitch_m), (layout.rows, layout.vertical_pitch_m)
    most = [
        int(np.ceil(3 * repeat * pitch / wavelength_m)) + 1 if count > 1 else 0
        for (count, pitch), repeat in zip(pitches, period, strict=True)
    ]
    y, z = np.meshgrid(*(np.arange(-count, count + 1.0) for count in most), indexing="ij")
    return y.ravel(), z.ravel()


def _placed(
    layout: ArrayLayout, period: tuple[int, int], wavelength_m: float, orders: tuple[Floats, Floats]
) -> Floats:
    """Direction cosines of orders; every second order across a triangular lattice lies between two rows."""
    y, z = orders
    u_y = y * (wavelength_m / (period[0] * layout.horizontal_pitch_m)) if layout.columns > 1 else 0 * y
    u_z = z * (wavelength_m / (period[1] * layout.vertical_pitch_m)) if layout.rows > 1 else 0 * z
    if layout.lattice is Lattice.TRIANGULAR and layout.rows > 1:
        u_z = u_z - y // period[0] % 2 * (wavelength_m / (2 * layout.vertical_pitch_m))
    return floats(np.stack([u_y, u_z], 1))
