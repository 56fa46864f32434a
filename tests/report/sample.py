"""A whole assessment written by hand, records only: every verdict kind, two bands, hostile text.

The scenario is invented; the figures are chosen to show the report at work and are judged nowhere.
"""

from __future__ import annotations

from dataclasses import replace

from speccheck.records import (
    Amount,
    Assessment,
    Band,
    CellRef,
    Compliance,
    Convention,
    Curve,
    Deviation,
    Drawing,
    ExposureNote,
    ExposureRow,
    ExposureZone,
    Finding,
    Fit,
    Interval,
    Level,
    MatrixRow,
    Notice,
    Outcome,
    Panel,
    PanelAssessment,
    Reading,
    Requirement,
    Sense,
    Settings,
    Statement,
    Status,
    Step,
    Submission,
    Tender,
    Unread,
)

FILE = "quarrymoss-dual.xlsx"
LOW: Band = (694.0, 960.0)
HIGH: Band = (1695.0, 2690.0)


def at(cell: str, sheet: str = "Panel data") -> CellRef:
    """A cell of the invented bid."""
    return CellRef(FILE, sheet, cell)


def _reading(cell: str, parameter: str, raw: str, value: object, unit: str, **more: object) -> Reading:
    return Reading(where=at(cell), parameter=parameter, raw=raw, value=value, unit=unit, **more)  # type: ignore[arg-type]


READINGS = (
    _reading("B4", "operating_bands", "694-960 MHz", LOW, "MHz", band=LOW),
    _reading("C4", "operating_bands", "1695-2690 MHz", HIGH, "MHz", band=HIGH),
    _reading("B5", "gain", "15,2 ± 0,4 dBi", 15.2, "dBi", band=LOW, tolerance=0.4, stated_unit="dBi"),
    _reading("C5", "gain", "21.0 dBi", 21.0, "dBi", band=HIGH, sense=Sense.MIN),
    _reading("B6", "horizontal_beamwidth", "67° ± 3°", 67.0, "deg", band=LOW, tolerance=3.0),
    _reading("C6", "horizontal_beamwidth", "63", 63.0, "deg", band=HIGH),
    _reading("B7", "vertical_beamwidth", "9.8 deg", 9.8, "deg", band=LOW),
    _reading("C7", "vertical_beamwidth", "5,5", 5.5, "deg", band=HIGH),
    _reading("B8", "electrical_tilt", "2…12", (2.0, 12.0), "deg", band=LOW),
    _reading("C8", "electrical_tilt", "2…12", (2.0, 12.0), "deg", band=HIGH),
    _reading("C9", "vertical_element_spacing", "128 mm", 0.128, "m", band=HIGH, stated_unit="mm"),
    _reading("C10", "vswr", "< 1.5", 1.5, "", band=HIGH, sense=Sense.MAX),
    _reading("C11", "return_loss", "14 dB", 14.0, "dB", band=HIGH, sense=Sense.MIN),
    _reading("B12", "max_power_per_port", "250 W", 250.0, "W", band=LOW),
    _reading("C12", "max_power_per_port", "1,250", 1250.0, "W", band=HIGH, alternatives=(1250.0, 1.25)),
    _reading("B20", "height", "1998", 1.998, "m", stated_unit="mm"),
    _reading("B21", "width", "426 mm", 0.426, "m"),
    _reading("B22", "weight", "31.5 kg", 31.5, "kg"),
    _reading("B23", "wind_load", "720 N @150 km/h", 720.0, "N", condition="front, 150 km/h"),
    _reading("B24", "rf_ports", "6", 6.0, ""),
)

STATEMENTS = (
    Statement(
        where=at("B13"),
        parameter="passive_intermodulation",
        raw="complies",
        status=Status.DECLARED,
        band=LOW,
    ),
    Statement(
        where=at("C13"),
        parameter="passive_intermodulation",
        raw="TBA",
        status=Status.TO_BE_ADVISED,
        band=HIGH,
    ),
)

PANEL = Panel(name="Quarrymoss QD-6 <b>bold</b>", where=at("A1"), readings=READINGS, statements=STATEMENTS)

