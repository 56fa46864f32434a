"""Statements by direction: front-to-back ratio, cross-polar discrimination, plane of the horizontal cut."""

from __future__ import annotations

import re

from speccheck.checks.cell_text import words
from speccheck.checks.envelopes import ENVELOPE
from speccheck.checks.registry import Judgement, check
from speccheck.checks.saying import claim
from speccheck.records import Amount, Fit, Interval, Reading, Step

_TOTAL = re.compile(r"total|gesamtleistung|potenza tot|co\s*\+|sum|±\s*30|\+/-\s*30|150\s*°|210\s*°")
_CO_POLAR_ONLY = re.compile(r"[ck]o-?\s?pol")
_USUAL_TOTAL_DB = 32.0
_USUAL_CO_POLAR_DB = 40.0
_UNDEFINED_DB = 30.0
_SECTOR = re.compile(r"se[ck]t[oe]u?r|settore|±\s*60|\+/-\s*60|over .*beam|60\s*°")
_ON_AXIS = re.compile(
    r"\b(?:axis|achse|axe|asse|eje)\b|boresight|hauptstrahl|(?<!\d)0\s*°|main direction|peak"
)
_USUAL_SECTOR_DB = 15.0
_USUAL_AXIS_DB = 35.0
_UNDEFINED_CROSS_DB = 25.0
_CUT = re.compile(r"\b(cut|pattern|diagram|schnitt|coupe|corte|taglio|strahlungs)")
_HORIZON = re.compile(r"horizon(?!tal)|at 0\s*° elevation|elevation 0")


@check(
    "front-to-back-defined",
    "Front-to-back ratio is defined and comparable",
    needs=("front_to_back_ratio",),
    optional=("front_to_back_definition",),
    source="two definitions in use: co-polar at 180°, total power within 180° ± 30° (common practice)",
)
def front_to_back_defined(
    front_to_back_ratio: Reading,
    front_to_back_definition: Reading | None,
) -> Judgement | None:
    """Asks for the definition of a front-to-back ratio that only the milder one makes usual.

    Formula
    total power: peak less the highest co- plus cross-polar level within 180° ± 30°; co-polar: peak less level
    at 180°; the second is never the smaller

    Assumptions
    Total power within 180° ± 30° is usually 20 to 32 dB, co-polar at 180° up to 40 dB (common practice). A
    figure without definition is taken as total power up to 30 dB; from there on it is doubtful.

    Worked example
    30 dB without a word on angle or polarisation is doubtful; as co-polar ratio at 180° it would be usual.
    26 dB as total power within 180° ± 30° fits.
    """
    said = words(front_to_back_ratio, front_to_back_definition)
    co_polar_only = front_to_back_ratio.at.get("co_polar_only") == 1
    total = bool(_TOTAL.search(said)) and not co_polar_only
    milder = co_polar_only or (bool(_CO_POLAR_ONLY.search(said)) and not total)
    bound = _USUAL_TOTAL_DB if total else _USUAL_CO_POLAR_DB if milder else _UNDEFINED_DB
    claimed = front_to_back_ratio.nominal
    doubtful = claimed > bound or (not total and not milder and claimed >= bound)
    kind = "total power within 180° ± 30°" if total else "co-polar at 180°" if milder else "no definition"
    return Judgement(
        verdict=Fit.DOUBTFUL if doubtful else Fit.FITS,
        summary=f"A front-to-back ratio of {claim(front_to_back_ratio)}, {kind}, is "
        f"{'high' if doubtful else 'usual'}"
        + ("; it compares only with others of the same definition." if not total else "."),
        claimed=Amount(claimed, "dB"),
        expected=Interval(None, bound, "dB"),
        working=(Step("Definition read from the cells", kind, bound, "dB"),),
        assumptions=(f"Usual up to {bound:g} dB for this definition (common practice).",),
        question="Please state the angular range of the front-to-back ratio, and whether it is co-polar or "
        "total power.",
    )


