"""Lines of the form ``Label: value``, and the lines that one cell holds."""

from __future__ import annotations

import re

LINE = re.compile(r"^\s*[-•*·]?\s*([^:=\t]{2,90}?)\s*(?::|=|\t|\.{3,}|…{2,})\s*(?=\S)(.+)$", re.DOTALL)


def looks_like_line(text: str) -> bool:
    """Whether a text has the form ``Label: value``, known or not."""
    return len(text) < 200 and LINE.match(text) is not None


def split_lines(text: str) -> list[str]:
    """The lines of a cell; pieces between semicolons count as lines when each has a label."""
    lines = [line.strip() for line in text.splitlines() if line.strip()]
    split: list[str] = []
    for line in lines:
        pieces = [piece.strip() for piece in re.split(r"\s*[;|]\s*", line) if piece.strip()]
        split += pieces if len(pieces) > 1 and all(map(looks_like_line, pieces)) else [line]
    return split
