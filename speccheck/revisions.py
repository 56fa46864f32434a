"""Two revisions of one bid: changed, added and vanished values and verdicts.

Panels are matched by name, figures by parameter, band and conditions, verdicts by check or clause. The
same figure written in another unit is no change.
"""

from __future__ import annotations

from collections.abc import Callable, Hashable, Iterable, Iterator, Sequence
from dataclasses import dataclass
from itertools import zip_longest
from typing import Literal, TypeVar, get_args

from speccheck.dictionary import parameters
from speccheck.records import (
    Assessment,
    Band,
    CellRef,
    PanelAssessment,
    Reading,
    Sense,
    Value,
)
from speccheck.text import plain

Kind = Literal["panel", "outcome", "figure", "statement", "finding", "requirement"]
Item = TypeVar("Item")


@dataclass(frozen=True, slots=True, kw_only=True)
class Change:
    """One difference; `old` is None where it was added, `new` where it vanished."""

    panel: str
    kind: Kind
    what: str
    band: Band | None = None
    old: str | None
    new: str | None
    old_where: CellRef | None = None
    new_where: CellRef | None = None

    @property
    def word(self) -> str:
        """changed, added or vanished."""
        if self.old is None:
            return "added"
        return "vanished" if self.new is None else "changed"


@dataclass(frozen=True, slots=True, kw_only=True)
class Revision:
    """All that differs between two results; `cautions` say what makes the comparison doubtful."""

    old_file: str
    new_file: str
    old_sha256: str
    new_sha256: str
    cautions: tuple[str, ...] = ()
    changes: tuple[Change, ...] = ()


def compare(old: Assessment, new: Assessment) -> Revision:
    """Return what changed from `old` to `new`."""
    changes: list[Change] = []
    for before, after in _paired_panels(old.panels, new.panels):
        changes += _panel_changes(before, after)
    return Revision(
        old_file=old.submission.file,
        new_file=new.submission.file,
        old_sha256=old.submission.sha256,
        new_sha256=new.submission.sha256,
        cautions=tuple(_cautions(old, new)),
        changes=tuple(changes),
    )


def comparison_text(revision: Revision) -> str:
    """Return the comparison for a screen: cautions first, then one line a change, by panel."""
    lines = [
        f"old: {plain(revision.old_file)}  sha256 {revision.old_sha256}",
        f"new: {plain(revision.new_file)}  sha256 {revision.new_sha256}",
        *(f"caution: {plain(text)}" for text in revision.cautions),
    ]
    panel: str | None = None
    for change in revision.changes:
        if change.panel != panel:
            panel = change.panel
            lines += ["", plain(panel) or "(panel without a name)"]
        lines.append(_line(change))
    lines += ["", _count(revision.changes)]
    return "\n".join(lines) + "\n"


def _line(change: Change) -> str:
    band = f", {change.band[0]:g}–{change.band[1]:g} MHz" if change.band else ""
    values = (
        f"{change.old if change.old is not None else '–'} → {change.new if change.new is not None else '–'}"
    )
    places = [str(where) for where in (change.old_where, change.new_where) if where is not None]
    where = f"  [{' → '.join(dict.fromkeys(places))}]" if places else ""
    return plain(f"  {change.word:<8} {change.kind:<11} {change.what}{band}: {values}{where}")


def _count(changes: Sequence[Change]) -> str:
    if not changes:
        return "no value and no verdict differs"
    counts = {
        word: sum(change.word == word for change in changes) for word in ("changed", "added", "vanished")
    }
    return ", ".join(f"{number} {word}" for word, number in counts.items())


def _cautions(old: Assessment, new: Assessment) -> Iterator[str]:
    before, after = old.submission, new.submission
    if before.sha256 == after.sha256:
        yield "both results are of the same file, byte for byte"
    else:
        shared = sorted(_labels(old) & _labels(new))
        if shared:
            yield f"revision '{shared[0]}' is on both files, but their checksums differ"
        elif before.file == after.file and not (_labels(old) and _labels(new)):
            yield f"both files are named '{before.file}' without a revision, but their checksums differ"
    if old.program_version != new.program_version:
        versions = f"{old.program_version} and {new.program_version}"
        yield f"made by program versions {versions}: verdicts may differ by that"
    if old.settings.tender_sha256 != new.settings.tender_sha256:
        yield "judged by two different tender files: verdicts may differ by that"
    elif old.settings != new.settings:
        yield "judged with different settings: verdicts may differ by that"


def _labels(assessment: Assessment) -> set[str]:
    """Revision labels that the bidder wrote."""
    return {
        reading.raw.strip() or str(reading.value)
        for panel in assessment.submission.panels
        for reading in panel.readings
        if reading.parameter == "revision"
    }


@dataclass(frozen=True, slots=True, kw_only=True)
class _Fact:
    """Something one result says of one panel, in a form that compares."""

    kind: Kind
    what: str
    text: str
    band: Band | None = None
    where: CellRef | None = None


