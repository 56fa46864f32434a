"""Orders, carriers, wind speeds and temperatures in any place of a heading, in eight languages.

The headings are written by hand, ten a language for most parameters (common practice of data sheets).
"""

from __future__ import annotations

import pytest

from speccheck.dictionary import match_heading

PIM = """
PIM d'ordre 3 à 2 x 43 dBm (dBc)
PIM 3rd order, 2x43 dBm
3rd order PIM (dBc @ 2 x 43 dBm)
PIM3 2x43 dBm [dBc]
Passive intermodulation, third order, 2 carriers of 43 dBm
Passive Intermodulation (IM3, 2 x 20 W)
IM3 @ 2x43 dBm, dBc
Third-order passive intermodulation with 2 x 43 dBm carriers (dBc)
PIM (3rd order) at 2×20 W
Intermodulation products, 3rd order (2x43 dBm)
Passive Intermodulation 3. Ordnung bei 2 x 43 dBm [dBc]
PIM 3. Ordnung (2x43 dBm)
Intermodulation dritter Ordnung, 2 × 20 W
Passive Intermodulation, 2 Träger je 43 dBm (dBc)
IM-Produkte 3. Ordnung (2 x 43 dBm), dBc
PIM3, zwei Träger zu 43 dBm
Passive Intermodulation IM3 [dBc] bei 2x20 W
Intermodulation 3. Ord. @2x43 dBm
Intermodulationsprodukte 3. Ordnung (2×43 dBm)
Passive Intermodulation (2 x 43 dBm Träger)
Intermodulation passive d'ordre 3, 2 porteuses de 43 dBm (dBc)
Intermodulation passive du 3e ordre (2x43 dBm)
PIM 3ème ordre avec 2 x 20 W
Produits d'intermodulation d'ordre 3 (dBc, 2 x 43 dBm)
IMP d'ordre 3 à 2 x 43 dBm
Intermodulation passive (ordre 3) à 2×43 dBm
PIM ordre 3 (2x43 dBm)
Intermodulation d'ordre trois (dBc)
Intermodulation passive IM3 sous 2 x 43 dBm
Intermodulation passive, 3e ordre, deux porteuses 43 dBm
Intermodulación pasiva de 3.er orden a 2x43 dBm (dBc)
PIM de tercer orden con 2 portadoras de 43 dBm
Intermodulación de orden 3 (2 x 20 W)
Intermodulación pasiva (3º orden, 2x43 dBm)
PIM 3.er orden a 2 x 43 dBm
Productos de intermodulación de 3.er orden [dBc]
Intermodulación pasiva IM3 a 2×43 dBm
PIM (orden 3) con 2x43 dBm, dBc
Intermodulación pasiva, tercer orden
IM3 pasiva a 2 x 43 dBm
Intermodulazione passiva di 3° ordine a 2x43 dBm
Intermodulazione di terzo ordine con 2 x 20 W (dBc)
PIM di 3° ordine (2 x 43 dBm)
PIM del 3° ordine, 2 portanti da 43 dBm
Intermodulazione passiva (ordine 3) [dBc]
Prodotti di intermodulazione del terzo ordine
PIM ordine 3 a 2×43 dBm
Intermodulazione passiva IM3 (2x43 dBm)
Intermodulazione passiva, 3º ordine, due portanti 43 dBm
Intermodulazione 3o ordine
Intermodulação passiva de 3.ª ordem a 2x43 dBm (dBc)
PIM de 3ª ordem com 2 x 20 W
Intermodulação de terceira ordem (2x43 dBm)
PIM (3.ª ordem) com 2 portadoras de 43 dBm
Produtos de intermodulação de 3.ª ordem
Intermodulação passiva, ordem 3 [dBc]
PIM ordem 3 a 2×43 dBm
Intermodulação passiva IM3 (2 x 43 dBm)
Intermodulação passiva de 3ª ordem, duas portadoras 43 dBm
IM3 passiva com 2x43 dBm
Intermodulacja pasywna 3. rzędu przy 2x43 dBm (dBc)
PIM 3. rzędu (2 x 43 dBm)
Intermodulacja trzeciego rzędu, 2 nośne 43 dBm
Intermodulacja pasywna rzędu 3 przy 2 × 20 W
PIM3 przy 2x43 dBm [dBc]
Produkty intermodulacji 3. rzędu
Intermodulacja pasywna (IM3) dla 2x43 dBm
Pasywna intermodulacja 3 rzędu
Poziom intermodulacji 3. rzędu (2×43 dBm)
PIM III rzędu (2 x 43 dBm)
Passieve intermodulatie 3e orde bij 2x43 dBm (dBc)
PIM 3e orde (2 x 20 W)
Intermodulatie van de 3e orde met 2 x 43 dBm
Derde-orde intermodulatie (2x43 dBm)
Passieve intermodulatie, 3de orde [dBc]
Intermodulatieproducten 3e orde
PIM derde orde bij 2 dragers van 43 dBm
Passieve intermodulatie IM3 (2×43 dBm)
PIM, orde 3, 2x43 dBm
IM3 bij 2 x 43 dBm, dBc
"""

