"""The outputs of a run: the formats, and how the name of each file ends."""

from __future__ import annotations

SUFFIXES = {
    "html": ".report.html",
    "xlsx": ".review.xlsx",
    "json": ".result.json",
    "pdf": ".report.pdf",
}
"""Ending of each output, in the order of writing: the PDF, which may be impossible, last."""

FORMATS = tuple(SUFFIXES)
