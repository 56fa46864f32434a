"""Sound panels derived by arithmetic of their own, and the same panels with one figure planted wrong.

The figures come from a sum over the sphere with raised-cosine elements, cosine tapers and a drawn loss:
neither the element form nor the integration of the program. Losses of 0.6 to 1.6 dB, elements of 60 to 100°
and tapers with side lobes of -11 to -19 dB are common practice.
"""

from __future__ import annotations

import functools
import math
import random
from typing import Any

import numpy as np
import pytest
from checks.cases import panel_of

from speccheck.checks import examine
from speccheck.records import Finding, Fit, Settings

SPEED_MM_MHZ = 299_792.458


def _raised_cosine(angle_rad: np.ndarray, hpbw_deg: float) -> np.ndarray:
    """((1 + cos a)/2)^q with half power at half the width."""
    q = math.log(0.5) / math.log(math.cos(math.radians(hpbw_deg / 4)) ** 2)
    return ((1 + np.cos(angle_rad)) / 2) ** q


def _line(count: int, pitch_wl: float, pedestal: float, u: np.ndarray) -> np.ndarray:
    """Power pattern of a line with a cosine on a pedestal."""
    place = np.arange(count) - (count - 1) / 2
    weights = pedestal + (1 - pedestal) * np.cos(math.pi * place / count)
    return np.abs((weights * np.exp(2j * math.pi * pitch_wl * np.multiply.outer(u, place))).sum(-1)) ** 2


def _half_power_width(cut: np.ndarray, angle_deg: np.ndarray) -> float:
    above = np.flatnonzero(cut >= cut.max() / 2)
    edges = [(above[0] - 1, above[0]), (above[-1] + 1, above[-1])]
    ends = [np.interp(cut.max() / 2, cut[list(pair)], angle_deg[list(pair)]) for pair in edges]
    return float(abs(ends[1] - ends[0]))


@functools.lru_cache(maxsize=64)
def _beam(
    counts: tuple[int, int], pitches_mm: tuple[float, float], mhz: float, az: float, pedestal: float
) -> tuple[float, float, float]:
    """Directivity [dBi], horizontal and vertical width [deg] by a 0.5° sum over the sphere."""
    rows, columns = counts
    up, across = np.radians(np.arange(-89.75, 90, 0.5)), np.radians(np.arange(-179.75, 180, 0.5))
    vertical, horizontal = (p * mhz / SPEED_MM_MHZ for p in pitches_mm)
    power = np.maximum(np.outer(_raised_cosine(up, 72), _raised_cosine(across, az)), 10**-2.8)
    power = power * _line(rows, vertical, pedestal, np.sin(up))[:, None]
    if columns > 1:
        power = power * _line(columns, horizontal, 0.9, np.outer(np.cos(up), np.sin(across)))
    solid = (power * np.cos(up)[:, None]).sum() * np.radians(0.5) ** 2
    row, column = np.unravel_index(power.argmax(), power.shape)
    widths = (
        _half_power_width(power[row], np.degrees(across)),
        _half_power_width(power[:, column], np.degrees(up)),
    )
    return 10 * math.log10(4 * math.pi * power.max() / solid), *widths


def _column(seed: int) -> dict[str, Any]:
    rng = random.Random(seed)
    low, high, pitch = rng.choice([(698, 960, 245), (1710, 2170, 105), (2300, 2690, 92), (3300, 3800, 58)])
    rows, az, pedestal = (
        rng.choice([4, 5, 6, 8, 10, 12]),
        rng.choice([60, 65, 68, 85, 90]),
        rng.uniform(0.4, 1),
    )
    directivity, across, along = _beam((rows, 1), (pitch, 0), (low + high) / 2, az, pedestal)
    return {
        "frequency_range": [low, high],
        "polarisations": 2,
        "array_rows": rows,
        "array_columns": 1,
        "vertical_element_spacing": f"{pitch} mm",
        "horizontal_beamwidth": round(across),
        "vertical_beamwidth": round(along, 1),
        "gain": f"{directivity - rng.uniform(0.6, 1.4):.1f} dBi",
        "electrical_tilt": [0, 8],
        "rf_ports": 2,
        "height": round(rows * pitch / 1000 + 0.1, 2),
    }


