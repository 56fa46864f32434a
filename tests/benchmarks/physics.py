"""How fast and how exact the array physics is: python tests/benchmarks/physics.py

Prints the time of one panel and band (three frequencies by five steering states, with directivity, beam,
beamwidths and side lobes) on one core, its ratio to a 1 degree sphere sum and to the reading of a 60-cell
row measured in the same run, and the accuracy against a fine Gauss-Legendre sphere.
"""

from __future__ import annotations

import io
import os
import time

for name in ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS"):
    os.environ[name] = "1"  # before numpy is imported

import numpy as np  # noqa: E402
import openpyxl  # noqa: E402

from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS  # noqa: E402
from speccheck.physics.element import SectorElement  # noqa: E402
from speccheck.physics.layout import ArrayLayout  # noqa: E402
from speccheck.physics.states import array_states, directivity_dbi  # noqa: E402

ELEMENT = SectorElement(80, 65)
CENTRE_HZ = 3.55e9
FREQ_HZ = np.repeat([3.3e9, 3.55e9, 3.8e9], 5)
TILT_DEG = np.tile([0.0, 3, 6, 10, 6], 3)
SCAN_DEG = np.tile([0.0, 0, 30, 45, 60], 3)
REPEATS = 300


def panel(rows=12, columns=8, serial=0):
    """A panel of its own each time: a pitch that differs by parts in a million defeats every cache."""
    wavelength = SPEED_OF_LIGHT_MPS / CENTRE_HZ
    return ArrayLayout(rows, columns, 0.7 * wavelength * (1 + 1e-7 * serial), 0.5 * wavelength)


def timed(work, repeats):
    """Median and best time of one call [s]."""
    spent = []
    for serial in range(repeats):
        start = time.perf_counter()
        work(serial)
        spent.append(time.perf_counter() - start)
    return float(np.median(spent)), min(spent)


def sphere_dbi(layout, freq_hz, tilt_deg, scan_deg, nodes=None):
    """Directivity by summing a sphere: 1 degree midpoints, or Gauss-Legendre by uniform azimuth."""
    k = 2 * np.pi * freq_hz / SPEED_OF_LIGHT_MPS
    if nodes is None:
        theta = np.radians(np.arange(0.5, 180))
        weight = np.sin(theta) * np.radians(1)
        phi = np.radians(np.arange(-179.5, 180))
    else:
        mu, weight = np.polynomial.legendre.leggauss(nodes)
        theta, phi = np.arccos(mu), (np.arange(2 * nodes) + 0.5) / nodes * np.pi - np.pi
    z = np.arange(layout.rows) * layout.vertical_pitch_m
    y = np.arange(layout.columns) * layout.horizontal_pitch_m
    tilt, scan = np.radians(tilt_deg), np.radians(scan_deg)
    u_y0, u_z0 = np.cos(tilt) * np.sin(scan), -np.sin(tilt)
    along = np.exp(1j * k * np.multiply.outer(np.cos(theta) - u_z0, z)).sum(1)
    u_y = np.multiply.outer(np.sin(theta), np.sin(phi))
    across = sum(np.exp(1j * k * position * (u_y - u_y0)) for position in y)
    power = ELEMENT.power(theta[:, None], phi) * np.abs(along[:, None] * across) ** 2
    mean = (power.sum(1) * weight).sum() * (2 * np.pi / len(phi)) / (4 * np.pi)
    found = array_states(layout, ELEMENT, freq_hz, tilt_deg, scan_deg)
    theta_p, phi_p = np.radians(found.peak_theta_deg), np.radians(found.peak_phi_deg)
    u_yp, u_zp = np.sin(theta_p) * np.sin(phi_p), np.cos(theta_p)
    peak = np.exp(1j * k * z * (u_zp - u_z0)).sum() * np.exp(1j * k * y * (u_yp - u_y0)).sum()
    return 10 * np.log10(ELEMENT.power(theta_p, phi_p) * np.abs(peak) ** 2 / mean)


