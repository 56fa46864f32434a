"""Innocent readings: pure transforms, tried one at a time, the one that repairs everything first."""

from __future__ import annotations

import pytest
from checks.cases import panel_of

from speccheck.checks import examine
from speccheck.checks.innocent.conventions import INNOCENT_READINGS, Reach, innocent
from speccheck.checks.innocent.offering import NONE_FITS
from speccheck.records import Fit, Settings

COLUMN = {
    "frequency_range": [1710, 2170],
    "polarisations": 2,
    "array_rows": 12,
    "array_columns": 1,
    "vertical_element_spacing": "92 mm",
    "horizontal_beamwidth": 65,
    "vertical_beamwidth": 7.8,
    "gain": "20.1 dBi",
    "height": 1.24,
    "width": 0.17,
}
MISFIT = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)


def test_one_reading_repairs_every_misfit_and_comes_first() -> None:
    misfits = [f for f in examine(panel_of(COLUMN), Settings()) if f.verdict in MISFIT]
    assert len(misfits) >= 2
    for finding in misfits:
        first = finding.conventions[0]
        assert first.name == "both polarisations added into the gain"
        assert set(first.repairs) == {f.check for f in misfits}
        assert first.leaves == ()
        assert first.value == pytest.approx(20.1 - 3.01)


def test_question_is_neutral_and_names_the_cell_to_look_at_and_is_the_same_for_every_misfit() -> None:
    findings = [f for f in examine(panel_of(COLUMN), Settings()) if f.verdict in MISFIT]
    assert len({f.question for f in findings}) == 1  # asked once, however many checks it settles
    for finding in findings:
        assert finding.question.startswith("Please confirm (Case!B9) whether the gain is ")
        for word in ("false", "wrong", "error", "misleading", "cheat"):
            assert word not in finding.question.lower()


def test_left_over_is_shown_for_each_reading() -> None:
    finding = next(f for f in examine(panel_of(COLUMN), Settings()) if f.check == "gain-fits-geometry")
    left_over = [s for s in finding.working if s.label.startswith("Left over if ")]
    assert len(left_over) == len(finding.conventions)


def test_says_so_where_no_reading_fits() -> None:
    panel = panel_of({**COLUMN, "gain": "34 dBi"})
    finding = next(f for f in examine(panel, Settings()) if f.check == "gain-fits-geometry")
    assert finding.conventions == ()
    assert NONE_FITS in finding.assumptions


def test_reading_that_breaks_a_claim_that_fitted_is_not_offered() -> None:
    # half the rows would repair the spacing's height but break the vertical beamwidth
    panel = panel_of({**COLUMN, "gain": "17.1 dBi", "height": 0.9})
    finding = next(f for f in examine(panel, Settings()) if f.check == "array-fits-housing")
    assert finding.verdict is Fit.DOES_NOT_FIT
    assert "rows count the dipoles of both polarisations" not in [c.name for c in finding.conventions]


@pytest.mark.parametrize("name", sorted(INNOCENT_READINGS))
def test_transform_is_pure_and_keeps_every_cell(name: str) -> None:
    panel = panel_of({**COLUMN, "feed_loss": 0.5, "horizontal_scan": [-60, 60], "rf_ports": 2, "eirp": 64})
    before = repr(panel)
    other = INNOCENT_READINGS[name].reread(panel, Reach())
    assert repr(panel) == before
    assert [r.where for r in other.readings] == [r.where for r in panel.readings]
    assert [r.raw for r in other.readings] == [r.raw for r in panel.readings]


def test_name_is_registered_once() -> None:
    with pytest.raises(ValueError, match="'both polarisations added into the gain' is registered twice"):
        innocent("both polarisations added into the gain", "x", "gain")(lambda panel, _: panel)


def test_only_the_misfitting_band_is_reread_where_the_others_fit() -> None:
    whole = {
        k: v for k, v in COLUMN.items() if k not in ("gain", "horizontal_beamwidth", "vertical_beamwidth")
    }
    whole["frequency_range"] = [1710, 2690]
    bands = {
        "1710-2170": {"gain": "17.1 dBi", "horizontal_beamwidth": 65, "vertical_beamwidth": 7.8},
        "2300-2690": {"gain": "21.3 dBi", "horizontal_beamwidth": 62, "vertical_beamwidth": 6.1},
    }
    findings = examine(panel_of(whole, bands), Settings())
    misfits = [f for f in findings if f.verdict in MISFIT and f.check == "gain-fits-geometry"]
    assert [f.band for f in misfits] == [(2300.0, 2690.0)]
    assert misfits[0].conventions[0].name == "both polarisations added into the gain"


def test_rows_and_columns_exchanged_are_offered_first_though_the_findings_stand_on_other_cells() -> None:
    # 12 rows of 58 mm and 8 columns of 41.5 mm fill 696 mm × 332 mm; threes do not divide 8 rows
    swapped = {
        "frequency_range": [3300, 3800],
        "polarisations": 2,
        "array_rows": 8,
        "array_columns": 12,
        "subarray_rows": 3,
        "subarray_tilt": 6,
        "vertical_element_spacing": "58 mm",
        "horizontal_element_spacing": "41.5 mm",
        "transceivers": 64,
        "horizontal_beamwidth": 13.2,
        "vertical_beamwidth": 6.3,
        "electrical_tilt": [2, 10],
        "height": 0.79,
        "width": 0.40,
    }
    findings = [f for f in examine(panel_of(swapped), Settings()) if f.verdict in MISFIT]
    assert "vertical-beamwidth-fits-rows" in [f.check for f in findings]
    for finding in findings:
        assert finding.conventions[0].name == "array given as columns × rows"
