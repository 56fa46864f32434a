"""The looks of generated workbooks: cell formats by name, colours by tone of verdict."""

from __future__ import annotations

from collections.abc import Iterable

from openpyxl import Workbook
from openpyxl.cell import Cell
from openpyxl.formatting.rule import CellIsRule, Rule
from openpyxl.styles import Alignment, Border, Font, PatternFill, Protection, Side

from speccheck.records import Compliance, Fit, Outcome
from speccheck.report.cells import StyleIds
from speccheck.report.marks import COMPLIANCE, FITS, OUTCOMES, Mark

FONT = "Calibri"
INK = "1F2933"
HEADING_FILL = "243B53"

TONES = {
    "good": ("E3F1E6", "1B5E31"),
    "near": ("FFF1CC", "6B4700"),
    "bad": ("FBDCD9", "8A1C14"),
    "open": ("E4E7EB", "323F4B"),
}
"""Fill and ink by tone; each pair has a contrast above 4.5 to 1."""

READ_FILL = "EAF2FB"
UNREAD_FILL = "F3E8FD"
ENTRY_FILL = "FFFDF0"
EXAMPLE_INK = "52606D"

TEXTS = frozenset({"text", "wrap", "bold", "link", "heading", "example", "entry-text"})
NUMBER_FORMATS = {
    "number": "General",
    "number0": "0",
    "number1": "0.0",
    "number2": "0.00",
    "number3": "0.000",
    "number4": "0.0000",
}
FILLS = {
    "entry": ENTRY_FILL,
    "entry-text": ENTRY_FILL,
    "entry-date": ENTRY_FILL,
    "read": READ_FILL,
    "unread": UNREAD_FILL,
    **{tone: fill for tone, (fill, _) in TONES.items()},
}


def register_looks(workbook: Workbook) -> StyleIds:
    """Return the format numbers of every look; the workbook keeps the formats."""
    sheet = workbook.create_sheet("looks")
    names = ["heading", "text", "wrap", "bold", "link", "date", "example", "example-number", *NUMBER_FORMATS]
    names += FILLS
    ids = {name: _register(sheet.cell(row, 1), name, quoted=False) for row, name in enumerate(names, 1)}
    quoted = {name: _register(sheet.cell(row, 2), name, quoted=True) for row, name in enumerate(names, 1)}
    workbook.remove(sheet)
    return StyleIds(ids, quoted)


def _register(cell: Cell, name: str, *, quoted: bool) -> int:
    fill = HEADING_FILL if name == "heading" else FILLS.get(name, "")
    cell.font = _font(name)
    cell.fill = PatternFill("solid", start_color=fill) if fill else PatternFill()
    written = name in TEXTS
    cell.alignment = Alignment(
        horizontal="left" if written else None,
        indent=1 if written else 0,
        vertical="center" if name == "heading" else "top",
        wrap_text=name in {"wrap", "heading"},
    )
    line = Side(style="thin", color="D9E2EC")
    cell.border = Border(bottom=line, right=line) if fill else Border(bottom=line)
    cell.protection = Protection(locked=name == "heading")
    cell.number_format = _number_format(name)
    cell.quotePrefix = quoted
    number: int = cell.style_id
    return number


def _font(name: str) -> Font:
    if name == "heading":
        return Font(name=FONT, size=11, bold=True, color="FFFFFF")
    if name == "link":
        return Font(name=FONT, size=11, underline="single", color="0B5394")
    if name.startswith("example"):
        return Font(name=FONT, size=11, italic=True, color=EXAMPLE_INK)
    ink = TONES[name][1] if name in TONES else INK
    return Font(name=FONT, size=11, bold=name == "bold", color=ink)


def _number_format(name: str) -> str:
    if name in NUMBER_FORMATS:
        return NUMBER_FORMATS[name]
    if name in {"date", "entry-date"}:
        return "yyyy-mm-dd"
    if name in TEXTS:
        return "@"
    return "General"


def status_rules(words: Iterable[str]) -> list[Rule]:
    """Return conditional formats that colour a status word wherever sorting takes it."""
    return [_status_rule(word, _TONE_OF[word]) for word in words]


def _status_rule(word: str, tone: str) -> Rule:
    fill, ink = TONES[tone]
    return CellIsRule(
        operator="equal",
        formula=[f'"{word}"'],
        fill=PatternFill("solid", bgColor=fill),
        font=Font(bold=True, color=ink),
    )


def _tones(marks: dict[Fit, Mark] | dict[Compliance, Mark] | dict[Outcome, Mark]) -> dict[str, str]:
    return {str(word): mark.tone for word, mark in marks.items()}


_TONE_OF = {**_tones(FITS), **_tones(COMPLIANCE), **_tones(OUTCOMES)}
