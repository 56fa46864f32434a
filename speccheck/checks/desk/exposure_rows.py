"""The rows of the exposure note: distances of each band, of all bands, and the region they lie in."""

from __future__ import annotations

from dataclasses import dataclass, replace
from itertools import product

from speccheck.checks.desk.exposure_inputs import Radiated
from speccheck.checks.saying import mhz
from speccheck.physics.decibels import ratio
from speccheck.physics.exposure import (
    combined_distance_m,
    cylindrical_crossover_m,
    cylindrical_iec62232_wm2,
    cylindrical_oet65_wm2,
    distance_m,
    far_field_exposure_m,
    far_field_pattern_m,
    round_up_m,
)
from speccheck.records import ExposureRow, Panel, Step
from speccheck.standards import BASES, POPULATIONS, Limit, LimitSet


@dataclass(frozen=True, slots=True, kw_only=True)
class Frame:
    """What every row is calculated with; factors on power density [1]."""

    limits: LimitSet
    reflection: float
    cautious_reflection: float
    tolerance_db: float
    tdd_share: float
    power_factor: float
    country_factor: float = 1.0

    @property
    def time_factor(self) -> float:
        """Downlink share times actual-maximum factor [1]."""
        return self.tdd_share * self.power_factor

    @property
    def cautious_factor(self) -> float:
        """Factor on power density of the cautious set [1]."""
        return float(self.cautious_reflection * ratio(self.tolerance_db))

    def level(self, source: Radiated, population: str, basis: str) -> tuple[float, Limit] | None:
        """Frequency [MHz] and level where the limit of a band is lowest."""
        found = self.limits.lowest(*source.band, population, basis)
        if found is None:
            return None
        return found[0], replace(found[1], value_w_m2=found[1].value_w_m2 * self.country_factor)


def band_rows(panel: Panel, source: Radiated, frame: Frame) -> tuple[ExposureRow, ...]:
    """Rows of one band: each population under each averaging kind."""
    rows = []
    for population, basis in product(POPULATIONS, BASES):
        found = frame.level(source, population, basis)
        if found is not None:
            rows.append(_row(panel, source, frame, (population, basis), found))
    return tuple(rows)


def _row(
    panel: Panel, source: Radiated, frame: Frame, who: tuple[str, str], found: tuple[float, Limit]
) -> ExposureRow:
    frequency_mhz, level = found
    population, basis = who
    plain = float(distance_m(source.eirp_w, level.value_w_m2, frame.reflection))
    largest = _largest_m(panel)
    top_hz = source.band[1] * 1e6
    far = float(far_field_pattern_m(largest, top_hz)) if largest else None
    far_exposure = float(far_field_exposure_m(largest, top_hz)) if largest else None
    cylindrical, crossover = _cylindrical(panel, source, level.value_w_m2, frame)
    return ExposureRow(
        band=source.band,
        population=population,
        category=frame.limits.populations[population],
        basis=basis,
        frequency_mhz=frequency_mhz,
        eirp_dbm=round(source.eirp_dbm, 3),
        power_w=round(source.power_w, 4),
        gain_dbi=round(source.gain_dbi, 3),
        limit_w_m2=round(level.value_w_m2, 4),
        averaging_min=level.averaging_min,
        distance_m=_up(plain),
        cautious_distance_m=_up(_cautious(source.eirp_w, level.value_w_m2, frame)),
        factored_distance_m=_up(plain * frame.time_factor**0.5) if frame.time_factor < 1 else None,
        far_field_m=round(far, 2) if far else None,
        far_field_exposure_m=round(far_exposure, 2) if far_exposure else None,
        cylindrical_distance_m=_up(cylindrical) if cylindrical else None,
        region=_region(plain, far_exposure, far, crossover if cylindrical else None),
    )


def _cautious(eirp_w: float, limit_wm2: float, frame: Frame) -> float:
    return float(distance_m(eirp_w, limit_wm2, frame.cautious_factor))


def _up(distance: float) -> float:
    return round(float(round_up_m(distance)), 1)


def _largest_m(panel: Panel) -> float | None:
    sides = [r.nominal for key in ("height", "width") if (r := panel.get(key)) is not None]
    return max(sides, default=None)


def _cylindrical(
    panel: Panel, source: Radiated, limit_wm2: float, frame: Frame
) -> tuple[float | None, float | None]:
    """Distance [m] of the spatial average and where that model ends [m]; None where it does not hold."""
    height, width = panel.get("height"), panel.get("horizontal_beamwidth", source.band)
    if height is None or width is None or not 0 < width.nominal <= 360:
        return None, None
    at_one_m = float(cylindrical_oet65_wm2(source.power_w, 1.0, height.nominal, width.nominal))
    reach = frame.reflection * at_one_m / limit_wm2
    crossover = float(cylindrical_crossover_m(ratio(source.gain_dbi), height.nominal, width.nominal))
    return (reach, crossover) if reach < crossover else (None, None)


