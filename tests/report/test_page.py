"""The HTML page: counts, order, words, escaping, self-containment."""

from __future__ import annotations

import re
from dataclasses import replace
from html.parser import HTMLParser
from itertools import pairwise

import jinja2
import pytest
from hypothesis import HealthCheck, given, settings
from report.sample import OUTLINE, PANEL, SUBMISSION, sample
from report.strategies import assessments

from speccheck.records import Assessment, Compliance, ExposureNote, Fit, Level, Panel, Unread
from speccheck.report.pages.formats import Numbers
from speccheck.report.pages.html import _environment, render_html
from speccheck.report.pages.view import build_view

PAGE = render_html(sample())

FORBIDDEN = (
    "safe",
    "safely",
    "safety",
    "harmless",
    "no risk",
    "guaranteed",
    "radiation-free",
    "exclusion zone",
    "false",
    "lie",
    "fraud",
)
"""Words to avoid of the exposure note and of reports on bidders; 'complies' only where a bidder wrote it."""


class Outline(HTMLParser):
    """Tags, text and identifiers of a page, without script and style."""

    def __init__(self, page: str) -> None:
        super().__init__()
        self.tags: list[tuple[str, dict[str, str | None]]] = []
        self.text: list[str] = []
        self._hidden = 0
        self.feed(page)

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        self.tags.append((tag, dict(attrs)))
        self._hidden += tag in ("script", "style")

    def handle_endtag(self, tag: str) -> None:
        self._hidden -= tag in ("script", "style")

    def handle_data(self, data: str) -> None:
        if not self._hidden:
            self.text.append(data)

    def words(self) -> str:
        """Everything a reader sees, in reading order."""
        return " ".join(" ".join(self.text).split())


def test_sections_stand_in_the_order_that_readers_expect() -> None:
    expected = (
        "summary how-to-read matrix offers physics exposure questions registers requirements inputs annex"
    )
    found = re.findall(r'<section id="([a-z-]+)"', PAGE)
    assert [name for name in found if not name.startswith("panel-")] == expected.split()


def test_headings_never_skip_a_level() -> None:
    levels = [int(tag[1]) for tag, _ in Outline(PAGE).tags if re.fullmatch("h[1-6]", tag)]
    assert levels[0] == 1
    assert levels.count(1) == 1
    assert all(later - earlier <= 1 for earlier, later in pairwise(levels))


def test_counts_of_the_summary_are_the_counts_of_the_tables() -> None:
    for level in (Level.MANDATORY, Level.DESIRABLE):
        for verdict in Compliance:
            rows = [r for r in OUTLINE.requirements if (r.requirement.level, r.verdict) == (level, verdict)]
            shown = re.search(f'data-count="{level.value}/{verdict.value}">([0-9]+)<', PAGE)
            assert shown is not None
            assert int(shown[1]) == len(rows), (level, verdict)
    for fit in Fit:
        shown = re.search(f'data-count="{fit.value}">([0-9]+)<', PAGE)
        assert shown is not None
        assert int(shown[1]) == sum(f.verdict is fit for f in OUTLINE.findings)


def test_rows_and_findings_are_printed_once_for_each_record() -> None:
    matrix = PAGE[PAGE.index('id="matrix"') : PAGE.index('id="offers"')]
    assert matrix.count("<tr data-level") == len(OUTLINE.requirements)
    physics = PAGE[PAGE.index('id="physics"') : PAGE.index('id="exposure"')]
    judged = [f for f in OUTLINE.findings if f.verdict is not Fit.NOT_JUDGED]
    assert physics.count("<div class=finding") == len(judged)
    inputs = PAGE[PAGE.index('id="inputs"') : PAGE.index('id="annex"')]
    assert inputs.count("<tr") >= len(PANEL.readings) + len(PANEL.statements) + len(SUBMISSION.unread)


def test_every_open_row_and_every_misfit_has_a_question() -> None:
    view = build_view(sample())
    asked = {i for q in view.questions for i in q.findings}
    assert asked == {i for i, f in enumerate(OUTLINE.findings) if f.question}
    clauses = {clause for q in view.questions for clause in q.clauses}
    open_rows = [
        r for r in OUTLINE.requirements if r.verdict in (Compliance.NOT_STATED, Compliance.NOT_JUDGED)
    ]
    assert {r.requirement.clause for r in open_rows} <= clauses
    assert [q.number for q in view.questions] == list(range(1, len(view.questions) + 1))


