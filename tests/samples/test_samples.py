"""Each sample bid's whole result against expectations written by hand from handbook arithmetic."""

from __future__ import annotations

import tomllib
from functools import cache
from pathlib import Path
from typing import Any

import pytest

from speccheck.intake.tenders.tender_book import read_tender
from speccheck.pipeline import assess
from speccheck.records import Assessment, Compliance, Finding, Fit, Level, PanelAssessment

SAMPLES = Path(__file__).parents[2] / "sample_specs"
EXPECTED = {path.stem: path for path in sorted((Path(__file__).parent / "expected").glob("*.toml"))}
PANELS = [
    (stem, panel["name"], panel)
    for stem, path in EXPECTED.items()
    for panel in tomllib.loads(path.read_text(encoding="utf-8"))["panel"]
]


@cache
def judged(stem: str) -> Assessment:
    return assess(SAMPLES / f"{stem}.xlsx", tender=read_tender(SAMPLES / "tender.xlsx"))


def panel_of(stem: str, name: str) -> PanelAssessment:
    return next(panel for panel in judged(stem).panels if panel.panel.name == name)


def finding_of(panel: PanelAssessment, wanted: dict[str, Any]) -> Finding:
    band = tuple(wanted["band"]) if "band" in wanted else None
    return next(f for f in panel.findings if f.check == wanted["check"] and (band is None or f.band == band))


@pytest.mark.parametrize("stem", EXPECTED)
def test_sample_has_exactly_the_panels_expected(stem: str) -> None:
    expected = [name for owner, name, _ in PANELS if owner == stem]
    assert [panel.panel.name for panel in judged(stem).panels] == expected
    assert not judged(stem).submission.unread


@pytest.mark.parametrize(("stem", "name", "expected"), PANELS, ids=lambda value: str(value)[:30])
def test_outcome_and_everything_that_does_not_fit(stem: str, name: str, expected: dict[str, Any]) -> None:
    panel = panel_of(stem, name)
    found = {f.check: f.verdict.value for f in panel.findings if f.verdict is not Fit.FITS}
    surprising = {
        check: verdict
        for check, verdict in found.items()
        if expected["not_fitting"].get(check, "") not in (verdict, "any")
    }
    vanished = {
        check for check, verdict in expected["not_fitting"].items() if verdict != "any" and check not in found
    }
    assert (surprising, vanished) == ({}, set())
    assert panel.outcome.value == expected["outcome"], panel.reasons
    assert panel.exposure is not None
    assert panel.exposure.complete is (expected["exposure"] == "complete")


@pytest.mark.parametrize(("stem", "name", "expected"), PANELS, ids=lambda value: str(value)[:30])
def test_findings_agree_with_handbook_arithmetic(stem: str, name: str, expected: dict[str, Any]) -> None:
    for wanted in expected["finding"]:
        finding = finding_of(panel_of(stem, name), wanted)
        assert finding.verdict.value == wanted["verdict"], finding.summary
        near = {"abs": wanted["within"] + 1e-9}
        if "claimed" in wanted:
            assert finding.claimed is not None
            assert finding.claimed.value == pytest.approx(wanted["claimed"], **near)
        for end in ("low", "high"):
            if end in wanted:
                assert getattr(finding.expected, end) == pytest.approx(wanted[end], **near), wanted["check"]
        if "working" in wanted:
            steps = [s for s in finding.working if wanted["working"]["label"] in s.label.lower()]
            assert steps[0].value == pytest.approx(wanted["working"]["value"], **near)


@pytest.mark.parametrize(("stem", "name", "expected"), PANELS, ids=lambda value: str(value)[:30])
def test_rejected_clauses_and_innocent_readings(stem: str, name: str, expected: dict[str, Any]) -> None:
    panel = panel_of(stem, name)
    failed = {
        row.requirement.clause
        for row in panel.requirements
        if row.verdict in (Compliance.FAILS, Compliance.FAILS_NARROWLY)
        and row.requirement.level is Level.MANDATORY
    }
    assert failed == set(expected.get("rejecting_clauses", []))
    if "innocent_reading" in expected:
        misfits = [f for f in panel.findings if f.verdict is Fit.DOES_NOT_FIT]
        assert all(expected["innocent_reading"] in f.conventions[0].name for f in misfits)
        assert all((f.question and "?" in f.question) or "confirm" in f.question for f in misfits)
