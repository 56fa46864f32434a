"""Demands on names: polarisation, connector, protection code, free text."""

from __future__ import annotations

import re
from collections.abc import Sequence

from speccheck.records import Compliance, Reading, Requirement
from speccheck.tender.grading import Grade

_GENDER = re.compile(r"\b(female|male)\b|\((f|m)\)", re.IGNORECASE)
_CODE = re.compile(r"IP\s*([X\d])([X\d])", re.IGNORECASE)
_JETS, _IMMERSION = "56", "78"


def compare_names(requirement: Requirement, readings: Sequence[Reading]) -> Grade:
    """Grade of offered names against the demanded one or ones."""
    judges = {"ingress_protection": _ingress, "connector_type": _connectors, "polarisations": _polarisation}
    judge = judges.get(requirement.parameter, _text)
    return judge(str(requirement.limit or ""), [_said(reading) for reading in readings], requirement.operator)


def _said(reading: Reading) -> str:
    return reading.raw if isinstance(reading.value, float | int | tuple) else f"{reading.value} {reading.raw}"


def _plain(text: str) -> str:
    return re.sub(r"[^a-z0-9.]+", "", text.casefold().replace("/", "-").replace("-", ""))


def _text(limit: str, said: Sequence[str], operator: str) -> Grade:
    wanted = [_plain(name) for name in limit.split(",") if name.strip()]
    if not wanted:
        return Grade(Compliance.NOT_JUDGED, None, "no name is demanded")
    have = [any(name in _plain(text) for text in said) for name in wanted]
    if any(have) if operator == "any of" else all(have):
        return Grade(Compliance.MEETS)
    return Grade(
        Compliance.NOT_JUDGED, None, "another wording was offered; whether it is equivalent is for a person"
    )


def _connectors(limit: str, said: Sequence[str], operator: str) -> Grade:
    wanted = {_interface(name): _gender(name) for name in limit.split(",") if name.strip()}
    offered = {name for text in said for name in _interfaces(text)}
    if not offered:
        return Grade(Compliance.NOT_JUDGED, None, "no connector type could be read from the offer")
    foreign = offered - set(wanted)
    if foreign:
        return Grade(
            Compliance.FAILS, None, f"offered type {', '.join(sorted(foreign))} is not among those demanded"
        )
    if operator == "all of" and set(wanted) - offered:
        return Grade(
            Compliance.FAILS, None, f"type {', '.join(sorted(set(wanted) - offered))} is not offered"
        )
    genders = {_gender(text) for text in said} - {""}
    asked = {gender for gender in wanted.values() if gender} or {"female"}
    if genders - asked:
        return Grade(
            Compliance.NOT_JUDGED,
            None,
            f"offered {', '.join(sorted(genders))}, read as demanded: {', '.join(asked)}",
        )
    return Grade(Compliance.MEETS)


def _interfaces(text: str) -> set[str]:
    found = re.findall(
        r"4\.3\s*[-/]\s*10|7\s*[-/]\s*16|NEX\s*10|2\.2\s*[-/]\s*5|\bN\b|MCX|MQ\d|SMP", text, re.IGNORECASE
    )
    return {_interface(name) for name in found}


def _interface(name: str) -> str:
    bare = re.sub(r"\b(?:fe)?male\b|\b(?:DIN|type)\b|[()\s]", "", name, flags=re.IGNORECASE)
    return bare.replace("/", "-").upper()


def _gender(text: str) -> str:
    found = _GENDER.search(text)
    if not found:
        return ""
    return (found[1] or {"f": "female", "m": "male"}[found[2].casefold()]).casefold()


def _polarisation(limit: str, said: Sequence[str], operator: str) -> Grade:
    del operator
    wanted = _polarisations(limit)
    offered = set().union(*(_polarisations(text) for text in said))
    if not wanted or not offered:
        return Grade(Compliance.NOT_JUDGED, None, "the polarisation could not be read")
    if wanted <= offered:
        return Grade(Compliance.MEETS)
    return Grade(
        Compliance.FAILS, None, f"offered {', '.join(sorted(offered))}, demanded {', '.join(sorted(wanted))}"
    )


def _polarisations(text: str) -> set[str]:
    folded = text.casefold()
    found: set[str] = set()
    if re.search(r"45|slant|cross[- ]?pol|x-pol|dual[- ]?slant", folded):
        found.add("±45°")
    if re.search(r"\bv(?:ertical)?\b|\bh/v\b|\bv/h\b|\bvpol\b", folded):
        found.add("vertical")
    if re.search(r"\bh(?:orizontal)?\b|\bh/v\b|\bv/h\b|\bhpol\b", folded):
        found.add("horizontal")
    return found


def _ingress(limit: str, said: Sequence[str], operator: str) -> Grade:
    """Solids are a ladder; water jets (5, 6) and immersion (7, 8) prove nothing of each other.

    Source: IEC 60529 (from memory).
    """
    del operator
    wanted, offered = _CODE.findall(limit), [code for text in said for code in _CODE.findall(text)]
    if not wanted or not offered:
        return Grade(Compliance.NOT_JUDGED, None, "no protection code could be read")
    solids, water = wanted[0]
    if solids.isdigit() and not any(code[0].isdigit() and code[0] >= solids for code in offered):
        return Grade(Compliance.FAILS, None, "protection against solids is lower")
    waters = {code[1] for code in offered}
    if any(_water_includes(have, water) for have in waters):
        return Grade(Compliance.MEETS)
    if water in _JETS and waters & set(_IMMERSION):
        return Grade(Compliance.NOT_JUDGED, None, "an immersion code does not prove the jet test; ask for it")
    return Grade(Compliance.FAILS, None, "protection against water is lower")


def _water_includes(have: str, want: str) -> bool:
    if want in ("X", have):
        return True
    ladder = "0123456"
    return have in ladder and want in ladder and ladder.index(have) >= ladder.index(want)
