"""Tolerances and limits told beside the figures: by a heading, a unit, a column; written down by hand."""

from __future__ import annotations

from pathlib import Path

import pytest

from speccheck.records import Reading
from tests.intake.sheets import Rows, read


def _only(path: Path, rows: Rows, key: str) -> Reading:
    (panel,) = read(path, rows).submission.panels
    (found,) = [r for r in panel.readings if r.parameter == key]
    return found


@pytest.mark.parametrize(
    ("heading", "key", "value", "tolerance"),
    [
        ("Gain [dBi ±0.5]", "gain", 17.5, 0.5),
        ("Gain (±0.5 dB) [dBi]", "gain", 17.5, 0.5),
        ("Gewinn, dBi ± 0,5", "gain", 17.5, 0.5),
        ("Gain dBi +/-0.5", "gain", 17.5, 0.5),
        ("Ancho de haz horizontal (° ± 5)", "horizontal_beamwidth", 66, 5.0),
        ("Horizontal beamwidth 65° ±5°", "horizontal_beamwidth", 65, 5.0),
        ("Horizontal beamwidth 65° ±5°", "horizontal_beamwidth", 66, None),
        ("Height (mm, ±2)", "height", 1998, 0.002),
        ("Weight (kg ±5 %)", "weight", 20, 1.0),
        ("Cross-polar discrimination (±10°), dB", "cross_polar_discrimination", 20, None),
        ("Front-to-back ratio (180° ±30°), dB", "front_to_back_ratio", 28, None),
        ("Isolation ±45 (dB)", "port_isolation", 30, None),
        ("Gain [dBi ±0.5]", "gain", "≥ 17.5", None),
        ("Gain [dBi ±0.5]", "gain", "17.5 ± 0.3", 0.3),
    ],
)
def test_a_tolerance_in_the_heading_holds_for_its_figures(
    tmp_path: Path, heading: str, key: str, value: float | str, tolerance: float | None
) -> None:
    rows = [["Model", "Frequency (MHz)", heading, "VSWR"], ["KD-1", "1710-2170", value, 1.4]]
    found = _only(tmp_path, rows, key)
    assert found.tolerance == (None if tolerance is None else pytest.approx(tolerance))


def test_a_tolerance_in_the_row_of_units_holds_for_its_column(tmp_path: Path) -> None:
    rows = [
        ["Model", "Frequency", "Gain", "HPBW horizontal", "Weight"],
        ["", "MHz", "dBi ±0.5", "° ± 5", "kg"],
        ["KD-1", "1710-2170", 17.5, 65, 20],
        ["KD-2", "1710-2170", 18.1, 33, 24],
    ]
    panels = read(tmp_path, rows).submission.panels
    told = {(p.name, r.parameter): (r.value, r.tolerance) for p in panels for r in p.readings}
    assert told["KD-1", "gain"] == (17.5, 0.5)
    assert told["KD-2", "horizontal_beamwidth"] == (33.0, 5.0)
    assert told["KD-2", "weight"] == (24.0, None)


def test_a_tolerance_in_the_column_of_units_holds_for_its_row(tmp_path: Path) -> None:
    rows = [
        ["Parameter", "Unit", "Value"],
        ["Model", "", "KD-1"],
        ["Frequency range", "MHz", "1710-2170"],
        ["Gain", "dBi ±0.5", 17.5],
        ["Horizontal beamwidth", "° ±5", 65],
    ]
    assert _only(tmp_path, rows, "gain").tolerance == 0.5
    assert _only(tmp_path, rows, "horizontal_beamwidth").tolerance == 5.0


