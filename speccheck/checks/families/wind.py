"""Wind: the drag coefficient a wind load implies, scaling with speed, largest load against the sides."""

from __future__ import annotations

from speccheck.checks.cell_text import half_digit
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, label
from speccheck.checks.stated_conditions import wind_speed_mps
from speccheck.physics.wind import drag_coefficient, dynamic_pressure_pa, force_n, scaled_force_n
from speccheck.records import WIND_CAUTIONS, Amount, Fit, Interval, Panel, Reading, Step

_USUAL_DRAG = (0.65, 2.1)
_TUNNEL_DRAG = 0.4
_POSSIBLE_DRAG = (0.1, 5.0)
_SIDES = ("wind_load", "wind_load_lateral", "wind_load_rear", "wind_load_max")
_SCALING_DOUBT = 0.10
_SCALING_MISFIT = 0.25
_TRADE_AIR_KGM3 = 1.225


@check(
    "wind-load-fits-area",
    "Wind load fits the area at the stated speed",
    needs=("wind_load", "height", "width"),
    optional=("wind_load_lateral", "depth", "wind_load_speed"),
    about=("wind_load",),
    source="EN 1991-1-4 section 5.3, force coefficient; drag of panels 0.65 to 2.1 (common practice)",
    scope="panel",
)
def wind_load_fits_area(
    *,
    wind_load: Reading,
    height: Reading,
    width: Reading,
    wind_load_lateral: Reading | None,
    depth: Reading | None,
    wind_load_speed: Reading | None,
) -> Judgement | None:
    """Asks about a wind load whose implied drag coefficient is outside what panels show.

    Formula
    C = F / (½·ρ·v²·A), ρ = 1.225 kg/m³, A = height × width (lateral: height × depth)

    Assumptions
    Flat plates are near 1.2 or above, long box sections up to 2, rounded radomes lower; 0.65 to 2.1 is usual
    (common practice). Outside that the figure is doubtful; outside 0.1 to 5 it does not fit any body. Size is
    that of the radome without brackets.

    Worked example
    2.0 m × 0.4 m at 150 km/h: the dynamic pressure is 1063 Pa. 400 N imply a drag coefficient of 0.47:
    doubtful. At 200 km/h the load is 1.78 times that at 150 km/h.
    """
    faces = [(wind_load, width, "frontal")]
    if wind_load_lateral is not None and depth is not None:
        faces.append((wind_load_lateral, depth, "lateral"))
    judged = [
        (face, _drag(face, height, speed))
        for face in faces
        if (speed := wind_speed_mps(face[0], wind_load_speed))
    ]
    if not judged:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("wind_load_speed",))
    worst = min(judged, key=lambda j: _drag_rank(j[1]))
    (load, across, name), drag = worst
    speed = wind_speed_mps(load, wind_load_speed) or 0.0
    area = height.nominal * across.nominal
    low, high = (float(force_n(c, speed, area)) for c in _USUAL_DRAG)
    verdict = _drag_verdict(drag, load)
    return Judgement(
        verdict=verdict,
        summary=f"The {name} load of {claim(load)} at {speed * 3.6:.0f} km/h implies "
        f"a drag coefficient of {drag:.2f}"
        + (", as panels usually show." if verdict is Fit.FITS else "; panels show 0.65 to 2.1."),
        claimed=Amount(load.nominal, "N"),
        expected=Interval(round(low, 1), round(high, 1), "N"),
        working=tuple(s for (f, d) in judged for s in _drag_steps(f, d, height, wind_load_speed)),
        assumptions=(
            f"Air of {_TRADE_AIR_KGM3} kg/m³; size of the radome without brackets; steady wind square on.",
            WIND_CAUTIONS[0],
        ),
        question="Please state speed, direction and method (wind tunnel or calculation) of the wind load, "
        "and whether brackets are included.",
        used=tuple(f[0] for f, _ in judged),
    )


def _drag(face: tuple[Reading, Reading, str], height: Reading, speed_mps: float) -> float:
    load, across, _ = face
    return float(drag_coefficient(load.nominal, speed_mps, height.nominal * across.nominal))


def _drag_verdict(drag: float, load: Reading) -> Fit:
    if not _POSSIBLE_DRAG[0] <= drag <= _POSSIBLE_DRAG[1]:
        return Fit.DOES_NOT_FIT
    least = _TUNNEL_DRAG if load.at.get("wind_tunnel") == 1 else _USUAL_DRAG[0]
    return Fit.FITS if least <= drag <= _USUAL_DRAG[1] else Fit.DOUBTFUL


def _drag_rank(drag: float) -> float:
    """Lower for a drag further outside the usual range."""
    return min(drag / _USUAL_DRAG[0], _USUAL_DRAG[1] / drag)


