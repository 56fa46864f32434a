"""The sheet Recomputed: what can be redone by hand, as live formulas that refer to the cells read.

Only closed-form relations stand here; what needs an integral over the pattern is in the findings.
"""

from __future__ import annotations

import math

from speccheck.records import Assessment, Band, ExposureRow, Panel, PanelAssessment, Reading, Settings
from speccheck.report.workbooks.review_ledger import Figure, Ledger
from speccheck.report.workbooks.review_places import Places
from speccheck.report.workbooks.sheets import Table

SPEED_OF_LIGHT_M_S = 299_792_458.0
SECTOR_CONSTANT_DEG2 = 31_000.0
SPHERE_DEG2 = 4 * math.pi * (180 / math.pi) ** 2


def recomputed(assessment: Assessment, places: Places) -> Table:
    """Return the sheet for every panel and band."""
    ledger = Ledger(places)
    light = ledger.assume("Speed of light", SPEED_OF_LIGHT_M_S, "m/s", "SI Brochure, 9th edition: exact")
    sector = ledger.assume(
        "Product of gain and beamwidths", SECTOR_CONSTANT_DEG2, "deg²", "ITU-R F.1336-5, recommends 3.3"
    )
    sphere = ledger.result(
        "Square degrees of the sphere", "deg²", "4*PI()*(180/PI())^2", lambda: SPHERE_DEG2, (), look="number1"
    )
    for one in assessment.panels:
        ledger.panel = one.panel.name
        for band in one.panel.bands or (None,):
            ledger.band = band
            _array(ledger, one.panel, band, light)
            _gain_and_power(ledger, one.panel, band, (sector, sphere))
            _matching(ledger, one.panel, band)
        _exposure(ledger, one, assessment.settings)
    return ledger.table()


def _array(ledger: Ledger, panel: Panel, band: Band | None, light: Figure) -> None:
    top = _band_edge(ledger, panel, band, upper=True)
    bottom = _band_edge(ledger, panel, band, upper=False)
    wave_top = _wavelength(ledger, "Wavelength at the top of the band", light, top)
    wave_bottom = _wavelength(ledger, "Wavelength at the bottom of the band", light, bottom)
    lengths = []
    for axis, count, spacing, scan in (
        ("Vertical", "array_rows", "vertical_element_spacing", ("vertical_scan", "electrical_tilt")),
        ("Horizontal", "array_columns", "horizontal_element_spacing", ("horizontal_scan",)),
    ):
        pitch = ledger.read(panel.get(spacing, band), f"{axis} element spacing", "m")
        _spacing(ledger, axis, _farthest(panel, band, scan), pitch=pitch, wave=wave_top, light=light)
        number = ledger.read(panel.get(count, band), axis.replace("al", "al positions"), "")
        lengths.append(
            ledger.result(
                f"{axis} length of the aperture", "m", "{0}*{1}", lambda n, d: n * d, (number, pitch)
            )
        )
    for name, wave in (("top", wave_top), ("bottom", wave_bottom)):
        ledger.result(
            f"Directivity of the aperture at the {name} of the band",
            "dBi",
            "10*LOG10(4*PI()*{0}*{1}/{2}^2)",
            lambda a, b, w: 10 * math.log10(4 * math.pi * a * b / w**2),
            (*lengths, wave),
            source="4πA/λ², uniform and lossless: losses and taper lower it, narrow columns may exceed it",
            look="number2",
        )


def _band_edge(ledger: Ledger, panel: Panel, band: Band | None, *, upper: bool) -> Figure | None:
    name = f"{'Top' if upper else 'Bottom'} of the band"
    if band is None:
        return None
    for reading in (*panel.all("operating_bands", band), *panel.all("frequency_range")):
        if reading.value == band:
            return ledger.read(reading, name, "MHz", upper=upper)
    return ledger.assume(name, band[1 if upper else 0], "MHz", "band that the figures are stated for")


def _wavelength(ledger: Ledger, name: str, light: Figure, edge: Figure | None) -> Figure | None:
    return ledger.result(
        name,
        "m",
        "{0}/({1}*1E6)",
        lambda c, f: c / (f * 1e6),
        (light, edge),
        source="λ = c/f",
        look="number4",
    )


def _farthest(panel: Panel, band: Band | None, parameters: tuple[str, ...]) -> Reading | None:
    """Return the first stated steering or tilt range of a plane."""
    found = (panel.get(parameter, band) for parameter in parameters)
    return next((r for r in found if r is not None and not isinstance(r.value, str)), None)


