"""'At most three negative deviations': a rule of the tender that counts the misses of one panel."""

from __future__ import annotations

import re
from collections.abc import Iterator, Sequence

from speccheck.records import Compliance, Level, MatrixRow, Requirement
from speccheck.records.words import FAILED, OPEN

_CAP = re.compile(r"negative deviations ≤ (\d+)")


def capped(requirements: Sequence[Requirement], rows: Sequence[MatrixRow]) -> Iterator[MatrixRow]:
    """One row for each rule that caps the desirable requirements a panel may miss.

    A requirement missed in several bands counts once, and accepted deviations are not counted. Where
    open rows could still break the cap the rule is not judged.
    """
    for rule in requirements:
        match = _CAP.fullmatch(str(rule.limit)) if rule.operator == "rule" else None
        if match is None:
            continue
        cap = int(match[1])
        missed = _clauses(rows, FAILED)
        undecided = _clauses(rows, OPEN) - missed
        if len(missed) > cap:
            verdict = Compliance.FAILS
        elif len(missed) + len(undecided) > cap:
            verdict = Compliance.NOT_JUDGED
        else:
            verdict = Compliance.MEETS
        note = f"{len(missed)} desirable requirements missed, {len(undecided)} open, at most {cap} allowed"
        yield MatrixRow(requirement=rule, verdict=verdict, margin=float(cap - len(missed)), note=note)


def _clauses(rows: Sequence[MatrixRow], verdicts: Sequence[Compliance]) -> set[int]:
    return {
        id(row.requirement)
        for row in rows
        if row.requirement.level is Level.DESIRABLE
        and row.verdict in verdicts
        and row.requirement.operator not in ("evidence", "information")
    }
