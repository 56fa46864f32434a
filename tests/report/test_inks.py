"""Looks of marks: one table for browsers and PDF; what occurs again is drawn once and found again."""

from __future__ import annotations

import re
from html.parser import HTMLParser

from report.sample import sample

from speccheck.report.pages.html import render_html
from speccheck.report.pages.inks import LETTERS, MARKS, for_print, rules, shared_groups

AXES = '<g class="grid"><path d="M0 0h100M0 10h100M0 20h100M0 30h100M0 40h100M0 50h100M0 60h100"/></g>'
PAGE = render_html(sample())


class Drawings(HTMLParser):
    """How many paths and letterings stand inside each drawing, `use` counting as what it refers to."""

    def __init__(self, page: str) -> None:
        super().__init__()
        self.marks: list[int] = []
        self.groups: dict[str, int] = {}
        self._open: list[str] = []
        self.feed(page)

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        named = dict(attrs)
        if tag == "svg":
            self.marks.append(0)
        elif tag == "g":
            self._open.append(named.get("id") or "")
            self.groups.setdefault(self._open[-1], 0)
        elif tag in ("path", "text"):
            self.marks[-1] += 1
            self.groups[self._open[-1]] += 1
        elif tag == "use":
            self.marks[-1] += self.groups[(named["href"] or "")[1:]]

    def handle_endtag(self, tag: str) -> None:
        if tag == "g":
            self._open.pop()


def test_equal_axes_are_drawn_once_and_referred_to() -> None:
    shared = shared_groups(f"<svg>{AXES}</svg><svg>{AXES}</svg><svg>{AXES}</svg>")
    assert shared.count("<path") == 1
    assert shared.count("<use href=#g1 />") == 2
    assert shared_groups(f"<svg>{AXES}</svg>") == f"<svg>{AXES}</svg>"


def test_print_gets_every_mark_and_no_reference() -> None:
    printed = for_print(PAGE)
    assert "<use" in PAGE
    assert "<use" not in printed
    assert Drawings(printed).marks == Drawings(PAGE).marks
    assert not re.search(r'<g class="', printed)


def test_print_gets_the_title_of_each_drawing() -> None:
    titles = re.findall(r'<p class="figure-title"[^>]*>(.*?)</p>', PAGE)
    assert re.findall(r"<svg[^>]*><title>(.*?)</title>", for_print(PAGE)) == titles


def test_every_look_is_a_rule_with_the_same_figures() -> None:
    style = rules()
    for name, look in {**MARKS, **LETTERS}.items():
        (rule,) = re.findall(rf"^g\.{name}\{{(.*)\}}$", style, re.MULTILINE)
        assert re.findall(r'="([^"]*)"', look) == [
            value.removesuffix("px") for value in re.findall(r":([^;]*)", rule)
        ]


def test_every_class_of_a_drawing_has_a_look() -> None:
    used = {name for group in re.findall(r'<g class="([a-z -]+)"', PAGE) for name in group.split()}
    assert used <= {*MARKS, *LETTERS, "m", "e"}


def test_text_of_a_bidder_is_never_taken_for_a_mark() -> None:
    hostile = '&lt;g class="grid"&gt;'
    assert for_print(f"<td>{hostile}</td>") == f"<td>{hostile}</td>"
