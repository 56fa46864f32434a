"""Which panel each column of a table with parameters down the side speaks of."""

from __future__ import annotations

from speccheck.intake.bands import find_bands
from speccheck.intake.claims import Claim, Context, Draft, SheetResult
from speccheck.intake.columns import VALUE_ROLES, Column
from speccheck.intake.down_regions import Down
from speccheck.intake.grid import Cell
from speccheck.intake.labels import Label
from speccheck.intake.marks import Marks
from speccheck.intake.naming import Names, model_name
from speccheck.records import Band

NAME_KEYS = frozenset({"model", "panel_type"})
_FREQUENCY_KEYS = frozenset({"frequency_range", "operating_bands"})


class DownPanels:
    """The drafts of one table, by panel name; a single nameless one where columns name no panels."""

    def __init__(self, marks: Marks, table: Down, columns: dict[int, Column], result: SheetResult) -> None:
        self._marks, self._table, self._columns, self._result = marks, table, columns, result
        self._drafts: dict[str, Draft] = {}
        self.model_row = 0
        self.named_by_row = False

    @property
    def first(self) -> Draft:
        """The only draft, or the first of several."""
        return next(iter(self._drafts.values()))

    @property
    def several(self) -> bool:
        """Whether the columns name more than one panel."""
        return len(self._drafts) > 1

    def open(self, names: Names, heading_rows: list[int]) -> None:
        """Make a draft for each panel named over the columns, or one named by the title."""
        values = self._value_columns()
        self.model_row = self._find_model_row(values)
        for column in values:
            cell = self._name_cell(column)
            if cell is not None and model_name(cell.text) not in self._drafts:
                self._add(model_name(cell.text), cell, named=True)
        if not self._drafts:
            title = names.title_for(self._table, heading_rows, self._marks, self._result)
            self._add("", title.cell, named=title.certain).name = title.name
        self._bands_from_row(values)
        self._claims_of_headings(values)

    def start(self, name: str, cell: Cell) -> None:
        """Begin the next panel of a table that lists panels below one another."""
        self._drafts = {}
        self._add(name, cell, named=True)

    def of(self, column: Column) -> Draft:
        """The draft a column speaks of."""
        if len(self._drafts) == 1:
            return self.first
        cell = self._name_cell(column)
        return self._drafts.get(model_name(cell.text) if cell else "") or self.first

    def claim_band(self, draft: Draft, cell: Cell, band: Band, heading: str) -> None:
        """A heading that gives the frequencies of a band is itself a claim."""
        if band not in draft.bands:
            draft.bands.append(band)
        context = Context(Label(heading, ("operating_bands",), "MHz"), heading=heading)
        text = f"{band[0]:g}-{band[1]:g} MHz"
        draft.claims.append(Claim(cell, context, band, text=text, banded=True))

    def _add(self, key: str, where: Cell, *, named: bool) -> Draft:
        draft = self._drafts[key] = Draft(key, self._marks.grid, where, named=named)
        self._result.drafts.append(draft)
        return draft

    def _value_columns(self) -> list[Column]:
        return [column for column in self._columns.values() if column.role in VALUE_ROLES]

    def _name_cell(self, column: Column) -> Cell | None:
        if self.model_row:
            cell = self._marks.grid.covering(self.model_row, column.index)
            if cell is not None:
                return cell
        return column.name_cell

    def _rows_of(self, keys: frozenset[str]) -> list[int]:
        rows = range(self._table.top, self._table.bottom + 1)
        column, headings = self._table.label_column, self._marks.headings
        return [r for r in rows if (found := headings.get((r, column))) and set(found.parameters) <= keys]

    def _find_model_row(self, values: list[Column]) -> int:
        if len(values) < 2:
            return 0
        for row in self._rows_of(NAME_KEYS):
            cells = [self._marks.grid.cells.get((row, column.index)) for column in values]
            if len({cell.text for cell in cells if cell is not None}) > 1:
                return row
        return 0

    def _bands_from_row(self, values: list[Column]) -> None:
        """A row of frequency ranges that differ across one panel's columns gives the columns their bands."""
        for row in self._rows_of(_FREQUENCY_KEYS):
            unit = self._marks.headings[row, self._table.label_column].unit or "MHz"
            for draft in self._drafts.values():
                mine = [c for c in values if self.of(c) is draft and c.role in ("", "offered", "panel")]
                cells = {c.index: self._marks.grid.cells.get((row, c.index)) for c in mine}
                spans = {i: _only_band(cell.text, unit) for i, cell in cells.items() if cell is not None}
                if len({span for span in spans.values() if span}) < 2 or any(c.band for c in mine):
                    continue
                for column in mine:
                    column.band = spans.get(column.index)
                    if column.band is not None and column.band not in draft.bands:
                        draft.bands.append(column.band)

    def _claims_of_headings(self, values: list[Column]) -> None:
        done: set[tuple[int, int]] = set()
        for column in values:
            draft = self.of(column)
            frequency, named_by = column.frequency, column.band_cell
            if frequency is not None and (frequency.row, frequency.column) not in done:
                done.add((frequency.row, frequency.column))
                self._claim_range(draft, frequency)
            if column.band is not None and named_by is not None:
                if column.band not in draft.bands:
                    draft.bands.append(column.band)
                if (named_by.row, named_by.column) not in done:
                    done.add((named_by.row, named_by.column))
                    self.claim_band(draft, named_by, column.band, "column heading")

    def _claim_range(self, draft: Draft, cell: Cell) -> None:
        label = self._marks.labels.of(cell.text)
        context = Context(Label(label.text, ("frequency_range",), "MHz"), heading=label.text)
        for low, high in label.bands.spans[:1]:
            draft.claims.append(Claim(cell, context, None, text=f"{low:g}-{high:g} MHz"))


def _only_band(text: str, unit: str) -> Band | None:
    spans = find_bands(text if "hz" in text.lower() else f"{text} {unit}").spans
    return spans[0] if len(spans) == 1 else None
