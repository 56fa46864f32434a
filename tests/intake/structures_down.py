"""Small bids with headings down the side, one structure each; rows, merges, and their readings by hand."""

from __future__ import annotations

from intake.sheets import Rows

_ = None

DOWN: dict[str, tuple[Rows, tuple[str, ...], str]] = {
    "arrays by name over a row of bands": (
        [
            ["Typ: BR-306-65"],
            [],
            ["Merkmal", "Einheit", "Array R1", "Array Y1", "Array P1"],
            ["Frequenzbereich", "MHz", "694 – 960", "1695 – 2180", "3300 – 3800"],
            ["Gewinn", "dBi", "16,3", "18,0", "17,5"],
            ["VSWR", "–", "< 1,5", _, _],
            ["Gewicht", "kg", "29,4", _, _],
        ],
        ("C6:E6", "C7:E7"),
        """BR-306-65: C4 operating_bands 694..960 MHz @694-960
        BR-306-65: D4 operating_bands 1695..2180 MHz @1695-2180
        BR-306-65: E4 operating_bands 3300..3800 MHz @3300-3800
        BR-306-65: C5 gain 16.3 dBi @694-960
        BR-306-65: D5 gain 18 dBi @1695-2180
        BR-306-65: E5 gain 17.5 dBi @3300-3800
        BR-306-65: C6 vswr ≤1.5
        BR-306-65: C7 weight 29.4 kg""",
    ),
    "arrays by place and colour": (
        [
            ["Panel BR-20"],
            ["Parameter", "Red", "Yellow left"],
            ["Frequency range (MHz)", "694-960", "1695-2180"],
            ["Gain (dBi)", 16, 18],
        ],
        (),
        """BR-20: B3 operating_bands 694..960 MHz @694-960
        BR-20: C3 operating_bands 1695..2180 MHz @1695-2180
        BR-20: B4 gain 16 dBi @694-960
        BR-20: C4 gain 18 dBi @1695-2180""",
    ),
    "blocks of arrays below one another, and what holds for the whole panel": (
        [
            ["HX-10P"],
            ["R1 | 694–960 MHz | ports 1–2", _, _],
            ["Gain", 16.1, "dBi"],
            ["P1 | 3300–4200 MHz | ports 3–4", _, _],
            ["Gain", 17.9, "dBi"],
            ["All arrays", _, _],
            ["VSWR", "≤ 1.5", _],
            ["Mechanics", _, _],
            ["Weight", 36.5, "kg"],
        ],
        ("A2:C2", "A4:C4", "A6:C6", "A8:C8"),
        """HX-10P: A2 operating_bands 694..960 MHz @694-960
        HX-10P: B3 gain 16.1 dBi @694-960
        HX-10P: A4 operating_bands 3300..4200 MHz @3300-4200
        HX-10P: B5 gain 17.9 dBi @3300-4200
        HX-10P: B7 vswr ≤1.5
        HX-10P: B9 weight 36.5 kg""",
    ),
    "statistics among other words over columns": (
        [
            ["Type AX-24"],
            ["Merkmal / Characteristic", "Einheit / Unit", "Typical", "Guaranteed min", "Guaranteed max"],
            ["Frequenz / Frequency", "MHz", "3300-3600"],
            ["Gewinn / Gain", "dBi", 24.6, 23.9, _],
            ["VSWR", "–", 1.3, _, 1.5],
            ["Gewicht / Weight", "kg", 22, _, _],
        ],
        ("C6:E6",),
        """AX-24: C3 frequency_range 3300..3600 MHz
        AX-24: C3 operating_bands 3300..3600 MHz @3300-3600
        AX-24: C4 gain 24.6 dBi @3300-3600
        AX-24: D4 gain ≥23.9 dBi @3300-3600
        AX-24: C5 vswr 1.3 @3300-3600
        AX-24: E5 vswr ≤1.5 @3300-3600
        AX-24: C6 weight 22 kg""",
    ),
    "tilts and planes over columns": (
        [
            ["Panel KD-20"],
            ["Parameter", "Unit", "Tilt 0°", "Tilt 10°"],
            ["Gain", "dBi", 15, 14.7],
            [],
            ["Parameter", "Unit", "Horizontal", "Vertical"],
            ["HPBW", "°", 65, 12],
        ],
        (),
        """KD-20: C3 gain 15 dBi
        KD-20: D3 gain 14.7 dBi
        KD-20: C6 horizontal_beamwidth 65 deg
        KD-20: D6 vertical_beamwidth 12 deg""",
    ),
    "names merged down beside two tables": (
        [
            ["KD-20", "Parameter", "Value"],
            [_, "Frequency", "694-960 MHz"],
            [_, "Gain", "15 dBi"],
            ["KD-21", "Parameter", "Value"],
            [_, "Frequency", "1710-2690 MHz"],
            [_, "Gain", "17 dBi"],
        ],
        ("A1:A3", "A4:A6"),
        """KD-20: C2 frequency_range 694..960 MHz
        KD-20: C2 operating_bands 694..960 MHz @694-960
        KD-20: C3 gain 15 dBi @694-960
        KD-21: C5 frequency_range 1710..2690 MHz
        KD-21: C5 operating_bands 1710..2690 MHz @1710-2690
        KD-21: C6 gain 17 dBi @1710-2690""",
    ),
    "a form with its model above the heading row": (
        [
            ["Offered model:", _, "HX-69"],
            [],
            ["Item", "Requirement", "Required", "Offered", "Comply (Y/N)"],
            ["A  Electrical"],
            ["1.1", "Gain", "≥ 15 dBi", "15.8 dBi", "Y"],
            ["1.2", "VSWR", "≤ 1.5", "≤ 1.45", "Y"],
        ],
        (),
        """HX-69: C1 model HX-69
        HX-69: D5 gain 15.8 dBi
        HX-69: D6 vswr ≤1.45""",
    ),
    "the range in a panel's title, where nothing else tells": (
        [["Panel KD-12, 694–960 MHz"], ["Parameter", "Value"], ["Gain", "15 dBi"], ["Weight", "12 kg"]],
        (),
        """KD-12: A1 frequency_range 694..960 MHz
        KD-12: A1 operating_bands 694..960 MHz @694-960
        KD-12: B3 gain 15 dBi @694-960
        KD-12: B4 weight 12 kg""",
    ),
    "a place in the band as the only condition that names one": (
        [
            ["Product", "ORK-21"],
            [],
            ["Parameter", "Condition", "Min.", "Typ.", "Unit"],
            ["Frequency range", _, _, "1920–2170", "MHz"],
            ["Gain", "mid band", 17.4, 17.9, "dBi"],
        ],
        (),
        """ORK-21: B1 model ORK-21
        ORK-21: D4 frequency_range 1920..2170 MHz
        ORK-21: D4 operating_bands 1920..2170 MHz @1920-2170
        ORK-21: C5 gain ≥17.4 dBi @1920-2170
        ORK-21: D5 gain 17.9 dBi @1920-2170""",
    ),
    "pasted lines under bands": (
        [
            ["Antenna KD-20"],
            ["694-960 MHz:"],
            ["Gain: 15 dBi"],
            ["1710-2690 MHz:"],
            ["Gain: 17 dBi"],
            ["Weight: 20 kg"],
        ],
        (),
        """KD-20: A2 operating_bands 694..960 MHz @694-960
        KD-20: A3 gain 15 dBi @694-960
        KD-20: A4 operating_bands 1710..2690 MHz @1710-2690
        KD-20: A5 gain 17 dBi @1710-2690
        KD-20: A6 weight 20 kg""",
    ),
    "a row a figure: panel, band and parameter beside each": (
        [
            ["Model", "Band", "Parameter", "Value", "Unit"],
            ["KD-20", "694-960 MHz", "Gain", 15, "dBi"],
            ["KD-20", "1710-2690 MHz", "Gain", 17, "dBi"],
            ["KD-21", "1710-2690 MHz", "Gain", 16, "dBi"],
        ],
        (),
        """KD-20: B2 operating_bands 694..960 MHz @694-960
        KD-20: D2 gain 15 dBi @694-960
        KD-20: B3 operating_bands 1710..2690 MHz @1710-2690
        KD-20: D3 gain 17 dBi @1710-2690
        KD-21: B4 frequency_range 1710..2690 MHz
        KD-21: B4 operating_bands 1710..2690 MHz @1710-2690
        KD-21: D4 gain 16 dBi @1710-2690""",
    ),
    "a model beside a list of issues, its name in the column of units": (
        [
            ["NORTHMERE LTD", _, _, _, "Issue", "Date"],
            ["Data sheet DS-22", _, _, _, "A", "14.02.2024"],
            [_, _, _, _, "B", "03.09.2024"],
            ["Model", "NM-18"],
            [],
            ["Frequency range", "MHz", "1710 to 2200"],
            ["Gain", "dBi", 17.8],
            ["Weight", "kg", 11],
        ],
        (),
        """NM-18: C6 frequency_range 1710..2200 MHz
        NM-18: C6 operating_bands 1710..2200 MHz @1710-2200
        NM-18: C7 gain 17.8 dBi @1710-2200
        NM-18: C8 weight 11 kg""",
    ),
    "a model over two tables side by side": (
        [
            ["Modello", "VC-18"],
            [],
            ["Parametro", "U.M.", "Valore", _, "Parametro", "U.M.", "Valore"],
            ["Guadagno", "dBi", 15.2, _, "Altezza", "mm", 742],
            ["ROS", _, 1.5, _, "Peso", "kg", 6.3],
        ],
        (),
        """VC-18: B1 model VC-18
        VC-18: C4 gain 15.2 dBi
        VC-18: C5 vswr 1.5
        VC-18: G4 height 0.742 m
        VC-18: G5 weight 6.3 kg""",
    ),
    "bands in gigahertz under a heading with the unit": (
        [
            ["Product", "M28"],
            [],
            ["Property", "Unit", "Frequency range [GHz]", _],
            [_, _, "24.25–27.5", "26.5–29.5"],
            ["Gain", "dBi", 27.2, 27.9],
        ],
        ("C3:D3", "A3:A4", "B3:B4"),
        """M28: B1 model M28
        M28: C4 operating_bands 24250..27500 MHz @24250-27500
        M28: D4 operating_bands 26500..29500 MHz @26500-29500
        M28: C5 gain 27.2 dBi @24250-27500
        M28: D5 gain 27.9 dBi @26500-29500""",
    ),
    "'Min | Typ | Max' again under each name is statistics, though 'Typ' heads names in German": (
        [
            ["Parameter", "Unit", "OR-M8", _, _, "OR-M10", _, _],
            [_, _, "Min", "Typ", "Max", "Min", "Typ", "Max"],
            ["Frequency", "MHz", 1710, _, 2170, 1710, _, 2170],
            ["VSWR", _, "-", 1.3, 1.5, "-", 1.4, 1.5],
        ],
        ("A1:A2", "B1:B2", "C1:E1", "F1:H1"),
        """OR-M8: C3 frequency_range 1710..2170 MHz
        OR-M8: C3 operating_bands 1710..2170 MHz @1710-2170
        OR-M8: D4 vswr 1.3 @1710-2170
        OR-M8: E4 vswr ≤1.5 @1710-2170
        OR-M10: F3 frequency_range 1710..2170 MHz
        OR-M10: F3 operating_bands 1710..2170 MHz @1710-2170
        OR-M10: G4 vswr 1.4 @1710-2170
        OR-M10: H4 vswr ≤1.5 @1710-2170""",
    ),
    "'sem' and 'com fixações' beside a merged label are two weights": (
        [["Parâmetro", "Condição", "Unidade", "MD-8"], ["Peso", "sem fixações", "kg", "7,1"],
         [_, "com fixações", "kg", "10,5"]],
        ("A2:A3",),
        """MD-8: D2 weight 7.1 kg
        MD-8: D3 weight_with_brackets 10.5 kg""",
    ),
    "the factors of a number of elements say rows and columns again, of no band": (
        [["Model", "AX-32"], ["Frequency range (MHz)", "3300-3800"], ["Gain (dBi)", 24], ["Array rows", 8],
         ["Radiating elements", "128 (8x8x2)"]],
        (),
        """AX-32: B1 model AX-32
        AX-32: B2 frequency_range 3300..3800 MHz
        AX-32: B2 operating_bands 3300..3800 MHz @3300-3800
        AX-32: B3 gain 24 dBi @3300-3800
        AX-32: B4 array_rows 8
        AX-32: B5 element_count 128
        AX-32: B5 array_rows 8
        AX-32: B5 array_columns 8
        AX-32: B5 polarisations 2""",
    ),
    "two panels beside each other, one of bands over columns, are told apart by what a panel has once": (
        [
            ["Valmora P7", _, _, _, "Valmora D7"],
            ["Parametro", "Valore", _, _, "Parametro", "694–960 MHz", "1710–2690 MHz"],
            ["Banda di frequenza (MHz)", "1710 ÷ 2690", _, _, "Guadagno (dBi)", "15,2", "17,6"],
            ["Guadagno (dBi)", "16,5", _, _, "Altezza (mm)", 1340, _],
            ["Altezza (mm)", 780, _, _, "Peso (kg)", "17,8", _],
            ["Peso (kg)", "6,4"],
        ],
        ("F4:G4", "F5:G5"),
        """Valmora P7: B3 frequency_range 1710..2690 MHz
        Valmora P7: B3 operating_bands 1710..2690 MHz @1710-2690
        Valmora P7: B4 gain 16.5 dBi @1710-2690
        Valmora P7: B5 height 0.78 m
        Valmora P7: B6 weight 6.4 kg
        Valmora D7: F2 operating_bands 694..960 MHz @694-960
        Valmora D7: G2 operating_bands 1710..2690 MHz @1710-2690
        Valmora D7: F3 gain 15.2 dBi @694-960
        Valmora D7: G3 gain 17.6 dBi @1710-2690
        Valmora D7: F4 height 1.34 m
        Valmora D7: F5 weight 17.8 kg""",
    ),
    "rows below a weight say what it is with and without": (
        [["Parametr", "Jedn.", "KD-8", "KD-9"], ["Masa", "kg"], ["bez uchwytów", "kg", 12, 13],
         ["z uchwytami", "kg", 15, 16], ["Masa (g)", _, 9000, 8000], ["– z uchwytami", _, 9500, _]],
        (),
        """KD-8: C3 weight 12 kg
        KD-8: C4 weight_with_brackets 15 kg
        KD-8: C5 weight 9 kg
        KD-8: C6 weight_with_brackets 9.5 kg
        KD-9: D3 weight 13 kg
        KD-9: D4 weight_with_brackets 16 kg
        KD-9: D5 weight 8 kg""",
    ),
}  # fmt: skip
