"""How often an honest gain is doubted and a flattering one caught: python tests/benchmarks/population.py

Random plausible panels of each class, with taper, element shape, excitation errors and loss unknown to the
judge, state their geometry, beamwidths and gain as a data sheet would print them (rounded), and every check
of the program looks at them. The truth is a Gauss-Legendre sphere summed element by element: nothing of it is
shared with the package.

Ranges of loss, errors and geometry are assumptions about the trade, so the percentages are indicative. Above
all they depend on how losses lie within their range: seldom at its ends (symmetric triangular, for which the
edges of `speccheck.physics.expected` are set), or anywhere alike (uniform). Both are printed: the same panels
with the same rank of loss. An argument sets the number of panels a class.
"""

from __future__ import annotations

import sys
from dataclasses import dataclass
from pathlib import Path

import numpy as np

sys.path.insert(0, str(Path(__file__).parents[1]))

from checks.cases import panel_of

from speccheck.checks.runner import run_checks
from speccheck.physics.expected import PanelClass
from speccheck.records import Fit, Settings

SEED = 4711
COUNT = 400
OFFSETS_DB = (0.0, 1.0, 1.5, 2.0, 3.0)
LOSSES_DB = {
    PanelClass.PASSIVE: (0.4, 1.6),
    PanelClass.MASSIVE_MIMO: (0.3, 1.8),
    PanelClass.MMWAVE: (0.5, 2.8),
}
BANDS_MHZ = {
    PanelClass.PASSIVE: (1710, 2170),
    PanelClass.MASSIVE_MIMO: (3300, 3800),
    PanelClass.MMWAVE: (24250, 27500),
}
SPEED_MM_MHZ = 299_792.458


def triangular(rank):
    """Place in a range of a figure of that rank, symmetric about the middle."""
    return np.sqrt(rank / 2) if rank < 0.5 else 1 - np.sqrt((1 - rank) / 2)


DRAWS = {"triangular": triangular, "uniform": lambda rank: rank}


@dataclass
class Truth:
    """One panel: counts, pitches [wavelengths], beam as printed, lossless gain, rank of its loss."""

    kind: PanelClass
    counts: tuple[int, int, int]
    pitches: tuple[float, float]
    tilt_deg: float
    azimuth_deg: float
    elevation_deg: float
    directivity_dbi: float
    rank: float

    def loss_db(self, draw):
        low, high = LOSSES_DB[self.kind]
        return low + (high - low) * DRAWS[draw](self.rank)

    def stated(self, draw, offset_db, *, declared):
        """The panel as its data sheet prints it."""
        low, high = BANDS_MHZ[self.kind]
        wavelength_mm = SPEED_MM_MHZ / ((low + high) / 2)
        digits = 2 if self.kind is PanelClass.MMWAVE else 1
        rows, columns, grouped = self.counts
        gain = round(self.directivity_dbi - self.loss_db(draw), 1) + offset_db
        sheet = {
            "frequency_range": [low, high],
            "polarisations": 2,
            "array_rows": rows,
            "array_columns": columns,
            "vertical_element_spacing": f"{self.pitches[0] * wavelength_mm:.{digits}f} mm",
            "horizontal_beamwidth": self.azimuth_deg,
            "vertical_beamwidth": self.elevation_deg,
            "gain": {"value": round(float(gain), 1), "unit": "dBi", "at": {"tilt_deg": self.tilt_deg}},
        }
        if columns > 1:
            sheet["horizontal_element_spacing"] = f"{self.pitches[1] * wavelength_mm:.{digits}f} mm"
        if grouped > 1:
            sheet |= {"subarray_rows": grouped, "subarray_tilt": 0}
        if declared:
            sheet["feed_loss"] = round(float(self.loss_db(draw)), 1)
        return panel_of(sheet)