def _planar(seed: int) -> dict[str, Any]:
    rng = random.Random(seed)
    low, high, dv, dh = rng.choice([(3300, 3800, 58, 41.5), (2496, 2690, 80, 56), (3700, 3980, 54, 38.5)])
    rows, columns, az = rng.choice([8, 12, 16]), rng.choice([4, 8, 16]), rng.choice([80, 90, 100])
    directivity, across, along = _beam((rows, columns), (dv, dh), (low + high) / 2, az, 0.9)
    gain = round(directivity - rng.uniform(0.7, 1.6), 1)
    return {
        "frequency_range": [low, high],
        "polarisations": 2,
        "array_rows": rows,
        "array_columns": columns,
        "subarray_rows": 2,
        "subarray_tilt": 6,
        "transceivers": rows // 2 * columns * 2,
        "vertical_element_spacing": f"{dv} mm",
        "horizontal_element_spacing": f"{dh} mm",
        "horizontal_beamwidth": round(across, 1),
        "vertical_beamwidth": round(along, 1),
        "gain": f"{gain} dBi",
        "electrical_tilt": [2, 10],
        "horizontal_scan": [-55, 55],
        "conducted_power": 200,
        "eirp": f"{10 * math.log10(200e3) + gain:.1f} dBm",
    }


SOUND = [*(_column(seed) for seed in range(16)), *(_planar(seed) for seed in range(8))]


def _misfits(panel: dict[str, Any]) -> list[Finding]:
    return [f for f in examine(panel_of(panel), Settings()) if f.verdict in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)]


def _raised(panel: dict[str, Any], by_db: float) -> dict[str, Any]:
    kept = {key: value for key, value in panel.items() if key != "eirp"}
    return {**kept, "gain": f"{float(panel['gain'].split()[0]) + by_db:.1f} dBi"}


@pytest.mark.parametrize("panel", SOUND, ids=lambda p: f"{p['array_rows']}x{p['array_columns']}")
def test_a_sound_panel_is_left_in_peace(panel: dict[str, Any]) -> None:
    doubts = [f"{f.check}: {f.summary}" for f in _misfits(panel) if f.check != "gain-names-its-reference"]
    assert doubts == []


@pytest.mark.parametrize("panel", SOUND, ids=lambda p: f"{p['array_rows']}x{p['array_columns']}")
def test_three_decibels_more_never_fit(panel: dict[str, Any]) -> None:
    found = [f for f in _misfits(_raised(panel, 3.01)) if f.check == "gain-fits-geometry"]
    assert [f.verdict for f in found] == [Fit.DOES_NOT_FIT]
    assert any("both polarisations" in c.name for c in found[0].conventions)


@pytest.mark.parametrize(
    ("by_db", "convention", "most_missed"),
    [
        (2.15, "2.15 dB of a half-wave dipole added twice", 4),
        (3.01, "both polarisations added into the gain", 3),
        (-2.15, "gain in dBd under a heading in dBi", 0),
    ],
)
def test_the_convention_behind_a_moved_gain_is_named_first(
    by_db: float, convention: str, most_missed: int
) -> None:
    """3.01 − 2.15 = 0.86 dB apart and a loss of 0.6 to 1.6 dB unstated: one in six may be mistaken.

    A loss anywhere within ±0.4 dB of its middle and a directivity good to 0.2 dB (one standard deviation,
    assumed) lie beyond half the gap, 0.43 dB, on one side in 8 % of draws, by integration of the normal tail:
    2 of 24 panels are to be expected, with a standard deviation of √(24 · 0.08 · 0.92) = 1.3. One in six is 4
    of 24; 3 and 0 are stricter. All three are what is reached today, limits against getting worse, and no
    facts of the trade.
    """
    missed = []
    for panel in SOUND:
        found = [f for f in _misfits(_raised(panel, by_db)) if f.check == "gain-fits-geometry"]
        names = [c.name for f in found for c in f.conventions]
        assert convention in names[:2]
        missed += [names[0]] if names[0] != convention else []
    assert len(missed) <= most_missed, missed
