"""Several figures in one cell: given to planes, tilts, frequencies, statistics or bands in their order."""

from __future__ import annotations

from speccheck.dictionary import parameters
from speccheck.intake.panels.found import Found
from speccheck.intake.panels.planes import ASK_FOR_PLANES, part_by_plane
from speccheck.intake.tables.claims import Claim
from speccheck.records import Band, Unread


def share_out_list(claim: Claim, found: list[Found], bands: list[Band]) -> tuple[list[Found], Unread | None]:
    """The figures of one cell, each with what tells it from the others; why not, if nothing does."""
    first = found[0]
    if trouble := part_by_plane(found):
        return [], Unread(where=first.where, text=first.raw, reason=trouble, suggestion=ASK_FOR_PLANES)
    alike = _plain_list(found)
    label = claim.context.label
    if label.tilts and len(alike) == len(label.tilts):
        for one, tilt in zip(alike, label.tilts, strict=True):
            one.at = {"tilt_deg": tilt}
    elif label.frequencies_mhz and len(alike) == len(label.frequencies_mhz):
        for one, frequency_mhz in zip(alike, label.frequencies_mhz, strict=True):
            one.at = {"frequency_mhz": frequency_mhz}
    elif label.statistics and len(alike) == len(label.statistics):
        for one, statistic in zip(alike, label.statistics, strict=True):
            one.take_statistic(statistic)
    elif len(alike) == len(bands) and claim.band is None:
        for one, band in zip(alike, bands, strict=True):
            one.band = band
    elif alike and all(f.band == claim.band for f in alike):
        if len({one.value for one in alike}) == 1:
            return [one for one in found if one is first or one not in alike], None
        reason = f"{len(alike)} figures in one cell"
        reason += f", but {len(bands)} known bands to give them to" if claim.band is None else " for one band"
        ask = "ask which figure holds for which band"
        return [], Unread(where=first.where, text=first.raw, reason=reason, suggestion=ask)
    return found, None


def _plain_list(found: list[Found]) -> list[Found]:
    """Several figures of one parameter that nothing in their cell tells apart; empty when there are none."""
    first = found[0]
    alike = [f for f in found if f.parameter == first.parameter]
    if len(alike) < 2 or parameters()[first.parameter].kind not in ("number", "range", "count"):
        return []
    told_apart = any(f.figure.quantity.at for f in alike)
    told_apart = told_apart or len({(f.figure.condition, f.figure.sense) for f in alike}) > 1
    return [] if told_apart else alike
