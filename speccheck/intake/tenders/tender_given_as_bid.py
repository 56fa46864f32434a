"""A tender workbook handed in where a bid was expected: recognised by sheets that only a buyer fills."""

from __future__ import annotations

from speccheck.errors import UnusableInputError
from speccheck.intake.files.opening import Book

_BUYERS_SHEETS = {"settings", "headings", "deviations"}
_BUYERS_HEADINGS = {"wording", "requirement", "level", "confirmed"}


def refuse_tender(book: Book) -> None:
    """Raise UnusableInputError where the file is a tender workbook."""
    sheets = {grid.name.strip().casefold(): grid for grid in book.grids}
    grid = sheets.get("requirements")
    if grid is None or not _BUYERS_SHEETS & set(sheets):
        return
    heads = [
        cell for _, cell in sorted(grid.cells.items()) if cell.text.strip().casefold() in _BUYERS_HEADINGS
    ]
    if heads:
        raise UnusableInputError(
            book.file,
            sheet=grid.name,
            cell=heads[0].address,
            found=f"a tender workbook (heading '{heads[0].text.strip()}' beside the buyer's own sheets)",
            expected="a bidder's workbook",
            remedy="give this file with --tender, and the bids as arguments",
        )
