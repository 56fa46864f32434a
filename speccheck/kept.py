"""What is made from the program's own files, kept beside its byte code as Python keeps that.

The dictionary is written for people to read and correct; parsing and folding it would take as long in
every run as judging a panel. Kept things are made anew when a byte of what they are made from changes.
Where the folder cannot be written they are made each time.
"""

from __future__ import annotations

import contextlib
import functools
import hashlib
import marshal
import os
import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any, TypeVar, cast

T = TypeVar("T")

PACKAGE = Path(__file__).parent
_FOLDER = PACKAGE / "__pycache__"


def kept(name: str, sources: tuple[str, ...], make: Callable[[], T]) -> T:
    """What `make` returns, from an earlier run where nothing it is made from has changed.

    Parameters
    ----------
    name : of the thing, one file each
    sources : data and code it is made from, as patterns below the package, such as ``data/*.csv``
    make : makes it, of dicts, lists, tuples, sets, texts and numbers only

    Raises
    ------
    FileNotFoundError : no file has a source's name, so that a change of it would go unseen
    """
    path = _FOLDER / f"{name}.{sys.implementation.cache_tag}.kept"
    stamp = _digest(sources)  # of contents: tools that install or copy give files of two versions one time
    with contextlib.suppress(OSError, EOFError, ValueError, TypeError):
        of, thing = marshal.loads(path.read_bytes())  # noqa: S302 - trusted as far as the byte code beside it
        if of == stamp:
            found: T = thing
            return found
    made = make()
    with contextlib.suppress(OSError, ValueError):
        _write(path, marshal.dumps((stamp, cast(Any, made))))
    return made


def toml(name: str) -> dict[str, Any]:
    """A table of the program's data, by its path below ``data``."""

    def parse() -> dict[str, Any]:
        import tomllib  # noqa: PLC0415 - not for a table that is kept

        return tomllib.loads((PACKAGE / "data" / name).read_text(encoding="utf-8"))

    return kept(name.replace("/", "-"), (f"data/{name}",), parse)


@functools.cache
def _digest(sources: tuple[str, ...]) -> bytes:
    digest = hashlib.blake2b(digest_size=16)
    for pattern in sources:
        paths = sorted(PACKAGE.glob(pattern))
        if not paths:
            raise FileNotFoundError(f"no {pattern} in {PACKAGE}")
        for path in paths:
            content = path.read_bytes()
            digest.update(f"{path.name} {len(content)} ".encode())
            digest.update(content)
    return digest.digest()


def _write(path: Path, content: bytes) -> None:
    """Whole or absent; other processes may be keeping the same thing."""
    path.parent.mkdir(exist_ok=True)
    unfinished = path.with_name(f"{path.name}.{os.getpid()}")
    unfinished.write_bytes(content)
    unfinished.replace(path)
