"""Innocent readings: a misfit is tried under every convention that would explain it, one at a time.

The runner judges the re-read panel by the same checks. Readings that repair every misfit come first; one
that breaks a claim which fitted is dropped. Nothing here names a culprit: candidates and one question.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Callable, Collection
from dataclasses import dataclass, replace
from typing import Protocol

from speccheck.checks.innocent.conventions import INNOCENT_READINGS, InnocentReading, Reach
from speccheck.records import Band, CellRef, Convention, Finding, Fit, Panel, Step


class Examined(Protocol):
    """A panel that the checks have been asked about, or can be."""

    def findings(self, slugs: Collection[str] | None = None) -> tuple[Finding, ...]:
        """What all checks say of it, or those named."""


Rerun = Callable[[Panel], Examined]

_Key = tuple[str, Band | None, tuple[CellRef, ...], int]

MISFIT = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)
LISTED = 5
SLIPS = "figure-plausible"
"""The one check that says nothing of a figure that is possible."""

NONE_FITS = "None of the readings tried fits."


@dataclass(frozen=True, slots=True)
class _Candidate:
    reading: InnocentReading
    rank: int
    repaired: dict[_Key, Finding]
    leaves: tuple[str, ...]
    likely: bool

    @property
    def order(self) -> tuple[bool, int, bool, float, int]:
        """Repairs everything, repairs most, pointed to by the figures, leaves least over, listed first."""
        return (
            bool(self.leaves),
            -len(self.repaired),
            not self.likely,
            max(map(_off_middle, _most_telling(self.repaired.values()))),
            self.rank,
        )


def offer_innocent_readings(panel: Panel, findings: tuple[Finding, ...], rerun: Rerun) -> tuple[Finding, ...]:
    """The findings, misfits completed with the readings that would repair them and one question.

    Parameters
    ----------
    panel : the panel as read
    findings : what the checks say of it
    rerun : another reading of the panel, to be judged by the same checks
    """
    keyed = _keyed(findings)
    misfits = {key: f for key, f in keyed.items() if f.verdict in MISFIT}
    if not misfits:
        return findings
    trial = _Trial(panel, misfits, frozenset(k for k, f in keyed.items() if f.verdict is Fit.FITS), rerun)
    tried = [trial.of(rank, reading) for rank, reading in enumerate(INNOCENT_READINGS.values())]
    candidates = sorted((c for c in tried if c is not None), key=lambda c: c.order)
    return tuple(_completed(key, f, candidates) if key in misfits else f for key, f in keyed.items())


@dataclass(frozen=True, slots=True)
class _Trial:
    """The panel as read, what misfits and what fits, and the judge of another reading."""

    panel: Panel
    misfits: dict[_Key, Finding]
    fitted: frozenset[_Key]
    rerun: Rerun

    def of(self, rank: int, reading: InnocentReading) -> _Candidate | None:
        """The reading over all bands or else the misfitting ones; None if it repairs nothing."""
        if not any(set(reading.parameters) & set(f.parameters) for f in self.misfits.values()):
            return None
        bands = tuple(dict.fromkeys(band for _, band, *_ in self.misfits if band is not None))
        seen = [self.panel]
        for reach in (Reach(), Reach(bands)) if len(self.panel.bands) > 1 else (Reach(),):
            other = reading.reread(self.panel, reach)
            if other in seen:
                continue
            seen.append(other)
            candidate = self._judged(rank, reading, other)
            if candidate:
                return candidate
        return None

    def _judged(self, rank: int, reading: InnocentReading, other: Panel) -> _Candidate | None:
        examined = self.rerun(other)
        misfitting = _keyed(examined.findings({slug for slug, *_ in self.misfits}))
        if not self._repaired(misfitting):
            return None
        after = _keyed(examined.findings())
        if any(f.verdict is Fit.DOES_NOT_FIT for key, f in after.items() if key not in self.misfits):
            return None
        if any(after[k].verdict is Fit.NOT_JUDGED for k in self.fitted if k in after):
            return None  # a claim that fitted and can no longer be judged is not explained
        repaired = self._repaired(after)
        still = [key[0] for key in self.misfits if key not in repaired]
        doubted = [k[0] for k in after if k in self.fitted and after[k].verdict is Fit.DOUBTFUL]
        return _Candidate(
            reading, rank, repaired, tuple(dict.fromkeys([*still, *doubted])), reading.likely(self.panel)
        )

    def _repaired(self, after: dict[_Key, Finding]) -> dict[_Key, Finding]:
        """What misfitted and fits now; an impossible figure that is no longer one fits as well."""
        fits = {k: after[k] for k in self.misfits if k in after and after[k].verdict is Fit.FITS}
        return fits | {k: _settled(f) for k, f in self.misfits.items() if k not in after and f.check == SLIPS}


def _settled(finding: Finding) -> Finding:
    """An impossible figure that is possible when read so: nothing is left to compare."""
    return replace(finding, verdict=Fit.FITS, claimed=None, expected=None)


def _keyed(findings: tuple[Finding, ...]) -> dict[_Key, Finding]:
    """Findings by what they are about, in their order.

    The one finding of a check and band is known by these alone, since another reading may stand on other
    cells; several are told apart by their cells, in any order.
    """
    count = Counter((f.check, f.band) for f in findings)
    keyed: dict[_Key, Finding] = {}
    for f in findings:
        cells = tuple(sorted(f.where, key=str)) if count[f.check, f.band] > 1 else ()
        ordinal = 0
        while (f.check, f.band, cells, ordinal) in keyed:
            ordinal += 1
        keyed[f.check, f.band, cells, ordinal] = f
    return keyed


def _completed(key: _Key, finding: Finding, candidates: list[_Candidate]) -> Finding:
    mine = [c for c in candidates if key in c.repaired][:LISTED]
    cells = ", ".join(str(place) for place in finding.where)
    if not mine:
        said = finding.question or "Please state the frequency, tilt and conditions these figures hold for."
        return replace(
            finding, assumptions=(*finding.assumptions, NONE_FITS), question=_with_cells(said, cells)
        )
    asked = " or ".join(dict.fromkeys(c.reading.ask for c in mine[:2]))
    return replace(
        finding,
        conventions=tuple(_convention(c, c.repaired[key]) for c in mine),
        working=(*finding.working, *(s for c in mine for s in _left_over(c, c.repaired[key]))),
        question=f"Please confirm ({cells}) whether {asked}.",
    )


def _with_cells(question: str, cells: str) -> str:
    return question if any(c in question for c in cells.split(", ")) else f"{question} (cells {cells})"


def _convention(candidate: _Candidate, after: Finding) -> Convention:
    value = after.claimed.value if after.claimed else ""
    return Convention(
        name=candidate.reading.name,
        value=f"{value[0]:g} to {value[1]:g}" if isinstance(value, tuple) else value,
        unit=after.claimed.unit if after.claimed else "",
        repairs=tuple(dict.fromkeys(key[0] for key in candidate.repaired)),
        leaves=candidate.leaves,
    )


def _of_difference(unit: str) -> str:
    """Unit of the difference of two figures: levels differ by decibels."""
    return "dB" if unit in ("dBi", "dBd", "dBm", "dBc") else unit


def _most_telling(findings: Collection[Finding]) -> Collection[Finding]:
    """Of the findings that expect an interval in one unit the one with the narrowest; else all of them."""
    narrowest: dict[str, tuple[float, Finding]] = {}
    for finding in findings:
        span = finding.expected
        if span is None or span.low is None or span.high is None:
            continue
        width = span.high - span.low
        if span.unit not in narrowest or width < narrowest[span.unit][0]:
            narrowest[span.unit] = width, finding
    return [finding for _, finding in narrowest.values()] or findings


def _off_middle(after: Finding) -> float:
    """Distance of the re-read claim from the middle of what is expected, in half widths of that interval."""
    value = after.claimed.value if after.claimed else None
    span = after.expected
    if not isinstance(value, int | float) or span is None or span.low is None or span.high is None:
        return 0.5
    half = (span.high - span.low) / 2
    return round(abs(value - (span.low + span.high) / 2) / half, 1) if half > 0 else 0.0


def _left_over(candidate: _Candidate, after: Finding) -> tuple[Step, ...]:
    """What is left between the re-read claim and the middle of what is then expected."""
    value = after.claimed.value if after.claimed else None
    span = after.expected
    if not isinstance(value, int | float) or span is None or span.low is None or span.high is None:
        return ()
    middle = (span.low + span.high) / 2
    formula = f"{value:.4g} − {middle:.4g} (middle of {span.low:.4g} to {span.high:.4g})"
    return (
        Step(
            f"Left over if {candidate.reading.name}",
            formula,
            round(value - middle, 3),
            _of_difference(span.unit),
        ),
    )
