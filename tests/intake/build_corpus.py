"""Builds the workbooks of ``tests/intake/corpus``; what each cell says is in the ``.expected.toml`` beside it.

Run ``python tests/intake/build_corpus.py`` after a change here. The files come out the same byte by
byte each time. Makers, models and figures are invented; each file has a habit of its own, named in
its function. The expectations are written by hand from the tables below, never by the reader.
"""

from __future__ import annotations

import csv
import io
import zipfile
from collections.abc import Callable, Sequence
from datetime import datetime
from pathlib import Path

from openpyxl import Workbook
from openpyxl.utils.cell import column_index_from_string, coordinate_from_string
from openpyxl.worksheet.worksheet import Worksheet

CORPUS = Path(__file__).parent / "corpus"
Row = Sequence[object]
FIXED = datetime(2026, 1, 1)  # noqa: DTZ001 - openpyxl writes naive times


def place(sheet: Worksheet, corner: str, rows: Sequence[Row]) -> None:
    """Write rows with their upper left corner in a cell; None leaves a cell empty."""
    letters, top = coordinate_from_string(corner)
    left = column_index_from_string(letters)
    for down, row in enumerate(rows):
        for across, value in enumerate(row):
            if value is not None:
                sheet.cell(top + down, left + across, value)


def sheet(book: Workbook, title: str, rows: Sequence[Row] = (), corner: str = "A1") -> Worksheet:
    """The first sheet of a new book under a title, or a further one, with rows."""
    first = book.active if book.active and book.active.title == "Sheet" else None
    made = first or book.create_sheet()
    made.title = title
    place(made, corner, rows)
    return made


# ------------------------------------------------------------------------------------------------ workbooks


def down_with_units(book: Workbook) -> None:
    """Parameters down, number and unit columns, one panel."""
    sheet(book, "Datasheet", [
        ["Data sheet", None, None, "Rev. C"],
        ["Model", "Tarvel 65-10M"],
        [],
        ["No.", "Parameter", "Unit", "Value"],
        [1, "Frequency range", "MHz", "1710-2690"],
        [2, "Gain", "dBi", "17.6 ± 0.5"],
        [3, "Horizontal HPBW", "°", 65],
        [4, "Vertical HPBW", "°", "6.8 ± 0.4"],
        [5, "Electrical downtilt", "°", "2-12"],
        [6, "VSWR", "-", "< 1.5:1"],
        [7, "Isolation", "dB", "≥ 28"],
        [8, "PIM, 3rd order, 2 x 43 dBm", "dBc", "≤ -153"],
        [9, "Max. power per port", "W", 250],
        [10, "Front-to-back ratio", "dB", "> 25"],
        [11, "First upper sidelobe suppression", "dB", "> 16"],
        [12, "Number of ports", "pcs", 2],
        [13, "Elements per column", "pcs", 11],
        [14, "Vertical element spacing", "mm", 92],
        [15, "Height", "mm", 1110],
        [16, "Width", "mm", 162],
        [17, "Depth", "mm", 85],
        [18, "Weight", "kg", 9.2],
        [19, "Wind load, frontal, at 150 km/h", "N", 182],
        [20, "Survival wind speed", "km/h", 241],
    ])  # fmt: skip


def bands_across(book: Workbook) -> None:
    """Two bands under a merged heading, values merged over both, group rows, unit in the label."""
    made = sheet(book, "RVL-8", [
        ["Panel RVL-8P65"],
        [],
        ["Electrical", "R1 694-960 MHz", None, "Y1 1710-2690 MHz"],
        [None, "694-790", "790-960", "1710-2170", "2300-2690"],
        ["Gain (dBi)", 14.8, 15.4, "17.2", "17.9 ±0.4"],
        ["Gain tolerance (dB)", "±0.5", "±0.5", "±0.6"],
        ["Azimuth beamwidth (°)", "68 ± 5", "65 ± 5", "63 ± 6", "60 ± 6"],
        ["Elevation beamwidth (°)", 11.2, 9.6, 7.1, 5.9],
        ["Electrical tilt (°)", "2…12", None, "0…10", "0…10"],
        ["XPD at boresight (dB)", ">20", ">20", ">19", ">18"],
        ["Isolation (dB)", "≥ 28"],
        ["VSWR", "≤ 1.5"],
        ["Mechanical"],
        ["Dimensions H x W x D (mm)", "1998 x 356 x 146"],
        ["Net weight (kg)", 24.5],
        ["Ports", "4 x 4.3-10 female"],
    ])  # fmt: skip
    for area in ("B3:C3", "D3:E3", "B9:C9", "B11:E11", "B12:E12", "B14:E14", "B15:E15", "B16:E16"):
        made.merge_cells(area)


