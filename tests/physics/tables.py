"""Published and brute-force reference tables, and how their rows become calls of the package."""

from __future__ import annotations

import csv
from pathlib import Path

from speccheck.physics import taper
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.physics.element import CosineElement, IsotropicElement, SectorElement
from speccheck.physics.layout import ArrayLayout, Lattice

REFERENCE = Path(__file__).parent.parent / "reference"
ONE_METRE_HZ = SPEED_OF_LIGHT_MPS
"""Frequency of a 1 m wavelength: lengths in wavelengths are lengths in metres."""


def rows(name):
    """Rows of a reference table as dictionaries."""
    with (REFERENCE / name).open(encoding="utf-8", newline="") as file:
        return list(csv.DictReader(file))


def element(name):
    """Element of arrays.csv by its name there."""
    if name.startswith("cosq"):  # cos^q of the FIELD
        return CosineElement(2 * float(name[4:]))
    return {
        "iso2": IsotropicElement(),
        "iso1": IsotropicElement(front_only=True),
        "38901": SectorElement(65, 65),
        "37840": SectorElement(80, 65),
    }[name]


def weights(text, count):
    """Taper of arrays.csv by its name there."""
    if text == "uniform":
        return ()
    kind, *figures = text.split(":")
    make = {"taylor": taper.taylor, "cheb": taper.chebyshev, "cosped": taper.cosine_on_pedestal}[kind]
    return tuple(
        make(count, *(int(f) if kind == "taylor" and i else float(f) for i, f in enumerate(figures)))
    )


def layout(row):
    """Layout of one row of arrays.csv, pitches in metres at 1 m wavelength."""
    rows_, columns, grouped = int(row["M"]), int(row["N"]), int(row["K_sub"])
    panels_v, panels_h = int(row["Mg"]), int(row["Ng"])
    return ArrayLayout(
        rows_,
        columns,
        float(row["dV"]),
        float(row["dH"]),
        subarray_rows=grouped,
        subarray_tilt_deg=float(row["sub_tilt_deg"] or 0),
        row_taper=weights(row["taper_v"], panels_v * rows_ // grouped),
        column_taper=weights(row["taper_h"], panels_h * columns),
        panel_rows=panels_v,
        panel_columns=panels_h,
        panel_vertical_pitch_m=float(row["dgV"]),
        panel_horizontal_pitch_m=float(row["dgH"]),
        lattice=Lattice.TRIANGULAR if row["lattice"] == "tri" else Lattice.RECTANGULAR,
    )
