"""Whether the cells of a column answer for the labels of their rows: figures of the right kind and unit."""

from __future__ import annotations

from collections.abc import Iterable

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tables.labels import Label
from speccheck.quantities import UnknownUnitError, convert, read_cell

_JUDGED = 10
_FEWEST = 2
_MEASURED = ("number", "range", "scan", "count", "bands", "size")


def share_answering(cells: Iterable[tuple[Label, Cell]]) -> float | None:
    """Share of cells that could be values of their labels; None where too few can be told.

    A dash or a 'comply' tells nothing, nor does any text beside a label that asks for text.
    """
    told = []
    for label, cell in cells:
        fits = _fits(label, cell)
        if fits is not None:
            told.append(fits)
        if len(told) == _JUDGED:
            break
    return sum(told) / len(told) if len(told) >= _FEWEST else None


def labelled(
    grid: Grid, headings: dict[tuple[int, int], Label], column: int, cells: list[Cell]
) -> Iterable[tuple[Label, Cell]]:
    """Cells with the label of their row; a label merged over rows, or with none below it, counts for all."""
    for cell in cells:
        for row in range(cell.row, max(0, cell.row - 4), -1):
            head = grid.covering(row, column)
            if head is not None:
                label = headings.get((head.row, head.column))
                if label:
                    yield label, cell
                break


def _fits(label: Label, cell: Cell) -> bool | None:
    table = parameters()
    first = table[label.parameters[0]]
    if first.kind not in _MEASURED or cell.fault:
        return None
    content = read_cell(
        cell.raw,
        kind=first.kind if len(label.parameters) == 1 else "size",
        unit=label.unit,
        number_format=cell.number_format,
        expected=first.unit,
    )
    if content.status:
        return None
    for quantity in content.quantities:
        try:
            if not isinstance(quantity.value, str) and quantity.unit:
                end = quantity.value[0] if isinstance(quantity.value, tuple) else quantity.value
                convert(end, quantity.unit, first.unit)
        except UnknownUnitError:
            if quantity.unit not in first.keep:
                return False
    return bool(content.quantities)
