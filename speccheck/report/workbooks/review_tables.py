"""The sheets of results: Findings and Requirements."""

from __future__ import annotations

from speccheck.records import (
    Assessment,
    Compliance,
    Convention,
    Fit,
    MatrixRow,
    Step,
)
from speccheck.report.pages.formats import Numbers, margin_decimals, shown_unit
from speccheck.report.pages.view import label
from speccheck.report.workbooks.cells import Content
from speccheck.report.workbooks.review_parts import (
    PEOPLE,
    UNFILLED,
    band_edges,
    linked_cells,
    number_cell,
    spread,
)
from speccheck.report.workbooks.review_places import FINDINGS, NumberedFinding, Places
from speccheck.report.workbooks.sheets import Column, Table

TALLER = (
    "Rows are as tall as what is printed; double-click the lower edge of a row's number to see all of it."
)


def findings(places: Places) -> Table:
    """One row a finding, with claim, expected interval, working and question."""
    bounds = ("Claimed", "Claimed to", "Expected from", "Expected to")
    return Table(
        name=FINDINGS,
        columns=(
            Column(heading="No.", width=7, look="number0", note="Number of the finding; keeps when sorted."),
            Column(heading="Panel", width=18),
            Column(heading="Band from (MHz)", width=10, look="number", note="Empty: the panel as a whole."),
            Column(heading="Band to (MHz)", width=10, look="number"),
            Column(heading="Verdict", width=13, status=tuple(Fit), note="Words of physics; see Lists."),
            Column(heading="Check", width=32, look="wrap"),
            Column(heading="Summary", width=60, look="wrap"),
            *(
                Column(heading=name, width=11, look="number", note="In the unit beside it.")
                for name in bounds
            ),
            Column(heading="Unit", width=8),
            Column(heading="Cells", width=34, look="link", note="Leads to the first of the cells."),
            Column(heading="Question", width=40, look="wrap"),
            Column(heading="Claimed in words", width=16),
            Column(
                heading="Innocent readings", width=60, look="wrap", note="Conventions that would explain it."
            ),
            Column(heading="Working", width=90, look="wrap", note=TALLER),
            Column(heading="Assumptions", width=70, look="wrap"),
            Column(heading="Source", width=50, look="wrap"),
            *PEOPLE,
        ),
        rows=[_finding_row(one, places) for one in places.findings],
        frozen=2,
        printed=14,
    )


def _finding_row(one: NumberedFinding, places: Places) -> list[Content]:
    finding = one.finding
    claimed, expected = finding.claimed, finding.expected
    held = expected or claimed
    unit = held.unit if held else ""
    low, high, words = spread(claimed.value if claimed else None)
    if claimed and claimed.unit != unit and not words:
        low, high, words = None, None, Numbers().amount(claimed)
    return [
        one.number,
        one.panel,
        *band_edges(finding.band),
        finding.verdict.value,
        finding.title,
        finding.summary,
        low,
        high,
        number_cell(expected.low if expected else None, unit),
        number_cell(expected.high if expected else None, unit),
        shown_unit(unit),
        linked_cells(finding.where, places),
        finding.question,
        words,
        "\n".join(map(_convention, finding.conventions)) or _none_tried(finding.verdict),
        "\n".join(map(_step, finding.working)),
        "\n".join(finding.assumptions),
        finding.source,
        *UNFILLED,
    ]


def requirements(assessment: Assessment, places: Places) -> Table:
    """One row a requirement, panel and band: limit, offer, margin, verdict."""
    return Table(
        name="Requirements",
        columns=(
            Column(heading="Clause", width=10),
            Column(heading="Panel", width=18),
            Column(heading="Level", width=12),
            Column(heading="Wording", width=44, look="wrap"),
            Column(heading="Parameter", width=26),
            Column(heading="Band from (MHz)", width=10, look="number", note="Empty: the panel as a whole."),
            Column(heading="Band to (MHz)", width=10, look="number"),
            Column(heading="Operator", width=10),
            Column(heading="Limit", width=10, look="number", note="In the unit beside it."),
            Column(heading="Limit to", width=10, look="number", note="Upper end of a range."),
            Column(heading="Limit in words", width=16),
            Column(heading="Unit", width=8),
            Column(heading="Offered", width=10, look="number", note="In the requirement's unit."),
            Column(heading="Offered to", width=10, look="number"),
            Column(heading="Margin", width=10, look="number", note="Positive is on the good side."),
            Column(heading="Verdict", width=18, status=tuple(Compliance), note="See Lists."),
            Column(heading="Offer's cell", width=14, look="link"),
            Column(heading="As written", width=20, note="The bidder's own text."),
            Column(heading="Verdict without deviation", width=16, status=tuple(Compliance)),
            Column(heading="Claim in doubt", width=26, note="Checks that the offered figure does not fit."),
            Column(heading="Note", width=40, look="wrap"),
            Column(heading="Reading confirmed", width=11, note="By the buyer, in the tender workbook."),
            Column(heading="Tender's cell", width=18),
            *PEOPLE,
        ),
        rows=[
            _requirement_row(one.panel.name, row, places)
            for one in assessment.panels
            for row in one.requirements
        ],
        frozen=2,
        printed=17,
    )


def _requirement_row(panel: str, row: MatrixRow, places: Places) -> list[Content]:
    asked = row.requirement
    limit = spread(asked.limit)
    offered = spread(row.offered_in_unit)
    answer = row.offered or row.statement
    return [
        asked.clause,
        panel,
        asked.level.value,
        asked.wording,
        label(asked.parameter) if asked.parameter else "",
        *band_edges(row.band),
        asked.operator,
        *limit,
        shown_unit(asked.unit),
        *offered[:2],
        number_cell(row.margin, asked.unit, margin_decimals),
        row.verdict.value,
        linked_cells((answer.where,), places) if answer else "",
        answer.raw if answer else "",
        row.underlying.value if row.underlying else "",
        ", ".join(row.in_doubt),
        row.note,
        "yes" if asked.confirmed else "no",
        str(asked.where),
        *UNFILLED,
    ]


def _convention(one: Convention) -> str:
    value = one.value if isinstance(one.value, str) else f"{one.value:g}"
    return f"{one.name}: {value} {shown_unit(one.unit)}".rstrip()


def _none_tried(verdict: Fit) -> str:
    return "none of those tried fits" if verdict in (Fit.DOES_NOT_FIT, Fit.DOUBTFUL) else ""


def _step(step: Step) -> str:
    value = step.value if isinstance(step.value, str) else f"{step.value:.5g}"
    return f"{step.label}: {step.formula} = {value} {shown_unit(step.unit)}".rstrip()