MISFIT = Finding(
    check="gain-fits-beamwidths",
    title="Gain fits the beamwidths",
    verdict=Fit.DOES_NOT_FIT,
    band=HIGH,
    summary="21.0 dBi is claimed; widths of 63° and 5.5° allow 18.1 to 19.8 dBi. The claim is 1.2 dB above.",
    parameters=("gain", "horizontal_beamwidth", "vertical_beamwidth"),
    claimed=Amount(21.0, "dBi"),
    expected=Interval(18.1, 19.8, "dBi"),
    working=(
        Step("Lower constant", "10·log10(31000 / (63 · 5.5))", 19.52, "dBi"),
        Step("Feed loss assumed", "0.3 to 1.4 dB", "0.3 to 1.4", "dB"),
    ),
    assumptions=("one polarisation", "losses of 0.3 to 1.4 dB between port and aperture"),
    conventions=(
        Convention("gain summed over both polarisations", 18.0, "dBi", repairs=("gain-fits-beamwidths",)),
        Convention(
            "beamwidths stated at the low end of the band", 20.1, "dBi", leaves=("gain-fits-geometry",)
        ),
    ),
    question="Cell C5 states 21.0 dBi. Is this the gain of one polarisation, and at which frequency?",
    source="ITU-R F.1336-5, recommends 3.3",
    where=(at("C5"), at("C6"), at("C7")),
)

FINDINGS = (
    replace(
        MISFIT,
        verdict=Fit.FITS,
        band=LOW,
        claimed=Amount(15.2, "dBi"),
        expected=Interval(14.3, 16.0, "dBi"),
        summary="15.2 dBi is claimed; widths of 67° and 9.8° allow 14.3 to 16.0 dBi.",
        conventions=(),
        question="",
        where=(at("B5"), at("B6"), at("B7")),
    ),
    MISFIT,
    Finding(
        check="spacing-free-of-lobes",
        title="Element spacing keeps grating lobes out of the claimed tilt range",
        verdict=Fit.DOUBTFUL,
        band=HIGH,
        summary="128 mm is 1.15λ at 2690 MHz; a lobe enters from 2280 MHz on and stands at −6.1 dB.",
        parameters=("vertical_element_spacing",),
        claimed=Amount(0.128, "m"),
        expected=Interval(None, 0.092, "m"),
        working=(Step("Spacing at the top of the band", "0.128 m / 0.1114 m", 1.149, "λ"),),
        assumptions=("uniform columns",),
        question="Which frequency does the spacing in cell C9 belong to?",
        source="common practice",
        where=(at("C9"),),
    ),
    Finding(
        check="vswr-fits-return-loss",
        title="VSWR and return loss tell the same",
        verdict=Fit.FITS,
        band=HIGH,
        summary="VSWR 1.50 and return loss 14.0 dB agree within rounding.",
        parameters=("vswr", "return_loss"),
        claimed=Amount(14.0, "dB"),
        expected=Interval(13.9, 14.1, "dB"),
        working=(Step("Return loss of VSWR 1.5", "−20·log10((1.5 − 1) / (1.5 + 1))", 13.98, "dB"),),
        source="IEC 60050-726",
        where=(at("C10"), at("C11")),
    ),
    Finding(
        check="ports-fit-arrays",
        title="Ports match the arrays",
        verdict=Fit.NOT_JUDGED,
        summary="The number of arrays is not stated.",
        parameters=("rf_ports", "array_columns"),
        missing=("array_columns",),
        question="How many columns does each band have?",
        where=(at("B24"),),
    ),
)


def _requirement(
    clause: str, parameter: str, operator: str, limit: object, unit: str, **more: object
) -> Requirement:
    row = int(clause.rsplit(".", 1)[1]) + 1
    return Requirement(
        where=CellRef("tender.xlsx", "Requirements", f"B{row}"),
        clause=clause,
        wording=f"{parameter.replace('_', ' ')} {operator} {limit} {unit}",
        level=more.pop("level", Level.MANDATORY),  # type: ignore[arg-type]
        parameter=parameter,
        operator=operator,
        limit=limit,  # type: ignore[arg-type]
        unit=unit,
        **more,  # type: ignore[arg-type]
    )


