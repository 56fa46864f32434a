"""Runs every check over one panel and makes findings of what they say.

The runner supplies the readings, answers for missing and ambiguous ones, attaches the cells, tries the
innocent readings on misfits and turns a crash into a finding. It never raises for anything a bidder wrote.
"""

from __future__ import annotations

import itertools
from collections.abc import Iterator
from dataclasses import replace

import numpy as np

from speccheck.checks.families.plausibility import impossible
from speccheck.checks.innocent.conventions import offer_innocent_readings
from speccheck.checks.registry import CHECKS, Case, Check, Judgement
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
        return offer_innocent_readings(panel, run_checks(panel, settings), lambda p: run_checks(p, settings))


def run_checks(panel: Panel, settings: Settings) -> tuple[Finding, ...]:
    """The findings of a panel as it stands, without trying any other reading of it."""
    usable = replace(panel, readings=tuple(r for r in panel.readings if not impossible(r)))
    spoken_of = _spoken_of(panel)
    found: list[Finding] = []
    for check in CHECKS.values():
        if check.about and not any(key in spoken_of for key in check.about):
            continue
        seen = panel if check.sees_impossible else usable
        bands: tuple[Band | None, ...] = (seen.bands or (None,)) if check.scope == "band" else (None,)
        by_band = [
            list(_findings(check, Case(seen, band, settings), panel))
            for band in bands
            if not check.about or any(_in_band(spoken_of.get(key), band) for key in check.about)
        ]
        found += _joined(list(itertools.chain.from_iterable(by_band)), len(bands))
    return tuple(found)


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


def _spoken_of(panel: Panel) -> dict[str, set[Band | None]]:
    """The bands in which each parameter is stated, with or without a figure."""
    bands: dict[str, set[Band | None]] = {}
    for reading in panel.readings:
        bands.setdefault(reading.parameter, set()).add(reading.band)
    for statement in panel.statements:
        bands.setdefault(statement.parameter, set()).add(statement.band)
    return bands


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
