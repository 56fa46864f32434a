"""Values that say themselves what they are, whatever their heading is called."""

from __future__ import annotations

import re
from collections.abc import Iterable

from speccheck.intake.tables.labels import Label

_CHAINS = re.compile(r"\s*\d{1,4}\s?T\s?[/x-]?\s?\d{1,4}\s?R\s*", re.IGNORECASE)
NOTHING = Label("")


def label_by_values(heading: str, values: Iterable[str]) -> Label:
    """The label that values under or beside an unknown heading prove; no label when they prove none.

    >>> label_by_values("Configuration", ["64T64R", "32T32R"]).parameters
    ('transceivers',)
    """
    texts = list(values)
    if not texts or not all(map(_CHAINS.fullmatch, texts)):
        return NOTHING
    how = f"heading '{heading}' beside '{texts[0].strip()}', a number of transceivers"
    return Label(heading, ("transceivers",), how=how)
