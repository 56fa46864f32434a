"""Checks of a panel's claims against physics and arithmetic.

`examine` gives the findings of a panel. A family registers its checks when it is imported here; the
order of the imports is the order of the findings.
"""

# isort: off
from speccheck.checks import plausibility
from speccheck.checks import spacing, lattices
from speccheck.checks import housing, ports, layers
from speccheck.checks import innocent_gain, innocent_geometry
from speccheck.checks.runner import examine
# isort: on

FAMILIES = (plausibility, spacing, lattices, housing, ports, layers)
INNOCENT = (innocent_gain, innocent_geometry)

__all__ = ["FAMILIES", "INNOCENT", "examine"]
