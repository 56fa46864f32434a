"""Cells of generated workbooks: any text is stored as text and read back by another library."""

import io
from xml.etree import ElementTree

import openpyxl
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from openpyxl.utils import get_column_letter

from speccheck.report.workbooks.book import book_bytes
from speccheck.report.workbooks.cells import Rich, column_letter, xml_attribute, xml_text
from speccheck.report.workbooks.looks import LOOKS, TONES
from speccheck.report.workbooks.sheets import Column, Grid, Imprint, Table
from speccheck.text import plain

any_text = st.text(alphabet=st.characters(), max_size=40)


def read_back(rows, columns):
    data = book_bytes([Table(name="T", columns=columns, rows=rows)], Imprint(title="t"))
    return openpyxl.load_workbook(io.BytesIO(data))["T"]


@given(any_text)
def test_any_text_is_well_formed_and_keeps_its_words(text):
    element = ElementTree.fromstring(f'<t a="{xml_attribute(text)}">{xml_text(text)}</t>')  # noqa: S314 - own text
    shown = (element.text or "").replace("_x005F_", "_")
    typed = text.replace("_x005F_", "_").replace("\r\n", "\n")
    assert len(shown) == len(typed)
    assert all(a in (b, "\ufffd", "\n") for a, b in zip(shown, typed, strict=True))


@settings(max_examples=30, deadline=None)
@given(
    st.lists(st.one_of(any_text, st.floats(allow_nan=False, allow_infinity=False)), min_size=1, max_size=5)
)
def test_another_library_reads_numbers_as_numbers_and_text_as_text(items):
    sheet = read_back([[item] for item in items], [Column(heading="Item")])
    for number, item in enumerate(items, start=2):
        cell = sheet.cell(number, 1)
        if isinstance(item, str):
            assert cell.data_type != "f"
            assert cell.value is None or isinstance(cell.value, str)
        else:
            assert cell.value == item


def test_direction_marks_and_controls_are_shown_as_replacements():
    assert xml_text("a\u202eb\x00c") == plain("a\u202eb\x00c") == "a\ufffdb\ufffdc"


@pytest.mark.parametrize("number", [1, 26, 27, 52, 702, 703, 16384])
def test_column_letters_are_those_of_another_library(number):
    assert column_letter(number) == get_column_letter(number)


def test_every_look_has_its_format():
    names = list(LOOKS)
    sheet = read_back(
        [[Rich(value="x", look=name) for name in names]], [Column(heading=name) for name in names]
    )
    for number, name in enumerate(names, start=1):
        cell, look = sheet.cell(2, number), LOOKS[name]
        assert cell.protection.locked == look.locked
        assert bool(cell.font.b) == look.bold
        assert cell.number_format == ("@" if look.written else look.number_format)
        assert cell.fill.start_color.rgb == (f"FF{look.fill}" if look.fill else "00000000")


def luminance(colour):
    """Relative luminance as WCAG 2.1 defines it."""
    parts = [int(colour[n : n + 2], 16) / 255 for n in (0, 2, 4)]
    linear = [p / 12.92 if p <= 0.04045 else ((p + 0.055) / 1.055) ** 2.4 for p in parts]
    return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2]


@pytest.mark.parametrize("name", [*TONES, "heading", "link", "example", "read", "unread"])
def test_text_contrast_is_at_least_four_and_a_half(name):
    """WCAG 2.1, success criterion 1.4.3."""
    look = LOOKS[name]
    light, dark = sorted((luminance(look.fill or "FFFFFF"), luminance(look.ink)), reverse=True)
    assert (light + 0.05) / (dark + 0.05) >= 4.5


def test_grid_notes_and_links_are_read_by_another_library():
    grid = Grid(
        name="G", cells={3: {2: Rich(value="x", link="'G'!A1", hint="there")}}, notes={(3, 2): "a <note>"}
    )
    sheet = openpyxl.load_workbook(io.BytesIO(book_bytes([grid], Imprint(title="t"))))["G"]
    assert sheet["B3"].comment.text == "a <note>"
    assert (sheet["B3"].hyperlink.location, sheet["B3"].hyperlink.tooltip) == ("'G'!A1", "there")
