"""All figures of a panel in many states (frequency, tilt, scan) at once."""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.beam import find_beam
from speccheck.physics.cuts import front_grid, principal_cuts
from speccheck.physics.decibels import Floats, db, floats
from speccheck.physics.element import Element
from speccheck.physics.field import excite, intensity
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.radiated import radiated_power
from speccheck.physics.readings import read_cuts


@dataclass(frozen=True, eq=False, slots=True)
class ArrayStates:
    """Figures of each state, all of the same shape; lobes in dB against the beam, nan where a cut has none.

    freq_hz [Hz], tilt_deg [deg], scan_deg [deg]: the state.
    directivity_dbi [dBi]: lossless, at the beam, integrated over the sphere.
    peak_theta_deg, peak_phi_deg [deg]: where the beam really points.
    horizontal_beamwidth_deg, vertical_beamwidth_deg [deg]: half-power widths; nan for no crossing in front.
    first_sidelobe_horizontal_db, first_sidelobe_vertical_db [dB]: the higher of the two beside the beam.
    upper_sidelobe_db [dB]: the first one above the beam.
    highest_sidelobe_horizontal_db, highest_sidelobe_vertical_db [dB]: highest outside the beam, in front.
    highest_sidelobe_phi_deg, highest_sidelobe_theta_deg [deg]: where those stand.
    """

    freq_hz: Floats
    tilt_deg: Floats
    scan_deg: Floats
    directivity_dbi: Floats
    peak_theta_deg: Floats
    peak_phi_deg: Floats
    horizontal_beamwidth_deg: Floats
    vertical_beamwidth_deg: Floats
    first_sidelobe_horizontal_db: Floats
    first_sidelobe_vertical_db: Floats
    upper_sidelobe_db: Floats
    highest_sidelobe_horizontal_db: Floats
    highest_sidelobe_phi_deg: Floats
    highest_sidelobe_vertical_db: Floats
    highest_sidelobe_theta_deg: Floats


def array_states(
    layout: ArrayLayout,
    element: Element,
    freq_hz: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    scan_deg: ArrayLike = 0.0,
) -> ArrayStates:
    """Directivity, beam, beamwidths and side lobes of a panel in many states; the same states only once.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [ArrayStates]: figures of the broadcast states.
    Source: 3GPP TR 37.840 clause 5.4.4 (array), IEEE Std 145 (terms); directivity by the lag form.

    >>> column = ArrayLayout(10, 1, 0.8, 0.5)  # at 1 m wavelength
    >>> from speccheck.physics.element import SectorElement
    >>> states = array_states(column, SectorElement(), 299792458.0)
    >>> float(states.directivity_dbi.round(2)), float(states.vertical_beamwidth_deg.round(2))
    (19.25, 6.35)
    """
    grids = np.broadcast_arrays(floats(freq_hz), floats(tilt_deg), floats(scan_deg))
    asked = list(zip(*(grid.ravel().tolist() for grid in grids), strict=True))
    distinct = dict.fromkeys(asked)
    figures = _figures(layout, element, tuple(distinct))
    if len(distinct) < len(asked):
        place = {state: at for at, state in enumerate(distinct)}
        figures = figures[:, [place[state] for state in asked]]
    return ArrayStates(*figures.reshape(-1, *grids[0].shape))


def directivity_dbi(
    layout: ArrayLayout,
    element: Element,
    freq_hz: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    scan_deg: ArrayLike = 0.0,
) -> Floats:
    """Directivity alone, at the beam.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [dBi]: 4 pi U/P of the broadcast states.
    Source: definition; radiated power by the lag form.

    >>> from speccheck.physics.element import IsotropicElement
    >>> pair = ArrayLayout(2, 1, 0.5, 0.5)
    >>> float(directivity_dbi(pair, IsotropicElement(), 299792458.0).round(4))
    3.0103
    """
    grids = np.broadcast_arrays(floats(freq_hz), floats(tilt_deg), floats(scan_deg))
    states = excite(layout, element, *(grid.ravel() for grid in grids))
    beam = find_beam(states)
    peak = intensity(states, beam.theta_rad[:, None], beam.phi_rad[:, None])[:, 0]
    return db(peak / radiated_power(states)).reshape(grids[0].shape)[()]


def scan_loss_db(
    layout: ArrayLayout,
    element: Element,
    freq_hz: ArrayLike,
    tilt_deg: ArrayLike = 0.0,
    scan_deg: ArrayLike = 0.0,
) -> Floats:
    """Directivity lost by steering, against the beam at azimuth 0 and the fixed tilt of the sub-arrays.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    tilt_deg [deg]: electrical tilt, positive downwards.
    scan_deg [deg]: azimuth scan.
    Returns [dB]: positive where the steered beam is weaker.
    Source: difference of two integrated directivities.

    >>> from speccheck.physics.element import SectorElement
    >>> panel = ArrayLayout(16, 16, 0.5, 0.5)
    >>> float(scan_loss_db(panel, SectorElement(80, 65), 299792458.0, scan_deg=60).round(2))
    3.11
    """
    rest = layout.subarray_tilt_deg if layout.subarray_rows > 1 else 0.0
    steered = directivity_dbi(layout, element, freq_hz, tilt_deg, scan_deg)
    return directivity_dbi(layout, element, freq_hz, rest) - steered


@lru_cache(maxsize=1024)
def _figures(
    layout: ArrayLayout, element: Element, distinct: tuple[tuple[float, float, float], ...]
) -> Floats:
    """Figures in the order of ArrayStates, one row each, of distinct states (frequency, tilt, scan)."""
    keys = np.array(distinct).T
    states = excite(layout, element, *keys)
    beam = find_beam(states)
    grid = front_grid(layout, states.highest)
    peaks = np.concatenate([beam.phi_rad, beam.theta_rad - np.pi / 2])
    cuts = principal_cuts(states, beam, grid)
    read = read_cuts(cuts.level, grid, peaks)
    count = len(distinct)
    figures = np.empty((15, count))
    figures[:3] = keys
    figures[3] = 10 * np.log10(cuts.intensity / radiated_power(states))
    figures[4], figures[5] = np.degrees(beam.theta_rad), np.degrees(beam.phi_rad)
    figures[6:8] = np.degrees(read.width_rad).reshape(2, count)
    figures[8:10] = np.fmax(read.before_db, read.after_db).reshape(2, count)
    figures[10] = read.before_db[count:]
    figures[11::2] = read.highest_db.reshape(2, count)
    figures[12::2] = np.degrees(read.highest_rad).reshape(2, count)
    figures[14] += 90
    figures.flags.writeable = False
    return figures
