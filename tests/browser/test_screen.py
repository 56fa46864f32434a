"""The HTML report in a real Chromium: tools, keyboard, zoom, schemes, accessibility rules, no request."""

from __future__ import annotations

import json
import os
from collections.abc import Iterator
from pathlib import Path

import pytest
from browser.devtools import CHROMIUM, Browser
from report.sample import sample

from speccheck.report.pages.html import render_html

pytestmark = [
    pytest.mark.browser,
    pytest.mark.skipif(CHROMIUM is None, reason="no Chromium on this machine"),
]

AXE = Path(os.environ.get("AXE_CORE", Path(__file__).parent / "node_modules/axe-core/axe.min.js"))


@pytest.fixture(scope="module")
def browser() -> Iterator[Browser]:
    with Browser() as running:
        yield running


@pytest.fixture(scope="module")
def file(tmp_path_factory: pytest.TempPathFactory) -> Path:
    path = tmp_path_factory.mktemp("page") / "sample.report.html"
    path.write_text(render_html(sample()), encoding="utf-8")
    return path


@pytest.fixture
def page(browser: Browser, file: Path) -> Browser:
    browser.viewport(1280, 900)
    browser.dark(False)
    browser.open(file)
    return browser


def shown(page: Browser, selector: str) -> int:
    """How many elements of a selector take room on the screen."""
    return page.evaluate(
        f"[...document.querySelectorAll({json.dumps(selector)})]"
        ".filter(element => element.getClientRects().length).length"
    )


def test_no_request_leaves_the_page_and_its_policy_blocks_nothing(page: Browser, file: Path) -> None:
    assert [url for url in page.requests if not url.startswith("data:font/")] == [file.as_uri()]
    assert not page.complaints


def test_text_of_a_bidder_stays_text(page: Browser) -> None:
    assert page.evaluate("[...document.querySelectorAll('b')].every(e => e.textContent !== 'bold')")
    assert page.evaluate("document.body.textContent.includes('<b>bold</b>')")
    assert page.evaluate("document.scripts.length") == 1


def test_content_is_complete_without_script(browser: Browser, file: Path) -> None:
    browser.open(file, script=False)
    without = browser.evaluate("document.getElementById('main').innerText.length")
    assert shown(browser, "section") == browser.evaluate("document.querySelectorAll('section').length")
    assert shown(browser, ".tools") == 0
    browser.open(file)
    assert without >= 0.97 * browser.evaluate("document.getElementById('main').innerText.length")


def test_filters_hide_and_show_by_verdict_and_level(page: Browser) -> None:
    rows = "#matrix tbody tr"
    assert shown(page, rows) == 12
    page.evaluate("document.querySelector('input[value=meets]').click()")
    assert shown(page, rows) == 8
    assert "filtered out" in page.evaluate("document.querySelector('[role=status]').textContent")
    page.evaluate("document.querySelector('input[value=desirable]').click()")
    assert shown(page, rows) == 7
    page.evaluate(
        "document.querySelectorAll('.tools input:not(:checked)[type=checkbox]').forEach(box => box.click())"
    )
    assert shown(page, rows) == 12


def test_a_column_sorts_up_down_and_back(page: Browser) -> None:
    clauses = "[...document.querySelectorAll('#matrix tbody tr th')].map(e => e.textContent)"
    before = page.evaluate(clauses)
    click = "document.querySelector('#matrix thead th button').click()"
    page.evaluate(click)
    up = page.evaluate(clauses)
    assert (
        page.evaluate("document.querySelector('#matrix thead th').getAttribute('aria-sort')") == "ascending"
    )
    page.evaluate(click)
    assert page.evaluate(clauses) == up[::-1]
    page.evaluate(click)
    assert page.evaluate(clauses) == before


def test_go_to_a_cell_from_the_keyboard(page: Browser) -> None:
    page.evaluate(
        "document.getElementById('go-to-cell').focus(); document.getElementById('go-to-cell').value = 'c9'"
    )
    page.press("Enter", 13)
    assert "C9" in page.evaluate("document.activeElement.querySelector('th').textContent")
    page.evaluate("document.getElementById('go-to-cell').value = 'ZZ99'")
    page.evaluate("document.querySelector('.tools button').click()")
    assert "no figure was read from ZZ99" in page.evaluate("document.querySelector('.tools').textContent")


def test_a_question_is_copied_or_selected(page: Browser) -> None:
    asked = page.evaluate("document.querySelector('.question .asked').textContent.trim()")
    page.evaluate("document.querySelector('.question button').click()")
    page.evaluate("new Promise(done => setTimeout(done, 200))")
    label = page.evaluate("document.querySelector('.question button').textContent")
    assert label.startswith(("Copied", "Selected"))
    if label.startswith("Selected"):
        assert page.evaluate("getSelection().toString().trim()") == asked


def test_the_keyboard_reaches_the_content_first_and_every_tool(page: Browser) -> None:
    page.press("Tab", 9)
    assert page.evaluate("document.activeElement.className") == "skip"
    reached = set()
    for _ in range(60):
        page.press("Tab", 9)
        reached.add(page.evaluate("document.activeElement.tagName"))
    assert {"A", "INPUT", "BUTTON"} <= reached


@pytest.mark.parametrize(("width", "zoom"), [(1280, 1.0), (1280, 2.0), (380, 1.0)])
def test_text_never_scrolls_sideways(page: Browser, width: int, zoom: float) -> None:
    page.viewport(width, 900, zoom)
    assert page.evaluate("document.documentElement.scrollWidth <= document.documentElement.clientWidth")


@pytest.mark.skipif(not AXE.is_file(), reason="axe-core is not installed: npm install --prefix tests/browser")
@pytest.mark.parametrize("dark", [False, True])
def test_the_accessibility_rules_find_no_violation(page: Browser, dark: bool) -> None:
    page.dark(dark)
    page.evaluate(AXE.read_text(encoding="utf-8"))
    page.evaluate("axe.run(document).then(result => { window.result = result })")
    assert page.evaluate("result.passes.length") > 20
    say = "v.id + ': ' + v.nodes.slice(0, 3).map(n => n.html).join(' ')"
    assert page.evaluate(f"result.violations.map(v => {say})") == []
