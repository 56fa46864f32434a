"""Numbers behind the figures, against handbook arithmetic; odd figures never stop them."""

from __future__ import annotations

import math

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from speccheck.checks import panel_drawings
from speccheck.records import Amount, Band, CellRef, Drawing, Finding, Fit, Interval, Panel, Reading, Settings
from speccheck.report.pages.array_figures import draw
from speccheck.report.pages.formats import Numbers

BAND: Band = (3300.0, 3800.0)
WHERE = CellRef("bid.xlsx", "Data", "B2")


def panel(band: Band = BAND, **figures: object) -> Panel:
    """A panel of one band with the figures named, all in one cell."""
    stated = {"operating_bands": band} | figures
    return Panel(
        name="panel",
        where=WHERE,
        readings=tuple(
            Reading(where=WHERE, parameter=key, raw=str(value), value=value, unit="", band=band)  # type: ignore[arg-type]
            for key, value in stated.items()
        ),
    )


def drawn(kind: str, *findings: Finding, **figures: object) -> Drawing | None:
    """The drawing of a kind, if there is one."""
    found = panel_drawings(panel(**figures), Settings(), findings)  # type: ignore[arg-type]
    return next((d for d in found if d.kind == kind), None)


ACTIVE = {
    "array_rows": 12.0,
    "array_columns": 8.0,
    "vertical_element_spacing": 0.058,
    "horizontal_element_spacing": 0.0428,
    "electrical_tilt": (-3.0, 9.0),
    "horizontal_scan": (-60.0, 60.0),
}


def test_spacing_crosses_its_limit_where_the_grating_lobe_condition_says() -> None:
    # Mailloux, Phased Array Antenna Handbook, ch. 1: d/λ = 1/(1 + sin 60°) = 0.536;
    # c/(0.0428 m · 1.866) = 3.754 GHz
    drawing = drawn("spacing", **ACTIVE)
    assert drawing is not None
    assert drawing.marks["crossing_horizontal_mhz"] == pytest.approx(3754, abs=1)
    assert drawing.marks["limit_horizontal_wl"] == pytest.approx(0.5359, abs=1e-4)
    assert "3754 MHz" in drawing.title


def test_limits_of_a_triangular_lattice_are_reached_where_its_first_lobe_enters() -> None:
    # Hansen, Phased Array Antennas, ch. 2: an equilateral lattice, not steered, keeps lobes out up to a side
    # of 2/√3 = 1.1547 λ: sides (s, 0) and (s/2, s√3/2) have the reciprocal (1/s, -1/(√3 s)) of length
    # 2/(√3 s), which is 1, the rim of visible space, at that side. Rows 0.1 m · √3/2 apart, each shifted by
    # half a side: c · 1.1547/0.1 m = 3462 MHz, 1.1547 · √3/2 = 1 λ
    drawing = drawn(
        "spacing",
        lattice="triangular",
        array_rows=8.0,
        array_columns=8.0,
        vertical_element_spacing=0.1 * math.sqrt(3) / 2,
        horizontal_element_spacing=0.1,
    )
    assert drawing is not None
    assert drawing.marks["limit_horizontal_wl"] == pytest.approx(1.1547, abs=1e-4)
    assert drawing.marks["limit_vertical_wl"] == pytest.approx(1, abs=1e-4)
    for plane in ("vertical", "horizontal"):
        assert drawing.marks[f"crossing_{plane}_mhz"] == pytest.approx(3462, abs=1)
    assert draw(drawing, Numbers()) is not None


def test_half_a_wavelength_keeps_lobes_out_of_the_steering_map() -> None:
    # d = λ/2 at the band top: no lobe for any steering (Balanis, Antenna Theory, ch. 6)
    half = 299.792458 / 3800 / 2
    close = drawn(
        "steering-map", **ACTIVE | {"vertical_element_spacing": half, "horizontal_element_spacing": half}
    )
    wide = drawn("steering-map", **ACTIVE | {"horizontal_element_spacing": 0.06})
    assert close is not None
    assert close.marks["lobes_seen"] == 0
    assert wide is not None
    assert wide.marks["lobes_seen"] > 0


def test_lobes_of_sub_arrays_stand_a_wavelength_over_their_pitch_apart() -> None:
    # lobes at sin θ + n·λ/D (Mailloux, Phased Array Antenna Handbook, ch. 7): three rows of 58 mm at 3800 MHz
    # have λ/D = 78.893/174 = 0.453, twice 0.907; the third, 1.360 = λ/58 mm, is the element lattice's own
    grouped = drawn("steering-map", **ACTIVE | {"vertical_element_spacing": 0.058, "subarray_rows": 3.0})
    assert grouped is not None
    own = grouped.curves[0]
    steps = {round(c.y[0] - own.y[0], 2) for c in grouped.curves if c.name == "sub-array lobe"}
    assert {0.45, -0.45, 0.91, -0.91} <= steps
    assert not steps & {1.36, -1.36}


