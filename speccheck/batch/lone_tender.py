"""The buyer's own workbook where it lies among the bids of a folder."""

from __future__ import annotations

import re
import zipfile
from collections.abc import Iterable
from pathlib import Path

_MOST = 65_536
_SHEET_REQUIREMENTS = re.compile(rb'name="requirements"', re.IGNORECASE)


def lone_tender(paths: Iterable[str | Path]) -> Path | None:
    """The one workbook with a sheet Requirements in the folders named; None for none or several."""
    folders = [path for path in map(Path, paths) if path.is_dir()]
    found = [
        path for folder in folders for path in sorted(folder.rglob("*.xls[xm]")) if has_requirements(path)
    ]
    return found[0] if len(found) == 1 else None


def has_requirements(path: Path) -> bool:
    """Whether the list of sheets names one; a file that cannot be opened is named later, as a bid."""
    if path.name.startswith("~$") or path.name.endswith(".review.xlsx"):
        return False
    try:
        with zipfile.ZipFile(path) as archive, archive.open("xl/workbook.xml") as part:
            return bool(_SHEET_REQUIREMENTS.search(part.read(_MOST)))
    except (OSError, KeyError, zipfile.BadZipFile, NotImplementedError, RuntimeError, EOFError):
        return False
