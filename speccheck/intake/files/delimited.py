"""Text files with delimiters: which encoding, which delimiter, which cells."""

from __future__ import annotations

import csv
import io

from speccheck.errors import UnusableInputError
from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.files.limits import Limits

_DELIMITERS = (";", "\t", ",", "|")
_BYTE_ORDER_MARKS = ((b"\xef\xbb\xbf", "utf-8-sig"), (b"\xff\xfe", "utf-16"), (b"\xfe\xff", "utf-16"))


def read_delimited(content: bytes, *, file: str, name: str, limits: Limits) -> tuple[Grid, str]:
    """Read a delimited text file; also says how it was read.

    Raises
    ------
    UnusableInputError : binary content, or more than the limits allow
    """
    text, encoding = _decode(content, file)
    delimiter = _delimiter(text)
    grid = Grid(name=name)
    csv.field_size_limit(max(limits.text_length * 50, 1_000_000))
    try:
        for row, fields in enumerate(csv.reader(io.StringIO(text, newline=""), delimiter=delimiter), start=1):
            for column, value in enumerate(fields, start=1):
                if value and not value.isspace():
                    grid.cells[row, column] = _cell(row, column, value, limits)
            if len(grid.cells) > limits.cells:
                raise UnusableInputError(
                    file,
                    found=f"more than {limits.cells} filled cells",
                    expected="a table of that size at most",
                    remedy="split the file",
                )
    except csv.Error as error:
        raise UnusableInputError(
            file,
            found=f"text that is no table ({error})",
            expected="rows of delimited cells",
            remedy="save it as .xlsx",
        ) from error
    shown = {"\t": "tab", ";": "semicolon", ",": "comma", "|": "bar"}[delimiter]
    return grid, f"read as {encoding} text with the {shown} between cells"


def _cell(row: int, column: int, value: str, limits: Limits) -> Cell:
    if len(value) > limits.text_length:
        fault = f"text of {len(value)} characters, more than {limits.text_length}"
        value = value[: limits.text_length]
        return Cell(row, column, value, value, fault=fault)
    return Cell(row, column, value, value)


def _decode(content: bytes, file: str) -> tuple[str, str]:
    for mark, codec in _BYTE_ORDER_MARKS:
        if content.startswith(mark):
            return _strictly(content, codec, file), codec.removesuffix("-sig").upper()
    sample = content[:4000]
    if len(sample) > 3 and sample.count(0) > len(sample) // 3:
        codec = "utf-16-le" if sample[1::2].count(0) > sample[::2].count(0) else "utf-16-be"
        return _strictly(content, codec, file), "UTF-16"
    if b"\0" in content:
        raise _binary(file)
    try:
        return content.decode("utf-8"), "UTF-8"
    except UnicodeDecodeError:
        pass
    try:
        return content.decode("cp1252"), "Windows-1252"
    except UnicodeDecodeError:
        return content.decode("latin-1"), "Latin-1"


def _strictly(content: bytes, codec: str, file: str) -> str:
    try:
        return content.decode(codec)
    except UnicodeDecodeError:
        raise _binary(file) from None


def _binary(file: str) -> UnusableInputError:
    return UnusableInputError(
        file,
        found="neither a workbook nor readable text",
        expected="an .xlsx or .xlsm workbook, or .csv or .tsv text",
        remedy="save the data as .xlsx in a spreadsheet program",
    )


def _delimiter(text: str) -> str:
    """The delimiter that cuts the most lines into the same number of cells."""
    lines = [line for line in text[:60_000].splitlines() if line.strip()][:200]
    return max(_DELIMITERS, key=lambda mark: (_evenness(lines, mark), -_DELIMITERS.index(mark)))


def _evenness(lines: list[str], mark: str) -> int:
    counts: dict[int, int] = {}
    for line in lines:
        outside = "".join(line.split('"')[::2])
        cut = outside.count(mark)
        if cut:
            counts[cut] = counts.get(cut, 0) + 1
    return max(counts.values(), default=0)
