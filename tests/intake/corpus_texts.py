"""Bids of the corpus as delimited text; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

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
GERMAN = [
    ["Angebot Felsa Funktechnik"],
    ["Angebotener Typ: Felsa 17X"],
    [],
    ["Merkmal", "Wert", "Einheit", "Bemerkung"],
    ["Frequenzbereich", "1.710 – 2.200", "MHz"],
    ["Polarisation", "±45", "°", "Doppelslant"],
    ["Gewinn", "17,3 +/- 0,5", "dBi", "Bandmitte"],
    ["Öffnungswinkel horizontal (-3 dB)", "65 +/- 4", "°"],
    ["Öffnungswinkel vertikal (-3 dB)", "7,1", "°"],
    ["Elektrische Absenkung", "2 bis 10", "°", "fernsteuerbar"],
    ["Nebenzipfelunterdrückung oberhalb der Hauptkeule", "min. 17", "dB"],
    ["Vor-/Rückverhältnis", "mind. 26", "dB"],
    ["Kreuzpolarentkopplung (0°)", "mind. 19", "dB"],
    ["Stehwellenverhältnis", "max. 1,5"],
    ["Entkopplung zwischen den Eingängen", "mind. 30", "dB"],
    ["Belastbarkeit je Eingang", "300", "W"],
    ["Höhe", "1.310", "mm"],
    ["Breite", "160", "mm"],
    ["Tiefe", "92", "mm"],
    ["Gewicht ohne Halterung", "10,1", "kg", "mit Halterung 13,4 kg"],
    ["Windlast frontal bei 150 km/h", "280", "N"],
    ["Überlebenswindgeschwindigkeit", "200", "km/h"],
]  # fmt: skip
EDGES = [
    ["Model", "Freq low, MHz", "Freq high, MHz", "Gain, dBi", "Gain tol., dB", "Az HPBW, deg", "El HPBW, deg", "Height, mm", "Weight, kg"],
    ["CS-10", "694", "960", "14.0", "0.5", "60", "5.0", "1,000", "8.0"],
    ["CS-11", "1695", "2690", "14.1", "0.5", "61", "5.2", "1,040", "8.5"],
    ["CS-12", "3300", "3800", "14.2", "0.5", "62", "5.4", "1,080", "9.0"],
    ["CS-13", "694", "960", "14.3", "0.5", "63", "5.6", "1,120", "9.5"],
    ["CS-14", "1695", "2690", "14.4", "0.5", "64", "5.8", "1,160", "10.0"],
    ["CS-15", "3300", "3800", "14.5", "0.5", "65", "6.0", "1,200", "10.5"],
]  # fmt: skip

TEXTS: dict[str, tuple[list[list[str]], str, str]] = {
    "t01_french.csv": (FRENCH, "utf-8", ";"),
    "t02_spanish.csv": (SPANISH, "latin-1", ";"),
    "t03_portuguese.tsv": (PORTUGUESE, "utf-16", "\t"),
    "t04_polish.csv": (POLISH, "utf-8-sig", ";"),
    "t05_english_thousands.csv": (ENGLISH_THOUSANDS, "cp1252", ","),
    "t06_unsettled.csv": (UNSETTLED, "utf-8", ","),
    "t07_german.csv": (GERMAN, "utf-16", ";"),
    "t08_band_edges.csv": (EDGES, "utf-8", ","),
}
"""File name to rows, encoding and delimiter."""
