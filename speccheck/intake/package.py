"""The frame of an .xlsx package: its sheets, shared texts, number formats and what else it carries."""

from __future__ import annotations

import posixpath
from dataclasses import dataclass, field

from speccheck.errors import UnusableInputError
from speccheck.intake.archive import Archive
from speccheck.intake.limits import Limits
from speccheck.intake.number_formats import BUILT_IN
from speccheck.intake.xml_parts import End, Start, Text, stream


@dataclass(frozen=True, slots=True)
class SheetEntry:
    """A worksheet named in the workbook part."""

    name: str
    part: str
    hidden: bool


@dataclass(slots=True)
class Package:
    """What all sheets share."""

    sheets: list[SheetEntry] = field(default_factory=list)
    texts: list[str] = field(default_factory=list)
    formats: list[str] = field(default_factory=list)
    counts_from_1904: bool = False
    oddities: list[str] = field(default_factory=list)

    def number_format(self, style: str) -> str:
        """Number format of a cell's style index; empty for the general format."""
        index = int(style) if style.isdigit() else -1
        return self.formats[index] if 0 <= index < len(self.formats) else ""


def read_package(archive: Archive, limits: Limits) -> Package:
    """Read everything but the sheets themselves.

    Raises
    ------
    UnusableInputError : not a spreadsheet package, or damaged
    """
    reader = _PartReader(archive, limits)
    main = reader.main_part()
    package = Package()
    relations = reader.relations(main)
    package.sheets = reader.sheets(main, relations, package)
    for kind, target in relations.values():
        if target not in archive:
            continue
        if kind == "sharedStrings":
            package.texts = reader.texts(target)
        elif kind == "styles":
            package.formats = reader.formats(target)
    package.oddities = _oddities(archive)
    return package


def _oddities(archive: Archive) -> list[str]:
    lowered = [name.lower() for name in archive.names]
    found = []
    if any("vbaproject" in name or "macrosheet" in name for name in lowered):
        found.append("the workbook carries macros; they were not run")
    if any("externallink" in name for name in lowered):
        found.append("the workbook links to other files; the links were not followed, stored values are used")
    if any("/embeddings/" in name for name in lowered):
        found.append("the workbook carries embedded files; they were not opened")
    if any("/media/" in name for name in lowered):
        found.append("the workbook carries pictures; text in them was not read")
    if any("/comments" in name or "threadedcomment" in name for name in lowered):
        found.append("the workbook carries cell comments; they were not read")
    return found


class _PartReader:
    """Small readers, one a part."""

    def __init__(self, archive: Archive, limits: Limits) -> None:
        self._archive, self._limits = archive, limits

    def main_part(self) -> str:
        if "[Content_Types].xml" not in self._archive:
            raise self._not_a_workbook()
        for kind, target in self.relations("").values():
            if kind == "officeDocument" and target in self._archive:
                return target
        raise self._not_a_workbook()

    def relations(self, part: str) -> dict[str, tuple[str, str]]:
        """Relation id to (kind, target part); links out of the package are left out."""
        folder, name = posixpath.split(part)
        path = posixpath.join(folder, "_rels", f"{name}.rels")
        found: dict[str, tuple[str, str]] = {}

        def start(tag: str, at: dict[str, str]) -> None:
            if tag == "Relationship" and at.get("TargetMode") != "External":
                kind = at.get("Type", "").rsplit("/", 1)[-1]
                target = posixpath.normpath(posixpath.join("/", folder, at.get("Target", ""))).lstrip("/")
                found[at.get("Id", "")] = (kind, target)

        if path in self._archive:
            self._stream(path, start)
        return found

    def sheets(self, part: str, relations: dict[str, tuple[str, str]], package: Package) -> list[SheetEntry]:
        found: list[SheetEntry] = []

        def start(tag: str, at: dict[str, str]) -> None:
            if tag == "workbookPr":
                package.counts_from_1904 = at.get("date1904") in ("1", "true")
            elif tag == "sheet":
                kind, target = relations.get(_relation_id(at), ("", ""))
                if kind == "worksheet" and target in self._archive:
                    hidden = at.get("state", "visible") != "visible"
                    found.append(SheetEntry(at.get("name", ""), target, hidden))

        self._stream(part, start)
        if not found:
            raise self._not_a_workbook()
        if len(found) > self._limits.sheets:
            raise self._archive.too_large(f"{len(found)} sheets, more than {self._limits.sheets},")
        return found

    def texts(self, part: str) -> list[str]:
        """Shared texts; runs of rich text joined, phonetic hints left out."""
        found: list[str] = []
        pieces: list[str] = []
        state = {"text": False, "hint": 0, "total": 0}

        def start(tag: str, _: dict[str, str]) -> None:
            if tag == "si":
                pieces.clear()
            elif tag == "rPh":
                state["hint"] += 1
            elif tag == "t":
                state["text"] = not state["hint"]

        def end(tag: str) -> None:
            if tag == "si":
                found.append("".join(pieces))
            elif tag == "rPh":
                state["hint"] -= 1
            elif tag == "t":
                state["text"] = False

        def text(data: str) -> None:
            if state["text"]:
                state["total"] += len(data)
                if state["total"] > self._limits.text_total:
                    raise self._archive.too_large("more text than the limit")
                pieces.append(data)

        self._stream(part, start, end, text)
        return found

    def formats(self, part: str) -> list[str]:
        """Number format by style index."""
        own: dict[int, str] = {}
        found: list[str] = []
        inside = [False]

        def start(tag: str, at: dict[str, str]) -> None:
            if tag == "numFmt":
                own[_whole(at.get("numFmtId", ""))] = at.get("formatCode", "")[:200]
            elif tag == "cellXfs":
                inside[0] = True
            elif tag == "xf" and inside[0]:
                number = _whole(at.get("numFmtId", "0"))
                code = own.get(number) or BUILT_IN.get(number, "")
                found.append("" if code == "General" else code)

        def end(tag: str) -> None:
            if tag == "cellXfs":
                inside[0] = False

        self._stream(part, start, end)
        return found

    def _stream(
        self, part: str, start: Start, end: End = lambda _: None, text: Text = lambda _: None
    ) -> None:
        chunks = self._archive.chunks(part)
        stream(
            chunks, file=self._archive.file, part=part, limits=self._limits, start=start, end=end, text=text
        )

    def _not_a_workbook(self) -> UnusableInputError:
        return UnusableInputError(
            self._archive.file,
            found="a zip archive without a worksheet",
            expected="an .xlsx or .xlsm workbook",
            remedy="save the data as .xlsx",
        )


def _relation_id(at: dict[str, str]) -> str:
    """The attribute ``id`` of the relationships namespace, whatever prefix the writer gave it."""
    return next((value for name, value in at.items() if name.endswith(":id")), "")


def _whole(text: str) -> int:
    return int(text) if text.isdigit() and len(text) < 10 else -1
