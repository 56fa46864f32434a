"""Cells about connectors, ports and polarisations, where a number may be part of a name."""

from __future__ import annotations

import re
from datetime import date

from speccheck.quantities.content import Quantity

_GENDER = (
    r"long\s?neck\s?female|female\s?long\s?neck|female|male|long\s?neck|buchse|stecker|kupplung|femelle|mâle"
    r"|hembra|macho|femmina|maschio|fêmea|żeńskie|męskie|vrouwelijk|mannelijk|socket|jack|plug|f\b|m\b"
)
# Interfaces by the names of IEC 61169 parts and of the trade; '4.3-10' is a name, not a range.
_CONNECTOR = re.compile(
    rf"""
    (?:(?<=[xX×*]) | (?<![\w.]))
    (?:(?:din\s*)?
       (?P<name>4[.,]3\s?[-/]\s?10 | 7\s?[-/]\s?16 | 1[.,]5\s?[-/]\s?3[.,]5 | 2[.,]2\s?[-/]\s?5)(?![\d.])
     | (?P<letter>N|SMA|SMP|TNC|NEX\s?10|MQ4|MQ5|QMA|BNC|FME|EIA)(?=$|[\s,;)/.-]|-type)(?!\s*\d{{2,}}))
    (?:\s*-?\s*(?:din|type|typ))?
    (?:\s*[,(]?\s*(?P<gender>{_GENDER})\)?)?
    """,
    re.IGNORECASE | re.VERBOSE,
)
_COUNT_BEFORE = re.compile(
    r"\(?(\d{1,4})\)?\s*(?:[x×*]|ports?|pcs\.?|stk\.?|pieces|connectors?|st\.?|off|nos?\.?)?\s*(?:of\s+|,\s*|:\s*|\(\s*)?$",
    re.IGNORECASE,
)
_COUNT_AFTER = re.compile(
    r"^\s*[(,:x×*]\s*(?:x\s*|×\s*)?(\d{1,4})\s*(?:[x×]|pcs\.?|ports?|off)?\s*\)?", re.IGNORECASE
)
_PLUS = r"(?:\+|plus|and|,|;)\s*(\d{1,2})?\s*(?:x|×)?\s*"
_CALIBRATION = re.compile(
    _PLUS + r"(?:(?:4[.,]3-10|smp|n|mq4)\s*)?\(?(?:cal\b|cal\.|calibration|kalibr\w*)[^,;+]*", re.IGNORECASE
)
_CONTROL = re.compile(_PLUS + r"(?:ret|control|aisg|steuer\w*|8-pin|din-8)[^,;+]*", re.IGNORECASE)
_PORTS = re.compile(
    r"(\d{1,4})(?![.,\d])\s*(?:ports?|connectors?|pcs|stk|anschlüsse|connecteurs|puertos|conectores|connettori|porte|portas"
    r"|złącz\w*|poorten|[x×])?",
    re.IGNORECASE,
)
_SUM = re.compile(r"\d{1,3}(?:\s*[^\W\d]{1,8})?(?:\s*\+\s*\d{1,3}(?:\s*[^\W\d]{1,8})?)+")
_CHAINS = re.compile(r"(\d{1,3})\s?T\s?/?\s?(\d{1,3})\s?R", re.IGNORECASE)
_PRODUCT = re.compile(r"^(\d{1,3})\s*[x×*]\s*(\d{1,3})(?:\s*=\s*(\d{1,4}))?(?![\d.,-])")

_ACROSS = r"\b(?:h|hp|h-?pol\w*|horizontal\w*|orizzontal\w*|poziom\w*)"
_UPRIGHT = r"\b(?:v|vp|v-?pol\w*|verti[ck]a\w*|pion\w*)"
_WITH = r"\s*(?:[/+&,]|and|und|et|y|e|i|en)\s*"
_TWO = re.compile(
    rf"""
    ± | ^x$ | \+\s*45 | 45\s*°?\s*/\s*-\s*45 | x-?pol | cross-?pol | crossed | dual | slant | orthogonal | two
    | zwei | doppel | kreuz | double | croisée | doble | cruzada | doppia | incrociata | dupla | podwójna
    | krzyżowa | dubbel | kruis | rhcp\s*[/+&]\s*lhcp | lhcp\s*[/+&]\s*rhcp
    | {_ACROSS}{_WITH}{_UPRIGHT}\b | {_UPRIGHT}{_WITH}{_ACROSS}\b
    """,
    re.IGNORECASE | re.VERBOSE,
)
_ONE = re.compile(
    r"(?:linear\W+)?(?:single|linear|vertical\w*|vertikal\w*|verticale|pionowa|verticaal|horizontal\w*|v|h|vp|hp|one|circular\w*"
    r"|rhcp|lhcp|zirkular|einfach|simple)(?:[\s,-]+(?:linear|pol\w*|polari[sz]ed))?\.?",
    re.IGNORECASE,
)
_LEADING_COUNT = re.compile(
    r"([1-4])(?!\s*[\d.,°])\s*(?:$|[(x×,;:]|lin|pol|slant|orth|planes?)", re.IGNORECASE
)


