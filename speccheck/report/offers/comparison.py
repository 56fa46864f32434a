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
from speccheck.report.offers.comparison_points import MOST_PLACES, points_lines, swing_texts
from speccheck.report.offers.comparison_view import (
    COLUMNS_PER_TABLE,
    MARKS_PER_TABLE,
    Comparison,
    compare,
)
from speccheck.report.pages.view import guard_bands

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
    makers: dict[str, Callable[[], Iterator[bytes]]] = {
        "json": lambda: (text.encode("utf-8", "backslashreplace") for text in comparison_json(evaluation)),
        "xlsx": lambda: iter((_book(view()),)),
        "html": lambda: iter((render_comparison(view(), linked=True).encode("utf-8", "replace"),)),
        "pdf": lambda: iter((_pdf(render_comparison(view())),)),
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


def render_comparison(view: Comparison, *, linked: bool = False) -> str:
    """The comparison as one self-contained HTML page, with links to the reports beside it if `linked`."""
    from speccheck.report.pages.html import render  # noqa: PLC0415 - jinja2 only if asked for

    settings = view.evaluation.settings
    placed = view.placed[:MOST_PLACES]
    return render(
        "comparison.html",
        settings.paper,
        view.numbers,
        view=view,
        levels=tuple(Level),
        groups=view.groups(COLUMNS_PER_TABLE),
        glances=view.groups(MARKS_PER_TABLE),
        placed=placed,
        points=points_lines(view, placed),
        swings=swing_texts(view),
        guards=guard_bands(settings, view.numbers),
        linked=linked,
    )


def _book(view: Comparison) -> bytes:
    from speccheck.report.offers.comparison_book import comparison_bytes  # noqa: PLC0415 - only if asked for

    return comparison_bytes(view)


def _pdf(page: str) -> bytes:
    from speccheck.report.pages.pdf import pdf_bytes  # noqa: PLC0415 - WeasyPrint only if asked for

    return pdf_bytes(page)