def _facts(one: PanelAssessment) -> Iterator[_Fact]:
    yield _Fact(kind="panel", what="name", text=one.panel.name, where=one.panel.where)
    yield _Fact(kind="outcome", what="outcome", text=one.outcome.value)
    for reading in one.panel.readings:
        yield _Fact(
            kind="figure",
            what=_label(reading.parameter) + _conditions(reading),
            text=_figure_text(reading),
            band=reading.band,
            where=reading.where,
        )
    for said in one.panel.statements:
        what = _label(said.parameter)
        yield _Fact(kind="statement", what=what, text=said.status.value, band=said.band, where=said.where)
    for finding in one.findings:
        title = finding.title or finding.check
        yield _Fact(kind="finding", what=title, text=finding.verdict.value, band=finding.band)
    for row in one.requirements:
        asked = row.requirement
        what = f"clause {asked.clause}, {_label(asked.parameter) if asked.parameter else 'no parameter'}"
        yield _Fact(kind="requirement", what=what, text=row.verdict.value, band=row.band)


def _paired_panels(
    old: Sequence[PanelAssessment], new: Sequence[PanelAssessment]
) -> Iterator[tuple[PanelAssessment | None, PanelAssessment | None]]:
    """Pair panels by name; one renamed panel on either side is taken for the same."""
    paired = _paired(old, new, _name)
    pairs = list(paired)
    gone = [one for one, other in pairs if one is not None and other is None]
    come = [other for one, other in pairs if other is not None and one is None]
    if len(gone) == len(come) == 1:
        yield from ((one, other) for one, other in pairs if one is not None and other is not None)
        yield gone[0], come[0]
    else:
        yield from pairs


def _panel_changes(old: PanelAssessment | None, new: PanelAssessment | None) -> Iterator[Change]:
    """What differs between two panels; of a panel that came or went, only that."""
    before = list(_facts(old)) if old else []
    after = list(_facts(new)) if new else []
    if old is None or new is None:
        before, after = before[:1], after[:1]
    name = (after or before)[0].text
    paired = _paired(before, after, _key)
    for left, right in sorted(paired, key=_by_kind):
        some = right or left
        if some is not None and (left is None or right is None or left.text != right.text):
            yield Change(
                panel=name,
                kind=some.kind,
                what=some.what,
                band=some.band,
                old=left.text if left else None,
                new=right.text if right else None,
                old_where=left.where if left else None,
                new_where=right.where if right else None,
            )


def _name(one: PanelAssessment) -> str:
    return one.panel.name


def _key(fact: _Fact) -> Hashable:
    """What both revisions must share for the texts to be held against each other."""
    return fact.kind, fact.what, fact.band


def _by_kind(pair: tuple[_Fact | None, _Fact | None]) -> int:
    some = pair[1] or pair[0]
    return get_args(Kind).index(some.kind) if some else 0


def _paired(
    old: Iterable[Item], new: Iterable[Item], key: Callable[[Item], Hashable]
) -> Iterator[tuple[Item | None, Item | None]]:
    """Pair items of one key in order, without those stated alike; None where one side has no more."""
    before, after = _grouped(old, key), _grouped(new, key)
    for name in dict.fromkeys((*before, *after)):
        yield from zip_longest(*_without_equals(before.get(name, []), after.get(name, [])))


def _grouped(items: Iterable[Item], key: Callable[[Item], Hashable]) -> dict[Hashable, list[Item]]:
    groups: dict[Hashable, list[Item]] = {}
    for item in items:
        groups.setdefault(key(item), []).append(item)
    return groups


def _without_equals(left: Sequence[Item], right: Sequence[Item]) -> tuple[list[Item], list[Item]]:
    """Leave out facts that both sides state alike, wherever they stand."""
    rest, only_left = list(right), []
    for item in left:
        same = next((n for n, other in enumerate(rest) if _content(other) == _content(item)), None)
        if same is None:
            only_left.append(item)
        else:
            del rest[same]
    return only_left, rest


def _content(item: object) -> object:
    return item.text if isinstance(item, _Fact) else id(item)


def _figure_text(reading: Reading) -> str:
    bound = {Sense.MIN: "≥ ", Sense.MAX: "≤ ", Sense.NOMINAL: ""}[reading.sense]
    slack = f" ± {reading.tolerance:.9g}" if reading.tolerance is not None else ""
    other = "".join(f" or {_value_text(value)}" for value in reading.alternatives)
    return f"{bound}{_value_text(reading.value)}{slack}{other} {reading.unit}".rstrip()


def _value_text(value: Value) -> str:
    if isinstance(value, tuple):
        return f"{value[0]:.9g} to {value[1]:.9g}"
    return value if isinstance(value, str) else f"{value:.9g}"


def _conditions(reading: Reading) -> str:
    said = [f"{name.replace('_', ' ')} {value:g}" for name, value in sorted(reading.at.items())]
    said += [reading.statistic] if reading.statistic else []
    return f" ({', '.join(said)})" if said else ""


def _label(key: str) -> str:
    known = parameters().get(key)
    return known.label if known else key.replace("_", " ")
