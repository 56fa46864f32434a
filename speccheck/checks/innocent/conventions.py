"""Innocent readings: a misfit is tried under every convention that would explain it, one at a time.

A convention is a pure transform of a panel: the same bid as its author may have meant it. The runner
judges the re-read panel by the same checks. Readings that repair every misfit come first; one that
breaks a claim which fitted is dropped. Nothing here names a culprit: candidates and one question.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Callable, Collection
from dataclasses import dataclass, replace

from speccheck.records import Band, CellRef, Convention, Finding, Fit, Panel, Reading, Step

Transform = Callable[[Panel, "Reach"], Panel]
Rerun = Callable[[Panel], tuple[Finding, ...]]

_Key = tuple[str, Band | None, tuple[CellRef, ...], int]

MISFIT = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)
LISTED = 5
SLIPS = "figure-plausible"
"""The one check that says nothing of a figure that is possible."""

NONE_FITS = "None of the readings tried fits."


@dataclass(frozen=True, slots=True)
class Reach:
    """The bands [MHz] a re-reading covers; None for the whole panel."""

    bands: tuple[Band, ...] | None = None

    def covers(self, reading: Reading) -> bool:
        """Whether a reading is re-read."""
        return self.bands is None or reading.band in self.bands


@dataclass(frozen=True, slots=True)
class InnocentReading:
    """A named convention: the question that names it, the parameters it re-reads, the transform.

    `likely` tells of a panel whether its figures themselves point to this reading; it then goes before
    others that repair as much.
    """

    name: str
    ask: str
    parameters: tuple[str, ...]
    reread: Transform
    likely: Callable[[Panel], bool]


INNOCENT_READINGS: dict[str, InnocentReading] = {}


def _never(panel: Panel) -> bool:  # noqa: ARG001
    return False


def innocent(
    name: str, ask: str, *parameters: str, likely: Callable[[Panel], bool] = _never
) -> Callable[[Transform], Transform]:
    """Register a convention; `ask` completes 'Please confirm whether …'.

    Raises
    ------
    ValueError : a name registered twice
    """

    def register(reread: Transform) -> Transform:
        if name in INNOCENT_READINGS:
            raise ValueError(f"innocent reading '{name}' is registered twice")
        INNOCENT_READINGS[name] = InnocentReading(name, ask, parameters, reread, likely)
        return reread

    return register


def reread(panel: Panel, reach: Reach, keys: tuple[str, ...], change: Callable[[Reading], Reading]) -> Panel:
    """A panel with the certain numeric readings of `keys` inside `reach` changed."""

    def one(reading: Reading) -> Reading:
        mine = reading.parameter in keys and reading.certain and reach.covers(reading)
        return change(reading) if mine and not isinstance(reading.value, str) else reading

    return replace(panel, readings=tuple(one(r) for r in panel.readings))


def shifted(offset: float) -> Callable[[Reading], Reading]:
    """A change that adds `offset` in the reading's unit."""
    return lambda reading: replace(reading, value=_each(reading, lambda v: v + offset))


def scaled(factor: float) -> Callable[[Reading], Reading]:
    """A change that multiplies by `factor`."""
    return lambda reading: replace(reading, value=_each(reading, lambda v: v * factor))


def marked(**conditions: float) -> Callable[[Reading], Reading]:
    """A change that leaves the figure and adds conditions under which it holds."""
    return lambda reading: replace(reading, at={**reading.at, **conditions})


def _each(reading: Reading, change: Callable[[float], float]) -> float | tuple[float, float]:
    if isinstance(reading.value, tuple):
        return (change(reading.value[0]), change(reading.value[1]))
    return change(float(reading.value))


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
    rerun : judges another reading of the panel by the same checks
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
        after = _keyed(self.rerun(other))
        if any(f.verdict is Fit.DOES_NOT_FIT for key, f in after.items() if key not in self.misfits):
            return None
        if any(after[k].verdict is Fit.NOT_JUDGED for k in self.fitted if k in after):
            return None  # a claim that fitted and can no longer be judged is not explained
        repaired = {k: after[k] for k in self.misfits if k in after and after[k].verdict is Fit.FITS}
        repaired |= {k: _settled(f) for k, f in self.misfits.items() if k not in after and f.check == SLIPS}
        if not repaired:
            return None
        still = [key[0] for key in self.misfits if key not in repaired]
        doubted = [k[0] for k in after if k in self.fitted and after[k].verdict is Fit.DOUBTFUL]
        return _Candidate(
            reading, rank, repaired, tuple(dict.fromkeys([*still, *doubted])), reading.likely(self.panel)
        )


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
