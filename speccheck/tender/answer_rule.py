"""'Answer only Meets / Does not meet / Exceeds': a rule of the tender on answers without a figure.

It holds only where the tender says so. A figure is judged as a figure, whatever is answered beside it.
"""

from __future__ import annotations

import re
from collections.abc import Sequence
from dataclasses import dataclass, replace

from speccheck.records import Compliance, MatrixRow, Requirement

_APPLIES = (Compliance.NOT_STATED, Compliance.DECLARED_ONLY)
_NEGATIVE = re.compile(r"\b(?:not|no|non|fails?)\b")


@dataclass(frozen=True, slots=True)
class AnswerRule:
    """The answers allowed, folded, and how the rule is referred to."""

    allowed: tuple[str, ...]
    named: str


def answer_rule(requirements: Sequence[Requirement]) -> AnswerRule | None:
    """The rule of a tender, None where it sets none."""
    for requirement in requirements:
        if requirement.operator == "rule" and requirement.limit == "answers allowed":
            allowed = (_folded(word) for word in re.split(r"[/,;]|\bor\b", requirement.scope))
            open_mark = "" if requirement.confirmed else ", reading not confirmed"
            named = f"clause {requirement.clause or requirement.where}{open_mark}"
            return AnswerRule(tuple(word for word in allowed if word), named)
    return None


def ruled(row: MatrixRow, rule: AnswerRule | None) -> MatrixRow:
    """A row answered in words, as the rule counts the answer; a gap without any cell stays not stated."""
    if rule is None or row.verdict not in _APPLIES or row.offered is not None:
        return row
    if row.statement is None:
        note = f"no answer was found; {rule.named} allows only '{' / '.join(rule.allowed)}'"
        return replace(row, note="; ".join(filter(None, (row.note, note))))
    said = row.statement.raw.strip()
    answer = _folded(said)
    if answer in rule.allowed and not _NEGATIVE.search(answer):
        return row
    if answer in rule.allowed:
        note = f"answered '{said}'"
    else:
        shown = f"answered '{said}'" if said else "left empty"
        note = f"{shown}, which counts as 'does not meet' ({rule.named})"
    return replace(row, verdict=Compliance.FAILS, note=note)


def _folded(text: str) -> str:
    return re.sub(r"[^\w]+", " ", text.casefold()).strip()
