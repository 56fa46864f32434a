"""Frequencies that only the title of a panel gives: 'Panel KD-12, 694–960 MHz'."""

from __future__ import annotations

from speccheck.intake.tables.bands import find_bands
from speccheck.intake.tables.claims import Claim, Context, Draft
from speccheck.intake.tables.labels import FREQUENCY_KEYS, Label

_HEADING = "title of the panel"


def claims_with_title(draft: Draft) -> list[tuple[Draft, Claim]]:
    """The claims of a draft and of all joined to it, each with its piece.

    The range in its title is one more claim where nothing else tells of frequencies.
    """
    claims = [(piece, claim) for piece in draft.pieces() for claim in piece.claims]
    if draft.bands or any(_tells_of_bands(claim) for _, claim in claims):
        return claims
    found = find_bands(draft.where.text)
    if not draft.named or len(found.spans) != 1 or not found.proved or found.names:
        return claims
    low, high = found.spans[0]
    context = Context(Label(_HEADING, ("operating_bands",), "MHz"), heading=_HEADING)
    return [(draft, Claim(draft.where, context, text=f"{low:g}-{high:g} MHz")), *claims]


def _tells_of_bands(claim: Claim) -> bool:
    return claim.banded or claim.band is not None or claim.context.label.parameters[0] in FREQUENCY_KEYS