@pytest.mark.parametrize("heading", ["Limite", "Limit", "Bound", "Grenzwert", "Min/max", "", "Zakres"])
@pytest.mark.parametrize(
    "words",
    [("mini", "maxi", "typ"), ("min.", "max.", "typ."), ("≥", "≤", "typical"), ("mín", "máx", "típico")],
)
@pytest.mark.parametrize("before", [True, False])
def test_a_word_beside_a_bare_figure_says_what_it_bounds(
    tmp_path: Path, heading: str, words: tuple[str, str, str], before: bool
) -> None:
    # common practice: isolation is guaranteed as a minimum, standing-wave ratio as a maximum
    low, high, usual = words

    def row(label: str, value: object, bound: object, unit: str) -> list[object]:
        return [label, bound, value, unit] if before else [label, value, unit, bound]

    rows = [
        row("Parameter", "Value", heading or None, "Unit"),
        row("Model", "KD-1", None, ""),
        row("Frequency range", "1710-2170", None, "MHz"),
        row("Gain", 17.5, usual, "dBi"),
        row("Port isolation", 30, low, "dB"),
        row("VSWR", 1.5, high, ""),
        row("Front-to-back ratio", "> 25", high, "dB"),
        row("Weight", 20, None, "kg"),
    ]
    (panel,) = read(tmp_path, rows).submission.panels
    told = {r.parameter: (r.value, r.sense, r.statistic) for r in panel.readings}
    assert told["gain"] == (17.5, "nominal", "typical")
    assert told["port_isolation"] == (30.0, "min", "")
    assert told["vswr"] == (1.5, "max", "")
    assert told["front_to_back_ratio"] == (25.0, "min", "")  # the sign in the cell is nearer than the column
    assert told["weight"] == (20.0, "nominal", "")


def test_a_row_of_signs_and_tolerances_below_the_units(tmp_path: Path) -> None:
    rows = [
        ["Model", "Frequency", "Gain", "Isolation", "VSWR"],
        ["", "MHz", "dBi", "dB", ""],
        ["", "", "±0.5", "≥", "≤"],
        ["KD-1", "1710-2170", 17.5, 30, 1.5],
        ["KD-2", "698-960", 16.5, 28, 1.4],
    ]
    panels = read(tmp_path, rows).submission.panels
    told = {(p.name, r.parameter): (r.value, r.sense, r.tolerance) for p in panels for r in p.readings}
    assert {name for name, _ in told} == {"KD-1", "KD-2"}
    assert told["KD-1", "gain"] == (17.5, "nominal", 0.5)
    assert told["KD-2", "port_isolation"] == (28.0, "min", None)
    assert told["KD-2", "vswr"] == (1.4, "max", None)


@pytest.mark.parametrize(
    ("heading", "sense"),
    [
        ("Isolation (dB), ≥", "min"),
        ("Isolation ≥ [dB]", "min"),
        ("Isolation (≥)", "min"),
        ("Isolation", "nominal"),
    ],
)
def test_a_sign_in_a_heading_says_what_its_figures_bound(tmp_path: Path, heading: str, sense: str) -> None:
    rows = [["Model", "Frequency (MHz)", heading, "VSWR (≤)"], ["KD-1", "1710-2170", 30, 1.5]]
    assert _only(tmp_path, rows, "port_isolation").sense == sense
    assert _only(tmp_path, rows, "vswr").sense == "max"


def test_limits_of_a_form_are_those_of_its_demands(tmp_path: Path) -> None:
    rows = [
        ["Parameter", "Limit", "Required", "Offered", "Unit"],
        ["Model", "", "", "KD-1", ""],
        ["Frequency range", "", "1710-2170", "1710-2170", "MHz"],
        ["Gain", "min", 17, 17.5, "dBi"],
        ["VSWR", "max", 1.5, 1.4, ""],
    ]
    assert _only(tmp_path, rows, "gain").sense == "nominal"
    assert _only(tmp_path, rows, "vswr").sense == "nominal"


def test_a_word_not_known_in_a_column_of_limits_is_listed(tmp_path: Path) -> None:
    rows = [
        ["Parámetro", "Valor", "Unidad", "Límite"],
        ["Modelo", "KD-1", "", ""],
        ["Banda", "1710-2170", "MHz", ""],
        ["Ganancia", "17,5", "dBi", "típ."],
        ["Aislamiento", "30", "dB", "mín."],
        ["ROE", "1,5", "", "máx."],
        ["Relación F/B", "25", "dB", "garantizado"],
        ["Peso", "20", "kg", "según lote"],
    ]
    assert _only(tmp_path, rows, "port_isolation").sense == "min"
    assert _only(tmp_path, rows, "gain").statistic == "typical"
    assert [u.text for u in read(tmp_path, rows).submission.unread] == ["según lote"]
