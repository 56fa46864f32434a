"""What the command line shows: progress, a short table, the explanation of a check."""

from __future__ import annotations

import re
import sys
import time
from collections.abc import Callable, Iterable, Iterator, Sequence
from contextlib import contextmanager
from textwrap import wrap
from typing import TextIO

from speccheck.checks.registry import Check
from speccheck.dictionary import parameters
from speccheck.records import Outcome
from speccheck.records.evaluations import Bid, Evaluation
from speccheck.text import plain

_SYMBOLS = {Outcome.ACCEPTABLE: "✓", Outcome.CLARIFY: "?", Outcome.REJECT: "×"}
_WIDTH = 100
_BAR = 24
_MORE = re.compile(r" \(\+\d+ more\)$")
_MOST_LINES = 3
_SECTIONS = ("Formula", "Assumptions", "Worked example")


class Progress:
    """A line for each bid that is done; below them, on a terminal, a bar with count and time left."""

    def __init__(self, stream: TextIO, clock: Callable[[], float] = time.monotonic) -> None:
        self._stream = stream
        self._clock = clock
        self._started = clock()
        self._worked = 0
        self.count = ""

    def __call__(self, done: int, total: int, bid: Bid) -> None:
        """Tell of one bid; only bids that were worked on tell how long the others will take."""
        self._worked += not bid.resumed
        self.count = f"{done} of {total} bids"
        left = ""
        if self._worked and done < total:
            left = f", {_duration((self._clock() - self._started) / self._worked * (total - done))} left"
        line = progress_line(done, total, bid, left)
        if not self._stream.isatty():
            print(line, file=self._stream, flush=True)
            return
        full = round(_BAR * done / total)
        bar = f"{'━' * full}{'╌' * (_BAR - full)} {self.count}{left}" if done < total else ""
        print(f"\r\x1b[K{line}\n{bar}", end="", file=self._stream, flush=True)


def _duration(seconds: float) -> str:
    if seconds < 90:
        return f"{max(round(seconds), 1)} s"
    minutes = round(seconds / 60)
    return f"{minutes} min" if minutes < 90 else f"{minutes // 60} h {minutes % 60} min"


@contextmanager
def resumable(progress: Progress) -> Iterator[None]:
    """Say what is done where the program is ended early."""
    try:
        yield
    except SystemExit:
        print(  # noqa: T201
            f"speccheck: stopped, {progress.count or 'no bid'} done; every file written is whole, "
            "and the same command with --resume does the rest",
            file=sys.stderr,
        )
        raise


def progress_line(done: int, total: int, bid: Bid, left: str = "") -> str:
    """One line about a bid that has just been done; `left` tells the time left."""
    count = f"[{done:>{len(str(total))}}/{total}{left}]"
    name = plain(bid.label, 60)
    if bid.error:
        return f"{count} {name}: not used\n    {plain(bid.error, 600)}"
    outcomes = ", ".join(f"{plain(o.panel, 40)} {o.outcome.value}" for o in bid.offers[:4])
    more = f" and {len(bid.offers) - 4} more" if len(bid.offers) > 4 else ""
    state = " (unchanged, kept)" if bid.resumed else ""
    note = f"\n    {bid.note}" if bid.note else ""
    return f"{count} {name}: {outcomes or 'no panel'}{more}{state}{note}"


def outcome_table(evaluation: Evaluation) -> str:
    """Panel, outcome and what blocks, one row a panel; unusable bids last."""
    rows = [
        (plain(offer.panel, 28), f"{_SYMBOLS[offer.outcome]} {offer.outcome.value}", _blocks(offer.reasons))
        for bid in evaluation.bids
        for offer in bid.offers
    ]
    rows += [
        (plain(bid.label, 28), "! not used", "see the message above") for bid in evaluation.bids if bid.error
    ]
    return _table(("Panel", "Outcome", "What blocks"), rows)


def _blocks(reasons: Sequence[str]) -> str:
    if not reasons:
        return "nothing"
    more = f" (+{len(reasons) - 1} more)" if len(reasons) > 1 else ""
    return plain(reasons[0], 200) + more


def _in_lines(text: str, width: int) -> list[str]:
    """Text in lines of a width, three at most; how many more there are stays."""
    more = found[0] if (found := _MORE.search(text)) else ""
    lines = wrap(text, width) or [""]
    if len(lines) > _MOST_LINES:
        lines = wrap(text, width, max_lines=_MOST_LINES, placeholder=f" …{more}")
    return lines


def _table(head: tuple[str, ...], rows: Sequence[tuple[str, ...]]) -> str:
    widths = [max(len(row[i]) for row in [head, *rows]) for i in range(len(head) - 1)]
    last = max(20, _WIDTH - sum(widths) - 2 * len(widths))

    def lines(row: Sequence[str]) -> Iterator[str]:
        for at, end in enumerate(_in_lines(row[-1], last)):
            cells = [(cell if at == 0 else "").ljust(width) for cell, width in zip(row, widths, strict=False)]
            yield "  ".join([*cells, end]).rstrip()

    rule = "─" * min(_WIDTH, sum(widths) + 2 * len(widths) + last)
    return "\n".join([*lines(head), rule, *(line for row in rows for line in lines(row))])


def list_of_checks(checks: Iterable[Check]) -> str:
    """Every check with its slug and title, by family."""
    lines: list[str] = []
    family = ""
    for check in checks:
        if check.family != family:
            family = check.family
            lines += ["", family.replace("_", " ")]
        lines.append(f"  {check.slug:<34} {check.title}")
    return "\n".join([*lines[1:], "", "speccheck explain SLUG tells more of one."])


def explanation(check: Check) -> str:
    """All there is to know about a check."""
    names = parameters()

    def labels(keys: Sequence[str]) -> str:
        return ", ".join(names[key].label for key in keys) or "none"

    scope = "each band of a panel" if check.scope == "band" else "the panel as a whole"
    return "\n".join(
        [
            f"{check.title}  ({check.slug})",
            *_named("Judges", scope),
            *_named("Needs", labels(check.needs)),
            *_named("Uses", labels(check.optional)),
            *_named("Source", check.source),
            "",
            *_filled(check.explanation),
        ]
    )


def _named(name: str, text: str) -> list[str]:
    return wrap(text, _WIDTH, initial_indent=f"{name:<12}", subsequent_indent=" " * 12)


def _filled(text: str) -> Iterator[str]:
    """Paragraphs filled to the width of the screen; a section's name keeps its own line."""
    for paragraph in text.split("\n\n"):
        head, _, rest = paragraph.partition("\n")
        named = head.strip() in _SECTIONS
        if named:
            yield f"  {head.strip()}"
        words = " ".join((rest if named else paragraph).split())
        yield from wrap(words, _WIDTH, initial_indent="    ", subsequent_indent="    ")
        yield ""
