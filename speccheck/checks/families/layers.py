"""Antenna ports, layers and users: what the separately driven branches of a panel can carry."""

from __future__ import annotations

import re

from speccheck.checks.families.ports import group_count, whole
from speccheck.checks.registry import Case, Judgement, check
from speccheck.checks.saying import claim, named
from speccheck.records import Amount, Fit, Interval, Reading, Step
from speccheck.standards import PortLayout, layouts, port_layouts

MILLIMETRE_WAVE_MHZ = 24_250.0
"""Lower edge of frequency range 2 [MHz] (3GPP TS 38.104, clause 5.1)."""

FEW_LAYERS = 4
"""Layers that pass without a question above that edge: two a beam and polarisation pair, two panels."""

LAYERS_TO_ONE_DEVICE = 8
"""Most layers to one device below 6 GHz (3GPP TS 38.214 clause 5.1.1.1: up to eight)."""

_TO_ONE_DEVICE = re.compile(r"device|\bUE\b|terminal|per user|SU-?MIMO", re.IGNORECASE)


@check(
    "csi-rs-layout",
    "CSI-RS ports have a standard layout",
    needs=("csi_rs_ports",),
    optional=(
        "transceivers",
        "array_rows",
        "array_columns",
        "subarray_rows",
        "subarray_columns",
        "panel_groups",
    ),
    source="3GPP TS 38.214 Tables 5.2.2.2.1-2 (one panel) and 5.2.2.2.2-1 (several panels)",
)
def csi_rs_layout(
    *,
    csi_rs_ports: Reading,
    transceivers: Reading | None,
    array_rows: Reading | None,
    array_columns: Reading | None,
    subarray_rows: Reading | None,
    subarray_columns: Reading | None,
    panel_groups: Reading | None,
) -> Judgement:
    """Looks the number of CSI-RS ports up among the codebook layouts and holds it against the array.

    Ports count pairs of polarisations on a grid N1 × N2, not elements; a panel of 64 transceivers with 32
    ports is ordinary, since ports are combined. More ports than transceivers cannot be.

    Formula
    ports = 2 · N1 · N2 · Ng ≤ transceivers; N1 × N2 within the grid of sub-arrays, either way round

    Assumptions
    Layouts of Release 19 (48, 64, 128 ports) may lead to a question only, never to a misfit.

    Worked example
    32 ports: N1 × N2 of 4 × 4, 8 × 2 or 16 × 1. Twenty ports have no layout: 20 does not fit.
    """
    ports, groups = whole(csi_rs_ports), group_count(panel_groups)
    known = layouts(ports)
    trees = whole(transceivers, 0)
    steps = (Step("Layouts of so many ports", _printed(known) or "none", len(known)),)
    ask = "Please state N1, N2 and the number of panels of the codebook."
    amount = Amount(ports, "")
    if ports > 1 and not known:
        nearest = sorted({x.ports for x in port_layouts()}, key=lambda p: abs(p - ports))[:2]
        return Judgement(
            verdict=Fit.DOES_NOT_FIT,
            summary=f"{claim(csi_rs_ports)} CSI-RS ports claimed; the codebooks have no layout of so many"
            f" (nearest {' and '.join(map(str, sorted(nearest)))}).",
            claimed=amount,
            working=steps,
            question=ask,
        )
    if trees and ports > trees:
        return Judgement(
            verdict=Fit.DOES_NOT_FIT,
            summary=f"{claim(csi_rs_ports)} CSI-RS ports claimed with {named(transceivers)};"  # type: ignore[arg-type]
            f" {ports - trees} more ports than transceivers.",
            claimed=amount,
            expected=Interval(1, trees, ""),
            working=(*steps, Step("Ports over transceivers", f"{ports} − {trees}", ports - trees)),
            question=ask,
        )
    late = bool(known) and all(x.warn_only for x in known)
    grid = _port_grid(array_rows, array_columns, subarray_rows, subarray_columns)
    placed = not known or grid is None or any(_within(x, grid, groups) for x in known)
    doubt = " Only Release 19 knows so many ports." if late else ""
    doubt += (
        ""
        if placed
        else f" None of its layouts lies within the {grid[0]} × {grid[1]} sub-arrays."
        if grid
        else ""
    )
    return Judgement(
        verdict=Fit.DOUBTFUL if late or not placed else Fit.FITS,
        summary=f"{claim(csi_rs_ports)} CSI-RS ports claimed;"
        f" layouts {_printed(known) or 'single port'}.{doubt}",
        claimed=amount,
        expected=Interval(1, trees or None, ""),
        working=steps,
        assumptions=("Ports may be combined from several transceivers.",),
        question=ask,
    )


