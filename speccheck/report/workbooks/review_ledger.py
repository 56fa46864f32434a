"""A chain of live formulas: inputs that refer to cells of the workbook, assumptions, results."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable
from dataclasses import dataclass, field

from speccheck.records import Band, Reading
from speccheck.report.pages.formats import shown_unit
from speccheck.report.workbooks.cells import Content, Rich
from speccheck.report.workbooks.review_inputs import UPPER_COLUMN, VALUE_COLUMN
from speccheck.report.workbooks.review_places import INPUTS, Places
from speccheck.report.workbooks.sheets import Column, Table

SHEET = "Recomputed"
SAME = 1e-9
"""Relative difference under which two numbers are the same figure in two units."""


@dataclass(frozen=True, slots=True)
class Figure:
    """A number on the sheet and the address it stands at."""

    value: float
    at: str


@dataclass(slots=True)
class Ledger:
    """The lines of the sheet Recomputed, in order; each may refer to earlier ones."""

    places: Places
    rows: list[list[Content]] = field(default_factory=list)
    panel: str = ""
    band: Band | None = None

    def read(self, reading: Reading | None, name: str, unit: str, *, upper: bool = False) -> Figure | None:
        """Return a line that refers to the bidder's figure; None where there is none.

        Parameters
        ----------
        reading : a figure in `unit`, or None
        upper : take the upper end of a range, else its lower end
        """
        if reading is None or isinstance(reading.value, str):
            return None
        value = reading.value[1 if upper else 0] if isinstance(reading.value, tuple) else reading.value
        formula, source = self._reference(reading, value, upper=upper)
        return self._line(
            name, Rich(value=value, formula=formula, look="number"), unit, "input", source=source
        )

    def assume(self, name: str, value: float, unit: str, source: str) -> Figure:
        """Return a line with a number that people may change."""
        return self._line(name, Rich(value=value, look="entry"), unit, "assumption", source=source)

    def result(
        self,
        name: str,
        unit: str,
        formula: str,
        compute: Callable[..., float],
        inputs: Iterable[Figure | None],
        *,
        source: str = "",
        look: str = "number3",
    ) -> Figure | None:
        """Return a line with a live formula; None where an input is missing or the sum has no result.

        Parameters
        ----------
        formula : the spreadsheet formula, with {0}, {1} … for the inputs
        compute : the same in Python, for the stored result
        """
        known = [figure for figure in inputs if figure is not None]
        if len(known) != len(list(inputs)):
            return None
        try:
            value = float(compute(*(figure.value for figure in known)))
        except (ValueError, ZeroDivisionError, OverflowError):
            return None
        if not math.isfinite(value):
            return None
        live = formula.format(*(figure.at for figure in known))
        words = formula.format(*(f"[{figure.at.replace('$', '')}]" for figure in known))
        return self._line(
            name, Rich(value=value, formula=live, look=look), unit, "result", words=words, source=source
        )

    def table(self) -> Table:
        """Return the sheet."""
        return Table(
            name=SHEET,
            columns=(
                Column(
                    heading="Line",
                    width=7,
                    look="number0",
                    note="Filter freely; sorting is locked, since lines refer to each other.",
                ),
                Column(heading="Panel", width=22),
                Column(heading="Band from (MHz)", width=11, look="number"),
                Column(heading="Band to (MHz)", width=11, look="number"),
                Column(heading="Quantity", width=58),
                Column(
                    heading="Figure",
                    width=14,
                    look="number",
                    note="Live formula, or an assumption you may change. Unit beside it.",
                ),
                Column(heading="Unit", width=9),
                Column(
                    heading="Kind",
                    width=12,
                    note="input: refers to a cell as read; assumption: may be changed; result: formula.",
                ),
                Column(heading="Formula", width=44, look="wrap"),
                Column(heading="Source", width=70, look="wrap"),
            ),
            rows=self.rows,
            frozen=2,
            sortable=False,
        )

    def _line(
        self, name: str, figure: Rich, unit: str, kind: str, *, words: str = "", source: Content
    ) -> Figure:
        row = len(self.rows) + 2
        band = self.band or (None, None)
        head: list[Content] = [row - 1, self.panel, *band, name]
        self.rows.append([*head, figure, shown_unit(unit), kind, words, source])
        if not isinstance(figure.value, int | float):
            raise TypeError(f"{name}: {figure.value!r} is not a number")
        return Figure(float(figure.value), f"$F${row}")

    def _reference(self, reading: Reading, value: float, *, upper: bool) -> tuple[str, Content]:
        """Formula that gives `value`, and the link to where it comes from."""
        mirror = self.places.mirror(reading.where)
        number = self.places.numbers.get(reading.where)
        source: Content = str(reading.where)
        if mirror:
            source = Rich(value=str(reading.where), link=mirror, look="link")
            conversion = _conversion(reading, number, value)
            if conversion is not None:
                return f"{mirror}{conversion}", source
        row = self.places.reading_row(reading)
        column = UPPER_COLUMN if upper and isinstance(reading.value, tuple) else VALUE_COLUMN
        return (f"'{INPUTS}'!${column}${row}" if row else ""), source


def _conversion(reading: Reading, number: float | None, value: float) -> str | None:
    """What turns the number in the cell into `value`; None where that is not plain arithmetic."""
    if number is None or isinstance(reading.value, tuple):
        return None
    if math.isclose(number, value, rel_tol=SAME, abs_tol=0.0):
        return ""
    logarithmic = {reading.unit.startswith("dB"), reading.stated_unit.startswith("dB")}
    if logarithmic == {True}:
        return f"{value - number:+.12g}"
    if logarithmic == {True, False} or number == 0 or value == 0:
        return None
    return f"*{value / number:.12g}"