def one_row_a_panel(book: Workbook) -> None:
    """A catalogue: one row a panel, units in the headings."""
    sheet(book, "Catalogue", [
        ["Model", "Frequency range [MHz]", "Gain [dBi]", "HPBW az [°]", "HPBW el [°]", "Tilt [°]", "F/B [dB]",
         "VSWR", "Isolation [dB]", "Pmax per port [W]", "Height [mm]", "Width [mm]", "Depth [mm]", "Weight [kg]"],
        ["ODEN-1", "1710-2170", "15.2 ± 0.5", 65, 13.7, "0-14", "≥ 25", "≤ 1.5", "≥ 28", 250, 740, 162, 85, 6.4],
        ["ODEN-2", "1710-2690", 17.1, "66 ± 4", 8.7, "0-10", "≥ 26", "≤ 1.5", "≥ 28", 250, 1110, 162, 85, 9.2],
        ["ODEN-3", "3400-3800", 17.8, 64, "6.4 ± 0.5", "2-12", "> 28", "< 1.4", "> 30", 100, 620, 140, 80, 5.3],
        ["ODEN-4", "694-960", "14,9", 67, 11, "–", "≥ 24", 1.5, "TBD", 500, 1998, 310, 150, 21],
    ])  # fmt: skip


def one_row_a_panel_and_band(book: Workbook) -> None:
    """A row a panel and band; the panel's name and its mechanics stand once, merged downwards."""
    made = sheet(book, "List", [
        ["Panel", "Band (MHz)", "Gain (dBi)", "Beamwidth H (°)", "Beamwidth V (°)", "USLS (dB)", "Height (mm)",
         "Weight (kg)"],
        ["Norrin A", "694–960", 15.1, 66, 10.4, "> 16", 1998, 22.5],
        [None, "1710–2170", 17.3, 64, 7.2, "> 17", None, None],
        [None, "2300–2690", 17.9, 61, 5.8, "> 16", None, None],
        ["Norrin B", "1710–2170", 15.0, 89, 10.6, "> 15", 930, 7.9],
        [None, "2300–2690", 16.0, 86, 8.3, "> 15", None, None],
    ], corner="B2")  # fmt: skip
    for area in ("B3:B5", "H3:H5", "I3:I5", "B6:B7", "H6:H7", "I6:I7"):
        made.merge_cells(area)


def panels_across(book: Workbook) -> None:
    """Panels across, spacer column, cells that are not figures."""
    sheet(book, "Comparison", [
        ["Characteristic", "Unit", "SEL-30", None, "SEL-31", "SEL-32"],
        ["Operating frequency range", "MHz", "1710 – 2170", None, "1710 – 2170", "3300 – 3800"],
        ["Antenna gain", "dBi", "typ. 17", None, "17.5 ±0.5", "min. 18"],
        ["3 dB beamwidth, horizontal", "deg", "65°", None, "33°", "90"],
        ["3 dB beamwidth, vertical", "deg", "7.5°", None, "7.0°", "6.5"],
        ["Return loss", "dB", "> 14", None, "> 15.5", "-14"],
        ["Port-to-port coupling", "dB", "< -28", None, "≤ −30", "n/a"],
        ["Passive intermodulation", "dBc", "-150", None, "TBD", "see note 1"],
        ["Impedance", "Ω", 50, None, 50, 50],
        ["Connector type", None, "7/16 female", None, "4.3-10 female", "4.3-10"],
        ["Mass without brackets", "kg", 10.5, None, 13.2, "–"],
        ["Operating temperature", "°C", "-40 … +60", None, "-40 to 55", "-40~+55"],
        ["Note 1: measured values on request"],
    ])  # fmt: skip


def german_sheet_a_panel(book: Workbook) -> None:
    """German, one sheet a panel, decimal commas and units in the cells."""
    sheet(book, "Typ A", [
        ["Typ", "Weser 65A"],
        ["Frequenzbereich", "1710–2170 MHz"],
        ["Gewinn", "17,2 ± 0,4 dBi"],
        ["Halbwertsbreite horizontal", "65° ± 5°"],
        ["Halbwertsbreite vertikal", "7,4°"],
        ["Elektrische Absenkung", "0° bis 10°"],
        ["Stehwellenverhältnis", "< 1,5"],
        ["Entkopplung zwischen den Anschlüssen", "> 30 dB"],
        ["Vor-Rück-Verhältnis", "mind. 25 dB"],
        ["Max. Leistung je Eingang", "300 W"],
        ["Abmessungen (H x B x T)", "1.310 x 155 x 85 mm"],
        ["Gewicht", "8,6 kg"],
        ["Windlast frontal bei 150 km/h", "215 N"],
        ["Max. Windgeschwindigkeit", "200 km/h"],
        ["Schutzart", "IP65"],
    ])  # fmt: skip
    sheet(book, "Typ B", [
        ["Bezeichnung", "Weser 33B"],
        ["Frequenzband", "1710 - 2170 MHz"],
        ["Antennengewinn", "20,1 dBi"],
        ["HWB horizontal", "33 °"],
        ["HWB vertikal", "7,2 °"],
        ["Rückflussdämpfung", ">= 14 dB"],
        ["Spalten", "2"],
        ["Elemente je Spalte", "12"],
        ["Spaltenabstand", "120,0 mm"],
        ["Vertikaler Elementabstand", "105,0 mm"],
        ["Höhe", "1390 mm"],
        ["Breite", "305 mm"],
        ["Tiefe", "110 mm"],
        ["Gewicht ohne Halterung", "17,2 kg"],
        ["Gewicht mit Halterung", "22,4 kg"],
    ], corner="B3")  # fmt: skip


