"""Gain over band and tilt: does a row of figures run as physics lets it run."""

from __future__ import annotations

import itertools
import math

from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack, mhz
from speccheck.records import Amount, Band, Fit, Interval, Panel, Reading, Step

SLOPE_ALLOWANCE_DB = 1.0
"""Spread of loss, taper and rounding between two bands [dB] (common practice)."""

FAR_BANDS = 1.15
"""Ratio of mid frequencies from which a slope can be told from rounding."""


@check(
    "gain-over-band",
    "Gain rises over the band as the aperture lets it",
    needs=("gain",),
    optional=("horizontal_beamwidth", "vertical_beamwidth"),
    source="4πA/λ² at constant aperture: C. A. Balanis, Antenna Theory, ch. 12",
    scope="panel",
)
def gain_over_band(*, case: Case) -> Judgement | None:
    """Compares the gains of two bands of one array with the change of their beamwidths.

    Where widths are stated for both bands, the gain must rise as the beam narrows. Where they are not, a
    fixed
    aperture lets it rise between 10·log10 and 20·log10 of the frequency ratio. One gain for two distant bands
    is the sign of a copied figure or of a best value.

    Formula
    ΔG = 10·log10(θh1·θv1 ÷ (θh2·θv2)) ± 1 dB; else 10·log10(f2/f1) − 1 dB to 20·log10(f2/f1) + 1 dB

    Assumptions
    Both bands use the same rows and columns; bands with counts of their own are not compared.

    Worked example
    17.5 dBi in both 1710–1880 and 2490–2690 MHz with 65° × 7.8° and 62° × 5.4°: the beam narrows by 1.8 dB,
    the gain rises by 0.0 dB, doubtful.
    """
    pairs = [
        (low, high)
        for low, high in itertools.combinations(sorted(_gains(case.panel), key=_middle), 2)
        if _middle(high) / _middle(low) >= FAR_BANDS
    ]
    if not pairs:
        return None
    judged = [_compared(case.panel, low, high) for low, high in pairs]
    return max(judged, key=lambda pair: pair[0])[1]


def _gains(panel: Panel) -> list[Reading]:
    """The first gain of each band, where the bands share one array."""
    own = any(r.band is not None for key in ("array_rows", "array_columns") for r in panel.all(key))
    bands = [b for b in panel.bands if any(r.band == b for r in panel.all("gain"))]
    if own and len(bands) > 1:
        return []
    firsts = (panel.get("gain", band) for band in bands)
    return [r for r in firsts if r is not None and r.band is not None and not isinstance(r.value, str)]


def _middle(reading: Reading) -> float:
    low, high = reading.band or (1.0, 1.0)
    return (low + high) / 2


def _widths(panel: Panel, band: Band | None) -> tuple[Reading, Reading] | None:
    across, along = panel.get("horizontal_beamwidth", band), panel.get("vertical_beamwidth", band)
    if across is None or along is None or across.band is None or along.band is None:
        return None
    return None if isinstance(across.value, str) or isinstance(along.value, str) else (across, along)


def _compared(panel: Panel, low: Reading, high: Reading) -> tuple[float, Judgement]:
    """How far [dB] the rise lies outside what is allowed, and the judgement."""
    rise = high.nominal - low.nominal
    slack = last_digit_slack(low) + last_digit_slack(high)
    first, second = _widths(panel, low.band), _widths(panel, high.band)
    ratio = _middle(high) / _middle(low)
    used: tuple[Reading, ...] = (low, high)
    if first and second:
        narrowing = 10 * math.log10(
            first[0].nominal * first[1].nominal / (second[0].nominal * second[1].nominal)
        )
        least, most = narrowing - SLOPE_ALLOWANCE_DB, narrowing + SLOPE_ALLOWANCE_DB
        why = f"the beam narrows by {narrowing:.1f} dB"
        beams = [f"({across.nominal:g} × {along.nominal:g})" for across, along in (first, second)]
        formula = f"10·log10({beams[0]} ÷ {beams[1]})"
        step = Step("Narrowing of the beam", formula, round(narrowing, 2), "dB")
        used += (*first, *second)
    else:
        line, area = 10 * math.log10(ratio), 20 * math.log10(ratio)
        least, most = line - SLOPE_ALLOWANCE_DB, area + SLOPE_ALLOWANCE_DB
        why = f"a fixed aperture gives {line:.1f} to {area:.1f} dB"
        step = Step("Rise at constant aperture", f"20·log10({ratio:.3f})", round(area, 2), "dB")
    outside = max(least - slack - rise, rise - most - slack)
    return outside, Judgement(
        verdict=Fit.FITS if outside <= 0 else Fit.DOUBTFUL,
        summary=f"Gain {claim(low)} in {mhz(low.band)} and {claim(high)} in {mhz(high.band)}: it rises by"
        f" {rise:.1f}"
        f" dB; {why}.",
        claimed=Amount(round(rise, 2), "dB"),
        expected=Interval(round(least, 2), round(most, 2), "dB"),
        working=(Step("Rise of the gain", f"{high.nominal:g} − {low.nominal:g}", round(rise, 2), "dB"), step),
        assumptions=("Both bands use the same array.", f"Allowance {SLOPE_ALLOWANCE_DB:g} dB."),
        question="Please state gain and beamwidths at the lower, middle and upper frequency of each band.",
        used=used,
        alone=True,
    )


