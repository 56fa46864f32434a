"""Tokens to amounts: a number or range with its tolerance, unit, sense, and how it is joined on."""

from __future__ import annotations

import itertools
from dataclasses import dataclass, field

from speccheck.quantities.lexer import Token
from speccheck.quantities.numerals import numeral
from speccheck.quantities.units import dimension

_JOINING = {"times": "×", "slash": "/", "sep": ",", "colon": ":", "plus": "+", "and": "and"}
_LOWEST_BAND_MHZ = 400.0
_OPENING = ("open", "sep")
"""Behind them a word such as 'min.' belongs to the figure that follows: '17.5 dBi (min. 17.0)'."""
_SHARING = ("×", "/", ",", "and")


@dataclass(slots=True)
class Amount:
    """A figure as it stands among its neighbours.

    `joined` is the sign before it: ``×``, ``/``, ``,``, ``:``, ``+``, ``and``, or empty.
    `joint` is the sign or word between the ends of a range.
    `role` is ``at`` after '@' or 'at', ``aside`` in parentheses. `plusminus` marks '±45'.
    """

    low: float
    high: float | None = None
    unit: str = ""
    tolerance: float | None = None
    tolerance_unit: str = ""
    sense: str = ""
    better: bool = False
    statistic: str = ""
    plusminus: bool = False
    joined: str = ""
    role: str = ""
    spelled: str = ""
    joint: str = ""
    words: list[str] = field(default_factory=list)
    before: list[str] = field(default_factory=list)


@dataclass(slots=True)
class _Pending:
    """What has been read since the last amount and belongs to the next."""

    sense: str = ""
    better: bool = False
    statistic: str = ""
    joined: str = ""
    at: bool = False
    words: list[str] = field(default_factory=list)


def amounts(tokens: list[Token], *, comma: bool) -> tuple[list[Amount], list[str]]:
    """All amounts of a cell in order, and the words that stand beside none."""
    return _Reader(tokens, comma).read()