REQUIREMENTS = (
    _requirement("4.1", "gain", "≥", 14.5, "dBi", bands=(LOW,), confirmed=True),
    _requirement("4.2", "horizontal_beamwidth", "within", (60.0, 70.0), "deg", bands=(LOW,), confirmed=True),
    _requirement("4.3", "vswr", "≤", 1.5, "", bands=(HIGH,), confirmed=True),
    _requirement("4.4", "electrical_tilt", "contains", (0.0, 12.0), "deg", bands=(HIGH,), confirmed=True),
    _requirement("4.5", "return_loss", "≥", 14.1, "dB", bands=(HIGH,), confirmed=True),
    _requirement("4.6", "passive_intermodulation", "≤", -153.0, "dBc", bands=(LOW,)),
    _requirement("4.7", "survival_wind_speed", "≥", 55.6, "m/s", confirmed=True),
    _requirement("4.8", "max_power_per_port", "≥", 200.0, "W", bands=(HIGH,), confirmed=True),
    _requirement("4.9", "height", "≤", 1.9, "m", confirmed=True),
    _requirement("4.10", "weight", "≤", 30.0, "kg", level=Level.DESIRABLE, confirmed=True),
    _requirement("4.11", "width", "≤", 0.45, "m", level=Level.DESIRABLE, confirmed=True),
    _requirement(
        "4.12", "operating_bands", "contains", (1710.0, 2690.0), "MHz", bands=(HIGH,), confirmed=True
    ),
)


def _row(index: int, verdict: Compliance, cell: str = "", **more: object) -> MatrixRow:
    offered = next((r for r in READINGS if r.where.cell == cell), None)
    requirement = REQUIREMENTS[index]
    band = requirement.bands[0] if requirement.bands else None
    return MatrixRow(requirement=requirement, verdict=verdict, band=band, offered=offered, **more)  # type: ignore[arg-type]


ROWS = (
    _row(0, Compliance.MEETS, "B5", margin=0.3),
    _row(1, Compliance.MEETS_NARROWLY, "B6", margin=0.0),
    _row(2, Compliance.MEETS, "C10", margin=0.0),
    _row(3, Compliance.FAILS, "C8", margin=-2.0, note="0 to 2° is not offered.", statement=STATEMENTS[0]),
    _row(4, Compliance.FAILS_NARROWLY, "C11", margin=-0.1),
    _row(5, Compliance.DECLARED_ONLY, statement=STATEMENTS[0]),
    _row(6, Compliance.NOT_STATED),
    _row(7, Compliance.NOT_JUDGED, "C12", note="The cell admits two readings."),
    _row(8, Compliance.DEVIATION_ACCEPTED, "B20", margin=-0.098, underlying=Compliance.FAILS),
    _row(9, Compliance.FAILS, "B22", margin=-1.5),
    _row(10, Compliance.MEETS, "B21", margin=0.024),
    _row(11, Compliance.MEETS, "C4", margin=0.0, in_doubt=("bands-fit-range",)),
)

