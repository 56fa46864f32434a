"""What a check rests on in every band alike, so that a page of many bands says it once and refers to it."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

from speccheck.records import Finding, Fit


@dataclass(frozen=True, slots=True, kw_only=True)
class Basis:
    """Source and assumptions that all answers of one check have in common."""

    check: str
    title: str
    source: str
    assumptions: tuple[str, ...]

    def rest(self, finding: Finding) -> tuple[str, ...]:
        """Assumptions of one finding beyond the common ones."""
        return tuple(text for text in finding.assumptions if text not in self.assumptions)


def common_bases(findings: Iterable[Finding]) -> dict[str, Basis]:
    """By check: what its answers share. A check that answered once, or by several sources, has no entry."""
    answers: dict[str, list[Finding]] = {}
    for finding in findings:
        if finding.verdict is not Fit.NOT_JUDGED:
            answers.setdefault(finding.check, []).append(finding)
    return {
        check: Basis(
            check=check,
            title=found[0].title,
            source=found[0].source,
            assumptions=tuple(
                text
                for text in dict.fromkeys(found[0].assumptions)
                if all(text in other.assumptions for other in found)
            ),
        )
        for check, found in answers.items()
        if len(found) > 1 and len({f.source for f in found}) == 1
    }
