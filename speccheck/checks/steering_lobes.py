"""The lobes a lattice raises over the claimed steering range, and the bid's own claims they break."""

from __future__ import annotations

import functools
import re
from dataclasses import dataclass, replace

import numpy as np

from speccheck.checks.model import Model
from speccheck.checks.saying import named
from speccheck.physics import lobes
from speccheck.physics.element import SectorElement
from speccheck.physics.layout import ArrayLayout, Lattice
from speccheck.records import Fit, Reading, Step

HARD_DB, SOFT_DB = -3.0, -8.0
"""Lobe levels [dB against the beam] from which a spacing does not fit, or is doubtful."""

ORDINARY_SIDELOBE_DB = -13.3
"""First side lobe of a uniform line [dB]: a lobe below it is not distinct (any antenna handbook)."""

PANEL_PLANE_DEG = 90.0

WIDEST_TILT_DEG = 30.0
"""Angles beyond it in a claim are angles of azimuth: no panel is tilted so far (common practice)."""

FAR_PITCH_WL = 6.0
"""Pitch [wavelengths] from which the next lobe is within ten degrees of the beam: no search needed."""

_FREE = re.compile(
    r"\b(no|none|free|without|absent|nil|keine?|ohne|aucune?|sans|sin|nessun[oa]?|brak|geen)\b", re.I
)
_ANGLE = re.compile(r"[±+-]?\s*(\d+(?:[.,]\d+)?)\s*(?:°|deg)")
_LEVEL = re.compile(r"(-?−?\s*\d+(?:[.,]\d+)?)\s*dB", re.I)
_EVERY_LOBE = re.compile(
    r"\b(all|any|highest|maximum|worst|every)\s+(upper\s+)?(side|grating)?[\s-]*lobes?\b", re.I
)


@dataclass(frozen=True, slots=True)
class Steering:
    """Both ends of a claimed range [deg], in one plane, and where it is claimed."""

    ends_deg: tuple[float, float]
    horizontal: bool
    reading: Reading | None

    @property
    def largest_deg(self) -> float:
        """The end farther from the panel normal [deg]."""
        return max(self.ordered_deg, key=abs)

    @property
    def ordered_deg(self) -> tuple[float, float]:
        """Both ends [deg], the upper one first."""
        return self.ends_deg[1], self.ends_deg[0]


@dataclass(frozen=True, slots=True)
class Lobe:
    """The strongest lobe over the range at the top of the band."""

    level_db: float
    scan_deg: float
    stands_deg: float
    visible: bool

    @property
    def present(self) -> bool:
        """Whether there is any lobe, or flank of one, in front."""
        return not np.isnan(self.level_db)

    @property
    def verdict(self) -> Fit:
        """By the -3 and -8 dB rule; the flank of a hidden lobe fits."""
        if not self.visible or not self.present:
            return Fit.FITS
        return (
            Fit.DOES_NOT_FIT
            if self.level_db >= HARD_DB
            else Fit.DOUBTFUL
            if self.level_db >= SOFT_DB
            else Fit.FITS
        )


def span_deg(reading: Reading | None) -> tuple[float, float] | None:
    """Both ends [deg] of a steering range; a single figure is the end of a range to either side.

    An end beyond the panel plane can only be the whole width of the range, half of it to either side.
    """
    if reading is None or isinstance(reading.value, str):
        return None
    if isinstance(reading.value, tuple):
        low, high = min(reading.value), max(reading.value)
    else:
        low, high = -abs(reading.value), abs(reading.value)
    beyond = max(abs(low), abs(high)) > PANEL_PLANE_DEG
    return (low / 2, high / 2) if beyond else (low, high)


def tilt_span_deg(tilt: Reading | None, scan: Reading | None) -> tuple[tuple[float, float], Reading] | None:
    """Both ends [deg] of the claimed steering in the vertical plane, positive downwards, and the wider claim.

    A tilt range and a vertical scan range are both claims: a lobe inside either counts. A scan range is
    counted upwards, but '0 to 10°' with no negative end means below the horizon (common practice).
    """
    claims: list[tuple[tuple[float, float], Reading]] = []
    if tilt is not None and not isinstance(tilt.value, str):
        claims.append(((tilt.low, tilt.high), tilt))
    if scan is not None and (ends := span_deg(scan)):
        # without any angle of the other sign the range is that below the horizon
        claims.append((ends if ends[0] >= 0 else (-ends[1], -ends[0]), scan))
    if not claims:
        return None
    widest = max(claims, key=lambda claim: claim[0][1] - claim[0][0])
    return (min(c[0][0] for c in claims), max(c[0][1] for c in claims)), widest[1]


def strongest(model: Model, steering: Steering, *, subarrays: bool) -> Lobe:
    """The strongest lobe of the element or of the sub-array lattice over both ends of the range."""
    layout = _in_plane(model.layout, horizontal=steering.horizontal)
    pitch_wl = _pitch_wl(model, steering, subarrays=subarrays)
    if pitch_wl > FAR_PITCH_WL:
        return _far(pitch_wl, steering)
    return _searched(layout, model.high_hz, steering.ordered_deg, steering.horizontal, subarrays)


def _in_plane(layout: ArrayLayout, *, horizontal: bool) -> ArrayLayout:
    """One row or column of a rectangular lattice: the lobes of the other plane are judged there."""
    if layout.lattice is Lattice.TRIANGULAR:
        return layout
    if horizontal:
        return replace(layout, rows=1, subarray_rows=1, subarray_tilt_deg=0.0)
    return replace(layout, columns=1, subarray_columns=1)


