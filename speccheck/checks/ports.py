"""Counts that must multiply: positions, polarisations, sub-arrays, transceivers, connectors."""

from __future__ import annotations

from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, named
from speccheck.records import Amount, Fit, Interval, Reading, Step

BOTH_POLARISATIONS = "Two polarisations: the bid states no number (common practice for sector panels)."


def polarisation_count(polarisations: Reading | None) -> tuple[int, tuple[str, ...]]:
    """Polarisations of one element position and what was assumed."""
    if polarisations is None or isinstance(polarisations.value, str):
        return 2, (BOTH_POLARISATIONS,)
    return max(1, round(polarisations.nominal)), ()


def whole(reading: Reading | None, otherwise: int = 1) -> int:
    """A count, or `otherwise` where none is stated."""
    return otherwise if reading is None or isinstance(reading.value, str) else round(reading.nominal)


def group_count(panel_groups: Reading | None) -> int:
    """Panel groups in one housing: '1 x 2' is two; 1 where nothing countable is stated."""
    if panel_groups is None:
        return 1
    if not isinstance(panel_groups.value, str):
        return max(1, round(panel_groups.nominal))
    counts = [int(p) for p in panel_groups.value.lower().replace("×", "x").split("x") if p.strip().isdigit()]
    product = 1
    for count in counts:
        product *= max(1, count)
    return product


@check(
    "elements-fit-counts",
    "Element count fits rows and columns",
    needs=("element_count", "array_rows"),
    optional=("array_columns", "polarisations", "panel_groups"),
    about=("element_count",),
    source="arithmetic; 3GPP TR 38.901 clause 7.3 (M, N, P)",
)
def elements_fit_counts(
    *,
    element_count: Reading,
    array_rows: Reading,
    array_columns: Reading | None,
    polarisations: Reading | None,
    panel_groups: Reading | None,
) -> Judgement:
    """Multiplies rows by columns and holds the product against the stated number of elements.

    A count may be of positions or of the dipoles of both polarisations; gain follows the positions.

    Formula
    positions = rows × columns × panel groups; dipoles = positions × polarisations

    Assumptions
    One column and one panel group where the bid states none; two polarisations where it states none.

    Worked example
    12 rows × 8 columns are 96 positions or 192 dipoles of two polarisations. 128 fits neither.
    """
    count, (each, assumed) = whole(element_count), polarisation_count(polarisations)
    rows, columns, groups = whole(array_rows), whole(array_columns), group_count(panel_groups)
    positions = rows * columns * groups
    formula = f"{rows} × {columns}" + (f" × {groups}" if groups > 1 else "")
    steps = (
        Step("Element positions", formula, positions),
        Step("Dipoles of all polarisations", f"{positions} × {each}", positions * each),
    )
    meanings = {positions: "positions", positions * each: "dipoles of both polarisations"}
    fits = count in meanings
    tail = (
        f"It counts {meanings[count]}."
        if fits
        else f"It matches neither; it differs by {count - positions:+d} and {count - positions * each:+d}."
    )
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOES_NOT_FIT,
        summary=f"{claim(element_count)} elements claimed; {formula} gives {positions} positions"
        f" or {positions * each} dipoles. {tail}",
        claimed=Amount(count, ""),
        expected=Interval(positions, positions * each, ""),
        working=steps,
        assumptions=assumed,
        question="Please state the number of element positions and whether both polarisations are counted.",
    )


