"""Records made by the ten thousand: filled while still open, then closed for good.

A frozen record is filled by one call of `object.__setattr__` a field, which took a fifth of the time of
reading a catalogue. An open one is an ordinary class with the same slots: it is filled two to three times as
fast, and closed by taking the class of the record.
"""

from __future__ import annotations

from dataclasses import fields, make_dataclass
from typing import Any

from speccheck.intake.files.grid import Raw
from speccheck.records import CellRef, MirrorCell


def open_class(record: type) -> Any:
    """The slots of a frozen record in an ordinary class, whose objects take `record` as class when full.

    Every field must be set, those with defaults too.
    """
    slots = [(field.name, field.type) for field in fields(record)]
    return make_dataclass(f"_Open{record.__name__}", slots, slots=True)


_OpenCellRef, _OpenMirrorCell = open_class(CellRef), open_class(MirrorCell)
_new = object.__new__


def cell_ref(file: str, sheet: str, cell: str) -> CellRef:
    """The reference of a cell."""
    open_ref = _new(_OpenCellRef)
    open_ref.file = file
    open_ref.sheet = sheet
    open_ref.cell = cell
    open_ref.__class__ = CellRef
    closed: CellRef = open_ref
    return closed


def mirror_cell(cell: str, raw: Raw, text: str, formula: str) -> MirrorCell:
    """A cell as it stood: a number as it is, anything else as text; a truth value is an int to isinstance."""
    open_cell = _new(_OpenMirrorCell)
    open_cell.cell = cell
    open_cell.value = raw if type(raw) is int or type(raw) is float else text
    open_cell.formula = formula
    open_cell.__class__ = MirrorCell
    closed: MirrorCell = open_cell
    return closed
