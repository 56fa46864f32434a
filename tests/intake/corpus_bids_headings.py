"""Bids whose headings take some reading: levels, details, forms; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

from intake.corpus_paper import merge, sheet
from openpyxl import Workbook


def three_levels_of_headings(book: Workbook) -> None:
    """Arrays over wider bands over sub-bands; a note quotes a figure withdrawn."""
    made = sheet(book, "LX-2447", [
        ["Multiband antenna LX-2447-6 – preliminary data, subject to change"],
        ["The earlier issue B stated 15.9 dBi for the low band; that figure is withdrawn."],
        [],
        ["Item", "Description", "Array R1", "Arrays Y1, Y2", None, None, None, "Unit"],
        [None, None, "698–960 MHz", "1695–2690 MHz"],
        [None, None, None, "1695–1880 MHz", "1850–1990 MHz", "1920–2180 MHz", "2490–2690 MHz"],
        [1, "Typical gain over all tilts", "15.1 ± 0.3", "16.9 ± 0.4", "17.2 ± 0.4", "17.5 ± 0.5", "17.8 ± 0.6", "dBi"],
        [2, "Beamwidth, azimuth", 67, 65, 63, 62, 59, "deg"],
        [3, "Beamwidth, elevation", 10.9, 6.9, 6.5, 6.1, 5, "deg"],
        [4, "Electrical downtilt (continuous)", "2–14", "2–12", None, None, None, "deg"],
        [5, "Front-to-back, co-polar, ±20°", ">27", ">28", ">28", ">29", ">28", "dB"],
        [6, "First upper side lobe suppression, typ.", ">16", ">17", ">17", ">18", ">16", "dB"],
        [7, "Cross-polar discrimination at 0°", "≥19", "≥20", "≥20", "≥21", "≥20", "dB"],
        [8, "VSWR", "<1.5:1"],
        [9, "Max power per input", 400, 250, None, None, None, "W"],
        [10, "Intermodulation IM3 (2 × 20 W)", "<-153", None, None, None, None, "dBc"],
        [11, "Interface", "6 x 4.3-10 female, long neck"],
        ["Mechanical specification"],
        [13, "Height / width / depth", "1999 / 399 / 169", None, None, None, None, "mm"],
        [14, "Net weight", "29.7", None, None, None, None, "kg"],
        [15, "Wind load (150 km/h) frontal", "690", None, None, None, None, "N"],
        [16, "Wind load (150 km/h) lateral", "270", None, None, None, None, "N"],
        [17, "Maximum wind velocity", "200", None, None, None, None, "km/h"],
    ])  # fmt: skip
    merge(
        made,
        "A1:H1 A4:A6 B4:B6 C14:G14 C16:G16 C17:G17 C19:G19 C20:G20 C21:G21 C22:G22 C23:G23 C5:C6 D10:G10 D15:G15 D4:G4 D5:G5 H4:H6",
    )


def german_catalogue(book: Workbook) -> None:
    """Names and mechanics merged over bands; details and units in rows of their own."""
    made = sheet(book, "Lieferprogramm 2031", [
        [None, "Lieferprogramm Sektorantennen (Auszug)"],
        [],
        [None, "Typ", "Band", "Frequenz", "Gewinn", "Halbwertsbreite", None, "Elektrische Absenkung", "V/R-Verhältnis", "Entkopplung", "Leistung", "Abmessungen", None, None, "Gewicht"],
        [None, None, None, None, None, "hor.", "vert.", None, None, None, "je Eingang", "H", "B", "T"],
        [None, None, None, "MHz", "dBi", "Grad", "Grad", "Grad", "dB", "dB", "W", "mm", "mm", "mm", "kg"],
        [None, "SAX 65-4", "LB", "694 – 960", "15,0", "68±4", "10,5±1", "2-12", ">25", ">30", 500, 2000, 320, 150, "24,5"],
        [None, None, "HB", "1695 – 2690", "17,6", "62±5", "6,2±0,6", "2-12", ">26", ">28", 300],
        [None, "SAX 65-2L", "LB", "694 – 960", "15,7", "67±4", "9,8±0,9", "0-10", ">25", ">30", 500, 2000, 262, 140, "17,9"],
        [None, "SAX 33-4", "HB", "1710 – 2170", "20,4", "33±2", "6,6±0,5", "0-8", ">28", ">30", 250, 1340, 330, 120, "16,8"],
        [None, None, "HB2", "2300 – 2690", "21,1", "28±2", "5,4±0,5", "0-8", ">28", ">30", 250],
    ])  # fmt: skip
    merge(made, "B6:B7 B9:B10 F3:G3 L3:N3 L6:L7 L9:L10 M6:M7 M9:M10 N6:N7 N9:N10 O6:O7 O9:O10")


def french_comparison(book: Workbook) -> None:
    """Panels across with spacers; what a row is about in a column of details of unknown heading."""
    made = sheet(book, "Comparatif", [
        [],
        [None, "Comparatif des aériens proposés – lot 2"],
        [],
        [None, "Rubrique", "Caractéristique", "Précision", "Unité", "Orvane 12", None, "Orvane 18", None, "Orvane 21"],
        [None, "Radio", "Bande de fréquences", None, "MHz", "1710–2690", None, "1710–2690", None, "1710–2690"],
        [None, None, "Polarisation", None, None, "±45°", None, "±45°", None, "±45°"],
        [None, None, "Gain", "1710–2170 MHz", "dBi", "13,9 ± 0,5", None, "17,0 ± 0,5", None, "20,2 ± 0,5"],
        [None, None, None, "2300–2690 MHz", "dBi", "14,6 ± 0,5", None, "17,8 ± 0,5", None, "–"],
        [None, None, "Ouverture à mi-puissance, plan horizontal", "1710–2170 MHz", "°", "65 ± 4", None, "64 ± 4", None, "33 ± 3"],
        [None, None, None, "2300–2690 MHz", "°", "61 ± 4", None, "60 ± 4", None, "–"],
        [None, None, "Ouverture à mi-puissance, plan vertical", "1710–2170 MHz", "°", "17,8", None, "7,2", None, "7,1"],
        [None, None, None, "2300–2690 MHz", "°", "14,1", None, "5,8", None, "–"],
        [None, None, "Inclinaison électrique", "télécommandée", "°", "0–12", None, "0–10", None, "2–10"],
        [None, None, "Rapport avant/arrière", "180° ± 30°", "dB", "≥ 25", None, "≥ 27", None, "≥ 28"],
        [None, None, "Taux d'ondes stationnaires", None, None, "≤ 1,5", None, "≤ 1,5", None, "≤ 1,5"],
        [None, None, "Découplage entre accès", None, "dB", "≥ 28", None, "≥ 30", None, "≥ 30"],
        [None, None, "Puissance admissible", "par accès", "W", 250, None, 250, None, 200],
        [None, "Mécanique", "Hauteur", None, "mm", "600", None, "1 330", None, "1 330"],
        [None, None, "Largeur", None, "mm", "155", None, "155", None, "310"],
        [None, None, "Épaisseur", None, "mm", "85", None, "90", None, "105"],
        [None, None, "Masse", "sans fixations", "kg", "5,4", None, "9,3", None, "14,8"],
        [None, None, None, "avec fixations", "kg", "8,6", None, "12,6", None, "18,4"],
        [None, None, "Effort au vent", "frontal, 150 km/h", "N", "110", None, "240", None, "450"],
        [None, None, None, "latéral, 150 km/h", "N", "60", None, "130", None, "150"],
        [None, None, "Vitesse de vent de survie", None, "km/h", "200", None, "200", None, "200"],
        [],
        [None, "– : bande non couverte"],
    ])  # fmt: skip
    merge(made, "B18:B25 B5:B17 C11:C12 C21:C22 C23:C24 C7:C8 C9:C10")


def symbols_and_tolerances(book: Workbook) -> None:
    """A column of symbols, one of tolerances with units of the figure."""
    sheet(book, "Data", [
        ["EK-3308T 8-port panel"],
        [],
        ["Parameter", "Symbol", "Value", "Tolerance", "Unit", "Note"],
        ["Frequency range", "f", "3300–3800", None, "MHz"],
        ["Gain, single column", "G0", 15.8, "± 0.5", "dBi", "mid band"],
        ["Horizontal half-power beamwidth", "φ3dB", 90, "± 8", "°"],
        ["Vertical half-power beamwidth", "θ3dB", 6.3, 0.4, "°"],
        ["Electrical tilt", "α", "2–12", "± 0.5", "°", "step 1°"],
        ["Element rows", "M", 10, None, "–"],
        ["Element columns", "N", 4, None, "–"],
        ["Horizontal element spacing", "dx", 0.5, None, "λ", "at 3.55 GHz"],
        ["Vertical element spacing", "dy", 60, None, "mm"],
        ["Front-to-back ratio", "F/B", 25, None, "dB", "minimum"],
        ["Cross-polar discrimination", "XPD", 20, None, "dB"],
        ["VSWR", "s", 1.5, None, None, "max."],
        ["Co-polar isolation", "S21", -20, None, "dB", "max."],
        ["Power per port", "P", 100, None, "W"],
        ["Height", "H", 720, "± 3", "mm"],
        ["Width", "W", 200, None, "mm"],
        ["Depth", "D", 95, None, "mm"],
        ["Weight", "m", 8.9, None, "kg", "without clamps"],
        ["Wind load, frontal", "F", 170, None, "N", "150 km/h"],
    ])  # fmt: skip


def one_figure_a_row(book: Workbook) -> None:
    """Panel, band, parameter, value and unit in every row."""
    sheet(book, "Long", [
        ["Panel", "Band (MHz)", "Parameter", "Value", "Unit"],
        ["LT-1", "698-960", "Gain", 15.1, "dBi"],
        ["LT-1", "698-960", "Horizontal beamwidth", 67, "°"],
        ["LT-1", "698-960", "Vertical beamwidth", 11, "°"],
        ["LT-1", "698-960", "Electrical tilt", "2-14", "°"],
        ["LT-1", "698-960", "Front-to-back ratio", "> 25", "dB"],
        ["LT-1", "1710-2690", "Gain", 17.6, "dBi"],
        ["LT-1", "1710-2690", "Horizontal beamwidth", 63, "°"],
        ["LT-1", "1710-2690", "Vertical beamwidth", 6, "°"],
        ["LT-1", "1710-2690", "Electrical tilt", "2-12", "°"],
        ["LT-1", "1710-2690", "Front-to-back ratio", "> 27", "dB"],
        ["LT-1", "all", "Height", 2000, "mm"],
        ["LT-1", "all", "Weight", 24.5, "kg"],
        ["LT-2", "698-960", "Gain", 15.1, "dBi"],
        ["LT-2", "698-960", "Horizontal beamwidth", 67, "°"],
        ["LT-2", "698-960", "Vertical beamwidth", 11, "°"],
        ["LT-2", "698-960", "Electrical tilt", "2-14", "°"],
        ["LT-2", "698-960", "Front-to-back ratio", "> 25", "dB"],
        ["LT-2", "1710-2690", "Gain", 17.6, "dBi"],
        ["LT-2", "1710-2690", "Horizontal beamwidth", 63, "°"],
        ["LT-2", "1710-2690", "Vertical beamwidth", 6, "°"],
        ["LT-2", "1710-2690", "Electrical tilt", "2-12", "°"],
        ["LT-2", "1710-2690", "Front-to-back ratio", "> 27", "dB"],
        ["LT-2", "all", "Height", 2600, "mm"],
        ["LT-2", "all", "Weight", 31, "kg"],
    ])  # fmt: skip


def demands_in_the_labels(book: Workbook) -> None:
    """What is asked stands in the label; the panel is named within the bidder's line."""
    sheet(book, "Réponses", [
        ["Cadre de réponse technique"],
        ["Soumissionnaire : Lumeo Antennes – aérien proposé : Lumeo 65-17"],
        [],
        ["N°", "Exigence", "Réponse du soumissionnaire", "Conforme (O/N)", "Remarques"],
        [1, "Bande de fréquences : 1710 – 2170 MHz", "1710 – 2170 MHz", "O"],
        [2, "Gain ≥ 17 dBi", "17,3 dBi", "O", "au milieu de bande"],
        [3, "Ouverture horizontale à -3 dB : 65° ± 5°", "66° ± 4°", "O"],
        [4, "Ouverture verticale à -3 dB ≤ 8°", "7,3°", "O"],
        [5, "ROS ≤ 1,5", "conforme", "O"],
        [6, "Poids ≤ 15 kg", "10,2 kg sans fixations", "O", "12,9 kg avec fixations"],
        [7, "Hauteur ≤ 1500 mm", "1 320 mm", "O"],
    ])  # fmt: skip


