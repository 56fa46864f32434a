"""Roles of columns that no heading word settles, judged by what stands in them."""

from __future__ import annotations

import re

from speccheck.intake.files.grid import Cell
from speccheck.intake.tables.columns import VALUE_ROLES, Column
from speccheck.intake.tables.labels import is_unit
from speccheck.intake.tables.versions import settle_versions
from speccheck.intake.tables.words import answer, bound_of, column_role

_WORD_FIRST = re.compile(r"\s*[^\W\d_]{4,}")
_MOSTLY = 0.6
_BOUNDS = 0.75
"""Share of cells that must be words such as 'max.' where a column says what the figures beside it bound."""
_ANSWERS, _SILENT = 0.6, 0.4
"""Shares of cells from which on, and up to which, a column is surely one of values, or of none."""


def settle_roles(
    columns: dict[int, Column], cells: dict[int, list[Cell]], shares: dict[int, float | None]
) -> None:
    """Give each column without a role the one its cells speak for.

    Parameters
    ----------
    columns, cells : headings and cells by column
    shares : share of the cells that could be values of their rows' labels, where that can be told
    """
    for index, column in columns.items():
        if _holds_bounds(cells.get(index, [])):
            column.role = "bound"
        if not column.role and not column.band and not column.band_name:
            column.role = _by_content(column, cells.get(index, []))
    _beside_the_values(columns, cells, shares)
    _scribbles(columns, cells)
    _band_columns(columns, cells)
    _conditions_before_units(columns, cells)
    _details_before_values(columns, cells)
    _offer_beside_requirement(columns)
    _several_offers(columns)
    settle_versions(columns)
    if not any(c.role in ("", "offered", "panel", "typical", "minimum", "maximum") for c in columns.values()):
        for column in columns.values():
            if column.role in ("condition", "compliance", "group", "band"):
                column.role = ""
                break


def _holds_bounds(cells: list[Cell]) -> bool:
    """Whether a column says of the figures beside it what they bound: 'mini', 'max.', '≥'."""
    if not all(isinstance(cell.raw, str) for cell in cells):
        return False
    bounds = [bound_of(cell.text) for cell in cells]
    telling = sum(bound in ("minimum", "maximum", "typical") for bound in bounds)
    return 2 * telling > len(cells) and sum(map(bool, bounds)) >= _BOUNDS * len(cells)


def _by_content(column: Column, cells: list[Cell]) -> str:
    if not cells:
        return ""
    texts = [c.text for c in cells if isinstance(c.raw, str)]
    units = sum(is_unit(text) for text in texts)
    dashes = sum(text.strip() in ("-", "–", "—") for text in texts)
    if units - dashes >= 1 and units >= (0.9 if column.words else 0.6) * len(cells):
        return "unit"
    answers = sum(bool(answer(text)) for text in texts)
    if answers >= 2 and answers >= (0.9 if column.words else 0.7) * len(cells):
        return "compliance"
    wordy = sum(len(text) > 25 and not any(letter.isdigit() for letter in text) for text in texts)
    if wordy >= 0.6 * len(cells) and not column.words:
        return "remark"
    return ""


def _beside_the_values(
    columns: dict[int, Column], cells: dict[int, list[Cell]], shares: dict[int, float | None]
) -> None:
    """A column whose cells do not answer for the labels details them, or remarks on the values before it."""
    values = [
        i for i, share in shares.items() if (share or 0.0) >= _ANSWERS and columns[i].role in VALUE_ROLES
    ]
    for index, share in shares.items():
        if not columns[index].role and share is not None and share < _SILENT and values:
            texts = all(isinstance(cell.raw, str) for cell in cells.get(index, []))
            columns[index].role = "condition" if index < values[0] and texts else "remark"
            columns[index].guessed = bool(columns[index].words)
    _beside_the_offer(columns, shares)


