"""A reduced run of tests/benchmarks/population.py: honest gains pass, flattering ones are caught."""

import pytest
from benchmarks.population import caught, simulate

from speccheck.physics.expected import GainZone, PanelClass

COUNT = 120


def slack(share):
    """Two standard deviations of a share counted on so few panels."""
    return 2 * (share * (1 - share) / COUNT) ** 0.5


@pytest.mark.parametrize(
    ("kind", "least_caught"),
    [(PanelClass.PASSIVE, 0.97), (PanelClass.MASSIVE_MIMO, 0.97), (PanelClass.MMWAVE, 0.80)],
)
def test_population(kind, least_caught):
    shares, margins = simulate(kind, COUNT, seed=90125)
    for declared in (False, True):
        honest = shares[declared, 0.0]
        assert honest[GainZone.IMPOSSIBLE] <= 0.002 + slack(0.002)
        assert honest[GainZone.QUESTION] <= 0.04 + slack(0.04)
        assert honest[GainZone.LOW] <= 0.02
        assert caught(shares[declared, 3.0]) == 1.0
    assert caught(shares[False, 1.5]) >= least_caught - slack(least_caught)
    assert caught(shares[True, 1.5]) >= 0.99 - slack(0.99)
    assert margins[2] < 0  # nothing honest reaches its own lossless directivity


def test_the_population_has_a_margin_of_its_own():
    """Another seed gives other panels: the run is no constant."""
    first, second = (simulate(PanelClass.PASSIVE, 5, seed)[1] for seed in (1, 2))
    assert first[1] != second[1]
