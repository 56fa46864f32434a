"""The list of checks: each declares what it needs and gives only its judgement.

The runner supplies the readings by band, answers for missing ones, attaches cells, tries the
innocent readings and turns a crash into a finding.
"""

from __future__ import annotations

import inspect
from collections.abc import Callable
from dataclasses import dataclass
from typing import Literal

from speccheck.dictionary import parameters
from speccheck.records import Amount, Band, Fit, Interval, Panel, Reading, Settings, Step

Scope = Literal["band", "panel"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Judgement:
    """What a check function returns; the runner makes a Finding of it.

    `used` names readings beyond the arguments that the judgement stands on, so that their cells are
    shown; with `alone` it stands on these only.
    """

    verdict: Fit
    summary: str
    claimed: Amount | None = None
    expected: Interval | None = None
    working: tuple[Step, ...] = ()
    assumptions: tuple[str, ...] = ()
    question: str = ""
    missing: tuple[str, ...] = ()
    used: tuple[Reading, ...] = ()
    alone: bool = False


@dataclass(frozen=True, slots=True)
class Case:
    """What is being judged: the panel, the band [MHz] (None for a panel-wide check), the settings."""

    panel: Panel
    band: Band | None
    settings: Settings


JudgementFunction = Callable[..., Judgement | tuple[Judgement, ...] | None]


@dataclass(frozen=True, slots=True, kw_only=True)
class Check:
    """A registered check; `explanation` is its docstring."""

    slug: str
    title: str
    family: str
    scope: Scope
    needs: tuple[str, ...]
    optional: tuple[str, ...]
    about: tuple[str, ...]
    sees_impossible: bool
    arguments: frozenset[str]
    source: str
    explanation: str
    judge: JudgementFunction


CHECKS: dict[str, Check] = {}


def check(
    slug: str,
    title: str,
    *,
    needs: tuple[str, ...],
    source: str,
    optional: tuple[str, ...] = (),
    about: tuple[str, ...] = (),
    scope: Scope = "band",
    sees_impossible: bool = False,
) -> Callable[[JudgementFunction], JudgementFunction]:
    """Register a check function; it takes `case` and the parameters it names, as it wants.

    A needed parameter arrives as a Reading, an optional one as a Reading or None, by keyword. Declared
    parameters the function does not take are cited only. The function
    returns a Judgement (or several), or None where the check does not apply to this panel at all.
    `about` names the claims that are judged: where the panel states none of them (without `about`:
    none of `needs`), the check does not apply and nothing is reported missing. Figures outside what is
    possible at all are withheld unless a check says that it `sees_impossible` ones.

    Raises
    ------
    ValueError : a slug claimed twice, a parameter the dictionary does not know, an argument that
        was not declared, or a check without explanation
    """

    def register(judge: JudgementFunction) -> JudgementFunction:
        if slug in CHECKS:
            raise ValueError(f"check '{slug}' is registered twice")
        unknown = [key for key in (*needs, *optional, *about) if key not in parameters()]
        if unknown:
            raise ValueError(f"check '{slug}' names parameters the dictionary lacks: {', '.join(unknown)}")
        arguments = frozenset(inspect.signature(judge).parameters)
        odd = ", ".join(sorted(arguments - {"case", *needs, *optional}))
        if odd:
            raise ValueError(f"check '{slug}' takes arguments it does not declare: {odd}")
        explanation = inspect.getdoc(judge) or ""
        if not explanation:
            raise ValueError(f"check '{slug}' has no explanation")
        CHECKS[slug] = Check(
            slug=slug,
            title=title,
            family=judge.__module__.rsplit(".", 1)[-1],
            scope=scope,
            needs=needs,
            optional=optional,
            about=about or needs,
            sees_impossible=sees_impossible,
            arguments=arguments,
            source=source,
            explanation=explanation,
            judge=judge,
        )
        return judge

    return register
