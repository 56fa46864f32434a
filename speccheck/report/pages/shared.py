"""What many answers have in common, so that a page of many bands says it once and refers to it."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

from speccheck.records import Convention, Finding, Fit


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


@dataclass(frozen=True, slots=True)
class NamedReading:
    """An innocent reading, whatever value it gives in a band: what it repairs and what it leaves."""

    name: str
    repairs: tuple[str, ...]
    leaves: tuple[str, ...]


def named_reading(convention: Convention) -> NamedReading:
    """The reading of which a convention is one case."""
    return NamedReading(convention.name, convention.repairs, convention.leaves)


def named_readings(findings: Iterable[Finding]) -> dict[NamedReading, int]:
    """Innocent readings that repair or leave anything, each once, numbered as they come."""
    found = (named_reading(convention) for finding in findings for convention in finding.conventions)
    told = dict.fromkeys(reading for reading in found if reading.repairs or reading.leaves)
    return {reading: number for number, reading in enumerate(told, start=1)}
