"""How often an honest gain is doubted and a flattering one caught: python tests/benchmarks/population.py

Random plausible panels of each class, with taper, element shape, excitation errors and loss unknown to the
judge, claim their own beamwidths and gain as a data sheet would print them (rounded). The truth is a
Gauss-Legendre sphere summed element by element: nothing of it is shared with the package. Loss (symmetric
triangular over the range of the class), errors and geometry are assumptions about the trade, so the
percentages are indicative. An argument sets the number of panels a class.
"""

from __future__ import annotations

import sys
from dataclasses import dataclass

import numpy as np

from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.physics.expected import GainZone, PanelClass, expected_gain
from speccheck.physics.layout import ArrayLayout

SEED = 4711
COUNT = 2000
OFFSETS_DB = (0.0, 1.0, 1.5, 2.0, 3.0)


@dataclass
class Truth:
    """One honest panel: declared layout [wavelengths], what it claims, and its loss."""

    layout: ArrayLayout
    tilt_deg: float
    azimuth_deg: float
    elevation_deg: float
    gain_dbi: float
    loss_db: float


def draw(kind, rng):
    """Geometry, element, tapers and loss of one panel of a class."""
    if kind is PanelClass.PASSIVE:
        rows, columns, grouped = int(rng.integers(6, 15)), 1, 1
        pitch_v, pitch_h, loss = rng.uniform(0.6, 0.95), 0.5, rng.triangular(0.4, 1.0, 1.6)
        azimuth, tilt = rng.uniform(58, 72), rng.uniform(0, 8)
    elif kind is PanelClass.MASSIVE_MIMO:
        grouped = int(rng.integers(1, 4))
        rows, columns = int(rng.choice([4, 6, 8])) * grouped, int(rng.choice([4, 8, 16]))
        pitch_v, pitch_h, loss = (
            rng.uniform(0.6, 0.75),
            rng.uniform(0.48, 0.56),
            rng.triangular(0.3, 1.05, 1.8),
        )
        azimuth, tilt = rng.uniform(65, 100), 0.0
    else:
        rows, columns, grouped = int(rng.choice([8, 12, 16])), int(rng.choice([8, 12, 16])), 1
        pitch_v, pitch_h, loss = (
            rng.uniform(0.48, 0.56),
            rng.uniform(0.48, 0.56),
            rng.triangular(0.5, 1.65, 2.8),
        )
        azimuth, tilt = rng.uniform(65, 100), 0.0
    shape = (azimuth, rng.uniform(60, 85), rng.uniform(20, 30))
    pedestals = rng.uniform(0.3, 1.0, 2) if columns > 1 else (rng.uniform(0.3, 1.0), 1.0)
    worst_db, worst_deg = (1.5, 15.0) if kind is PanelClass.MMWAVE else (1.0, 10.0)
    errors = rng.uniform(0.2, worst_db), rng.uniform(2, worst_deg)
    return (rows, columns, grouped), (pitch_v, pitch_h), shape, pedestals, errors, tilt, loss


def excitation(counts, pitch_v, pedestals, errors, *, tilt, rng):
    """Complex weights (M, N) per element, errors per port."""
    rows, columns, grouped = counts
    ports = rows // grouped
    taper_v = pedestals[0] + (1 - pedestals[0]) * np.sin(np.pi * (np.arange(ports) + 0.5) / ports)
    taper_h = pedestals[1] + (1 - pedestals[1]) * np.sin(np.pi * (np.arange(columns) + 0.5) / columns)
    amplitude = 10 ** (rng.normal(0, errors[0], (ports, columns)) / 20)
    phase = rng.normal(0, np.radians(errors[1]), (ports, columns))
    weights = np.outer(taper_v, taper_h) * amplitude * np.exp(1j * phase)
    weights = np.repeat(weights, grouped, axis=0)
    steer = np.exp(2j * np.pi * np.arange(rows) * pitch_v * np.sin(np.radians(tilt)))
    return weights * steer[:, None]


def element_power(shape, theta, phi):
    azimuth, elevation, floor = shape
    vertical = np.minimum(12 * ((np.degrees(theta) - 90) / elevation) ** 2, floor)
    horizontal = np.minimum(12 * (np.degrees(phi) / azimuth) ** 2, floor)
    return 10 ** (-np.minimum(vertical + horizontal, floor) / 10)


def far_power(weights, pitches, shape, theta, phi):
    """Intensity over all theta (T,) by phi (P,), element by element."""
    rows, columns = weights.shape
    along = np.exp(2j * np.pi * pitches[0] * np.multiply.outer(np.cos(theta), np.arange(rows))) @ weights
    u_y = np.multiply.outer(np.sin(theta), np.sin(phi))
    step = np.exp(2j * np.pi * pitches[1] * u_y)
    field = np.zeros(u_y.shape, complex)
    for n in reversed(range(columns)):
        field = field * step + along[:, n, None]
    return element_power(shape, theta[:, None], phi) * np.abs(field) ** 2