def row_reading_time(rows=300, cells=60):
    """Time to read one row of a workbook by openpyxl [s], read-only and in full."""
    book = openpyxl.Workbook()
    for row in range(rows):
        book.active.append([f"panel {row}", *(17.5 + row / 1000 + cell for cell in range(cells - 1))])
    stored = io.BytesIO()
    book.save(stored)
    spent = []
    for read_only in (True, False):
        start = time.perf_counter()
        opened = openpyxl.load_workbook(io.BytesIO(stored.getvalue()), read_only=read_only, data_only=True)
        total = sum(1 for row in opened.active.iter_rows(values_only=True) for _ in row)
        spent.append((time.perf_counter() - start) / rows)
        assert total == rows * cells
    return spent


def accuracy():
    """Worst difference of directivity [dB] over 20 directions against 300 x 600 Gauss-Legendre nodes."""
    worst = 0.0
    for scan in (0, 15, 30, 45, 60):
        for tilt in (0, 5, 12, 20):
            exact = sphere_dbi(panel(), CENTRE_HZ, float(tilt), float(scan), nodes=300)
            worst = max(worst, abs(exact - float(directivity_dbi(panel(), ELEMENT, CENTRE_HZ, tilt, scan))))
    return worst


def main():
    array_states(panel(), ELEMENT, FREQ_HZ, TILT_DEG, SCAN_DEG)  # imports, quadrature nodes
    median, best = timed(
        lambda serial: array_states(panel(serial=serial + 1), ELEMENT, FREQ_HZ, TILT_DEG, SCAN_DEG), REPEATS
    )
    column = SectorElement(65, 65)
    column_median, _ = timed(
        lambda serial: array_states(
            panel(10, 1, serial + 1), column, FREQ_HZ, TILT_DEG, np.zeros_like(SCAN_DEG)
        ),
        REPEATS,
    )
    again, _ = timed(lambda _: array_states(panel(), ELEMENT, FREQ_HZ, TILT_DEG, SCAN_DEG), REPEATS)
    sphere, _ = timed(lambda _: sphere_dbi(panel(), CENTRE_HZ, 6.0, 30.0), 15)
    alone, _ = timed(
        lambda serial: directivity_dbi(panel(serial=serial + 1), ELEMENT, FREQ_HZ, TILT_DEG, SCAN_DEG), 100
    )
    small = np.ones(15)
    one_number, _ = timed(lambda _: small + small, 5000)
    reading, full = row_reading_time()
    states = len(FREQ_HZ)
    for label, value, unit in (
        ("small numpy call on this machine", f"{one_number * 1e6:.2f}", "us"),
        (f"12 x 8 panel, {states} states, all figures", f"{median * 1e6:.0f}", f"us (best {best * 1e6:.0f})"),
        ("  target 600 us, alarm 1500 us", f"{median / 600e-6:.2f}", "of the target"),
        ("  per state", f"{median / states * 1e6:.1f}", "us"),
        ("  directivity alone, all states", f"{alone * 1e6:.0f}", "us"),
        ("  the same panel again (kept)", f"{again * 1e6:.0f}", "us"),
        (f"10 x 1 column, {states} states, all figures", f"{column_median * 1e6:.0f}", "us"),
        ("1 degree sphere, directivity of one state", f"{sphere * 1e6:.0f}", "us"),
        ("  sphere for all states / all figures here", f"{sphere * states / median:.0f}", "x (target 50)"),
        ("60-cell row read by openpyxl, read-only", f"{reading * 1e6:.0f}", f"us (full {full * 1e6:.0f})"),
        ("  physics / reading of its row", f"{median / reading:.1f}", f"x (full {median / full:.1f})"),
        ("worst directivity error, 20 directions", f"{accuracy():.1e}", "dB (target 0.01)"),
    ):
        print(f"{label:46s}{value:>9s} {unit}")


if __name__ == "__main__":
    main()
