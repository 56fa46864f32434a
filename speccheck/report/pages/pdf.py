"""The same page as PDF: tagged, bookmarked, its files attached; nothing is fetched while rendering."""

from __future__ import annotations

import contextlib
import datetime as dt
import gc
import hashlib
import io
import os
import warnings
import zlib
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import Any, Literal

from speccheck.atomic import write_bytes_atomic
from speccheck.report.pages.inks import for_print
from speccheck.text import plain

_UNDATED = dt.datetime(2000, 1, 1, tzinfo=dt.UTC)
VARIANT = "pdf/a-3a"
"""Form in which the file is written: tags and attachments need it. No validator has confirmed a level."""

Relationship = Literal["Source", "Data", "Supplement", "Unspecified"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Attachment:
    """A file that travels inside the PDF; `relationship` as in ISO 19005-3 (Source, Data, Supplement)."""

    name: str
    content: bytes
    description: str
    relationship: Relationship = "Supplement"


class PdfUnavailableError(Exception):
    """The libraries that a PDF needs are not on this machine; the HTML report does not need them."""

    def __init__(self, reason: str) -> None:
        self.reason = reason
        super().__init__(reason)

    def __str__(self) -> str:
        return (
            f"no PDF was written: found {self.reason}; expected the Pango libraries (version 1.44 or later); "
            "install them (Debian and Ubuntu: apt-get install libpango-1.0-0 libpangoft2-1.0-0 "
            "libharfbuzz-subset0; macOS: brew install pango) or leave pdf out of the formats; "
            "the other formats are not affected"
        )


def write_pdf(html: str, path: str | Path, attachments: Sequence[Attachment] = ()) -> None:
    """Write a page of this program as PDF; the same page and date give the same bytes.

    Parameters
    ----------
    html : a whole document as `render_html` makes it
    path : where the PDF goes; whole or absent
    attachments : files that travel inside, with relationship, description and checksum

    Raises
    ------
    PdfUnavailableError : native libraries are missing
    OutputError : the file cannot be written
    """
    write_bytes_atomic(path, pdf_bytes(html, attachments))


def pdf_bytes(html: str, attachments: Sequence[Attachment] = ()) -> bytes:
    """The PDF of a page; parameters and errors as for `write_pdf`."""
    weasyprint = _load_weasyprint()
    fetcher = weasyprint.urls.URLFetcher(allowed_protocols=["data"])
    document = weasyprint.HTML(string=for_print(html), url_fetcher=fetcher)
    moment = _moment()
    enclosed = [
        weasyprint.Attachment(
            file_obj=io.BytesIO(item.content),
            name=plain(item.name, limit=200),
            description=plain(f"{item.description} (SHA-256 {hashlib.sha256(item.content).hexdigest()})"),
            created=moment,
            modified=moment,
            relationship=item.relationship,
        )
        for item in attachments
    ]
    with warnings.catch_warnings(), _collector_at_rest():
        # WeasyPrint leaves its colour profile to the garbage collector, which warns of an open file
        warnings.simplefilter("ignore", ResourceWarning)
        content: bytes = document.write_pdf(
            finisher=_settle,
            attachments=enclosed,
            pdf_variant=VARIANT,
            pdf_identifier=hashlib.sha256(html.encode("utf-8", "replace")).digest()[:16],
        )
    return content


@contextlib.contextmanager
def _collector_at_rest() -> Iterator[None]:
    """No search for cycles while a page is laid out: its million objects are all in use until the end."""
    was_on = gc.isenabled()
    gc.disable()
    try:
        yield
    finally:
        if was_on:
            gc.enable()


def _settle(_: Any, pdf: Any) -> None:
    """Give every object its final bytes: pydyf asks for them twice, for the file and for its identifier.

    Streams are packed here, at zlib's usual level: the highest takes twice as long for one byte in a hundred.
    """
    import pydyf  # noqa: PLC0415 - comes with WeasyPrint

    class Settled(pydyf.Object):  # type: ignore[misc, unused-ignore]
        data, compressible = b"", False

    for place, item in enumerate(pdf.objects):
        if item.free == "f":
            continue
        if isinstance(item, pydyf.Stream) and item.compress:
            plainly = pydyf.Stream(item.stream).data
            content = plainly[plainly.index(b"stream\n") + 7 : -len(b"\nendstream")]
            item.extra["Filter"] = "/FlateDecode"
            item.stream, item.compress = [zlib.compress(content)], False
        settled = pdf.objects[place] = Settled()
        settled.number, settled.generation, settled.free = item.number, item.generation, item.free
        settled.data, settled.compressible = item.data, item.compressible


def _load_weasyprint() -> Any:
    """WeasyPrint, loaded only when a PDF is asked for: it takes longer to load than HTML to write."""
    try:
        return _import_weasyprint()
    except (ImportError, OSError) as error:
        raise PdfUnavailableError(str(error).splitlines()[0][:300]) from error


def _import_weasyprint() -> Any:
    import weasyprint  # noqa: PLC0415

    return weasyprint


def _moment() -> dt.datetime:
    """Date of the attachments: SOURCE_DATE_EPOCH, else none of any meaning, so that a run can be repeated."""
    epoch = os.environ.get("SOURCE_DATE_EPOCH", "")
    return dt.datetime.fromtimestamp(int(epoch), dt.UTC) if epoch.isdigit() else _UNDATED
