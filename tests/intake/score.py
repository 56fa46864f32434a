"""Scores the reader on the corpus: ``python tests/intake/score.py [NAME…] [-v]``.

One line a workbook: figures read right (parameter, panel, band, value, unit, sense, tolerance, cell) of
those expected, and wrong figures presented as certain. The expectations are ``corpus/*.expected.toml``:
a table ``[[panel]]`` with ``name``, ``sheet`` and ``readings``, one figure a line ::

    D6 gain 17.6 ± 0.5 dBi          cell, parameter, figure as a person reads it
    D10 vswr max 1.5                a bound
    D9 electrical_tilt 2..12 deg    a range
    D9 electrical_tilt ? 2..12 deg  may be read so, but not as certain
    B5 vswr : declared              a status without a figure
    C7 - none                       not a claim: nothing may be read from it
    B4 transceivers 64 ~            the band does not matter
    @1710-2690                      band of the lines that follow; @- for none
    B9 electrical_tilt 2..12 deg @694-790    band of this line
"""

from __future__ import annotations

import re
import sys
import tomllib
from dataclasses import dataclass, field
from pathlib import Path

from speccheck.intake.submission import read_submission
from speccheck.records import Panel, Reading, Submission

CORPUS = Path(__file__).parent / "corpus"
RELATIVE = 1e-4

# Expected figures may be in another unit than the parameter's; exact factors (NIST SP 811).
FACTORS = {"mm": 1e-3, "km/h": 1 / 3.6, "": 1.0}

_LINE = re.compile(r"(?P<cell>[A-Z]+\d+) (?P<key>\S+) (?P<rest>.+)")
_FIGURE = re.compile(
    r"(?P<doubt>\? )?(?P<sense>min |max )?(?P<low>-?[\d.]+?)(?:\.\.(?P<high>-?[\d.]+))?"
    r"(?: ± (?P<tolerance>[\d.]+))?(?: (?P<unit>[^\s@~]+))?"
)


@dataclass(frozen=True)
class Expected:
    """One line of an expectation."""

    panel: str
    sheet: str
    cell: str
    key: str
    band: tuple[float, float] | None
    any_band: bool = False
    value: float | tuple[float, float] | str | None = None
    tolerance: float | None = None
    sense: str = "nominal"
    status: str = ""
    doubtful: bool = False


@dataclass
class Score:
    """Result for one file."""

    file: str
    right: int = 0
    total: int = 0
    wrong: list[str] = field(default_factory=list)
    missed: list[str] = field(default_factory=list)


def expectations(path: Path) -> list[Expected]:
    """All lines of one expectation file."""
    result = []
    for panel in tomllib.loads(path.read_text(encoding="utf-8"))["panel"]:
        band: tuple[float, float] | None = None
        for line in panel["readings"].strip().splitlines():
            if line.startswith("@"):
                band = _band(line[1:])
            else:
                result.append(_expected(line, panel, band))
    return result


def _band(text: str) -> tuple[float, float] | None:
    low, _, high = text.strip().partition("-")
    return (float(low), float(high)) if low else None


def _expected(line: str, panel: dict[str, str], band: tuple[float, float] | None) -> Expected:
    match = _LINE.match(line)
    if not match:
        raise ValueError(f"not understood: {line}")
    rest = match["rest"]
    any_band = rest.endswith(" ~")
    rest, _, own = rest.removesuffix(" ~").partition(" @")
    band = _band(own) if own else band
    common = (panel["name"], panel.get("sheet", ""), match["cell"], match["key"], band, any_band)
    if rest == "none":
        return Expected(*common, status="none")
    if rest.startswith(": "):
        return Expected(*common, status=rest[2:])
    if rest.startswith("'"):
        return Expected(*common, value=rest.strip("'"))
    figure = _FIGURE.fullmatch(rest)
    if not figure:
        raise ValueError(f"not understood: {line}")
    factor = FACTORS.get(figure["unit"] or "", 1.0)
    low = float(figure["low"]) * factor
    return Expected(
        *common,
        value=(low, float(figure["high"]) * factor) if figure["high"] else low,
        tolerance=float(figure["tolerance"]) if figure["tolerance"] else None,
        sense=(figure["sense"] or "nominal").strip(),
        doubtful=bool(figure["doubt"]),
    )


