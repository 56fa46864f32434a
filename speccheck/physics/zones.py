"""How far a power density reaches around a panel, direction by direction."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from speccheck.physics.decibels import Floats, floats, ratio
from speccheck.physics.element import Element
from speccheck.physics.exposure import distance_m
from speccheck.physics.layout import ArrayLayout
from speccheck.physics.pattern import gain_pattern_dbi


@dataclass(frozen=True, slots=True)
class PanelDistances:
    """Reach [m] of a power density from the panel centre, not rounded, in five directions."""

    front_m: float
    above_m: float
    below_m: float
    beside_m: float
    behind_m: float


def envelope_dbi(
    layout: ArrayLayout,
    element: Element,
    freq_hz: float,
    beams_deg: Sequence[tuple[float, float]],
    *,
    theta_deg: Floats,
    phi_deg: Floats,
) -> Floats:
    """Highest directivity over a set of beams.

    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    beams_deg [deg]: tilt and scan of each beam.
    theta_deg [deg]: zenith angle, broadcast with phi.
    phi_deg [deg]: azimuth.
    Returns [dBi]: maximum over the beams.
    Source: envelope of a beam set, the cautious reading for exposure (common practice).
    """
    patterns = [
        gain_pattern_dbi(layout, element, freq_hz, theta_deg, phi_deg, tilt_deg=tilt, scan_deg=scan)
        for tilt, scan in beams_deg
    ]
    return floats(np.max(patterns, axis=0))


def panel_distances(
    layout: ArrayLayout,
    element: Element,
    freq_hz: float,
    *,
    power_w: float,
    limit_wm2: float,
    beams_deg: Sequence[tuple[float, float]] = ((0.0, 0.0),),
    reflection: float = 1.0,
    factor: float = 1.0,
    mechanical_tilt_deg: float = 0.0,
    gain_dbi: float | None = None,
) -> PanelDistances:
    """Reach of a power density around a panel, from its recomputed pattern and the spherical model.

    A model element has a floor behind and no losses; inside the far field the model mostly overstates.
    layout [ArrayLayout]: the panel.
    element [Element]: its element.
    freq_hz [Hz]: frequency.
    power_w [W]: average power over all ports and polarisations.
    limit_wm2 [W/m^2]: limit of the power density.
    beams_deg [deg]: tilt and scan of the beams whose envelope counts.
    reflection [1]: factor on power density, 1, 2.56 or 4.
    factor [1]: time factor, 0..1.
    mechanical_tilt_deg [deg]: mechanical tilt, positive downwards.
    gain_dbi [dBi]: gain that the strongest direction is set to; None for the lossless directivity.
    Returns [PanelDistances]: largest extent of the boundary in each direction.
    Source: OET Bulletin 65, equation 4, applied direction by direction.

    >>> from speccheck.physics.element import IsotropicElement
    >>> one = ArrayLayout(1, 1, 0.5, 0.5)
    >>> reach = panel_distances(one, IsotropicElement(), 299792458.0, power_w=1000, limit_wm2=10)
    >>> round(reach.front_m, 2), round(reach.above_m, 2), round(reach.behind_m, 2)
    (2.82, 2.82, 2.82)
    """
    theta, phi = _directions(layout, freq_hz)
    pattern = envelope_dbi(layout, element, freq_hz, beams_deg, theta_deg=theta, phi_deg=phi)
    if gain_dbi is not None:
        pattern = pattern + (gain_dbi - pattern.max())
    reach = distance_m(power_w * ratio(pattern), limit_wm2, reflection, factor)
    sine, tilt = np.sin(np.radians(theta)), np.radians(mechanical_tilt_deg)
    ahead, aside, up = (
        sine * np.cos(np.radians(phi)),
        sine * np.sin(np.radians(phi)),
        np.cos(np.radians(theta)),
    )
    # the panel leans forward: its boresight drops by the mechanical tilt
    x, z = (
        reach * (ahead * np.cos(tilt) + up * np.sin(tilt)),
        reach * (up * np.cos(tilt) - ahead * np.sin(tilt)),
    )
    return PanelDistances(
        float(reach.max()),
        float(max(z.max(), 0.0)),
        float(max(-z.min(), 0.0)),
        float(np.abs(reach * aside).max()),
        float(max(-x.min(), 0.0)),
    )


def _directions(layout: ArrayLayout, freq_hz: float) -> tuple[Floats, Floats]:
    """Directions [deg] over the sphere, five to a null width and at most two degrees apart."""
    per_degree = freq_hz / 299_792_458.0 * max(layout.height_m, layout.width_m) * np.radians(1)
    step = 1 / int(np.clip(np.ceil(5 * per_degree), 1, 4))
    theta = np.arange(0, 180 + step / 2, step)
    phi = np.arange(-180, 180, max(step, 1.0))
    return theta[:, None], phi[None, :]