@check(
    "cross-polar-defined",
    "Cross-polar discrimination is defined and comparable",
    needs=(),
    optional=("cross_polar_discrimination", "cross_polar_sector"),
    about=("cross_polar_discrimination", "cross_polar_sector"),
    source="25 dB on axis and 10 dB at the sector edge are both usual (common practice)",
)
def cross_polar_defined(
    cross_polar_discrimination: Reading | None,
    cross_polar_sector: Reading | None,
) -> Judgement | None:
    """Asks for the directions of a cross-polar discrimination, and holds the sector figure against the axis.

    Formula
    least ratio over ±60° ≤ ratio on axis, since the sector holds the axis

    Assumptions
    On axis 15 to 35 dB are usual, over a sector of ±60° up to 15 dB (common practice). A figure without
    direction of 25 dB and more is doubtful. One that holds on axis alone says nothing of the sector edge.

    Worked example
    25 dB stated over ±60° is doubtful and would fit on axis. A sector figure of 20 dB above an axis figure of
    18 dB contradicts itself: both are least values, and the sector holds the axis.
    """
    stated = cross_polar_discrimination or cross_polar_sector
    if stated is None:
        return None
    kind, bound = _cross_kind(stated)
    claimed = stated.nominal
    crossed = (
        cross_polar_discrimination is not None
        and cross_polar_sector is not None
        and cross_polar_sector.nominal > cross_polar_discrimination.nominal
    )
    high = claimed > bound or (kind == "no direction" and claimed >= bound)
    trouble = " The figure over the sector is above the one on axis." if crossed else ""
    return Judgement(
        verdict=Fit.DOUBTFUL if crossed or high else Fit.FITS,
        summary=f"A cross-polar discrimination of {claim(stated)}, {kind}, is "
        f"{'high' if high else 'usual'}.{trouble}",
        claimed=Amount(claimed, "dB"),
        expected=Interval(None, bound, "dB"),
        working=(Step("Directions read from the cells", kind, bound, "dB"),),
        assumptions=(
            f"Usual up to {bound:g} dB (common practice).",
            "A figure on axis says nothing of the sector edge.",
        ),
        question="Please state the cross-polar discrimination on axis and its least value over ±60°.",
    )


def _cross_kind(stated: Reading) -> tuple[str, float]:
    said = words(stated)
    angle = stated.at.get("angle_deg")
    if angle is not None:
        on_axis = abs(angle) < 1
        return ("on axis", _USUAL_AXIS_DB) if on_axis else (f"at {angle:g}°", _USUAL_SECTOR_DB)
    if stated.parameter == "cross_polar_sector" or _SECTOR.search(said):
        return "over the sector", _USUAL_SECTOR_DB
    if _ON_AXIS.search(said):
        return "on axis", _USUAL_AXIS_DB
    return "no direction", _UNDEFINED_CROSS_DB


