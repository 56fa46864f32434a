"""What a clause says once read: parameter, operator, limit, statistic, scope, level, doubts, unread words."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from speccheck.records import Band, Level, Value
from speccheck.records.demands import doubt, doubt_code


@dataclass(frozen=True, slots=True, kw_only=True)
class Clause:
    """One demand of a clause; `limit` is in the unit of the wording, `level` None if none was said."""

    parameter: str = ""
    operator: str = ""
    limit: Value | None = None
    unit: str = ""
    statistic: str = ""
    bands: tuple[Band, ...] = ()
    scope: str = ""
    at: Mapping[str, float] = field(default_factory=dict)
    level: Level | None = None
    doubts: tuple[str, ...] = ()
    unread: str = ""

    def doubting(self, *codes: str, detail: str = "") -> Clause:
        """The same clause with further doubts, none twice."""
        more = tuple(doubt(code, detail) for code in codes)
        return replace(self, doubts=tuple(dict.fromkeys((*self.doubts, *more))))

    def without(self, code: str) -> Clause:
        """The same clause without the doubt of one code."""
        return replace(self, doubts=tuple(text for text in self.doubts if doubt_code(text) != code))

    @property
    def codes(self) -> tuple[str, ...]:
        """Code words of the doubts."""
        return tuple(doubt_code(text) for text in self.doubts)
