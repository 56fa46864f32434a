"""speccheck vets antenna-panel bids on paper."""

__version__ = "0.1.0"
