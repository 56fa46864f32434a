"""Innocent readings of counts, spacings, angles and sizes. See `conventions` for how they are tried."""

from __future__ import annotations

from dataclasses import replace

from speccheck.checks.innocent.conventions import Reach, Transform, innocent, reread, scaled, shifted
from speccheck.dictionary import parameters
from speccheck.records import Panel, Reading


def _halved(reading: Reading) -> Reading:
    return scaled(0.5)(reading) if reading.nominal >= 2 and reading.nominal % 2 == 0 else reading


def _swapped(panel: Panel, one: str, other: str) -> Panel:
    names = {one: other, other: one}

    def renamed(reading: Reading) -> Reading:
        name = names.get(reading.parameter)
        return reading if name is None else replace(reading, parameter=name)

    return replace(panel, readings=tuple(renamed(r) for r in panel.readings))


@innocent("rows count the dipoles of both polarisations", "the rows count positions or dipoles", "array_rows")
def rows_of_both_polarisations(panel: Panel, reach: Reach) -> Panel:
    """Half as many rows: gain follows positions, not dipoles."""
    return reread(panel, reach, ("array_rows",), _halved)


@innocent(
    "columns count the dipoles of both polarisations",
    "the columns count positions or dipoles",
    "array_columns",
)
def columns_of_both_polarisations(panel: Panel, reach: Reach) -> Panel:
    """Half as many columns."""
    return reread(panel, reach, ("array_columns",), _halved)


@innocent(
    "elements counted for one polarisation",
    "the elements of one or of both polarisations are counted",
    "element_count",
)
def elements_of_one_polarisation(panel: Panel, reach: Reach) -> Panel:
    """Twice the stated number of elements."""
    return reread(panel, reach, ("element_count",), scaled(2))


@innocent(
    "elements counted for one column",
    "the elements of one column or of the whole panel are counted",
    "element_count",
)
def elements_of_one_column(panel: Panel, reach: Reach) -> Panel:
    """The stated number of elements times the columns."""
    columns = panel.get("array_columns")
    if columns is None or isinstance(columns.value, str):
        return panel
    return reread(panel, reach, ("element_count",), scaled(columns.nominal))


@innocent(
    "transceivers counted for one polarisation",
    "the transceivers of one or of both polarisations are counted",
    "transceivers",
)
def transceivers_of_one_polarisation(panel: Panel, reach: Reach) -> Panel:
    """Twice the stated number of transceivers."""
    return reread(panel, reach, ("transceivers",), scaled(2))


@innocent(
    "two transceivers combined on each sub-array", "transceivers are combined two to one", "transceivers"
)
def transceivers_combined(panel: Panel, reach: Reach) -> Panel:
    """Half the stated number of transceivers."""
    return reread(panel, reach, ("transceivers",), _halved)


@innocent(
    "rows count sub-arrays, not elements",
    "the rows count elements or sub-arrays",
    "array_rows",
    "subarray_rows",
)
def rows_count_subarrays(panel: Panel, reach: Reach) -> Panel:
    """Rows times the elements of a sub-array."""
    grouped = panel.get("subarray_rows")
    if grouped is None or isinstance(grouped.value, str) or grouped.nominal < 2:
        return panel
    return reread(panel, reach, ("array_rows",), scaled(grouped.nominal))


@innocent(
    "sub-array given as columns × rows",
    "the sub-array is given as rows × columns",
    "subarray_rows",
    "subarray_columns",
)
def subarray_swapped(panel: Panel, reach: Reach) -> Panel:  # noqa: ARG001
    """Rows and columns of the sub-array exchanged."""
    return _swapped(panel, "subarray_rows", "subarray_columns")


@innocent(
    "array given as columns × rows", "the array is given as rows × columns", "array_rows", "array_columns"
)
def array_swapped(panel: Panel, reach: Reach) -> Panel:  # noqa: ARG001
    """Rows and columns exchanged, spacings as stated."""
    return _swapped(panel, "array_rows", "array_columns")


@innocent(
    "horizontal and vertical spacing exchanged",
    "the horizontal and the vertical spacing are in the right cells",
    "horizontal_element_spacing",
    "vertical_element_spacing",
)
def spacings_swapped(panel: Panel, reach: Reach) -> Panel:  # noqa: ARG001
    """Spacings exchanged."""
    return _swapped(panel, "horizontal_element_spacing", "vertical_element_spacing")