EXPOSURE = ExposureNote(
    complete=True,
    limit_set="ICNIRP 2020",
    edition="2020",
    limit_source="Health Physics 118(5):483-524, table 5",
    rows=tuple(
        ExposureRow(
            band=band,
            population=population,
            category="general public" if population == "public" else "workers",
            basis=basis,
            frequency_mhz=frequency,
            eirp_dbm=eirp,
            limit_w_m2=limit,
            averaging_min=minutes,
            distance_m=distance,
            cautious_distance_m=round(distance * 2.01, 1),
            far_field_m=far,
            region="inside the far-field distance",
        )
        for band, population, basis, frequency, eirp, limit, minutes, distance, far in (
            (LOW, "public", "whole body", 694.0, 69.2, 3.47, 30.0, 13.9, 22.1),
            (LOW, "workers", "whole body", 694.0, 69.2, 17.35, 30.0, 6.2, 22.1),
            (HIGH, "public", "whole body", 1695.0, 74.0, 8.48, 30.0, 15.4, 61.4),
            (HIGH, "workers", "whole body", 1695.0, 74.0, 42.4, 30.0, 6.9, 61.4),
            (None, "public", "whole body", None, None, None, 30.0, 20.8, None),
            (None, "workers", "whole body", None, None, None, 30.0, 9.3, None),
        )
    ),
    assumptions=(
        "power of all ports and both polarisations together, 500 W (cells B12, C12)",
        "highest gain over band and tilt; losses 0 dB",
        "EIRP is the average over time, summed over both polarisations",
    ),
    cautions=(
        "Calculated for comparison of offers from figures supplied by the bidder. No measurement was made. "
        "It does not replace the assessment required before the antenna is put into service.",
        "Other transmitters on the structure or nearby are not included.",
        "The distance is along the strongest beam only.",
    ),
    validity=("Holds for this revision of the sheet, this power and this limit set.",),
    factors=(
        Step("Reflection factor on power density", "free space", 1.0),
        Step("Time factor", "full power", 1.0),
    ),
    working=(Step("Public, 694 to 960 MHz", "√(8318 W / (4π · 3.47 W/m²))", 13.81, "m"),),
    around=(
        ExposureZone(
            band=HIGH,
            population="public",
            basis="whole body",
            front_m=15.4,
            above_m=1.2,
            below_m=3.6,
            beside_m=9.8,
            behind_m=0.6,
            tilts_deg=(2.0, 12.0),
            scans_deg=(0.0,),
            side_view=(
                (0.0, 1.2),
                (6.0, 0.8),
                (15.3, -0.4),
                (15.0, -3.2),
                (6.0, -3.0),
                (0.0, -1.2),
                (-0.6, 0.0),
            ),
            top_view=(
                (0.0, 1.0),
                (7.0, 8.6),
                (12.0, 6.5),
                (15.4, 0.0),
                (12.0, -6.5),
                (7.0, -8.6),
                (0.0, -1.0),
            ),
        ),
    ),
    where=(at("B12"), at("C12"), at("B5"), at("C5")),
)


def _cut(name: str, width: float, middle: float = 0.0, end: float = 180.0) -> Curve:
    """A parabola in dB with a floor: the form of TR 38.901 Table 7.3-1."""
    angles = tuple(float(a) for a in range(int(-end), int(end) + 1, 2))
    levels = tuple(max(-12 * ((a - middle) / width) ** 2, -30.0) for a in angles)
    return Curve(name=name, x=angles, y=levels, x_unit="deg", y_unit="dB")


def _outline(name: str, u: float, v: float) -> Curve:
    corners = ((u - 0.1, v), (u + 0.1, v), (u + 0.1, v - 0.2), (u - 0.1, v - 0.2))
    return Curve(
        name=name, x=tuple(c[0] for c in corners), y=tuple(c[1] for c in corners), x_unit="u", y_unit="v"
    )


