"""Arguments, exit codes and what goes to the screen; no logic.

Each command imports what it needs when it runs: importing all of it would take a bid's time again.
"""

from __future__ import annotations

import gc
import os
import signal
import sys
from enum import IntEnum
from pathlib import Path
from typing import TYPE_CHECKING

import click

from speccheck import __version__
from speccheck.errors import OutputError, UnusableInputError
from speccheck.records import Outcome
from speccheck.records.outputs import FORMATS

if TYPE_CHECKING:
    from speccheck.records import Assessment, Tender
    from speccheck.records.evaluations import Evaluation


class Exit(IntEnum):
    """Exit codes of every command."""

    ACCEPTABLE = 0
    CLARIFY_OR_REJECT = 1
    WRONG_USAGE = 2
    UNUSABLE_INPUT = 3
    INTERRUPTED = 130


EXIT_CODES = """\b
Exit codes:
  0  everything is acceptable
  1  something to clarify or to reject
  2  wrong usage
  3  an input could not be used (the rest was still done)
  130  interrupted; what is written is whole"""

_path = click.Path(path_type=Path)


def parse_formats(_context: click.Context, _option: click.Parameter, text: str) -> tuple[str, ...]:
    """The formats asked for, in the order of FORMATS; BadParameter names an unknown one."""
    wanted = {part.strip().lower() for part in text.split(",") if part.strip()}
    unknown = sorted(wanted - set(FORMATS))
    if unknown or not wanted:
        found = ", ".join(unknown) or text
        raise click.BadParameter(f"found '{found}'; expected some of {', '.join(FORMATS)}")
    return tuple(name for name in FORMATS if name in wanted)


@click.group(epilog=EXIT_CODES, context_settings={"help_option_names": ["-h", "--help"]})
@click.version_option(__version__, prog_name="speccheck")
def cli() -> None:
    """Vet antenna-panel bids on paper: read the workbooks, recompute what physics and arithmetic
    allow, judge the tender's requirements, write the report."""


def main() -> None:
    """Run the command line; an input or output that cannot be used ends it with one message."""
    # A panel's matrices are small: more threads would cost more than they save. Read by numpy when imported.
    os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")
    # Nearly everything made in a run lives to its end and hardly any of it in cycles: looking for those
    # after every 700 objects, and through all of them at the end, would take a tenth of the whole run.
    gc.set_threshold(50_000)
    before = signal.signal(signal.SIGINT, _stop)
    try:
        cli(standalone_mode=True)
    except (UnusableInputError, OutputError) as error:
        click.echo(f"speccheck: {error}", err=True)
        sys.exit(Exit.UNUSABLE_INPUT)
    except SystemExit as end:
        if end.code != Exit.INTERRUPTED:  # libraries that were interrupted still remove their temporary files
            gc.freeze()
        raise
    finally:
        signal.signal(signal.SIGINT, before)


def _stop(_number: int, _frame: object) -> None:
    """Give up on an interrupt (Ctrl-C), leaving nothing unfinished; a second one ends at once."""
    signal.signal(signal.SIGINT, signal.SIG_DFL)
    click.echo("\nspeccheck: interrupted; what is under way is given up", err=True)
    sys.exit(Exit.INTERRUPTED)


@cli.command(epilog=EXIT_CODES)
@click.argument("bids", nargs=-1, required=True, type=_path)
@click.option("--tender", "tender_file", type=_path, help="The buyer's workbook.")
@click.option("--out", default="reports", show_default=True, type=_path, help="Folder for the outputs.")
@click.option(
    "--formats",
    default=",".join(FORMATS),
    show_default=True,
    callback=parse_formats,
    help="Which outputs to write, separated by commas.",
)
@click.option("--jobs", default=1, show_default=True, type=click.IntRange(1, 64), help="Processes to use.")
@click.option("--resume", is_flag=True, help="Keep what is done of bids whose input and rules are unchanged.")
@click.option(
    "--copy-for", "copies", multiple=True, metavar="BIDDER", help="Write this bidder's own copy too."
)
def check(
    *,
    bids: tuple[Path, ...],
    tender_file: Path | None,
    out: Path,
    formats: tuple[str, ...],
    jobs: int,
    resume: bool,
    copies: tuple[str, ...],
) -> None:
    """Vet the BIDS (files or folders) and write the reports.

    More than one bid or panel adds the comparison of the offers. Where a folder of bids holds one
    workbook with a sheet Requirements and no --tender is given, that workbook is the tender.
    """
    from speccheck import screen
    from speccheck.batch import assess_many

    tender_file, tender = _tender(bids, tender_file)
    progress = screen.Progress(sys.stdout)
    with screen.resumable(progress):
        evaluation = assess_many(
            bids,
            out=out,
            tender=tender,
            tender_file=tender_file,
            formats=formats,
            jobs=jobs,
            resume=resume,
            progress=progress,
        )
    if not evaluation.bids:
        raise click.UsageError(
            f"no bid found in {', '.join(map(str, bids))}: name a workbook or a folder with some"
        )
    click.echo()
    click.echo(screen.outcome_table(evaluation))
    click.echo(f"\nOutputs in {out}")
    for bidder in copies:
        from speccheck.batch.copying import write_copy

        written = write_copy(bidder, evaluation.bids, out=out, tender=tender, formats=formats)
        click.echo(f"Copy for {bidder} in {written[0].parent}")
    sys.exit(_exit_code(evaluation))


