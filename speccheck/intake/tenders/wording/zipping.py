"""One demand to its clauses: lists zipped to bands, sizes to dimensions, planes to parameters."""

from __future__ import annotations

from dataclasses import replace

from speccheck.dictionary import Parameter, parameters
from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.intake.tenders.wording.figures import Figure, Form
from speccheck.intake.tenders.wording.limits import settle
from speccheck.intake.tenders.wording.segments import Demand
from speccheck.records import Band

_SIDES = {"h": "height", "l": "height", "w": "width", "d": "depth", "t": "depth"}


def zipped(demand: Demand) -> tuple[Clause, ...]:
    """The clauses of a demand."""
    keys = demand.key.split("+")
    clauses = _of_several(demand, keys) if len(keys) > 1 else _of_one(demand, parameters()[demand.key])
    return tuple(_placed(clause, demand) for clause in clauses)


def _of_one(demand: Demand, parameter: Parameter) -> tuple[Clause, ...]:
    figures = demand.figures
    if len(figures) == 1 and figures[0].form is not Form.SIZE:
        return (settle(parameter, demand.said, figures[0]),)
    if len(figures) == len(demand.place.bands):
        pairs = zip(figures, demand.place.bands, strict=True)
        return tuple(_banded(settle(parameter, demand.said, figure), band) for figure, band in pairs)
    detail = f"{len(figures)} figures for {len(demand.place.bands)} bands"
    return (Clause(parameter=parameter.key).doubting("LIST", detail=detail),)


def _banded(clause: Clause, band: Band) -> Clause:
    return replace(clause, bands=(band,))


def _of_several(demand: Demand, keys: list[str]) -> tuple[Clause, ...]:
    known = [parameters()[key] for key in keys]
    figures = demand.figures
    if len(figures) == 1 and figures[0].form is Form.SIZE and len(figures[0].numbers) == len(keys):
        return _sized(demand, known, figures[0])
    if len(figures) <= len(keys) and all(demand.planes):
        chosen = [_in_plane(known, plane) for plane in demand.planes]
        return tuple(settle(p, demand.said, f) for p, f in zip(chosen, figures, strict=True))
    if len(figures) == len(keys):
        return tuple(settle(p, demand.said, f).doubting("PLANE") for p, f in zip(known, figures, strict=True))
    if len(figures) == 1 and figures[0].form is not Form.SIZE:
        return (settle(known[0], demand.said, figures[0]).doubting("PLANE"),)
    return (
        Clause(parameter=keys[0]).doubting("LIST", detail=f"{len(figures)} figures for {len(keys)} limits"),
    )


def _sized(demand: Demand, known: list[Parameter], size: Figure) -> tuple[Clause, ...]:
    """A size in the order the wording names ('H x W x D'), or in the usual one with a doubt."""
    sides = [_SIDES.get(letter, "") for letter in demand.order]
    named = sorted(sides) == sorted(parameter.key for parameter in known)
    ordered = [parameters()[side] for side in sides] if named else known
    clauses = tuple(
        settle(parameter, demand.said, Figure(Form.PLAIN, (number,), size.unit))
        for parameter, number in zip(ordered, size.numbers, strict=True)
    )
    return clauses if named else tuple(clause.doubting("ORDER") for clause in clauses)


def _in_plane(known: list[Parameter], plane: str) -> Parameter:
    return next((p for p in known if p.key.startswith(plane)), known[0])


def _placed(clause: Clause, demand: Demand) -> Clause:
    """The clause with place, own level and statistic of its part, and its parts added up."""
    texts = demand.place.texts
    if demand.parts:
        texts = (*texts, demand.bracket)
    clause = replace(
        clause,
        bands=clause.bands or demand.place.bands,
        at=dict(demand.place.at),
        level=demand.level,
        statistic=demand.statistic,
        scope="; ".join(texts),
    )
    if demand.parts and sum(demand.parts) != clause.limit:
        clause = clause.doubting("SUM", detail=f"{'+'.join(f'{part:g}' for part in demand.parts)}")
    return clause