@functools.lru_cache(maxsize=4096)
def _searched(
    layout: ArrayLayout, freq_hz: float, ends_deg: tuple[float, float], horizontal: bool, subarrays: bool
) -> Lobe:
    ends, rest = np.array(ends_deg), np.full(2, layout.subarray_tilt_deg)
    tilt, scan = (rest, ends) if horizontal else (ends, np.zeros(2))
    search = lobes.subarray_lobes if subarrays else lobes.element_lobes
    found = search(layout, SectorElement(), freq_hz, tilt, scan)
    # of a lobe whose centre is hidden only the flank is seen: it counts behind any visible one
    rank = np.where(found.centre_visible, 0.0, -1e3) + np.nan_to_num(found.level_db, nan=-1e6)
    at = int(np.argmax(rank))
    stands = found.phi_deg if horizontal else found.theta_deg - 90
    return Lobe(float(found.level_db[at]), ends_deg[at], float(stands[at]), bool(found.centre_visible[at]))


def _pitch_wl(model: Model, steering: Steering, *, subarrays: bool) -> float:
    layout = model.layout
    if steering.horizontal:
        return model.horizontal_pitch_wl(model.high_hz)
    return model.vertical_pitch_wl(model.high_hz) * (layout.subarray_rows if subarrays else 1)


def _far(pitch_wl: float, steering: Steering) -> Lobe:
    """The lobe next to the beam of a very wide pitch, by the element pattern alone."""
    beam = float(np.sin(np.radians(steering.largest_deg)))
    stands = float(np.degrees(np.arcsin(beam - np.copysign(1 / pitch_wl, beam))))
    drop = 12 * (stands**2 - steering.largest_deg**2) / 65**2
    return Lobe(-drop, steering.largest_deg, stands, True)


def claimed_freedom(grating_lobes: Reading | None) -> tuple[float | None, float | None] | None:
    """What 'none within ±60°' claims: the angle [deg] and the level [dB] it names, or None for no claim."""
    if grating_lobes is None:
        return None
    text = f"{grating_lobes.value}"
    level, angle = _LEVEL.search(text), _ANGLE.search(text)
    if not _FREE.search(text) and level is None:
        return None
    number = None if level is None else -abs(float(re.sub(r"[−\s-]", "", level[1]).replace(",", ".")))
    return (None if angle is None else float(angle[1].replace(",", "."))), number


def broken_claims(
    lobe: Lobe,
    *,
    grating_lobes: Reading | None,
    suppressions: tuple[Reading | None, ...],
    horizontal: bool,
    distinct_db: float = ORDINARY_SIDELOBE_DB,
) -> list[str]:
    """The bid's own claims that the lobe breaks, in words; from `distinct_db` [dB] on it counts as one."""
    if not lobe.visible or not lobe.present:
        return []
    broken: list[str] = []
    freedom = claimed_freedom(grating_lobes)
    if freedom is not None and grating_lobes is not None:
        angle_deg, allowed_db = freedom
        in_azimuth = angle_deg is not None and angle_deg > WIDEST_TILT_DEG
        meant = angle_deg is None or (abs(lobe.scan_deg) <= angle_deg and (horizontal or not in_azimuth))
        if meant and lobe.level_db > (distinct_db if allowed_db is None else allowed_db):
            broken.append(f"the claim '{grating_lobes.value}' ({grating_lobes.where})")
    broken += [named(s) for s in suppressions if s is not None and -lobe.level_db < s.low - 0.5]
    return broken


def every_lobe(reading: Reading | None) -> Reading | None:
    """A side-lobe claim, if it says that it covers every lobe and not the first one only."""
    if reading is None:
        return None
    said = f"{reading.heading} {reading.condition} {reading.raw}"
    return reading if _EVERY_LOBE.search(said) else None


ELEMENT_ASSUMED = "Element pattern of TR 38.901 form, 65° × 65°; a wider element raises the lobe."


def lobe_steps(lobe: Lobe) -> tuple[Step, ...]:
    """The line of working for a lobe; none where there is no lobe."""
    if not lobe.present:
        return ()
    seen = "lobe" if lobe.visible else "flank of a hidden lobe"
    formula = (
        f"array and element pattern, beam steered to {lobe.scan_deg:g}°, {seen} at {lobe.stands_deg:.0f}°"
    )
    return (Step("Strongest lobe against the beam", formula, round(lobe.level_db, 1), "dB"),)


def lobe_said(lobe: Lobe, enters_at_deg: float) -> str:
    """A sentence on the lobe."""
    if not lobe.visible or not lobe.present:
        return "No lobe enters within the range."
    return (
        f"Steered to {lobe.scan_deg:g}° a second beam (grating lobe) stands at {lobe.stands_deg:.0f}°,"
        f" {level_said(lobe.level_db)}; it appears from {enters_at_deg:.0f}° on."
    )


def level_said(level_db: float) -> str:
    """A level against the beam [dB] in words."""
    return f"{abs(level_db):.1f} dB {'above' if level_db > 0 else 'below'} the wanted one"


def broken_said(broken: list[str]) -> str:
    """A sentence on the bid's claims that are broken."""
    return f" It breaks {' and '.join(broken)}." if broken else ""
