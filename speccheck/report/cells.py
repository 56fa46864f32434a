"""Cells, rows and links of a generated sheet as SpreadsheetML text.

openpyxl makes the frame of a workbook (styles, validations, print set-up); the rows are written
here, because it cannot store a formula together with its result, and because a cell costs it ten
times as long. Text is always of the text type, so that nothing typed by a bidder can run.
"""

from __future__ import annotations

import math
import re
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass

from openpyxl.utils import get_column_letter

from speccheck.text import plain

LONGEST_TEXT = 32_000
"""A cell holds 32 767 characters."""

_NOT_XML = re.compile("[\ud800-\udfff\ufffe\uffff]")
_LOOKS_ESCAPED = re.compile(r"_(?=x[0-9A-Fa-f]{4}_)")
_RUNS_WHEN_EDITED = tuple("=+-@|%\t\r\n ")


@dataclass(frozen=True, slots=True, kw_only=True)
class Rich:
    """A cell with more than a value.

    `look` names a style other than the column's, `link` a place inside the workbook such as
    ``'Input 1'!D12``, `hint` what is shown over the link, `formula` a live formula without its equals
    sign whose stored result is `value`.
    """

    value: str | float | None = None
    look: str = ""
    link: str = ""
    hint: str = ""
    formula: str = ""


Content = str | float | Rich | None
"""What a cell of a generated sheet holds."""


@dataclass(frozen=True, slots=True)
class StyleIds:
    """Numbers of the cell formats by name of look; `quoted` ones keep text as text when edited."""

    normal: Mapping[str, int]
    quoted: Mapping[str, int]


def xml_text(text: str) -> str:
    """Any text as XML character data that a spreadsheet shows as it was typed."""
    clean = _LOOKS_ESCAPED.sub("_x005F_", _NOT_XML.sub("\ufffd", plain(text, LONGEST_TEXT)))
    return clean.replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;")


def xml_attribute(text: str) -> str:
    """Any text as an XML attribute value between double quotes."""
    return xml_text(text).replace('"', "&quot;").replace("\n", "&#10;")


def sheet_data(
    rows: Mapping[int, Iterable[tuple[int, Content, str]]], heights: Mapping[int, float], styles: StyleIds
) -> str:
    """Return the ``sheetData`` element; each row is (column number, content, look) in column order.

    `heights` [points] is what a row starts with; a program may fit it anew.
    """
    letters = [get_column_letter(n) for n in range(1, _widest(rows) + 1)]
    parts = ["<sheetData>"]
    for number, row in rows.items():
        height = f' ht="{heights[number]:g}"' if number in heights else ""
        parts.append(f'<row r="{number}"{height}>')
        parts += [_cell(f"{letters[column - 1]}{number}", item, look, styles) for column, item, look in row]
        parts.append("</row>")
    parts.append("</sheetData>")
    return "".join(parts)


def hyperlinks(links: Sequence[tuple[str, Rich]]) -> str:
    """Return the ``hyperlinks`` element for (address, cell) pairs; links lead inside the workbook only."""
    if not links:
        return ""
    body = "".join(
        f'<hyperlink ref="{address}" location="{xml_attribute(cell.link)}"'
        f' tooltip="{xml_attribute(cell.hint[:250])}"/>'
        for address, cell in links
    )
    return f"<hyperlinks>{body}</hyperlinks>"


def _widest(rows: Mapping[int, Iterable[tuple[int, Content, str]]]) -> int:
    return max((column for row in rows.values() for column, _, _ in row), default=1)


def _cell(address: str, item: Content, look: str, styles: StyleIds) -> str:
    formula = ""
    if isinstance(item, Rich):
        look, formula, item = item.look or look, item.formula, item.value
    if isinstance(item, str):
        if formula:
            return (
                f'<c r="{address}" s="{styles.normal[look]}" t="str">'
                f"<f>{xml_text(formula)}</f><v>{xml_text(item)}</v></c>"
            )
        ids = styles.quoted if item.startswith(_RUNS_WHEN_EDITED) else styles.normal
        return (
            f'<c r="{address}" s="{ids[look]}" t="inlineStr">'
            f'<is><t xml:space="preserve">{xml_text(item)}</t></is></c>'
        )
    style = styles.normal[look]
    stored = f"<f>{xml_text(formula)}</f>" if formula else ""
    if item is None or not math.isfinite(item):
        return f'<c r="{address}" s="{style}">{stored}</c>'
    return f'<c r="{address}" s="{style}">{stored}<v>{item!r}</v></c>'
