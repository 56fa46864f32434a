"""Which files are bids, and under which folder of the outputs each one's results go."""

from __future__ import annotations

import os
from collections import Counter
from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from pathlib import Path

_BID_SUFFIXES = (
    ".xlsx", ".xlsm", ".csv", ".tsv", ".txt", ".xls", ".xlsb", ".ods", ".pdf", ".docx", ".doc", ".zip",
)  # fmt: skip
"""What bidders send; those that cannot be read are named in the comparison, not passed over."""
_OWN_OUTPUTS = (
    ".report.html", ".report.pdf", ".review.xlsx", ".result.json", ".questions.html", ".questions.xlsx",
    ".answers.html", ".answers.xlsx", ".reading.xlsx", ".reading.json",
)  # fmt: skip
_NEVER = ("readme", "license", "comparison.")


@dataclass(frozen=True, slots=True)
class BidFile:
    """A bid and the folder, below the output folder, that its results go to ('' for the folder itself)."""

    path: Path
    folder: str = ""


def find_bids(paths: Iterable[str | Path], *, tender_file: str | Path | None = None) -> tuple[BidFile, ...]:
    """Files named or lying in the folders named, each once, in name order within a folder.

    Parameters
    ----------
    paths : files, taken whatever they are, and folders, searched with their sub-folders
    tender_file : the buyer's own workbook, left out where a folder holds it

    Two bids of one name in different folders, or of one stem, get folders of their own.
    """
    tender = _real(Path(tender_file)) if tender_file is not None else None
    found: dict[str, Path] = {}
    for given in map(Path, paths):
        inside = _in_folder(given, tender) if given.is_dir() else (given,)
        for path in inside:
            found.setdefault(_real(path), path)
    files = tuple(found.values())
    stems = Counter(path.stem.casefold() for path in files)
    common = _common([path for path in files if stems[path.stem.casefold()] > 1])
    return tuple(
        BidFile(path, _own_folder(path, common) if stems[path.stem.casefold()] > 1 else "") for path in files
    )


def _in_folder(folder: Path, tender: str | None) -> Iterator[Path]:
    for path in sorted(folder.rglob("*"), key=lambda p: (str(p.parent), p.name.casefold(), p.name)):
        name = path.name.casefold()
        hidden = any(part.startswith(".") for part in path.relative_to(folder).parts)
        if hidden or name.startswith(("~$", *_NEVER)) or name.endswith(_OWN_OUTPUTS):
            continue
        if path.is_file() and path.suffix.casefold() in _BID_SUFFIXES and _real(path) != tender:
            yield path


def _real(path: Path) -> str:
    return os.path.realpath(path)


def _common(paths: list[Path]) -> str:
    return os.path.commonpath([_real(path.parent) for path in paths]) if paths else ""


def _own_folder(path: Path, common: str) -> str:
    """A folder name made of the path below what all of them share; the suffix keeps a.csv from a.xlsx."""
    below = Path(os.path.relpath(_real(path), common))
    return "__".join((*below.parts[:-1], below.name.replace(".", "_")))
