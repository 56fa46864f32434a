"""Small bids, each with one structure, and their readings by hand: rows, merges, expected lines."""

from __future__ import annotations

from intake.sheets import Rows

_ = None

STRUCTURES: dict[str, tuple[Rows, tuple[str, ...], str]] = {
    "group rows first, merged and in the middle; page numbers, sums, repeated headings": (
        [
            ["Type", "Freq. (MHz)", "Gain (dBi)", "VSWR", "Ports"],
            ["Family A – 700/900 MHz"],
            ["VD-1", "694-960", 15, 1.5, 2],
            [],
            ["Page 1 of 2"],
            ["Type", "Freq. (MHz)", "Gain (dBi)", "VSWR", "Ports"],
            ["Family B", "1 model"],
            ["VD-2", "1710-2690", 17, 1.4, 4],
            ["Total", _, _, _, 6],
        ],
        ("A2:E2",),
        """VD-1: B3 frequency_range 694..960 MHz
        VD-1: B3 operating_bands 694..960 MHz @694-960
        VD-1: C3 gain 15 dBi @694-960
        VD-1: D3 vswr 1.5 @694-960
        VD-1: E3 rf_ports 2
        VD-2: B8 frequency_range 1710..2690 MHz
        VD-2: B8 operating_bands 1710..2690 MHz @1710-2690
        VD-2: C8 gain 17 dBi @1710-2690
        VD-2: D8 vswr 1.4 @1710-2690
        VD-2: E8 rf_ports 4""",
    ),
    "bands in titles over stacked tables of the same models": (
        [
            ["Banda bassa 694–960 MHz"],
            ["Modello", "Guadagno [dBi]", "ROS"],
            ["MONTE 15", 14.1, 1.5],
            ["MONTE 17", 15.1, 1.5],
            [],
            ["Banda alta 1695–2690 MHz"],
            ["Modello", "Guadagno [dBi]", "ROS"],
            ["MONTE 15", 17.3, 1.4],
            ["MONTE 17", 18.3, 1.4],
        ],
        ("A1:C1", "A6:C6"),
        """MONTE 15: A1 operating_bands 694..960 MHz @694-960
        MONTE 15: B3 gain 14.1 dBi @694-960
        MONTE 15: C3 vswr 1.5 @694-960
        MONTE 15: A6 operating_bands 1695..2690 MHz @1695-2690
        MONTE 15: B8 gain 17.3 dBi @1695-2690
        MONTE 15: C8 vswr 1.4 @1695-2690
        MONTE 17: A1 operating_bands 694..960 MHz @694-960
        MONTE 17: B4 gain 15.1 dBi @694-960
        MONTE 17: C4 vswr 1.5 @694-960
        MONTE 17: A6 operating_bands 1695..2690 MHz @1695-2690
        MONTE 17: B9 gain 18.3 dBi @1695-2690
        MONTE 17: C9 vswr 1.4 @1695-2690""",
    ),
    "a quantity over sub-bands beside the whole range of the panel": (
        [
            ["Model", "Frequency range (MHz)", "Gain (dBi)", _, "VSWR"],
            [_, _, "1710-1880", "2300-2690", _],
            ["VD-1", "1710-2690", 17.1, 17.9, 1.5],
        ],
        ("C1:D1", "A1:A2", "B1:B2", "E1:E2"),
        """VD-1: B3 frequency_range 1710..2690 MHz
        VD-1: C3 gain 17.1 dBi @1710-1880
        VD-1: D3 gain 17.9 dBi @2300-2690
        VD-1: E3 vswr 1.5""",
    ),
    "other bands over a repeated heading row begin another table": (
        [
            [_, "694-960 MHz", "1710-2170 MHz", _],
            ["Model", "Gain (dBi)", "Gain (dBi)", "Weight (kg)"],
            ["VD-1", 15, 17, 20],
            [],
            [_, "1710-2170 MHz", "2500-2690 MHz", _],
            ["Model", "Gain (dBi)", "Gain (dBi)", "Weight (kg)"],
            ["VD-2", 17.5, 18, 14],
        ],
        (),
        """VD-1: B3 gain 15 dBi @694-960
        VD-1: C3 gain 17 dBi @1710-2170
        VD-1: D3 weight 20 kg
        VD-2: B7 gain 17.5 dBi @1710-2170
        VD-2: C7 gain 18 dBi @2500-2690
        VD-2: D7 weight 14 kg""",
    ),
    "merged down over all rows of a panel, over some, and blank below the first": (
        [
            ["Model", "Band (MHz)", "Gain (dBi)", "VSWR", "Isolation (dB)", "Ports total", "Height (mm)"],
            ["VD-1", "694-960", 15, 1.5, 28, 6, 1300],
            [_, "1710-2170", 17, _, 30, _, _],
            [_, "2300-2690", 17.5, _, _, _, _],
        ],
        ("A2:A4", "D2:D4", "E3:E4", "G2:G4"),
        """VD-1: B2 operating_bands 694..960 MHz @694-960
        VD-1: C2 gain 15 dBi @694-960
        VD-1: D2 vswr 1.5
        VD-1: E2 port_isolation 28 dB @694-960
        VD-1: F2 rf_ports 6
        VD-1: G2 height 1.3 m
        VD-1: B3 operating_bands 1710..2170 MHz @1710-2170
        VD-1: C3 gain 17 dBi @1710-2170
        VD-1: E3 port_isolation 30 dB @1710-2170
        VD-1: E3 port_isolation 30 dB @2300-2690
        VD-1: B4 operating_bands 2300..2690 MHz @2300-2690
        VD-1: C4 gain 17.5 dBi @2300-2690""",
    ),
    "ports said again of each array beside a height said once": (
        [
            ["Type", "Array", "Frequency (MHz)", "Ports", "Gain (dBi)", "Height (mm)"],
            ["TM-4", "R1", "694-960", 2, 15, 1300],
            [_, "Y1", "1695-2690", 2, 18, _],
        ],
        ("A2:A3", "F2:F3"),
        """TM-4: C2 operating_bands 694..960 MHz @694-960
        TM-4: D2 rf_ports 2 @694-960
        TM-4: E2 gain 15 dBi @694-960
        TM-4: F2 height 1.3 m
        TM-4: C3 operating_bands 1695..2690 MHz @1695-2690
        TM-4: D3 rf_ports 2 @1695-2690
        TM-4: E3 gain 18 dBi @1695-2690""",
    ),
    "a row a tilt": (
        [
            ["Type", "Freq. (MHz)", "Tilt", "Gain (dBi)"],
            ["TM-4", "694-960", "0°", 15],
            [_, _, "10°", 14.6],
        ],
        (),
        """TM-4: B2 frequency_range 694..960 MHz
        TM-4: B2 operating_bands 694..960 MHz @694-960
        TM-4: D2 gain 15 dBi @694-960
        TM-4: D3 gain 14.6 dBi @694-960""",
    ),
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
}
