"""How figures are worded: statistic, typical for guaranteed, copied figures, bare decibels, bare promises.

These checks look at the whole panel and give one finding each.
"""

from __future__ import annotations

import re

from speccheck.checks.cell_text import listed, words
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import label
from speccheck.dictionary import parameters
from speccheck.records import Fit, Reading, Sense, Step
from speccheck.records.words import Status

_GUARANTEED = ("vswr", "return_loss", "port_isolation", "passive_intermodulation")
_KEY_FIGURES = (
    "gain",
    "horizontal_beamwidth",
    "vertical_beamwidth",
    "front_to_back_ratio",
    "cross_polar_discrimination",
    *_GUARANTEED,
)
_TYPICAL = re.compile(r"\bt[yi]p(?:\.|ic|isch|\b)")
_STATISTICS = (
    "industry recommendation on base-station antennas: tolerance is 1.5 standard deviations (from memory)"
)


@check(
    "figures-say-their-statistic",
    "Figures say what they guarantee",
    needs=(),
    about=_KEY_FIGURES,
    source=_STATISTICS,
    scope="panel",
)
def figures_say_their_statistic(case: Case) -> Judgement | None:
    """Looks for typical figures where a guaranteed one is needed, and lists figures without any statistic.

    Formula
    P(|z| < 1.5) = 0.866 for a two-sided tolerance, P(z < 1) = 0.841 for a one-sided minimum or maximum

    Assumptions
    VSWR, return loss, isolation and intermodulation are absolute limits in the trade: 'typical' there, or
    'typical' beside a sign of minimum or maximum, is doubtful, and so is one figure given as typical and as
    minimum both. A ± tolerance may be statistical (mean ± 1.5
    standard deviations, 86.6 % of samples) or absolute: the sheet alone cannot tell. Figures without sign,
    tolerance or word are listed and asked about, not doubted.

    Worked example
    'VSWR 1.4 typ.' is doubtful: the buyer needs the guaranteed maximum. '65 ± 5' may leave 13.4 % of samples
    outside 60 to 70.
    """
    stated = tuple(r for key in _KEY_FIGURES for r in case.panel.all(key))
    if not stated:
        return None
    typical = tuple(
        r for r in stated if _TYPICAL.search(words(r)) and (_sold_as_guaranteed(r) or _also_bound(r, stated))
    )
    bare = tuple(r for r in stated if _says_nothing(r))
    ranged = tuple(r for r in stated if r.tolerance)
    return Judgement(
        verdict=Fit.DOUBTFUL if typical else Fit.FITS,
        summary=f"Typical where a guaranteed figure is needed: {_names(typical)}."
        if typical
        else f"No statistic is stated for {_names(bare)}."
        if bare
        else "Every key figure carries a sign, a tolerance or a statistic.",
        working=tuple(
            Step(f"{label(r.parameter)} as written", str(r.where), r.raw[:60]) for r in (*typical, *bare)[:12]
        ),
        assumptions=(
            "A ± tolerance may be mean ± 1.5 standard deviations (86.6 % of samples) or absolute."
            if ranged
            else "A one-sided figure may hold for 84.1 % of samples or for all.",
        ),
        question=f"Please state the guaranteed figure for {_names(typical)}."
        if typical
        else "Please state for each tolerance, minimum and maximum whether it holds for every sample or is "
        "statistical, and for which share.",
        used=typical or stated,
    )


def _sold_as_guaranteed(reading: Reading) -> bool:
    return reading.parameter in _GUARANTEED or reading.sense is not Sense.NOMINAL


def _also_bound(typical: Reading, stated: tuple[Reading, ...]) -> bool:
    """Whether the same figure stands as minimum or maximum of the same parameter and band as well."""
    return any(
        r.parameter == typical.parameter
        and r.band == typical.band
        and r.sense is not Sense.NOMINAL
        and r.value == typical.value
        for r in stated
    )


def _says_nothing(reading: Reading) -> bool:
    return reading.sense is Sense.NOMINAL and not reading.tolerance and not reading.statistic


def _names(readings: tuple[Reading, ...]) -> str:
    return listed(tuple(dict.fromkeys(label(r.parameter) for r in readings))) if readings else "any figure"


@check(
    "gain-names-its-reference",
    "Gain names its reference antenna",
    needs=(),
    about=("gain",),
    source="ITU-R V.573: dBi is 2.15 dB above dBd; 'dB' alone names no reference",
    scope="panel",
)
def gain_names_its_reference(case: Case) -> Judgement | None:
    """Asks for the reference antenna where a gain is in bare decibels.

    Formula
    G [dBi] = G [dBd] + 2.15

    Assumptions
    The unit is taken from heading, unit column or cell. A gain in 'dB' or without unit may be dBi or dBd;
    read as dBi it is doubtful until the reference is stated.

    Worked example
    17 dB may be 17 dBi or 19.15 dBi; 2.15 dB shift a coverage requirement and change a distance by 28 %.
    """
    gains = tuple(r for r in case.panel.readings if r.parameter == "gain" and not isinstance(r.value, str))
    if not gains:
        return None
    bare = tuple(r for r in gains if not re.search(r"db\s?\(?[icd]", f"{r.stated_unit} {words(r)}".lower()))
    return Judgement(
        verdict=Fit.DOUBTFUL if bare else Fit.FITS,
        summary=f"{len(bare)} of {len(gains)} gain figures name no reference antenna; read as dBi."
        if bare
        else "Every gain names its reference antenna.",
        working=tuple(
            Step("If dBd is meant", f"{r.nominal:g} + 2.15", round(r.nominal + 2.15, 3), "dBi") for r in bare
        ),
        assumptions=("Bare decibels are read as dBi.",) if bare else (),
        question="Please state the gain in dBi." if bare else "",
        used=bare or gains,
    )


@check(
    "declared-with-figure",
    "Declarations carry a figure",
    needs=(),
    source="a declaration without a figure cannot be checked (common practice)",
    scope="panel",
)
def declared_with_figure(case: Case) -> Judgement | None:
    """Lists parameters answered with 'comply' or the like where a figure is needed.

    Formula
    none: a statement without figure has nothing to compute

    Assumptions
    Parameters that are answered in words by nature are left out.

    Worked example
    'VSWR: comply' says nothing a measurement could be held against: not judged, and the figure is asked for.
    """
    bare = [s for s in case.panel.statements if s.status is Status.DECLARED and _needs_figure(s.parameter)]
    if not bare:
        return None
    keys = tuple(dict.fromkeys(s.parameter for s in bare if not case.panel.all(s.parameter)))
    if not keys:
        return None
    names = listed(tuple(label(k) for k in keys))
    places = ", ".join(dict.fromkeys(str(s.where) for s in bare if s.parameter in keys))
    return Judgement(
        verdict=Fit.NOT_JUDGED,
        summary=f"Declared without a figure: {names} ({places}).",
        missing=keys,
        assumptions=("A declaration is no figure.",),
        question=f"Please state the figures for {names} ({places}).",
    )


def _needs_figure(key: str) -> bool:
    parameter = parameters().get(key)
    return parameter is not None and parameter.kind in ("number", "count", "range", "scan")
