"""Files nobody should have sent: each gives one clear message in bounded time and memory."""

from __future__ import annotations

import io
import os
import time
import tracemalloc
import zipfile
from collections.abc import Callable
from pathlib import Path

import pytest
from openpyxl import Workbook

from speccheck.errors import UnusableInputError
from speccheck.intake.files.limits import Limits
from speccheck.intake.files.opening import open_book

SHEET = "xl/worksheets/sheet1.xml"
MAIN = '<worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main">{}</worksheet>'


def workbook_bytes() -> bytes:
    book = Workbook()
    book.active.append(["Gain", "17.5 dBi"])
    out = io.BytesIO()
    book.save(out)
    return out.getvalue()


def with_part(name: str, content: bytes, *, also: str | None = None) -> bytes:
    """The plain workbook with one part replaced, or one more added."""
    out = io.BytesIO()
    with (
        zipfile.ZipFile(io.BytesIO(workbook_bytes())) as old,
        zipfile.ZipFile(out, "w", zipfile.ZIP_DEFLATED) as new,
    ):
        for entry in old.infolist():
            new.writestr(entry.filename, content if entry.filename == name else old.read(entry))
        if also is not None:
            new.writestr(also, content)
    return out.getvalue()


def sheet(body: str) -> bytes:
    return with_part(SHEET, MAIN.format(body).encode())


def lying_directory() -> bytes:
    """A bomb whose directory claims a small part."""
    content = with_part(SHEET, MAIN.format("<sheetData>" + "<row/>" * 9_000_000 + "</sheetData>").encode())
    with zipfile.ZipFile(io.BytesIO(content)) as archive:
        size = archive.getinfo(SHEET).file_size
    return content.replace(size.to_bytes(4, "little"), (4000).to_bytes(4, "little"))


def encrypted_zip() -> bytes:
    content = bytearray(workbook_bytes())
    place = content.find(b"PK\x01\x02")
    while place >= 0:
        content[place + 8] |= 1
        place = content.find(b"PK\x01\x02", place + 4)
    return bytes(content)


BOMB_ENTITIES = (
    '<!DOCTYPE b [<!ENTITY a "ha"><!ENTITY c "&a;&a;&a;&a;"><!ENTITY d "&c;&c;&c;&c;">]>' + MAIN.format("&d;")
).encode()
EXTERNAL_ENTITY = ('<!DOCTYPE b [<!ENTITY a SYSTEM "file:///etc/passwd">]>' + MAIN.format("&a;")).encode()

HOSTILE: dict[str, tuple[Callable[[], bytes], str]] = {
    "empty.xlsx": (lambda: b"", "empty file"),
    "renamed-pdf.xlsx": (lambda: b"%PDF-1.7\n%\xe2\xe3", "PDF"),
    "old.xls": (lambda: b"\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1" + bytes(600), "save it as .xlsx"),
    "password.xlsx": (
        lambda: b"\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1" + bytes(600) + "EncryptedPackage".encode("utf-16-le"),
        "password",
    ),
    "locked-zip.xlsx": (encrypted_zip, "password"),
    "truncated.xlsx": (lambda: workbook_bytes()[:-300], "truncated or damaged"),
    "half.xlsx": (lambda: workbook_bytes()[:900], "truncated or damaged"),
    "not-a-workbook.xlsx": (lambda: _plain_zip("readme.txt"), "without a worksheet"),
    "document.xlsx": (lambda: _plain_zip("word/document.xml"), "word-processor"),
    "sheet.ods": (lambda: _plain_zip("mimetype", "content.xml"), "save it as .xlsx"),
    "binary.xlsb": (lambda: _plain_zip("xl/workbook.bin"), "save it as .xlsx"),
    "climbing.xlsx": (lambda: with_part("", b"x", also="../../etc/cron.d/x"), "odd path"),
    "absolute.xlsx": (lambda: with_part("", b"x", also="/etc/x"), "odd path"),
    "entities.xlsx": (lambda: with_part(SHEET, BOMB_ENTITIES), "document type"),
    "external.xlsx": (lambda: with_part(SHEET, EXTERNAL_ENTITY), "document type"),
    "entities-in-styles.xlsx": (lambda: with_part("xl/styles.xml", BOMB_ENTITIES), "document type"),
    "broken-xml.xlsx": (lambda: with_part(SHEET, b"<worksheet><sheetData><row>"), "broken XML"),
    "bomb.xlsx": (lambda: with_part(SHEET, bytes(60_000_000)), "grows from"),
    "lying.xlsx": (lying_directory, "found"),
    "many-rows.xlsx": (
        lambda: sheet("<sheetData>" + "".join(f"<row r='{n}'/>" for n in range(2_600_000)) + "</sheetData>"),
        "elements",
    ),
    "deep.xlsx": (lambda: with_part(SHEET, b"<a>" * 3_000_000), "grows from"),
    "deep-stored.xlsx": (lambda: _stored(SHEET, b"<a>" * 3_000_000), "elements"),
    "long-text.xlsx": (lambda: sheet("<x a='" + "y" * 9_000_000 + "'/>"), "found"),
    "many-cells.xlsx": (
        lambda: sheet("<sheetData>" + ("<row>" + "<c><v>1</v></c>" * 100 + "</row>") * 2100 + "</sheetData>"),
        "filled cells",
    ),
    "no-cells.xlsx": (lambda: sheet("<sheetData/>"), "no filled cell"),
    "nul.csv": (lambda: b"Gain,\x00\x00\x0117", "neither a workbook nor readable text"),
    "page.csv": (lambda: b"<html><table><tr><td>Gain</td></tr></table></html>", "web page"),
    "picture.xlsx": (lambda: b"\x89PNG\r\n\x1a\n", "picture"),
    "odd-utf16.csv": (lambda: b"\xff\xfea", "found"),
    "blank.csv": (lambda: b" ; ; \n;;\n", "no filled cell"),
}


