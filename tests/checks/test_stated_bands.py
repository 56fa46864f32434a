"""A bid numbers its own bands as often as it names standard ones."""

from __future__ import annotations

import pytest

from speccheck.checks.stated_conditions import named_bands
from speccheck.records import CellRef, Panel, Reading

WHERE = CellRef("bid.xlsx", "Data", "C2")


@pytest.mark.parametrize(
    ("raw", "span", "names"),
    [
        ("Band 1: 790-862 MHz", (790.0, 862.0), set()),  # E-UTRA band 1 is 1920-1980 and 2110-2170 MHz
        ("Band 20: 791-862 MHz", (791.0, 862.0), {"B20"}),  # 3GPP TS 36.104 Table 5.5-1
        ("LTE band 3", (1710.0, 1880.0), {"B3"}),
        ("n78 (3400-3600 MHz)", (3400.0, 3600.0), {"n78"}),  # 3GPP TS 38.104 Table 5.2-1
    ],
)
def test_an_ordinal_is_no_standard_band(raw: str, span: tuple[float, float], names: set[str]) -> None:
    reading = Reading(where=WHERE, parameter="operating_bands", raw=raw, value=span, unit="MHz", band=span)
    assert set(named_bands(Panel(name="P", where=WHERE, readings=(reading,)))) == names
