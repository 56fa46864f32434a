"""Frequencies: named bands inside the range, sub-bands against the headline, width of one array."""

from __future__ import annotations

from itertools import pairwise

from speccheck.checks.cell_text import listed
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.stated_conditions import named_bands, stated_ranges
from speccheck.records import Amount, Band, Fit, Interval, Panel, Reading, Step
from speccheck.standards import OperatingBand, operating_band, union

_SLACK_MHZ = 0.5
_WIDE_GAP = 1.3
_EDGE_SHARE = 0.01
_WIDEST = 0.70
TABLES = "3GPP TS 38.104 Tables 5.2-1 and 5.2-2; TS 36.104 Table 5.5-1"


@check(
    "named-bands-inside-range",
    "Named bands lie inside the frequency range",
    needs=(),
    optional=("frequency_range",),
    about=("operating_bands",),
    source=TABLES,
    scope="panel",
)
def named_bands_inside_range(case: Case) -> Judgement | None:
    """Holds the bands a bid names against the megahertz it offers.

    Formula
    for each band: uplink and downlink inside the union of the ranges offered; missing = what is outside

    Assumptions
    A named band means all of it, both directions, as the standard prints its edges; half a megahertz is
    allowed for. A band outside the headline range does not fit; one
    inside the headline but outside every sub-band with figures is doubtful, as is a name the tables lack.

    Worked example
    n78 is 3300 to 3800 MHz. A panel for 3400 to 3600 MHz misses 300 MHz of it: it does not fit. n78 lies
    inside n77 (3300 to 4200 MHz): a panel for n77 has n78 as well, not the reverse.
    """
    unknown = tuple(name for name in named_bands(case.panel) if operating_band(name) is None)
    named = _named(case.panel)
    ranges = stated_ranges(case.panel, "frequency_range") or stated_ranges(case.panel, "operating_bands")
    if not ranges or not (named or unknown):
        return None
    headline, table = union(ranges), union(case.panel.bands) or union(ranges)
    outside = _not_covered(named, headline)
    untold = {name: mhz for name, mhz in _not_covered(named, table).items() if name not in outside}
    steps = tuple(
        Step(
            f"Missing of {b.name} ({b.rat})",
            f"{shown(b.spans)} MHz in {shown(headline)} MHz",
            _missing(b, headline),
            "MHz",
        )
        for b, _ in named
    )
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if outside else Fit.DOUBTFUL if untold or unknown else Fit.FITS,
        summary=_bands_summary(outside, untold, headline) + _not_in_tables(unknown),
        claimed=Amount(", ".join((*(b.name for b, _ in named), *unknown)), ""),
        expected=Interval(headline[0][0], headline[-1][1], "MHz"),
        working=steps,
        assumptions=("A named band means both directions in full.", *_editions(named)),
        question="Please state which part of each named band is covered, in MHz, for both directions.",
        used=tuple({r.where: r for r in named_bands(case.panel).values()}.values()),
    )


def _named(panel: Panel) -> list[tuple[OperatingBand, Reading]]:
    known = ((operating_band(name), reading) for name, reading in named_bands(panel).items())
    return [(band, reading) for band, reading in known if band is not None]


def _not_covered(named: list[tuple[OperatingBand, Reading]], offered: tuple[Band, ...]) -> dict[str, float]:
    """Missing MHz by band name; a band offered in part counts as covered where the ranges overlap it."""
    found = {}
    for band, reading in named:
        missing = missing_mhz(band, offered)
        wanted = sum(high - low for low, high in band.spans)
        in_part = reading.at.get("part_of_band") == 1 and missing < wanted
        if missing > _SLACK_MHZ and not in_part:
            found[band.name] = round(missing, 3)
    return found


def _not_in_tables(unknown: tuple[str, ...]) -> str:
    return f" The tables have no band {listed(unknown)}." if unknown else ""


def _editions(named: list[tuple[OperatingBand, Reading]]) -> list[str]:
    return list(dict.fromkeys(f"{b.source} {b.edition}".strip() + f", {b.confidence}." for b, _ in named))


def shown(spans: tuple[Band, ...]) -> str:
    return " and ".join(f"{low:g}–{high:g}" for low, high in spans)


def missing_mhz(band: OperatingBand, offered: tuple[Band, ...]) -> float:
    """How much [MHz] of a band's uplink and downlink lies outside joined ranges [MHz]."""
    total = 0.0
    for low, high in band.spans:
        inside = sum(max(0.0, min(high, r[1]) - max(low, r[0])) for r in offered)
        total += (high - low) - inside
    return total


def _missing(band: OperatingBand, offered: tuple[Band, ...]) -> float:
    return round(missing_mhz(band, offered), 3)


def _bands_summary(outside: dict[str, float], untold: dict[str, float], headline: tuple[Band, ...]) -> str:
    if outside:
        parts = listed(tuple(f"{mhz:g} MHz of {name}" for name, mhz in outside.items()))
        return f"The range {shown(headline)} MHz misses {parts}."
    if untold:
        parts = listed(tuple(f"{mhz:g} MHz of {name}" for name, mhz in untold.items()))
        return f"No sub-band with figures covers {parts}, though the headline range does."
    return f"The named bands lie inside {shown(headline)} MHz."