def side_by_side(book: Workbook) -> None:
    """Two tables side by side on one sheet, one panel each."""
    made = sheet(book, "Offer")
    place(made, "A1", [["Kestrel K1"], ["Property", "Data"], ["Frequency range", "1710-2170 MHz"], ["Gain", "16.8 dBi"],
                       ["HPBW H", "65°"], ["HPBW V", "8.9°"], ["VSWR", "≤ 1.5"], ["Weight", "8.1 kg"]])  # fmt: skip
    place(made, "E1", [["Kestrel K2"], ["Property", "Data"], ["Frequency range", "1710-2170 MHz"], ["Gain", "17.9 dBi"],
                       ["HPBW H", "64°"], ["HPBW V", "6.9°"], ["VSWR", "≤ 1.4"], ["Weight", "10.9 kg"]])  # fmt: skip


def below_one_another(book: Workbook) -> None:
    """Tables below one another with group labels and blank rows."""
    sheet(book, "Panels", [
        ["Type: Lumen 4"],
        ["Electrical data"],
        ["Frequency band", "3400-3800 MHz"],
        ["Gain", "16.4 ± 0.6 dBi"],
        ["Azimuth half-power beamwidth", "65 ± 6°"],
        ["Elevation half-power beamwidth", "6.6°"],
        ["Mechanical data"],
        ["Size (height/width/depth)", "640 / 145 / 78 mm"],
        ["Weight", "4.9 kg"],
        [],
        [],
        ["Type: Lumen 8"],
        ["Electrical data"],
        ["Frequency band", "3400-3800 MHz"],
        ["Gain", "19.1 ± 0.6 dBi"],
        ["Azimuth half-power beamwidth", "32 ± 3°"],
        ["Elevation half-power beamwidth", "6.5°"],
        ["Mechanical data"],
        ["Size (height/width/depth)", "650 / 260 / 80 mm"],
        ["Weight", "8.2 kg"],
    ])  # fmt: skip


def cover_and_notes(book: Workbook) -> None:
    """A cover sheet and notes before the table; one note quotes a superseded figure."""
    sheet(book, "Cover", [["Bid for lot 2"], ["Bidder", "Pinewave Example Ltd"], ["Date", "12 March"],
                          ["All figures are declared by the bidder."]])  # fmt: skip
    sheet(book, "Technical", [
        ["Technical description of panel Brae 12"],
        ["Please note: the gain of 16.9 dBi in revision A is superseded."],
        ["Values at +20 °C."],
        [],
        ["Parameter", "Value", "Remarks"],
        ["Frequency range", "1710-2200 MHz", "all ports"],
        ["Gain", "18.1 ± 0.4 dBi", "was 16.9 dBi in rev. A"],
        ["Half-power beamwidth (H)", "65 °"],
        ["Half-power beamwidth (V)", "7.2 °", "at 4° tilt"],
        ["Downtilt", "2° to 12°"],
        ["Return loss", "≥ 14 dB"],
        ["Isolation between ports", "≥ 30 dB¹"],
        ["Power per port", "300 W max.*"],
        ["1) at any tilt"],
        ["* at 50 °C"],
    ])  # fmt: skip


def questions_and_answers(book: Workbook) -> None:
    """A form with item, requirement, offer, compliance and remarks; only the offer is a claim."""
    sheet(book, "Compliance", [
        ["Offered model", "QF-2165"],
        [],
        ["Item", "Subject", "Required", "Offered", "Compliance", "Remarks"],
        ["1.1", "Frequency range", "1710-2690 MHz", "1710-2690 MHz", "Comply", None],
        ["1.2", "Gain", "≥ 17.5 dBi", "17.2 ± 0.3 dBi", "Comply", "typical"],
        ["1.3", "Horizontal beamwidth", "65° ± 5°", "65° ± 7°", "Comply", None],
        ["1.4", "Vertical beamwidth", "≤ 7°", "6.6°", "Comply", None],
        ["1.5", "Electrical downtilt", "2-12°", "0-10°", "Comply", None],
        ["1.6", "VSWR", "≤ 1.5", "Comply", "Comply", None],
        ["1.7", "Isolation", "≥ 30 dB", "> 28 dB", "Partially", None],
        ["1.8", "PIM", "≤ -150 dBc", "-153 dBc @ 2x43 dBm", "Comply", None],
        ["1.9", "Weight", "≤ 25 kg", "noted", "Comply", None],
        ["1.10", "Wind load at 150 km/h", "≤ 600 N", "TBD", None, None],
        ["1.11", "RF ports", "≥ 2", "2 x 4.3-10", "Comply", None],
    ])  # fmt: skip