def active_portfolio(book: Workbook) -> None:
    """Names of bands beside their frequencies; arrays, transceivers and steering."""
    sheet(book, "5G portfolio", [
        ["Product", "NR band", "Frequency", "Array (rows x cols x pol)", "TRX", "Max. EIRP", "Output power", "Azimuth scan", "Elevation scan", "Peak gain", "Dimensions (HxWxD, mm)", "Weight (kg)", "Power consumption (W)"],
        ["AP-32L", "n41", "2496–2690 MHz", "12x8x2", "32T32R", "76.8 dBm", "240 W", "±60°", "±10°", 24.9, "990x480x160", 34.5, 850],
        ["AP-64C", "n78", "3.4–3.8 GHz", "12x8x2", "64T64R", "79 dBm", "320 W", "±60°", "-5°…+15°", 25.6, "860x400x150", 29.8, 1020],
        ["AP-8M", "n258", "24.25–27.5 GHz", "16x16x2", "4T4R", "60 dBm", "8 W", "±60°", "±15°", 29.5, "380x240x110", 8.2, 310],
    ])  # fmt: skip


def merged_over_bands(book: Workbook) -> None:
    """Some figures merged over the bands of a panel."""
    made = sheet(book, "Übersicht", [
        ["Anlage 3: Technische Daten der angebotenen Antennen"],
        [],
        ["Antennentyp", "Frequenzband", "Gewinn", "Halbwertsbreite", None, "Tilt", "VSWR", "Isolation", "IM3", "Größe (H x B x T)", "Masse"],
        [None, None, None, "horizontal", "vertikal"],
        [None, "MHz", "dBi", "°", "°", "°", None, "dB", "dBc", "mm", "kg"],
        ["VEX 12/65", "698 ... 806", "14,1 ± 0,4", "69 ± 3", "14,2", "0–12", "< 1,5", "> 30", "< –150", "1499 x 300 x 165", "18,2"],
        [None, "824 ... 960", "14,8 ± 0,4", "66 ± 3", "12,3"],
        ["VEX 18/65", "1695 ... 1880", "17,2 ± 0,3", "66 ± 3", "7,3", "0–12", "< 1,5", "> 30", "< –150", "1390 x 170 x 95", "10,4"],
        [None, "1850 ... 2170", "17,7 ± 0,4", "64 ± 4", "6,6"],
        [None, "2300 ... 2690", "18,1 ± 0,5", "61 ± 4", "5,4"],
    ])  # fmt: skip
    merge(
        made,
        "A6:A7 A8:A10 D3:E3 F6:F7 F8:F10 G6:G7 G8:G10 H6:H7 H8:H10 I6:I7 I8:I10 J6:J7 J8:J10 K6:K7 K8:K10",
    )


