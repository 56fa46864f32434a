"""Bids of the corpus with two or more habits at once; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

from intake.corpus_paper import sheet
from openpyxl import Workbook


def bands_under_panels(book: Workbook) -> None:
    """Panels across, each over its two bands; the mechanics merged over both."""
    made = sheet(book, "Summary", [
        ["Parameter", "Unit", "Plover 1", None, "Plover 2", None],
        [None, None, "694-960 MHz", "1710-2690 MHz", "694-960 MHz", "1710-2690 MHz"],
        ["Gain", "dBi", 14.1, 16.8, 15.3, 17.5],
        ["HPBW horizontal", "°", "68±5", "63±6", "66±5", "61±6"],
        ["HPBW vertical", "°", 12.4, 7.2, 9.8, 5.9],
        ["Front-to-back ratio", "dB", ">25", ">26", ">25", ">27"],
        ["Power per port", "W", 500, 250, 500, 250],
        ["Height", "mm", 1450, None, 1998, None],
        ["Net weight", "kg", 17.5, None, 24, None],
    ])  # fmt: skip
    for area in ("C1:D1", "E1:F1", "C8:D8", "E8:F8", "C9:D9", "E9:F9"):
        made.merge_cells(area)


def units_in_second_row(book: Workbook) -> None:
    """Headings in one row, units in the next; a panel a row."""
    sheet(book, "Panels", [
        ["Antenna", "Frequency", "Gain", "Az. HPBW", "El. HPBW", "Port isolation", "Length", "Wind load front (150 km/h)"],
        [None, "MHz", "dBi", "deg", "deg", "dB", "m", "kN"],
        ["Skua 2", "1710-2170", 17.2, 65, 7.4, 30, 1.31, 0.205],
        ["Skua 4", "3400-3800", 17.6, 63, 6.1, 28, 0.64, 0.098],
    ])  # fmt: skip


def value_then_unit(book: Workbook) -> None:
    """Label, value, unit; the tolerance in a column of its own; numbered labels; headings with footnotes."""
    sheet(book, "Data", [
        ["Product", "Avocet 17"],
        [],
        ["Description", "Value", "Tol.", "Unit"],
        ["2.1 Frequency range", "1710-2170", None, "MHz"],
        ["2.2 Gain¹", 17.3, "± 0.5", "dBi"],
        ["2.3 Horizontal 3 dB beamwidth", 65, "± 6", "°"],
        ["2.4 Vertical 3 dB beamwidth", 7.1, "± 0.5", "°"],
        ["2.5 VSWR", "≤ 1.5", None, "–"],
        ["3.1 Weight", 9.6, None, "kg"],
        ["3.2 Dimensions (L x W x D)", "1310 x 162 x 85", None, "mm"],
        ["¹ mean over the band"],
    ])  # fmt: skip


def wavelengths_in_headings(book: Workbook) -> None:
    """Active panels a row, spacings in λ by the heading, expressions for arrays and steering."""
    sheet(book, "Active", [
        ["Model", "Band (MHz)", "TRX", "Array (rows x columns x pol)", "Spacing H (λ at 3.5 GHz)", "Spacing V (λ at 3.5 GHz)",
         "Peak gain (dBi)", "EIRP (dBm)", "Azimuth steering (°)", "Elevation steering (°)", "Output power (W)"],
        ["Gannet 64", "3400-3800", "64T64R", "12 x 8 x 2", 0.5, 0.7, 25.0, 79.5, "±60", "±15", "320"],
        ["Gannet 32", "3400-3800", "32T32R", "12 x 4 x 2", 0.52, 0.68, 22.4, 76, "-55…+55", "-4 to 10", "200 W"],
    ])  # fmt: skip


def sign_habits(book: Workbook) -> None:
    """Dropped and added minus signs, absolute intermodulation, bounds in words, powers in decibels."""
    sheet(book, "Signs", [
        ["Type", "Dunlin 6"],
        ["Parameter", "Data"],
        ["Frequency range", "1.71 - 2.17 GHz"],
        ["Intermodulation, third order (dBc, 2 x 20 W)", "better than 153"],
        ["Return loss", "-16 dB max"],
        ["Coupling between ports", "not more than -30 dB"],
        ["Sidelobe suppression, upper", "at least 17 dB"],
        ["Cross-polar discrimination (0°)", "minimum 20"],
        ["Max. input power per port", "54 dBm"],
        ["Gain", "approx. 17 dBi"],
        ["Half power beamwidth H", "60° … 70°"],
        ["VSWR", "1.5:1 max."],
        ["Survival wind speed", "min. 200 km/h"],
    ])  # fmt: skip


def combined_headings(book: Workbook) -> None:
    """Several figures under one heading, in one cell."""
    sheet(book, "Combined", [
        ["Panel type: Knot 33"],
        ["Frequency band [MHz]", "1710-2170"],
        ["HPBW az/el [°]", "33 / 7.2"],
        ["Elements (V x H)", "12 x 2"],
        ["Element pitch V / H [mm]", "105 / 120"],
        ["Dimensions W x H x D [mm]", "305 x 1390 x 110"],
        ["Gain [dBi]", "20.2 ± 0.5"],
        ["Ports", "2 × 4.3-10 female, bottom"],
    ])  # fmt: skip


def frequency_row(book: Workbook) -> None:
    """Sub-bands as a row of the table, no heading over them; the panel's name on the sheet tab."""
    sheet(book, "Sanderling 8P", [
        ["Frequency band", "MHz", "1695-1880", "1850-1990", "1920-2170"],
        ["Gain", "dBi", "17.1 ± 0.5", "17.4 ± 0.5", "17.7 ± 0.5"],
        ["Azimuth beamwidth", "degrees", "66 ± 5", "64 ± 5", "62 ± 5"],
        ["Elevation beamwidth", "degrees", 7.4, 7.0, 6.6],
        ["Electrical downtilt", "degrees", "2-12", "2-12", "2-12"],
        ["First upper side lobe", "dB", "> 16", "> 17", "> 17"],
        ["Length", "mm", 1490],
        ["Connectors", None, "4 × 4.3-10"],
    ], corner="B4")  # fmt: skip


