"""One self-contained HTML page from an Assessment: no network, complete without script."""

from __future__ import annotations

import base64
import contextlib
import functools
import hashlib
import re
import sys
from collections.abc import Callable, Iterable, Sequence
from itertools import accumulate
from pathlib import Path
from typing import Any

import jinja2
from jinja2.bccache import Bucket
from markupsafe import Markup

from speccheck.atomic import write_bytes_atomic
from speccheck.errors import OutputError
from speccheck.records import MOUNTING_CAUTIONS, WIND_CAUTIONS, Assessment, Compliance, Fit, Level, MatrixRow
from speccheck.report.pages.exposure_lines import (
    exposure_table,
    merged_by_band,
    note_parts,
    region_lines,
    zone_table,
)
from speccheck.report.pages.formats import Numbers, shown_unit
from speccheck.report.pages.inks import rules, shared_groups
from speccheck.report.pages.marks import COMPLIANCE, FITS, LEVELS, OUTCOMES, mark_for
from speccheck.report.pages.markup import cells, clean, marks, status, table_rows, workings
from speccheck.report.pages.shared import common_bases, named_reading, named_readings
from speccheck.report.pages.view import build_view, label, rules_fingerprint

PAPERS = {"a4": "A4", "letter": "letter"}
_FACES = (("Report Sans", "", 400, "regular"), ("Report Sans", "", 600, "semibold"))
_WIDE_FACES = (
    ("Report Sans Wide", "-wide", 400, "regular"),
    ("Report Sans Wide", "-wide", 600, "semibold"),
)
_WIDE_LETTERS = re.compile(
    "[\u0100-\u017f\u0218-\u021b\u0400-\u045f]|(?![ΔΣΩαβγδεζηθλμπρσφψ])[\u0384-\u03ce]"
)
"""Letters of bidders beyond the basic typeface, whose faces only a page that shows them carries. The Greek
letters of formulas are in the basic one."""


def render_html(assessment: Assessment) -> str:
    """The report of one bidder's file.

    Returns
    -------
    A whole HTML document; the same assessment gives the same bytes.
    """
    view = build_view(assessment)
    return render("report.html", assessment.settings.paper, view.numbers, view=view)


def render(template: str, paper: str, numbers: Numbers, **context: Any) -> str:
    """Fill a page template that extends ``base.html``; other reports of the program use it too.

    Parameters
    ----------
    template : file name in the templates folder
    paper : ``A4`` or ``Letter``
    numbers : number habits of the page
    context : what the template prints
    """
    sheet = PAPERS.get(paper.lower(), "A4")
    style, script = _stylesheet(sheet, wide=False), _asset("report.js")
    page = (
        _environment(numbers)
        .get_template(template)
        .render(
            style=Markup(style),  # noqa: S704 - the program's own style sheet and script
            script=Markup(script),  # noqa: S704
            style_hash=_csp_hash(style),
            script_hash=_csp_hash(script),
            **context,
        )
    )
    beyond_ascii = page.encode().translate(None, delete=bytes(range(128))).decode()
    if _WIDE_LETTERS.search(beyond_ascii):
        wide = _stylesheet(sheet, wide=True)
        page = page.replace(_csp_hash(style), _csp_hash(wide), 1).replace(style, wide, 1)
    return shared_groups(page)


def templates_folder() -> Path:
    """Where the templates lie: beside the package when installed, at the top of a checkout."""
    package = Path(__file__).parents[2]
    installed = package / "templates"
    return installed if installed.is_dir() else package.parent / "templates"


class _ShortTemplates(jinja2.FileSystemLoader):
    """Templates without the ends of elements that HTML lets a page leave out, 4 % of a large page.

    Source: HTML Standard, clause 13.1.2.4, optional tags: the next one, or the end of the table or list,
    follows each. The line end behind goes too: it would become a blank at the end of the element.
    """

    optional = re.compile(r"</(?:td|th|tr|li|thead|tbody)>\n?")

    def get_source(
        self, environment: jinja2.Environment, template: str
    ) -> tuple[str, str, Callable[[], bool]]:
        """A template as it is compiled."""
        source, name, is_current = super().get_source(environment, template)
        return self.optional.sub("", source), name, is_current


class _CompiledTemplates(jinja2.BytecodeCache):
    """Compiled templates beside the package's own byte code, as Python keeps its own; compiling takes 0.1 s.

    Where that folder cannot be written they are compiled each time.
    """

    folder = Path(__file__).parent / "__pycache__"

    def load_bytecode(self, bucket: Bucket) -> None:
        """Read a compiled template; jinja2 refuses one of another version or another source."""
        try:
            with self._file(bucket).open("rb") as stream:
                bucket.load_bytecode(stream)
        except (OSError, EOFError, ValueError, TypeError):
            bucket.reset()

    def dump_bytecode(self, bucket: Bucket) -> None:
        """Keep a compiled template; a failure costs time only."""
        with contextlib.suppress(OSError, OutputError):
            self.folder.mkdir(exist_ok=True)
            write_bytes_atomic(self._file(bucket), bucket.bytecode_to_string())

    def _file(self, bucket: Bucket) -> Path:
        return self.folder / f"template-{bucket.key[:20]}.{sys.implementation.cache_tag}.bin"


