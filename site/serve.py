"""Sets up, builds and serves the page on this machine, and opens it: the one command to see Farside.

python3 site/serve.py [--port 8000] [--no-open] [--no-build] [--as-is]
"""

import argparse
import subprocess
import sys
import webbrowser
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))

import make
from making import environment
from making.environment import say
from making.places import BUILT_SITE
from making.server import Server


def main() -> int:
    parser = argparse.ArgumentParser(description="Sets up, builds and serves the page, and opens it.")
    parser.add_argument("--port", type=int, default=8000, help="where to serve (default 8000; 0 for any that is free)")
    parser.add_argument("--no-open", action="store_true", help="do not open a browser")
    parser.add_argument("--no-build", action="store_true", help="serve what was built last")
    parser.add_argument("--as-is", action="store_true", help="use this Python and Node, install nothing")
    given = parser.parse_args()

    environment.enter(as_is=given.as_is)
    if not given.no_build:
        say("Building the site (half a minute, less when little has changed)")
        try:
            make.build()
        except subprocess.CalledProcessError as error:
            say(f"The build failed at: {' '.join(map(str, error.cmd))[:200]}")
            return 1
    if not BUILT_SITE.is_dir():
        say("Nothing has been built yet; run this without --no-build.")
        return 1
    return serve(given.port, open_it=not given.no_open)


def serve(port: int, *, open_it: bool) -> int:
    """Serves until Ctrl-C."""
    try:
        server = Server(BUILT_SITE, port)
    except OSError as error:
        say(f"Port {port} cannot be used ({error.strerror}). Try another: --port {port + 1}")
        return 1
    with server:
        say(f"Farside is at {server.address}")
        say("After its first visit the page works without a network. Ctrl-C ends this.")
        if open_it and not webbrowser.open(server.address):
            say("No browser could be opened from here; open that address yourself.")
        try:
            server.wait()
        except KeyboardInterrupt:
            say("\nEnded.")
    return 0


if __name__ == "__main__":
    sys.exit(main())
