"""speccheck vets antenna-panel bids on paper.

`assess(path, …)` judges one bidder's file, `assess_many(paths, …)` a whole evaluation.
"""

from __future__ import annotations

from typing import Any

__version__ = "0.1.0"
__all__ = ["__version__", "assess", "assess_many"]


def __getattr__(name: str) -> Any:
    # Late, because every module below imports the version from here.
    if name == "assess":
        from speccheck.pipeline import assess  # noqa: PLC0415

        return assess
    if name == "assess_many":
        from speccheck.batch import assess_many  # noqa: PLC0415

        return assess_many
    raise AttributeError(f"module 'speccheck' has no attribute '{name}'")
