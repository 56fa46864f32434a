"""Where things stand in the review workbook: mirrored cells, rows of readings and of findings."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass, field

from speccheck.records import Assessment, CellRef, Finding
from speccheck.report.pages.inputs import InputRow, input_rows
from speccheck.report.workbooks.cells import column_letter

FINDINGS = "Findings"
INPUTS = "Inputs as read"
FIRST_ROW = 2
LAST_ROW, LAST_COLUMN = 1_048_576, 16_384

_ADDRESS = re.compile(r"\$?([A-Z]{1,3})\$?([1-9][0-9]{0,6})")


@dataclass(frozen=True, slots=True)
class NumberedFinding:
    """A finding with the number and row it has on the sheet Findings."""

    number: int
    panel: str
    finding: Finding

    @property
    def row(self) -> int:
        """Row on the sheet Findings as written."""
        return self.number + FIRST_ROW - 1

    @property
    def link(self) -> str:
        """Place of the finding inside the workbook."""
        return f"'{FINDINGS}'!A{self.row}"


@dataclass(frozen=True, slots=True)
class Places:
    """The map from the bidder's cells to places inside the workbook."""

    file: str
    mirrors: dict[str, str]
    findings: tuple[NumberedFinding, ...]
    inputs: tuple[InputRow, ...]
    input_rows: dict[int, int] = field(default_factory=dict)
    numbers: dict[CellRef, float] = field(default_factory=dict)

    def mirror(self, where: CellRef) -> str:
        """Place of the mirrored cell, such as ``'Input 1'!D12``; empty where it is not mirrored."""
        place = row_and_column(where.cell)
        if place is None or where.file != self.file or where.sheet not in self.mirrors:
            return ""
        row, column = place
        return f"'{self.mirrors[where.sheet]}'!{column_letter(column)}{row}"

    def reading_row(self, reading: object) -> int | None:
        """Row on the sheet Inputs as read of this very reading or statement."""
        return self.input_rows.get(id(reading))


def place_everything(assessment: Assessment) -> Places:
    """Number the sheets, findings and readings of an assessment."""
    submission = assessment.submission
    mirrors = {sheet.name: f"Input {n}" for n, sheet in enumerate(submission.mirror, start=1)}
    rows, _ = input_rows(submission)
    read = {(row.where.sheet, row.where.cell) for row in rows}
    numbers = {
        CellRef(submission.file, sheet.name, cell.cell): float(cell.value)
        for sheet in submission.mirror
        for cell in sheet.cells
        if isinstance(cell.value, int | float) and (sheet.name, cell.cell) in read
    }
    by_identity = {id(row.reading or row.statement): n for n, row in enumerate(rows, start=FIRST_ROW)}
    return Places(submission.file, mirrors, tuple(_numbered(assessment)), rows, by_identity, numbers)


def _numbered(assessment: Assessment) -> Iterable[NumberedFinding]:
    number = 0
    for panel in assessment.panels:
        for finding in panel.findings:
            number += 1
            yield NumberedFinding(number, panel.panel.name, finding)


def row_and_column(address: str) -> tuple[int, int] | None:
    """Row and column number of a cell address; None for what is not one, or off the sheet."""
    match = _ADDRESS.match(address)
    if match is None:
        return None
    column = 0
    for letter in match[1]:
        column = column * 26 + ord(letter) - ord("A") + 1
    row = int(match[2])
    return (row, column) if row <= LAST_ROW and column <= LAST_COLUMN else None
