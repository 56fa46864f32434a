"""The tender: requirements judged, the tender itself vetted, questions asked, answers taken in."""

from speccheck.tender.judging import judge
from speccheck.tender.outcome import outcome
from speccheck.tender.vetting import vet, vetted

__all__ = ["judge", "outcome", "vet", "vetted"]
