"""One bid from file to outputs: the unit of work, the same in this process, another one or on a cluster.

The contract: reads one file and the rules; writes only its own outputs, each whole or absent, and last
of all its mark; returns a small summary; never raises for anything the file does.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from pathlib import Path

from speccheck import pipeline
from speccheck.batch.finished import file_digest, read_mark, under_way, write_mark
from speccheck.batch.inputs import BidFile
from speccheck.errors import OutputError, UnusableInputError
from speccheck.records import Assessment, Settings, Tender
from speccheck.records.evaluations import Bid
from speccheck.records.outputs import SUFFIXES
from speccheck.report.pages.clarification import write_clarification
from speccheck.report.pages.pdf import PdfUnavailableError
from speccheck.tender.summaries import summarise


@dataclass(frozen=True, slots=True, kw_only=True)
class Rules:
    """Everything besides the file that a result depends on."""

    tender: Tender | None
    settings: Settings
    formats: Sequence[str]
    out: Path
    digest: str
    resume: bool = False


def do_bid(bid: BidFile, rules: Rules) -> Bid:
    """Assess one bid and write its outputs, or say why it could not be used."""
    out = rules.out / bid.folder if bid.folder else rules.out
    if rules.resume:
        done = read_mark(out, bid.path, rules.digest)
        if done is not None:
            return replace(done, path=str(bid.path), resumed=True)
    try:
        with under_way(out, bid.path.name, bid.path.stem):
            return _done(bid, rules, out)
    except (UnusableInputError, OutputError) as error:
        return failed(bid, str(error))
    except Exception as error:
        kind = type(error).__name__
        return failed(
            bid, f"{bid.path.name}: the program failed on this file ({kind}: {error}); please report it"
        )


def _done(bid: BidFile, rules: Rules, out: Path) -> Bid:
    assessment = pipeline.assess(bid.path, tender=rules.tender, settings=rules.settings)
    outputs, note = _outputs(assessment, bid.path, out, rules.formats)
    result = Bid(
        path=str(bid.path),
        file=assessment.submission.file,
        folder=bid.folder,
        sha256=assessment.submission.sha256,
        offers=summarise(assessment),
        outputs=tuple(path.name for path in outputs),
        note=note,
    )
    if not note and result.sha256 == file_digest(bid.path):
        write_mark(out, bid.path, rules.digest, result)
    return result


def _outputs(
    assessment: Assessment, path: Path, out: Path, formats: Sequence[str]
) -> tuple[Sequence[Path], str]:
    """Outputs written; without the PDF and with a note where the system cannot make one."""
    try:
        made, note = pipeline.write_outputs(assessment, path, out, formats), ""
    except PdfUnavailableError as error:
        expected = [out / f"{path.stem}{SUFFIXES[name]}" for name in formats if name != "pdf"]
        made, note = [output for output in expected if output.is_file()], str(error)
    return [*made, *write_clarification(assessment, out, path.stem, formats)], note


def failed(bid: BidFile, message: str) -> Bid:
    """A bid that could not be used."""
    return Bid(path=str(bid.path), file=bid.path.name, folder=bid.folder, error=message)
