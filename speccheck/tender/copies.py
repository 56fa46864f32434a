"""Copies for one bidder: its own rows and nothing of another bidder."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import replace
from pathlib import PurePath

from speccheck.errors import UnusableInputError
from speccheck.records import Assessment, Deviation, Tender


def copy_for(bidder: str, assessments: Sequence[Assessment]) -> tuple[Assessment, ...]:
    """Return the assessments of one bidder, without deviations granted to others.

    Parameters
    ----------
    bidder : file name with or without its ending, a maker or a panel; capitals do not matter
    assessments : all that were judged together

    Raises
    ------
    UnusableInputError : nobody of that name is among them
    """
    mine = [one for one in assessments if bidder.strip().casefold() in bidder_names(one)]
    if not mine:
        known = ", ".join(sorted(one.submission.file for one in assessments)) or "no file"
        raise UnusableInputError(
            bidder,
            found="a name that no judged file, maker or panel has",
            expected=f"a bidder among {known}",
            remedy="give the file name of the bid",
        )
    names = frozenset().union(*map(bidder_names, mine))
    return tuple(replace(one, tender=_without_others(one.tender, names)) for one in mine)


def bidder_names(assessment: Assessment) -> frozenset[str]:
    """Names a bid goes by, folded: its file, the makers and the panels it states."""
    submission = assessment.submission
    makers = (panel.get("manufacturer") for panel in submission.panels)
    names = [
        submission.file,
        PurePath(submission.file).stem,
        *(panel.name for panel in submission.panels),
        *(str(maker.value) for maker in makers if maker is not None),
    ]
    return frozenset(name.strip().casefold() for name in names if name.strip())


def _without_others(tender: Tender | None, names: frozenset[str]) -> Tender | None:
    """Return the tender with the deviations of these names only, and nothing else of their sheet."""
    if tender is None:
        return None
    sheets = {deviation.where.sheet for deviation in tender.deviations}
    return replace(
        tender,
        deviations=tuple(_granted_to(names, tender.deviations)),
        unread=tuple(one for one in tender.unread if one.where.sheet not in sheets),
        findings=tuple(
            one for one in tender.findings if not any(where.sheet in sheets for where in one.where)
        ),
    )


def _granted_to(names: frozenset[str], deviations: Iterable[Deviation]) -> Iterable[Deviation]:
    return (one for one in deviations if one.offer.strip().casefold() in names)
