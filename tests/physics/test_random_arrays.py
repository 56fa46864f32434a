"""Every figure of random arrays against the brute force of tests/physics/brute_sphere.py.

Tolerances: directivity 0.01 dB, widths 0.05 deg, side, grating and sub-array lobes 0.1 dB.
"""

import math
from dataclasses import dataclass

import numpy as np
import pytest
from hypothesis import example, given, settings
from hypothesis import strategies as st
from physics.brute_sphere import Array, Brute
from physics.random_panels import element_of, layout_of, random_array
from physics.tables import ONE_METRE_HZ

from speccheck.physics.lobes import element_lobes, highest_lobe, subarray_lobes
from speccheck.physics.states import array_states

FAINT_DB = -30.0
"""The lobe beside the beam counts down to this level below the highest of the cut: between two zeros that
almost meet, one sample wide, stands a lobe that no panel was ever judged by. Of others, -45 dB counts."""


@dataclass(frozen=True)
class Lobe:
    """A level [dB]: within 0.1 dB of another, or both faint."""

    level_db: float
    faint_db: float = -45.0

    def matches(self, found):
        wanted = self.level_db
        if math.isnan(wanted):
            return not found > self.faint_db
        return abs(found - wanted) <= 0.1 or (wanted < self.faint_db and not found > self.faint_db + 3)


def figures(array, tilt, scan):
    """(name, found, expected, matches) of everything."""
    brute, call = Brute(array, tilt, scan), (layout_of(array), element_of(array), ONE_METRE_HZ, tilt, scan)
    found = array_states(*call)
    yield "directivity", found.directivity_dbi, brute.directivity_dbi, 0.01
    for plane in ("vertical", "horizontal"):
        width, beside, highest = brute.cut(plane)
        yield f"{plane} width", getattr(found, f"{plane}_beamwidth_deg"), width, 0.05
        yield f"{plane} highest", getattr(found, f"highest_sidelobe_{plane}_db"), Lobe(highest), None
        if not any(level - max(highest, 0) < FAINT_DB for level in beside):
            first = max((level for level in beside if not math.isnan(level)), default=math.nan)
            yield f"{plane} first", getattr(found, f"first_sidelobe_{plane}_db"), Lobe(first), None
    yield "grating", element_lobes(*call).level_db, Lobe(brute.lattice_lobe()), None
    yield "sub-array", subarray_lobes(*call).level_db, Lobe(brute.lattice_lobe(subarrays=True)), None
    if array.columns > 1 and array.rows > 1:
        yield "anywhere", highest_lobe(*call).level_db, Lobe(brute.highest_lobe()), None


def wrong(array, tilt, scan):
    """Names and figures of all that is outside its tolerance."""
    return [
        (name, float(found), expected)
        for name, found, expected, tolerance in figures(array, tilt, scan)
        if not (
            expected.matches(float(found))
            if tolerance is None
            else float(found) == pytest.approx(expected, abs=tolerance, nan_ok=True)
        )
    ]


@st.composite
def cases(draw):
    return random_array(np.random.default_rng(draw(st.integers(0, 10**6))))


# steered into a null of its sub-arrays of twelve: the beam is the maximum uphill of it
LONG_SUBARRAYS = (Array(24, 12, 0.4314, 0.8, (99, 79.5, 28.4), grouped=12, fixed_tilt=4.44), -6.61, 4.13)
# a staggered lattice of sub-arrays: its lobes stand between those of a rectangular one
STAGGERED = (
    Array(32, 14, 0.732, 1.0986, (93, 83.7, 20), grouped=4, fixed_tilt=7.27, staggered=True),
    6.5,
    -27,
)
# two panel groups: the flank of a grating lobe is finer than one group alone makes it
GROUPS = (
    Array(3, 8, 0.728, 0.6186, (94, 66.6, 25.7), groups=(3, 2), group_pitches=(2.461, 4.949)),
    8.53,
    7.12,
)
# grating lobes seen with their flank at the rim of visible space alone: one column, and a planar array
RIM = (Array(8, 1, 0.759, 0.456, (96.7, 81.9, 20.5), grouped=4, fixed_tilt=7.94), -9.61, 0.0)
PLANAR_RIM = (Array(31, 14, 0.869, 0.8815, (96.8, 61.2, 22.0)), 4.456, 5.4965)


@settings(max_examples=20, deadline=None, derandomize=True)
@given(case=cases())
@example(case=LONG_SUBARRAYS)
@example(case=STAGGERED)
@example(case=GROUPS)
@example(case=RIM)
@example(case=PLANAR_RIM)
def test_every_figure_of_any_array(case):
    assert wrong(*case) == []
