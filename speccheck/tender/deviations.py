"""Accepted deviations: they count as passed until they expire and never hide the failed row."""

from __future__ import annotations

from dataclasses import replace
from pathlib import PurePath

from speccheck.records import Compliance, Deviation, MatrixRow, Panel, Tender

_EXCUSABLE = (
    Compliance.FAILS,
    Compliance.FAILS_NARROWLY,
    Compliance.DECLARED_ONLY,
    Compliance.NOT_STATED,
    Compliance.NOT_JUDGED,
)


def with_deviation(row: MatrixRow, tender: Tender, panel: Panel) -> MatrixRow:
    """The row with an accepted deviation of its clause and offer; an expired one is only named.

    The day that counts is `settings.today`; without it only deviations cannot be dated and none counts.
    """
    if row.verdict not in _EXCUSABLE:
        return row
    mine = [d for d in tender.deviations if d.clause == row.requirement.clause and applies(d, panel)]
    for deviation in mine:
        if tender.settings.today and deviation.expires >= tender.settings.today:
            return replace(
                row, verdict=Compliance.DEVIATION_ACCEPTED, underlying=row.verdict, deviation=deviation
            )
    if mine:
        note = f"the deviation accepted by {mine[0].approver} expired on {mine[0].expires} and does not count"
        return replace(row, note="; ".join(filter(None, (row.note, note))))
    return row


def applies(deviation: Deviation, panel: Panel) -> bool:
    """Whether a deviation names this panel, its file or its maker."""
    maker = panel.get("manufacturer")
    names = {panel.name, panel.where.file, PurePath(panel.where.file).stem}
    names |= {str(maker.value)} if maker is not None else set()
    return deviation.offer.strip().casefold() in {name.strip().casefold() for name in names}
