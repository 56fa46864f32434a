"""Counts that must multiply: positions, polarisations, sub-arrays, transceivers, connectors."""

from __future__ import annotations

from speccheck.checks.model import FEW_BRANCHES
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim
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
    case: Case,
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
    total = _positions_of_all_bands(case) * groups if element_count.band is None else 0
    if total and total != positions:
        meanings |= {total: "positions of all bands", total * each: "dipoles of all bands"}
    fits = count in meanings
    if not fits and array_columns is None:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("array_columns",))
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


def _positions_of_all_bands(case: Case) -> int:
    """Positions of all arrays, where rows are stated by band; 0 where they are not."""
    rows = {r.band: r for r in case.panel.all("array_rows") if r.band is not None}
    return sum(whole(r) * whole(case.panel.get("array_columns", band)) for band, r in rows.items())


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
    if array_columns is None and claimed > FEW_BRANCHES:
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("array_columns",))
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
        summary=f"{claim(transceivers)} transceivers claimed; rows and columns of sub-arrays × polarisations"
        f" give {formula} = {expected}.{ratio}",
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
