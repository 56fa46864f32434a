"""The comparison of offers: page, PDF, workbook and JSON from one evaluation."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from functools import cache
from pathlib import Path

from speccheck.atomic import whole_file
from speccheck.records import Level
from speccheck.records.evaluations import Bid, Evaluation, Offer
from speccheck.report.codec import encode_fields
from speccheck.report.machine import compact, member
from speccheck.report.offers.comparison_view import Comparison, compare

SCHEMA = "speccheck-comparison/1"
_NOT_SAID_OF_A_BID = frozenset({"path", "resumed", "offers"})
"""Fields that depend on where and when it was judged, and the offers, which follow."""


def write_comparison(evaluation: Evaluation, out: str | Path, formats: Sequence[str]) -> tuple[Path, ...]:
    """Write ``comparison.*`` in the formats asked for; returns the paths.

    Raises
    ------
    OutputError : a file cannot be written
    PdfUnavailableError : the PDF libraries of the system are missing; everything else is written by then
    """
    folder = Path(out)
    folder.mkdir(parents=True, exist_ok=True)
    view = cache(lambda: compare(evaluation))
    page = cache(lambda: render_comparison(view()).encode("utf-8", "replace"))
    makers: dict[str, Callable[[], Iterator[bytes]]] = {
        "json": lambda: (text.encode("utf-8", "backslashreplace") for text in comparison_json(evaluation)),
        "xlsx": lambda: iter((_book(view()),)),
        "html": lambda: iter((page(),)),
        "pdf": lambda: iter((_pdf(page().decode()),)),
    }
    written: list[Path] = []
    for name, make in makers.items():
        if name in formats:
            written.append(folder / f"comparison.{name}")
            with whole_file(written[-1]) as stream:
                stream.writelines(make())
    return tuple(written)


def comparison_json(evaluation: Evaluation) -> Iterator[str]:
    """The evaluation as JSON, a row of an offer a line; the same evaluation gives the same text."""
    yield f'{{"schema":{compact(SCHEMA)},\n'
    yield f'"program":{compact({"name": "speccheck", "version": evaluation.program_version})},\n'
    for name, value in encode_fields(evaluation, "", leave_out=frozenset({"bids"})).items():
        yield f"{compact(name)}:{member(value)},\n"
    yield '"bids":['
    for number, bid in enumerate(evaluation.bids):
        yield f"{',' if number else ''}\n{_bid_json(bid)}"
    yield "]}\n"


def _bid_json(bid: Bid) -> str:
    said = compact(encode_fields(bid, "", leave_out=_NOT_SAID_OF_A_BID))
    return f'{said[:-1]},"offers":[{",".join(map(_offer_json, bid.offers))}]}}'


def _offer_json(offer: Offer) -> str:
    said = compact(encode_fields(offer, "", leave_out=frozenset({"cells"})))
    rows = ",\n".join(compact(encode_fields(cell, "")) for cell in offer.cells)
    return f'\n{said[:-1]},"cells":[\n{rows}]}}'


def render_comparison(view: Comparison) -> str:
    """The comparison as one self-contained HTML page."""
    from speccheck.report.pages.html import render  # noqa: PLC0415 - jinja2 only if asked for

    evaluation = view.evaluation
    levels = tuple(level for level in Level if evaluation.tender is not None)
    return render("comparison.html", evaluation.settings.paper, view.numbers, view=view, levels=levels)


def _book(view: Comparison) -> bytes:
    from speccheck.report.offers.comparison_book import comparison_bytes  # noqa: PLC0415 - only if asked for

    return comparison_bytes(view)


def _pdf(page: str) -> bytes:
    from speccheck.report.pages.pdf import pdf_bytes  # noqa: PLC0415 - WeasyPrint only if asked for

    return pdf_bytes(page)
