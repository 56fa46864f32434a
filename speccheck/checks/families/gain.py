"""Gain against the geometry it is made of: counts, spacings, losses, and the short formula of system
models."""

from __future__ import annotations

import math
from dataclasses import dataclass

from speccheck.checks.beams import (
    COLUMN_WIDTHS_DEG,
    BeamGain,
    Claims,
    beam_gains,
    claim_freq_hz,
    declared_loss_db,
    panel_class,
    rest_tilt_deg,
)
from speccheck.checks.envelopes import is_envelope
from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack
from speccheck.physics.decibels import SPEED_OF_LIGHT_MPS
from speccheck.physics.expected import GainZone
from speccheck.records import Amount, Fit, Interval, Reading, Step
from speccheck.records.words import FIT_GRAVITY

VERDICTS = {
    GainZone.IMPOSSIBLE: Fit.DOES_NOT_FIT,
    GainZone.QUESTION: Fit.DOUBTFUL,
    GainZone.PLAUSIBLE: Fit.FITS,
    GainZone.LOW: Fit.DOUBTFUL,
}
WIDEST_SECTOR_DEG = 180.0
"""Horizontal half-power width [deg] beyond which a panel radiates behind itself as well."""

COLUMN_PRODUCT = 35_000.0
"""Directivity × width × width [deg²] of a uniform column: 8 at 0.8 λ, 18.3 dBi, 65° × 8° (computed)."""

SHORT_FORMULA_WITHIN_DB, MOST_RANGE_DB = 0.15, 1.0
"""Rounding of a system-model figure; half range of a gain whose either end may be the expected one [dB]."""


def number(reading: Reading | None) -> float | None:
    """The figure of a reading, None where there is none."""
    return None if reading is None or isinstance(reading.value, str) else reading.nominal


@check(
    "gain-fits-geometry",
    "Gain fits the array",
    needs=("gain",),
    optional=(
        "array_rows",
        "horizontal_beamwidth",
        "vertical_beamwidth",
        "electrical_tilt",
        "feed_loss",
        "efficiency",
    ),
    source="integrated directivity of the declared array, TR 38.901 elements; loss ranges: common practice",
)
def gain_fits_geometry(
    *,
    case: Case,
    gain: Reading,
    horizontal_beamwidth: Reading | None,
    vertical_beamwidth: Reading | None,
    electrical_tilt: Reading | None,
    feed_loss: Reading | None,
    efficiency: Reading | None,
) -> Judgement:
    """Computes the directivity of the declared array, takes off a range of losses and compares.

    The array is fitted to the claimed beamwidths by a taper and integrated over the sphere, at the frequency
    of the claim (mid band unless stated). Above the lossless value a claim does not fit; between the least
    plausible loss and the lossless value it needs a loss statement; far below the expectation it is
    questioned too. A panel that radiates all round has no sector element and is not judged here.

    Formula
    D = 4π·U(beam) ÷ ∮U dΩ; gain = D − loss; loss 0.5–1.6 dB passive, 0.5–1.8 dB massive MIMO, 0.9–2.8 dB
    millimetre wave, or as declared ± 0.3 dB

    Assumptions
    Element of TR 38.901 form; cosine taper on a pedestal; model allowance 0.2 dB. Where the horizontal width
    is that of fewer columns, the gain may be theirs or that of all columns.

    Worked example
    8 × 8 positions at 0.7 λ × 0.5 λ, beam of 8.9° × 12.5°: D = 24.7 dBi lossless; 26.8 dBi does not fit.
    """
    model = model_of(case)
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    if model.layout.columns == 1 and (number(horizontal_beamwidth) or 0.0) > WIDEST_SECTOR_DEG:
        return _all_round(gain, horizontal_beamwidth)
    widths = _Widths(horizontal_beamwidth, vertical_beamwidth)
    all_stated = [g for g in case.panel.all("gain", case.band) if not isinstance(g.value, str)]
    stated = [g for g in all_stated if "angle_deg" not in g.at] or [gain]
    judged = [
        _judged(
            model,
            one,
            _beams_of(model, one, widths, electrical_tilt, declared_loss_db(one, feed_loss, efficiency)),
        )
        for one in stated
    ]
    return max(judged, key=lambda j: FIT_GRAVITY[j.verdict])


def _all_round(gain: Reading, width: Reading | None) -> Judgement:
    wide = "" if width is None else f" with a horizontal width of {claim(width)}"
    return Judgement(
        verdict=Fit.NOT_JUDGED,
        summary=f"{claim(gain)} gain claimed{wide}: no element of a sector panel is that wide, and the array"
        " was not computed.",
        question="Please state how the panel forms a beam that wide, and confirm that the horizontal width"
        " is that of one beam at -3 dB.",
    )


