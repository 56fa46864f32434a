"""Claims to readings: the cell read by its parameter's kind, converted, with how it was recognised."""

from __future__ import annotations

from speccheck.dictionary import parameters
from speccheck.intake.files.grid import Cell, Raw
from speccheck.intake.panels.found import Figure, Found, Outcome, spread
from speccheck.intake.panels.open_records import cell_ref
from speccheck.intake.panels.understanding import Understanding, Understood, unit_of
from speccheck.intake.tables.claims import Claim, Context
from speccheck.quantities import DecimalHabit, read_cell
from speccheck.records import CellRef, Statement, Status, Unread
from speccheck.text import plain


class Reader:
    """Reads claims of one file."""

    def __init__(self, file: str, habit: DecimalHabit) -> None:
        self._file, self._understanding = file, Understanding(habit)

    def where(self, sheet: str, address: str) -> CellRef:
        """The reference of a cell."""
        return CellRef(self._file, sheet, address)

    def figures(self, cell: Cell, context: Context) -> tuple[Figure, ...]:
        """What a cell would say under a heading, claimed or not."""
        return () if cell.fault else self._understanding.of(cell.raw, context, cell.number_format).figures

    def read(self, claim: Claim, sheet: str) -> Outcome:
        """Readings of one claim, or its statement, or why it was not read."""
        cell, context = claim.cell, claim.context
        where = cell_ref(self._file, sheet, cell.address)
        if cell.fault:
            return Outcome(
                sheet,
                unread=Unread(where=where, text=cell.text, reason=cell.fault, suggestion=_remedy(cell.fault)),
            )
        raw: Raw = cell.raw if claim.text is None else claim.text
        if isinstance(raw, str) and raw.startswith("'"):
            raw = raw[1:]  # the sign that a spreadsheet shall keep a cell as text
        known = self._understanding.of(raw, context, cell.number_format)
        figures, content = known.figures, known.content
        if not figures or content.status is not None or known.trouble or claim.tolerance is not None:
            return self._read_with_care(claim, sheet, where, known)
        if len(figures) == 1:  # nearly every cell of a catalogue
            return Outcome(sheet, [_found(where, claim, figures[0])], None, None, content.footnotes)
        return Outcome(sheet, [_found(where, claim, f) for f in figures], None, None, content.footnotes)

    def _read_with_care(self, claim: Claim, sheet: str, where: CellRef, understood: Understood) -> Outcome:
        """A claim whose cell says no figure, or more than one."""
        cell, context = claim.cell, claim.context
        if understood.refused:
            text, reason = plain(cell.text, 80), understood.refused
            return Outcome(
                sheet, unread=Unread(where=where, text=text, reason=reason, suggestion="split the file")
            )
        content, figures, trouble = understood.content, understood.figures, understood.trouble
        first = context.label.parameters[0]
        outcome = Outcome(
            sheet, [_found(where, claim, figure) for figure in figures], footnotes=content.footnotes
        )
        if content.status is not None:
            outcome.statement = Statement(
                where=where,
                parameter=first,
                raw=cell.text,
                status=Status(content.status),
                band=claim.band,
                heading=context.heading,
            )
        elif not figures:
            trouble = trouble or f"no {parameters()[first].label} could be read from it"
        if trouble:
            hint = "" if figures else _example(first)
            outcome.unread = Unread(where=where, text=cell.text, reason=trouble, suggestion=hint)
        self._add_tolerance(outcome.found, claim)
        return outcome

    def _add_tolerance(self, found: list[Found], claim: Claim) -> None:
        """A tolerance in a column of its own holds for the figure of its row."""
        if claim.tolerance is None or claim.tolerance.fault:
            return
        key = claim.context.label.parameters[0]
        content = read_cell(
            claim.tolerance.raw, kind="number", unit=unit_of(claim.context), expected=parameters()[key].unit
        )
        for quantity in content.quantities[:1]:
            for one in found:
                if one.tolerance is None and isinstance(one.value, float):
                    one.tolerance = spread(quantity, one)


def _found(where: CellRef, claim: Claim, figure: Figure) -> Found:
    quantity = figure.quantity
    return Found(
        where,
        claim.cell.text,
        claim.context.heading,
        figure,
        figure.parameter,
        quantity.value,
        claim.band or figure.band,
        quantity.tolerance,
    )


def _example(key: str) -> str:
    examples = parameters()[key].examples
    return f"such as '{examples[0].cell}'" if examples else ""


def _remedy(fault: str) -> str:
    if fault.startswith("formula"):
        return "open the file in a spreadsheet program and save it, so that results are stored"
    return "ask the bidder for the figure"
