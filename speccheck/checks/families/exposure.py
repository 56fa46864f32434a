"""A compliance distance the bidder states, held against the panel's own power, gain and the limit set."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from itertools import product

from speccheck.checks.cell_text import half_digit, listed, words
from speccheck.checks.desk.exposure_inputs import Radiated, lacking, radiated
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
from speccheck.physics.exposure import (
    REFLECTION_FULL,
    REFLECTION_GROUND,
    REFLECTION_NONE,
    combined_distance_m,
    distance_m,
)
from speccheck.records import Amount, Fit, Interval, Panel, Reading, Step
from speccheck.standards import LOCAL, PUBLIC, WHOLE_BODY, WORKERS, LimitSet, limit_set, limit_set_names

_WORKER_WORDS = re.compile(r"work|occupation|(?<!un)controlled|professional|beruf|travail")
_REFLECTIONS = (
    (REFLECTION_NONE, "free space"),
    (REFLECTION_GROUND, "ground reflection 2.56"),
    (REFLECTION_FULL, "full reflection 4"),
)
_FACTORS = (
    (1.0, "full power"),
    (0.75, "75 % downlink share"),
    (0.25, "power factor 0.25"),
    (0.1875, "75 % share and power factor 0.25"),
)
_WITHIN = 0.04
_NAMED = 3


@check(
    "compliance-distance-fits-power",
    "Stated compliance distance fits power, gain and limits",
    needs=("compliance_distance",),
    source="OET Bulletin 65 equation 4; ITU-T K.52; limit set of the settings",
    scope="panel",
)
def compliance_distance_fits_power(case: Case, compliance_distance: Reading) -> Judgement | None:
    """Solves a stated compliance distance for the factors behind it and names the familiar set that fits.

    Formula
    r = √(k·F·EIRP / (4π·S)); so k·F/S = 4π·r²/EIRP; several bands: r = √(Σ rᵢ²)

    Assumptions
    Power over all ports and both polarisations, highest gain, general public and whole body of the limit set
    unless the cell says workers, its levels times the buyer's country factor. Tried are workers' and local
    limits, reflection 1, 2.56 and 4, time factors 1, 0.75, 0.25 and 0.1875. A distance at or above the plain
    one (free space, full power) fits; a shorter one that a familiar set explains within 4 % is doubtful, as
    the set is not stated; one shorter than all of them does not fit.

    Worked example
    80 dBm and 10 W/m² give 28.2 m; 12.2 m is that at a factor of 0.1875, 45.1 m that at a reflection of 2.56.
    A stated 12.2 m is doubtful until limit, power, gain and averaging are stated.
    """
    name = case.settings.limit_set
    if name not in limit_set_names():
        return Judgement(
            verdict=Fit.NOT_JUDGED,
            summary=f"Limit set '{name}' is not known.",
            question="Please name the limit set of the stated distance.",
        )
    sources = tuple(s for band in case.panel.bands if (s := radiated(case.panel, band)) is not None)
    if not sources:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=_missing(case.panel))
    population = WORKERS if _WORKER_WORDS.search(words(compliance_distance)) else PUBLIC
    reach = _Reach(sources, limit_set(name), population, case.settings.country_factor)
    plain = reach.distance(population, WHOLE_BODY, factor=compliance_distance.at.get("time_factor", 1.0))
    return None if plain is None else _judged(compliance_distance, reach, plain)


@dataclass(frozen=True, slots=True)
class _Reach:
    """Distances [m] of all bands together under a limit set and the buyer's factor on its levels."""

    sources: tuple[Radiated, ...]
    limits: LimitSet
    population: str
    country_factor: float

    def distance(
        self,
        population: str,
        basis: str,
        *,
        k: float = 1.0,
        factor: float = 1.0,
        country: float | None = None,
    ) -> float | None:
        on_level = country or self.country_factor
        each = []
        for source in self.sources:
            level = self.limits.lowest(*source.band, population, basis)
            if level is None:
                return None
            each.append(float(distance_m(source.eirp_w, level[1].value_w_m2 * on_level, k, factor)))
        return float(combined_distance_m(each))

    def familiar(self) -> list[tuple[str, float]]:
        """Distances [m] under every familiar combination, those of the population meant first."""
        people = (self.population, *(p for p in (PUBLIC, WORKERS) if p != self.population))
        found = []
        if self.country_factor != 1:
            r = self.distance(self.population, WHOLE_BODY, country=1.0)
            found += [("the levels without the country factor", r)] if r is not None else []
        for who, basis, (factor, share), (k, reflection) in product(
            people, (WHOLE_BODY, LOCAL), _FACTORS, _REFLECTIONS
        ):
            r = self.distance(who, basis, k=k, factor=factor)
            if r is not None:
                found.append((f"{who}, {basis}, {share}, {reflection}", r))
        return found


def _judged(cell: Reading, reach: _Reach, plain: float) -> Judgement:
    stated, slack = cell.nominal, half_digit(cell)
    familiar = reach.familiar()
    near = [pair for pair in familiar if abs(stated - pair[1]) <= max(_WITHIN * pair[1], slack)][:_NAMED]
    shortest = min(r for _, r in familiar) * (1 - _WITHIN)
    re_read = "time_factor" in cell.at
    enough = abs(stated - plain) <= max(_WITHIN * plain, slack) if re_read else stated + slack >= plain * 0.99
    verdict = Fit.FITS if enough else Fit.DOES_NOT_FIT if stated + slack < shortest else Fit.DOUBTFUL
    said = (
        f"; {listed(tuple(name for name, _ in near))} would give it"
        if near
        else "; none of the familiar sets gives it"
    )
    total_w = sum(s.eirp_w for s in reach.sources)
    needed = 4 * math.pi * stated**2 / total_w
    return Judgement(
        verdict=verdict,
        summary=f"A compliance distance of {claim(cell)} is stated; {plain:.1f} m follows from power and "
        f"gain for the {reach.population} at full power{'' if enough else said}.",
        claimed=Amount(stated, "m"),
        expected=Interval(round(plain, 2), None, "m"),
        working=(
            *(step for s in reach.sources for step in s.steps),
            Step("Distance at full power in free space", "√(Σ EIRP/(4π·S))", round(plain, 3), "m"),
            Step("k·F/S it needs", f"4π × {stated:g}² / {total_w:.5g} W", round(needed, 6), "m²/W"),
            *(Step(f"With {name}", "√(Σ k·F·EIRP/(4π·S))", round(r, 2), "m") for name, r in near),
        ),
        assumptions=(
            f"Limit set {reach.limits.title} ({reach.limits.edition}); {reach.population}, whole body.",
            *_country(reach.country_factor),
            "Power over all ports and both polarisations; highest gain; average power.",
            "A calculated distance is no statement about a site; local rules and licensed practice decide.",
        ),
        question="Please state limit set, population, power, gain, time factor and reflection factor of the "
        "stated distance.",
        used=tuple(r for s in reach.sources for r in s.readings),
    )


def _country(factor: float) -> tuple[str, ...]:
    if factor == 1:
        return ()
    return (f"Levels times the country factor {factor:g} that the buyer set.",)


def _missing(panel: Panel) -> tuple[str, ...]:
    if not panel.bands:
        return ("frequency_range",)
    return tuple(dict.fromkeys(key for band in panel.bands for key in lacking(panel, band)))
