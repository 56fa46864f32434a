"""Small bids with headings across, one structure each; rows, merges, and their readings by hand."""

from __future__ import annotations

from intake.sheets import Rows

_ = None

ACROSS: dict[str, tuple[Rows, tuple[str, ...], str]] = {
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
    "counts with their nouns beside headings of groups": (
        [
            ["Unit", _, "Array", _],
            ["Model", "Band (MHz)", "Antenna array", "Sub-array (V x H)"],
            ["SAU-64", "3400 - 3800", "192 elements (12x8x2)", "3 x 1"],
            ["SAU-32", "３３００～３８００", "128 elements (8x8x2)", "4 x 1"],
        ],
        ("A1:B1", "C1:D1"),
        """SAU-64: B3 frequency_range 3400..3800 MHz
        SAU-64: B3 operating_bands 3400..3800 MHz @3400-3800
        SAU-64: C3 element_count 192
        SAU-64: C3 array_rows 12
        SAU-64: C3 array_columns 8
        SAU-64: C3 polarisations 2
        SAU-64: D3 subarray_rows 3
        SAU-64: D3 subarray_columns 1
        SAU-32: B4 frequency_range 3300..3800 MHz
        SAU-32: B4 operating_bands 3300..3800 MHz @3300-3800
        SAU-32: C4 element_count 128
        SAU-32: C4 array_rows 8
        SAU-32: C4 array_columns 8
        SAU-32: C4 polarisations 2
        SAU-32: D4 subarray_rows 4
        SAU-32: D4 subarray_columns 1""",
    ),
    "a row that numbers the columns, and ditto marks": (
        [
            ["Model", "Band (MHz)", "Gain (dBi)", "VSWR"],
            ["(1)", "(2)", "(3)", "(4)"],
            ["VD-1", "694-960", 15, 1.5],
            ["VD-2", '"', 16, "ditto"],
        ],
        (),
        """VD-1: B3 frequency_range 694..960 MHz
        VD-1: B3 operating_bands 694..960 MHz @694-960
        VD-1: C3 gain 15 dBi @694-960
        VD-1: D3 vswr 1.5 @694-960
        VD-2: B4 frequency_range 694..960 MHz
        VD-2: B4 operating_bands 694..960 MHz @694-960
        VD-2: C4 gain 16 dBi @694-960
        VD-2: D4 vswr 1.5 @694-960""",
    ),
    "answers made of words that head columns elsewhere": (
        [
            ["Antenna", "Band (MHz)", "Gain (dBi)", "Polarisation", "Radome material"],
            ["Kite 65", "694-960", 15, "Dual polarisation", "Radome of GRP"],
            ["Wind Star", "1710-2690", 17, "Dual polarisation", "Radome of GRP"],
        ],
        (),
        """Kite 65: B2 frequency_range 694..960 MHz
        Kite 65: B2 operating_bands 694..960 MHz @694-960
        Kite 65: C2 gain 15 dBi @694-960
        Kite 65: D2 polarisations 2
        Kite 65: E2 radome_material Radome of GRP
        Wind Star: B3 frequency_range 1710..2690 MHz
        Wind Star: B3 operating_bands 1710..2690 MHz @1710-2690
        Wind Star: C3 gain 17 dBi @1710-2690
        Wind Star: D3 polarisations 2
        Wind Star: E3 radome_material Radome of GRP""",
    ),
    "families merged beside part numbers, ranges under an unknown heading": (
        [
            ["Family", "Part no.", "NR range (MHz)", "Gain (dBi)"],
            ["Tor", "WT-04", "694-960", 14.3],
            [_, "WT-06", "694-960", 16.1],
        ],
        ("A2:A3",),
        """WT-04: A2 panel_type Tor
        WT-04: C2 frequency_range 694..960 MHz
        WT-04: C2 operating_bands 694..960 MHz @694-960
        WT-04: D2 gain 14.3 dBi @694-960
        WT-06: A2 panel_type Tor
        WT-06: C3 frequency_range 694..960 MHz
        WT-06: C3 operating_bands 694..960 MHz @694-960
        WT-06: D3 gain 16.1 dBi @694-960""",
    ),
}
