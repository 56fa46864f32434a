"""Clauses that set rules, refer elsewhere or belong after award; none of them is a limit of its own row."""

from __future__ import annotations

import re
from dataclasses import replace

from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.records import Level

_ALL_VALUES = re.compile(r"^\s*all (?:values|figures)\b(.*)$", re.IGNORECASE)
_BASELINE = re.compile(
    r"\b(?:(?:same (?:as )?|equal )or better than|not worse than)\b.*?\b(annex|row|panel|item)\b(.*)",
    re.IGNORECASE,
)
_CONDITION = re.compile(r"^\s*(?:if|when|where|falls|si)\b(.*?),(.*)$", re.IGNORECASE)
_AFTER_AWARD = re.compile(
    r"\b(?:on|upon|at|after) (?:delivery|acceptance|award|site acceptance)\b", re.IGNORECASE
)
_KNOCK_OUT = re.compile(r"(?:★|\*).{0,40}(?:deviation|reject)", re.IGNORECASE)
_CAP = re.compile(r"(?:at most|not more than|maximum|up to)\s+(\d+)", re.IGNORECASE)
_ANSWERS = re.compile(r"^\s*answer only\b(.*)$", re.IGNORECASE)
_LEGEND = re.compile(r"^\s*(?:M\s*/\s*O|M\s*/\s*D\s*/\s*O)\b.*column", re.IGNORECASE)
_TO_STATE = re.compile(
    r"^\s*(?:bidder|tenderer|supplier|offeror)s? (?:to|shall|must) (?:state|indicate)\.?\s*$", re.IGNORECASE
)


def whole_phrase(text: str) -> Clause | None:
    """The reading of a clause that is no demand on a figure, or None."""
    for read in (_all_values, _answers, _knock_out, _legend, _baseline, _condition, _after_award, _to_state):
        clause = read(text)
        if clause is not None:
            return clause
    return None


def _rule(scope: str, **more: str) -> Clause:
    return Clause(operator="rule", level=Level.INFORMATION, scope=scope.strip(" .:,"), **more)  # type: ignore[arg-type]


def _all_values(text: str) -> Clause | None:
    """'All values guaranteed, over temperature, all ports' sets statistic and scope of every row."""
    match = _ALL_VALUES.match(text)
    if not match:
        return None
    firm = re.search(r"guarante|worst|minim|absolute", match[1], re.IGNORECASE)
    typical = re.search(r"\btyp", match[1], re.IGNORECASE)
    statistic = "each" if firm else "typ" if typical else ""
    return _rule(match[1], statistic=statistic, limit="all rows")


def _answers(text: str) -> Clause | None:
    match = _ANSWERS.match(text)
    return _rule(match[1], limit="answers allowed") if match else None


def _knock_out(text: str) -> Clause | None:
    if not _KNOCK_OUT.search(text):
        return None
    cap = _CAP.search(text)
    clause = _rule(text, limit=f"negative deviations ≤ {cap[1]}" if cap else "negative deviations")
    if cap:
        clause = replace(clause, level=Level.MANDATORY)
    return clause.doubting("LEVEL", detail="whether the cap counts per panel or per bid is not stated")


def _legend(text: str) -> Clause | None:
    if not _LEGEND.match(text):
        return None
    return _rule(text, limit="level column").doubting("LEVEL", detail="O may mean optional or offered")


def _baseline(text: str) -> Clause | None:
    match = _BASELINE.search(text)
    if not match:
        return None
    return Clause(operator="baseline", limit=(match[1] + match[2]).strip(" .")).doubting("BASELINE")


def _condition(text: str) -> Clause | None:
    match = _CONDITION.match(text)
    if not match:
        return None
    clause = Clause(operator="condition", limit=match[2].strip(" ."), scope=f"if {match[1].strip()}")
    return clause.doubting("CONDITION")


def _after_award(text: str) -> Clause | None:
    if not _AFTER_AWARD.search(text):
        return None
    return Clause(operator="after award", level=Level.INFORMATION, scope=text.strip()).doubting("AFTER")


def _to_state(text: str) -> Clause | None:
    return Clause(operator="information", level=Level.INFORMATION) if _TO_STATE.match(text) else None
