"""Tender wording to demands: parameter, operator, limit, unit, statistic, scope, level, doubts, unread words.

The program proposes, a person confirms. Direction comes from the words, or else from the parameter;
where both clash the row stops and asks. Nothing of the wording is dropped silently.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, replace

from speccheck.dictionary import parameters
from speccheck.intake.tenders.wording import names
from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.intake.tenders.wording.figures import Form
from speccheck.intake.tenders.wording.lexicon import Kind
from speccheck.intake.tenders.wording.segments import (
    demands,
    fitting_parameter,
    general_statistics,
    own_level,
    scope_of,
    segments,
)
from speccheck.intake.tenders.wording.tokens import Token, tokens
from speccheck.intake.tenders.wording.whole_phrases import whole_phrase
from speccheck.intake.tenders.wording.zipping import zipped
from speccheck.records import Level

_STATISTICAL_UNITS = ("dBi", "dB", "dBc", "deg", "dBm")
_CONTENT = (Kind.QUANTITY, Kind.VERSION)
_WITH_KIT = ("incl", "with mounting", "with brackets", "with the mounting")


@dataclass(frozen=True, slots=True, kw_only=True)
class Habits:
    """What a tender settles for all its rows: house names, default statistic, decimal comma."""

    house: Mapping[str, str]
    statistic: str = "each"
    decimal_comma: bool | None = None


PLAIN_HABITS = Habits(house={})
CONTRADICTING_LEVELS = "words of two levels in one demand"


def read_wording(
    wording: str, *, level: Level | None = None, parameter: str = "", habits: Habits = PLAIN_HABITS
) -> tuple[Clause, ...]:
    """Read one clause; several demands in one wording give several clauses, none gives one that asks.

    Parameters
    ----------
    wording : the buyer's words
    level : level of the tender's own column, which beats the verb
    parameter : parameter of the tender's own column, which beats the words
    habits : what the tender settles for all rows
    """
    whole = whole_phrase(wording)
    if whole is not None:
        return (replace(whole, level=whole.level or level or Level.MANDATORY),)
    found = tokens(wording, house=habits.house, decimal_comma=habits.decimal_comma)
    key = parameter or _parameter(found)
    clauses = (
        _named(found, key)
        or _figures(found, key, fixed=bool(parameter))
        or (_without_figure(found, key, level),)
    )
    return tuple(_completed(clause, found, level, habits) for clause in clauses)


def _parameter(found: Sequence[Token]) -> str:
    """Key of the parameter named, the first that a figure's unit fits; several keys joined by '+'."""
    named = names.of_kind(found, Kind.PARAMETER)
    return fitting_parameter(found) or (named[0].said if named else _frequencies(found))


def _frequencies(found: Sequence[Token]) -> str:
    """'The antenna shall cover 698 to 894 MHz' names no parameter, but its figures do."""
    figures = [token.figure for token in found if token.figure is not None]
    bands = all(figure.form is Form.RANGE and figure.unit in ("MHz", "GHz") for figure in figures)
    return "frequency_range" if figures and bands and not names.of_kind(found, Kind.UNREAD) else ""


_NAMED = (
    (Kind.STANDARD, ("", "standards", "control_protocol", "remote_tilt_control"), names.standards),
    (Kind.BAND_NAME, ("", "operating_bands", "frequency_range"), names.band_names),
    (Kind.INGRESS, None, names.ingress),
    (Kind.BRANCHES, None, names.branches),
    (Kind.CONNECTOR, ("", "connector_type"), names.connectors),
)
"""Kinds of names, the parameters beside which they are the demand (None: any), and their readers."""


def _named(found: Sequence[Token], key: str) -> tuple[Clause, ...]:
    kinds = {token.kind for token in found}
    for kind, beside, read in _NAMED:
        if kind in kinds and (beside is None or key in beside):
            return read(found)
    return names.polarisations(found) if key == "polarisations" else ()


def _figures(found: Sequence[Token], key: str, *, fixed: bool) -> tuple[Clause, ...]:
    if not key:
        return ()
    read = tuple(clause for demand in demands(found, key, fixed=fixed) for clause in zipped(demand))
    if not read:
        return ()
    more = names.connectors(found) if key == "rf_ports" and names.of_kind(found, Kind.CONNECTOR) else ()
    adjustable = [t.text for t in names.of_kind(found, Kind.SCOPE) if "adjustable" in t.text]
    if key == "electrical_tilt" and adjustable:
        more = (Clause(parameter=key, operator="evidence", limit=adjustable[0]),)
    return (*read, *more)


