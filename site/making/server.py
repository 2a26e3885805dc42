"""Serves a built site on this machine, with the headers that a host of the site should send."""

import sys
import threading
from functools import partial
from http.server import SimpleHTTPRequestHandler, ThreadingHTTPServer
from pathlib import Path
from types import TracebackType
from typing import Final, Self

POLICY: Final = "; ".join(
    (
        "default-src 'none'",
        "script-src 'self' 'wasm-unsafe-eval'",
        "worker-src 'self'",
        "connect-src 'self'",
        "style-src 'self'",
        "img-src 'self' data:",
        "font-src 'self'",
        "manifest-src 'self'",
        "base-uri 'none'",
        "form-action 'none'",
        "frame-ancestors 'none'",
    )
)
"""Sent with every file: the worker's own script needs it too. A page's <meta> may not hold frame-ancestors."""

ALWAYS: Final = {
    "Content-Security-Policy": POLICY,
    "X-Content-Type-Options": "nosniff",
    "Referrer-Policy": "no-referrer",
}


class Handler(SimpleHTTPRequestHandler):
    """Static files with the policy, the right types, and no surprise from a cache."""

    protocol_version = "HTTP/1.1"
    extensions_map = {  # noqa: RUF012
        **SimpleHTTPRequestHandler.extensions_map,
        ".js": "text/javascript",
        ".mjs": "text/javascript",
        ".wasm": "application/wasm",
        ".webmanifest": "application/manifest+json",
        ".svg": "image/svg+xml",
    }

    def end_headers(self) -> None:
        for name, value in ALWAYS.items():
            self.send_header(name, value)
        self.send_header("Cache-Control", self._caching())
        super().end_headers()

    def _caching(self) -> str:
        """Files whose name changes with their content may be kept for ever; all others are asked for each time."""
        kept = self.path.startswith("/assets/engine-") or self.path.startswith("/assets/pyodide-")
        return "public, max-age=31536000, immutable" if kept else "no-cache"

    def log_message(self, format: str, *args: object) -> None:  # noqa: A002
        """Says nothing: a page's hundred requests are no news."""


class _Quiet(ThreadingHTTPServer):
    """A browser that leaves a page in the middle of a file is no error."""

    daemon_threads = True

    def handle_error(self, request: object, client_address: object) -> None:
        if not isinstance(sys.exception(), ConnectionError):
            super().handle_error(request, client_address)  # type: ignore[arg-type]


class Server:
    """A site served from its own thread, for use in a `with`.

    Parameters
    ----------
    folder : Path
        The built site.
    port : int
        0 takes any that is free.
    """

    def __init__(self, folder: Path, port: int = 0) -> None:
        self._server = _Quiet(("127.0.0.1", port), partial(Handler, directory=str(folder)))
        self._thread = threading.Thread(target=self._server.serve_forever, daemon=True)

    @property
    def address(self) -> str:
        """Where it is served, with a closing slash."""
        return f"http://127.0.0.1:{self._server.server_address[1]}/"

    def __enter__(self) -> Self:
        self._thread.start()
        return self

    def __exit__(self, kind: type[BaseException] | None, error: BaseException | None, at: TracebackType | None) -> None:
        self._server.shutdown()
        self._server.server_close()
        self._thread.join()

    def wait(self) -> None:
        """Goes on serving until it is interrupted."""
        self._thread.join()
