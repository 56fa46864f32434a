"""Progress: a line a bid, and on a terminal a bar with count and time left."""

from __future__ import annotations

import io
from collections.abc import Iterator

from speccheck.records.evaluations import Bid
from speccheck.screen import Progress


class Terminal(io.StringIO):
    """A stream that says it is a terminal."""

    def isatty(self) -> bool:
        return True


def _clock(*seconds: float) -> Iterator[float]:
    yield from seconds


def test_time_left_is_that_of_bids_worked_on() -> None:
    """By hand: one bid in 30 s (the other was kept) leaves 8 bids of 30 s = 4 min."""
    ticks, stream = _clock(0, 30), io.StringIO()
    progress = Progress(stream, lambda: next(ticks))
    progress(1, 10, Bid(path="a.xlsx", file="a.xlsx", resumed=True))
    progress(2, 10, Bid(path="b.xlsx", file="b.xlsx"))
    first, second = stream.getvalue().splitlines()
    assert first == "[ 1/10] a.xlsx: no panel (unchanged, kept)"
    assert second == "[ 2/10, 4 min left] b.xlsx: no panel"


def test_a_terminal_shows_a_bar_until_the_last_bid() -> None:
    ticks, stream = _clock(0, 2), Terminal()
    progress = Progress(stream, lambda: next(ticks))
    progress(1, 2, Bid(path="a.xlsx", file="a.xlsx"))
    assert stream.getvalue().endswith("━━━╌╌╌╌╌╌╌╌╌╌╌╌ 1 of 2 bids, 2 s left")
    progress(2, 2, Bid(path="b.xlsx", file="b.xlsx"))
    assert stream.getvalue().endswith("[2/2] b.xlsx: no panel\n")
