"""Number formats of spreadsheet cells: the built-in ones, and which of them show a date.

openpyxl converts the dates, but is imported only for a workbook that holds one: importing it takes
as long as reading ten bids.
"""

from __future__ import annotations

import datetime
import re
from functools import lru_cache

BUILT_IN = {
    1: "0", 2: "0.00", 3: "#,##0", 4: "#,##0.00", 9: "0%", 10: "0.00%", 11: "0.00E+00",
    12: "# ?/?", 13: "# ??/??",
    14: "mm-dd-yy", 15: "d-mmm-yy", 16: "d-mmm", 17: "mmm-yy", 18: "h:mm AM/PM", 19: "h:mm:ss AM/PM",
    20: "h:mm", 21: "h:mm:ss", 22: "m/d/yy h:mm",
    5: '"$"#,##0_);("$"#,##0)', 6: '"$"#,##0_);[Red]("$"#,##0)',
    7: '"$"#,##0.00_);("$"#,##0.00)', 8: '"$"#,##0.00_);[Red]("$"#,##0.00)',
    37: "#,##0_);(#,##0)", 38: "#,##0_);[Red](#,##0)",
    39: "#,##0.00_);(#,##0.00)", 40: "#,##0.00_);[Red](#,##0.00)",
    41: r'_(* #,##0_);_(* \(#,##0\);_(* "-"_);_(@_)',
    42: r'_("$"* #,##0_);_("$"* \(#,##0\);_("$"* "-"_);_(@_)',
    43: r'_(* #,##0.00_);_(* \(#,##0.00\);_(* "-"??_);_(@_)',
    44: r'_("$"* #,##0.00_)_("$"* \(#,##0.00\)_("$"* "-"??_)_(@_)',
    45: "mm:ss", 46: "[h]:mm:ss", 47: "mmss.0", 48: "##0.0E+0", 49: "@",
}  # fmt: skip
"""Formats that a workbook names by number only (ECMA-376-1, 18.8.30 numFmt); 0 is the general format.

Those that the standard leaves to the language of the user are given as in English.
"""

_NOT_SHOWN_AS_DATE = re.compile(r'"[^"]*"|[\\_*].|\[(?![hms]+\])[^\]]*\]', re.IGNORECASE)
"""Text in quotes, escaped, padding and filling characters, colours and languages; [h] counts hours."""
_DATE_LETTERS = re.compile(r"[dmhys]", re.IGNORECASE)

Date = datetime.date | datetime.time


@lru_cache(maxsize=500)
def shows_date(number_format: str) -> bool:
    """Whether a number format shows a date or time; its first section, for positive figures, decides.

    >>> shows_date("d-mmm-yy"), shows_date('0.0 "dBm"'), shows_date("[Red]0.0")
    (True, False, False)
    """
    shown = _NOT_SHOWN_AS_DATE.sub("", number_format).split(";", 1)[0]
    return _DATE_LETTERS.search(shown) is not None


def date_of_serial(number: float, *, counts_from_1904: bool) -> Date | None:
    """Date of a serial number.

    Raises
    ------
    ValueError, OverflowError : no date has this number
    """
    from openpyxl.utils.datetime import MAC_EPOCH, WINDOWS_EPOCH, from_excel  # noqa: PLC0415 - see above

    found: Date | None = from_excel(number, MAC_EPOCH if counts_from_1904 else WINDOWS_EPOCH)
    return found


def date_of_text(text: str) -> Date | None:
    """Date in the form of ISO 8601 that a cell of the date type stores.

    Raises
    ------
    ValueError : not such a date, or a length of time
    """
    from openpyxl.utils.datetime import from_ISO8601  # noqa: PLC0415 - see above

    found: Date | datetime.timedelta | None = from_ISO8601(text)
    if isinstance(found, datetime.timedelta):
        raise ValueError(f"a length of time: {text}")
    return found
