"""From a file to what its bidder said.

`opening` turns any file into grids of cells; `layout` finds the tables of a sheet and what each value cell
inherits from its headings (a claim); `reading` reads claims; `panels` puts them together; `submission` is
the whole way. `requirements`, `phrases` and `tender_book` read the buyer's workbook.
"""

from speccheck.intake.limits import Limits
from speccheck.intake.submission import read_submission

__all__ = ["Limits", "read_submission"]
