"""Limits of gain, beamwidth and size that no panel can meet together at the low end of its band."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from speccheck.physics.bounds import gain_from_beamwidths_dbi
from speccheck.physics.decibels import wavelength_m
from speccheck.quantities import UnknownUnitError, convert
from speccheck.records import Amount, Band, Finding, Fit, Interval, Level, Requirement, Step
from speccheck.tender.demanded import Demanded, named

LOSSLESS_CONSTANT = 35_000.0
"""Directivity times both half-power widths [deg²] of a uniform column (common practice)."""
_LINE_WIDTH_DEG = 50.8
_HARD_DB = 0.5
"""A demand this far above the lossless figure is out of reach; within it, only of a lossless panel."""
_WIDTH_SLACK = 1.05
"""Half-power width of a uniform line is met within 5 % (common practice)."""


@dataclass(frozen=True, slots=True)
class Size:
    """What bounds one beamwidth from below: an angle and the rows it comes from."""

    narrowest_deg: float
    rows: tuple[Requirement, ...]
    formula: str


def attainability(rows: Sequence[Demanded], requirements: Sequence[Requirement]) -> Iterator[Finding]:
    """Findings on mandatory gain and beamwidth rows against size and frequency, band by band."""
    duties = [row for row in rows if row.requirement.level is Level.MANDATORY]
    duties += _nominal_widths(requirements)
    for band in _bands(duties, requirements):
        yield from _gain(duties, requirements, band)
        yield from _widths(duties, requirements, band)


def _nominal_widths(requirements: Sequence[Requirement]) -> Iterator[Demanded]:
    """Beamwidths named without tolerance ('65°'): no limit for an offer, but what the buyer has in mind."""
    for r in requirements:
        bare = r.operator == "information" and r.level is Level.MANDATORY
        if bare and r.parameter == "horizontal_beamwidth" and isinstance(r.limit, float | int):
            yield Demanded(r, float(r.limit), float(r.limit), "deg")


def _bands(duties: Sequence[Demanded], requirements: Sequence[Requirement]) -> tuple[Band, ...]:
    """Bands of the rows that have their own, else the ranges that must be covered."""
    own = [
        b for row in duties for b in row.requirement.bands if row.requirement.parameter == "gain" and b[0] > 0
    ]
    return tuple(dict.fromkeys(own)) or tuple(band for band, _ in _covered(requirements))


def _covered(requirements: Sequence[Requirement]) -> Iterator[tuple[Band, Requirement]]:
    for r in requirements:
        if r.parameter in ("frequency_range", "operating_bands") and isinstance(r.limit, tuple):
            try:
                low, high = (convert(edge, r.unit or "MHz", "MHz") for edge in r.limit)
            except UnknownUnitError:
                continue
            yield (low, high), r


def _gain(duties: Sequence[Demanded], requirements: Sequence[Requirement], band: Band) -> Iterator[Finding]:
    wanted = max(_of("gain", duties, band), key=lambda row: row.low, default=None)
    azimuth = max(_of("horizontal_beamwidth", duties, band), key=lambda row: row.low, default=None)
    if wanted is None or azimuth is None or not math.isfinite(wanted.low) or azimuth.low <= 0:
        return
    elevation = _elevation(duties, band)
    if elevation is None:
        return
    lossless = float(gain_from_beamwidths_dbi(azimuth.low, elevation.narrowest_deg, LOSSLESS_CONSTANT))
    excess = wanted.low - lossless
    if excess <= -_HARD_DB:
        return
    limiting = (wanted.requirement, azimuth.requirement, *elevation.rows, *_range_rows(requirements, band))
    reach = "is unattainable" if excess > _HARD_DB else "leaves nothing for losses"
    yield Finding(
        check="tender-gain-attainable",
        title="Gain, beamwidth, size and frequency demanded together",
        verdict=Fit.DOES_NOT_FIT if excess > _HARD_DB else Fit.DOUBTFUL,
        summary=(
            f"{named(wanted.requirement)} {reach} at {band[0]:g} MHz: about {lossless:.1f} dBi "
            f"without losses under {' and '.join(named(r) for r in (azimuth.requirement, *elevation.rows))}"
        ),
        parameters=("gain", "horizontal_beamwidth", "height"),
        band=band,
        claimed=Amount(wanted.low, "dBi"),
        expected=Interval(None, lossless, "dBi"),
        working=(
            Step("Narrowest vertical beamwidth", elevation.formula, elevation.narrowest_deg, "deg"),
            Step(
                "Directivity without losses",
                f"10 log10({LOSSLESS_CONSTANT:g}/({azimuth.low:g} · {elevation.narrowest_deg:.1f}))",
                lossless,
                "dBi",
            ),
        ),
        assumptions=("the narrowest beamwidths that the rows allow, uniform amplitude, no losses",),
        question="Lower the gain, allow more length, or demand the gain at the upper end of the band only.",
        source="half-power width of a uniform line 50.8° λ/L; directivity 35 000/(θh·θv), common practice",
        where=tuple(dict.fromkeys(r.where for r in limiting)),
    )


def _elevation(duties: Sequence[Demanded], band: Band) -> Size | None:
    """The narrowest vertical beamwidth that length and beamwidth rows allow; None where neither is there."""
    sizes: list[Size] = []
    for row in _of("height", duties, band):
        if 0 < row.high < math.inf:
            width = _line_width_deg(row.high, band[0])
            sizes.append(
                Size(width, (row.requirement,), f"50.8 λ/L with L = {row.high:g} m at {band[0]:g} MHz")
            )
    for row in _of("vertical_beamwidth", duties, band):
        if row.low > 0 and math.isfinite(row.low):
            sizes.append(Size(row.low, (row.requirement,), "lower end of the row"))
    return max(sizes, key=lambda size: size.narrowest_deg, default=None)


def _widths(duties: Sequence[Demanded], requirements: Sequence[Requirement], band: Band) -> Iterator[Finding]:
    """Beamwidths narrower than the housing allows at the low end of the band."""
    for beam, side in (("vertical_beamwidth", "height"), ("horizontal_beamwidth", "width")):
        for wide in _of(beam, duties, band):
            for box in _of(side, duties, band):
                if not (0 < box.high < math.inf and math.isfinite(wide.high)):
                    continue
                narrowest = _line_width_deg(box.high, band[0])
                if wide.high * _WIDTH_SLACK >= narrowest:
                    continue
                rows = (wide.requirement, box.requirement, *_range_rows(requirements, band))
                formula = f"50.8 λ/L with L = {box.high:g} m at {band[0]:g} MHz"
                yield Finding(
                    check="tender-beamwidth-attainable",
                    title="Beamwidth, size and frequency demanded together",
                    verdict=Fit.DOES_NOT_FIT,
                    summary=(
                        f"{named(wide.requirement)} is unattainable at {band[0]:g} MHz: "
                        f"{named(box.requirement)} allows no less than about {narrowest:.1f}°"
                    ),
                    parameters=(beam, side),
                    band=band,
                    claimed=Amount(wide.high, "deg"),
                    expected=Interval(narrowest, None, "deg"),
                    working=(Step("Narrowest half-power beamwidth", formula, narrowest, "deg"),),
                    assumptions=("uniform amplitude over the whole housing",),
                    question="Allow a wider beam or a larger panel, or exempt the low end of the band.",
                    source="half-power width of a uniform line 50.8° λ/L, any antenna handbook (from memory)",
                    where=tuple(dict.fromkeys(r.where for r in rows)),
                )


def _line_width_deg(length_m: float, low_mhz: float) -> float:
    """Half-power width [deg] of a uniform line as handbooks give it, 50.8° λ/L."""
    return _LINE_WIDTH_DEG * float(wavelength_m(low_mhz * 1e6)) / length_m


def _of(key: str, duties: Sequence[Demanded], band: Band) -> list[Demanded]:
    return [
        row
        for row in duties
        if row.requirement.parameter == key
        and (
            not row.requirement.bands
            or any(min(b[1], band[1]) > max(b[0], band[0]) for b in row.requirement.bands)
        )
    ]


def _shared(one: Band, other: Band) -> bool:
    return min(one[1], other[1]) > max(one[0], other[0])


def _range_rows(requirements: Sequence[Requirement], band: Band) -> tuple[Requirement, ...]:
    return tuple(
        r for covered, r in _covered(requirements) if covered[0] <= band[0] and band[1] <= covered[1]
    )
