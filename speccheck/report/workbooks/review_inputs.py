"""The bidder's side of the review workbook: every cell as read, and a mirror of every sheet."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from speccheck.records import Assessment, CellRef, Fit, MirrorSheet, Reading, Statement, Submission
from speccheck.report.pages.formats import shown_unit
from speccheck.report.pages.inputs import InputRow
from speccheck.report.pages.marks import mark_for
from speccheck.report.pages.view import label
from speccheck.report.workbooks.cells import Content, Rich
from speccheck.report.workbooks.review_parts import spread
from speccheck.report.workbooks.review_places import INPUTS, NumberedFinding, Places, row_and_column
from speccheck.report.workbooks.sheets import Column, Grid, Table

VALUE_COLUMN, UPPER_COLUMN = "H", "I"
"""Columns of the sheet Inputs as read that hold a value and the upper end of a range."""

_IN_DOUBT = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)
_WORST_FIRST = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL, Fit.NOT_JUDGED, Fit.FITS)


def inputs_as_read(submission: Submission, places: Places) -> Table:
    """One row a cell and reading; then what was not understood, and what to know of the file."""
    rows = [_input_row(row, places) for row in places.inputs]
    rows += [
        _bare_row(one.where, one.text, "not understood", _because(one.reason, one.suggestion), places)
        for one in submission.unread
    ]
    rows += [_bare_row(one.where, "", "notice", one.text, places) for one in submission.notices]
    return Table(
        name=INPUTS,
        columns=(
            Column(heading="Cell", width=16, look="link", note="Leads to the mirrored cell."),
            Column(heading="Panel", width=18),
            Column(heading="Parameter", width=28),
            Column(heading="Band from (MHz)", width=11, look="number", note="Empty: the panel as a whole."),
            Column(heading="Band to (MHz)", width=11, look="number"),
            Column(heading="As written", width=20, note="The bidder's own text."),
            Column(heading="Read as", width=15, note="figure, text, ambiguous, a statement, not understood."),
            Column(heading="Value", width=11, look="number", note="In the unit beside it."),
            Column(heading="Value to", width=11, look="number", note="Upper end of a range."),
            Column(heading="Text", width=14),
            Column(heading="Unit", width=8),
            Column(heading="Tolerance (±)", width=11, look="number"),
            Column(heading="Bound", width=10, note="min: at least; max: at most."),
            Column(heading="Statistic", width=12),
            Column(heading="Conditions", width=26),
            Column(heading="Heading", width=30),
            Column(heading="How it was read", width=80, look="wrap"),
        ),
        rows=rows,
        printed=13,
    )


def _input_row(row: InputRow, places: Places) -> list[Content]:
    if row.statement is not None:
        return _statement_row(row.panel, row.statement, places)
    if row.reading is None:
        raise ValueError(f"{row.where}: neither reading nor statement")
    return _reading_row(row.panel, row.reading, places)


def _reading_row(panel: str, reading: Reading, places: Places) -> list[Content]:
    low, high, words = spread(reading.value)
    kind = "ambiguous" if not reading.certain else ("text" if words else "figure")
    return [
        _cell(reading.where, places),
        panel,
        label(reading.parameter),
        *(reading.band or (None, None)),
        reading.raw,
        kind,
        low,
        high,
        words,
        shown_unit(reading.unit),
        reading.tolerance,
        "" if reading.sense == "nominal" else reading.sense.value,
        reading.statistic,
        _conditions(reading),
        reading.heading,
        _how_read(reading),
    ]


def _statement_row(panel: str, one: Statement, places: Places) -> list[Content]:
    band = one.band or (None, None)
    start = [_cell(one.where, places), panel, label(one.parameter), *band, one.raw, one.status.value]
    return [*start, *(None,) * 8, one.heading, "a statement without a figure; no verdict rests on it"]


def _bare_row(where: CellRef, text: str, kind: str, remark: str, places: Places) -> list[Content]:
    return [_cell(where, places), "", "", None, None, text, kind, *(None,) * 9, remark]


def _cell(where: CellRef, places: Places) -> Content:
    link = places.mirror(where)
    return (
        Rich(value=str(where), link=link, hint="to the cell as the bidder filled it") if link else str(where)
    )


def _because(reason: str, suggestion: str) -> str:
    return f"{reason}; nearest known: {suggestion}" if suggestion else reason


def _conditions(reading: Reading) -> str:
    at = [f"{name.replace('_', ' ')} {value:g}" for name, value in reading.at.items()]
    return "; ".join([*at, *([reading.condition] if reading.condition else [])])


def _how_read(reading: Reading) -> str:
    said = [reading.recognised] if reading.recognised else []
    if reading.stated_unit and reading.stated_unit != reading.unit and reading.stated_value is not None:
        said.append(f"stated as {_plain_value(reading.stated_value)} {reading.stated_unit}")
    if reading.alternatives:
        said.append("may also mean " + " or ".join(map(_plain_value, reading.alternatives)))
    return "; ".join(said)


def _plain_value(value: object) -> str:
    if isinstance(value, tuple):
        return f"{value[0]:g} to {value[1]:g}"
    return value if isinstance(value, str) else f"{value:g}"


def mirror_grids(assessment: Assessment, places: Places) -> list[Grid]:
    """One sheet for each input sheet, values at their own addresses, judged cells coloured and linked."""
    marks = _Marks(
        judged=_worst_findings(places),
        read={row.where: f"'{INPUTS}'!A{n}" for n, row in reversed(list(enumerate(places.inputs, start=2)))},
        unread=frozenset(one.where for one in assessment.submission.unread),
    )
    file = assessment.submission.file
    return [_grid(sheet, file, places.mirrors[sheet.name], marks) for sheet in assessment.submission.mirror]


@dataclass(frozen=True, slots=True)
class _Marks:
    """What is known of the bidder's cells: worst finding, place of the reading, not understood."""

    judged: Mapping[CellRef, NumberedFinding]
    read: Mapping[CellRef, str]
    unread: frozenset[CellRef]

    def on(self, where: CellRef, value: str | float | None) -> Content:
        """Return the mirrored cell with its look and link."""
        if where in self.judged:
            return _judged(value, self.judged[where])
        if where in self.read:
            return Rich(value=value, look="read", link=self.read[where], hint="to how it was read")
        return Rich(value=value, look="unread") if where in self.unread else value

    def note(self, where: CellRef) -> str:
        """Return the note for a cell whose claim is in doubt."""
        finding = self.judged.get(where)
        return _sentence(finding) if finding and finding.finding.verdict in _IN_DOUBT else ""


