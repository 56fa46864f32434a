"""The comparison as a workbook: offers, matrix, all rows with real numbers, points with live sums, files."""

from __future__ import annotations

from collections.abc import Collection, Iterator, Sequence
from dataclasses import dataclass

from speccheck.records import Compliance, Outcome, Requirement, Value
from speccheck.records.evaluations import Evaluation, OfferCell
from speccheck.report.offers.comparison_points import points_lines
from speccheck.report.offers.comparison_view import Column as OfferColumn
from speccheck.report.offers.comparison_view import Comparison
from speccheck.report.pages.formats import shown_unit
from speccheck.report.pages.marks import mark_for
from speccheck.report.pages.view import label, rules_fingerprint
from speccheck.report.workbooks.book import book_bytes
from speccheck.report.workbooks.cells import Content, Rich, column_letter
from speccheck.report.workbooks.sheets import Column, Imprint, Table, moment_of

_MOST_MATRIX_COLUMNS = 250


def comparison_bytes(view: Comparison) -> bytes:
    """The comparison workbook as an .xlsx file; the same evaluation gives the same bytes."""
    evaluation = view.evaluation
    sheets = [_read_me(view), _offers(view)]
    if evaluation.tender is not None:
        sheets += [_matrix(view), _rows(view), _points(view)]
    return book_bytes([*sheets, _files(view)], _imprint(evaluation))


def _imprint(evaluation: Evaluation) -> Imprint:
    rules = evaluation.settings
    status = "" if rules.issued else "DRAFT, "
    number = f"{rules.report_number}, " if rules.report_number else ""
    return Imprint(
        title=f"Comparison of offers: {rules.tender or 'no tender'}",
        subject=f"speccheck {evaluation.program_version}",
        footer=f"{status}{number}comparison of offers",
        paper=rules.paper,
        moment=moment_of(rules.today),
    )


def _read_me(view: Comparison) -> Table:
    evaluation = view.evaluation
    rows: list[tuple[Content, Content]] = [
        ("What this is", view.sentence),
        ("Tender", evaluation.settings.tender or "none given"),
        ("Program", f"speccheck {evaluation.program_version}"),
        (
            "Rules fingerprint",
            rules_fingerprint(evaluation.settings, evaluation.tender, evaluation.program_version),
        ),
        (
            "Sheet Offers",
            "One row an offer: outcome, counts, points, what blocks it. Knocked-out offers first.",
        ),
        (
            "Sheet Matrix",
            "Requirements in tender order against offers; of several bands the one that weighs most.",
        ),
        ("Sheet Rows", "Every requirement, offer and band with real numbers, for sorting and filtering."),
        ("Sheet Points", "Desirable requirements: weights may be changed to try; the sums follow."),
        ("Sheet Files", "Every bid, usable or not, with its checksum."),
        (
            "Care",
            "A desk check of stated figures; it replaces no measurement, local rule or licensed practice.",
        ),
    ]
    columns = (Column(heading="Topic", width=26, look="bold"), Column(heading="Text", width=110, look="wrap"))
    return Table(name="Read me", columns=columns, rows=rows)


def _offers(view: Comparison) -> Table:
    counts = (
        "Mandatory passed",
        "Mandatory failed",
        "Mandatory open",
        "Claims in doubt",
        "Deviations accepted",
    )
    rows = [
        (
            c.number, c.name, c.bid.label, c.offer.outcome.value, *c.counts, c.offer.misfits, c.offer.doubts,
            c.points, c.place or None, "; ".join(c.offer.reasons),
        )
        for c in view.columns
    ]  # fmt: skip
    return Table(
        name="Offers",
        columns=(
            Column(heading="No", width=6, look="number0"),
            Column(heading="Panel", width=28),
            Column(heading="File", width=24),
            Column(heading="Outcome", width=13, status=tuple(Outcome)),
            *(Column(heading=name, width=13, look="number0") for name in counts),
            Column(heading="Physics misfits", width=11, look="number0"),
            Column(heading="Physics doubts", width=11, look="number0"),
            Column(heading="Points", width=9, look="number"),
            Column(heading="Place", width=8, look="number0"),
            Column(heading="What blocks or is open", width=80, look="wrap"),
        ),
        rows=rows,
        frozen=2,
    )


def _matrix(view: Comparison) -> Table:
    shown = view.columns[:_MOST_MATRIX_COLUMNS]
    rows = [
        (
            line.requirement.clause,
            line.requirement.level.value,
            _demand(view, line.requirement),
            *(_entry_text(view, line.requirement, entry.cell) if entry else None for entry in line.entries),
        )
        for line in view.lines(shown)
    ]
    return Table(
        name="Matrix",
        columns=(
            Column(heading="Clause", width=10),
            Column(heading="Level", width=12),
            Column(heading="Requirement", width=40, look="wrap"),
            *(Column(heading=f"{c.number} {c.name}"[:60], width=24, look="wrap") for c in shown),
        ),
        rows=rows,
        frozen=3,
    )