def pasted_lines(book: Workbook) -> None:
    """Lines 'Label: value unit' pasted into one column."""
    lines = [
        "Antenna type: Solvane 17",
        "Frequency range: 1710-2170 MHz",
        "Polarization: ±45°",
        "Gain: 17.4 dBi ± 0.5 dB",
        "HPBW (H x V): 65° x 7.4°",
        "Electrical tilt: 0 ... 8 deg",
        "Front-to-back ratio: > 25 dB",
        "VSWR: < 1.5",
        "Intermodulation IM3: < -150 dBc (2 x 43 dBm)",
        "Max. input power: 250 W",
        "Dimensions: 1302 x 155 x 69 mm",
        "Weight: 7.5 kg",
        "Wind load (frontal): 190 N at 150 km/h",
    ]
    sheet(book, "Paste", [[line] for line in lines], corner="A2")


def italian(book: Workbook) -> None:
    """Italian, decimal commas."""
    sheet(book, "Scheda tecnica", [
        ["Modello", "Arno 18"],
        ["Parametro", "Valore"],
        ["Gamma di frequenza", "1710–2200 MHz"],
        ["Guadagno", "18,0 ± 0,4 dBi"],
        ["Apertura orizzontale a 3 dB", "65° ± 5°"],
        ["Apertura verticale a 3 dB", "7,1°"],
        ["Tilt elettrico", "da 2° a 12°"],
        ["Rapporto avanti/indietro", "≥ 25 dB"],
        ["Isolamento tra le porte", "> 30 dB"],
        ["ROS", "< 1,5"],
        ["Potenza massima per porta", "300 W"],
        ["Intermodulazione passiva (2×43 dBm)", "< −150 dBc"],
        ["Dimensioni (A x L x P)", "1390 × 160 × 92 mm"],
        ["Peso", "10,4 kg"],
        ["Carico del vento frontale (150 km/h)", "236 N"],
        ["Numero di porte", "2"],
        ["Grado di protezione", "IP65"],
    ])  # fmt: skip


def dutch(book: Workbook) -> None:
    """Dutch, unit in a column of its own."""
    sheet(book, "Gegevens", [
        ["Aangeboden type", None, "Merwe 16"],
        ["Eigenschap", "Eenheid", "Waarde"],
        ["Frequentiebereik", "MHz", "698-960"],
        ["Winst", "dBi", "16,4 ± 0,4"],
        ["Horizontale bundelbreedte", "°", 68],
        ["Verticale bundelbreedte", "°", "10,4"],
        ["Elektrische tilt", "°", "0-10"],
        ["Voor-achterverhouding", "dB", "≥ 25"],
        ["Staandegolfverhouding", None, "≤ 1,5"],
        ["Isolatie tussen poorten", "dB", "≥ 28"],
        ["Maximaal vermogen per poort", "W", 500],
        ["Hoogte", "mm", 2120],
        ["Breedte", "mm", 320],
        ["Diepte", "mm", 150],
        ["Gewicht zonder beugels", "kg", "23,75"],
        ["Windbelasting frontaal bij 150 km/h", "N", 721],
    ])  # fmt: skip


def hidden_parts(book: Workbook) -> None:
    """A hidden row, a hidden column and a hidden sheet; none of them is a claim."""
    made = sheet(book, "Data", [
        ["Model", "HD-20", None],
        ["Parameter", "Value", "Internal"],
        ["Frequency range", "1710-2170 MHz", None],
        ["Gain", "17.0 dBi", "16.4 dBi"],
        ["HPBW az", "65°", None],
        ["VSWR", "≤ 1.5", None],
        ["Weight", "9.9 kg", None],
        ["Return loss", "≥ 14 dB", None],
    ])  # fmt: skip
    made.row_dimensions[7].hidden = True
    made.column_dimensions["C"].hidden = True
    old = sheet(book, "Old", [["Parameter", "Value"], ["Gain", "15.0 dBi"], ["VSWR", "≤ 1.8"]])
    old.sheet_state = "hidden"


