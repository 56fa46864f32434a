"""Headings over several figures: 'Dimensions H×W×D', 'HPBW (H x V)', 'rows x columns x pol'."""

from __future__ import annotations

import re

from speccheck.dictionary.folding import fold, heading_words, without_neutral, word_list
from speccheck.dictionary.index import find, listed
from speccheck.dictionary.parameters import parameters
from speccheck.quantities import dimension, unit_name

_BRACKETS = re.compile(r"[\[(]([^\[\]()]*)[\])]")
_BETWEEN = (
    r"\s*[×*]\s*|\s+x\s+|\s*/\s*|\s*\|\s*|\s+by\s+|\s*&\s*|\s*\+\s*|\s+(?:and|und|et|y|e|i|en)\s+"
    r"|(?<=\b\w)x(?=\w\b)"
)
_PARTS = re.compile(_BETWEEN, re.IGNORECASE)
_COMMA_PARTS = re.compile(_BETWEEN + r"|\s*,\s+", re.IGNORECASE)
_STATES = re.compile(r"(?:\bby\b|\bper\b|,)[^/×*|&+]*$", re.IGNORECASE)
_OF_STATE = frozenset({"beam_count", "electrical_tilt", "tilt_steps", "operating_bands", "frequency_range"})
"""Behind a comma or 'by' they say for which beam, tilt or band a figure holds."""
_LETTERS = re.compile(r"\b([a-z])\s*[x×*/,]\s*([a-z])(?:\s*[x×*/,]\s*([a-z]))?\b", re.IGNORECASE)
_DIMENSIONS = {"high": "height", "wide": "width", "deep": "depth"}
_ARRAY = {
    "rows": "array_rows",
    "columns": "array_columns",
    "poles": "polarisations",
    "vertical": "array_rows",
    "horizontal": "array_columns",
}


def composite(text: str) -> str:
    """Parameter keys joined by ``+`` in the order of the heading's parts; empty if it has none."""
    return _letters(text) or _parts(text)


def _letters(text: str) -> str:
    """'H x W x D' in the letters of eight languages, alone or beside a word for size."""
    found = _LETTERS.search(text)
    if not found or not found.group(3):
        return ""
    order = heading_words()["letters"].get("".join(found.groups()).casefold())
    rest = fold(text[: found.start()] + " " + text[found.end() :])
    housing = word_list("housing").issuperset(without_neutral(rest))
    if not order or not (housing or find(rest) == "height+width+depth"):
        return ""
    names = {"h": "height", "w": "width", "d": "depth"}
    return "+".join(names[letter] for letter in order)


def _parts(text: str) -> str:
    plain = _BRACKETS.sub(r" \1 ", text)
    keys = _split(_PARTS.split(plain)) or _split(_COMMA_PARTS.split(plain))
    first, _, last = keys.partition("+")
    states = last in _OF_STATE and parameters()[first].scope == "band" and first not in _OF_STATE
    return "" if states and _STATES.search(plain) else keys


def _split(parts: list[str]) -> str:
    pieces = [fold(part) for part in parts if part.strip()]
    if not 2 <= len(pieces) <= 3:
        return ""
    together = _same_kind(pieces)
    if together:
        return together
    keys = [listed(piece) for piece in pieces]
    if keys[-1] == "beam_count":  # 'gain, broadcast beam' names the beam
        return ""
    if not all(keys) or len(set(keys)) < len(keys) or any("+" in key for key in keys):
        return ""
    per_port = keys[-1] == "rf_ports" and parameters()[keys[0]].unit != ""  # 'puissance max./port'
    return "" if per_port or _names_its_unit(parts, keys) else "+".join(keys)


def _names_its_unit(parts: list[str], keys: list[str]) -> bool:
    """Whether the last part is the unit of the first: 'Max. power per port / W'; 'H / W' are two letters."""
    unit, own = unit_name(parts[-1].strip()), parameters()[keys[0]].unit
    return bool(own and unit) and len(parts[0].strip()) > 1 and dimension(unit) == dimension(own)


def _same_kind(pieces: list[tuple[str, ...]]) -> str:
    """Parts that differ in one word each, such as 'HPBW H' and 'V', share the rest."""
    for names in (
        ("horizontal", "vertical", "poles"),
        ("rows", "columns", "poles"),
        ("high", "wide", "deep"),
    ):
        parts = [next((n for n in names if word_list(n).intersection(p)), "") for p in pieces]
        if not all(parts) or len(set(parts)) != len(parts):
            continue
        base = tuple(w for p, n in zip(pieces, parts, strict=True) for w in p if w not in word_list(n))
        keys = [_with_part(base, name) for name in parts]
        if all(keys):
            return "+".join(keys)
    return ""


def _with_part(base: tuple[str, ...], part: str) -> str:
    if part in _DIMENSIONS and (not base or find(base).startswith("height")):
        return _DIMENSIONS[part]
    alone = not base and part in ("rows", "columns", "poles")  # 'H/V' alone is a polarisation
    if part in _ARRAY and (alone or find(base).startswith(("array_", "element_count", "lattice"))):
        return _ARRAY[part]
    if not base:
        return ""
    named = {"rows": "row", "columns": "column", "poles": "pol"}.get(part, part)
    for form in (named, {"horizontal": "azimuth", "vertical": "elevation"}.get(part, "")):
        key = find((*base, form)) if form else ""
        if key and "+" not in key:
            return key
    return ""
