"""Counts: '64T64R', '12x8x2', '192 elements (12x8x2)'."""

from __future__ import annotations

import math
import re
from dataclasses import replace

from speccheck.quantities.content import CellContent, Quantity
from speccheck.quantities.figures import Claim

_TRANSCEIVERS = re.compile(r"(\d{1,4})\s?Tx?\s?[/x-]?\s?(\d{1,4})\s?Rx?(?![a-z])", re.IGNORECASE)
_FACTORS = re.compile(r"\d{1,3}(?:\s?[×xX*]\s?\d{1,3}){1,2}(?:\s?=\s?(\d{1,5}))?")


def special_count(text: str) -> CellContent | None:
    """Count of a text that is a chain count or a bare product; None for any other text."""
    chains = _TRANSCEIVERS.search(text)
    if chains:
        sent, received = float(chains.group(1)), float(chains.group(2))
        if sent == received:
            return CellContent(quantities=(Quantity(value=sent, parameter="transceivers"),))
        pair = (
            Quantity(value=sent, parameter="transceivers", condition="transmit"),
            Quantity(value=received, parameter="transceivers", condition="receive"),
        )
        return CellContent(quantities=pair)
    product = _FACTORS.fullmatch(text)
    if not product:
        return None
    parts = [float(n) for n in re.findall(r"\d+", text.split("=", maxsplit=1)[0])]
    stated = product.group(1)
    total = float(stated) if stated else math.prod(parts)
    notes = () if stated else (f"the product {text}",)
    return CellContent(quantities=(Quantity(value=total, at=_factors(parts)),), notes=notes)


def array_of(found: Quantity) -> tuple[Quantity, ...]:
    """Rows, columns and polarisations of an element count that names its factors.

    The order is that of TR 38.901, rows × columns × polarisations. Nothing comes back when the factors do
    not make up the count, or the third is not one or two.

    >>> [(q.parameter, q.value) for q in array_of(special_count("12x8x2").quantities[0])]
    [('array_rows', 12.0), ('array_columns', 8.0), ('polarisations', 2.0)]
    """
    factors = [found.at[f"factor_{i}"] for i in range(1, 4) if f"factor_{i}" in found.at]
    if len(factors) < 2 or math.prod(factors) != found.value or (len(factors) == 3 and factors[2] > 2):
        return ()
    names = ("array_rows", "array_columns", "polarisations")
    return tuple(Quantity(value=f, parameter=n) for f, n in zip(factors, names, strict=False))


def count_of_claims(read: list[Claim], quantities: list[Quantity]) -> list[Quantity]:
    """'192 elements (12x8x2)' is 192; the factors in parentheses go into its conditions."""
    if not quantities:
        return quantities
    first = quantities[0]
    if len(read) == 2 and read[1].amount.role == "aside" and read[1].factors:
        return [replace(first, at=_factors([*read[1].factors, read[1].amount.low]))]
    if read[0].factors:
        factors = [*read[0].factors, read[0].amount.low]
        return [replace(first, value=math.prod(factors), at=_factors(factors))]
    return [first] if all(c.amount.role == "aside" for c in read[1:]) else quantities


def _factors(parts: list[float]) -> dict[str, float]:
    return {f"factor_{i}": part for i, part in enumerate(parts, start=1)}
