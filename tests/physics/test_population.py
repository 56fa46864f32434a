"""A reduced run of tests/benchmarks/population.py through every check: honest panels pass, flattering are
caught. Losses as the edges are set for: symmetric about the middle of their range. The shares asked for are
the aims of this project that the whole run prints, with room for so few panels."""

import numpy as np
import pytest
from benchmarks.population import LOSSES_DB, honest, simulate, triangular

from speccheck.physics.expected import PanelClass
from speccheck.records import Fit

COUNT = 50


def slack(share):
    """Two standard deviations of a share counted on so few panels."""
    return 2 * (share * (1 - share) / COUNT) ** 0.5


@pytest.mark.parametrize(
    ("kind", "least_caught"),
    [(PanelClass.PASSIVE, 0.97), (PanelClass.MASSIVE_MIMO, 0.97), (PanelClass.MMWAVE, 0.80)],
)
def test_population(kind, least_caught):
    shares = simulate(kind, COUNT, seed=90125, draws=("triangular",), offsets=(0.0, 1.5, 3.0))
    for declared in (False, True):
        plain = shares["triangular", declared, 0.0]
        assert plain[Fit.DOES_NOT_FIT] <= 0.002 + slack(0.002)
        assert plain[Fit.DOUBTFUL] <= 0.04 + slack(0.04)
        assert shares["triangular", declared, 3.0][Fit.FITS] == 0
    assert shares["triangular", False, 1.5][Fit.FITS] <= 1 - least_caught + slack(least_caught)
    assert shares["triangular", True, 1.5][Fit.FITS] <= 0.01 + slack(0.01)


def test_losses_lie_within_their_range_and_about_its_middle():
    assert [triangular(rank) for rank in (0.0, 0.5, 1.0)] == [0.0, 0.5, 1.0]
    assert triangular(0.125) == pytest.approx(
        0.25
    )  # an eighth of a triangle lies below a quarter of its base
    assert all(low < high for low, high in LOSSES_DB.values())


def test_the_population_has_a_margin_of_its_own():
    """Another seed gives other panels: the run is no constant."""

    first, second = (honest(PanelClass.PASSIVE, np.random.default_rng(seed)) for seed in (1, 2))
    assert first.directivity_dbi != second.directivity_dbi