WIND = """
Frontal wind load at 150 km/h (N)
Wind load (frontal, 160 km/h)
Wind load, front, 42 m/s [N]
Wind load @ 150 km/h, frontal (N)
Windload frontal 93 mph (lbf)
Front wind load (at 150 km/h) N
Wind thrust (frontal, 160 km/h)
Wind force, frontal at 150 km/h
Wind loading at 160 km/h, front, N
Frontal wind force [N] @150 km/h
Windlast frontal bei 150 km/h [N]
Windlast (frontal, 150 km/h)
Windlast bei 42 m/s, frontal (N)
Windkraft frontal (160 km/h)
Windlast von vorn bei 150 km/h
Windlast vorne, 150 km/h [N]
Frontale Windlast @ 150 km/h
Windbelastung frontal (bei 150 km/h)
Windlast N (frontal bei 150 km/h)
Charge au vent frontale à 150 km/h (N)
Charge au vent (frontale, 150 km/h)
Prise au vent frontale à 160 km/h
Effort au vent (frontal, 160 km/h)
Effort du vent de face à 150 km/h [N]
Poussée du vent frontale (150 km/h)
Charge de vent, face, 42 m/s
Charge au vent de face (N à 150 km/h)
Force du vent frontale, 150 km/h
Charge au vent frontale @ 150 km/h, N
Empuje del viento (frontal, 160 km/h)
Carga de viento frontal a 150 km/h (N)
Carga al viento frontal, 150 km/h
Fuerza del viento frontal (160 km/h)
Empuje de viento a 150 km/h, frontal [N]
Carga de viento (frente, 150 km/h)
Carga frontal de viento a 42 m/s
Esfuerzo del viento frontal a 150 km/h
Carga del viento frontal @ 150 km/h
Resistencia al viento frontal 150 km/h (N)
Carico del vento frontale a 150 km/h (N)
Carico vento (frontale, 160 km/h)
Spinta del vento frontale a 150 km/h
Carico di vento frontale, 42 m/s [N]
Forza del vento frontale (150 km/h)
Carico frontale del vento a 160 km/h
Spinta vento (frontale) 150 km/h
Carico al vento frontale @ 150 km/h
Sforzo del vento frontale (150 km/h)
Carico del vento di fronte, 150 km/h
Carga de vento frontal a 150 km/h (N)
Carga do vento (frontal, 160 km/h)
Força do vento frontal a 150 km/h
Esforço do vento frontal (150 km/h)
Carga ao vento frontal, 42 m/s [N]
Empuxo do vento (frontal, 160 km/h)
Carga de vento @ 150 km/h, frontal
Carga frontal de vento (150 km/h)
Impulso do vento frontal 150 km/h
Carga de vento de frente a 150 km/h
Obciążenie wiatrem z przodu przy 150 km/h (N)
Obciążenie wiatrem (czołowe, 160 km/h)
Napór wiatru czołowy przy 150 km/h
Siła wiatru czołowa (150 km/h) [N]
Obciążenie wiatrem frontalne, 42 m/s
Parcie wiatru z przodu (160 km/h)
Siła naporu wiatru od frontu, 150 km/h
Obciążenie wiatrem @ 150 km/h, przód
Czołowe obciążenie wiatrem przy 150 km/h
Obciążenie od wiatru z przodu 150 km/h
Windbelasting frontaal bij 150 km/h (N)
Windbelasting (frontaal, 160 km/u)
Winddruk frontaal bij 150 km/h [N]
Windkracht voorzijde (150 km/u)
Frontale windbelasting, 42 m/s
Windlast frontaal @ 150 km/u
Windbelasting voorkant bij 160 km/h
Windbelasting van voren (150 km/u)
Windkracht frontaal, 150 km/u, N
Belasting door wind, frontaal (150 km/u)
"""

