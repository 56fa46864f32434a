"""XML from outside, read as a stream of elements.

The parser of the standard library keeps no tree, so memory does not grow with the file. A document type is
refused at once: without one there are no entities to expand and nothing external to fetch.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping
from xml.parsers import expat

from speccheck.errors import UnusableInputError
from speccheck.intake.files.limits import Limits

_LONG = 500_000
"""A piece of this many bytes without a new element is one text no cell can hold."""

Starts = Mapping[str, Callable[[dict[str, str]], None]]
"""What is done at the start of an element, given its attributes, by the element's name."""

Ends = Mapping[str, Callable[[], None]]
Text = Callable[[str], None]


def stream(
    chunks: Iterable[bytes], *, file: str, part: str, limits: Limits, starts: Starts, ends: Ends, text: Text
) -> None:
    """Feed a part to the handlers, found by element names without their namespace prefix.

    Raises
    ------
    UnusableInputError : not well formed, a document type, or more elements or longer text than the limits
    """
    parser = expat.ParserCreate()
    parser.buffer_text = True
    count = 0

    def started(name: str, attributes: dict[str, str]) -> None:
        nonlocal count
        count += 1
        start = starts.get(name)
        if start is None and ":" in name:
            start = starts.get(name[name.rfind(":") + 1 :])
        if start is not None:
            start(attributes)

    def ended(name: str) -> None:
        end = ends.get(name)
        if end is None and ":" in name:
            end = ends.get(name[name.rfind(":") + 1 :])
        if end is not None:
            end()

    def refuse_document_type(*_: object) -> None:
        raise _unusable(file, f"a document type declaration in '{part}'", "remove it; spreadsheets have none")

    parser.StartElementHandler = started
    parser.EndElementHandler = ended
    parser.CharacterDataHandler = text
    parser.StartDoctypeDeclHandler = refuse_document_type
    try:
        previous = -1
        for piece in chunks:
            parser.Parse(piece, False)
            if count > limits.elements:
                raise _unusable(
                    file, f"more than {limits.elements} elements in '{part}'", "split the workbook"
                )
            if count == previous and len(piece) > _LONG:
                raise _unusable(file, f"one text or tag of more than a megabyte in '{part}'", "shorten it")
            previous = count
        parser.Parse(b"", True)
    except expat.ExpatError as error:
        raise _unusable(
            file,
            f"broken XML in '{part}' ({error})",
            "open it in a spreadsheet program and save it again as .xlsx",
        ) from error


def _unusable(file: str, found: str, remedy: str) -> UnusableInputError:
    return UnusableInputError(file, found=found, expected="the XML of an ordinary workbook", remedy=remedy)
