"""Where the walk down a table with parameters down the side stands."""

from __future__ import annotations

from dataclasses import dataclass

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.down_bands import NamedBand
from speccheck.intake.tables.labels import Label
from speccheck.records import Band


@dataclass(slots=True)
class Standing:
    """The label of the row, the band and group above it, and a title that may begin a panel."""

    label: Label | None = None
    label_row: int = 0
    label_bottom: int = 0
    section_band: Band | None = None
    section_name: str = ""
    side_band: Band | None = None
    side_name: str = ""
    side_bottom: int = 0
    group: str = ""
    pending_title: Cell | None = None

    @property
    def band(self) -> NamedBand:
        """The band a row has from its surroundings: from words at its side, else from those above it."""
        if self.side_name:
            return self.side_band, "" if self.side_band else self.side_name
        return self.section_band, "" if self.section_band else self.section_name