@check(
    "sub-bands-make-up-range",
    "Sub-bands make up the headline range",
    needs=("frequency_range",),
    source="industry practice: one table column for each sub-band of the range (common practice)",
    scope="panel",
)
def sub_bands_make_up_range(case: Case, frequency_range: Reading) -> Judgement | None:
    """Holds the headline frequency range against the sub-bands that have figures.

    Formula
    union of sub-bands against the headline: edges not reached, gaps, parts outside

    Assumptions
    Sub-bands may overlap. A gap between sub-bands is usual where it is narrow (upper over lower edge up to
    1.3); a wider one, a headline edge missed by more than 1 % or 10 MHz, or a sub-band outside the headline
    is doubtful.

    Worked example
    Headline 1710 to 2690 MHz with figures for 1710 to 2170 and 2300 to 2690 MHz: a gap of 130 MHz (ratio
    1.06), usual. With figures for 1710 to 2170 MHz only, 520 MHz at the top have none: doubtful.
    """
    headline = union(stated_ranges(case.panel, "frequency_range"))
    table = tuple(b for b in case.panel.bands if b not in headline)
    if not headline or not table:
        return None
    joined = union(table)
    shortened = frequency_range.at.get("table_shortened") == 1
    troubles = [] if shortened else _edge_troubles(headline, joined) + _gap_troubles(headline, joined)
    gaps = [(a[1], b[0]) for a, b in pairwise(joined)]
    return Judgement(
        verdict=Fit.DOUBTFUL if troubles else Fit.FITS,
        summary=f"Figures are stated for {shown(joined)} MHz of {shown(headline)} MHz"
        + (f": {listed(tuple(troubles))}." if troubles else "."),
        claimed=Amount((headline[0][0], headline[-1][1]), "MHz"),
        expected=Interval(joined[0][0], joined[-1][1], "MHz"),
        working=tuple(
            Step(
                "Gap without figures",
                f"{high:g} − {low:g} MHz, ratio {high / low:.2f}",
                round(high - low, 3),
                "MHz",
            )
            for low, high in gaps
        ),
        assumptions=("Sub-bands may overlap; a narrow gap between them is usual.",),
        question="Please state figures for every part of the frequency range, or the range they hold for.",
        used=case.panel.all("operating_bands"),
    )


def _edge_troubles(headline: tuple[Band, ...], joined: tuple[Band, ...]) -> list[str]:
    troubles = []
    for name, claimed, told in (
        ("bottom", headline[0][0], joined[0][0]),
        ("top", headline[-1][1], joined[-1][1]),
    ):
        slack = max(10.0, _EDGE_SHARE * claimed)
        beyond = told - claimed if name == "bottom" else claimed - told
        if beyond > slack:
            troubles.append(f"{beyond:g} MHz at the {name} have no figures")
        elif beyond < -slack:
            troubles.append(f"a sub-band reaches {-beyond:g} MHz beyond the {name} of the headline")
    return troubles


def _gap_troubles(headline: tuple[Band, ...], joined: tuple[Band, ...]) -> list[str]:
    gaps = ((a[1], b[0]) for a, b in pairwise(joined))
    inside = [(low, high) for low, high in gaps if any(h[0] <= low and high <= h[1] for h in headline)]
    return [
        f"{high - low:g} MHz between {low:g} and {high:g} MHz have none"
        for low, high in inside
        if high / low > _WIDE_GAP
    ]


@check(
    "fractional-bandwidth",
    "Bandwidth is in reach of one array",
    needs=(),
    optional=("gain",),
    about=("frequency_range", "operating_bands"),
    source="definition of relative bandwidth; radiators of panels reach about 60 % (common practice)",
)
def fractional_bandwidth(case: Case, gain: Reading | None) -> Judgement | None:
    """Asks about a single set of figures over a range wider than one kind of radiator covers.

    Formula
    B = (f2 − f1) / ((f1 + f2)/2)

    Assumptions
    Wideband radiators of panels reach about 60 % (1427 to 2690 MHz is 61 %, common practice). Above 70 % one
    array seldom covers the range: several arrays are meant, and each needs figures of its own.

    Worked example
    1710 to 2690 MHz is 980/2200 = 44.5 %: usual. 698 to 2690 MHz with one gain is 1992/1694 = 117.6 %:
    doubtful.
    """
    if case.band is None or gain is None:
        return None
    low, high = case.band
    share = (high - low) / ((high + low) / 2)
    wide = share > _WIDEST
    return Judgement(
        verdict=Fit.DOUBTFUL if wide else Fit.FITS,
        summary=f"One set of figures covers {low:g} to {high:g} MHz, a bandwidth of {share * 100:.1f} %"
        + (": more than one array usually covers." if wide else "."),
        claimed=Amount(round(share * 100, 2), "%"),
        expected=Interval(None, _WIDEST * 100, "%"),
        working=(
            Step(
                "Relative bandwidth",
                f"({high:g} − {low:g}) / (({low:g} + {high:g})/2)",
                round(share * 100, 2),
                "%",
            ),
        ),
        assumptions=("One array carries the figures of one band.",),
        question="Please state the figures for each array and its own frequency range.",
    )
