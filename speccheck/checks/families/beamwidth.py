"""Beamwidths against the rows and columns that form the beam."""

from __future__ import annotations

from speccheck.checks.beams import (
    COLUMN_WIDTHS_DEG,
    Claims,
    beam_gains,
    claim_freq_hz,
    columns_of_width,
    declared_loss_db,
    flat,
    rest_tilt_deg,
    uniform_widths_deg,
)
from speccheck.checks.envelopes import held_as_envelope, is_envelope
from speccheck.checks.model import Lacking, Model, model_of
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, last_digit_slack
from speccheck.physics.expected import GainZone
from speccheck.records import Amount, Fit, Interval, Reading, Step

REJECT, QUESTION, WIDE = 0.92, 0.95, 1.22
"""Ratios to the uniform width: narrower does not fit, needs a question, wider needs a question. On simulated
honest panels 0.95 questions 3 % and 0.92 rejects under 0.5 %; 1.17 is a -20 dB taper."""

ALL_ROUND_DEG = 300.0
"""Width [deg] from which an antenna serves all directions and is no sector panel."""

RATIO_SOURCE = "uniform array pattern (any antenna handbook); ratios set on a simulated population of panels"


@check(
    "vertical-beamwidth-fits-rows",
    "Vertical beamwidth fits the rows",
    needs=("vertical_beamwidth", "array_rows"),
    optional=("electrical_tilt",),
    about=("vertical_beamwidth",),
    source=RATIO_SOURCE,
)
def vertical_beamwidth_fits_rows(
    *, case: Case, vertical_beamwidth: Reading, array_rows: Reading, electrical_tilt: Reading | None
) -> Judgement | None:
    """Holds the vertical half-power width against that of the stated rows with uniform weights.

    Uniform weights give the narrowest ordinary beam. A width below 0.92 of it does not fit, below 0.95 it is
    questioned; above 1.22 the taper is heavier than for -20 dB side lobes, nulls are filled, or there are
    fewer rows.

    Formula
    θv ≈ 50.8° · λ ÷ (N·d), computed from the exact pattern with the element

    Assumptions
    Mid band unless a frequency is stated; least tilt unless a tilt is stated; half of the last printed digit.

    Worked example
    10 rows at 0.8 λ have 6.3° (50.8 ÷ 8 = 6.35 without element). 5.0° is 0.79 of it and does not fit.
    """
    if round(array_rows.nominal) < 2:
        return None
    if is_envelope(vertical_beamwidth):
        return held_as_envelope(case, vertical_beamwidth)
    model = model_of(case, "vertical")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    freq_hz = claim_freq_hz(vertical_beamwidth, model)
    tilt = rest_tilt_deg(vertical_beamwidth, model, electrical_tilt)
    _, uniform = uniform_widths_deg(flat(model.layout), freq_hz, tilt)
    if uniform is None:
        return None
    pitch = model.vertical_pitch_wl(freq_hz)
    words = f"{model.layout.rows} rows at {pitch:.2f} λ ({freq_hz / 1e6:.0f} MHz)"
    rough = f"exact pattern; 50.8° ÷ ({model.layout.rows} × {pitch:.3f}) without element"
    return _held(model, vertical_beamwidth, uniform, words, rough)


def _held(model: Model, width: Reading, uniform_deg: float, words: str, rough: str) -> Judgement:
    """A width against the uniform one, by the three ratios."""
    ratio = width.nominal / uniform_deg
    slack = last_digit_slack(width) / uniform_deg
    verdict = (
        Fit.DOES_NOT_FIT
        if ratio + slack < REJECT
        else Fit.DOUBTFUL
        if ratio + slack < QUESTION or ratio - slack > WIDE
        else Fit.FITS
    )
    tail = (
        "narrower than these elements can make it"
        if ratio < QUESTION
        else "wider than a -20 dB taper makes it"
        if ratio - slack > WIDE
        else "as uniform to tapered weights make it"
    )
    return Judgement(
        verdict=verdict,
        summary=f"{claim(width)} claimed; {words} have {uniform_deg:.1f}° at the narrowest (uniform weights)"
        f" and up to {WIDE * uniform_deg:.1f}° tapered. The claim is {ratio:.2f} of the narrowest, {tail}.",
        claimed=Amount(width.nominal, "deg"),
        expected=Interval(round(QUESTION * uniform_deg, 2), round(WIDE * uniform_deg, 2), "deg"),
        working=(
            Step("Width with uniform weights", rough, round(uniform_deg, 2), "deg"),
            Step("Ratio of the claim to it", f"{width.nominal:g} ÷ {uniform_deg:.2f}", round(ratio, 3)),
        ),
        assumptions=(
            f"Weights between uniform and a -20 dB taper; edges at {REJECT}, {QUESTION} and {WIDE}.",
            *model.assumptions,
        ),
        question="Please state the level (-3 dB), frequency and tilt of the beamwidth and the number of rows"
        " and"
        " columns that form the beam.",
        used=model.used,
    )


