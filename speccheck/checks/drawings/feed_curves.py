"""Numbers behind the figures of power and ports: the EIRP ladder and the port maps."""

from __future__ import annotations

from collections.abc import Iterator

from speccheck.checks.model import Model
from speccheck.checks.saying import mhz
from speccheck.checks.transmit_power import TransmitPower, transmit_power
from speccheck.physics.power import dbm
from speccheck.records import Band, Drawing, Panel, Reading

_LEAST_W, _MOST_W, _MOST_DB = 1e-6, 1e9, 200.0
_MOST_PORTS = 4096
"""Beyond these a figure shows a slip of the pen, which the checks report."""


def eirp_ladder(panel: Panel, band: Band) -> Iterator[Drawing]:
    """Power, gain and their sum beside the claimed EIRP."""
    power, gain, claim = _power(panel, band), panel.get("gain", band), panel.get("eirp", band)
    if power is None or not _LEAST_W <= power.nominal_w <= _MOST_W or gain is None:
        return
    if isinstance(gain.value, str) or abs(gain.high) > _MOST_DB:
        return
    level, highest = float(dbm(power.nominal_w)), gain.high
    marks = {"power_w": power.nominal_w, "power_dbm": level, "gain_dbi": highest, "sum_dbm": level + highest}
    title = f"Power {level:.1f} dBm and gain {highest:.1f} dBi add up to {level + highest:.1f} dBm EIRP"
    where = [*(r.where for r in power.readings), gain.where]
    if claim is not None and not isinstance(claim.value, str) and abs(claim.high) <= _MOST_DB:
        marks["claimed_dbm"] = claim.high
        difference = claim.high - level - highest
        title += f"; {claim.high:.1f} dBm is claimed ({difference:+.1f} dB)".replace("-", "−")
        where.append(claim.where)
    kind = "input rating of the ports" if power.input_rating else "transmit power"
    yield Drawing(
        kind="eirp-ladder",
        title=title,
        text=f"{mhz(band)}: {kind} {power.nominal_w:.4g} W over both polarisations, highest gain, no losses "
        "taken off.",
        band=band,
        marks=marks,
        where=tuple(dict.fromkeys(where)),
    )


def _power(panel: Panel, band: Band) -> TransmitPower | None:
    """Total power where the panel's figures are numbers that give one."""
    try:
        return transmit_power(panel, band)
    except (ValueError, OverflowError):
        return None


def port_grid(panel: Panel, model: Model) -> Iterator[Drawing]:
    """Ports of an active array as a grid of sub-arrays, two polarisations each."""
    stated = panel.get("transceivers", model.band)
    if stated is None or isinstance(stated.value, str) or not 0 < stated.nominal <= _MOST_PORTS:
        return
    rows, columns = model.layout.port_rows, model.layout.port_columns
    ports = rows * columns * 2
    same = "as" if ports == round(stated.nominal) else "while"
    yield Drawing(
        kind="port-map",
        title=f"{rows} × {columns} sub-arrays in two polarisations make {ports} ports, "
        f"{same} {stated.nominal:.0f} transceivers are stated",
        text=f"Grid of {rows} rows and {columns} columns of sub-arrays with {model.layout.subarray_rows} × "
        f"{model.layout.subarray_columns} element positions each, both polarisations.",
        band=model.band,
        marks={"grid_rows": rows, "grid_columns": columns, "stated_ports": stated.nominal},
        where=tuple(dict.fromkeys((*(r.where for r in model.used), stated.where))),
    )


def port_map(panel: Panel) -> Iterator[Drawing]:
    """Ports by band of a passive panel, where they are stated by band."""
    found = [(band, panel.get("ports_per_band", band)) for band in panel.bands]
    stated = [(b, r) for b, r in found if r is not None and _is_count(r)]
    if not stated or len(stated) != len(found):
        return
    total = panel.get("rf_ports")
    marks: dict[str, float] = {}
    together = 0.0
    for i, (band, reading) in enumerate(stated, start=1):
        marks |= {
            f"band_{i}_low_mhz": band[0],
            f"band_{i}_high_mhz": band[1],
            f"band_{i}_ports": reading.nominal,
        }
        together += reading.nominal
    title = f"{together:.0f} ports over {len(stated)} band{'s' if len(stated) > 1 else ''}"
    where = [reading.where for _, reading in stated]
    if total is not None and _is_count(total):
        marks["stated_ports"] = total.nominal
        title += f"; {total.nominal:.0f} are stated for the panel"
        where.append(total.where)
    text = "; ".join(f"{mhz(band)}: {reading.nominal:.0f} ports" for band, reading in stated)
    yield Drawing(
        kind="port-map", title=title, text=f"{text}.", marks=marks, where=tuple(dict.fromkeys(where))
    )


def _is_count(reading: Reading) -> bool:
    return not isinstance(reading.value, str) and 0 < reading.nominal <= _MOST_PORTS
