"""The cells of one row that qualify its values: units, condition, tolerance, band."""

from __future__ import annotations

import re
from dataclasses import dataclass, field, replace

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.columns import VALUE_ROLES, Column
from speccheck.intake.tables.labels import Label, Labels
from speccheck.intake.tables.words import bound_of
from speccheck.quantities import read_cell

_BRACKETED = re.compile(r"\s*[(\[][^()\[\]]*[)\]]|\s*,?\s*°\s*$")
_BOUNDS = {"minimum": "min", "maximum": "max", "typical": "typ"}
_MEASURED = ("number", "range", "scan", "count", "size")


@dataclass(slots=True)
class RowCells:
    """Qualifying cells of a row; units and tolerances by column, as a table may have several such columns."""

    condition: Cell | None = None
    lead: str = ""
    tolerances: dict[int, Cell] = field(default_factory=dict)
    band: Cell | None = None
    units: dict[int, Cell] = field(default_factory=dict)
    asides: list[Cell] = field(default_factory=list)
    bounds: dict[int, Cell] = field(default_factory=dict)

    @property
    def condition_text(self) -> str:
        """Text of the condition cell, with the word its column leads it with."""
        return f"{self.lead}{self.condition.text}" if self.condition else ""

    def conditions(self, column: Column) -> str:
        """What a figure is said of beside its band: condition cell, heading of its column, remarks."""
        said = find_bands(self.condition_text)
        own = said.rest if said.proved else self.condition_text
        return "; ".join(filter(None, (own, column.condition, *(cell.text for cell in self.asides))))

    @property
    def first_unit(self) -> str:
        """The unit of the row, before its value columns are told apart."""
        return next((cell.text for cell in self.units.values()), "")

    def tolerance(self, column: Column) -> Cell | None:
        """The tolerance of a column: the next one after it, or the only one of the row's table."""
        return _of_column(self.tolerances, column)

    def bound(self, column: Column) -> str:
        """``min``, ``max`` or ``typ`` where a cell beside the figure says only that, else empty."""
        cell = _of_column(self.bounds, column)
        return _BOUNDS.get(bound_of(cell.text), "") if cell is not None else ""

    def unit(self, column: Column) -> str:
        """The unit that holds for a column: of several the nearest, after it rather than before it."""
        if not self.units:
            return column.unit
        nearest = min(self.units, key=lambda index: (abs(index - column.index), index < column.index))
        return self.units[nearest].text


def _of_column(cells: dict[int, Cell], column: Column) -> Cell | None:
    """Of the cells that qualify the figures of a row the next one after a column, or the only one."""
    after = [index for index in cells if index > column.index]
    return cells[min(after)] if after else next(iter(cells.values()), None)


def row_cells(grid: Grid, columns: dict[int, Column], row: int) -> RowCells:
    """Find the qualifying cells of a row; a merged unit or band holds for all rows it covers."""
    found = RowCells()
    conditions: list[Cell] = []
    demands = any(column.role == "required" for column in columns.values())  # what is bounded is the demand
    for index, column in columns.items():
        if column.role in ("unit", "band") and (column.role != "band" or column.band is None):
            cell = grid.covering(row, index)
            if cell is not None and column.role == "unit":
                found.units[index] = cell
            elif cell is not None:
                found.band = found.band or cell
        elif column.role in ("condition", "tolerance", "bound"):
            cell = grid.cells.get((row, index))
            if cell is not None and column.role == "condition":
                conditions.append(cell)
            elif cell is not None and not (demands and column.role == "bound"):
                (found.tolerances if column.role == "tolerance" else found.bounds)[index] = cell
    if conditions:
        found.condition, found.lead = conditions[0], columns[conditions[0].column].lead
    return found


def asides_of(columns: dict[int, Column], label: Label, beside: list[Cell]) -> list[Cell]:
    """Words in a column without a heading, behind the figure of a row: 'mid tilt' remarks on a gain."""
    values = [c for c in beside if (k := columns.get(c.column)) is not None and k.role in VALUE_ROLES]
    kind = parameters()[label.parameters[0]].kind
    if kind not in _MEASURED or len(values) < 2 or not _has_figure(values[0]):
        return []
    return [
        cell
        for cell in values[1:]
        if isinstance(cell.raw, str)
        and not (_has_figure(cell) or columns[cell.column].cells or columns[cell.column].band)
        and any(map(str.isalpha, cell.text))
        and read_cell(cell.raw, kind=kind).status is None
    ]


def _has_figure(cell: Cell) -> bool:
    return not isinstance(cell.raw, str) or any(map(str.isdigit, cell.text))


def joined_label(labels: Labels, label: Label | None, condition: Cell | None, group: str = "") -> Label:
    """A label with its condition: 'Radiator pitch' and 'horizontal' name a parameter together.

    A label that says nothing alone may do so behind its group: 'Beamwidth' and 'Horizontal'.
    """
    if label is not None and not label and group and (grouped := labels.of(f"{group} {label.text}")):
        label = grouped
    if condition is None or is_band_label(condition.text):
        return label or Label("")
    if label is not None and label.text:
        for text in (f"{label.text} {condition.text}", f"{label.text}, {condition.text}"):
            joined = labels.of(text)
            if joined:
                return joined
        if label:
            return label
    return labels.of(condition.text)


def in_plane(labels: Labels, label: Label, plane: str) -> Label:
    """A label with the plane that the heading of a column adds: 'Beamwidth (°)' under 'Vertical'."""
    if not plane:
        return label
    bare = _BRACKETED.sub("", label.text).strip().removesuffix(label.unit or " ").strip(" ,")
    texts = (f"{text}{link}{plane}" for text in (label.text, bare) for link in (" ", ", "))
    found = next((joined for text in texts if (joined := labels.of(text))), label)
    return replace(found, unit=found.unit or label.unit, text=label.text)