def german_form_with_nicknames(book: Workbook) -> None:
    """A form; bands called upper and lower; two figures in one cell."""
    sheet(book, "Preisblatt-Technik", [
        ["Bieter: Tarsus GmbH – angebotener Typ: Tarsus 2B"],
        ["Pos.", "Anforderung", "Forderung", "Einheit", "Angabe des Bieters", "erfüllt (ja/nein)", "Bemerkung"],
        ["4.1", "Frequenzbereich unteres Band", "790-960", "MHz", "790-960", "ja"],
        ["4.2", "Frequenzbereich oberes Band", "1710-2690", "MHz", "1710-2690", "ja"],
        ["4.3", "Gewinn 790-960 MHz", "≥ 15", "dBi", "15,3", "ja"],
        ["4.4", "Gewinn 1710-2690 MHz", "≥ 17", "dBi", "17,4", "ja"],
        ["4.5", "Horizontale Halbwertsbreite", "65 ± 6", "°", "66 / 62", "ja"],
        ["4.6", "VSWR", "≤ 1,5", None, "1,5", "ja"],
        ["4.7", "Gewicht", "≤ 25", "kg", "26,1", "ja"],
        ["4.8", "Höhe", "≤ 2000", "mm", "1 998", "ja"],
        ["4.9", "Windlast (150 km/h)", "≤ 900", "N", "wird nachgereicht", "nein"],
    ])  # fmt: skip


