"""The frame of an .xlsx package: its sheets, shared texts, number formats and what else it carries."""

from __future__ import annotations

import posixpath
from dataclasses import dataclass, field

from speccheck.errors import UnusableInputError
from speccheck.intake.files.archive import Archive
from speccheck.intake.files.limits import Limits
from speccheck.intake.files.number_formats import BUILT_IN
from speccheck.intake.files.xml_parts import Ends, Starts, Text, stream


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

        def relation(at: dict[str, str]) -> None:
            if at.get("TargetMode") != "External":
                kind = at.get("Type", "").rsplit("/", 1)[-1]
                target = posixpath.normpath(posixpath.join("/", folder, at.get("Target", ""))).lstrip("/")
                found[at.get("Id", "")] = (kind, target)

        if path in self._archive:
            self._stream(path, {"Relationship": relation})
        return found

    def sheets(self, part: str, relations: dict[str, tuple[str, str]], package: Package) -> list[SheetEntry]:
        found: list[SheetEntry] = []

        def properties(at: dict[str, str]) -> None:
            package.counts_from_1904 = at.get("date1904") in ("1", "true")

        def sheet(at: dict[str, str]) -> None:
            kind, target = relations.get(_relation_id(at), ("", ""))
            if kind == "worksheet" and target in self._archive:
                hidden = at.get("state", "visible") != "visible"
                found.append(SheetEntry(at.get("name", ""), target, hidden))

        self._stream(part, {"workbookPr": properties, "sheet": sheet})
        if not found:
            raise self._not_a_workbook()
        if len(found) > self._limits.sheets:
            raise self._archive.too_large(f"{len(found)} sheets, more than {self._limits.sheets},")
        return found

    def texts(self, part: str) -> list[str]:
        """Shared texts; runs of rich text joined, phonetic hints left out."""
        shared = _SharedTexts(self._archive, self._limits)
        self._stream(part, shared.starts, shared.ends, shared.text)
        return shared.found

    def formats(self, part: str) -> list[str]:
        """Number format by style index."""
        own: dict[int, str] = {}
        found: list[str] = []
        inside = [False]

        def number_format(at: dict[str, str]) -> None:
            own[_whole(at.get("numFmtId", ""))] = at.get("formatCode", "")[:200]

        def cell_style(at: dict[str, str]) -> None:
            if inside[0]:
                number = _whole(at.get("numFmtId", "0"))
                code = own.get(number) or BUILT_IN.get(number, "")
                found.append("" if code == "General" else code)

        def enter(_: dict[str, str]) -> None:
            inside[0] = True

        def leave() -> None:
            inside[0] = False

        self._stream(part, {"numFmt": number_format, "cellXfs": enter, "xf": cell_style}, {"cellXfs": leave})
        return found

    def _stream(
        self, part: str, starts: Starts, ends: Ends | None = None, text: Text = lambda _: None
    ) -> None:
        stream(
            self._archive.chunks(part),
            file=self._archive.file,
            part=part,
            limits=self._limits,
            starts=starts,
            ends=ends or {},
            text=text,
        )

    def _not_a_workbook(self) -> UnusableInputError:
        return UnusableInputError(
            self._archive.file,
            found="a zip archive without a worksheet",
            expected="an .xlsx or .xlsm workbook",
            remedy="save the data as .xlsx",
        )


class _SharedTexts:
    """Collects the shared texts."""

    def __init__(self, archive: Archive, limits: Limits) -> None:
        self._archive, self._limits = archive, limits
        self.found: list[str] = []
        self._pieces: list[str] = []
        self._total = self._hints = 0
        self._listening = False
        self.starts: Starts = {"si": self._begin, "rPh": self._hint, "t": self._listen}
        self.ends: Ends = {"si": self._finish, "rPh": self._hint_over, "t": self._stop}

    def text(self, data: str) -> None:
        if self._listening:
            self._total += len(data)
            if self._total > self._limits.text_total:
                raise self._archive.too_large("more text than the limit")
            self._pieces.append(data)

    def _begin(self, _: dict[str, str]) -> None:
        self._pieces.clear()

    def _finish(self) -> None:
        self.found.append("".join(self._pieces))

    def _hint(self, _: dict[str, str]) -> None:
        self._hints += 1

    def _hint_over(self) -> None:
        self._hints -= 1

    def _listen(self, _: dict[str, str]) -> None:
        self._listening = not self._hints

    def _stop(self) -> None:
        self._listening = False


def _relation_id(at: dict[str, str]) -> str:
    """The attribute ``id`` of the relationships namespace, whatever prefix the writer gave it."""
    return next((value for name, value in at.items() if name.endswith(":id")), "")


def _whole(text: str) -> int:
    return int(text) if text.isdigit() and len(text) < 10 else -1
