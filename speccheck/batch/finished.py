"""What is already done: a mark beside the outputs of each bid, written last, so that a run can be resumed.

A mark holds a digest of everything the result depends on (the bid's bytes, the rules, the formats, the
program), so a changed input or rule is done again, and the small summary the comparison needs.
"""

from __future__ import annotations

import hashlib
import json
from collections.abc import Iterator, Sequence
from contextlib import contextmanager
from pathlib import Path

from speccheck.atomic import remove_unfinished, write_text_atomic
from speccheck.errors import OutputError
from speccheck.records import Settings, Tender
from speccheck.records.evaluations import Bid
from speccheck.report.codec import decode, encode

MARKS_FOLDER = ".finished"
_SCHEMA = "speccheck-finished/1"
_CHUNK = 1 << 20


def rules_digest(tender: Tender | None, settings: Settings, formats: Sequence[str], version: str) -> str:
    """SHA-256 of the rules: tender, settings, formats and program version."""
    rules = {
        "schema": _SCHEMA,
        "tender": encode(tender, "") if tender is not None else None,
        "settings": encode(settings, ""),
        "formats": sorted(formats),
        "program": version,
    }
    return hashlib.sha256(json.dumps(rules, sort_keys=True, ensure_ascii=False).encode()).hexdigest()


def file_digest(path: Path) -> str:
    """SHA-256 of a file, '' if it cannot be read."""
    digest = hashlib.sha256()
    try:
        with path.open("rb") as stream:
            while chunk := stream.read(_CHUNK):
                digest.update(chunk)
    except OSError:
        return ""
    return digest.hexdigest()


def mark_path(out: Path, path: Path) -> Path:
    """Where the mark of one bid lies in the folder of its outputs."""
    return out / MARKS_FOLDER / f"{path.name}.json"


def write_mark(out: Path, path: Path, rules: str, bid: Bid) -> None:
    """Mark a bid as done; called after its last output is in place."""
    target = mark_path(out, path)
    target.parent.mkdir(parents=True, exist_ok=True)
    mark = {"schema": _SCHEMA, "rules": rules, "bid": encode(bid, "")}
    write_text_atomic(target, json.dumps(mark, ensure_ascii=False, sort_keys=True))


def read_mark(out: Path, path: Path, rules: str) -> Bid | None:
    """The finished bid, or None where anything it depends on has changed or an output is gone."""
    try:
        mark = json.loads(mark_path(out, path).read_text(encoding="utf-8"))
        if mark["schema"] != _SCHEMA or mark["rules"] != rules:
            return None
        bid: Bid = decode(Bid, mark["bid"], "")
    except (OSError, ValueError, KeyError, TypeError):
        return None
    whole = bid.outputs and all((out / name).is_file() for name in bid.outputs)
    return bid if whole and bid.sha256 and bid.sha256 == file_digest(path) else None


@contextmanager
def under_way(out: Path, name: str, stem: str) -> Iterator[None]:
    """Work on outputs whose names start with `stem`; a run that was killed at it is tidied up first.

    A file tells that the work is begun, so that only then the folder is searched: with a hundred thousand
    bids in one folder a search for each of them would take longer than the bids.

    Raises
    ------
    OutputError : the folder cannot be written to
    """
    begun = out / MARKS_FOLDER / f"{name}.begun"
    try:
        begun.parent.mkdir(parents=True, exist_ok=True)
        if begun.exists():
            remove_unfinished(out, f"{stem}.")
            remove_unfinished(begun.parent, f"{stem}.")
        begun.touch()
    except OSError as error:
        raise OutputError(str(out), error.strerror or str(error)) from error
    try:
        yield
    finally:
        begun.unlink(missing_ok=True)
