"""Bids that say much in few words: bands inside cells, questions, two languages; see ``build_corpus.py``."""

# ruff: noqa: E501 - one row of a table, one line

from __future__ import annotations

from intake.corpus_paper import sheet
from openpyxl import Workbook


def bands_inside_cells(book: Workbook) -> None:
    """One column of values; each cell says for which band, by nickname or by frequencies."""
    sheet(book, "QD-4P", [
        ["Quad panel QD-4P-65"],
        [],
        ["Parameter", "Value"],
        ["Frequency", "LB: 694-960 MHz; HB: 1695-2690 MHz"],
        ["Gain", "LB: 15.5 dBi; HB: 17.8 dBi"],
        ["HPBW, horizontal", "LB 67°, HB 62°"],
        ["HPBW, vertical", "11° (LB) / 6° (HB)"],
        ["Electrical tilt", "2-14° (LB), 2-12° (HB)"],
        ["Front-to-back ratio", "≥ 25 dB (694-960 MHz); ≥ 28 dB (1695-2690 MHz)"],
        ["Cross-polar discrimination", "694-960: 18 dB, 1695-2690: 20 dB"],
        ["RF connectors", "two 4.3-10 female + 2 x 4.3-10 female"],
        ["Dimensions", "H1998 W305 D165"],
        ["Weight (w/o mounting kit)", "22 kg"],
        ["Mounting kit (kg)", "4,5"],
    ])  # fmt: skip


def questions_to_an_active_panel(book: Workbook) -> None:
    """Whole questions as labels; figures of broadcast beams beside those of traffic beams."""
    sheet(book, "Questionnaire", [
        ["Questionnaire, lot 5"],
        [],
        ["Question", "Answer"],
        ["Which model do you offer?", "AAX-64-320"],
        ["What is the frequency range of the antenna?", "n78, 3400 to 3800 MHz"],
        ["How many transceivers does the antenna have?", "64T64R"],
        ["Please state the number of antenna elements (rows x columns x polarisations)", "192 elements (12x8x2)"],
        ["What is the gain of the traffic beam in dBi?", "25.2 ± 0.5"],
        ["What is the gain of the broadcast beam?", "17.5 dBi"],
        ["Please state the EIRP (traffic beam, max.)", "80.2 dBm"],
        ["Please state the EIRP (SSB)", "72 dBm"],
        ["What is the horizontal steering range?", "± 60°"],
        ["What is the vertical steering range?", "-3° to +12°"],
        ["What is the maximum power consumption?", "1.15 kW"],
        ["Please indicate the height of the panel", "2' 5\""],
        ["How much does the panel weigh without brackets?", "29 kg"],
        ["Please state the wind load at 150 km/h (frontal | lateral | rearside)", "330 | 140 | 345 N"],
        ["Power", "320 W"],
    ])  # fmt: skip


def labels_in_two_languages(book: Workbook) -> None:
    """German and English in every label; frequency edges in rows of their own."""
    sheet(book, "Datenblatt", [
        ["Typ / Type", "KB 18-65"],
        [],
        ["Merkmal / Characteristic", "Einheit / Unit", "Wert / Value"],
        ["Frequenz von / Frequency from", "MHz", 1710],
        ["Frequenz bis / Frequency to", "MHz", 2170],
        ["Gewinn / Gain", "dBi", "17,4 ± 0,4"],
        ["Keulenbreite horizontal / Beam width horizontal", "°", "65"],
        ["Keulenbreite vertikal / Beam width vertical", "°", "7,4"],
        ["Welligkeit (VSWR)", "–", "< 1,4"],
        ["Intermodulation 3. Ordnung bei 2 × 43 dBm / PIM3", "dBc", "< -153"],
        ["Entkopplung der Tore / Isolation", "dB", "> 30"],
        ["Entkopplung zwischen den Systemen / Inter-system isolation", "dB", "> 32"],
        ["Belastbarkeit je Tor, max. / Max. power per port", "W", "250"],
        ["Max. Windgeschwindigkeit / Max. wind velocity", "km/h", "241"],
        ["Gewicht ohne Schellen / Weight without clamps", "kg", "9,8"],
        ["Gewinnschwankung / Gain ripple", "dB", "0,8"],
    ])  # fmt: skip


WORDS = {
    "c62_bands_inside_cells": bands_inside_cells,
    "c63_questions_to_an_active_panel": questions_to_an_active_panel,
    "c64_labels_in_two_languages": labels_in_two_languages,
}
"""File name to the function that fills the workbook."""