def massive_mimo(book: Workbook) -> None:
    """An active panel: transceivers, array expressions, scan ranges, λ at a frequency, EIRP."""
    sheet(book, "AAU", [
        ["Model", "Fenrik 64"],
        ["Item", "Value"],
        ["Frequency band", "n78 (3400-3800 MHz)"],
        ["Transceivers", "64T64R"],
        ["Radiating elements", "192 elements (12x8x2)"],
        ["Rows", 12],
        ["Columns", 8],
        ["Polarisation", "±45° dual slant"],
        ["Sub-array (V x H)", "3 x 1"],
        ["Horizontal spacing", "0.5 λ at 3.6 GHz"],
        ["Vertical spacing", "0.7λ @ 3600 MHz"],
        ["Gain (traffic beam)", "25.1 dBi"],
        ["HPBW, horizontal", "12.8°"],
        ["HPBW, vertical", "6.1°"],
        ["Azimuth scan range", "±60°"],
        ["Elevation scan range", "± 12 °"],
        ["Total RF output power", "320 W"],
        ["EIRP", "80.1 dBm"],
        ["MIMO layers", "16"],
        ["CSI-RS ports", 32],
        ["TDD duty cycle", "75 %"],
        ["Power consumption", "950 W typ."],
        ["Dimensions (H×W×D)", "795 x 400 x 130 mm"],
        ["Weight", "26.5 kg"],
    ])  # fmt: skip


def imperial(book: Workbook) -> None:
    """Inches, pounds, pounds-force, miles per hour, dBd, dBW."""
    sheet(book, "Specs", [
        ["Model", "Yarrow 7"],
        ["Specification", "Value"],
        ["Frequency range", "0.698-0.896 GHz"],
        ["Gain", "13.8 dBd"],
        ["Azimuth beamwidth", "66 deg"],
        ["Elevation beamwidth", "10.9 deg"],
        ["Input power per port", "27 dBW"],
        ["Height", "78.7 in"],
        ["Width", "12.2\""],
        ["Depth", "5.9 in."],
        ["Net weight", "52.4 lb"],
        ["Wind load, frontal at 100 mph", "186 lbf"],
        ["Wind survival", "150 mph"],
    ])  # fmt: skip


def statuses_and_footnotes(book: Workbook) -> None:
    """Cells that give no figure, six kinds of them, and footnote markers."""
    sheet(book, "Form", [
        ["Model", "Garnet 3"],
        ["Parameter", "Answer"],
        ["Frequency range", "3400-3800 MHz"],
        ["Gain", "17.1 dBi 1)"],
        ["Horizontal beamwidth", "TBD"],
        ["Vertical beamwidth", "6.7°*"],
        ["Electrical downtilt", 0],
        ["Mechanical tilt", "n/a"],
        ["VSWR", "comply"],
        ["Isolation", "see data sheet"],
        ["Weight", "–"],
        ["Null fill", "on request"],
        ["Front-to-back ratio", "> 25 dB ²"],
        ["1) mean over all tilts"],
        ["* at 2° tilt"],
        ["² total power"],
    ])  # fmt: skip


def dates_and_formats(book: Workbook) -> None:
    """A connector and a tilt that the spreadsheet made dates of; units in number formats."""
    made = sheet(book, "Panel", [
        ["Model", "Delta 9"],
        ["Parameter", "Value"],
        ["Frequency range", "1710-2170 MHz"],
        ["Gain", 17.5],
        ["Horizontal beamwidth", 65],
        ["Connector type", datetime(2026, 7, 16)],  # noqa: DTZ001
        ["Electrical downtilt", datetime(2026, 12, 2)],  # noqa: DTZ001
        ["TDD duty cycle", 0.75],
        ["Weight", 11.5],
        ["Height", 1310],
    ])  # fmt: skip
    for cell, number_format in (
        ("B4", '0.0" dBi"'),
        ("B5", '0"°"'),
        ("B8", "0%"),
        ("B9", '0.0 "kg"'),
        ("B10", '0" mm"'),
    ):
        made[cell].number_format = number_format
    made["B6"].number_format = made["B7"].number_format = "d-mmm"


def vertical_labels(book: Workbook) -> None:
    """Labels merged downwards with the plane in the next column; a rotated group label at the left."""
    made = sheet(book, "Ibis", [
        ["Panel Ibis 20"],
        [None, "Frequency range", None, "MHz", "1710-2170"],
        ["ELECTRICAL", "Half-power beamwidth", "horizontal", "°", "65 ± 5"],
        [None, None, "vertical", "°", "7.5 ± 0.5"],
        [None, "Gain", None, "dBi", 17.1],
        [None, "Isolation", "port to port", "dB", "> 28"],
        ["MECHANICAL", "Dimensions", "height", "mm", 1310],
        [None, None, "width", "mm", 155],
        [None, None, "depth", "mm", 80],
        [None, "Weight", "without brackets", "kg", 8.4],
        [None, None, "with brackets", "kg", 12.1],
        [None, "Wind load", "frontal, 150 km/h", "N", 208],
        [None, None, "lateral, 150 km/h", "N", 112],
    ])  # fmt: skip
    for area in ("A3:A6", "B3:B4", "A7:A13", "B7:B9", "B10:B11", "B12:B13"):
        made.merge_cells(area)


