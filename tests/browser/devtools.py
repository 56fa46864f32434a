"""A Chromium driven over the pipe of its DevTools protocol: no driver, no socket, no further package."""

from __future__ import annotations

import itertools
import json
import os
import shutil
import subprocess
import tempfile
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path
from types import TracebackType
from typing import Any

CHROMIUM = next(
    (path for name in ("chromium", "chromium-browser", "google-chrome") if (path := shutil.which(name))), None
)
_FLAGS = (
    "--headless=new",
    "--no-sandbox",
    "--disable-gpu",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--remote-debugging-pipe",
    "--window-size=1280,900",
)


@dataclass(frozen=True, slots=True)
class Spoken:
    """A node of the accessibility tree; `above` holds the roles around it, the outermost first."""

    role: str
    name: str
    description: str
    level: int
    above: tuple[str, ...]


class Browser:
    """One page of a headless Chromium; `requests` holds every address the page asked for."""

    def __init__(self) -> None:
        if CHROMIUM is None:
            raise RuntimeError("no Chromium on this machine")
        self._profile = tempfile.TemporaryDirectory(ignore_cleanup_errors=True)
        ours_read, theirs_write = os.pipe()
        theirs_read, ours_write = os.pipe()
        # Chromium reads commands from descriptor 3 and answers on descriptor 4
        command = 'exec 3<&"$0" 4>&"$1"; shift; exec "$@"'
        self._process = subprocess.Popen(
            ["bash", "-c", command, str(theirs_read), str(theirs_write), CHROMIUM, *_FLAGS,
             f"--user-data-dir={self._profile.name}", "about:blank"],
            pass_fds=(theirs_read, theirs_write),
            stdout=subprocess.DEVNULL,
            stderr=subprocess.DEVNULL,
        )  # fmt: skip
        os.close(theirs_read)
        os.close(theirs_write)
        self._input, self._output = os.fdopen(ours_read, "rb", 0), os.fdopen(ours_write, "wb", 0)
        self._numbers, self._rest, self._session = itertools.count(1), b"", ""
        self.requests: list[str] = []
        self.complaints: list[str] = []
        target = self.call("Target.createTarget", url="about:blank")["targetId"]
        self._session = self.call("Target.attachToTarget", targetId=target, flatten=True)["sessionId"]
        for domain in ("Page", "Runtime", "Network", "Log"):
            self.call(f"{domain}.enable")

    def __enter__(self) -> Browser:
        return self

    def __exit__(
        self, kind: type[BaseException] | None, error: BaseException | None, trace: TracebackType | None
    ) -> None:
        self._process.kill()
        self._process.wait()
        self._input.close()
        self._output.close()
        self._profile.cleanup()

    def call(self, method: str, **parameters: Any) -> dict[str, Any]:
        """Send one command and wait for its answer; events on the way are noted."""
        number = next(self._numbers)
        message: dict[str, Any] = {"id": number, "method": method, "params": parameters}
        if self._session:
            message["sessionId"] = self._session
        self._output.write(json.dumps(message).encode() + b"\0")
        while True:
            answer = self._next()
            if answer.get("id") == number:
                if "error" in answer:
                    raise RuntimeError(f"{method}: {answer['error']['message']}")
                result: dict[str, Any] = answer["result"]
                return result
            self._note(answer)

    def open(self, file: Path, *, script: bool = True) -> None:
        """Load a file from disk and wait until it stands."""
        self.call("Emulation.setScriptExecutionDisabled", value=not script)
        self.requests.clear()
        self.complaints.clear()
        self.call("Page.navigate", url=file.as_uri())
        while True:
            event = self._next()
            self._note(event)
            if event.get("method") == "Page.loadEventFired":
                return

    def evaluate(self, expression: str) -> Any:
        """Value of an expression in the page; a promise is awaited."""
        answer = self.call(
            "Runtime.evaluate", expression=expression, returnByValue=True, awaitPromise=True, userGesture=True
        )
        if "exceptionDetails" in answer:
            raise RuntimeError(answer["exceptionDetails"]["exception"].get("description", "script failed"))
        return answer["result"].get("value")

    def press(self, key: str, code: int) -> None:
        """Press and release one key."""
        for kind in ("keyDown", "keyUp"):
            text = "\r" if key == "Enter" and kind == "keyDown" else ""
            self.call(
                "Input.dispatchKeyEvent", type=kind, key=key, code=key, windowsVirtualKeyCode=code, text=text
            )

    def viewport(self, width: int, height: int, zoom: float = 1.0) -> None:
        """Size of the window [px]; a zoom of 2 halves the room that the page has."""
        self.call(
            "Emulation.setDeviceMetricsOverride",
            width=round(width / zoom),
            height=round(height / zoom),
            deviceScaleFactor=zoom,
            mobile=False,
        )

    def dark(self, on: bool) -> None:
        """Ask for the dark or the light scheme."""
        scheme = "dark" if on else "light"
        self.call("Emulation.setEmulatedMedia", features=[{"name": "prefers-color-scheme", "value": scheme}])

    def spoken(self) -> list[Spoken]:
        """What a screen reader is told of the page, in reading order."""
        self.call("Accessibility.enable")
        nodes = {node["nodeId"]: node for node in self.call("Accessibility.getFullAXTree")["nodes"]}
        (root,) = (node for node in nodes.values() if "parentId" not in node)

        def walk(node: dict[str, Any], above: tuple[str, ...]) -> Iterator[Spoken]:
            role = node.get("role", {}).get("value", "")
            if not node.get("ignored"):
                levels = [p["value"]["value"] for p in node.get("properties", []) if p["name"] == "level"]
                name, more = (node.get(key, {}).get("value", "") for key in ("name", "description"))
                yield Spoken(role, name, more, levels[0] if levels else 0, above)
                above = (*above, role)
            for child in node.get("childIds", []):
                if child in nodes:
                    yield from walk(nodes[child], above)

        return list(walk(root, ()))

    def _next(self) -> dict[str, Any]:
        while b"\0" not in self._rest:
            block = self._input.read(65536)
            if not block:
                raise RuntimeError("Chromium closed its pipe")
            self._rest += block
        text, _, self._rest = self._rest.partition(b"\0")
        message: dict[str, Any] = json.loads(text)
        return message

    def _note(self, event: dict[str, Any]) -> None:
        parameters = event.get("params", {})
        if event.get("method") == "Network.requestWillBeSent":
            self.requests.append(parameters["request"]["url"])
        elif event.get("method") == "Log.entryAdded":
            self.complaints.append(parameters["entry"]["text"])
        elif event.get("method") == "Runtime.exceptionThrown":
            self.complaints.append(parameters["exceptionDetails"]["text"])