def _printed(known: tuple[PortLayout, ...]) -> str:
    return ", ".join(f"{x.n1} × {x.n2}" + (f" on {x.panels} panels" if x.panels > 1 else "") for x in known)


def _port_grid(
    rows: Reading | None, columns: Reading | None, down: Reading | None, across: Reading | None
) -> tuple[int, int] | None:
    if rows is None or columns is None:
        return None
    return max(1, whole(rows) // whole(down)), max(1, whole(columns) // whole(across))


def _within(layout: PortLayout, grid: tuple[int, int], groups: int) -> bool:
    if layout.panels not in (1, groups):
        return False
    ways = ((layout.n1, layout.n2), (layout.n2, layout.n1))
    return any(across <= grid[1] and down <= grid[0] for across, down in ways)


@check(
    "layers-fit-ports",
    "Layers fit the ports",
    needs=("mimo_layers",),
    optional=("transceivers", "rf_ports", "csi_rs_ports"),
    source="rank of a channel: no more layers than independent branches (any text on MIMO); common practice",
)
def layers_fit_ports(
    mimo_layers: Reading,
    transceivers: Reading | None,
    rf_ports: Reading | None,
    csi_rs_ports: Reading | None,
) -> Judgement:
    """Holds the layers against the branches that can carry them.

    Formula
    layers ≤ transceivers (or RF connectors of a passive panel); beyond the CSI-RS ports a question

    Assumptions
    Layers are those of one panel on the same resource, all users together, downlink.

    Worked example
    16 layers on 8 transceivers: 8 more than there are branches, does not fit.
    """
    branches = transceivers or rf_ports
    if branches is None or isinstance(branches.value, str):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("transceivers",))
    layers, most = whole(mimo_layers), whole(branches)
    observed = whole(csi_rs_ports, most)
    over = layers > most
    verdict = Fit.DOES_NOT_FIT if over else Fit.DOUBTFUL if layers > observed else Fit.FITS
    tail = (
        f"{layers - most} more than there are branches."
        if over
        else f"more than the {observed} CSI-RS ports that are fed back."
        if layers > observed
        else "each layer has a branch."
    )
    return Judgement(
        verdict=verdict,
        summary=f"{claim(mimo_layers)} layers claimed on {named(branches)}: {tail}",
        claimed=Amount(layers, ""),
        expected=Interval(1, most, ""),
        working=(Step("Layers beyond the branches", f"{layers} − {most}", layers - most),),
        assumptions=("Layers of one panel on the same resource, all users together, downlink.",),
        question="Please state how many layers are carried at once, to how many users.",
    )