def connectors(text: str) -> tuple[list[Quantity], str]:
    """Number of RF ports and type of connector in a tidy text; what was not understood.

    Ports come with the parameter ``rf_ports``, types with ``connector_type``, a calibration connector
    with ``calibration_ports``.

    >>> [(q.parameter, q.value) for q in connectors("2 x 4.3-10 female")[0]]
    [('rf_ports', 2.0), ('connector_type', '4.3-10 female')]
    """
    found: list[Quantity] = []
    calibration = _CALIBRATION.search(text)
    if calibration:
        found.append(Quantity(value=float(calibration.group(1) or 1), parameter="calibration_ports"))
        text = text[: calibration.start()] + text[calibration.end() :]
    text = _CONTROL.sub("", text)
    total, types, rest = _typed(text)
    if not types:
        total, rest = _untyped(text)
    ports = [] if total is None else [Quantity(value=total, parameter="rf_ports")]
    named = [Quantity(value=" + ".join(types), parameter="connector_type")] if types else []
    return [*ports, *named, *found], rest.strip(" ,;+()")


def connector_of_date(day: date) -> str | None:
    """The connector a spreadsheet may have made a date of: 16 July from '7-16'."""
    if (day.month, day.day) == (7, 16):
        return "7-16"
    if (day.month, day.day) in ((3, 4), (4, 3)) and day.year % 100 == 10:
        return "4.3-10"
    return None


def polarisations(text: str) -> float | None:
    """How many polarisations a tidy text names; ``±45°`` is two slants, not a tolerance.

    >>> polarisations("±45°"), polarisations("vertical"), polarisations("2 x 45")
    (2.0, 1.0, 2.0)
    """
    plain = text.strip().strip("()")
    leading = _LEADING_COUNT.match(plain)
    if leading:
        return float(leading.group(1))
    if _TWO.search(plain):
        return 2.0
    return 1.0 if _ONE.fullmatch(plain) else None


def _typed(text: str) -> tuple[float | None, list[str], str]:
    total: float | None = None
    types: list[str] = []
    rest: list[str] = []
    position = 0
    for match in _CONNECTOR.finditer(text):
        before = text[position : match.start()]
        count = _COUNT_BEFORE.search(before)
        end = match.end()
        if count:
            rest.append(before[: count.start()])
        else:
            rest.append(before)
            count = _COUNT_AFTER.match(text[end:])
            end += count.end() if count else 0
        if count:
            total = (total or 0.0) + float(count.group(1))
        types.append(_type_name(match))
        position = end
    return total, list(dict.fromkeys(types)), " ".join([*rest, text[position:]])


def _type_name(match: re.Match[str]) -> str:
    name = match.group("letter") or ""
    if match.group("name"):
        name = match.group("name").replace(" ", "").replace(",", ".").replace("/", "-")
    name = name.upper()
    return f"{name} {match.group('gender')}" if match.group("gender") else name


def _untyped(text: str) -> tuple[float | None, str]:
    summands = _SUM.fullmatch(text.split("(", maxsplit=1)[0].strip())
    if summands:
        return float(sum(int(n) for n in re.findall(r"(?<![\w.])\d{1,3}(?![\w.])", summands.group()))), ""
    chains = _CHAINS.fullmatch(text.strip())
    if chains and chains.group(1) == chains.group(2):
        return float(chains.group(1)), ""
    product = _PRODUCT.match(text)
    if product:
        first, second, stated = product.groups()
        return float(stated or int(first) * int(second)), text[product.end() :]
    match = _PORTS.match(text)
    return (float(match.group(1)), text[match.end() :]) if match else (None, text)
