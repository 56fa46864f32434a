"""The buyer's country factor holds for a claimed compliance distance as it does for the exposure note."""

from __future__ import annotations

import pytest
from checks.cases import panel_of

from speccheck.checks import examine
from speccheck.records import Finding, Fit, Settings


def _finding(stated_m: float, factor: float) -> Finding:
    said = {"conducted_power": 200.0, "gain": 27.0, "compliance_distance": stated_m}
    panel = panel_of({"frequency_range": [3400, 3600], **said})
    findings = examine(panel, Settings(country_factor=factor))
    return next(f for f in findings if f.check == "compliance-distance-fits-power")


@pytest.mark.parametrize(
    ("stated_m", "factor", "verdict"),
    [(28.5, 1.0, Fit.FITS), (28.5, 0.25, Fit.DOUBTFUL), (56.5, 0.25, Fit.FITS)],
)
def test_a_quarter_of_the_level_doubles_the_distance(stated_m: float, factor: float, verdict: Fit) -> None:
    """200 W (53.01 dBm) and 27 dBi are 80.01 dBm; ICNIRP 2020, table 5: 10 W/m2 above 2 GHz, general public.

    r = sqrt(1.002e5 / (4 pi 10)) = 28.2 m (OET Bulletin 65, equation 4); a quarter of S gives 56.5 m.
    """
    assert _finding(stated_m, factor).verdict is verdict


def test_a_distance_without_the_factor_is_named_as_such() -> None:
    finding = _finding(28.24, 0.25)
    assert "without the country factor" in finding.summary
    assert any("country factor 0.25" in text for text in finding.assumptions)
