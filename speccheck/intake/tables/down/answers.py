"""Declarations of compliance in the rows of a form, with what is asked and offered beside them."""

from __future__ import annotations

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.claims import Claim, Context, Declared, Draft, SheetResult
from speccheck.intake.tables.columns import VALUE_ROLES, Column
from speccheck.intake.tables.labels import Label
from speccheck.intake.tables.words import answer

_FORM = {
    "said": frozenset({"compliance"}),
    "required": frozenset({"required"}),
    "offered": VALUE_ROLES,
    "unit": frozenset({"unit"}),
}


def take_answers(
    grid: Grid,
    columns: dict[int, Column],
    row: int,
    label: Label | None,
    *,
    draft: Draft,
    result: SheetResult,
) -> None:
    """A declaration of compliance stands for an offer only where there is none."""
    cells = {role: _cells_of(grid, columns, row, roles) for role, roles in _FORM.items()}
    for said in cells["said"]:
        if label is None or answer(said.text) != "comply":
            continue
        context = Context(label, cells["unit"][0].text if cells["unit"] else "", heading=label.text)
        if not cells["offered"]:
            draft.claims.append(Claim(said, context, None))
        elif cells["required"]:
            result.declared.append(Declared(cells["required"][0], cells["offered"][0], said, context))


def _cells_of(grid: Grid, columns: dict[int, Column], row: int, roles: frozenset[str]) -> list[Cell]:
    found = (grid.cells.get((row, index)) for index, column in columns.items() if column.role in roles)
    return [cell for cell in found if cell is not None]
