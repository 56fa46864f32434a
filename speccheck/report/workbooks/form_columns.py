"""Columns of a bid form: a parameter, and the condition that a tender demands its figure under."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass

from speccheck.dictionary import Parameter, parameters
from speccheck.records import Requirement

_KMH_PER_MPS = 3.6
_ANSWERED_BY = {"frequency_range": "operating_bands"}
"""A row of the form is a band: a second column of frequencies would ask for the same again."""


@dataclass(frozen=True, slots=True)
class Asked:
    """A column of the form; `requirements` are the rows it answers."""

    parameter: Parameter
    condition: str = ""
    requirements: tuple[Requirement, ...] = ()


def condition_of(requirement: Requirement) -> str:
    """Words for a heading that make a figure comparable: 'at 150 km/h', 'at 2 x 43 dBm', 'at 60°'."""
    at = requirement.at
    if "wind_speed_mps" in at:
        return f"at {round(at['wind_speed_mps'] * _KMH_PER_MPS, 1):g} km/h"
    if "carrier_dbm" in at:
        return f"at 2 x {at['carrier_dbm']:.4g} dBm"
    if "angle_deg" in at:
        return f"at {abs(at['angle_deg']):g}°"
    return ""


def answering_key(requirement: Requirement) -> str:
    """Key of the column that a requirement is answered in."""
    return _ANSWERED_BY.get(requirement.parameter, requirement.parameter)


def asked_columns(keys: Sequence[str], requirements: Iterable[Requirement]) -> Iterator[Asked]:
    """One column a parameter, or one for each condition its figure is demanded under."""
    by_key: dict[str, dict[str, list[Requirement]]] = {}
    for requirement in requirements:
        spoken = by_key.setdefault(answering_key(requirement), {})
        spoken.setdefault(condition_of(requirement), []).append(requirement)
    for key in keys:
        for condition, rows in by_key.get(key, {"": []}).items():
            yield Asked(parameters()[key], condition, tuple(rows))
