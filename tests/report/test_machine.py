"""The JSON result: its contract, its schema, the way back."""

import dataclasses
import json
import math
from importlib import resources

import jsonschema
import pytest
from hypothesis import HealthCheck, Phase, given, settings
from report.strategies import assessments

from speccheck import records
from speccheck.errors import UnusableInputError
from speccheck.records import Curve, Drawing, MirrorSheet, Reading
from speccheck.report.machine import from_json, to_json

SCHEMA = json.loads(resources.files("speccheck").joinpath("data/result.schema.json").read_text("utf-8"))
VALIDATOR = jsonschema.Draft202012Validator(SCHEMA)


@settings(
    max_examples=12,
    deadline=None,
    phases=[Phase.explicit, Phase.reuse, Phase.generate],  # shrinking a whole assessment takes minutes
    suppress_health_check=list(HealthCheck),
)
@given(assessments())
def test_any_assessment_survives_the_way_there_and_back(one):
    text = to_json(one)
    again = from_json(text)
    assert again == one
    assert to_json(again) == text
    VALIDATOR.validate(json.loads(text))


def test_members_and_order_of_the_contract(bid):
    document = json.loads(to_json(bid))
    assert list(document)[:6] == ["schema", "program", "input", "settings", "panels", "unread"]
    assert document["schema"] == "speccheck-result/1"
    assert document["input"] == {"file": "bid.xlsx", "sha256": bid.submission.sha256, "bytes": 10240}
    panel = document["panels"][0]
    assert {"name", "outcome", "readings", "findings", "requirements", "exposure"} <= set(panel)
    gain = next(r for r in panel["readings"] if r["parameter"] == "gain")
    assert gain["where"] == {"sheet": "Bid", "cell": "D3"}
    assert (gain["value"], gain["unit"], gain["band"], gain["sense"]) == (
        26.8,
        "dBi",
        [3300, 3800],
        "nominal",
    )
    row = panel["requirements"][0]
    assert (row["clause"], row["verdict"], row["limit"], row["offered"]) == ("3.1", "meets", 24.0, 26.8)
    assert row["where"] == {"file": "tender.xlsx", "sheet": "Requirements", "cell": "B2"}


def test_a_result_of_an_earlier_program_lacks_members_that_came_later(bid):
    """Members may be added within a version of the schema; what has a default may be absent."""
    document = json.loads(to_json(bid))
    del document["settings"]["country_factor"]
    assert from_json(json.dumps(document)) == from_json(to_json(bid))


def test_mirror_stays_in_the_input_file(bid):
    assert bid.submission.mirror
    assert from_json(to_json(bid)).submission.mirror == ()


def test_numbers_that_are_not_finite_become_null(bid):
    curve = Curve(name="c", x=(0.0, 1.0), y=(-math.inf, 2.0), x_unit="deg", y_unit="dB")
    drawing = Drawing(kind="cut", title="t", text="t", curves=(curve,))
    odd = dataclasses.replace(bid.panels[0], drawings=(drawing,))
    text = to_json(dataclasses.replace(bid, panels=(odd,)))
    assert json.loads(text)["panels"][0]["drawings"][0]["curves"][0]["y"] == [None, 2.0]
    assert math.isnan(from_json(text).panels[0].drawings[0].curves[0].y[0])


def test_lone_surrogate_can_be_stored(bid):
    panel = dataclasses.replace(bid.panels[0].panel, name="P\ud800")
    text = to_json(dataclasses.replace(bid, panels=(dataclasses.replace(bid.panels[0], panel=panel),)))
    assert text.encode("utf-8").decode("utf-8") == text
    assert from_json(text).panels[0].panel.name == "P\ud800"


@pytest.mark.parametrize(
    ("text", "found"),
    [
        ("", "text that is not JSON"),
        ("[1]", "schema None"),
        ('{"schema": "speccheck-result/9"}', "schema 'speccheck-result/9'"),
        ('{"schema": "speccheck-result/1"}', "missing or odd member ('input')"),
        ("[" * 100_000, "text that is not JSON"),
    ],
)
def test_other_files_get_one_message(text, found):
    with pytest.raises(UnusableInputError) as caught:
        from_json(text, "old.json")
    assert str(caught.value).startswith("old.json: found ")
    assert found in str(caught.value)


def test_schema_names_every_field_of_every_record():
    """A field added to a record must be published: the schema lists each by the record's name."""
    VALIDATOR.check_schema(SCHEMA)
    inner = {"Assessment", "Submission", "Panel", "PanelAssessment", "MatrixRow", "MirrorCell", "MirrorSheet"}
    for name in records.__all__:
        record = getattr(records, name)
        if dataclasses.is_dataclass(record) and name not in inner | {"Tender"}:
            described = SCHEMA["$defs"][name]["properties"]
            assert set(described) >= {f.name for f in dataclasses.fields(record)} - {"mirror"}, name
    assert MirrorSheet.__name__ not in SCHEMA["$defs"]
    assert Reading.__name__ in SCHEMA["$defs"]