def _region(plain: float, far_exposure: float | None, far: float | None, crossover: float | None) -> str:
    if far is None or far_exposure is None:
        return "size of the panel not stated: near or far field not known"
    if plain >= far:
        words = f"beyond 2D²/λ ({far:.1f} m): far field"
    elif plain >= far_exposure:
        words = f"between 0.6D²/λ ({far_exposure:.1f} m) and 2D²/λ ({far:.1f} m)"
    else:
        words = f"inside 0.6D²/λ ({far_exposure:.1f} m): near field, the spherical formula usually overstates"
    if crossover is not None:
        words += f"; cylindrical model holds up to {crossover:.1f} m"
    return words


def all_bands_rows(sources: tuple[Radiated, ...], frame: Frame) -> tuple[ExposureRow, ...]:
    """Rows of all bands together: r = √(Σ rᵢ²), every band at its full power on one axis."""
    if len(sources) < 2:
        return ()
    rows = []
    for population, basis in product(POPULATIONS, BASES):
        levels = [frame.level(source, population, basis) for source in sources]
        known = [level[1] for level in levels if level is not None]
        if len(known) < len(sources):
            continue
        pairs = list(zip(sources, known, strict=True))
        each = [float(distance_m(s.eirp_w, k.value_w_m2, frame.reflection)) for s, k in pairs]
        together = float(combined_distance_m(each))
        cautious = float(combined_distance_m([_cautious(s.eirp_w, k.value_w_m2, frame) for s, k in pairs]))
        rows.append(
            ExposureRow(
                band=None,
                population=population,
                category=frame.limits.populations[population],
                basis=basis,
                frequency_mhz=None,
                eirp_dbm=None,
                limit_w_m2=None,
                averaging_min=max(k.averaging_min for k in known),
                distance_m=_up(together),
                cautious_distance_m=_up(cautious),
                factored_distance_m=_up(together * frame.time_factor**0.5) if frame.time_factor < 1 else None,
            )
        )
    return tuple(rows)


def cylinder_steps(panel: Panel, sources: tuple[Radiated, ...], frame: Frame) -> tuple[Step, ...]:
    """Peak density at the public distance by the IEC 62232 cylindrical formula, where its inputs are stated.

    The formula is from memory (medium confidence); its peak is twice the spatial average.
    """
    steps = []
    for source in sources:
        level = frame.level(source, POPULATIONS[0], BASES[0])
        height, width = panel.get("height"), panel.get("horizontal_beamwidth", source.band)
        if level is None or height is None or width is None or not 0 < width.nominal <= 360:
            continue
        r = float(distance_m(source.eirp_w, level[1].value_w_m2, frame.reflection))
        gain, high = float(ratio(source.gain_dbi)), height.nominal
        average = float(
            cylindrical_iec62232_wm2(
                source.power_w, r, height_m=high, az_hpbw_deg=width.nominal, directivity=gain
            )
        )
        label = f"Cylindrical formula of IEC 62232 at {r:.1f} m, {mhz(source.band)}, peak 2·S_avg"
        formula = f"P {source.power_w:.4g} W, L {high:g} m, φ₃ {width.nominal:g}°, D {gain:.4g}"
        steps.append(Step(label, formula, round(2 * frame.reflection * average, 4), "W/m²"))
    return tuple(steps)


def distance_steps(sources: tuple[Radiated, ...], frame: Frame) -> tuple[Step, ...]:
    """The arithmetic of every distance, before rounding up."""
    steps = []
    for population, basis in product(POPULATIONS, BASES):
        each = []
        for source in sources:
            found = frame.level(source, population, basis)
            if found is None:
                continue
            level = found[1].value_w_m2
            each.append(float(distance_m(source.eirp_w, level, frame.reflection)))
            formula = f"√({frame.reflection:g} × {source.eirp_w:.5g} W / (4π × {level:.4g} W/m²))"
            steps.append(Step(f"{population}, {basis}, {mhz(source.band)}", formula, round(each[-1], 3), "m"))
        if len(each) > 1 and len(each) == len(sources):
            together = float(combined_distance_m(each))
            formula = "√(" + " + ".join(f"{r:.2f}²" for r in each) + ")"
            steps.append(Step(f"{population}, {basis}, all bands", formula, round(together, 3), "m"))
            if all(s.whole_panel for s in sources):
                words = "power and ports stated once, all of it in the band with the longest distance"
                steps.append(
                    Step(f"{population}, {basis}, if the bands share it", words, round(max(each), 3), "m")
                )
    return tuple(steps)
