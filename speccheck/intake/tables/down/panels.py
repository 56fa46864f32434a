"""Which panel each column of a table with parameters down the side speaks of."""

from __future__ import annotations

import re

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.bands import find_bands
from speccheck.intake.tables.claims import Claim, Context, Draft, SheetResult
from speccheck.intake.tables.columns import VALUE_ROLES, Column
from speccheck.intake.tables.down.bands import ColumnBands
from speccheck.intake.tables.down.regions import Down
from speccheck.intake.tables.labels import Label
from speccheck.intake.tables.marks import Marks
from speccheck.intake.tables.names.naming import Names, Title, model_name
from speccheck.intake.tables.names.titles import codes
from speccheck.intake.tables.words import names_array
from speccheck.records import Band

NAME_KEYS = frozenset({"model", "panel_type"})
_NAMING_KEYS = frozenset({"model", "panel_type", "manufacturer", "part_number", "revision"})
_ARRAY = re.compile(r"[A-Z]{1,2}[1-9]\d?")
_NUMBERED = re.compile(r"\d\d")
_FREQUENCY_KEYS = frozenset({"frequency_range", "operating_bands"})


class DownPanels:
    """The drafts of one table, by panel name; a single nameless one where columns name no panels."""

    def __init__(self, marks: Marks, table: Down, columns: dict[int, Column], result: SheetResult) -> None:
        self._marks, self._table, self._columns, self._result = marks, table, columns, result
        self._drafts: dict[str, Draft] = {}
        self._column_bands: dict[int, ColumnBands] = {}
        self._technical: set[int] = set()
        self._seen: dict[str, Draft] = {}
        self.model_row = 0
        self.name_column = 0
        self.named_by_row = False

    @property
    def first(self) -> Draft:
        """The only draft, or the first of several."""
        return next(iter(self._drafts.values()))

    @property
    def first_is_technical(self) -> bool:
        """Whether the first panel already has figures, not only names."""
        return id(self.first) in self._technical

    def note(self, draft: Draft, label: Label) -> None:
        """Remember that a panel has been given a claim."""
        if label.parameters[0] not in _NAMING_KEYS:
            self._technical.add(id(draft))

    @property
    def several(self) -> bool:
        """Whether the columns name more than one panel."""
        return len(self._drafts) > 1

    def open(self, names: Names, heading_rows: list[int]) -> None:
        """Make a draft for each panel named over the columns, or one named by the title."""
        values = self._value_columns()
        self._unname([c for c in values if not self._may_name(c)])
        self.model_row = self._find_model_row(values)
        self._share_names(values)
        if not self.model_row:
            self._name_arrays(values)
        title = None
        if not self.model_row and (self._name_groups_of_bands(values) or self._name_nothing(values)):
            title = self._title(names, heading_rows)
            self._unname(values if title.certain else [])
        for column in values:
            cell = self._name_cell(column)
            if cell is not None and model_name(cell.text) not in self._drafts:
                self._add(model_name(cell.text), cell, named=True)
        if not self._drafts:
            title = title or self._title(names, heading_rows)
            self._add("", title.cell, named=title.certain).name = title.name
        self._bands_from_row(values)
        self._claims_of_headings(values)

    def _title(self, names: Names, heading_rows: list[int]) -> Title:
        """The name of the one panel that the table is about."""
        top = heading_rows[0] if heading_rows else self._table.top
        return names.above(top, self._table.label_column, self._table.right, self._marks, self._result)

    def start(self, name: str, cell: Cell) -> None:
        """Begin the next panel of a table that lists panels below one another."""
        self._drafts = {}
        self._add(name, cell, named=True)

    def follow(self, row: int) -> None:
        """Go to the panel that a column of names beside the labels gives for a row."""
        cell = self._marks.grid.covering(row, self.name_column) if self.name_column else None
        name = model_name(cell.text) if cell is not None else ""
        if cell is None or not name or name in self._drafts:
            return
        if not self._seen:
            self._result.drafts.remove(self.first)
        if name not in self._seen:
            self.start(name, cell)
            self._seen[name] = self.first
        self._drafts = {name: self._seen[name]}

    def _name_arrays(self, values: list[Column]) -> None:
        """Take names such as 'Lower left' for arrays of one panel, and P1 beside R1 and Y1."""
        named = [column for column in values if column.words]
        known = any(column.band_name for column in values if not column.words)
        if known and all(_ARRAY.fullmatch(column.name) for column in named):
            arrays = named
        elif len({column.name for column in named}) > 1 and all(names_array(c.name) for c in named):
            arrays = named if self._rows_of(_FREQUENCY_KEYS) or all(c.band for c in named) else []
        else:
            return
        for column in arrays:
            column.band_name = column.band_name or column.name
        self._unname(arrays)

    @staticmethod
    def _name_groups_of_bands(values: list[Column]) -> bool:
        """Whether the words over the columns part one panel's bands: no type codes, no band under two."""
        bands: dict[str, set[Band]] = {}
        for column in values:
            if column.words:
                bands.setdefault(column.name, set()).update([column.band] if column.band else [])
        groups = list(bands.values())
        apart = sum(map(len, groups)) == len(set().union(*groups))
        return (
            len(groups) > 1
            and all(groups)
            and apart
            and not any(codes(name) or _NUMBERED.search(name) for name in bands)
        )

    @staticmethod
    def _name_nothing(values: list[Column]) -> bool:
        """Whether one heading without any figure stands over the values; a title names a panel better."""
        names = {column.name for column in values if column.words}
        return len(names) == 1 and not any(letter.isdigit() for name in names for letter in name)

    def _share_names(self, values: list[Column]) -> None:
        """A name holds for the next columns without heading that give a band: merges get lost on the way."""
        rows = self._rows_of(_FREQUENCY_KEYS)
        before: Column | None = None
        for column in values:
            if (cell := self._name_cell(column)) is not None:
                before, name = column, cell
            elif before is not None and not column.cells and self._gives_band(rows, column):
                column.words, column.name_cell = before.words, name

    def _gives_band(self, rows: list[int], column: Column) -> bool:
        return any(column.index in self._spans_of_row(row, [column]) for row in rows)

    def _may_name(self, column: Column) -> bool:
        named = column.name_cell is None or self._marks.may_name(column.name_cell)
        return named and not self._marks.without.over_columns

    @staticmethod
    def _unname(values: list[Column]) -> None:
        for column in values:
            column.words, column.name_cell = [], None

    def of(self, column: Column) -> Draft:
        """The draft a column speaks of."""
        if len(self._drafts) == 1:
            return self.first
        cell = self._name_cell(column)
        return self._drafts.get(model_name(cell.text) if cell else "") or self.first

    def bands_of(self, column: Column) -> ColumnBands:
        """The bands of the panel a column speaks of."""
        draft = self.of(column)
        if id(draft) not in self._column_bands:
            for key, columns in self._by_draft(self._value_columns()).items():
                self._column_bands[key] = ColumnBands(columns)
        return self._column_bands[id(draft)]

    def _by_draft(self, columns: list[Column]) -> dict[int, list[Column]]:
        by_draft: dict[int, list[Column]] = {id(draft): [] for draft in self._drafts.values()}
        for column in columns:
            by_draft[id(self.of(column))].append(column)
        return by_draft

    def claim_band_of_rows(self, cell: Cell, band: Band, heading: str) -> None:
        """A heading over or beside rows gives a band to all panels of the table."""
        for draft in self._drafts.values():
            self.claim_band(draft, cell, band, heading)

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
        """The row that names the panels over the columns; a row of part numbers where nothing else does."""
        if len(values) < 2:
            return 0
        unnamed = not any(column.words or column.band or column.band_name for column in values)
        numbers = self._rows_of(frozenset({"part_number"})) if unnamed else []
        for row in [*self._rows_of(NAME_KEYS), *numbers]:
            found = (self._marks.grid.cells.get((row, column.index)) for column in values)
            cells = [cell for cell in found if cell is not None]
            if len({cell.text for cell in cells}) > 1 and all(map(self._marks.may_name, cells)):
                return row
        return 0

    def _bands_from_row(self, values: list[Column]) -> None:
        """A row of frequency ranges that differ across one panel's columns gives the columns their bands.

        Of several such rows the one with the most ranges; ranges of another that contain them are wider.
        Over columns headed by names of standard bands the ranges say which part of them is meant.
        """
        rows = self._rows_of(_FREQUENCY_KEYS)
        by_draft = self._by_draft([c for c in values if c.role in ("", "offered", "panel")])
        for draft in self._drafts.values():
            mine = by_draft[id(draft)]
            spans = [self._spans_of_row(row, mine) for row in rows]
            best = max(spans, key=lambda found: len(set(found.values())), default={})
            named = [c for c in mine if _only_named(c)]
            if len(set(best.values())) < (1 if named else 2) or any(c.band for c in mine if c not in named):
                continue
            for column in mine:
                if column in named and column.index not in best:
                    continue
                if column.band_cell is not None:
                    column.band_name, column.band_cell = column.band_cell.text.strip(), None
                column.band = best.get(column.index)
                if column.band is not None and column.band not in draft.bands:
                    draft.bands.append(column.band)
                column.wider = next((w for s in spans if _holds(w := s.get(column.index), column.band)), None)

    def _spans_of_row(self, row: int, columns: list[Column]) -> dict[int, Band]:
        unit = self._marks.headings[row, self._table.label_column].unit or "MHz"
        cells = {c.index: self._marks.grid.covering(row, c.index) for c in columns}
        found = {i: _only_band(cell.text, unit) for i, cell in cells.items() if cell is not None}
        return {index: span for index, span in found.items() if span is not None}

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


def _only_named(column: Column) -> bool:
    """Whether the band of a column is only that of a standard's name, such as 'n78'."""
    return column.band_cell is not None and bool(find_bands(column.band_cell.text).names)


def _only_band(text: str, unit: str) -> Band | None:
    spans = find_bands(text if "hz" in text.lower() else f"{text} {unit}").spans
    return spans[0] if len(spans) == 1 else None


def _holds(wider: Band | None, band: Band | None) -> bool:
    return bool(wider and band and wider != band and wider[0] <= band[0] and band[1] <= wider[1])
