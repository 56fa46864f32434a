"""Cells, rows and links of a generated sheet as SpreadsheetML text.

Text is always of the text type, so that nothing typed by a bidder can run, and a formula is stored
with its result, so that a reader that does not calculate shows it too.
"""

from __future__ import annotations

import functools
import math
import re
from collections.abc import Sequence
from dataclasses import dataclass

from speccheck.report.workbooks.looks import style_number
from speccheck.text import plain

LONGEST_TEXT = 32_000
"""A cell holds 32 767 characters."""

_SHORT = 60
"""Letters of a text that is worth keeping as it was written."""

_NOT_XML = re.compile("[\ud800-\udfff\ufffe\uffff]")
_HARMLESS = re.compile("[ -%'-;=?-^`-~\u00a0-\u1fff\u2010-\u2027\u2030-\u2065\u2070-\ud7ff\n]*")
"""Text that needs no care: no mark-up, no controls, no direction marks, no underscore."""
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


@functools.cache
def column_letter(number: int) -> str:
    """Letters of a column number, counted from 1."""
    letters = ""
    while number:
        number, rest = divmod(number - 1, 26)
        letters = chr(ord("A") + rest) + letters
    return letters


def xml_text(text: str) -> str:
    """Any text as XML character data that a spreadsheet shows as it was typed."""
    if _HARMLESS.fullmatch(text) and len(text) <= LONGEST_TEXT:
        return text
    lines = plain(text, LONGEST_TEXT).replace("\r\n", "\n").replace("\r", "\n")  # as XML reads them anyway
    clean = _LOOKS_ESCAPED.sub("_x005F_", _NOT_XML.sub("\ufffd", lines))
    return clean.replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;")


def xml_attribute(text: str) -> str:
    """Any text as an XML attribute value between double quotes."""
    return xml_text(text).replace('"', "&quot;").replace("\n", "&#10;")


def row_xml(
    number: int, row: Sequence[tuple[int, Content, str]], height: float | None, *, kept: bool = False
) -> str:
    """Return a ``row`` element of (column number, content, look) in column order.

    `height` [points] is what the row starts with; a program may fit it anew unless it is `kept`.
    """
    tall = f' ht="{height:g}"' if height is not None else ""
    tall += ' customHeight="1"' if kept else ""
    cells = [_cell(f"{column_letter(column)}{number}", item, look) for column, item, look in row]
    return f'<row r="{number}"{tall}>{"".join(cells)}</row>'


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


def _cell(address: str, item: Content, look: str) -> str:
    if isinstance(item, str):
        said = _short_text(item, look) if len(item) <= _SHORT else _text(item, look)
        return f'<c r="{address}" {said}'
    formula = ""
    if isinstance(item, Rich):
        look, formula, item = item.look or look, item.formula, item.value
    if isinstance(item, str):
        return _cell(address, item, look) if not formula else _calculated_text(address, item, look, formula)
    style = style_number(look)
    if isinstance(item, bool):
        return f'<c r="{address}" s="{style}" t="b"><v>{int(item)}</v></c>'
    stored = f"<f>{xml_text(formula)}</f>" if formula else ""
    if item is None or not math.isfinite(item):
        return f'<c r="{address}" s="{style}">{stored}</c>'
    return f'<c r="{address}" s="{style}">{stored}<v>{item!r}</v></c>'


def _calculated_text(address: str, text: str, look: str, formula: str) -> str:
    return (
        f'<c r="{address}" s="{style_number(look)}" t="str">'
        f"<f>{xml_text(formula)}</f><v>{xml_text(text)}</v></c>"
    )


def _text(text: str, look: str) -> str:
    """A cell of text after its address."""
    style = style_number(look, quoted=text.startswith(_RUNS_WHEN_EDITED))
    return f's="{style}" t="inlineStr"><is><t xml:space="preserve">{xml_text(text)}</t></is></c>'


_short_text = functools.lru_cache(maxsize=4096)(_text)
"""Verdicts, labels, bands and names stand in thousands of cells."""
