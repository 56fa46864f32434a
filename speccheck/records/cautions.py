"""Cautions that go with figures about wind load and tower work; a report prints them beside those figures."""

from __future__ import annotations

WIND_CAUTIONS: tuple[str, ...] = (
    "The wind figures compare offers. They are not a structural assessment of the mast, pole or fixings.",
    "A load holds for the speed, direction and air density it is stated for; gusts, ice, terrain, height "
    "above ground and neighbouring equipment change it, and it grows with the square of the speed.",
    "The design wind speed, load factors and exposure category come from the structural code of the country "
    "of use and are set by a licensed structural engineer.",
    "A survival wind speed is the bidder's own statement; it says nothing about the structure that carries "
    "the panel.",
)

MOUNTING_CAUTIONS: tuple[str, ...] = (
    "Weight and size are as the bidder states them; whether brackets, cables and the radio are included has "
    "to be confirmed before lifting or loading is planned.",
    "Lifting, rigging and work at height follow local rules and are done by trained and licensed people.",
    "Work within reach of an antenna needs the transmitters switched off or reduced by the site's own "
    "procedure; a calculated compliance distance is no permission to approach.",
)
