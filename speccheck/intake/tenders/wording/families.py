"""Which units belong to a parameter, so that a place ('at 150 km/h') is never taken for a limit."""

from __future__ import annotations

from speccheck.dictionary import Parameter
from speccheck.quantities import dimension

_LOOSE = {"gain": ("dB",), "carrier level": ("dBm", "dB"), "length": ("λ",)}
"""Units that bidders and buyers write for a dimension beside its own."""


def belongs(unit: str, parameter: Parameter) -> bool:
    """Whether a figure in `unit` can be a figure of this parameter; no unit always can."""
    if not unit or unit == parameter.unit:
        return True
    asked = dimension(parameter.unit)
    return unit in _LOOSE.get(asked, ()) or (bool(asked) and dimension(unit) == asked)