def _demand(view: Comparison, requirement: Requirement) -> str:
    name = label(requirement.parameter) if requirement.parameter else requirement.wording
    if requirement.limit is None:
        return name
    return f"{name} {requirement.operator} {view.numbers.stated(requirement.limit, requirement.unit)}"


def _entry_text(view: Comparison, requirement: Requirement, cell: OfferCell) -> Content:
    mark = mark_for(cell.verdict)
    figure = view.numbers.offered(cell.offered, requirement.unit) if cell.offered is not None else cell.raw
    margin = f" ({view.numbers.signed(cell.margin, requirement.unit)})" if cell.margin is not None else ""
    doubt = ", in doubt" if cell.in_doubt else ""
    return Rich(value=f"{mark.symbol} {mark.word}: {figure or '–'}{margin}{doubt}", look=f"{mark.tone}-wrap")


def _rows(view: Comparison) -> Table:
    return Table(
        name="Rows",
        columns=(
            Column(heading="No", width=6, look="number0"),
            Column(heading="Panel", width=26),
            Column(heading="Clause", width=10),
            Column(heading="Level", width=12),
            Column(heading="Parameter", width=28),
            Column(heading="Band [MHz]", width=14),
            Column(heading="Verdict", width=17, status=tuple(Compliance)),
            Column(heading="Operator", width=10),
            Column(heading="Limit low", width=10, look="number"),
            Column(heading="Limit high", width=10, look="number"),
            Column(heading="Offered low", width=11, look="number"),
            Column(heading="Offered high", width=11, look="number"),
            Column(heading="Unit", width=8),
            Column(heading="Margin", width=10, look="number", note="Positive on the good side of the limit."),
            Column(heading="Stated", width=24),
            Column(heading="Cell", width=16),
            Column(heading="In doubt by", width=24),
            Column(heading="Without deviation", width=17),
            Column(heading="Note", width=60, look="wrap"),
        ),
        rows=_AllRows(view),
        frozen=3,
    )


@dataclass(frozen=True, slots=True)
class _AllRows(Collection[Sequence[Content]]):
    """Rows made as they are written: of many offers they would take more memory than all the rest."""

    view: Comparison

    def __iter__(self) -> Iterator[Sequence[Content]]:
        return (row for column in self.view.columns for row in _offer_rows(self.view, column))

    def __len__(self) -> int:
        return sum(len(column.offer.cells) for column in self.view.columns)

    def __contains__(self, row: object) -> bool:
        return any(row == one for one in self)


def _offer_rows(view: Comparison, column: OfferColumn) -> Iterator[Sequence[Content]]:
    for cell in column.offer.cells:
        requirement = view.requirements[cell.requirement]
        yield (
            column.number, column.name, requirement.clause, requirement.level.value,
            label(requirement.parameter) if requirement.parameter else requirement.wording,
            f"{cell.band[0]:g}-{cell.band[1]:g}" if cell.band else "",
            cell.verdict.value, requirement.operator, *_ends(requirement.limit), *_ends(cell.offered),
            shown_unit(requirement.unit), cell.margin, cell.raw, str(cell.where) if cell.where else "",
            ", ".join(cell.in_doubt), cell.underlying.value if cell.underlying else "", cell.note,
        )  # fmt: skip


def _ends(value: Value | None) -> tuple[Content, Content]:
    if isinstance(value, tuple):
        return value
    return value, None


def _points(view: Comparison) -> Table:
    """Weights and shares of the offers with a place; the last row sums them by a live formula."""
    placed = view.placed[:_MOST_MATRIX_COLUMNS]
    rows: list[Sequence[Content]] = []
    for line in points_lines(view, placed):
        demands = "; ".join(_demand(view, requirement) for requirement in line.demands)
        weight = Rich(value=line.weight, look="entry")
        rows.append((line.demands[0].clause, demands, weight, *map(float, line.earned)))
    last = len(rows) + 1
    sums: list[Content] = [
        Rich(
            value=column.points,
            formula=f"SUMPRODUCT($C$2:$C${last},{column_letter(n)}2:{column_letter(n)}{last})",
        )
        for n, column in enumerate(placed, start=4)
    ]
    if rows:
        total = Rich(value=view.evaluation.points_possible, formula=f"SUM(C2:C{last})")
        rows.append(("", "Points", total, *sums))
    return Table(
        name="Points",
        columns=(
            Column(heading="Clause", width=10),
            Column(heading="Desirable requirement", width=44, look="wrap"),
            Column(heading="Weight", width=10, look="number"),
            *(Column(heading=f"{c.number} {c.name}"[:60], width=16, look="number") for c in placed),
        ),
        rows=rows,
        frozen=3,
        sortable=False,
    )


def _files(view: Comparison) -> Table:
    return Table(
        name="Files",
        columns=(
            Column(heading="File", width=34),
            Column(heading="SHA-256", width=66),
            Column(heading="Offers", width=8, look="number0"),
            Column(heading="Outputs", width=60, look="wrap"),
            Column(heading="Why not usable", width=80, look="wrap"),
        ),
        rows=[
            (bid.label, bid.sha256, len(bid.offers), ", ".join(bid.outputs), bid.error)
            for bid in view.evaluation.bids
        ],
    )
