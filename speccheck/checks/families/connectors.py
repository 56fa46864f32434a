"""Radio-frequency connectors against the columns and bands they feed."""

from __future__ import annotations

from speccheck.checks.families.ports import group_count, polarisation_count, whole
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, named
from speccheck.records import Amount, Fit, Interval, Reading, Step


@check(
    "connectors-fit-columns",
    "RF connectors fit the columns",
    needs=("rf_ports", "array_columns"),
    optional=(
        "polarisations",
        "array_rows",
        "subarray_rows",
        "transceivers",
        "calibration_ports",
        "panel_groups",
    ),
    about=("rf_ports",),
    source="arithmetic; two polarisations a column (common practice)",
    scope="panel",
)
def connectors_fit_columns(
    *,
    case: Case,
    rf_ports: Reading,
    polarisations: Reading | None,
    array_rows: Reading | None,
    subarray_rows: Reading | None,
    transceivers: Reading | None,
    calibration_ports: Reading | None,
    panel_groups: Reading | None,
) -> Judgement:
    """Counts what the radio-frequency connectors can feed: one for each column and polarisation at most.

    Columns fed together need fewer connectors, never more. Columns stated by band belong to arrays of
    their own and are added; a column divided into stated sub-arrays counts once for each of them, and one of
    an active panel that states none may be divided down to its elements.
    Connectors for control and calibration are not counted.

    Formula
    connectors = polarisations × k, with k from 1 to the number of separately fed columns of all bands

    Assumptions
    Two polarisations where the bid states none; no combiner outside the panel. Columns stated once for
    several bands may be there in each band.

    Worked example
    One column, two polarisations: 2 connectors. Four connectors do not fit unless there is a second column.
    """
    each, assumed = polarisation_count(polarisations)
    by_band = {r.band: r for r in case.panel.all("array_columns")}
    # columns stated once for several bands may stand for an array in each of them
    repeated = max(1, len(case.panel.bands)) if set(by_band) == {None} else 1
    undivided = 1 if transceivers is not None else whole(array_rows)
    along = max(1, whole(array_rows) // whole(subarray_rows, undivided))
    arrays = sum(whole(r) for r in by_band.values()) * repeated * group_count(panel_groups) * along
    claimed, most = whole(rf_ports), arrays * each
    fits = claimed <= most and claimed % each == 0
    counted = " + ".join(str(whole(r)) for r in by_band.values())
    counted += "".join(f" × {n}" for n in (repeated, along) if n > 1)
    rest = f" {named(calibration_ports)} is counted apart." if calibration_ports else ""
    odd = f" The count is no multiple of {each} polarisations." if claimed % each else ""
    over = f" That is {claimed - most} more than the columns can use." if claimed > most else ""
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOES_NOT_FIT,
        summary=f"{claim(rf_ports)} RF connectors claimed; {counted} columns of {each} polarisations use"
        f" {each} to {most}.{over}{odd}{rest}",
        claimed=Amount(claimed, ""),
        expected=Interval(each, most, ""),
        working=(Step("Most connectors", f"({counted}) × {each}", most),),
        assumptions=(*assumed, "Columns fed together share connectors; no combiner outside the panel."),
        question="Please state which column, band and polarisation each connector feeds.",
        used=tuple(by_band.values()),
    )


@check(
    "connectors-add-up",
    "Connectors by band add up",
    needs=("rf_ports", "ports_per_band"),
    about=("ports_per_band",),
    source="arithmetic; internal combiners reduce connectors (common practice)",
    scope="panel",
)
def connectors_add_up(case: Case, rf_ports: Reading) -> Judgement:
    """Adds the connectors of all bands and holds the sum against the connectors of the panel.

    Bands that share an array or an internal combiner share connectors, so the total may be smaller than
    the sum but never smaller than the largest band, and never larger than the sum.

    Formula
    largest of the bands ≤ connectors ≤ sum of the bands

    Assumptions
    Control and calibration connectors are not among them.

    Worked example
    Two bands of 4 and 4 connectors: 4 to 8. A total of 12 does not fit.
    """
    by_band = tuple({r.band: r for r in case.panel.all("ports_per_band")}.values())
    if len(by_band) == 1 and by_band[0].band is None:
        bands = max(1, len(case.panel.bands))
        counts = [whole(by_band[0])] * bands
    else:
        counts = [whole(r) for r in by_band]
    claimed, most, least = whole(rf_ports), sum(counts), max(counts)
    fits = least <= claimed <= most
    summed = " + ".join(map(str, counts))
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOES_NOT_FIT,
        summary=f"{claim(rf_ports)} RF connectors claimed for the panel; by band {summed} = {most}"
        + (", which agrees." if claimed == most else f"; {least} to {most} can be."),
        claimed=Amount(claimed, ""),
        expected=Interval(least, most, ""),
        working=(Step("Sum of the bands", summed, most), Step("Largest band", summed, least)),
        assumptions=("Bands may share connectors through an internal combiner.",),
        question="Please state the RF connectors by band, and the control and calibration connectors apart.",
        used=by_band,
    )