def _tender(bids: tuple[Path, ...], tender_file: Path | None) -> tuple[Path | None, Tender | None]:
    if tender_file is None:
        from speccheck.batch.lone_tender import lone_tender

        tender_file = lone_tender(bids)
        if tender_file is None:
            return None, None
        click.echo(f"Tender: {tender_file} (found among the bids; name another with --tender)")
    from speccheck.report.screens.tender_listing import tender_summary

    tender = _read_vetted(tender_file)
    click.echo(tender_summary(tender))
    return tender_file, tender


def _read_vetted(path: Path) -> Tender:
    from speccheck.intake.tenders.tender_book import read_tender
    from speccheck.tender.vetting import vetted

    return vetted(read_tender(path))


def _read_tender(path: Path | None) -> Tender | None:
    if path is None:
        return None
    from speccheck.intake.tenders.tender_book import read_tender

    return read_tender(path)


def _exit_code(evaluation: Evaluation) -> Exit:
    if any(bid.error for bid in evaluation.bids):
        return Exit.UNUSABLE_INPUT
    outcomes = {offer.outcome for bid in evaluation.bids for offer in bid.offers}
    return Exit.ACCEPTABLE if outcomes <= {Outcome.ACCEPTABLE} else Exit.CLARIFY_OR_REJECT


@cli.command(epilog=EXIT_CODES)
@click.argument("bid", type=_path)
@click.option("--out", type=_path, help="Folder for the same as workbook and JSON.")
@click.option("--tender", "tender_file", type=_path, help="The buyer's workbook, for its Headings sheet.")
def read(bid: Path, out: Path | None, tender_file: Path | None) -> None:
    """Show how each cell of BID was understood; nothing is judged.

    Of a tender workbook it shows each wording beside its reading.
    """
    from speccheck.batch.lone_tender import has_requirements
    from speccheck.intake import read_submission
    from speccheck.report.screens.listing import listing

    if has_requirements(bid):
        from speccheck.report.screens.tender_listing import tender_listing

        click.echo(tender_listing(_read_vetted(bid)))
        return
    tender = _read_tender(tender_file)
    submission = read_submission(bid, headings=tender.settings.headings if tender else {})
    click.echo(listing(submission))
    if out is not None:
        from speccheck.atomic import write_bytes_atomic
        from speccheck.report.workbooks.readbook import read_json, write_read_book

        out.mkdir(parents=True, exist_ok=True)
        write_read_book(submission, out / f"{bid.stem}.reading.xlsx")
        write_bytes_atomic(out / f"{bid.stem}.reading.json", read_json(submission).encode())
        click.echo(f"\nWritten to {out}")


@cli.command(epilog=EXIT_CODES)
@click.argument("target", metavar="OUT.xlsx", type=_path)
@click.option("--tender", "tender_file", type=_path, help="Ask for exactly what this tender requires.")
def form(target: Path, tender_file: Path | None) -> None:
    """Write a blank bid form to hand to bidders."""
    from speccheck.report.workbooks.form import write_form

    write_form(target, _read_tender(tender_file))
    click.echo(f"Written: {target}")


@cli.command(epilog=EXIT_CODES)
@click.argument("bid", type=_path)
@click.argument("answered", type=_path)
@click.option("--tender", "tender_file", type=_path, help="The buyer's workbook.")
@click.option("--out", default="reports", show_default=True, type=_path, help="Folder for the outputs.")
def answers(bid: Path, answered: Path, tender_file: Path | None, out: Path) -> None:
    """Set the answers of BID's clarification list (ANSWERED.xlsx) beside the figures first stated.

    A changed figure is named as a change of substance; the offer itself stays as it was opened.
    """
    from speccheck.intake.tenders.answers import read_answers
    from speccheck.pipeline import assess
    from speccheck.report.pages.clarification import write_answers
    from speccheck.tender.answers import take_in

    assessment = assess(bid, tender=_read_tender(tender_file))
    taken = take_in(assessment, read_answers(answered))
    out.mkdir(parents=True, exist_ok=True)
    for path in write_answers(assessment, taken, out, bid.stem):
        click.echo(f"Written: {path}")
    for one in taken:
        click.echo(f"  {one.answer.number}: {one.kind.value}")


@cli.command(epilog=EXIT_CODES)
@click.argument("slug", required=False)
def explain(slug: str | None) -> None:
    """Tell what a check does: formula, inputs, assumptions, source, worked example."""
    from speccheck import screen
    from speccheck.checks.registry import CHECKS

    if slug is None:
        click.echo(screen.list_of_checks(CHECKS.values()))
        return
    if slug not in CHECKS:
        raise click.UsageError(f"no check '{slug}'; speccheck explain lists them all")
    click.echo(screen.explanation(CHECKS[slug]))


@cli.command(epilog=EXIT_CODES)
@click.argument("old", type=_path)
@click.argument("new", type=_path)
def compare(old: Path, new: Path) -> None:
    """Show what changed between two results (JSON) of one bid."""
    from speccheck import revisions

    revision = revisions.compare(_stored(old), _stored(new))
    click.echo(revisions.comparison_text(revision))
    same = not revision.changes and revision.old_sha256 == revision.new_sha256
    sys.exit(Exit.ACCEPTABLE if same else Exit.CLARIFY_OR_REJECT)


def _stored(path: Path) -> Assessment:
    from speccheck.report.machine import from_json

    try:
        text = path.read_text(encoding="utf-8")
    except (OSError, UnicodeDecodeError) as error:
        raise UnusableInputError(
            str(path),
            found=f"a file that cannot be read as text ({error})",
            expected="a .result.json file as written by speccheck check",
            remedy="check the name and give the JSON, not the report",
        ) from error
    return from_json(text, str(path))
