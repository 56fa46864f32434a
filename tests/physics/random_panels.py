"""Random arrays, from a seeded generator, and their counterparts in the package.

Ranges are assumptions that span common practice and more; no expected figure stands here.
"""

from __future__ import annotations

import warnings

from physics.brute_sphere import Array
from scipy.signal import windows

from speccheck.physics.element import SectorElement
from speccheck.physics.layout import ArrayLayout, Lattice


def random_array(rng):
    """An array and how it is steered: tilt and scan [deg]."""
    grouped = int(rng.choice([1, 1, 1, 2, 3, 4, 6, 8, 12]))
    rows = grouped * int(rng.integers(1, max(2, 32 // grouped) + 1))
    columns = int(rng.integers(1, 17))
    groups = tuple(int(n) for n in (rng.choice([1, 1, 2, 3]), rng.choice([1, 1, 2, 3])))
    if rows * groups[0] > 32:
        groups = (1, groups[1])
    if columns * groups[1] > 16:
        groups = (groups[0], 1)
    pitch_v, pitch_h = rng.uniform(0.4, 1.1), rng.uniform(0.4, 1.1)
    gaps = tuple(float(g) for g in rng.choice([0.0, 0.25, 0.5, 1.0], 2) * rng.uniform(0.5, 1.0, 2))
    staggered = bool(columns > 1 and rows > 1 and rng.random() < 0.25)
    return (
        Array(
            rows,
            columns,
            pitch_v,
            pitch_h,
            element=(rng.uniform(60, 100), rng.uniform(60, 85), rng.uniform(20, 30)),
            grouped=grouped,
            fixed_tilt=float(rng.uniform(0, 8)) if grouped > 1 else 0.0,
            staggered=staggered,
            row_weights=random_taper(groups[0] * rows // grouped, rng),
            column_weights=random_taper(groups[1] * columns, rng),
            groups=groups,
            group_pitches=(rows * pitch_v + gaps[0], columns * pitch_h + gaps[1]),
        ),
        float(rng.uniform(0, 10) if rng.random() < 0.7 else rng.uniform(-30, 30)),
        float(rng.uniform(-60, 60)) if columns > 1 and rng.random() < 0.7 else 0.0,
    )


def random_taper(count, rng):
    """Half of all lines uniform, the others Dolph-Chebyshev, Taylor, cosine on a pedestal or ragged."""
    kind = rng.integers(0, 8)
    if kind < 4 or count < 4 or count > 20:
        return ()
    if kind == 4:
        with warnings.catch_warnings():  # scipy warns that spectral analysis wants 45 dB
            warnings.simplefilter("ignore")
            weights = windows.chebwin(count, rng.uniform(20, 32))
    elif kind == 5:
        weights = windows.taylor(count, nbar=4, sll=rng.uniform(20, 32), norm=False)
    elif kind == 6:
        pedestal = rng.uniform(0.3, 1)
        weights = pedestal + (1 - pedestal) * windows.cosine(count)
    else:
        weights = rng.uniform(0.5, 1.0, count)
    return tuple((weights / weights.max()).tolist())


def layout_of(array):
    """The array as the package describes it, at a wavelength of one metre."""
    return ArrayLayout(
        array.rows,
        array.columns,
        array.pitch_v,
        array.pitch_h,
        subarray_rows=array.grouped,
        subarray_tilt_deg=array.fixed_tilt,
        row_taper=array.row_weights,
        column_taper=array.column_weights,
        panel_rows=array.groups[0],
        panel_columns=array.groups[1],
        panel_vertical_pitch_m=array.group_pitches[0],
        panel_horizontal_pitch_m=array.group_pitches[1],
        lattice=Lattice.TRIANGULAR if array.staggered else Lattice.RECTANGULAR,
    )


def element_of(array):
    """Its element."""
    az, el, floor = array.element
    return SectorElement(az, el, floor, floor)
