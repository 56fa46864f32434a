"""From a figure and its words to operator and limit, the right way round for each parameter."""

from __future__ import annotations

from speccheck.dictionary import Parameter
from speccheck.intake.tenders.wording.clauses import Clause
from speccheck.intake.tenders.wording.figures import Figure, Form
from speccheck.records import Value

_FLIPPED = {"≥": "≤", "≤": "≥", ">": "<", "<": ">"}
_ASKED = {"≥": "higher", ">": "higher", "≤": "lower", "<": "lower"}


def settle(parameter: Parameter, said: str, figure: Figure) -> Clause:
    """Operator, limit and doubts of one figure of a parameter.

    Parameters
    ----------
    parameter : what the figure limits
    said : comparator word class of data/requirement_words.toml, '' if the wording has none
    figure : the figure in the parameter's kind of unit
    """
    if figure.ambiguous:
        return Clause(parameter=parameter.key, unit=figure.unit).doubting("NUMBER")
    clause = _by_form(parameter, said, figure)
    if parameter.unit == "dBi" and figure.unit == "dB":
        clause = clause.doubting("REFERENCE")
    if not figure.unit and parameter.unit and "UNIT" not in clause.codes:
        clause = clause.doubting("NOUNIT", detail=parameter.unit)
    return clause


def _by_form(parameter: Parameter, said: str, figure: Figure) -> Clause:
    if parameter.direction == "contains":
        return _capability(parameter, said, figure)
    if figure.form is Form.TOLERANCE:
        return _window(parameter, figure, _around(figure))
    if figure.form is Form.RANGE:
        return _window(parameter, figure, (min(figure.numbers), max(figure.numbers)))
    if figure.form is Form.PLUS_MINUS:
        return _clause(parameter, figure, "within", (-figure.numbers[0], figure.numbers[0]))
    return _single(parameter, said, figure)


def _capability(parameter: Parameter, said: str, figure: Figure) -> Clause:
    """A range the offer must cover; one end alone leaves the other open."""
    if said in ("<", ">") and parameter.kind == "bands":
        return Clause(parameter=parameter.key, operator="all of").doubting("LIST")
    figure, slipped = _frequency_slip(parameter, figure)
    numbers = figure.numbers
    if figure.form is Form.PLUS_MINUS:
        clause = _clause(parameter, figure, "contains", (-numbers[0], numbers[0]))
    elif figure.form is Form.TOLERANCE:
        clause = _clause(parameter, figure, "contains", _around(figure))
    elif figure.form is Form.RANGE:
        clause = _clause(parameter, figure, "contains", (min(numbers), max(numbers)))
    elif said == "about":
        return _clause(parameter, figure, "information", numbers[0]).doubting("TOL")
    else:
        clause = _clause(parameter, figure, "contains", numbers[0]).doubting("RANGE")
    if parameter.kind == "scan":
        clause = clause.doubting("CRITERION")
    return clause.doubting("UNIT", detail="MHz figure below 10 read as GHz") if slipped else clause


def _frequency_slip(parameter: Parameter, figure: Figure) -> tuple[Figure, bool]:
    """'1.710 - 2.690 MHz' is a thousands point or gigahertz; both mean 1710 to 2690 MHz."""
    if parameter.kind != "bands" or figure.unit not in ("MHz", "") or max(figure.numbers) >= 10:
        return figure, False
    thousand = tuple(round(number * 1000, 6) for number in figure.numbers)
    return Figure(figure.form, thousand, "MHz", figure.slack_unit), True


def _around(figure: Figure) -> tuple[float, float]:
    middle, slack = figure.numbers
    if figure.slack_unit == "dB" and figure.unit in ("W", "kW"):
        factor = 10 ** (slack / 10)
        return middle / factor, middle * factor
    if figure.slack_unit == "%" and figure.unit != "%":
        return middle * (1 - slack / 100), middle * (1 + slack / 100)
    return middle - slack, middle + slack


def _window(parameter: Parameter, figure: Figure, limit: tuple[float, float]) -> Clause:
    clause = _clause(parameter, figure, "within", limit)
    return clause.doubting("UPPER") if parameter.direction in ("higher", "lower") else clause


def _single(parameter: Parameter, said: str, figure: Figure) -> Clause:
    value, turned, doubts = _usual_sign(parameter, said, figure)
    operator, more = _operator(parameter, turned)
    if value != figure.numbers[0] and said == "better":
        operator = "≥" if parameter.direction == "higher" else "≤"
    clause = _clause(parameter, figure, operator, value).doubting(*doubts, *more)
    if clashes(parameter, operator):
        clause = clause.doubting("CLASH", detail=f"{parameter.label}: {parameter.direction} is better")
    return clause


def clashes(parameter: Parameter, operator: str) -> bool:
    """Whether an operator asks for the worse direction of a parameter that has a better one."""
    asked = _ASKED.get(operator)
    return parameter.direction in ("higher", "lower") and asked is not None and asked != parameter.direction


def _usual_sign(parameter: Parameter, said: str, figure: Figure) -> tuple[float, str, tuple[str, ...]]:
    """Value in the dictionary's sign, the comparator to go with it, and a doubt where habits mix.

    '≤ -28 dB' isolation is ≥ 28 dB: the comparator turns with the sign. Where it did not turn
    ('≥ -28 dB', 'PIM max. 150 dBc') only the parameter's good direction makes sense; a dropped minus
    is always doubtful.
    """
    value = figure.numbers[0]
    dropped = parameter.sign == "negative" and value > 0 and figure.unit in ("", "dB", "dBc")
    added = parameter.sign == "positive" and value < 0
    if not dropped and not added:
        return value, said, ()
    unturned = _ASKED.get(said) == parameter.direction
    return -value, said if unturned else _FLIPPED.get(said, said), ("SIGN",) if dropped or unturned else ()


def _operator(parameter: Parameter, said: str) -> tuple[str, tuple[str, ...]]:
    """Operator and doubts of a comparator; direction comes from the words, or else from the parameter."""
    if said in ("≥", "≤", ">", "<", "="):
        return said, ()
    if said == "about" or (not said and parameter.direction == "window"):
        return "information", ("TOL",)
    if said == "up_to" and parameter.direction != "higher":
        return "≤", ()
    loose = {"higher": "≥", "lower": "≤"}.get(parameter.direction, "=")
    if said == "better":
        return {"≥": ">", "≤": "<"}.get(loose, "="), ("EQUAL",)
    if said == "or_better" and loose != "=":
        return loose, ()
    return "=" if parameter.kind == "connectors" else loose, ("DIR",)


def _clause(parameter: Parameter, figure: Figure, operator: str, limit: Value) -> Clause:
    return Clause(parameter=parameter.key, operator=operator, limit=limit, unit=figure.unit or parameter.unit)
