"""The section 'inputs as read': what every cell of the offer was taken for, in sheet order."""

from __future__ import annotations

import re
from dataclasses import dataclass

from speccheck.records import CellRef, Reading, Statement, Submission

_ADDRESS = re.compile(r"([A-Z]+)([0-9]+)")


@dataclass(frozen=True, slots=True, kw_only=True)
class InputRow:
    """One cell and one thing read from it; `anchor` is empty on the second and later rows of a cell."""

    where: CellRef
    anchor: str
    panel: str
    reading: Reading | None = None
    statement: Statement | None = None


def input_rows(submission: Submission) -> tuple[tuple[InputRow, ...], dict[CellRef, str]]:
    """All readings and statements in sheet order, and the anchor of each cell."""
    items: list[tuple[CellRef, str, Reading | None, Statement | None]] = []
    for panel in submission.panels:
        items.extend((r.where, panel.name, r, None) for r in panel.readings)
        items.extend((s.where, panel.name, None, s) for s in panel.statements)
    sheets = {name: i for i, name in enumerate(dict.fromkeys(item[0].sheet for item in items))}
    items.sort(key=lambda item: (sheets[item[0].sheet], *_place(item[0].cell)))
    anchors: dict[CellRef, str] = {}
    rows = []
    for where, panel_name, reading, statement in items:
        first = where not in anchors
        if first:
            anchors[where] = f"c{len(anchors) + 1}"
        rows.append(
            InputRow(
                where=where,
                anchor=anchors[where] if first else "",
                panel=panel_name,
                reading=reading,
                statement=statement,
            )
        )
    return tuple(rows), anchors


def _place(address: str) -> tuple[int, int]:
    """Row and column of a cell address, for sorting; unreadable addresses come last."""
    match = _ADDRESS.match(address)
    if match is None:
        return 2**31, 0
    column = 0
    for letter in match[1]:
        column = column * 26 + ord(letter) - ord("A") + 1
    return int(match[2]), column
