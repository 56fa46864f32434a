"""The Settings, Headings and Deviations sheets of a tender workbook."""

from __future__ import annotations

import re
from collections.abc import Callable
from dataclasses import replace
from datetime import date, datetime

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell, Grid
from speccheck.intake.tenders.tender_tables import Row, fold, nearest, table, trouble
from speccheck.intake.tenders.wording.figures import Form, match_figure, number
from speccheck.intake.tenders.wording.tokens import normalise
from speccheck.quantities import UnknownUnitError, convert
from speccheck.records import Deviation, Finding, Settings
from speccheck.standards import limit_set_names

_TRUE = ("yes", "y", "true", "1", "x", "ja", "oui", "si", "sí")
_FALSE = ("no", "n", "false", "0", "nein", "non")
STATISTICS = ("each", "typ", "mean-dB", "mean-lin", "min", "max")

_NAMES: dict[str, tuple[str, Callable[[str], object]]] = {}


def _setting(field: str, *names: str) -> Callable[[Callable[[str], object]], Callable[[str], object]]:
    def register(read: Callable[[str], object]) -> Callable[[str], object]:
        _NAMES.update({fold(name): (field, read) for name in names})
        return read

    return register


@_setting("limit_set", "Exposure limit set", "Limit set")
def _limit_set(text: str) -> str:
    known = {fold(name): name for name in limit_set_names()}
    if fold(text) not in known:
        raise ValueError(f"one of {', '.join(limit_set_names())}")
    return known[fold(text)]


@_setting("tdd_duty", "TDD duty", "TDD downlink share")
@_setting("actual_maximum_factor", "Actual-maximum factor", "Actual maximum factor")
def _share(text: str) -> float:
    value = _number(text.rstrip("% "))
    value = value / 100 if "%" in text else value
    if not 0 < value <= 1:
        raise ValueError("a share above 0 and up to 1, or the same in %")
    return value


@_setting("reflection_factor", "Reflection factor", "Ground reflection factor")
def _reflection(text: str) -> float:
    value = _number(text)
    if not 1 <= value <= 4:
        raise ValueError("a power factor from 1 (none) to 4 (full reflection)")
    return value


@_setting("country_factor", "Country factor", "Country factors", "Country factor on exposure limits")
def _country(text: str) -> float:
    value = _number(text.rstrip("% "))
    value = value / 100 if "%" in text else value
    if not 0 < value <= 1:
        raise ValueError("a factor on the power density of the limit, above 0 and up to 1")
    return value


@_setting("power_tolerance_db", "Power tolerance", "Power tolerance dB")
def _decibels(text: str) -> float:
    value = _number(re.sub(r"\s*dB$", "", text))
    if value < 0:
        raise ValueError("a figure in dB, not negative")
    return value


@_setting("equality_meets", "Equality rule", "Equality", "Equality meets")
def _equality(text: str) -> bool:
    if fold(text) in ("meets", *_TRUE):
        return True
    if fold(text) in ("does not meet", "fails", *_FALSE):
        return False
    raise ValueError("'meets' or 'does not meet'")


@_setting("statistic", "Default statistic", "Statistic default", "Statistic", "Statistic when none is named")
def _statistic(text: str) -> str:
    aliases = {"worst case": "each", "mean": "mean-dB", "typical": "typ", "average": "mean-dB"}
    word = aliases.get(fold(text), text.strip())
    if word not in STATISTICS:
        raise ValueError(f"one of {', '.join(STATISTICS)}")
    return word


@_setting("paper", "Paper", "Paper size")
def _paper(text: str) -> str:
    if text.casefold() not in ("a4", "letter"):
        raise ValueError("A4 or Letter")
    return "A4" if text.casefold() == "a4" else "Letter"


@_setting("decimal_comma", "Number habit", "Decimal separator", "Decimal comma")
def _comma(text: str) -> bool:
    if fold(text) in ("comma", "decimal comma", *_TRUE) or text.strip() == ",":
        return True
    if fold(text) in ("point", "decimal point", "dot", *_FALSE) or text.strip() == ".":
        return False
    raise ValueError("'point' or 'comma'")


@_setting("date_order", "Date habit", "Date order", "Date format")
def _date_order(text: str) -> str:
    known = {fold(name): name for name in ("iso", "day first", "month first")}
    if fold(text) not in known:
        raise ValueError("'iso', 'day first' or 'month first'")
    return known[fold(text)]


@_setting("issued", "Issued")
def _yes_no(text: str) -> bool:
    if fold(text) in _TRUE:
        return True
    if fold(text) in _FALSE:
        return False
    raise ValueError("'yes' or 'no'")


@_setting("tender", "Tender", "Tender reference", "Tender name")
@_setting("report_number", "Report number")
@_setting("revision", "Revision")
def _text(text: str) -> str:
    return text.strip()


@_setting("today", "Evaluation date", "Date of evaluation", "Today")
def _date(text: str) -> str:
    return iso_date(text)


def iso_date(text: str) -> str:
    """A date as YYYY-MM-DD; ValueError for anything else (day-month order is never guessed)."""
    match = re.match(r"\s*(\d{4})-(\d{2})-(\d{2})(?:[ T].*)?$", text)
    if not match:
        raise ValueError("a date cell, or text such as 2027-03-31")
    return date(*(int(part) for part in match.groups())).isoformat()


def cell_text(cell: Cell | None) -> str:
    """Text of a cell, dates in ISO form."""
    if cell is None:
        return ""
    if isinstance(cell.raw, datetime):
        return cell.raw.date().isoformat()
    if isinstance(cell.raw, date):
        return cell.raw.isoformat()
    return cell.text.strip()


