"""Titles that name a panel and titles that do not: expectations by hand, as an engineer reads them."""

from __future__ import annotations

from pathlib import Path

import pytest
from intake.sheets import Rows, lines, read, save

from speccheck.intake.files.grid import Grid
from speccheck.intake.submission import read_account
from speccheck.intake.tables.names.naming import Names, model_name

_TABLE: Rows = [[], ["Gain (dBi)", 17], ["Weight (kg)", 12]]

_PAPERS = {
    "Ficha técnica Aldaya 3L": "Aldaya 3L",
    "Technisches Datenblatt Kaldora 8": "Kaldora 8",
    "Kaldora 8S – Datenblatt": "Kaldora 8S",
    "Fiche technique : Vela 12": "Vela 12",
    "Karta katalogowa Wierzba 4H": "Wierzba 4H",
    "Scheda tecnica dell'antenna Vela 12": "Vela 12",
    "Folha de dados da antena Mira 4L": "Mira 4L",
    "Productblad Kaldora 8S": "Kaldora 8S",
    "Kaldora 8S (technische specificatie)": "Kaldora 8S",
    "Data sheet: Norda 65-12": "Norda 65-12",
    "Valmora P7": "Valmora P7",
}


def _is_title(text: str) -> bool:
    return Names(Grid("Sheet1"), "bid").is_title(text)


@pytest.mark.parametrize("title", _PAPERS)
def test_a_word_for_the_paper_beside_a_name_is_none_of_it(title: str, tmp_path: Path) -> None:
    (panel,) = read(tmp_path, [[title], *_TABLE]).submission.panels
    assert (panel.name, _is_title(title)) == (_PAPERS[title], True)


@pytest.mark.parametrize(
    "text",
    ["Section A1", "Ports P1", "Anexo A1", "Tabelle B2", "Array R1", "Gelb Y1", "Datenblatt 2026",
     "Data sheet page 2", "Specification Rev 3", "Datasheet Lot 2", "Ficha técnica"],
)  # fmt: skip
def test_a_part_of_a_paper_names_no_panel(text: str) -> None:
    assert not _is_title(text)


def test_the_name_of_a_sheet_that_ends_its_title_is_the_panels(tmp_path: Path) -> None:
    sheets = {name: [[f"Karta wyrobu {name}"], *_TABLE] for name in ("Aldaya 3L", "Aldaya 2L")}
    account = read_account(save(tmp_path / "bid.xlsx", sheets))
    assert [panel.name for panel in account.submission.panels] == ["Aldaya 3L", "Aldaya 2L"]


def test_a_title_with_more_of_the_name_than_its_sheet_keeps_it(tmp_path: Path) -> None:
    account = read_account(save(tmp_path / "bid.xlsx", {"KD-12": [["Vela KD-12"], *_TABLE]}))
    assert lines(account)[0].startswith("Vela KD-12: ") and model_name("Vela KD-12") == "Vela KD-12"


@pytest.mark.parametrize(
    "title",
    [
        "Antenna type {}",
        "Panel {}",
        "Type d'antenne {}",
        "Antena tipo {}",
        "Typ anteny {}",
        "Antenna type no. {}",
    ],
)
@pytest.mark.parametrize("counts", [("1", "2"), ("A", "B"), ("I", "II")])
def test_counted_types_over_columns_are_two_panels(
    title: str, counts: tuple[str, str], tmp_path: Path
) -> None:
    names = [title.format(count) for count in counts]
    rows = [["Parameter", *names], ["Frequency range (MHz)", "694-960", "1710-2690"], ["Gain (dBi)", 15, 17]]
    panels = read(tmp_path, rows).submission.panels
    assert [(p.name, p.readings[-1].value) for p in panels] == [(names[0], 15), (names[1], 17)]


@pytest.mark.parametrize("names", [("Klein", "Gross"), ("", "")])
def test_contrary_tables_beside_each_other_are_no_one_panel(names: tuple[str, str], tmp_path: Path) -> None:
    rows = [
        [names[0], "", "", names[1]],
        ["Parameter", "Value", "", "Parameter", "694-960 MHz", "1710-2690 MHz"],
        ["Gain (dBi)", 16.5, "", "Gain (dBi)", 15.2, 17.6],
        ["Height (mm)", 780, "", "Height (mm)", 1340],
        ["Weight (kg)", 6.4, "", "Weight (kg)", 17.8],
    ]
    panels = read(tmp_path, rows, ["E4:F4", "E5:F5"]).submission.panels
    gains = [[r.value for r in panel.readings if r.parameter == "gain"] for panel in panels]
    assert sorted(gains) == [[15.2, 17.6], [16.5]] and panels[0].name != panels[1].name


@pytest.mark.parametrize("corner", ["Parameter", None])
@pytest.mark.parametrize("heads", [("Min", "Typ"), ("694-960 MHz", "1710-2690 MHz"), ("Value", "Value")])
def test_a_row_of_models_over_a_row_of_headings_names_the_columns(
    corner: str | None, heads: tuple[str, str], tmp_path: Path
) -> None:
    rows = [["Model", "KD-8", None, "KD-9", None], [corner, *heads, *heads], ["Gain (dBi)", 16, 18, 17, 19]]
    panels = read(tmp_path, rows, ["B1:C1", "D1:E1"]).submission.panels
    gains = {panel.name: [r.value for r in panel.readings if r.parameter == "gain"] for panel in panels}
    assert gains == {"KD-8": [16, 18], "KD-9": [17, 19]}


@pytest.mark.parametrize(
    "note",
    [
        "Ersetzt RHN-65-17 (Gewinn 16,9 dBi).",
        "Replaces RHN-65-17",
        "Remplace RHN-65-17",
    ],
)
def test_what_a_panel_replaces_is_not_its_name(note: str, tmp_path: Path) -> None:
    path = save(tmp_path / "bid.xlsx", {"Datenblatt": [["Sektorantenne RHN-65-18"], [note], *_TABLE]})
    (panel,) = read_account(path).submission.panels
    assert panel.name == "RHN-65-18"


def test_a_sheet_called_after_the_paper_names_no_panel(tmp_path: Path) -> None:
    rows: Rows = [["Karta katalogowa"], ["Antena sektorowa", "WISLANA 3P65-16"], *_TABLE]
    (panel,) = read_account(save(tmp_path / "bid.xlsx", {"Karta katalogowa": rows})).submission.panels
    assert panel.name == "WISLANA 3P65-16"
