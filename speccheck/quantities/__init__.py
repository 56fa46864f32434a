"""Cell texts to figures with unit, tolerance, sense and conditions; conversion of units.

`read_cell` understands one cell, `decimal_habit` says how a file writes decimals, `convert` changes
units of one dimension, `settle` brings a figure into a parameter's unit and sign.
"""

from speccheck.quantities.attachments import connector_of_date
from speccheck.quantities.cell import read_cell
from speccheck.quantities.content import CellContent, Quantity
from speccheck.quantities.counts import array_of
from speccheck.quantities.figures import answers
from speccheck.quantities.numerals import NUMERAL_PATTERN, DecimalHabit, decimal_habit, numeral
from speccheck.quantities.settling import settle
from speccheck.quantities.spectrum import band_names
from speccheck.quantities.statuses import status_of
from speccheck.quantities.tidy import split_footnotes, tidy
from speccheck.quantities.units import UNIT_PATTERN, UnknownUnitError, convert, dimension, unit_name

__all__ = [
    "NUMERAL_PATTERN",
    "UNIT_PATTERN",
    "CellContent",
    "DecimalHabit",
    "Quantity",
    "UnknownUnitError",
    "answers",
    "array_of",
    "band_names",
    "connector_of_date",
    "convert",
    "decimal_habit",
    "dimension",
    "numeral",
    "read_cell",
    "settle",
    "split_footnotes",
    "status_of",
    "tidy",
    "unit_name",
]