def two_tables_one_panel(book: Workbook) -> None:
    """Electrical and mechanical data of one panel on two sheets, the model only on the first."""
    sheet(book, "Electrical", [
        ["Model: Curlew 12"],
        ["Parameter", "Value"],
        ["Frequency range", "2300-2690 MHz"],
        ["Gain", "18.0 dBi"],
        ["HPBW, az", "65°"],
        ["HPBW, el", "5.6°"],
    ])  # fmt: skip
    sheet(book, "Mechanical", [
        ["Model: Curlew 12"],
        ["Parameter", "Value"],
        ["Height", "1110 mm"],
        ["Width", "150 mm"],
        ["Depth", "79 mm"],
        ["Weight", "8.8 kg"],
    ])  # fmt: skip


def bullets_and_equals(book: Workbook) -> None:
    """Pasted lines of several makes: bullets, equals signs, semicolons; two panels after one another."""
    lines = [
        "Model: Ruff 1",
        "• Frequency range = 1710-2170 MHz",
        "• Gain = 16.9 dBi",
        "• Horizontal beamwidth = 65 deg",
        "• VSWR = < 1.5",
        "• Weight = 8.0 kg",
        "",
        "Model: Ruff 2",
        "• Frequency range = 3400-3800 MHz",
        "• Gain = 17.5 dBi",
        "• Horizontal beamwidth = 63 deg",
        "• VSWR = < 1.4",
        "• Weight = 5.5 kg",
    ]
    sheet(book, "Text", [[line] for line in lines if line is not None])