@check(
    "gain-over-tilt",
    "Gain falls with tilt",
    needs=("gain",),
    source="array theory: a uniform column of 8 at 0.9 λ drops 0.3 dB from 2° to 12°; real panels drop more",
)
def gain_over_tilt(*, case: Case) -> Judgement | None:
    """Looks at gains stated at several tilts: equal figures at all of them are the sign of a copied figure.

    Formula
    G(least tilt) − G(greatest tilt) ≥ 0.1 dB over 6° or more, and G does not rise by more than 0.5 dB

    Assumptions
    Figures to 0.1 dB; soft, since a mean over all tilts is a usual definition too.

    Worked example
    17.5 dBi at 2°, at 7° and at 12°: the same over 10°, doubtful. 17.5, 17.4 and 17.1 dBi fit.
    """
    at_tilts = {r.at["tilt_deg"]: r for r in case.panel.all("gain", case.band) if "tilt_deg" in r.at}
    tilts = sorted(at_tilts)
    if len(tilts) < 2 or tilts[-1] - tilts[0] < 6:
        return None
    first, last = at_tilts[tilts[0]], at_tilts[tilts[-1]]
    drop = first.nominal - last.nominal
    equal = len({r.nominal for r in at_tilts.values()}) == 1
    doubtful = equal or drop < -0.5
    shown = ", ".join(f"{at_tilts[t].nominal:g} dBi at {t:g}°" for t in tilts)
    tail = "the same at all tilts" if equal else f"a drop of {drop:.1f} dB"
    return Judgement(
        verdict=Fit.DOUBTFUL if doubtful else Fit.FITS,
        summary=f"Gain {shown} ({first.where} and others): {tail}; a column loses a few tenths of a decibel.",
        claimed=Amount(round(drop, 2), "dB"),
        expected=Interval(0.1, 2.0, "dB"),
        working=(Step("Drop over tilt", f"{first.nominal:g} − {last.nominal:g}", round(drop, 2), "dB"),),
        assumptions=("A mean over all tilts would be equal at all of them.",),
        question="Please state the gain at least, middle and greatest tilt as measured, or say that it is a"
        " mean.",
        used=tuple(at_tilts[t] for t in tilts),
        alone=True,
    )


@check(
    "gain-mean",
    "Mean gain is a mean",
    needs=("gain",),
    source="arithmetic: mean of decibels against mean of powers, 10·log10 of the mean of 10^(G/10)",
)
def gain_mean(*, case: Case) -> Judgement | None:
    """Recomputes a stated mean gain from the gains it averages, in decibels and in powers.

    Formula
    mean of decibels = ΣG ÷ n; mean of powers = 10·log10(Σ10^(G/10) ÷ n)

    Assumptions
    The mean is of the single figures stated for the same band; either mean is accepted.

    Worked example
    14 and 18 dBi average to 16.0 dBi in decibels and 16.4 dBi in powers; 17.5 dBi is neither, doubtful.
    """
    stated = [r for r in case.panel.all("gain", case.band) if not isinstance(r.value, str)]
    means = [r for r in stated if r.statistic in ("mean", "average")]
    single = [r for r in stated if r not in means and ("frequency_mhz" in r.at or "tilt_deg" in r.at)]
    if not means or len(single) < 2:
        return None
    values = [r.nominal for r in single]
    in_db = sum(values) / len(values)
    in_power = 10 * math.log10(sum(10 ** (v / 10) for v in values) / len(values))
    mean = means[0]
    fits = any(abs(mean.nominal - m) <= 0.1 + last_digit_slack(mean) for m in (in_db, in_power))
    shown = " + ".join(f"{v:g}" for v in values)
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOUBTFUL,
        summary=f"Mean gain {claim(mean)} claimed; the single figures average to {in_db:.1f} dBi in decibels"
        " and"
        f" {in_power:.1f} dBi in powers.",
        claimed=Amount(mean.nominal, "dBi"),
        expected=Interval(round(in_db, 2), round(in_power, 2), "dBi"),
        working=(
            Step("Mean of decibels", f"({shown}) ÷ {len(values)}", round(in_db, 2), "dBi"),
            Step("Mean of powers", f"10·log10(mean of 10^(G ÷ 10)) of {shown}", round(in_power, 2), "dBi"),
        ),
        assumptions=("Either mean is accepted; a tender should say which.",),
        question="Please state how the mean gain was formed: over which frequencies and tilts, in decibels or"
        " powers.",
        used=(mean, *single),
        alone=True,
    )