def test_a_misfit_lists_innocent_readings_or_says_that_none_fits() -> None:
    text = Outline(PAGE).words()
    assert text.count("gain summed over both polarisations (18.0 dBi)") == 2
    assert "Innocent readings: none of those tried would explain it" in text


def test_words_to_avoid_never_occur() -> None:
    text = Outline(PAGE).words().lower()
    assert not [word for word in FORBIDDEN if re.search(rf"\b{word}\b", text)]


def test_text_of_a_bidder_stays_text() -> None:
    assert "<script>alert" not in PAGE
    assert "&lt;script&gt;alert" in PAGE
    assert "<b>bold</b>" not in PAGE
    assert "\u202e" not in PAGE


@pytest.mark.parametrize(
    "hostile",
    [
        '"><img src=x onerror=alert(1)>',
        "</script><script>alert(1)</script>",
        "{{ 7 * 7 }}{% raw %}",
        "javascript:alert(1)",
        "\x00\x1b[31m\u202egnp.exe",
        "=cmd|' /C calc'!A0",
        "x" * 10_000,
        "<!-- ]]> &amp; &#60;svg onload=alert(1)&#62;",
    ],
)
def test_hostile_text_in_every_place_a_bidder_can_write(hostile: str) -> None:
    first = replace(PANEL.readings[0], raw=hostile, condition=hostile, recognised=hostile, value=hostile)
    panel = replace(PANEL, name=hostile, readings=(first, *PANEL.readings[1:]))
    finding = replace(OUTLINE.findings[1], summary=hostile, question=hostile)
    assessed = replace(OUTLINE, panel=panel, findings=(finding,), reasons=(hostile,))
    unread = (
        Unread(where=replace(first.where, sheet=hostile), text=hostile, reason="r", suggestion=hostile),
    )
    submission = replace(SUBMISSION, file=hostile, panels=(panel,), unread=unread)
    page = Outline(render_html(replace(sample(), submission=submission, panels=(assessed,))))
    clean = Outline(PAGE)
    assert {t for t, _ in page.tags} <= {t for t, _ in clean.tags}
    assert {name for _, attributes in page.tags for name in attributes} <= {
        name for _, attributes in clean.tags for name in attributes
    }
    assert len([t for t, _ in page.tags if t == "script"]) == 1


def test_nothing_is_fetched_and_only_the_page_s_own_style_and_script_may_run() -> None:
    outline = Outline(PAGE)
    for tag, attributes in outline.tags:
        assert tag not in ("img", "link", "iframe", "object", "embed", "form", "base")
        assert "src" not in attributes
        assert "style" not in attributes
        assert not [name for name in attributes if name.startswith("on")]
        assert (attributes.get("href") or "#").startswith("#")
    policy = next(a["content"] or "" for t, a in outline.tags if t == "meta" and "http-equiv" in a)
    assert policy.startswith("default-src 'none'")
    assert "unsafe" not in policy
    assert "http:" not in PAGE.replace("http://www.w3.org/2000/svg", "")
    assert "https:" not in PAGE


def test_links_lead_somewhere_and_identifiers_are_used_once() -> None:
    tags = Outline(PAGE).tags
    names = [a["id"] for _, a in tags if "id" in a]
    assert len(names) == len(set(names))
    targets = {(a.get("href") or "")[1:] for t, a in tags if t == "a"}
    assert targets <= set(names)
    assert {a.get("aria-labelledby", "").split(" ")[0] for _, a in tags if a.get("aria-labelledby")} <= set(
        names
    )


def test_every_figure_has_a_title_that_says_something_and_a_text_equivalent() -> None:
    figures = re.findall(r"<figure.*?</figure>", PAGE, re.DOTALL)
    assert len(figures) >= 10
    for figure in figures:
        title = re.search(r'<p class="figure-title" id="([^"]+)">(.+?)</p>', figure)
        caption = re.search(r"<figcaption><span id=([^>]+)>(.+?)</span>", figure)
        assert title is not None
        assert caption is not None
        assert caption[2] != title[2]
        assert len(caption[2]) > 20
        assert f"aria-labelledby={title[1]} aria-describedby={caption[1]}" in figure
        assert '<svg role="img" ' in figure


