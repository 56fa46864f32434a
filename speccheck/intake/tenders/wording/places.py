"""Places of a clause: the band, angle, tilt, wind speed or test power that a limit holds at."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field

from speccheck.dictionary import Parameter
from speccheck.intake.tenders.wording.figures import Figure, Form
from speccheck.intake.tenders.wording.lexicon import Kind
from speccheck.intake.tenders.wording.tokens import Token
from speccheck.quantities import convert, dimension
from speccheck.records import Band

_LOWEST_BARE_BAND_MHZ = 300.0
_OPEN_END_MHZ = 1e6
MHZ_PER_UNIT = {"MHz": 1.0, "GHz": 1000.0, "kHz": 0.001, "": 1.0}


@dataclass(frozen=True, slots=True, kw_only=True)
class Place:
    """Conditions a limit holds under; `texts` in the wording's own words."""

    bands: tuple[Band, ...] = ()
    at: Mapping[str, float] = field(default_factory=dict)
    texts: tuple[str, ...] = ()

    def __add__(self, other: Place) -> Place:
        return Place(
            bands=self.bands or other.bands,
            at={**other.at, **self.at},
            texts=tuple(dict.fromkeys((*self.texts, *other.texts))),
        )


def bare_band(figure: Figure, parameter: Parameter) -> bool:
    bare = figure.form is Form.RANGE and not figure.unit and min(figure.numbers) >= _LOWEST_BARE_BAND_MHZ
    return bare and parameter.direction != "contains" and parameter.unit in ("dBi", "dB", "dBc", "", "deg")


def place_of(segment: Sequence[Token], index: int, parameter: Parameter) -> Place:
    """What a figure that is no limit says about where the limit holds."""
    token = segment[index]
    figure = token.figure
    if figure is None:
        return Place()
    kind = dimension(figure.unit)
    if kind == "frequency" or bare_band(figure, parameter):
        return _frequency_place(segment, index, figure)
    if figure.form is Form.CARRIERS:
        return Place(at={"carrier_dbm": convert(figure.numbers[1], figure.unit, "dBm")}, texts=(token.text,))
    if kind == "angle":
        following = segment[index + 1 : index + 2]
        tilt = any(t.said in ("electrical_tilt", "tilt_steps") for t in following)
        return Place(at={"tilt_deg" if tilt else "angle_deg": figure.numbers[0]}, texts=(token.text,))
    if kind == "speed":
        speed = convert(figure.numbers[0], figure.unit, "m/s")
        return Place(at={"wind_speed_mps": speed}, texts=(token.text,))
    return Place(texts=(token.text,))


def _frequency_place(segment: Sequence[Token], index: int, figure: Figure) -> Place:
    factor = MHZ_PER_UNIT[figure.unit]
    numbers = [number * factor for number in figure.numbers]
    if figure.form is Form.RANGE:
        return Place(bands=((min(numbers), max(numbers)), *_listed_bands(segment, index)))
    before = segment[index - 1].said if index else ""
    if before in ("<", "≤", "up_to"):
        return Place(bands=((0.0, numbers[0]),))
    if before in (">", "≥"):
        return Place(bands=((numbers[0], _OPEN_END_MHZ),))
    return Place(at={"frequency_mhz": numbers[0]}, texts=(segment[index].text,))


def _listed_bands(segment: Sequence[Token], index: int) -> tuple[Band, ...]:
    """Further ranges of a list 'a/b/c MHz' that starts at `index`."""
    bands: list[Band] = []
    while index + 2 < len(segment) and (
        segment[index + 1].text in "/,;&" or segment[index + 1].kind is Kind.JOIN
    ):
        figure = segment[index + 2].figure
        if figure is None or figure.form is not Form.RANGE:
            break
        numbers = [number * MHZ_PER_UNIT.get(figure.unit, 1.0) for number in figure.numbers]
        bands.append((min(numbers), max(numbers)))
        index += 2
    return tuple(bands)
