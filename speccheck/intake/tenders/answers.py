"""The clarification list that a bidder has filled in and sent back."""

from __future__ import annotations

from pathlib import Path

from speccheck.errors import UnusableInputError
from speccheck.intake.files.opening import open_book
from speccheck.intake.tenders.tender_tables import Row, fold, table
from speccheck.records.answers import Answer

COLUMNS: dict[str, tuple[str, ...]] = {
    "number": ("no", "number"),
    "panel": ("panel",),
    "clause": ("clause", "clauses"),
    "cells": ("cell", "cells"),
    "asked": ("what is asked", "question"),
    "answer": ("answer",),
    "figure": ("figure", "answered figure"),
    "replaces": ("cell of the figure", "replaces cell"),
}


def read_answers(path: str | Path) -> tuple[Answer, ...]:
    """Rows of the sheet Questions that hold an answer or a figure, in order.

    Raises
    ------
    UnusableInputError : the file cannot be opened or holds no clarification list
    """
    book = open_book(path)
    for grid in book.grids:
        found = table(grid, book.file, COLUMNS, ("number", "panel", "answer"))
        if fold(grid.name) == "questions" and found is not None:
            return tuple(_answer(row) for row in found.rows if row.text("answer") or row.text("figure"))
    raise UnusableInputError(
        book.file,
        found="no sheet 'Questions' with the columns No, Panel and Answer",
        expected="the clarification list as it was sent, with the column Answer filled in",
        remedy="ask the bidder to fill in the file itself",
    )


def _answer(row: Row) -> Answer:
    cells = row.text("cells")
    return Answer(
        where=row.where("answer" if row.text("answer") else "figure"),
        number=row.text("number"),
        panel=row.text("panel"),
        clause=row.text("clause"),
        asked=row.text("asked"),
        text=row.text("answer"),
        figure=row.text("figure"),
        replaces=row.text("replaces") or cells.split(",")[0].strip(),
    )
