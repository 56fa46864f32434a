"""The result as JSON, after ``data/result.schema.json``, and back to an Assessment.

The same assessment always gives the same bytes: nothing here depends on time, place or machine.
The mirror of the input sheets is left out; the input file itself holds them.
"""

from __future__ import annotations

import json

from speccheck.errors import UnusableInputError
from speccheck.records import (
    Assessment,
    MatrixRow,
    Panel,
    PanelAssessment,
    Requirement,
    Settings,
    Submission,
    Tender,
)
from speccheck.report.codec import Json, decode, decode_fields, encode, encode_fields

SCHEMA = "speccheck-result/1"

_ENCODER = json.JSONEncoder(ensure_ascii=False, allow_nan=False, separators=(",", ":"))
_OWN_PLACE = frozenset({"requirement", "verdict", "margin", "offered_in_unit", "offered"})


def to_json(assessment: Assessment) -> str:
    """Return the whole result as JSON text; long lists have one item a line, so that lines compare."""
    return laid_out(_document(assessment))


def from_json(text: str, file: str = "result.json") -> Assessment:
    """Return the Assessment that `to_json` wrote, without the mirror of the input sheets.

    Raises
    ------
    UnusableInputError : not JSON, another schema, or members missing
    """
    try:
        document = json.loads(text)
    except (ValueError, RecursionError) as error:
        raise _unusable(file, f"text that is not JSON ({error})") from error
    schema = document.get("schema") if isinstance(document, dict) else None
    if schema != SCHEMA:
        raise _unusable(file, f"schema {schema!r}")
    try:
        return _assessment(document)
    except (KeyError, TypeError, ValueError, AttributeError) as error:
        raise _unusable(file, f"a result with a missing or odd member ({error})") from error


def _unusable(file: str, found: str) -> UnusableInputError:
    return UnusableInputError(
        file,
        found=found,
        expected=f"a result file of schema '{SCHEMA}'",
        remedy="give a .result.json file as written by this program, unchanged",
    )


def _document(assessment: Assessment) -> dict[str, Json]:
    submission = assessment.submission
    home = submission.file
    return {
        "schema": SCHEMA,
        "program": {"name": "speccheck", "version": assessment.program_version},
        "input": {"file": home, "sha256": submission.sha256, "bytes": submission.size_bytes},
        "settings": encode(assessment.settings, home),
        "panels": [_panel(one, home) for one in assessment.panels],
        "unread": encode(submission.unread, home),
        "notices": encode(submission.notices, home),
        "tender": encode(assessment.tender, home),
    }


def _panel(one: PanelAssessment, home: str) -> dict[str, Json]:
    return {
        "name": one.panel.name,
        "where": encode(one.panel.where, home),
        "outcome": one.outcome.value,
        "reasons": list(one.reasons),
        "readings": encode(one.panel.readings, home),
        "statements": encode(one.panel.statements, home),
        "findings": encode(one.findings, home),
        "requirements": [_matrix_row(row, home) for row in one.requirements],
        "exposure": encode(one.exposure, home),
        "drawings": encode(one.drawings, home),
    }


def _matrix_row(row: MatrixRow, home: str) -> dict[str, Json]:
    """Return the requirement's fields and the judgement side by side; `offered` is the bare figure."""
    return {
        **encode_fields(row.requirement, home),
        "verdict": row.verdict.value,
        "offered": encode(row.offered_in_unit, home),
        "margin": encode(row.margin, home),
        "reading": encode(row.offered, home),
        **encode_fields(row, home, leave_out=_OWN_PLACE),
    }


def _assessment(document: dict[str, Json]) -> Assessment:
    home = document["input"]["file"]
    panels = tuple(_read_panel(data, home) for data in document["panels"])
    submission = decode_fields(
        Submission,
        document,
        home,
        file=home,
        sha256=document["input"]["sha256"],
        size_bytes=document["input"]["bytes"],
        panels=tuple(one.panel for one in panels),
        mirror=(),
    )
    return Assessment(
        submission=submission,
        settings=decode(Settings, document["settings"], home),
        panels=panels,
        tender=decode(Tender | None, document["tender"], home),
        program_version=document["program"]["version"],
    )


def _read_panel(data: dict[str, Json], home: str) -> PanelAssessment:
    rows = tuple(_read_matrix_row(row, home) for row in data["requirements"])
    panel: Panel = decode_fields(Panel, data, home)
    one: PanelAssessment = decode_fields(PanelAssessment, data, home, panel=panel, requirements=rows)
    return one


def _read_matrix_row(data: dict[str, Json], home: str) -> MatrixRow:
    moved = {**data, "offered": data["reading"], "offered_in_unit": data["offered"]}
    row: MatrixRow = decode_fields(MatrixRow, moved, home, requirement=decode(Requirement, data, home))
    return row


def laid_out(document: dict[str, Json]) -> str:
    """Return JSON text with one member, and one item of a long list, a line."""
    members = [f"{compact(name)}:{member(value)}" for name, value in document.items()]
    text = "{" + ",\n".join(members) + "}\n"
    # a lone surrogate cannot be stored as UTF-8; JSON has an escape of the same look for it
    return text.encode("utf-8", "backslashreplace").decode("utf-8")


def member(value: Json) -> str:
    """Return JSON text with one item of a list, and one member of a record that holds records, a line."""
    if isinstance(value, dict) and any(isinstance(part, list | dict) for part in value.values()):
        inner = [f"{compact(name)}:{_items(part)}" for name, part in value.items()]
        return "{\n" + ",\n".join(inner) + "}"
    if isinstance(value, list) and value and isinstance(value[0], dict):
        return "[\n" + ",\n".join(member(item) for item in value) + "]"
    return compact(value)


def _items(value: Json) -> str:
    if isinstance(value, list) and value and isinstance(value[0], dict):
        return "[\n" + ",\n".join(compact(item) for item in value) + "]"
    return compact(value)


def compact(value: Json) -> str:
    """Return JSON text without a line break."""
    return _ENCODER.encode(value)
