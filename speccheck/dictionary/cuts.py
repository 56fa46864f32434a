"""Setting aside what a heading says beside the name: unit, figures, remarks."""

from __future__ import annotations

import functools
import itertools
import re
from collections.abc import Iterator
from dataclasses import dataclass, replace

from speccheck.dictionary.concepts import telling_words
from speccheck.dictionary.folding import fold, heading_words, word_list
from speccheck.quantities import NUMERAL_PATTERN, unit_name

_BRACKETS = re.compile(r"[\[(]([^\[\]()]*)[\])]")
_AT_WORDS = (
    r"(?:@|\b(?:at|bei|for|für|à|pour|a|para|per|przy|dla|sous|under|bij|voor|with|mit|avec|con|com|z|met|in"
    r"|within)\b)"
)
# units that conditions of a heading come in; a short list keeps the expression small
_CONDITION_UNIT = (
    r"(?:[GMk]?Hz|km/(?:hr?|u|std|godz)|kmh|kph|m/s|mph|kn|kts?|°\s?C|°|deg(?:rees?)?|Grad"
    r"|dBm|dBW|k?W|V|mm|cm|m|ft|inch|in|%|λ|years?)(?!\w)"
)
_FIGURE = rf"[±+\-]?\s?{NUMERAL_PATTERN}\s?(?:{_CONDITION_UNIT}|1(?=\W|$))?"
_TURNED = r"(?:(?:electrical|el\.?)\s)?(?:tilt|downtilt|edt|scan|steering|azimuth)(?:\s(?:of|angle))?\s?[:=]?"
_CONDITION = re.compile(
    rf"(?:{_AT_WORDS}\s{_TURNED}|(?<=[,;(])\s?{_TURNED}|{_AT_WORDS})?\s?(?<![\w.])(?:\d\s?[x×]\s?)?{_FIGURE}(?:\s?(?:-|…|to|bis|à|a|do|tot|/|±|\+)\s?{_FIGURE})*(?![\w])"
    r"(?:\s(?:tilt|downtilt|edt|scan|steering|azimuth|carriers|tones)\b)?",
    re.IGNORECASE,
)
_ORDINAL = re.compile(r"(?:\s*\.)?\s*(?:er|e|ème|eme|rd|th|[ªº°])?\.?\s*(?:ord|rz[ęąa])", re.IGNORECASE)
"""Behind a number: 'third order' is written '3. Ordnung', '3.er orden', '3ª ordem'."""
_ORDER_WORD = r"(?:order|ordre|orden|ordine|ordem|orde|ord\.|ordnung|rz[eę]du|rz[aą]d)"
_THIRD_ORDER = re.compile(
    rf"\b(?:(?:d'|de\s|di\s|del\s|du\s)\s?)?{_ORDER_WORD}\s?(?:n[o°]\s?)?"
    r"(?:3|three|drei|trois|tres|tre|três|trzy|trzeciego|drie)\b"
    rf"|\b(?:3|iii)(?:\s?\.)?[\s-]?(?:(?:rd|er|e|ème|eme|o|a|go|de|ter|°)\.?)?[\s-]*{_ORDER_WORD}(?!\w)",
    re.IGNORECASE,
)
_DECIBELS = re.compile(r"\s?dB(?!\w)", re.IGNORECASE)
"""Behind the level of a width: the unit stays in the name, where '3 dB' is a word."""
_CARRIERS = re.compile(
    rf"(?:{_AT_WORDS}|[,;])?\s*\b"
    r"(?:\d|two|zwei|deux|dos|due|dois|duas|dwie|dwoma|dwóch|twee)\s+"
    r"(?:carriers?|tones?|signals?|träger\w*|porteuses?|portadoras?|portanti|nośn\w+|dragers?|draaggolven)\b"
    r"(?:\s*(?:of|at|@|de|da|di|je|jeweils|à|zu|von|van|po|each|,)?"
    rf"\s*{NUMERAL_PATTERN}\s?(?:dBm|W)(?!\w)(?:\s+each)?)?",
    re.IGNORECASE,
)
_STATED = re.compile(
    rf"(?:{_AT_WORDS}\s)?(?<!\w)(?:(?:einer|une|una|um|een)\s)?"
    r"(?:v(?:_?w(?:ind)?)?|t_?a?(?:mb)?|wind ?speed|windgeschwindigkeit|windsnelheid|ambient temperature"
    r"|ambient|umgebungstemperatur|temperature|temperatur|(?:vitesse|velocidad|velocità|velocidade|prędkości?)\s(?:\w+\s)?"
    r"(?:vent|viento|vento|wiatru))\s*(?:of|von|de|di|van)?\s*[=:]?\s*"
    rf"{NUMERAL_PATTERN}\s?(?:km/h|m/s|mph|kph|kmh|km/u|°\s?C)(?!\w)",
    re.IGNORECASE,
)
"""'(v = 150 km/h)', 'bei Umgebungstemperatur 50 °C': the letter before the figure is no word of the name."""
_TRAILING_UNIT = re.compile(r"(?:[,;/:]|\s(?:in|en|w)\s|\s)\s?([^\s,;:/()\[\]]{1,12}(?:/[a-z]{1,4})?)\s*$")
_UNIT_BEFORE_BRACKET = re.compile(r"(?<=[^\W\d])\s([^\s,;:/()\[\]]{2,8}|[°%ΩNW])\s*(?=[(\[])")
_UNIT_BEFORE_BOUND = re.compile(
    r"\s*,\s*([^\s,;:()\[\]]{1,6})\s*,\s*((?:min|max|typ|nom)(?:imum|ical|inal)?\.?)$", re.IGNORECASE
)
_INCHES = re.compile(r"[(\[]\s*in\.?\s*[)\]]|[\s,/]\s*in\.?\s*$", re.IGNORECASE)
_SPLIT_NOTES = re.compile(r"\s*[,;]\s+|\s+[-–:]\s+|:\s*|\s*@\s*|\s+/\s+")


