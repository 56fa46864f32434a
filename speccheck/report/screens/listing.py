"""How a bid was understood, as text for a screen of 100 columns: cell by cell, nothing judged."""

from __future__ import annotations

import textwrap

from speccheck.dictionary import parameters
from speccheck.records import Band, Panel, Reading, Sense, Statement, Submission, Value
from speccheck.text import plain

WIDTH = 100
_COLUMNS = (34, 21, 24, 9)
_SIGNS = {Sense.MIN: "≥ ", Sense.MAX: "≤ ", Sense.NOMINAL: ""}


def listing(submission: Submission) -> str:
    """The `read` screen: readings by panel and band, statements, what was not read, notices."""
    lines = [f"{plain(submission.file, 80)}: {_counts(submission)}"]
    for panel in submission.panels:
        lines += ["", *_panel(panel)]
    if submission.unread:
        lines += ["", _rule("Not read")]
        for item in submission.unread:
            lines += _item(f"{item.where}  '{plain(item.text, 60)}'", item.reason, item.suggestion)
    if submission.notices:
        lines += ["", _rule("Notices")]
        for notice in submission.notices:
            lines += _wrapped(f"{_place(str(notice.where))}{plain(notice.text, 500)}", "  ")
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _counts(submission: Submission) -> str:
    readings = sum(len(panel.readings) for panel in submission.panels)
    unsure = sum(not r.certain for panel in submission.panels for r in panel.readings)
    statements = sum(len(panel.statements) for panel in submission.panels)
    parts = [
        _plural(len(submission.panels), "panel"),
        _plural(readings, "figure") + (f" ({unsure} ambiguous)" if unsure else ""),
        _plural(statements, "statement"),
        f"{len(submission.unread)} not read",
        _plural(len(submission.notices), "notice"),
    ]
    return ", ".join(parts)


def _plural(count: int, word: str) -> str:
    return f"{count} {word}" + ("" if count == 1 else "s")


def _panel(panel: Panel) -> list[str]:
    lines = [f"{plain(panel.name, 70)}  (named by {panel.where})", _rule("")]
    lines.append(_row("parameter", "understood as", "written", "cell", heading=True))
    for band in _bands(panel):
        mine = [r for r in panel.readings if r.band == band]
        said = [s for s in panel.statements if s.band == band]
        if not mine and not said:
            continue
        lines.append(f"-- {_band(band)}")
        for reading in mine:
            lines += _reading(reading)
        for statement in said:
            lines += _statement(statement)
    return lines


def _bands(panel: Panel) -> list[Band | None]:
    banded = dict.fromkeys((*(r.band for r in panel.readings), *(s.band for s in panel.statements)))
    return [None, *(band for band in banded if band is not None)]


def _band(band: Band | None) -> str:
    return "whole panel" if band is None else f"{band[0]:g} – {band[1]:g} MHz"


def _reading(reading: Reading) -> list[str]:
    understood = _understood(reading)
    row = _row(_label(reading.parameter), understood, plain(reading.raw, 200), reading.where.cell)
    details = [plain(reading.recognised, 300)]
    if reading.condition:
        details.append(f"condition: {plain(reading.condition, 200)}")
    if reading.alternatives:
        others = " or ".join(_figure(value) for value in reading.alternatives)
        details.append(f"ambiguous: {others}; no verdict rests on it")
    return [row, *(line for detail in details if detail for line in _wrapped(detail, "      "))]


def _understood(reading: Reading) -> str:
    text = _SIGNS[reading.sense] + _figure(reading.value)
    if reading.tolerance is not None:
        text += f" ± {reading.tolerance:g}"
    return " ".join(filter(None, (text, reading.unit, reading.statistic)))


def _figure(value: Value) -> str:
    if isinstance(value, tuple):
        return f"{value[0]:.6g} … {value[1]:.6g}"
    return plain(value, 60) if isinstance(value, str) else f"{value:.6g}"


def _statement(statement: Statement) -> list[str]:
    shown = f"({statement.status.value})"
    return [_row(_label(statement.parameter), shown, plain(statement.raw, 60), statement.where.cell)]


def _label(key: str) -> str:
    known = parameters().get(key)
    return known.label if known else key


def _row(*cells: str, heading: bool = False) -> str:
    fitted = [_fit(" ".join(cell.split()), width) for cell, width in zip(cells, _COLUMNS, strict=True)]
    row = "  " + "  ".join(f"{cell:<{width}}" for cell, width in zip(fitted, _COLUMNS, strict=True))
    return row if not heading else row.upper()


def _fit(text: str, width: int) -> str:
    return text if len(text) <= width else text[: width - 1] + "…"


def _item(head: str, reason: str, suggestion: str) -> list[str]:
    lines = [*_wrapped(head, "  "), *_wrapped(plain(reason, 300), "      ")]
    if suggestion:
        lines += _wrapped(f"nearest or next: {plain(suggestion, 200)}", "      ")
    return lines


def _place(where: str) -> str:
    return f"{where}  " if where else ""


def _rule(title: str) -> str:
    return f"{title} ".lstrip().ljust(WIDTH, "─")


def _wrapped(text: str, indent: str) -> list[str]:
    return textwrap.wrap(
        " ".join(text.split()), WIDTH, initial_indent=indent, subsequent_indent=indent + "  "
    )
