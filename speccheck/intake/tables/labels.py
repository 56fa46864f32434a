"""What a heading says: parameter, unit, band, statistic and condition, read once per distinct text."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass, replace

from speccheck.dictionary import match_heading, parameters
from speccheck.intake.tables.bands import NO_BANDS, BandText, find_bands, is_band_label
from speccheck.intake.tables.demands import demanded
from speccheck.intake.tables.lines import LINE
from speccheck.intake.tables.names.titles import counts_panels
from speccheck.intake.tables.vocabulary import runs, stem, vocabulary
from speccheck.intake.tables.words import column_role, is_counting_unit
from speccheck.quantities import answers, dimension, unit_name

FREQUENCY_KEYS = frozenset({"frequency_range", "operating_bands"})
_LONGEST = 160
_MOST_SUGGESTIONS = 300
MOST_LETTERS = 100_000
"""Letters of different texts made of heading words: time to look up grows with them; bids have few."""
_NUMBER = re.compile(r"\d+(?:[.,]\d+)?")
_AT = r"[,(]?\s*(?:at|@|bei|mit|for|für|à|a|con|com|przy|bij|vs\.?)?\s*"
_TILT_WORD = (
    r"(?:(?:electrical|electric|el\.|elektrisch\w*)\s*)?(?:down-?)?(?:tilts?|neigung\w*|absenkung\w*|inclinaison|"
    r"inclinaci[oó]n|inclina[cç][aã]o|inclinazione|pochyleni\w*|nachyleni\w*|neiging)(?:\s+(?:angles?|el\w*))?"
)
_ANGLE = r"\d+(?:[.,]\d+)?\s*(?:°|deg\.?|grad\b)?"
_ANGLES = rf"((?:{_ANGLE}\s*/\s*)+{_ANGLE})"
_TILTS = re.compile(
    rf"{_AT}(?:{_TILT_WORD}\s*(?:of|=|:)?\s*{_ANGLES}|{_ANGLES}\s*(?:of\s+)?{_TILT_WORD})\s*[)]?\s*$",
    re.IGNORECASE,
)
_LETTER_FIRST = re.compile(r"[^\W\d_]\s+[^\W\d_]{2,}")
_SIZES = frozenset({"height", "width", "depth"})
_FREQUENCIES = re.compile(rf"{_AT}((?:\d+(?:[.,]\d+)?\s*/\s*)+\d+(?:[.,]\d+)?)\s*([GM]Hz)\s*[)]?\s*$", re.I)
_CODE = re.compile(r"[^\W\d_]{1,4}[-/. ]?\d[\w./-]*")
_NUMBERED = re.compile(
    r"(?:gain|gewinn|ganho|zysk|winst|vswr|tilt|hpbw|xpd|fbr|pim|eirp) [1-6]", re.IGNORECASE
)
_STATISTICS = re.compile(r"[,(]?\s*\b((?:[^\W\d_]{2,9}\.?\s*/\s*){1,2}[^\W\d_]{2,9}\.?)\s*\)?\s*$")
_UNIT_BEHIND = re.compile(r"^(.+?)\s*(?:,|\s/(?!\s*[HVWD]\b)|\bin\b)\s*([^\s,()\[\]]{1,8})\s*((?:[(\[].*)?)$")
_BAND_WORD = re.compile(
    r"\b(?:(?:in|im|en|dans|na|w|nel\w*|la|der|the)\s+)*(?:sub-?)?(?:band|bande|banda|pasmo|pasmie|teilband)\b",
    re.I,
)
_UNIT_BRACKET = re.compile(r"\s*(?:[(\[][^()\[\]\d]{1,8}[)\]]|,?\s*\b(?:dBi|dBd|dB))\s*$")
_LISTED = re.compile(r"(?<![\w/])[^\W\d][\w-]*(?:\s*/\s*[^\W\d][\w-]*){1,2}(?![\w/])")
_WITHOUT = re.compile(r"\bw/o\b", re.IGNORECASE)
_SYMBOL = re.compile(r"(?:.*\b)?[A-Z]\s?[x×/]\s?[A-Z]\s?[x×/]\s?[A-Z]\b|d_?[hvxyz]\b", re.IGNORECASE)
_BAR = re.compile(r"\s*\|\s*")
_ITEM = r"[^\W\d][^()\[\]/]*"
_LISTED_IN_BRACKET = re.compile(
    rf"[(\[]\s*({_ITEM}\s[^()\[\]/]*(?:/\s*{_ITEM})+|{_ITEM}(?:/\s*{_ITEM}\s[^()\[\]/]+)+)\s*[)\]]"
)
_LISTS, _SEVERAL = re.compile(r"[/|]"), re.compile(r"[xX×/*]")
SLACK_ALONE = re.compile(r"\s*(?:±|\+/-)\s?\d(?:[.,]\d+)?\s?%?\s*")
_WITH_SLACK = re.compile(r"(?<=\S)\s*[,;(\[]?\s*±\s?\d+(?:[.,]\d+)?\s?(?:%|°|[A-Za-z]{1,3})?[\])]?$")
_STATISTIC = {"minimum": "min", "typical": "typ", "maximum": "max"}


@dataclass(frozen=True, slots=True)
class Label:
    """A heading as understood. No `parameters` means it is not in the dictionary."""

    text: str
    parameters: tuple[str, ...] = ()
    unit: str = ""
    condition: str = ""
    bands: BandText = NO_BANDS
    sense: str = "nominal"
    statistic: str = ""
    tolerance: bool = False
    how: str = ""
    tilts: tuple[float, ...] = ()
    frequencies_mhz: tuple[float, ...] = ()
    statistics: tuple[str, ...] = ()

    def __bool__(self) -> bool:
        return bool(self.parameters)


_NO_LABEL = Label("")


class Labels:
    """The reader of headings, with the buyer's own synonyms; `passed_over` counts texts not looked up."""

    def __init__(self, synonyms: Mapping[str, str]) -> None:
        self._synonyms = dict(synonyms)
        self._known: dict[str, Label] = {}
        self._vocabulary = vocabulary() | {stem(word) for text in synonyms for word in runs(text)}
        self._near: dict[str, str] = {}
        self._room = MOST_LETTERS
        self.passed_over = 0

    def of(self, text: str) -> Label:
        """Understand one heading text."""
        known = self._known.get(text)
        if known is None:
            known = self._known[text] = self._understand(text)
        return known

    def parse_line(self, text: str) -> tuple[Label, str] | None:
        """A line ``Label: value`` cut in two, when the label is known."""
        match = LINE.match(text)
        if match is None:
            return None
        label = self.of(match[1])
        return (label, match[2].strip()) if label and label.parameters != ("remarks",) else None

    def _understand(self, text: str) -> Label:
        if not self._could_be_heading(text) or not self._has_room_for(text):
            return Label(text)
        cleaned = _WITHOUT.sub("without", text.strip().rstrip(":").strip())
        listed = (self._with_list, self._with_tilts, self._with_statistics) if _LISTS.search(cleaned) else ()
        for attempt in (*listed, self._with_demand, self._with_unit, self._match, self._with_bands):
            found: Label = attempt(cleaned)
            if found:
                return found if found.text == text else replace(found, text=text)
        return Label(text)

    def _could_be_heading(self, text: str) -> bool:
        words = runs(text)
        if len(text) > _LONGEST:
            return False
        if _SYMBOL.match(text):
            return True
        if not any(stem(word) in self._vocabulary for word in words):
            return False
        return max(map(len, words)) > 1 or (len(words) > 1 and _SEVERAL.search(text) is not None)

    def _has_room_for(self, text: str) -> bool:
        if len(text) > self._room:
            self.passed_over += 1
            return False
        self._room -= len(text)
        return True

    def _with_unit(self, text: str) -> Label:
        """'Total power, W': the letter behind the comma is a unit before it is a word."""
        cut = _UNIT_BEHIND.match(text)
        if cut is None or not unit_name(cut[2]):
            return _NO_LABEL
        found = self._match(f"{cut[1]} {cut[3]}".strip())
        return replace(found, unit=found.unit or cut[2]) if len(found.parameters) == 1 else _NO_LABEL

    def _with_list(self, text: str) -> Label:
        """'Wind load (front/side)' heads two figures: each word with the rest is a heading of its own."""
        if (parted := self._parted_by_bar(text)).parameters:
            return parted
        text = _BAR.sub("/", text)
        bracket = _LISTED_IN_BRACKET.search(text)
        if bracket is not None:
            return self._of_items(text, bracket.start(), bracket.end(), bracket[1])
        lists = [cut for cut in _LISTED.finditer(text) if not unit_name(cut[0])]
        if not lists or not _names_something(text[: lists[-1].start()] + text[lists[-1].end() :]):
            return _NO_LABEL
        return self._of_items(text, lists[-1].start(), lists[-1].end(), lists[-1][0])

    def _parted_by_bar(self, text: str) -> Label:
        """'VSWR | return loss, dB' heads two figures, each named in full."""
        parts = [part for part in _BAR.split(text) if part]
        found = [self._with_unit(part) or self._match(part) for part in parts] if len(parts) > 1 else []
        keys = tuple(key for label in found for key in label.parameters)
        several = len(set(keys)) == len(parts) and all(len(label.parameters) == 1 for label in found)
        return replace(found[0], parameters=keys) if several and found else _NO_LABEL

    def _of_items(self, text: str, start: int, end: int, items: str) -> Label:
        """The heading of several figures, one for each item between `start` and `end` of a heading."""
        found = []
        last_is_unit = len(unit_name(items.rpartition("/")[2])) > 1  # 'Frequency band / MHz'
        if last_is_unit or any("/" in word and unit_name(word) for word in items.split()):
            return _NO_LABEL
        listed = re.split(r"\s*/\s*", items)
        tail = listed[-1].partition(" ")[2]  # '(without/with brackets)'
        for item in [*(i if " " in i or not tail else f"{i} {tail}" for i in listed[:-1]), listed[-1]]:
            single = f"{text[:start].rstrip(' ([')} ({item}) {text[end:].lstrip(' )]')}".strip()
            found.append(self._with_unit(single) or self._match(single))
        keys = tuple(key for label in found for key in label.parameters)
        several = len(set(keys)) == len(found) and all(len(label.parameters) == 1 for label in found)
        return replace(found[0], parameters=keys) if several else _NO_LABEL

    def _with_tilts(self, text: str) -> Label:
        """'Gain at tilt 0°/5°/10°' and 'Gain @ 3.3/3.5/3.8 GHz' head lists of figures, one each."""
        bare = _UNIT_BRACKET.sub("", text)
        tilts, frequencies = _TILTS.search(bare), _FREQUENCIES.search(bare)
        listed = tilts or frequencies
        if listed is None:
            return _NO_LABEL
        inner = self._match(bare[: listed.start()].strip(" ,;") + text[len(bare) :])
        if not inner:
            return inner
        numbers = [float(n.replace(",", ".")) for n in _NUMBER.findall(listed[1] or listed[2])]
        if tilts:
            return replace(inner, tilts=tuple(numbers))
        scale = 1000.0 if listed[2].lower() == "ghz" else 1.0
        return replace(inner, frequencies_mhz=tuple(scale * number for number in numbers))

    def _with_statistics(self, text: str) -> Label:
        """'Power consumption, typ./max.' heads two figures of one parameter."""
        bracket = _UNIT_BRACKET.search(text)
        bare, unit = (text[: bracket.start()], bracket[0]) if bracket else (text, "")
        listed = _STATISTICS.search(bare)
        if listed is None or not (
            name := (bare[: listed.start()] + " " + bare[listed.end() :]).strip(" ,;:")
        ):
            return _NO_LABEL
        said = tuple(statistic_of(word) for word in re.split(r"\s*/\s*", listed[1]))
        said = tuple("typical" if word == "typ" else word for word in said)
        inner = self._with_unit(f"{name}{unit}") or self._match(f"{name}{unit}")
        return replace(inner, statistics=said) if len(inner.parameters) == 1 and all(said) else _NO_LABEL

    def _with_demand(self, text: str) -> Label:
        """'Vertical beamwidth at -3 dB ≤ 8°': what is asked for stands behind the name of the parameter."""
        names, unit = demanded(text)
        found = next((label for name in names if (label := self.of(name))), None)
        if found is None or not answers(unit, dimension(parameters()[found.parameters[0]].unit)):
            return _NO_LABEL
        return replace(found, sense="nominal")

    def _with_bands(self, text: str) -> Label:
        bands = find_bands(text)
        inner = self._match(_tidy(bands.rest)) if bands.spans and bands.rest else _NO_LABEL
        if not inner and bands.spans:
            inner = self._match(_tidy(_BAND_WORD.sub(" ", bands.rest)))
        return replace(inner, bands=bands) if inner else inner

    def letter(self, text: str) -> Label:
        """A single letter as a heading, such as H for the height; only its neighbours can prove it one."""
        return self._match(text.strip()) if len(text.strip()) == 1 else _NO_LABEL

    def suggestion(self, text: str) -> str:
        """The nearest known headings to a text; for the first few hundred texts of a file only."""
        near = self._near.get(text)
        if near is None:
            if len(self._near) >= _MOST_SUGGESTIONS:
                return ""
            found = match_heading(text, self._synonyms).suggestions if text else ()
            near = self._near[text] = "; ".join(found[:2])
        return near

    def _match(self, text: str) -> Label:
        found = match_heading(text, self._synonyms, suggest=False)
        if not found.exact or not found.parameters or counts_panels(text):
            return _NO_LABEL
        if found.condition and _CODE.fullmatch(text) and not _NUMBERED.fullmatch(text):
            return _NO_LABEL  # 'BR-0012' is a model, not a width; 'Gain 1' is the gain of the first band
        if found.condition and _LETTER_FIRST.match(text) and set(found.parameters) <= _SIZES:
            return _NO_LABEL  # 'D of 12 March' is an issue, not a depth
        if any(letter.isdigit() for letter in text) and parameters()[found.parameters[0]].kind == "text":
            return _NO_LABEL  # 'RAL 7035' and 'Model 12' are answers
        bands = find_bands(found.condition) if found.condition else NO_BANDS
        return Label(
            text=text,
            parameters=tuple(found.parameters),
            unit=found.unit,
            condition=found.condition,
            bands=bands if bands.proved or set(found.parameters) <= FREQUENCY_KEYS else NO_BANDS,
            sense=found.sense,
            statistic=found.statistic,
            tolerance=found.tolerance_of,
            how=found.how,
        )


