"""A bidder's own copy: no other bidder in text, metadata, attachments, parts or object streams."""

from __future__ import annotations

import hashlib
import io
import re
import shutil
import subprocess
import zipfile
from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path

import pypdf
import pytest

from speccheck.intake.tenders.tender_book import read_tender
from speccheck.pipeline import assess, write_outputs
from speccheck.records import CellRef, Deviation
from speccheck.tender.copies import copy_for

SAMPLES = Path(__file__).parents[2] / "sample_specs"
OWN, OTHER = SAMPLES / "eskerfold-slim.xlsx", SAMPLES / "cindermoor-beam.xlsx"
NAMED = "Thornquay Aerials"
"""A third bidder, whom only an accepted deviation of the tender names."""

pytestmark = pytest.mark.skipif(
    not (shutil.which("qpdf") and shutil.which("pdftotext")), reason="qpdf or poppler-utils is not installed"
)


@pytest.fixture(scope="module")
def outputs(tmp_path_factory: pytest.TempPathFactory) -> dict[str, Path]:
    tender = read_tender(SAMPLES / "tender.xlsx")
    accepted = [
        Deviation(where=CellRef("tender.xlsx", "Deviations", f"A{row}"), clause=clause, offer=offer,
                  reason=f"agreed with {offer}", approver="", expires="")
        for row, clause, offer in ((2, "T-08", NAMED), (3, "T-09", "cindermoor-beam"))
    ]  # fmt: skip
    tender = replace(tender, deviations=tuple(accepted))
    (copy,) = copy_for("eskerfold-slim", [assess(path, tender=tender) for path in (OWN, OTHER)])
    folder = tmp_path_factory.mktemp("copy")
    write_outputs(copy, OWN, folder, ("html", "pdf", "xlsx", "json"))
    return {path.suffix: path for path in folder.iterdir() if "questions" not in path.name}


def traces() -> list[bytes]:
    """What would give the other bidders away: file, panel, maker and fingerprint."""
    digest = hashlib.sha256(OTHER.read_bytes()).hexdigest()
    return [text.encode() for text in ("cindermoor", "cinder beam", NAMED.lower(), digest, digest[:16])]


def found(content: bytes) -> list[bytes]:
    """Traces in a content, as plain bytes or as the UTF-16 of PDF strings, in any case of letters."""
    low = content.lower()
    wide = [trace.decode().encode("utf-16-be") for trace in traces()]
    hexed = [text.hex().encode() for text in (*traces(), *wide)]
    return [trace for trace in (*traces(), *wide, *hexed) if trace in low]


def parts(content: bytes) -> Iterator[bytes]:
    """A file, and what it holds where it is an archive."""
    yield content
    if content.startswith(b"PK"):
        with zipfile.ZipFile(io.BytesIO(content)) as archive:
            for name in archive.namelist():
                yield name.encode()
                yield archive.read(name)


def test_the_search_finds_what_it_looks_for() -> None:
    assert any(found(part) for part in parts(OTHER.read_bytes()))
    assert found("Cinder Beam 128".encode("utf-16-be").lower())


def test_no_output_names_another_bidder(outputs: dict[str, Path]) -> None:
    assert set(outputs) == {".html", ".pdf", ".xlsx", ".json"}
    for path in outputs.values():
        assert [trace for part in parts(path.read_bytes()) for trace in found(part)] == [], path.name


def test_the_pdf_holds_no_trace_in_objects_text_or_metadata(outputs: dict[str, Path], tmp_path: Path) -> None:
    unpacked = tmp_path / "unpacked.pdf"
    options = ("--qdf", "--object-streams=disable", "--decode-level=all")
    subprocess.run(["qpdf", *options, str(outputs[".pdf"]), str(unpacked)], check=True)
    content = unpacked.read_bytes()
    assert b"/Type /EmbeddedFile" in content
    assert b"/ObjStm" not in content
    text = subprocess.run(["pdftotext", str(unpacked), "-"], check=True, capture_output=True).stdout
    assert b"Eskerfold Slim" in text
    squeezed = re.sub(rb"\s", b"", text)
    assert found(content) == found(text) == []
    assert not [trace for trace in traces() if trace.replace(b" ", b"") in squeezed.lower()]


def test_what_the_pdf_carries_holds_no_trace(outputs: dict[str, Path]) -> None:
    document = pypdf.PdfReader(outputs[".pdf"])
    carried = {name: content for name, contents in document.attachments.items() for content in contents}
    assert OWN.name in carried
    assert len(carried) == 3
    for name, content in carried.items():
        assert [trace for part in parts(content) for trace in found(part)] == [], name
    assert not found(str(document.metadata).encode())
    assert document.xmp_metadata is not None
    assert not found(document.trailer["/Root"]["/Metadata"].get_object().get_data())
