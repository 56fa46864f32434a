"""What a reader of the result must know about the file itself: hidden parts, formulas, dates, notes."""

from __future__ import annotations

import re
from collections.abc import Callable
from datetime import date, time
from itertools import groupby

from speccheck.intake.files.grid import Cell, Grid, column_letters
from speccheck.intake.files.opening import Book
from speccheck.intake.tables.claims import SheetResult
from speccheck.intake.tables.labels import MOST_LETTERS, Labels
from speccheck.records import CellRef, Notice
from speccheck.text import plain

_MARKER = re.compile(
    r"^\s*[(\[]?(\d{1,2}|\*{1,4}|[a-z]|[¹²³⁴⁵⁶⁷⁸⁹])\s*[)\].:=–-]?\s+(?=\S)|^\s*([¹²³⁴⁵⁶⁷⁸⁹*])\s*(?=\S)"
)
_NOTE_WORD = re.compile(
    r"^\s*(?:note|anm\.?|anmerkung|nota|remarque|uwaga|opmerking)\s*(\d{1,2})\s*[:.)–-]?\s*", re.IGNORECASE
)
_SUPERSCRIPT = str.maketrans("¹²³⁴⁵⁶⁷⁸⁹", "123456789")
_SHOWN = 8
_DATES = (date, time)

Where = Callable[[str, str], CellRef]


def book_notices(book: Book, where: Where) -> list[Notice]:
    """Notices on the whole file."""
    return [Notice(where=where("", ""), text=text) for text in book.oddities]


def passed_over(labels: Labels) -> str:
    """What was not looked up, and why."""
    return (
        f"{labels.passed_over} texts were not looked up as headings: more than {MOST_LETTERS} letters of "
        "different texts before them might be headings; split the file"
    )


def grid_notices(grid: Grid, where: Where) -> list[Notice]:
    """Hidden parts, formulas and dates of one sheet."""
    if grid.hidden:
        count = len(grid.cells) + len(grid.hidden_cells)
        text = f"hidden sheet with {count} filled cells; nothing on it was used"
        return [Notice(where=where(grid.name, ""), text=text)] if count else []
    found = [*_hidden(grid, where)]
    formulas = [cell for cell in grid.cells.values() if cell.formula and not cell.fault]
    if formulas:
        linked = [cell for cell in formulas if "[" in cell.formula]
        text = f"{len(formulas)} cells are formulas, their stored results are used: {_addresses(formulas)}"
        if linked:
            text += f"; {_addresses(linked)} point to another workbook"
        found.append(Notice(where=where(grid.name, formulas[0].address), text=text))
    found += [
        Notice(
            where=where(grid.name, cell.address),
            text=f"holds a date ({plain(cell.text, 40)}); a spreadsheet may have made it of another text",
        )
        for cell in grid.cells.values()
        if isinstance(cell.raw, _DATES)
    ]
    return found


def _hidden(grid: Grid, where: Where) -> list[Notice]:
    def part(cell: Cell) -> tuple[str, int]:
        return ("row", cell.row) if cell.row in grid.hidden_rows else ("column", cell.column)

    found = []
    for (kind, number), cells in groupby(sorted(grid.hidden_cells.values(), key=part), key=part):
        listed = list(cells)
        name = str(number) if kind == "row" else column_letters(number)
        shown = ", ".join(f"{c.address} '{plain(c.text, 40)}'" for c in listed[:_SHOWN])
        more = f" and {len(listed) - _SHOWN} more" if len(listed) > _SHOWN else ""
        text = f"hidden {kind} {name} was not used: {shown}{more}"
        found.append(Notice(where=where(grid.name, listed[0].address), text=text))
    return found


def note_notices(result: SheetResult, labels: Labels, where: Where) -> list[Notice]:
    """Notes that quote a figure of a known parameter: named, because a reader may take them for claims."""
    found = []
    for place, role in result.roles.items():
        if role not in ("example", "note"):
            continue
        cell = result.grid.cells[place]
        if role == "example":
            text = "an example row of the form, not read as a claim"
            found.append(Notice(where=where(result.grid.name, cell.address), text=text))
        if role == "note" and any(letter.isdigit() for letter in cell.text) and len(cell.text) < 500:
            words = re.split(r"[\d:;,.()]", cell.text)
            if any(labels.of(word.strip()) for word in words if 3 < len(word.strip()) < 60):
                text = f"a note, not read as a claim: '{plain(cell.text, 160)}'"
                found.append(Notice(where=where(result.grid.name, cell.address), text=text))
    return found


def doubt_notices(result: SheetResult, where: Where) -> list[Notice]:
    """What does not hang together in a sheet, whichever way it is read: its layout was not understood."""
    found = []
    for doubt in result.doubts:
        cells = sorted(doubt.cells, key=_place)
        text = f"layout not understood for certain: {doubt.text}; compare {_addresses(cells)}"
        found.append(Notice(where=where(result.grid.name, cells[0].address), text=text))
    return found


def _place(cell: Cell) -> tuple[int, int]:
    return cell.row, cell.column


def footnotes(result: SheetResult) -> dict[str, str]:
    """Notes below or beside the tables, by their marker."""
    notes: dict[str, str] = {}
    for place, role in result.roles.items():
        if role not in ("note", "heading"):
            continue
        text = result.grid.cells[place].text
        for line in text.splitlines():
            match = _NOTE_WORD.match(line) or _MARKER.match(line)
            if match is not None:
                marker = next(filter(None, match.groups())).translate(_SUPERSCRIPT)
                notes.setdefault(marker, plain(line[match.end() :].strip(), 200))
    return notes


def _addresses(cells: list[Cell]) -> str:
    shown = ", ".join(cell.address for cell in cells[:_SHOWN])
    return f"{shown} and {len(cells) - _SHOWN} more" if len(cells) > _SHOWN else shown
