"""Tapers against scipy.signal.windows (a general-purpose library) and the bounds they set."""

import numpy as np
import pytest
from scipy.signal import windows

from speccheck.physics import bounds, taper


@pytest.mark.parametrize("count", [2, 3, 5, 8, 10, 13, 16, 24, 64])
@pytest.mark.parametrize("level", [20, 26, 30])
def test_chebyshev(count, level):
    with np.errstate(all="ignore"):
        expected = windows.chebwin(count, at=level + 25, sym=True)
    assert taper.chebyshev(count, level + 25) == pytest.approx(expected, abs=1e-9)


@pytest.mark.parametrize("count", [5, 8, 16, 33])
@pytest.mark.parametrize(("level", "nbar"), [(20, 3), (25, 4), (30, 6)])
def test_taylor(count, level, nbar):
    expected = windows.taylor(count, nbar=nbar, sll=level, norm=False, sym=True)
    assert taper.taylor(count, level, nbar) == pytest.approx(expected / expected.max(), abs=1e-12)


@pytest.mark.parametrize("count", [4, 9, 16])
@pytest.mark.parametrize("pedestal", [0.0, 0.3, 1.0])
def test_cosine_on_pedestal(count, pedestal):
    expected = pedestal + (1 - pedestal) * windows.cosine(count, sym=True)
    assert taper.cosine_on_pedestal(count, pedestal) == pytest.approx(expected, abs=1e-12)


@pytest.mark.parametrize(
    ("count", "ratios"),
    # exact Dolph-Chebyshev beamwidth ratios at 18, 20, 25, 30 dB, computed with scipy windows and brute force
    [
        (8, (1.071, 1.112, 1.203, 1.284)),
        (10, (1.054, 1.096, 1.191, 1.277)),
        (12, (1.042, 1.083, 1.181, 1.269)),
        (16, (1.025, 1.067, 1.165, 1.255)),
    ],
)
def test_chebyshev_bound(count, ratios):
    found = [bounds.chebyshev_beamwidth_ratio(count, level) for level in (18, 20, 25, 30)]
    assert found == pytest.approx(ratios, abs=0.004)  # the table holds ratios of angles, ours of sines


@pytest.mark.parametrize("count", [6, 10, 17])
@pytest.mark.parametrize("ratio", [1.05, 1.15, 1.25])
def test_no_cosine_taper_beats_the_chebyshev_bound(count, ratio):
    weights = taper.cosine_on_pedestal(count, taper.pedestal_for_ratio(count, ratio))
    widened = taper.beamwidth_ratio(weights)
    assert -taper.sidelobe_db(weights) <= bounds.chebyshev_sidelobe_db(count, widened) + 0.05


@pytest.mark.parametrize("ratio", [1.0, 1.08, 1.165, 1.3])
def test_fitted_pedestal_gives_the_ratio_back(ratio):
    pedestal = taper.pedestal_for_ratio(12, ratio)
    assert taper.beamwidth_ratio(taper.cosine_on_pedestal(12, pedestal)) == pytest.approx(ratio, abs=0.001)


def test_limits():
    assert taper.pedestal_for_ratio(10, 0.9) == 1.0  # narrower than uniform: uniform
    assert taper.pedestal_for_ratio(10, 3.0) == 0.0  # wider than a pure cosine: pure cosine
    assert taper.chebyshev(1, 20).tolist() == [1.0]
    assert np.isnan(taper.sidelobe_db(np.ones(2)))  # two elements have no side lobe