def _number(text: str) -> float:
    match = match_figure(normalise(text), 0)
    if match is None or match[1].form is not Form.PLAIN or len(match[0]) != len(normalise(text)):
        raise ValueError("a number")
    value, doubtful = number(match[0])
    if doubtful:
        raise ValueError("a number that reads one way only")
    return value


def read_settings(grid: Grid, file: str) -> tuple[Settings, tuple[Finding, ...]]:
    """Settings of a tender; an unknown name or value leaves the default and says so."""
    columns = {"setting": ("setting", "name", "parameter"), "value": ("value",), "unit": ("unit", "units")}
    found = table(grid, file, columns, ("setting", "value"))
    settings = Settings()
    if found is None:
        return settings, ()
    troubles: list[Finding] = []
    for row in found.rows:
        name, value = row.text("setting"), cell_text(row.cells.get("value"))
        if not name or not value:
            continue
        try:
            settings = _with_setting(settings, name, value, row.text("unit"))
        except KeyError:
            near = nearest(name, tuple(_NAMES))
            ask = f"Did you mean '{near}'?" if near else "See the tender template for the known settings."
            summary = f"setting '{name}' is not known and was not used"
            troubles.append(
                trouble("tender-settings", "Settings of the tender", row.where("setting"), summary, ask)
            )
        except (ValueError, UnknownUnitError) as error:
            summary = f"found '{value}' for '{name}'; expected {error}; the default stays in force"
            ask = "Correct the cell and run again."
            troubles.append(
                trouble("tender-settings", "Settings of the tender", row.where("value"), summary, ask)
            )
    return settings, tuple(troubles)


def _with_setting(settings: Settings, name: str, value: str, unit: str) -> Settings:
    guard = re.match(r"\s*guard band[s]?\s*[:,-]?\s*(.+)$", name, re.IGNORECASE)
    if guard:
        key = parameter_key(guard[1])
        width = convert(_number(value), unit or parameters()[key].unit, parameters()[key].unit)
        return replace(settings, guard_bands={**settings.guard_bands, key: abs(width)})
    loss = re.match(r"\s*loss(?: class)?\s*[:,-]?\s*(.+)$", name, re.IGNORECASE)
    if loss:
        return replace(settings, loss_db={**settings.loss_db, loss[1].strip().casefold(): _range(value)})
    field, read = _NAMES[fold(name)]
    return replace(settings, **{field: read(f"{value} {unit}".strip() if unit == "%" else value)})  # type: ignore[arg-type]


def _range(text: str) -> tuple[float, float]:
    match = match_figure(normalise(text), 0)
    if match is None or match[1].form is not Form.RANGE:
        raise ValueError("a range such as 0.5-1.5")
    low, high = match[1].numbers
    return min(low, high), max(low, high)


def parameter_key(text: str) -> str:
    """Key of the parameter with this key or label; KeyError if there is none."""
    by_name = {fold(p.label): key for key, p in parameters().items()}
    by_name.update({fold(key.replace("_", " ")): key for key in parameters()})
    return by_name[fold(text.replace("_", " "))]


def read_headings(grid: Grid, file: str) -> tuple[dict[str, str], tuple[Finding, ...]]:
    """House synonyms: heading to parameter key."""
    columns = {"heading": ("heading", "house heading", "synonym"), "parameter": ("parameter", "key", "means")}
    found = table(grid, file, columns, ("heading", "parameter"))
    headings: dict[str, str] = {}
    troubles: list[Finding] = []
    for row in found.rows if found else ():
        heading, said = row.text("heading"), row.text("parameter")
        if not heading or not said:
            continue
        try:
            headings[heading] = parameter_key(said)
        except KeyError:
            near = nearest(said, tuple(p.label for p in parameters().values()))
            summary = f"'{said}' is no known parameter, so the heading '{heading}' was not taken in"
            ask = f"Did you mean '{near}'?" if near else "Use a parameter key of the dictionary."
            troubles.append(
                trouble("tender-headings", "House headings", row.where("parameter"), summary, ask)
            )
    return headings, tuple(troubles)


def read_deviations(grid: Grid, file: str) -> tuple[tuple[Deviation, ...], tuple[Finding, ...]]:
    """Accepted deviations; one without reason, approver or readable expiry does not count."""
    columns = {
        "clause": ("clause", "no", "ref"),
        "offer": ("bidder or panel", "bidder", "panel", "offer"),
        "reason": ("reason", "justification"),
        "approver": ("approver", "approved by"),
        "expiry": ("expiry", "expires", "valid until"),
    }
    found = table(grid, file, columns, ("clause", "offer"))
    read: list[Deviation] = []
    troubles: list[Finding] = []
    for row in found.rows if found else ():
        lacking = [name for name in ("clause", "offer", "reason", "approver", "expiry") if not row.text(name)]
        try:
            expires = iso_date(cell_text(row.cells.get("expiry"))) if "expiry" not in lacking else ""
        except ValueError as error:
            lacking, expires = [*lacking, f"expiry ({error})"], ""
        if lacking:
            summary = f"deviation lacks {', '.join(lacking)} and does not count"
            ask = "Complete the row; a deviation counts only with reason, approver and expiry."
            troubles.append(trouble("tender-deviations", "Accepted deviations", row.where(), summary, ask))
        else:
            read.append(_deviation(row, expires))
    return tuple(read), tuple(troubles)


def _deviation(row: Row, expires: str) -> Deviation:
    return Deviation(
        where=row.where("clause"),
        clause=row.text("clause"),
        offer=row.text("offer"),
        reason=row.text("reason"),
        approver=row.text("approver"),
        expires=expires,
    )