@innocent(
    "columns stated for one of two equal arrays",
    "the panel holds a second array of the same kind",
    "array_columns",
)
def second_array(panel: Panel, reach: Reach) -> Panel:
    """Twice the columns."""
    return reread(panel, reach, ("array_columns",), scaled(2))


@innocent(
    "calibration connectors counted among the RF connectors",
    "calibration connectors are among the RF connectors counted",
    "rf_ports",
    "calibration_ports",
)
def calibration_counted(panel: Panel, reach: Reach) -> Panel:
    """The stated calibration connectors taken off."""
    calibration = panel.get("calibration_ports")
    if calibration is None or isinstance(calibration.value, str):
        return panel
    return reread(panel, reach, ("rf_ports",), shifted(-calibration.nominal))


def _joined(bands: int) -> Transform:
    """Connectors of devices outside the panel, each with one connector for each of so many bands."""

    def divided(reading: Reading) -> Reading:
        return scaled(1 / bands)(reading) if reading.nominal % bands == 0 else reading

    def reread_panel(panel: Panel, reach: Reach) -> Panel:
        return reread(panel, reach, ("rf_ports",), divided) if len(panel.bands) >= bands else panel

    return reread_panel


for _device, _bands in (("diplexers", 2), ("triplexers", 3)):
    innocent(
        f"connectors of external {_device} counted",
        f"the connectors counted are those of the panel or of external {_device}",
        "rf_ports",
    )(_joined(_bands))


@innocent(
    "interleaved elements double the density",
    "elements of the upper band are interleaved at half the spacing",
    "vertical_element_spacing",
    "array_rows",
)
def interleaved(panel: Panel, reach: Reach) -> Panel:
    """Half the row spacing, twice the rows."""
    denser = reread(panel, reach, ("vertical_element_spacing",), scaled(0.5))
    return reread(denser, reach, ("array_rows",), scaled(2))


@innocent(
    "two interleaved lines share the stated rows", "the rows are those of two interleaved lines", "array_rows"
)
def two_lines(panel: Panel, reach: Reach) -> Panel:
    """Half the rows, of the stated spacing."""
    return reread(panel, reach, ("array_rows",), _halved)


@innocent(
    "scan range given as its whole width",
    "the scan range is given to either side or as its whole width",
    "horizontal_scan",
    "vertical_scan",
)
def whole_width_of_scan(panel: Panel, reach: Reach) -> Panel:
    """Half the scan range."""
    return reread(panel, reach, ("horizontal_scan", "vertical_scan"), scaled(0.5))


@innocent(
    "tilt range counted from the built-in tilt",
    "the tilt range is counted from the horizon or from a built-in tilt",
    "electrical_tilt",
    "vertical_scan",
)
def range_about_fixed_tilt(panel: Panel, reach: Reach) -> Panel:
    """Sub-arrays built for the middle of the range, half the range to either side."""

    def centred(reading: Reading) -> Reading:
        half = (reading.high - reading.low) / 4
        return replace(reading, value=(reading.nominal - half, reading.nominal + half))

    return reread(panel, reach, ("electrical_tilt", "vertical_scan"), centred)


@innocent(
    "tilt range with the mechanical tilt in it",
    "the electrical tilt range holds the mechanical tilt as well",
    "electrical_tilt",
    "mechanical_tilt",
    likely=lambda panel: bool(panel.all("mechanical_tilt")),
)
def mechanical_tilt_within(panel: Panel, reach: Reach) -> Panel:
    """The stated mechanical tilt taken off both ends."""
    bracket = panel.get("mechanical_tilt")
    if bracket is None or isinstance(bracket.value, str):
        return panel

    def electrical(reading: Reading) -> Reading:
        low, high = reading.low - bracket.low, reading.high - bracket.high
        return replace(reading, value=(low, high), tolerance=None) if low <= high else reading

    return reread(panel, reach, ("electrical_tilt",), electrical)


_POSITIVE = tuple(key for key, p in parameters().items() if p.possible is not None and p.possible[0] >= 0)


@innocent("a dash read as a minus sign", "the sign before the figure is a dash", *_POSITIVE)
def dash_for_minus(panel: Panel, reach: Reach) -> Panel:
    """Negative figures of what is positive by its nature, without the sign."""

    def positive(reading: Reading) -> Reading:
        negative = not isinstance(reading.value, tuple) and reading.nominal < 0
        return scaled(-1)(reading) if negative else reading

    return reread(panel, reach, _POSITIVE, positive)
