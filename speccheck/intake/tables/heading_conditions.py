"""Headings of columns that name a condition of the figures below: a tilt, a frequency, a plane, a slant."""

from __future__ import annotations

import re

from speccheck.intake.tables.labels import Labels

_POINT = re.compile(r"(?:at|@|bei|à|a|con)?\s*\d+(?:[.,]\d+)?\s*[MG]Hz", re.IGNORECASE)
_SLANT = re.compile(r"([+−–-])\s*45\s*°?")
_ANGLE = re.compile(r"(.*?)[\s=:]*\+?(\d+(?:[.,]\d+)?)\s*(?:°|deg\.?|grad)\s*(.*)", re.IGNORECASE)
_STEEPEST_DEG = 20.0
"""An angle alone over a column is a tilt up to here; '65°' and '90°' tell types apart."""
_LONGEST = 40
_PLANES = (("horizontal_beamwidth",), ("vertical_beamwidth",))


def condition_of_heading(text: str, labels: Labels) -> str:
    """The tilt, frequency or slant that a heading says alone, worded as a condition; empty for others.

    >>> condition_of_heading("5°", Labels({})), condition_of_heading("KD-65", Labels({}))
    ('tilt 5°', '')
    """
    if len(text) > _LONGEST or not any(map(str.isdigit, text)):
        return ""
    if _POINT.fullmatch(text):
        return text
    slant = _SLANT.fullmatch(text)
    if slant is not None:
        return f"slant {'plus' if slant[1] == '+' else 'minus'} 45"
    angle = _ANGLE.fullmatch(text)
    if angle is None:
        return ""
    words = f"{angle[1]} {angle[3]}".strip(" ()")
    of_tilt = says_tilt(words, labels) if words else float(angle[2].replace(",", ".")) <= _STEEPEST_DEG
    return f"tilt {angle[2]}°" if of_tilt else ""


def says_tilt(text: str, labels: Labels) -> bool:
    """Whether a heading says 'tilt' and nothing else."""
    return len(text) <= _LONGEST and labels.of(text).parameters == ("electrical_tilt",)


def says_plane(text: str, labels: Labels) -> bool:
    """Whether a heading says only which plane its figures are of, such as 'Azimuth'."""
    short = len(text) <= _LONGEST and not any(map(str.isdigit, text))
    return short and not labels.of(text) and labels.of(f"beamwidth {text}").parameters in _PLANES
