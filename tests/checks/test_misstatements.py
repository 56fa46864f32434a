"""Forty ways in which panel claims go wrong (common practice), each with its cases.

Every number has a misstated case that ends in a misfit or in a question, an innocent reading that the
program offers for it or asks about, and an honest twin that is left in peace. A text here is the beginning
of the name of a case in the case file of its check; the other is a reading's name, or words of the question.
"""

from __future__ import annotations

import functools
from dataclasses import dataclass

import pytest
from checks.cases import CheckCase, all_cases

from speccheck.checks import examine
from speccheck.checks.innocent.conventions import INNOCENT_READINGS
from speccheck.records import Finding, Fit, Settings

MISFIT = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)


@dataclass(frozen=True)
class Misstatement:
    """What is claimed, the check that sees it, the misstated case, the innocent reading, the honest twin."""

    number: int
    what: str
    check: str
    misstated: str
    innocent: str
    twin: str


FORTY = tuple(
    Misstatement(*row)
    for row in (
        (1, "gain too high for the beamwidths", "gain-fits-beamwidths", "a width at -10 dB: 17.3",
         "horizontal width taken at -10 dB", "honest twin: 17.6 dBi from"),
        (2, "dBd under dBi", "gain-fits-geometry", "gain 2.15 dB low", "gain in dBd under a heading in dBi",
         "honest twin: 14.75"),
        (3, "both polarisations summed", "gain-fits-geometry", "both polarisations summed",
         "both polarisations added into the gain", "honest twin: 17.1"),
        (4, "directivity sold as gain", "gain-fits-geometry", "directivity sold as gain",
         "directivity, before losses", "honest twin of both: 18.3"),
        (5, "gain at an internal plane", "gain-fits-geometry", "the same with the loss declared",
         "gain at an internal plane, before the stated loss", "honest twin of both: 18.3"),
        (6, "best value of the band", "gain-fits-geometry", "best frequency of a wide band",
         "gain at the best frequency of the band", "honest twin: gains that rise"),
        (7, "gain at one tilt only", "gain-over-tilt", "equal at three tilts", "mean", "honest twin"),
        (8, "mean of decibels or of powers", "gain-mean", "neither mean", "mean", "the mean of powers"),
        (9, "typical shown as guaranteed", "figures-say-their-statistic", "9: typical sold as guaranteed",
         "guaranteed", "9: honest twin"),
        (10, "statistical tolerance", "figures-say-their-statistic", "9: typical beside a sign of minimum",
         "guaranteed", "10: a tolerance may be statistical"),
        (11, "width at -10 dB", "gain-fits-beamwidths", "a width at -10 dB: 17.3",
         "sector width, not beamwidth", "honest twin: 17.6 dBi from"),
        (12, "vertical beam too narrow for the length", "vertical-beamwidth-fits-height",
         "width at the top of the band", "widths at the upper band edge", "honest twin"),
        (13, "gain above the aperture", "gain-fits-housing", "29.0 dBi from",
         "both polarisations added into the gain", "a narrow column beats"),
        (14, "8 dBi and 10 log N", "gain-fits-geometry", "12 × 8 by the short formula",
         "system-model figure: element gain + 10·log10 N", "honest twin: 24.0"),
        (15, "envelope passed off as one pattern", "gain-fits-beamwidths", "15: vertical width",
         "widths of the envelope of all beams", "15: honest twin: the width says"),
        (16, "front-to-back flattered", "front-to-back-defined", "16: flattered",
         "front-to-back ratio co-polar at 180°", "16: honest twin"),
        (17, "first upper lobe only", "first-lobe-and-range", "better over the range", "range",
         "honest twin"),
        (18, "cross-polar ratio on axis only", "cross-polar-defined", "18: boresight figure",
         "cross-polar discrimination on axis", "18: honest twin"),
        (19, "cuts on the horizon", "horizontal-cut-through-beam", "19: cut on the horizon",
         "cut through the beam peak", "19: honest twin"),
        (20, "spacing at another frequency", "horizontal-spacing", "spacing in λ quoted at the bottom",
         "spacing in wavelengths quoted at the upper band edge", "honest twin: 41.5"),
        (21, "no grating lobes claimed", "horizontal-spacing", "0.6 λ claimed free",
         "scan range given as its whole width", "honest twin: 41.5"),
        (22, "one wideband column", "vertical-spacing", "one wideband column",
         "interleaved elements double the density", "honest twin: 92 mm"),
        (23, "elements of both polarisations", "elements-fit-counts", "rows that count both polarisations",
         "rows count the dipoles of both polarisations", "192 elements are 96"),
        (24, "transceivers and rows do not multiply", "transceivers-fit-subarrays",
         "rows that count sub-arrays", "rows count sub-arrays, not elements", "honest twin: 64T64R"),
        (25, "vertical range too large", "subarray-spacing", "threes at 0.7 λ",
         "scan range given as its whole width", "honest twin: 2 to 10°"),
        (26, "scan loss left out", "figures-fall-with-scan", "26: the gain at 60°", "normal",
         "26: honest twin"),
        (27, "width of other columns", "horizontal-beamwidth-fits-columns", "65° beside the gain",
         "horizontal width of a broadcast beam or single column", "honest twin: 65° beside"),
        (28, "array does not fit the box", "array-fits-housing", "12 at 0.8 λ of 1710 MHz",
         "spacing in wavelengths quoted at the upper band edge", "honest twin: 0.8 λ"),
        (29, "ports over-counted", "connectors-fit-columns", "the calibration connector counted",
         "calibration connectors counted among the RF connectors", "honest twin: two connectors"),
        (30, "headline wider than the table", "sub-bands-make-up-range", "30: headline wider",
         "table of sub-bands shortened", "30: honest twin"),
        (31, "VSWR and return loss", "vswr-matches-return-loss", "31: 1.3 beside 14 dB", "VSWR is typical",
         "31: rounding, 1.5 beside 14 dB"),
        (32, "intermodulation", "intermodulation-comparable", "32: flattered by test power",
         "small panel tested at its own rating", "32: honest twin"),
        (33, "isolation of the wrong ports", "isolation-plausible", "33: high isolation",
         "isolation of the two polarisations of one column", "33: honest twin"),
        (34, "power of all ports at once", "port-power-adds-up", "34: a small share",
         "port rating for one port in use at a time", "34: honest twin"),
        (35, "EIRP above power plus gain", "eirp-fits-power-and-gain", "35: EIRP 3 dB above",
         "EIRP with both polarisations added twice", "35: honest twin"),
        (36, "EIRP per port as total", "eirp-fits-power-and-gain", "36: EIRP of one port of 64",
         "EIRP of one port", "36: honest twin"),
        (37, "efficiency beyond belief", "mains-power-covers-rf", "37: efficiency",
         "power consumption at part load", "37: honest twin"),
        (38, "compliance distance bare of its limit", "compliance-distance-fits-power",
         "38: workers' distance", "distance for workers", "38: honest twin says workers"),
        (39, "wind load", "wind-load-fits-area", "39: wind load too low", "wind load at 120 km/h",
         "39: honest twin"),
        (40, "weight without the radio", "weight-fits-size", "40: active panel without its radio",
         "weight without the radio", "40: honest twin"),
    )
)  # fmt: skip


