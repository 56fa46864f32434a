"""The one-way order of layers, read from the imports themselves."""

from __future__ import annotations

import ast
from graphlib import TopologicalSorter
from pathlib import Path

import pytest

PACKAGE = Path(__file__).parents[1] / "speccheck"

LAYERS: tuple[frozenset[str], ...] = (
    frozenset({"errors", "text", "kept", "physics"}),
    frozenset({"quantities", "atomic"}),
    frozenset({"records"}),
    frozenset({"dictionary", "standards"}),
    frozenset({"intake", "checks", "tender", "report", "revisions"}),
    frozenset({"pipeline"}),
    frozenset({"batch"}),
    frozenset({"screen"}),
    frozenset({"cli"}),
)


def room(path: Path) -> str:
    """Top-level name of a module inside the package."""
    return path.relative_to(PACKAGE).parts[0].removesuffix(".py")


def imports(path: Path) -> list[str]:
    """Dotted names a module imports, wherever in the file."""
    names: list[str] = []
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            names += [alias.name for alias in node.names]
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, f"{path}: relative import"
            names += [f"{node.module}.{alias.name}" for alias in node.names]
    return names


def height(name: str) -> int:
    """Layer number of a room; fails naming a room that has no layer."""
    for level, names in enumerate(LAYERS):
        if name in names:
            return level
    pytest.fail(f"'{name}' has no layer in tests/test_layers.py")


MODULES = sorted(p for p in PACKAGE.rglob("*.py") if p != PACKAGE / "__init__.py")


@pytest.mark.parametrize("path", MODULES, ids=lambda p: str(p.relative_to(PACKAGE)))
def test_module_imports_only_from_below(path: Path) -> None:
    me = room(path)
    for name in imports(path):
        parts = name.split(".")
        if parts[0] != "speccheck" or len(parts) < 2 or parts[1] == "__version__":
            continue
        other = parts[1]
        if other == me:
            continue
        assert height(other) < height(me), f"{path}: {me} must not import {name}"


def module(path: Path) -> str:
    """Dotted name of a module."""
    return ".".join(path.relative_to(PACKAGE.parent).with_suffix("").parts).removesuffix(".__init__")


def test_no_modules_import_one_another_in_a_circle() -> None:
    names = {module(path) for path in MODULES}
    graph = {}
    for path in MODULES:
        known = {name if name in names else name.rpartition(".")[0] for name in imports(path)}
        graph[module(path)] = known & names - {module(path)}
    assert len(list(TopologicalSorter(graph).static_order())) == len(names)  # CycleError names the circle


@pytest.mark.parametrize("path", sorted((PACKAGE / "physics").glob("*.py")), ids=lambda p: p.name)
def test_physics_sees_numpy_only(path: Path) -> None:
    allowed = {
        "numpy",
        "speccheck",
        "math",
        "dataclasses",
        "typing",
        "collections",
        "functools",
        "enum",
        "__future__",
    }
    outside = {name.split(".")[0] for name in imports(path)} - allowed
    assert not outside, f"{path}: {outside}"


@pytest.mark.parametrize("path", MODULES, ids=lambda p: str(p.relative_to(PACKAGE)))
def test_module_is_short_enough_to_be_one_idea(path: Path) -> None:
    assert len(path.read_text(encoding="utf-8").splitlines()) <= 300
