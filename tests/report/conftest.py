"""A small assessment written by hand: one panel, two bands, one bad figure, hostile text."""

import pytest

from speccheck.records import (
    Amount,
    Assessment,
    CellRef,
    Compliance,
    Convention,
    Deviation,
    ExposureNote,
    ExposureRow,
    Finding,
    Fit,
    Interval,
    Level,
    MatrixRow,
    MirrorCell,
    MirrorSheet,
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

BAND = (3300, 3800)


def cell(address):
    return CellRef("bid.xlsx", "Bid", address)


def asked(address):
    return CellRef("tender.xlsx", "Requirements", address)


def reading(parameter, address, value, unit="", **more):
    more.setdefault("raw", str(value))
    more.setdefault("stated_value", value)
    more.setdefault("stated_unit", unit)
    return Reading(where=cell(address), parameter=parameter, value=value, unit=unit, **more)


# row of the sheet: heading, raw cell; numbers stand as numbers, the rest as text
SHEET = (
    ("Model", "=cmd|'/c calc'!A0"),
    ("Frequency range (MHz)", "3300-3800"),
    ("Gain (dBi)", 26.8),
    ("Horizontal beamwidth (deg)", 12.5),
    ("Vertical beamwidth", "6.0 ± 0.5"),
    ("Array rows", 12),
    ("Array columns", 8),
    ("Vertical element spacing (mm)", 55),
    ("Horizontal element spacing (mm)", 45),
    ("Horizontal scan (deg)", "±60"),
    ("VSWR", "< 1.5"),
    ("Return loss (dB)", 14.0),
    ("Passive intermodulation (dBc)", -153),
    ("Total power (W)", 200),
    ("EIRP (dBm)", 79.8),
    ("Flux mode", "yes"),
    ("Weight", "tbd"),
)


def readings():
    b = {"band": BAND}
    return (
        reading("model", "D1", "=cmd|'/c calc'!A0"),
        reading("frequency_range", "D2", BAND, "MHz", raw="3300-3800"),
        reading("operating_bands", "D2", BAND, "MHz", raw="3300-3800", **b),
        reading("gain", "D3", 26.8, "dBi", **b),
        reading("horizontal_beamwidth", "D4", 12.5, "deg", **b),
        reading("vertical_beamwidth", "D5", 6.0, "deg", tolerance=0.5, raw="6.0 ± 0.5", **b),
        reading("array_rows", "D6", 12),
        reading("array_columns", "D7", 8),
        reading("vertical_element_spacing", "D8", 0.055, "m", raw="55", stated_value=55, stated_unit="mm"),
        reading("horizontal_element_spacing", "D9", 0.045, "m", raw="45", stated_value=45, stated_unit="mm"),
        reading("horizontal_scan", "D10", (-60.0, 60.0), "deg", raw="±60", **b),
        reading("vswr", "D11", 1.5, raw="< 1.5", sense=Sense.MAX, **b),
        reading("return_loss", "D12", 14.0, "dB", sense=Sense.MIN, **b),
        reading("passive_intermodulation", "D13", -153.0, "dBc", **b),
        reading("max_power_total", "D14", 200.0, "W"),
        reading("eirp", "D15", 79.8, "dBm", **b),
    )


def findings():
    return (
        Finding(
            check="gain-fits-array",
            title="Gain fits the array",
            verdict=Fit.DOES_NOT_FIT,
            summary="26.8 dBi claimed; 23.9 to 25.1 dBi expected.",
            parameters=("gain", "array_rows", "array_columns"),
            band=BAND,
            claimed=Amount(26.8, "dBi"),
            expected=Interval(23.9, 25.1, "dBi"),
            working=(Step("Aperture", "12 · 55 mm × 8 · 45 mm", 0.2376, "m²"),),
            assumptions=("ohmic loss 0.2 to 1.0 dB",),
            conventions=(
                Convention("both polarisations together", 23.8, "dBi", repairs=("gain-fits-array",)),
            ),
            question="Please confirm the number of positions.",
            source="TR 38.901 clause 7.3",
            where=(cell("D3"), cell("D6"), cell("D7")),
        ),
        Finding(
            check="vswr-fits-return-loss",
            title="VSWR fits the return loss",
            verdict=Fit.FITS,
            summary="VSWR 1.5 is a return loss of 14.0 dB.",
            parameters=("vswr", "return_loss"),
            band=BAND,
            where=(cell("D11"), cell("D12")),
        ),
        Finding(
            check="weight-plausible",
            title="Weight is plausible",
            verdict=Fit.NOT_JUDGED,
            summary="Not judged: weight not stated.",
            parameters=("weight",),
            missing=("weight",),
            question="Please state the weight.",
        ),
    )


def requirements(gain):
    asked_gain = Requirement(
        where=asked("B2"),
        clause="3.1",
        wording="Gain shall be at least 24 dBi",
        level=Level.MANDATORY,
        parameter="gain",
        operator="≥",
        limit=24.0,
        unit="dBi",
        confirmed=True,
    )
    asked_weight = Requirement(
        where=asked("B3"),
        clause="=3.2",
        wording="@Weight up to 25 kg",
        level=Level.DESIRABLE,
        parameter="weight",
        operator="≤",
        limit=25.0,
        unit="kg",
    )
    stated = Statement(where=cell("D17"), parameter="weight", raw="tbd", status=Status.TO_BE_ADVISED)
    return (
        MatrixRow(
            requirement=asked_gain,
            verdict=Compliance.MEETS,
            band=BAND,
            offered=gain,
            offered_in_unit=26.8,
            margin=2.8,
            in_doubt=("gain-fits-array",),
        ),
        MatrixRow(
            requirement=asked_weight, verdict=Compliance.NOT_STATED, statement=stated, note="to be advised"
        ),
    )


def exposure():
    row = ExposureRow(
        band=BAND,
        population="general public",
        basis="whole body",
        frequency_mhz=3300,
        eirp_dbm=79.8,
        limit_w_m2=10,
        averaging_min=30,
        distance_m=27.6,
        cautious_distance_m=55.6,
    )
    return ExposureNote(
        complete=True,
        limit_set="icnirp-2020",
        edition="2020",
        rows=(row,),
        assumptions=("gain at its highest",),
        cautions=("No measurement was made.",),
    )


@pytest.fixture
def bid():
    """The assessment of one invented panel against two requirements."""
    stated = readings()
    weight = Statement(where=cell("D17"), parameter="weight", raw="tbd", status=Status.TO_BE_ADVISED)
    panel = Panel(name="=Panel 1", where=cell("D1"), readings=stated, statements=(weight,))
    mirror = [MirrorCell(f"A{n}", heading) for n, (heading, _) in enumerate(SHEET, 1)]
    mirror += [MirrorCell(f"D{n}", raw) for n, (_, raw) in enumerate(SHEET, 1)]
    mirror.append(MirrorCell("F3", 26.8, formula="=D3*1"))
    submission = Submission(
        file="bid.xlsx",
        sha256="ab" * 32,
        size_bytes=10240,
        panels=(panel,),
        unread=(
            Unread(where=cell("A16"), text="Flux mode", reason="no known heading", suggestion="null fill"),
        ),
        notices=(Notice(where=cell("F3"), text="formula with stored result"),),
        mirror=(MirrorSheet(name="Bid", cells=tuple(mirror)), MirrorSheet(name="Notes", hidden=True)),
    )
    gain = next(r for r in stated if r.parameter == "gain")
    rows = requirements(gain)
    tender = Tender(
        file="tender.xlsx",
        sha256="cd" * 32,
        requirements=tuple(row.requirement for row in rows),
        deviations=(
            Deviation(
                where=CellRef("tender.xlsx", "Deviations", "A2"),
                clause="3.1",
                offer="Other bidder",
                reason="lighter mast",
                approver="",
                expires="2027-01-31",
            ),
        ),
    )
    judged = PanelAssessment(
        panel=panel,
        outcome=Outcome.CLARIFY,
        findings=findings(),
        requirements=rows,
        exposure=exposure(),
        reasons=("1 claim does not fit",),
    )
    return Assessment(
        submission=submission,
        settings=Settings(tender="tender.xlsx", revision="B & 1", guard_bands={"gain": 0.5}),
        panels=(judged,),
        tender=tender,
        program_version="0.1.0",
    )
