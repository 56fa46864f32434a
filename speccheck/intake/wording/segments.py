"""The parts of a clause: which figures are limits, which are places (band, angle, wind speed, test power)."""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field, replace

from speccheck.dictionary import Parameter, parameters
from speccheck.intake.wording.families import belongs
from speccheck.intake.wording.figures import Figure, Form
from speccheck.intake.wording.lexicon import Kind, general_vocabularies
from speccheck.intake.wording.tokens import Token
from speccheck.quantities import convert, dimension
from speccheck.records import Band, Level

_LOWEST_BARE_BAND_MHZ = 300.0
_OPEN_END_MHZ = 1e6
MHZ_PER_UNIT = {"MHz": 1.0, "GHz": 1000.0, "kHz": 0.001, "": 1.0}


@dataclass(frozen=True, slots=True, kw_only=True)
class Place:
    """Conditions a limit holds under; `texts` in the wording's own words."""

    bands: tuple[Band, ...] = ()
    at: Mapping[str, float] = field(default_factory=dict)
    texts: tuple[str, ...] = ()

    def __add__(self, other: Place) -> Place:
        return Place(
            bands=self.bands or other.bands,
            at={**other.at, **self.at},
            texts=tuple(dict.fromkeys((*self.texts, *other.texts))),
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class Demand:
    """The limits of one part of a clause with their comparator, planes, place and own level."""

    figures: tuple[Figure, ...]
    said: str = ""
    planes: tuple[str, ...] = ()
    place: Place = field(default_factory=Place)
    level: Level | None = None
    statistic: str = ""
    parts: tuple[float, ...] = ()
    bracket: str = ""


def segments(found: Sequence[Token]) -> tuple[tuple[Token, ...], ...]:
    """A clause cut at commas and semicolons outside brackets."""
    cut: list[list[Token]] = [[]]
    depth = 0
    for token in found:
        depth += {"(": 1, "[": 1, ")": -1, "]": -1}.get(token.text, 0)
        if depth <= 0 and token.kind is Kind.MARK and token.text in ",;":
            cut.append([])
        else:
            cut[-1].append(token)
    return tuple(tuple(part) for part in cut if part)


def demands(found: Sequence[Token], key: str) -> tuple[Demand, ...]:
    """The demands of a clause on the parameter `key` (several keys joined by '+')."""
    parameter = parameters()[key.split("+", maxsplit=1)[0]]
    parts = [_part(segment, parameter) for segment in segments(found)]
    general = Place()
    for part in parts:
        if not part.figures:
            general = general + part.place
    read: list[Demand] = []
    level: Level | None = None
    said = next((part.said for part in parts if not part.figures and part.said != "best"), "")
    for part in parts:
        level = part.level or level
        if part.figures:
            said = part.said or said
            read.append(replace(part, said=said, level=level, place=part.place + general))
    last = parts[-1] if parts else None
    if last is not None and not last.figures and last.level is not None:
        read = [replace(demand, level=demand.level or last.level) for demand in read]
    return tuple(read)


def own_level(segment: Iterable[Token]) -> Level | None:
    """Level said in a part of a clause."""
    said = [t.said for t in segment if t.kind is Kind.LEVEL]
    return Level(said[0].removesuffix("_by_will")) if said else None


def scope_of(found: Sequence[Token]) -> tuple[str, ...]:
    """Words of scope anywhere in a clause, those inside a parameter's name among them."""
    (scopes,) = (v for v in general_vocabularies() if v.kind is Kind.SCOPE)
    texts: list[str] = []
    named = False
    for token in found:
        if token.kind is Kind.SCOPE or (token.kind is Kind.COMPARATOR and token.said == "best"):
            texts.append(token.text)
        elif token.kind is Kind.PARAMETER:
            inside = scopes.pattern.finditer(token.text)
            texts.extend(match.group() for match in inside if match.start() or named)
            named = True
    return tuple(texts)


def _part(segment: Sequence[Token], parameter: Parameter) -> Demand:
    segment = _with_shared_units(segment)
    inside = _depths(segment)
    limits: list[int] = []
    place = Place()
    parts: list[float] = []
    for index, token in enumerate(segment):
        if token.figure is None:
            continue
        if _is_part_count(token.figure, inside[index], parameter, limits):
            parts.append(token.figure.numbers[0])
        elif _is_limit(token.figure, inside[index], parameter, limits):
            limits.append(index)
        else:
            place = place + _place(segment, index, parameter)
    said, statistic = _comparator(segment, limits, parameter)
    return Demand(
        figures=tuple(f for i in limits if (f := segment[i].figure) is not None),
        said=said,
        planes=tuple(_plane_of(segment, limits, position) for position in range(len(limits))),
        place=place,
        level=own_level(segment),
        statistic=statistic,
        parts=tuple(parts),
        bracket=" ".join(
            t.text for t, within in zip(segment, inside, strict=True) if within and t.text != "("
        ),
    )


def _with_shared_units(segment: Sequence[Token]) -> tuple[Token, ...]:
    """'16.5/17.0/17.5 dBi': the unit printed once belongs to the whole list."""
    shared = list(segment)
    for index in range(len(shared) - 3, -1, -1):
        token, mark, following = shared[index], shared[index + 1], shared[index + 2]
        if token.figure and not token.figure.unit and mark.text == "/" and following.figure:
            shared[index] = replace(token, figure=token.figure.with_unit(following.figure.unit))
    return tuple(shared)


def _depths(segment: Sequence[Token]) -> tuple[bool, ...]:
    depth = 0
    inside: list[bool] = []
    for token in segment:
        depth += {"(": 1, "[": 1, ")": -1, "]": -1}.get(token.text, 0)
        inside.append(depth > 0)
    return tuple(inside)


def _is_part_count(figure: Figure, inside: bool, parameter: Parameter, limits: Sequence[int]) -> bool:
    counted = parameter.kind in ("connectors", "count")
    return bool(inside and limits and counted and figure.form is Form.PLAIN and not figure.unit)


def _is_limit(figure: Figure, inside: bool, parameter: Parameter, limits: Sequence[int]) -> bool:
    if figure.form is Form.CARRIERS or not belongs(figure.unit, parameter):
        return False
    if _bare_band(figure, parameter):
        return False
    return not (inside and limits)


def _bare_band(figure: Figure, parameter: Parameter) -> bool:
    bare = figure.form is Form.RANGE and not figure.unit and min(figure.numbers) >= _LOWEST_BARE_BAND_MHZ
    return bare and parameter.direction != "contains" and parameter.unit in ("dBi", "dB", "dBc", "", "deg")


def _place(segment: Sequence[Token], index: int, parameter: Parameter) -> Place:
    """What a figure that is no limit says about where the limit holds."""
    token = segment[index]
    figure = token.figure
    if figure is None:
        return Place()
    kind = dimension(figure.unit)
    if kind == "frequency" or _bare_band(figure, parameter):
        return _frequency_place(segment, index, figure)
    if figure.form is Form.CARRIERS:
        return Place(at={"carrier_dbm": convert(figure.numbers[1], figure.unit, "dBm")}, texts=(token.text,))
    if kind == "angle":
        following = segment[index + 1 : index + 2]
        tilt = any(t.said in ("electrical_tilt", "tilt_steps") for t in following)
        return Place(at={"tilt_deg" if tilt else "angle_deg": figure.numbers[0]}, texts=(token.text,))
    if kind == "speed":
        speed = convert(figure.numbers[0], figure.unit, "m/s")
        return Place(at={"wind_speed_mps": speed}, texts=(token.text,))
    return Place(texts=(token.text,))


def _frequency_place(segment: Sequence[Token], index: int, figure: Figure) -> Place:
    factor = MHZ_PER_UNIT[figure.unit]
    numbers = [number * factor for number in figure.numbers]
    if figure.form is Form.RANGE:
        return Place(bands=((min(numbers), max(numbers)), *_listed_bands(segment, index)))
    before = segment[index - 1].said if index else ""
    if before in ("<", "≤", "up_to"):
        return Place(bands=((0.0, numbers[0]),))
    if before in (">", "≥"):
        return Place(bands=((numbers[0], _OPEN_END_MHZ),))
    return Place(at={"frequency_mhz": numbers[0]}, texts=(segment[index].text,))


def _listed_bands(segment: Sequence[Token], index: int) -> tuple[Band, ...]:
    """Further ranges of a list 'a/b/c MHz' that starts at `index`."""
    bands: list[Band] = []
    while index + 2 < len(segment) and (
        segment[index + 1].text in "/,;&" or segment[index + 1].kind is Kind.JOIN
    ):
        figure = segment[index + 2].figure
        if figure is None or figure.form is not Form.RANGE:
            break
        numbers = [number * MHZ_PER_UNIT.get(figure.unit, 1.0) for number in figure.numbers]
        bands.append((min(numbers), max(numbers)))
        index += 2
    return tuple(bands)


def _comparator(segment: Sequence[Token], limits: Sequence[int], parameter: Parameter) -> tuple[str, str]:
    """The comparator of the limits, and the statistic that a second 'min' or 'max' names."""
    said = {i: t.said for i, t in enumerate(segment) if t.kind is Kind.COMPARATOR}
    if not limits:
        return (next(iter(said.values())), "") if said else ("", "")
    before = [i for i in said if i < limits[0] and said[i] != "best"]
    after = [i for i in said if i == limits[-1] + 1]
    chosen = before[-1] if before else after[0] if after else None
    if chosen is None:
        return "", ""
    others = [said[i] for i in (*before, *after) if i != chosen and said[i] in ("≥", "≤")]
    return said[chosen], _bound_statistic(others[0], parameter) if others else ""


def _bound_statistic(said: str, parameter: Parameter) -> str:
    """'Min. gain ≥ 17': the first word names the worst or best value over the scope."""
    worst = {"higher": "≥", "lower": "≤"}.get(parameter.direction)
    if said == worst:
        return "each"
    return "min" if said == "≥" else "max"


def _plane_of(segment: Sequence[Token], limits: Sequence[int], position: int) -> str:
    """Plane named after a figure, or else before it, up to the neighbouring figures."""
    start = limits[position - 1] + 1 if position else 0
    end = limits[position + 1] if position + 1 < len(limits) else len(segment)
    after = [t.said for t in segment[limits[position] : end] if t.kind is Kind.PLANE]
    before = [t.said for t in segment[start : limits[position]] if t.kind is Kind.PLANE]
    return (after or before or [""])[0]