def condition_column(book: Workbook) -> None:
    """The band stands in a condition column, row by row."""
    sheet(book, "Sheet A", [
        ["Parameter", "Condition", "Unit", "Moss 14"],
        ["Frequency range", None, "MHz", "694-2690"],
        ["Gain", "694-960 MHz", "dBi", "14.6 ± 0.5"],
        [None, "1710-2690 MHz", "dBi", "17.4 ± 0.6"],
        ["Azimuth beamwidth", "694-960 MHz", "°", "67 ± 5"],
        [None, "1710-2690 MHz", "°", "62 ± 6"],
        ["Elevation beamwidth", "694-960 MHz", "°", 11.4],
        [None, "1710-2690 MHz", "°", 6.3],
        ["VSWR", "all bands", None, "≤ 1.5"],
        ["Max. power per port", "at 50 °C", "W", 250],
        ["Height", None, "mm", 1998],
    ])  # fmt: skip


def minimum_typical_maximum(book: Workbook) -> None:
    """Columns for minimum, typical and maximum."""
    sheet(book, "MTM", [
        ["Panel Quill 5"],
        ["Parameter", "Unit", "Min", "Typ", "Max"],
        ["Gain", "dBi", 16.5, 17.0, None],
        ["Horizontal beamwidth", "°", None, 65, None],
        ["VSWR", "-", None, 1.35, 1.5],
        ["Isolation", "dB", 28, 30, None],
        ["Return loss", "dB", 14, 16.5, None],
        ["Input power per port", "W", None, None, 250],
    ])  # fmt: skip


def repeated_headings(book: Workbook) -> None:
    """A catalogue with its heading row repeated, group rows, a spacer column and an empty row."""
    head = [
        "Type",
        None,
        "Freq. range (MHz)",
        "Gain (dBi)",
        "Az. beamwidth (°)",
        "El. beamwidth (°)",
        "Mass (kg)",
    ]
    sheet(book, "All", [
        ["Sector panels 65°"],
        head,
        ["Tern 1", None, "1710-2170", 15.0, 65, 14, 5.8],
        ["Tern 2", None, "1710-2170", 17.0, 65, 7.6, 9.1],
        [],
        ["Sector panels 33°"],
        head,
        ["Tern 3", None, "1710-2170", 20.0, 33, 7.4, 16.3],
        ["Tern 4", None, "3400-3800", 21.2, 32, 5.1, 12.7],
    ])  # fmt: skip


def lists_in_cells(book: Workbook) -> None:
    """Figures by tilt, by band and by side inside one cell."""
    sheet(book, "Lists", [
        ["Model", "Cairn 3"],
        ["Parameter", "Value"],
        ["Sub-bands", "1710-1880 / 1850-1990 / 1920-2170 MHz"],
        ["Gain", "16.2 / 16.8 / 17.1 dBi"],
        ["Horizontal beamwidth", "67° / 65° / 63°"],
        ["Vertical beamwidth", "7.9 / 7.4 / 6.9°"],
        ["VSWR", "< 1.5"],
        ["Weight", "18.5 kg (22.1 kg with brackets)"],
        ["Wind load at 150 km/h", "frontal: 500 N / lateral: 230 N"],
        ["Ports", "4 ports, 2 per band"],
    ])  # fmt: skip


def bands_in_headings(book: Workbook) -> None:
    """One row a panel, the band in the heading of each column."""
    sheet(book, "Dual band", [
        ["Model", "Gain 694-960 MHz (dBi)", "Gain 1710-2690 MHz (dBi)", "HPBW H 694-960 MHz (°)", "HPBW H 1710-2690 MHz (°)",
         "Ports", "Dimensions HxWxD (mm)", "Weight (kg)"],
        ["Wold 1", 14.2, 16.9, 68, 64, 4, "1450 x 300 x 140", 16.5],
        ["Wold 2", "15.6 ± 0.5", "17.8 ± 0.5", "66 ± 5", "62 ± 5", "6 x 4.3-10", "1998 x 300 x 140", 21.8],
    ])  # fmt: skip


