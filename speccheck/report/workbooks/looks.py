"""The looks of generated workbooks: cell formats by name, colours by tone of verdict."""

from __future__ import annotations

import functools
from collections.abc import Iterable
from dataclasses import dataclass

from speccheck.records import Compliance, Fit, Outcome
from speccheck.report.pages.marks import COMPLIANCE, FITS, OUTCOMES, Mark

FONT = "Calibri"
INK = "1F2933"
RULE = "D9E2EC"

TONES = {
    "good": ("E3F1E6", "1B5E31"),
    "near": ("FFF1CC", "6B4700"),
    "bad": ("FBDCD9", "8A1C14"),
    "open": ("E4E7EB", "323F4B"),
}
"""Fill and ink by tone; each pair has a contrast above 4.5 to 1."""

ENTRY_FILL = "FFFDF0"
TEXT_FORMAT, DATE_FORMAT = "@", "yyyy-mm-dd"


@dataclass(frozen=True, slots=True, kw_only=True)
class Look:
    """A cell format; `written` cells hold text, stand left and have the text format."""

    fill: str = ""
    ink: str = INK
    bold: bool = False
    italic: bool = False
    underlined: bool = False
    written: bool = False
    wrapped: bool = False
    locked: bool = False
    number_format: str = "General"


def _looks() -> dict[str, Look]:
    looks = {
        "heading": Look(fill="243B53", ink="FFFFFF", bold=True, written=True, wrapped=True, locked=True),
        "text": Look(written=True),
        "wrap": Look(written=True, wrapped=True),
        "bold": Look(written=True, bold=True),
        "link": Look(written=True, wrapped=True, underlined=True, ink="0B5394"),
        "example": Look(written=True, italic=True, ink="52606D"),
        "example-number": Look(italic=True, ink="52606D"),
        "date": Look(number_format=DATE_FORMAT),
        "number": Look(),
        "entry": Look(fill=ENTRY_FILL),
        "entry-text": Look(fill=ENTRY_FILL, written=True),
        "entry-date": Look(fill=ENTRY_FILL, number_format=DATE_FORMAT),
        "read": Look(fill="EAF2FB"),
        "unread": Look(fill="F3E8FD"),
    }
    looks |= {f"number{n}": Look(number_format="0." + "0" * n if n else "0") for n in range(5)}
    looks |= {tone: Look(fill=fill, ink=ink) for tone, (fill, ink) in TONES.items()}
    looks |= {f"{tone}-wrap": Look(fill=fill, ink=ink, wrapped=True) for tone, (fill, ink) in TONES.items()}
    return looks


LOOKS = _looks()
_NUMBER = {name: 1 + 2 * n for n, name in enumerate(LOOKS)}
_FORMATS = {"General": 0, "0": 1, "0.00": 2, TEXT_FORMAT: 49}
"""Number formats that the file format numbers itself; others are numbered from 164."""


def style_number(look: str, *, quoted: bool = False) -> int:
    """Number of a cell format; a `quoted` one keeps text as text when a person edits it.

    Raises
    ------
    KeyError : a look that is not in LOOKS
    """
    return _NUMBER[look] + quoted