def score(path: Path, expected: list[Expected]) -> Score:
    """Compare a file's readings with what is expected."""
    submission = read_submission(path)
    result = Score(path.name)
    judged: set[tuple[str, str, str]] = set()
    for item in expected:
        result.total += 1
        judged.add((item.panel, item.cell, item.key))
        problem = _judge(item, submission)
        if problem:
            result.missed.append(f"{item.cell} {item.key}: {problem}")
        else:
            result.right += 1
    result.wrong = [
        f"{r.where.cell} {r.parameter} = {r.value}"
        for panel in submission.panels
        for r in panel.readings
        if r.certain and _contradicts(panel, r, expected)
    ]
    return result


def _judge(item: Expected, submission: Submission) -> str:
    panels = [p for p in submission.panels if p.name == item.panel]
    if not panels:
        return f"no panel {item.panel}, there are {[p.name for p in submission.panels]}"
    panel = panels[0]
    here = [r for r in panel.readings if r.where.cell == item.cell and item.sheet in ("", r.where.sheet)]
    if item.status == "none":
        return "" if not here else f"read as {here[0].parameter}"
    if item.status:
        said = [s for s in panel.statements if s.where.cell == item.cell and s.parameter == item.key]
        found = [s for s in said if s.status == item.status]
        return "" if found else f"status {[str(s.status) for s in said]}, readings {[r.value for r in here]}"
    own = [r for r in here if r.parameter == item.key]
    if any(_same(item, r) for r in own):
        return ""
    return f"wanted {item.value} {item.band}, found {[_shown(r) for r in own] or 'nothing'}"


def _same(item: Expected, reading: Reading) -> bool:
    band = item.any_band or reading.band == item.band
    sense = reading.sense == item.sense
    certain = reading.certain is not item.doubtful
    return band and sense and certain and _value(item, reading) and _tolerance(item, reading)


def _value(item: Expected, reading: Reading) -> bool:
    if isinstance(item.value, str) or isinstance(reading.value, str):
        return item.value == reading.value
    wanted = item.value if isinstance(item.value, tuple) else (item.value,)
    found = reading.value if isinstance(reading.value, tuple) else (reading.value,)
    return len(wanted) == len(found) and all(
        w is not None and abs(w - f) <= RELATIVE * max(abs(w), 1e-9)
        for w, f in zip(wanted, found, strict=True)
    )


def _tolerance(item: Expected, reading: Reading) -> bool:
    if item.tolerance is None or reading.tolerance is None:
        return item.tolerance is None and reading.tolerance is None
    return abs(item.tolerance - reading.tolerance) < 1e-6


def _contradicts(panel: Panel, reading: Reading, expected: list[Expected]) -> bool:
    """A certain reading of a parameter and cell that the expectation names with another value."""
    rivals = [
        e for e in expected if (e.panel, e.cell, e.key) == (panel.name, reading.where.cell, reading.parameter)
    ]
    return bool(rivals) and not any(_same(e, reading) for e in rivals)


def _shown(reading: Reading) -> str:
    bits = [str(reading.value), str(reading.band), str(reading.sense), f"± {reading.tolerance}"]
    return " ".join([*bits, "" if reading.certain else "uncertain"])


def corpus(names: list[str]) -> list[tuple[Path, Path]]:
    """Input files with their expectations, all or those whose names begin as given."""
    pairs = []
    for expected in sorted(CORPUS.glob("*.expected.toml")):
        stem = expected.name.removesuffix(".expected.toml")
        (source,) = [p for p in CORPUS.glob(f"{stem}.*") if p != expected]
        if not names or any(stem.startswith(name) for name in names):
            pairs.append((source, expected))
    return pairs


def main(arguments: list[str]) -> int:
    """Print the score per workbook and in all; 0 when at least 97 % are right and none is wrong."""
    names = [a for a in arguments if not a.startswith("-")]
    results = [score(source, expectations(expected)) for source, expected in corpus(names)]
    for result in results:
        share, wrong = 100 * result.right / result.total, len(result.wrong)
        print(f"{result.file:38} {result.right:4} of {result.total:4} {share:6.1f} %, wrong {wrong}")
        if "-v" in arguments:
            for line in (*result.missed, *(f"WRONG {w}" for w in result.wrong)):
                print(f"    {line}")
    right, total = sum(r.right for r in results), sum(r.total for r in results)
    wrong = sum(len(r.wrong) for r in results)
    print(f"{'all':38} {right:4} of {total:4} {100 * right / total:6.1f} %, wrong {wrong}")
    return 0 if right >= 0.97 * total and not wrong else 1


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
