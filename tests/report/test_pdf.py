"""The PDF: tags, language, bookmarks, fonts, attachments; nothing fetched, the same bytes twice."""

from __future__ import annotations

import hashlib
import io
import logging
import shutil
import subprocess
from pathlib import Path

import pypdf
import pytest
from report.sample import FILE, sample

from speccheck.errors import OutputError
from speccheck.report.pages import pdf as pdf_module
from speccheck.report.pages.html import render_html
from speccheck.report.pages.pdf import Attachment, PdfUnavailableError, pdf_bytes, write_pdf

ATTACHED = (
    Attachment(name="bid.result.json", content=b'{"schema": 1}', description="Result", relationship="Data"),
    Attachment(name=FILE, content=b"PK bid", description="The bidder's file", relationship="Source"),
)


@pytest.fixture(scope="module")
def content() -> bytes:
    return pdf_bytes(render_html(sample()), ATTACHED)


@pytest.fixture(scope="module")
def document(content: bytes) -> pypdf.PdfReader:
    return pypdf.PdfReader(io.BytesIO(content))


@pytest.fixture(scope="module")
def text(document: pypdf.PdfReader) -> str:
    return "\n".join(page.extract_text() for page in document.pages)


def test_language_title_and_tags(document: pypdf.PdfReader) -> None:
    catalog = document.trailer["/Root"]
    assert catalog["/Lang"] == "en"
    assert catalog["/MarkInfo"]["/Marked"]
    assert "/StructTreeRoot" in catalog
    assert catalog["/ViewerPreferences"]["/DisplayDocTitle"]
    assert document.metadata is not None
    assert FILE in (document.metadata.title or "")
    assert document.metadata.author is None


def test_bookmarks_follow_the_sections(document: pypdf.PdfReader) -> None:
    top = [entry.title for entry in document.outline if not isinstance(entry, list)]
    assert top == ["Antenna panel compliance report"]
    inner = [entry.title for entry in document.outline[1] if not isinstance(entry, list)]
    assert inner[:4] == ["Summary", "How to read this", "Offer matrix", "Per offer"]
    assert inner[-1] == "Annex"


def test_every_font_is_embedded(document: pypdf.PdfReader) -> None:
    seen = 0
    for page in document.pages:
        for font in page["/Resources"]["/Font"].values():
            described = font["/DescendantFonts"][0]["/FontDescriptor"]
            assert {"/FontFile", "/FontFile2", "/FontFile3"} & set(described)
            seen += 1
    assert seen


def test_symbols_copy_out_as_themselves(text: str) -> None:
    for symbol in "λ±≥≤°²√−×·–✓✗≠≈△▽◇◆○":
        assert symbol in text, symbol


def test_each_page_carries_number_revision_and_draft(document: pypdf.PdfReader) -> None:
    pages = [page.extract_text() for page in document.pages]
    for number, page in enumerate(pages, start=1):
        assert f"Page {number} of {len(pages)}" in page
        assert "Report SR-2-014, revision A" in page
        assert "DRAFT" in page


def test_the_first_page_is_enough_to_decide(document: pypdf.PdfReader) -> None:
    first = document.pages[0].extract_text()
    for wanted in ("reject", "Decisions asked for", "Approved", "Clause 4.4", "not judged"):
        assert wanted in first


def test_counts_agree_with_the_page(document: pypdf.PdfReader) -> None:
    first = " ".join(document.pages[0].extract_text().split())
    assert "mandatory 3 1 1 1 1 1 1 1 10" in first
    assert "desirable 1 0 0 1 0 0 0 0 2" in first


def test_attachments_with_relationship_description_and_checksum(document: pypdf.PdfReader) -> None:
    assert dict(document.attachments) == {a.name: [a.content] for a in ATTACHED}
    files = {f.get_object()["/UF"]: f.get_object() for f in document.trailer["/Root"]["/AF"]}
    for attached in ATTACHED:
        entry = files[attached.name]
        assert entry["/AFRelationship"] == f"/{attached.relationship}"
        assert hashlib.sha256(attached.content).hexdigest() in entry["/Desc"]
        stated = entry["/EF"]["/F"].get_object()["/Params"]["/CheckSum"]
        raw = stated if isinstance(stated, bytes) else stated.original_bytes
        assert raw == hashlib.md5(attached.content, usedforsecurity=False).digest()


def test_figures_carry_a_text_equivalent(document: pypdf.PdfReader) -> None:
    found: list[str] = []

    def walk(node: pypdf.generic.PdfObject) -> None:
        node = node.get_object()
        if isinstance(node, list):
            for kid in node:
                walk(kid)
        elif isinstance(node, dict):
            if node.get("/S") == "/Figure":
                found.append(str(node.get("/Alt", "")))
            if "/K" in node:
                walk(node["/K"])

    walk(document.trailer["/Root"]["/StructTreeRoot"]["/K"])
    assert len(found) >= 10
    assert all(found)


def test_the_same_page_gives_the_same_bytes(content: bytes) -> None:
    assert pdf_bytes(render_html(sample()), ATTACHED) == content


def test_nothing_is_fetched_and_nothing_is_complained_about(caplog: pytest.LogCaptureFixture) -> None:
    with caplog.at_level(logging.WARNING, logger="weasyprint"):
        pdf_bytes(render_html(sample()))
    assert not caplog.records


@pytest.mark.parametrize("address", ["https://example.invalid/x.png", "file:///etc/hostname"])
def test_an_address_in_a_page_is_refused(address: str, caplog: pytest.LogCaptureFixture) -> None:
    with caplog.at_level(logging.ERROR, logger="weasyprint"):
        pdf_bytes(f"<html lang=en><title>t</title><img alt=x src={address}>")
    assert "disallowed protocol" in caplog.text


def test_missing_native_libraries_give_one_message(monkeypatch: pytest.MonkeyPatch, tmp_path: Path) -> None:
    def no_pango() -> None:
        raise OSError("cannot load library 'libpango-1.0-0'")

    monkeypatch.setattr(pdf_module, "_import_weasyprint", no_pango)
    with pytest.raises(
        PdfUnavailableError, match=r"libpango.*apt-get install.*other formats are not affected"
    ):
        write_pdf("<p>x", tmp_path / "x.pdf")
    assert not list(tmp_path.iterdir())


def test_an_unwritable_place_leaves_no_half_file(tmp_path: Path) -> None:
    with pytest.raises(OutputError):
        write_pdf("<html lang=en><title>t</title><p>x", tmp_path / "missing" / "x.pdf")
    assert not list(tmp_path.iterdir())


@pytest.mark.skipif(shutil.which("qpdf") is None, reason="qpdf is not installed")
def test_qpdf_finds_nothing_wrong(content: bytes, tmp_path: Path) -> None:
    file = tmp_path / "report.pdf"
    file.write_bytes(content)
    subprocess.run(["qpdf", "--check", str(file)], check=True, capture_output=True)


def test_letter_paper(content: bytes) -> None:
    letter = pypdf.PdfReader(io.BytesIO(pdf_bytes(render_html(sample(paper="Letter")))))
    assert [round(float(v)) for v in letter.pages[0].mediabox[2:]] == [612, 792]
    a4 = pypdf.PdfReader(io.BytesIO(content))
    assert [round(float(v)) for v in a4.pages[0].mediabox[2:]] == [595, 842]
