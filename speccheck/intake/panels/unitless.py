"""Figures without any unit: the parameter's own, or the only one in which the figure is plausible."""

from __future__ import annotations

from dataclasses import replace

from speccheck.dictionary import Parameter
from speccheck.quantities import Quantity, UnknownUnitError, convert
from speccheck.quantities.content import Value

_USUAL = {
    "m": ("m", "mm", "cm", "in"),
    "m/s": ("m/s", "km/h", "mph"),
    "N": ("N", "kN"),
    "MHz": ("MHz", "GHz"),
    "kg": ("kg", "g"),
    "W": ("W", "kW"),
}
"""Units bidders use for a quantity (common practice), the parameter's own first."""


def with_unit(quantity: Quantity, parameter: Parameter) -> tuple[Quantity, str]:
    """The quantity with the unit it must have, and how that was found.

    A figure plausible in its parameter's unit keeps it; one plausible in a single other unit has that;
    where several would do, all are alternatives.

    Raises
    ------
    UnknownUnitError : the figure is plausible in no usual unit
    """
    units = _USUAL.get(parameter.unit, ())
    value = quantity.value
    if quantity.unit or isinstance(value, str) or not units or parameter.plausible is None or not value:
        return quantity, ""
    wavelengths = "λ" in parameter.keep and _within(value, (0.3, 1.5))
    likely = [unit for unit in units if _within(_converted(value, unit, parameter.unit), parameter.plausible)]
    if likely and likely[0] == parameter.unit and not wavelengths:
        return quantity, f"no unit given, {parameter.unit} taken"
    if wavelengths:
        likely.append("λ")
    if not likely:
        raise UnknownUnitError(
            f"no unit given, and {_shown(value)} is plausible in none of {', '.join(units)}"
        )
    if len(likely) == 1:
        return replace(
            quantity, unit=likely[0]
        ), f"no unit given; {_shown(value)} is plausible in {likely[0]} only"
    others = tuple(_converted(value, unit, parameter.unit) for unit in likely if unit != "λ")
    others = (*others, *([value] if "λ" in likely else []))
    how = f"no unit given; {' or '.join(likely)} would do"
    return replace(quantity, unit=likely[0], alternatives=others), how


def _converted(value: Value, unit: str, to_unit: str) -> Value:
    if isinstance(value, str):
        return value
    if isinstance(value, tuple):
        return convert(value[0], unit, to_unit), convert(value[1], unit, to_unit)
    return convert(value, unit, to_unit)


def _within(value: Value, span: tuple[float, float]) -> bool:
    if isinstance(value, str):
        return False
    ends = value if isinstance(value, tuple) else (value,)
    return all(span[0] <= end <= span[1] for end in ends)


def _shown(value: Value) -> str:
    return (
        f"{value[0]:g} – {value[1]:g}"
        if isinstance(value, tuple)
        else f"{value:g}"
        if isinstance(value, float)
        else value
    )
