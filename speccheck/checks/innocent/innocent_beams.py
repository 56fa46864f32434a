"""Innocent readings of beamwidths. See `conventions` for how they are tried."""

from __future__ import annotations

from dataclasses import replace

from speccheck.checks.beams import COLUMN_WIDTHS_DEG
from speccheck.checks.envelopes import steered_deg
from speccheck.checks.innocent.conventions import Reach, Transform, innocent, marked, reread, scaled
from speccheck.records import Panel, Reading

WIDE_BEAM_DEG = 100.0
"""Horizontal width [deg] from which few panels are that wide at half power: most are 60 to 90 (common
practice), and 65 at half power is 111 to 119 at -10 dB."""

RARE_COLUMN_DEG = 55.0
"""Width [deg] below which hardly any single column is sold: most are 60 to 90 wide (common practice)."""

ARRAY_BEAM_DEG = 50.0
"""Width [deg] at -10 dB below which a beam is that of an array of columns and not of an element."""


_HORIZONTAL, _VERTICAL = "horizontal_beamwidth", "vertical_beamwidth"
_WHOLE_ASKED = "the beamwidth is the whole angle between the half-power points or that to one side"


def _doubled(keys: tuple[str, ...]) -> Transform:
    """Widths of `keys` doubled; nothing is reread where the panel lacks one of them."""

    def change(panel: Panel, reach: Reach) -> Panel:
        return reread(panel, reach, keys, scaled(2)) if all(map(panel.all, keys)) else panel

    return change


def _wide_beam(panel: Panel) -> bool:
    widths = [r for r in panel.all("horizontal_beamwidth") if not isinstance(r.value, str)]
    return any(WIDE_BEAM_DEG <= r.nominal <= 2 * WIDE_BEAM_DEG for r in widths)


@innocent(
    "horizontal width of a broadcast beam or single column",
    "the horizontal beamwidth is that of the beam the gain belongs to",
    "horizontal_beamwidth",
)
def broadcast_beam(panel: Panel, reach: Reach) -> Panel:
    """A width that a column can have belongs to one column, whatever the gain belongs to."""

    def of_column(reading: Reading) -> Reading:
        wide = COLUMN_WIDTHS_DEG[0] <= reading.nominal <= COLUMN_WIDTHS_DEG[1]
        return marked(beam_columns=1)(reading) if wide else reading

    return reread(panel, reach, ("horizontal_beamwidth",), of_column)


@innocent(
    "widths of the envelope of all beams",
    "the beamwidths are those of one beam or of the envelope of all beams",
    _HORIZONTAL,
    _VERTICAL,
)
def envelope_of_all_beams(panel: Panel, reach: Reach) -> Panel:
    """A width no smaller than the stated steering range of its plane covers all beams."""

    def covering(reading: Reading) -> Reading:
        range_deg = steered_deg(panel, reading.band, reading)
        wide = range_deg is not None and 0 < range_deg <= reading.nominal
        return marked(envelope=1)(reading) if wide else reading

    return reread(panel, reach, (_HORIZONTAL, _VERTICAL), covering)


_LEVEL_ASKED = "the {} taken at half power"


@innocent(
    "horizontal width taken at -10 dB",
    _LEVEL_ASKED.format("horizontal beamwidth is"),
    _HORIZONTAL,
    likely=_wide_beam,
)
def horizontal_width_at_10_db(panel: Panel, reach: Reach) -> Panel:
    """Width divided by √(10/3), the ratio of a parabola in decibels; a narrow array beam by 1.67.

    A width that would leave less than single columns usually have is not re-read.
    """

    def half_power(reading: Reading) -> Reading:
        columns = panel.get("array_columns", reading.band)
        other = scaled((3 / 10) ** 0.5 if reading.nominal > ARRAY_BEAM_DEG else 1 / 1.67)(reading)
        single = columns is not None and columns.value == 1
        return reading if single and other.nominal < RARE_COLUMN_DEG else other

    return reread(panel, reach, (_HORIZONTAL,), half_power)


@innocent("vertical width taken at -10 dB", _LEVEL_ASKED.format("vertical beamwidth is"), _VERTICAL)
def vertical_width_at_10_db(panel: Panel, reach: Reach) -> Panel:
    """Width divided by 1.67, the ratio of a uniform line."""
    return reread(panel, reach, (_VERTICAL,), scaled(1 / 1.67))


@innocent("both widths taken at -10 dB", _LEVEL_ASKED.format("beamwidths are"), _VERTICAL, _HORIZONTAL)
def widths_at_10_db(panel: Panel, reach: Reach) -> Panel:
    """Both at once; nothing where either is stated alone or would be no half-power width."""
    horizontal = horizontal_width_at_10_db(panel, reach)
    both = panel.all(_VERTICAL) and horizontal != panel
    return vertical_width_at_10_db(horizontal, reach) if both else panel


for _name, _keys in (
    ("horizontal width", (_HORIZONTAL,)),
    ("vertical width", (_VERTICAL,)),
    ("both widths", (_HORIZONTAL, _VERTICAL)),
):
    innocent(f"{_name} given to one side of the beam", _WHOLE_ASKED, *_keys)(_doubled(_keys))


@innocent(
    "sector width, not beamwidth",
    "the width is that of the sector served",
    "horizontal_beamwidth",
    likely=_wide_beam,
)
def sector_width(panel: Panel, reach: Reach) -> Panel:
    """A sector of 120° is served by a beam of 65° (common practice); 90° and 60° by 65° and 33°."""
    beams = {120.0: 65.0, 90.0: 65.0, 60.0: 33.0}

    def beam(reading: Reading) -> Reading:
        return replace(
            reading, value=beams.get(reading.nominal, reading.nominal), tolerance=reading.tolerance
        )

    return reread(panel, reach, ("horizontal_beamwidth",), beam)


@innocent(
    "widths at the upper band edge",
    "the beamwidths hold over the whole band or at one frequency",
    "vertical_beamwidth",
    "horizontal_beamwidth",
)
def widths_at_top(panel: Panel, reach: Reach) -> Panel:
    """The widths held against the upper band edge."""

    def at_top(reading: Reading) -> Reading:
        band = reading.band or (panel.bands[-1] if panel.bands else None)
        return reading if band is None else replace(reading, at={**reading.at, "frequency_mhz": band[1]})

    return reread(panel, reach, ("vertical_beamwidth", "horizontal_beamwidth"), at_top)


@innocent(
    "widths at the lower band edge",
    "the beamwidths hold over the whole band or at one frequency",
    "vertical_beamwidth",
    "horizontal_beamwidth",
)
def widths_at_bottom(panel: Panel, reach: Reach) -> Panel:
    """The widths held against the lower band edge."""

    def at_bottom(reading: Reading) -> Reading:
        band = reading.band or (panel.bands[0] if panel.bands else None)
        return reading if band is None else replace(reading, at={**reading.at, "frequency_mhz": band[0]})

    return reread(panel, reach, ("vertical_beamwidth", "horizontal_beamwidth"), at_bottom)
