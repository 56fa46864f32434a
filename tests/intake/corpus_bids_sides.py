"""Bids with remarks, titles and bands beside what they belong to; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

from intake.corpus_paper import merge, sheet
from openpyxl import Workbook


def metric_and_imperial(book: Workbook) -> None:
    """The same figures in two systems of units."""
    sheet(book, "Radio unit", [
        ["Product sheet: Mistral AAU-32 (band n41)"],
        [],
        ["Property", "Metric", "Imperial", "Remarks"],
        ["Frequency", "2496–2690 MHz"],
        ["TRX", "32T32R"],
        ["Radiating elements", "192 (12 × 8 × 2)", None, "rows × columns × pol."],
        ["Element pitch horizontal", "58 mm", "2.28 in"],
        ["Element pitch vertical", "80 mm", "3.15 in"],
        ["Max. EIRP", "76.5 dBm", None, "both polarisations"],
        ["Output power", "240 W", "53.8 dBm", "total"],
        ["Beam steering, horizontal", "±55°"],
        ["Beam steering, vertical", "±8°"],
        ["Maximum antenna gain", "24.3 dBi"],
        ["Size (H × W × D)", "998 × 494 × 180 mm", "39.3 × 19.4 × 7.1 in"],
        ["Weight", "36.2 kg", "79.8 lb", "without brackets"],
        ["Wind load, front", "645 N @ 150 km/h", "145 lbf @ 93 mph"],
        ["Power consumption", "typ. 780 W, max. 1050 W"],
        ["Temperature", "-40 to +55 °C", "-40 to +131 °F"],
    ])  # fmt: skip


def values_and_remarks(book: Workbook) -> None:
    """Under each panel a column of values and one of remarks."""
    made = sheet(book, "Evaluation", [
        ["Evaluation of low-band panels"],
        [],
        ["No.", "Criterion", "Unit", "MX-650", None, "MX-655", None, "MX-660"],
        [None, None, None, "Value", "Remark", "Value", "Remark", "Value", "Remark"],
        [1, "Operating band", "MHz", "694–960", None, "694–960", None, "703–960"],
        [2, "Gain (mid band)", "dBi", "15.2 ± 0.4", None, "15.5 ± 0.4", None, "15.1", "declared 15.9 in rev. A"],
        [3, "Horizontal HPBW", "°", "66", None, "64", None, "68"],
        [4, "Vertical HPBW", "°", "10.1", None, "9.4", None, "10.6"],
        [5, "Tilt", "°", "2–14", None, "2–12", None, "n/a", "fixed tilt model"],
        [6, "First upper side lobe", "dB", "≥ 16", None, "≥ 17", None, "TBD"],
        [7, "Height", "mm", "1 998", None, "2 150", None, "1 960"],
        [8, "Weight incl. clamps", "kg", "27.1", None, "29.5", None, "24.0"],
        [9, "Wind load @150 km/h, front", "N", "760", None, "810", None, "745"],
    ])  # fmt: skip
    merge(made, "A3:A4 B3:B4 C3:C4 D3:E3 F3:G3 H3:I3")


def panel_named_on_the_cover(book: Workbook) -> None:
    """The panel is named on the cover only."""
    sheet(book, "Cover", [
        [],
        [None, "Technical offer"],
        [None, "Tenderer", "Ostrava Signal"],
        [None, "Offered panel", "OS-4P-1726"],
        [None, "Date", "6 May 2031"],
    ])  # fmt: skip
    sheet(book, "Statement of compliance", [
        ["Item", "Requirement", "Tender limit", "Tenderer's figure", "C / NC", "Comment"],
        ["1", "Operating band", "1710–2690 MHz", "1710–2690 MHz", "C"],
        ["2", "Gain, lowest of all ports", "min. 17.0 dBi", "16.8 dBi", "C"],
        ["3", "Beamwidth, horizontal", "65° ± 6°", "62° ± 6°", "C"],
        ["4", "Beamwidth, vertical", "max. 7.5°", "6.2° ± 0.7°", "C"],
        ["5", "Tilt range", "2–10°", "2–10°", "C"],
        ["6", "VSWR", "max. 1.5", "1.5 max.", "C"],
        ["7", "Isolation", "min. 28 dB", "complies", "C"],
        ["8", "PIM (3rd order)", "max. -150 dBc", "−153 dBc (2 × 43 dBm)", "C"],
        ["9", "RF ports", "4 × 4.3-10", "4 × 4.3-10 female", "C"],
        ["10", "Power per port", "min. 200 W", "250 W", "C", "at 50 °C"],
        ["11", "Weight", "max. 20 kg", "22.4 kg", "NC", "see deviation 1"],
        ["12", "Length", "max. 2000 mm", "1.396 m", "C"],
        ["13", "Survival wind", "min. 200 km/h", "67 m/s", "C"],
    ])  # fmt: skip


def lines_under_bands(book: Workbook) -> None:
    """Pasted lines under lines that name the band."""
    sheet(book, "Offer text", [
        ["Panel offered: Rhea 2B-2000"],
        [],
        ["Low band (694–960 MHz)"],
        ["Gain = 15.4 ± 0.5 dBi"],
        ["Horizontal beamwidth = 67 ± 4°"],
        ["Vertical beamwidth = 10.2°"],
        ["Electrical tilt = 2…14°"],
        [],
        ["High band (1695–2690 MHz)"],
        ["Gain = 17.6 ± 0.6 dBi"],
        ["Horizontal beamwidth = 63 ± 5°"],
        ["Vertical beamwidth = 5.9°"],
        ["Electrical tilt = 2…12°"],
        [],
        ["Mechanical"],
        ["Height = 2.0 m"],
        ["Width = 305 mm"],
        ["Weight = 24.9 kg without brackets"],
        ["Wind load = 690 N (front, 150 km/h)"],
    ])  # fmt: skip


def tables_under_one_title(book: Workbook) -> None:
    """Two tables beside each other under one title."""
    sheet(book, "DX-88", [
        ["DX-88-65 sector panel"],
        [],
        ["Electrical", None, None, None, None, "Mechanical"],
        ["MHz", "1427-1518", "1710-2170", "2300-2690", None, "Height [mm]", 1400],
        ["Gain [dBi]", 16.2, 17.4, 18, None, "Width [mm]", 170],
        ["HPBW az [°]", 66, 64, 60, None, "Depth [mm]", 95],
        ["HPBW el [°]", 8.6, 6.7, 5.4, None, "Weight [kg]", 11.4],
        ["F/B [dB]", 25, 27, 28, None, "Ports", 6],
        ["XPD [dB]", 18, 20, 19, None, "Wind load front 150 km/h [N]", 300],
    ])  # fmt: skip


def lists_by_band(book: Workbook) -> None:
    """Lists of figures, one a band, in the cells of a catalogue."""
    sheet(book, "List", [
        ["Antenna", "Bands (MHz)", "Gain (dBi)", "Az. HPBW (°)", "El. HPBW (°)", "Tilt (°)", "Ports", "H (mm)", "W (mm)", "D (mm)", "Weight (kg)"],
        ["LL-201", "694-960 / 1710-2690", "14.9 / 17.3", "67 / 63", "11.9 / 6.3", "0-12 / 0-10", 4, 1500, 300, 150, 19.1],
        ["LL-202", "694-960 / 1427-2690", "15.8 / 17.6", "66 / 62", "9.7 / 5.6", "2-12 / 2-12", 6, 2000, 380, 160, 27.7],
        ["LL-301", "694-960 / 1427-1518 / 1695-2690", "16.0 / 16.3 / 18.1", "65 / 66 / 60", "8.9 / 8.6 / 5.2", "2-10 / 2-10 / 2-10", 8, 2400, 430, 190, 36.4],
    ])  # fmt: skip


def schedule_for_two_panels(book: Workbook) -> None:
    """Offers and declarations for two panels beside each other; items numbered B1, B2."""
    made = sheet(book, "Schedule B", [
        ["Schedule B – technical particulars (to be completed by tenderer)"],
        [],
        ["Ref.", "Particulars", "Unit", "Required", "ARX-15", None, "ARX-18"],
        [None, None, None, None, "Offered", "Comply (Y/N)", "Offered", "Comply (Y/N)"],
        ["B1", "Frequency range", "MHz", "as table 1", "790–960", "Y", "1710–2170", "Y"],
        ["B2", "Gain", "dBi", "≥ 15 / ≥ 17", "15.3", "Y", "17.4", "Y"],
        ["B3", "Horizontal 3 dB beamwidth", "deg", "65 ± 6", "67 ± 4", "Y", "64 ± 4", "Y"],
        ["B4", "Vertical 3 dB beamwidth", "deg", "–", "12.4", "Y", "6.9", "Y"],
        ["B5", "Front-to-back ratio", "dB", "≥ 25", "≥ 25", "Y", "≥ 28", "Y"],
        ["B6", "Overall height", "mm", "≤ 2000", "1580", "Y", "1310", "Y"],
        ["B7", "Weight without fixings", "kg", "≤ 20", "14.9", "Y", "9.5", "Y"],
        ["B8", "Wind load (front) at 150 km/h", "N", "≤ 600", "560", "Y", "290", "Y"],
    ])  # fmt: skip
    merge(made, "E3:F3 G3:H3")


def rows_detailed_by_conditions(book: Workbook) -> None:
    """Sections, parameters and conditions in three columns before the value."""
    sheet(book, "Massive MIMO", [
        ["Ibex 64T-35 – massive MIMO panel"],
        [],
        ["Section", "Parameter", "Condition", "Value", "Unit"],
        ["Radio", "Frequency range", None, "3400–3700", "MHz"],
        [None, "Number of transceivers", None, 64],
        [None, "Rated output power", "all transceivers", 53, "dBm"],
        [None, "EIRP", "boresight, both polarisations", 79, "dBm"],
        ["Array", "Rows", None, 12],
        [None, "Columns", None, 8],
        [None, "Element spacing", "horizontal", 43, "mm"],
        [None, None, "vertical", 60, "mm"],
        [None, "Sub-array", "rows", 3],
        ["Beams", "Gain", "service beam, boresight", 25.2, "dBi"],
        [None, "Half-power beamwidth", "horizontal", 12.7, "°"],
        [None, None, "vertical", 6.4, "°"],
        [None, "Steering range", "horizontal", "±60", "°"],
        [None, None, "vertical", "-4 … +12", "°"],
        ["Mechanics", "Height", None, 850, "mm"],
        [None, "Width", None, 420, "mm"],
        [None, "Depth", None, 150, "mm"],
        [None, "Weight", "without bracket", 28.5, "kg"],
        [None, "Wind load", "frontal, 150 km/h", 400, "N"],
        [None, "Power consumption", "typical", 720, "W"],
        [None, None, "maximum", 980, "W"],
    ])  # fmt: skip


def bands_in_french_labels(book: Workbook) -> None:
    """The band stands in the label of each row."""
    sheet(book, "Tableau", [
        [],
        ["Désignation", "Unités", "Isère 65-20", "Isère 65-26"],
        ["Bandes de fréquences", "MHz", "698-960 / 1710-2690", "698-960 / 1710-2690"],
        ["Gain bande 698-960 MHz", "dBi", "15,5 ± 0,4", "16,3 ± 0,4"],
        ["Gain bande 1710-2690 MHz", "dBi", "17,6 ± 0,5", "18,0 ± 0,6"],
        ["Ouverture horizontale 698-960 MHz", "°", "66", "65"],
        ["Ouverture horizontale 1710-2690 MHz", "°", "62", "60"],
        ["Tilt électrique 698-960 MHz", "°", "2 à 12", "2 à 10"],
        ["Tilt électrique 1710-2690 MHz", "°", "2 à 12", "0 à 8"],
        ["Isolation", "dB", "≥ 28", "≥ 30"],
        ["Nombre d'accès", None, 6, 6],
        ["Dimensions H x L x P", "mm", "2 000 x 300 x 150", "2 600 x 320 x 160"],
        ["Poids", "kg", "24,0", "32,7"],
        ["Tenue au vent", "km/h", "200", "200"],
    ])  # fmt: skip


def answers_in_words(book: Workbook) -> None:
    """Answers in phrases: 'besser als', 'Toleranz ±'."""
    sheet(book, "Fragenkatalog", [
        ["Fragenkatalog – Los 3"],
        ["Angebotene Antenne: Norde 18X65"],
        [],
        ["Nr.", "Frage / Anforderung", "Antwort Bieter", "K.O.", "Erfüllungsgrad"],
        [1, "Frequenzbereich", "1710 bis 2170 MHz", "x", "voll"],
        [2, "Antennengewinn", "17,8 dBi (± 0,4 dB)", None, "voll"],
        [3, "Horizontaler Öffnungswinkel", "65 Grad, Toleranz ± 5 Grad", None, "voll"],
        [4, "Vertikaler Öffnungswinkel", "ca. 6,8 Grad", "x", "voll"],
        [5, "Elektrischer Downtilt", "von 2 bis 10 Grad stufenlos", None, "voll"],
        [6, "Vor-Rück-Verhältnis", "besser als 26 dB", None, "voll"],
        [7, "VSWR", "kleiner 1,5", "x", "voll"],
        [8, "Entkopplung der Tore", "größer 30 dB", None, "voll"],
        [9, "Gewicht", "10,3 kg ohne, 13,6 kg mit Halter", None, "voll"],
        [10, "Höhe", "1,31 m", "x", "voll"],
        [11, "Windlast", "290 N frontal bei 150 km/h", None, "voll"],
        [12, "Grenzgeschwindigkeit Wind", "bis 200 km/h", None, "voll"],
    ])  # fmt: skip


def polish_abbreviations(book: Workbook) -> None:
    """Abbreviated headings after a long preface."""
    made = sheet(book, "Zestawienie", [
        ["Załącznik nr 2 do oferty"],
        ["Zestawienie parametrów oferowanych anten panelowych"],
        ["Uwaga: w poprzedniej ofercie podano zysk 16,9 dBi"],
        [],
        [],
        ["Lp.", "Model anteny", "Pasmo [MHz]", "Zysk [dBi]", "Szer. wiązki H [°]", "Szer. wiązki V [°]", "Przód/tył [dB]", "Tilt el. [°]", "Wys. [mm]", "Masa [kg]", "Uwagi"],
        [1, "Wisla 4P", "791–960", "15,1", 67, "11,8", "≥25", "0÷12", 1500, "19,8"],
        [None, None, "1710–2690", "17,3", 62, "6,2", "≥27", "0÷10"],
        [2, "Wisla 6P", "694–960", "15,9", 66, "9,4", "≥26", "2÷12", 2000, "28,6"],
        [None, None, "1427–2690", "17,8", 61, "5,4", "≥27", "2÷12"],
    ])  # fmt: skip
    merge(made, "A7:A8 A9:A10 B7:B8 B9:B10 I7:I8 I9:I10 J7:J8 J9:J10")


def tolerances_by_band(book: Workbook) -> None:
    """A tolerance column beside the values of each band."""
    made = sheet(book, "Values", [
        ["Type: Delta-T 65"],
        [],
        ["Parameter", "1710–1880 MHz", None, "2300–2690 MHz", None, "Unit"],
        [None, "Value", "Tol. ±", "Value", "Tol. ±"],
        ["Gain", 17.2, 0.4, 18, 0.5, "dBi"],
        ["Azimuth beamwidth", 66, 4, 61, 5, "°"],
        ["Elevation beamwidth", 7.1, 0.5, 5.5, 0.4, "°"],
        ["Front-to-back ratio", 28, None, 30, None, "dB"],
        ["Height", 1390, None, None, None, "mm"],
        ["Weight", 10.9, None, None, None, "kg"],
    ])  # fmt: skip
    merge(made, "A3:A4 B3:C3 D3:E3 F3:F4")


SIDES = {
    "c50_metric_and_imperial": metric_and_imperial,
    "c51_values_and_remarks": values_and_remarks,
    "c52_panel_named_on_the_cover": panel_named_on_the_cover,
    "c53_lines_under_bands": lines_under_bands,
    "c54_tables_under_one_title": tables_under_one_title,
    "c55_lists_by_band_in_catalogue": lists_by_band,
    "c56_schedule_for_two_panels": schedule_for_two_panels,
    "c57_rows_detailed_by_conditions": rows_detailed_by_conditions,
    "c58_bands_in_french_labels": bands_in_french_labels,
    "c59_answers_in_words": answers_in_words,
    "c60_polish_abbreviations": polish_abbreviations,
    "c61_tolerances_by_band": tolerances_by_band,
}
"""File name to the function that fills the workbook."""
