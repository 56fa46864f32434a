"""House rules of the physics: units in docstrings, worked examples, small modules, numpy alone."""

import doctest
import importlib
import inspect
import pkgutil
import re
from pathlib import Path

import pytest

import speccheck.physics

MODULES = [
    importlib.import_module(f"speccheck.physics.{module.name}")
    for module in pkgutil.iter_modules(speccheck.physics.__path__)
]
FUNCTIONS = [
    pytest.param(function, id=f"{module.__name__.rpartition('.')[2]}.{name}")
    for module in MODULES
    for name, function in vars(module).items()
    if inspect.isfunction(inspect.unwrap(function) if callable(function) else function)
    and not name.startswith("_")
    and inspect.unwrap(function).__module__ == module.__name__
]
METHODS = [
    pytest.param(method, id=f"{cls.__name__}.{name}")
    for module in MODULES
    for cls in vars(module).values()
    if inspect.isclass(cls) and cls.__module__ == module.__name__ and not cls.__name__.startswith("_")
    for name, method in vars(cls).items()
    if inspect.isfunction(method) and not name.startswith("_")
]


@pytest.mark.parametrize("function", FUNCTIONS + METHODS)
def test_every_argument_and_result_has_a_unit(function):
    function = inspect.unwrap(function)
    text = inspect.getdoc(function) or ""
    for name in inspect.signature(function).parameters:
        if name != "self":
            assert re.search(rf"\b{name} \[[^\]]+\]", text), f"{function.__qualname__}: no unit for {name}"
    protocol = function.__qualname__.startswith("Element.")
    assert protocol or re.search(r"^Returns \[[^\]]+\]", text, re.M), (
        f"{function.__qualname__}: result without unit"
    )


@pytest.mark.parametrize("function", FUNCTIONS)
def test_every_relation_names_its_source(function):
    assert re.search(r"^Source: .{6,}", inspect.getdoc(inspect.unwrap(function)) or "", re.M)


@pytest.mark.parametrize("module", MODULES, ids=lambda module: module.__name__.rpartition(".")[2])
def test_worked_examples(module):
    failed, _ = doctest.testmod(module, raise_on_error=False)
    assert failed == 0


def test_there_are_worked_examples():
    assert sum(len(doctest.DocTestFinder().find(module)) > 0 for module in MODULES) >= 12
    examples = sum(len(test.examples) for module in MODULES for test in doctest.DocTestFinder().find(module))
    assert examples >= 60


@pytest.mark.parametrize("module", MODULES, ids=lambda module: module.__name__.rpartition(".")[2])
def test_modules_stay_small_and_see_numpy_only(module):
    source = Path(module.__file__).read_text(encoding="utf-8")
    assert source.count("\n") < 300
    imported = set(re.findall(r"^(?:from|import) (\w+)", source, re.M))
    standard = {"__future__", "collections", "dataclasses", "enum", "functools", "typing"}
    assert imported <= standard | {"numpy", "speccheck"}
    assert all(name.startswith("physics") for name in re.findall(r"from speccheck\.(\w+)", source))


def test_the_index_names_every_public_function():
    index = speccheck.physics.__doc__
    plumbing = {"beam", "cuts", "field", "quadrature", "radiated", "readings"}
    missing = [
        function.values[0].__name__
        for function in FUNCTIONS
        if function.values[0].__module__.rpartition(".")[2] not in plumbing
        and function.values[0].__name__ not in index
    ]
    assert missing == []