def mean_power(weights, pitches, shape):
    """Mean over the sphere, quadrature dense for the kinks of the element."""
    rows, columns = weights.shape
    extent = np.hypot(rows * pitches[0], columns * pitches[1])
    mu, weight = np.polynomial.legendre.leggauss(int(np.pi * extent + 24))
    phi = np.linspace(-np.pi, np.pi, int(2 * np.pi * columns * pitches[1] + 60), endpoint=False)
    return (far_power(weights, pitches, shape, np.arccos(mu), phi).mean(1) @ weight) / 2


def peak_and_widths(weights, pitches, shape, tilt):
    """Beam intensity and both half-power widths [deg] by fine cuts through the beam."""
    theta, phi = np.radians(90 + tilt), 0.0
    for span, count in ((4.0, 33), (0.4, 17)):
        thetas = theta + np.radians(np.linspace(-span, span, count))
        phis = phi + np.radians(np.linspace(-span, span, count))
        near = far_power(weights, pitches, shape, thetas, phis)
        i, j = np.unravel_index(near.argmax(), near.shape)
        theta, phi = thetas[i], phis[j]
    peak = near.max()
    fine = np.radians(np.arange(-89, 89, 0.1))
    vertical = far_power(weights, pitches, shape, np.pi / 2 + fine, np.array([phi]))[:, 0] / peak
    horizontal = far_power(weights, pitches, shape, np.array([theta]), fine)[0] / peak
    return peak, width(horizontal, fine, phi), width(vertical, fine, theta - np.pi / 2)


def width(level, angle, at):
    middle = int(np.argmin(np.abs(angle - at)))
    right = middle + int(np.argmax(level[middle:] < 0.5))
    left = middle - int(np.argmax(level[middle::-1] < 0.5))
    edges = [
        np.interp(0.5, [level[i], level[j]], [angle[i], angle[j]])
        for i, j in ((right, right - 1), (left, left + 1))
    ]
    return float(np.degrees(edges[0] - edges[1]))


def honest(kind, rng):
    """One honest panel and its data-sheet figures."""
    counts, pitches, shape, pedestals, errors, tilt, loss = draw(kind, rng)
    weights = excitation(counts, pitches[0], pedestals, errors, tilt=tilt, rng=rng)
    peak, azimuth, elevation = peak_and_widths(weights, pitches, shape, tilt)
    gain = 10 * np.log10(peak / mean_power(weights, pitches, shape)) - loss
    rows, columns, grouped = counts
    layout = ArrayLayout(rows, columns, *pitches, subarray_rows=grouped)
    printed_azimuth = round(azimuth) if columns == 1 else round(azimuth, 1)
    return Truth(layout, tilt, printed_azimuth, round(elevation, 1), round(gain, 1), round(loss, 1))


def simulate(kind, count, seed):
    """Shares of zones by offset, without and with declared loss: {(declared, offset): {zone: share}}."""
    rng = np.random.default_rng([seed, list(PanelClass).index(kind)])
    tally = {
        (declared, offset): dict.fromkeys(GainZone, 0) for declared in (False, True) for offset in OFFSETS_DB
    }
    margins = []
    for _ in range(count):
        truth = honest(kind, rng)
        for declared in (False, True):
            edges = expected_gain(
                truth.layout,
                SPEED_OF_LIGHT_MPS,
                kind,
                tilt_deg=truth.tilt_deg,
                horizontal_beamwidth_deg=truth.azimuth_deg,
                vertical_beamwidth_deg=truth.elevation_deg,
                declared_loss_db=truth.loss_db if declared else None,
            )
            for offset in OFFSETS_DB:
                tally[declared, offset][edges.zone(truth.gain_dbi + offset)] += 1
        margins.append(truth.gain_dbi - edges.directivity_dbi)
    shares = {key: {zone: n / count for zone, n in zones.items()} for key, zones in tally.items()}
    return shares, np.percentile(margins, [2.5, 50, 97.5])


def caught(zones):
    return zones[GainZone.IMPOSSIBLE] + zones[GainZone.QUESTION]


def main(count=COUNT):
    print(f"{count} panels a class, seed {SEED}; shares in per cent")
    print(f"{'':26s}{'honest claims':^32s}{'caught, claim too high by':^28s}")
    print(
        f"{'class':17s}{'loss':9s}" + "".join(f"{name:>11s}" for name in ("impossible", "questioned", "low")),
        end="",
    )
    print("".join(f"{f'{offset:g} dB':>7s}" for offset in OFFSETS_DB[1:]))
    for kind in PanelClass:
        shares, margins = simulate(kind, count, SEED)
        for declared in (False, True):
            honest_zones = (GainZone.IMPOSSIBLE, GainZone.QUESTION, GainZone.LOW)
            zones = [100 * shares[declared, 0.0][zone] for zone in honest_zones]
            found = [100 * caught(shares[declared, offset]) for offset in OFFSETS_DB[1:]]
            print(f"{kind.value:17s}{'declared' if declared else 'unknown':9s}", end="")
            print("".join(f"{zone:11.2f}" for zone in zones) + "".join(f"{share:7.1f}" for share in found))
        low, middle, high = margins
        print(f"{'':17s}gain less fitted directivity {low:.2f} .. {high:.2f}, median {middle:.2f} dB")


if __name__ == "__main__":
    main(int(sys.argv[1]) if len(sys.argv) > 1 else COUNT)
