"""The sheets around the results: Read me, Rules used, Lists."""

from __future__ import annotations

from collections.abc import Mapping, Sequence

from speccheck.records import Assessment, Compliance, Fit, Outcome
from speccheck.report.pages.marks import COMPLIANCE, FITS, LEVELS, OUTCOMES
from speccheck.report.pages.view import fingerprint, label
from speccheck.report.workbooks.cells import Content, Rich
from speccheck.report.workbooks.review_places import Places
from speccheck.report.workbooks.sheets import Column, Table


def read_me(assessment: Assessment, places: Places) -> Table:
    """What was judged, how to use the sheets, what the colours mean, what to be careful with."""
    submission = assessment.submission
    rows: list[tuple[Content, Content]] = [
        ("Input file", submission.file),
        ("Input SHA-256", submission.sha256),
        ("Input size in bytes", submission.size_bytes),
        ("Program", f"speccheck {assessment.program_version}"),
        ("Rules fingerprint", fingerprint(assessment)),
        ("Tender", assessment.tender.file if assessment.tender else "none: no requirement was judged"),
        ("Report number", assessment.settings.report_number),
        ("Revision", assessment.settings.revision),
        ("Status", "issued" if assessment.settings.issued else "DRAFT"),
        *_SHEETS,
        *((sheet, f"Mirror of the bidder's sheet '{name}'") for name, sheet in places.mirrors.items()),
        *((sheet.name, "was hidden in the bidder's file") for sheet in submission.mirror if sheet.hidden),
        *_LEGEND,
        *_CARE,
    ]
    return Table(
        name="Read me",
        columns=(
            Column(heading="Topic", width=26, look="bold"),
            Column(heading="Text", width=110, look="wrap"),
        ),
        rows=rows,
    )


_SHEETS = (
    ("Sheet Summary", "One row a panel: outcome and counts."),
    (
        "Sheet Findings",
        "Every check, with claim, expected interval, working, innocent readings and question.",
    ),
    ("Sheet Requirements", "Every requirement against every panel, with margin. Empty without a tender."),
    ("Sheet Questions", "The clarification list, with room for owner, dates and answers."),
    ("Sheet Inputs as read", "Every cell as it was understood, and what was not."),
    (
        "Sheets Input 1, 2 …",
        "The bidder's sheets, values at their own addresses. Formulas are not carried over.",
    ),
    ("Sheet Recomputed", "Live formulas for what can be redone by hand. Assumptions may be changed to try."),
    ("Sheet Rules used", "Settings, checks and sources."),
    ("Sheet Lists", "The words of the program and what each means; pick-lists refer to it."),
)

_LEGEND = (
    (
        "Colours of mirrored cells",
        "The colour is that of the worst finding that rests on the cell. Words count.",
    ),
    ("", Rich(value="a finding that fits", look="good")),
    ("", Rich(value="a doubtful finding", look="near")),
    ("", Rich(value="a finding that does not fit", look="bad")),
    ("", Rich(value="not judged: something is missing", look="open")),
    ("", Rich(value="read, no finding rests on it", look="read")),
    ("", Rich(value="not understood", look="unread")),
)

_CARE = (
    (
        "Text from the bidder",
        "Stored as text and never run as a formula. On export to CSV put an apostrophe before text that "
        "starts with =, +, - or @; leave negative numbers as they are.",
    ),
    (
        "Sorting",
        "Filter and sort freely, except on Recomputed. Links lead to the rows as first written; "
        "after sorting, go by the number of the finding.",
    ),
    ("Locked cells", "Headings only, without a password."),
    ("Links on paper", "Every link repeats what stands in its cell; nothing stands in a note only."),
    (
        "A misfit",
        "These figures, read this way, cannot all be true. It asks a question and never shows intent.",
    ),
    (
        "Distances",
        "Calculated compliance distances are a desk check from bidder's figures along the strongest beam. "
        "They are no site assessment and no permission to work near it: local rules and licensed "
        "practice decide. Read them only with the assumptions and cautions on the sheet Rules used.",
    ),
)


