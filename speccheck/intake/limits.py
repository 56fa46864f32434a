"""How much of a file from outside is taken in before it is refused."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True, kw_only=True)
class Limits:
    """Bounds that keep one hostile file from taking the machine; all far above any honest bid.

    `expansion` is unpacked size over packed size of one part of an archive.
    """

    file_bytes: int = 50_000_000
    parts: int = 5_000
    part_bytes: int = 150_000_000
    total_bytes: int = 300_000_000
    expansion: int = 200
    elements: int = 6_000_000
    sheets: int = 200
    cells: int = 500_000
    merged_ranges: int = 20_000
    text_length: int = 32_767
    text_total: int = 50_000_000
