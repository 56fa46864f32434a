"""Innocent readings of gain. See `conventions` for how they are tried."""

from __future__ import annotations

import math
from dataclasses import replace

from speccheck.checks.innocent.conventions import Reach, Transform, innocent, marked, reread, shifted
from speccheck.checks.saying import last_digit_slack
from speccheck.records import Panel, Reading

DIPOLE_DBI = 2.15
"""Gain of a half-wave dipole [dBi]; 10·log10 1.641 (any antenna handbook)."""

TWICE_DB = 3.01
"""Two equal powers over one [dB]; 10·log10 2."""

SYSTEM_MODEL_ELEMENT_DBI = 8.0
"""Element gain of the system models, 3GPP TR 38.901 Table 7.3-1."""

SHORT_FORMULA_WITHIN_DB = 0.15
"""The formula's result as printed, to a tenth of a decibel [dB]."""

_REFERENCE_ASKED = "the gain is counted from an isotropic radiator (dBi) or a half-wave dipole (dBd)"


def _moved(*keys: str, by_db: float) -> Transform:
    """Figures of `keys` moved together; nothing is reread where the panel lacks one of them."""

    def change(panel: Panel, reach: Reach) -> Panel:
        return reread(panel, reach, keys, shifted(by_db)) if all(map(panel.all, keys)) else panel

    return change


for _name, _ask, _by_db in (
    ("2.15 dB of a half-wave dipole added twice", _REFERENCE_ASKED, -DIPOLE_DBI),
    ("gain in dBd under a heading in dBi", _REFERENCE_ASKED, DIPOLE_DBI),
    # an aperture shared by two polarisations is not larger
    ("both polarisations added into the gain", "the gain is that of one polarisation", -TWICE_DB),
):
    innocent(_name, _ask, "gain")(_moved("gain", by_db=_by_db))
    # whoever computed the EIRP took the gain as he had it
    innocent(f"{_name}, and so in the EIRP", _ask, "gain", "eirp")(_moved("gain", "eirp", by_db=_by_db))


@innocent(
    "directivity, before losses",
    "the gain is measured at the connector or is the directivity without losses",
    "gain",
)
def directivity_as_gain(panel: Panel, reach: Reach) -> Panel:
    """The figure held against the lossless array."""
    return reread(panel, reach, ("gain",), marked(loss_db=0.0))


@innocent(
    "gain at an internal plane, before the stated loss",
    "the gain holds at the connector or behind the internal feed",
    "gain",
    "feed_loss",
)
def gain_before_feed(panel: Panel, reach: Reach) -> Panel:
    """Gain less the stated feed loss."""
    loss = panel.get("feed_loss")
    if loss is None or isinstance(loss.value, str):
        return panel
    return reread(panel, reach, ("gain",), shifted(-loss.nominal))


@innocent(
    "gain at the best frequency of the band",
    "the gain holds over the whole band or at its best frequency",
    "gain",
)
def gain_at_best_frequency(panel: Panel, reach: Reach) -> Panel:
    """The figure held against the upper edge of its band, or of the highest band that repeats it."""

    def at_top(reading: Reading) -> Reading:
        alike = [r.band[1] for r in panel.all("gain") if r.band and r.value == reading.value]
        band = reading.band or (panel.bands[-1] if panel.bands else None)
        if band is None:
            return reading
        top = max([band[1], *alike]) if reading.band else band[1]
        return replace(reading, at={**reading.at, "frequency_mhz": top})

    return reread(panel, reach, ("gain",), at_top)


@innocent(
    "system-model figure: element gain + 10·log10 N",
    "the gain is computed as element gain plus 10·log10 of the elements",
    "gain",
)
def system_model_gain(panel: Panel, reach: Reach) -> Panel:
    """The figure held against the short formula of system models, where it is that formula's result.

    The models are of planar arrays: a single column meets the formula of 8 dBi by chance only.
    """
    element = panel.get("element_gain")
    gain = SYSTEM_MODEL_ELEMENT_DBI if element is None or isinstance(element.value, str) else element.nominal

    def marked_if_equal(reading: Reading) -> Reading:
        rows, columns = (panel.get(key, reading.band) for key in ("array_rows", "array_columns"))
        if rows is None or isinstance(rows.value, str):
            return reading
        across = 1 if columns is None or isinstance(columns.value, str) else columns.nominal
        if across < 2 and element is None:
            return reading
        count = rows.nominal * across
        short = gain + 10 * math.log10(max(1.0, count))
        equal = abs(reading.nominal - short) <= min(last_digit_slack(reading), SHORT_FORMULA_WITHIN_DB) + 0.01
        return marked(element_gain_dbi=gain)(reading) if equal else reading

    return reread(panel, reach, ("gain",), marked_if_equal)


@innocent("gain of one column or sub-array", "the gain is that of the whole panel or of one column", "gain")
def gain_of_one_column(panel: Panel, reach: Reach) -> Panel:
    """The figure held against one column."""
    return reread(panel, reach, ("gain",), marked(beam_columns=1))


@innocent("gain of another band", "the gain stands in the column of its band", "gain")
def gain_of_another_band(panel: Panel, reach: Reach) -> Panel:
    """Gains of two bands exchanged."""
    gains = [r for r in panel.all("gain") if r.band is not None]
    if len(gains) != 2 or reach.bands is not None:
        return panel
    other = {gains[0].where: gains[1], gains[1].where: gains[0]}
    return replace(
        panel,
        readings=tuple(
            replace(r, value=other[r.where].value) if r.parameter == "gain" and r.where in other else r
            for r in panel.readings
        ),
    )