def _names_something(text: str) -> bool:
    """Whether a text holds a word of weight, more than 'max.' or 'RF'."""
    return any(len(word) > 2 and not statistic_of(word) for word in runs(text))


def _tidy(text: str) -> str:
    text = re.sub(r"[(\[]\s*[)\]]", " ", text)
    return re.sub(r"\s*[@,;:–-]\s*$", "", " ".join(text.split())).strip()


def is_unit(text: str) -> bool:
    """Whether a cell holds a unit, perhaps with a tolerance; a dash among units says that there is none."""
    with_slack = "±" in text and unit_name(_WITH_SLACK.sub("", text))
    return len(text) <= 24 and bool(with_slack or unit_name(text) or is_counting_unit(text))


def begins_with_unit(text: str) -> bool:
    """Whether a text is a unit with a note, such as 'N (150 km/h)'."""
    first = text.split(maxsplit=1)[0] if text.strip() else ""
    return bool(unit_name(first)) and not any(letter.isdigit() for letter in first)


def statistic_of(text: str) -> str:
    """``min``, ``typ`` or ``max`` when a heading cell says only that."""
    return _STATISTIC.get(column_role(text), "")


def is_heading_filler(text: str) -> bool:
    """Whether a cell under a heading still belongs to the heading: a unit, band or statistic."""
    told = is_unit(text) or is_band_label(text) or bool(statistic_of(text)) or text.strip() in ("H", "V")
    return told or SLACK_ALONE.fullmatch(text) is not None
