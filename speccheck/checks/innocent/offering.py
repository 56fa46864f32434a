"""Innocent readings: a misfit is tried under every convention that would explain it, one at a time.

The runner judges the re-read panel by the same checks. Readings that repair every misfit come first; one
that breaks a claim which fitted is dropped. Nothing here names a culprit: candidates and one question.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Callable, Collection, Iterator
from dataclasses import dataclass, replace
from typing import Protocol

from speccheck.checks.innocent.conventions import INNOCENT_READINGS, InnocentReading, Reach
from speccheck.checks.innocent.ranking import Candidate, Key, ranked, span_of
from speccheck.checks.registry import CHECKS
from speccheck.records import Convention, Finding, Fit, Panel, Step, Value


class Examined(Protocol):
    """A panel that the checks have been asked about, or can be."""

    def findings(self, slugs: Collection[str] | None = None) -> tuple[Finding, ...]:
        """What all checks say of it, or those named."""

    @property
    def differing(self) -> frozenset[str] | None:
        """The parameters reread; None where more than readings differs."""


Rerun = Callable[[Panel], Examined]

MISFIT = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)
LISTED = 5
ASKED_CELLS = 4
"""Cells that a question names: the claim and what it is held against stand first among those of a finding."""
WORTH_ASKING = 3.0
"""Difference of log likelihood up to which the second reading is asked for beside the first: 20 to 1."""

SLIPS = "figure-plausible"
"""The one check that says nothing of a figure that is possible."""

NONE_FITS = "None of the readings tried fits every figure it touches."


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
    candidates = ranked([c for c in tried if c is not None])
    return tuple(_completed(key, f, candidates) if key in misfits else f for key, f in keyed.items())


@dataclass(frozen=True, slots=True)
class _Trial:
    """The panel as read, what misfits and what fits, and the judge of another reading."""

    panel: Panel
    misfits: dict[Key, Finding]
    fitted: frozenset[Key]
    rerun: Rerun

    def of(self, rank: int, reading: InnocentReading) -> Candidate | None:
        """The reading over the widest reach in which it leaves no misfit that it touches."""
        if not any(set(reading.parameters) & set(f.parameters) for f in self.misfits.values()):
            return None
        seen = [self.panel]
        for reach in self._reaches():
            other = reading.reread(self.panel, reach)
            if other in seen:
                continue
            seen.append(other)
            if candidate := self._judged(rank, reading, reach, self.rerun(other)):
                pairs = zip(self.panel.readings, other.readings, strict=True)
                return replace(candidate, reread=tuple((old, new) for old, new in pairs if new is not old))
        return None

    def _reaches(self) -> Iterator[Reach]:
        """The whole panel, the misfitting bands, each of them alone."""
        yield Reach()
        if len(self.panel.bands) > 1:
            bands = tuple(dict.fromkeys(band for _, band, *_ in self.misfits if band is not None))
            yield Reach(bands)
            yield from (Reach((band,)) for band in bands)

    def _judged(
        self, rank: int, reading: InnocentReading, reach: Reach, examined: Examined
    ) -> Candidate | None:
        if any(self._left_open(slug, reach, examined) for slug in self._misfitting_checks()):
            return None
        repaired = self._repaired(_keyed(examined.findings(set(self._misfitting_checks()))))
        if not repaired:
            return None
        after = _keyed(examined.findings())
        if any(self._broken(key, finding) for key, finding in after.items()):
            return None
        mended = {slug for slug, *_ in repaired}
        return Candidate(
            reading=reading,
            rank=rank,
            repaired=repaired,
            judged=tuple(f for key, f in after.items() if f.verdict is Fit.FITS and key[0] in mended),
            leaves=tuple(dict.fromkeys(key[0] for key in self.misfits if key not in repaired)),
            likely=reading.likely(self.panel),
        )

    def _misfitting_checks(self) -> list[str]:
        """The last registered first: those are arithmetic, the first ones integrate patterns."""
        return list(dict.fromkeys(slug for slug, *_ in reversed(self.misfits)))

    def _left_open(self, slug: str, reach: Reach, examined: Examined) -> bool:
        """Whether a check that the reading touches still compares figures that misfit."""
        after = _keyed(examined.findings({slug}))
        return any(
            key in after
            and after[key].verdict is not Fit.FITS
            and (finding.expected is not None or after[key].verdict is Fit.NOT_JUDGED)
            and (reach.bands is None or key[1] is None or key[1] in reach.bands)
            and (_is_about(slug, examined.differing) or after[key] != finding)
            for key, finding in self.misfits.items()
            if key[0] == slug
        )

    def _broken(self, key: Key, after: Finding) -> bool:
        """Whether a finding is worse than before: a claim that fitted, or that nothing was said of."""
        if key in self.misfits:
            return False
        worse = (
            (Fit.DOES_NOT_FIT, Fit.DOUBTFUL, Fit.NOT_JUDGED) if key in self.fitted else (Fit.DOES_NOT_FIT,)
        )
        return after.verdict in worse

    def _repaired(self, after: dict[Key, Finding]) -> dict[Key, Finding]:
        """What misfitted and fits now; an impossible figure that is no longer one fits as well."""
        fits = {k: after[k] for k in self.misfits if k in after and after[k].verdict is Fit.FITS}
        return fits | {k: _settled(f) for k, f in self.misfits.items() if k not in after and f.check == SLIPS}


def _is_about(slug: str, parameters: frozenset[str] | None) -> bool:
    """Whether a check cannot do without one of the parameters."""
    return parameters is None or not parameters.isdisjoint(CHECKS[slug].needs)


def _settled(finding: Finding) -> Finding:
    """An impossible figure that is possible when read so: nothing is left to compare."""
    return replace(finding, verdict=Fit.FITS, claimed=None, expected=None)


def _keyed(findings: tuple[Finding, ...]) -> dict[Key, Finding]:
    """Findings by what they are about, in their order.

    The one finding of a check and band is known by these alone, since another reading may stand on other
    cells; several are told apart by their cells, in any order.
    """
    count = Counter((f.check, f.band) for f in findings)
    keyed: dict[Key, Finding] = {}
    for f in findings:
        cells = tuple(sorted(f.where, key=str)) if count[f.check, f.band] > 1 else ()
        ordinal = 0
        while (f.check, f.band, cells, ordinal) in keyed:
            ordinal += 1
        keyed[f.check, f.band, cells, ordinal] = f
    return keyed


def _completed(key: Key, finding: Finding, candidates: list[Candidate]) -> Finding:
    mine = [c for c in candidates if key in c.repaired][:LISTED]
    if not mine:
        cells = ", ".join(str(place) for place in finding.where[:ASKED_CELLS])
        said = finding.question or "Please state the frequency, tilt and conditions these figures hold for."
        return replace(
            finding, assumptions=(*finding.assumptions, NONE_FITS), question=_with_cells(said, cells)
        )
    open_ones = [c for c in mine[:2] if c.fits_as_well_as(mine[0], WORTH_ASKING)]
    asked = ", and whether ".join(dict.fromkeys(c.reading.ask for c in open_ones))
    reread = ", ".join(dict.fromkeys(str(new.where) for c in open_ones for _, new in c.reread))
    return replace(
        finding,
        conventions=tuple(_convention(c, finding, c.repaired[key]) for c in mine),
        assumptions=(*finding.assumptions, *_order_said(mine)),
        working=(*finding.working, *(s for c in mine for s in _left_over(c, c.repaired[key]))),
        question=f"Please confirm ({reread}) whether {asked}.",
    )


def _order_said(candidates: list[Candidate]) -> tuple[str, ...]:
    """What the order of the readings does not show."""
    first, *others = candidates
    as_well = [c.reading.name for c in others if c.fits_as_well_as(first)]
    return (f"'{first.reading.name}' fits no better than '{as_well[0]}'.",) if as_well else ()


def _with_cells(question: str, cells: str) -> str:
    if any(cell in question for cell in cells.split(", ")):
        return question
    return f"{question.removesuffix('.')} ({cells})."


def _convention(candidate: Candidate, before: Finding, after: Finding) -> Convention:
    value, unit = _as_read_now(candidate, before, after)
    return Convention(
        name=candidate.reading.name,
        value=f"{value[0]:g} to {value[1]:g}" if isinstance(value, tuple) else value,
        unit=unit,
        repairs=tuple(dict.fromkeys(key[0] for key in candidate.repaired)),
        leaves=candidate.leaves,
    )


def _as_read_now(candidate: Candidate, before: Finding, after: Finding) -> tuple[Value, str]:
    """The claim as reread; where another figure than the claim was reread, that one."""
    figures = [new for old, new in candidate.reread if new.value != old.value]
    if figures and (after.claimed is None or after.claimed == before.claimed):
        return _shortened(figures[0].value), figures[0].unit
    return (_shortened(after.claimed.value), after.claimed.unit) if after.claimed else ("", "")


def _shortened(value: Value) -> Value:
    """A figure in four digits; counts stay whole."""
    return value if isinstance(value, str | tuple | int) else float(f"{value:.4g}")


def _of_difference(unit: str) -> str:
    """Unit of the difference of two figures: levels differ by decibels."""
    return "dB" if unit in ("dBi", "dBd", "dBm", "dBc") else unit


def _left_over(candidate: Candidate, after: Finding) -> tuple[Step, ...]:
    """What is left between the re-read claim and the middle of what is then expected."""
    span = span_of(after)
    if span is None or after.expected is None:
        return ()
    value, low, high = span
    middle = (low + high) / 2
    formula = f"{value:.4g} − {middle:.4g} (middle of {low:.4g} to {high:.4g})"
    unit = _of_difference(after.expected.unit)
    return (Step(f"Left over if {candidate.reading.name}", formula, round(value - middle, 3), unit),)
