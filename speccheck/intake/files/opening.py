"""Any file from outside to grids of cells, or one clear message why not."""

from __future__ import annotations

import hashlib
import io
from dataclasses import dataclass, field
from itertools import islice
from pathlib import Path

from speccheck.errors import UnusableInputError
from speccheck.intake.files.archive import Archive
from speccheck.intake.files.delimited import read_delimited
from speccheck.intake.files.grid import Grid
from speccheck.intake.files.limits import Limits
from speccheck.intake.files.package import read_package
from speccheck.intake.files.sheet_stream import Allowance, read_sheet

_AS_XLSX = "open it in a spreadsheet program and save it as .xlsx"
_BYTES_OF = {
    b"%PDF": (
        "a PDF document",
        "ask the bidder for the spreadsheet, or copy its tables into an .xlsx workbook",
    ),
    b"{\\rtf": ("a rich-text document", "copy its tables into an .xlsx workbook"),
    b"\x89PNG": ("a picture", "type the figures into an .xlsx workbook"),
    b"\xff\xd8\xff": ("a picture", "type the figures into an .xlsx workbook"),
    b"Rar!": ("a RAR archive", "unpack it first"),
    b"7z\xbc\xaf": ("a 7z archive", "unpack it first"),
    b"\x1f\x8b": ("a gzip archive", "unpack it first"),
}
_OLE = b"\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1"
_MARKUP = (b"<!doctype", b"<html", b"<?xml", b"<table")
_PIECE = 1 << 20


@dataclass(slots=True)
class Book:
    """An opened file."""

    file: str
    sha256: str
    size_bytes: int
    grids: list[Grid] = field(default_factory=list)
    oddities: list[str] = field(default_factory=list)


def open_book(path: str | Path, limits: Limits | None = None) -> Book:
    """Open a workbook or delimited text file; nothing in it is run, followed or changed.

    Raises
    ------
    UnusableInputError : whatever makes the file unusable
    """
    limits = limits or Limits()
    file = Path(path).name or str(path)
    content = _content(Path(path), file, limits)
    book = Book(file=file, sha256=hashlib.sha256(content).hexdigest(), size_bytes=len(content))
    if content.startswith(b"PK"):
        _read_workbook(book, content, limits)
    else:
        _refuse_other_kinds(content, file)
        grid, how = read_delimited(content, file=file, name=Path(path).stem, limits=limits)
        book.grids, book.oddities = [grid], [how]
    if not any(grid.cells or grid.hidden_cells for grid in book.grids):
        raise UnusableInputError(
            file,
            found="no filled cell",
            expected="a table of panel parameters",
            remedy="check that the right file was sent",
        )
    return book


def _read_workbook(book: Book, content: bytes, limits: Limits) -> None:
    archive = Archive(io.BytesIO(content), book.file, limits)
    if "content.xml" in archive and "mimetype" in archive:
        raise _refusal(book.file, "an OpenDocument file", _AS_XLSX)
    if "word/document.xml" in archive:
        raise _refusal(book.file, "a word-processor document", "copy its tables into an .xlsx workbook")
    if "xl/workbook.bin" in archive:
        raise _refusal(book.file, "a binary workbook (.xlsb)", _AS_XLSX)
    package = read_package(archive, limits)
    allowance = Allowance(limits.cells)
    book.grids = [read_sheet(archive, entry, package, limits, allowance) for entry in package.sheets]
    book.oddities = package.oddities


def _content(path: Path, file: str, limits: Limits) -> bytes:
    try:
        if path.is_dir():
            raise _refusal(file, "a folder", "name the file in it")
        if not path.exists():
            raise _refusal(file, "no such file", "check the path")
        if not path.is_file():
            raise _refusal(file, "a device or pipe, not a file", "name an ordinary file")
        with path.open("rb") as stream:
            pieces = iter(lambda: stream.read(_PIECE), b"")  # one read of the limit takes its memory at once
            content = b"".join(islice(pieces, limits.file_bytes // _PIECE + 1))
    except (OSError, ValueError) as error:
        reason = getattr(error, "strerror", None) or str(error)
        raise _refusal(
            file,
            f"a file that cannot be opened ({reason})",
            "close it elsewhere and check that you may read it",
        ) from error
    if not content:
        raise _refusal(file, "an empty file", "send it again")
    if len(content) > limits.file_bytes:
        megabytes = limits.file_bytes // 1_000_000
        raise _refusal(
            file, f"a file of more than {megabytes} MB", "copy the data sheets alone into a new workbook"
        )
    return content


def _refuse_other_kinds(content: bytes, file: str) -> None:
    if content.startswith(_OLE):
        if b"E\0n\0c\0r\0y\0p\0t" in content:
            raise _refusal(file, "a password-protected workbook", "save it without a password")
        raise _refusal(file, "a workbook of the old .xls kind", _AS_XLSX)
    for start, (found, remedy) in _BYTES_OF.items():
        if content.startswith(start):
            raise _refusal(file, found, remedy)
    if content[:200].lstrip(b"\xef\xbb\xbf \r\n\t").lower().startswith(_MARKUP):
        raise _refusal(file, "a web page or XML document", _AS_XLSX)


def _refusal(file: str, found: str, remedy: str) -> UnusableInputError:
    return UnusableInputError(
        file, found=found, expected="an .xlsx or .xlsm workbook, or .csv or .tsv text", remedy=remedy
    )
