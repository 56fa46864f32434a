"""Figures that the first of a panel's rows gives for the whole panel."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Collection, Mapping

from speccheck.intake.files.grid import Grid
from speccheck.intake.tables.across.bands import RowBand
from speccheck.intake.tables.across.fields import Field
from speccheck.intake.tables.claims import Claim, Draft

Rows = Mapping[int, RowBand]
"""Rows of one panel, each with its band."""
_OF_PANEL = frozenset(
    {"rf_ports", "connector_type", "panel_type", "max_power_total", "transceivers", "csi_rs_ports"}
)
"""Stated once they are said of the whole panel, whatever the other panels of the table do."""


def settle_whole(
    grid: Grid, panels: Collection[tuple[Draft, Rows]], fields: Mapping[int, Field], others: Collection[int]
) -> None:
    """Take the band from figures said of all bands of a panel; `others` are columns that tell rows apart.

    A figure merged down over all rows of a panel is said of the whole panel, over some of them of each of
    their bands. So is one in the first row only, in a column that every panel fills in its first row only:
    merges get lost on the way through other formats.
    """
    several = [(draft, rows) for draft, rows in panels if len(set(rows.values())) > 1]
    placed = [(draft, rows, _by_column(draft, rows, others)) for draft, rows in several]
    seldom = _filled_once(placed)
    for draft, rows, columns in placed:
        for index, claims in columns.items():
            once = len(claims) == 1 and claims[0].cell.row == min(rows)
            of_panel = fields[index].label.parameters[0] in _OF_PANEL
            if once and (index in seldom or of_panel):
                _unband(claims[0], fields[index])
            elif grid.spans:
                for claim in claims:
                    _spread(grid, draft, claim, rows, fields[index])


def _by_column(draft: Draft, rows: Rows, others: Collection[int]) -> dict[int, list[Claim]]:
    found: dict[int, list[Claim]] = defaultdict(list)
    for claim in draft.claims:
        if claim.banded and claim.cell.column not in others and claim.cell.row in rows:
            found[claim.cell.column].append(claim)
    return found


def _filled_once(placed: list[tuple[Draft, Rows, dict[int, list[Claim]]]]) -> set[int]:
    """Columns that each panel of several rows fills in its first row only."""
    used = {index for _, _, columns in placed for index in columns}
    return {
        index
        for index in used
        if all(
            [claim.cell.row for claim in columns[index]] == [min(rows)]
            for _, rows, columns in placed
            if index in columns
        )
    }


def _spread(grid: Grid, draft: Draft, claim: Claim, rows: Rows, found: Field) -> None:
    span = grid.span(claim.cell)
    covered = {said: row for row, said in rows.items() if span.top <= row <= span.bottom}
    if len(covered) < 2:
        return
    if len(covered) == len(set(rows.values())):
        _unband(claim, found)
        return
    draft.claims += [
        Claim(claim.cell, claim.context, said.band, claim.text, banded=True)
        for said in covered
        if said.band != claim.band
    ]


def _unband(claim: Claim, found: Field) -> None:
    claim.band, claim.banded, claim.context = None, False, found.context