@dataclass(frozen=True, slots=True)
class _Widths:
    """The claimed half-power widths; figures [deg] as they are at another frequency of the band."""

    horizontal: Reading | None
    vertical: Reading | None

    def horizontal_deg(self, model: Model, freq_hz: float) -> float | None:
        """Width of an array beam falls with frequency, that of a single column stays."""
        if self.horizontal is None or self.horizontal.at.get("beam_columns") or is_envelope(self.horizontal):
            return None
        width = number(self.horizontal)
        fixed = model.layout.columns == 1 or (width is not None and width >= COLUMN_WIDTHS_DEG[0])
        return width if fixed else self._at(model, self.horizontal, freq_hz)

    def vertical_deg(self, model: Model, freq_hz: float) -> float | None:
        """Width of the rows at a frequency [Hz]."""
        beam = self.vertical is not None and not is_envelope(self.vertical)
        return self._at(model, self.vertical, freq_hz) if self.vertical and beam else None

    @staticmethod
    def _at(model: Model, width: Reading, freq_hz: float) -> float | None:
        stated = number(width)
        return None if stated is None else stated * claim_freq_hz(width, model) / freq_hz


def _beams_of(
    model: Model, gain: Reading, widths: _Widths, tilt: Reading | None, loss_db: float | None
) -> list[tuple[Claims, BeamGain]]:
    """The beams a gain may belong to, under the conditions it states."""
    freq_hz = claim_freq_hz(gain, model)
    columns = gain.at.get("beam_columns")
    claims = Claims(
        freq_hz=freq_hz,
        tilt_deg=rest_tilt_deg(gain, model, tilt),
        horizontal_deg=widths.horizontal_deg(model, freq_hz),
        vertical_deg=widths.vertical_deg(model, freq_hz),
        loss_db=loss_db,
        beam_columns=None if columns is None else round(columns),
    )
    return [(claims, beam) for beam in beam_gains(model, claims)]


@dataclass(frozen=True, slots=True)
class _Edges:
    """Edges [dBi] for a claim, widened for a wide band when the claim names no frequency."""

    low: float
    question: float
    impossible: float

    def zone(self, gain_dbi: float, slack_db: float) -> GainZone:
        if gain_dbi - slack_db > self.impossible:
            return GainZone.IMPOSSIBLE
        if gain_dbi - slack_db > self.question:
            return GainZone.QUESTION
        return GainZone.LOW if gain_dbi + slack_db < self.low else GainZone.PLAUSIBLE


def _edges(model: Model, claims: Claims, beam: BeamGain) -> _Edges:
    """A best value of the band may reach the question edge at its top before it cannot be true at all."""
    expected = beam.expected
    per_octave = 10 if beam.columns == 1 else 20
    rise = per_octave * math.log10(max(1.0, model.high_hz / claims.freq_hz))
    return _Edges(
        expected.low_dbi, expected.question_dbi, max(expected.impossible_dbi, expected.question_dbi + rise)
    )


def _judged(model: Model, gain: Reading, held: list[tuple[Claims, BeamGain]]) -> Judgement:
    if "element_gain_dbi" in gain.at:
        return _against_short_formula(model, gain)
    half = (gain.value[1] - gain.value[0]) / 2 if isinstance(gain.value, tuple) else 0.0
    slack, value = max(last_digit_slack(gain), min(half, MOST_RANGE_DB), 0.05), gain.nominal
    ranked = [(claims, beam, _edges(model, claims, beam)) for claims, beam in held]
    order = [GainZone.PLAUSIBLE, GainZone.LOW, GainZone.QUESTION, GainZone.IMPOSSIBLE]
    claims, beam, edges = min(
        ranked, key=lambda r: (order.index(r[2].zone(value, slack)), abs(value - r[2].question))
    )
    zone = edges.zone(value, slack)
    expected, layout = beam.expected, model.layout
    sense = {
        GainZone.IMPOSSIBLE: f"{value - expected.directivity_dbi:.1f} dB above the lossless value",
        GainZone.QUESTION: f"{value - expected.question_dbi:.1f} dB above what the least loss leaves",
        GainZone.PLAUSIBLE: f"an implied loss of {expected.directivity_dbi - value:.1f} dB",
        GainZone.LOW: f"{expected.low_dbi - value:.1f} dB under what such a panel has at least",
    }[zone]
    return Judgement(
        verdict=VERDICTS[zone],
        summary=f"{claim(gain)} gain claimed; {layout.rows} × {beam.columns} positions at"
        f" {pitches(model, beam.columns, claims.freq_hz)} have {expected.directivity_dbi:.1f} dBi"
        f" lossless at {claims.freq_hz / 1e6:.0f} MHz and"
        f" {expected.low_dbi:.1f} to {expected.question_dbi:.1f} dBi with losses: {sense}.",
        claimed=Amount(round(value, 2), "dBi"),
        expected=Interval(round(expected.low_dbi, 2), round(expected.question_dbi, 2), "dBi"),
        working=_working(model, gain, claims, beam),
        assumptions=(
            f"Gain of {beam.columns} of {layout.columns} columns.",
            *(text[0].upper() + text[1:] + "." for text in expected.assumptions),
            f"Upper edge set by: {expected.binding}.",
            *model.assumptions,
        ),
        question="Please state the frequency, tilt and beam of the gain figure, whether it is measured at the"
        " connector, and the loss inside the panel.",
        used=(gain, *model.used),
    )


