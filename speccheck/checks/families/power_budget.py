"""Powers that must add up: ports and totals, transceivers and totals, mains power, base-station classes."""

from __future__ import annotations

from speccheck.checks.cell_text import half_digit, words
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
from speccheck.checks.transmit_power import transmit_power
from speccheck.physics.power import dbm, rf_efficiency, total_power_w
from speccheck.records import Amount, Fit, Interval, Reading, Step
from speccheck.standards import PowerClass, operating_bands, power_classes

_USUAL_EFFICIENCY = 0.45
_USUAL_TDD_DUTY = 0.75
_LEAST_SHARE = 0.15


@check(
    "port-power-adds-up",
    "Port power and panel power agree",
    needs=("max_power_total",),
    optional=("max_power_per_port", "rf_ports"),
    source="conservation of energy; a panel limit beside the port limit (common practice)",
    scope="panel",
)
def port_power_adds_up(
    case: Case,
    max_power_total: Reading,
    max_power_per_port: Reading | None,
    rf_ports: Reading | None,
) -> Judgement | None:
    """Holds the power the whole panel accepts against what its ports accept together.

    Formula
    P_panel ≤ ports × P_port

    Assumptions
    A panel limit below the sum is usual, because heat adds up: the figure per port then holds for few ports
    in use at a time, at the ambient temperature stated. Below 15 % of the sum it is asked about. The highest
    port rating of any band is taken.

    Worked example
    4 ports of 250 W accept 1000 W together. A panel limit of 1500 W does not fit.
    """
    if max_power_per_port is None or rf_ports is None:
        return None
    highest = max(r.high + half_digit(r) for r in case.panel.all("max_power_per_port"))
    together = float(total_power_w(highest, rf_ports.high))
    claimed = max_power_total.nominal
    one_at_a_time = max_power_per_port.at.get("one_port") == 1
    too_much = claimed - half_digit(max_power_total) > together
    little = claimed < _LEAST_SHARE * together and not one_at_a_time
    said = "exceeds" if too_much else "is a small share of" if little else "stays within"
    return Judgement(
        verdict=Fit.DOES_NOT_FIT if too_much else Fit.DOUBTFUL if little else Fit.FITS,
        summary=f"A panel limit of {claim(max_power_total)} {said} the {together:.5g} W its ports "
        "accept together.",
        claimed=Amount(claimed, "W"),
        expected=Interval(round(_LEAST_SHARE * together, 2), round(together, 2), "W"),
        working=(
            Step("Power of all ports", f"{rf_ports.high:g} × {highest:.5g} W", round(together, 3), "W"),
        ),
        assumptions=("Average powers at the same ambient temperature; the highest port rating of any band.",),
        question="Please state how many ports may carry their full power at the same time, and at which "
        "ambient temperature each figure holds.",
    )


@check(
    "transceiver-power-adds-up",
    "Transceiver power and conducted power agree",
    needs=("power_per_transceiver",),
    optional=("conducted_power", "transceivers"),
    source="conservation of energy: independent transmitters add in power",
)
def transceiver_power_adds_up(
    power_per_transceiver: Reading,
    conducted_power: Reading | None,
    transceivers: Reading | None,
) -> Judgement | None:
    """Holds the power of all transmitters against the power of one times their number.

    Formula
    P_total = N × P_one

    Assumptions
    Rated average powers at the same plane. Half of the last printed digit of both is allowed for; beyond it
    up to 1 dB is doubtful, more does not fit.

    Worked example
    64 transceivers of 5 W give 320 W, 55.05 dBm. A total of 200 W is 2.04 dB less: it does not fit.
    """
    if conducted_power is None or transceivers is None:
        return None
    slack = power_per_transceiver.tolerance or half_digit(power_per_transceiver)
    count = transceivers.nominal
    low = count * (power_per_transceiver.nominal - slack)
    high = count * (power_per_transceiver.nominal + slack)
    claimed, margin = conducted_power.nominal, half_digit(conducted_power) + 0.01 * conducted_power.nominal
    outside = low - claimed - margin > 0 or claimed - margin - high > 0
    nearest = min(max(claimed, low), high)
    off_db = abs(float(dbm(claimed)) - float(dbm(nearest))) if nearest > 0 else 99.0
    verdict = Fit.FITS if not outside else Fit.DOUBTFUL if off_db <= 1.0 else Fit.DOES_NOT_FIT
    total = float(total_power_w(power_per_transceiver.nominal, count))
    return Judgement(
        verdict=verdict,
        summary=f"{count:g} transceivers of {power_per_transceiver.nominal:g} W give {total:.5g} W; "
        f"{claim(conducted_power)} is stated.",
        claimed=Amount(claimed, "W"),
        expected=Interval(round(low, 3), round(high, 3), "W"),
        working=(
            Step("Power of all transceivers", f"{count:g} × {power_per_transceiver.nominal:g} W", total, "W"),
        ),
        assumptions=("Rated average powers of all transmitters, at the same plane.",),
        question="Please state the rated power of one transmitter and of all together, and whether either is "
        "per polarisation or per carrier.",
    )


