"""Builds the workbooks of ``tests/intake/corpus``; the ``.expected.toml`` beside each says what it states.

Run ``python tests/intake/build_corpus.py`` after a change in the ``corpus_*.py`` modules. The files come
out the same byte by byte each time. Makers, models and figures are invented; each file has a habit of
its own, named in its function. The expectations are written by hand from the tables, never by the
reader.
"""

from __future__ import annotations

import csv
import io
import sys
import zipfile
from datetime import datetime
from pathlib import Path

from openpyxl import Workbook

sys.path.insert(0, str(Path(__file__).resolve().parents[1]))

from intake.corpus_bids_cells import CELLS
from intake.corpus_bids_hard import HARD
from intake.corpus_bids_headings import HEADINGS
from intake.corpus_bids_layouts import LAYOUTS
from intake.corpus_bids_sides import SIDES
from intake.corpus_bids_words import WORDS
from intake.corpus_texts import TEXTS

CORPUS = Path(__file__).parent / "corpus"
WORKBOOKS = {**LAYOUTS, **CELLS, **HARD, **HEADINGS, **SIDES, **WORDS}
FIXED = datetime(2026, 1, 1)  # noqa: DTZ001 - openpyxl writes naive times


def save(book: Workbook, path: Path) -> None:
    """Write a workbook whose bytes depend on its content only."""
    book.properties.created = book.properties.modified = FIXED
    packed = io.BytesIO()
    book.save(packed)
    with zipfile.ZipFile(packed) as source, zipfile.ZipFile(path, "w", zipfile.ZIP_DEFLATED) as target:
        for name in sorted(source.namelist()):
            target.writestr(zipfile.ZipInfo(name, (2026, 1, 1, 0, 0, 0)), _timeless(name, source.read(name)))


def _timeless(name: str, content: bytes) -> bytes:
    """The core properties without the moment of saving, which the library always writes."""
    if name != "docProps/core.xml":
        return content
    start, rest = content.split(b"<dcterms:modified", 1)
    _, end = rest.split(b"</dcterms:modified>", 1)
    return start + end


def write(folder: Path) -> list[Path]:
    """Write the whole corpus into a folder; returns the files."""
    folder.mkdir(exist_ok=True)
    for name, fill in WORKBOOKS.items():
        book = Workbook()
        fill(book)
        save(book, folder / f"{name}.xlsx")
    for name, (rows, encoding, delimiter) in TEXTS.items():
        text = io.StringIO()
        csv.writer(text, delimiter=delimiter, lineterminator="\r\n").writerows(rows)
        (folder / name).write_bytes(text.getvalue().encode(encoding))
    return sorted([*(folder / f"{name}.xlsx" for name in WORKBOOKS), *(folder / name for name in TEXTS)])


if __name__ == "__main__":
    for path in write(CORPUS):
        print(path.name)
