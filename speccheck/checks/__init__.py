"""Checks of a panel's claims against physics and arithmetic.

`examine` gives the findings of a panel. A family registers its checks when it is imported here; the
order of the imports is the order of the findings.
"""

from speccheck.checks import plausibility
from speccheck.checks.runner import examine

__all__ = ["examine", "plausibility"]
