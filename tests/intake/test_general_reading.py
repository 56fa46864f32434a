"""Habits of bids that come in many forms; what a competent engineer reads stands beside (common practice)."""

from __future__ import annotations

from pathlib import Path

import pytest

from speccheck.intake.tables.labels import Labels
from tests.intake.sheets import Rows, line, read


def _lines(path: Path, rows: Rows, *keys: str) -> list[str]:
    submission = read(path, rows).submission
    shown = [line(p.name, r) for p in submission.panels for r in p.readings if r.parameter in keys]
    return sorted(shown)


def test_group_words_split_no_panel_and_titles_name_them(tmp_path: Path) -> None:
    def table(name: str, gain: float) -> Rows:
        electrical = [["Electrical properties"], ["Frequency (MHz)", "1710-2170"], ["Gain (dBi)", gain]]
        return [[name], *electrical, ["Mechanical properties"], ["Weight (kg)", 12.3], ["Height (mm)", 1300]]

    rows = [*table("NORDA 65-12", 17.3), [], *table("NORDA 65-08", 15.2)]
    assert _lines(tmp_path, rows, "gain", "weight") == [
        "NORDA 65-08: B12 gain 15.2 dBi @1710-2170",
        "NORDA 65-08: B14 weight 12.3 kg",
        "NORDA 65-12: B4 gain 17.3 dBi @1710-2170",
        "NORDA 65-12: B6 weight 12.3 kg",
    ]


def test_a_footnote_settles_what_its_heading_leaves_open(tmp_path: Path) -> None:
    rows = [
        ["Model", "Band (MHz)", "Gain (dBi) 1)", "SLL (dB) 2)", "Ports"],
        ["QX-201", "698-803", 14.2, 15, 2],
        ["QX-201", "824-960", 14.9, 16, 2],
        [],
        ["1) average over all tilts"],
        ["2) first upper side lobe, minimum"],
    ]
    assert _lines(tmp_path, rows, "upper_sidelobe_suppression", "rf_ports") == [
        "QX-201: D2 upper_sidelobe_suppression ≥15 dB @698-803",
        "QX-201: D3 upper_sidelobe_suppression ≥16 dB @824-960",
        "QX-201: E2 rf_ports 2",
        "QX-201: E3 rf_ports 2",
    ]
    panel = read(tmp_path, rows).submission.panels[0]
    assert {r.statistic for r in panel.readings if r.parameter == "gain"} == {"mean"}


def test_a_note_on_an_older_product_settles_nothing(tmp_path: Path) -> None:
    rows = [
        ["Model", "Band (MHz)", "Gain (dBi) 1)", "Weight (kg)"],
        ["QX-201", "698-803", 14.2, 12],
        [],
        ["1) previous model: minimum"],
    ]
    assert _lines(tmp_path, rows, "gain") == ["QX-201: C2 gain 14.2 dBi @698-803"]


def test_words_after_each_figure_give_its_plane(tmp_path: Path) -> None:
    rows = [["Panel: TP-64A"], ["Frequency: 3400-3700 MHz"], ["Configuration: 64T64R"]]
    rows += [["Element spacing: 0.5λ horizontal / 0.7λ vertical at 3.55 GHz"], ["Gain: 25.2 dBi"]]
    keys = ("horizontal_element_spacing", "vertical_element_spacing", "transceivers")
    assert _lines(tmp_path, rows, *keys) == [
        "TP-64A: A3 transceivers 64",
        "TP-64A: A4 horizontal_element_spacing 0.5 λ",
        "TP-64A: A4 vertical_element_spacing 0.7 λ",
    ]


@pytest.mark.parametrize("spacings", ["0.5λ x 0.7λ (H x V)", "0.5λ H / 0.7λ V", "V 0.7λ, H 0.5λ"])
def test_letters_beside_two_spacings_give_the_planes(tmp_path: Path, spacings: str) -> None:
    rows = [["Model", "TP-64A"], ["Gain (dBi)", 24], ["Element spacing", spacings], ["Weight (kg)", 20]]
    assert set(_lines(tmp_path, rows, "horizontal_element_spacing", "vertical_element_spacing")) == {
        "TP-64A: B3 horizontal_element_spacing 0.5 λ",
        "TP-64A: B3 vertical_element_spacing 0.7 λ",
    }


def test_two_spacings_without_planes_are_not_read(tmp_path: Path) -> None:
    rows = [["Parameter", "Value"], ["Gain (dBi)", 24], ["Element spacing", "0.5λ x 0.7λ"]]
    submission = read(tmp_path, rows).submission
    assert [u.where.cell for u in submission.unread] == ["B3"]
    assert "which plane" in submission.unread[0].reason


def test_statistics_in_the_heading_part_the_figures(tmp_path: Path) -> None:
    rows = [["Parameter", "AAU-32"], ["Frequency (MHz)", "3400-3800"], ["Gain (dBi)", 24]]
    rows += [["Power consumption, typ./max.", "520 / 780 W"], ["Layers DL/UL", "16/8"], ["Volume, l", "29"]]
    assert _lines(tmp_path, rows, "power_consumption", "mimo_layers", "uplink_layers", "volume") == [
        "AAU-32: B4 power_consumption 520 W",
        "AAU-32: B4 power_consumption ≤780 W",
        "AAU-32: B5 mimo_layers 16",
        "AAU-32: B5 uplink_layers 8",
        "AAU-32: B6 volume 29 l",
    ]


@pytest.mark.parametrize(
    "heading",
    ["Gain at tilt 2°/7°/12° (dBi)", "Gain (dBi) at 2° / 7° / 12° tilt", "Gewinn bei Absenkung 2°/7°/12°"],
)
def test_a_list_of_tilts_is_no_condition(heading: str) -> None:
    label = Labels({}).of(heading)
    assert (label.parameters, label.tilts, label.condition) == (("gain",), (2.0, 7.0, 12.0), "")


@pytest.mark.parametrize("heading", ["Bande de fréquences (MHz)", "Banda (MHz)", "Frequency band (MHz)"])
def test_a_row_has_the_band_of_its_frequency_column(tmp_path: Path, heading: str) -> None:
    rows = [["Modèle", heading, "Gain (dBi)"], ["AX-18", "1710-2170", 17.5], ["AX-09", "790-960", 15.1]]
    assert _lines(tmp_path, rows, "gain") == [
        "AX-09: C3 gain 15.1 dBi @790-960",
        "AX-18: C2 gain 17.5 dBi @1710-2170",
    ]
