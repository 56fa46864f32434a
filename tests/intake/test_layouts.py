"""Each layout a bidder may use, read as a competent engineer reads it (expectations by hand)."""

from __future__ import annotations

from pathlib import Path

import pytest
from intake.sheets import Rows, lines, read, save

from speccheck.intake.submission import read_account

_ = None

LAYOUTS: dict[str, tuple[Rows, tuple[str, ...], str]] = {
    "parameters down, one panel": (
        [
            ["Type QX-22"],
            [],
            ["Parameter", "Value"],
            ["Frequency range", "1710 – 2170 MHz"],
            ["Gain", "17.5 ± 0.5 dBi"],
        ],
        (),
        """QX-22: B4 frequency_range 1710..2170 MHz
        QX-22: B4 operating_bands 1710..2170 MHz @1710-2170
        QX-22: B5 gain 17.5±0.5 dBi @1710-2170""",
    ),
    "bands across under a merged heading, a value for all bands merged": (
        [
            ["Panel QX-22"],
            ["Parameter", "Unit", "Frequency range 1695 – 2690", _],
            [_, _, "1695-1880", "2300-2690"],
            ["Gain", "dBi", 17, 18],
            ["VSWR", "–", "< 1.5", _],
            ["Tolerance on gain", "dB", "± 0.4", _],
            ["Height", "mm", 1300, _],
        ],
        ("A2:A3", "B2:B3", "C2:D2", "C5:D5", "C6:D6", "C7:D7"),
        """QX-22: C2 frequency_range 1695..2690 MHz
        QX-22: C3 operating_bands 1695..1880 MHz @1695-1880
        QX-22: D3 operating_bands 2300..2690 MHz @2300-2690
        QX-22: C4 gain 17±0.4 dBi @1695-1880
        QX-22: D4 gain 18±0.4 dBi @2300-2690
        QX-22: C5 vswr ≤1.5
        QX-22: C7 height 1.3 m""",
    ),
    "bands in a frequency row": (
        [
            ["Sector panel QX-22"],
            ["Frequency range (MHz)", "698-960", "1710-2170"],
            ["Gain (dBi)", 15.5, 17.2],
            ["Weight (kg)", 25],
        ],
        (),
        """QX-22: B2 operating_bands 698..960 MHz @698-960
        QX-22: C2 operating_bands 1710..2170 MHz @1710-2170
        QX-22: B3 gain 15.5 dBi @698-960
        QX-22: C3 gain 17.2 dBi @1710-2170
        QX-22: B4 weight 25 kg""",
    ),
    "band names of the standard across": (
        [["Parameter", "n78", "n41"], ["Gain", "24 dBi", "23.5 dBi"]],
        (),
        """bid: B1 operating_bands 3300..3800 MHz @3300-3800
        bid: C1 operating_bands 2496..2690 MHz @2496-2690
        bid: B2 gain 24 dBi @3300-3800
        bid: C2 gain 23.5 dBi @2496-2690""",
    ),
    "one row a panel": (
        [
            ["Offer of Veldt"],
            [],
            ["Model", "Frequency (MHz)", "Gain (dBi)", "Weight (kg)"],
            ["VD-1", "1710-2170", 17.5, 12],
            ["VD-2", "698-960", 15.1, 21],
        ],
        (),
        """VD-1: B4 frequency_range 1710..2170 MHz
        VD-1: B4 operating_bands 1710..2170 MHz @1710-2170
        VD-1: C4 gain 17.5 dBi @1710-2170
        VD-1: D4 weight 12 kg
        VD-2: B5 frequency_range 698..960 MHz
        VD-2: B5 operating_bands 698..960 MHz @698-960
        VD-2: C5 gain 15.1 dBi @698-960
        VD-2: D5 weight 21 kg""",
    ),
    "one row a panel and band, units below the headings": (
        [
            ["Model", "Band", "Gain", "Weight"],
            [_, "MHz", "dBi", "kg"],
            ["VD-1", "1710-1880", 17.1, 12],
            [_, "1920-2170", 17.5, _],
        ],
        (),
        """VD-1: B3 operating_bands 1710..1880 MHz @1710-1880
        VD-1: C3 gain 17.1 dBi @1710-1880
        VD-1: D3 weight 12 kg
        VD-1: B4 operating_bands 1920..2170 MHz @1920-2170
        VD-1: C4 gain 17.5 dBi @1920-2170""",
    ),
    "two-level headings across": (
        [
            ["Model", "Gain (dBi)", _, "Height (mm)"],
            [_, "1710-1880", "1920-2170", _],
            ["VD-1", 17.1, 17.6, 1300],
        ],
        ("B1:C1", "A1:A2", "D1:D2"),
        """VD-1: B3 gain 17.1 dBi @1710-1880
        VD-1: C3 gain 17.6 dBi @1920-2170
        VD-1: D3 height 1.3 m""",
    ),
    "bands over parameters across": (
        [
            ["Type", "698-960 MHz", _, "1710-2690 MHz", _],
            [_, "Gain (dBi)", "VSWR", "Gain (dBi)", "VSWR"],
            ["VD-1", 15.1, 1.5, 17.6, 1.4],
        ],
        ("B1:C1", "D1:E1"),
        """VD-1: B3 gain 15.1 dBi @698-960
        VD-1: C3 vswr 1.5 @698-960
        VD-1: D3 gain 17.6 dBi @1710-2690
        VD-1: E3 vswr 1.4 @1710-2690""",
    ),
    "panels across with spacer columns, conditions and a label that continues": (
        [
            ["Parameter", "Condition", "Unit", _, "OS-15", _, "OS-17"],
            ["Frequency range", _, "MHz", _, "1710–2690", _, "1710–2690"],
            ["Gain", "1710–2170 MHz", "dBi", _, "13.8 ±0.5", _, 17],
            [_, "2300–2690 MHz", "dBi", _, 14.8, _, "–"],
            ["Weight", "without brackets", "kg", _, 5.1, _, 9],
            [_, "with brackets", "kg", _, 8.5, _, 12],
        ],
        ("A3:A4",),
        """OS-15: E2 frequency_range 1710..2690 MHz
        OS-15: E3 gain 13.8±0.5 dBi @1710-2170
        OS-15: E4 gain 14.8 dBi @2300-2690
        OS-15: E5 weight 5.1 kg
        OS-15: E6 weight_with_brackets 8.5 kg
        OS-17: G2 frequency_range 1710..2690 MHz
        OS-17: G3 gain 17 dBi @1710-2170
        OS-17: G5 weight 9 kg
        OS-17: G6 weight_with_brackets 12 kg""",
    ),
    "questions and answers: only the offer is a claim": (
        [
            ["Item", "Parameter", "Required", "Offered", "Comply", "Remarks"],
            [1, "Gain", "≥ 17 dBi", "17.5 dBi", "Comply", "see annex"],
            [2, "VSWR", "≤ 1.5", "1.4", "Yes", _],
            [3, "Isolation", "≥ 30 dB", _, "comply", _],
            [4, "Weight", "≤ 25 kg", "TBD", "Comply", _],
        ],
        (),
        """bid: D2 gain 17.5 dBi
        bid: D3 vswr 1.4""",
    ),
    "pasted lines": (
        [
            ["Antenna type: ZZ-77"],
            ["Frequency range: 1710-2170 MHz"],
            ["Gain: 17.5 ± 0.5 dBi"],
            ["VSWR: < 1.5:1"],
        ],
        (),
        """ZZ-77: A2 frequency_range 1710..2170 MHz
        ZZ-77: A2 operating_bands 1710..2170 MHz @1710-2170
        ZZ-77: A3 gain 17.5±0.5 dBi @1710-2170
        ZZ-77: A4 vswr ≤1.5 @1710-2170""",
    ),
    "two tables side by side": (
        [
            ["Electrical", _, _, "Mechanical", _],
            ["Gain", "17 dBi", _, "Height", "1300 mm"],
            ["VSWR", "< 1.5", _, "Width", "160 mm"],
        ],
        (),
        """bid: B2 gain 17 dBi
        bid: B3 vswr ≤1.5
        bid: E2 height 1.3 m
        bid: E3 width 0.16 m""",
    ),
    "tables below one another": (
        [
            ["Type KA-1"],
            ["Parameter", "Value"],
            ["Gain", "17 dBi"],
            ["VSWR", "<1.5"],
            [],
            ["Type KA-2"],
            ["Parameter", "Value"],
            ["Gain", "15 dBi"],
            ["VSWR", "<1.4"],
        ],
        (),
        """KA-1: B3 gain 17 dBi
        KA-1: B4 vswr ≤1.5
        KA-2: B8 gain 15 dBi
        KA-2: B9 vswr ≤1.4""",
    ),
    "bands below one another under group rows": (
        [
            ["Panel KB-9"],
            ["Parameter", "Value"],
            ["Height", "1300 mm"],
            ["Band 1: 1695-1880 MHz"],
            ["Gain", "17 dBi"],
            ["Band 2: 2300-2690 MHz"],
            ["Gain", "18 dBi"],
        ],
        (),
        """KB-9: B3 height 1.3 m
        KB-9: A4 operating_bands 1695..1880 MHz @1695-1880
        KB-9: B5 gain 17 dBi @1695-1880
        KB-9: A6 operating_bands 2300..2690 MHz @2300-2690
        KB-9: B7 gain 18 dBi @2300-2690""",
    ),
    "a list of figures for a list of bands": (
        [
            ["Parameter", "KB-9"],
            ["Frequency range", "1695-1880 / 1850-1990 / 2300-2690 MHz"],
            ["Gain", "16.2 / 16.8 / 17.1 dBi"],
        ],
        (),
        """KB-9: B2 operating_bands 1695..1880 MHz @1695-1880
        KB-9: B2 operating_bands 1850..1990 MHz @1850-1990
        KB-9: B2 operating_bands 2300..2690 MHz @2300-2690
        KB-9: B3 gain 16.2 dBi @1695-1880
        KB-9: B3 gain 16.8 dBi @1850-1990
        KB-9: B3 gain 17.1 dBi @2300-2690""",
    ),
    "minimum, typical and maximum in columns": (
        [["Parameter", "Unit", "Min", "Typ", "Max"], ["Gain", "dBi", 16.5, 17, _], ["VSWR", _, _, 1.3, 1.5]],
        (),
        """bid: C2 gain ≥16.5 dBi
        bid: D2 gain 17 dBi
        bid: D3 vswr 1.3
        bid: E3 vswr ≤1.5""",
    ),
    "bands as merged labels at the side": (
        [
            [_, "Parameter", "Value"],
            ["698-960 MHz", "Gain", "15 dBi"],
            [_, "VSWR", "<1.5"],
            ["1710-2690 MHz", "Gain", "17 dBi"],
            [_, "VSWR", "<1.4"],
            ["General", "Weight", "20 kg"],
        ],
        ("A2:A3", "A4:A5"),
        """bid: A2 operating_bands 698..960 MHz @698-960
        bid: C2 gain 15 dBi @698-960
        bid: C3 vswr ≤1.5 @698-960
        bid: A4 operating_bands 1710..2690 MHz @1710-2690
        bid: C4 gain 17 dBi @1710-2690
        bid: C5 vswr ≤1.4 @1710-2690
        bid: C6 weight 20 kg""",
    ),
    "a model row over merged band columns": (
        [
            ["Model", "A-1", _, "A-2", _],
            ["Frequency range (MHz)", "1710-1880", "1920-2170", "698-806", "790-960"],
            ["Gain (dBi)", 17, 17.5, 15, 15.4],
            ["Weight (kg)", 11, _, 22, _],
        ],
        ("B1:C1", "D1:E1", "B4:C4", "D4:E4"),
        """A-1: B2 operating_bands 1710..1880 MHz @1710-1880
        A-1: C2 operating_bands 1920..2170 MHz @1920-2170
        A-1: B3 gain 17 dBi @1710-1880
        A-1: C3 gain 17.5 dBi @1920-2170
        A-1: B4 weight 11 kg
        A-2: D2 operating_bands 698..806 MHz @698-806
        A-2: E2 operating_bands 790..960 MHz @790-960
        A-2: D3 gain 15 dBi @698-806
        A-2: E3 gain 15.4 dBi @790-960
        A-2: D4 weight 22 kg""",
    ),
    "repeated heading rows and group rows": (
        [
            ["Model", "Gain (dBi)", "VSWR"],
            ["Alpha", 17, 1.5],
            ["Model", "Gain (dBi)", "VSWR"],
            ["Beta", 15, 1.4],
            ["Dual band types"],
            ["Gamma", 14, 1.3],
        ],
        (),
        """Alpha: B2 gain 17 dBi
        Alpha: C2 vswr 1.5
        Beta: B4 gain 15 dBi
        Beta: C4 vswr 1.4
        Gamma: B6 gain 14 dBi
        Gamma: C6 vswr 1.3""",
    ),
}


