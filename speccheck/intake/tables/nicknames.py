"""Bands called by a nickname, where the panel itself says elsewhere which frequencies are meant."""

from __future__ import annotations

from speccheck.intake.panels.found import Found, Outcome
from speccheck.intake.tables.claims import Claim
from speccheck.intake.tables.words import fold, is_band_nickname
from speccheck.records import Band

_FREQUENCY = frozenset({"frequency_range", "operating_bands"})
_WORDS = frozenset({"band", "bands", "bande", "banda", "pasmo", "the", "in", "of"})


def resolve_nicknames(outcomes: list[tuple[Claim, Outcome]]) -> None:
    """Give 'gain, low band' the frequencies that 'frequency range, low band' states."""
    bands: dict[str, set[Band]] = {}
    for claim, outcome in outcomes:
        if claim.context.label.parameters[0] not in _FREQUENCY:
            continue
        spans = [(f.value, _in_cell(f)) for f in outcome.found if isinstance(f.value, tuple)]
        for span, own in spans:
            if name := own or _nickname(claim):
                bands.setdefault(name, set()).add(span)
    for claim, outcome in outcomes if bands else ():
        spans_of_name = bands.get(_nickname(claim), set())
        if claim.band is None and len(spans_of_name) == 1:
            (claim.band,) = spans_of_name
            claim.banded = True
            for found in outcome.found:
                found.band = found.band or claim.band
        for found in outcome.found if claim.band is None else ():
            spans_of_name = bands.get(_in_cell(found), set())
            if found.band is None and len(spans_of_name) == 1:
                (found.band,) = spans_of_name


def _in_cell(found: Found) -> str:
    """The nickname that stands beside a figure in its cell: 'LB: 15.5 dBi; HB: 17.8 dBi'."""
    for piece in found.figure.condition.split(", "):
        if is_band_nickname(piece.strip(" :()")):
            return _bare(piece.strip(" :()"))
    return ""


def _bare(text: str) -> str:
    return " ".join(word for word in fold(text).split() if word not in _WORDS)


def _nickname(claim: Claim) -> str:
    """The band's nickname in a heading, a condition or a group, without the word for band."""
    context = claim.context
    for text in (context.band_name, context.condition, *context.label.condition.split(", ")):
        if text and is_band_nickname(text):
            return _bare(text)
    return ""