@check(
    "mains-power-covers-rf",
    "Mains power covers the radio power",
    needs=("power_consumption",),
    optional=("tdd_duty",),
    about=("power_consumption",),
    source="conservation of energy; efficiency of active panels up to about 45 % (common practice)",
    scope="panel",
)
def mains_power_covers_rf(
    case: Case,
    power_consumption: Reading,
    tdd_duty: Reading | None,
) -> Judgement | None:
    """Holds the power drawn against the average radio power that leaves the panel.

    Formula
    η = F · P_rf / P_mains, with F the share of time spent transmitting; η ≤ 1

    Assumptions
    F as stated; else 75 % in bands where one frequency serves both directions, 100 % elsewhere. Above 100 %
    energy is not conserved; above 45 % is doubtful, since power amplifiers, receivers and processing share
    the mains power (common practice). The radio power of the strongest band counts.

    Worked example
    320 W from 500 W is 64 % without pause and 48 % at a downlink share of 75 %: doubtful. Consumption is
    often typical, at part load, while the radio power is the maximum.
    """
    bands = case.panel.bands or (None,)
    powers = [p for band in bands if (p := transmit_power(case.panel, band)) is not None]
    powers = [p for p in powers if not p.input_rating]
    if not powers:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("conducted_power",))
    strongest = max(powers, key=lambda p: p.nominal_w)
    duty = tdd_duty.nominal / 100 if tdd_duty else _usual_duty(case)
    if power_consumption.high <= 0:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("power_consumption",))
    share = float(rf_efficiency(strongest.low_w, power_consumption.high, duty))
    radiated_w = duty * strongest.nominal_w
    verdict = Fit.DOES_NOT_FIT if share > 1 else Fit.DOUBTFUL if share > _USUAL_EFFICIENCY else Fit.FITS
    shown = float(rf_efficiency(strongest.nominal_w, max(power_consumption.nominal, 1e-9), duty))
    return Judgement(
        verdict=verdict,
        summary=f"{strongest.nominal_w:.5g} W of radio power for {duty * 100:.3g} % of the time from "
        f"{claim(power_consumption)} is an efficiency of {shown * 100:.3g} %.",
        claimed=Amount(power_consumption.nominal, "W"),
        expected=Interval(round(radiated_w / _USUAL_EFFICIENCY, 2), None, "W"),
        working=(
            strongest.step,
            Step("Average radio power", f"{duty:g} × {strongest.nominal_w:.5g} W", round(radiated_w, 3), "W"),
            Step("Efficiency", f"{radiated_w:.5g} W / {power_consumption.nominal:g} W", round(shown, 4)),
        ),
        assumptions=(
            *strongest.assumptions,
            f"Downlink share {duty * 100:.3g} %, {'as stated' if tdd_duty else 'assumed'}.",
            "Up to 45 % of the mains power leaves as radio power (common practice).",
        ),
        question="Please state the load and the downlink share at which the power consumption holds, and the "
        "consumption at full radio power.",
        used=strongest.readings,
    )


def _usual_duty(case: Case) -> float:
    """75 % where any band of the panel lies inside a time-division band of NR, else 1."""
    spans = [
        b.downlink for b in operating_bands().values() if (b.rat, b.duplex) == ("NR", "TDD") and b.downlink
    ]
    inside = any(low <= b[0] and b[1] <= high for b in case.panel.bands for low, high in spans)
    return _USUAL_TDD_DUTY if inside else 1.0


@check(
    "power-within-station-class",
    "Power lies within the base-station class named",
    needs=(),
    optional=("panel_type", "standards", "remarks"),
    about=("panel_type", "standards", "remarks"),
    source="3GPP TS 38.104 Tables 6.2.1-1 and 6.2.1-2 (from memory)",
)
def power_within_station_class(
    case: Case,
    panel_type: Reading | None,
    standards: Reading | None,
    remarks: Reading | None,
) -> Judgement | None:
    """Holds the rated power against the limit of the base-station class the bid names.

    Formula
    medium range: P per transmitter ≤ 38 dBm; local area: P per transmitter ≤ 24 dBm; wide area: no limit

    Assumptions
    The class is read from the words on type, standards and remarks. The limit holds for one carrier; all
    transmitters are taken as equal. Half a decibel is allowed for rounding.

    Worked example
    A medium-range station of 8 transmitters and 100 W has 12.5 W, 40.97 dBm, each: above 38 dBm, it does
    not fit.
    """
    said = words(panel_type, standards, remarks)
    limits = [c for c in power_classes() if "per antenna connector" in c.quantity and c.name in said]
    power = transmit_power(case.panel, case.band)
    count = case.panel.get("transceivers", case.band) or case.panel.get("rf_ports", case.band)
    if not limits or power is None or power.input_rating or count is None or count.nominal < 1:
        return None
    each = power.nominal_w / count.nominal
    return _held_against_class(limits[0], float(dbm(each)), each, power.nominal_w, count)


def _held_against_class(
    limit: PowerClass, level: float, each: float, total: float, count: Reading
) -> Judgement:
    inside = limit.limit is None or level <= limit.limit + 0.5
    bound = "no upper limit" if limit.limit is None else f"at most {limit.limit:g} dBm"
    return Judgement(
        verdict=Fit.FITS if inside else Fit.DOES_NOT_FIT,
        summary=f"{each:.4g} W per transmitter, {level:.2f} dBm; the {limit.name} class has {bound}.",
        claimed=Amount(round(level, 3), "dBm"),
        expected=Interval(None, limit.limit, "dBm"),
        working=(
            Step("Power of one transmitter", f"{total:.5g} W / {count.nominal:g}", round(each, 4), "W"),
            Step("As a level", f"10·log10({each:.4g}) + 30", round(level, 3), "dBm"),
        ),
        assumptions=(f"One carrier; transmitters of equal power. {limit.source}, {limit.confidence}.",),
        question="Please state the base-station class and the rated carrier power per connector.",
        used=(count,),
    )
