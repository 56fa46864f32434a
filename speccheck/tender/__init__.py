"""The tender: requirements judged, the tender itself vetted, questions asked, answers taken in."""

from speccheck.tender.judging import judge
from speccheck.tender.outcome import outcome

__all__ = ["judge", "outcome"]