def draw(kind, rng):
    """Geometry, element, tapers and errors of one panel of a class."""
    if kind is PanelClass.PASSIVE:
        rows, columns, grouped = int(rng.integers(6, 15)), 1, 1
        pitch_v, pitch_h = rng.uniform(0.6, 0.95), 0.5
        azimuth, tilt = rng.uniform(58, 72), rng.uniform(0, 8)
    elif kind is PanelClass.MASSIVE_MIMO:
        grouped = int(rng.integers(1, 4))
        rows, columns = int(rng.choice([4, 6, 8])) * grouped, int(rng.choice([4, 8, 16]))
        pitch_v, pitch_h = rng.uniform(0.6, 0.75), rng.uniform(0.48, 0.56)
        azimuth, tilt = rng.uniform(65, 100), 0.0
    else:
        rows, columns, grouped = int(rng.choice([8, 12, 16])), int(rng.choice([8, 12, 16])), 1
        pitch_v, pitch_h = rng.uniform(0.48, 0.56), rng.uniform(0.48, 0.56)
        azimuth, tilt = rng.uniform(65, 100), 0.0
    shape = (azimuth, rng.uniform(60, 85), rng.uniform(20, 30))
    pedestals = rng.uniform(0.3, 1.0, 2) if columns > 1 else (rng.uniform(0.3, 1.0), 1.0)
    worst_db, worst_deg = (1.5, 15.0) if kind is PanelClass.MMWAVE else (1.0, 10.0)
    errors = rng.uniform(0.2, worst_db), rng.uniform(2, worst_deg)
    return (rows, columns, grouped), (pitch_v, pitch_h), shape, pedestals, errors, tilt


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
    """One panel and its figures."""
    counts, pitches, shape, pedestals, errors, tilt = draw(kind, rng)
    weights = excitation(counts, pitches[0], pedestals, errors, tilt=tilt, rng=rng)
    peak, azimuth, elevation = peak_and_widths(weights, pitches, shape, tilt)
    directivity = 10 * np.log10(peak / mean_power(weights, pitches, shape))
    printed_azimuth = round(azimuth) if counts[1] == 1 else round(azimuth, 1)
    rank = rng.uniform()
    return Truth(kind, counts, pitches, tilt, printed_azimuth, round(elevation, 1), float(directivity), rank)


def verdict(panel):
    """The worst any check says of a panel."""
    verdicts = {finding.verdict for finding in run_checks(panel, Settings())}
    return next((v for v in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL) if v in verdicts), Fit.FITS)


def simulate(kind, count, seed, *, draws=tuple(DRAWS), offsets=OFFSETS_DB):
    """Shares of verdicts: {(draw, declared, offset): {verdict: share}}."""
    rng = np.random.default_rng([seed, list(PanelClass).index(kind)])
    tally = {
        (name, declared, offset): dict.fromkeys((Fit.DOES_NOT_FIT, Fit.DOUBTFUL, Fit.FITS), 0.0)
        for name in draws
        for declared in (False, True)
        for offset in offsets
    }
    for _ in range(count):
        truth = honest(kind, rng)
        for (name, declared, offset), shares in tally.items():
            shares[verdict(truth.stated(name, offset, declared=declared))] += 1 / count
    return tally


def main(count=COUNT):
    print(f"{count} panels a class, seed {SEED}, every check; shares in per cent")
    print(f"{'':37s}{'honest claims':^24s}{'caught, claim too high by':^28s}")
    print(f"{'class':17s}{'losses lie':12s}{'loss':8s}{'does not fit':>12s}{'questioned':>12s}", end="")
    print("".join(f"{f'{offset:g} dB':>7s}" for offset in OFFSETS_DB[1:]))
    for kind in PanelClass:
        shares = simulate(kind, count, SEED)
        for name in DRAWS:
            for declared in (False, True):
                honest_shares = shares[name, declared, 0.0]
                print(f"{kind.value:17s}{name:12s}{'declared' if declared else 'unknown':8s}", end="")
                print(
                    "".join(f"{100 * honest_shares[v]:12.2f}" for v in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)),
                    end="",
                )
                caught = (1 - shares[name, declared, offset][Fit.FITS] for offset in OFFSETS_DB[1:])
                print("".join(f"{100 * share:7.1f}" for share in caught))
    print(
        "Aims: honest does not fit 0.2, questioned 4 at most; 1.5 dB caught 97 (millimetre wave 80), with\n"
        "the loss declared 99; 3 dB always. The edges are set for triangular losses. Uniform ones put so\n"
        "many honest panels below the least plausible loss that no edge meets both aims for millimetre\n"
        "wave: the remedy is the loss statement that the question asks for."
    )


if __name__ == "__main__":
    main(int(sys.argv[1]) if len(sys.argv) > 1 else COUNT)
