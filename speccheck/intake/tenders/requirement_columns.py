"""The structured columns of a requirement row: level, parameter, operator, value, unit, statistic, bands."""

from __future__ import annotations

from dataclasses import replace

from speccheck.dictionary import parameters
from speccheck.intake.tenders.phrases import Habits
from speccheck.intake.tenders.tender_settings import parameter_key
from speccheck.intake.tenders.tender_tables import Row, fold
from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.intake.tenders.wording.families import belongs
from speccheck.intake.tenders.wording.figures import Figure, Form, match_figure
from speccheck.intake.tenders.wording.lexicon import Kind, general_vocabularies, parameter_vocabulary, words
from speccheck.intake.tenders.wording.limits import clashes, settle
from speccheck.intake.tenders.wording.places import MHZ_PER_UNIT
from speccheck.intake.tenders.wording.tokens import normalise
from speccheck.quantities import unit_name
from speccheck.records import Band, Level
from speccheck.records.demands import OPERATORS, UNJUDGED_OPERATORS
from speccheck.standards import operating_band

LEVEL_WORDS = "M, D, I (or mandatory, desirable, information)"
_NO = ("", "no", "n", "0", "false", "nein", "non", "-", "open")


def is_yes(text: str) -> bool:
    """Whether a Confirmed cell says yes: any mark or name but 'no'."""
    return fold(text) not in _NO and text.strip() not in _NO


def level_of(text: str) -> tuple[Level | None, bool]:
    """Level of a level column, and whether the word is known (an empty cell is)."""
    if not text:
        return None, True
    for level, terms in words()["level_column"].items():
        if text.strip().casefold() in terms or fold(text) in terms:
            return Level(level), True
    return None, False


def parameter_of(text: str, habits: Habits) -> tuple[str, bool]:
    """Key of a parameter column (key, label, heading or house name), and whether it is known."""
    if not text:
        return "", True
    try:
        return parameter_key(text), True
    except KeyError:
        term = parameter_vocabulary(habits.house).match(text.strip(), 0)
    if term and len(term[0]) == len(text.strip()):
        return term[1], True
    return "", False


def statistic_of(text: str) -> str:
    """Statistic of a column in the words of the program; an unknown word stays as it is."""
    for vocabulary in general_vocabularies():
        if vocabulary.kind is Kind.STATISTIC:
            term = vocabulary.match(text.strip(), 0)
            return term[1] if term else text.strip()
    return text.strip()


def _operator_of(text: str) -> str:
    if text.strip() in (*OPERATORS, *UNJUDGED_OPERATORS, ""):
        return text.strip()
    for vocabulary in general_vocabularies():
        if vocabulary.kind is Kind.COMPARATOR:
            term = vocabulary.match(normalise(text), 0)
            if term and len(term[0]) == len(normalise(text)):
                return term[1]
    return fold(text)


def stated_clause(row: Row, value: str, context: Clause, key: str, habits: Habits) -> Clause:
    """The demand of a row whose value stands in a column; the wording gives scope and place."""
    clause = _valued(row, value, key, habits)
    statistic = statistic_of(row.text("statistic")) or context.statistic
    kept = tuple(
        d for d in context.doubts if d.split(":")[0] in ("LEVEL", "SCOPE", "STAT", "ORDINAL", "POLARISATION")
    )
    clause = replace(
        clause,
        statistic=statistic,
        level=context.level,
        bands=context.bands,
        scope=context.scope,
        at=context.at,
        unread=context.unread,
        doubts=tuple(dict.fromkeys((*clause.doubts, *kept))),
    )
    if row.text("statistic"):
        clause = clause.without("STAT")
    return bands_of(clause, row) if row.text("bands") else clause


def _valued(row: Row, value: str, key: str, habits: Habits) -> Clause:
    operator, written = _operator_of(row.text("operator")), row.text("unit")
    unit = unit_name(written)
    if key not in parameters():
        return Clause(parameter="", operator=operator, limit=value, unit=unit).doubting("PARAMETER")
    parameter = parameters()[key]
    if written not in ("", ":1", "-") and (not unit or not belongs(unit, parameter)):
        return Clause(parameter=key, operator=operator, unit=written).doubting("UNITS", detail=f"'{written}'")
    if operator in ("text", "evidence", "any of", "all of", "information") or parameter.kind in (
        "text",
        "polarisation",
    ):
        return Clause(parameter=key, operator=operator or "evidence", limit=value, unit=unit)
    figure = _figure(value, habits)
    if figure is None:
        return Clause(parameter=key, operator=operator, unit=unit).doubting("VALUE", detail=f"'{value}'")
    if figure.unit and not belongs(figure.unit, parameter):
        return Clause(parameter=key, operator=operator).doubting("UNITS", detail=f"'{figure.unit}'")
    figure = figure if figure.unit else figure.with_unit(unit)
    clause = settle(parameter, operator, figure)
    if operator in ("within", "contains") and isinstance(clause.limit, tuple):
        clause = replace(clause, operator=operator)
    elif (
        operator in ("≥", "≤", ">", "<") and isinstance(clause.limit, float) and clashes(parameter, operator)
    ):
        clause = clause.doubting("CLASH")
    return clause


def _figure(value: str, habits: Habits) -> Figure | None:
    text = normalise(value)
    found = match_figure(text, 0, decimal_comma=habits.decimal_comma)
    return found[1] if found and len(found[0]) == len(text) else None


def bands_of(clause: Clause, row: Row) -> Clause:
    """The clause for the bands of its row's band column: ranges or names of standard bands."""
    bands: list[Band] = []
    for piece in normalise(row.text("bands")).replace("\n", ";").split(";"):
        for word in piece.split(","):
            span = _band(word.strip())
            if span is None:
                return clause.doubting("LIST", detail=f"'{word.strip()}' is no band")
            bands.extend(span)
    return replace(clause, bands=tuple(bands)).without("SCOPE")


def _band(text: str) -> tuple[Band, ...] | None:
    if not text or fold(text) in ("all", "any", "each"):
        return ()
    standard = operating_band(text)
    if standard is not None:
        return ((standard.low_mhz, standard.high_mhz),)
    found = match_figure(text, 0)
    if found is None or found[1].form is not Form.RANGE or found[1].unit not in MHZ_PER_UNIT:
        return None
    low, high = (number * MHZ_PER_UNIT[found[1].unit] for number in found[1].numbers)
    return ((min(low, high), max(low, high)),)
