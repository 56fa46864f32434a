"""Small words around figures in eight languages: senses, statistics, ranges, places, statuses."""

from __future__ import annotations

from typing import Literal

WordRole = Literal["min", "max", "better", "statistic", "range", "from", "at", "and"]

_ROLES: dict[tuple[WordRole, str], str] = {
    (
        "min",
        "",
    ): """min min. minimum minimal minimale minimaal minimalny minimalna minimalnie mín mín. mínimo mínima
        minimo minima mind. mindestens wenigstens au_moins al_menos almeno pelo_menos no_mínimo co_najmniej ten_minste
        minstens at_least not_less_than no_less_than not_below not_fewer_than nicht_unter nie_mniej_niż pas_moins_de
        no_menos_de non_meno_di não_menos_que niet_minder_dan more_than greater_than above over exceeding mehr_als
        größer_als über plus_de supérieur_à más_de mayor_que superior_a più_di maggiore_di mais_de maior_que powyżej
        więcej_niż meer_dan groter_dan boven ab dès min.: or_more or_higher or_greater oder_mehr ou_plus o_más o_più
        ou_mais lub_więcej of_meer and_above""",
    (
        "max",
        "",
    ): """max max. maximum maximal maximale maximaal maksymalny maksymalna maksymalnie maks maks. máx máx.
        máximo máxima massimo massima massimi maximo höchstens au_plus al_máximo como_máximo al_massimo no_máximo
        co_najwyżej ten_hoogste hoogstens at_most up_to not_more_than no_more_than not_exceeding nicht_über
        nie_więcej_niż pas_plus_de no_más_de non_più_di não_mais_que niet_meer_dan less_than lower_than below under
        weniger_als kleiner_als unter moins_de inférieur_à menos_de menor_que inferior_a meno_di minore_di poniżej
        mniej_niż minder_dan kleiner_dan onder bis_zu jusqu'à hasta fino_a até or_less or_lower or_below oder_weniger
        ou_moins""",
    (
        "better",
        "",
    ): "better better_than besser besser_als meilleur_que mejor_que migliore_di melhor_que lepiej_niż beter_dan",
    (
        "statistic",
        "typical",
    ): """typ typ. typical typically typisch typischerweise typique típico típ. típ tipico
        tipica tip. típica typowo typowa typowy typowe""",
    ("statistic", "nominal"): "nom nom. nominal nominell nominale nominalny nominaal nenn nenn.",
    (
        "statistic",
        "mean",
    ): """mean avg avg. average averaged mittel mittelwert im_mittel moyenne moy. medio media média
        médio średnio średnia gemiddeld gemiddelde""",
    (
        "statistic",
        "approximate",
    ): """approx approx. approximately about around ca ca. circa c. etwa ungefähr env. environ
        aprox aprox. aproximadamente około ok. ongeveer""",
    ("range", ""): "to bis à a al do tot t/m até through thru zu",
    (
        "from",
        "",
    ): "from von vom de da dal od van between zwischen entre entre_le tra fra między desde del tussen",
    ("at", ""): "@ at bei a_una para chez przy bij für for con pour per_una @: na em",
    ("and", ""): "and und et y e i en ed und_zwar sowie oraz &",
}

ROLES: dict[str, tuple[WordRole, str]] = {
    word.replace("_", " "): role for role, words in _ROLES.items() for word in words.split()
}
"""Phrase, case-folded, to its role and, for statistics, their name."""

LONGEST_PHRASE = max(len(phrase.split()) for phrase in ROLES)

PLACES = frozenset(
    """frontal front frontale frente vorne frontseitig lateral side seitlich latérale latéral laterale boczne zijkant
    rear back hinten arrière trasera posteriore tył achter per port pro je par por puerto porta porto portu poort each
    input total gesamt totale total_power brackets clamps mounting kit with without mit ohne avec sans con sin senza com
    sem z bez met zonder incl excl including excluding horizontal vertical h v hor vert hor. vert. azimuth elevation az
    el lb mb hb on axis boresight all tilts tilt over band carriers carrier tones peak female male and the of in
    elements element dual-polarised polarisation polarisations rows columns ports cp
    total_power co-polar first copolar survival operational wind load net gross""".split()
)
"""Words that qualify a figure and are understood; anything else beside a figure is left over."""

