"""Readings in the making: what a cell says, before the whole panel has settled band and tolerance."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from speccheck.intake.panels.open_records import open_class
from speccheck.quantities import Quantity, UnknownUnitError, convert
from speccheck.records import Band, CellRef, Reading, Sense, Statement, Unread, Value

_OpenReading = open_class(Reading)


@dataclass(frozen=True, slots=True)
class Figure:
    """A quantity settled in its parameter's unit: all of a reading that does not depend on place and band."""

    parameter: str
    quantity: Quantity
    unit: str
    sense: Sense
    statistic: str
    recognised: str
    condition: str
    at: Mapping[str, float]
    band: Band | None
    """Band that the cell or heading itself names."""


@dataclass(slots=True)
class Found:
    """A reading in the making: band, tolerance and notes may still change."""

    where: CellRef
    raw: str
    heading: str
    figure: Figure
    parameter: str
    value: Value
    band: Band | None
    tolerance: float | None
    remark: str = ""
    recognised: str = ""
    at: Mapping[str, float] | None = None

    def also(self, parameter: str, band: Band | None) -> Found:
        """The same figure said of another parameter or band."""
        return Found(
            self.where,
            self.raw,
            self.heading,
            self.figure,
            parameter,
            self.value,
            band,
            self.tolerance,
            self.remark,
            self.recognised,
            self.at,
        )

    def take_statistic(self, word: str) -> None:
        """Take what the heading says of this figure of several: ``min``, ``typical``, ``mean`` or ``max``."""
        bounds = word in ("min", "max")
        sense = Sense(word) if bounds else Sense.NOMINAL
        self.figure = replace(self.figure, sense=sense, statistic="" if bounds else word)

    def reading(self) -> Reading:
        """The finished reading."""
        figure, quantity = self.figure, self.figure.quantity
        condition = figure.condition
        if self.remark:
            condition = f"{condition}; {self.remark}" if condition else self.remark
        reading = object.__new__(_OpenReading)
        reading.where = self.where
        reading.parameter = self.parameter
        reading.raw = self.raw
        reading.value = self.value
        reading.unit = figure.unit
        reading.band = self.band
        reading.tolerance = self.tolerance
        reading.sense = figure.sense
        reading.statistic = figure.statistic
        reading.stated_value = quantity.stated_value
        reading.stated_unit = quantity.stated_unit
        reading.condition = condition
        reading.at = {**figure.at, **self.at} if self.at else figure.at
        reading.heading = self.heading
        reading.recognised = self.recognised or figure.recognised
        reading.alternatives = quantity.alternatives
        reading.__class__ = Reading
        closed: Reading = reading
        return closed


@dataclass(slots=True)
class Outcome:
    """What became of one claim."""

    sheet: str
    found: list[Found] = field(default_factory=list)
    statement: Statement | None = None
    unread: Unread | None = None
    footnotes: tuple[str, ...] = ()
    joined: bool = False
    kept: Found | None = None
    """A figure that is no reading until another one completes it."""


def spread(stated: Quantity, of: Found) -> float | None:
    """A tolerance stated apart from its figure, in the figure's unit; None when it cannot be one."""
    amount = stated.tolerance if stated.tolerance is not None else stated.value
    if not isinstance(amount, float) or not isinstance(of.value, float):
        return None
    if stated.unit == "%" and of.figure.unit != "%":
        return abs(of.value * amount / 100)
    if stated.unit in ("", "dB", of.figure.unit):
        return abs(amount)
    try:
        return abs(convert(amount, stated.unit, of.figure.unit) - convert(0.0, stated.unit, of.figure.unit))
    except UnknownUnitError:
        return None
