"""The wheel and the sdist carry everything, and the wheel runs from a new environment."""

from __future__ import annotations

import json
import subprocess
import sys
import tarfile
import venv
import zipfile
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
BID = ROOT / "sample_specs" / "aldervane-quay-column.xlsx"


@pytest.fixture(scope="session")
def built(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """Folder with a wheel and an sdist made from the checkout."""
    target = tmp_path_factory.mktemp("dist")
    command = [sys.executable, "-m", "build", "--no-isolation", "--outdir", str(target), str(ROOT)]
    subprocess.run(command, check=True, capture_output=True, text=True)
    return target


def test_wheel_ships_templates_data_and_types(built: Path) -> None:
    names = zipfile.ZipFile(next(built.glob("*.whl"))).namelist()
    for wanted in ("speccheck/templates/base.html", "speccheck/data/parameters.toml", "speccheck/py.typed"):
        assert wanted in names
    assert any(name.startswith("speccheck/data/exposure/") for name in names)


def test_sdist_ships_tests_and_samples(built: Path) -> None:
    with tarfile.open(next(built.glob("*.tar.gz"))) as archive:
        names = {name.split("/", 1)[1] for name in archive.getnames() if "/" in name}
    assert {"templates/base.html", "tests/test_packaging.py", "sample_specs/tender.xlsx", "LICENSE"} <= names


@pytest.mark.slow
def test_wheel_runs_from_a_new_environment_outside_the_checkout(built: Path, tmp_path: Path) -> None:
    venv.create(tmp_path / "env", with_pip=True)
    python = tmp_path / "env" / "bin" / "python"
    wheel = next(built.glob("*.whl"))
    subprocess.run([python, "-m", "pip", "install", "--quiet", str(wheel)], check=True, capture_output=True)
    command = [tmp_path / "env" / "bin" / "speccheck", "check", BID, "--out", "out", "--formats", "html,json"]
    done = subprocess.run(command, cwd=tmp_path, capture_output=True, text=True, check=False)
    assert done.returncode in (0, 1), done.stderr
    result = json.loads((tmp_path / "out" / "aldervane-quay-column.result.json").read_text(encoding="utf-8"))
    assert result["schema"] == "speccheck-result/1"
    assert (tmp_path / "out" / "aldervane-quay-column.report.html").stat().st_size > 10_000
