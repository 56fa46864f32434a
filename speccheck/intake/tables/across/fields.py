"""What the columns of a table with headings across hold: figures of a parameter, names of panels, bands."""

from __future__ import annotations

import re
from collections import defaultdict
from dataclasses import dataclass, field

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.panels.told_by_value import label_by_values
from speccheck.intake.tables.across.bands import gives_frequencies, holds_nicknames, holds_spans
from speccheck.intake.tables.across.regions import Across
from speccheck.intake.tables.beams import hold_beams
from speccheck.intake.tables.claims import Context
from speccheck.intake.tables.columns import Column, heading_stack
from speccheck.intake.tables.composing import compose
from speccheck.intake.tables.edges import edge_columns
from speccheck.intake.tables.labels import FREQUENCY_KEYS, Label
from speccheck.intake.tables.marking import is_size_letter
from speccheck.intake.tables.marks import Marks

_NAME_KEYS = ("model", "panel_type", "part_number")
_LOOKED_AT = 40
_YEAR = re.compile(r"^(?!.*Hz).*?(?<![\d.,/–-])(20[12]\d)(?![\d.,/–-])", re.IGNORECASE)
_TILT = re.compile(r"\s*\d+(?:[.,]\d+)?\s*°?\s*")


@dataclass(slots=True)
class Field:
    """One column: what its cells claim."""

    column: Column
    label: Label
    context: Context
    role: str = ""
    misses: int = 0
    of_frequency: bool = False
    banded: bool = False
    pair: int = 0
    """The column that gives the band of these figures alone, where a row has several bands."""


@dataclass(slots=True)
class Guides:
    """Columns that say whom and what band a row is about; 0 where there is none.

    `overall` gives the whole range of a panel whose bands stand in the headings, `tilted` the tilt at which
    the figures of a row hold, `beamed` the beam.
    """

    named: int = 0
    banded: int = 0
    nicknamed: int = 0
    overall: int = 0
    tilted: int = 0
    beamed: int = 0
    names_of_bands: set[int] = field(default_factory=set)
    edges: tuple[int, int] = (0, 0)
    of_bands: frozenset[int] = frozenset()

    @property
    def tell_rows(self) -> bool:
        """Whether a column tells the rows of one panel apart: by band, array or beam."""
        return bool(self.banded or self.nicknamed or self.beamed)

    @property
    def tell_panels(self) -> bool:
        """Whether a column names the panels, or tells rows of one panel apart."""
        return bool(self.named) or self.tell_rows


def describe_fields(marks: Marks, table: Across) -> dict[int, Field]:
    """The columns of a table, from the headings over them and, failing those, from what they hold."""
    rows = [*table.heading_rows, *table.data_rows]
    within = {c.column for row in rows for c in marks.rows.get(row, ())}
    used = sorted(column for column in within if table.left <= column <= table.right)
    fields = {index: _describe(marks, table, index) for index in used}
    for found in _of_earlier_years(fields):
        found.label, found.role = Label(found.label.text), "superseded"
    return fields


def _of_earlier_years(fields: dict[int, Field]) -> list[Field]:
    """Columns such as 'Gain 2025' beside 'Gain' or 'Gain 2026': figures of an earlier year are no claims."""
    alike: dict[object, list[Field]] = defaultdict(list)
    for found in fields.values():
        if found.label:
            column = found.column
            key = (
                found.label.parameters,
                column.band or column.band_name,
                column.statistic,
                column.condition,
            )
            alike[key].append(found)
    earlier = []
    for several in alike.values():
        years = [_YEAR.search(found.column.heading) for found in several]
        newest = max((year[1] for year in years if year), default="")
        plain = not all(years)
        earlier += [f for f, y in zip(several, years, strict=True) if y and (plain or y[1] < newest)]
    return earlier


def _describe(marks: Marks, table: Across, index: int) -> Field:
    stack = heading_stack(marks.grid, table.heading_rows, index, table.left)
    letters = [c for c in stack if is_size_letter(c.text) and marks.is_heading(c)]
    # the letter W over a width is no unit
    label, column = compose(index, [c for c in stack if c not in letters], marks.labels)
    if letters:
        label, column.cells = marks.headings[letters[-1].row, letters[-1].column], stack
    if not label and column.role == "":
        below = cells_below(marks.grid, table, index)
        texts = [c.text for c in below]
        label = label_by_values(column.heading, texts, column.unit) or label
        if not label and column.unit in ("MHz", "GHz") and holds_spans(below, column.unit):
            how = f"heading '{column.heading}' over ranges in {column.unit}"
            label = Label(column.heading, ("frequency_range",), column.unit, how=how)
    if column.role == "tolerance" and column.unit:
        label = Label(column.heading)
    context = Context(
        label=label,
        unit=column.unit,
        condition=column.condition,
        statistic=column.statistic,
        heading=column.heading,
        band_name=column.band_name if column.band is None else "",
    )
    return Field(
        column,
        label,
        context,
        role="" if label else column.role,
        of_frequency=set(label.parameters) <= FREQUENCY_KEYS,
        banded=column.band is not None or bool(column.band_name),
    )


