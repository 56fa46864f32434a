"""Answers of a bidder to the clarification list, beside the figures first stated."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

from speccheck.records.offers import Band, CellRef, Reading
from speccheck.records.words import Compliance


class AnswerKind(StrEnum):
    """What an answer does to the offer; only a changed figure touches its substance."""

    EXPLANATION = "explanation"
    CONFIRMED = "figure confirmed"
    ADDED = "figure added"
    CHANGED = "change of substance"
    NOT_READ = "figure not read"


@dataclass(frozen=True, slots=True, kw_only=True)
class Answer:
    """One answered row of the clarification list; `replaces` is the cell its figure stands for."""

    where: CellRef
    number: str
    panel: str
    clause: str
    asked: str
    text: str
    figure: str
    replaces: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Effect:
    """A requirement row whose verdict the answered figure would change."""

    clause: str
    parameter: str
    band: Band | None
    before: Compliance
    after: Compliance


@dataclass(frozen=True, slots=True, kw_only=True)
class TakenAnswer:
    """An answer with the figure first stated; the offer itself stays as it was opened."""

    answer: Answer
    kind: AnswerKind
    first: Reading | None = None
    answered: Reading | None = None
    effects: tuple[Effect, ...] = ()
