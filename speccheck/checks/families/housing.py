"""The array has to fit into the box it is sold in."""

from __future__ import annotations

from dataclasses import dataclass, replace

from speccheck.checks.families.ports import group_count
from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.records import Amount, Fit, Interval, Reading, Step
from speccheck.records.words import FIT_GRAVITY


@dataclass(frozen=True, slots=True)
class _Side:
    """One direction: what is stated of the box, how many elements at which pitch [m], how wide one is [m]."""

    word: str
    elements: str
    stated: Reading
    count: int
    pitch_m: float
    element_m: float

    @property
    def full_m(self) -> float:
        """Length [m] of the array with half an element beyond the outermost centres."""
        return (self.count - 1) * self.pitch_m + self.element_m

    @property
    def formula(self) -> str:
        """How the length comes about."""
        pitch, element = f"{self.pitch_m * 1000:.4g} mm", f"{self.element_m * 1000:.4g} mm"
        if self.element_m == self.pitch_m:
            return f"{self.count} × {pitch}"
        return f"({self.count} − 1) × {pitch} + {element}"

    @property
    def least_m(self) -> float:
        """Length [m] with a quarter of an element beyond the outermost centres."""
        return (self.count - 1) * self.pitch_m + self.element_m / 2

    @property
    def verdict(self) -> Fit:
        """Hard where even the least length exceeds the box."""
        if self.full_m <= self.stated.high:
            return Fit.FITS
        return Fit.DOES_NOT_FIT if self.least_m > self.stated.high else Fit.DOUBTFUL

    @property
    def sentence(self) -> str:
        """Claim, expectation, difference."""
        start = (
            f"{self.word.capitalize()} {claim(self.stated)} claimed; {self.count} {self.elements} at"
            f" {self.pitch_m * 1000:.4g} mm take {self.full_m * 1000:.0f} mm"
        )
        spare = self.stated.high - self.full_m
        return start + (
            f", {spare * 1000:.0f} mm to spare."
            if spare >= 0
            else f", {-spare * 1000:.0f} mm more than the box."
        )


@check(
    "array-fits-housing",
    "Array fits the housing",
    needs=("array_rows",),
    optional=(
        "height",
        "width",
        "array_columns",
        "vertical_element_spacing",
        "horizontal_element_spacing",
        "panel_groups",
    ),
    about=("height", "width"),
    source="geometry: N elements at pitch d take N·d, half a pitch beyond the outermost on either side",
)
def array_fits_housing(
    case: Case,
    height: Reading | None,
    width: Reading | None,
    panel_groups: Reading | None,
) -> Judgement | None:
    """Multiplies elements by their spacing and holds the product against height and width.

    Formula
    N·d ≤ side: fits; (N − ½)·d > side: does not fit; between them doubtful. Columns farther apart than half
    a wavelength at the lower band edge take (N − 1)·d and that half wavelength.

    Assumptions
    An element needs half a pitch beyond its centre, a quarter at the very least; an element is half a
    wavelength wide at most. A spacing in λ without a
    frequency is taken at the middle of the band. Several panel groups stand side by side within the box.

    Worked example
    12 rows at 140 mm take 1680 mm; a height of 1400 mm is 280 mm short and does not fit.
    """
    model = model_of(case)
    if isinstance(model, Lacking) and height is not None:
        model = model_of(case, "vertical")
    if isinstance(model, Lacking) and width is not None:
        model = model_of(case, "horizontal")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    sides = _sides(model, height, width, group_count(panel_groups))
    if not sides:
        return None
    worst = max(sides, key=lambda side: (FIT_GRAVITY[side.verdict], side.full_m / side.stated.high))
    return Judgement(
        verdict=worst.verdict,
        summary=" ".join(side.sentence for side in sorted(sides, key=lambda s: s is not worst)),
        claimed=Amount(worst.stated.high, "m"),
        expected=Interval(round(worst.full_m, 4), None, "m"),
        working=tuple(
            Step(
                f"Array along the {side.word}",
                side.formula,
                round(side.full_m * 1000, 1),
                "mm",
            )
            for side in sides
        ),
        assumptions=("Half a pitch beyond the outermost elements.", *model.assumptions),
        question="Please confirm the spacing in millimetres and the outer size with the radome.",
        used=model.used,
    )


def _sides(model: Model, height: Reading | None, width: Reading | None, groups: int) -> list[_Side]:
    layout = model.layout
    sides: list[_Side] = []
    if height is not None and layout.rows > 1:
        pitch = layout.vertical_pitch_m
        sides.append(_Side("height", "rows", height, layout.rows, pitch, pitch))
    if width is not None and layout.columns > 1:
        pitch, widest = layout.horizontal_pitch_m, SPEED_OF_LIGHT_MPS / model.low_hz / 2
        sides.append(_Side("width", "columns", width, layout.columns, pitch, min(pitch, widest)))
    if groups > 1 and sides:
        # groups stand along the side with more room, so only one side grows
        roomy = max(sides, key=lambda s: s.stated.high / s.full_m)
        sides = [replace(s, count=s.count * groups) if s is roomy else s for s in sides]
    return sides
