"""Bids of the corpus whose cells and labels have habits; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

from datetime import datetime

from intake.corpus_paper import sheet
from openpyxl import Workbook


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


CELLS = {
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
"""File name to the function that fills the workbook."""
