"""Any assessment at all: a strategy for each record, made from its type hints."""

import dataclasses
import typing

from hypothesis import strategies as st

from speccheck.records import Assessment, CellRef, MirrorCell, MirrorSheet, PanelAssessment, Value

numbers = st.floats(allow_nan=False, allow_infinity=False)
values = st.one_of(numbers, st.tuples(numbers, numbers), st.text(max_size=8))
sheet_names = st.one_of(st.just("Bid"), st.text(max_size=40))
cells = st.builds(
    MirrorCell,
    st.sampled_from(["A1", "D3", "XFD9", "", "R1C1", "A1:B2"]),
    st.one_of(st.none(), st.text(), numbers),
)
mirrors = st.lists(st.builds(MirrorSheet, name=sheet_names, cells=st.lists(cells).map(tuple)), max_size=2)
places = st.builds(
    CellRef, st.just("bid.xlsx"), sheet_names, st.sampled_from(["A1", "D3", "", "ZZZ99999999"])
)
LEAVES = {
    CellRef: places,
    str: st.text(max_size=8),
    float: numbers,
    int: st.integers(0, 2**53),
    bool: st.booleans(),
}


def of(hint):  # noqa: PLR0911 - one line a kind of hint
    """A strategy for one type hint of a record, few items a list."""
    origin, arguments = typing.get_origin(hint), typing.get_args(hint)
    if hint == Value:
        return values
    if hint in LEAVES:
        return LEAVES[hint]
    if origin is tuple and arguments[-1] is not Ellipsis:
        return st.tuples(*map(of, arguments))
    if origin is tuple:
        return st.lists(of(arguments[0]), max_size=2).map(tuple)
    if origin is not None and issubclass(origin, typing.Mapping):
        return st.dictionaries(st.text(max_size=4), of(arguments[1]), max_size=2)
    if arguments:
        return st.one_of(*map(of, arguments))
    if hint is type(None):
        return st.none()
    if dataclasses.is_dataclass(hint):
        fields = {name: of(part) for name, part in typing.get_type_hints(hint).items()}
        return st.builds(hint, **fields)
    return st.sampled_from(list(hint))


@st.composite
def assessments(draw, *, mirrored=False):
    """Assessments whose submission holds the panels that were judged, as the pipeline makes them."""
    judged = draw(st.lists(of(PanelAssessment), min_size=1, max_size=2))
    one = draw(of(Assessment))
    mirror = tuple(draw(mirrors)) if mirrored else ()
    submission = dataclasses.replace(one.submission, panels=tuple(p.panel for p in judged), mirror=mirror)
    return dataclasses.replace(one, submission=submission, panels=tuple(judged))
