"""Errors for inputs that cannot be used at all: where, found, expected, what to do."""

from __future__ import annotations

import functools


class UnusableInputError(Exception):
    """An input that cannot be used; its text is the one message the user sees.

    Parameters
    ----------
    file : name of the file as the user gave it
    found : what was there
    expected : what would have been usable
    remedy : what the user can do
    sheet, cell : place inside the file, where there is one
    """

    def __init__(
        self, file: str, *, found: str, expected: str, remedy: str, sheet: str = "", cell: str = ""
    ) -> None:
        self.file, self.sheet, self.cell = file, sheet, cell
        self.found, self.expected, self.remedy = found, expected, remedy
        super().__init__(file, found, expected, remedy, sheet, cell)

    def __str__(self) -> str:
        place = self.file
        if self.sheet:
            place += f", sheet '{self.sheet}'"
        if self.cell:
            place += f", cell {self.cell}"
        return f"{place}: found {self.found}; expected {self.expected}; {self.remedy}"

    def __reduce__(self) -> tuple[object, ...]:
        named = {
            "found": self.found,
            "expected": self.expected,
            "remedy": self.remedy,
            "sheet": self.sheet,
            "cell": self.cell,
        }
        return functools.partial(UnusableInputError, **named), (self.file,)


class OutputError(Exception):
    """An output that could not be written; its text is the one message the user sees.

    Parameters
    ----------
    file : path of the output
    reason : what the system said
    """

    def __init__(self, file: str, reason: str) -> None:
        self.file, self.reason = file, reason
        super().__init__(file, reason)

    def __str__(self) -> str:
        return (
            f"{self.file}: could not be written ({self.reason}); nothing half-written was left; "
            "free some space or give a folder you may write to"
        )
