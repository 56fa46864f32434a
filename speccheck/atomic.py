"""Files that are whole or absent: written beside their place under another name, then moved."""

from __future__ import annotations

import os
import tempfile
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import IO

from speccheck.errors import OutputError

_NAMED = 80
"""Letters of a file's name that its unfinished form bears."""


@contextmanager
def whole_file(path: Path | str) -> Iterator[IO[bytes]]:
    """A stream whose content stands at `path` when the block ends without an error, and not before.

    No reader ever sees half of it, whatever ends the program. It does not wait for the disk: after a power
    cut the file may be missing or empty.

    Raises
    ------
    OutputError : folder missing or not writable, disk full; what stood at `path` before is kept
    """
    target = Path(path)
    unfinished: Path | None = None
    try:
        handle, name = tempfile.mkstemp(prefix=f".{target.name[:_NAMED]}.", suffix=".part", dir=target.parent)
        unfinished = Path(name)
        with os.fdopen(handle, "wb") as stream:
            yield stream
        unfinished.chmod(0o666 & ~_umask())
        unfinished.replace(target)
    except OSError as error:
        if unfinished is not None:
            unfinished.unlink(missing_ok=True)
        raise OutputError(str(target), error.strerror or str(error)) from error
    except BaseException:
        if unfinished is not None:
            unfinished.unlink(missing_ok=True)
        raise


def write_bytes_atomic(path: Path | str, data: bytes) -> None:
    """Write `data` to `path` as one whole file. Errors as above."""
    with whole_file(path) as stream:
        stream.write(data)


def write_text_atomic(path: Path | str, text: str) -> None:
    """Write `text` as UTF-8; a lone surrogate becomes a replacement mark. Errors as above."""
    write_bytes_atomic(path, text.encode("utf-8", "replace"))


def remove_unfinished(folder: Path, start: str) -> None:
    """Remove what a killed program left of the files in `folder` whose names start so."""
    for left in folder.glob(".*.part"):
        if left.name[1:].startswith(start[:_NAMED]):
            left.unlink(missing_ok=True)


def _umask() -> int:
    """Return the process's file mode mask, which can only be read by setting it."""
    mask = os.umask(0o077)
    os.umask(mask)
    return mask
