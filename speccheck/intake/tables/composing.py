"""The parameter that the heading cells over one column name together."""

from __future__ import annotations

import re

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.bands import is_band_label
from speccheck.intake.tables.columns import PLANE_LETTERS, Column, describe
from speccheck.intake.tables.labels import Label, Labels, is_unit, statistic_of
from speccheck.intake.tables.words import column_role, is_group_heading

_BRACKETS = re.compile(r"[(\[][^()\[\]]*[)\]]")


def compose(index: int, stack: list[Cell], labels: Labels) -> tuple[Label, Column]:
    """The parameter a stack of heading cells names, and what else the stack says."""
    column = describe(index, stack, labels)
    words = [
        " ".join(c.text.split())
        for c in stack
        if c.text.strip() in PLANE_LETTERS
        or not (is_unit(c.text) or is_band_label(c.text) or statistic_of(c.text))
    ]
    for text in _combinations(words):
        label = labels.of(text)
        if label:
            label = _part_of(label, words[-1], labels)
            if column.band is None and label.bands.spans:
                column.band = label.bands.hull
            return label, column
    if words and column_role(words[-1]):
        column.role = column_role(words[-1])
    return Label(" ".join(words)), column


def _part_of(label: Label, word: str, labels: Labels) -> Label:
    """Under 'Dimensions' the words 'Height' and 'H' each head one of the three figures."""
    if len(label.parameters) < 2:
        return label
    alone = labels.of(word) or labels.letter(word)
    return alone if len(alone.parameters) == 1 and set(alone.parameters) < set(label.parameters) else label


def _combinations(words: list[str]) -> list[str]:
    if not words:
        return []
    tails = [words[start:] for start in range(len(words) - 1)]
    joined = [text for tail in tails for text in (" ".join(tail), ", ".join(tail), _upper_bare(tail))]
    backwards = [] if is_group_heading(words[0]) else [" ".join(reversed(words))]
    return [*joined, *backwards, *reversed(words)]


def _upper_bare(words: list[str]) -> str:
    """Words joined without the brackets of the upper ones: 'HPBW (°)' over 'H' is HPBW H."""
    return " ".join([*(_BRACKETS.sub("", word).strip() for word in words[:-1]), words[-1]])
