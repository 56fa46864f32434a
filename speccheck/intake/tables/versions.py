"""Columns that give one panel at several issues: 'Value 2025' beside 'Value 2026', 'Rev. A', 'Rev. B'."""

from __future__ import annotations

import re

from speccheck.intake.tables.columns import VALUE_ROLES, Column
from speccheck.intake.tables.words import column_role

_VERSION = re.compile(
    r"(?:(?:rev(?:ision)?|issue|version|edition|ausgabe|stand|[ée]dition|r[ée]vision|revisi[oó]n|edici[oó]n|"
    r"revisione|edizione|revis[aã]o|wydanie|rewizja|uitgave|revisie)\.?\s*([a-z]|\d{1,2})|(20[12]\d))",
    re.IGNORECASE,
)


def settle_versions(columns: dict[int, Column]) -> None:
    """Of columns named only by their issue the latest speaks of the panel; the others are superseded."""
    found = {i: v for i, c in columns.items() if c.role in VALUE_ROLES and (v := _version(c))}
    if len(set(found.values())) < 2:
        return
    latest = max(found.values())
    for index, version in found.items():
        column = columns[index]
        column.words, column.name_cell = [], None
        column.role = column.role if version == latest else "superseded"


def _version(column: Column) -> str:
    words = column.name.strip(" ()").split()
    if len(words) > 1 and column_role(words[0]) == "offered":
        words = words[1:]
    match = _VERSION.fullmatch(" ".join(words).strip(" ()"))
    return (match[1] or match[2]).upper().rjust(4) if match else ""