@check(
    "transceivers-fit-subarrays",
    "Transceivers fit the sub-arrays",
    needs=("transceivers", "array_rows"),
    optional=("array_columns", "subarray_rows", "subarray_columns", "polarisations", "panel_groups"),
    about=("transceivers",),
    source="arithmetic; 3GPP TR 38.901 clause 7.3, TR 36.897 (elements per transceiver)",
)
def transceivers_fit_subarrays(
    *,
    transceivers: Reading,
    array_rows: Reading,
    array_columns: Reading | None,
    subarray_rows: Reading | None,
    subarray_columns: Reading | None,
    polarisations: Reading | None,
    panel_groups: Reading | None,
) -> Judgement:
    """Counts the sub-arrays of both polarisations: each needs a transceiver of its own.

    Formula
    transceivers = (rows ÷ sub-array rows) × (columns ÷ sub-array columns) × polarisations × panel groups

    Assumptions
    Equal sub-arrays. Where the bid states no sub-array, any whole division of rows and columns is accepted.
    Two polarisations where the bid states none.

    Worked example
    12 rows × 8 columns in sub-arrays of 3 × 1, two polarisations: 4 × 8 × 2 = 64; 128 do not fit.
    """
    claimed, (each, assumed) = whole(transceivers), polarisation_count(polarisations)
    rows, columns, groups = whole(array_rows), whole(array_columns), group_count(panel_groups)
    if subarray_rows is None and subarray_columns is None:
        return _any_subarray(transceivers, (rows, columns, each, groups), assumed)
    down, across = whole(subarray_rows), whole(subarray_columns)
    formula = f"({rows} ÷ {down}) × ({columns} ÷ {across}) × {each}" + (f" × {groups}" if groups > 1 else "")
    if rows % down or columns % across:
        return Judgement(
            verdict=Fit.DOUBTFUL,
            summary=f"{claim(transceivers)} transceivers claimed; {rows} × {columns} positions do not"
            f" divide into sub-arrays of {down} × {across}. Unequal sub-arrays would explain it.",
            claimed=Amount(claimed, ""),
            working=(Step("Sub-arrays", formula, rows / down * columns / across * each * groups),),
            assumptions=(*assumed, "Equal sub-arrays."),
            question="Please state how the elements are divided among the transceivers.",
        )
    expected = (rows // down) * (columns // across) * each * groups
    fits = expected == claimed
    ratio = "" if fits else f" The ratio is {claimed / expected:.3g}."
    return Judgement(
        verdict=Fit.FITS if fits else Fit.DOES_NOT_FIT,
        summary=f"{claim(transceivers)} transceivers claimed; {formula} = {expected}.{ratio}",
        claimed=Amount(claimed, ""),
        expected=Interval(expected, expected, ""),
        working=(Step("Sub-arrays of all polarisations", formula, expected),),
        assumptions=(*assumed, "Equal sub-arrays, each with a transceiver of its own."),
        question="Please state rows, columns, sub-array size and transceivers of one panel.",
    )


def _any_subarray(
    transceivers: Reading, counts: tuple[int, int, int, int], assumed: tuple[str, ...]
) -> Judgement:
    """Without a stated sub-array: is there any whole division that gives so many transceivers."""
    claimed, (rows, columns, each, groups) = whole(transceivers), counts
    divisions = [
        (down, across)
        for down in range(1, rows + 1)
        for across in range(1, columns + 1)
        if rows % down == 0 and columns % across == 0
        if (rows // down) * (columns // across) * each * groups == claimed
    ]
    most = rows * columns * each * groups
    said = (
        f"sub-arrays of {divisions[0][0]} × {divisions[0][1]} would give so many."
        if divisions
        else f"no whole sub-array of {rows} × {columns} positions gives so many (at most {most})."
    )
    return Judgement(
        verdict=Fit.FITS if divisions else Fit.DOES_NOT_FIT if claimed > most else Fit.DOUBTFUL,
        summary=f"{claim(transceivers)} transceivers claimed; {said}",
        claimed=Amount(claimed, ""),
        expected=Interval(each * groups, most, ""),
        working=(Step("Elements of all polarisations", f"{rows} × {columns} × {each} × {groups}", most),),
        assumptions=(*assumed, "The bid states no sub-array; any whole division is accepted."),
        question="Please state the sub-array size in rows and columns.",
    )


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
    Two polarisations where the bid states none; no combiner outside the panel.

    Worked example
    One column, two polarisations: 2 connectors. Four connectors do not fit unless there is a second column.
    """
    each, assumed = polarisation_count(polarisations)
    by_band = {r.band: r for r in case.panel.all("array_columns")}
    undivided = 1 if transceivers is not None else whole(array_rows)
    along = max(1, whole(array_rows) // whole(subarray_rows, undivided))
    arrays = sum(whole(r) for r in by_band.values()) * group_count(panel_groups) * along
    claimed, most = whole(rf_ports), arrays * each
    fits = claimed <= most and claimed % each == 0
    counted = " + ".join(str(whole(r)) for r in by_band.values()) + (f" × {along}" if along > 1 else "")
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
