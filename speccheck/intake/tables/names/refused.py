"""What the name of a panel can never be: a date or issue, a unit, a figure, a heading, a sentence, a firm."""

from __future__ import annotations

import re
from functools import lru_cache

from speccheck.intake.tables.bands import find_bands, is_band_label
from speccheck.intake.tables.labels import is_unit
from speccheck.intake.tables.names.titles import codes
from speccheck.intake.tables.words import (
    column_role,
    fold,
    is_aside_of_table,
    is_generic_sheet_name,
    is_group_heading,
    names_array,
)
from speccheck.quantities.units import unit_name

_MONTH = (
    r"(?:jan|feb|f[eé]v|m[aä]r|apr|abr|avr|ma[iyj]|kwi|ju[nil]|giu|lug|aug|ao[uû]|ago|sie|sep|set|wrz|o[ckt]t|ou[tc]|paz|"
    r"nov|lis|de[cz]|di[cz]|gru|ene|gen|sty|lut|cze|lip)[^\W\d]*\.?"
)
_DATE = (
    rf"(?:(?:19|20)\d\d[-/.]\d\d?(?:[-/.]\d\d?)?|\d\d?[-/.]\d\d?[-/.](?:19|20)?\d\d|\d\d?/(?:19|20)\d\d"
    rf"|(?:\d\d?\.?\s*(?:de\s+)?)?{_MONTH}\s*(?:de\s+)?(?:\d\d?,\s*)?(?:19|20)\d\d)"
    r"(?:[T ]\d\d:\d\d(?::\d\d)?)?"
)
_ISSUE = (
    r"(?:rev(?:ision)?|issue|version|edition|vers|ausgabe|stand|[eé]dition|r[eé]vision|revisi[oó]n|edici[oó]n|revisione|"
    r"edizione|revis[aã]o|wydanie|rewizja|uitgave|revisie|draft)\.?\s*:?\s*"
    rf"(?:[a-z]|\d{{1,2}}(?:\.\d{{1,2}})*|{_DATE})"
    rf"|(?:date|datum|fecha|data)\s*:?\s*{_DATE}"
)
_OF_PAPER = re.compile(rf"(?:(?:{_DATE}|{_ISSUE})[\s,;/()–-]*)+", re.IGNORECASE)
_DATED = re.compile(rf"(?:[^\W\d]+\.?:?\s+){{1,2}}{_DATE}", re.IGNORECASE)
_WHOLE_DATE = re.compile(r"(?<!\d)(?:(?:19|20)\d\d-\d\d-\d\d|\d\d?[./]\d\d?[./](?:19|20)\d\d)(?!\d)")
_BARE = re.compile(r"[<>≤≥±~+−–-]*\s*(?:\d{1,3}|\d+[.,]\d+)\s*")
_FIRST_WORD = re.compile(r"[<>≤≥±~+−–-]*\s*\d+(?:[.,]\d+)?\s*([^\s\d()]+)\s*(?:[(\[].*)?")
_FIRM = re.compile(
    r"(?:^|[\s,])(?:inc|ltd|llc|plc|corp|gmbh|ag|kg|"
    r"s\.?a\.?s?|s\.?r\.?l|s\.?p\.?a|b\.?v|n\.?v|oy|ab|a/s|sp\.? z o\.? ?o)\.?$",
    re.IGNORECASE,
)
_REPLACES = re.compile(
    r"(?:this\s+)?(?:replac(?:es|ing)|supersed(?:es|ing)|successor (?:of|to)"
    r"|ersetzt|ersatz f[uü]r|nachfolger (?:von|der|des)|remplace|annule et remplace"
    r"|su[bs]stitu(?:ye|i)|reemplaza|sostituisce|zast[eę]puje|vervangt)\b",
    re.IGNORECASE,
)
_LONGEST, _MOST_WORDS = 70, 9


@lru_cache(maxsize=20_000)
def of_paper(text: str) -> bool:
    """Whether a text only dates or numbers the issue of a paper: 'Rev. 4, 2026-02-11', 'Printed May 2026'."""
    bare = text.strip(" ()[]")
    return (_OF_PAPER.fullmatch(bare) or _DATED.fullmatch(bare)) is not None


@lru_cache(maxsize=20_000)
def never_a_name(text: str) -> str:
    """What a text is that can never be the name of a panel; empty where it may be one."""
    words = " ".join(text.split())
    kinds = (
        ("a date or issue", of_paper(words) or (_WHOLE_DATE.search(words) is not None and not codes(words))),
        ("a figure", _is_figure(words)),
        ("a sentence", len(words) > _LONGEST or len(words.split()) > _MOST_WORDS),
        ("a unit", is_unit(words)),
        ("a word over columns", bool(column_role(words))),
        ("a word over rows", is_group_heading(words) or is_aside_of_table(words)),
        ("a band or array", _is_array(words)),
        ("a word for a sheet", not any(map(str.isdigit, words)) and _is_sheet_word(words)),
        ("what it replaces", _REPLACES.match(words) is not None),
        ("a firm", _FIRM.search(words) is not None),
    )
    return next((kind for kind, is_so in kinds if is_so), "")


def _is_figure(words: str) -> bool:
    """'12', '17,5', '50 ohm': a number, or one with a unit; a longer number may be the code of a product."""
    if _BARE.fullmatch(words):
        return True
    first = _FIRST_WORD.fullmatch(words)
    return first is not None and bool(unit_name(first[1]))


def _is_array(words: str) -> bool:
    bands = find_bands(words)
    around = bands.proved and not any(map(str.isdigit, bands.rest)) and bands.rest.islower()
    return around or is_band_label(words) or names_array(words)


def _is_sheet_word(words: str) -> bool:
    last = fold(words).rpartition(" ")[2]  # 'Panel A' is a name
    return len(last) > 1 and is_generic_sheet_name(words)