def _beside_the_offer(columns: dict[int, Column], shares: dict[int, float | None]) -> None:
    """Beside a column named as the offer, one of unknown heading that answers for nothing is none."""
    if not any(c.role == "offered" and not c.words for c in columns.values()):
        return
    for index, share in shares.items():
        if not columns[index].role and columns[index].words and (share or 0.0) < _ANSWERS:
            columns[index].role, columns[index].guessed = "remark", True


def _scribbles(columns: dict[int, Column], cells: dict[int, list[Cell]]) -> None:
    """Words without a heading, behind figures that fill as many rows, are remarks: 'measured 2025-11-03'."""
    wordy = {index: _share_of_words(cells.get(index, [])) for index in columns}
    for index, column in columns.items():
        before = [
            i
            for i, c in columns.items()
            if i < index and c.role in VALUE_ROLES and len(cells.get(i, ())) >= len(cells.get(index, ()))
        ]
        bare = not (column.role or column.cells or column.band or column.band_name)
        if bare and wordy[index] > _MOSTLY and any(wordy[i] < 1 - _MOSTLY for i in before):
            column.role = "remark"


def _share_of_words(cells: list[Cell]) -> float:
    words = sum(isinstance(cell.raw, str) and _WORD_FIRST.match(cell.text) is not None for cell in cells)
    return words / len(cells) if cells else 0.0


def _band_columns(columns: dict[int, Column], cells: dict[int, list[Cell]]) -> None:
    """A column headed 'Band' holds the band of its row, unless it is the only column of values."""
    for index, column in columns.items():
        if column.role == "band" and not cells.get(index):
            column.role = ""


def _conditions_before_units(columns: dict[int, Column], cells: dict[int, list[Cell]]) -> None:
    """Between the headings and the unit column stand conditions, when values follow the units."""
    units = [index for index, column in columns.items() if column.role == "unit"]
    if not units:
        return
    after = [i for i, c in columns.items() if i > units[0] and c.role == "" and cells.get(i)]
    before = [i for i, c in columns.items() if i < units[0] and c.role == "" and cells.get(i)]
    if not after:
        return
    for index in before:
        texts = [c for c in cells[index] if isinstance(c.raw, str)]
        if not columns[index].words and len(texts) == len(cells[index]):
            columns[index].role = "condition"


def _several_offers(columns: dict[int, Column]) -> None:
    """Columns 'Bidder A' and 'Bidder B' are two offers, each with its own name; 'Guaranteed' names none."""
    offers = [c for c in columns.values() if c.role == "offered" and c.cells and not (c.band or c.band_name)]
    offers = [c for c in offers if not all(column_role(cell.text) for cell in c.cells)]
    if len({c.heading for c in offers}) > 1 and not any(c.words for c in offers):
        for column in offers:
            column.words, column.name_cell = [column.heading], column.cells[-1]


def _details_before_values(columns: dict[int, Column], cells: dict[int, list[Cell]]) -> None:
    """Words such as 'horizontal' and 'vertical' between the labels and the first column of figures."""
    plain = [i for i, c in columns.items() if c.role == "" and not c.words and not c.band and not c.band_name]
    figures = [
        i for i, c in columns.items() if c.role in VALUE_ROLES and _share_of_figures(cells.get(i, [])) > 0.5
    ]
    for index in plain:
        texts = cells.get(index, [])
        if figures and index < figures[0] and texts and _share_of_figures(texts) < 0.3:
            columns[index].role = "condition"


def _share_of_figures(cells: list[Cell]) -> float:
    figures = sum(not isinstance(c.raw, str) or any(letter.isdigit() for letter in c.text) for c in cells)
    return figures / len(cells) if cells else 0.0


def _offer_beside_requirement(columns: dict[int, Column]) -> None:
    """Where a column is named as the offer, limits given beside it as minimum or maximum are the buyer's."""
    roles = {column.role for column in columns.values()}
    if "offered" in roles and "required" not in roles:
        for column in columns.values():
            if column.role in ("minimum", "maximum") and not column.words:
                column.role = "required"
