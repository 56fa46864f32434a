"""The runner: gaps and doubtful readings answered, cells attached, crashes contained, order kept."""

from __future__ import annotations

from dataclasses import replace

import pytest
from checks.cases import panel_of

from speccheck.checks import examine
from speccheck.checks.innocent.conventions import INNOCENT_READINGS, Reach, reread, scaled
from speccheck.checks.registry import CHECKS, Case, Judgement, check
from speccheck.checks.runner import Examination, run_checks
from speccheck.records import Finding, Fit, Panel, Reading, Settings

COLUMN = {
    "frequency_range": [1710, 2170],
    "array_rows": 12,
    "array_columns": 1,
    "vertical_element_spacing": "92 mm",
    "horizontal_beamwidth": 65,
    "vertical_beamwidth": 7.8,
    "gain": "17.1 dBi",
}


def one(panel: Panel, slug: str) -> Finding:
    return next(f for f in examine(panel, Settings()) if f.check == slug)


@pytest.fixture
def registered(monkeypatch: pytest.MonkeyPatch) -> dict[str, object]:
    """A registry of its own, so that a test's check leaves no trace."""
    checks: dict[str, object] = {}
    monkeypatch.setattr("speccheck.checks.registry.CHECKS", checks)
    monkeypatch.setattr("speccheck.checks.runner.CHECKS", checks)
    return checks


def test_sound_column_raises_no_misfit() -> None:
    findings = examine(panel_of(COLUMN), Settings())
    assert [f.check for f in findings if f.verdict in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)] == []


def test_missing_reading_is_named_and_asked_for() -> None:
    without = {k: v for k, v in COLUMN.items() if k != "vertical_beamwidth"}
    finding = one(panel_of(without), "gain-fits-beamwidths")
    assert finding.verdict is Fit.NOT_JUDGED
    assert finding.missing == ("vertical_beamwidth",)
    assert finding.summary.endswith("not judged: vertical half-power beamwidth not stated.")
    assert finding.question == "Please state vertical half-power beamwidth for 1710–2170 MHz."


def test_ambiguous_reading_carries_no_verdict() -> None:
    panel = panel_of({**COLUMN, "vertical_beamwidth": {"value": 7.8, "alternatives": [7.8, 78]}})
    finding = one(panel, "gain-fits-beamwidths")
    assert finding.verdict is Fit.NOT_JUDGED
    assert "can be read in more than one way" in finding.summary


def test_statement_without_figure_is_told_from_silence() -> None:
    finding = one(panel_of({**COLUMN, "vertical_beamwidth": "TBD"}), "gain-fits-beamwidths")
    assert "without a figure in Case!B" in finding.summary


def test_impossible_figure_is_reported_once_and_used_nowhere() -> None:
    findings = examine(panel_of({**COLUMN, "gain": 1e308}), Settings())
    about_gain = [f for f in findings if "gain" in f.parameters and f.verdict is Fit.DOES_NOT_FIT]
    assert [f.check for f in about_gain] == ["figure-plausible"]
    assert "no possible figure" in one(panel_of({**COLUMN, "gain": 1e308}), "gain-fits-beamwidths").summary


def test_finding_names_the_cells_of_all_readings_used() -> None:
    finding = one(panel_of(COLUMN), "gain-fits-geometry")
    assert {"B3", "B5", "B6", "B7", "B8"} <= {place.cell for place in finding.where}


def test_same_judgement_in_every_band_is_one_finding() -> None:
    whole = {"frequency_range": [1710, 2690], "vswr": 1.5, "return_loss": 14}
    panel = panel_of(whole, {"1710-2170": {"gain": 17}, "2300-2690": {"gain": 18}})
    mine = [f for f in examine(panel, Settings()) if f.check == "vswr-matches-return-loss"]
    assert [f.band for f in mine] == [None]


def test_crash_becomes_a_finding_that_names_check_and_error(registered: dict[str, object]) -> None:
    @check("always-stops", "Always stops", needs=("gain",), source="test")
    def always_stops(gain: object) -> Judgement | None:
        """A check that stops."""
        raise ZeroDivisionError(gain)

    assert set(registered) == {"always-stops"}
    (finding,) = run_checks(panel_of(COLUMN), Settings())
    assert finding.verdict is Fit.NOT_JUDGED
    assert "'always-stops' stopped with ZeroDivisionError" in finding.summary
    assert finding.where


