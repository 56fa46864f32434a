"""Case files of the checks: small panels in the bidder's own figures and the verdict they deserve.

One file a check, ``<slug>.toml``; `test_cases.py` runs them all. A file looks so:

    check = "gain-fits-geometry"

    [[case]]
    name = "8 × 8 positions cannot give 26.8 dBi"
    source = "array theory, any antenna handbook: 4π·area/λ²"      # where the expectation comes from
    worked_example = true      # the example of the docstring: each text in `says` stands in both
    [case.panel]               # readings of the whole panel, by dictionary key
    frequency_range = [3300, 3800]          # two numbers: a range; a number: in the dictionary's unit
    array_rows = 8
    vertical_element_spacing = "0.7 λ"      # '<number> <unit>': λ at the middle of the frequency range
    horizontal_element_spacing = { value = 0.5, unit = "λ", at = { frequency_mhz = 3400 } }
    gain = [{ value = 26.8, at = { tilt_deg = 2 } }, { value = 26.8, at = { tilt_deg = 10 } }]
    electrical_tilt = { value = [0, 10], sense = "nominal", tolerance = 1, condition = "…", raw = "…" }
    front_to_back_ratio = "TBD"             # text without a number for a numeric key: a statement
    vswr = { value = "comply", declared = true }   # a statement that declares without a figure
    operating_bands = "n78"                 # a named band is a reading
    [case.bands."1710-2170"]   # readings of one band
    gain = 17.1
    [case.expect]
    verdict = "does not fit"   # fits | doubtful | does not fit | not judged | not applicable
    band = [1710, 2170]        # which finding, where a check judges by band (default: the first found)
    claimed = 26.8             # all of the following are optional
    low = [24.0, 0.3]          # edge of the expected interval: value and how far off it may be
    high = [25.1, 0.3]
    says = ["0.70 λ"]          # texts that stand in summary, working, assumptions or question
    step = { "Spacing at the top of the band" = [0.752, 0.005] }   # working by label
    missing = ["vertical_beamwidth"]        # what a finding 'not judged' must name
    readings = ["both polarisations added"] # innocent readings that must be offered, by name
    first = "both polarisations added"      # the one that must come first
    no_readings = true                      # says that none of the readings tried fits
    others = { "array-fits-housing" = "fits" }   # verdicts of other checks on the same panel

Expectations come from a handbook, a standard or arithmetic by hand, never from the program.
"""

from __future__ import annotations

import tomllib
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from speccheck.dictionary import parameters
from speccheck.records import Band, CellRef, Panel, Reading, Sense, Statement, Status, Value

FOLDER = Path(__file__).parent
SPEED_OF_LIGHT_MPS = 299_792_458.0
FACTORS = {
    "": 1.0,
    "mm": 1e-3,
    "cm": 1e-2,
    "in": 0.0254,
    "GHz": 1e3,
    "km/h": 1 / 3.6,
    "kW": 1e3,
    "kN": 1e3,
}


@dataclass(frozen=True)
class CheckCase:
    """One case of one file; `expect` as documented above."""

    check: str
    name: str
    source: str
    panel: Panel
    expect: dict[str, Any]
    worked_example: bool

    def __str__(self) -> str:
        return f"{self.check}: {self.name}"


def all_cases() -> list[CheckCase]:
    return [case for path in sorted(FOLDER.glob("*.toml")) for case in cases_of(path)]


def cases_of(path: Path) -> list[CheckCase]:
    table = tomllib.loads(path.read_text(encoding="utf-8"))
    assert table["check"] == path.stem, f"{path.name} is about {table['check']}"
    return [
        CheckCase(
            check=table["check"],
            name=case["name"],
            source=case["source"],
            panel=panel_of(case.get("panel", {}), case.get("bands", {})),
            expect=case["expect"],
            worked_example=case.get("worked_example", False),
        )
        for case in table["case"]
    ]