def cells_below(grid: Grid, table: Across, index: int) -> list[Cell]:
    """The first cells of a column."""
    rows = table.data_rows[:_LOOKED_AT]
    return [cell for row in rows if (cell := grid.cells.get((row, index))) is not None]


def unit_of(found: Field) -> str:
    """The unit of the frequencies in a column of bands."""
    return found.label.unit or found.column.unit or "MHz"


def find_guides(marks: Marks, table: Across, fields: dict[int, Field]) -> Guides:
    """Which columns name the panel and the band of a row."""
    grid = marks.grid
    naming = fields
    if marks.without.names:
        naming = {i: f for i, f in fields.items() if all(map(marks.may_name, cells_below(grid, table, i)))}
    beamed = next((i for i in fields if hold_beams(cells_below(grid, table, i))), 0)
    guides = Guides(
        _name_column(grid, table, {i: f for i, f in naming.items() if i != beamed}), beamed=beamed
    )
    columns = {i: cells_below(grid, table, i) for i in fields if i != guides.named}
    frequencies = [
        i
        for i in columns
        if _is_frequency(fields[i]) and not fields[i].pair and holds_spans(columns[i], unit_of(fields[i]))
    ]
    given = [i for i in frequencies if gives_frequencies(columns[i])]
    guides.names_of_bands = {i for i in frequencies if given and i not in given}
    narrow = [i for i in given or frequencies if fields[i].label.parameters[:1] != ("frequency_range",)]
    guides.banded = next(iter(narrow or given or frequencies), 0)
    if _name_several_bands(fields):
        guides.overall, guides.banded = guides.banded, 0
    guides.edges = edge_columns({i: fields[i].column.heading for i in columns})
    guides.nicknamed = next((i for i in columns if holds_nicknames(columns[i])), 0)
    guides.tilted = next((i for i in columns if _sets_rows_apart(grid, table, fields[i], guides)), 0)
    telling = {*guides.edges, *guides.names_of_bands, guides.nicknamed, guides.banded, guides.tilted, beamed}
    guides.of_bands = frozenset(telling - {0})
    return guides


def _sets_rows_apart(grid: Grid, table: Across, found: Field, guides: Guides) -> bool:
    """Whether a column of single tilts tells rows of the same panel and band apart."""
    if found.label.parameters != ("electrical_tilt",) or found.banded:
        return False
    seen: dict[object, set[str]] = {}
    name = band = ""
    for row in table.data_rows[:_LOOKED_AT]:
        cell = grid.cells.get((row, found.column.index))
        if cell is None or not _TILT.fullmatch(cell.text):
            return False
        named, banded = grid.cells.get((row, guides.named)), grid.cells.get((row, guides.banded))
        band = banded.text if banded is not None else "" if named is not None else band
        name = named.text if named is not None else name
        seen.setdefault((name, band), set()).add(cell.text)
    return any(len(tilts) > 1 for tilts in seen.values())


def _name_several_bands(fields: dict[int, Field]) -> bool:
    """Whether the headings part the figures by band, so that no row is about one band."""
    found = (f.column for f in fields.values() if f.banded and f.label and not f.of_frequency)
    return len({column.band or column.band_name for column in found}) > 1


def _is_frequency(found: Field) -> bool:
    of_label = bool(found.label) and found.of_frequency
    return found.role == "band" or (of_label and not found.context.statistic)


def _name_column(grid: Grid, table: Across, fields: dict[int, Field]) -> int:
    for key in _NAME_KEYS:
        named = [i for i, f in fields.items() if f.label.parameters[:1] == (key,)]
        if key == "panel_type":
            named = [i for i in named if not _groups_numbered(grid, table, fields, i)]
        if named:
            return next((i for i in named if _holds_words(cells_below(grid, table, i))), named[0])
    roles = [i for i, f in fields.items() if f.role == "panel"]
    return roles[0] if roles else _unlabelled_text_column(grid, table, fields)


def _groups_numbered(grid: Grid, table: Across, fields: dict[int, Field], index: int) -> bool:
    """Whether a column names families of panels, each with a part number of its own in every row."""
    families = {cell.text for cell in cells_below(grid, table, index)}
    numbered = (i for i, f in fields.items() if f.label.parameters[:1] == ("part_number",))
    return any(len({cell.text for cell in cells_below(grid, table, i)}) > len(families) for i in numbered)


def _holds_words(cells: list[Cell]) -> bool:
    return bool(cells) and all(isinstance(c.raw, str) for c in cells)


def _unlabelled_text_column(grid: Grid, table: Across, fields: dict[int, Field]) -> int:
    for index, found in fields.items():
        if not found.label and found.role in ("", "parameter", "offered", "typical"):
            cells = cells_below(grid, table, index)
            if _holds_words(cells) and all(any(map(str.isalpha, c.text)) for c in cells):
                return index
    numbers = [i for i, f in fields.items() if f.role == "number"]
    return numbers[0] if numbers else 0