def _without_figure(found: Sequence[Token], key: str, column: Level | None) -> Clause:
    """A row without a figure: papers or a statement where that is enough, else a question."""
    if Level.INFORMATION in (own_level(found), column):
        return Clause(parameter=key, operator="information")
    if not key:
        return Clause(operator="evidence").doubting("PARAMETER")
    if key in parameters() and parameters()[key].kind == "text":
        rest = " ".join(t.text for t in found if t.kind in (Kind.UNREAD, Kind.SCOPE))
        return Clause(parameter=key, operator="evidence", limit=rest or None)
    return Clause(parameter=key.split("+", maxsplit=1)[0]).doubting("VALUE")


def _completed(clause: Clause, found: Sequence[Token], level: Level | None, habits: Habits) -> Clause:
    """The clause with level, statistic, scope and unread words of the whole wording."""
    clause = _with_level(clause, found, level)
    clause = _with_statistic(clause, found, habits.statistic)
    scope = scope_of(found)
    clause = replace(clause, scope="; ".join(dict.fromkeys(filter(None, (clause.scope, *scope)))))
    if clause.parameter == "weight" and any(text.casefold().startswith(_WITH_KIT) for text in scope):
        clause = replace(clause, parameter="weight_with_brackets")
    unread = " ".join(t.text for t in names.of_kind(found, Kind.UNREAD) if t.text not in clause.scope.split())
    clause = replace(clause, unread=unread)
    return clause.doubting(*_usual_doubts(clause))


def _usual_doubts(clause: Clause) -> tuple[str, ...]:
    known = parameters().get(clause.parameter)
    codes: list[str] = []
    if clause.parameter == "element_count":
        codes.append("COUNT")
    if clause.parameter == "eirp" and "polari" not in clause.scope:
        codes.append("POLARISATION")
    if clause.parameter == "passive_intermodulation" and "order" not in clause.scope:
        codes.append("ORDINAL")
    if known and known.scope == "band" and known.kind == "number" and not clause.bands and not clause.scope:
        codes.append("SCOPE")
    return tuple(codes)


def _with_level(clause: Clause, found: Sequence[Token], column: Level | None) -> Clause:
    """A level column beats the verb, and a verb beside it that says otherwise leaves a doubt.

    Where one wording holds two levels, the demand of the weaker part keeps its own.
    """
    said = [t.said for t in names.of_kind(found, Kind.LEVEL)]
    if len({word.removesuffix("_by_will") for word in said}) > 1 and not _two_levels(found):
        clause = clause.doubting("LEVEL", detail=CONTRADICTING_LEVELS)
    verb = clause.level or (own_level(found) if clause.parameter == "" or not _two_levels(found) else None)
    if column is None:
        plain = verb is not None and said[0] != "mandatory_by_will"
        clause = replace(clause, level=verb or Level.MANDATORY)
        return clause if plain else clause.doubting("LEVEL")
    if verb is not None and _two_levels(found) and clause.level is verb and verb is not Level.MANDATORY:
        return clause
    clause = replace(clause, level=column)
    return clause.doubting("LEVEL") if verb not in (None, column) else clause


def _two_levels(found: Sequence[Token]) -> bool:
    """Whether some parts of a wording with several demands have a level of their own and others another."""
    figured = [part for part in segments(found) if any(t.kind in _CONTENT for t in part)]
    return len(figured) > 1 and len({own_level(part) for part in figured}) > 1


def _with_statistic(clause: Clause, found: Sequence[Token], default: str) -> Clause:
    known = parameters().get(clause.parameter)
    if known is None or known.unit not in (*_STATISTICAL_UNITS, "") or known.kind != "number":
        return clause
    said = general_statistics(found)
    if clause.statistic:
        return clause
    if not said:
        return replace(clause, statistic=default).doubting("STAT", detail=f"none named, read as {default}")
    clause = replace(clause, statistic=said[0])
    if said[0] == "mean-dB" and known.unit.startswith("dB"):
        return clause.doubting("STAT", detail="mean of decibels or of powers is not stated; read as decibels")
    return clause
