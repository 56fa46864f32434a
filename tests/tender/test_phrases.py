"""The phrases of phrases.toml, each read as its entry says; expectations are common practice unless an entry
names another source."""

from __future__ import annotations

import tomllib
from pathlib import Path
from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from speccheck.intake.tenders.phrases import PLAIN_HABITS, read_wording
from speccheck.intake.tenders.requirements import read_requirements
from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.quantities import convert
from speccheck.records import Level
from speccheck.records.demands import blocked
from tender.books import table_of

CASES = tomllib.loads((Path(__file__).parent / "phrases.toml").read_text(encoding="utf-8"))["phrase"]
SPOKEN = [
    (case, words)
    for case in CASES
    if "columns" not in case
    for words in (case["wording"], *case.get("variants", []))
]


def test_all_sixty_four_phrasings_are_here() -> None:
    assert sorted({case["number"] for case in CASES}) == list(range(1, 65))


@pytest.mark.parametrize(("case", "words"), SPOKEN, ids=[f"{c['number']}-{w[:40]}" for c, w in SPOKEN])
def test_wording_is_read_as_intended(case: dict[str, Any], words: str) -> None:
    clauses = read_wording(words)
    assert len(clauses) == len(case["reading"])
    for clause, expected in zip(clauses, case["reading"], strict=True):
        _check(clause, expected)
    if "unread" in case:
        assert clauses[0].unread.split() == case["unread"]


@pytest.mark.parametrize("case", [c for c in CASES if "columns" in c], ids=lambda c: str(c["number"]))
def test_columns_of_two_values_give_two_levels(case: dict[str, Any]) -> None:
    rows, _ = read_requirements(table_of([{"wording": case["wording"], **case["columns"]}]), PLAIN_HABITS)
    requirements = [r for row in rows for r in row.requirements]
    for requirement, expected in zip(requirements, case["reading"], strict=True):
        _check(requirement, expected)


def _check(read: Any, expected: dict[str, Any]) -> None:
    codes = {text.partition(":")[0] for text in read.doubts}
    for field in ("parameter", "operator", "unit", "statistic"):
        if field in expected:
            assert getattr(read, field) == expected[field], field
    if "limit" in expected:
        assert read.limit == (
            pytest.approx(tuple(expected["limit"]), rel=1e-3)
            if isinstance(expected["limit"], list)
            else expected["limit"]
        )
    if "limit_dbi" in expected:
        assert convert(read.limit, read.unit, "dBi") == pytest.approx(expected["limit_dbi"])
    if "bands" in expected:
        assert read.bands == tuple(tuple(band) for band in expected["bands"])
    if "at" in expected:
        assert dict(read.at) == pytest.approx(expected["at"], rel=1e-3)
    if "level" in expected:
        assert read.level is Level(expected["level"])
    assert expected.get("scope", "") in read.scope
    assert set(expected.get("doubts", ())) <= codes
    assert not set(expected.get("without", ())) & codes
    assert bool(blocked(read.doubts)) is expected.get("blocked", False)


@pytest.mark.parametrize(
    ("column", "words", "level", "doubtful"),
    [
        (Level.MANDATORY, "Gain should be at least 17 dBi", Level.MANDATORY, True),
        (Level.DESIRABLE, "Gain at least 17 dBi", Level.DESIRABLE, False),
        (None, "Gain must be at least 17 dBi", Level.MANDATORY, False),
        (None, "Gain will be at least 17 dBi", Level.MANDATORY, True),
        (None, "Gain should be at least 17 dBi", Level.DESIRABLE, False),
        (None, "Please state the gain", Level.INFORMATION, False),
    ],
)
def test_a_level_column_beats_the_verb(
    column: Level | None, words: str, level: Level, doubtful: bool
) -> None:
    """RFC 2119 equates must and shall; 'will' is not a level word of 3GPP TR 21.801, so it leaves a doubt."""
    clause = read_wording(words, level=column)[0]
    assert clause.level is level
    assert ("LEVEL" in clause.codes) is doubtful


def test_the_parameter_is_the_one_whose_unit_the_figure_has() -> None:
    clause = read_wording("On all RF ports and at every tilt the isolation shall be at least 28 dB")[0]
    assert (clause.parameter, clause.operator, clause.limit) == ("port_isolation", "≥", 28)