POWER = """
Rating per input (W)
Power rating per input (W)
Max. power per port at 50 °C (W)
Power per port (CW, 50 °C)
Power handling per port, 50 °C ambient [W]
Input power per port @ 40 °C
Max input power per port (W, at 50 °C)
Average power per port at +50°C
Maximum power / port at 50 °C ambient
Power handling capability per input W
Max. Leistung pro Port bei 50 °C (W)
Eingangsleistung pro Eingang [W] (50 °C)
Belastbarkeit je Port bei 50 °C
Max. Eingangsleistung je Eingang, 50 °C Umgebung
Leistung pro Anschluss (W, 40 °C)
Belastbarkeit pro Eingang (W)
Maximale Leistung je Eingang (50 °C Umgebungstemperatur)
Leistung pro Port @ 50 °C [W]
HF-Leistung je Anschluss bei +50 °C
Leistungsbelastbarkeit pro Port (W)
Puissance max. par accès à 50 °C (W)
Puissance admissible par entrée (50 °C)
Puissance par port, 50 °C ambiant [W]
Puissance maximale par connecteur à 40 °C
Tenue en puissance par accès (W)
Puissance d'entrée max. par port @ 50 °C
Puissance moyenne par accès (W à 50 °C)
Puissance admissible par accès, W
Puissance max./accès (50 °C)
Puissance nominale par entrée (W)
Potencia máx. por puerto a 50 °C (W)
Potencia admisible por entrada (50 °C)
Potencia máxima por puerto, 50 °C ambiente [W]
Potencia de entrada por puerto @ 50 °C
Potencia media por puerto (W a 50 °C)
Potencia por conector (W)
Capacidad de potencia por puerto (W)
Potencia máxima admisible por puerto
Potencia por entrada (W, 40 °C)
Potencia nominal por entrada (W)
Potenza max. per porta a 50 °C (W)
Potenza ammissibile per ingresso (50 °C)
Potenza massima per porta, 50 °C ambiente [W]
Potenza di ingresso per porta @ 50 °C
Potenza media per porta (W a 50 °C)
Potenza per connettore (W)
Potenza massima applicabile per porta
Potenza per ingresso (W, 40 °C)
Potenza nominale per ingresso
Potenza max/porta (W)
Potência máx. por porta a 50 °C (W)
Potência admissível por entrada (50 °C)
Potência máxima por porta, 50 °C ambiente [W]
Potência de entrada por porta @ 50 °C
Potência média por porta (W a 50 °C)
Potência por conector (W)
Capacidade de potência por porta (W)
Potência máxima admissível por porta
Potência por entrada (W, 40 °C)
Potência nominal por entrada (W)
Moc maks. na port przy 50 °C (W)
Dopuszczalna moc na wejście (50 °C)
Maksymalna moc na port, 50 °C otoczenia [W]
Moc wejściowa na port @ 50 °C
Średnia moc na port (W przy 50 °C)
Moc na złącze (W)
Obciążalność na port (W)
Maks. moc wejściowa na wejście
Moc na wejście (W, 40 °C)
Moc znamionowa na wejście (W)
Max. vermogen per poort bij 50 °C (W)
Toelaatbaar vermogen per ingang (50 °C)
Maximaal vermogen per poort, 50 °C omgeving [W]
Ingangsvermogen per poort @ 50 °C
Gemiddeld vermogen per poort (W bij 50 °C)
Vermogen per connector (W)
Belastbaarheid per poort (W)
Max. ingangsvermogen per ingang
Vermogen per ingang (W, 40 °C)
Nominaal vermogen per ingang (W)
"""

ISOLATION = """
Isolation between any two ports
Isolation between any ports (dB)
Isolation, any two ports, min.
Port-to-port isolation, any pair
Isolation between all ports
Entkopplung zwischen zwei beliebigen Ports
Entkopplung zwischen beliebigen Eingängen (dB)
Isolation entre deux accès quelconques
Isolation entre deux ports
Aislamiento entre dos puertos cualesquiera
Aislamiento entre puertos cualesquiera
Isolamento tra due porte qualsiasi
Isolamento fra porte qualsiasi
Isolamento entre duas portas quaisquer
Izolacja między dowolnymi portami
Izolacja między dowolnymi dwoma portami
Isolatie tussen twee willekeurige poorten
Isolatie tussen poorten onderling
"""


def _lines(text: str) -> list[str]:
    return text.strip().splitlines()


