"""A reduced run of tests/benchmarks/population.py through every check: honest panels pass, flattering are
caught. Losses as the edges are set for: symmetric about the middle of their range. The shares asked for are
the aims of this project that the whole run prints, with room for so few panels."""

import numpy as np
import pytest
from benchmarks.population import LOSSES_DB, honest, simulate, triangular

from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.physics.expected import GainZone, PanelClass, expected_gain
from speccheck.physics.layout import ArrayLayout
from speccheck.records import Fit

COUNT = 120


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


def expected_of(panel, *, declared):
    """What the package expects of a panel of the population, at 1 m wavelength."""
    rows, columns, grouped = panel.counts
    return expected_gain(
        ArrayLayout(rows, columns, *panel.pitches, subarray_rows=grouped),
        SPEED_OF_LIGHT_MPS,
        panel.kind,
        tilt_deg=panel.tilt_deg,
        horizontal_beamwidth_deg=panel.azimuth_deg,
        vertical_beamwidth_deg=panel.elevation_deg,
        declared_loss_db=round(panel.loss_db("triangular"), 1) if declared else None,
    )


@pytest.mark.parametrize("kind", PanelClass)
def test_honest_gains_are_seldom_low_and_below_their_lossless_directivity(kind):
    """The middle 95 in 100 stay below the fitted directivity: losses are at least 0.3 dB."""
    rng = np.random.default_rng([90125, list(PanelClass).index(kind)])
    panels = [honest(kind, rng) for _ in range(COUNT)]
    gains = [round(panel.directivity_dbi - panel.loss_db("triangular"), 1) for panel in panels]
    for declared in (False, True):
        edges = [expected_of(panel, declared=declared) for panel in panels]
        low = sum(edge.zone(gain) is GainZone.LOW for edge, gain in zip(edges, gains, strict=True))
        assert low <= 0.02 * COUNT
    margins = [gain - edge.directivity_dbi for edge, gain in zip(edges, gains, strict=True)]
    assert np.percentile(margins, 97.5) < 0


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