def _drag_steps(
    face: tuple[Reading, Reading, str], drag: float, height: Reading, stated_speed: Reading | None
) -> list[Step]:
    load, across, name = face
    speed = wind_speed_mps(load, stated_speed) or 0.0
    pressure, area = float(dynamic_pressure_pa(speed)), height.nominal * across.nominal
    return [
        Step("Dynamic pressure", f"½ × {_TRADE_AIR_KGM3} × {speed:.2f}²", round(pressure, 1), "Pa"),
        Step(f"Area, {name}", f"{height.nominal:g} m × {across.nominal:g} m", round(area, 4), "m²"),
        Step(
            f"Drag coefficient, {name}",
            f"{load.nominal:g} N / ({pressure:.1f} Pa × {area:.4f} m²)",
            round(drag, 3),
        ),
    ]


@check(
    "wind-loads-agree",
    "Wind loads agree with each other",
    needs=(),
    optional=("wind_load_speed",),
    about=_SIDES,
    source="load proportional to the square of the speed; EN 1991-1-4 section 4.5",
    scope="panel",
)
def wind_loads_agree(case: Case, wind_load_speed: Reading | None) -> Judgement | None:
    """Holds wind loads at several speeds, and the largest load against the single sides.

    Formula
    F₂ = F₁·(v₂/v₁)²; the maximum over all directions ≥ load of each side at the same speed

    Assumptions
    One drag coefficient for one side at all speeds. More than 10 % off is doubtful, more than 25 % does not
    fit. A maximum below a side beyond rounding does not fit.

    Worked example
    300 N at 150 km/h is 533 N at 200 km/h (factor 1.78). 300 N stated at 200 km/h as well does not fit.
    """
    found = [j for key in _SIDES if (j := _scaling(case.panel.all(key), wind_load_speed)) is not None]
    largest = _largest_load(case.panel, wind_load_speed)
    found += [largest] if largest is not None else []
    order = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL, Fit.FITS)
    return min(found, key=lambda j: order.index(j.verdict), default=None)


def _scaling(loads: tuple[Reading, ...], stated: Reading | None) -> Judgement | None:
    timed = sorted(((s, r) for r in loads if (s := wind_speed_mps(r, stated))), key=lambda pair: pair[0])
    if len(timed) < 2 or timed[0][0] == timed[-1][0]:
        return None
    (slow, first), (fast, last) = timed[0], timed[-1]
    wanted = float(scaled_force_n(first.nominal, slow, fast))
    slack = half_digit(first) * wanted / first.nominal + half_digit(last)
    off = max(abs(last.nominal - wanted) - slack, 0.0) / wanted
    verdict = (
        Fit.FITS if off <= _SCALING_DOUBT else Fit.DOUBTFUL if off <= _SCALING_MISFIT else Fit.DOES_NOT_FIT
    )
    return Judgement(
        verdict=verdict,
        summary=f"{first.nominal:g} N at {slow * 3.6:.0f} km/h is {wanted:.0f} N at {fast * 3.6:.0f} km/h; "
        f"{last.nominal:g} N is stated.",
        claimed=Amount(last.nominal, "N"),
        expected=Interval(round(wanted * 0.9, 1), round(wanted * 1.1, 1), "N"),
        working=(
            Step(
                "Load at the higher speed",
                f"{first.nominal:g} N × ({fast:.2f}/{slow:.2f})²",
                round(wanted, 1),
                "N",
            ),
        ),
        assumptions=("The same side and drag coefficient at both speeds.", WIND_CAUTIONS[0]),
        question="Please state which speed and side each wind load is for.",
        used=(first, last),
    )


def _largest_load(panel: Panel, stated: Reading | None) -> Judgement | None:
    most = panel.get("wind_load_max")
    if most is None:
        return None
    sides = [
        r
        for key in _SIDES[:3]
        for r in panel.all(key)
        if wind_speed_mps(r, stated) == wind_speed_mps(most, stated)
    ]
    if not sides:
        return None
    side = max(sides, key=lambda r: r.nominal)
    below = most.nominal + half_digit(most) < side.nominal - half_digit(side)
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if below else Fit.FITS,
        summary=f"The largest load is {most.nominal:g} N; {label(side.parameter)} is {side.nominal:g} N.",
        claimed=Amount(most.nominal, "N"),
        expected=Interval(side.nominal, None, "N"),
        working=(Step("Largest of the sides", "as stated", side.nominal, "N"),),
        assumptions=("All loads at the same speed.", WIND_CAUTIONS[0]),
        question="Please state the wind load by direction, and the largest of all.",
        used=(most, side),
    )
