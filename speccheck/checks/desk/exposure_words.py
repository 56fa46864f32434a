"""Fixed words of the exposure note: cautions and limits of validity."""

from __future__ import annotations

CAUTIONS: tuple[str, ...] = (
    "Calculated to compare offers, from figures the bidder supplied. Nothing was measured. It does "
    "not replace the assessment that is required before an antenna is put into service.",
    "Other transmitters on the structure or nearby are not included. Together they can exceed a limit "
    "that each of them keeps alone.",
    "The distance runs from the front of the radome along the strongest beam. Above, below, beside "
    "and behind the panel other distances hold, and tilting or steering moves the beam.",
    "Roofs, walls and metal parts reflect and can raise the field; the reflection factor used is stated.",
    "Close to the panel the formula usually overstates the field on the beam axis; it says nothing "
    "about touching the radome and is no basis for work on or near the antenna.",
    "A time factor or actual-maximum factor holds only where the equipment monitors and enforces it "
    "and the rules of the country accept it. Otherwise the full-power figure counts. Power already "
    "averaged over the downlink share must not be reduced again.",
    "Implanted medical devices, fuel and detonators, and interference with equipment lie outside "
    "these limits.",
    "Local rules decide which limits, methods and persons count; the assessment for a site is the "
    "work of licensed or otherwise qualified practice.",
)

VALIDITY: tuple[str, ...] = (
    "Holds for this revision of the bidder's sheet, this power and band set, and this limit set and "
    "edition. A new revision, a power licence, an added band, another tilt range or a new national "
    "rule voids it.",
    "One panel alone; free space or the reflection factor stated; people standing, no shielding.",
    "Not for indoor or small-cell contact distances, body-worn or hand-held use, medical locations, "
    "explosive atmospheres, pulsed radar, or sites with several operators.",
    "Exposure shorter than the averaging time has further limits that are not covered.",
    "To be checked and signed by the person responsible before use.",
)
