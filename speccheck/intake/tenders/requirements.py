"""The Requirements sheet: each row as the demands it makes, the buyer's columns before the wording."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass, replace

from speccheck.dictionary import parameters
from speccheck.intake.tenders.phrases import Habits, read_wording
from speccheck.intake.tenders.requirement_columns import (
    LEVEL_WORDS,
    bands_of,
    is_yes,
    level_of,
    parameter_of,
    stated_clause,
    statistic_of,
)
from speccheck.intake.tenders.tender_tables import Row, Table, fold
from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.records import Level, Requirement, Unread
from speccheck.records.demands import blocked, doubt, doubt_code

COLUMNS: dict[str, tuple[str, ...]] = {
    "clause": (
        "clause",
        "no",
        "item",
        "ref",
        "reference",
        "id",
        "#",
        "number",
        "req",
        "requirement no",
        "clause no",
    ),
    "wording": ("wording", "requirement", "requirement text", "text", "description", "specification"),
    "level": ("level", "m/o", "m/d/i", "m/d/o", "priority", "category", "obligation", "★"),
    "parameter": ("parameter", "quantity"),
    "operator": ("operator", "comparator", "condition", "op"),
    "value": ("value", "limit", "required value", "required"),
    "must": ("must", "mandatory value", "must value"),
    "should": ("should", "desirable value", "should value", "preferred value"),
    "unit": ("unit", "units"),
    "statistic": ("statistic", "stat"),
    "bands": ("bands", "band", "frequency bands", "applies to bands"),
    "weight": ("weight", "points", "score weight", "weighting"),
    "confirmed": ("confirmed", "confirmed by", "reading confirmed"),
}


@dataclass(frozen=True, slots=True)
class ReadRow:
    """One row of the sheet with its requirements."""

    row: Row
    requirements: tuple[Requirement, ...]


def read_requirements(found: Table, habits: Habits) -> tuple[tuple[ReadRow, ...], tuple[Unread, ...]]:
    """Requirements row by row; rules ('all values guaranteed …') are applied to every row.

    Rows that are group labels (one text, no level, nothing readable) are listed as such.
    """
    read: list[ReadRow] = []
    labels: list[Unread] = []
    for row in found.rows:
        requirements = tuple(_requirements(row, habits))
        if _is_label(row, requirements):
            reason = "taken as a group label: no level, parameter or figure"
            labels.append(
                Unread(where=row.where(), text=row.text("wording") or row.text("clause"), reason=reason)
            )
        elif requirements:
            read.append(ReadRow(row, requirements))
    return _with_rules(read), tuple(labels)


def _is_label(row: Row, requirements: Sequence[Requirement]) -> bool:
    if len([name for name in row.cells if name != "clause"]) > 1 or row.text("level"):
        return False
    return not row.text("wording") or all(r.operator == "evidence" and not r.parameter for r in requirements)


def _requirements(row: Row, habits: Habits) -> Iterator[Requirement]:
    wording = row.text("wording")
    level, level_known = level_of(row.text("level"))
    parameter, parameter_known = parameter_of(row.text("parameter"), habits)
    clauses = _clauses(row, wording, level, parameter, habits)
    for clause in clauses:
        doubts = list(clause.doubts)
        if not level_known:
            doubts = [text for text in doubts if doubt_code(text) != "LEVEL"]
            doubts.append(doubt("LEVEL", f"'{row.text('level')}' is none of {LEVEL_WORDS}"))
        if not parameter_known:
            doubts.append(doubt("PARAMETER", f"'{row.text('parameter')}' is not in the dictionary"))
        yield _requirement(row, wording, replace(clause, doubts=tuple(dict.fromkeys(doubts))))


def _clauses(
    row: Row, wording: str, level: Level | None, parameter: str, habits: Habits
) -> tuple[Clause, ...]:
    said = read_wording(wording, level=level, parameter=parameter, habits=habits) if wording else ()
    if row.text("must") or row.text("should"):
        return tuple(_two_values(row, said, parameter, habits))
    key = parameter or (said[0].parameter if said else "")
    if row.text("value") and "+" in key:
        spoken = " ".join(row.text(name) for name in ("operator", "value", "unit"))
        several = read_wording(spoken, level=level, parameter=key, habits=habits)
        return tuple(_with_columns(clause, row) for clause in several)
    if row.text("value"):
        context = said[0] if said else Clause(level=level or Level.MANDATORY)
        stated = stated_clause(row, row.text("value"), context, parameter or context.parameter, habits)
        return (_compared(stated, said, confirmed=is_yes(row.text("confirmed"))),)
    if not said:
        clause = Clause(parameter=parameter, level=level or Level.MANDATORY).doubting("VALUE")
        return (clause,)
    return tuple(_with_columns(clause, row) for clause in said)


def _two_values(row: Row, said: Sequence[Clause], parameter: str, habits: Habits) -> Iterator[Clause]:
    """Must and should columns: a mandatory and a desirable limit of one parameter."""
    context = said[0] if said else Clause()
    for column, level in (("must", Level.MANDATORY), ("should", Level.DESIRABLE)):
        if row.text(column):
            clause = stated_clause(row, row.text(column), context, parameter or context.parameter, habits)
            kept = tuple(d for d in clause.doubts if doubt_code(d) not in ("LEVEL", "VALUE", "DIR"))
            yield replace(clause, level=level, doubts=kept)


def _compared(stated: Clause, said: Sequence[Clause], *, confirmed: bool) -> Clause:
    """The columns count; where the wording gives another figure a person must say which holds."""
    figures = [
        c for c in said if c.parameter == stated.parameter and c.limit is not None and not blocked(c.doubts)
    ]
    if not figures or any(_same(clause, stated) for clause in figures):
        return stated
    first = figures[0]
    detail = f"columns {stated.operator} {stated.limit}, wording {first.operator} {first.limit} {first.unit}"
    return stated.doubting("CONFIRMED" if confirmed else "COLUMNS", detail=detail)


def _same(one: Clause, other: Clause) -> bool:
    strict = {">": "≥", "<": "≤"}
    same_way = strict.get(one.operator, one.operator) == strict.get(other.operator, other.operator)
    return same_way and one.limit == other.limit and (one.unit or other.unit) == (other.unit or one.unit)


def _with_columns(clause: Clause, row: Row) -> Clause:
    """A clause read from the wording with what the other columns settle."""
    if row.text("statistic"):
        clause = replace(clause, statistic=statistic_of(row.text("statistic"))).without("STAT")
    if row.text("bands"):
        clause = bands_of(clause, row)
    return clause


def _requirement(row: Row, wording: str, clause: Clause) -> Requirement:
    weight = row.text("weight").rstrip("% ").replace(",", ".")
    return Requirement(
        where=row.where("wording" if wording else ""),
        clause=row.text("clause"),
        wording=wording or _wording_of(row),
        level=clause.level or Level.MANDATORY,
        parameter=clause.parameter,
        operator=clause.operator,
        limit=clause.limit,
        unit=clause.unit,
        statistic=clause.statistic,
        bands=clause.bands,
        scope=clause.scope,
        at=dict(clause.at),
        doubts=clause.doubts,
        unread=clause.unread,
        confirmed=is_yes(row.text("confirmed")),
        weight=float(weight) if weight.replace(".", "", 1).isdigit() else None,
    )


def _wording_of(row: Row) -> str:
    """Wording made of the columns where the row has none of its own."""
    parts = (row.text(name) for name in ("parameter", "operator", "value", "unit"))
    return " ".join(part for part in parts if part)


def _with_rules(read: Sequence[ReadRow]) -> tuple[ReadRow, ...]:
    """Rows of rules set statistic and scope of the rows that name none of their own."""
    rules = [r for row in read for r in row.requirements if r.operator == "rule" and r.limit == "all rows"]
    if not rules:
        return tuple(read)
    rule = rules[0]
    return tuple(replace(row, requirements=tuple(_ruled(r, rule) for r in row.requirements)) for row in read)


def _ruled(requirement: Requirement, rule: Requirement) -> Requirement:
    codes = {doubt_code(text) for text in requirement.doubts}
    known = parameters().get(requirement.parameter)
    if known is None or known.kind != "number" or fold(requirement.wording) == fold(rule.wording):
        return requirement
    kept = requirement.doubts
    if "STAT" in codes and rule.statistic:
        requirement = replace(requirement, statistic=rule.statistic)
        kept = tuple(text for text in kept if doubt_code(text) != "STAT")
    if "SCOPE" in codes:
        requirement = replace(requirement, scope=f"{rule.scope} (clause {rule.clause})".strip())
        kept = tuple(text for text in kept if doubt_code(text) != "SCOPE")
    return replace(requirement, doubts=kept)
