"""Which of the readings that repair a misfit is named first, and when two of them fit as well."""

from __future__ import annotations

import math
from collections.abc import Collection
from dataclasses import dataclass

from speccheck.checks.innocent.conventions import InnocentReading
from speccheck.records import Band, CellRef, Finding, Reading

Key = tuple[str, Band | None, tuple[CellRef, ...], int]
"""What a finding is about: check, band, and cells and number where a check has several for a band."""

HONEST_PLACE = {"dBi": 0.6}
"""Where honest figures lie from the low to the high edge of what is expected; in the middle by default. The
upper edge of a gain is sharp, the lower one generous: honest gains lie 1.2 dB below lossless where the edges
are 2.2 and 0.5 dB below (median of the population in `tests/benchmarks/population.py`)."""

SPREADS_TO_AN_EDGE = 2.0
"""Standard deviations from there to an edge: about 95 % of honest figures lie between the edges."""

BAND_SCATTER = 0.5
"""Standard deviation of one band from the average of its panel, in spreads: a quarter of a decibel where half
of the range of gain is 0.85 dB (common practice: losses rise slowly with frequency)."""

SAME, AS_WELL = 0.25, 1.0
"""Differences of log likelihood: below the first only rounding tells two readings apart, and the commoner one
goes first; below the second, a factor of e, the order is no finding, and the report says so."""


@dataclass(frozen=True, slots=True)
class Candidate:
    """An innocent reading, the figures before and after, the misfits it repairs, and those it does not touch.

    `judged` are the findings of the repairing checks in all bands: where it rereads one band, the others tell
    what the panel is like.
    """

    reading: InnocentReading
    rank: int
    repaired: dict[Key, Finding]
    judged: tuple[Finding, ...]
    leaves: tuple[str, ...]
    likely: bool
    reread: tuple[tuple[Reading, Reading], ...] = ()

    @property
    def order(self) -> tuple[int, bool, float, int]:
        """Repairs most, pointed to by the figures, fits best, listed first."""
        return (
            -len(self.repaired),
            not self.likely,
            self.unlikelihood,
            self.rank,
        )

    @property
    def unlikelihood(self) -> float:
        """How unlikely the reread figures would be of an honest panel: −ln of the likelihood."""
        return sum(map(_unlikelihood, _most_telling(self.judged)))

    def fits_as_well_as(self, other: Candidate, within: float = AS_WELL) -> bool:
        """Whether both explain as much and are as likely."""
        return self.order[:2] == other.order[:2] and abs(self.unlikelihood - other.unlikelihood) < within


def ranked(candidates: Collection[Candidate]) -> list[Candidate]:
    """The best explanation first; among equals the one listed first."""
    rest = sorted(candidates, key=lambda c: c.order)
    ordered: list[Candidate] = []
    while rest:
        first = min((c for c in rest if c.fits_as_well_as(rest[0], SAME)), key=lambda c: c.rank)
        rest.remove(first)
        ordered.append(first)
    return ordered


def span_of(finding: Finding) -> tuple[float, float, float] | None:
    """The claimed figure and both edges of what is expected; None where there is no room between them."""
    value = finding.claimed.value if finding.claimed else None
    span = finding.expected
    if not isinstance(value, int | float) or span is None or span.low is None or span.high is None:
        return None
    return (value, span.low, span.high) if span.low < span.high else None


def _unlikelihood(alike: list[Finding]) -> float:
    """−ln of the density of claimed figures in several bands, up to a constant.

    What a model cannot know of a panel, above all its loss, is nearly the same in all bands: the average is
    held against the expected spread, each band against the average.
    """
    places = [place for finding in alike if (place := _place(finding))]
    if not places:
        return 0.0
    average = sum(off for off, _ in places) / len(places)
    scatter = sum((off - average) ** 2 for off, _ in places) / BAND_SCATTER**2
    return (average**2 + scatter) / 2 + sum(math.log(spread) for _, spread in places) / len(places)


def _place(after: Finding) -> tuple[float, float] | None:
    """Distance of a claim from the usual figure, in spreads, and the spread: in decibels or shares of it."""
    span = span_of(after)
    if span is None or after.expected is None:
        return None
    value, low, high = span
    unit = after.expected.unit
    usual = low + HONEST_PLACE.get(unit, 0.5) * (high - low)
    spread = (high - low) / 2 / SPREADS_TO_AN_EDGE
    return (value - usual) / spread, spread / (1.0 if unit.startswith("dB") else abs(usual) or 1.0)


def _most_telling(findings: Collection[Finding]) -> list[list[Finding]]:
    """By unit, the findings of the check that expects the narrowest interval."""
    by_unit: dict[str, dict[str, list[Finding]]] = {}
    for finding in findings:
        if span_of(finding) and finding.expected:
            by_unit.setdefault(finding.expected.unit, {}).setdefault(finding.check, []).append(finding)
    return [min(checks.values(), key=_width) for checks in by_unit.values()]


def _width(findings: list[Finding]) -> float:
    spans = [span for finding in findings if (span := span_of(finding))]
    return sum(high - low for _, low, high in spans) / len(spans)
