"""Which of a heading's parameters each figure of a cell answers for."""

from __future__ import annotations

from collections.abc import Iterator

from speccheck.dictionary import parameters, specified
from speccheck.quantities import Quantity, array_of

_FEWEST_OF_SEVERAL = {"array_rows": 2, "subarray_rows": 1}  # a plain number of rows may stand alone
_SECTOR_DEG = 45.0


def paired(keys: tuple[str, ...], quantities: tuple[Quantity, ...]) -> Iterator[tuple[str, Quantity]]:
    """Each figure of a cell with the parameter it answers for; nothing where their numbers do not fit."""
    table = parameters()
    if len(keys) == 1:
        for quantity in quantities:
            own = quantity.parameter if quantity.parameter in table else keys[0]
            yield _at_sector_edge(specified(own, quantity.condition), quantity), quantity
            if own == "element_count":
                yield from ((part.parameter, part) for part in array_of(quantity))
    elif {quantity.parameter for quantity in quantities} == set(keys):
        yield from ((quantity.parameter, quantity) for quantity in quantities)
    elif len(quantities) == len(keys) or len(keys) > len(quantities) >= _FEWEST_OF_SEVERAL.get(keys[0], 9):
        yield from zip(keys, quantities, strict=False)


def _at_sector_edge(key: str, quantity: Quantity) -> str:
    """'≥ 10 dB (±60°)' beside '≥ 20 dB (0°)' is the discrimination at the edge of the sector."""
    wide = key == "cross_polar_discrimination" and abs(quantity.at.get("angle_deg", 0.0)) >= _SECTOR_DEG
    return "cross_polar_sector" if wide else key
