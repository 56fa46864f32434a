"""Lines that give a figure right behind its name: 'VSWR < 1.5', 'Weight 8.5 kg', 'Gain - 17.2 dBi'."""

from __future__ import annotations

import re

from speccheck.dictionary import parameters
from speccheck.intake.tables.labels import Label, Labels
from speccheck.quantities import read_cell

_LONGEST = 80
_LOOSE = re.compile(
    r"\s*[-•*·]?\s*(?P<name>[^\W\d][^<>≤≥:=]*?)(?:\s+|\s*(?=[<>≤≥~]))(?:[-–—]\s+)?"
    r"(?P<value>(?:[<>≤≥~]|[±+]?\d|[-−]\s?\d).*)"
)
_WORDLESS = frozenset({"text", "polarisation", "connectors"})


def loose_line(text: str, labels: Labels) -> tuple[Label, str] | None:
    """Label and value of a line without a colon; None unless the value is nothing but figures."""
    if len(text) > _LONGEST or "\n" in text:
        return None
    cut = _LOOSE.fullmatch(text.strip())
    label = labels.of(cut["name"].strip()) if cut else None
    if cut is None or not label:
        return None
    kinds = {parameters()[key].kind for key in label.parameters}
    if kinds & _WORDLESS:
        return None
    first = parameters()[label.parameters[0]]
    kind = first.kind if len(label.parameters) == 1 else "size"
    said = read_cell(cut["value"], kind=kind, unit=label.unit, expected=first.unit)
    return (label, cut["value"]) if said.quantities and not said.rest and said.status is None else None
