"""Bidder text made harmless; everything from outside is hostile."""

from __future__ import annotations

import re

_UNSAFE = re.compile(r"[\x00-\x08\x0b\x0c\x0e-\x1f\x7f\u200e\u200f\u202a-\u202e\u2066-\u2069]")


def plain(text: str, limit: int = 2000) -> str:
    """Bidder text without control and direction marks, cut at `limit` characters."""
    clean = _UNSAFE.sub("\ufffd", text)
    return clean if len(clean) <= limit else clean[:limit] + "…"
