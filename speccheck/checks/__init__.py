"""Checks of a panel's claims against physics and arithmetic.

`examine` gives the findings of a panel. A family registers its checks when it is imported here; the
order of the imports is the order of the findings.
"""

# isort: off
from speccheck.checks.families import plausibility
from speccheck.checks.families import spacing, lattices
from speccheck.checks.families import gain, gain_widths, gain_runs
from speccheck.checks.families import beamwidth, beamwidth_box, sidelobes, tapers, scan
from speccheck.checks.families import housing, ports, connectors, layers
from speccheck.checks.families import power, power_array, power_budget, losses, matching, intermodulation
from speccheck.checks.families import frequency_unit, bands, duplex, directions
from speccheck.checks.families import wind, mechanics, exposure, wording
from speccheck.checks.innocent import innocent_gain, innocent_power, innocent_beams, innocent_geometry
from speccheck.checks.innocent import innocent_lengths, innocent_matching, innocent_statements
from speccheck.checks.drawings.curves import panel_drawings
from speccheck.checks.desk.exposure_note import exposure_note
from speccheck.checks.runner import examine
# isort: on

FAMILIES = (
    plausibility, spacing, lattices, gain, gain_widths, gain_runs, beamwidth, beamwidth_box,
    sidelobes, tapers, scan,
    housing, ports, connectors, layers,
    power, power_array, power_budget, losses, matching, intermodulation,
    frequency_unit, bands, duplex, directions, wind, mechanics, exposure, wording,
)  # fmt: skip
INNOCENT = (
    innocent_gain, innocent_power, innocent_beams, innocent_geometry, innocent_lengths, innocent_matching,
    innocent_statements,
)  # fmt: skip

__all__ = ["FAMILIES", "INNOCENT", "examine", "exposure_note", "panel_drawings"]
