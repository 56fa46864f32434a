"""A bidder's own copy: its rows only, written into a folder of its own."""

from __future__ import annotations

from collections.abc import Sequence
from pathlib import Path, PurePath

from speccheck import pipeline
from speccheck.records import Tender
from speccheck.records.evaluations import Bid
from speccheck.tender.copies import copy_for


def write_copy(
    bidder: str, bids: Sequence[Bid], *, out: Path, tender: Tender | None, formats: Sequence[str]
) -> list[Path]:
    """Write the outputs of one bidder again, without trace of the others.

    Parameters
    ----------
    bidder : file name with or without its ending, a maker or a panel; capitals do not matter
    bids : all bids that were judged together
    out : folder of the evaluation; the copy goes into ``copy-for-<stem>`` below it
    tender : the rules all were judged by
    formats : some of the keys of pipeline.SUFFIXES

    Raises
    ------
    UnusableInputError : nobody of that name is among them
    OutputError : a file could not be written
    """
    usable = [bid for bid in bids if not bid.error]
    named = [bid for bid in usable if bidder.strip().casefold() in _names(bid)]
    assessments = [pipeline.assess(bid.path, tender=tender) for bid in named or usable]
    written: list[Path] = []
    for copy in copy_for(bidder, assessments):
        source = next(Path(bid.path) for bid in usable if bid.sha256 == copy.submission.sha256)
        written += pipeline.write_outputs(copy, source, out / f"copy-for-{source.stem}", formats)
    return written


def _names(bid: Bid) -> frozenset[str]:
    names = (bid.file, PurePath(bid.file).stem, *(offer.panel for offer in bid.offers))
    return frozenset(name.strip().casefold() for name in names)
