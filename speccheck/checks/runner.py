"""Runs every check over one panel and makes findings of what they say.

The runner supplies the readings, answers for missing and ambiguous ones, attaches the cells, tries the
innocent readings on misfits and turns a crash into a finding. It never raises for anything a bidder wrote.
"""

from __future__ import annotations

import functools
import itertools
from collections.abc import Collection, Iterator
from dataclasses import dataclass, replace

import numpy as np

from speccheck.checks.families.plausibility import impossible
from speccheck.checks.innocent.offering import offer_innocent_readings
from speccheck.checks.registry import CHECKS, Case, Check, Judgement
from speccheck.checks.watched import WatchedPanel
from speccheck.dictionary import parameters
from speccheck.records import Band, CellRef, Finding, Fit, Panel, Reading, Settings


def examine(panel: Panel, settings: Settings) -> tuple[Finding, ...]:
    """Everything the checks say of a panel, in the order the checks are registered.

    Parameters
    ----------
    panel : one offered panel as read
    settings : the buyer's settings

    Returns
    -------
    findings, each with the cells it stands on; misfits with the innocent readings that would repair
    them and one question to the bidder
    """
    with np.errstate(all="ignore"):
        asread = Examination(panel, settings)
        return offer_innocent_readings(panel, asread.findings(), asread.reread)


def run_checks(panel: Panel, settings: Settings) -> tuple[Finding, ...]:
    """The findings of a panel as it stands, without trying any other reading of it."""
    return Examination(panel, settings).findings()


@dataclass(frozen=True, slots=True)
class _Answer:
    """What a check says of a panel, and the parameters it asked for; None if it took them all."""

    findings: tuple[Finding, ...]
    asked: frozenset[str] | None


class Examination:
    """What the checks say of one panel, each run when its answer is first wanted.

    Another reading of the same panel is examined beside this one: a check that asked for no figure that
    differs would say the same again and is not run.
    """

    def __init__(self, panel: Panel, settings: Settings, beside: Examination | None = None) -> None:
        self._panel, self._settings, self._beside = panel, settings, beside
        self._differ = _differing(beside._panel, panel) if beside else None
        self._answers: dict[str, _Answer] = {}

    def reread(self, other: Panel) -> Examination:
        """The examination of another reading of this panel."""
        return Examination(other, self._settings, self)

    def findings(self, slugs: Collection[str] | None = None) -> tuple[Finding, ...]:
        """The findings of all checks, or of those named, in the order the checks are registered."""
        wanted = (check for check in CHECKS.values() if slugs is None or check.slug in slugs)
        return tuple(itertools.chain.from_iterable(self._answer(check).findings for check in wanted))

    @property
    def differing(self) -> frozenset[str] | None:
        """The parameters whose readings differ from the panel this one is examined beside."""
        return self._differ

    def _answer(self, check: Check) -> _Answer:
        answer = self._answers.get(check.slug) or self._kept(check) or self._run(check)
        self._answers[check.slug] = answer
        return answer

    def _kept(self, check: Check) -> _Answer | None:
        """The answer to the other reading, where nothing the check asked for differs from it."""
        if self._beside is None or self._differ is None:
            return None
        kept = self._beside._answers.get(check.slug)
        return kept if kept and kept.asked is not None and self._differ.isdisjoint(kept.asked) else None

    def _run(self, check: Check) -> _Answer:
        asked = {*check.about, *check.needs, *check.optional}
        if check.about and not any(key in self._spoken_of for key in check.about):
            return _Answer((), frozenset(asked))
        seen = self._all if check.sees_impossible else self._usable
        seen.listen()
        bands: tuple[Band | None, ...] = (seen.bands or (None,)) if check.scope == "band" else (None,)
        by_band = [
            list(_findings(check, Case(seen, band, self._settings), self._panel))
            for band in bands
            if not check.about or any(_in_band(self._spoken_of.get(key), band) for key in check.about)
        ]
        findings = _joined(list(itertools.chain.from_iterable(by_band)), len(bands))
        cited = {key for finding in findings for key in finding.parameters}
        return _Answer(tuple(findings), None if seen.asked is None else frozenset(asked | cited | seen.asked))

    @functools.cached_property
    def _all(self) -> WatchedPanel:
        return WatchedPanel(self._panel)

    @functools.cached_property
    def _usable(self) -> WatchedPanel:
        usable = tuple(r for r in self._panel.readings if not impossible(r))
        return WatchedPanel(replace(self._panel, readings=usable))

    @functools.cached_property
    def _spoken_of(self) -> dict[str, set[Band | None]]:
        """The bands in which each parameter is stated, with or without a figure."""
        bands: dict[str, set[Band | None]] = {}
        for reading in self._panel.readings:
            bands.setdefault(reading.parameter, set()).add(reading.band)
        for statement in self._panel.statements:
            bands.setdefault(statement.parameter, set()).add(statement.band)
        return bands


def _differing(one: Panel, other: Panel) -> frozenset[str] | None:
    """The parameters whose readings differ; None where the panels differ in more than that."""
    same_frame = one.bands == other.bands and one.statements is other.statements
    if not same_frame or len(one.readings) != len(other.readings):
        return None
    pairs = zip(one.readings, other.readings, strict=True)
    return frozenset(key for a, b in pairs if a is not b for key in (a.parameter, b.parameter))


