"""The parts of a clause: which figures are limits of which parameter, and under which comparator."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field, replace

from speccheck.dictionary import Parameter, parameters
from speccheck.intake.tenders.wording.families import belongs
from speccheck.intake.tenders.wording.figures import Figure, Form
from speccheck.intake.tenders.wording.lexicon import Kind, fold, general_vocabularies
from speccheck.intake.tenders.wording.places import Place, bare_band, place_of
from speccheck.intake.tenders.wording.tokens import Token
from speccheck.records import Level

_PLACE_WORDS = ("at", "@", "for", "over", "in", "with", "on")


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
    key: str = ""
    order: str = ""


def segments(found: Sequence[Token]) -> tuple[tuple[Token, ...], ...]:
    """A clause cut at commas and semicolons outside brackets, and at an 'and' between two figures' parts."""
    cut: list[list[Token]] = [[]]
    depth = 0
    for place, token in enumerate(found):
        depth += {"(": 1, "[": 1, ")": -1, "]": -1}.get(token.text, 0)
        mark = token.kind is Kind.MARK and token.text in ",;"
        if depth <= 0 and (mark or _joins_demands(cut[-1], token, found[place + 1 :])):
            cut.append([])
        else:
            cut[-1].append(token)
    return tuple(tuple(part) for part in cut if part)


def _joins_demands(before: Sequence[Token], token: Token, after: Sequence[Token]) -> bool:
    """Whether an 'and' stands between two figures of one unit, so that each side is a demand."""
    if token.kind is not Kind.JOIN or token.said != "and":
        return False
    first, second = (
        [t.figure.unit for t in part if t.figure is not None and t.figure.unit] for part in (before, after)
    )
    return bool(first) and first[0] in second


def demands(found: Sequence[Token], key: str, *, fixed: bool = False) -> tuple[Demand, ...]:
    """The demands of a clause on the parameter `key` (several keys joined by '+').

    A part that names a parameter of its own demands that one, unless the tender's column fixed it.
    """
    cut = segments(found)
    keys = [key if fixed else _own_key(segment, key) for segment in cut]
    parts = [
        replace(_part(segment, parameters()[own.split("+", maxsplit=1)[0]]), key=own)
        for segment, own in zip(cut, keys, strict=True)
    ]
    order = "".join(
        c for t in found if t.kind is Kind.ORDER for c in t.text.casefold() if c.isalpha() and c != "x"
    )
    general = Place()
    for part in parts:
        if not part.figures:
            general = general + part.place
    several = sum(bool(part.figures) for part in parts) > 1
    read: list[Demand] = []
    level: Level | None = None
    said = next((part.said for part in parts if not part.figures and part.said != "best"), "")
    for part, segment in zip(parts, cut, strict=True):
        level = part.level or level
        if part.figures:
            said = part.said or said
            statistic = part.statistic or (_own_statistic(segment) if several else "")
            place = part.place + general
            read.append(replace(part, said=said, level=level, place=place, statistic=statistic, order=order))
    last = parts[-1] if parts else None
    if last is not None and not last.figures and last.level is not None:
        read = [replace(demand, level=demand.level or last.level) for demand in read]
    return tuple(read)


def general_statistics(found: Sequence[Token]) -> tuple[str, ...]:
    """Statistics that hold for the whole clause: of its only demand, or said apart from any figure."""
    cut = segments(found)
    figured = [any(t.figure is not None for t in segment) for segment in cut]
    parts = [s for s, own in zip(cut, figured, strict=True) if sum(figured) < 2 or not own]
    return tuple(t.said for segment in parts for t in segment if t.kind is Kind.STATISTIC)


def _own_statistic(segment: Sequence[Token]) -> str:
    return next((t.said for t in segment if t.kind is Kind.STATISTIC), "")


def _own_key(segment: Sequence[Token], key: str) -> str:
    """Parameter that a part names itself and has a figure for, else `key`.

    'at 10° tilt' says a place, and so does 'in the band 2300-2690 MHz' beside a figure of `key`.
    """
    own = fitting_parameter(segment)
    if not own or (segment[0].kind is Kind.FILLER and segment[0].text.casefold() in _PLACE_WORDS):
        return key
    general = parameters()[key.split("+", maxsplit=1)[0]]
    figures = [t.figure for t in segment if t.figure is not None and t.figure.unit]
    is_place = parameters()[own.split("+", maxsplit=1)[0]].kind == "bands"
    return key if is_place and any(belongs(f.unit, general) for f in figures) else own


def fitting_parameter(segment: Sequence[Token]) -> str:
    """Key of the first parameter named that a figure's unit fits, '' if there is none."""
    units = {t.figure.unit for t in segment if t.figure is not None and t.figure.unit}
    for token in segment:
        if token.kind is Kind.PARAMETER:
            first = parameters()[token.said.split("+", maxsplit=1)[0]]
            if any(belongs(unit, first) for unit in units):
                return token.said
    return ""


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
            inside = scopes.finditer(token.text)
            texts.extend(text for start, text in inside if start or named)
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
            place = place + place_of(segment, index, parameter)
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
    if bare_band(figure, parameter):
        return False
    return not (inside and limits)


def _comparator(segment: Sequence[Token], limits: Sequence[int], parameter: Parameter) -> tuple[str, str]:
    """The comparator of the limits, and the statistic that a second 'min' or 'max' names."""
    said = {i: t.said for i, t in enumerate(segment) if t.kind is Kind.COMPARATOR}
    if not limits:
        return (next(iter(said.values())), "") if said else ("", "")
    before = [i for i in said if i < limits[0] and said[i] != "best"]
    after = [i for i in said if i == limits[-1] + 1]
    chosen = before[-1] if before else after[0] if after else None
    if chosen is None:
        return _bound_in_name(segment, parameter), ""
    others = [said[i] for i in (*before, *after) if i != chosen and said[i] in ("≥", "≤")]
    return said[chosen], _bound_statistic(others[0], parameter) if others else ""


def _bound_in_name(segment: Sequence[Token], parameter: Parameter) -> str:
    """'Minimum gain', 'VSWR max': a bound that belongs to the name; not that of 'maximum power per port'."""
    (bounds,) = (v for v in general_vocabularies() if v.kind is Kind.COMPARATOR)
    names = [token.text for token in segment if token.kind is Kind.PARAMETER]
    said = {bounds.meaning[fold(text)] for name in names for _, text in bounds.finditer(name)}
    worst = {"higher": "≥", "lower": "≤"}.get(parameter.direction, "")
    return worst if worst in said else ""


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
