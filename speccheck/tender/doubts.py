"""Claims that physics puts in doubt: the verdict on the number stands, the row is marked."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

from speccheck.records import Finding, Fit, MatrixRow, Reading

_CONTEXT = ("electrical_tilt", "polarisations", "height", "width", "depth", "transceivers", "frequency_range")
"""Parameters that many checks take in as the setting of another claim; they are marked only as the claim."""
_WITHOUT_FIGURE = ("text", "any of", "all of", "evidence", "information")


def marked(row: MatrixRow, findings: Sequence[Finding]) -> MatrixRow:
    """The row with the slugs of the checks that put its claim in doubt."""
    if row.offered is None or row.requirement.operator in _WITHOUT_FIGURE:
        return row
    doubting = (
        f.check for f in findings if _questioned(f) and _in_band(f, row) and _concerns(f, row.offered)
    )
    return replace(row, in_doubt=tuple(dict.fromkeys(doubting)))


def _questioned(finding: Finding) -> bool:
    """A misfit, or a doubt about a figure; reading troubles without an expected interval mark nothing."""
    doubted = finding.verdict is Fit.DOUBTFUL and finding.expected is not None
    return finding.verdict is Fit.DOES_NOT_FIT or doubted


def _in_band(finding: Finding, row: MatrixRow) -> bool:
    return finding.band is None or row.band is None or finding.band == row.band


def _concerns(finding: Finding, offered: Reading) -> bool:
    if offered.parameter not in finding.parameters:
        return False
    if offered.parameter not in _CONTEXT or offered.parameter == finding.parameters[0]:
        return True
    claimed = finding.claimed
    return claimed is not None and claimed.value == offered.value and claimed.unit == offered.unit
