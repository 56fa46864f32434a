"""Words that say what a column, row or title is for, from ``data/table_words.toml``."""

from __future__ import annotations

import re
import unicodedata
from functools import cache, lru_cache

from speccheck.kept import toml

_BRACKETED = re.compile(r"\s*[(\[][^()\[\]]*[)\]]\s*$")
_ITEM_NUMBER = re.compile(r"^\s*(?:[(\[]?[a-h\d]{1,2}[)\]]|[-•*·▪–])\s*")
_SPACES = re.compile(r"[\s\u00a0\u2007\u2009\u202f\u200b_]+")
_LANGUAGES = re.compile(r"\s*[/|\n]\s*")
_MOST_LANGUAGES = 3
_TOLD_BY_ONE = frozenset({"parameter", "unit", "remark", "condition", "offered", "required", "compliance"})
_ARRAY = r"(?:r|b|y|l|m|h|lb|mb|hb)[1-9]\d?"
_ARRAYS = re.compile(rf"{_ARRAY}(?:\s*[/+&,-]\s*{_ARRAY})*")
_CODE_OF_ARRAY = re.compile(r"[a-z]{1,2}[1-9]\d?|\d")
_NUMBER_OF_ARRAY = r"s?(?:[ -]?\d|[ -](?:[a-h]|[ivx]+|[a-z]{1,2}[1-9]\d?))\b.{0,20}"
_PAGE = re.compile(
    r"^\W*(?:page|seite|pagina|strona|str\.|blatt|sheet|feuille|folio|pag?\.)\s*\d+(?:\s*(?:of|von|sur|de|di|z|van|/)\s*\d+)?\W*$"
)
_CODE = re.compile(r"[A-Z]+-?\d|\d-?[A-Z]")
_DASHES = str.maketrans(
    {"–": "-", "—": "-", "−": "-", "‐": "-", "‑": "-", "’": "'", "ß": "ss", "ł": "l", "ø": "o"}
)


@lru_cache(maxsize=20_000)
def fold(text: str) -> str:
    """A text in lower case without accents, with plain dashes and single spaces, without a closing colon."""
    plain = text.casefold()
    if not plain.isascii():
        plain = unicodedata.normalize("NFKD", plain.translate(_DASHES))
        plain = "".join(letter for letter in plain if not unicodedata.combining(letter))
    return _SPACES.sub(" ", plain).strip(" :*?\t\n")


@cache
def _table() -> dict[str, dict[str, frozenset[str]]]:
    return {
        name: {role: frozenset(fold(word) for word in words) for role, words in roles.items()}
        for name, roles in toml("table_words.toml").items()
    }


@cache
def _column_roles() -> dict[str, str]:
    return {word: role for role, words in reversed(_table()["column"].items()) for word in words}


@lru_cache(maxsize=20_000)
def column_role(text: str) -> str:
    """What a column under this heading holds: ``unit``, ``offered``, ``remark`` …; empty when unknown.

    The heading may say it in two languages, 'Parámetro / Parameter', or among other words, 'Guaranteed min'.
    """
    if len(text) > 60:
        return ""
    folded = fold(text)
    known = _column_roles().get(folded, "")
    return known or _role_in_languages(folded) or _statistic_role(folded) or _role(folded)


def _role(folded: str) -> str:
    roles = _column_roles()
    return roles.get(folded) or roles.get(_BRACKETED.sub("", folded).strip(" :"), "")


def _role_in_languages(folded: str) -> str:
    """The role that parts of a heading agree on; one of them may be a word that is not known."""
    parts = [part for part in _LANGUAGES.split(folded) if part]
    if not 2 <= len(parts) <= _MOST_LANGUAGES:
        return ""
    roles = [_role(part) for part in parts]
    said = set(filter(None, roles))
    role = said.pop() if len(said) == 1 else ""
    return role if all(roles) or role in _TOLD_BY_ONE else ""


def _statistic_role(folded: str) -> str:
    """``minimum``, ``typical`` or ``maximum`` where all other words only confirm it: 'Value (min.)'."""
    words = [word for word in re.split(r"[\s()\[\],;:/-]+", folded) if word]
    confirming = _table()["statistic"]["confirming"]
    roles = {_role(word) for word in words if word not in confirming}
    role = roles.pop() if len(roles) == 1 else ""
    return role if len(words) > 1 and role in ("minimum", "typical", "maximum") else ""


_LEANINGS = (
    ("tolerance", r"^tol\b|toleran[zct]|tolleran"),
    ("remark", r"\bremark|\bcomment|bemerkung|anmerkung|remarque|observa[cç]|uwagi|opmerking|justification"),
    ("compliance", r"\bcompl(?:y|ies|iance|iant)\b|konformit|conformit"),
    ("offered", r"\boffer|\bbidder|\btenderer|\bsupplier|\bvendor|angebot|\bofert|\bpropos|aangebod|oferow"),
    (
        "required",
        r"requir|gefordert|anforderung|\bsoll|\bexig|richiest|requerid|wymag|vereist|supersed|previous",
    ),
)
_SPECIFIC = ("required", "compliance", "remark", "tolerance", "condition", "unit", "offered", "parameter")