def panel_of(
    whole: dict[str, Any], bands: dict[str, dict[str, Any]] | None = None, name: str = "Case panel"
) -> Panel:
    """A panel from plain tables; each figure gets a cell of its own.

    As in a sheet: where one frequency range is the only band, figures by band belong to it.
    """
    edges = {_edges(text): table for text, table in (bands or {}).items()}
    ranges = _listed(whole.get("frequency_range", []))
    only = _range(ranges[0]) if not edges and len(ranges) == 1 else None
    middle = _middle(only or next(iter(edges), None))
    entries: list[tuple[Band | None, str, Any]] = []
    for key, given in whole.items():
        by_band = only is not None and parameters()[key].scope == "band"
        entries += [(only if by_band else None, key, one) for one in _listed(given)]
    if only:
        entries.append((only, "operating_bands", list(only)))
    for band, table in edges.items():
        entries += [(band, key, one) for key, given in table.items() for one in _listed(given)]
    readings: list[Reading] = []
    statements: list[Statement] = []
    for row, (band, key, given) in enumerate(entries, start=2):
        where = CellRef("case.xlsx", "Case", f"B{row}")
        made = _entry(key, given, band, where, _middle(band) or middle)
        (readings if isinstance(made, Reading) else statements).append(made)  # type: ignore[arg-type]
    place = CellRef("case.xlsx", "Case", "A1")
    return Panel(name=name, where=place, readings=tuple(readings), statements=tuple(statements))


def _entry(
    key: str, given: Any, band: Band | None, where: CellRef, middle_mhz: float | None
) -> Reading | Statement:
    parameter = parameters()[key]
    table = dict(given) if isinstance(given, dict) else {"value": given}
    value, unit = table["value"], table.get("unit", "")
    written = value if isinstance(value, str) else f"{_printed(value)} {unit}".strip()
    number, _, tail = str(value).partition(" ") if isinstance(value, str) else ("", "", "")
    named = parameter.kind == "bands" and not _is_number(number) and "declared" not in table
    if isinstance(value, str) and parameter.kind not in ("text", "connectors") and not named:
        if not _is_number(number):
            status = Status.DECLARED if table.get("declared") else Status.TO_BE_ADVISED
            return Statement(where=where, parameter=key, raw=value, status=status, band=band, heading=key)
        value, unit = float(number), tail
    at = {name: float(figure) for name, figure in table.get("at", {}).items()}
    return Reading(
        where=where,
        parameter=key,
        raw=table.get("raw", written),
        value=_in_dictionary_unit(value, unit, at.get("frequency_mhz", middle_mhz)),
        unit=parameter.unit,
        band=band,
        tolerance=table.get("tolerance"),
        sense=Sense(table.get("sense", "nominal")),
        statistic=table.get("statistic", ""),
        stated_value=tuple(value) if isinstance(value, list) else value,
        stated_unit=unit,
        condition=table.get("condition", ""),
        at=at,
        heading=table.get("heading", parameter.label),
        recognised=parameter.label,
        alternatives=tuple(table.get("alternatives", ())),
    )


def _in_dictionary_unit(value: Any, unit: str, frequency_mhz: float | None) -> Value:
    if isinstance(value, str):
        return value
    if unit in ("λ", "wl"):
        assert frequency_mhz, "a spacing in λ needs a frequency"
        factor = SPEED_OF_LIGHT_MPS / (frequency_mhz * 1e6)
    else:
        factor = FACTORS.get(unit, 1.0)
    if isinstance(value, list):
        return (float(value[0]) * factor, float(value[1]) * factor)
    return float(value) * factor


def _printed(value: Any) -> str:
    return "–".join(f"{v:g}" for v in value) if isinstance(value, list) else str(value)


def _is_number(text: str) -> bool:
    try:
        float(text)
    except ValueError:
        return False
    return True


def _listed(given: Any) -> list[Any]:
    """Several readings of one parameter: a list of tables or of ranges; else the one."""
    if isinstance(given, list) and given and isinstance(given[0], dict | list):
        return given
    return [given] if given != [] else []


def _range(given: Any) -> Band:
    value = given["value"] if isinstance(given, dict) else given
    factor = FACTORS[given.get("unit", "")] if isinstance(given, dict) else 1.0
    return (float(value[0]) * factor, float(value[1]) * factor)


def _edges(text: str) -> Band:
    low, _, high = text.partition("-")
    return (float(low), float(high))


def _middle(band: Band | None) -> float | None:
    return None if band is None else (band[0] + band[1]) / 2