def test_words_not_understood_are_kept() -> None:
    clause = read_wording("Gain shall be at least 17 dBi in the frobnicated state")[0]
    assert clause.unread == "frobnicated state"


def test_a_range_of_a_beamwidth_is_a_window_and_of_a_band_a_capability() -> None:
    """Common practice: the word 'between' does not tell which, the parameter does."""
    assert read_wording("Horizontal beamwidth between 60 and 70 degrees")[0].operator == "within"
    assert read_wording("Frequency between 1710 and 2690 MHz")[0].operator == "contains"


@given(st.text(max_size=80))
def test_any_wording_gives_a_clause_and_never_fails(words: str) -> None:
    clauses = read_wording(words)
    assert clauses
    assert all(isinstance(clause, Clause) for clause in clauses)


@given(
    st.floats(min_value=10, max_value=25).map(lambda x: round(x, 1)),
    st.sampled_from(
        ["≥ {} dBi", "at least {} dBi", "not less than {} dBi", "min. {} dBi", "{} dBi or better"]
    ),
)
def test_any_gain_reads_back_to_itself(gain: float, words: str) -> None:
    clause = read_wording(f"Gain {words.format(gain)}")[0]
    assert (clause.operator, clause.limit, clause.unit) == ("≥", gain, "dBi")


@pytest.mark.parametrize(
    ("words", "readings"),
    [
        (
            "Gain not less than 16.5 dBi in the band 1710-2170 MHz and 17.5 dBi in the band 2300-2690 MHz",
            [("gain", "≥", 16.5, ((1710, 2170),)), ("gain", "≥", 17.5, ((2300, 2690),))],
        ),
        ("Height ≤ 1500 mm, width ≤ 300 mm", [("height", "≤", 1500, ()), ("width", "≤", 300, ())]),
        ("Gain ≥ 16 dBi, at 10° tilt", [("gain", "≥", 16, ())]),
        ("VSWR shall be less than or equal to 1.5", [("vswr", "≤", 1.5, ())]),
        ("Shall survive wind speeds of 55 m/s", [("survival_wind_speed", "≥", 55, ())]),
        (
            "Max size (W x H x D): 300 x 1500 x 150 mm",
            [("width", "≤", 300, ()), ("height", "≤", 1500, ()), ("depth", "≤", 150, ())],
        ),
        ("A panel with at least 64 transceivers", [("transceivers", "≥", 64, ())]),
        (
            "The antenna shall cover 698 to 894 MHz and 1695 to 2360 MHz",
            [
                ("frequency_range", "contains", (698, 894), ()),
                ("frequency_range", "contains", (1695, 2360), ()),
            ],
        ),
        ("Gewinn mindestens 17 dBi", [("gain", "≥", 17, ())]),
        ("Le gain doit être au moins 17 dBi", [("gain", "≥", 17, ())]),
    ],
)  # fmt: skip
def test_other_ways_to_say_it(words: str, readings: list[tuple[Any, ...]]) -> None:
    """Common practice: kinds of wording met in schedules beyond the numbered ones."""
    read = [(c.parameter, c.operator, c.limit, c.bands) for c in read_wording(words)]
    assert read == readings


@pytest.mark.parametrize(
    "words", ["Minimum gain 14 dBi", "VSWR max. 1.5", "Max. weight 30 kg", "Gain min 14 dBi"]
)
def test_a_bound_that_is_part_of_a_name_is_a_word_of_direction(words: str) -> None:
    (clause,) = read_wording(words)
    assert clause.operator in "≥≤"
    assert "DIR" not in clause.codes


def test_maximum_power_is_a_capability_and_no_upper_limit() -> None:
    """Common practice: what a port must bear is a least figure, whatever its heading is called."""
    (clause,) = read_wording("Max power per port 250 W")
    assert (clause.operator, "CLASH" in clause.codes) == ("≥", False)


def test_a_row_for_information_needs_no_value() -> None:
    (clause,) = read_wording("State the mean time between failures", level=Level.INFORMATION)
    assert (clause.parameter, clause.operator, clause.codes) == ("mtbf", "information", ())


def test_a_typical_value_beside_a_guaranteed_one_keeps_its_own_statistic() -> None:
    guaranteed, typical = read_wording("Gain: 17 dBi min, 18 dBi typ")
    assert (guaranteed.statistic, typical.statistic) == ("each", "typ")