def pasted_side_by_side(book: Workbook) -> None:
    """Pasted lines of two panels beside each other."""
    sheet(book, "Blocks", [
        ["ZK-18", None, "ZK-15"],
        ["Frequency range: 1710-2170 MHz", None, "Frequency range: 824-960 MHz"],
        ["Gain: 17.7 dBi +/- 0.5 dB", None, "Gain: 15.2 dBi +/- 0.4 dB"],
        ["Horizontal HPBW: 65 deg", None, "Horizontal HPBW: 67 deg"],
        ["Vertical HPBW: 6.8 deg", None, "Vertical HPBW: 12.4 deg"],
        ["Electrical tilt: 0-10 deg", None, "Front-to-back: >25 dB"],
        ["VSWR: <1.5:1", None, "Wind load: 520 N frontal, 190 N lateral at 150 km/h"],
        ["PIM: <-153 dBc (2x43 dBm)", None, "Weight: 14.4 kg"],
        ["Connector: 2 x 7/16 DIN female"],
        ["Weight: 9.3 kg"],
        ["Size: 1310x155x90 mm"],
    ])  # fmt: skip


def forms_below_one_another(book: Workbook) -> None:
    """Two Portuguese forms below one another, each with its panel and headings."""
    sheet(book, "Resposta técnica", [
        ["Concurso 17/2031 – resposta técnica"],
        [],
        ["Antena proposta: Tejo 65-15"],
        ["Item", "Requisito", "Exigido", "Proposto", "Cumpre?"],
        [1, "Banda de frequência", "790-960 MHz", "791-960 MHz", "Sim"],
        [2, "Ganho", "≥ 15 dBi", "15,3 ± 0,4 dBi", "Sim"],
        [3, "Largura de feixe horizontal", "65° ± 6°", "67°", "Sim"],
        [4, "Largura de feixe vertical", "≤ 14°", "12,6°", "Sim"],
        [5, "Relação frente-costas", "≥ 25 dB", "≥ 25 dB", "Sim"],
        [6, "Peso", "≤ 18 kg", "14,9 kg", "Sim"],
        [],
        ["Antena proposta: Tejo 65-18"],
        ["Item", "Requisito", "Exigido", "Proposto", "Cumpre?"],
        [1, "Banda de frequência", "1710-2170 MHz", "1710-2170 MHz", "Sim"],
        [2, "Ganho", "≥ 17,5 dBi", "17,2 ± 0,5 dBi", "Sim"],
        [3, "Largura de feixe horizontal", "65° ± 6°", "64° ± 5°", "Sim"],
        [4, "Largura de feixe vertical", "≤ 8°", "6,9°", "Sim"],
        [5, "Isolamento", "≥ 30 dB", "cumpre", "Sim"],
        [6, "Peso", "≤ 12 kg", "9,7 kg", "Sim"],
    ])  # fmt: skip


HEADINGS = {
    "c39_three_levels_of_headings": three_levels_of_headings,
    "c40_german_catalogue_in_three_heading_rows": german_catalogue,
    "c41_french_comparison_with_details": french_comparison,
    "c42_symbols_and_tolerances": symbols_and_tolerances,
    "c43_one_figure_a_row": one_figure_a_row,
    "c44_demands_in_the_labels": demands_in_the_labels,
    "c45_active_portfolio": active_portfolio,
    "c46_figures_merged_over_bands": merged_over_bands,
    "c47_german_form_with_nicknames": german_form_with_nicknames,
    "c48_pasted_side_by_side": pasted_side_by_side,
    "c49_forms_below_one_another": forms_below_one_another,
}
"""File name to the function that fills the workbook."""