def _spacing(
    ledger: Ledger,
    axis: str,
    scan: Reading | None,
    *,
    pitch: Figure | None,
    wave: Figure | None,
    light: Figure,
) -> None:
    ledger.result(
        f"{axis} spacing in wavelengths at the top of the band",
        "λ",
        "{0}/{1}",
        lambda d, w: d / w,
        (pitch, wave),
    )
    low = ledger.read(scan, f"{axis} steering, lower end", "deg")
    high = ledger.read(scan, f"{axis} steering, upper end", "deg", upper=True)
    steer = ledger.result(
        f"{axis} steering, farthest from broadside",
        "deg",
        "MAX(ABS({0}),ABS({1}))",
        lambda a, b: max(abs(a), abs(b)),
        (low, high),
        look="number1",
    )
    ledger.result(
        f"{axis} spacing at which a grating lobe enters",
        "λ",
        "1/(1+SIN(RADIANS({0})))",
        lambda a: 1 / (1 + math.sin(math.radians(a))),
        (steer,),
        source="common practice: d/λ = 1/(1 + sin θ); its level beside the beam is in the findings",
    )
    ledger.result(
        f"{axis} plane: frequency at which a grating lobe enters",
        "MHz",
        "{0}/({1}*(1+SIN(RADIANS({2}))))/1E6",
        lambda c, d, a: c / (d * (1 + math.sin(math.radians(a)))) / 1e6,
        (light, pitch, steer),
        source="the same, solved for the frequency",
        look="number0",
    )


def _gain_and_power(
    ledger: Ledger, panel: Panel, band: Band | None, constants: tuple[Figure | None, ...]
) -> None:
    gain = ledger.read(panel.get("gain", band), "Gain as claimed", "dBi")
    widths = tuple(
        ledger.read(panel.get(key, band), name, "deg")
        for key, name in (
            ("horizontal_beamwidth", "Horizontal beamwidth as claimed"),
            ("vertical_beamwidth", "Vertical beamwidth as claimed"),
        )
    )
    names = ("Gain that the beamwidths point to", "Greatest gain of one beam of these widths")
    for name, constant, source in zip(
        names, constants, ("ITU-R F.1336-5, recommends 3.3", "all power inside the beam"), strict=True
    ):
        ledger.result(
            name,
            "dBi",
            "10*LOG10({0}/({1}*{2}))",
            lambda k, h, v: 10 * math.log10(k / (h * v)),
            (constant, *widths),
            source=source,
            look="number2",
        )
    stated = panel.get("conducted_power", band) or panel.get("max_power_total", band)
    power = ledger.read(stated, "Total power as claimed", "W")
    total = ledger.result(
        "EIRP of all power through this gain",
        "dBm",
        "10*LOG10({0}*1000)+{1}",
        lambda p, g: 10 * math.log10(p * 1000) + g,
        (power, gain),
        source="conducted power over both polarisations plus the gain of one",
        look="number2",
    )
    claimed = ledger.read(panel.get("eirp", band), "EIRP as claimed", "dBm")
    ledger.result(
        "EIRP as claimed less EIRP recomputed",
        "dB",
        "{0}-{1}",
        lambda a, b: a - b,
        (claimed, total),
        look="number2",
    )


def _matching(ledger: Ledger, panel: Panel, band: Band | None) -> None:
    vswr = ledger.read(panel.get("vswr", band), "VSWR as claimed", "")
    ledger.result(
        "Return loss of this VSWR",
        "dB",
        "20*LOG10(({0}+1)/({0}-1))",
        lambda s: 20 * math.log10((s + 1) / (s - 1)),
        (vswr,),
        source="|Γ| = (s − 1)/(s + 1)",
        look="number2",
    )
    loss = ledger.read(panel.get("return_loss", band), "Return loss as claimed", "dB")
    ledger.result(
        "VSWR of this return loss",
        "",
        "(1+10^(-{0}/20))/(1-10^(-{0}/20))",
        lambda r: (1 + 10 ** (-r / 20)) / (1 - 10 ** (-r / 20)),
        (loss,),
        source="s = (1 + |Γ|)/(1 − |Γ|)",
    )


def _exposure(ledger: Ledger, one: PanelAssessment, settings: Settings) -> None:
    if one.exposure is None or not one.exposure.complete:
        return
    ledger.band = None
    k = ledger.assume(
        "Reflection factor on power density", settings.reflection_factor, "", "setting of this assessment"
    )
    for row in one.exposure.rows:
        if row.band is not None:
            ledger.band = row.band
            _distance(ledger, row, k, f"{one.exposure.limit_set} {one.exposure.edition}".strip())


def _distance(ledger: Ledger, row: ExposureRow, k: Figure, limit_set: str) -> None:
    if row.eirp_dbm is None or row.limit_w_m2 is None:
        return
    case = f"{row.population}, {row.basis}"
    eirp = ledger.assume(
        f"EIRP used ({case})", row.eirp_dbm, "dBm", "exposure note: total, highest gain, no losses"
    )
    limit = ledger.assume(
        f"Limit ({case})", row.limit_w_m2, "W/m2", f"{limit_set}, {row.averaging_min:g} min"
    )
    distance = ledger.result(
        f"Calculated compliance distance ({case})",
        "m",
        "SQRT({0}*10^(({1}-30)/10)/(4*PI()*{2}))",
        lambda k, e, s: math.sqrt(k * 10 ** ((e - 30) / 10) / (4 * math.pi * s)),
        (k, eirp, limit),
        source="r = √(k·EIRP/(4π·S)); strongest beam only; read it with the assumptions and cautions",
    )
    ledger.result(
        f"The same, rounded up ({case})",
        "m",
        "ROUNDUP(ROUND({0}*10,6),0)/10",
        lambda r: math.ceil(round(r * 10, 6)) / 10,
        (distance,),
        look="number1",
    )
