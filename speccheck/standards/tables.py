"""Published tables the checks stand on: operating bands, CSI-RS port layouts, base-station classes.

Each row keeps its source, edition and how far it was verified. Files are read once, when first asked for.
"""

from __future__ import annotations

import csv
import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cache
from importlib import resources

from speccheck.records import Band

_BAND_NAME = re.compile(
    r"^\s*(?:(?:nr|5g|lte|e-?utra|4g)?[\s-]*band[\s-]*)?(n|b)?\s*0*(\d{1,3})\s*$", re.IGNORECASE
)


@dataclass(frozen=True, slots=True, kw_only=True)
class OperatingBand:
    """One 3GPP operating band; spans in [MHz], None where the band has no such direction."""

    name: str
    rat: str
    uplink: Band | None
    downlink: Band | None
    duplex: str
    frequency_range: str
    source: str
    edition: str
    confidence: str
    note: str = ""

    @property
    def spans(self) -> tuple[Band, ...]:
        """The separate spans [MHz] an antenna for this band must cover, lowest first."""
        return tuple(sorted({s for s in (self.uplink, self.downlink) if s is not None}))

    @property
    def low_mhz(self) -> float:
        """Lowest edge [MHz]."""
        return min(low for low, _ in self.spans)

    @property
    def high_mhz(self) -> float:
        """Highest edge [MHz]."""
        return max(high for _, high in self.spans)

    @property
    def reversed_duplex(self) -> bool:
        """Whether the downlink lies below the uplink (n13, n14, n20, n24, n71, n105 ...)."""
        return self.uplink is not None and self.downlink is not None and self.downlink < self.uplink

    @property
    def satellite(self) -> bool:
        """Whether the band serves satellites and not terrestrial panels."""
        return self.frequency_range.startswith("NTN")


@dataclass(frozen=True, slots=True, kw_only=True)
class PortLayout:
    """One supported codebook layout: ports = 2 · n1 · n2 · panels (n1 along the row, n2 along the column)."""

    codebook: str
    ports: int
    panels: int
    n1: int
    n2: int
    o1: int
    o2: int
    source: str
    edition: str
    confidence: str
    note: str = ""

    @property
    def warn_only(self) -> bool:
        """Whether the row may only support a remark, never a misfit."""
        return self.note.startswith("warn only")


@dataclass(frozen=True, slots=True, kw_only=True)
class PowerClass:
    """A limit of a base-station class; `limit` None where the standard sets no upper limit."""

    equipment: str
    name: str
    quantity: str
    limit: float | None
    unit: str
    per_counted_unit: bool
    condition: str
    source: str
    edition: str
    confidence: str


def _rows(file: str) -> Iterator[Mapping[str, str]]:
    text = resources.files("speccheck").joinpath("data", file).read_text(encoding="utf-8")
    return csv.DictReader(text.splitlines())


def _span(low: str, high: str) -> Band | None:
    return (float(low), float(high)) if low else None


@cache
def operating_bands() -> Mapping[str, OperatingBand]:
    """All bands by name (``n78`` for NR, ``B42`` for E-UTRA).

    Source: 3GPP TS 38.104 Tables 5.2-1 and 5.2-2, TS 36.104 Table 5.5-1; edition in each row.
    """
    return {
        row["band"]: OperatingBand(
            name=row["band"],
            rat=row["rat"],
            uplink=_span(row["ul_low_mhz"], row["ul_high_mhz"]),
            downlink=_span(row["dl_low_mhz"], row["dl_high_mhz"]),
            duplex=row["duplex_mode"],
            frequency_range=row["frequency_range"],
            source=row["source"],
            edition=row["edition"],
            confidence=row["confidence"],
            note=row["note"],
        )
        for row in _rows("operating_bands.csv")
    }


def operating_band(name: str) -> OperatingBand | None:
    """The band a name means, or None: ``n78``, ``N78``, ``B42``, ``Band 7``, ``LTE band 20``, ``NR band n1``.

    A bare number and ``Band 7`` mean the E-UTRA band, ``n`` or a mention of NR or 5G the NR band.
    """
    match = _BAND_NAME.match(name)
    if match is None:
        return None
    letter = (match[1] or ("n" if re.match(r"\s*(nr|5g)", name, re.IGNORECASE) else "B")).lower()
    return operating_bands().get(f"{'n' if letter == 'n' else 'B'}{int(match[2])}")


def covers(band: OperatingBand, ranges: tuple[Band, ...], slack_mhz: float = 0.0) -> bool:
    """Whether every span of `band` lies inside one of `ranges` [MHz], within `slack_mhz` [MHz]."""
    joined = union(ranges)
    return all(
        any(low >= r[0] - slack_mhz and high <= r[1] + slack_mhz for r in joined) for low, high in band.spans
    )


def bands_within(low_mhz: float, high_mhz: float, rat: str = "NR") -> tuple[OperatingBand, ...]:
    """Terrestrial bands of `rat` that lie wholly between two frequencies [MHz], by lowest edge."""
    inside = (
        band
        for band in operating_bands().values()
        if band.rat == rat and not band.satellite and low_mhz <= band.low_mhz and band.high_mhz <= high_mhz
    )
    return tuple(sorted(inside, key=lambda band: (band.low_mhz, band.high_mhz)))


def union(ranges: tuple[Band, ...]) -> tuple[Band, ...]:
    """Ranges [MHz] with overlapping and touching ones joined, lowest first."""
    joined: list[Band] = []
    for low, high in sorted(ranges):
        if joined and low <= joined[-1][1]:
            joined[-1] = (joined[-1][0], max(joined[-1][1], high))
        else:
            joined.append((low, high))
    return tuple(joined)


@cache
def port_layouts() -> tuple[PortLayout, ...]:
    """All codebook layouts. Source: 3GPP TS 38.214 clauses 5.2.2.2.1 and 5.2.2.2.2."""
    return tuple(
        PortLayout(
            codebook=row["codebook"],
            ports=int(row["csi_rs_ports"]),
            panels=int(row["panels"]),
            n1=int(row["n1"]),
            n2=int(row["n2"]),
            o1=int(row["o1"]),
            o2=int(row["o2"]),
            source=row["source"],
            edition=row["edition"],
            confidence=row["confidence"],
            note=row["note"],
        )
        for row in _rows("port_layouts.csv")
    )


def layouts(ports: int, panels: int | None = None) -> tuple[PortLayout, ...]:
    """Layouts with so many CSI-RS ports, of one number of panels if given; empty if there is none."""
    return tuple(x for x in port_layouts() if x.ports == ports and panels in (None, x.panels))


@cache
def power_classes() -> tuple[PowerClass, ...]:
    """Limits of the base-station classes. Source: 3GPP TS 38.104 clauses 6.2 and 9.3."""
    return tuple(
        PowerClass(
            equipment=row["equipment"],
            name=row["class"],
            quantity=row["quantity"],
            limit=float(row["limit"]) if row["limit"] else None,
            unit=row["unit"],
            per_counted_unit=row["per_counted_unit"] == "yes",
            condition=row["condition"],
            source=row["source"],
            edition=row["edition"],
            confidence=row["confidence"],
        )
        for row in _rows("power_classes.csv")
    )
