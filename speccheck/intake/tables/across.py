"""Tables with headings across: one row a panel, or a panel and band."""

from __future__ import annotations

import re
from dataclasses import dataclass, field, replace

from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.panels.told_by_value import label_by_values
from speccheck.intake.tables.across_bands import (
    RowBand,
    band_of,
    gives_frequencies,
    holds_nicknames,
    holds_spans,
)
from speccheck.intake.tables.bands import find_bands
from speccheck.intake.tables.claims import Claim, Context, Draft, SheetResult
from speccheck.intake.tables.columns import Column, heading_stack
from speccheck.intake.tables.composing import compose
from speccheck.intake.tables.edges import band_between, edge_columns
from speccheck.intake.tables.labels import Label
from speccheck.intake.tables.marks import Marks, is_size_letter
from speccheck.intake.tables.naming import Names, model_name
from speccheck.intake.tables.regions import Across
from speccheck.records import Band

_FREQUENCY_KEYS = frozenset({"frequency_range", "operating_bands"})
_NAME_KEYS = ("model", "panel_type", "part_number")
_EXAMPLE = re.compile(r"\s*example\b", re.IGNORECASE)
_SILENT_ROLES = {"remark": "note", "number": "label", "group": "label", "level": "label", "required": "label"}


@dataclass(slots=True)
class _Field:
    """One column: what its cells claim."""

    column: Column
    label: Label
    context: Context
    role: str = ""
    misses: int = 0
    of_frequency: bool = False
    banded: bool = False


@dataclass(slots=True)
class _Row:
    """The panel and band the walk stands at."""

    draft: Draft | None = None
    said: RowBand = field(default_factory=RowBand)