def _stored(name: str, content: bytes) -> bytes:
    """The workbook with a part replaced, nothing compressed."""
    out = io.BytesIO()
    with zipfile.ZipFile(io.BytesIO(workbook_bytes())) as old, zipfile.ZipFile(out, "w") as new:
        for entry in old.infolist():
            new.writestr(entry.filename, content if entry.filename == name else old.read(entry))
    return out.getvalue()


def _plain_zip(*names: str) -> bytes:
    out = io.BytesIO()
    with zipfile.ZipFile(out, "w") as archive:
        for name in names:
            archive.writestr(name, "x")
    return out.getvalue()


@pytest.mark.parametrize("name", HOSTILE)
def test_hostile_file_gives_one_message(tmp_path: Path, name: str) -> None:
    make, expected = HOSTILE[name]
    path = tmp_path / name
    path.write_bytes(make())
    started = time.perf_counter()
    with pytest.raises(UnusableInputError) as caught:
        open_book(path)
    message = str(caught.value)
    assert expected in message
    assert message.startswith(name)
    assert "expected" in message
    assert caught.value.remedy
    assert time.perf_counter() - started < 10


@pytest.mark.parametrize("name", ["lying.xlsx", "many-cells.xlsx", "long-text.xlsx", "bomb.xlsx"])
def test_hostile_file_stays_within_memory(tmp_path: Path, name: str) -> None:
    path = tmp_path / name
    path.write_bytes(HOSTILE[name][0]())
    tracemalloc.start()
    with pytest.raises(UnusableInputError):
        open_book(path)
    _, peak = tracemalloc.get_traced_memory()
    tracemalloc.stop()
    assert peak < 200_000_000


def test_missing_file_and_folder(tmp_path: Path) -> None:
    for path, expected in ((tmp_path / "none.xlsx", "no such file"), (tmp_path, "a folder")):
        with pytest.raises(UnusableInputError, match=expected):
            open_book(path)


@pytest.mark.skipif(os.geteuid() == 0, reason="the administrator may read everything")
def test_unreadable_file(tmp_path: Path) -> None:
    path = tmp_path / "locked.xlsx"
    path.write_bytes(workbook_bytes())
    path.chmod(0)
    with pytest.raises(UnusableInputError, match="cannot be opened"):
        open_book(path)


def test_file_above_the_size_limit(tmp_path: Path) -> None:
    path = tmp_path / "big.csv"
    path.write_bytes(b"Gain;17\n" * 1000)
    with pytest.raises(UnusableInputError, match="more than"):
        open_book(path, Limits(file_bytes=1000))


def test_device_is_refused() -> None:
    with pytest.raises(UnusableInputError, match="device"):
        open_book("/dev/zero")


def test_a_million_claimed_rows_with_three_cells_is_quick(tmp_path: Path) -> None:
    body = (
        '<dimension ref="A1:XFD1048576"/><sheetData><row r="1"><c r="A1"><v>1</v></c></row>'
        '<row r="1048576"><c r="XFD1048576"><v>2</v></c><c r="A1048576"><v>3</v></c></row></sheetData>'
        '<mergeCells><mergeCell ref="B2:XFD1048575"/></mergeCells>'
    )
    path = tmp_path / "wide.xlsx"
    path.write_bytes(sheet(body))
    started = time.perf_counter()
    book = open_book(path)
    assert time.perf_counter() - started < 1
    assert sorted(cell.address for cell in book.grids[0].cells.values()) == ["A1", "A1048576", "XFD1048576"]


def test_odd_addresses_do_not_crash(tmp_path: Path) -> None:
    body = (
        '<sheetData><row r="x"><c r="ZZZZ9"><v>1</v></c><c r="A0"><v>2</v></c><c><v>3</v></c>'
        '<c r="B99999999999"><v>4</v></c><c t="s"><v>999</v></c><c t="s"><v>-1</v></c>'
        '<c t="d"><v>x</v></c></row></sheetData>'
    )
    path = tmp_path / "odd.xlsx"
    path.write_bytes(sheet(body))
    book = open_book(path)
    assert any(cell.fault for cell in book.grids[0].cells.values())


def test_macros_links_and_embedded_files_are_named_and_left_alone(tmp_path: Path) -> None:
    path = tmp_path / "macro.xlsm"
    out = io.BytesIO(workbook_bytes())
    with zipfile.ZipFile(out, "a") as archive:
        for name in ("xl/vbaProject.bin", "xl/externalLinks/externalLink1.xml", "xl/embeddings/a.bin"):
            archive.writestr(name, b"x")
    path.write_bytes(out.getvalue())
    told = " ".join(open_book(path).oddities)
    assert "macros" in told
    assert "not followed" in told
    assert "embedded" in told


def test_input_is_not_modified(tmp_path: Path) -> None:
    path = tmp_path / "bid.xlsx"
    path.write_bytes(workbook_bytes())
    before = path.read_bytes(), path.stat().st_mtime_ns
    open_book(path)
    assert (path.read_bytes(), path.stat().st_mtime_ns) == before