@functools.cache
def _environment(numbers: Numbers) -> jinja2.Environment:
    environment = jinja2.Environment(
        loader=_ShortTemplates(templates_folder()),
        autoescape=True,
        undefined=jinja2.StrictUndefined,
        finalize=_clean,
        trim_blocks=True,
        lstrip_blocks=True,
        auto_reload=False,
        bytecode_cache=_CompiledTemplates(),
    )
    environment.filters.update(
        label=label,
        unit=shown_unit,
        mark=mark_for,
        stated=numbers.stated,
        figure=numbers.figure,
        signed=numbers.signed,
        offered=numbers.offered,
        amount=numbers.amount,
        interval=numbers.interval,
        band=numbers.band,
        number=numbers.plain,
        day=numbers.day,
        prose=numbers.prose,
        formula=numbers.formula,
        metres_up=numbers.rounded_up,
        capitalize_first=_capitalize_first,
        by_weight=_by_weight,
        joined=_joined,
        halves=_halves,
        marks=marks,
        table_rows=table_rows,
        cells=cells,
        workings=functools.partial(workings, numbers=numbers),
    )
    environment.globals.update(
        FITS=FITS,
        COMPLIANCE=COMPLIANCE,
        OUTCOMES=OUTCOMES,
        LEVELS=LEVELS,
        Fit=Fit,
        Level=Level,
        status=status,
        common_bases=common_bases,
        named_reading=named_reading,
        named_readings=named_readings,
        exposure_table=exposure_table,
        merged_by_band=merged_by_band,
        note_parts=note_parts,
        region_lines=region_lines,
        rules_fingerprint=rules_fingerprint,
        zone_table=zone_table,
        WIND_CAUTIONS=WIND_CAUTIONS,
        MOUNTING_CAUTIONS=MOUNTING_CAUTIONS,
    )
    return environment


def _clean(value: Any) -> Any:
    """Every text that a template prints loses control and direction marks before it is escaped."""
    return clean(value) if type(value) is str else value


def _capitalize_first(text: str) -> str:
    return text[:1].upper() + text[1:]


def _joined(texts: Iterable[str]) -> str:
    """Several remarks as one sentence."""
    return "; ".join(text.rstrip(".") for text in texts) + "."


def _halves(texts: Sequence[str]) -> tuple[Sequence[str], ...]:
    """Texts in two parts of about the same length, in their order; one text stays one part."""
    if len(texts) < 2:
        return (texts,)
    ends = list(accumulate(map(len, texts)))
    cut = min(range(1, len(texts)), key=lambda i: abs(2 * ends[i - 1] - ends[-1]))
    return texts[:cut], texts[cut:]


_WEIGHT = {
    Compliance.FAILS: 0,
    Compliance.FAILS_NARROWLY: 1,
    Compliance.NOT_STATED: 2,
    Compliance.NOT_JUDGED: 2,
    Compliance.DECLARED_ONLY: 2,
    Compliance.MEETS_NARROWLY: 3,
    Compliance.DEVIATION_ACCEPTED: 4,
    Compliance.MEETS: 5,
}


def _by_weight(rows: Iterable[MatrixRow]) -> list[MatrixRow]:
    """Requirement rows with the failed ones first, tender order within a verdict."""
    return sorted(rows, key=lambda row: _WEIGHT[row.verdict])


@functools.cache
def _stylesheet(paper: str, *, wide: bool) -> str:
    """Style sheet with the typeface inside, for one paper size."""
    faces = "".join(
        f"@font-face{{font-family:'{family}';font-weight:{weight};"
        f"src:url(data:font/woff2;base64,{_font(f'inter-{name}{ending}.woff2')}) format('woff2')}}\n"
        for family, ending, weight, name in (_FACES + _WIDE_FACES if wide else _FACES)
    )
    style = _asset("report.css").replace("size: A4", f"size: {paper}")
    return faces + rules() + re.sub(r"\s*([{};])\s*|(:) +", r"\1\2", style)


@functools.cache
def _asset(name: str) -> str:
    """Style or script of the templates folder, without indents and lines of comment."""
    text = (templates_folder() / name).read_text(encoding="utf-8").strip()
    return re.sub(r"\n\s*(?://[^\n]*\n\s*)*", "\n", text)


def _font(name: str) -> str:
    return base64.b64encode((templates_folder() / "fonts" / name).read_bytes()).decode("ascii")


@functools.cache
def _csp_hash(text: str) -> str:
    """Fingerprint that lets the page's own style or script through its content policy."""
    return "sha256-" + base64.b64encode(hashlib.sha256(text.encode()).digest()).decode("ascii")
