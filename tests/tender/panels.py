"""Panels made by hand for the tests of the tender; each reading has a cell of its own."""

from __future__ import annotations

import itertools
from typing import Any

from speccheck.dictionary import parameters
from speccheck.records import (
    Band,
    CellRef,
    Level,
    Panel,
    Reading,
    Requirement,
    Sense,
    Settings,
    Statement,
    Status,
    Tender,
    Value,
)

_ROWS = itertools.count(2)


def cell() -> CellRef:
    """A cell not used before."""
    return CellRef("bid.xlsx", "Panels", f"D{next(_ROWS)}")


def says(parameter: str, value: Value, raw: str = "", *, band: Band | None = None, **more: Any) -> Reading:
    """A reading in the dictionary's unit; `raw` is what stood in the cell."""
    unit = more.pop("unit", parameters()[parameter].unit)
    sense = Sense(more.pop("sense", "nominal"))
    return Reading(
        where=cell(),
        parameter=parameter,
        raw=raw or str(value),
        value=value,
        unit=unit,
        band=band,
        sense=sense,
        **more,
    )


def answers(parameter: str, raw: str, status: Status, *, band: Band | None = None) -> Statement:
    """A cell without a figure."""
    return Statement(where=cell(), parameter=parameter, raw=raw, status=status, band=band)


def panel(*said: Reading | Statement, name: str = "Aster 8", file: str = "aster.xlsx") -> Panel:
    """A panel of such cells."""
    return Panel(
        name=name,
        where=CellRef(file, "Panels", "A2"),
        readings=tuple(s for s in said if isinstance(s, Reading)),
        statements=tuple(s for s in said if isinstance(s, Statement)),
    )


def demand(
    parameter: str, operator: str, limit: Value | None, unit: str | None = None, **more: Any
) -> Requirement:
    """A requirement in the dictionary's unit unless another is given."""
    return Requirement(
        where=CellRef("tender.xlsx", "Requirements", "B2"),
        clause=more.pop("clause", "1"),
        wording=more.pop("wording", f"{parameter} {operator} {limit}"),
        level=more.pop("level", Level.MANDATORY),
        parameter=parameter,
        operator=operator,
        limit=limit,
        unit=parameters()[parameter].unit if unit is None else unit,
        statistic=more.pop("statistic", "each"),
        **more,
    )


def tender(*requirements: Requirement, deviations: tuple[Any, ...] = (), **settings: Any) -> Tender:
    """A tender of such requirements."""
    return Tender(
        file="tender.xlsx",
        sha256="0" * 64,
        requirements=requirements,
        deviations=deviations,
        settings=Settings(**settings),
    )