def test_modelled_curves_are_called_expected_not_measured() -> None:
    for kind in ("Vertical cut", "Horizontal cut", "Side view", "Top view"):
        figure = next(f for f in re.findall(r"<figure.*?</figure>", PAGE, re.DOTALL) if kind in f)
        assert re.search("expected, not measured", figure, re.IGNORECASE)


def test_tables_have_captions_or_names_and_header_cells_with_scope() -> None:
    for table in re.findall(r"<table.*?</table>", PAGE, re.DOTALL):
        assert "<th scope=" in table
        assert re.search(r"<caption|<thead|<table[^>]*aria-label", table)


def test_distances_stand_in_one_box_with_assumptions_and_cautions() -> None:
    box = next(b for b in PAGE.split('<section class="exposure"') if "desk check" in b.partition("</h3>")[0])
    box = box.partition("</section>")[0]
    assert "20.8" in box
    for text in (*OUTLINE.exposure.assumptions, *OUTLINE.exposure.cautions):  # type: ignore[union-attr]
        assert text[:40] in box
    assert PAGE.count("20.8 m") == box.count("20.8 m")


def test_a_note_without_its_inputs_prints_incomplete_and_no_distance() -> None:
    note = ExposureNote(
        complete=False, limit_set="ICNIRP 2020", missing=("gain",), cautions=("No measurement.",)
    )
    page = render_html(replace(sample(), panels=(replace(OUTLINE, exposure=note),)))
    assert "Incomplete: no distance is given. Missing: Gain" in page
    assert "No measurement." in page


def test_wind_and_mounting_figures_come_with_cautions() -> None:
    text = Outline(PAGE).words()
    assert "720 N" in text
    assert "They are not a structural assessment" in text


def test_the_program_fills_no_name_and_leaves_boxes() -> None:
    block = PAGE[PAGE.index('class="signoff') :].partition("</table>")[0]
    for role in ("Prepared", "Checked", "Approved"):
        assert f"<tr><th scope=row>{role}<td><td><td><td>" in block


def test_draft_until_issued() -> None:
    assert "DRAFT" in Outline(PAGE).words()
    assert "DRAFT" not in Outline(render_html(sample(issued=True))).words()


def test_decimal_comma_and_paper_by_settings() -> None:
    page = render_html(sample(decimal_comma=True, paper="Letter"))
    assert "14,3 to 16,0" in page
    assert "size:letter" in page
    assert "size:A4" in PAGE


def test_the_same_assessment_gives_the_same_page() -> None:
    assert render_html(sample()) == PAGE


def test_an_undefined_name_in_a_template_is_an_error() -> None:
    template = _environment(Numbers()).from_string("{{ viw.panels }}")
    with pytest.raises(jinja2.UndefinedError):
        template.render()


def test_a_file_without_panels_still_gives_a_page() -> None:
    empty = Assessment(submission=replace(SUBMISSION, panels=()), settings=sample().settings)
    text = Outline(render_html(empty)).words()
    assert "No panel was found in this file" in text
    assert "Strahlerform" in text


def test_a_panel_without_any_figure_gives_a_page() -> None:
    bare = replace(
        OUTLINE, panel=Panel(name="bare", where=PANEL.where), findings=(), exposure=None, drawings=()
    )
    assert "bare" in render_html(replace(sample(), panels=(bare,), tender=None))


@settings(max_examples=12, deadline=None, suppress_health_check=list(HealthCheck))
@given(assessment=assessments())
def test_no_assessment_stops_the_page(assessment: Assessment) -> None:
    page = render_html(assessment)
    assert page.rstrip().endswith("</html>")
    assert not re.search(r' d="[^"]*(nan|inf)', page)


def test_a_page_stays_below_the_weight_limit() -> None:
    assert len(PAGE.encode()) < 400_000


def test_a_very_long_cell_is_whole_on_the_screen_and_short_on_paper():
    text = "y" * 10_000
    reading = replace(sample().submission.panels[0].readings[0], raw=text)
    panel = replace(sample().submission.panels[0], readings=(reading,))
    page = render_html(replace(sample(), submission=replace(sample().submission, panels=(panel,))))
    shown = re.sub(r"<[^>]*>", "", page)
    assert text in shown
    assert "<span class=rest>" + "y" * 8_800 + "</span>" in page  # 10 000 less the 1 200 that are printed
    assert "10000 characters" in shown
