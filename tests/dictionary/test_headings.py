"""Headings as bidders write them; what each means was written down by hand from the trade's usage."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from speccheck.dictionary import match_heading, parameters, synonyms
from speccheck.dictionary.concepts import rules
from speccheck.dictionary.index import _claim, index

KNOWN = [
    ("Gain [dBi]", ("gain",), "dBi"),
    ("Gain, dBi", ("gain",), "dBi"),
    ("GAIN (dBi)", ("gain",), "dBi"),
    ("Gewinn / dBi", ("gain",), "dBi"),
    ("1.4 Antenna gain:", ("gain",), ""),
    ("Half-power beam width, azimuth", ("horizontal_beamwidth",), ""),
    ("azimuth half power beamwidth (°)", ("horizontal_beamwidth",), "deg"),
    ("HPBW az", ("horizontal_beamwidth",), ""),
    ("Halbwertsbreite horizontal", ("horizontal_beamwidth",), ""),
    ("Ouverture à 3 dB (V)", ("vertical_beamwidth",), ""),
    ("Ancho de haz a media potencia, vertical", ("vertical_beamwidth",), ""),
    ("Apertura orizzontale a 3 dB", ("horizontal_beamwidth",), ""),
    ("Largura de feixe horizontal", ("horizontal_beamwidth",), ""),
    ("Szerokość wiązki w poziomie", ("horizontal_beamwidth",), ""),
    ("Bundelbreedte horizontaal", ("horizontal_beamwidth",), ""),
    ("Dipoles per column", ("array_rows",), ""),
    ("Radiators, vertical", ("array_rows",), ""),
    ("Columns of elements", ("array_columns",), ""),
    ("Pitch V", ("vertical_element_spacing",), ""),
    ("pitch H (mm)", ("horizontal_element_spacing",), "mm"),
    ("F/B", ("front_to_back_ratio",), ""),
    ("USLS", ("upper_sidelobe_suppression",), ""),
    ("XPD", ("cross_polar_discrimination",), ""),
    ("XPD ±60°", ("cross_polar_sector",), ""),
    ("Coupling between ports", ("port_isolation",), ""),
    ("ROS", ("vswr",), ""),
    ("PIM3", ("passive_intermodulation",), ""),
    ("P max / port", ("max_power_per_port",), ""),
    ("Max. power, whole antenna", ("max_power_total",), ""),
    ("RET range", ("electrical_tilt",), ""),
    ("Mass (net)", ("weight",), ""),
    ("Masse [kg]", ("weight",), "kg"),
    ("Maße", ("height", "width", "depth"), ""),
    ("Weight with brackets", ("weight_with_brackets",), ""),
    ("Wind load (side)", ("wind_load_lateral",), ""),
    ("Wind load, rear side", ("wind_load_rear",), ""),
    ("Frontal load at 42 m/s", ("wind_load",), ""),
    ("v survival", ("survival_wind_speed",), ""),
    ("Temperaturbereich", ("temperature_range",), ""),
    ("Gain of the element", ("element_gain",), ""),
    ("Hoehe", ("height",), ""),
]

SEVERAL = [
    ("Height x width x depth (mm)", ("height", "width", "depth")),
    ("Dimensions H×W×D", ("height", "width", "depth")),
    ("Size (height/width/depth)", ("height", "width", "depth")),
    ("W x H x D", ("width", "height", "depth")),
    ("L x W x H", ("height", "width", "depth")),
    ("Abmessungen (H x B x T)", ("height", "width", "depth")),
    ("Dimensions (H x L x P)", ("height", "width", "depth")),
    ("HPBW (H x V)", ("horizontal_beamwidth", "vertical_beamwidth")),
    ("Beamwidth V/H", ("vertical_beamwidth", "horizontal_beamwidth")),
    ("Sub-array (el × az)", ("subarray_rows", "subarray_columns")),
    ("rows x columns x pol", ("array_rows", "array_columns", "polarisations")),
    ("Array (columns x rows)", ("array_columns", "array_rows")),
    ("Element spacing (H x V)", ("horizontal_element_spacing", "vertical_element_spacing")),
    ("Steering range H/V", ("horizontal_scan", "vertical_scan")),
    ("TRX / ports", ("transceivers", "rf_ports")),
]


@pytest.mark.parametrize(("heading", "keys", "unit"), KNOWN, ids=[k[0] for k in KNOWN])
def test_a_heading_of_the_trade_is_recognised(heading: str, keys: tuple[str, ...], unit: str) -> None:
    found = match_heading(heading)
    assert (found.parameters, found.unit, found.exact) == (keys, unit, True)


@pytest.mark.parametrize(("heading", "keys"), SEVERAL, ids=[s[0] for s in SEVERAL])
def test_a_heading_over_several_figures_keeps_their_order(heading: str, keys: tuple[str, ...]) -> None:
    assert match_heading(heading).parameters == keys


@pytest.mark.parametrize(
    ("heading", "condition"),
    [
        ("Wind load, frontal, at 150 km/h", "150 km/h"),
        ("Intermodulation, 3rd order, 2 x 43 dBm carriers", "2 x 43 dBm"),
        ("Front-to-back ratio, total power, 180° ± 30°", "180° ± 30°"),
        ("Max. input power per port (at 50 °C)", "50 °C"),
        ("Gain 1710-2170 MHz", "1710-2170 MHz"),
        ("Cross-polar discrimination on axis", "on axis"),
        ("Gain (dBi), all tilts", "all tilts"),
    ],
)
def test_what_a_heading_says_beside_its_name_is_a_condition(heading: str, condition: str) -> None:
    found = match_heading(heading)
    assert len(found.parameters) == 1
    assert condition in found.condition


def test_a_bound_or_a_typical_value_in_the_heading_is_kept() -> None:
    assert match_heading("Max. input power per port").sense == "max"
    assert match_heading("Isolation (min.)").sense == "min"
    assert match_heading("Gain (typ.)").statistic == "typical"
    assert match_heading("Gain").sense == "nominal"


@pytest.mark.parametrize(
    "heading", ["Tolerance on gain", "Gain tolerance", "Toleranz Gewinn", "Gain tol. [dB]"]
)
def test_a_row_may_state_the_tolerance_of_another(heading: str) -> None:
    found = match_heading(heading)
    assert (found.parameters, found.tolerance_of) == (("gain",), True)


@pytest.mark.parametrize(
    "heading",
    [
        "Horizontl beamwidth",
        "Gain of scale",
        "Gain (single column of sub-panel)",
        "Weight with crate",
        "Total gains and losses of the company",
    ],
)
def test_a_near_miss_is_not_taken(heading: str) -> None:
    assert match_heading(heading).parameters == ()


def test_a_near_miss_comes_with_a_suggestion() -> None:
    assert "horizontal_beamwidth" in match_heading("Horizontl beamwidth").suggestions[0]


def test_the_buyers_own_headings_go_first() -> None:
    house = {"Leistungszahl A": "eirp", "Gain": "element_gain"}
    assert match_heading("LEISTUNGSZAHL a (dBm)", house).parameters == ("eirp",)
    assert match_heading("Gain [dBi]", house).parameters == ("element_gain",)


def test_no_heading_is_claimed_by_two_parameters() -> None:
    assert len(index()) > 5000


def test_a_heading_claimed_twice_is_refused_with_its_name() -> None:
    table = {"fold gain": "gain"}
    with pytest.raises(ValueError, match=r"headings/xx\.toml: 'gain, fold' is claimed by gain and by eirp"):
        _claim(table, "gain, fold", "eirp", "xx")


ALL = [(key, text) for table in synonyms().values() for key, texts in table.items() for text in texts]


def test_every_heading_of_the_dictionary_is_recognised_as_its_parameter() -> None:
    wrong = [
        (t, k)
        for k, t in ALL
        if "+".join(match_heading(t).parameters) != k and not match_heading(t).tolerance_of
    ]
    assert wrong == []


@given(st.sampled_from(ALL), st.sampled_from(["{} *", "{}:", "  {}  ", "{} (see remark)", "3.2 {}"]))
def test_case_and_trimmings_do_not_matter(entry: tuple[str, str], form: str) -> None:
    key, text = entry
    assert "+".join(match_heading(form.format(text.upper() if "ß" not in text else text)).parameters) == key


@given(st.text(max_size=200))
def test_any_text_is_a_heading_or_none(text: str) -> None:
    assert all(key in parameters() for key in match_heading(text).parameters)


@pytest.mark.parametrize(
    ("heading", "key"),
    [
        ("Vertical inter-element spacing", "vertical_element_spacing"),
        ("Pitch between columns", "horizontal_element_spacing"),
        ("Number of radiating elements, vertical", "array_rows"),
        ("Azimuth pattern width (3 dB)", "horizontal_beamwidth"),
        ("Elec. downtilt range", "electrical_tilt"),
        ("Steering range (az)", "horizontal_scan"),
        ("Sidelobe suppression above the beam", "upper_sidelobe_suppression"),
        ("Back radiation suppression", "front_to_back_ratio"),
        ("Intra-band port isolation", "port_isolation"),
        ("Permissible input power per port", "max_power_per_port"),
        ("Total power handling capacity", "max_power_total"),
        ("Conducted output power (all TRX)", "conducted_power"),
        ("Wind pressure load front", "wind_load"),
    ],
)
def test_a_heading_nobody_listed_is_put_together_from_its_words(heading: str, key: str) -> None:
    assert match_heading(heading).parameters == (key,)


@pytest.mark.parametrize(
    "heading",
    ["Gain margin", "Return loss of cable", "Antenna height above ground", "Wind load on tower",
     "Noise level", "Power", "Element of surprise", "Distance to site", "Weight of the radio",
     "Storage temperature"],
)  # fmt: skip
def test_one_word_that_is_not_understood_is_enough_to_refuse(heading: str) -> None:
    assert match_heading(heading).parameters == ()


def test_every_rule_names_known_parameters_and_concepts() -> None:
    assert all(part in parameters() for rule in rules() for part in rule.parameter.split("+"))
