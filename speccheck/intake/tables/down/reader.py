"""Tables with parameters down the side: one panel, several bands or several panels across."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.panels.told_by_value import label_by_values
from speccheck.intake.tables.bands import band_of_title, find_bands, is_band_label
from speccheck.intake.tables.beams import is_beam_name, of_beam
from speccheck.intake.tables.claims import Claim, Context, SheetResult
from speccheck.intake.tables.columns import VALUE_ROLES, Column
from speccheck.intake.tables.down.answers import take_answers
from speccheck.intake.tables.down.bands import NamedBand, band_of_row, lone_nickname
from speccheck.intake.tables.down.headings import (
    describe_columns,
    extend,
    find_headings,
    find_name_column,
    numbering_columns,
)
from speccheck.intake.tables.down.panels import NAME_KEYS, DownPanels
from speccheck.intake.tables.down.regions import Down, cells_between
from speccheck.intake.tables.down.row import RowCells, asides_of, in_plane, joined_label, row_cells
from speccheck.intake.tables.down.standing import Standing
from speccheck.intake.tables.down.titles import stated_below, waiting_title
from speccheck.intake.tables.labels import Label
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.naming import Names, model_name
from speccheck.intake.tables.words import without_number


class DownReader:
    """Walks one table from its headings to its last row."""

    def __init__(self, marks: Marks, table: Down, result: SheetResult, names: Names) -> None:
        self._marks, self._table, self._result, self._names = marks, table, result, names
        self._grid: Grid = marks.grid
        self._columns: dict[int, Column] = {}
        self._heading_rows: list[int] = []
        self._state = Standing()
        self._numbering: set[int] = set()
        self._place_in_band = ""

    def read(self) -> None:
        """Place every cell of the table and collect its claims."""
        self._heading_rows = find_headings(self._marks, self._table, self._result)
        extend(self._marks, self._table, self._result)
        self._columns = describe_columns(self._marks, self._table, self._heading_rows, self._result)
        self._panels = DownPanels(self._marks, self._table, self._columns, self._result)
        self._panels.open(self._names, self._heading_rows)
        self._numbering = numbering_columns(self._marks, self._table, self._heading_rows)
        self._panels.name_column = find_name_column(self._marks, self._table, self._heading_rows)
        self._section_above()
        self._place_in_band = lone_nickname(self._conditions())
        first = (self._heading_rows[-1] + 1) if self._heading_rows else self._table.top
        for row in range(min(first, self._table.top), self._table.bottom + 1):
            cells = [
                c for c in self._marks.rows.get(row, ()) if self._table.left <= c.column <= self._table.right
            ]
            if cells:
                self._row(row, cells)

    def _conditions(self) -> Iterator[Cell]:
        columns = [index for index, column in self._columns.items() if column.role == "condition"]
        for row in range(self._table.top, self._table.bottom + 1):
            yield from filter(None, (self._grid.cells.get((row, index)) for index in columns))

    def _row(self, row: int, cells: list[Cell]) -> None:
        state, table = self._state, self._table
        beside = [c for c in cells if c.column > table.label_column]
        label_cell = self._grid.cells.get((row, table.label_column))
        left = [c for c in cells if c.column < table.label_column]
        if label_cell is None and beside and (own := [c for c in left if self._marks.is_heading(c)]):
            label_cell = own[-1]
        self._panels.follow(row)
        self._left_cells(row, [c for c in left if c is not label_cell])
        if label_cell is not None and not beside:
            self._section(label_cell)
            return
        if label_cell is not None and self._repeats_heading(cells):
            for cell in cells:
                self._result.mark(cell, "heading")
            return
        if label_cell is not None:
            span = self._grid.span(label_cell)
            state.take(label_cell, self._marks.labels)
            state.label_bottom = span.bottom
            self._result.mark(label_cell, "label")
        elif not beside:
            return
        self._values(row, label_cell, beside)

    def _section_above(self) -> None:
        """A band named by the sheet, or alone in the row above the table, holds for all rows."""
        state, top = self._state, min([*self._heading_rows, self._table.top])
        corner = self._grid.cells.get((top, self._table.label_column)) if self._heading_rows else None
        if corner is not None and is_band_label(corner.text):
            self._section(corner)
            return
        first, last = self._table.label_column, min(self._table.right, self._table.label_column + 40)
        above = [c for row in (top - 1, top - 2) for c in cells_between(self._marks, row, first, last)]
        above = [c for c in above if (c.row, c.column) not in self._result.roles]
        above = above[:1] if above and is_band_label(above[0].text) else above
        title = above[0] if len(above) == 1 and self._grid.name != above[0].text else None
        if title is not None and is_band_label(title.text) and isinstance(title.raw, str):
            self._section(title)
        elif is_band_label(self._grid.name) and not self._names.is_file(self._grid.name):
            state.section_band, state.section_name = find_bands(self._grid.name).hull, self._grid.name

    def _repeats_heading(self, cells: list[Cell]) -> bool:
        if not self._heading_rows:
            return False
        heads = cells_between(self._marks, self._heading_rows[-1], 1, self._table.right)
        texts = [(c.column, c.text) for c in heads]
        return len(texts) > 1 and [(c.column, c.text) for c in cells] == texts

    def _left_cells(self, row: int, cells: list[Cell]) -> None:
        state = self._state
        for cell in cells:
            self._result.mark(cell, "label")
            if cell.column in self._numbering:
                continue
            bands = find_bands(cell.text)
            if is_band_label(cell.text) and isinstance(cell.raw, str):
                state.side_band, state.side_name = bands.hull, cell.text
                state.side_bottom = max(self._grid.span(cell).bottom, row)
                if state.side_bottom == row:
                    state.side_bottom = self._table.bottom
                if bands.hull:
                    self._panels.claim_band_of_rows(cell, bands.hull, "row group")
            elif isinstance(cell.raw, str):
                state.group = cell.text
                state.side_band, state.side_name = None, ""
        if state.side_name and row > state.side_bottom:
            state.side_band, state.side_name = None, ""

    def _section(self, cell: Cell) -> None:
        """A label with nothing beside it: a group word, a band for the rows below, or a panel's title."""
        state = self._state
        state.label = None
        said = band_of_title(cell.text, self._names.is_title)
        if said is not None:
            state.section_band, state.section_name = said[0], cell.text
            self._result.mark(cell, "heading")
            if state.section_band:
                self._panels.claim_band_of_rows(cell, state.section_band, "heading of rows below")
            return
        self._result.mark(cell, "heading")
        state.section_band, state.section_name = None, ""
        state.group, state.beam = cell.text, cell.text if is_beam_name(cell.text) else ""
        state.pending_title = None if state.beam else waiting_title(self._names, state.pending_title, cell)

    def _values(self, row: int, label_cell: Cell | None, beside: list[Cell]) -> None:
        state = self._state
        extra = row_cells(self._grid, self._columns, row)
        if label_cell is None and row > state.label_bottom and not (extra.condition or extra.band):
            state.label = None
        self._band_label(label_cell)
        label = joined_label(self._marks.labels, state.label, extra.condition, state.group)
        if not label and label_cell is not None:
            label = label_by_values(
                label_cell.text, [c.text for c in beside if self._is_value(c)], extra.first_unit
            )
        if not label:
            self._unknown_row(label if state.label is None else state.label, beside)
            return
        self._maybe_new_panel()
        if label.parameters[0] in NAME_KEYS:
            self._name_panel(label, beside)
        extra.asides = asides_of(self._columns, label, beside)
        for cell in beside:
            column = self._columns.get(cell.column)
            if column is None:
                continue
            if cell in extra.asides:
                self._result.mark(cell, "note")
            elif column.role in VALUE_ROLES and cell is not extra.band:
                self._claim(cell, label, extra)
            elif column.role == "superseded":
                reason = f"column '{column.heading[:60]}' holds figures of an earlier issue"
                self._result.unread.append((cell, reason, ""))
                self._result.mark(cell, "unread")
            else:
                self._result.mark(cell, "note" if column.role == "remark" else "label")
        take_answers(
            self._grid, self._columns, row, state.label, draft=self._panels.first, result=self._result
        )

    def _is_value(self, cell: Cell) -> bool:
        column = self._columns.get(cell.column)
        return column is not None and column.role in VALUE_ROLES

    def _band_label(self, cell: Cell | None) -> None:
        """'(a) 698–960 MHz' below 'Gain' is the gain in that band."""
        state = self._state
        text = without_number(cell.text) if cell is not None and not state.label else ""
        group = self._marks.labels.of(state.group) if text and is_band_label(text) else None
        if group:
            state.label = replace(group, bands=find_bands(text))

    def _claim(self, cell: Cell, label: Label, extra: RowCells) -> None:
        if cell.row == self._panels.model_row and label.parameters[0] in NAME_KEYS:
            self._result.mark(cell, "heading")
            return
        span = self._grid.span(cell)
        covered = [self._columns[cell.column]]
        if span.right > span.left:
            covered = [c for c in self._columns.values() if span.left <= c.index <= span.right]
        firsts = {id(self._panels.of(c)): c for c in reversed(covered) if c.role in VALUE_ROLES}
        for first in reversed(firsts.values()):
            for band in self._bands_of(cell, first, label, extra):
                self._add_claim(cell, first, label, extra, band)

    def _add_claim(
        self, cell: Cell, column: Column, label: Label, extra: RowCells, said_of: NamedBand
    ) -> None:
        band, name = said_of
        heading = self._state.label.text if self._state.label else ""
        context = Context(
            label=in_plane(self._marks.labels, label, column.plane),
            unit=extra.unit(column),
            condition=extra.conditions(column),
            statistic=self._statistic(cell, column) or extra.bound(column),
            heading=heading or label.text,
            band_name=name or (column.band_name if band is not None and band == column.band else ""),
        )
        context = of_beam(context, column.beam or self._state.beam)
        draft = self._panels.of(column)
        banded = band is not None or bool(name)
        draft.claims.append(Claim(cell, context, band, banded=banded, tolerance=extra.tolerance(column)))
        self._panels.note(draft, label)
        if band is not None and band not in draft.bands:
            draft.bands.append(band)

    def _statistic(self, cell: Cell, column: Column) -> str:
        """What a column says of its figures; one merged over 'min', 'typ' and 'max' is none of them."""
        span = self._grid.span(cell)
        covered = [c.statistic for c in self._columns.values() if span.left <= c.index <= span.right]
        return column.statistic if len(set(covered)) == 1 else ""

    def _bands_of(self, cell: Cell, column: Column, label: Label, extra: RowCells) -> list[NamedBand]:
        if label.bands.spans:
            return [(label.bands.hull, "")]
        said = band_of_row(extra, self._place_in_band)
        if said is not None:
            return [said]
        bands = self._panels.bands_of(column)
        return bands.of(self._grid, cell, column) or [self._state.band]

    def _maybe_new_panel(self) -> None:
        """A title inside the table, over parameters the panel above already has, starts the next panel."""
        state = self._state
        if state.pending_title is None:
            return
        title, state.pending_title = state.pending_title, None
        if self._panels.several or not self._marks.may_name(title):
            return
        current = self._panels.first
        if not current.claims and self._names.is_title(title.text):
            current.name, current.where, current.named = model_name(title.text), title, True
            return
        certain = self._names.is_title(title.text)
        below = stated_below(self._marks, self._table, title, certain=certain)
        needed = 2 if certain else 4
        if len(below & current.keys()) >= needed:
            name = model_name(title.text)
            self._panels.start(name, title)
            state.section_band, state.section_name = None, ""

    def _name_panel(self, label: Label, beside: list[Cell]) -> None:
        """A row 'Model' beside one column of values names the panel, or the next one below it."""
        texts = [c for c in beside if isinstance(c.raw, str) and (len(beside) == 1 or self._is_value(c))]
        panels = self._panels
        if panels.several or panels.model_row or len(texts) != 1 or label.parameters[0] != "model":
            return
        name = model_name(texts[0].text)
        if panels.first_is_technical and panels.named_by_row:
            panels.start(name, texts[0])
        elif not panels.first_is_technical or not panels.first.named:
            panels.first.name, panels.first.where, panels.first.named = name, texts[0], True
        panels.named_by_row = True

    def _unknown_row(self, label: Label, beside: list[Cell]) -> None:
        label_text = label.text.strip()
        reason = (
            f"heading '{label_text[:80]}' is not in the dictionary"
            if label_text
            else "value without a heading"
        )
        for cell in beside:
            if (cell.row, cell.column) in self._marks.lines:
                continue  # lines of their own beside a group word
            if self._is_value(cell):
                self._result.unread.append((cell, reason, self._marks.labels.suggestion(label_text)))
                self._result.mark(cell, "unread")
            else:
                self._result.mark(cell, "label")
