"""Many bids under one set of rules: every file done or named, and the comparison of their offers."""

from __future__ import annotations

from collections.abc import Callable, Generator, Iterable, Sequence
from contextlib import closing, suppress
from pathlib import Path

from speccheck import __version__
from speccheck.batch.finished import rules_digest, under_way
from speccheck.batch.inputs import BidFile, find_bids
from speccheck.batch.work import Rules, do_bid
from speccheck.records import Settings, Tender
from speccheck.records.evaluations import Bid, Evaluation
from speccheck.records.outputs import FORMATS
from speccheck.report.pages.pdf import PdfUnavailableError
from speccheck.tender.ranking import standings, swings, weight_notes, weight_table, weights

__all__ = ["BidFile", "Evaluation", "assess_many", "find_bids"]

Progress = Callable[[int, int, Bid], None]
"""Called after each bid with the number done, the number of all, and its result."""


def assess_many(
    paths: Iterable[str | Path],
    *,
    out: str | Path,
    tender: Tender | None = None,
    tender_file: str | Path | None = None,
    settings: Settings | None = None,
    formats: Sequence[str] = FORMATS,
    jobs: int = 1,
    resume: bool = False,
    progress: Progress | None = None,
) -> Evaluation:
    """Assess many bids; outputs per bid, and ``comparison.*`` where there is more than one bid or panel.

    Parameters
    ----------
    paths : files and folders
    out : folder of the outputs, made if missing
    tender, settings : the rules, one set for all
    tender_file : the tender's own file, so that it is not taken for a bid
    formats : any of html, pdf, xlsx, json
    jobs : processes
    resume : skip bids whose input, rules and outputs are unchanged
    progress : called after each bid

    Raises
    ------
    OutputError : the comparison cannot be written; a bid's own trouble is in its `error`
    """
    bids = find_bids(paths, tender_file=tender_file)
    rules = _rules(tender, settings, formats, Path(out), resume=resume)
    results: dict[int, Bid] = {}
    with closing(_results(bids, rules, jobs)) as finished:
        for place, result in finished:
            results[place] = result
            if progress is not None:
                progress(len(results), len(bids), result)
    evaluation = evaluate([results[place] for place in sorted(results)], tender, rules.settings, rules.digest)
    if len(bids) > 1 or sum(len(bid.offers) for bid in evaluation.bids) > 1:
        from speccheck.report.offers.comparison import write_comparison  # noqa: PLC0415 - not for a single offer

        # that there is no PDF is told by the note of every bid
        with suppress(PdfUnavailableError), under_way(rules.out, "comparison", "comparison"):
            write_comparison(evaluation, rules.out, formats)
    return evaluation


def _results(bids: Sequence[BidFile], rules: Rules, jobs: int) -> Generator[tuple[int, Bid]]:
    """Place and result of each bid, in the order they are finished; closing it ends what is under way."""
    if jobs <= 1 or len(bids) <= 1:
        return ((place, do_bid(bid, rules)) for place, bid in enumerate(bids))
    from speccheck.batch.pool import run  # noqa: PLC0415 - the process pool is not for a single bid

    return run(bids, rules, jobs)


def evaluate(bids: Sequence[Bid], tender: Tender | None, settings: Settings, digest: str = "") -> Evaluation:
    """Bids put side by side: order by points, and how far a weight must move to change it."""
    requirements = tender.requirements if tender else ()
    placed = standings(bids, requirements) if tender else ()
    return Evaluation(
        bids=tuple(bids),
        settings=settings,
        tender=tender,
        standings=placed,
        swings=swings(placed, bids, requirements),
        weights=weight_table(requirements),
        points_possible=sum(weights(requirements).values()),
        weighted=any(r.weight is not None for r in requirements),
        rules_sha256=digest,
        program_version=__version__,
        notes=weight_notes(requirements) if tender else (),
    )


def _rules(
    tender: Tender | None, settings: Settings | None, formats: Sequence[str], out: Path, *, resume: bool
) -> Rules:
    chosen = settings or (tender.settings if tender else Settings())
    digest = rules_digest(tender, chosen, formats, __version__)
    return Rules(
        tender=tender, settings=chosen, formats=tuple(formats), out=out, digest=digest, resume=resume
    )