def rules_used(assessment: Assessment) -> Table:
    """Settings, deviations, checks and the exposure note's assumptions, each with its source."""
    rows: list[list[Content]] = [
        *_settings(assessment),
        *_checks(assessment),
        *_deviations(assessment),
        *_exposure(assessment),
    ]
    return Table(
        name="Rules used",
        columns=(
            Column(heading="Kind", width=22),
            Column(heading="Rule", width=44),
            Column(heading="Figure", width=12, look="number"),
            Column(heading="Text", width=80, look="wrap"),
            Column(heading="Source", width=50, look="wrap"),
        ),
        rows=rows,
        frozen=2,
    )


def _settings(assessment: Assessment) -> list[list[Content]]:
    rules = assessment.settings
    numbers: Mapping[str, float] = {
        "Reflection factor on power density": rules.reflection_factor,
        "Country factor on exposure levels": rules.country_factor,
        "TDD duty": rules.tdd_duty,
        "Actual-maximum factor": rules.actual_maximum_factor,
        "Power tolerance of the cautious set (dB)": rules.power_tolerance_db,
        **{f"Guard band: {label(key)}": value for key, value in rules.guard_bands.items()},
    }
    ranges = {f"Loss (dB): {name}": f"{low:g} to {high:g}" for name, (low, high) in rules.loss_db.items()}
    words = {
        "Limit set of the exposure note": rules.limit_set,
        "Equality with a limit": "meets" if rules.equality_meets else "does not meet",
        "Statistic where a requirement names none": rules.statistic,
        **ranges,
        **{f"House heading: {name}": label(key) for name, key in rules.headings.items()},
    }
    source = rules.tender or "built in"
    rows: list[list[Content]] = [["setting", name, value, "", source] for name, value in numbers.items()]
    return rows + [["setting", name, None, text, source] for name, text in words.items()]


def _checks(assessment: Assessment) -> list[list[Content]]:
    used = {f.check: f for one in assessment.panels for f in one.findings}
    return [["check", used[slug].title, None, slug, used[slug].source] for slug in sorted(used)]


def _deviations(assessment: Assessment) -> list[list[Content]]:
    accepted = assessment.tender.deviations if assessment.tender else ()
    return [
        [
            "deviation",
            f"Clause {one.clause}, {one.offer}",
            None,
            f"{one.reason}; accepted by {one.approver or 'nobody named'}, until {one.expires or 'no date'}",
            str(one.where),
        ]
        for one in accepted
    ]


def _exposure(assessment: Assessment) -> list[list[Content]]:
    rows: list[list[Content]] = []
    for one in assessment.panels:
        if one.exposure is None:
            continue
        note, name = one.exposure, one.panel.name
        groups = (
            ("exposure: missing", note.missing),
            ("exposure: assumption", note.assumptions),
            ("exposure: caution", note.cautions),
            ("exposure: validity", note.validity),
        )
        rows += [[kind, name, None, text, note.limit_source] for kind, texts in groups for text in texts]
    return rows


def lists() -> Table:
    """Words of the program and their meaning; columns E and G feed the pick-lists."""
    meanings: Sequence[tuple[str, str]] = (
        *((str(word), mark.meaning) for word, mark in OUTCOMES.items()),
        *((str(word), text) for word, text in LEVELS.items()),
    )
    fits = [(str(word), FITS[word].meaning) for word in Fit]
    met = [(str(word), COMPLIANCE[word].meaning) for word in Compliance]
    picks = list(dict.fromkeys([*map(str, Fit), *map(str, Compliance)]))
    rows: list[list[Content]] = []
    for number in range(max(len(picks), len(meanings), len(met))):
        rows.append(
            [
                *_at(meanings, number),
                *_at(fits, number),
                picks[number] if number < len(picks) else None,
                dict(met).get(picks[number]) if number < len(picks) else None,
                ("yes", "no")[number] if number < 2 else None,
            ]
        )
    return Table(
        name="Lists",
        columns=(
            Column(heading="Outcome or level", width=16, status=tuple(Outcome)),
            Column(heading="Meaning of outcome or level", width=50, look="wrap"),
            Column(heading="Physics verdict", width=16, status=tuple(Fit)),
            Column(heading="Meaning of physics verdict", width=50, look="wrap"),
            Column(heading="Reviewer's verdict", width=23, status=(*Fit, *Compliance)),
            Column(heading="Meaning for a requirement", width=50, look="wrap"),
            Column(heading="Yes or no", width=10),
        ),
        rows=rows,
    )


def _at(pairs: Sequence[tuple[str, str]], number: int) -> tuple[Content, Content]:
    return pairs[number] if number < len(pairs) else (None, None)
