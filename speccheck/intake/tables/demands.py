"""Labels that hold what is asked for: 'Gain shall be not less than 17 dBi', 'VSWR ≤ 1.5'."""

from __future__ import annotations

import re

from speccheck.quantities import unit_name

_SHALL = (
    r"(?:shall|should|must|has to|have to|is to|are to|will|is|are|soll(?:te)?|muss|darf|doit|devra|debe"
    r"|deberá|deve|dovrà|deverá|musi|powinn[ayo]|moet|dient)"
)
_BE = (
    r"(?:not\s+)?(?:be|have|sein|être|ser|essere|być|wynosić|zijn|exceed|dépasser|superar|superare|exceder)?"
)
_BOUND = (
    r"(?:not less than|no less than|not lower than|not below|not more than|no more than|not greater than"
    r"|not exceeding|not above|at least|at most|minimum|maximum|min\.?|max\.?|better than|greater than"
    r"|more than|less than|lower than|higher than|smaller than|exceeding|above|below|up to|equal to|of"
    r"|from|mindestens|höchstens|nicht (?:unter|über)|nicht (?:weniger|mehr|kleiner|größer) als"
    r"|größer(?: als)?|kleiner(?: als)?|besser als|bis|von|au moins|au plus"
    r"|(?:supérieure?|inférieure?)(?: ou égale?)? à|ne dépassant pas|meilleure? que|de|al menos"
    r"|como máximo|como mínimo|(?:mayor|menor) (?:o igual )?(?:que|a|de)"
    r"|no (?:menor|mayor|inferior|superior) (?:a|de|que)|(?:super|infer)iore? a|almeno|al massimo"
    r"|non (?:inferiore|superiore) a|(?:maggiore|minore) (?:o uguale )?(?:di|a)|no mínimo|no máximo"
    r"|pelo menos|maior (?:ou igual )?(?:que|a)|não (?:inferior|superior) a|co najmniej|co najwyżej"
    r"|nie (?:mniej|więcej) niż|większ[aey] niż|mniejsz[aey] niż|powyżej|poniżej|ten minste|minimaal"
    r"|maximaal|niet (?:meer|minder) dan|groter dan|kleiner dan|beter dan|tot)"
)
_SIGN = r"(?:[≥≤<>=]+)"
_DEMAND = re.compile(
    rf"(?P<name>\S.*?)\s*[:,;–-]?\s*(?:{_SHALL}\s+{_BE}\s*)?"
    rf"(?:(?<!\w)(?:{_BOUND})(?!\w)\s*{_SIGN}?|{_SIGN}|(?<=exceed)|(?<=dépasser))\s*"
    r"[-−+±]?\d[\d.,]*(?:\s?[:/]\s?1(?!\d))?\s?(?P<unit>[^\W\d_]{1,7}(?:/[^\W\d_]{1,3})?|[°%])?"
    r"[^()\[\]—]*(?P<notes>(?:[(\[][^()\[\]\d]*[)\]])?)\W*$",
    re.IGNORECASE,
)
_SHALL_BEFORE_END = re.compile(rf"\s+{_SHALL}(?:\s+{_BE})?$", re.IGNORECASE)


def demanded(text: str) -> tuple[tuple[str, ...], str]:
    """Names that may head a label with a demand behind them, the fuller first, and the unit demanded.

    No names where there is no demand.

    >>> demanded("Weight shall not exceed 20 kg (without clamps)"), demanded("VSWR ≤ 1.5")
    ((('Weight (without clamps)', 'Weight'), 'kg'), (('VSWR',), ''))
    """
    cut = _DEMAND.fullmatch(text) if any(map(str.isdecimal, text)) else None
    if cut is None:
        return (), ""
    name = _SHALL_BEFORE_END.sub("", cut["name"]).strip(" ,;:–-([")
    return (f"{name} {cut['notes']}", name) if cut["notes"] else (name,), unit_name(cut["unit"] or "")