def test_check_without_its_subject_is_silent() -> None:
    slugs = {f.check for f in examine(panel_of(COLUMN), Settings())}
    assert not slugs & {"csi-rs-layout", "layers-fit-ports", "horizontal-spacing", "subarray-spacing"}


def test_panel_without_readings_gives_no_verdict() -> None:
    panel = replace(panel_of(COLUMN), readings=(), statements=())
    assert all(f.verdict is Fit.NOT_JUDGED for f in examine(panel, Settings()))


@pytest.mark.parametrize(
    ("needs", "arguments", "said"),
    [
        (("gian",), "case", "names parameters the dictionary lacks: gian"),
        (("gain",), "gain, width", "takes arguments it does not declare: width"),
    ],
)
def test_registry_refuses_and_names_the_culprit(
    registered: dict[str, object], needs: tuple[str, ...], arguments: str, said: str
) -> None:
    scope: dict[str, object] = {}
    exec(f"def judge({arguments}):\n    'Explained.'", scope)  # noqa: S102
    with pytest.raises(ValueError, match=said):
        check("odd", "Odd", needs=needs, source="test")(scope["judge"])  # type: ignore[arg-type]
    assert not registered


def test_registry_refuses_a_slug_twice_and_a_check_without_explanation(
    registered: dict[str, object],
) -> None:
    def explained(case: Case) -> None:
        """Explained."""

    check("twice", "Twice", needs=(), source="test")(explained)
    with pytest.raises(ValueError, match="'twice' is registered twice"):
        check("twice", "Twice", needs=(), source="test")(explained)
    with pytest.raises(ValueError, match="'bare' has no explanation"):
        check("bare", "Bare", needs=(), source="test")(lambda: None)
    assert set(registered) == {"twice"}


def test_slugs_are_plain_words() -> None:
    assert all(slug == slug.lower() and " " not in slug for slug in CHECKS)


RICH = {
    **COLUMN,
    "polarisations": 2,
    "rf_ports": 2,
    "electrical_tilt": [0, 10],
    "upper_sidelobe_suppression": 18,
    "feed_loss": 0.7,
    "height": 1.24,
    "width": 0.17,
    "weight": 14,
    "wind_load": "480 N at 150 km/h",
    "vswr": 1.5,
    "return_loss": 14,
    "max_power_per_port": 300,
    "passive_intermodulation": -153,
    "gain": "21 dBi",
}


@pytest.mark.parametrize("name", sorted(INNOCENT_READINGS))
def test_answers_kept_from_the_panel_as_read_are_those_of_a_fresh_run(name: str) -> None:
    other = INNOCENT_READINGS[name].reread(panel_of(RICH), Reach())
    asread = Examination(panel_of(RICH), Settings())
    asread.findings()
    assert asread.reread(other).findings() == run_checks(other, Settings())


@pytest.mark.usefixtures("registered")
def test_check_that_asked_for_nothing_changed_is_not_run_again() -> None:
    asked: list[str] = []

    @check("looks-at-gain", "Looks at gain", needs=("gain",), source="test")
    def looks_at_gain(gain: Reading) -> Judgement | None:
        """Looks at the gain."""
        asked.append("gain")
        return Judgement(verdict=Fit.FITS, summary=f"{gain.nominal:g}")

    @check("looks-aside", "Looks aside", needs=("vertical_beamwidth",), source="test")
    def looks_aside(case: Case) -> Judgement | None:
        """Looks at a parameter it does not declare."""
        rows = case.panel.get("array_rows", case.band)
        asked.append("rows")
        return Judgement(verdict=Fit.FITS, summary=f"{rows.nominal:g}" if rows else "")

    panel = panel_of({**COLUMN, "vswr": 1.5})
    asread = Examination(panel, Settings())
    asread.findings()
    for key, run in (("gain", ["gain"]), ("array_rows", ["rows"]), ("vswr", [])):
        asked.clear()
        asread.reread(reread(panel, Reach(), (key,), scaled(2))).findings()
        assert asked == run
