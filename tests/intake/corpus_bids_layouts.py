"""Bids of the corpus, one layout or language each; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

from intake.corpus_paper import place, sheet
from openpyxl import Workbook


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


LAYOUTS = {
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
}
"""File name to the function that fills the workbook."""
