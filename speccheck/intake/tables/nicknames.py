"""Bands called by a nickname, where the panel itself says elsewhere which frequencies are meant."""

from __future__ import annotations

from speccheck.intake.panels.found import Outcome
from speccheck.intake.tables.claims import Claim
from speccheck.intake.tables.words import fold, is_band_nickname
from speccheck.records import Band

_FREQUENCY = frozenset({"frequency_range", "operating_bands"})
_WORDS = frozenset({"band", "bands", "bande", "banda", "pasmo", "the", "in", "of"})


def resolve_nicknames(outcomes: list[tuple[Claim, Outcome]]) -> None:
    """Give 'gain, low band' the frequencies that 'frequency range, low band' states."""
    bands: dict[str, set[Band]] = {}
    for claim, outcome in outcomes:
        name = _nickname(claim) if claim.context.label.parameters[0] in _FREQUENCY else ""
        if name:
            spans = [f.value for f in outcome.found if isinstance(f.value, tuple)]
            bands.setdefault(name, set()).update(spans)
    for claim, outcome in outcomes if bands else ():
        spans_of_name = bands.get(_nickname(claim), set())
        if claim.band is None and len(spans_of_name) == 1:
            (claim.band,) = spans_of_name
            claim.banded = True
            for found in outcome.found:
                found.band = found.band or claim.band


def _nickname(claim: Claim) -> str:
    """The band's nickname in a heading, a condition or a group, without the word for band."""
    context = claim.context
    for text in (context.band_name, context.condition, *context.label.condition.split(", ")):
        if text and is_band_nickname(text):
            return " ".join(word for word in fold(text).split() if word not in _WORDS)
    return ""