class AcrossReader:
    """Walks one table from its first data row to its last."""

    def __init__(self, marks: Marks, table: Across, result: SheetResult, names: Names) -> None:
        self._marks, self._table, self._result, self._names = marks, table, result, names
        self._grid: Grid = marks.grid
        self._fields: dict[int, _Field] = {}
        self._named: int = 0
        self._banded: int = 0
        self._nicknamed: int = 0
        self._names_of_bands: set[int] = set()
        self._edges: tuple[int, int] = (0, 0)
        self._guides: set[int] = set()
        self._contexts: dict[tuple[int, str], Context] = {}
        self._by_name: dict[str, tuple[Draft, set[object]]] = {}
        self._at = _Row()

    def read(self) -> None:
        """Place every cell of the table and collect its claims."""
        self._describe()
        for row in [*self._table.heading_rows, *self._table.repeated]:
            for cell in self._cells(row):
                self._result.mark(cell, "heading")
        self._choose_names_and_bands()
        for row in self._table.data_rows:
            self._row(row, self._cells(row))
        self._report_unknown()

    def _cells(self, row: int) -> list[Cell]:
        return [c for c in self._marks.rows.get(row, ()) if self._table.left <= c.column <= self._table.right]

    def _describe(self) -> None:
        rows, labels = self._table.heading_rows, self._marks.labels
        used = {c.column for row in [*rows, *self._table.data_rows] for c in self._cells(row)}
        for index in sorted(used):
            stack = heading_stack(self._grid, rows, index, self._table.left)
            label, column = compose(index, stack, labels)
            letters = [c for c in stack if is_size_letter(c.text) and self._marks.is_heading(c)]
            label = self._marks.headings[letters[-1].row, letters[-1].column] if letters else label
            if not label and column.role == "":
                texts = [c.text for c in self._column_cells(index)]
                label = label_by_values(column.heading, texts) or label
            if column.role == "tolerance" and column.unit:
                label = Label(column.heading)
            role = "" if label else column.role
            context = Context(
                label=label,
                unit=column.unit,
                statistic=column.statistic,
                heading=column.heading,
                band_name=column.band_name if column.band is None else "",
            )
            self._fields[index] = _Field(
                column,
                label,
                context,
                role,
                of_frequency=set(label.parameters) <= _FREQUENCY_KEYS,
                banded=column.band is not None or bool(column.band_name),
            )

    def _choose_names_and_bands(self) -> None:
        fields = self._fields
        for key in _NAME_KEYS:
            named = [i for i, f in fields.items() if f.label.parameters[:1] == (key,)]
            if named:
                self._named = next((i for i in named if self._holds_words(i)), named[0])
                break
        else:
            roles = [i for i, f in fields.items() if f.role == "panel"]
            self._named = roles[0] if roles else self._unlabelled_text_column()
        columns = {i: self._column_cells(i) for i in fields if i != self._named}
        frequencies = [
            i for i in columns if self._is_frequency(fields[i]) and holds_spans(columns[i], self._unit_of(i))
        ]
        given = [i for i in frequencies if gives_frequencies(columns[i])]
        self._names_of_bands = {i for i in frequencies if given and i not in given}
        narrow = [i for i in given or frequencies if fields[i].label.parameters[:1] != ("frequency_range",)]
        self._banded = next(iter(narrow or given or frequencies), 0)
        self._edges = edge_columns({i: fields[i].column.heading for i in columns})
        nicknames = [i for i in columns if holds_nicknames(columns[i])]
        self._nicknamed = nicknames[0] if nicknames else 0
        self._guides = {*self._edges, *self._names_of_bands, self._nicknamed, self._banded}

    def _is_frequency(self, found: _Field) -> bool:
        of_label = bool(found.label) and found.of_frequency
        return found.role == "band" or (of_label and not found.context.statistic)

    def _unit_of(self, index: int) -> str:
        return self._fields[index].label.unit or self._fields[index].column.unit or "MHz"

    def _column_cells(self, index: int) -> list[Cell]:
        return [c for r in self._table.data_rows[:40] if (c := self._grid.cells.get((r, index))) is not None]

    def _holds_words(self, index: int) -> bool:
        cells = self._column_cells(index)
        return bool(cells) and all(isinstance(c.raw, str) for c in cells)

    def _unlabelled_text_column(self) -> int:
        for index, found in self._fields.items():
            if not found.label and found.role in ("", "parameter", "offered", "typical"):
                cells = [c for r in self._table.data_rows[:50] if (c := self._grid.cells.get((r, index)))]
                if cells and all(isinstance(c.raw, str) and any(map(str.isalpha, c.raw)) for c in cells):
                    return index
        numbers = [i for i, f in self._fields.items() if f.role == "number"]
        return numbers[0] if numbers else 0

    def _row(self, row: int, cells: list[Cell]) -> None:
        if _EXAMPLE.match(cells[0].text):
            self._result.mark(cells[0], "example")
            for cell in cells[1:]:
                self._result.mark(cell, "label")
            return
        if len(cells) == 1 and len(self._fields) > 2:
            cell = cells[0]
            known = self._fields.get(cell.column)
            if known is None or not known.label or cell.column in (self._named, self._table.left):
                self._result.mark(cell, "heading")
                self._at = _Row() if cell.column != self._named else self._at
                if cell.column == self._named:
                    self._start_panel(row, cell)
                return
        self._place(row, cells)
        draft = self._at.draft
        if draft is None:
            return
        for cell in cells:
            if cell.column != self._named:
                self._claim(cell, draft)

    def _place(self, row: int, cells: list[Cell]) -> None:
        name_cell = self._grid.cells.get((row, self._named)) if self._named else None
        said = band_of(
            self._grid.covering(row, self._banded) if self._banded else None,
            self._grid.covering(row, self._nicknamed) if self._nicknamed else None,
            self._unit_of(self._banded) if self._banded else "",
        )
        if self._edges[0] and not said.band:
            heading = self._fields[self._edges[0]].column.heading
            said = RowBand(band_between(self._grid, row, self._edges, heading), said.name)
        key = (said.band, said.name)
        if name_cell is not None:
            self._result.mark(name_cell, "heading")
            name = model_name(name_cell.text)
            known = self._by_name.get(name)
            if known and said.name + str(said.band or "") and key not in known[1]:
                self._at = _Row(known[0])
            else:
                self._start_panel(row, name_cell)
        elif self._at.draft is None or not (self._named or self._banded or self._nicknamed):
            self._start_panel(row, cells[0])
        self._at.said = said
        draft = self._at.draft
        if draft is not None:
            self._by_name[draft.name][1].add(key)
            if said.band and said.band not in draft.bands:
                draft.bands.append(said.band)

    def _start_panel(self, row: int, cell: Cell) -> None:
        if self._named and cell.column == self._named:
            draft = Draft(model_name(cell.text), self._grid, cell, named=True)
        else:
            top = self._table.heading_rows[0]
            title = self._names.above(top, self._table.left, self._table.right, self._marks, self._result)
            several = len(self._table.data_rows) > 1 and not (self._banded or self._nicknamed)
            draft = Draft(
                f"{title.name} row {row}" if several else title.name, self._grid, cell, named=title.certain
            )
        self._result.drafts.append(draft)
        self._by_name[draft.name] = (draft, set())
        self._at = _Row(draft)

    def _claim(self, cell: Cell, draft: Draft) -> None:
        found = self._fields.get(cell.column)
        if found is None:
            return
        if cell.column in self._guides and self._only_guides(cell, draft):
            return
        said, column = self._at.said, found.column
        if found.label.parameters:
            context, band, banded = found.context, column.band, found.banded
            if not found.of_frequency or column.index == self._banded:
                context = self._noted(context, said.name) if said.name else context
                if not banded and said.known:
                    band, banded = said.band, True
            draft.claims.append(Claim(cell, context, band, banded=banded))
            if column.band is not None and column.band not in draft.bands:
                draft.bands.append(column.band)
        elif cell.column == self._banded:
            label = Label(column.heading, ("operating_bands",), column.unit or "MHz")
            if find_bands(cell.text).spans:
                context = Context(label, heading=column.heading)
                draft.claims.append(Claim(cell, context, said.band, banded=said.band is not None))
            else:
                self._result.mark(cell, "label")
        elif found.role in _SILENT_ROLES:
            self._result.mark(cell, _SILENT_ROLES[found.role])
        elif found.role == "tolerance" and draft.claims:
            draft.claims[-1].tolerance = cell
            self._result.mark(cell, "label")
        else:
            found.misses += 1
            self._result.mark(cell, "unread")

    def _only_guides(self, cell: Cell, draft: Draft) -> bool:
        """Whether a cell says nothing but the band of its row."""
        if cell.column in self._edges:
            self._claim_edge(cell, draft, self._at.said.band)
            return True
        silent = cell.column == self._nicknamed or cell.column in self._names_of_bands
        if silent or (cell.column == self._banded and self._at.said.point):
            self._result.mark(cell, "label")
            return True
        return False

    def _claim_edge(self, cell: Cell, draft: Draft, band: Band | None) -> None:
        """The band of a row is claimed by the cell of its lower edge."""
        self._result.mark(cell, "unread" if band is None else "reading")
        if band is not None and cell.column == self._edges[0]:
            heading = self._fields[cell.column].column.heading
            context = Context(Label(heading, ("operating_bands",), "MHz"), heading=heading)
            text = f"{band[0]:g}-{band[1]:g} MHz"
            draft.claims.append(Claim(cell, context, band, text=text, banded=True))

    def _noted(self, context: Context, name: str) -> Context:
        """A context with the nickname of the row's band, made once for each."""
        key = (id(context), name)
        if key not in self._contexts:
            self._contexts[key] = replace(context, condition=name)
        return self._contexts[key]

    def _report_unknown(self) -> None:
        """One line for a column that was not read, not one a cell."""
        for index, found in self._fields.items():
            if not found.misses:
                continue
            where = found.column.cells[-1] if found.column.cells else None
            if where is None:
                rows = self._table.data_rows
                where = next(c for r in rows if (c := self._grid.cells.get((r, index))) is not None)
            heading = found.column.heading[:80]
            unknown = f"column heading '{heading}' is not in the dictionary"
            reason = unknown if heading else "a column without a heading"
            nearest = self._marks.labels.suggestion(found.label.text)
            self._result.unread.append((where, f"{reason}; its {found.misses} cells were not read", nearest))
