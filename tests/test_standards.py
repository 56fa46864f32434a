"""Tables against their standards; band edges as printed in TS 38.104 Table 5.2-1 and 5.2-2 (V19.4.0)."""

from __future__ import annotations

import re

import pytest

from speccheck.standards import (
    POPULATIONS,
    UnknownLimitSetError,
    bands_within,
    covers,
    layouts,
    limit_set,
    limit_set_names,
    operating_band,
    operating_bands,
    port_layouts,
    power_classes,
    union,
)


@pytest.mark.parametrize(
    ("name", "uplink", "downlink"),
    [
        ("n1", (1920, 1980), (2110, 2170)),
        ("n20", (832, 862), (791, 821)),
        ("n28", (703, 748), (758, 803)),
        ("n78", (3300, 3800), (3300, 3800)),
        ("n257", (26500, 29500), (26500, 29500)),
        ("B32", None, (1452, 1496)),
        ("n84", (1920, 1980), None),
    ],
)
def test_band_edges(name, uplink, downlink):
    """Source: 3GPP TS 38.104 Tables 5.2-1, 5.2-2; TS 36.104 Table 5.5-1."""
    band = operating_band(name)
    assert band is not None
    assert (band.uplink, band.downlink) == (uplink, downlink)


def test_every_band_names_source_and_confidence():
    assert len(operating_bands()) == 157
    for band in operating_bands().values():
        assert band.source.startswith("3GPP TS 3")
        assert band.confidence in {"checked against a public copy", "from memory"}
        assert all(low < high for low, high in band.spans)


@pytest.mark.parametrize(
    ("written", "meant"),
    [
        ("N78", "n78"),
        ("Band 7", "B7"),
        ("b42", "B42"),
        ("LTE band 20", "B20"),
        ("NR band n1", "n1"),
        ("NR band 1", "n1"),
        ("7", "B7"),
        ("n078", "n78"),
    ],
)
def test_band_names_as_written(written, meant):
    assert operating_band(written) == operating_bands()[meant]


@pytest.mark.parametrize("written", ["n6", "n999", "band", "3500 MHz", "", "n78-n79"])
def test_no_band_is_made_up(written):
    assert operating_band(written) is None


def test_downlink_below_uplink():
    """Source: 3GPP TS 38.104 Table 5.2-1."""
    found = {
        b.name for b in operating_bands().values() if b.rat == "NR" and b.reversed_duplex and not b.satellite
    }
    assert found == {"n13", "n14", "n20", "n24", "n71", "n105"}


def test_n78_lies_inside_n77():
    names = [band.name for band in bands_within(3300, 4200)]
    assert names == ["n78", "n77", "n48"]
    assert [band.name for band in bands_within(3400, 3800)] == ["n48"]


def test_a_paired_band_may_be_covered_by_two_ranges():
    n3 = operating_bands()["n3"]
    assert covers(n3, ((1710, 1785), (1805, 1880)))
    assert not covers(n3, ((1710, 1785), (1850, 1880)))
    assert covers(n3, ((1711, 1879),), slack_mhz=1)


def test_union_joins_touching_ranges():
    assert union(((1850, 1990), (1695, 1880), (2300, 2690))) == ((1695, 1990), (2300, 2690))


def test_port_layouts_follow_their_own_count():
    """Source: 3GPP TS 38.214 clause 5.2.2.2: P = 2 N1 N2 Ng; O2 = 1 exactly when N2 = 1."""
    for row in port_layouts():
        assert row.ports == 2 * row.n1 * row.n2 * row.panels
        assert (row.o2 == 1) == (row.n2 == 1)


def test_layouts_of_32_ports():
    """Source: 3GPP TS 38.214 Tables 5.2.2.2.1-2 and 5.2.2.2.2-1."""
    assert {(x.n1, x.n2) for x in layouts(32, panels=1)} == {(4, 4), (8, 2), (16, 1)}
    assert {(x.panels, x.n1, x.n2) for x in layouts(32)} >= {(2, 8, 1), (4, 4, 1), (2, 4, 2), (4, 2, 2)}
    assert layouts(10) == ()
    assert all(x.warn_only for x in layouts(64))


def test_power_classes():
    """Source: 3GPP TS 38.104 Table 6.2.1-1 (from memory)."""
    limits = {
        (p.equipment, p.name): p.limit for p in power_classes() if "per antenna connector" in p.quantity
    }
    assert limits == {
        ("BS type 1-C", "wide area"): None,
        ("BS type 1-C", "medium range"): 38.0,
        ("BS type 1-C", "local area"): 24.0,
    }


@pytest.mark.parametrize("name", limit_set_names())
def test_each_limit_set_reproduces_the_examples_it_carries(name):
    limits = limit_set(name)
    assert limits.examples
    for example in limits.examples:
        level = limits.limit(example.frequency_mhz, example.population, example.basis)
        assert level is not None
        assert level.value_w_m2 == pytest.approx(example.limit_w_m2, rel=example.tolerance_percent / 100), (
            example.source
        )


@pytest.mark.parametrize("name", limit_set_names())
def test_each_limit_set_is_continuous_and_ordered(name):
    """Rows meet within 0.5 % at their edges, and workers' levels are never below the public's."""
    limits = limit_set(name)
    for upper in limits.rows:
        for lower in limits.rows:
            same = (upper.population, upper.basis) == (lower.population, lower.basis)
            if same and lower.high_mhz == upper.low_mhz:
                edge = upper.low_mhz
                assert upper.at(edge).value_w_m2 == pytest.approx(lower.at(edge).value_w_m2, rel=0.005)
    for f_mhz in (450, 700, 960, 1710, 2690, 3500, 6000, 26500):
        for basis in limits.bases:
            levels = [limits.limit(f_mhz, population, basis) for population in POPULATIONS]
            if None not in levels:
                assert levels[0].value_w_m2 < levels[1].value_w_m2


def test_sets_from_memory_say_so():
    marked = {name for name in limit_set_names() if limit_set(name).verify_before_use}
    assert marked == set(limit_set_names()) - {"icnirp-2020", "icnirp-1998", "fcc-1.1310"}
    assert all("verify before use" in limit_set(name).note for name in marked)


def test_lowest_level_of_a_band_is_at_its_bottom_below_2_ghz():
    """ICNIRP 2020 Table 5 (from memory): f/200 at 694 MHz is 3.47 W/m²; flat above 2 GHz."""
    found = limit_set("icnirp-2020").lowest(694, 960)
    assert found is not None
    assert found[0] == 694
    assert found[1].value_w_m2 == pytest.approx(3.47)


def test_lowest_level_above_6_ghz_local_is_at_the_top():
    found = limit_set("icnirp-2020").lowest(24250, 29500, basis="local")
    assert found is not None
    assert found[0] == 29500


def test_no_level_outside_a_set():
    assert limit_set("fcc-1.1310").limit(150_000) is None
    assert limit_set("fcc-1.1310").lowest(90_000, 150_000) is None
    assert limit_set("fcc-1.1310").limit(900, basis="local") is None


def test_averaging_time_of_1998_shortens_above_10_ghz():
    """ICNIRP 1998 (from memory): 68/f^1.05 min, by hand 68/33.06 = 2.057."""
    level = limit_set("icnirp-1998").limit(28_000)
    assert level is not None
    assert level.averaging_min == pytest.approx(2.057, abs=0.002)


def test_unknown_set_names_the_known_ones():
    with pytest.raises(UnknownLimitSetError, match=re.escape("'moon-2030' is not known; known are canada")):
        limit_set("moon-2030")
