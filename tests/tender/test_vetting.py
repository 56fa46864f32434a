"""A tender vetted before issue. Expected figures: half-power width of a uniform line 50.8° λ/L and
directivity 35 000/(θh·θv) of a uniform column (any antenna handbook, from memory)."""

from __future__ import annotations

import pytest

from speccheck.intake.tenders.phrases import read_wording
from speccheck.records import CellRef, Fit, Level, Requirement, Tender
from speccheck.tender.vetting import vet, vetted


def _tender(*rows: tuple[str, str]) -> Tender:
    """Rows of level and wording, read as a tender's would be, all confirmed."""
    requirements = []
    for number, (level, wording) in enumerate(rows, start=1):
        for clause in read_wording(wording, level=Level(level)):
            requirements.append(
                Requirement(
                    where=CellRef("tender.xlsx", "Requirements", f"B{number + 1}"),
                    clause=str(number),
                    wording=wording,
                    level=clause.level or Level.MANDATORY,
                    confirmed=True,
                    **{name: getattr(clause, name) for name in READ},
                )
            )
    return Tender(file="tender.xlsx", sha256="0" * 64, requirements=tuple(requirements))


def _must(*wordings: str) -> Tender:
    return _tender(*(("mandatory", wording) for wording in wordings))


READ = ("parameter", "operator", "limit", "unit", "statistic", "bands", "scope", "at", "doubts")
BOX = ("Frequency 694-960 MHz", "Horizontal beamwidth 65° ± 0°", "Panel length not exceeding 1.4 m")


def test_gain_out_of_reach_names_the_limiting_rows() -> None:
    """694 MHz: λ = 0.432 m, 50.8·0.432/1.4 = 15.7°, 10·log10(35000/(65·15.7)) = 15.4 dBi without losses."""
    (finding,) = vet(_must(*BOX, "Gain shall be at least 17 dBi"))
    assert (finding.check, finding.verdict) == ("tender-gain-attainable", Fit.DOES_NOT_FIT)
    assert finding.expected is not None
    assert finding.expected.high == pytest.approx(15.4, abs=0.06)
    assert {where.cell for where in finding.where} == {"B2", "B3", "B4", "B5"}
    assert "694 MHz" in finding.summary
    assert "15.4 dBi" in finding.summary


def test_a_beamwidth_without_tolerance_counts_too() -> None:
    """The 15.4 dBi of the box above, below the 17 dBi demanded."""
    found = vet(_must(BOX[0], "Horizontal beamwidth 65°", BOX[2], "Gain shall be at least 17 dBi"))
    assert [f.check for f in found] == ["tender-gain-attainable"]
    assert "nominally 65 deg" in found[0].summary


@pytest.mark.parametrize(("gain", "verdict"), [(14.5, None), (15.2, Fit.DOUBTFUL), (16.5, Fit.DOES_NOT_FIT)])
def test_gain_just_within_reach_leaves_nothing_for_losses(gain: float, verdict: Fit | None) -> None:
    found = vet(_must(*BOX, f"Gain ≥ {gain} dBi"))
    assert [f.verdict for f in found] == ([verdict] if verdict else [])


def test_the_same_gain_is_no_trouble_at_twice_the_frequency() -> None:
    assert not vet(_must("Frequency 1710-2170 MHz", *BOX[1:], "Gain ≥ 17 dBi"))


def test_each_band_is_vetted_at_its_own_low_end() -> None:
    rows = ("Gain ≥ 15 dBi (694-960), ≥ 17 dBi (1710-2690)", *BOX[1:])
    assert [f.band for f in vet(_must(*rows)) if f.check == "tender-gain-attainable"] == [(694.0, 960.0)]


def test_a_beam_narrower_than_the_housing_allows() -> None:
    """1710 MHz: λ = 0.1753 m, 50.8·0.1753/1.0 = 8.9°; 7° needs 1.27 m."""
    rows = ("Frequency 1710-2170 MHz", "Vertical beamwidth not exceeding 7°", "Height max. 1000 mm")
    (finding,) = vet(_must(*rows))
    assert finding.check == "tender-beamwidth-attainable"
    assert finding.expected is not None
    assert finding.expected.low == pytest.approx(8.9, abs=0.05)


@pytest.mark.parametrize(
    ("rows", "checks"),
    [
        (("Gain ≥ 17 dBi", "Gain between 15 and 16 dBi"), ["tender-rows-contradict"]),
        (("Gain ≥ 17 dBi (1710-2170)", "Gain between 15 and 16 dBi (694-960)"), []),
        (("Weight ≤ 25 kg", "Weight ≤ 20 kg"), []),
        (("Horizontal beamwidth 65° ± 3°", "Horizontal beamwidth 90° ± 3°"), ["tender-rows-contradict"]),
        (("Cross-polar discrimination ≥ 20 dB (0°), ≥ 10 dB (±60°)",), []),
        (("Gain ≥ 15 dBd", "Gain between 16 and 17 dBi"), ["tender-rows-contradict"]),
        (("VSWR ≤ 1.5", "Return loss ≥ 14 dB"), []),
        (("VSWR ≤ 1.3", "Return loss ≥ 14 dB"), ["tender-mismatch-twice"]),
        (("Frequency 1710-2170 MHz", "Gain ≥ 15 dBi (2300-2690)"), ["tender-band-not-demanded"]),
        (("VSWR not less than 1.3", "VSWR ≤ 1.2"), []),
    ],
)
def test_rows_against_each_other(rows: tuple[str, ...], checks: list[str]) -> None:
    """dBd + 2.15 = dBi; VSWR 1.5 = 13.98 dB and 1.3 = 17.69 dB return loss (Pozar, ch. 2)."""
    assert [finding.check for finding in vet(_must(*rows))] == checks


@pytest.mark.parametrize(
    ("must", "wish", "found"),
    [
        ("VSWR ≤ 1.4", "VSWR ≤ 1.5", True),
        ("VSWR ≤ 1.5", "VSWR ≤ 1.4", False),
        ("Gain ≥ 17 dBi", "Gain ≥ 16.5 dBi", True),
        ("Gain ≥ 16.5 dBi", "Gain ≥ 17 dBi", False),
    ],
)
def test_a_wish_weaker_than_the_duty(must: str, wish: str, found: bool) -> None:
    checks = [f.check for f in vet(_tender(("mandatory", must), ("desirable", wish)))]
    assert ("tender-wish-weaker-than-duty" in checks) is found


def test_vetted_keeps_what_reading_found() -> None:
    tender = _must("VSWR ≤ 1.3", "Return loss ≥ 14 dB")
    assert [f.check for f in vetted(tender).findings] == ["tender-mismatch-twice"]
    assert vetted(tender).requirements == tender.requirements