@lru_cache(maxsize=2000)
def column_leaning(text: str) -> str:
    """The role of a column heading that only leans on a role word, or is put together from such words."""
    if any(letter.isdigit() for letter in text) or len(text) > 60:
        return ""
    leaning = next((role for role, pattern in _LEANINGS if re.search(pattern, text, re.IGNORECASE)), "")
    if leaning:
        return leaning
    words = [word for word in re.findall(r"[^\W\d_]+", fold(text)) if len(word) > 3]
    roles = [_roles_of_words().get(word, frozenset()) for word in words]
    if not roles or not all(roles):
        return ""
    shared = frozenset.intersection(*roles) or frozenset.union(*roles)
    return next((role for role in _SPECIFIC if role in shared), "")


@cache
def _roles_of_words() -> dict[str, frozenset[str]]:
    """Single words of the column headings to the roles they occur in."""
    found: dict[str, set[str]] = {}
    for role in _SPECIFIC:
        for phrase in _table()["column"][role]:
            for word in re.findall(r"[^\W\d_]+", phrase):
                found.setdefault(word, set()).add(role)
    return {word: frozenset(roles) for word, roles in found.items()}


def is_generic_sheet_name(name: str) -> bool:
    """Whether a sheet name says nothing of the panel on it: 'Data 2', 'Panels A', 'Datasheets'."""
    folded = fold(name).rstrip("0123456789 -_.()")
    generic = _table()["sheet"]["generic"] | title_prefixes("papers") | {""}
    bare = re.sub(r"[ -][a-z]$", "", folded)
    return bool({folded, bare, bare.removesuffix("s"), bare.removesuffix("en")} & generic)


@lru_cache(maxsize=20_000)
def is_group_heading(text: str) -> bool:
    """Whether a text only heads a part of a panel's table, such as 'Mechanical properties'."""
    words = re.findall(r"[^\W\d_]+", fold(text))
    return bool(words) and not any(map(str.isdigit, text)) and _table()["group"]["words"].issuperset(words)


@lru_cache(maxsize=20_000)
def is_aside_of_table(text: str) -> bool:
    """Whether a row that begins so closes or parts a table: page number, sum, mean, 'continued'."""
    folded = fold(text)
    if len(folded) > 40:
        return False
    words = _table()["aside"]
    first = re.match(r"[\W_]*([^\W\d_-]+(?:-[^\W\d_]+)?)", folded)
    return bool(_PAGE.search(folded)) or (
        first is not None and first[1] in words["first"] and not _CODE.search(text)
    )


def is_group_word(word: str) -> bool:
    """Whether one word belongs to headings of parts, such as 'section'."""
    return fold(word) in _table()["group"]["words"]


def title_prefixes(strength: str = "prefix") -> frozenset[str]:
    """Words before the name of a panel in a title; the ``weak`` ones, such as 'Value', name none.

    ``papers`` are the words for the paper itself, such as 'Data sheet'.
    """
    return _table()["title"][strength]


@cache
def generic_title_words() -> frozenset[str]:
    """Single words that occur in titles and sheet names without being part of a panel's name."""
    phrases = title_prefixes("prefix") | title_prefixes("weak") | _table()["sheet"]["generic"]
    return frozenset(word for phrase in phrases for word in phrase.split())


def without_number(text: str) -> str:
    """A label without the number or letter of its item: '(a) 698–960 MHz'."""
    return _ITEM_NUMBER.sub("", text)


@lru_cache(maxsize=20_000)
def is_band_nickname(text: str) -> bool:
    """Whether a text names a band or array without saying its frequencies: ``Low band``, ``Array R1``."""
    folded = _BRACKETED.sub("", fold(text))
    if len(folded) > 40:
        return False
    words = _table()["band"]
    if folded in words["nickname"] or _ARRAYS.fullmatch(folded) or _colour_and_number(folded):
        return True
    return any(re.fullmatch(re.escape(start) + _NUMBER_OF_ARRAY, folded) for start in words["starts"])


def _colour_and_number(folded: str) -> bool:
    """'Red 1', 'yellow array 2': arrays are told apart by the colour of their connectors."""
    cut = re.fullmatch(r"([^\W\d]+)(?:\s+[^\W\d]+)?[ -]?\d{1,2}", folded)
    return cut is not None and cut[1] in _table()["band"]["colours"]


def names_array(text: str) -> bool:
    """Whether words only tell the arrays of a panel apart, by place, colour or code: 'Lower array R1'."""
    words = re.findall(r"[^\W_]+", fold(text))
    band = _table()["band"]
    telling = [word for word in words if word in band["arrays"] | band["colours"]]
    return bool(telling) and all(
        word in band["arrays"] | band["colours"] | band["links"] or _CODE_OF_ARRAY.fullmatch(word)
        for word in words
    )


def answer(text: str) -> str:
    """``comply`` or ``deviate`` for an answer without a figure, else empty."""
    folded = fold(text).rstrip(".!")
    for name, words in _table()["answer"].items():
        if folded in words:
            return name
    return ""


@lru_cache(maxsize=2000)
def bound_of(text: str) -> str:
    """``minimum``, ``maximum``, ``typical`` or ``nominal`` for a cell that only says what a figure bounds."""
    folded = fold(text).strip("()[]")
    return next((name for name, words in _table()["bound"].items() if folded in words), "")


def is_counting_unit(text: str) -> bool:
    """Whether a text of a unit column is no physical unit: ``pcs``, ``–``, ``dBc @ 2x43 dBm``."""
    return fold(text).strip("[]() ") in _table()["unit"]["words"]
