"""The comparison of offers: page, PDF, workbook and JSON from one evaluation."""

from __future__ import annotations

import json
from collections.abc import Sequence
from pathlib import Path

from speccheck.atomic import write_bytes_atomic, write_text_atomic
from speccheck.records import Level
from speccheck.records.evaluations import Evaluation
from speccheck.report.codec import encode
from speccheck.report.offers.comparison_view import MOST_COLUMNS, compare

SCHEMA = "speccheck-comparison/1"


def write_comparison(evaluation: Evaluation, out: str | Path, formats: Sequence[str]) -> tuple[Path, ...]:
    """Write ``comparison.*`` in the formats asked for; returns the paths.

    Raises
    ------
    OutputError : a file cannot be written
    """
    folder = Path(out)
    folder.mkdir(parents=True, exist_ok=True)
    written: list[Path] = []
    if "json" in formats:
        written.append(folder / "comparison.json")
        write_text_atomic(written[-1], comparison_json(evaluation))
    if "xlsx" in formats:
        from speccheck.report.offers.comparison_book import comparison_bytes  # noqa: PLC0415 - only if asked for

        written.append(folder / "comparison.xlsx")
        write_bytes_atomic(written[-1], comparison_bytes(evaluation))
    page = render_comparison(evaluation) if {"html", "pdf"} & set(formats) else ""
    if "html" in formats:
        written.append(folder / "comparison.html")
        write_text_atomic(written[-1], page)
    if "pdf" in formats:
        from speccheck.report.pages.pdf import write_pdf  # noqa: PLC0415 - WeasyPrint only if asked for

        written.append(folder / "comparison.pdf")
        write_pdf(page, written[-1])
    return tuple(written)


def comparison_json(evaluation: Evaluation) -> str:
    """The evaluation as JSON; the same evaluation gives the same text."""
    body = encode(evaluation, "")
    document = {
        "schema": SCHEMA,
        "program": {"name": "speccheck", "version": evaluation.program_version},
        **body,
    }
    for bid in document["bids"]:
        del bid["path"], bid["resumed"]
    return json.dumps(document, ensure_ascii=False, indent=1, sort_keys=True) + "\n"


def render_comparison(evaluation: Evaluation) -> str:
    """The comparison as one self-contained HTML page."""
    from speccheck.report.pages.html import render  # noqa: PLC0415 - jinja2 only if asked for

    view = compare(evaluation)
    levels = tuple(level for level in Level if evaluation.tender is not None)
    return render(
        "comparison.html",
        evaluation.settings.paper,
        view.numbers,
        view=view,
        levels=levels,
        most_columns=MOST_COLUMNS,
    )
