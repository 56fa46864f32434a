"""A zip archive from outside, opened with suspicion.

Sizes are checked in the directory before anything is unpacked and counted again while unpacking, since a
directory may lie. Parts are read from memory only: nothing is ever written, so a path that climbs out of the
archive can do no harm, but it marks a file no spreadsheet program wrote, and the file is refused.
"""

from __future__ import annotations

import zipfile
import zlib
from collections.abc import Iterator
from typing import IO

from speccheck.errors import UnusableInputError
from speccheck.intake.files.limits import Limits

_CHUNK = 1 << 20
_SAVE_AGAIN = "open it in a spreadsheet program and save it again as .xlsx"
_STORED_OR_DEFLATED = (zipfile.ZIP_STORED, zipfile.ZIP_DEFLATED)


class Archive:
    """Read access to the parts of a zip file, within limits."""

    def __init__(self, source: IO[bytes], file: str, limits: Limits) -> None:
        self.file, self._limits = file, limits
        self._left = limits.total_bytes
        try:
            self._zip = zipfile.ZipFile(source)
        except (zipfile.BadZipFile, NotImplementedError, ValueError, EOFError, OSError) as error:
            raise self.damaged("a truncated or damaged archive") from error
        self._entries = {self._checked(entry).filename: entry for entry in self._listed()}

    def __contains__(self, name: str) -> bool:
        return name in self._entries

    @property
    def names(self) -> tuple[str, ...]:
        """Names of all parts."""
        return tuple(self._entries)

    def chunks(self, name: str) -> Iterator[bytes]:
        """The unpacked bytes of a part, piece by piece.

        Raises
        ------
        UnusableInputError : the part is missing, damaged or larger than it said
        """
        entry = self._entries.get(name)
        if entry is None:
            raise self.damaged(f"an archive without its part '{name}'")
        room = self._limits.part_bytes
        try:
            with self._zip.open(entry) as part:
                while piece := part.read(_CHUNK):
                    room -= len(piece)
                    self._left -= len(piece)
                    if room < 0 or self._left < 0:
                        raise self.too_large(f"part '{name}' unpacks to more than the limit")
                    yield piece
        except (
            zipfile.BadZipFile,
            zlib.error,
            EOFError,
            NotImplementedError,
            RuntimeError,
            OSError,
        ) as error:
            raise self.damaged(f"a damaged part '{name}'") from error

    def read(self, name: str) -> bytes:
        """The unpacked bytes of a part."""
        return b"".join(self.chunks(name))

    def damaged(self, found: str) -> UnusableInputError:
        """The error for an archive that cannot be unpacked."""
        return UnusableInputError(
            self.file,
            found=found,
            expected="a complete .xlsx workbook",
            remedy=f"{_SAVE_AGAIN} or send it again",
        )

    def too_large(self, found: str) -> UnusableInputError:
        """The error for an archive that would unpack to too much."""
        return UnusableInputError(
            self.file,
            found=found,
            expected=f"at most {self._limits.total_bytes // 1_000_000} MB unpacked",
            remedy="copy the data sheets alone into a new workbook",
        )

    def _listed(self) -> list[zipfile.ZipInfo]:
        entries = self._zip.infolist()
        if len(entries) > self._limits.parts:
            raise self.too_large(f"an archive of {len(entries)} parts")
        if sum(entry.file_size for entry in entries) > self._limits.total_bytes:
            raise self.too_large("an archive that unpacks to more than the limit")
        return entries

    def _checked(self, entry: zipfile.ZipInfo) -> zipfile.ZipInfo:
        name = entry.filename
        if name.startswith(("/", "\\")) or ".." in name.replace("\\", "/").split("/") or ":" in name:
            raise self.damaged(f"an archive part with the odd path {name[:80]!r}")
        if entry.flag_bits & 0x1:
            raise UnusableInputError(
                self.file,
                found="a password-protected archive",
                expected="a workbook that opens without a password",
                remedy="save it without a password",
            )
        if entry.compress_type not in _STORED_OR_DEFLATED:
            raise self.damaged(f"the part '{name[:80]}' packed in an unknown way")
        packed = max(entry.compress_size, 1)
        if entry.file_size > self._limits.part_bytes or (
            entry.file_size > 4 * _CHUNK and entry.file_size > packed * self._limits.expansion
        ):
            raise self.too_large(f"part '{name[:80]}' that grows from {packed} to {entry.file_size} bytes")
        return entry
