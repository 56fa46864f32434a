"""Values that say themselves what they are, whatever their heading is called."""

from __future__ import annotations

import re
from collections.abc import Iterable

from speccheck.dictionary import is_ambiguous, match_heading
from speccheck.intake.tables.labels import Label
from speccheck.quantities import NUMERAL_PATTERN, UNIT_PATTERN, dimension, unit_name

_CHAINS = re.compile(r"\s*\d{1,4}\s?T\s?[/x-]?\s?\d{1,4}\s?R\s*", re.IGNORECASE)
_FIGURE = re.compile(rf"(?:{NUMERAL_PATTERN})\s*(?:{UNIT_PATTERN})?|[<>≤≥±=]")
_SYMBOLS = {
    ("G", "gain"): "gain",
    ("Gi", "gain"): "gain",
    ("f", "frequency"): "frequency_range",
    ("m", "mass"): "weight",
    ("M", "mass"): "weight",
    ("F", "force"): "wind_load",
    ("Z", "resistance"): "impedance",
}
"""Symbols that name a parameter together with the dimension of a unit (common practice)."""
NOTHING = Label("")


def label_by_values(heading: str, values: Iterable[str], unit: str = "") -> Label:
    """The label that values or a unit beside an unknown heading prove; no label when they prove none.

    >>> label_by_values("Configuration", ["64T64R", "32T32R"]).parameters
    ('transceivers',)
    >>> label_by_values("Power", ["250 W per port"]).parameters
    ('max_power_per_port',)
    >>> label_by_values("G", ["17.5"], "dBi").parameters
    ('gain',)
    """
    symbol = (heading.partition(" / ")[0].strip(), dimension(unit_name(unit)))
    if symbol in _SYMBOLS:
        return Label(heading, (_SYMBOLS[symbol],), unit, how=f"symbol '{symbol[0]}' over figures in {unit}")
    texts = list(values)
    if texts and is_ambiguous(heading):
        return _by_remark(heading, texts)
    if not texts or not all(map(_CHAINS.fullmatch, texts)):
        return NOTHING
    how = f"heading '{heading}' beside '{texts[0].strip()}', a number of transceivers"
    return Label(heading, ("transceivers",), how=how)


def _by_remark(heading: str, texts: list[str]) -> Label:
    """The label that one remark behind all figures makes of a heading with several meanings."""
    remarks = {" ".join(_FIGURE.sub(" ", text).split()) for text in texts}
    if len(remarks) != 1 or not (remark := remarks.pop()):
        return NOTHING
    found = match_heading(f"{heading} {remark}", suggest=False).parameters
    how = f"heading '{heading}' beside '{texts[0].strip()}'"
    return Label(heading, found, how=how) if len(found) == 1 else NOTHING
