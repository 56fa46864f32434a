"""A panel that notes which parameters a check asks for, so that no check is run again for nothing."""

from __future__ import annotations

from speccheck.records import Band, Panel, Reading


class WatchedPanel(Panel):
    """The panel it is made of, to every question; `asked` names the parameters asked for so far.

    `asked` is None once all readings were taken at once. Bands and statements are not noted: whoever keeps
    an answer compares them himself.
    """

    asked: set[str] | None

    def __init__(self, panel: Panel) -> None:
        known = {"name": panel.name, "where": panel.where, "statements": panel.statements}
        self.__dict__.update(known, _panel=panel, _bands=panel.bands)
        self.listen()

    def listen(self) -> None:
        """Forget what was asked for."""
        self.__dict__["asked"] = set()

    @property
    def readings(self) -> tuple[Reading, ...]:
        """All readings."""
        self.__dict__["asked"] = None
        return self._whole.readings

    @property
    def bands(self) -> tuple[Band, ...]:
        """Bands [MHz] as of the panel itself."""
        bands: tuple[Band, ...] = self.__dict__["_bands"]
        return bands

    def all(self, parameter: str, band: Band | None = None) -> tuple[Reading, ...]:
        """Certain readings of a parameter, as of the panel itself."""
        if self.asked is not None:
            self.asked.add(parameter)
        return self._whole.all(parameter, band)

    @property
    def _whole(self) -> Panel:
        panel: Panel = self.__dict__["_panel"]
        return panel
