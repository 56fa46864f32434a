"""A tender on the screen: each wording beside its reading, doubts and what was not understood."""

from __future__ import annotations

from collections.abc import Iterator
from textwrap import wrap

from speccheck.dictionary import parameters
from speccheck.records import Finding, Premise, Requirement, Tender, Value
from speccheck.text import plain

_WIDTH = 100
_WITHOUT_PARAMETER = {
    "rule": "rule for other rows:",
    "baseline": "as good as another offer's figures:",
    "condition": "under a condition:",
    "after award": "test after award:",
    "information": "to be stated by the bidder",
}
_SPOKEN = {"evidence": "papers or statement:", "text": "named:", "information": "for information"}


def tender_listing(tender: Tender) -> str:
    """Text of at most 100 columns; nothing is judged.

    Parameters
    ----------
    tender : the buyer's workbook, read
    """
    lines = [_head(tender), ""]
    for requirement in tender.requirements:
        lines += _requirement(requirement)
    if tender.findings:
        lines += ["", "To put right before issue"]
        lines += [line for f in tender.findings for line in _wrapped(f"- {_asked(f)}", "    ")]
    if tender.unread:
        lines += ["", "Not read"]
        lines += [
            line
            for u in tender.unread
            for line in _wrapped(f"- {u.where}: {plain(u.text, 200)} ({u.reason})", "    ")
        ]
    return "\n".join(lines)


def tender_summary(tender: Tender) -> str:
    """What was read in one line, and below it what the tender leaves in doubt."""
    troubles = [line for f in tender.findings for line in _wrapped(f"  - {f.summary}", "    ")]
    return "\n".join([_head(tender), *troubles])


def _asked(finding: Finding) -> str:
    return f"{finding.summary}. {finding.question}".strip()


def _head(tender: Tender) -> str:
    open_rows = sum(not r.confirmed for r in tender.requirements)
    read = f"{_count(len(tender.requirements), 'requirement')} read, {open_rows} not confirmed"
    return f"{plain(tender.file)}: {read}, {_count(len(tender.deviations), 'accepted deviation')}"


def _count(number: int, thing: str) -> str:
    return f"{number} {thing}{'' if number == 1 else 's'}"


def _requirement(requirement: Requirement) -> Iterator[str]:
    mark = "" if requirement.confirmed else "   NOT CONFIRMED"
    head = f"{requirement.clause:<8} {requirement.where}   {requirement.level.value}{mark}"
    yield from _wrapped(head, "    ")
    yield from _wrapped(f"    wording  {plain(requirement.wording, 400)}", " " * 13)
    yield from _wrapped(f"    reading  {reading_of(requirement)}", " " * 13)
    if requirement.doubts:
        yield from _wrapped(f"    doubts   {'; '.join(requirement.doubts)}", " " * 13)
    if requirement.unread:
        yield from _wrapped(f"    unread   {plain(requirement.unread, 200)}", " " * 13)


def reading_of(requirement: Requirement) -> str:
    """The requirement as understood: parameter, operator, limit with unit, statistic, bands, scope."""
    known = parameters().get(requirement.parameter)
    parts = [
        known.label if known else _WITHOUT_PARAMETER.get(requirement.operator, "parameter not understood"),
        _SPOKEN.get(requirement.operator, requirement.operator) if known else "",
        _limit(requirement.limit),
        requirement.unit,
        f"({requirement.statistic})" if requirement.statistic else "",
        ", ".join(f"{low:g}-{high:g} MHz" for low, high in requirement.bands),
        requirement.scope,
        _premise(requirement.premise),
    ]
    return " ".join(dict.fromkeys(part for part in parts if part))


def _premise(premise: Premise | None) -> str:
    if premise is None:
        return ""
    label = parameters()[premise.parameter].label
    return f"(only where {label} {premise.operator} {_limit(premise.limit)} {premise.unit}".rstrip() + ")"


def _limit(limit: Value | None) -> str:
    if limit is None:
        return ""
    if isinstance(limit, tuple):
        return f"{limit[0]:g} to {limit[1]:g}"
    return limit if isinstance(limit, str) else f"{limit:g}"


def _wrapped(text: str, further: str) -> list[str]:
    return wrap(text, _WIDTH, subsequent_indent=further, break_long_words=True) or [""]