@functools.cache
def styles_xml() -> str:
    """Return the styles part of every generated workbook."""
    fonts = list(dict.fromkeys(map(_font, LOOKS.values())))
    fills = list(dict.fromkeys(_fill(look.fill) for look in LOOKS.values() if look.fill))
    formats = dict(_FORMATS)
    for look in LOOKS.values():
        formats.setdefault(_format(look), 164 + len(formats) - len(_FORMATS))
    cells = ['<xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/>']
    for look in LOOKS.values():
        fill = fills.index(_fill(look.fill)) + 2 if look.fill else 0
        numbers = formats[_format(look)], fonts.index(_font(look)) + 1, fill
        cells += [_cell_format(look, numbers, quoted=quoted) for quoted in (False, True)]
    own = [f'<numFmt numFmtId="{n}" formatCode="{code}"/>' for code, n in formats.items() if n >= 164]
    plain_font = f'<font><sz val="11"/><color rgb="FF{INK}"/><name val="{FONT}"/><family val="2"/></font>'
    none = '<fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill>'
    side = f'style="thin"><color rgb="FF{RULE}"/>'
    borders = (
        "<border><left/><right/><top/><bottom/><diagonal/></border>"
        f"<border><left/><right/><top/><bottom {side}</bottom><diagonal/></border>"
        f"<border><left/><right {side}</right><top/><bottom {side}</bottom><diagonal/></border>"
    )
    normal = '<xf numFmtId="0" fontId="0" fillId="0" borderId="0"'
    return (
        '<styleSheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main">'
        f'<numFmts count="{len(own)}">{"".join(own)}</numFmts>'
        f'<fonts count="{len(fonts) + 1}">{plain_font}{"".join(fonts)}</fonts>'
        f'<fills count="{len(fills) + 2}">{none}{"".join(fills)}</fills>'
        f'<borders count="3">{borders}</borders>'
        f'<cellStyleXfs count="1">{normal}/></cellStyleXfs>'
        f'<cellXfs count="{len(cells)}">{"".join(cells)}</cellXfs>'
        '<cellStyles count="1"><cellStyle name="Normal" xfId="0" builtinId="0"/></cellStyles>'
        f'<dxfs count="{len(TONES)}">{"".join(map(_tone_format, TONES))}</dxfs>'
        "</styleSheet>"
    )


def _font(look: Look) -> str:
    marks = ("<b/>" if look.bold else "") + ("<i/>" if look.italic else "")
    marks += "<u/>" if look.underlined else ""
    return (
        f'<font>{marks}<sz val="11"/><color rgb="FF{look.ink}"/><name val="{FONT}"/><family val="2"/></font>'
    )


def _fill(colour: str) -> str:
    return f'<fill><patternFill patternType="solid"><fgColor rgb="FF{colour}"/></patternFill></fill>'


def _format(look: Look) -> str:
    return TEXT_FORMAT if look.written else look.number_format


def _cell_format(look: Look, numbers: tuple[int, int, int], *, quoted: bool) -> str:
    number_format, font, fill = numbers
    horizontal = ' horizontal="left" indent="1"' if look.written else ""
    wrap = ' wrapText="1"' if look.wrapped else ""
    return (
        f'<xf numFmtId="{number_format}" fontId="{font}" fillId="{fill}" borderId="{2 if fill else 1}"'
        f' xfId="0"{" quotePrefix=" + chr(34) + "1" + chr(34) if quoted else ""} applyNumberFormat="1"'
        ' applyFont="1" applyFill="1" applyBorder="1" applyAlignment="1" applyProtection="1">'
        f'<alignment{horizontal} vertical="{"center" if look.locked else "top"}"{wrap}/>'
        f'<protection locked="{int(look.locked)}"/></xf>'
    )


def _tone_format(tone: str) -> str:
    fill, ink = TONES[tone]
    return (
        f'<dxf><font><b/><color rgb="FF{ink}"/></font>'
        f'<fill><patternFill><bgColor rgb="FF{fill}"/></patternFill></fill></dxf>'
    )


def status_rules(words: Iterable[str], first_priority: int) -> str:
    """Return conditional formats that colour a status word wherever sorting takes it."""
    tones = list(TONES)
    return "".join(
        f'<cfRule type="cellIs" dxfId="{tones.index(_TONE_OF[word])}" priority="{priority}" operator="equal">'
        f'<formula>"{word}"</formula></cfRule>'
        for priority, word in enumerate(words, start=first_priority)
    )


def _tones(marks: dict[Fit, Mark] | dict[Compliance, Mark] | dict[Outcome, Mark]) -> dict[str, str]:
    return {str(word): mark.tone for word, mark in marks.items()}


_TONE_OF = {**_tones(FITS), **_tones(COMPLIANCE), **_tones(OUTCOMES)}
