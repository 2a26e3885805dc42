"""The command `farside`: one file a subcommand."""

import argparse
import io
import os
import sys
from collections.abc import Sequence
from typing import Final

from farside.cli import check, rules, schema
from farside.reading.problems import Refused
from farside.version import VERSION

WRONG: Final = 2


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command line; what is wrong with the call or its input goes to standard error and gives 2."""
    parser = argparse.ArgumentParser(
        prog="farside",
        description="Checks whether each increment of a light-cured filling gets its light.",
        epilog="A planning aid: the maker's instructions, local rules and the licensed clinician come first.",
    )
    parser.add_argument("--version", action="version", version=f"farside {VERSION}")
    commands = parser.add_subparsers(required=True, metavar="COMMAND")
    for command in (check, rules, schema):
        command.add_to(commands)
    _write_in_utf_8()
    called = parser.parse_args(arguments)
    try:
        status: int = called.run(called)
        sys.stdout.flush()
    except BrokenPipeError:
        # Whoever read has gone; what is left unwritten must not be tried again as the interpreter ends.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return WRONG
    except Refused as refused:
        print(refused, file=sys.stderr)
        return WRONG
    except OSError as unreadable:
        print(f"cannot read {unreadable.filename}: {unreadable.strerror}", file=sys.stderr)
        return WRONG
    return status


def _write_in_utf_8() -> None:
    """Let marks, µ and names through whatever the machine's own encoding is; JSON is UTF-8 in any case."""
    for stream in (sys.stdout, sys.stderr):
        if isinstance(stream, io.TextIOWrapper):
            stream.reconfigure(encoding="utf-8", errors="backslashreplace")
