"""Claims: a value cell with everything that says what it means, before it is read."""

from __future__ import annotations

from dataclasses import dataclass, field

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.labels import Label
from speccheck.records import Band


@dataclass(frozen=True, slots=True)
class Context:
    """What a value cell inherits from its row and column. Equal contexts read equal cells equally."""

    label: Label
    unit: str = ""
    condition: str = ""
    statistic: str = ""
    heading: str = ""
    band_name: str = ""


@dataclass(slots=True)
class Claim:
    """One value cell, or a part of one (`text`), said of one band or of the whole panel."""

    cell: Cell
    context: Context
    band: Band | None = None
    text: str | None = None
    banded: bool = False
    tolerance: Cell | None = None


@dataclass(slots=True)
class Draft:
    """A panel being collected; `joined` are pieces found elsewhere, often on other sheets."""

    name: str
    grid: Grid
    where: Cell
    claims: list[Claim] = field(default_factory=list)
    named: bool = False
    bands: list[Band] = field(default_factory=list)
    joined: list[Draft] = field(default_factory=list)

    def pieces(self) -> list[Draft]:
        """This draft and all joined to it."""
        return [self, *(piece for other in self.joined for piece in other.pieces())]

    def keys(self) -> set[str]:
        """Parameters claimed so far."""
        return {
            key for piece in self.pieces() for claim in piece.claims for key in claim.context.label.parameters
        }


@dataclass(frozen=True, slots=True)
class Declared:
    """One row of a form: what is asked, offered and declared."""

    required: Cell
    offered: Cell
    said: Cell
    context: Context


@dataclass(frozen=True, slots=True)
class Doubt:
    """Something in a reading that does not hang together; `weight` is 1 where it spoils the whole sheet.

    `no_names` are cells that gave names and cannot, `names` those that perhaps had better not. `misplaced`
    figures stand under headings they cannot belong to.
    """

    text: str
    cells: tuple[Cell, ...]
    weight: float
    no_names: tuple[Cell, ...] = ()
    names: tuple[Cell, ...] = ()
    misplaced: bool = False


@dataclass(slots=True)
class SheetResult:
    """What the layout stage hands over for one sheet: drafts, and the role of each cell it placed."""

    grid: Grid
    drafts: list[Draft] = field(default_factory=list)
    roles: dict[tuple[int, int], str] = field(default_factory=dict)
    unread: list[tuple[Cell, str, str]] = field(default_factory=list)
    declared: list[Declared] = field(default_factory=list)
    doubts: list[Doubt] = field(default_factory=list)
    _walked: int = 0

    def mark_claims(self) -> None:
        """Say of every claim of the tables just walked that its cell is taken; reading gives the last word.

        A walk adds drafts and leaves those of earlier walks alone, so each claim is marked once.
        """
        for draft in self.drafts[self._walked :]:
            for claim in draft.claims:
                self.roles.setdefault((claim.cell.row, claim.cell.column), "claimed")
        self._walked = len(self.drafts)

    def mark(self, cell: Cell, role: str) -> None:
        """Say what a cell was taken for; the first word stands."""
        self.roles.setdefault((cell.row, cell.column), role)