def test_width_of_the_vertical_cut_is_that_of_a_uniform_line() -> None:
    # 50.8° · λ/L of a uniform line (Balanis, Antenna Theory, ch. 6): 12 · 58 mm at 3550 MHz gives 6.16°
    drawing = drawn("vertical-cut", **ACTIVE)
    assert drawing is not None
    expected = 50.8 * (299.792458 / 3550) / (12 * 0.058)
    assert drawing.marks["expected_3db_deg"] == pytest.approx(expected, rel=0.02)
    assert drawing.marks["upper_sidelobe_db"] == pytest.approx(
        -13.2, abs=0.5
    )  # first side lobe of a uniform line


def test_up_is_up_and_tilt_points_down() -> None:
    drawing = drawn("vertical-cut", **ACTIVE)
    assert drawing is not None
    peaks = [c.x[max(range(len(c.y)), key=c.y.__getitem__)] for c in drawing.curves]
    assert peaks == pytest.approx([3, -3, -9], abs=0.6)
    assert [c.name for c in drawing.curves] == ["tilt −3°", "tilt 3°", "tilt 9°"]


def test_a_single_column_is_drawn_for_its_claim_and_not_held_against_it() -> None:
    drawing = drawn(
        "horizontal-cut", array_rows=10.0, vertical_element_spacing=0.06, horizontal_beamwidth=65.0
    )
    assert drawing is not None
    assert "expected_3db_deg" not in drawing.marks
    # 12 (φ/65°)² dB reaches 10 dB at ±59.3° (TR 38.901 Table 7.3-1)
    assert drawing.marks["expected_10db_deg"] == pytest.approx(2 * 59.3, abs=2)


def test_the_interval_of_a_finding_is_marked() -> None:
    finding = Finding(
        check="x",
        title="x",
        verdict=Fit.FITS,
        summary="x",
        parameters=("vertical_beamwidth",),
        band=BAND,
        claimed=Amount(6.0, "deg"),
        expected=Interval(5.5, 7.0, "deg"),
    )
    drawing = drawn("vertical-cut", finding, **ACTIVE)
    assert drawing is not None
    assert (drawing.marks["interval_low_deg"], drawing.marks["interval_high_deg"]) == (5.5, 7.0)


def test_the_ladder_adds_power_and_gain() -> None:
    # 320 W are 55.05 dBm; with 25 dBi 80.05 dBm EIRP
    drawing = drawn("eirp-ladder", conducted_power=320.0, gain=25.0, eirp=80.0)
    assert drawing is not None
    assert drawing.marks["sum_dbm"] == pytest.approx(80.05, abs=0.01)
    assert "−0.1 dB" in drawing.title


def test_ports_of_an_active_array_are_counted_in_both_polarisations() -> None:
    # 12 × 8 positions, 3 rows to a port: 4 · 8 · 2 = 64
    drawing = drawn("port-map", **ACTIVE, subarray_rows=3.0, transceivers=64.0)
    assert drawing is not None
    assert "4 × 8 sub-arrays in two polarisations make 64 ports" in drawing.title


NUMBERS = st.one_of(
    st.sampled_from([0.0, -1.0, 1.0, 1e308, -1e308, 1e-300]), st.floats(-1e6, 1e6), st.floats(0.01, 100)
)
KEYS = (*ACTIVE, "gain", "eirp", "conducted_power", "transceivers", "ports_per_band", "subarray_rows",
        "vertical_beamwidth", "horizontal_beamwidth", "horizontal_beamwidth_10db", "rf_ports")  # fmt: skip


@settings(max_examples=150, deadline=None, suppress_health_check=[HealthCheck.too_slow])
@given(
    figures=st.dictionaries(
        st.sampled_from(KEYS), st.one_of(NUMBERS, st.tuples(NUMBERS, NUMBERS), st.text(max_size=5))
    ),
    edges=st.tuples(NUMBERS, NUMBERS),
)
def test_no_figure_of_a_bid_stops_a_drawing(figures: dict[str, object], edges: Band) -> None:
    base: dict[str, object] = {"array_rows": 8.0, "vertical_element_spacing": 0.1} | figures
    for drawing in panel_drawings(panel(edges, **base), Settings(), ()):
        assert all(math.isfinite(v) for v in drawing.marks.values()), drawing
        figure = draw(drawing, Numbers())
        assert figure is not None
        assert not any("nan" in s.path or "inf" in s.path for s in figure.strokes)
