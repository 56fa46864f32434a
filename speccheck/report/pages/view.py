"""What the templates print: an Assessment put in reading order, counted once, numbered once.

Nothing is judged here. Every count of the report comes from `Tally`, so summary and tables cannot differ.
"""

from __future__ import annotations

import hashlib
import json
from collections.abc import Iterable, Sequence
from dataclasses import asdict, dataclass

from speccheck.dictionary import parameters
from speccheck.records import (
    Assessment,
    Band,
    CellRef,
    Compliance,
    Finding,
    Fit,
    Level,
    MatrixRow,
    PanelAssessment,
    Requirement,
    Settings,
    Tender,
)
from speccheck.records.demands import margin_unit
from speccheck.records.words import FAILED
from speccheck.report.pages.canvas import Figure
from speccheck.report.pages.figures import panel_figures
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.inputs import InputRow, input_rows
from speccheck.report.pages.marks import Mark, mark_for
from speccheck.report.pages.questions import Question, collect_questions
from speccheck.report.pages.summary import Tally, decisions, sentence, tally

MISFITS = (Fit.DOES_NOT_FIT, Fit.DOUBTFUL)


@dataclass(frozen=True, slots=True, kw_only=True)
class FindingView:
    """A finding with its place in the report."""

    finding: Finding
    anchor: str
    mark: Mark
    question: Question | None

    @property
    def unexplained(self) -> bool:
        """Whether none of the innocent readings tried would explain the claim."""
        return self.finding.verdict in MISFITS and not self.finding.conventions


@dataclass(frozen=True, slots=True, kw_only=True)
class BandView:
    """The physics pages of one band, or of the panel as a whole."""

    band: Band | None
    findings: tuple[FindingView, ...]
    figures: tuple[Figure, ...]

    @property
    def judged(self) -> tuple[FindingView, ...]:
        """Findings with a verdict; the others are listed with the offer."""
        return tuple(f for f in self.findings if f.finding.verdict is not Fit.NOT_JUDGED)


@dataclass(frozen=True, slots=True, kw_only=True)
class PanelView:
    """One panel, ready to print."""

    anchor: str
    number: int
    source: PanelAssessment
    mark: Mark
    sentence: str
    tally: Tally
    findings: tuple[FindingView, ...]
    contradictions: tuple[MatrixRow, ...]
    bands: tuple[BandView, ...]
    figures: tuple[Figure, ...]
    exposure_figures: tuple[Figure, ...]
    questions: tuple[Question, ...]

    @property
    def name(self) -> str:
        """The panel's name as its bidder wrote it."""
        return self.source.panel.name

    @property
    def misfits(self) -> tuple[FindingView, ...]:
        """Claims that do not fit, then doubtful ones."""
        return tuple(f for verdict in MISFITS for f in self.findings if f.finding.verdict is verdict)

    @property
    def reasons_of_rows(self) -> tuple[str, ...]:
        """Reasons for the outcome besides the misfits, which a table of their own says in full."""
        claims = tuple(verdict.value for verdict in MISFITS)
        return tuple(reason for reason in self.source.reasons if not reason.startswith(claims))

    def with_verdict(self, verdict: Fit) -> tuple[FindingView, ...]:
        """Findings of one verdict."""
        return tuple(f for f in self.findings if f.finding.verdict is verdict)

    def rows(self, level: Level, *verdicts: Compliance) -> tuple[MatrixRow, ...]:
        """Requirement rows of a level, those with one of the verdicts where any are named."""
        rows = (row for row in self.source.requirements if row.requirement.level is level)
        return tuple(row for row in rows if not verdicts or row.verdict in verdicts)

    def top_reasons(self, most: int) -> tuple[str, ...]:
        """What decided the outcome, the weightiest first."""
        return self.source.reasons[:most]