@check(
    "horizontal-cut-through-beam",
    "Horizontal cut goes through the beam",
    needs=("horizontal_beamwidth",),
    optional=("gain", "electrical_tilt", "vertical_beamwidth", "remarks"),
    source="3GPP TR 38.901 Table 7.3-1: main beam falls by 12·(angle/beamwidth)² dB",
)
def horizontal_cut_through_beam(
    *,
    horizontal_beamwidth: Reading,
    gain: Reading | None,
    electrical_tilt: Reading | None,
    vertical_beamwidth: Reading | None,
    remarks: Reading | None,
) -> Judgement | None:
    """Asks whether a cut taken on the horizon was taken while the beam was tilted away from it.

    Formula
    level at the horizon [dB] = −12·(tilt/θv)²; beam peak and horizon agree where it is near 0

    Assumptions
    Applies where the words of the width or gain, or a remark on the cuts, name the horizon. The tilt is the
    one stated beside the figure, else the middle of the range. More than 1 dB below the peak is doubtful. A
    remark on cuts that names no plane is asked about where the tilt reaches half the vertical width.

    Worked example
    At 6° of tilt with a 7° vertical width the horizon lies 12·(6/7)² = 8.8 dB under the beam peak: width and
    gain of that cut are not those of the beam.
    """
    said = words(horizontal_beamwidth, gain)
    remark = words(remarks)
    if not _HORIZON.search(said) and not (_CUT.search(remark) and _HORIZON.search(remark)):
        return _plane_not_named(electrical_tilt, vertical_beamwidth) if _CUT.search(remark) else None
    if electrical_tilt is None or vertical_beamwidth is None:
        lacking = "electrical_tilt" if electrical_tilt is None else "vertical_beamwidth"
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=(lacking,))
    tilt = horizontal_beamwidth.at.get("tilt_deg", electrical_tilt.nominal)
    through_beam = horizontal_beamwidth.at.get("through_beam") == 1
    down = 0.0 if through_beam else 12 * (tilt / vertical_beamwidth.nominal) ** 2
    return Judgement(
        verdict=Fit.DOUBTFUL if down > 1 else Fit.FITS,
        summary=f"On the horizon the level is {down:.1f} dB below the beam peak at {tilt:g}° tilt.",
        claimed=Amount(horizontal_beamwidth.nominal, "deg"),
        working=(
            Step(
                "Level below the peak", f"12·({tilt:g}/{vertical_beamwidth.nominal:g})²", round(down, 2), "dB"
            ),
        ),
        assumptions=(f"Tilt of {tilt:g}°.", "Main beam as a parabola in decibels."),
        question="Please state whether the horizontal cut goes through the beam peak or lies on the horizon.",
    )


def _plane_not_named(tilt: Reading | None, width: Reading | None) -> Judgement | None:
    """A question where cuts are spoken of, their plane is not named, and the tilt makes it matter."""
    if tilt is None or width is None or isinstance(tilt.value, str) or isinstance(width.value, str):
        return None
    if tilt.high < width.nominal / 2:
        return None
    down = round(12 * (tilt.high / width.nominal) ** 2, 1)
    return Judgement(
        verdict=Fit.NOT_JUDGED,
        summary="Horizontal cut through the beam: not judged: the plane of the cuts is not stated; at"
        f" {tilt.high:g}° tilt the horizon lies {down:.1f} dB below the peak.",
        working=(Step("Level at the horizon", f"12·({tilt.high:g}/{width.nominal:g})²", down, "dB"),),
        question="Please state whether the horizontal cut goes through the beam peak or lies on the horizon.",
    )


@check(
    "patterns-of-one-beam",
    "Patterns are those of one beam",
    needs=("remarks",),
    optional=("gain",),
    about=("remarks",),
    source="energy conservation: the mean gain over the sphere is the efficiency, 0 dB at most",
)
def patterns_of_one_beam(remarks: Reading, gain: Reading | None) -> Judgement | None:
    """Asks for the pattern of one beam where the bid says that its patterns are envelopes of many.

    An envelope is right for studies of interference and exposure. It is no pattern of a beam: integrated over
    the sphere it holds more than the panel is fed with, and its widths and side lobes are nobody's.

    Formula
    mean of G over the sphere = efficiency ≤ 1; an envelope exceeds it

    Assumptions
    Applies where a remark on patterns or cuts names an envelope. Widths said to be those of an envelope are
    held against the steering range by the checks of beamwidths.

    Worked example
    'patterns show the envelope of all beams' is not judged: the pattern of one beam is asked for.
    """
    said = words(remarks)
    if not (_CUT.search(said) and ENVELOPE.search(said)):
        return None
    return Judgement(
        verdict=Fit.NOT_JUDGED,
        summary="Patterns are those of one beam: not judged: the patterns are said to be the envelope of all"
        " beams, whose mean over the sphere may exceed 0 dB; nothing of one beam can be read off them.",
        question="Please supply the pattern of one beam beside the envelope of all beams, and say which of"
        " them gain, beamwidths and side lobes are taken from.",
        used=() if gain is None else (gain,),
    )