DRAWINGS = (
    Drawing(
        kind="spacing",
        title="Vertical spacing passes its limit of 0.83λ for 12° at 1939 MHz",
        text="1695–2690 MHz: 0.72λ to 1.15λ.",
        band=HIGH,
        curves=(Curve(name="vertical, 128 mm", x=HIGH, y=(0.72, 1.15), x_unit="MHz", y_unit="λ"),),
        marks={"limit_vertical_wl": 0.83, "angle_vertical_deg": 12.0, "crossing_vertical_mhz": 1939.0},
        where=(at("C9"), at("C8")),
    ),
    Drawing(
        kind="vertical-cut",
        title="Vertical cut: 5.5° claimed, expected 4.5° at −3 dB",
        text="Computed at 2192 MHz.",
        band=HIGH,
        curves=(_cut("tilt 2°", 4.5, -2, 90), _cut("tilt 7°", 4.5, -7, 90), _cut("tilt 12°", 4.5, -12, 90)),
        marks={
            "expected_3db_deg": 4.5,
            "expected_3db_from_deg": -9.2,
            "expected_3db_to_deg": -4.7,
            "claimed_3db_deg": 5.5,
            "upper_sidelobe_db": -12.9,
        },
        where=(at("C7"),),
    ),
    Drawing(
        kind="horizontal-cut",
        title="Horizontal cut: 63° claimed, expected 65° at −3 dB and 118° at −10 dB",
        text="Computed at 2192 MHz.",
        band=HIGH,
        curves=(_cut("azimuth 0°", 65.0),),
        marks={"expected_3db_deg": 65.0, "expected_10db_deg": 118.0, "claimed_3db_deg": 63.0},
        where=(at("C6"),),
    ),
    Drawing(
        kind="steering-map",
        title="At 2690 MHz grating lobes reach visible space within the claimed steering",
        text="2 lobes of the element lattice are visible.",
        band=HIGH,
        curves=(
            _outline("claimed steering", 0, 0),
            _outline("grating lobe", 0, 0.87),
            _outline("grating lobe", 0, -0.87),
        ),
        marks={"lobes_seen": 2.0},
        where=(at("C9"),),
    ),
    Drawing(
        kind="eirp-ladder",
        title="Power 59.0 dBm and gain 21.0 dBi add up to 80.0 dBm EIRP; 78.0 dBm is claimed (−2.0 dB)",
        text="Rating of the ports 800 W over both polarisations.",
        band=HIGH,
        marks={"power_w": 800.0, "power_dbm": 59.03, "gain_dbi": 21.0, "sum_dbm": 80.03, "claimed_dbm": 78.0},
        where=(at("C5"), at("C12")),
    ),
    Drawing(
        kind="port-map",
        title="6 ports over 2 bands; 6 are stated for the panel",
        text="2 ports below 1 GHz, 4 above.",
        marks={
            "band_1_low_mhz": LOW[0],
            "band_1_high_mhz": LOW[1],
            "band_1_ports": 2.0,
            "band_2_low_mhz": HIGH[0],
            "band_2_high_mhz": HIGH[1],
            "band_2_ports": 4.0,
        },
        where=(at("B24"),),
    ),
    Drawing(
        kind="port-map",
        title="4 × 8 sub-arrays in two polarisations make 64 ports, while 32 transceivers are stated",
        text="Grid of 4 rows and 8 columns of sub-arrays.",
        band=LOW,
        marks={"grid_rows": 4, "grid_columns": 8, "stated_ports": 32.0},
        where=(at("B24"),),
    ),
)

OUTLINE = PanelAssessment(
    panel=PANEL,
    outcome=Outcome.REJECT,
    findings=FINDINGS,
    requirements=ROWS,
    exposure=EXPOSURE,
    drawings=DRAWINGS,
    reasons=(
        "Clause 4.4: tilt 2 to 12° is offered, 0 to 12° is required (C8).",
        "Clause 4.5: return loss 14.0 dB against at least 14.1 dB (C11).",
        "1695 to 2690 MHz: 21.0 dBi does not fit widths of 63° and 5.5° (C5, C6, C7).",
        "Clause 4.7: survival wind speed is not stated.",
        "Clause 4.8: power per port admits two readings (C12).",
        "Clause 4.6: intermodulation is declared without a figure (B13).",
    ),
)

TENDER = Tender(
    file="tender.xlsx",
    sha256="7f" * 32,
    requirements=REQUIREMENTS,
    deviations=(
        Deviation(
            where=CellRef("tender.xlsx", "Deviations", "A2"),
            clause="4.9",
            offer=FILE,
            reason="mast top has room",
            approver="named by the buyer",
            expires="2027-06-30",
        ),
    ),
)

SUBMISSION = Submission(
    file=FILE,
    sha256="3ac91f" * 10 + "0b1d",
    size_bytes=18342,
    panels=(PANEL,),
    unread=(
        Unread(
            where=at("A30"),
            text="<script>alert('x')</script> Strahlerform: \u202eSonder",
            reason="no known heading",
            suggestion="element pattern",
        ),
    ),
    notices=(Notice(where=at("D1"), text="column D is hidden"),),
)

SETTINGS = Settings(
    tender="Saltreach Ferries, radio renewal, lot 2",
    report_number="SR-2-014",
    revision="A",
    today="2026-12-01",
    guard_bands={"gain": 0.2},
)


def sample(**settings: object) -> Assessment:
    """The sample assessment, with settings changed as named."""
    return Assessment(
        submission=SUBMISSION,
        settings=replace(SETTINGS, **settings),  # type: ignore[arg-type]
        panels=(OUTLINE,),
        tender=TENDER,
        program_version="0.1.0",
    )
