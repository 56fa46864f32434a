"""Frequencies whose unit slipped by a factor of a thousand."""

from __future__ import annotations

from speccheck.checks.registry import Case, Judgement, check
from speccheck.records import Amount, Fit, Interval, Reading, Step

_LOWEST_MHZ, _HIGHEST_MHZ = 100.0, 100_000.0


@check(
    "frequency-in-megahertz",
    "Frequencies are in the unit stated",
    needs=(),
    about=("frequency_range", "operating_bands"),
    source="3GPP TS 38.104 Tables 5.2-1 and 5.2-2: bands between 410 and 71 000 MHz",
    scope="panel",
    sees_impossible=True,
)
def frequency_in_megahertz(case: Case) -> Judgement | None:
    """Finds frequency ranges that only another unit makes a panel's.

    Formula
    100 MHz ≤ f ≤ 100 000 MHz

    Assumptions
    Panels work between 100 MHz and 100 GHz. A range outside is a slip of unit, most often gigahertz written
    under megahertz or the reverse. Applies only where there is such a range.

    Worked example
    1.710-2.690 MHz is no panel band; as gigahertz it is 1710 to 2690 MHz.
    """
    spans = [r for r in _cells(case) if isinstance(r.value, tuple)]
    slipped = [r for r in spans if r.high < _LOWEST_MHZ or r.low > _HIGHEST_MHZ]
    reread = [r for r in spans if r.at.get("unit_reread") == 1]
    if not slipped and not reread:
        return None
    shown = (slipped or reread)[0]
    factor = 1000.0 if shown.high < _LOWEST_MHZ else 0.001
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if slipped else Fit.FITS,
        summary=f"{shown.low:g} to {shown.high:g} MHz is {'no' if slipped else 'a'} range of panels.",
        claimed=Amount((shown.low, shown.high), "MHz"),
        expected=Interval(_LOWEST_MHZ, _HIGHEST_MHZ, "MHz"),
        working=(
            Step(
                "Lower edge in the other unit",
                f"{shown.low:g} × {factor:g}",
                round(shown.low * factor, 6),
                "MHz",
            ),
        ),
        assumptions=("Panels work between 100 MHz and 100 GHz.",),
        question="Please state the frequency range in MHz.",
        used=tuple(slipped or reread),
    )


def _cells(case: Case) -> tuple[Reading, ...]:
    return (*case.panel.all("frequency_range"), *case.panel.all("operating_bands"))
