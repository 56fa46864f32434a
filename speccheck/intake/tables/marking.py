"""A first look at every cell of a sheet: headings, pasted lines, plain values."""

from __future__ import annotations

import re
from collections import defaultdict
from functools import lru_cache

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.beams import unmark_beams
from speccheck.intake.tables.labels import (
    Label,
    Labels,
    is_heading_filler,
    is_unit,
    statistic_of,
)
from speccheck.intake.tables.lines import split_lines
from speccheck.intake.tables.marks import Marks, is_form_heading, looks_like_value
from speccheck.intake.tables.words import column_role, is_band_nickname

_LONGEST = 2000
_SIZES = frozenset("HWDBTLPAGS")
_LETTER_UNIT = re.compile(r"(?<=^[A-Za-z])\s*(?:[(\[]|,\s)\s*(?:mm|cm|m|in|inch|\")\s*[)\]]?$")
_LONGEST_LETTER = 9
_COUNTED = re.compile(r"\b\d+\s+[^\W\d_]{3,}")
_WORD = re.compile(r"[^\W\d_]+")
_BRACKETED = re.compile(r"[(\[][^()\[\]]*[)\]]")
_MOST_COUNTED = 2
"""Words behind a number that is no item number: '64 TRX', but not '12 Number of ports'."""
_FEWEST_HEADINGS = 4
_FEWEST_FILLED, _FEWEST_LETTERS = 3, 3
_NAME_WITH_NUMBER = re.compile(r"[^\W\d_]\s+\d+\w{0,2}$")
_HEADS_VALUES = ("offered", "unit", "minimum", "typical", "maximum")
_LINE_MARKS = (":", "=", "\t", "...", "…")


def _rows(grid: Grid) -> dict[int, list[Cell]]:
    """Cells by row; a title said again in every cell, as some programs unfold merged cells, counts once."""
    rows = grid.rows()
    for row, cells in rows.items():
        if len(cells) >= _FEWEST_FILLED and cells[0].raw == cells[1].raw and _is_unfolded(cells):
            rows[row] = cells[:1]
    return rows


def _is_unfolded(cells: list[Cell]) -> bool:
    first = cells[0].raw
    words = isinstance(first, str) and sum(map(str.isalpha, first)) >= _FEWEST_LETTERS
    return words and all(cell.raw == first for cell in cells)


def mark(grid: Grid, labels: Labels) -> Marks:
    """Look at every visible cell once."""
    marks = Marks(grid, labels, _rows(grid))
    values: set[str] = set()
    for row, cells in marks.rows.items():
        following: Cell | None = None
        for cell in reversed(cells):
            raw = cell.raw
            if isinstance(raw, str) and raw not in values and not cell.fault:
                if _is_value(raw, labels):
                    values.add(raw)
                else:
                    _mark_text(marks, (row, cell.column), raw, following)
            following = cell
    _mark_letters(marks)
    unmark_beams(marks)
    _unmark_column_words(marks)
    _unmark_answers(marks)
    return marks


def _unmark_answers(marks: Marks) -> None:
    """Words of the dictionary beside figures, below a row of headings, are answers: 'RET included'."""
    by_row: dict[int, list[int]] = defaultdict(list)
    for row, column in sorted(marks.headings):
        by_row[row].append(column)
    columns: set[int] = set()
    for row, headings in by_row.items():
        cells = marks.rows[row]
        if len(headings) >= _FEWEST_HEADINGS and len(headings) * 4 >= len(cells) * 3:
            columns = {cell.column for cell in cells}
        elif columns and _answers(marks, [cell for cell in cells if cell.column in columns], len(columns)):
            first = min(columns)
            if first in headings and not _NAME_WITH_NUMBER.search(marks.grid.cells[row, first].text):
                columns = set()  # headings down the side begin
                continue
            for column in headings:
                if column in columns:
                    del marks.headings[row, column]


def _answers(marks: Marks, under: list[Cell], headings: int) -> bool:
    """Whether a row below headings holds figures, under half of the headings or more."""
    plain = [c for c in under if not marks.is_heading(c) and looks_like_value(c)]
    return len(under) * 2 >= headings and any(not is_heading_filler(c.text) for c in plain)


def _unmark_column_words(marks: Marks) -> None:
    """Words over the columns of a table with headings down the side head no values: 'Parameter | Typ'."""
    for row in sorted({row for row, _ in marks.headings}):
        cells, headings = marks.rows[row], marks.heading_columns(row)
        if _are_statistics([marks.grid.cells[row, column] for column in headings], cells):
            for column in headings:
                del marks.headings[row, column]
            continue
        if len(headings) > 4:
            continue
        if _names_over_headings(marks, row, headings):
            del marks.headings[row, headings[0]]
            continue
        roles = [column_role(cell.text) for cell in cells if isinstance(cell.raw, str)]
        if is_form_heading(roles) or _tells_arrays_apart(cells):
            for column in headings:
                if column_role(marks.grid.cells[row, column].text):
                    del marks.headings[row, column]
            continue
        if len(headings) > 2:
            continue
        statistics = sum(role in ("minimum", "typical", "maximum") for role in roles)
        for column in headings:
            said = statistic_of(marks.grid.cells[row, column].text)
            detail = bool(said) and _follows_heading(marks, row, column)
            if "parameter" in roles or statistics > 1 or detail:
                del marks.headings[row, column]