@check(
    "layers-at-band",
    "Layers are usual for the band",
    needs=("mimo_layers",),
    source="common practice: many paths below 6 GHz, few at millimetre waves; TS 38.214 clause 5.1.1.1",
)
def layers_at_band(case: Case, mimo_layers: Reading) -> Judgement | None:
    """Asks where a millimetre-wave panel claims many layers, or one device more than eight.

    Below 6 GHz many paths carry up to eight layers to one device; millimetre-wave panels form beams
    along few paths.

    Formula
    from 24.25 GHz: layers ≤ 4 (two polarisations on two beams); to one device: layers ≤ 8

    Assumptions
    A claim beyond that is a question, not a misfit.

    Worked example
    16 layers at 26 GHz: more than 4, doubtful.
    """
    layers = whole(mimo_layers)
    above = case.band is not None and case.band[0] >= MILLIMETRE_WAVE_MHZ * 0.98
    device = re.search(
        r"device|\bUE\b|terminal|per user|SU-?MIMO", f"{mimo_layers.raw} {mimo_layers.condition}", re.I
    )
    if not above and not device:
        return None
    most = FEW_LAYERS if above else LAYERS_TO_ONE_DEVICE
    place = "at millimetre waves" if above else "to one device"
    return Judgement(
        verdict=Fit.FITS if layers <= most else Fit.DOUBTFUL,
        summary=f"{claim(mimo_layers)} layers claimed {place}; up to {most} are usual.",
        claimed=Amount(layers, ""),
        expected=Interval(1, most, ""),
        working=(Step("Layers beyond the usual", f"{layers} − {most}", layers - most),),
        assumptions=("Common practice, not a limit of physics.",),
        question="Please state the layers carried to one user and the beams that carry them at once.",
    )


@check(
    "users-fit-transceivers",
    "Users fit the transceivers",
    needs=("served_users",),
    optional=("transceivers", "rf_ports"),
    source="degrees of freedom of an array: N branches place N − 1 nulls (any text on adaptive arrays)",
)
def users_fit_transceivers(
    served_users: Reading, transceivers: Reading | None, rf_ports: Reading | None
) -> Judgement:
    """Counts the nulls needed to serve users at once: each user stands in the nulls of all others.

    Formula
    users ≤ branches − 1

    Assumptions
    Users are served on the same resource at the same moment, one layer each.

    Worked example
    64 users on 32 transceivers: at most 31 at once, does not fit.
    """
    branches = transceivers or rf_ports
    if branches is None or isinstance(branches.value, str):
        return Judgement(verdict=Fit.NOT_JUDGED, summary="", missing=("transceivers",))
    users, most = whole(served_users), max(1, whole(branches) - 1)
    verdict = Fit.FITS if users <= most else Fit.DOUBTFUL if users == most + 1 else Fit.DOES_NOT_FIT
    return Judgement(
        verdict=verdict,
        summary=f"{claim(served_users)} users at once claimed on {named(branches)}; each user in the nulls of"
        f" the others allows {most}.",
        claimed=Amount(users, ""),
        expected=Interval(1, most, ""),
        working=(Step("Users at once", f"{whole(branches)} − 1", most),),
        assumptions=("All users on the same resource at the same moment.",),
        question="Please state how many users are served on the same resource at the same moment.",
    )


@check(
    "panel-meaning",
    "Meaning of 'panel' is stated",
    needs=("panel_groups",),
    source="common practice: 'panel' is a housing, a group of elements in it, or a pair of beams",
    scope="panel",
)
def panel_meaning(panel_groups: Reading) -> Judgement:
    """Asks which meaning of 'panel' or 'multi-panel' a bid uses.

    Formula
    none: 'multi-panel' without numbers, or several groups without their distance, is a question

    Assumptions
    One group, or groups with numbers, need no question about the count.

    Worked example
    'multi-panel' alone is not judged; '1 x 2' counts two groups and fits.
    """
    text = str(panel_groups.value)
    if re.search(r"\d", text):
        return Judgement(
            verdict=Fit.FITS,
            summary=f"Panel groups {claim(panel_groups)}: {group_count(panel_groups)} in one housing.",
            claimed=Amount(panel_groups.value, ""),
            assumptions=("The groups stand in one housing.",),
        )
    return Judgement(
        verdict=Fit.NOT_JUDGED,
        summary=f"{claim(panel_groups)} is stated without numbers: not judged: 'panel' has several meanings.",
        claimed=Amount(text, ""),
        question=f"Please state ({panel_groups.where}) what 'panel' means here: separate housings, groups of"
        " elements in one housing, or beams; and how many.",
    )
