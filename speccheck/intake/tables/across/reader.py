"""Tables with headings across: one row a panel, or a panel and band."""

from __future__ import annotations

import re
from dataclasses import dataclass, field, replace

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.across.bands import RowBand, band_of
from speccheck.intake.tables.across.families import families, settle_families
from speccheck.intake.tables.across.fields import Field, describe_fields, find_guides, unit_of
from speccheck.intake.tables.across.pairs import band_of_pair, pair_with_bands
from speccheck.intake.tables.across.regions import Across, cells_of
from speccheck.intake.tables.across.unknown import report_unknown
from speccheck.intake.tables.across.whole import settle_whole
from speccheck.intake.tables.bands import band_of_title, find_bands, is_band_label
from speccheck.intake.tables.beams import of_beam, said_apart
from speccheck.intake.tables.claims import Claim, Context, Draft, SheetResult
from speccheck.intake.tables.edges import band_between
from speccheck.intake.tables.labels import Label
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.naming import Names, model_name
from speccheck.intake.tables.repeats import is_ditto, meant
from speccheck.intake.tables.words import is_aside_of_table
from speccheck.records import Band

_EXAMPLE = re.compile(r"\s*example\b", re.IGNORECASE)
_SILENT_ROLES = {"remark": "note", "number": "label", "group": "label", "level": "label", "required": "label"}
_ABOVE = 2
"""Rows above the headings in which a title may give the band of a table."""


@dataclass(slots=True)
class _Row:
    """The panel and band the walk stands at."""

    draft: Draft | None = None
    said: RowBand = field(default_factory=RowBand)
    known: bool = False
    """Whether the row is about one band."""
    note: str = ""
    """What all figures of the row are said of: the nickname of its band, its tilt."""


@dataclass(slots=True)
class _Known:
    """A panel met before, and the rows about it."""

    draft: Draft
    rows: dict[int, RowBand] = field(default_factory=dict)
    said: set[tuple[RowBand, str]] = field(default_factory=set)


