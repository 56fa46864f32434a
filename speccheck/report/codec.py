"""Records to plain JSON values and back, field by field after their type hints.

Numbers that are not finite become null. A cell reference leaves out the file where that is the
input file itself.
"""

from __future__ import annotations

import functools
import math
import types
import typing
from collections.abc import Mapping
from dataclasses import MISSING, fields, is_dataclass
from enum import StrEnum
from typing import Any, Union

from speccheck.records import CellRef

Json = Any
"""What json.loads returns: dict, list, str, int, float, bool or None."""

_AS_THEY_ARE = frozenset({str, int, bool, type(None)})


def encode(item: object, home: str) -> Json:
    """Return a record, or any value inside one, as JSON values; `home` is the input file's name.

    Raises
    ------
    TypeError : a type that no record holds
    """
    if item is None or isinstance(item, str | int | float):
        return item if type(item) in _AS_THEY_ARE else _encode_scalar(item)
    if isinstance(item, tuple | list):
        if all(map(_is_plain_number, item)):
            return list(item)
        return [encode(part, home) for part in item]
    if isinstance(item, Mapping):
        return {str(key): encode(part, home) for key, part in item.items()}
    if isinstance(item, CellRef):
        place = {"sheet": item.sheet, "cell": item.cell}
        return place if item.file == home else {"file": item.file, **place}
    return encode_fields(item, home)


def _is_plain_number(item: object) -> bool:
    """Whether an item needs no care; the points of curves are many."""
    return type(item) is float and math.isfinite(item)


def _encode_scalar(item: str | float | None) -> Json:
    if isinstance(item, StrEnum):
        return item.value
    if isinstance(item, float) and not math.isfinite(item):
        return None
    return item


def encode_fields(item: object, home: str, leave_out: frozenset[str] = frozenset()) -> dict[str, Json]:
    """Return the fields of a record by name, without those in `leave_out`."""
    record: type = type(item)
    return {
        name: value if type(value := getattr(item, name)) in _AS_THEY_ARE else encode(value, home)
        for name in _names(record)
        if name not in leave_out
    }


def decode(hint: Any, data: Json, home: str) -> Any:
    """Return `data` as the type that `hint` describes; the inverse of `encode`.

    Raises
    ------
    KeyError, TypeError, ValueError : data that does not have the shape of `hint`
    """
    origin = typing.get_origin(hint)
    if origin in (Union, types.UnionType):
        return _decode_choice(typing.get_args(hint), data, home)
    if origin is tuple:
        return _decode_tuple(typing.get_args(hint), data, home)
    if origin is not None:
        _, value_hint = typing.get_args(hint)
        return {key: decode(value_hint, part, home) for key, part in data.items()}
    if is_dataclass(hint) and isinstance(hint, type):
        return _decode_record(hint, data, home)
    return _decode_scalar(hint, data)


def _decode_record(record: type, data: Json, home: str) -> Any:
    if record is CellRef:
        return CellRef(data.get("file", home), data["sheet"], data["cell"])
    return decode_fields(record, data, home)


def _decode_scalar(hint: type, data: Json) -> Any:
    if issubclass(hint, StrEnum):
        return hint(data)
    if hint is float and data is None:
        return math.nan
    if not isinstance(data, (int, float) if hint is float else hint):
        raise TypeError(f"found {data!r}, expected {hint.__name__}")
    return data


def decode_fields(record: type, data: dict[str, Json], home: str, **given: object) -> Any:
    """Return a record from its fields by name; `given` holds those that are already at hand.

    A field with a default may be absent: an earlier program did not know it.
    """
    wanted = ((name, hint) for name, hint in _hints(record).items() if name not in given)
    optional = _optional(record)
    read = {
        name: decode(hint, data[name], home) for name, hint in wanted if name in data or name not in optional
    }
    return record(**read, **given)


def _decode_choice(hints: tuple[Any, ...], data: Json, home: str) -> Any:
    """Return `data` as the one of several types that its JSON type points at."""
    if data is None:
        return None if type(None) in hints else math.nan
    for hint in hints:
        if hint is not type(None) and _may_be(hint, data):
            return decode(hint, data, home)
    raise ValueError(f"{data!r} is none of {hints}")


def _may_be(hint: Any, data: Json) -> bool:
    """Whether the JSON type of `data` is the one that `hint` is encoded as."""
    if isinstance(data, list):
        return typing.get_origin(hint) is tuple
    if isinstance(data, dict):
        return is_dataclass(hint)
    if isinstance(data, str):
        return isinstance(hint, type) and issubclass(hint, str)
    return hint in (float, int, bool)


def _decode_tuple(hints: tuple[Any, ...], data: Json, home: str) -> tuple[Any, ...]:
    if len(hints) == 2 and hints[1] is Ellipsis:
        return tuple(decode(hints[0], part, home) for part in data)
    return tuple(decode(hint, part, home) for hint, part in zip(hints, data, strict=True))


@functools.cache
def _names(record: type) -> tuple[str, ...]:
    if not is_dataclass(record):
        raise TypeError(f"{record.__name__} is not a record")
    return tuple(field.name for field in fields(record))


@functools.cache
def _optional(record: Any) -> frozenset[str]:
    return frozenset(
        field.name
        for field in fields(record)
        if field.default is not MISSING or field.default_factory is not MISSING
    )


@functools.cache
def _hints(record: type) -> dict[str, Any]:
    return typing.get_type_hints(record)
