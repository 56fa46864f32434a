"""Recognising a bidder's heading: which parameter, in which unit, under which conditions.

Headings are compared after folding: case, accents, hyphens, plural s, articles and the order of words
do not count. A heading that is not known word for word is taken only when what is left out is a unit,
a figure with its unit, or a remark without any word that could make it another parameter. Anything
else is no match, with suggestions.
"""

from __future__ import annotations

import functools
import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace

from speccheck.dictionary.composites import composite
from speccheck.dictionary.concepts import by_concepts
from speccheck.dictionary.cuts import Cut, conditions_of, cuts
from speccheck.dictionary.folding import fold, key_of, word_list
from speccheck.dictionary.index import known_words, listed, suggestions
from speccheck.dictionary.parameters import parameters
from speccheck.dictionary.questions import unasked
from speccheck.quantities import answers, dimension, split_footnotes, tidy

_LONGEST_HEADING = 160
_LONGEST_REMARK = 80
_SIDES = frozenset({"f", "l", "s", "r"})
_STATISTICS = ("max", "min", "typical", "mean")
_TWICE = tuple(map(re.compile, (r"\s+[–—-]\s+", r"\s+[/|=–—-]\s+|\s*\|\s*|\n")))
_GLOSS = re.compile(r"([^()\[\]]+)[(\[]([^()\[\]]{2,60})[)\]]\s*")
_BARE_SIGN = re.compile(r"([≥>≤<])\s*(?:$|[)\](\[,;])")
_EACH = re.compile(
    r"(?<=[^\W\d])\.?/(?=(?:col|column|port|input|trx|row|puerto|porta|porto|accès|entrée|poort|Eingang|kolumnę|Spalte)\b)",
    re.IGNORECASE,
)
"""'Power/port' and 'Elem./col.' are said of each; 'TRX / ports' names two."""
_MOST_LANGUAGES = 3
_SHORT = 4
_NUMBERING = re.compile(r"^\s*(?:(?:\d{1,2}\.)+\d{0,2}\.?\s+|\(?\d{1,2}[.)]\s+|\(?[a-zA-Z]\)\s+|[-•*·▪–]\s+)")


@dataclass(frozen=True, slots=True, kw_only=True)
class HeadingMatch:
    """What a heading says. No `parameters` means it is not in the dictionary.

    Several parameters stand for figures in one cell, in order. `exact` is true when they are certain.
    `sense` and `statistic` come from words such as 'max.' and 'typical'; `tolerance_of` marks a row
    that states the tolerance of the parameter. `plane` is horizontal or vertical where the heading
    names one. `how` tells the reader how the heading was recognised.
    """

    parameters: tuple[str, ...] = ()
    unit: str = ""
    condition: str = ""
    sense: str = "nominal"
    statistic: str = ""
    tolerance_of: bool = False
    plane: str = ""
    exact: bool = False
    how: str = ""
    suggestions: tuple[str, ...] = ()


def match_heading(text: str, extra: Mapping[str, str] | None = None, *, suggest: bool = True) -> HeadingMatch:
    """Recognise a heading.

    Parameters
    ----------
    text : heading as the bidder wrote it
    extra : the buyer's own headings, text to parameter key; they go before the dictionary's
    suggest : whether to look for near headings where none matches, which takes most of the time

    >>> match_heading("Half-power beam width, azimuth [°]").parameters
    ('horizontal_beamwidth',)
    >>> match_heading("Dimensions H×W×D (mm)").parameters
    ('height', 'width', 'depth')
    >>> match_heading("Gains of scale").parameters
    ()
    """
    house = _house(tuple(sorted(extra.items()))) if extra else {}
    return _match(text, house, suggest) if house else _match_known(text, suggest)


@functools.lru_cache(maxsize=1024)
def specified(key: str, condition: str) -> str:
    """The parameter that a remark beside a figure makes of another.

    >>> specified("weight", "with brackets"), specified("wind_load", "lateral"), specified("gain", "typ")
    ('weight_with_brackets', 'wind_load_lateral', 'gain')
    """
    words = " ".join(
        word for word in condition.split(", ", maxsplit=1)[0].split() if not any(c.isdigit() for c in word)
    )
    telling = word_list("vital") | word_list("counts_in") | _SIDES
    if not 0 < len(words) <= _LONGEST_REMARK or telling.isdisjoint(fold(words)):
        return key
    name = parameters()[key].label.split(",")[0].replace(" per port", "")
    found = match_heading(f"{name} {words}", suggest=False).parameters
    same_unit = len(found) == 1 and parameters()[found[0]].unit == parameters()[key].unit
    return found[0] if same_unit else key


@functools.lru_cache(maxsize=8)
def _house(extra: tuple[tuple[str, str], ...]) -> dict[str, str]:
    return {key_of(fold(text)): key for text, key in extra if all(k in parameters() for k in key.split("+"))}


@functools.lru_cache(maxsize=8192)
def _match_known(text: str, suggest: bool) -> HeadingMatch:
    return _match(text, {}, suggest)


