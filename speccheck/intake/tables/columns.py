"""What the heading rows above a table say of each of its columns."""

from __future__ import annotations

import re
from dataclasses import dataclass, field

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.beams import is_beam_name
from speccheck.intake.tables.heading_conditions import condition_of_heading, says_plane, says_tilt
from speccheck.intake.tables.labels import FREQUENCY_KEYS, SLACK_ALONE, Label, Labels, is_unit, statistic_of
from speccheck.intake.tables.words import column_leaning, column_role
from speccheck.records import Band

PLANE_LETTERS = ("H", "V")
"""Over a column they mean horizontal and vertical, not hours and volts."""
VALUE_ROLES = frozenset({"", "offered", "panel", "typical", "minimum", "maximum", "parameter"})
"""Roles of columns whose cells may be claims; an empty role is a column named after a panel or band."""

_SLACK = re.compile(r"(?:±|\+/-)\s*(.+)")


@dataclass(slots=True)
class Column:
    """One column of a table: the heading cells over it and what they say."""

    index: int
    cells: list[Cell] = field(default_factory=list)
    role: str = ""
    words: list[str] = field(default_factory=list)
    name_cell: Cell | None = None
    band: Band | None = None
    band_name: str = ""
    band_cell: Cell | None = None
    wider: Band | None = None
    statistic: str = ""
    unit: str = ""
    condition: str = ""
    plane: str = ""
    beam: str = ""
    guessed: bool = False
    """Whether the role of a column of unknown heading was told by its cells alone."""
    lead: str = ""
    """Word before the cells of a column of conditions that only its heading says."""
    frequency: Cell | None = None
    frequency_unit: str = ""
    """Unit of the ranges below a heading such as 'Frequency range [GHz]'."""

    def take_band(self, band: Band | None, cell: Cell) -> None:
        """Take in the band of a heading cell; one above that contains it stays as the wider band."""
        above = self.band
        if above and band and above != band and above[0] <= band[0] and band[1] <= above[1]:
            self.wider = above
        self.band, self.band_cell = band, cell

    @property
    def name(self) -> str:
        """Words of the headings that are neither band, unit nor role: a panel's name, if anything."""
        return " ".join(self.words)

    @property
    def heading(self) -> str:
        """All heading texts, top to bottom."""
        return " / ".join(dict.fromkeys(" ".join(cell.text.split()) for cell in self.cells))


def heading_stack(grid: Grid, rows: list[int], column: int, left: int) -> list[Cell]:
    """Heading cells over a column, top to bottom; a heading over several columns counts for each.

    A heading that is not merged reaches to the next filled cell of its row or of one above; the lowest row
    heads its own columns only.
    """
    stack: list[Cell] = []
    for row in rows:
        cell = grid.covering(row, column)
        own = any(above.column == column for above in stack)
        if cell is None and not own and row != rows[-1] and grid.covering(rows[-1], column) is not None:
            first = max([left, column - 12, *(above.column for above in stack)])
            for before in range(column - 1, first - 1, -1):
                cell = grid.cells.get((row, before))
                if cell is not None:
                    merged = grid.spans.get((row, before))
                    cell = (
                        None if merged or column_role(cell.text) in ("parameter", "unit", "number") else cell
                    )
                    break
        if cell is not None and cell not in stack:
            stack.append(cell)
    return stack


def describe(index: int, stack: list[Cell], labels: Labels) -> Column:
    """Sort the heading texts over a value column into band, unit, statistic, role and panel name."""
    column = Column(index, stack)
    for cell in stack:
        _take(column, cell, labels)
    if column.role == "band" and (column.band or column.band_name):
        column.role = ""
    if column.lead and column.condition:
        column.role, column.lead = "", ""
    if column.frequency is not None and column.band is None:
        column.band, column.band_cell = labels.of(column.frequency.text).bands.hull, column.frequency
        column.frequency = None
    return column


def _take(column: Column, cell: Cell, labels: Labels) -> None:
    text = " ".join(cell.text.split())
    statistic = statistic_of(text)
    role = column_role(text) or column_leaning(text)
    slack = _SLACK.fullmatch(text)
    condition = condition_of_heading(text, labels)
    if is_beam_name(text) and set(labels.of(text).parameters) <= {"beam_count"}:
        column.beam = text
    elif text in PLANE_LETTERS:
        column.plane = text
    elif condition:
        column.condition = "; ".join(filter(None, (column.condition, condition)))
    elif slack and is_unit(slack[1]):
        column.role, column.unit = "tolerance", slack[1]
    elif SLACK_ALONE.fullmatch(text):
        column.unit = f"{column.unit} {text}".strip()  # below the unit: 'dBi' over '±0.5'
    elif role == "unit":
        column.role = role
    elif is_unit(text):
        column.unit = text
    elif statistic:
        column.statistic = statistic
        column.role = column.role or {"min": "minimum", "typ": "typical", "max": "maximum"}[statistic]
    elif role:
        column.role = role
        bands = find_bands(text)
        if bands.spans and bands.proved:
            column.band, column.band_cell = bands.hull, cell
    else:
        _take_subject(column, cell, labels, text)


def _take_subject(column: Column, cell: Cell, labels: Labels, text: str) -> None:
    """A heading that says what its figures are of: a band, a plane, a tilt, or a panel by name."""
    if says_tilt(text, labels):
        column.role, column.lead = "condition", "tilt "
    elif _is_frequency_heading(labels.of(text)):
        column.frequency = cell
    elif set(labels.of(text).parameters or ("",)) <= FREQUENCY_KEYS:
        column.frequency_unit = labels.of(text).unit
    elif column.frequency_unit and find_bands(f"{text} {column.frequency_unit}").spans:
        _take_band(column, cell, f"{text} {column.frequency_unit}")
    elif is_band_label(text):
        _take_band(column, cell, text)
    elif says_plane(text, labels):
        column.plane = text
    else:
        _take_name(column, cell, text)


def _take_band(column: Column, cell: Cell, text: str) -> None:
    bands = find_bands(text)
    if bands.spans and bands.connected:
        column.take_band(bands.hull, cell)
        text = bands.rest if not bands.names else text
    column.band_name = " ".join(filter(None, (column.band_name, text.strip(" ()[]:,-–"))))


def _take_name(column: Column, cell: Cell, text: str) -> None:
    bands = find_bands(text)
    unit = re.search(r"\s*[(\[]([^()\[\]]+)[)\]]\s*$", text)
    if bands.spans and bands.proved:
        column.take_band(bands.hull, cell)
        text = bands.rest.strip(" ()[]:,-–")
    elif unit and is_unit(unit[1]):
        column.unit, text = unit[1], text[: unit.start()]
    if text:
        column.words.append(text)
        column.name_cell = cell


def _is_frequency_heading(label: Label) -> bool:
    return (
        bool(label.bands.spans)
        and set(label.parameters) <= {"frequency_range", "operating_bands"}
        and bool(label)
    )
