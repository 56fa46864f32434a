"""What the other figures of a panel settle: the plane of a spacing, the beam of a width."""

from __future__ import annotations

from speccheck.intake.panels.found import Found

_ACROSS, _ALONG = "horizontal_element_spacing", "vertical_element_spacing"
_OTHER_PLANE = {_ACROSS: _ALONG, _ALONG: _ACROSS}
_BROADCAST_WIDTHS = {
    "broadcast_horizontal_beamwidth": "horizontal_beamwidth",
    "broadcast_vertical_beamwidth": "vertical_beamwidth",
}
_OPEN = frozenset({"element_spacing", *_BROADCAST_WIDTHS})


def settle_by_panel(readings: list[Found]) -> None:
    """Give open figures the parameter that the rest of their panel leaves for them."""
    stated = {found.parameter for found in readings}
    if stated.isdisjoint(_OPEN):
        return
    for found in readings:
        if found.parameter == "element_spacing":
            _settle_spacing(found, readings, stated)
        elif found.parameter in _BROADCAST_WIDTHS:
            _settle_width(found, readings)


def _settle_spacing(found: Found, readings: list[Found], stated: set[str]) -> None:
    """Beside a spacing between columns, or in a panel of one column, the other one is along the column."""
    known = stated & _OTHER_PLANE.keys()
    columns = {other.value for other in readings if other.parameter == "array_columns"}
    if len(known) == 1:
        (plane,) = known
        key, why = _OTHER_PLANE[plane], "the spacing of the other plane is stated apart"
    elif not known and columns == {1.0}:
        key, why = _ALONG, "the panel has one column"
    else:
        return
    found.parameter = key
    found.recognised = f"{found.recognised or found.figure.recognised}; {why}"


def _settle_width(found: Found, readings: list[Found]) -> None:
    """A panel that states no other width means its own by that of the broadcast beams; the remark stays."""
    key = _BROADCAST_WIDTHS[found.parameter]
    same = [o for o in readings if o.parameter in (key, found.parameter) and o.band == found.band]
    if len(same) > 1:
        return
    found.parameter = key
    found.remark = f"{found.remark}; broadcast beam" if found.remark else "broadcast beam"
