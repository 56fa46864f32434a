"""Planes of beamwidths and pairs of ports in the wording of seven languages (common practice)."""

from __future__ import annotations

import pytest

from speccheck.dictionary import match_heading, specified

_HEADINGS = {
    "horizontal_beamwidth": (
        "Halbwertsbreite azimutal", "HWB in der Azimutebene", "ouverture dans le plan horizontal",
        "ancho de haz acimutal", "apertura orizz.", "abertura em azimute", "szerokość wiązki azymutalna",
        "bundelbreedte in het horizontale vlak",
    ),
    "vertical_beamwidth": (
        "Halbwertsbreite elevational", "ouverture dans le plan vertical", "ancho de haz en elevación",
        "larghezza del fascio sul piano verticale", "ângulo de meia potência vertical",
        "szerokość wiązki elewacyjna", "openingshoek el.",
    ),
    "port_isolation": (
        "Entkopplung der Tore", "découplage entre voies", "desacoplo entre puertos",
        "disaccoppiamento tra le porte", "desacoplamento entre polarizações", "odsprzężenie między portami",
        "ontkoppeling tussen de polarisaties",
    ),
    "interband_isolation": (
        "Entkopplung zwischen den Systemen", "isolation entre systèmes", "aislamiento entre sistemas",
        "isolamento tra i sistemi", "izolacja między systemami", "isolatie tussen de systemen",
        "isolation between systems", "isolation between arrays", "Isolation Band zu Band",
        "découplage inter-bandes", "aislamiento entre sub-bandas",
        "isolamento fra le bande", "isolação entre as bandas", "separacja międzypasmowa",
        "isolatie band tot band",
    ),
}  # fmt: skip


@pytest.mark.parametrize(("key", "heading"), [(k, h) for k, texts in _HEADINGS.items() for h in texts])
def test_the_heading_is_known(key: str, heading: str) -> None:
    assert match_heading(heading).parameters == (key,)


def test_half_power_is_no_mean() -> None:
    assert match_heading("ancho de haz a media potencia horizontal").statistic == ""
    assert match_heading("ganancia media").statistic == "mean"


_MORE = {
    "passive_intermodulation": (
        "Intermodulation 3. Ordnung bei 2 × 43 dBm [dBc]", "Intermodulación de 3.er orden 2x20 W",
        "intermodulazione passiva di terzo ordine", "PIM 3e ordre", "intermodulacja bierna",
    ),
    "rf_ports": ("N.º de puertos", "Anschlüsse gesamt", "liczba wejść", "numero di ingressi"),
    "cross_polar_discrimination": ("Discriminación polar cruzada (0°)", "XPD in Hauptrichtung"),
    "gain": (
        "garantierter Gewinn", "ganancia promedio", "ganho por banda", "gain of full array",
        "zysk dla pasma",
    ),
    "front_to_back_ratio": ("voor-naar-achterverhouding", "rapport av./arr.", "forward-to-back ratio"),
    "horizontal_beamwidth": ("Keulenbreite horizontal", "ancho de lóbulo horizontal", "apertura piano H"),
    "weight": ("Gewicht ohne Schellen", "poids hors supports", "waga bez mocowań", "peso sem kit de fixação"),
    "weight_with_brackets": (
        "Gewicht inkl. Montagekit", "weight incl. tilt bracket", "weight inc. fixings", "peso com fixações",
        "peso incluyendo abrazaderas", "peso incluse staffe", "gewicht inclusief montagebeugels",
    ),
    "power_per_transceiver": ("Output power per port (W)",),
    "peak_power_per_port": ("peak power per port",),
    "cross_polar_sector": ("XPD over ±60° sector",),
    "broadcast_gain": ("SSB beam gain", "gain, envelope of beams"),
}  # fmt: skip


@pytest.mark.parametrize(("key", "heading"), [(k, h) for k, texts in _MORE.items() for h in texts])
def test_a_wording_of_the_trade_is_known(key: str, heading: str) -> None:
    assert match_heading(heading).parameters == (key,)


_NEAR_MISSES = {
    "gain": (
        "gain flatness", "gain / gain flatness", "gain, ripple", "gain variation over band",
        "Gewinnschwankung",
        "variation de gain", "rizado de ganancia", "element gain", "gain of SSB beam", "column gain",
        "Rx gain",
    ),
    "wind_load": (
        "wind load lateral", "rear wind load", "maximum wind load", "ice load", "charge au vent latérale",
    ),
    "weight": (
        "weight of bracket", "Gewicht der Halterung", "poids de la fixation", "shipping weight",
        "masa uchwytów",
    ),
    "port_isolation": ("isolation inter-band", "isolation between systems", "isolation between columns"),
    "horizontal_beamwidth": (
        "10 dB azimuth beamwidth", "element beamwidth, horizontal", "azimuth beamwidth variation",
    ),
    "max_power_per_port": (
        "Power", "power consumption", "peak power per port", "output power per port", "total power",
    ),
    "survival_wind_speed": ("operational wind speed", "wind speed for wind load"),
    "electrical_tilt": ("mechanical tilt", "tilt accuracy", "tilt step"),
    "upper_sidelobe_suppression": ("lower sidelobe suppression", "azimuth sidelobe level"),
    "passive_intermodulation": ("PIM test power", "IM5", "intermodulation 5th order"),
    "temperature_range": ("storage temperature",),
    "height": ("packing dimensions", "mounting height", "height above ground"),
}  # fmt: skip


@pytest.mark.parametrize(("key", "heading"), [(k, h) for k, texts in _NEAR_MISSES.items() for h in texts])
def test_a_near_miss_is_never_the_main_parameter(key: str, heading: str) -> None:
    assert key not in match_heading(heading).parameters


@pytest.mark.parametrize("heading", ["gain tolerance", "Toleranz Gewinn", "azimuth beamwidth tolerance"])
def test_a_tolerance_is_said_to_be_one(heading: str) -> None:
    assert match_heading(heading).tolerance_of


_WITH = (
    "mit Halterungen", "inklusive Befestigung", "avec fixations", "y compris étriers", "con soportes",
    "incluyendo herrajes", "con staffe", "com fixações", "z uchwytami", "met beugels", "inclusief montageset",
)  # fmt: skip


@pytest.mark.parametrize("remark", _WITH)
def test_a_remark_beside_a_weight_says_that_brackets_are_counted_in(remark: str) -> None:
    assert specified("weight", remark) == "weight_with_brackets"


@pytest.mark.parametrize("remark", ["ohne Halterungen", "sans fixations", "sem fixações", "bez uchwytów"])
def test_a_weight_without_brackets_stays_a_weight(remark: str) -> None:
    assert specified("weight", remark) == "weight"
