"""Where the walk down a table with parameters down the side stands."""

from __future__ import annotations

from dataclasses import dataclass, replace

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.down.bands import NamedBand
from speccheck.intake.tables.labels import Label, Labels
from speccheck.records import Band

_DETAILED = frozenset({"weight", "weight_with_brackets"})
_FARTHEST = 3


@dataclass(slots=True)
class Standing:
    """The label of the row, the band and group above it, and a title that may begin a panel."""

    label: Label | None = None
    label_bottom: int = 0
    section_band: Band | None = None
    section_name: str = ""
    side_band: Band | None = None
    side_name: str = ""
    side_bottom: int = 0
    beam: str = ""
    group: str = ""
    pending_title: Cell | None = None
    weight: Cell | None = None
    """The last label that was 'Weight', which 'with brackets' in a row below details."""

    def take(self, cell: Cell, labels: Labels) -> None:
        """Take in the label of a row; one that says nothing alone may detail the weight just above."""
        self.label = labels.of(cell.text)
        if self.label:
            self.weight = cell if self.label.parameters == ("weight",) else None
        elif self.weight is not None and cell.row - self.weight.row < _FARTHEST:
            above = labels.of(self.weight.text)
            name = self.weight.text.partition("(")[0].partition(",")[0].strip()
            found = labels.of(f"{name} {cell.text.strip(' -–•*')}")
            if found and _DETAILED.issuperset(found.parameters):
                self.label = replace(found, unit=found.unit or above.unit)

    @property
    def band(self) -> NamedBand:
        """The band a row has from its surroundings: from words at its side, else from those above it."""
        if self.side_name:
            return self.side_band, "" if self.side_band else self.side_name
        return self.section_band, "" if self.section_band else self.section_name