class _Reader:
    def __init__(self, tokens: list[Token], comma: bool) -> None:
        self._tokens, self._comma = tokens, comma
        self._at = 0
        self._depth = 0
        self._found: list[Amount] = []
        self._pending = _Pending()
        first = next((t.kind for t in tokens if t.kind in ("num", "min", "max", "statistic")), "num")
        self._sense_leads = first != "num"

    def read(self) -> tuple[list[Amount], list[str]]:
        while self._at < len(self._tokens):
            if self._starts_amount():
                self._amount()
            else:
                self._other(self._tokens[self._at])
                self._at += 1
        leftover = self._pending.words
        if self._found:
            self._found[-1].words += leftover
            leftover = []
        _share_units(self._found)
        return self._found, leftover

    def _kind(self, ahead: int = 0) -> str:
        index = self._at + ahead
        return self._tokens[index].kind if index < len(self._tokens) else ""

    def _starts_amount(self) -> bool:
        if self._kind() == "num":
            return True
        return self._kind() in ("pm", "minus", "plus") and self._kind(1) == "num" and not self._joins_plus()

    def _joins_plus(self) -> bool:
        """A plus after a figure adds; at the start, after a slash or in a range it is a sign."""
        return (
            self._kind() == "plus"
            and self._at > 0
            and self._tokens[self._at - 1].kind in ("num", "unit", "word")
        )

    def _other(self, token: Token) -> None:
        kind, pending = token.kind, self._pending
        if kind in ("min", "max", "better", "statistic"):
            self._sense(token)
        elif kind == "open":
            self._depth += 1
        elif kind == "close":
            self._depth = max(0, self._depth - 1)
            self._settle_words()
        elif kind == "at":
            self._settle_words()
            self._pending.at = True
        elif kind in _JOINING:
            if kind == "plus" and self._found and self._kind(1) in ("", "close", "sep"):
                self._found[-1].sense = self._found[-1].sense or "min"
            if kind in ("sep", "slash", "times", "plus"):
                self._settle_words(keep=kind in ("times", "plus"))
            if kind != "colon" or self._tokens[self._at - 1].kind in ("num", "unit", "close"):
                pending.joined = _JOINING[kind]
        elif kind == "word":
            pending.words.append(token.text)
        elif kind == "unit" and self._found and not self._found[-1].unit:
            self._found[-1].unit = token.value
        elif kind == "unit" and token.text in ("V", "LB"):  # behind a unit: vertical plane, low band
            pending.words.append(token.text)

    def _settle_words(self, keep: bool = False) -> None:
        """Words up to a comma or a closing bracket belong to the amount before them."""
        if self._found and self._pending.words and not keep:
            self._found[-1].words += self._pending.words
            self._pending.words = []

    def _sense(self, token: Token) -> None:
        ahead = 2 if self._kind(1) == "colon" else 1  # 'Min: 16.5'
        follows = self._kind(ahead) in ("num", "minus", "plus", "pm", "open", "statistic", "min", "max")
        opens = self._at > 0 and self._tokens[self._at - 1].kind in _OPENING and self._kind(ahead) == "num"
        backward = bool(self._found) and not (self._sense_leads or self._pending.sense or opens)
        sign = token.text in "<>≤≥~≈"
        if self._found and (backward or not follows) and not sign:
            last = self._found[-1]
            if token.kind == "statistic":
                last.statistic = last.statistic or token.value
            elif token.kind == "better":
                last.better = True
            else:
                last.sense = last.sense or token.kind
            return
        if token.kind == "statistic":
            self._pending.statistic = token.value
        elif token.kind == "better":
            self._pending.better = True
        else:
            self._pending.sense = token.kind

    def _number(self) -> tuple[float, str]:
        sign = -1.0 if self._kind() == "minus" else 1.0
        if self._kind() in ("minus", "plus", "pm"):
            self._at += 1
        text = self._tokens[self._at].text
        self._at += 1
        value = numeral(text, comma=self._comma)
        return sign * (float("nan") if value is None else value), text

    def _unit(self) -> str:
        if self._kind() != "unit":
            return ""
        self._at += 1
        return self._tokens[self._at - 1].value

    def _amount(self) -> None:
        pending, self._pending = self._pending, _Pending()
        plusminus = self._kind() == "pm"
        low, spelled = self._number()
        found = Amount(
            low, plusminus=plusminus, spelled=spelled, sense=pending.sense, better=pending.better,
            statistic=pending.statistic, joined=pending.joined, before=pending.words,
            role="at" if pending.at else "aside" if self._depth else "",
        )  # fmt: skip
        found.unit = self._unit()
        self._range(found)
        self._tolerance(found)
        if self._kind() == "colon" and self._kind(1) == "num" and self._tokens[self._at + 1].text == "1":
            self._at += 2
        self._found.append(found)

    def _range(self, found: Amount) -> None:
        signed = 1 + (self._kind(1) in ("minus", "plus"))
        if self._kind() == "range" and self._kind(signed) == "num" and self._same_kind(found, signed + 1):
            found.joint = self._tokens[self._at].text
            self._at += 1
            found.high, spelled = self._number()
            found.spelled += "-" + spelled
            upper = self._unit()
            found.unit, found.tolerance_unit = upper or found.unit, ""
        elif self._kind() == "and" and self._kind(signed) == "num" and self._between():
            self._at += 1
            found.high, _ = self._number()
            found.unit = self._unit() or found.unit

    def _same_kind(self, found: Amount, ahead: int) -> bool:
        """'65° -3 dB' is no range: the ends are of two kinds."""
        upper = self._tokens[self._at + ahead].value if self._kind(ahead) == "unit" else ""
        return not upper or not found.unit or dimension(upper) == dimension(found.unit)

    def _between(self) -> bool:
        return any(token.kind == "from" for token in self._tokens[: self._at])

    def _tolerance(self, found: Amount) -> None:
        bracket = self._kind() == "open" and self._kind(1) == "pm" and self._kind(2) == "num"
        if not self._tolerance_fits(found, bracket):
            return
        if bracket:
            self._at += 1
        if self._kind() == "pm" and self._kind(1) == "num":
            found.tolerance, _ = self._number()
            found.tolerance_unit = self._unit()
            if bracket and self._kind() == "close":
                self._at += 1
        elif self._uneven():
            self._at += 1
            upper, _ = self._number()
            unit = self._unit()
            self._at += 1
            lower, _ = self._number()
            found.tolerance, found.tolerance_unit = max(abs(upper), abs(lower)), self._unit() or unit
        if not found.unit and found.tolerance_unit != "%":
            found.unit = found.tolerance_unit

    def _tolerance_fits(self, found: Amount, bracket: bool) -> bool:
        """'> 10 dB (±60°)' names a place; '300 W ± 1 dB' and '65 ± 5 %' are tolerances."""
        if self._kind(bracket) != "pm" or self._kind(1 + bracket) != "num":
            return True
        index = self._at + 2 + bracket
        unit = self._tokens[index].value if self._kind(2 + bracket) == "unit" else ""
        size = numeral(self._tokens[self._at + 1 + bracket].text, comma=self._comma) if bracket else None
        if size is not None and not found.unit and size > abs(found.low):
            return False
        same = dimension(unit) == dimension(found.unit)
        return not unit or not found.unit or same or unit in ("%", "dB")

    def _uneven(self) -> bool:
        """'+0.5/-0.3' after a figure."""
        kinds = [self._kind(i) for i in range(7) if self._kind(i) != "unit"]
        return kinds[:5] == ["plus", "num", "slash", "minus", "num"]


def _is_band(amount: Amount) -> bool:
    """Whether a range without unit can only be one of megahertz: '694-960: 15.5 dBi, 1695-2690: 17.8'."""
    return amount.high is not None and not amount.unit and _LOWEST_BAND_MHZ <= amount.low < amount.high


def _share_units(found: list[Amount]) -> None:
    """'1998 x 356 x 115 mm' gives its unit to all three; a label before a colon keeps its own."""
    for left, right in itertools.pairwise(found):
        both_ranges = left.high is not None and right.high is not None
        if left.role == "at" and right.joined == "/" and both_ranges:
            right.role = "at"
    pairs = list(itertools.pairwise(found))
    labels = {id(left) for left, right in pairs if right.joined == ":"}
    shared = [
        (a, b) for a, b in pairs if b.joined in _SHARING and a.role == b.role and _is_band(a) == _is_band(b)
    ]
    for left, right in reversed(shared):
        if not left.unit and (id(right) not in labels or id(left) in labels or right.joined == "/"):
            left.unit = right.unit
    for left, right in shared:
        if not right.unit:
            right.unit = left.unit