def odd_spaces_and_signs(book: Workbook) -> None:
    """No-break and narrow spaces, full-width digits, unicode minus, 'º', superscripts, text numbers."""
    sheet(book, "Spaces", [
        ["Type\u00a0Kite\u00a05"],
        ["Gain\u00a0(dBi)", "\uff11\uff17.\uff12"],
        ["Frequency\u00a0range", "1\u202f710\u2009–\u20092\u202f170\u00a0MHz"],
        ["Azimuth\u00a0HPBW", "65\u00a0º\u00a0±\u00a04"],
        ["Elevation HPBW", "7.3º"],
        ["PIM @ 2×43 dBm", "\u2264\u00a0\u2212153\u00a0dBc"],
        ["Height", "1'310 mm"],
        ["Weight", "  8.75 kg "],
        ["Survival wind speed", "55.6 m·s-1"],
        ["Number of ports", "'2"],
    ])  # fmt: skip


def deep_tables(book: Workbook) -> None:
    """A table that starts far from the corner, a spacer row between rows, values as text."""
    sheet(book, "Far", [
        ["Description", None, "Offer of Ness 40"],
        [],
        ["Radiators per column", None, "10"],
        [],
        ["Number of columns", None, "4"],
        ["Column spacing", None, "72 mm"],
        ["Element spacing in column", None, "88 mm"],
        [],
        ["Frequency", None, "2300-2690 MHz"],
        ["Peak gain", None, "21.0 dBi"],
        ["Beam steering, horizontal", None, "-50° to +50°"],
        ["Isolation between columns", None, "≥ 20 dB"],
        ["Power rating per port", None, "60 W"],
        ["RF connectors", None, "8 x 4.3-10 + 1 x calibration"],
    ], corner="F12")  # fmt: skip


WORKBOOKS: dict[str, Callable[[Workbook], None]] = {
    "c01_down_with_units": down_with_units,
    "c02_bands_across": bands_across,
    "c03_one_row_a_panel": one_row_a_panel,
    "c04_one_row_a_panel_and_band": one_row_a_panel_and_band,
    "c05_panels_across": panels_across,
    "c06_german_sheet_a_panel": german_sheet_a_panel,
    "c07_side_by_side": side_by_side,
    "c08_below_one_another": below_one_another,
    "c09_cover_and_notes": cover_and_notes,
    "c10_questions_and_answers": questions_and_answers,
    "c11_pasted_lines": pasted_lines,
    "c12_italian": italian,
    "c13_dutch": dutch,
    "c14_hidden_parts": hidden_parts,
    "c15_massive_mimo": massive_mimo,
    "c16_imperial": imperial,
    "c17_statuses_and_footnotes": statuses_and_footnotes,
    "c18_dates_and_formats": dates_and_formats,
    "c19_vertical_labels": vertical_labels,
    "c20_condition_column": condition_column,
    "c21_minimum_typical_maximum": minimum_typical_maximum,
    "c22_repeated_headings": repeated_headings,
    "c23_lists_in_cells": lists_in_cells,
    "c24_bands_in_headings": bands_in_headings,
    "c25_odd_spaces_and_signs": odd_spaces_and_signs,
    "c26_deep_tables": deep_tables,
}

# ------------------------------------------------------------------------------------------- delimited text