class AcrossReader:
    """Walks one table from its first data row to its last."""

    def __init__(self, marks: Marks, table: Across, result: SheetResult, names: Names) -> None:
        self._marks, self._table, self._result, self._names = marks, table, result, names
        self._grid: Grid = marks.grid
        self._fields: dict[int, Field] = {}
        self._contexts: dict[tuple[int, str], Context] = {}
        self._families: list[int] = []
        self._known: dict[str, _Known] = {}
        self._panels: list[_Known] = []
        self._section = RowBand()
        self._section_cell: Cell | None = None
        self._section_context: Context | None = None
        self._title: Cell | None = None
        self._at = _Row()

    def read(self) -> None:
        """Place every cell of the table and collect its claims."""
        self._fields = describe_fields(self._marks, self._table)
        pair_with_bands(self._marks, self._table, self._fields)
        for row in [*self._table.heading_rows, *self._table.repeated]:
            for cell in cells_of(self._marks, self._table, row):
                self._result.mark(cell, "heading")
        self._guides = find_guides(self._marks, self._table, self._fields)
        self._families = settle_families(self._grid, self._table, self._fields, self._guides.named)
        self._section_above()
        for row in self._table.data_rows:
            self._row(row, cells_of(self._marks, self._table, row))
        panels = [(known.draft, known.rows) for known in self._panels]
        settle_whole(self._grid, panels, self._fields, self._guides.of_bands)
        report_unknown(self._marks, self._table, self._fields, self._result)

    def _section_above(self) -> None:
        """A band alone in a row just above the headings, or as name of the sheet, holds for all rows.

        Not where columns or headings tell of bands.
        """
        guides = self._guides
        if guides.of_bands or guides.overall or any(found.banded for found in self._fields.values()):
            return
        if is_band_label(self._grid.name) and not self._names.is_file(self._grid.name):
            self._section = RowBand(find_bands(self._grid.name).hull, self._grid.name)
        top = self._table.heading_rows[0]
        for row in range(top - 1, max(0, top - 1 - _ABOVE), -1):
            cells = cells_of(self._marks, self._table, row)
            if len(cells) > 1 or any((row, c.column) in self._result.roles for c in cells):
                return
            if cells and (said := band_of_title(cells[0].text, self._names.is_title)):
                self._section, self._section_cell = RowBand(*said), cells[0]
                self._result.mark(cells[0], "heading")
                return

    def _row(self, row: int, cells: list[Cell]) -> None:
        if _EXAMPLE.match(cells[0].text):
            self._result.mark(cells[0], "example")
            for cell in cells[1:]:
                self._result.mark(cell, "label")
            return
        if row in self._table.groups or self._heads_rows(cells):
            for cell in cells:
                self._result.mark(cell, "heading")
            if not is_aside_of_table(cells[0].text):
                self._group(row, cells[0])
            return
        self._place(row, cells)
        draft = self._at.draft
        if draft is None:
            return
        if self._families:
            cells = [*cells, *families(self._grid, self._families, row)]
        for cell in cells:
            if cell.column != self._guides.named:
                self._claim(cell, draft)

    def _heads_rows(self, cells: list[Cell]) -> bool:
        """Whether a cell alone in its row stands where no figure may."""
        if len(cells) > 1 or len(self._fields) < 3:
            return False
        known = self._fields.get(cells[0].column)
        aside = cells[0].column in (self._guides.named, self._table.left)
        return known is None or not known.label or aside

    def _group(self, row: int, cell: Cell) -> None:
        """A title over the rows that follow: their band, their panel, or words that only group them."""
        said = band_of_title(cell.text, self._names.is_title)
        self._section, self._title = RowBand(*said) if said else RowBand(), None
        self._section_cell = cell if said else None
        self._at = _Row()
        if said is None and self._guides.named and cell.column == self._guides.named:
            self._start_panel(row, cell)
        elif said is None and not self._guides.named and self._names.is_title(cell.text):
            self._title = cell if self._marks.may_name(cell) else None

    def _place(self, row: int, cells: list[Cell]) -> None:
        guides, fields = self._guides, self._fields
        name_cell = self._grid.cells.get((row, guides.named)) if guides.named else None
        if name_cell is not None:
            name_cell = meant(self._grid, name_cell)
        said = band_of(
            self._meant(row, guides.banded),
            self._meant(row, guides.nicknamed),
            unit_of(fields[guides.banded]) if guides.banded else "",
        )
        if guides.edges[0] and not said.band:
            heading = fields[guides.edges[0]].column.heading
            said = RowBand(band_between(self._grid, row, guides.edges, heading), said.name)
        if not said.said:
            said = self._section
        tilt = said_apart(self._grid, guides.beamed, guides.tilted, row)
        if tilt and name_cell is None and not said.said:
            said = self._at.said
        if name_cell is not None:
            self._result.mark(name_cell, "heading")
            known = self._known.get(model_name(name_cell.text))
            if known and (said.said or tilt) and (said, tilt) not in known.said:
                self._at = _Row(known.draft)
            else:
                self._start_panel(row, name_cell)
        elif self._at.draft is None or not guides.tell_panels:
            self._start_panel(row, cells[0])
        self._at.said, self._at.known = said, said.known
        self._at.note = f"{said.name} {tilt}".strip() if tilt else said.name
        draft = self._at.draft
        if draft is not None:
            known = self._known[draft.name]
            known.rows[row] = said
            known.said.add((said, tilt))
            if said.band and said.band not in draft.bands:
                draft.bands.append(said.band)
                if said.band == self._section.band and self._section_cell is not None:
                    self._claim_section(draft, self._section_cell, said.band)

    def _meant(self, row: int, column: int) -> Cell | None:
        cell = self._grid.covering(row, column) if column else None
        return meant(self._grid, cell) if cell is not None else None

    def _claim_section(self, draft: Draft, cell: Cell, band: Band) -> None:
        """The band that a title gives to the rows below it is claimed of each of their panels."""
        if self._section_context is None:
            label = Label("title of the rows below", ("operating_bands",), "MHz")
            self._section_context = Context(label, heading=label.text)
        text = f"{band[0]:g}-{band[1]:g} MHz"
        draft.claims.append(Claim(cell, self._section_context, band, text=text, banded=True))

    def _start_panel(self, row: int, cell: Cell) -> None:
        if self._guides.named and cell.column == self._guides.named:
            draft = Draft(model_name(cell.text), self._grid, cell, named=True)
        elif self._title is not None:
            draft = Draft(model_name(self._title.text), self._grid, self._title, named=True)
        else:
            draft = self._untitled(row, cell)
        self._result.drafts.append(draft)
        known = self._known[draft.name] = _Known(draft)
        self._panels.append(known)
        self._at = _Row(draft)

    def _untitled(self, row: int, cell: Cell) -> Draft:
        """The panel of rows that name none: the one of the title above, or one of several."""
        top = self._table.heading_rows[0]
        title = self._names.above(top, self._table.left, self._table.right, self._marks, self._result)
        several = len(self._table.data_rows) > 1 and not self._guides.tell_rows
        name = f"{title.name} row {row}" if several else title.name
        return Draft(name, self._grid, cell, named=title.certain)

    def _claim(self, cell: Cell, draft: Draft) -> None:
        found = self._fields.get(cell.column)
        if found is None:
            return
        if cell.column in self._guides.of_bands and self._only_guides(cell, draft):
            return
        column = found.column
        if isinstance(cell.raw, str) and is_ditto(cell.raw):
            cell = replace(meant(self._grid, cell), text=cell.text)
        if found.label.parameters:
            context, band, banded = found.context, column.band, found.banded
            if not found.of_frequency or column.index == self._guides.banded:
                context = self._noted(context, self._at.note) if self._at.note else context
                if self._at.known and not banded:
                    band, banded = self._at.said.band, True
            if found.pair:
                band = self._band_of_pair(cell, found, draft)
                banded = band is not None
            draft.claims.append(Claim(cell, context, band, None, banded))
            if column.band is not None and column.band not in draft.bands:
                draft.bands.append(column.band)
        elif cell.column in (self._guides.banded, self._guides.overall):
            self._claim_range(cell, draft, found)
        elif found.role in _SILENT_ROLES:
            self._result.mark(cell, _SILENT_ROLES[found.role])
        elif found.role == "tolerance" and draft.claims:
            draft.claims[-1].tolerance = cell
            self._result.mark(cell, "label")
        else:
            found.misses += 1
            self._result.mark(cell, "unread")

    def _band_of_pair(self, cell: Cell, found: Field, draft: Draft) -> Band | None:
        """The band that another cell of the row gives to this one alone."""
        band = band_of_pair(self._meant(cell.row, found.pair), self._fields[found.pair])
        if band is not None and band not in draft.bands:
            draft.bands.append(band)
        return band

    def _claim_range(self, cell: Cell, draft: Draft, found: Field) -> None:
        """Frequencies under a word such as 'Band': the band of a row, or the whole range of its panel."""
        if not find_bands(cell.text).spans:
            self._result.mark(cell, "label")
            return
        overall = cell.column == self._guides.overall
        key, band = ("frequency_range", None) if overall else ("operating_bands", self._at.said.band)
        label = Label(found.column.heading, (key,), found.column.unit or "MHz")
        context = Context(label, heading=found.column.heading)
        draft.claims.append(Claim(cell, context, band, banded=band is not None))

    def _only_guides(self, cell: Cell, draft: Draft) -> bool:
        """Whether a cell says nothing but the band of its row."""
        guides = self._guides
        if cell.column in guides.edges:
            self._claim_edge(cell, draft, self._at.said.band)
            return True
        silent = {guides.nicknamed, guides.tilted, guides.beamed, *guides.names_of_bands}
        if cell.column in silent or (cell.column == guides.banded and self._at.said.point):
            self._result.mark(cell, "label")
            return True
        return False

    def _claim_edge(self, cell: Cell, draft: Draft, band: Band | None) -> None:
        """The band of a row is claimed by the cell of its lower edge."""
        self._result.mark(cell, "unread" if band is None else "reading")
        if band is not None and cell.column == self._guides.edges[0]:
            heading = self._fields[cell.column].column.heading
            context = Context(Label(heading, ("operating_bands",), "MHz"), heading=heading)
            text = f"{band[0]:g}-{band[1]:g} MHz"
            draft.claims.append(Claim(cell, context, band, text=text, banded=True))

    def _noted(self, context: Context, name: str) -> Context:
        """A context with the nickname of the row's band, made once for each."""
        key = (id(context), name)
        if key not in self._contexts:
            noted = replace(context, condition=name)
            self._contexts[key] = of_beam(context, name) if self._guides.beamed else noted
        return self._contexts[key]
