"""What Chromium tells a screen reader: order, names, headers, figures, verdict words, controls."""

from __future__ import annotations

import re
from collections import Counter
from collections.abc import Iterator
from itertools import pairwise

import pytest
from browser.devtools import CHROMIUM, Browser, Spoken
from report.sample import OUTLINE, sample

from speccheck.records import Fit
from speccheck.report.pages.html import render_html
from speccheck.report.pages.marks import COMPLIANCE, FITS, OUTCOMES

pytestmark = [
    pytest.mark.browser,
    pytest.mark.skipif(CHROMIUM is None, reason="no Chromium on this machine"),
]
SYMBOLS = "".join(mark.symbol for scale in (FITS, COMPLIANCE, OUTCOMES) for mark in scale.values())


@pytest.fixture(scope="module")
def spoken(tmp_path_factory: pytest.TempPathFactory) -> Iterator[list[Spoken]]:
    path = tmp_path_factory.mktemp("page") / "sample.report.html"
    path.write_text(render_html(sample()), encoding="utf-8")
    with Browser() as browser:
        browser.viewport(1280, 900)
        browser.open(path)
        yield browser.spoken()


def of(spoken: list[Spoken], *roles: str) -> list[Spoken]:
    """Nodes of these roles, in reading order."""
    return [node for node in spoken if node.role in roles]


def test_landmarks_are_few_and_each_has_a_name_of_its_own(spoken: list[Spoken]) -> None:
    assert [len(of(spoken, role)) for role in ("banner", "navigation", "main")] == [1, 1, 1]
    assert of(spoken, "navigation")[0].name == "Contents"
    names = [node.name for node in of(spoken, "region")]
    assert all(names)
    assert len(set(names)) == len(names)
    assert names[:4] == ["Summary", "How to read this", "Offer matrix", "Per offer"]


def test_headings_are_read_in_order_and_skip_no_level(spoken: list[Spoken]) -> None:
    headings = of(spoken, "heading")
    assert headings[0].level == 1
    assert [node.level for node in headings].count(1) == 1
    assert all(later.level - earlier.level <= 1 for earlier, later in pairwise(headings))
    assert all(node.name.strip() for node in headings)


def test_every_section_is_opened_by_its_heading(spoken: list[Spoken]) -> None:
    told = [node for node in spoken if node.role in ("region", "heading")]
    for region, following in pairwise(told):
        if region.role == "region":
            assert (following.role, following.name) == ("heading", region.name)


def test_every_table_has_a_name_and_every_row_a_header(spoken: list[Spoken]) -> None:
    tables = of(spoken, "table")
    assert len(tables) > 10
    assert all(table.name for table in tables)
    assert all(node.name for node in of(spoken, "columnheader"))
    rows: list[list[str]] = []
    for node in spoken:
        if node.role == "row":
            rows.append([])
        elif node.role in ("rowheader", "columnheader", "cell") and rows:
            rows[-1].append(node.role)
    headless = [row for row in rows if row and {"rowheader", "columnheader"}.isdisjoint(row)]
    assert not headless


def test_every_figure_has_a_title_that_says_the_finding_and_its_text(spoken: list[Spoken]) -> None:
    images = of(spoken, "image")
    assert len(images) >= 10
    for image in images:
        assert len(image.name) > 20
        assert len(image.description) > 20
        assert image.name != image.description
        assert "figure" in image.above
    assert not [node for node in spoken if "image" in node.above]


def test_a_verdict_is_its_word_and_no_symbol_is_read(spoken: list[Spoken]) -> None:
    symbols = re.compile(f"[{re.escape(SYMBOLS.replace('=', '').replace('–', ''))}]")
    for node in of(spoken, "heading", "checkbox", "rowheader"):
        assert not symbols.search(node.name.removeprefix("○ ambiguous")), node.name
    words = Counter(
        node.name.strip()
        for node in of(spoken, "StaticText")
        if "heading" in node.above and node.name.strip()
    )
    for verdict in (Fit.FITS, Fit.DOUBTFUL, Fit.DOES_NOT_FIT):
        assert words[verdict.value] == sum(f.verdict is verdict for f in OUTLINE.findings)


def test_every_control_has_a_name(spoken: list[Spoken]) -> None:
    for node in of(spoken, "link", "button", "checkbox", "textbox", "DisclosureTriangle"):
        assert node.name.strip(), node
    copies = [node.name for node in of(spoken, "button") if node.name.startswith("Copy")]
    assert copies
    assert len(set(copies)) == len(copies)
    assert {"Verdict", "Level", "Go to cell"} <= {node.name for node in of(spoken, "group")}
    opened = of(spoken, "DisclosureTriangle")
    assert len({node.description for node in opened}) == len(opened)


def test_lists_hold_items_and_nothing_else(spoken: list[Spoken]) -> None:
    items = of(spoken, "listitem")
    assert items
    assert all("list" in node.above for node in items)
    assert not [node for node in spoken if node.above[-1:] == ("list",) and node.role != "listitem"]