@pytest.mark.parametrize("heading", _lines(PIM))
def test_third_order_and_carriers_leave_intermodulation_what_it_is(heading: str) -> None:
    assert match_heading(heading).parameters == ("passive_intermodulation",)


@pytest.mark.parametrize("heading", _lines(WIND))
def test_wind_speed_and_side_leave_the_wind_load_what_it_is(heading: str) -> None:
    assert match_heading(heading).parameters == ("wind_load",)


@pytest.mark.parametrize("heading", _lines(POWER))
def test_temperature_leaves_the_power_of_a_port_what_it_is(heading: str) -> None:
    assert match_heading(heading).parameters == ("max_power_per_port",)


@pytest.mark.parametrize("heading", _lines(ISOLATION))
def test_any_two_ports_are_ports(heading: str) -> None:
    assert match_heading(heading).parameters == ("port_isolation",)


@pytest.mark.parametrize(
    ("heading", "key"),
    [
        ("PIM 5th order (2 x 43 dBm)", "passive_intermodulation"),
        ("Intermodulation 5. Ordnung", "passive_intermodulation"),
        ("Isolation between two bands", "port_isolation"),
        ("Max power, two ports (W)", "max_power_per_port"),
        ("Gain, any two columns", "subarray_gain"),
        ("Total power of all ports at 50 °C (W)", "max_power_per_port"),
        ("Side wind load at 150 km/h", "wind_load"),
    ],
)
def test_other_orders_ports_and_sides_are_other_parameters(heading: str, key: str) -> None:
    assert match_heading(heading).parameters != (key,)


@pytest.mark.parametrize(
    "words", ["2 carriers of 43 dBm", "2 portadoras de 43 dBm", "2 × 43 dBm", "2 Träger je 43 dBm"]
)
def test_carriers_become_a_condition(words: str) -> None:
    assert "43 dBm" in match_heading(f"PIM 3rd order, {words} (dBc)").condition


@pytest.mark.parametrize(
    "heading",
    [
        "Windlast frontal (v = 150 km/h)",
        "Wind load, v=42 m/s, front",
        "Wind load frontal (wind speed 150 km/h)",
        "Windlast frontal bei einer Windgeschwindigkeit von 150 km/h",
        "Windbelasting (windsnelheid 150 km/h)",
        "Carico del vento frontale (velocità del vento 150 km/h)",
        "Wind load N (frontal, 150 km/h)",
    ],
)
def test_the_symbol_of_a_speed_is_no_word_of_the_name(heading: str) -> None:
    found = match_heading(heading)
    assert found.parameters == ("wind_load",)
    assert any(speed in found.condition for speed in ("150 km/h", "42 m/s"))


def test_a_speed_in_the_name_of_a_speed_stays() -> None:
    assert match_heading("Survival wind speed 200 km/h").parameters == ("survival_wind_speed",)
    assert match_heading("Windlast seitlich (v = 150 km/h)").parameters == ("wind_load_lateral",)


@pytest.mark.parametrize(
    ("heading", "keys"),
    [
        ("Array size, rows", ("array_rows",)),
        ("Array size (columns)", ("array_columns",)),
        ("Ouverture à 3 dB H / V – 3 dB beamwidth H / V (°)", ("horizontal_beamwidth", "vertical_beamwidth")),
        ("Ouverture H / V - Beamwidth H / V", ("horizontal_beamwidth", "vertical_beamwidth")),
    ],
)
def test_sizes_by_word_and_lists_in_two_languages(heading: str, keys: tuple[str, ...]) -> None:
    assert match_heading(heading).parameters == keys


@pytest.mark.parametrize(
    "heading",
    [
        "Puissance admissible par connecteur",
        "Zulässige Leistung je Eingang",
        "Potenza ammissibile per porta",
        "Potencia admisible por puerto",
        "Potência admissível por porta",
        "Dopuszczalna moc na port",
        "Toelaatbaar vermogen per poort",
        "Permissible power per port",
        "Allowed power per port",
    ],
)
def test_what_is_permissible_is_a_maximum(heading: str) -> None:
    found = match_heading(heading)
    assert (found.parameters, found.sense) == (("max_power_per_port",), "max")


def test_the_level_of_a_width_keeps_its_unit() -> None:
    assert match_heading("Ouverture horizontale à -3 dB").condition == "-3 dB"
    assert match_heading("Half-power beamwidth at -3 dB, horizontal").condition == "-3 dB"
