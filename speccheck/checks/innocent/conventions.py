"""Conventions: other readings of the same cells, as their author may have meant them.

Each is a pure transform of a panel, registered with the question that names it. `offering` tries them.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, replace

from speccheck.records import Band, Panel, Reading

Transform = Callable[[Panel, "Reach"], Panel]


@dataclass(frozen=True, slots=True)
class Reach:
    """The bands [MHz] a re-reading covers; None for the whole panel."""

    bands: tuple[Band, ...] | None = None

    def covers(self, reading: Reading) -> bool:
        """Whether a reading is re-read."""
        return self.bands is None or reading.band in self.bands


@dataclass(frozen=True, slots=True)
class InnocentReading:
    """A named convention: the question that names it, the parameters it re-reads, the transform.

    `likely` tells of a panel whether its figures themselves point to this reading; it then goes before
    others that repair as much.
    """

    name: str
    ask: str
    parameters: tuple[str, ...]
    reread: Transform
    likely: Callable[[Panel], bool]


INNOCENT_READINGS: dict[str, InnocentReading] = {}


def _never(panel: Panel) -> bool:  # noqa: ARG001
    return False


def innocent(
    name: str, ask: str, *parameters: str, likely: Callable[[Panel], bool] = _never
) -> Callable[[Transform], Transform]:
    """Register a convention; `ask` completes 'Please confirm whether …'.

    Raises
    ------
    ValueError : a name registered twice
    """

    def register(reread: Transform) -> Transform:
        if name in INNOCENT_READINGS:
            raise ValueError(f"innocent reading '{name}' is registered twice")
        INNOCENT_READINGS[name] = InnocentReading(name, ask, parameters, reread, likely)
        return reread

    return register


def reread(panel: Panel, reach: Reach, keys: tuple[str, ...], change: Callable[[Reading], Reading]) -> Panel:
    """A panel with the certain numeric readings of `keys` inside `reach` changed."""

    def one(reading: Reading) -> Reading:
        mine = reading.parameter in keys and reading.certain and reach.covers(reading)
        return change(reading) if mine and not isinstance(reading.value, str) else reading

    return replace(panel, readings=tuple(one(r) for r in panel.readings))


def shifted(offset: float) -> Callable[[Reading], Reading]:
    """A change that adds `offset` in the reading's unit."""
    return lambda reading: replace(reading, value=_each(reading, lambda v: v + offset))


def scaled(factor: float) -> Callable[[Reading], Reading]:
    """A change that multiplies by `factor`."""
    return lambda reading: replace(reading, value=_each(reading, lambda v: v * factor))


def marked(**conditions: float) -> Callable[[Reading], Reading]:
    """A change that leaves the figure and adds conditions under which it holds."""
    return lambda reading: replace(reading, at={**reading.at, **conditions})


def _each(reading: Reading, change: Callable[[float], float]) -> float | tuple[float, float]:
    if isinstance(reading.value, tuple):
        return (change(reading.value[0]), change(reading.value[1]))
    return change(float(reading.value))
