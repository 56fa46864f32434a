"""The blank bid form: one row per panel and band, to be filled without a manual and read back whole."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from pathlib import Path

from speccheck.atomic import write_bytes_atomic
from speccheck.dictionary import Parameter, parameters
from speccheck.records import Requirement, Tender
from speccheck.report.pages.formats import shown_unit
from speccheck.report.workbooks.book import book_bytes
from speccheck.report.workbooks.cells import Content, Rich
from speccheck.report.workbooks.form_columns import Asked, answering_key, asked_columns
from speccheck.report.workbooks.sheets import Column, Grid, Imprint, NumberCheck, Table

SHEET = "Bid"
BLANK_ROWS = 40

ALWAYS = ("model", "operating_bands")
"""What names a row of the form."""

USUAL = (
    *(
        "polarisations",
        "array_rows",
        "array_columns",
        "vertical_element_spacing",
        "horizontal_element_spacing",
    ),
    *("subarray_rows", "subarray_columns", "transceivers", "rf_ports", "connector_type", "gain"),
    *("horizontal_beamwidth", "vertical_beamwidth", "electrical_tilt", "horizontal_scan", "vertical_scan"),
    *("upper_sidelobe_suppression", "front_to_back_ratio", "cross_polar_discrimination", "port_isolation"),
    *("vswr", "return_loss", "passive_intermodulation", "max_power_per_port", "max_power_total", "eirp"),
    *("height", "width", "depth", "weight", "wind_load", "survival_wind_speed", "temperature_range"),
    *("ingress_protection", "remarks"),
)
"""Columns of a form without a tender."""

NEEDED = (
    *("array_rows", "array_columns", "vertical_element_spacing", "horizontal_element_spacing"),
    *("horizontal_scan", "vertical_scan", "max_power_total"),
)
"""What a buyer's check of gain, beamwidths and exposure rests on, asked for even where no clause does."""

SMALL_LENGTHS = ("spacing", "height", "width", "depth", "diameter")

EXAMPLE: dict[str, str | float] = {
    "model": "EXAMPLE (not read; may be deleted)",
    "operating_bands": "3300-3800",
    "polarisations": "±45°",
    "array_rows": 12,
    "array_columns": 8,
    "vertical_element_spacing": 55,
    "horizontal_element_spacing": 43,
    "subarray_rows": 3,
    "subarray_columns": 1,
    "transceivers": 64,
    "rf_ports": 64,
    "gain": 24.8,
    "horizontal_beamwidth": 12.5,
    "vertical_beamwidth": 6.5,
    "electrical_tilt": "0 to 12",
    "horizontal_scan": "-45 to 45",
    "vertical_scan": "0 to 12",
    "max_power_per_port": 5,
    "max_power_total": 200,
    "eirp": 77.8,
    "height": 850,
    "width": 450,
    "depth": 180,
    "weight": 32.5,
}
"""One invented panel in the form's units; other columns show the dictionary's example."""

AS_ASKED = {"m/s": {"km/h": 3.6}, "N": {"kN": 0.001}}
"""Units of a tender that its form asks in, and how many of each make one of the dictionary's unit."""

CHOICES = {
    "polarisations": ("±45°", "vertical and horizontal", "vertical", "horizontal"),
    "connector_type": ("4.3-10 female", "7/16 female", "2.2-5 female", "N female"),
    "lattice": ("rectangular", "triangular"),
    "remote_tilt_control": ("internal", "external", "none"),
}
"""Pick-lists by parameter; anything else may be typed."""


def write_form(path: Path | str, tender: Tender | None = None) -> None:
    """Write a blank bid form; with a tender, for exactly its requirements.

    Raises
    ------
    OutputError : `path` cannot be written
    """
    write_bytes_atomic(path, form_bytes(tender))


def form_bytes(tender: Tender | None = None) -> bytes:
    """Return the blank bid form as an .xlsx file."""
    keys = _keys(tender)
    chosen = tuple(asked_columns(keys, tender.requirements if tender else ()))
    sheets: list[Table | Grid] = [_read_me(tender), _bid(keys, chosen)]
    if tender is not None:
        sheets.append(_clauses(tender, chosen))
    if _offered(keys):
        sheets.append(_lists(keys))
    source = f" for {tender.file}" if tender else ""
    rules = tender.settings if tender else None
    return book_bytes(
        sheets,
        Imprint(
            title=f"Bid form{source}",
            subject="blank form for antenna panels",
            footer=f"Bid form{source}",
            paper=rules.paper if rules else "A4",
        ),
    )


def form_heading(parameter: Parameter, condition: str = "", asked: Sequence[Requirement] = ()) -> str:
    """Return a heading that the dictionary knows, with condition and unit that the form asks for."""
    known = parameter.headings.get("en", ())
    same = parameter.label.lower() in {word.lower() for word in known}
    word = parameter.label if same or not known else known[0][:1].upper() + known[0][1:]
    word = f"{word}, {condition}" if condition else word
    unit, _ = form_unit(parameter, asked)
    return f"{word} ({unit})" if unit else word


def form_unit(parameter: Parameter, asked: Sequence[Requirement] = ()) -> tuple[str, float]:
    """Return the unit asked for, and how many of it make one of the dictionary's unit."""
    units = {requirement.unit for requirement in asked}
    for unit, many in AS_ASKED.get(parameter.unit, {}).items():
        if units == {unit}:
            return unit, many
    if parameter.unit == "m" and any(word in parameter.key for word in SMALL_LENGTHS):
        return "mm", 1000.0
    return parameter.unit, 1.0


