"""Demands for named things: bands, connectors, protection codes, standards, polarisations."""

from __future__ import annotations

import re
from collections.abc import Sequence

from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.intake.tenders.wording.figures import Form
from speccheck.intake.tenders.wording.lexicon import Kind
from speccheck.intake.tenders.wording.segments import own_level, segments
from speccheck.intake.tenders.wording.tokens import Token

_TRX = re.compile(r"(\d+)T(\d+)R", re.IGNORECASE)


def of_kind(found: Sequence[Token], kind: Kind) -> tuple[Token, ...]:
    """Tokens of one kind, in order."""
    return tuple(token for token in found if token.kind is kind)


def band_names(found: Sequence[Token]) -> tuple[Clause, ...]:
    """'n78 and n77', 'n78 or n77', 'n77/n78'; a range in brackets narrows the name to it."""
    names = tuple(token.text for token in of_kind(found, Kind.BAND_NAME))
    ranges = [
        t.figure
        for t in of_kind(found, Kind.QUANTITY)
        if t.figure is not None and t.figure.form is Form.RANGE
    ]
    if len(names) == 1 and len(ranges) == 1:
        limit = (min(ranges[0].numbers), max(ranges[0].numbers))
        unit = ranges[0].unit or "MHz"
        return (
            Clause(parameter="operating_bands", operator="contains", limit=limit, unit=unit, scope=names[0]),
        )
    clause = Clause(
        parameter="operating_bands",
        operator=_joined(found, Kind.BAND_NAME),
        limit=", ".join(names),
        unit="MHz",
    )
    slash = len(names) > 1 and any(t.text == "/" for t in found) and not of_kind(found, Kind.JOIN)
    return (clause.doubting("ANDOR") if slash else clause,)


def connectors(found: Sequence[Token]) -> tuple[Clause, ...]:
    """'4.3-10', '7/16 DIN or 4.3-10'; names, never ranges."""
    names = tuple(re.sub(r"^\d+\s*x\s*", "", t.text) for t in of_kind(found, Kind.CONNECTOR))
    several = len(set(names)) > 1
    operator = _joined(found, Kind.CONNECTOR) if several else "text"
    clause = Clause(parameter="connector_type", operator=operator, limit=", ".join(dict.fromkeys(names)))
    if not any("male" in name.casefold() for name in names):
        clause = clause.doubting("SEX")
    return (clause.doubting("MIXED") if several and operator == "any of" else clause,)


def ingress(found: Sequence[Token]) -> tuple[Clause, ...]:
    """'IP65 or better'; the second digit is no ladder (IEC 60529, from memory)."""
    code = of_kind(found, Kind.INGRESS)[0].text
    clause = Clause(parameter="ingress_protection", operator="text", limit=code.upper().replace(" ", ""))
    return (clause.doubting("LADDER") if any(t.said == "or_better" for t in found) else clause,)


def branches(found: Sequence[Token]) -> tuple[Clause, ...]:
    """'32T32R or higher'; with unequal numbers the smaller is demanded of both ways."""
    code = of_kind(found, Kind.BRANCHES)[0].text
    match = _TRX.match(code)
    transmit, receive = (int(number) for number in match.groups()) if match else (0, 0)
    said = [t.said for t in of_kind(found, Kind.COMPARATOR)]
    operator = "≥" if said else "="
    clause = Clause(
        parameter="transceivers", operator=operator, limit=float(min(transmit, receive)), scope=code
    )
    return (clause if said and transmit == receive else clause.doubting("DIR"),)


def standards(found: Sequence[Token]) -> tuple[Clause, ...]:
    """'3GPP TS 38.104 (latest version)', 'AISG v2.0': papers to be shown, version pinned."""
    names = of_kind(found, Kind.STANDARD)
    versions = of_kind(found, Kind.VERSION)
    control = any(t.text.upper() == "AISG" for t in names)
    parameter = "control_protocol" if control else "standards"
    if versions:
        clauses = tuple(
            Clause(
                parameter=parameter,
                operator="evidence",
                limit=f"{names[0].text} {token.text}",
                level=own_level(part),
            )
            for part in segments(found)
            for token in of_kind(part, Kind.VERSION)
        )
    else:
        clauses = tuple(Clause(parameter=parameter, operator="evidence", limit=t.text) for t in names)
    latest = any("latest" in t.text.casefold() for t in found)
    return tuple(clause.doubting("VERSION") for clause in clauses) if latest else clauses


def polarisations(found: Sequence[Token]) -> tuple[Clause, ...]:
    """'±45°' names two slanted polarisations and is no window."""
    slants = [t.text for t in of_kind(found, Kind.QUANTITY)]
    words = [t.text for t in found if t.kind in (Kind.PLANE, Kind.UNREAD, Kind.SCOPE)]
    limit = ", ".join(slants) or " ".join(words)
    clause = Clause(
        parameter="polarisations", operator="text", limit=limit.replace(" ", "") if slants else limit
    )
    return (clause if limit else clause.doubting("VALUE"),)


def _joined(found: Sequence[Token], kind: Kind) -> str:
    """'any of' where an 'or' stands between two names, else 'all of'."""
    places = [i for i, token in enumerate(found) if token.kind is kind]
    between = found[places[0] : places[-1]]
    return "any of" if any(t.kind is Kind.JOIN and t.said == "or" for t in between) else "all of"