def pitches(model: Model, columns: int, freq_hz: float) -> str:
    """The spacings in wavelengths, in words."""
    vertical = f"{model.vertical_pitch_wl(freq_hz):.2f} λ"
    return vertical if columns == 1 else f"{vertical} × {model.horizontal_pitch_wl(freq_hz):.2f} λ"


def _working(model: Model, gain: Reading, claims: Claims, beam: BeamGain) -> tuple[Step, ...]:
    expected, layout = beam.expected, model.layout
    wavelength_m = SPEED_OF_LIGHT_MPS / claims.freq_hz
    height = layout.rows * layout.vertical_pitch_m
    steps = [
        Step("Wavelength", f"c ÷ {claims.freq_hz / 1e6:.1f} MHz", round(wavelength_m * 1000, 2), "mm"),
    ]
    widths = claims.horizontal_deg, claims.vertical_deg
    if beam.columns == 1 and widths[0] and widths[1]:
        by_hand = 10 * math.log10(COLUMN_PRODUCT / (widths[0] * widths[1]))
        formula = f"10·log10(35000 ÷ ({widths[0]:g} × {widths[1]:g}))"
        steps.append(Step("Lossless column by hand, for comparison", formula, round(by_hand, 2), "dBi"))
    if beam.columns > 1:
        width = beam.columns * layout.horizontal_pitch_m
        area = 10 * math.log10(4 * math.pi * width * height / wavelength_m**2)
        formula = f"10·log10(4π × {width:.3f} m × {height:.3f} m ÷ ({wavelength_m:.4f} m)²)"
        steps.append(Step("Area value, for comparison", formula, round(area, 2), "dBi"))
    tapers = f"pedestals {expected.row_pedestal:.2f} (rows), {expected.column_pedestal:.2f} (columns)"
    steps += [
        Step(
            "Directivity of the fitted array",
            f"4π·U ÷ ∮U dΩ, {layout.rows} × {beam.columns}, tilt {claims.tilt_deg:g}°, {tapers}",
            round(expected.directivity_dbi, 2),
            "dBi",
        ),
        Step(
            "Upper edge",
            f"{expected.directivity_dbi:.2f} − {expected.directivity_dbi - expected.question_dbi:.2f} dB"
            " loss",
            round(expected.question_dbi, 2),
            "dBi",
        ),
        Step(
            "Lower edge",
            f"{expected.directivity_dbi:.2f} − {expected.directivity_dbi - expected.low_dbi:.2f} dB",
            round(expected.low_dbi, 2),
            "dBi",
        ),
        Step(
            "Implied loss",
            f"{expected.directivity_dbi:.2f} − {gain.nominal:.2f}",
            round(expected.directivity_dbi - gain.nominal, 2),
            "dB",
        ),
    ]
    return tuple(steps)


def _against_short_formula(model: Model, gain: Reading) -> Judgement:
    """Under the system-model reading: element gain plus 10·log10 N, and no array theory."""
    count = model.layout.rows * model.layout.columns
    element = gain.at["element_gain_dbi"]
    short = element + 10 * math.log10(count)
    off = abs(gain.nominal - short)
    return Judgement(
        verdict=Fit.FITS if off <= SHORT_FORMULA_WITHIN_DB else Fit.DOES_NOT_FIT,
        summary=f"{claim(gain)} gain claimed; {element:g} dBi + 10·log10 {count} = {short:.1f} dBi.",
        claimed=Amount(round(gain.nominal, 2), "dBi"),
        expected=Interval(short - SHORT_FORMULA_WITHIN_DB, short + SHORT_FORMULA_WITHIN_DB, "dBi"),
        working=(Step("Short formula", f"{element:g} + 10·log10 {count}", round(short, 2), "dBi"),),
        assumptions=(f"Class {panel_class(model).value}.",),
        used=model.used,
    )
