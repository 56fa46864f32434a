"""The whole story on one page: a bidder's file in, an assessment out, then its reports."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from functools import cache
from pathlib import Path

from speccheck import __version__
from speccheck.atomic import write_bytes_atomic
from speccheck.checks import examine, exposure_note, panel_drawings
from speccheck.intake import read_submission
from speccheck.records import Assessment, Finding, MatrixRow, Panel, PanelAssessment, Settings, Tender
from speccheck.records.outputs import SUFFIXES
from speccheck.report.machine import to_json
from speccheck.report.pages.html import render_html
from speccheck.report.pages.pdf import Attachment, pdf_bytes
from speccheck.report.workbooks.review import review_bytes
from speccheck.tender.outcome import outcome


def assess(path: str | Path, *, tender: Tender | None = None, settings: Settings | None = None) -> Assessment:
    """Read one bidder's file and judge every panel in it.

    Parameters
    ----------
    path : the bidder's workbook
    tender : the buyer's requirements, where there are any
    settings : the buyer's settings; those of the tender by default

    Raises
    ------
    UnusableInputError : the file cannot be used at all
    """
    rules = settings or (tender.settings if tender else Settings())
    submission = read_submission(path, headings=rules.headings)
    panels = tuple(_assess_panel(panel, tender, rules) for panel in submission.panels)
    return Assessment(
        submission=submission, settings=rules, panels=panels, tender=tender, program_version=__version__
    )


def _assess_panel(panel: Panel, tender: Tender | None, rules: Settings) -> PanelAssessment:
    findings = examine(panel, rules)
    rows = _rows(panel, tender, findings) if tender else ()
    verdict, reasons = outcome(findings, rows)
    return PanelAssessment(
        panel=panel,
        outcome=verdict,
        findings=findings,
        requirements=rows,
        exposure=exposure_note(panel, rules),
        drawings=panel_drawings(panel, rules, findings),
        reasons=reasons,
    )


def _rows(panel: Panel, tender: Tender, findings: tuple[Finding, ...]) -> tuple[MatrixRow, ...]:
    from speccheck.tender.judging import judge  # noqa: PLC0415 - twelve modules that only a tender needs

    return judge(tender, panel, findings)


def write_outputs(assessment: Assessment, bid: Path, out: Path, formats: Sequence[str]) -> list[Path]:
    """Write the outputs of one bid as ``out/<stem><suffix>``; each is whole or absent.

    Parameters
    ----------
    assessment : what was found
    bid : the bidder's file, attached to the PDF
    out : folder, made where it is missing
    formats : some of the keys of SUFFIXES

    Returns
    -------
    The files written, in the order of SUFFIXES

    Raises
    ------
    OutputError : a file could not be written
    PdfUnavailableError : the PDF libraries of the system are missing; everything else is written by then
    """
    out.mkdir(parents=True, exist_ok=True)
    page = cache(lambda: render_html(assessment))
    result = cache(lambda: to_json(assessment).encode())
    review = cache(lambda: review_bytes(assessment))
    makers: dict[str, Callable[[], bytes]] = {
        "json": result,
        "xlsx": review,
        "html": lambda: page().encode(),
        "pdf": lambda: pdf_bytes(page(), _attachments(bid, result(), review())),
    }
    written = []
    for name, suffix in SUFFIXES.items():
        if name in formats:
            path = out / f"{bid.stem}{suffix}"
            write_bytes_atomic(path, makers[name]())
            written.append(path)
    return written


def _attachments(bid: Path, result: bytes, review: bytes) -> tuple[Attachment, ...]:
    stem = bid.stem
    return (
        Attachment(
            name=f"{stem}{SUFFIXES['json']}",
            content=result,
            description="The whole result, for machines",
            relationship="Data",
        ),
        Attachment(
            name=f"{stem}{SUFFIXES['xlsx']}",
            content=review,
            description="Review workbook",
            relationship="Supplement",
        ),
        Attachment(
            name=bid.name,
            content=bid.read_bytes(),
            description="The bidder's file as judged",
            relationship="Source",
        ),
    )