@dataclass(frozen=True, slots=True, kw_only=True)
class MatrixLine:
    """One line of the offer matrix: a requirement in one band, and each panel's row or None."""

    requirement: Requirement
    band: Band | None
    rows: tuple[MatrixRow | None, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class ReportView:
    """The whole report, ready to print."""

    source: Assessment
    numbers: Numbers
    panels: tuple[PanelView, ...]
    matrix: tuple[MatrixLine, ...]
    questions: tuple[Question, ...]
    inputs: tuple[InputRow, ...]
    anchors: dict[CellRef, str]
    settings: tuple[tuple[str, str], ...]
    rules_fingerprint: str
    decisions: tuple[str, ...]

    @property
    def draft(self) -> bool:
        """Whether the report still has to be issued."""
        return not self.source.settings.issued

    @property
    def checks_used(self) -> tuple[tuple[str, str, str], ...]:
        """Slug, title and source of every check that answered, once."""
        found = {f.check: (f.check, f.title, f.source) for p in self.source.panels for f in p.findings}
        return tuple(found[slug] for slug in sorted(found))


def build_view(assessment: Assessment) -> ReportView:
    """Put an assessment in reading order."""
    numbers = Numbers(assessment.settings.decimal_comma, assessment.settings.date_order)
    questions = collect_questions(assessment, label)
    panels = tuple(
        _panel_view(i, panel, assessment, questions, numbers)
        for i, panel in enumerate(assessment.panels, start=1)
    )
    rows, anchors = input_rows(assessment.submission)
    return ReportView(
        source=assessment,
        numbers=numbers,
        panels=panels,
        matrix=_matrix(assessment),
        questions=questions,
        inputs=rows,
        anchors=anchors,
        settings=_settings_rows(assessment.settings, numbers),
        rules_fingerprint=fingerprint(assessment),
        decisions=decisions(assessment, questions),
    )


def label(key: str) -> str:
    """Name of a parameter in the dictionary; its key in words where it has none."""
    known = parameters().get(key)
    return known.label if known else key.replace("_", " ")


def guard_bands(settings: Settings, numbers: Numbers) -> str:
    """Guard bands in words, each in the unit of its parameter."""
    known = parameters()
    units = {key: margin_unit(known[key].unit) if key in known else "" for key in settings.guard_bands}
    return "; ".join(
        f"{label(key)} {numbers.figure(width, units[key])}" for key, width in settings.guard_bands.items()
    )


def fingerprint(assessment: Assessment) -> str:
    """Fingerprint of the rules an assessment was made by."""
    return rules_fingerprint(assessment.settings, assessment.tender, assessment.program_version)


def rules_fingerprint(settings: Settings, tender: Tender | None, program_version: str) -> str:
    """SHA-256 over settings, tender and program version: the same rules give the same one in every output."""
    rules = asdict(settings)
    for not_a_rule in (
        "today",
        "report_number",
        "revision",
        "issued",
        "paper",
        "decimal_comma",
        "date_order",
    ):
        rules.pop(not_a_rule, None)
    rules["program"] = program_version
    rules["tender_file"] = tender.sha256 if tender else ""
    return hashlib.sha256(json.dumps(rules, sort_keys=True, default=str).encode()).hexdigest()


def _panel_view(
    number: int,
    panel: PanelAssessment,
    assessment: Assessment,
    questions: Sequence[Question],
    numbers: Numbers,
) -> PanelView:
    own = tuple(q for q in questions if q.panel_number == number)
    by_finding = {index: q for q in own for index in q.findings}
    findings = tuple(
        FindingView(finding=f, anchor=f"p{number}f{i}", mark=mark_for(f.verdict), question=by_finding.get(i))
        for i, f in enumerate(panel.findings)
    )
    drawn = panel_figures(panel, numbers, label)
    counted = tally(panel)
    return PanelView(
        anchor=f"panel-{number}",
        number=number,
        source=panel,
        mark=mark_for(panel.outcome),
        sentence=sentence(counted, len(own), bool(assessment.tender)),
        tally=counted,
        findings=findings,
        contradictions=tuple(r for r in panel.requirements if r.statement and r.verdict in FAILED),
        bands=_bands(panel, findings, drawn.by_band),
        figures=drawn.overview,
        exposure_figures=drawn.exposure,
        questions=own,
    )


def _bands(
    panel: PanelAssessment, findings: Iterable[FindingView], figures: dict[Band | None, tuple[Figure, ...]]
) -> tuple[BandView, ...]:
    groups: dict[Band | None, list[FindingView]] = {band: [] for band in (*panel.panel.bands, None)}
    for view in findings:
        groups.setdefault(view.finding.band, []).append(view)
    views = (
        BandView(band=band, findings=tuple(found), figures=figures.get(band, ()))
        for band, found in groups.items()
    )
    return tuple(view for view in views if view.judged or view.figures)


def _matrix(assessment: Assessment) -> tuple[MatrixLine, ...]:
    """Requirements in tender order; the panels' rows side by side."""
    if assessment.tender is None:
        return ()
    known = list(assessment.tender.requirements)
    places = {id(requirement): i for i, requirement in enumerate(known)}
    lines: dict[tuple[int, Band | None], list[MatrixRow | None]] = {}
    for column, panel in enumerate(assessment.panels):
        for row in panel.requirements:
            index = places.get(id(row.requirement))
            if index is None:  # a result read back from JSON holds equal requirements, not the same ones
                if row.requirement not in known:
                    known.append(row.requirement)
                index = known.index(row.requirement)
            line = lines.setdefault((index, row.band), [None] * len(assessment.panels))
            line[column] = row
    return tuple(
        MatrixLine(requirement=known[index], band=band, rows=tuple(rows))
        for (index, band), rows in sorted(lines.items(), key=lambda item: item[0][0])
    )


def _settings_rows(settings: Settings, numbers: Numbers) -> tuple[tuple[str, str], ...]:
    losses = "; ".join(f"{k} {numbers.stated(v, 'dB')}" for k, v in settings.loss_db.items())
    return (
        ("Limit set of the exposure note", settings.limit_set),
        ("Reflection factor on power density", numbers.stated(settings.reflection_factor)),
        ("Country factor on exposure levels", numbers.stated(settings.country_factor)),
        ("TDD duty", numbers.stated(settings.tdd_duty)),
        ("Actual-maximum factor", numbers.stated(settings.actual_maximum_factor)),
        ("Power tolerance of the cautious set", numbers.stated(settings.power_tolerance_db, "dB")),
        ("Equality with a limit", "meets" if settings.equality_meets else "does not meet"),
        ("Statistic where a requirement names none", settings.statistic),
        ("Guard bands", guard_bands(settings, numbers) or "none"),
        ("Loss ranges", losses or "as built in for each class of panel"),
        ("House headings", str(len(settings.headings)) if settings.headings else "none"),
    )