@pytest.mark.parametrize("layout", LAYOUTS)
def test_layout(tmp_path: Path, layout: str) -> None:
    rows, merges, expected = LAYOUTS[layout]
    account = read(tmp_path, rows, merges)
    wanted = [text.strip() for text in expected.splitlines()]
    found = [text for text in lines(account) if " model " not in text]
    assert sorted(found) == sorted(wanted)


@pytest.mark.parametrize("layout", LAYOUTS)
def test_every_filled_cell_is_accounted_for(tmp_path: Path, layout: str) -> None:
    rows, merges, _expected = LAYOUTS[layout]
    account = read(tmp_path, rows, merges)
    filled = {cell.cell for sheet in account.submission.mirror for cell in sheet.cells}
    assert len(account.roles) == len(filled)


def test_panel_spread_over_sheets_with_cover_and_note(tmp_path: Path) -> None:
    path = save(
        tmp_path / "bid.xlsx",
        {
            "Cover": [
                ["Tender response"],
                ["Bidder", "Foo"],
                ["Model", "MM-17"],
                ["Gain 16 dBi of revision A is superseded."],
            ],
            "Electrical": [
                ["Parameter", "Value"],
                ["Gain", "17 dBi 1)"],
                ["VSWR", "1.4"],
                [],
                ["1) at mid band"],
            ],
            "Mechanical": [["Parameter", "Value"], ["Height", "1300 mm"]],
        },
    )
    account = read_account(path)
    assert [panel.name for panel in account.submission.panels] == ["MM-17"]
    assert [text for text in lines(account) if "gain" in text] == ["MM-17: B2 gain 17 dBi"]
    gain = next(r for r in account.submission.panels[0].readings if r.parameter == "gain")
    assert "at mid band" in gain.condition
    assert gain.where.sheet == "Electrical"
    assert any("superseded" in notice.text for notice in account.submission.notices)


def test_house_headings_are_taken_in(tmp_path: Path) -> None:
    rows = [["Parameter", "Value"], ["Quay rating", "150 km/h"], ["Gain", "17 dBi"]]
    plain = read(tmp_path, rows)
    assert [item.where.cell for item in plain.submission.unread] == ["B2"]
    house = read(tmp_path, rows, headings={"Quay rating": "survival_wind_speed"})
    assert any("survival_wind_speed" in text for text in lines(house))


def test_a_column_of_slack_under_a_merged_heading_is_no_second_figure(tmp_path: Path) -> None:
    rows: Rows = [
        ["Type", "Frequency (MHz)", "Gain", None],
        [None, None, "dBi", "± dB"],
        ["K-1", "1710-2170", 17.2, 0.5],
    ]
    (panel,) = read(tmp_path, rows, ["C1:D1"]).submission.panels
    (gain,) = panel.all("gain")
    assert (gain.value, gain.tolerance, gain.where.cell) == (17.2, 0.5, "C3")
