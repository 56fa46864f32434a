"""How a bid was read, as a workbook and as JSON: nothing is judged here."""

from __future__ import annotations

from pathlib import Path

from speccheck.atomic import write_bytes_atomic
from speccheck.records import Assessment, Settings, Submission
from speccheck.report.codec import encode, encode_fields
from speccheck.report.machine import laid_out
from speccheck.report.workbooks.book import book_bytes
from speccheck.report.workbooks.review import imprint
from speccheck.report.workbooks.review_inputs import inputs_as_read, mirror_grids
from speccheck.report.workbooks.review_places import place_everything
from speccheck.report.workbooks.sheets import Column, Grid, Table

SCHEMA = "speccheck-reading/1"


def write_read_book(submission: Submission, path: Path | str) -> None:
    """Write the readings and a mirror of the input sheets to `path`.

    Raises
    ------
    OutputError : `path` cannot be written
    """
    write_bytes_atomic(path, read_book_bytes(submission))


def read_book_bytes(submission: Submission) -> bytes:
    """Return the workbook of `write_read_book`; the same submission gives the same bytes."""
    unjudged = Assessment(submission=submission, settings=Settings(issued=True))
    places = place_everything(unjudged)
    sheets: list[Table | Grid] = [
        _read_me(submission, places.mirrors),
        inputs_as_read(submission, places),
        *mirror_grids(unjudged, places),
    ]
    return book_bytes(sheets, imprint(unjudged, "Inputs as read"))


def read_json(submission: Submission) -> str:
    """Return the readings as JSON; records have the members they have in the result's schema."""
    home = submission.file
    return laid_out(
        {
            "schema": SCHEMA,
            "input": {"file": home, "sha256": submission.sha256, "bytes": submission.size_bytes},
            "panels": [encode_fields(panel, home) for panel in submission.panels],
            "unread": encode(submission.unread, home),
            "notices": encode(submission.notices, home),
        }
    )


def _read_me(submission: Submission, mirrors: dict[str, str]) -> Table:
    rows = [
        ("Input file", submission.file),
        ("Input SHA-256", submission.sha256),
        ("Nothing is judged", "This workbook shows how each cell was understood, and what was not."),
        ("Sheet Inputs as read", "One row a cell and figure; not understood text and notices at the end."),
        *((sheet, f"Mirror of the bidder's sheet '{name}'") for name, sheet in mirrors.items()),
        *((one.name, "was hidden in the bidder's file") for one in submission.mirror if one.hidden),
        ("Text from the bidder", "Stored as text and never run as a formula."),
    ]
    return Table(
        name="Read me",
        columns=(
            Column(heading="Topic", width=26, look="bold"),
            Column(heading="Text", width=100, look="wrap"),
        ),
        rows=rows,
    )