@functools.cache
def finding(check: str, name: str) -> Finding | None:
    """What the check says of the one case whose name begins so."""
    cases: list[CheckCase] = [c for c in all_cases() if c.check == check and c.name.startswith(name)]
    assert len(cases) == 1, f"{check}: {len(cases)} cases begin with {name!r}"
    said = [f for f in examine(cases[0].panel, Settings()) if f.check == check]
    bands = cases[0].expect.get("band")
    return next((f for f in said if bands is None or f.band == tuple(bands)), None)


def test_all_forty_are_listed() -> None:
    assert [m.number for m in FORTY] == list(range(1, 41))


@pytest.mark.parametrize("case", FORTY, ids=lambda m: f"{m.number}: {m.what}")
def test_misstatement_is_found_and_its_innocent_reading_offered(case: Misstatement) -> None:
    found = finding(case.check, case.misstated)
    assert found is not None and found.verdict in MISFIT
    assert found.question, "a misfit asks"
    if case.innocent in INNOCENT_READINGS:
        assert case.innocent in [c.name for c in found.conventions]
    else:
        assert case.innocent in found.question + found.summary


@pytest.mark.parametrize("case", FORTY, ids=lambda m: f"{m.number}: {m.what}")
def test_honest_twin_is_left_in_peace(case: Misstatement) -> None:
    found = finding(case.check, case.twin)
    assert found is not None and found.verdict is Fit.FITS
