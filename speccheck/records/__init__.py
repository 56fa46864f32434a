"""The frozen data types that flow from a cell to a verdict."""

from speccheck.records.cautions import MOUNTING_CAUTIONS, WIND_CAUTIONS
from speccheck.records.offers import (
    Band,
    CellRef,
    MirrorCell,
    MirrorSheet,
    Notice,
    Panel,
    Reading,
    Statement,
    Submission,
    Unread,
    Value,
)
from speccheck.records.results import (
    Assessment,
    Curve,
    Drawing,
    ExposureNote,
    ExposureRow,
    ExposureZone,
    PanelAssessment,
)
from speccheck.records.tenders import Deviation, MatrixRow, Premise, Requirement, Settings, Tender
from speccheck.records.verdicts import Amount, Convention, Finding, Interval, Step
from speccheck.records.words import Compliance, Fit, Level, Outcome, Sense, Status

__all__ = [
    "MOUNTING_CAUTIONS",
    "WIND_CAUTIONS",
    "Amount",
    "Assessment",
    "Band",
    "CellRef",
    "Compliance",
    "Convention",
    "Curve",
    "Deviation",
    "Drawing",
    "ExposureNote",
    "ExposureRow",
    "ExposureZone",
    "Finding",
    "Fit",
    "Interval",
    "Level",
    "MatrixRow",
    "MirrorCell",
    "MirrorSheet",
    "Notice",
    "Outcome",
    "Panel",
    "PanelAssessment",
    "Premise",
    "Reading",
    "Requirement",
    "Sense",
    "Settings",
    "Statement",
    "Status",
    "Step",
    "Submission",
    "Tender",
    "Unread",
    "Value",
]
