"""What one cell says: figures, or a status, and what was left over.

The words of `sense` and `status` are the values of `records.Sense` and `records.Status`; this layer
lies below the records and spells them out.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Literal

Value = float | tuple[float, float] | str
SenseWord = Literal["nominal", "min", "max"]
StatusWord = Literal["missing", "not applicable", "to be advised", "referred", "declared"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Quantity:
    """One figure of a cell, in the unit written there.

    `unit` is the spelling of `units`, taken from the cell, else from its heading, else empty.
    `at` holds conditions with the unit in the name: ``tilt_deg``, ``angle_deg``, ``frequency_mhz``,
    ``frequency_low_mhz`` and ``frequency_high_mhz``, ``carrier_dbm``, ``wind_speed_mps``,
    ``temperature_c``, ``count`` (the 4 of '4 × 40 W').
    `alternatives` lists every reading of an ambiguous figure, `value` among them.
    `parameter` names another parameter where a cell speaks of one beside its own, such as the number
    of ports in '2 x 4.3-10 female'. After `settle` the unit is the parameter's, and `stated_value`
    and `stated_unit` keep what was written.
    """

    value: Value
    unit: str = ""
    tolerance: float | None = None
    sense: SenseWord = "nominal"
    statistic: str = ""
    alternatives: tuple[Value, ...] = ()
    at: Mapping[str, float] = field(default_factory=dict)
    condition: str = ""
    parameter: str = ""
    stated_value: Value | None = None
    stated_unit: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class CellContent:
    """The figures of a cell, or its status; `rest` is what was not understood.

    `footnotes` are the markers found, such as ``1`` of '17.5 1)'; `notes` say how a reading came
    about where that is not plain.
    """

    quantities: tuple[Quantity, ...] = ()
    status: StatusWord | None = None
    rest: str = ""
    footnotes: tuple[str, ...] = ()
    notes: tuple[str, ...] = ()
