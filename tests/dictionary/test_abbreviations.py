"""Abbreviated headings of catalogues, as makers with little room write them (common practice)."""

from __future__ import annotations

import pytest

from speccheck.intake.tables.labels import Labels

_SHORT = {
    "gain": (
        "Gain typ [dBi]", "G max", "Gan. (dBi)", "Guad. (dBi)",
    ),
    "horizontal_beamwidth": (
        "HPBW hor. [°]", "3dB BW H [°]", "Az. BW (°)", "Öffnungsw. H [°]", "Ouv. horiz. (°)",
        "Abert. H (°)", "Bundelbr. H (°)",
    ),
    "vertical_beamwidth": (
        "HPBW ver. [°]", "El. BW (°)", "HWB vert. [°]", "Apert. vert. (°)", "Szer. wiązki V (°)",
    ),
    "electrical_tilt": (
        "Elec. tilt [°]", "EDT [deg]", "Tilt el. [°]", "Incl. élec. (°)", "Poch. el. (°)",
    ),
    "front_to_back_ratio": (
        "FBR (dB)", "VRV [dB]", "Rapport AV/AR (dB)", "F/E (dB)", "P/T (dB)",
    ),
    "port_isolation": (
        "Isol. (dB)", "ISO [dB]", "Entk. [dB]", "Aisl. (dB)", "Izol. (dB)",
    ),
    "max_power_per_port": (
        "Pmax/port [W]", "Power/port (W)", "Puiss. max/accès (W)", "Pot. máx/puerto (W)", "Verm./poort (W)",
        "Leist./Port [W]",
    ),
    "array_rows": (
        "Elem./col.", "Elem. per column", "# rows",
    ),
    "weight": (
        "Wt. [kg]", "Net wt. (kg)", "Gew. [kg]", "Poids (kg)",
    ),
    "wind_load": (
        "WL front [N]", "Windl. frontal [N]", "Obc. wiatrem (N)", "Windbel. (N)",
    ),
    "wind_load_lateral": (
        "Wind load lat. [N]", "Wind L [N]",
    ),
    "survival_wind_speed": (
        "Vmax [km/h]", "Surv. wind [km/h]",
    ),
    "rf_ports": (
        "# ports", "Nb ports", "Ports [#]",
    ),
    "height+width+depth": (
        "Dims HxWxD [mm]", "HxWxD mm", "Abm. [mm]", "Wym. (mm)", "Afm. (mm)",
    ),
    "mimo_layers+uplink_layers": (
        "DL/UL layers",
    ),
}  # fmt: skip


@pytest.mark.parametrize(("keys", "heading"), [(k, h) for k, hs in _SHORT.items() for h in hs])
def test_an_abbreviation_is_known(keys: str, heading: str) -> None:
    assert Labels({}).of(heading).parameters == tuple(keys.split("+"))


@pytest.mark.parametrize("heading", ["Gew. [dBi]", "IM5 [dBc]"])
def test_an_abbreviation_in_another_unit_is_not(heading: str) -> None:
    assert Labels({}).of(heading).parameters == ()