def _match(text: str, house: Mapping[str, str], suggest: bool) -> HeadingMatch:
    if not text or len(text) > _LONGEST_HEADING or not any(c.isalpha() for c in text):
        return HeadingMatch()
    body = _EACH.sub(" per ", tidy(split_footnotes(text)[0])).strip(" :;.")
    if body != (unnumbered := _NUMBERING.sub("", body)):
        whole = _match_body([Cut(body)], body, house)
        if whole:
            return whole
    found = _match_body(cuts(unnumbered), unnumbered, house) or _said_twice(unnumbered, house)
    if found is None and (asked_for := unasked(unnumbered)) != unnumbered:
        found = _match_body(cuts(asked_for), asked_for, house)
    return found or HeadingMatch(suggestions=suggestions(body) if suggest else ())


def _said_twice(body: str, house: Mapping[str, str]) -> HeadingMatch | None:
    """'Gewinn / Gain' or 'Welligkeit (VSWR)': one name in two languages, or beside its abbreviation.

    A half that is not known may be in a language that is not read; one with a word of the dictionary that
    makes another parameter, or a quality of one, is none.
    """
    gloss = _GLOSS.fullmatch(body)
    found = _of_parts(gloss.groups(), house, glossed=True) if gloss else None
    parted = (_of_parts(between.split(body), house, glossed=False) for between in _TWICE)
    return found or next(filter(None, parted), None)


def _of_parts(parts: Iterable[str], house: Mapping[str, str], *, glossed: bool) -> HeadingMatch | None:
    """What the parts of a heading name alike; None where they differ, or where too little is known."""
    parts = [part for part in parts if part.strip()]
    if not 2 <= len(parts) <= _MOST_LANGUAGES:
        return None
    found = [_match(part, house, suggest=False) for part in parts]
    known = [m for m, part in zip(found, parts, strict=True) if m.parameters and len(part.strip()) > 1]
    silent = [part for part, match in zip(parts, found, strict=True) if not match.parameters]
    if len({match.parameters for match in known}) != 1 or any(match.tolerance_of for match in known):
        return None
    if silent and (glossed or len(known) > 1 or any(map(_tells_apart, silent))):
        return None
    senses = {match.sense for match in known} - {"nominal"}
    return replace(
        known[0],
        unit=next((match.unit for match in known if match.unit), ""),
        condition=", ".join(dict.fromkeys(match.condition for match in known if match.condition)),
        sense=senses.pop() if len(senses) == 1 else "nominal",
        statistic=next((match.statistic for match in known if match.statistic), ""),
        how="; ".join(match.how for match in known),
    )


def _tells_apart(text: str) -> bool:
    """Whether a text that names no parameter may still change one: 'flatness', 'per element', a figure."""
    words = fold(text)
    known = any(word in known_words() for word in words)
    return known or not words or any(map(str.isdigit, text)) or max(map(len, words)) < _SHORT


def _match_body(forms: Iterable[Cut], body: str, house: Mapping[str, str]) -> HeadingMatch | None:
    words = fold(body)
    tolerance_of = bool(word_list("tolerance").intersection(words))
    for cut in forms:
        found = _look_up(cut.text, house, tolerance_of=tolerance_of)
        if found and _unit_fits(cut.unit, found):
            result = _result(found, conditions_of(cut), words, tolerance_of=tolerance_of)
            return _with_sign(result, body) if result.sense == "nominal" else result
    return None


def _with_sign(match: HeadingMatch, body: str) -> HeadingMatch:
    """'VSWR (≤)' and 'Isolation, dB ≥': a sign without a figure says what the figures below bound."""
    sign = _BARE_SIGN.search(body)
    if sign is None or parameters()[match.parameters[0]].kind not in ("number", "count"):
        return match
    return replace(match, sense="min" if sign[1] in "≥>" else "max")


def _unit_fits(unit: str, keys: str) -> bool:
    """Whether what was taken for a unit can be one of the parameter's: 'Gain (LB)' is not in pounds."""
    own = parameters()[keys.split("+", maxsplit=1)[0]]
    return own.kind in ("text", "connectors", "polarisation") or answers(unit, dimension(own.unit))


def _look_up(text: str, house: Mapping[str, str], *, tolerance_of: bool) -> str:
    words = fold(text)
    if tolerance_of:
        words = tuple(word for word in words if word not in word_list("tolerance"))
    bare = tuple(word for word in words if word not in _STATISTICS)
    known = house.get(key_of(words)) or listed(words) or listed(bare) or composite(text)
    return known or by_concepts(bare)


def _result(found: str, cut: Cut, words: tuple[str, ...], *, tolerance_of: bool) -> HeadingMatch:
    keys = tuple(found.split("+"))
    statistic = "max" if "pmax" in words else next((s for s in _STATISTICS if s in words), "")
    if keys[0].startswith("max_power") and word_list("permissible").intersection(words):
        statistic = statistic or "max"
    bounds = statistic in ("min", "max") and not keys[0].endswith("_max")
    plane = next((p for p in ("horizontal", "vertical") if keys[0].startswith(p)), "")
    condition = ", ".join(cut.conditions)
    how = [f"heading '{cut.text}'"]
    how += [f"unit {cut.unit}"] if cut.unit else []
    how += [f"condition '{condition}'"] if condition else []
    return HeadingMatch(
        parameters=keys,
        unit=cut.unit,
        condition=condition,
        sense=statistic if bounds else "nominal",
        statistic="" if statistic in ("min", "max") else statistic,
        tolerance_of=tolerance_of,
        plane=plane if len(keys) == 1 else "",
        exact=True,
        how=", ".join(how),
    )
