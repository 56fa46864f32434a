"""Writes the invented tender and bids of `sample_specs/`; run it after changing a figure.

The scenario: the port of Marrowick renews its quay network and asks for antenna panels in several
bands. Bidders, places and panels are invented; each bid has its own habits.
"""

from __future__ import annotations

import datetime as dt
import zipfile
from pathlib import Path

from openpyxl import Workbook
from openpyxl.styles import Alignment, Font, PatternFill
from openpyxl.worksheet.worksheet import Worksheet

SAMPLES = Path(__file__).parents[2] / "sample_specs"
WRITTEN = dt.datetime(2026, 3, 2, 9, 0)  # noqa: DTZ001  a workbook stores local time
HEAD = Font(bold=True)
SHADE = PatternFill("solid", fgColor="E7E9EC")


def sheet(book: Workbook, title: str, rows: list[list[object]], widths: list[int]) -> Worksheet:
    """A sheet with the given rows; text that looks like a formula stays text."""
    page = book.create_sheet(title)
    for row in rows:
        page.append(row)
    for column, width in enumerate(widths):
        page.column_dimensions["ABCDEFGHIJKLMNOPQRSTUVWXYZ"[column]].width = width
    return page


def headed(page: Worksheet, row: int) -> None:
    for cell in page[row]:
        cell.font, cell.fill = HEAD, SHADE
        cell.alignment = Alignment(wrap_text=True, vertical="top")


def save(book: Workbook, name: str) -> None:
    """Saves with fixed times, so that an unchanged sample is an unchanged file."""
    del book["Sheet"]
    book.properties.creator = ""
    book.properties.created = book.properties.modified = WRITTEN
    path = SAMPLES / name
    book.save(path)
    with zipfile.ZipFile(path) as archive:
        parts = [(info.filename, archive.read(info)) for info in archive.infolist()]
    with zipfile.ZipFile(path, "w") as archive:
        for filename, content in parts:
            info = zipfile.ZipInfo(filename, WRITTEN.timetuple()[:6])
            info.compress_type = zipfile.ZIP_DEFLATED
            archive.writestr(info, content)


def tender() -> None:
    book = Workbook()
    rows = [
        ["Clause", "Requirement", "Level", "Confirmed", "Weight"],
        ["T-01", "Polarisation ±45°", "M", "yes", None],
        ["T-02", "VSWR ≤ 1.5:1", "M", "yes", None],
        ["T-03", "Isolation ≥ 25 dB between the two polarisations", "M", "yes", None],
        ["T-04", "Front-to-back ratio ≥ 25 dB, total power, 180° ± 30°", "M", "yes", None],
        ["T-05", "Upper side-lobe suppression at least 15 dB at all tilts", "D", "yes", 3],
        ["T-06", "Cross-polar discrimination ≥ 15 dB on axis", "D", "yes", 2],
        ["T-07", "Passive intermodulation ≤ -150 dBc @ 2×43 dBm", "D", "yes", 3],
        ["T-08", "Height not exceeding 2.0 m", "M", "yes", None],
        ["T-09", "Weight up to 35 kg", "M", "yes", None],
        ["T-10", "Wind load ≤ 600 N at 150 km/h frontal", "M", "yes", None],
        ["T-11", "Survival wind speed at least 200 km/h", "M", "yes", None],
        ["T-12", "Temperature range -40 … +55 °C", "M", "yes", None],
        ["T-13", "Electrical downtilt 2-10°, continuously adjustable", "D", "", 2],
        ["T-14", "Colour: bidder to state", "I", "yes", None],
    ]
    page = sheet(book, "Requirements", rows, [10, 70, 9, 12, 9])
    headed(page, 1)
    settings = [
        ["Setting", "Value", "Unit", "Note"],
        ["Tender", "Port of Marrowick, quay network renewal, lot 2", None, "printed on every report"],
        ["Exposure limit set", "icnirp-2020", None, "the set in force where the panels will stand"],
        ["Guard band: wind_load", 20, "N", "half of the usual spread between wind tunnels"],
        ["Guard band: vswr", 0, None, "a declared maximum is taken as it stands"],
        ["Statistic when none is named", "each", None, "worst case over the scope"],
    ]
    headed(sheet(book, "Settings", settings, [32, 46, 9, 46]), 1)
    headings = [["Heading", "Parameter"], ["Quay rating", "survival_wind_speed"]]
    headed(sheet(book, "Headings", headings, [32, 32]), 1)
    deviations = [["Clause", "Bidder or panel", "Reason", "Approver", "Expires"]]
    headed(sheet(book, "Deviations", deviations, [10, 24, 46, 24, 14]), 1)
    save(book, "tender.xlsx")