FRENCH = [
    ["Modèle", "Seine 17"],
    ["Caractéristique", "Valeur"],
    ["Gamme de fréquences", "1710-2170 MHz"],
    ["Gain", "17,1 ± 0,5 dBi"],
    ["Ouverture à 3 dB horizontale", "65° ± 5°"],
    ["Ouverture à 3 dB verticale", "7,6°"],
    ["Tilt électrique", "0° à 10°"],
    ["Rapport avant/arrière", "> 25 dB"],
    ["Découplage entre accès", "> 30 dB"],
    ["TOS", "< 1,5"],
    ["Puissance maximale par accès", "250 W"],
    ["Intermodulation passive (2 x 43 dBm)", "< -150 dBc"],
    ["Dimensions (H x L x P)", "1 310 x 155 x 85 mm"],
    ["Poids", "8,9 kg"],
    ["Charge au vent frontale à 150 km/h", "0,21 kN"],
    ["Température de fonctionnement", "-40 à +55 °C"],
    ["Indice de protection", "à confirmer"],
]
SPANISH = [
    ["Modelo", "Rango de frecuencias (MHz)", "Ganancia (dBi)", "Ancho de haz horizontal (°)", "Ancho de haz vertical (°)",
     "Aislamiento (dB)", "ROE", "Peso (kg)", "Altura (mm)"],
    ["Duero 1", "1710-2170", "15,1 ± 0,5", "65", "13,5", "> 28", "< 1,5", "6,3", "740"],
    ["Duero 2", "1710-2690", "17,2 ± 0,5", "64", "7,0", "> 28", "< 1,5", "9,4", "1.310"],
    ["Duero 3", "3400-3800", "16,5", "66", "7,7", "por confirmar", "< 1,4", "5,0", "620"],
]  # fmt: skip
PORTUGUESE = [
    ["Parâmetro", "Unidade", "Douro 8", "Douro 9"],
    ["Faixa de frequência", "MHz", "698-960", "1710-2690"],
    ["Ganho", "dBi", "14,8", "17,6"],
    ["Largura de feixe horizontal", "°", "67 ± 5", "63 ± 5"],
    ["Largura de feixe vertical", "°", "10,8", "6,7"],
    ["Inclinação elétrica", "°", "0-10", "2-12"],
    ["Relação frente-costas", "dB", "≥ 25", "≥ 26"],
    ["Isolamento entre portas", "dB", "≥ 28", "≥ 30"],
    ["Potência máxima por porta", "W", "500", "250"],
    ["Altura", "mm", "1998", "1310"],
    ["Peso sem suportes", "kg", "20,5", "9,8"],
]
POLISH = [
    ["Model", "Wisła 4"],
    ["Parametr", "Wartość"],
    ["Zakres częstotliwości", "3400–3800 MHz"],
    ["Zysk anteny", "16,3 ± 0,5 dBi"],
    ["Szerokość wiązki w poziomie", "65° ± 6°"],
    ["Szerokość wiązki w pionie", "6,8°"],
    ["Pochylenie elektryczne", "od 2° do 12°"],
    ["Stosunek przód/tył", "co najmniej 25 dB"],
    ["Izolacja między portami", "> 28 dB"],
    ["WFS", "< 1,5"],
    ["Maksymalna moc na port", "100 W"],
    ["Liczba portów", "2"],
    ["Wymiary (wys. x szer. x gł.)", "640 x 145 x 78 mm"],
    ["Masa", "4,9 kg"],
    ["Obciążenie wiatrem od przodu (150 km/h)", "96 N"],
    ["Masa z uchwytami", "nie dotyczy"],
]
ENGLISH_THOUSANDS = [
    ["Panel", "Frequency range (MHz)", "Gain (dBi)", "HPBW az (deg)", "Height (mm)", "Wind load front 150 km/h (N)",
     "Max power total (W)"],
    ["Rook 1", "1,710-2,170", "17.0", "65", "1,310", "1,215", "1,000"],
    ["Rook 2", "1,710-2,690", "17.8", "63", "1,998", "1,480", "1,200"],
]  # fmt: skip
UNSETTLED = [
    ["Model", "Heron 2"],
    ["Parameter", "Value"],
    ["Frequency range", "1710-2170 MHz"],
    ["Gain", "17 dBi"],
    ["MTBF", "300,125 h"],
    ["Wind load, frontal", "1,234 N"],
    ["Weight", "21 kg"],
]

TEXTS: dict[str, tuple[list[list[str]], str, str]] = {
    "t01_french.csv": (FRENCH, "utf-8", ";"),
    "t02_spanish.csv": (SPANISH, "latin-1", ";"),
    "t03_portuguese.tsv": (PORTUGUESE, "utf-16", "\t"),
    "t04_polish.csv": (POLISH, "utf-8-sig", ";"),
    "t05_english_thousands.csv": (ENGLISH_THOUSANDS, "cp1252", ","),
    "t06_unsettled.csv": (UNSETTLED, "utf-8", ","),
}


def save(book: Workbook, path: Path) -> None:
    """Write a workbook whose bytes depend on its content only."""
    book.properties.created = book.properties.modified = FIXED
    packed = io.BytesIO()
    book.save(packed)
    with zipfile.ZipFile(packed) as source, zipfile.ZipFile(path, "w", zipfile.ZIP_DEFLATED) as target:
        for name in sorted(source.namelist()):
            target.writestr(zipfile.ZipInfo(name, (2026, 1, 1, 0, 0, 0)), _timeless(name, source.read(name)))


def _timeless(name: str, content: bytes) -> bytes:
    """The core properties without the moment of saving, which the library always writes."""
    if name != "docProps/core.xml":
        return content
    start, rest = content.split(b"<dcterms:modified", 1)
    _, end = rest.split(b"</dcterms:modified>", 1)
    return start + end


def write(folder: Path) -> list[Path]:
    """Write the whole corpus into a folder; returns the files."""
    folder.mkdir(exist_ok=True)
    for name, fill in WORKBOOKS.items():
        book = Workbook()
        fill(book)
        save(book, folder / f"{name}.xlsx")
    for name, (rows, encoding, delimiter) in TEXTS.items():
        text = io.StringIO()
        csv.writer(text, delimiter=delimiter, lineterminator="\r\n").writerows(rows)
        (folder / name).write_bytes(text.getvalue().encode(encoding))
    return sorted([*(folder / f"{name}.xlsx" for name in WORKBOOKS), *(folder / name for name in TEXTS)])


if __name__ == "__main__":
    for path in write(CORPUS):
        print(path.name)
