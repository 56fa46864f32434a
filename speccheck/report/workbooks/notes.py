"""Notes beside cells of a generated sheet: the comments part and the drawing that places them."""

from __future__ import annotations

from collections.abc import Mapping

from speccheck.report.workbooks.cells import column_letter, xml_text
from speccheck.text import plain

LONGEST_NOTE = 600
WIDTH_POINTS = 200
LETTERS_A_LINE = 38

SHAPES_A_BLOCK = 1024
"""Shape numbers come in blocks that the drawing lists."""

_HEAD = (
    '<xml xmlns:v="urn:schemas-microsoft-com:vml" xmlns:o="urn:schemas-microsoft-com:office:office"'
    ' xmlns:x="urn:schemas-microsoft-com:office:excel">'
)
_BOX = (
    '<v:shapetype id="_x0000_t202" coordsize="21600,21600" o:spt="202" path="m,l,21600r21600,l21600,xe">'
    '<v:stroke joinstyle="miter"/><v:path gradientshapeok="t" o:connecttype="rect"/></v:shapetype>'
)


def comments_xml(notes: Mapping[tuple[int, int], str]) -> str:
    """Return the comments part for notes by (row, column)."""
    body = "".join(
        f'<comment ref="{column_letter(column)}{row}" authorId="0"><text>'
        f'<t xml:space="preserve">{xml_text(plain(text, LONGEST_NOTE))}</t></text></comment>'
        for (row, column), text in notes.items()
    )
    return (
        '<comments xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main">'
        f"<authors><author>speccheck</author></authors><commentList>{body}</commentList></comments>"
    )


def drawing_xml(notes: Mapping[tuple[int, int], str]) -> str:
    """Return the drawing part that gives each note a hidden box big enough for its text."""
    shapes = "".join(
        _shape(number, row, column, text)
        for number, ((row, column), text) in enumerate(notes.items(), start=SHAPES_A_BLOCK + 1)
    )
    blocks = ",".join(str(1 + n) for n in range(1 + len(notes) // SHAPES_A_BLOCK))
    numbered = f'<o:shapelayout v:ext="edit"><o:idmap v:ext="edit" data="{blocks}"/></o:shapelayout>'
    return f"{_HEAD}{numbered}{_BOX}{shapes}</xml>"


def _shape(number: int, row: int, column: int, text: str) -> str:
    shown = plain(text, LONGEST_NOTE)
    lines = 1 + sum(1 + len(part) // LETTERS_A_LINE for part in shown.split("\n"))
    style = (
        f"position:absolute;margin-left:60pt;margin-top:2pt;width:{WIDTH_POINTS}pt;height:{12 * lines + 8}pt;"
        "z-index:1;visibility:hidden"
    )
    return (
        f'<v:shape id="_x0000_s{number}" type="#_x0000_t202" style="{style}" fillcolor="#ffffe1"'
        ' o:insetmode="auto"><v:fill color2="#ffffe1"/><v:shadow color="black" obscured="t"/>'
        '<v:path o:connecttype="none"/><v:textbox style="mso-direction-alt:auto">'
        '<div style="text-align:left"></div></v:textbox><x:ClientData ObjectType="Note">'
        "<x:MoveWithCells/><x:SizeWithCells/><x:AutoFill>False</x:AutoFill>"
        f"<x:Row>{row - 1}</x:Row><x:Column>{column - 1}</x:Column></x:ClientData></v:shape>"
    )
