"""Planes of beamwidths and pairs of ports in the wording of seven languages (common practice)."""

from __future__ import annotations

import pytest

from speccheck.dictionary import match_heading

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
