"""What the tables of the review workbook share: columns for people, numbers, links to cells."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence

from speccheck.records import Band, CellRef, Value
from speccheck.report.pages.formats import decimals_for
from speccheck.report.workbooks.cells import Content, Rich
from speccheck.report.workbooks.review_places import Places
from speccheck.report.workbooks.sheets import Column

MOST_DECIMALS = 4

PEOPLE = (
    Column(
        heading="Reviewer's verdict",
        width=16,
        look="entry",
        choices="Lists!$E$2:$E$20",
        note="For people to fill: the program's verdict stays beside it.",
    ),
    Column(heading="Reason", width=24, look="entry", note="Why the reviewer's verdict differs."),
    Column(heading="Reviewer", width=14, look="entry"),
    Column(heading="Reviewed on", width=12, look="entry-date"),
)
UNFILLED: tuple[None, ...] = (None,) * len(PEOPLE)


def band_edges(band: Band | None) -> tuple[float | None, float | None]:
    """Lower and upper edge [MHz]; both empty for the panel as a whole."""
    return band or (None, None)


def number_cell(
    value: float | None, unit: str, decimals: Callable[[float, str], int] = decimals_for
) -> Content:
    """A real number that shows the digits its unit's data support."""
    if value is None:
        return None
    return Rich(value=value, look=f"number{min(decimals(value, unit), MOST_DECIMALS)}")


def spread(value: Value | None) -> tuple[Content, Content, str]:
    """Number, upper end and words of a value: what it has not stays empty."""
    if isinstance(value, str):
        return None, None, value
    if isinstance(value, tuple):
        return Rich(value=value[0], look="number"), Rich(value=value[1], look="number"), ""
    return (Rich(value=value, look="number") if value is not None else None), None, ""


def linked_cells(where: Iterable[CellRef], places: Places) -> Content:
    """The names of cells, leading to the first that is mirrored."""
    cells = tuple(dict.fromkeys(where))
    text = _cell_list(cells)
    link = next(filter(None, map(places.mirror, cells)), "")
    return Rich(value=text, link=link, hint="to the cell as the bidder filled it") if link else text


def _cell_list(cells: Sequence[CellRef]) -> str:
    """Cells with the sheet named once for each run: ``Bid!D3, D6, D7``."""
    texts, sheet = [], None
    for cell in cells:
        texts.append(cell.cell if cell.sheet == sheet else str(cell))
        sheet = cell.sheet
    return ", ".join(texts)