def _are_statistics(headings: list[Cell], cells: list[Cell]) -> bool:
    """Whether a row says 'Min | Typ | Max' under several names: there 'Typ' is no German 'type'."""
    said = {statistic_of(cell.text) for cell in cells if isinstance(cell.raw, str)}
    return len(headings) > 1 and len(said - {""}) > 1 and all(statistic_of(c.text) for c in headings)


def _names_over_headings(marks: Marks, row: int, headings: list[int]) -> bool:
    """Whether 'Model | KD-1 | KD-2' stands over a row of bands, of 'Min | Typ' or of 'Parameter | Value'."""
    first, *names = marks.rows[row]
    if headings != [first.column] or column_role(first.text) != "panel":
        return False
    below = marks.rows.get(row + 1, [])
    beside = [cell for cell in below if cell.column > first.column]
    corner = [column_role(cell.text) for cell in below if cell.column <= first.column]
    heads = len(beside) > 1 and all(
        isinstance(cell.raw, str)
        and (is_heading_filler(cell.text) or column_role(cell.text) in _HEADS_VALUES)
        for cell in beside
    )
    return heads and corner in ([], ["parameter"]) and len({cell.text for cell in names}) > 1


def _tells_arrays_apart(cells: list[Cell]) -> bool:
    """Whether a row heads the columns of arrays: 'Array | R1 | Y1 | Y2'."""
    first, *others = cells
    told = len(others) > 1 and column_role(first.text) == "band"
    return told and all(isinstance(c.raw, str) and is_band_nickname(c.text) for c in others)


def _follows_heading(marks: Marks, row: int, column: int) -> bool:
    before = marks.grid.covering(row, column - 1) if column > 1 else None
    return before is not None and (before.row, before.column) in marks.headings


def _mark_letters(marks: Marks) -> None:
    """H, W and D beside or below one another head the three sizes."""
    letters = {
        place: _LETTER_UNIT.sub("", cell.text.strip())
        for place, cell in marks.grid.cells.items()
        if isinstance(cell.raw, str) and len(cell.text) < _LONGEST_LETTER and is_size_letter(cell.text)
    }
    for row, column in letters:
        for step in ((0, 1), (1, 0)):
            places = [(row + n * step[0], column + n * step[1]) for n in range(3)]
            if all(place in letters for place in places):
                _mark_three(marks, places, " x ".join(letters[place] for place in places))
    for (row, column), letter in letters.items():
        around = ((row - 1, column), (row + 1, column), (row, column - 1), (row, column + 1))
        pair = any(place in letters and letters[place] != letter for place in around)
        if pair and (row, column) not in marks.headings and (label := marks.labels.letter(letter)):
            marks.headings[row, column] = label


@lru_cache(maxsize=20_000)
def is_size_letter(text: str) -> bool:
    """Whether a heading is a letter, perhaps with a unit of length, that may head a size."""
    if len(text) >= _LONGEST_LETTER or (len(text) > 1 and text[1] not in " ([,"):
        return False
    return _LETTER_UNIT.sub("", text.strip()).upper() in _SIZES


def _mark_three(marks: Marks, places: list[tuple[int, int]], letters: str) -> None:
    """'H x L x P' and 'L x W x H': what a letter stands for depends on the other two."""
    sizes = marks.labels.of(letters).parameters
    for place, size in zip(places, sizes, strict=False):
        text = marks.grid.cells[place].text
        unit = "".join(_LETTER_UNIT.findall(text.strip())).strip(" ,()[]")
        marks.headings[place] = Label(text, (size,), unit=unit, how=f"heading '{text}' of '{letters}'")


def _is_value(text: str, labels: Labels) -> bool:
    """Whether a text is neither heading nor line, wherever it stands; catalogues repeat their values."""
    if len(text) > _LONGEST or not any(letter.isalpha() for letter in text) or is_unit(text):
        return True
    if any(mark in text for mark in _LINE_MARKS):
        return False
    label = labels.of(text)
    return not label or _counts(text, label)


def _counts(text: str, label: Label) -> bool:
    """Whether a text says how many of something there are: '192 elements (12x8x2)', '12 rows, 8 columns'."""
    if not _COUNTED.match(text) or any(parameters()[key].kind != "count" for key in label.parameters):
        return False
    words = _WORD.findall(_BRACKETED.sub("", text))
    return len(words) <= _MOST_COUNTED or len(_COUNTED.findall(text)) > 1


def _mark_text(marks: Marks, place: tuple[int, int], text: str, following: Cell | None) -> None:
    """A label with its value behind a colon is a line, unless the value stands in the next cell."""
    alone = following is None or (following.row, following.column) in marks.lines
    if (alone or "\n" in text) and any(mark in text for mark in _LINE_MARKS):
        known = [line for line in map(marks.labels.parse_line, split_lines(text)) if line is not None]
        if known:
            marks.lines[place] = known[0]
            return
    label = marks.labels.of(text)
    if label:
        marks.headings[place] = label
