"""Words a requirement is judged by: operators, and the doubts its wording leaves.

A doubt starts with a code word so that it can be counted; the words after it are for the reader.
"""

from __future__ import annotations

OPERATORS = ("≥", "≤", ">", "<", "=", "within", "contains", "all of", "any of", "text")
"""Operators that a figure or a text is judged by."""

UNJUDGED_OPERATORS = ("evidence", "information", "baseline", "condition", "after award", "rule")
"""Operators that ask for papers, give information, or set how other rows are judged."""

BLOCKING = ("CLASH", "LIST", "NUMBER", "PARAMETER", "VALUE", "UNITS", "COLUMNS", "REFERENCE")
"""Doubts that leave no single reading: such a row is asked about and never judged."""

_DOUBTS = {
    "AFTER": "a test on delivery, no limit of the tender",
    "ANDOR": "a slash may mean 'and' or 'or'; read as all of them",
    "BASELINE": "refers to another panel; its figures are needed, and a beamwidth has no 'better'",
    "CLASH": "the words ask for the direction that is worse for this parameter",
    "CONFIRMED": "a person confirmed the columns; the wording gives another demand",
    "COLUMNS": "the columns and the wording give different demands",
    "CONDITION": "holds only under a condition that a person must evaluate first",
    "COUNT": "dipoles or crossed pairs: a factor of two",
    "CRITERION": "the criterion that ends the range (such as 3 dB scan loss) is not stated",
    "DIR": "no word of direction; read in the parameter's good direction",
    "DUPLICATE": "another row has the same clause",
    "EQUAL": "'better than' is strict by the words but widely met by equality; the equality rule decides",
    "LEVEL": "the level is not plain from the words",
    "LIST": "a list is needed before this can be read",
    "MIXED": "whether a mix of the types is allowed is not stated",
    "NUMBER": "the number admits two readings",
    "NOUNIT": "no unit written; read in the parameter's own unit",
    "ORDER": "the order is not stated; read as height, width, depth",
    "ORDINAL": "the order of the product is not stated; third order assumed",
    "PARAMETER": "no known parameter in the words",
    "POLARISATION": "one polarisation or the sum of both is not stated",
    "PLANE": "the plane is not stated; read as horizontal",
    "REFERENCE": "'dB' names no reference antenna (dBi or dBd)",
    "RANGE": "only one end of the range is given",
    "SCOPE": "no scope named; read as every band, tilt, port and polarisation offered",
    "SEX": "male or female not stated; female assumed",
    "SIGN": "the sign is habit; read as the usual demand",
    "STAT": "the statistic is not plain",
    "SUM": "the parts do not add up to the total",
    "TOL": "no tolerance given; none is invented",
    "UNIT": "as written the unit is impossible; read with the likely one",
    "UNITS": "the unit does not belong to this parameter",
    "UPPER": "whether more than the upper end is a defect is not stated",
    "VALUE": "no value in the row",
    "LADDER": "the second digit is no ladder: immersion (7, 8) does not include jets (5, 6)",
    "VERSION": "'latest' is read as the version in force at the tender date",
}

WINDOW_UNKNOWN = "judged on the figure; stated without tolerance, so the offered window is not known"
"""Note of a row whose bare figure lies inside the window demanded: a narrow pass and a question."""


def margin_unit(unit: str) -> str:
    """Unit of a difference of two figures: levels over any reference differ by plain decibels."""
    return "dB" if unit in ("dBi", "dBd", "dBm", "dBc") else unit


def doubt(code: str, detail: str = "") -> str:
    """A doubt in words, starting with its code word."""
    text = _DOUBTS[code]
    return f"{code}: {text}; {detail}" if detail else f"{code}: {text}"


def doubt_code(text: str) -> str:
    """The code word a doubt starts with."""
    return text.partition(":")[0]


def blocked(doubts: tuple[str, ...]) -> tuple[str, ...]:
    """Those doubts that leave no reading to judge by."""
    return tuple(text for text in doubts if doubt_code(text) in BLOCKING)