def aldervane() -> None:
    """Sound passive column: parameters down, two bands across under a merged heading."""
    book = Workbook()
    rows: list[list[object]] = [
        ["Aldervane Quay Column 12: technical data"],
        ["Values hold over all tilts and both polarisations"],
        [None],
        ["Parameter", "Unit", "Frequency range 1710 – 2690", None],
        [None, None, "1710 – 2170", "2300 – 2690"],
        ["Polarisation", "°", "±45", None],
        ["Radiating elements per column", "pcs", 12, None],
        ["Columns", "pcs", 1, None],
        ["Vertical element spacing", "mm", 92, None],
        ["RF ports", "pcs", "2 x 4.3-10 female", None],
        ["Gain", "dBi", "17.1 ± 0.5", "18.3 ± 0.5"],
        ["Horizontal beamwidth", "°", "65 ± 4", "62 ± 5"],
        ["Vertical beamwidth", "°", "7.8 ± 0.5", "6.1 ± 0.5"],
        ["Electrical downtilt", "°", "2 – 10", None],
        ["Upper side-lobe suppression", "dB", "≥ 16", "≥ 15"],
        ["Front-to-back ratio, total power, 180° ± 30°", "dB", "≥ 25", "≥ 26"],
        ["Cross-polar discrimination on axis", "dB", "≥ 18", "≥ 18"],
        ["Isolation between ports", "dB", "≥ 30", "≥ 30"],
        ["VSWR", None, "≤ 1.5", None],
        ["Return loss", "dB", "≥ 14", None],
        ["Passive intermodulation, 3rd order, 2 x 43 dBm", "dBc", "≤ -153", None],
        ["Max. power per port at 50 °C", "W", 250, None],
        ["Impedance", "Ω", 50, None],
        ["Height x width x depth", "mm", "1240 x 170 x 95", None],
        ["Weight without clamps", "kg", 11.5, None],
        ["Wind load, frontal, at 150 km/h", "N", 270, None],
        ["Survival wind speed", "km/h", 241, None],
        ["Temperature range", "°C", "-40 … +60", None],
        ["Colour", None, "light grey", None],
    ]
    page = sheet(book, "Data sheet", rows, [46, 9, 18, 18])
    headed(page, 4)
    headed(page, 5)
    page.merge_cells("C4:D4")
    for row in range(6, len(rows) + 1):
        if page.cell(row, 4).value is None:
            page.merge_cells(start_row=row, end_row=row, start_column=3, end_column=4)
    save(book, "aldervane-quay-column.xlsx")


def brackwater() -> None:
    """Two sound massive-MIMO panels: one row a panel, units in the headings."""
    book = Workbook()
    head = [
        "Model", "Frequency range (MHz)", "3GPP bands", "Polarisation", "Rows", "Columns",
        "Sub-array (rows x columns)", "Vertical spacing (mm)", "Horizontal spacing (mm)",
        "Fixed sub-array tilt (°)", "Transceivers", "CSI-RS ports", "Layers", "Gain (dBi)",
        "Azimuth beamwidth (°)", "Elevation beamwidth (°)", "Electrical tilt (°)",
        "Horizontal scan range (°)", "Total RF power (W)", "EIRP (dBm)", "Power consumption (W)",
        "Front-to-back ratio (dB)", "Cross-polar discrimination (dB)", "Port isolation (dB)", "VSWR",
        "Height (mm)", "Width (mm)", "Depth (mm)", "Weight (kg)", "Wind load at 150 km/h (N)",
        "Survival wind speed (km/h)", "Operating temperature (°C)",
    ]  # fmt: skip
    rows: list[list[object]] = [
        ["Brackwater active panels, offer to the port of Marrowick"],
        [None],
        head,
        [
            "Brack 64", "3300-3800", "n78", "±45°", 12, 8, "3 x 1", 58, 41.5, 6, "64T64R", 32, 16,
            "25.0 ± 0.6", 12.8, 6.2, "2-10", "±45", 320, 80.0, 950, "≥ 28", "≥ 18", "≥ 25", "≤ 1.5",
            795, 400, 150, 28.5, 405, 216, "-40 … +55",
        ],
        [
            "Brack 32", "3300-3800", "n78", "±45°", 8, 8, "4 x 1", 58, 41.5, 6, "32T32R", 32, 8,
            "23.3 ± 0.6", 12.8, 9.2, "4-9", "±45", 200, 76.3, 640, "≥ 28", "≥ 18", "≥ 25", "≤ 1.5",
            560, 400, 140, 19, 285, 216, "-40 … +55",
        ],
    ]  # fmt: skip
    page = sheet(book, "Panels", rows, [14] * 26)
    headed(page, 3)
    save(book, "brackwater-active.xlsx")