@dataclass(frozen=True, slots=True)
class Cut:
    """A heading with something set aside."""

    text: str
    unit: str = ""
    conditions: tuple[str, ...] = ()


def cuts(body: str) -> Iterator[Cut]:
    """The heading as it stands, then with its unit, its conditions and its remarks set aside.

    What looks like a unit may be none, so the heading with it comes again at the end.
    """
    whole = Cut(_THIRD_ORDER.sub("third order", body))
    seen: set[Cut] = set()
    in_inches = [_without_unit(whole)] if _INCHES.search(body) else []  # 'in' is a preposition as well
    stated = _without_stated(whole)
    as_last = itertools.chain(_stages(_without_unit(stated)), _stages(stated)) if stated != whole else ()
    for cut in itertools.chain(in_inches, [whole], _stages(_without_unit(whole)), _stages(whole), as_last):
        if cut not in seen:
            seen.add(cut)
            yield cut


def _stages(start: Cut) -> Iterator[Cut]:
    yield start
    figures = _without_figures(start)
    yield figures
    yield _without_unit(figures)
    remarks = _without_remarks(figures)
    yield remarks
    for base in dict.fromkeys((start, figures, remarks)):
        yield from _without_notes(base)
    yield _without_letter(figures)


def _without_unit(cut: Cut) -> Cut:
    inside = _without_bracketed_unit(cut) or _without_inner_unit(cut)
    if inside is not None:
        return inside
    trailing = _TRAILING_UNIT.search(cut.text)
    if not trailing or re.search(r"(?<![A-Za-z])\d+$", cut.text[: trailing.start()]):
        return cut
    letter_alone = trailing.group()[0].isspace() and len(trailing.group(1)) < 2
    name = unit_name(trailing.group(1))
    if not name or (letter_alone and trailing.group(1) not in "°%Ω"):
        return cut
    return replace(cut, text=cut.text[: trailing.start()].strip(" ,;:/"), unit=name)


def _without_bracketed_unit(cut: Cut) -> Cut | None:
    for bracket in reversed(list(_BRACKETS.finditer(cut.text))):
        name = unit_name(bracket.group(1))
        if name:
            rest = cut.text[: bracket.start()] + " " + cut.text[bracket.end() :]
            return replace(cut, text=rest.strip(" ,;:/"), unit=name)
        unit, others = _unit_among_notes(bracket.group(1))
        if unit:
            rest = f"{cut.text[: bracket.start()]} ({others}) {cut.text[bracket.end() :]}"
            return replace(cut, text=rest, unit=unit)
    return None


def _without_inner_unit(cut: Cut) -> Cut | None:
    """'Weight kg (without kit)' and 'Isolation, dB, min.': the unit stands before a bracket or a bound."""
    inner = _UNIT_BEFORE_BRACKET.search(cut.text)
    if inner and (name := unit_name(inner.group(1))):
        return replace(cut, text=f"{cut.text[: inner.start()]} {cut.text[inner.end() :]}", unit=name)
    bound = _UNIT_BEFORE_BOUND.search(cut.text)
    if bound and (name := unit_name(bound.group(1))):
        return replace(cut, text=f"{cut.text[: bound.start()]}, {bound.group(2)}", unit=name)
    return None