def french_question_form(book: Workbook) -> None:
    """A French form: exigence, offre, conformité."""
    sheet(book, "Conformité", [
        ["Modèle proposé", "Loire 65"],
        [],
        ["N°", "Caractéristique", "Exigence", "Offre", "Conformité", "Remarques"],
        ["1", "Gamme de fréquences", "1710-2170 MHz", "1710-2170 MHz", "Conforme", None],
        ["2", "Gain", "≥ 17 dBi", "17,4 ± 0,4 dBi", "Conforme", None],
        ["3", "Ouverture horizontale à 3 dB", "65° ± 5°", "65° ± 6°", "Conforme", None],
        ["4", "TOS", "≤ 1,5", "≤ 1,4", "Conforme", None],
        ["5", "Isolation entre accès", "≥ 30 dB", "conforme", "Conforme", None],
        ["6", "Poids", "≤ 12 kg", "à définir", None, None],
    ])  # fmt: skip


def german_comparison(book: Workbook) -> None:
    """German, panels across, unit column, decimal commas as text, a spare column and a legend."""
    sheet(book, "Vergleich", [
        [None, "Vergleich der angebotenen Antennen"],
        [],
        ["Pos.", "Eigenschaft", "Einheit", "Lahn 1", "Lahn 2", None],
        ["1", "Frequenzbereich", "MHz", "698–960", "1710–2170", None],
        ["2", "Antennengewinn", "dBi", "15,4 ± 0,5", "17,0 ± 0,5", None],
        ["3", "Halbwertsbreite, horizontal", "Grad", "67", "65", None],
        ["4", "Halbwertsbreite, vertikal", "Grad", "9,8", "7,6", None],
        ["5", "Nebenkeulenunterdrückung (oben)", "dB", "≥ 16", "≥ 17", None],
        ["6", "Vor-/Rückverhältnis", "dB", "≥ 25", "≥ 26", None],
        ["7", "Anschlüsse", None, "2 x 7-16 Buchse", "2 x 4.3-10 Buchse", None],
        ["8", "Abmessungen H×B×T", "mm", "1998×280×125", "1310×155×85", None],
        ["9", "Gewicht ohne Halterung", "kg", "18,5", "8,7", None],
        ["10", "Intermodulation (2 × 43 dBm)", "dBc", "< −150", "k.A.", None],
    ])  # fmt: skip


def catalogue_with_hidden_and_notes(book: Workbook) -> None:
    """A catalogue with a title, a hidden price column, statuses and notes below the table."""
    made = sheet(book, "Catalogue 2026", [
        ["Catalogue of sector panels"],
        [],
        ["Article", "Type", "Price", "Frequency range (MHz)", "Gain (dBi)", "HPBW H/V (°)", "Electrical tilt (°)", "Weight (kg)"],
        [101, "Stint A", 410, "1710-2170", "15.1", "65/13.8", "0-14", 6.1],
        [102, "Stint B", 455, "1710-2170", "17.1", "65/8.4", "0-10", 8.2],
        [103, "Stint C", 520, "1710-2690", "17.6", "63/6.9", "n/a", "tbd"],
        [],
        ["All weights without mounting kit. Gain of 18 dBi available on request."],
    ])  # fmt: skip
    made.column_dimensions["C"].hidden = True


HARD = {
    "c27_bands_under_panels": bands_under_panels,
    "c28_units_in_second_row": units_in_second_row,
    "c29_value_then_unit": value_then_unit,
    "c30_wavelengths_in_headings": wavelengths_in_headings,
    "c31_sign_habits": sign_habits,
    "c32_combined_headings": combined_headings,
    "c33_frequency_row": frequency_row,
    "c34_two_tables_one_panel": two_tables_one_panel,
    "c35_bullets_and_equals": bullets_and_equals,
    "c36_french_question_form": french_question_form,
    "c37_german_comparison": german_comparison,
    "c38_catalogue_with_hidden_and_notes": catalogue_with_hidden_and_notes,
}
"""File name to the function that fills the workbook."""