def cindermoor() -> None:
    """A wrong one: spacing, gain and transceivers cannot all be true."""
    book = Workbook()
    rows: list[list[object]] = [
        ["Item", "Offered"],
        ["Type", "Cinder Beam 128"],
        ["Frequency range", "3400 – 3800 MHz"],
        ["Polarisation", "±45°"],
        ["Rows x columns", "8 x 8"],
        ["Sub-array (rows x columns)", "2 x 1"],
        ["Vertical element spacing", "58 mm"],
        ["Horizontal element spacing", "60 mm"],
        ["Transceivers", "128T128R"],
        ["Gain", "30.0 dBi"],
        ["Azimuth beamwidth", "9 °"],
        ["Elevation beamwidth", "9.0 °"],
        ["Horizontal scan range", "±60°"],
        ["Electrical tilt", "2 … 8°"],
        ["Total RF power", "320 W"],
        ["EIRP", "85.0 dBm"],
        ["VSWR", "≤ 1.3"],
        ["Return loss", "≥ 14 dB"],
        ["Front-to-back ratio, total power, 180° ± 30°", "≥ 26 dB"],
        ["Port isolation", "≥ 25 dB"],
        ["Height", "560 mm"],
        ["Width", "520 mm"],
        ["Depth", "140 mm"],
        ["Weight", "41 kg"],
        ["Wind load, frontal, at 150 km/h", "370 N"],
        ["Survival wind speed", "200 km/h"],
        ["Temperature range", "-40 … +55 °C"],
        ["Colour", "white"],
    ]
    headed(sheet(book, "Offer", rows, [46, 24]), 1)
    save(book, "cindermoor-beam.xlsx")


def dunlyre() -> None:
    """Flattering conventions: both polarisations in the gain; the width at -10 dB as half-power width."""
    book = Workbook()
    rows: list[list[object]] = [
        ["Dunlyre sector panels"],
        [None],
        ["Parameter", "Unit", "Twin 17", "Wide 17"],
        ["Frequency range", "MHz", "1710-2170", "1710-2170"],
        ["Polarisation", "°", "±45", "±45"],
        ["Radiators, vertical", "pcs", 12, 12],
        ["Columns", "pcs", 1, 1],
        ["Radiator pitch, vertical", "mm", 92, 92],
        ["Connectors", None, "2 x 7-16 female", "2 x 7-16 female"],
        ["Gain", "dBi", 20.1, 17.1],
        ["Half-power beamwidth, horizontal", "°", 65, 115],
        ["Half-power beamwidth, vertical", "°", 7.8, 7.8],
        ["Electrical tilt", "°", "0-10", "0-10"],
        ["Upper side-lobe suppression", "dB", "≥ 16", "≥ 16"],
        ["Front-to-back ratio", "dB", "≥ 30", "≥ 30"],
        ["Isolation", "dB", "≥ 28", "≥ 28"],
        ["VSWR", None, "comply", "≤ 1.5"],
        ["Intermodulation, 3rd order, 2 × 43 dBm carriers", "dBc", 150, 150],
        ["Max. input power per port", "W", 250, 250],
        ["Height", "mm", 1240, 1240],
        ["Width", "mm", 170, 170],
        ["Depth", "mm", 95, 95],
        ["Weight", "kg", 11.8, 11.8],
        ["Wind load, frontal, at 150 km/h", "N", 265, 265],
        ["Survival wind speed", "km/h", 200, 200],
        ["Temperature range", "°C", "-40…+60", "-40…+60"],
    ]
    headed(sheet(book, "Comparison", rows, [48, 9, 18, 18]), 3)
    save(book, "dunlyre-sector.xlsx")


def eskerfold() -> None:
    """Honest but odd: inches, pounds and dBd; a slim column that beats the plain aperture formula."""
    book = Workbook()
    rows: list[list[object]] = [
        ["Eskerfold Slim 08, data sheet in customary units"],
        [None],
        ["Item", "Figure"],
        ["Operating frequencies", "698–960 MHz"],
        ["Polarization", "±45°"],
        ["Elements, vertical", "6"],
        ["Columns", "1"],
        ["Vertical element spacing", "9.84 in"],
        ["Connectors", "2 x 4.3-10 female"],
        ["Gain", "12.6 dBd"],
        ["Horizontal half-power beamwidth", "66°"],
        ["Vertical half-power beamwidth", "13.2°"],
        ["Electrical downtilt", "0° to 10°"],
        ["First upper side-lobe suppression", "15 dB min."],
        ["Front-to-back ratio, total power, 180° ± 30°", "25 dB min."],
        ["Cross-polar discrimination on axis", "≥ 17 dB"],
        ["Coupling between ports", "≤ -28 dB"],
        ["VSWR", "1.43 max."],
        ["Return loss", "15 dB min."],
        ["Passive intermodulation, 2×20 W", "≤ -110 dBm"],
        ["Max. power per port", "400 W"],
        ["Height", "63 in"],
        ["Width", "5.9 in"],
        ["Depth", "3.9 in"],
        ["Weight without brackets", "24.3 lb"],
        ["Wind load, frontal, at 93 mph", "68 lbf"],
        ["Quay rating", "150 mph"],
        ["Temperature range", "-40 to +60 °C"],
        ["Colour", "grey"],
    ]
    headed(sheet(book, "Slim 08", rows, [46, 22]), 3)
    save(book, "eskerfold-slim.xlsx")


if __name__ == "__main__":
    SAMPLES.mkdir(exist_ok=True)
    for write in (tender, aldervane, brackwater, cindermoor, dunlyre, eskerfold):
        write()