def _worst_findings(places: Places) -> dict[CellRef, NumberedFinding]:
    worst: dict[CellRef, NumberedFinding] = {}
    for verdict in _WORST_FIRST:
        for one in places.findings:
            if one.finding.verdict is verdict:
                for where in one.finding.where:
                    worst.setdefault(where, one)
    return worst


def _grid(sheet: MirrorSheet, file: str, name: str, marks: _Marks) -> Grid:
    cells: dict[int, dict[int, Content]] = {}
    notes: dict[tuple[int, int], str] = {}
    for cell in sheet.cells:
        place = row_and_column(cell.cell)
        if place is None:
            continue
        where = CellRef(file, sheet.name, cell.cell)
        cells.setdefault(place[0], {})[place[1]] = marks.on(where, cell.value)
        note = marks.note(where)
        if note:
            notes[place] = note
    return Grid(name=name, cells=cells, notes=notes, widths=_widths(cells))


def _judged(value: str | float | None, one: NumberedFinding) -> Rich:
    tone = mark_for(one.finding.verdict).tone
    return Rich(value=value, look=tone, link=one.link, hint=_sentence(one))


def _sentence(one: NumberedFinding) -> str:
    return f"Finding {one.number}, {one.finding.title}: {one.finding.verdict.value}. {one.finding.summary}"


def _widths(cells: Mapping[int, Mapping[int, Content]]) -> dict[int, float]:
    """Widths that show most texts, between 10 and 40 characters."""
    widths: dict[int, float] = {}
    for row in cells.values():
        for column, item in row.items():
            value = item.value if isinstance(item, Rich) else item
            length = len(value) + 2 if isinstance(value, str) else 10
            widths[column] = max(widths.get(column, 10.0), min(length, 40.0))
    return widths
