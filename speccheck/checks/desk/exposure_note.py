"""The desk check of RF exposure: calculated compliance distances of one panel under a named limit set.

A note without power, gain, band and limit has no distance: it is incomplete and says what is missing.
"""

from __future__ import annotations

from dataclasses import replace

from speccheck.checks.desk.exposure_inputs import Radiated, active, lacking, radiated
from speccheck.checks.desk.exposure_rows import (
    Frame,
    all_bands_rows,
    band_rows,
    cylinder_steps,
    distance_steps,
)
from speccheck.checks.desk.exposure_words import CAUTIONS, VALIDITY
from speccheck.checks.desk.exposure_zone import zones
from speccheck.checks.families.plausibility import impossible
from speccheck.checks.saying import label, mhz
from speccheck.records import Band, ExposureNote, Panel, Settings, Step
from speccheck.standards import BASES, POPULATIONS, LimitSet, limit_set, limit_set_names

CAUTIOUS_REFLECTION = 2.56


def exposure_note(panel: Panel, settings: Settings) -> ExposureNote:
    """Calculated compliance distances for public and workers, every averaging kind of the limit set.

    Parameters
    ----------
    panel : one offered panel as read
    settings : limit set, reflection factor, time factors and power tolerance of the buyer

    Returns
    -------
    the note; `complete` False with the list of what is missing, and no distance, where an input lacks

    Source: OET Bulletin 65 equations 4 and 12 to 16; ITU-T K.52; IEC 62232 (scopes seen, clauses not read).
    """
    panel = _possible(panel)
    missing = _missing(panel, settings)
    if missing:
        return _incomplete(settings, missing)
    limits = limit_set(settings.limit_set)
    sources = tuple(s for band in panel.bands if (s := radiated(panel, band)) is not None)
    frame = _frame(panel, settings, limits)
    rows = tuple(r for s in sources for r in band_rows(panel, s, frame))
    around, modelled = zones(panel, sources, frame)
    readings = tuple(dict.fromkeys(r.where for s in sources for r in s.readings))
    return ExposureNote(
        complete=True,
        limit_set=limits.title,
        edition=limits.edition,
        limit_source=limits.source,
        rows=rows + all_bands_rows(sources, frame),
        assumptions=tuple(dict.fromkeys((*_assumptions(panel, sources, frame), *modelled))),
        cautions=CAUTIONS,
        validity=VALIDITY,
        factors=_factors(frame),
        working=tuple(dict.fromkeys(step for s in sources for step in s.steps))
        + distance_steps(sources, frame)
        + cylinder_steps(panel, sources, frame),
        around=around,
        where=readings,
    )


def _possible(panel: Panel) -> Panel:
    """The panel without figures that no panel can have; those count as missing."""
    ordered = [r for r in panel.readings if r.band is None or r.band[0] < r.band[1]]
    return replace(panel, readings=tuple(r for r in ordered if not impossible(r)))


def _missing(panel: Panel, settings: Settings) -> tuple[str, ...]:
    if settings.limit_set not in limit_set_names():
        return (f"limit set '{settings.limit_set}' is not known; known are {', '.join(limit_set_names())}",)
    if not panel.bands:
        return ("frequency range",)
    limits = limit_set(settings.limit_set)
    found = []
    for band in panel.bands:
        if radiated(panel, band) is None:
            found += [f"{label(key)} for {mhz(band)}" for key in lacking(panel, band)]
        if _levels(limits, band) == 0:
            found.append(f"{limits.title} has no level for all of {mhz(band)}")
    return tuple(dict.fromkeys(found))


def _levels(limits: LimitSet, band: Band) -> int:
    return sum(limits.lowest(*band, who, basis) is not None for who in POPULATIONS for basis in BASES)


def _incomplete(settings: Settings, missing: tuple[str, ...]) -> ExposureNote:
    known = settings.limit_set in limit_set_names()
    limits = limit_set(settings.limit_set) if known else None
    return ExposureNote(
        complete=False,
        limit_set=limits.title if limits else settings.limit_set,
        edition=limits.edition if limits else "",
        limit_source=limits.source if limits else "",
        missing=missing,
        assumptions=("No distance is given: an input is missing.",),
        cautions=CAUTIONS,
        validity=VALIDITY,
    )


def _frame(panel: Panel, settings: Settings, limits: LimitSet) -> Frame:
    stated_share = max((r.high / 100 for r in panel.all("tdd_duty")), default=1.0)
    stated_power = max((r.high / 100 for r in panel.all("power_reduction_factor")), default=1.0)
    share = settings.tdd_duty if settings.tdd_duty < 1 else stated_share
    reduction = settings.actual_maximum_factor if settings.actual_maximum_factor < 1 else stated_power
    return Frame(
        limits=limits,
        reflection=settings.reflection_factor,
        cautious_reflection=max(CAUTIOUS_REFLECTION, settings.reflection_factor),
        tolerance_db=settings.power_tolerance_db,
        tdd_share=share,
        power_factor=reduction if active(panel) else 1.0,
        country_factor=settings.country_factor,
    )


def _factors(frame: Frame) -> tuple[Step, ...]:
    return (
        Step("Reflection factor on power density", "1 free space; 2.56 ground; 4 full", frame.reflection),
        *_country(frame),
        Step(
            "Time factor shown beside",
            f"downlink share {frame.tdd_share:g} × actual-maximum factor {frame.power_factor:g}",
            round(frame.time_factor, 4),
        ),
        Step(
            "Cautious set",
            f"time factor 1, reflection {frame.cautious_reflection:g}, power + {frame.tolerance_db:g} dB",
            round(frame.cautious_factor, 3),
        ),
    )


def _country(frame: Frame) -> tuple[Step, ...]:
    if frame.country_factor == 1:
        return ()
    return (Step("Country factor on the levels", "setting of the buyer", frame.country_factor),)


def _assumptions(panel: Panel, sources: tuple[Radiated, ...], frame: Frame) -> list[str]:
    limits = frame.limits
    said = [
        f"Limit set {limits.title}, edition {limits.edition}: {limits.source}. {limits.averaging}.",
        limits.note,
        "In each band the level at the frequency where it is lowest.",
        *(note for s in sources for note in s.assumptions),
        "EIRP is the average power of both polarisations together times the gain of one polarisation.",
        f"Reflection factor {frame.reflection:g} on power density; full power without time factor.",
        f"Cautious set: time factor 1, reflection {frame.cautious_reflection:g}, power raised by "
        f"{frame.tolerance_db:g} dB.",
    ]
    if frame.country_factor != 1:
        said.append(
            f"Every level is the one of the limit set times the country factor {frame.country_factor:g} that "
            "the buyer set; the rules of the country decide."
        )
    if frame.time_factor < 1:
        said.append(
            f"Beside the full-power distance: time factor {frame.time_factor:g}, valid only where the "
            "equipment enforces it and the rules accept it."
        )
    if not active(panel):
        said.append("No actual-maximum factor: the panel has no transmitters of its own.")
    if len(sources) > 1:
        said.append("All bands together: Σ S/S_lim = 1 with every band at its full power on one axis.")
    if any(s.whole_panel for s in sources):
        said.append(
            "Power or ports are stated once for several bands; each band is taken with all of it, which is "
            "cautious."
        )
    if len(limits.bases) == 1:
        said.append(f"{limits.title} has no separate level of local power density.")
    if limits.verify_before_use:
        said.append(f"{limits.title} is recorded from memory: verify before use.")
    return said