STATUSES: dict[str, str] = {}
"""Fold of a whole cell to its status."""

_STATUS_PHRASES: dict[str, str] = {
    "missing": """- -- --- ---- ? ?? . / not_stated not_specified not_given not_provided unknown none_stated blank empty
        keine_angabe k.a. k._a. k.a nicht_angegeben offen_gelassen non_renseigné non_précisé n.c. non_communiqué
        no_indicado sin_datos no_especificado s/d non_indicato non_specificato não_indicado não_especificado brak
        brak_danych nie_podano niet_vermeld niet_opgegeven onbekend x""",
    "not applicable": """n/a n.a. na n.a n._a. n/a. not_applicable not_app. nicht_zutreffend entfällt n._z. n.z. nicht_anwendbar
        sans_objet s.o. s._o. non_applicable no_aplica no_procede n.d.a. non_applicabile não_aplicável não_se_aplica
        nie_dotyczy n.d. nd n.v.t. n._v._t. nvt niet_van_toepassing not_supported not_used nicht_unterstützt
        not_available n/av""",
    "to be advised": """tbd tba tbc tbd. t.b.d. t.b.a. t.b.c. to_be_advised to_be_confirmed to_be_defined
        to_be_determined to_be_announced to_follow pending on_request upon_request open wird_nachgereicht noch_offen
        folgt auf_anfrage offen à_définir à_confirmer à_préciser sur_demande por_definir por_confirmar a_confirmar
        bajo_pedido a_petición pendiente da_definire da_confermare su_richiesta a_definir sob_consulta a_pedido
        do_ustalenia do_potwierdzenia do_uzupełnienia na_zapytanie nader_te_bepalen n.t.b. ntb op_aanvraag volgt
        nog_te_bepalen""",
    "declared": """comply complies complied compliant fully_compliant full_compliance full_comply we_comply c fc yes y ok
        okay o.k. ✓ ✔ ☑ meets met conform conforms conforming conformity confirmed noted noted_and_complied agreed accepted
        understood exceeds true erfüllt wird_erfüllt ja j konform entspricht eingehalten bestätigt conforme oui o
        respecté satisfait accepté cumple cumplido sí si s conforme_al_pliego sì rispettato soddisfatto sim cumpre atende
        atendido spełnia spełnione zgodne zgodny tak t voldoet akkoord no n not_compliant non-compliant non_compliant nc
        does_not_comply not_comply does_not_meet false nein nicht_erfüllt non nie não niet_conform voldoet_niet nee
        nie_spełnia no_cumple non_conforme não_cumpre não_conforme ne_satisfait_pas partially_compliant pc partial_compliance
        partially teilweise_erfüllt partiellement compliant_with_remarks""",
}
STATUSES.update(
    {p.replace("_", " "): status for status, text in _STATUS_PHRASES.items() for p in text.split()}
)

REFERRALS = (
    "see",
    "refer to",
    "please refer",
    "please see",
    "cf.",
    "as per",
    "according to",
    "acc. to",
    "as above",
    "as stated in",
    "same as above",
    "ditto",
    "idem",
    "dto",
    "s. ",
    "siehe",
    "vgl.",
    "gemäß",
    "laut",
    "voir",
    "cf ",
    "selon",
    "véase",
    "ver ",
    "según",
    "vedi",
    "vedere",
    "come da",
    "conforme folha",
    "vide",
    "patrz",
    "zob.",
    "zgodnie z",
    "wg ",
    "zie",
    "conform bijlage",
    "volgens",
    "datasheet",
    "data sheet",
    "attached",
    "per attachment",
    "annex",
    "anlage",
    "annexe",
    "anexo",
    "allegato",
    "załącznik",
    "bijlage",
    "note",
)
"""Beginnings of a cell that points elsewhere instead of giving a figure."""

ERROR_VALUES = frozenset(
    "#div/0! #n/a #name? #null! #num! #ref! #value! #spill! #calc! #getting_data #field! #blocked! #unknown!".split()
)
