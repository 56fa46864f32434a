"""How much of a file from outside is taken in before it is refused."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True, kw_only=True)
class Limits:
    """Ceilings far above any honest bid, low enough to read the worst file in seconds and under 300 MB.

    `expansion` is unpacked size over packed size of one part of an archive.
    """

    file_bytes: int = 40_000_000
    parts: int = 3_000
    part_bytes: int = 48_000_000
    total_bytes: int = 96_000_000
    expansion: int = 400
    elements: int = 2_500_000
    sheets: int = 200
    cells: int = 200_000
    merged_ranges: int = 20_000
    text_length: int = 32_767
    text_total: int = 24_000_000