def _without_letter(cut: Cut) -> Cut:
    """'Front wind N': a letter at the end may be a unit, where the parameter is stated in it."""
    words, _, letter = cut.text.rpartition(" ")
    name = unit_name(letter) if len(letter) == 1 and words and not cut.unit else ""
    return replace(cut, text=words.strip(" ,;:/"), unit=name) if name else cut


def _unit_among_notes(inner: str) -> tuple[str, str]:
    """The unit that begins or ends the words in brackets, 'N at 150 km/h' or 'H x W x D, mm'; the rest."""
    first = re.split(r" @ | at |,", inner, maxsplit=1)[0]
    if first != inner and unit_name(first):
        return unit_name(first), inner[len(first) :]
    before, comma, last = inner.rpartition(",")
    return (unit_name(last), before) if comma else ("", inner)


def _without_figures(cut: Cut) -> Cut:
    """Set figures with their units aside: '150 km/h', '2 x 43 dBm carriers', '1710-2170 MHz', '±60°'."""
    conditions: list[str] = []

    def keep(match: re.Match[str]) -> str:
        piece = match.group().strip()
        if not any(c.isdigit() for c in piece) or re.search(r"\ddB\b|\d dB\b", piece):
            return match.group()
        if _ORDINAL.match(match.string, match.end()):
            return match.group()
        unit = " dB" if _DECIBELS.match(match.string, match.end()) else ""
        conditions.append(re.sub(rf"^(?:[,;]\s*)?(?:{_AT_WORDS})?\s?", "", piece, flags=re.IGNORECASE) + unit)
        return " "

    rest = _CONDITION.sub(keep, _CARRIERS.sub(keep, cut.text))
    rest = re.sub(r"[\[(][\s,;@]*[\])]", " ", rest)
    rest = re.sub(rf"(?:\s*[,;@/-]\s*|\s+{_AT_WORDS}\s*)+$", "", " ".join(rest.split()))
    return Cut(rest, cut.unit, (*cut.conditions, *conditions)) if conditions else cut


def _without_stated(cut: Cut) -> Cut:
    """Set figures aside with the symbol or word of what they are: 'v = 150 km/h', 'ambient 50 °C'."""
    found = [match.group().strip() for match in _STATED.finditer(cut.text)]
    rest = re.sub(r"[\[(][\s,;@]*[\])]", " ", _STATED.sub(" ", cut.text)).strip(" ,;")
    return Cut(" ".join(rest.split()), cut.unit, (*cut.conditions, *found)) if found else cut


@functools.cache
def vital_words() -> frozenset[str]:
    """Words that may make another parameter of a heading: never left out."""
    return word_list("vital").union(word_list("horizontal"), word_list("vertical"), telling_words())


@functools.cache
def _remarks() -> re.Pattern[str]:
    longest_first = sorted(heading_words()["remarks"], key=len, reverse=True)
    return re.compile(
        r"[,;(]?\s*(?<!\w)(" + "|".join(map(re.escape, longest_first)) + r")(?!\w)\s*\)?", re.IGNORECASE
    )


def _without_remarks(cut: Cut) -> Cut:
    """Set known remarks aside: 'on axis', 'all tilts', 'without brackets'."""
    conditions: list[str] = []

    def keep(match: re.Match[str]) -> str:
        conditions.append(match.group(1))
        return " "

    rest = " ".join(_remarks().sub(keep, cut.text).split()).strip(" ,;")
    return Cut(rest, cut.unit, (*cut.conditions, *conditions)) if conditions and rest else cut


def _without_notes(cut: Cut) -> Iterator[Cut]:
    """Every way of leaving out remarks in brackets or after commas, the fewest left out first."""
    brackets = [b.group(1).strip() for b in _BRACKETS.finditer(cut.text)]
    main, *others = [s.strip() for s in _SPLIT_NOTES.split(_BRACKETS.sub(" ", cut.text)) if s.strip()] or [""]
    notes = [n for n in (*others, *brackets) if n][:5]
    droppable = [n for n in notes if not (vital_words().intersection(fold(n)) or unit_name(n))]
    for size in range(1, len(droppable) + 1):
        for left_out in itertools.combinations(droppable, size):
            kept = [n for n in notes if n not in left_out]
            yield Cut(" ".join([main, *(f"({n})" for n in kept)]), cut.unit, (*cut.conditions, *left_out))


def conditions_of(cut: Cut) -> Cut:
    """The cut with the conditions that its text still holds."""
    return (
        cut if cut.conditions else replace(cut, conditions=_without_remarks(_without_figures(cut)).conditions)
    )