def _keys(tender: Tender | None) -> tuple[str, ...]:
    if tender is None:
        return tuple(dict.fromkeys((*ALWAYS, *USUAL)))
    asked = [answering_key(r) for r in tender.requirements if r.parameter in parameters()]
    return tuple(dict.fromkeys((*ALWAYS, *asked, *NEEDED, "remarks")))


def _bid(keys: Sequence[str], chosen: Sequence[Asked]) -> Table:
    columns = [_column(one, keys) for one in chosen]
    blank: list[Content] = [None] * len(columns)
    example = [_example(one.parameter, one.requirements) for one in chosen]
    return Table(
        name=SHEET,
        columns=columns,
        rows=[example, *(blank for _ in range(BLANK_ROWS))],
        frozen=len(ALWAYS),
    )


def _column(one: Asked, keys: Sequence[str]) -> Column:
    parameter = one.parameter
    heading = form_heading(parameter, one.condition, one.requirements)
    numeric = parameter.kind in ("number", "count")
    return Column(
        heading=heading,
        width=_width(parameter, heading),
        look="entry" if numeric else "entry-text",
        note=_note(parameter, one.requirements),
        choices=_choice_range(parameter.key, keys),
        check=_number_check(parameter, one.requirements) if numeric else None,
    )


def _width(parameter: Parameter, heading: str) -> float:
    if parameter.key in (*ALWAYS, "remarks"):
        return 34
    return max(13.0, 1.2 * max(map(len, heading.split())) + 3, min(len(heading) * 0.7, 22))


def _note(parameter: Parameter, asked: Sequence[Requirement]) -> str:
    unit, _ = form_unit(parameter, asked)
    parts = [parameter.definition]
    if unit:
        parts.append(f"Unit: {shown_unit(unit)}.")
    if parameter.scope == "panel":
        parts.append("Once per panel: in its first row.")
    parts += [f"Clause {one.clause}: {one.wording}" for one in asked]
    return "\n".join(parts)[:600]


def _number_check(parameter: Parameter, asked: Sequence[Requirement]) -> NumberCheck | None:
    if parameter.plausible is None:
        return None
    unit, factor = form_unit(parameter, asked)
    low, high = (edge * factor for edge in parameter.plausible)
    shown = f" {shown_unit(unit)}" if unit else ""
    wanted = f"a number in{shown}" if unit else "a number"
    message = f"{parameter.label}: {wanted}, usually {low:g} to {high:g}{shown}."
    return NumberCheck(low=low, high=high, message=message)


def _example(parameter: Parameter, asked: Sequence[Requirement]) -> Content:
    if parameter.key in EXAMPLE:
        value = EXAMPLE[parameter.key]
        return Rich(value=value, look="example" if isinstance(value, str) else "example-number")
    if not parameter.examples:
        return Rich(look="example")
    first = parameter.examples[0]
    _, factor = form_unit(parameter, asked)
    if isinstance(first.value, tuple):
        return Rich(value=f"{first.value[0] * factor:g} to {first.value[1] * factor:g}", look="example")
    if isinstance(first.value, str):
        return Rich(value=first.cell, look="example")
    return Rich(value=float(f"{first.value * factor:.4g}"), look="example-number")


def _offered(keys: Iterable[str]) -> list[str]:
    return [key for key in CHOICES if key in keys]


def _choice_range(key: str, keys: Iterable[str]) -> str:
    first = 2
    for offered in _offered(keys):
        last = first + len(CHOICES[offered]) - 1
        if offered == key:
            return f"Lists!$A${first}:$A${last}"
        first = last + 1
    return ""


def _lists(keys: Sequence[str]) -> Table:
    """Every word of every pick-list below the other: two columns would read as label and figure."""
    words = [word for key in _offered(keys) for word in CHOICES[key]]
    return Table(
        name="Lists", columns=(Column(heading="Words to pick", width=30),), rows=[[w] for w in words]
    )


def _clauses(tender: Tender, chosen: Sequence[Asked]) -> Table:
    """One sentence a clause, in one cell: wording beside an answer would read as label and figure."""
    headings = {
        id(requirement): form_heading(one.parameter, one.condition, one.requirements)
        for one in chosen
        for requirement in one.requirements
    }
    sentences = dict.fromkeys(
        f"{r.clause} ({r.level.value}): {r.wording} — answer {_where_to_answer(headings.get(id(r)))}"
        for r in tender.requirements
    )
    return Table(
        name="Clauses",
        columns=(
            Column(heading="Clauses of the buyer", width=100, look="wrap"),
            Column(heading="Your words, if a figure is not enough", width=50, look="entry-text"),
        ),
        rows=[[sentence, None] for sentence in sentences],
    )


def _where_to_answer(heading: str | None) -> str:
    return f"on sheet {SHEET}, column {heading}" if heading else "here, in words"


def _read_me(tender: Tender | None) -> Table:
    steps = [
        f"Fill the sheet {SHEET}: one row for each panel and band, the model in every row.",
        "What holds for the whole panel stands once, in the panel's first row.",
        "Give each figure in the unit of its heading. A bound may be text: ≥ 26.5, ≤ 1.5, 65 ± 5.",
        "A range is two numbers with 'to' between them: 2 to 12.",
        "Write n/a where something does not apply, TBD where it is open. An empty cell is no answer.",
        "A warning about an unusual number does not stop you: keep the number if it is true.",
        "Notes on the headings say what is meant. The first row is an example and is not read.",
    ]
    if tender is not None:
        steps.append("The sheet Clauses says where each clause is answered.")
    return Table(
        name="Read me",
        columns=(Column(heading="What to do", width=110, look="wrap"),),
        rows=[[text] for text in steps],
    )
