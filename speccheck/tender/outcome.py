"""What rows and findings add up to for one panel: acceptable, clarify or reject, each with its reasons.

Only a failed mandatory requirement rejects; a misfit of physics asks a question. Nothing is averaged.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from speccheck.dictionary import parameters
from speccheck.records import Finding, Fit, Level, MatrixRow, Outcome
from speccheck.records.demands import margin_unit
from speccheck.records.words import FAILED, OPEN


def outcome(findings: Sequence[Finding], rows: Sequence[MatrixRow]) -> tuple[Outcome, tuple[str, ...]]:
    """Outcome of a panel and its reasons, the gravest first.

    Parameters
    ----------
    findings : what the checks said
    rows : requirement rows of the same panel; empty without a tender
    """
    failed = tuple(_failed(rows))
    misfits = tuple(_misfits(findings, Fit.DOES_NOT_FIT))
    asked = (*misfits, *_open(rows), *_misfits(findings, Fit.DOUBTFUL), *_doubted(rows))
    reasons = tuple(dict.fromkeys((*failed, *asked)))
    if failed:
        return Outcome.REJECT, reasons
    return (Outcome.CLARIFY if asked else Outcome.ACCEPTABLE), reasons


def label(row: MatrixRow) -> str:
    """Clause, parameter and band of a row in words."""
    parameter = parameters().get(row.requirement.parameter)
    name = parameter.label if parameter else row.requirement.wording[:60]
    band = f", {row.band[0]:g}-{row.band[1]:g} MHz" if row.band else ""
    clause = f"clause {row.requirement.clause}, " if row.requirement.clause else ""
    return f"{clause}{name}{band}"


def _mandatory(rows: Sequence[MatrixRow]) -> Iterator[MatrixRow]:
    return (row for row in rows if row.requirement.level is Level.MANDATORY)


def _failed(rows: Sequence[MatrixRow]) -> Iterator[str]:
    for row in _mandatory(rows):
        if row.verdict in FAILED:
            unit = margin_unit(row.requirement.unit)
            shown = "°" if unit == "deg" else f" {unit}".rstrip()
            margin = f" by {abs(row.margin):.3g}{shown}" if row.margin else ""
            yield f"{label(row)}: mandatory, {row.verdict.value}{margin}"


def _open(rows: Sequence[MatrixRow]) -> Iterator[str]:
    for row in _mandatory(rows):
        if row.verdict in OPEN and row.requirement.operator != "information":
            yield f"{label(row)}: mandatory, {row.verdict.value}"


def _doubted(rows: Sequence[MatrixRow]) -> Iterator[str]:
    for row in _mandatory(rows):
        if row.in_doubt:
            yield f"{label(row)}: claim in doubt ({', '.join(row.in_doubt)})"


def _misfits(findings: Sequence[Finding], verdict: Fit) -> Iterator[str]:
    """Claims of one verdict, each with its figures: the first sentence of what was found."""
    for finding in findings:
        if finding.verdict is verdict:
            band = f", {finding.band[0]:g}-{finding.band[1]:g} MHz" if finding.band else ""
            yield f"{verdict.value}{band}: {_first_sentence(finding.summary) or finding.title}"


def _first_sentence(text: str) -> str:
    return text.partition(". ")[0].rstrip(".")