def _joined(findings: list[Finding], bands: int) -> list[Finding]:
    """One finding for all bands where every band says the same of the same cells."""
    if bands > 1 and len(findings) == bands and len({repr(replace(f, band=None)) for f in findings}) == 1:
        return [replace(findings[0], band=None)]
    return findings


def _findings(check: Check, case: Case, panel: Panel) -> Iterator[Finding]:
    needed = {key: case.panel.get(key, case.band) for key in check.needs}
    extra = {key: case.panel.get(key, case.band) for key in check.optional}
    lacking = tuple(key for key, reading in needed.items() if reading is None)
    stated = tuple(r for r in (*needed.values(), *extra.values()) if r is not None)
    if lacking:
        yield _not_judged(check, case, lacking, stated, panel)
        return
    try:
        offered = {"case": case, **needed, **extra}
        said = check.judge(**{name: offered[name] for name in check.arguments})
        judgements = said if isinstance(said, tuple) else (said,) if said is not None else ()
        findings = [_finding(check, case, judgement, stated, panel) for judgement in judgements]
    except Exception as error:  # a crash in one check must not cost the others
        yield _stopped(check, case, stated, panel, error)
        return
    yield from findings


def _finding(
    check: Check, case: Case, judgement: Judgement, stated: tuple[Reading, ...], panel: Panel
) -> Finding:
    if judgement.missing and judgement.verdict is Fit.NOT_JUDGED and not judgement.summary:
        return _not_judged(check, case, judgement.missing, (*stated, *judgement.used), panel)
    used = judgement.used if judgement.alone else (*stated, *judgement.used)
    return Finding(
        check=check.slug,
        title=check.title,
        verdict=judgement.verdict,
        summary=judgement.summary,
        parameters=tuple(dict.fromkeys([*(r.parameter for r in used), *judgement.missing])),
        band=used[0].band if judgement.alone and used else case.band,
        claimed=judgement.claimed,
        expected=judgement.expected,
        working=judgement.working,
        assumptions=judgement.assumptions,
        question="" if judgement.verdict is Fit.FITS else judgement.question,
        source=check.source,
        missing=judgement.missing,
        where=_places(used, panel),
    )


def _not_judged(
    check: Check, case: Case, lacking: tuple[str, ...], stated: tuple[Reading, ...], panel: Panel
) -> Finding:
    reasons = [_reason(key, case, panel) for key in lacking]
    names = _listed([_label(key) for key in lacking])
    return Finding(
        check=check.slug,
        title=check.title,
        verdict=Fit.NOT_JUDGED,
        summary=f"{check.title}: not judged: {'; '.join(reasons)}.",
        parameters=tuple(dict.fromkeys([*check.needs, *(r.parameter for r in stated), *lacking])),
        band=case.band,
        question=f"Please state {names}{_of_band(case.band)}.",
        source=check.source,
        missing=lacking,
        where=_places(stated, panel) if stated else _spoken_places(lacking, panel),
    )


def _stopped(
    check: Check, case: Case, stated: tuple[Reading, ...], panel: Panel, error: Exception
) -> Finding:
    return Finding(
        check=check.slug,
        title=check.title,
        verdict=Fit.NOT_JUDGED,
        summary=f"{check.title}: not judged: the check '{check.slug}' stopped with {type(error).__name__}.",
        parameters=tuple(dict.fromkeys(r.parameter for r in stated)),
        band=case.band,
        question="Please confirm the figures in the cells named; the program could not work with them.",
        source=check.source,
        where=_places(stated, panel),
    )


def _reason(key: str, case: Case, panel: Panel) -> str:
    """Why a parameter is not there to be used: impossible, ambiguous, spoken of without a figure, absent."""
    mine = [r for r in panel.readings if r.parameter == key and r.band in (case.band, None)]
    for reading in mine:
        if not reading.certain:
            return f"{_label(key)} in {reading.where} can be read in more than one way"
        if impossible(reading):
            return f"{_label(key)} in {reading.where} is no possible figure"
    spoken = [s for s in panel.statements if s.parameter == key]
    if spoken:
        return f"{_label(key)} without a figure in {spoken[0].where}"
    return f"{_label(key)} not stated"


def _in_band(bands: set[Band | None] | None, band: Band | None) -> bool:
    return bands is not None and (band is None or None in bands or band in bands)


def _places(used: tuple[Reading, ...], panel: Panel) -> tuple[CellRef, ...]:
    return tuple(dict.fromkeys(r.where for r in used)) or (panel.where,)


def _spoken_places(lacking: tuple[str, ...], panel: Panel) -> tuple[CellRef, ...]:
    places = [r.where for r in panel.readings if r.parameter in lacking]
    places += [s.where for s in panel.statements if s.parameter in lacking]
    return tuple(dict.fromkeys(places)) or (panel.where,)


def _label(key: str) -> str:
    label = parameters()[key].label
    return label if label[:2].isupper() else label[0].lower() + label[1:]


def _listed(names: list[str]) -> str:
    return names[0] if len(names) == 1 else f"{', '.join(names[:-1])} and {names[-1]}"


def _of_band(band: Band | None) -> str:
    return "" if band is None else f" for {band[0]:g}–{band[1]:g} MHz"
