"""Every case file against the runner, and every check against having cases and an explanation."""

from __future__ import annotations

import functools
from typing import Any

import pytest
from checks.cases import FOLDER, CheckCase, all_cases

from speccheck.checks import examine
from speccheck.checks.registry import CHECKS
from speccheck.records import Finding, Panel, Settings

CASES = all_cases()


@functools.cache
def findings_of(panel_index: int) -> tuple[Finding, ...]:
    return examine(CASES[panel_index].panel, Settings())


def pick(findings: tuple[Finding, ...], check: str, band: list[float] | None) -> Finding | None:
    mine = [f for f in findings if f.check == check and (band is None or f.band == tuple(band))]
    return mine[0] if mine else None


def everything_said(finding: Finding) -> str:
    parts = [finding.summary, finding.question, *finding.assumptions]
    parts += [f"{s.label} {s.formula} {s.value} {s.unit}" for s in finding.working]
    return "\n".join(parts)


def verdict_of(finding: Finding | None) -> str:
    return "not applicable" if finding is None else str(finding.verdict)


@pytest.mark.parametrize("index", range(len(CASES)), ids=[str(c) for c in CASES])
def test_case(index: int) -> None:
    case = CASES[index]
    assert case.source, "an expectation without a source"
    findings = findings_of(index)
    finding = pick(findings, case.check, case.expect.get("band"))
    said = "" if finding is None else everything_said(finding)
    assert verdict_of(finding) == case.expect["verdict"], said
    for slug, verdict in case.expect.get("others", {}).items():
        other = pick(findings, slug, case.expect.get("band"))
        assert verdict_of(other) == verdict, other and everything_said(other)
    if finding is not None:
        assert_figures(finding, case.expect)
        assert_words(finding, case, said)


def assert_figures(finding: Finding, expect: dict[str, Any]) -> None:
    if "claimed" in expect:
        assert finding.claimed is not None
        assert finding.claimed.value == pytest.approx(expect["claimed"])
    for edge in ("low", "high"):
        if edge in expect:
            value, within = expect[edge]
            assert finding.expected is not None
            assert getattr(finding.expected, edge) == pytest.approx(value, abs=within), edge
    steps = {step.label: step.value for step in finding.working}
    for label, (value, within) in expect.get("step", {}).items():
        assert label in steps, f"no step '{label}' among {list(steps)}"
        assert steps[label] == pytest.approx(value, abs=within), label


def assert_words(finding: Finding, case: CheckCase, said: str) -> None:
    expect = case.expect
    for text in expect.get("says", []):
        assert text in said
        if case.worked_example:
            assert text in CHECKS[case.check].explanation, f"the docstring's example lacks {text!r}"
    assert set(expect.get("missing", [])) <= set(finding.missing)
    names = [convention.name for convention in finding.conventions]
    for name in expect.get("readings", []):
        assert name in names, said
    if "first" in expect:
        assert names[:1] == [expect["first"]], names
    if expect.get("no_readings"):
        assert not names
        assert "none of the readings tried fits" in said.lower()


@pytest.mark.parametrize("slug", sorted(CHECKS))
def test_check_has_cases_and_a_worked_example(slug: str) -> None:
    mine = [case for case in CASES if case.check == slug]
    assert mine, f"tests/checks/{slug}.toml is missing"
    examples = [case for case in mine if case.worked_example]
    assert examples, f"{slug} has no case marked worked_example"
    assert all(case.expect.get("says") for case in examples), (
        f"{slug}: its example ties no text to the docstring"
    )
    verdicts = {case.expect["verdict"] for case in mine}
    assert len(verdicts) > 1, f"{slug}: its cases know one verdict only"


@pytest.mark.parametrize("slug", sorted(CHECKS))
def test_explanation_is_complete(slug: str) -> None:
    explanation = CHECKS[slug].explanation
    for section in ("Formula", "Assumptions", "Worked example"):
        assert f"\n{section}\n" in explanation, f"{slug}: no section '{section}'"
    assert CHECKS[slug].source


def test_every_case_file_names_a_registered_check() -> None:
    assert {path.stem for path in FOLDER.glob("*.toml")} <= set(CHECKS)


@pytest.mark.parametrize("index", range(len(CASES)), ids=[str(c) for c in CASES])
def test_findings_lead_to_cells_and_are_repeatable(index: int) -> None:
    panel: Panel = CASES[index].panel
    findings = findings_of(index)
    assert findings == examine(panel, Settings())
    for finding in findings:
        assert finding.where, finding.check
        assert finding.summary.endswith((".", "?")), finding.summary
        if finding.verdict == "not judged":
            assert finding.question, finding
