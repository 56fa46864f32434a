"""What a panel says to a requirement, band by band: readings and statements, never mixed."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass, replace

from speccheck.dictionary import parameters
from speccheck.physics.matching import return_loss_db, vswr_from_return_loss
from speccheck.physics.power import eirp_from_erp_dbm
from speccheck.records import Band, Panel, Reading, Requirement, Statement

_TOUCH_MHZ = 0.5
_LEAST_VSWR = 1.0001
_LEAST_RETURN_LOSS_DB = 0.01


@dataclass(frozen=True, slots=True)
class Relation:
    """How another parameter's figure speaks for the one demanded.

    `bound` says that the true figure lies above ('lower bound') or below ('upper bound') the stated
    one; `falling` that a higher figure of one is a lower of the other.
    """

    parameter: str
    bound: str = ""
    convert: Callable[[float], float] = float
    falling: bool = False


def _return_loss(vswr: float) -> float:
    return float(return_loss_db(max(vswr, _LEAST_VSWR)))


def _vswr(return_loss: float) -> float:
    return float(vswr_from_return_loss(max(return_loss, _LEAST_RETURN_LOSS_DB)))


def _eirp(erp_dbm: float) -> float:
    return float(eirp_from_erp_dbm(erp_dbm))


STANDS_FOR: dict[str, tuple[Relation, ...]] = {
    "cross_polar_discrimination": (Relation("cross_polar_sector", "lower bound"),),
    "upper_sidelobe_suppression": (Relation("upper_sidelobe_peak_to_20", "lower bound"),),
    "weight_with_brackets": (Relation("weight", "lower bound"),),
    "weight": (Relation("weight_with_brackets", "upper bound"),),
    "wind_load": (Relation("wind_load_max", "upper bound"),),
    "return_loss": (Relation("vswr", convert=_return_loss, falling=True),),
    "vswr": (Relation("return_loss", convert=_vswr, falling=True),),
    "eirp": (Relation("erp", convert=_eirp),),
}
"""Parameters whose figure speaks for another's where that one is not stated: bounds or conversions."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Offer:
    """Everything said to one requirement for one band (None: for the panel)."""

    band: Band | None
    readings: tuple[Reading, ...] = ()
    ambiguous: tuple[Reading, ...] = ()
    statements: tuple[Statement, ...] = ()
    relation: Relation | None = None
    note: str = ""


def offers(requirement: Requirement, panel: Panel) -> tuple[Offer, ...]:
    """The offers of a panel, one a band in scope, or one for the panel where bands don't matter."""
    parameter = parameters()[requirement.parameter]
    if parameter.scope == "panel" or parameter.kind == "bands":
        return (_offer(requirement, panel, None),)
    bands = [band for band in panel.bands if in_scope(band, requirement.bands)]
    if not bands:
        if panel.bands:
            return (Offer(band=requirement.bands[0], note="no band of the panel lies in the band required"),)
        return (_offer(requirement, panel, None),)
    return tuple(_merged([_offer(requirement, panel, band) for band in bands]))


def in_scope(band: Band, scope: Sequence[Band]) -> bool:
    """Whether a band [MHz] shares more than an edge with one of the bands in scope."""
    return not scope or any(min(band[1], s[1]) - max(band[0], s[0]) > _TOUCH_MHZ for s in scope)


def _offer(requirement: Requirement, panel: Panel, band: Band | None) -> Offer:
    key = requirement.parameter
    own = _said(panel, key, band)
    if own.readings or own.ambiguous or own.statements:
        return own
    for relation in STANDS_FOR.get(key, ()):
        found = _said(panel, relation.parameter, band)
        if found.readings:
            label = parameters()[relation.parameter].label
            return replace(found, relation=relation, note=f"judged from {label}")
    return own


def _said(panel: Panel, key: str, band: Band | None) -> Offer:
    mine = tuple(r for r in panel.readings if r.parameter == key)
    if band is not None:
        mine = tuple(r for r in mine if r.band == band) or tuple(r for r in mine if r.band is None)
    statements = tuple(s for s in panel.statements if s.parameter == key and s.band in (None, band))
    return Offer(
        band=band,
        readings=tuple(r for r in mine if r.certain),
        ambiguous=tuple(r for r in mine if not r.certain),
        statements=statements,
    )


def _merged(found: list[Offer]) -> Iterator[Offer]:
    """Bands answered by the very same cells are one row: a figure stated once for the panel."""
    if len(found) > 1 and len({_cells(offer) for offer in found}) == 1:
        yield replace(found[0], band=None)
    else:
        yield from found


def _cells(offer: Offer) -> tuple[str, ...]:
    readings = (r.where for r in (*offer.readings, *offer.ambiguous))
    return tuple(str(where) for where in (*readings, *(s.where for s in offer.statements)))
