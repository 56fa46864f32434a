"""From a file to what its bidder said.

`files` turns any file into grids of cells; `tables` finds the tables of a sheet and what each value cell
inherits from its headings (a claim); `panels` reads the claims and puts them together; `submission` is the
whole way. `tenders` reads the buyer's workbook.
"""

from speccheck.intake.files.limits import Limits
from speccheck.intake.submission import read_submission

__all__ = ["Limits", "read_submission"]