@check(
    "horizontal-beamwidth-fits-columns",
    "Horizontal beamwidth fits the columns",
    needs=("horizontal_beamwidth",),
    optional=(
        "array_columns",
        "subarray_columns",
        "gain",
        "vertical_beamwidth",
        "electrical_tilt",
        "feed_loss",
    ),
    source=RATIO_SOURCE + "; widths of single columns: common practice",
)
def horizontal_beamwidth_fits_columns(
    *,
    case: Case,
    horizontal_beamwidth: Reading,
    array_columns: Reading | None,
    subarray_columns: Reading | None,
    gain: Reading | None,
    vertical_beamwidth: Reading | None,
    electrical_tilt: Reading | None,
    feed_loss: Reading | None,
) -> Judgement | None:
    """Finds the columns that give the claimed horizontal width, and asks whether the gain is theirs.

    All columns in phase give a narrow beam, one column 45° to 125°. A wide figure for a panel of many columns
    is that of a broadcast beam or of one column; then the gain must be the lower one of that beam.

    Formula
    θh ≈ 50.8° · λ ÷ (N·d), computed from the exact pattern with the element; edges as for the rows

    Assumptions
    Any whole share of the columns may form the beam unless the sub-array ties all of them together.

    Worked example
    8 columns at 0.5 λ have 12.6° with uniform weights (50.8 ÷ 4 = 12.7 without element); 9.0° is 0.71 of
    it and does not fit. 65° is one column: with 25.3 dBi, the gain of all columns, it is doubtful.
    """
    if array_columns is None or round(array_columns.nominal) < 2:
        return _single_column(horizontal_beamwidth, stated=array_columns is not None)
    if is_envelope(horizontal_beamwidth):
        return held_as_envelope(case, horizontal_beamwidth)
    model = model_of(case, "horizontal")
    if isinstance(model, Lacking):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=model.missing, used=model.used)
    freq_hz = claim_freq_hz(horizontal_beamwidth, model)
    tilt = rest_tilt_deg(horizontal_beamwidth, model, electrical_tilt)
    tied = subarray_columns is not None and round(subarray_columns.nominal) == model.layout.columns
    marked = "beam_columns" in horizontal_beamwidth.at
    own = None if tied else columns_of_width(model, horizontal_beamwidth.nominal, freq_hz, tilt)
    uniform, _ = uniform_widths_deg(flat(model.layout), freq_hz, tilt)
    if uniform is None or own is None or own == model.layout.columns:
        return None if uniform is None else _of_all(model, horizontal_beamwidth, uniform, freq_hz)
    if gain is None and not marked:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("gain",), used=model.used)
    theirs = marked or _gain_of(
        model, own, gain=gain, vertical=vertical_beamwidth, loss=feed_loss, tilt_deg=tilt
    )
    return _of_fewer(model, horizontal_beamwidth, own, uniform, theirs=theirs)


def _of_all(model: Model, width: Reading, uniform_deg: float, freq_hz: float) -> Judgement:
    columns, pitch = model.layout.columns, model.horizontal_pitch_wl(freq_hz)
    words = f"{columns} columns at {pitch:.2f} λ ({freq_hz / 1e6:.0f} MHz)"
    rough = f"exact pattern; 50.8° ÷ ({columns} × {pitch:.3f}) without element"
    return _held(model, width, uniform_deg, words, rough)


def _single_column(width: Reading, *, stated: bool) -> Judgement | None:
    low, high = COLUMN_WIDTHS_DEG
    if width.nominal >= ALL_ROUND_DEG:
        return None
    if width.nominal < low - 3 and not stated:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("array_columns",))
    fits = low - 3 <= width.nominal <= high
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOUBTFUL,
        summary=f"{claim(width)} claimed for one column; single columns have {low:g}° to {high:g}°.",
        claimed=Amount(width.nominal, "deg"),
        expected=Interval(low, high, "deg"),
        working=(Step("Width of single columns", "common practice", f"{low:g} to {high:g}", "deg"),),
        assumptions=("One column, or none stated; shaped reflectors reach a little less.",),
        question="Please state the columns that form the beam and the level of the beamwidth.",
    )


def _gain_of(
    model: Model,
    columns: int,
    *,
    gain: Reading | None,
    vertical: Reading | None,
    loss: Reading | None,
    tilt_deg: float,
) -> bool:
    """Whether the gain is no higher than that of so many columns."""
    if gain is None or isinstance(gain.value, str):
        return False
    claims = Claims(
        freq_hz=claim_freq_hz(gain, model),
        tilt_deg=tilt_deg,
        horizontal_deg=None,
        vertical_deg=None if vertical is None or isinstance(vertical.value, str) else vertical.nominal,
        loss_db=declared_loss_db(gain, loss, None),
        beam_columns=columns,
    )
    zone = beam_gains(model, claims)[0].zone(gain.nominal, last_digit_slack(gain))
    return zone in (GainZone.PLAUSIBLE, GainZone.LOW, GainZone.QUESTION)


def _of_fewer(model: Model, width: Reading, columns: int, uniform_deg: float, *, theirs: bool) -> Judgement:
    total = model.layout.columns
    share = "one column" if columns == 1 else f"{columns} columns"
    tail = "the gain is theirs." if theirs else "the gain is higher than theirs: another beam."
    own = COLUMN_WIDTHS_DEG if columns == 1 else (width.low, width.high)
    span = own if theirs else (QUESTION * uniform_deg, WIDE * uniform_deg)
    return Judgement(
        verdict=Fit.FITS if theirs else Fit.DOUBTFUL,
        summary=f"{claim(width)} claimed; all {total} columns in phase have {uniform_deg:.1f}°. Such a width"
        " is that"
        f" of {share} or of a broadcast beam; {tail}",
        claimed=Amount(width.nominal, "deg"),
        expected=Interval(round(span[0], 2), round(span[1], 2), "deg"),
        working=(
            Step("Width of all columns", f"exact pattern of {total} columns", round(uniform_deg, 2), "deg"),
        ),
        assumptions=(f"The width belongs to {share}.", *model.assumptions),
        question="Please state which beam (traffic, broadcast, one column) each of gain and beamwidth belongs"
        " to.",
        used=model.used,
    )
